"""Lubricants from a file: a CSV with a row each, or a TOML with a [[lubricant]] table each.

A CSV column may carry its unit in its heading, "nu_40 [mm^2/s]", and its cells are then bare numbers; without one,
every cell carries its own. "nu_40_range" holds how far lubricants of the kind spread, "95..125". Lines that begin with
# are remarks; cells are parted by commas, or by semicolons or tabs where the headings are. A TOML value is a text with
its unit.
"""

from __future__ import annotations

import csv
import re
import tomllib
from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from lubecheck.data.lubricant import FIELDS, RANGED, Field, Lubricant
from lubecheck.data.lubricant_figures import from_figures
from lubecheck.errors import Fault, InputError, TableError, nearest, shown
from lubecheck.units import KINDS, UnreadableText, example, from_house, is_quantity, quantity_to_house, read_text

_HEADING = re.compile(r"\s*([a-z0-9_]+)\s*(?:\[([^\]]+)\])?\s*")
_RANGE = re.compile(r"\s*([^\s.][^\s]*?|\.\d+)\s*\.\.\s*(\S+)(?:\s+(\S+))?\s*")
_KEY = re.compile(r"[a-z0-9]+(?:[-.][a-z0-9]+)*")
KEY_EXPECTED = "small letters and digits with hyphens between"
# What every row of the tables states, beyond what a user must.
_NEEDS = (
    "key",
    "name",
    "base_oil",
    "nu_40",
    "nu_100",
    "density_15",
    "expansion",
    "lowest",
    "highest",
    "source",
    "certainty",
)
_NEEDS_OF = {"grease": ("thickener", "nlgi", "ep", "yield_stress", "life_reference"), "oil": ("iso_vg", "pour_point")}
_FLAGS = {"yes": True, "true": True, "no": False, "false": False}


def read_file(path: Path, *, defaults: Mapping[str, Any] | None = None, is_complete: bool = False) -> list[Lubricant]:
    """Read the lubricants of a CSV or TOML file.

    defaults: facts that every entry without them has, such as its kind
    is_complete: every entry must state everything and its ranges (the tables of the package)

    Raises TableError with every fault, each with the file, the line, the entry and the column.
    """
    return read_lubricants(path, file_text(path), defaults=defaults, is_complete=is_complete)


def read_lubricants(
    path: Path, text: str, *, defaults: Mapping[str, Any] | None = None, is_complete: bool = False
) -> list[Lubricant]:
    """Read the lubricants of a text as `read_file` reads those of a file of this name.

    Raises TableError with every fault.
    """
    faults: list[str] = []
    entries = list(_facts(path, text, faults))
    found: list[Lubricant] = []
    seen: dict[str, int] = {}
    for number, (line, facts) in enumerate(entries, start=1):
        key = str(facts.get("key", "")).strip()
        place = f"{path.name}{f':{line}' if line else ''}: row {key or '(no key)'}, column"
        try:
            one = read_entry({**(defaults or {}), **facts}, is_complete=is_complete)
        except InputError as refused:
            faults += [f"{place} {fault}" for fault in refused.faults]
            continue
        if not key:
            faults.append(f"{place} key: given nothing; expected a short name to call it by, such as mill-grease")
        elif key in seen:
            faults.append(f"{place} key: given {shown(key)}; expected a key of its own, not that of entry {seen[key]}")
        elif not is_key(key):
            faults.append(f"{place} key: given {shown(key)}; expected {KEY_EXPECTED}")
        seen.setdefault(key, number)
        found.append(one)
    if not entries and not faults:
        faults.append(f"{path.name}: no lubricant in it; expected a CSV with a row each or a TOML with [[lubricant]]")
    if faults:
        raise TableError("\n".join(faults))
    return found


def read_facts(path: Path) -> list[tuple[int | None, dict[str, Any]]]:
    """Return the line and the facts of each entry of a file, as they stand there.

    Raises TableError where the file is no such table.
    """
    faults: list[str] = []
    found = list(_facts(path, file_text(path), faults))
    if faults:
        raise TableError("\n".join(faults))
    return found


