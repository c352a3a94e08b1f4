"""What a case may say of the place: the tables [surroundings] and [housing]."""

from __future__ import annotations

from dataclasses import dataclass

from lubecheck.model.entry import entry_of, words_of
from lubecheck.physics import clearance, grease_corrections, grease_life

RELIEFS = ("open", "closed")
HOUSINGS = ("pedestal", "split plummer", "flange", "motor end shield", "gearbox wall")


@dataclass(frozen=True, slots=True, kw_only=True)
class Surroundings:
    """[surroundings]: where the position stands."""

    ambient: float = entry_of(
        "fact", "temperature", -60, 150, meaning="air temperature round the housing", example='"40 degC"', need=True
    )
    coldest: float | None = entry_of(
        "fact", "temperature", -80, 60, meaning="coldest temperature of a start", example='"-15 degC"'
    )
    draught: float | None = entry_of("fact", "velocity", 0, 50, meaning="air speed at the housing", example='"2 m/s"')
    altitude: float | None = entry_of(
        "fact", "length", -500e3, 5000e3, meaning="height above sea level", example='"300 m"'
    )
    dust: str | None = entry_of("fact", words=words_of(grease_life.DUST), meaning="dust at the position")
    water: str | None = entry_of("fact", words=words_of(grease_life.WATER), meaning="water at the position")
    vibration: str | float | None = entry_of(
        "fact",
        "velocity",
        0,
        1,
        words=words_of(grease_life.VIBRATION),
        meaning="vibration of the machine: a class, or the peak velocity on the bearing housing",
        example='"7 mm/s"',
    )
    orientation: str | None = entry_of("fact", words=words_of(grease_life.ORIENTATION), meaning="how the shaft lies")
    turning_ring: str | None = entry_of(
        "fact", words=words_of(grease_corrections.TURNING_RING), meaning="which ring of the bearing turns"
    )
    air_flow: str | None = entry_of(
        "fact", words=words_of(grease_corrections.AIR_FLOW), meaning="air that passes through the bearing"
    )
    months: tuple[float, ...] | None = entry_of(
        "fact",
        "temperature",
        -60,
        150,
        form="months",
        meaning="mean ambient of the twelve months, January first; goes before `ambient`",
        example='["-3 degC", "-1 degC", ...]',
    )
    ambient_lowest: float | None = entry_of(
        "fact", "temperature", -60, 150, meaning="mean ambient of the coldest month", example='"-3 degC"'
    )
    ambient_highest: float | None = entry_of(
        "fact", "temperature", -60, 150, meaning="mean ambient of the warmest month", example='"31 degC"'
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class Housing:
    """[housing]: how heat leaves, what heat comes in, and where grease can go."""

    kind: str | None = entry_of("fact", words=HOUSINGS, meaning="kind of housing, for its outer area")
    area: float | None = entry_of(
        "fact", "area", 100, 1e8, meaning="outer area that gives off heat", example='"0.12 m^2"'
    )
    mass: float | None = entry_of(
        "fact", "mass", 10, 1e8, meaning="mass of the housing, which sets how fast it warms", example='"14 kg"'
    )
    conductance: float | None = entry_of(
        "fact",
        "conductance",
        0.01,
        1e4,
        example='"1.4 W/K"',
        meaning="all paths from the bearing to the ambient together",
    )
    void: float | None = entry_of(
        "fact", "volume", 0, 1e7, meaning="space for grease beside the bearing", example='"60 cm^3"'
    )
    relief: str | None = entry_of("fact", words=RELIEFS, meaning="relief or drain plug, or grease valve, while running")
    machine_heat: float | None = entry_of(
        "fact", "power", 0, 1e6, meaning="heat from the machine into the bearing", example='"12 W"'
    )
    shaft_temperature: float | None = entry_of(
        "fact", "temperature", -60, 300, example='"75 degC"', meaning="temperature of the shaft beside the bearing"
    )
    frame_temperature: float | None = entry_of(
        "fact", "temperature", -60, 300, example='"60 degC"', meaning="temperature of the base or frame it is bolted to"
    )
    frame_conductance: float | None = entry_of(
        "fact", "conductance", 0, 1e4, example='"5 W/K"', meaning="from the housing into that base or frame"
    )
    solar: float | None = entry_of(
        "fact", "irradiance", 0, 1500, example='"800 W/m^2"', meaning="sun on the housing, square to its rays"
    )
    coolant: str | None = entry_of(
        "fact", meaning="fluid in the cooling jacket: a coolant of the tables or of CoolProp", example='"water"'
    )
    coolant_flow: float | None = entry_of(
        "fact", "flow", 0.001, 1e4, example='"4 l/min"', meaning="flow through the cooling jacket"
    )
    coolant_inlet: float | None = entry_of(
        "fact", "temperature", -60, 150, example='"20 degC"', meaning="coolant temperature at the inlet"
    )
    jacket_area: float | None = entry_of(
        "fact", "area", 100, 1e8, example='"300 cm^2"', meaning="wall that the coolant wets"
    )
    shaft_fit: str | None = entry_of(
        "fact", words=clearance.SHAFT_FITS, meaning="tolerance class of the shaft, to judge the clearance"
    )
    housing_fit: str | None = entry_of(
        "fact", words=clearance.HOUSING_FITS, meaning="tolerance class of the housing bore"
    )
