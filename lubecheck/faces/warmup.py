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
    """Say of each set-point which courses pass it, which come near, and which could not be judged."""
    lines = []
    for i, one in enumerate(courses[0].crossings if courses else ()):
        met = {course.name: course.crossings[i] for course in courses}
        passed = [f"{name} (after {number(c.at_h)} h)" for name, c in met.items() if c.at_h is not None]
        near = [name for name, c in met.items() if c.state == "near"]
        unknown = [name for name, c in met.items() if c.state == "unknown"]
        reached = [name for name, c in met.items()
                   if c.at_h is None and c.state != "unknown" and (c.use_high or 0.0) >= 1]  # fmt: skip
        parts = [f"passed by {', '.join(passed)}" if passed else "", f"near in {', '.join(near)}" if near else "",
                 f"not known of {', '.join(unknown)}" if unknown else "",
                 f"within the band of {', '.join(reached)}" if reached else ""]  # fmt: skip
        lines.append(f"{one.name} at {figure(one.set_point, 'degC', system)}: "
                     + ("; ".join(part for part in parts if part) or "no course comes near it"))  # fmt: skip
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
        parts.append(f"{figure(cold['breakaway'].value, 'N*mm', system)} to make the grease yield")
    parts.append(
        "what the drive has is not stated ([limits] start_torque)" if drive is None
        else f"the drive has {figure(drive, 'N*mm', system)} for it"
    )  # fmt: skip
    return ["; ".join(parts)]
