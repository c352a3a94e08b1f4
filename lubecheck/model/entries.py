"""What a case may say: one dataclass a table, one entry a key, with kind, range and meaning as data on the field.

The reader, the help, the listing of assumptions and the schema all read these fields, so that a key is described once.
A field is a *fact* of the position (left out: a listed, cautious reading or `unknown`), a *decision* of the user (left
out: proposed), or a *requirement* (left out: a listed default).
"""

from __future__ import annotations

import dataclasses
from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from typing import Any

from lubecheck.data import families, lubricants
from lubecheck.data.bearings import Bearing
from lubecheck.data.cleanliness import setting_of
from lubecheck.data.oil_analysis import OilAnalysis
from lubecheck.data.rolling_bearing import LOAD_TORQUES
from lubecheck.model.cleanliness import stated_setting
from lubecheck.physics import cleanliness, clearance, fatigue, grease_amount, grease_corrections, grease_life
from lubecheck.units import KINDS

SUPPLIES = ("bath", "circulating", "jet", "mist")
STREAMS = ("circulating", "jet")  # supplies whose oil flows through the bearing and takes heat along
RELIEFS = ("open", "closed")
HOUSINGS = ("pedestal", "split plummer", "flange", "motor end shield", "gearbox wall")
FILTERS = ("in line", "off line", "none")
SERVICES = ("quiet", "normal", "shock")


@dataclass(frozen=True, slots=True)
class Entry:
    """One key of a case: the kinds or words it takes, the accepted range in the house unit, and what it means."""

    role: str  # "fact", "decision", "requirement" or "label"
    kinds: tuple[str, ...]  # unit kinds; empty for words and text
    low: float
    high: float
    words: tuple[str, ...]
    meaning: str
    example: str
    is_need: bool
    form: str = ""  # "date", "months" or "strokes" where the value is read in a way of its own

    @property
    def expected(self) -> str:
        """What the key takes, in words for a message."""
        if self.form == "date":
            return f"a date as year-month-day, such as {self.example}"
        if self.form == "months":
            return f"twelve temperatures, January first, {self.low:g} to {self.high:g} degC, such as {self.example}"
        parts = []
        if self.form == "strokes":
            parts.append(f"a count of strokes such as {self.example}, or")
        if len(self.kinds) > 1:
            units = " or ".join(KINDS[name].unit for name in self.kinds if not KINDS[name].is_bare)
            share = ", or a share of at most 100 %" if "share" in self.kinds else ""
            named = " or ".join(name for name in self.kinds if name != "share")
            parts.append(f"a {named}, {self.low:g} to {self.high:g} {units}{share}, such as {self.example}")
        elif self.kinds:
            kind = KINDS[self.kinds[0]]
            unit = "" if kind.is_bare else f" {kind.unit}"
            parts.append(f"a {kind.name}, {self.low:g} to {self.high:g}{unit}, such as {self.example}")
        if self.words:
            parts.append("one of " + ", ".join(self.words) if not self.kinds else f"or {' or '.join(self.words)}")
        return " ".join(parts) or "a text"


def _words(answers: Sequence[grease_life.Answer]) -> tuple[str, ...]:
    return tuple(answer.word for answer in answers)


def _entry(
    role: str,
    kinds: str | tuple[str, ...] = (),
    low: float = 0.0,
    high: float = 0.0,
    *,
    words: tuple[str, ...] = (),
    meaning: str,
    example: str = "",
    need: bool = False,
    form: str = "",
) -> Any:
    kinds = (kinds,) if isinstance(kinds, str) else kinds
    entry = Entry(role, kinds, low, high, words, meaning, example, need, form)
    if need:
        return dataclasses.field(metadata={"entry": entry})
    return dataclasses.field(default=None, metadata={"entry": entry})


entry_of = _entry  # for tables of other files


@dataclass(frozen=True, slots=True)
class Amount:
    """A quantity that may come in more than one kind: its number in the house unit of the kind it came in."""

    value: float
    kind: str
    word: str  # the unit the user wrote

    @property
    def is_calendar(self) -> bool:
        """A time in days, weeks, months or years runs by the calendar; one in hours or less is running time."""
        return self.kind == "time" and self.word not in ("h", "hour", "hours", "hr", "min", "s")


