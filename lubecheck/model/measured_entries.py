"""What a case may say of temperatures that were measured: the tables [measured] or [[measured]]."""

from __future__ import annotations

from dataclasses import dataclass

from lubecheck.model.entry import Amount, entry_of

# Where a sensor can sit; the model has one temperature for outer ring and housing, and one for inner ring and shaft.
PLACES = ("housing", "outer ring", "inner ring", "shaft", "oil outlet")


@dataclass(frozen=True, slots=True, kw_only=True)
class Measured:
    """[measured]: a temperature read at a known state; what is left out is as the case has it."""

    temperature: float = entry_of(
        "fact", "temperature", -60, 400, meaning="temperature that was read", example='"64 degC"', need=True
    )
    place: str | None = entry_of("fact", words=PLACES, meaning="where it was read")
    duty: float | None = entry_of(
        "fact", "number", 1, 1000, meaning="duty point that was running, counted from 1", example="2"
    )
    speed: float | None = entry_of(
        "fact", "speed", 0.1, 200_000, meaning="shaft speed at the reading", example='"1480 rpm"'
    )
    radial_load: float | None = entry_of(
        "fact", "force", 0, 3e7, meaning="radial load at the reading", example='"1800 N"'
    )
    axial_load: float | None = entry_of(
        "fact", "force", -3e7, 3e7, meaning="axial load at the reading", example='"200 N"'
    )
    ambient: float | None = entry_of(
        "fact", "temperature", -60, 150, meaning="air temperature at the reading", example='"21 degC"'
    )
    draught: float | None = entry_of(
        "fact", "velocity", 0, 50, meaning="air speed at the housing at the reading", example='"2 m/s"'
    )
    shaft_temperature: float | None = entry_of(
        "fact",
        "temperature",
        -60,
        300,
        example='"75 degC"',
        meaning="temperature of the shaft beside the bearing at the reading",
    )
    fill: Amount | None = entry_of(
        "fact", ("mass", "volume", "share"), 0, 1e7, meaning="grease in the bearing at the reading", example='"15 g"'
    )
    reading_error: float | None = entry_of(
        "fact",
        "temperature difference",
        0.1,
        20,
        example='"2 K"',
        meaning="what the reading is good to, 95 times of 100",
    )
    running_time: float | None = entry_of(
        "fact", "time", 0, 1e6, meaning="running time since the start or the last greasing", example='"30 h"'
    )
