"""What a case may say of the lubricant in the bearing and how it is renewed: the tables [grease] and [oil]."""

from __future__ import annotations

from dataclasses import dataclass

from lubecheck.model.entry import Amount, entry_of
from lubecheck.physics import grease_amount

SUPPLIES = ("bath", "circulating", "jet", "mist")
STREAMS = ("circulating", "jet")  # supplies whose oil flows through the bearing and takes heat along


@dataclass(frozen=True, slots=True, kw_only=True)
class GreasePlan:
    """[grease]: what is, or is planned to be, in the bearing and how often it is renewed."""

    fill: Amount | str | None = entry_of(
        "decision",
        ("mass", "volume", "share"),
        0,
        1e7,
        words=("unknown",),
        meaning="grease in the bearing: mass, volume or share of its free volume",
        example='"15 g"',
    )
    housing_fill: float | None = entry_of(
        "decision", "share", 0, 1, meaning="share of the housing's space filled", example='"40 %"'
    )
    regrease_amount: Amount | None = entry_of(
        "decision", ("mass", "volume"), 0, 1e7, example='"12 g"', meaning="grease given at each regreasing"
    )
    interval: Amount | None = entry_of(
        "decision",
        "time",
        1,
        400_000,
        example='"18 week"',
        meaning="time between regreasings: running hours, or calendar days to years",
    )
    hours_per_day: float | None = entry_of("fact", "time", 0.1, 24, meaning="running time in a day", example='"16 h"')
    stroke: Amount | None = entry_of(
        "fact",
        ("mass", "volume"),
        0.05,
        50,
        example='"1.2 g"',
        meaning="what one stroke of your grease gun gives, weighed",
    )
    rule: str | None = entry_of(
        "decision",
        words=tuple(grease_amount.REGREASE_GRAMS),
        meaning="rule of the regrease amount: from the side, through the ring's groove, or a weekly or monthly rhythm",
    )
    cartridge: Amount | None = entry_of(
        "fact", ("mass", "volume"), 10, 50_000, meaning="what a cartridge holds", example='"400 g"'
    )
    shutdown: float | None = entry_of(
        "fact", "time", 0, 8000, meaning="standstill of the plant in a year", example='"3 week"'
    )
    last_done: str | None = entry_of("fact", form="date", meaning="day of the last regreasing", example='"2026-05-04"')
    hours_run: float | None = entry_of(
        "fact", "time", 0, 1e6, meaning="hour meter: running hours since the last regreasing", example='"1200 h"'
    )
    given: Amount | None = entry_of(
        "fact",
        ("mass", "volume"),
        0,
        1e7,
        form="strokes",
        meaning="grease that was given on top of `fill`: strokes, mass or volume",
        example='"12 strokes"',
    )
    given_on: str | None = entry_of("fact", form="date", meaning="day that it was given", example='"2026-11-27"')
    regreasings: float | None = entry_of(
        "fact", "number", 0, 10_000, meaning="regreasings since the first fill, before `given`", example="3"
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class OilPlan:
    """[oil]: how the oil reaches the bearing and how often it is changed."""

    supply: str | None = entry_of("fact", words=SUPPLIES, meaning="how the oil is supplied")
    level: float | None = entry_of(
        "fact",
        "length",
        -500,
        2000,
        example='"0 mm"',
        meaning="oil level at rest above (+) or below (-) the centre of the lowest element",
    )
    flow: float | None = entry_of("fact", "flow", 0, 1e4, meaning="oil flow through the bearing", example='"1.5 l/min"')
    inlet: float | None = entry_of(
        "fact", "temperature", -20, 150, meaning="oil temperature at the inlet", example='"45 degC"'
    )
    contact: float | None = entry_of(
        "fact", "share", 0.05, 1, example='"50 %"', meaning="share of its warming that the oil takes in the bearing"
    )
    interval: Amount | None = entry_of(
        "decision", "time", 1, 400_000, meaning="time between oil changes", example='"6 month"'
    )
    hours_per_day: float | None = entry_of("fact", "time", 0.1, 24, meaning="running time in a day", example='"16 h"')
    volume: float | None = entry_of(
        "fact", "volume", 1, 1e8, meaning="oil in the bath or circuit: the change quantity", example='"1.2 l"'
    )
    last_done: str | None = entry_of("fact", form="date", meaning="day of the last oil change", example='"2026-05-04"')
    hours_run: float | None = entry_of(
        "fact", "time", 0, 1e6, meaning="hour meter: running hours since the last oil change", example='"1200 h"'
    )
    shutdown: float | None = entry_of(
        "fact", "time", 0, 8000, meaning="standstill of the plant in a year", example='"3 week"'
    )
