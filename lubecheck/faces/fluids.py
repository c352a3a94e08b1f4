"""Lubricants in the terminal: the list, one of them with all its figures, several compared on one chart.

Only prints what it is given. A user's text goes through rich's Text and never into markup.
"""

from __future__ import annotations

import itertools
import math
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Literal

from rich.console import Console
from rich.table import Table
from rich.text import Text

from lubecheck.data import lubricant_sheet as sheet
from lubecheck.data.grades import EDITIONS, equivalents
from lubecheck.data.lubricant import FIELDS, Field, Lubricant
from lubecheck.faces.charts import LETTERS, STYLES, Curve, viscosity_chart
from lubecheck.faces.display import amount, converted, in_system, is_plain, number, printable, shown_unit
from lubecheck.model.required import RequiredViscosity
from lubecheck.sources import SOURCES

CERTAINTY = {
    "checked": "checked against a second source",
    "seen": "seen in print",
    "memory": "from memory",
    "estimate": "an estimate",
}
_PLACES = {"within": "", "below": "below its range of use", "above": "above its range of use",
           "unknown": "range of use not stated"}  # fmt: skip
_WIDE = 100
_COLUMN = 11  # cells of a column of viscosities: eight figures, a mark, a gap


@dataclass(frozen=True, slots=True)
class Need:
    """The viscosity that a case asks for, with the words for it."""

    required: RequiredViscosity
    words: str


def print_list(
    found: Sequence[Lubricant],
    own: frozenset[str],
    console: Console,
    system: str,
    at: Sequence[float] = (),
    need: Need | None = None,
) -> None:
    """Print one line a lubricant; `own` holds the keys of the user's own."""
    table = Table(box=None, pad_edge=False, padding=(0, 2, 0, 0))
    headings: list[tuple[str, Literal["left", "right"]]] = [("Name", "left"), ("nu 40", "right"), ("nu 100", "right")]
    headings += [(f"at {degrees(t, system)}", "right") for t in at]
    headings += [("kappa 1", "right")] if need else []
    headings += [("NLGI", "right"), ("EP", "left"), ("from", "right"), ("to", "right")]
    is_wide = console.width >= _WIDE + 9 * (len(at) + bool(need))
    headings += [("Oil", "left"), ("Thickener", "left")] if is_wide else []
    for heading, justify in headings:
        # Where there is too little room, names break over two lines: figures must not lose a digit.
        table.add_column(heading, justify=justify, no_wrap=heading != "Name", overflow="fold")
    for one in found:
        cells = [one.key + (" *" if one.key in own else ""), amount(one.nu_40, "mm^2/s", system),
                 amount(one.nu_100, "mm^2/s", system)]  # fmt: skip
        cells += [amount(sheet.state(one, t).nu, "mm^2/s", system) for t in at]
        cells += [degrees(sheet.temperature_of(one, need.required.nu), system)] if need else []
        cells += [one.nlgi or "", "EP" if one.ep else "", degrees(one.lowest, system),
                  degrees(one.highest, system)]  # fmt: skip
        cells += [one.base_oil or "", one.thickener or ""] if is_wide else []
        table.add_row(*(Text(printable(cell)) for cell in cells))
    console.print(table)
    said = [f"{len(found)} lubricants" if len(found) != 1 else "1 lubricant", f"nu: {_NU_WORDS}",
            f"temperatures in {shown_unit('degC', system)}"]  # fmt: skip
    said += ["* your own"] if any(one.key in own for one in found) else []
    console.print(Text("\n" + "; ".join(said), style="dim"))
    if need:
        console.print(Text(f"kappa 1: the temperature at which it has {need.words}", style="dim"))


_LABELS = {
    "kind": "kind",
    "thickener": "thickener",
    "base_oil": "oil",
    "nlgi": "NLGI grade",
    "ep": "EP additives",
    "iso_vg": "ISO viscosity grade",
    "nu_40": "viscosity at 40 degC",
    "nu_100": "viscosity at 100 degC",
    "density_15": "density at 15 degC",
    "expansion": "thermal expansion",
    "yield_stress": "yield stress at rest",
    "pour_point": "pour point",
    "flash_point": "flash point",
    "lowest": "used from",
    "highest": "used up to",
    "life_reference": "full grease interval up to",
}
_BASE_OIL = ("nu_40", "nu_100", "expansion")  # figures of a grease that are its base oil's
_NU_WORDS = "kinematic viscosity of the (base) oil in mm^2/s"


def print_none(relaxed: Mapping[str, int], console: Console) -> None:
    """Print that nothing fits, and what would without one of the filters."""
    console.print(Text("No lubricant is all that."))
    for name, count in relaxed.items():
        console.print(Text(f"  without --{option(name)}: {count}"))