@dataclass(frozen=True, slots=True, kw_only=True)
class BearingTable:
    """[bearing]: by designation, or by family and dimensions; figures given here win over the tables."""

    designation: str | None = _entry(
        "fact", meaning="basic designation by DIN 623-1, with usual suffixes", example='"6309"'
    )
    family: str | None = _entry("fact", words=tuple(families.FAMILIES), meaning="family, where no designation is given")
    bore: float | None = _entry("fact", "length", 3, 2000, meaning="bore diameter d", example='"45 mm"')
    outside: float | None = _entry("fact", "length", 6, 3000, meaning="outside diameter D", example='"100 mm"')
    width: float | None = _entry("fact", "length", 1, 1000, meaning="width B", example='"25 mm"')
    dynamic_rating: float | None = _entry(
        "fact", "force", 100, 3e7, meaning="basic dynamic load rating C", example='"55.3 kN"'
    )
    static_rating: float | None = _entry(
        "fact", "force", 50, 6e7, meaning="basic static load rating C0", example='"31.5 kN"'
    )
    fatigue_limit: float | None = _entry("fact", "force", 1, 5e6, meaning="fatigue load limit Cu", example='"1.34 kN"')
    mass: float | None = _entry("fact", "mass", 1, 1e7, meaning="mass of the bearing", example='"0.83 kg"')
    contact_angle: float | None = _entry("fact", "angle", 0, 90, meaning="contact angle", example='"40 deg"')
    clearance: str | None = _entry("fact", words=("C2", "CN", "C3", "C4", "C5"), meaning="internal clearance class")
    seal: str | None = _entry("fact", words=("open", "shields", "contact seals"), meaning="seals or shields")
    cage: str | None = _entry("fact", words=("steel", "brass", "polyamide", "full complement"), meaning="cage")
    f0: float | None = _entry(
        "fact", "number", 0.3, 40, meaning="viscous friction factor f0 for an oil bath", example="2.3"
    )
    f1: float | None = _entry("fact", "number", 1e-6, 0.02, meaning="load friction factor f1", example="0.0002")
    load_torque: str | None = _entry(
        "requirement", words=LOAD_TORQUES, meaning="load factor of friction: constant f1, or z (P0/C0)^y"
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class LubricantTable:
    """[lubricant]: by name from the tables, by a standard's designation, or with its figures."""

    name: str | None = _entry("fact", meaning="name in the lubricant tables", example='"polyurea-110-2"')
    designation: str | None = _entry("fact", meaning="designation by a standard", example='"KP2K-30"')
    kind: str | None = _entry("fact", words=lubricants.LUBRICANT_KINDS, meaning="grease or oil")
    nu_40: float | None = _entry(
        "fact",
        "kinematic viscosity",
        1.5,
        20000,
        meaning="kinematic viscosity of the (base) oil at 40 degC",
        example='"110 mm^2/s"',
    )
    nu_100: float | None = _entry(
        "fact",
        "kinematic viscosity",
        0.8,
        2000,
        meaning="kinematic viscosity of the (base) oil at 100 degC",
        example='"12 mm^2/s"',
    )
    index: float | None = _entry("fact", "number", 0, 400, meaning="viscosity index", example="95")
    saybolt_100: float | None = _entry(
        "fact", "Saybolt viscosity", 33, 1e5, meaning="Saybolt Universal seconds at 100 degF", example='"315 SUS"'
    )
    saybolt_210: float | None = _entry(
        "fact", "Saybolt viscosity", 33, 1e4, meaning="Saybolt Universal seconds at 210 degF", example='"54 SUS"'
    )
    thickener: str | None = _entry("fact", words=lubricants.THICKENERS, meaning="thickener of the grease")
    base_oil: str | None = _entry("fact", words=lubricants.BASE_OILS, meaning="kind of base oil")
    nlgi: str | None = _entry(
        "fact", words=("000", "00", "0", "1", "2", "3", "4", "5", "6"), meaning="NLGI consistency grade"
    )
    lowest: float | None = _entry(
        "fact", "temperature", -100, 60, meaning="lowest temperature of use", example='"-30 degC"'
    )
    highest: float | None = _entry(
        "fact", "temperature", 20, 350, meaning="highest temperature of use", example='"140 degC"'
    )
    life_reference: float | None = _entry(
        "fact",
        "temperature",
        40,
        250,
        example='"70 degC"',
        meaning="temperature above which grease life halves by steps",
    )
    density_15: float | None = _entry(
        "fact", "density", 600, 2200, meaning="density at 15 degC", example='"890 kg/m^3"'
    )
    ep: bool | None = _entry("fact", meaning="proven EP additive: true or false")
    measured_viscosity: str | None = _entry(
        "fact",
        meaning="viscosity of the oil in use by analysis; replaces the fresh one",
        example='"98 mm^2/s at 40 degC"',
    )
    water: float | None = _entry(
        "fact", "share", 0, 0.1, meaning="water in the oil in use by analysis, by mass", example='"200 ppm"'
    )
    iso_code: str | None = _entry(
        "fact", meaning="cleanliness of the oil in use by analysis, ISO 4406", example='"19/17/14"'
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class ShaftForces:
    """Forces on a shaft with two bearings and where they act: keys of [shaft], and of [[duty]], which goes before it.

    A place is the distance from this bearing towards the other: negative on its outer side, as of an overhung rotor.
    """

    span: float | None = _entry(
        "fact", "length", 1, 1e5, meaning="distance from this bearing to the other", example='"600 mm"'
    )
    rotor_weight: Amount | None = _entry(
        "fact",
        ("force", "mass"),
        1e-3,
        1e9,
        meaning="weight, or mass, of rotor, fan wheel and shaft together",
        example='"600 N"',
    )
    rotor_at: float | None = _entry(
        "fact",
        "length",
        -1e5,
        1e5,
        example='"300 mm"',
        meaning="centre of that weight, from this bearing towards the other (negative: overhung)",
    )
    belt_pull: float | None = _entry(
        "fact", "force", 1e-3, 3e7, meaning="pull of all belts on the shaft, both strands together", example='"1.6 kN"'
    )
    belt_at: float | None = _entry(
        "fact",
        "length",
        -1e5,
        1e5,
        example='"-90 mm"',
        meaning="middle of the pulley, from this bearing towards the other (negative: overhung)",
    )
    belt_direction: float | None = _entry(
        "fact",
        "angle",
        -360,
        360,
        example='"90 deg"',
        meaning="direction of the pull, from straight down (90 deg: level, 180 deg: up)",
    )
    coupling_weight: Amount | None = _entry(
        "fact", ("force", "mass"), 1e-3, 1e9, meaning="weight, or mass, of the half coupling", example='"12 kg"'
    )
    coupling_at: float | None = _entry(
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

    opposed: str | None = _entry(
        "fact",
        meaning='designation of the opposed bearing at the other end, or "same"; axial_load is then that of the shaft, '
        "positive towards this bearing",
        example='"30213"',
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class Duty(ShaftForces):
    """[[duty]]: one state that the position runs in; several with their shares make a duty cycle."""

    speed: float = _entry("fact", "speed", 0.1, 200_000, meaning="shaft speed", example='"1480 rpm"', need=True)
    radial_load: float | None = _entry(
        "fact",
        "force",
        0,
        3e7,
        meaning="radial load on this bearing; left out where [shaft] gives the forces",
        example='"1800 N"',
    )
    axial_load: float = _entry(
        "fact",
        "force",
        -3e7,
        3e7,
        example='"0 N"',
        meaning='axial load on this bearing ("0 N" where there is none)',
        need=True,
    )
    opposed_radial_load: float | None = _entry(
        "fact", "force", 0, 3e7, meaning="radial load on the opposed bearing of [shaft]", example='"2.4 kN"'
    )
    acceleration: Amount | None = _entry(
        "fact",
        ("angular acceleration", "time"),
        1e-6,
        1e6,
        meaning="rapid starts or stops: time from rest to speed, or angular acceleration",
        example='"2 s"',
    )
    share: float | None = _entry("fact", "share", 1e-6, 1, meaning="share of the running time", example='"60 %"')
    ambient: float | None = _entry(
        "fact", "temperature", -60, 150, meaning="ambient in this state", example='"40 degC"'
    )
    draught: float | None = _entry(
        "fact", "velocity", 0, 50, meaning="air speed at the housing in this state", example='"2 m/s"'
    )
    shaft_temperature: float | None = _entry(
        "fact",
        "temperature",
        -60,
        300,
        example='"75 degC"',
        meaning="temperature of the shaft beside the bearing in this state",
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class Surroundings:
    """[surroundings]: where the position stands."""

    ambient: float = _entry(
        "fact", "temperature", -60, 150, meaning="air temperature round the housing", example='"40 degC"', need=True
    )
    coldest: float | None = _entry(
        "fact", "temperature", -80, 60, meaning="coldest temperature of a start", example='"-15 degC"'
    )
    draught: float | None = _entry("fact", "velocity", 0, 50, meaning="air speed at the housing", example='"2 m/s"')
    altitude: float | None = _entry(
        "fact", "length", -500e3, 5000e3, meaning="height above sea level", example='"300 m"'
    )
    dust: str | None = _entry("fact", words=_words(grease_life.DUST), meaning="dust at the position")
    water: str | None = _entry("fact", words=_words(grease_life.WATER), meaning="water at the position")
    vibration: str | float | None = _entry(
        "fact",
        "velocity",
        0,
        1,
        words=_words(grease_life.VIBRATION),
        meaning="vibration of the machine: a class, or the peak velocity on the bearing housing",
        example='"7 mm/s"',
    )
    orientation: str | None = _entry("fact", words=_words(grease_life.ORIENTATION), meaning="how the shaft lies")
    turning_ring: str | None = _entry(
        "fact", words=_words(grease_corrections.TURNING_RING), meaning="which ring of the bearing turns"
    )
    air_flow: str | None = _entry(
        "fact", words=_words(grease_corrections.AIR_FLOW), meaning="air that passes through the bearing"
    )
    months: tuple[float, ...] | None = _entry(
        "fact",
        "temperature",
        -60,
        150,
        form="months",
        meaning="mean ambient of the twelve months, January first; goes before `ambient`",
        example='["-3 degC", "-1 degC", ...]',
    )
    ambient_lowest: float | None = _entry(
        "fact", "temperature", -60, 150, meaning="mean ambient of the coldest month", example='"-3 degC"'
    )
    ambient_highest: float | None = _entry(
        "fact", "temperature", -60, 150, meaning="mean ambient of the warmest month", example='"31 degC"'
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class Housing:
    """[housing]: how heat leaves, what heat comes in, and where grease can go."""

    kind: str | None = _entry("fact", words=HOUSINGS, meaning="kind of housing, for its outer area")
    area: float | None = _entry(
        "fact", "area", 100, 1e8, meaning="outer area that gives off heat", example='"0.12 m^2"'
    )
    conductance: float | None = _entry(
        "fact",
        "conductance",
        0.01,
        1e4,
        example='"1.4 W/K"',
        meaning="all paths from the bearing to the ambient together",
    )
    void: float | None = _entry(
        "fact", "volume", 0, 1e7, meaning="space for grease beside the bearing", example='"60 cm^3"'
    )
    relief: str | None = _entry("fact", words=RELIEFS, meaning="relief or drain plug while running")
    machine_heat: float | None = _entry(
        "fact", "power", 0, 1e6, meaning="heat from the machine into the bearing", example='"12 W"'
    )
    shaft_temperature: float | None = _entry(
        "fact", "temperature", -60, 300, example='"75 degC"', meaning="temperature of the shaft beside the bearing"
    )
    frame_temperature: float | None = _entry(
        "fact", "temperature", -60, 300, example='"60 degC"', meaning="temperature of the base or frame it is bolted to"
    )
    frame_conductance: float | None = _entry(
        "fact", "conductance", 0, 1e4, example='"5 W/K"', meaning="from the housing into that base or frame"
    )
    solar: float | None = _entry(
        "fact", "irradiance", 0, 1500, example='"800 W/m^2"', meaning="sun on the housing, square to its rays"
    )
    coolant: str | None = _entry(
        "fact", meaning="fluid in the cooling jacket: a coolant of the tables or of CoolProp", example='"water"'
    )
    coolant_flow: float | None = _entry(
        "fact", "flow", 0.001, 1e4, example='"4 l/min"', meaning="flow through the cooling jacket"
    )
    coolant_inlet: float | None = _entry(
        "fact", "temperature", -60, 150, example='"20 degC"', meaning="coolant temperature at the inlet"
    )
    jacket_area: float | None = _entry(
        "fact", "area", 100, 1e8, example='"300 cm^2"', meaning="wall that the coolant wets"
    )
    shaft_fit: str | None = _entry(
        "fact", words=clearance.SHAFT_FITS, meaning="tolerance class of the shaft, to judge the clearance"
    )
    housing_fit: str | None = _entry(
        "fact", words=clearance.HOUSING_FITS, meaning="tolerance class of the housing bore"
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class GreasePlan:
    """[grease]: what is, or is planned to be, in the bearing and how often it is renewed."""

    fill: Amount | str | None = _entry(
        "decision",
        ("mass", "volume", "share"),
        0,
        1e7,
        words=("unknown",),
        meaning="grease in the bearing: mass, volume or share of its free volume",
        example='"15 g"',
    )
    housing_fill: float | None = _entry(
        "decision", "share", 0, 1, meaning="share of the housing's space filled", example='"40 %"'
    )
    regrease_amount: Amount | None = _entry(
        "decision", ("mass", "volume"), 0, 1e7, example='"12 g"', meaning="grease given at each regreasing"
    )
    interval: Amount | None = _entry(
        "decision",
        "time",
        1,
        400_000,
        example='"18 week"',
        meaning="time between regreasings: running hours, or calendar days to years",
    )
    hours_per_day: float | None = _entry("fact", "time", 0.1, 24, meaning="running time in a day", example='"16 h"')
    stroke: Amount | None = _entry(
        "fact",
        ("mass", "volume"),
        0.05,
        50,
        example='"1.2 g"',
        meaning="what one stroke of your grease gun gives, weighed",
    )
    rule: str | None = _entry(
        "decision",
        words=tuple(grease_amount.REGREASE_GRAMS),
        meaning="rule of the regrease amount: from the side, through the ring's groove, or a weekly or monthly rhythm",
    )
    cartridge: Amount | None = _entry(
        "fact", ("mass", "volume"), 10, 50_000, meaning="what a cartridge holds", example='"400 g"'
    )
    shutdown: float | None = _entry(
        "fact", "time", 0, 8000, meaning="standstill of the plant in a year", example='"3 week"'
    )
    last_done: str | None = _entry("fact", form="date", meaning="day of the last regreasing", example='"2026-05-04"')
    hours_run: float | None = _entry(
        "fact", "time", 0, 1e6, meaning="hour meter: running hours since the last regreasing", example='"1200 h"'
    )
    given: Amount | None = _entry(
        "fact",
        ("mass", "volume"),
        0,
        1e7,
        form="strokes",
        meaning="grease that was given on top of `fill`: strokes, mass or volume",
        example='"12 strokes"',
    )
    given_on: str | None = _entry("fact", form="date", meaning="day that it was given", example='"2026-11-27"')
    regreasings: float | None = _entry(
        "fact", "number", 0, 10_000, meaning="regreasings since the first fill, before `given`", example="3"
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class OilPlan:
    """[oil]: how the oil reaches the bearing and how often it is changed."""

    supply: str | None = _entry("fact", words=SUPPLIES, meaning="how the oil is supplied")
    level: float | None = _entry(
        "fact",
        "length",
        -500,
        2000,
        example='"0 mm"',
        meaning="oil level at rest above (+) or below (-) the centre of the lowest element",
    )
    flow: float | None = _entry("fact", "flow", 0, 1e4, meaning="oil flow through the bearing", example='"1.5 l/min"')
    inlet: float | None = _entry(
        "fact", "temperature", -20, 150, meaning="oil temperature at the inlet", example='"45 degC"'
    )
    contact: float | None = _entry(
        "fact", "share", 0.05, 1, example='"50 %"', meaning="share of its warming that the oil takes in the bearing"
    )
    interval: Amount | None = _entry(
        "decision", "time", 1, 400_000, meaning="time between oil changes", example='"6 month"'
    )
    hours_per_day: float | None = _entry("fact", "time", 0.1, 24, meaning="running time in a day", example='"16 h"')
    volume: float | None = _entry(
        "fact", "volume", 1, 1e8, meaning="oil in the bath or circuit: the change quantity", example='"1.2 l"'
    )
    last_done: str | None = _entry("fact", form="date", meaning="day of the last oil change", example='"2026-05-04"')
    hours_run: float | None = _entry(
        "fact", "time", 0, 1e6, meaning="hour meter: running hours since the last oil change", example='"1200 h"'
    )
    shutdown: float | None = _entry(
        "fact", "time", 0, 8000, meaning="standstill of the plant in a year", example='"3 week"'
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class Cleanliness:
    """[cleanliness]: what dirt the lubricant carries."""

    setting: str | None = _entry("fact", words=fatigue.SETTINGS[:-1], meaning="cleanliness by ISO 281 annex A")
    described: str | None = _entry("fact", words=cleanliness.WORDS, meaning="cleanliness in plain words")
    code: str | None = _entry("fact", meaning="cleanliness of the oil by ISO 4406", example='"18/15/12"')
    count_6: float | None = _entry(
        "fact", "number", 0, 2.5e6, meaning="oil analysis: particles over 6 um per ml", example="210"
    )
    count_14: float | None = _entry(
        "fact", "number", 0, 2.5e6, meaning="oil analysis: particles over 14 um per ml", example="38"
    )
    filter: str | None = _entry("fact", words=FILTERS, meaning="where the oil is filtered")
    filter_size: float | None = _entry(
        "fact", "length", 1e-4, 1, meaning="particle size that the filter's beta is for", example='"12 um"'
    )
    filter_beta: float | None = _entry(
        "fact", "number", 1, 1e5, meaning="filter beta: particles before over those after it", example="200"
    )
    water: float | None = _entry("fact", "share", 0, 1, meaning="water in the oil, by mass", example='"100 ppm"')


@dataclass(frozen=True, slots=True, kw_only=True)
class Requirements:
    """[limits]: the user's own limits, replacing the defaults."""

    life: float | None = _entry(
        "requirement", "time", 10, 1e6, meaning="modified rating life wanted", example='"40000 h"'
    )
    reliability: float | None = _entry(
        "requirement", "share", 0.5, 0.9995, meaning="reliability of that life", example='"90 %"'
    )
    grease_reliability: float | None = _entry(
        "requirement",
        "share",
        0.5,
        0.999,
        example='"99 %"',
        meaning="share of bearings whose grease still serves at the end of its interval or life",
    )
    highest_temperature: float | None = _entry(
        "requirement", "temperature", 20, 350, example='"95 degC"', meaning="highest bearing temperature"
    )
    least_viscosity_ratio: float | None = _entry(
        "requirement", "number", 0.1, 10, example="1.0", meaning="least viscosity ratio kappa"
    )
    static_safety: float | None = _entry(
        "requirement", "number", 0.3, 20, meaning="least static safety S0", example="2"
    )
    service: str | None = _entry("requirement", words=SERVICES, meaning="class of running for static safety")


@dataclass(frozen=True, slots=True, kw_only=True)
class Case:
    """One bearing position, as the user described it."""

    title: str = ""
    note: str = ""
    bearing: Bearing
    lubricant: lubricants.Lubricant
    duty: tuple[Duty, ...]
    surroundings: Surroundings
    shaft: Shaft = Shaft()
    opposed: Bearing | None = None  # the bearing that [shaft] opposed names
    housing: Housing = Housing()
    grease: GreasePlan = GreasePlan()
    oil: OilPlan = OilPlan()
    cleanliness: Cleanliness = Cleanliness()
    limits: Requirements = Requirements()
    analysis: OilAnalysis | None = None  # of the oil in use; `lubricant` is then the oil as it is now
    given: tuple[tuple[str, str], ...] = ()  # "table.key" and the text the user wrote, in their order

    @property
    def is_grease(self) -> bool:
        """The position is grease lubricated."""
        return self.lubricant.kind == "grease"

    @property
    def setting(self) -> str | None:
        """The cleanliness as stated, or else by the code of the oil in use."""
        stated = self.stated_setting
        if stated is not None or self.analysis is None or self.analysis.code is None:
            return None if stated == fatigue.OFF_SCALE else stated
        return setting_of(self.analysis.code)

    @property
    def is_beyond_settings(self) -> bool:
        """The oil is dirtier than ISO 281 has a setting for, by what is stated or else by the oil in use."""
        if self.stated_setting is not None:
            return self.stated_setting == fatigue.OFF_SCALE
        return self.setting is None and self.analysis is not None and self.analysis.code is not None

    @property
    def stated_setting(self) -> str | None:
        """The cleanliness as [cleanliness] states it, in one way or another."""
        return stated_setting(self.cleanliness, is_grease=self.is_grease, supply=self.oil.supply)

    @property
    def water(self) -> float | None:
        """Water in the oil as stated, or else by the analysis of the oil in use."""
        if self.cleanliness.water is not None or self.analysis is None:
            return self.cleanliness.water
        return self.analysis.water


TABLES: dict[str, type] = {
    "bearing": BearingTable,
    "lubricant": LubricantTable,
    "duty": Duty,
    "shaft": Shaft,
    "surroundings": Surroundings,
    "housing": Housing,
    "grease": GreasePlan,
    "oil": OilPlan,
    "cleanliness": Cleanliness,
    "limits": Requirements,
}


def entries(table: type) -> Iterator[tuple[str, Entry]]:
    """Return each key of a table with its entry."""
    for field in dataclasses.fields(table):
        yield field.name, field.metadata["entry"]
