"""What a case may say of the bearing and of its lubricant: the tables [bearing] and [lubricant]."""

from __future__ import annotations

from dataclasses import dataclass

from lubecheck.data import families, lubricants
from lubecheck.data.rolling_bearing import LOAD_TORQUES
from lubecheck.model.entry import entry_of


@dataclass(frozen=True, slots=True, kw_only=True)
class BearingTable:
    """[bearing]: by designation, or by family and dimensions; figures given here win over the tables."""

    designation: str | None = entry_of(
        "fact", meaning="basic designation by DIN 623-1, with usual suffixes", example='"6309"'
    )
    family: str | None = entry_of(
        "fact", words=tuple(families.FAMILIES), meaning="family, where no designation is given"
    )
    bore: float | None = entry_of("fact", "length", 3, 2000, meaning="bore diameter d", example='"45 mm"')
    outside: float | None = entry_of("fact", "length", 6, 3000, meaning="outside diameter D", example='"100 mm"')
    width: float | None = entry_of("fact", "length", 1, 1000, meaning="width B", example='"25 mm"')
    dynamic_rating: float | None = entry_of(
        "fact", "force", 100, 3e7, meaning="basic dynamic load rating C", example='"55.3 kN"'
    )
    static_rating: float | None = entry_of(
        "fact", "force", 50, 6e7, meaning="basic static load rating C0", example='"31.5 kN"'
    )
    fatigue_limit: float | None = entry_of(
        "fact", "force", 1, 5e6, meaning="fatigue load limit Cu", example='"1.34 kN"'
    )
    mass: float | None = entry_of("fact", "mass", 1, 1e7, meaning="mass of the bearing", example='"0.83 kg"')
    contact_angle: float | None = entry_of("fact", "angle", 0, 90, meaning="contact angle", example='"40 deg"')
    clearance: str | None = entry_of("fact", words=("C2", "CN", "C3", "C4", "C5"), meaning="internal clearance class")
    seal: str | None = entry_of("fact", words=("open", "shields", "contact seals"), meaning="seals or shields")
    cage: str | None = entry_of("fact", words=("steel", "brass", "polyamide", "full complement"), meaning="cage")
    f0: float | None = entry_of(
        "fact", "number", 0.3, 40, meaning="viscous friction factor f0 for an oil bath", example="2.3"
    )
    f1: float | None = entry_of("fact", "number", 1e-6, 0.02, meaning="load friction factor f1", example="0.0002")
    load_torque: str | None = entry_of(
        "requirement", words=LOAD_TORQUES, meaning="load factor of friction: constant f1, or z (P0/C0)^y"
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class LubricantTable:
    """[lubricant]: by name from the tables, by a standard's designation, or with its figures."""

    name: str | None = entry_of("fact", meaning="name in the lubricant tables", example='"polyurea-110-2"')
    designation: str | None = entry_of("fact", meaning="designation by a standard", example='"KP2K-30"')
    kind: str | None = entry_of("fact", words=lubricants.LUBRICANT_KINDS, meaning="grease or oil")
    nu_40: float | None = entry_of(
        "fact",
        "kinematic viscosity",
        1.5,
        20000,
        meaning="kinematic viscosity of the (base) oil at 40 degC",
        example='"110 mm^2/s"',
    )
    nu_100: float | None = entry_of(
        "fact",
        "kinematic viscosity",
        0.8,
        2000,
        meaning="kinematic viscosity of the (base) oil at 100 degC",
        example='"12 mm^2/s"',
    )
    index: float | None = entry_of("fact", "number", 0, 400, meaning="viscosity index", example="95")
    saybolt_100: float | None = entry_of(
        "fact", "Saybolt viscosity", 33, 1e5, meaning="Saybolt Universal seconds at 100 degF", example='"315 SUS"'
    )
    saybolt_210: float | None = entry_of(
        "fact", "Saybolt viscosity", 33, 1e4, meaning="Saybolt Universal seconds at 210 degF", example='"54 SUS"'
    )
    thickener: str | None = entry_of("fact", words=lubricants.THICKENERS, meaning="thickener of the grease")
    base_oil: str | None = entry_of("fact", words=lubricants.BASE_OILS, meaning="kind of base oil")
    nlgi: str | None = entry_of(
        "fact", words=("000", "00", "0", "1", "2", "3", "4", "5", "6"), meaning="NLGI consistency grade"
    )
    lowest: float | None = entry_of(
        "fact", "temperature", -100, 60, meaning="lowest temperature of use", example='"-30 degC"'
    )
    highest: float | None = entry_of(
        "fact", "temperature", 20, 350, meaning="highest temperature of use", example='"140 degC"'
    )
    life_reference: float | None = entry_of(
        "fact",
        "temperature",
        40,
        250,
        example='"70 degC"',
        meaning="temperature above which grease life halves by steps",
    )
    density_15: float | None = entry_of(
        "fact", "density", 600, 2200, meaning="density at 15 degC", example='"890 kg/m^3"'
    )
    ep: bool | None = entry_of("fact", meaning="proven EP additive: true or false")
    measured_viscosity: str | None = entry_of(
        "fact",
        meaning="viscosity of the oil in use by analysis; replaces the fresh one",
        example='"98 mm^2/s at 40 degC"',
    )
    water: float | None = entry_of(
        "fact", "share", 0, 0.1, meaning="water in the oil in use by analysis, by mass", example='"200 ppm"'
    )
    iso_code: str | None = entry_of(
        "fact", meaning="cleanliness of the oil in use by analysis, ISO 4406", example='"19/17/14"'
    )