def option(field: str) -> str:
    """Return the option of the command that goes with a field.

    >>> option("base_oil"), option("nu_40")
    ('base-oil', 'nu40')
    """
    return {"nu_40": "nu40"}.get(field, field.replace("_", "-"))


def print_added(one: Lubricant, path: str, console: Console) -> None:
    """Print that a lubricant was added, what was assumed of it, and how to use it."""
    console.print(Text(printable(f"Added {one.key} to {path}: {one.name}")))
    console.print(Text(f"  {one.nu_40:.4g} mm^2/s at 40 degC, {one.nu_100:.4g} at 100 degC"))
    missing = [name for name in ("lowest", "highest") if getattr(one, name) is None]
    if missing:
        console.print(Text(f"  not stated: {', '.join(missing)}; the limits that need it will be unknown"))
    for text in one.assumed:
        console.print(Text(printable(f"  assumed: {text}")))
    use = f'name = "{one.key}", checked with --lubricants {path}, or with LUBECHECK_LUBRICANTS set to it'
    console.print(Text(printable(f"  In a case: {use}")))


def print_one(
    one: Lubricant, temperatures: Sequence[float], console: Console, system: str, need: Need | None = None
) -> None:
    """Print all that is known of a lubricant."""
    console.print(Text(printable(one.name), style="bold"))
    console.print(Text(printable(one.key), style="dim"))
    _facts(one, console, system)
    _equivalents(one, console)
    _viscosities(one, temperatures, console, system)
    print_chart([one], console, system, need)
    console.print(Text("\nWhere the figures come from", style="bold"))
    said = [f"{SOURCES[one.source.partition(':')[0]].title}: {CERTAINTY[one.certainty]}"]
    said += [one.note] if one.note else []
    said += [f"assumed: {text}" for text in one.assumed]
    said += ["ranges: how far lubricants of the kind spread; a data sheet goes before"] if one.ranges else []
    table = _table("left")
    for text in said:
        _row(table, in_system(text, system))
    console.print(table)


def _facts(one: Lubricant, console: Console, system: str) -> None:
    table = _table("left", "right", "left", "left")
    for name, entry in FIELDS.items():
        if name not in _LABELS:
            continue
        value = getattr(one, name)
        if entry.is_number and value is not None:
            spread = ""
            if name in one.ranges:
                low, high = (_shown(end, entry, system) for end in one.ranges[name])
                spread = f"({low} to {high})"
            label = _LABELS[name] + (" (base oil)" if one.kind == "grease" and name in _BASE_OIL else "")
            _row(table, in_system(label, system), _shown(value, entry, system), shown_unit(entry.unit, system), spread)
        elif name in ("lowest", "highest"):
            _row(table, _LABELS[name], "not stated")
        elif value is not None:
            _row(table, _LABELS[name], {True: "yes", False: "no"}.get(value, str(value)))
        if name == "nu_100":
            index = sheet.index_of(one)
            _row(table, "viscosity index", "not defined" if index is None else f"{index:.0f}", "", "(ASTM D2270)")
    console.print(table)


def _shown(value: float, entry: Field, system: str) -> str:
    if entry.name == "iso_vg":
        return f"{value:g}"
    return degrees(value, system) if entry.unit == "degC" else amount(value, entry.unit, system)


def degrees(value: float | None, system: str) -> str:
    """Return a temperature as a whole number, or with the tenth that it has; a dash where there is none.

    >>> degrees(-30.0, "si"), degrees(37.777, "inch"), degrees(37.777, "si"), degrees(None, "si")
    ('-30', '100', '37.8', '-')
    """
    return "-" if value is None else f"{round(converted(value, 'degC', system), 1) + 0.0:g}"


def _equivalents(one: Lubricant, console: Console) -> None:
    """Print the grades that an oil has by its viscosity alone, each with the edition of its table."""
    grades = equivalents(one.nu_40, one.nu_100) if one.kind == "oil" else {}
    if grades:
        said = "; ".join(f"{text} ({EDITIONS[name]})" for name, text in grades.items())
        console.print(Text(f"\nGrades by viscosity alone: {said}"))


