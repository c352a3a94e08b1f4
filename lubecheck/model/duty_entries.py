"""What a case may say of speed and loads: the tables [[duty]] and [shaft]."""

from __future__ import annotations

from dataclasses import dataclass

from lubecheck.model.entry import Amount, entry_of


@dataclass(frozen=True, slots=True, kw_only=True)
class ShaftForces:
    """Forces on a shaft with two bearings and where they act: keys of [shaft], and of [[duty]], which goes before it.

    A place is the distance from this bearing towards the other: negative on its outer side, as of an overhung rotor.
    """

    span: float | None = entry_of(
        "fact", "length", 1, 1e5, meaning="distance from this bearing to the other", example='"600 mm"'
    )
    rotor_weight: Amount | None = entry_of(
        "fact",
        ("force", "mass"),
        1e-3,
        1e9,
        meaning="weight, or mass, of rotor, fan wheel and shaft together",
        example='"600 N"',
    )
    rotor_at: float | None = entry_of(
        "fact",
        "length",
        -1e5,
        1e5,
        example='"300 mm"',
        meaning="centre of that weight, from this bearing towards the other (negative: overhung)",
    )
    belt_pull: float | None = entry_of(
        "fact", "force", 1e-3, 3e7, meaning="pull of all belts on the shaft, both strands together", example='"1.6 kN"'
    )
    belt_at: float | None = entry_of(
        "fact",
        "length",
        -1e5,
        1e5,
        example='"-90 mm"',
        meaning="middle of the pulley, from this bearing towards the other (negative: overhung)",
    )
    belt_direction: float | None = entry_of(
        "fact",
        "angle",
        -360,
        360,
        example='"90 deg"',
        meaning="direction of the pull, from straight down (90 deg: level, 180 deg: up)",
    )
    coupling_weight: Amount | None = entry_of(
        "fact", ("force", "mass"), 1e-3, 1e9, meaning="weight, or mass, of the half coupling", example='"12 kg"'
    )
    coupling_at: float | None = entry_of(
        "fact",
        "length",
        -1e5,
        1e5,
        example='"-120 mm"',
        meaning="centre of the half coupling, from this bearing towards the other (negative: overhung)",
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class Shaft(ShaftForces):
    """[shaft]: a shaft on two bearings, this one and another, from which the loads follow."""

    opposed: str | None = entry_of(
        "fact",
        meaning='designation of the opposed bearing at the other end, or "same"; axial_load is then that of the shaft, '
        "positive towards this bearing",
        example='"30213"',
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class Duty(ShaftForces):
    """[[duty]]: one state that the position runs in; several with their shares make a duty cycle."""

    speed: float = entry_of("fact", "speed", 0.1, 200_000, meaning="shaft speed", example='"1480 rpm"', need=True)
    radial_load: float | None = entry_of(
        "fact",
        "force",
        0,
        3e7,
        meaning="radial load on this bearing; left out where [shaft] gives the forces",
        example='"1800 N"',
    )
    axial_load: float = entry_of(
        "fact",
        "force",
        -3e7,
        3e7,
        example='"0 N"',
        meaning='axial load on this bearing ("0 N" where there is none)',
        need=True,
    )
    opposed_radial_load: float | None = entry_of(
        "fact", "force", 0, 3e7, meaning="radial load on the opposed bearing of [shaft]", example='"2.4 kN"'
    )
    acceleration: Amount | None = entry_of(
        "fact",
        ("angular acceleration", "time"),
        1e-6,
        1e6,
        meaning="rapid starts or stops: time from rest to speed, or angular acceleration",
        example='"2 s"',
    )
    share: float | None = entry_of("fact", "share", 1e-6, 1, meaning="share of the running time", example='"60 %"')
    ambient: float | None = entry_of(
        "fact", "temperature", -60, 150, meaning="ambient in this state", example='"40 degC"'
    )
    draught: float | None = entry_of(
        "fact", "velocity", 0, 50, meaning="air speed at the housing in this state", example='"2 m/s"'
    )
    shaft_temperature: float | None = entry_of(
        "fact",
        "temperature",
        -60,
        300,
        example='"75 degC"',
        meaning="temperature of the shaft beside the bearing in this state",
    )
