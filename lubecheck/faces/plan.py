"""The plan as people and programs take it: terminal, JSON, and the files it is written to."""

from __future__ import annotations

import csv
import dataclasses
import datetime
import io
import json
from collections.abc import Callable, Mapping, Sequence
from pathlib import Path
from typing import Any

from rich.console import Console
from rich.padding import Padding
from rich.text import Text

from lubecheck.errors import Fault, InputError, nearest
from lubecheck.faces.calendar import to_ics
from lubecheck.faces.display import figure, in_system, number, printable
from lubecheck.faces.files import write_whole
from lubecheck.model.schedule import PlanRow

SCHEMA = "lubecheck/plan/1"
COLUMNS = tuple(field.name for field in dataclasses.fields(PlanRow))
GRAMS = tuple(
    name for name in COLUMNS if name.endswith(("_g", "_g_per_year")) and name != "stroke_g"
)  # to 0.1 g in files; a stroke was weighed finer
_FORMULA_MARKS = ("=", "+", "-", "@", "\t", "\r")  # a text that begins so would be run by a spreadsheet
_BY_NAME = ".csv, .xlsx, .ics or .md"


def record(rows: Sequence[PlanRow]) -> dict[str, Any]:
    """Return a plan as plain data; dates as year-month-day."""
    plain = []
    for row in rows:
        values = {name: getattr(row, name) for name in COLUMNS}
        plain.append({k: v.isoformat() if isinstance(v, datetime.date) else v for k, v in values.items()})
    return {"schema": SCHEMA, "lines": plain}


def to_json(rows: Sequence[PlanRow]) -> str:
    """Return a plan as JSON text."""
    return json.dumps(record(rows), indent=2, allow_nan=False)


def write(rows: Sequence[PlanRow], path: Path, start: datetime.date) -> None:
    """Write a plan to a file by the ending of its name, whole or not at all.

    Raises InputError for an ending that is not known, or a file that cannot be written.
    """
    maker(path)(rows, path, start)


def maker(path: Path) -> Callable[[Sequence[PlanRow], Path, datetime.date], None]:
    """Return what writes a file of this ending; raises InputError where nothing does."""
    found = _MAKERS.get(path.suffix.casefold())
    if found is None:
        near = nearest(path.suffix, _MAKERS)
        raise InputError([Fault("--to", str(path), f"a file name that ends in {_BY_NAME}", nearest=near)])
    return lambda rows, to, start: write_whole(to, found(rows, start))


def _plain(value: Any, name: str = "") -> Any:
    """Return a value as a cell: grams as they are weighed, texts joined and safe for a spreadsheet."""
    if isinstance(value, tuple):
        value = "\n".join(value)
    if isinstance(value, str):
        value = "".join(c if c.isprintable() or c == "\n" else " " for c in value.replace("\r\n", "\n"))
        return f"'{value}" if value.startswith(_FORMULA_MARKS) else value
    return round(value, 1 if name in GRAMS else 4) if isinstance(value, float) else value


def to_csv(rows: Sequence[PlanRow], start: datetime.date | None = None) -> bytes:
    """Return a plan as CSV by RFC 4180, in UTF-8."""
    text = io.StringIO(newline="")
    writer = csv.writer(text)
    writer.writerow(COLUMNS)
    for row in rows:
        writer.writerow(["" if (cell := _plain(getattr(row, name), name)) is None else cell for name in COLUMNS])
    return text.getvalue().encode("utf-8")


def to_xlsx(rows: Sequence[PlanRow], start: datetime.date) -> bytes:
    """Return a plan as a workbook: dates are dates, numbers are numbers, texts are never formulas."""
    from openpyxl import Workbook
    from openpyxl.styles import Alignment, Font

    book = Workbook()
    book.properties.creator = "lubecheck"
    sheet = book.worksheets[0]
    sheet.title = "Lubrication plan"
    sheet.append([name.replace("_", " ") for name in COLUMNS])
    for cell in sheet[1]:
        cell.font = Font(bold=True)
        cell.alignment = Alignment(wrap_text=True, vertical="top")
    for row in rows:
        sheet.append([_plain(getattr(row, name), name) for name in COLUMNS])
        for cell in sheet[sheet.max_row]:
            cell.alignment = Alignment(wrap_text=True, vertical="top")
            if isinstance(cell.value, datetime.date):
                cell.number_format = "yyyy-mm-dd"
    for i, name in enumerate(COLUMNS, start=1):
        letter = sheet.cell(1, i).column_letter
        sheet.column_dimensions[letter].width = 60 if name in ("steps", "cautions", "notes") else 16
    sheet.freeze_panes = "B2"
    raw = io.BytesIO()
    book.save(raw)
    return raw.getvalue()


_SHOWN = {  # column: heading of the Markdown table
    "position": "Position",
    "action": "Action",
    "lubricant": "Lubricant",
    "amount_g": "g",
    "strokes": "Strokes",
    "feed_g_per_h": "g/h",
    "interval_h": "Running h",
    "planned_days": "Days",
    "next_due": "Next due",
    "verdict": "Verdict",
}