def _viscosities(one: Lubricant, temperatures: Sequence[float], console: Console, system: str) -> None:
    is_inch, is_oil = system == "inch", one.kind == "oil"
    headings = [shown_unit("degC", system), "mm^2/s"] + ["SUS"] * is_inch + ["mPa*s", "kg/m^3"] * is_oil
    table = Table(box=None, pad_edge=False, padding=(0, 3, 0, 0))
    for heading in (*headings, ""):
        table.add_column(heading, justify="right" if heading else "left")
    for temperature in temperatures:
        state = sheet.state(one, temperature)
        cells = [degrees(temperature, system), amount(state.nu, "mm^2/s", system)]
        cells += [number(sheet.saybolt(state.nu, temperature))] * is_inch
        cells += [number(state.dynamic), number(state.density)] * is_oil
        table.add_row(*(Text(cell) for cell in (*cells, _PLACES[state.place])))
    console.print(Text("\nViscosity" + ("" if is_oil else " of the base oil"), style="bold"))
    console.print(table)


def print_several(
    found: Sequence[Lubricant], temperatures: Sequence[float], console: Console, system: str, need: Need | None = None
) -> None:
    """Print several lubricants side by side: their viscosity, and one chart."""
    table = _table("left", "left", "left")
    for letter, style, one in zip(LETTERS, itertools.cycle(STYLES), found, strict=False):
        span = f"{degrees(one.lowest, system)} to {degrees(one.highest, system)} {shown_unit('degC', system)}"
        table.add_row(Text(letter, style=f"bold {style}"), Text(printable(one.key)), Text(span))
    console.print(table)
    console.print(Text("\nViscosity of the (base) oil in mm^2/s; ! outside its range of use", style="bold"))
    lettered = list(zip(LETTERS, found, strict=False))
    side_by_side = max(1, (console.width - _COLUMN) // _COLUMN)
    for start in range(0, len(lettered), side_by_side):
        _columns(lettered[start : start + side_by_side], temperatures, console, system)
    print_chart(found, console, system, need)


def _columns(
    lettered: Sequence[tuple[str, Lubricant]], temperatures: Sequence[float], console: Console, system: str
) -> None:
    table = Table(box=None, pad_edge=False, padding=(0, 2, 0, 0))
    for heading in (shown_unit("degC", system), *(letter for letter, _ in lettered)):
        table.add_column(heading, justify="right", no_wrap=True)
    for temperature in temperatures:
        states = [sheet.state(one, temperature) for _, one in lettered]
        cells = [amount(s.nu, "mm^2/s", system) + ("!" if s.place in ("below", "above") else " ") for s in states]
        table.add_row(*(Text(cell) for cell in (degrees(temperature, system), *cells)))
    console.print(table)


def print_chart(found: Sequence[Lubricant], console: Console, system: str, need: Need | None = None) -> None:
    """Print the chart of lubricants, with the line of kappa 1 where a case asks for a viscosity."""
    cold, hot = sheet.span(found)
    meets = [sheet.temperature_of(one, need.required.nu) for one in found] if need else []
    hot = max(hot, *(min(150.0, meet) for meet in meets if meet is not None), cold + 20)
    curves = [
        Curve(letter, one.nu_40, one.nu_100, -math.inf if one.lowest is None else one.lowest,
              math.inf if one.highest is None else one.highest)
        for letter, one in zip(LETTERS, found, strict=False)
    ]  # fmt: skip
    lines = viscosity_chart(
        curves, cold=cold, hot=hot, width=console.width, is_plain=is_plain(console), system=system,
        level=need.required.nu if need else None,
    )  # fmt: skip
    console.print(Text("\nViscosity over temperature (scale of ASTM D341)", style="bold"))
    for line in lines:
        console.print(line, no_wrap=True, overflow="crop")
    for curve, style, one in zip(curves, itertools.cycle(STYLES), found, strict=False):
        legend = Text("  ").append(curve.letter, style=f"bold {style}").append(f" {printable(one.key)}")
        console.print(legend)
    console.print(Text("  a small letter: outside its range of use", style="dim"))
    if need:
        console.print(Text(f"  kappa 1: {need.words}"))
        for curve, one, meet in zip(curves, found, meets, strict=True):
            console.print(Text(f"  {curve.letter} {_meeting(one, meet, system)}"))


def _meeting(one: Lubricant, meet: float | None, system: str) -> str:
    """Say up to which temperature a lubricant has what is asked for."""
    if meet is None:
        return "has it nowhere between -70 and 370 degC"
    said = f"has it up to {degrees(meet, system)} {shown_unit('degC', system)}"
    place = sheet.place(one, meet)
    if place == "above":
        return f"{said}, so all over its range of use"
    return f"{said}, which is {_PLACES[place]}" if place == "below" else said


def _table(*justify: Literal["left", "right"]) -> Table:
    table = Table(box=None, pad_edge=False, padding=(0, 2, 0, 0), show_header=False)
    for side in justify:
        table.add_column(justify=side)
    return table


def _row(table: Table, *cells: str) -> None:
    table.add_row(*(Text(printable(cell)) for cell in (*cells, *[""] * (len(table.columns) - len(cells)))))