def file_text(path: Path) -> str:
    """Return the text of a file of lubricants.

    Raises TableError where it cannot be read.
    """
    try:
        return path.read_bytes().decode("utf-8-sig")
    except UnicodeDecodeError as refused:
        line = refused.object[: refused.start].count(b"\n") + 1
        raise TableError(f"{path}:{line}: is no text in UTF-8") from refused
    except (OSError, ValueError) as refused:
        reason = refused.strerror if isinstance(refused, OSError) and refused.strerror else "not a file name"
        raise TableError(f"{path}: cannot be read: {reason}") from refused


def is_toml(path: Path) -> bool:
    """Tell whether a file of lubricants is TOML, by its name; every other is CSV."""
    return path.suffix.lower() == ".toml"


def is_key(text: str) -> bool:
    """Tell whether a text may be the key of a lubricant."""
    return _KEY.fullmatch(text) is not None


def _facts(path: Path, text: str, faults: list[str]) -> Iterator[tuple[int | None, dict[str, Any]]]:
    return _toml(path.name, text) if is_toml(path) else _csv(path.name, text, faults)


def read_entry(facts: Mapping[str, Any], *, is_complete: bool = False) -> Lubricant:
    """Return the lubricant of one entry whose values are texts with units (or TOML's own numbers and flags).

    Raises InputError with every fault.

    >>> read_entry({"kind": "oil", "base_oil": "mineral", "nu_40": "68 cSt", "index": 95}).nu_100.__round__(2)
    8.53
    """
    faults: list[Fault] = []
    figures: dict[str, Any] = {}
    ranges: dict[str, tuple[float, float]] = {}
    for name, value in facts.items():
        if value is None or (isinstance(value, str) and not value.strip()):
            continue
        base = name.removesuffix("_range")
        is_range = base != name and base in RANGED
        entry = FIELDS.get(base if is_range else name)
        try:
            if entry is None:
                known = [*FIELDS, *(f"{ranged}_range" for ranged in RANGED)]
                faults.append(Fault(name, name, "a field such as " + ", ".join(FIELDS), nearest=nearest(name, known)))
            elif is_range:
                ranges[base] = _range(value, entry)
            else:
                figures[name] = read_value(value, entry)
        except UnreadableText as refused:
            faults.append(Fault(name, shown(value), refused.expected, nearest=refused.near))
    if is_complete:
        told = {fault.key for fault in faults}
        needs = [*_NEEDS, *_NEEDS_OF.get(figures.get("kind", ""), ())]
        absent = [name for name in needs if name not in figures]
        absent += [f"{name}_range" for name in RANGED if name in figures and name not in ranges]
        faults += [Fault(name, "nothing", "a value: a table states all") for name in absent if name not in told]
    if faults:
        try:  # what else is wrong is told in the same breath
            from_figures(ranges=ranges, is_complete=is_complete, **figures)
        except InputError as refused:
            told = {fault.key for fault in faults}
            faults += [fault for fault in refused.faults if fault.key not in told and fault.given != "nothing"]
        raise InputError(faults)
    return from_figures(ranges=ranges, is_complete=is_complete, **figures)


@dataclass(frozen=True, slots=True)
class CsvRows:
    """The rows of a CSV text: what parts its cells, and each row with its first and its last line."""

    delimiter: str
    headings: tuple[tuple[str, str | None], ...]  # field, and its unit where the heading has one
    lines: tuple[tuple[int, int], ...]  # of the heading row, then of each row
    cells: tuple[tuple[str, ...], ...]  # of each row


def csv_rows(name: str, text: str) -> CsvRows | None:
    """Return the rows of a CSV text; None where there are none.

    Raises TableError where its headings or its quotes are no table's.
    """
    lines = [(number, line) for number, line in enumerate(text.split("\n"), start=1) if not line.startswith("#")]
    lines = [(number, line.removesuffix("\r")) for number, line in lines if line.strip(" ,;\t\r")]
    if not lines:
        return None
    delimiter = next((mark for mark in ",;\t" if mark in lines[0][1]), ",")
    reader = csv.reader((f"{line}\n" for _, line in lines), delimiter=delimiter, strict=True)
    rows: list[tuple[str, ...]] = []
    spans: list[tuple[int, int]] = []
    first = 0
    try:
        for row in reader:
            rows.append(tuple(row))
            spans.append((lines[first][0], lines[reader.line_num - 1][0]))
            first = reader.line_num
    except csv.Error as refused:
        raise TableError(f"{name}:{lines[min(first, len(lines) - 1)][0]}: no row of a CSV: {refused}") from refused
    faults = []
    headings: list[tuple[str, str | None]] = []
    for cell in rows[0]:
        match = _HEADING.fullmatch(cell)
        if match is None:
            faults.append(f"column {shown(cell)}; expected a field, with its unit in brackets")
            continue
        if match[1] in [field for field, _ in headings]:
            faults.append(f"column {match[1]} stands twice")
        headings.append((match[1], match[2]))
    if faults:
        raise TableError("\n".join(f"{name}:{spans[0][0]}: {fault}" for fault in faults))
    return CsvRows(delimiter, tuple(headings), tuple(spans), tuple(rows[1:]))