def to_markdown(rows: Sequence[PlanRow], start: datetime.date) -> bytes:
    """Return a plan as Markdown: one table, then the steps and notes of each position."""
    lines = [f"# Lubrication plan from {start.isoformat()}", ""]
    lines.append("| " + " | ".join(_SHOWN.values()) + " |")
    lines.append("|" + " --- |" * len(_SHOWN))
    lines.extend("| " + " | ".join(_escaped(_short(getattr(row, name))) for name in _SHOWN) + " |" for row in rows)
    for row in rows:
        lines += ["", f"## {_escaped(row.position)}", ""]
        lines.extend(f"{i}. {_escaped(step)}" for i, step in enumerate(row.steps, start=1))
        lines.extend(["", *(f"- {_escaped(note)}" for note in row.notes)] if row.notes else ())
    cautions = dict.fromkeys(caution for row in rows for caution in row.cautions)
    lines += ["", "## Cautions", "", *(f"- {_escaped(caution)}" for caution in cautions), ""]
    return "\n".join(lines).encode("utf-8")


def _short(value: Any) -> str:
    if value is None:
        return "-"
    return number(value) if isinstance(value, float) else str(value)


def _escaped(text: str) -> str:
    """Return a text that Markdown and HTML take as it stands, on one line."""
    text = printable(text)
    for mark in "\\`*_[]|#":
        text = text.replace(mark, f"\\{mark}")
    return text.replace("&", "&amp;").replace("<", "&lt;")


_MAKERS: Mapping[str, Callable[[Sequence[PlanRow], datetime.date], bytes]] = {
    ".csv": to_csv,
    ".xlsx": to_xlsx,
    ".ics": to_ics,
    ".md": to_markdown,
}


def print_plan(rows: Sequence[PlanRow], console: Console, system: str = "si") -> None:
    """Print a plan."""
    for row in rows:
        console.print(Text(printable(row.position), style="bold"))
        for line in (_what(row, system), _first(row, system), _when(row), _year(row, system)):
            if line:
                console.print(Padding(Text(line), (0, 0, 0, 2)))
        for i, step in enumerate(row.steps, start=1):
            console.print(Padding(Text(f"{i}. {in_system(step, system)}"), (0, 0, 0, 2)))
        for note in row.notes:
            console.print(Padding(Text(f"- {printable(in_system(note, system))}"), (0, 0, 0, 2)))
        console.print()
    console.print(Text("Cautions", style="bold"))
    for caution in dict.fromkeys(caution for row in rows for caution in row.cautions):
        console.print(Padding(Text(f"- {in_system(caution, system)}"), (0, 0, 0, 2)))


def _what(row: PlanRow, system: str) -> str:
    parts = [f"{row.action}: {row.lubricant}"]
    if row.feed_g_per_h is not None:
        parts.append(f"{row.feed_g_per_h:.2g} g/h by an automatic feeder")
    elif row.amount_g is not None:
        strokes = f" = {row.strokes} strokes of {figure(row.stroke_g, 'g', system)}" if row.strokes else ""
        ounces = f"{row.amount_oz:.2f} oz, " if row.amount_oz is not None and system == "si" else ""
        parts.append(f"{figure(row.amount_g, 'g', system)} ({ounces}{figure(row.amount_cm3, 'cm^3', system)}){strokes}")
    elif row.amount_cm3 is not None:
        parts.append(figure(row.amount_cm3, "cm^3", system))
    return printable("; ".join(parts))


def _first(row: PlanRow, system: str) -> str:
    if row.first_fill_g is None:
        return ""
    housing = "" if row.housing_fill_g is None else f", housing {figure(row.housing_fill_g, 'g', system)}"
    return f"first fill: bearing {figure(row.first_fill_g, 'g', system)}{housing}"


def _when(row: PlanRow) -> str:
    if row.planned_days is None:
        return ""
    parts = [f"every {row.planned_days} days"]
    if row.interval_days != row.planned_days:
        parts.append(f"(its own interval: {row.interval_days} days, {number(row.interval_h)} running hours)")
    else:
        parts.append(f"({number(row.interval_h)} running hours)")
    if row.last_done is not None:
        parts.append(f"last done {row.last_done.isoformat()},")
    if row.next_due is not None:
        parts.append(f"next due {row.next_due.isoformat()} ({row.next_due:%G-W%V})")
    return " ".join(parts)


def _year(row: PlanRow, system: str) -> str:
    if row.grease_g_per_year is None:
        return ""
    parts = [f"{figure(row.grease_g_per_year, 'g', system)} of grease a year"]
    if row.cartridges_per_year is not None:
        parts.append(f"{row.cartridges_per_year:.2g} cartridges")
    if row.rounding_g_per_year is not None:
        parts.append(f"fitting it to the route costs {figure(row.rounding_g_per_year, 'g', system)} of that")
    return ", ".join(parts)
