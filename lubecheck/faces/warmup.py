"""The warm-up for the terminal: courses with their peaks and times, a chart, the cold start."""

from __future__ import annotations

from rich.console import Console
from rich.padding import Padding
from rich.text import Text

from lubecheck.faces.course_chart import Line, course_chart
from lubecheck.faces.display import amount, figure, in_system, is_plain, number, shown_unit
from lubecheck.faces.losses import plain_table
from lubecheck.model.result import Course, WarmUp

LETTERS = {"first start": "F", "start": "S", "after greasing": "G", "cold start": "C"}
_LEAST_HOURS = 4.0  # of a chart


def print_warm_up(warm_up: WarmUp, console: Console, system: str) -> None:
    """Print the courses, the chart, what the set-points meet and the torque of a cold start."""
    unit = shown_unit("degC", system)
    console.print(Text(f"\nWarm-up: what a sensor on the housing shows, {unit}", style="bold"))
    table = plain_table("Course", "from", "peak", "band", "at, h", "end", "steady, h")
    followed = [course for course in warm_up.courses if course.time_h]
    for course in followed:
        read = course.figures.figures
        peak = read["peak"]
        table.add_row(
            Text(f"{LETTERS[course.name]} {course.name}"),
            *(Text(amount(read[name].value, "degC", system)) for name in ("start", "peak")),
            Text(f"{amount(peak.low, 'degC', system)} to {amount(peak.high, 'degC', system)}"),
            Text(number(read["time_of_peak"].value)),
            Text(amount(read["end"].value, "degC", system)),
            Text(number(read["time_to_steady"].value)),
        )
    console.print(Padding(table, (0, 0, 0, 2)))
    if followed:
        for line in _chart(followed, console, system):
            console.print(line)
    lines = [f"{LETTERS[course.name]} {course.name}: {course.meaning}" for course in followed]
    lines += _crossings(followed, system)
    lines += _cold(warm_up, system)
    lines += [in_system(note, system) for note in warm_up.notes]
    for text in lines:
        console.print(Padding(Text(text), (0, 0, 0, 2)))


def _chart(courses: list[Course], console: Console, system: str) -> list[Text]:
    times = (course.figures.figures["time_to_steady"].value or 0.0 for course in courses)
    lines = [Line(LETTERS[course.name], course.time_h, course.sensor) for course in courses]
    levels = {crossing.name: crossing.set_point for course in courses for crossing in course.crossings}
    until = max(_LEAST_HOURS, *(1.2 * time for time in times))
    return course_chart(
        lines, until=until, width=console.width, is_plain=is_plain(console), system=system, levels=levels
    )


def _crossings(courses: list[Course], system: str) -> list[str]:
    """Say of each set-point which courses pass it, when and for how long, and which may with the band."""
    lines = []
    for i, one in enumerate(courses[0].crossings if courses else ()):
        parts = []
        for course in courses:
            crossing, peak = course.crossings[i], course.figures.figures["peak"]
            band = (f"{amount(peak.value, 'degC', system)} ({amount(peak.low, 'degC', system)} to "
                    f"{figure(peak.high, 'degC', system)})")  # fmt: skip
            if crossing.at_h is not None:
                lasts = "for good" if crossing.for_h is None else f"for {number(crossing.for_h)} h"
                parts.append(f"passed in {course.name} after {number(crossing.at_h)} h {lasts}, peak {band}")
            elif crossing.state == "unknown":
                parts.append(f"not known of {course.name}")
            elif crossing.state == "near" or (crossing.use_high or 0.0) >= 1:
                parts.append(f"may be passed in {course.name}, peak {band}")
        at = figure(one.set_point, "degC", system)
        lines.append(f"{one.name} at {at}: {'; '.join(parts) or 'no course comes near it'}")
    return lines


def _cold(warm_up: WarmUp, system: str) -> list[str]:
    if warm_up.cold is None:
        return ["cold start: [surroundings] coldest is not said, so its torque is not known"]
    cold = warm_up.cold.figures
    drive = cold["drive"].value
    parts = [
        f"torque of a start at {figure(cold['temperature'].value, 'degC', system)}: "
        f"{figure(cold['running'].value, 'N*mm', system)} at running speed "
        f"({amount(cold['running'].low, 'N*mm', system)} to {amount(cold['running'].high, 'N*mm', system)})"
    ]
    if cold["breakaway"].value is not None:
        parts.append(f"to break away at most {figure(cold['breakaway'].value, 'N*mm', system)}")
    parts.append(
        "what the drive has is not stated ([limits] start_torque)" if drive is None
        else f"the drive has {figure(drive, 'N*mm', system)} for it"
    )  # fmt: skip
    if cold["starts_from"].value is not None:
        parts.append(f"enough from {figure(cold['starts_from'].value, 'degC', system)} on")
    return ["; ".join(parts)]
