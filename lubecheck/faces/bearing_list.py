"""Bearings on the terminal and as JSON: sheets, the list of a family, the list of families."""

from __future__ import annotations

import json
from collections.abc import Sequence
from typing import Any

from rich.console import Console
from rich.table import Table
from rich.text import Text

from lubecheck.faces.display import amount, figure, in_system, printable, shown_unit
from lubecheck.model.bearing_sheet import BearingSheet, Listed, ListedFamily

SCHEMA = "lubecheck/bearings/1"
_WIDE = 100  # columns from which sources stand beside the figures


def record(
    sheets: Sequence[BearingSheet] = (), listed: Sequence[Listed] = (), families: Sequence[ListedFamily] = ()
) -> str:
    """Return sheets and lists as JSON text."""
    made: dict[str, Any] = {
        "schema": SCHEMA,
        "bearings": [_of_sheet(sheet) for sheet in sheets],
        "sizes": [
            {
                "designation": one.designation,
                "standard": one.standard,
                **{key: {"value": getattr(one, key), "unit": "mm"} for key in ("bore", "outside", "width")},
            }
            for one in listed
        ],
        "families": [{"family": one.family, "series": list(one.series), "sizes": one.sizes} for one in families],
    }
    return json.dumps(made, indent=2, allow_nan=False)


def _of_sheet(sheet: BearingSheet) -> dict[str, Any]:
    figures: dict[str, Any] = {}
    for one in sheet.figures:
        figures[one.name] = {"value": one.value, "unit": one.unit, "status": one.status, "basis": one.basis}
        if one.low is not None and one.high is not None:
            figures[one.name] |= {"low": one.low, "high": one.high}
    return {
        "designation": sheet.designation,
        "family": sheet.family,
        "series": sheet.series,
        "figures": figures,
        **{key.replace(" ", "_"): word for key, word in sheet.words},
        "notes": list(sheet.notes),
        "unread": list(sheet.unread),
    }


def print_sheets(sheets: Sequence[BearingSheet], console: Console, system: str = "si") -> None:
    """Print one sheet a bearing."""
    for i, sheet in enumerate(sheets):
        if i:
            console.print()
        console.print(Text(printable(f"{sheet.designation} {sheet.family}".strip()), style="bold"))
        console.print(Text(printable(", ".join(f"{key} {word}" for key, word in sheet.words))))
        columns = [("Figure", "left"), ("", "right"), ("", "left"), ("Range", "left"), ("From", "left")]
        is_wide = console.width >= _WIDE
        table = _table(*columns, *([("Source", "left")] if is_wide else []))
        for one in sheet.figures:
            span = ""
            if one.low is not None and one.high is not None:
                span = f"{amount(one.low, one.unit, system)} to {amount(one.high, one.unit, system)}"
            is_small = one.unit == "1" and abs(one.value) < 0.1  # f1: three digits are not enough
            value = f"{one.value:.2g}" if is_small else amount(one.value, one.unit, system)
            cells = [
                one.name.replace("_", " "),
                value,
                shown_unit(one.unit, system),
                "" if is_small else span,
                one.status,
            ]
            table.add_row(*map(Text, (*cells, one.basis) if is_wide else cells))
        console.print(table)
        for note in sheet.notes:
            console.print(Text(printable(f"- {in_system(note, system)}")))


def print_listing(listed: Sequence[Listed], console: Console, system: str = "si") -> None:
    """Print the sizes of a family."""
    table = _table(
        ("Designation", "left"), ("Bore", "right"), ("Outside", "right"), ("Width", "right"), ("Standard", "left")
    )
    for one in listed:
        sizes = (figure(value, "mm", system) for value in (one.bore, one.outside, one.width))
        table.add_row(*map(Text, (one.designation, *sizes, one.standard)))
    console.print(table)


def print_families(families: Sequence[ListedFamily], console: Console) -> None:
    """Print the families with their series."""
    table = _table(("Family", "left"), ("Sizes", "right"))
    table.add_column("Series")
    for one in families:
        table.add_row(*map(Text, (one.family, str(one.sizes), ", ".join(one.series))))
    console.print(table)


def _table(*columns: tuple[str, Any]) -> Table:
    table = Table(box=None, pad_edge=False, padding=(0, 2, 0, 0))
    for heading, justify in columns:
        table.add_column(heading, justify=justify, no_wrap=True)
    return table