def _csv(name: str, text: str, faults: list[str]) -> Iterator[tuple[int, dict[str, Any]]]:
    """Yield the line and the facts of each row; a row that has not its cells is noted and left out."""
    rows = csv_rows(name, text)
    if rows is None:
        return
    for (number, _), row in zip(rows.lines[1:], rows.cells, strict=True):
        if len(row) != len(rows.headings):
            faults.append(f"{name}:{number}: {len(row)} cells; expected {len(rows.headings)}, one a column")
            continue
        facts = {}
        for (column, unit), cell in zip(rows.headings, row, strict=True):
            stripped = cell.strip()
            facts[column] = f"{stripped} {unit}" if unit and unit != "1" and stripped else stripped
        yield number, facts


def _toml(name: str, text: str) -> Iterator[tuple[int | None, dict[str, Any]]]:
    """Yield the facts of each [[lubricant]] table, with the line it begins at."""
    try:
        document = tomllib.loads(text)
    except tomllib.TOMLDecodeError as refused:
        raise TableError(f"{name}: {refused}") from refused
    others = [key for key in document if key != "lubricant"]
    entries = document.get("lubricant", [])
    if others or not isinstance(entries, list) or not all(isinstance(entry, dict) for entry in entries):
        raise TableError(f"{name}: expected [[lubricant]] tables only{f', given {others[0]}' if others else ''}")
    starts = [n for n, line in enumerate(text.splitlines(), start=1) if re.match(r"\s*\[\[\s*lubricant\s*\]\]", line)]
    for i, entry in enumerate(entries):
        yield (starts[i] if len(starts) == len(entries) else None), entry


def read_value(value: Any, entry: Field) -> Any:
    """Read one value into the unit of its field.

    Raises UnreadableText where it is not of the field's kind.
    """
    if entry.kind == "flag":
        flag = value if isinstance(value, bool) else _FLAGS.get(str(value).strip().casefold())
        if flag is None:
            raise UnreadableText("yes or no")
        return flag
    if entry.kind == "word":
        given = str(value).strip() if isinstance(value, str | int) and not isinstance(value, bool) else ""
        by_fold = {_folded(word): word for word in entry.words}
        if _folded(given) not in by_fold:
            raise UnreadableText("one of " + ", ".join(entry.words), nearest(given, entry.words))
        return by_fold[_folded(given)]
    if entry.kind == "text":
        if not isinstance(value, str):
            raise UnreadableText("a text")
        return value.strip()
    return _number(value, entry)


def _number(value: Any, entry: Field) -> float:
    kind = KINDS[entry.kind]
    if is_quantity(value):
        house = float(quantity_to_house(value, kind))
    elif isinstance(value, str):
        house = read_text(value, kind)
    elif kind.is_bare and isinstance(value, int | float) and not isinstance(value, bool):
        house = float(value)
    else:
        raise UnreadableText(example(kind))
    return house if entry.unit == kind.unit else from_house(house, entry.unit, kind)


def _range(value: Any, entry: Field) -> tuple[float, float]:
    match = _RANGE.fullmatch(value) if isinstance(value, str) else None
    if match is None:
        raise UnreadableText(f'a range such as "95..125 {entry.unit}"')
    unit = match[3] or ""
    low, high = (_number(f"{end} {unit}".strip(), entry) for end in (match[1], match[2]))
    if low > high:
        raise UnreadableText("a range from low to high")
    return low, high


def _folded(word: str) -> str:
    return re.sub(r"[\s_-]+", " ", word).strip().casefold()
