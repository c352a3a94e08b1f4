"""Lubricants from a file: a CSV with a row each, or a TOML with a [[lubricant]] table each.

A CSV column may carry its unit in its heading, "nu_40 [mm^2/s]", and its cells are then bare numbers; without one,
every cell carries its own. "nu_40_range" holds how far lubricants of the kind spread, "95..125". Lines that begin with
# are remarks. A TOML value is a text with its unit.
"""

from __future__ import annotations

import csv
import re
import tomllib
from collections.abc import Iterator, Mapping
from pathlib import Path
from typing import Any

from lubecheck.data.lubricant import FIELDS, RANGED, Field, Lubricant
from lubecheck.data.lubricant_figures import from_figures
from lubecheck.errors import Fault, InputError, TableError, nearest, shown
from lubecheck.units import KINDS, UnreadableText, example, from_house, is_quantity, quantity_to_house, read_text

_HEADING = re.compile(r"\s*([a-z0-9_]+)\s*(?:\[([^\]]+)\])?\s*")
_RANGE = re.compile(r"\s*([^\s.][^\s]*?|\.\d+)\s*\.\.\s*(\S+)(?:\s+(\S+))?\s*")
_KEY = re.compile(r"[a-z0-9]+(?:[-.][a-z0-9]+)*")
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
    entries = read_facts(path)
    faults: list[str] = []
    found: list[Lubricant] = []
    seen: dict[str, int] = {}
    for number, (line, facts) in enumerate(entries, start=1):
        key = str(facts.get("key", "")) or f"entry {number}"
        place = f"{path.name}{f':{line}' if line else ''}: row {key}, column"
        try:
            one = read_entry({**(defaults or {}), **facts}, is_complete=is_complete)
        except InputError as refused:
            faults += [f"{place} {fault}" for fault in refused.faults]
            continue
        if key in seen:
            faults.append(f"{place} key: given {shown(key)}; expected a key of its own, not that of entry {seen[key]}")
        elif not _KEY.fullmatch(key):
            faults.append(f"{place} key: given {shown(key)}; expected small letters and digits with hyphens between")
        seen.setdefault(key, number)
        found.append(one)
    if not entries:
        faults.append(f"{path.name}: no lubricant in it; expected a CSV with a row each or a TOML with [[lubricant]]")
    if faults:
        raise TableError("\n".join(faults))
    return found


def read_facts(path: Path) -> list[tuple[int | None, dict[str, Any]]]:
    """Return the line and the facts of each entry of a file, as they stand there.

    Raises TableError where the file is no such table.
    """
    try:
        text = path.read_text(encoding="utf-8-sig")
    except OSError as refused:
        raise TableError(f"{path}: cannot be read: {refused.strerror}") from refused
    except UnicodeDecodeError as refused:
        raise TableError(f"{path}: is no text in UTF-8") from refused
    return list(_toml(path.name, text) if path.suffix.lower() == ".toml" else _csv(path.name, text))


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
                figures[name] = _value(value, entry)
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


def _csv(name: str, text: str) -> Iterator[tuple[int, dict[str, Any]]]:
    """Yield the line and the facts of each row."""
    lines = [(number, line) for number, line in enumerate(text.splitlines(), start=1) if not line.startswith("#")]
    lines = [(number, line) for number, line in lines if line.strip(" ,;\t")]
    if not lines:
        return
    rows = list(zip((number for number, _ in lines), csv.reader(line for _, line in lines), strict=True))
    headings: list[tuple[str, str | None]] = []
    for cell in rows[0][1]:
        match = _HEADING.fullmatch(cell)
        if match is None:
            raise TableError(f"{name}:{rows[0][0]}: column {shown(cell)}; expected a field, with its unit in brackets")
        headings.append((match[1], match[2]))
    twice = [column for column, _ in headings if [other for other, _ in headings].count(column) > 1]
    if twice:
        raise TableError(f"{name}:{rows[0][0]}: column {twice[0]} stands twice")
    for number, row in rows[1:]:
        if len(row) != len(headings):
            raise TableError(f"{name}:{number}: {len(row)} cells; expected {len(headings)}, one a column")
        facts = {}
        for (column, unit), cell in zip(headings, row, strict=True):
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


def _value(value: Any, entry: Field) -> Any:
    """Read one value into the unit of its field."""
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
