"""Adding a lubricant to a user's own file: what is there is kept, and the file is written whole or not at all."""

from __future__ import annotations

import csv
import io
import json
import math
import os
import shutil
import tempfile
from collections.abc import Mapping
from pathlib import Path

from lubecheck.data import lubricants
from lubecheck.data.lubricant import FIELDS, Lubricant
from lubecheck.data.lubricant_files import (
    KEY_EXPECTED,
    csv_rows,
    file_text,
    is_key,
    is_toml,
    read_entry,
    read_lubricants,
    read_value,
)
from lubecheck.errors import Fault, InputError, TableError, shown
from lubecheck.units import KINDS, from_house, split_text, to_house, unit_word

_BOM = "\N{ZERO WIDTH NO-BREAK SPACE}"


def add(path: Path, facts: Mapping[str, str]) -> Lubricant:
    """Add an entry to a file of lubricants, TOML or CSV by its name, and return the lubricant that it makes.

    facts: texts by the names of `FIELDS`; "key" is a need

    Raises InputError with every fault of the entry, TableError where the file is refused or cannot be written. Either
    way the file stays as it was.
    """
    path = path.resolve()  # a link stays a link to the file
    old = file_text(path) if path.exists() else ""
    present = {one.key: one for one in read_lubricants(path, old)} if old.strip() else {}
    ordered = {name: facts[name].strip() for name in FIELDS if name in facts} | {
        name: text.strip() for name, text in facts.items() if name not in FIELDS
    }
    faults = _key_faults(ordered.get("key", ""), path, present)
    try:
        one = read_entry(ordered)
    except InputError as refused:
        raise InputError([*faults, *refused.faults]) from None
    if faults:
        raise InputError(faults)
    newline = "\r\n" if "\r\n" in old else "\n"
    new = _with_table(old, ordered, newline) if is_toml(path) else _with_row(path.name, old, ordered, newline)
    found = read_lubricants(path, new)
    if found[:-1] != list(present.values()) or found[-1].key != one.key or not _is_near(found[-1], one):
        raise TableError(f"{path}: the entry cannot be added without changing another; add it by hand")
    has_bom = path.exists() and path.read_bytes().startswith(_BOM.encode())
    _write_whole(path, (_BOM if has_bom else "") + new)
    return one


def _is_near(found: Lubricant, wanted: Lubricant) -> bool:
    """Tell whether a lubricant came back as it was meant: a cell in another unit may differ in its last digit."""
    pairs = ((getattr(found, name), getattr(wanted, name)) for name in FIELDS if hasattr(wanted, name))
    return all(
        math.isclose(one, other, rel_tol=1e-8) if isinstance(one, float) and isinstance(other, float) else one == other
        for one, other in pairs
    )


def _key_faults(key: str, path: Path, present: Mapping[str, Lubricant]) -> list[Fault]:
    if not key:
        return [Fault("key", "nothing", "a short name to call it by, such as motor-grease")]
    if not is_key(key):
        return [Fault("key", shown(key), KEY_EXPECTED)]
    if any(lubricants.is_same_name(key, other) for one in present.values() for other in (one.key, one.name)):
        return [Fault("key", shown(key), f"a key of its own: {path.name} has it already")]
    if any(lubricants.is_same_name(key, other) for other in lubricants.names()):
        return [Fault("key", shown(key), "a key of its own: a generic lubricant of the tables has it")]
    return []


def _with_table(old: str, facts: Mapping[str, str], newline: str) -> str:
    """Return a TOML text with one more [[lubricant]] table at its end."""
    lines = ["[[lubricant]]"]
    for name, text in facts.items():
        kind = FIELDS[name].kind if name in FIELDS else "text"  # a range is a text of its own
        if kind == "flag":
            value = "true" if read_value(text, FIELDS[name]) else "false"
        elif kind == "number":
            value = f"{read_value(text, FIELDS[name]):g}"
        else:
            value = json.dumps(text, ensure_ascii=False)  # a JSON string is a TOML one
        lines.append(f"{name} = {value}")
    gap = newline if old.strip() else ""
    return _ended(old, newline) + gap + newline.join(lines) + newline


def _with_row(name: str, old: str, facts: Mapping[str, str], newline: str) -> str:
    """Return a CSV text with one more row, and with the columns that it needs and has not."""
    rows = csv_rows(name, old)
    if rows is None:
        return _ended(old, newline) + _row(list(facts), ",", newline) + _row(list(facts.values()), ",", newline)
    known = [column for column, _ in rows.headings]
    new = [column for column in facts if column not in known]
    lines = old.split("\n")
    for i, (_, last) in enumerate(rows.lines):
        ending = "\r" if lines[last - 1].endswith("\r") else ""
        cells = new if i == 0 else [""] * len(new)
        lines[last - 1] = lines[last - 1].removesuffix("\r") + "".join(rows.delimiter + cell for cell in cells) + ending
    cells = [_cell(column, unit, facts.get(column, "")) for column, unit in rows.headings]
    added = _row([*cells, *(facts[column] for column in new)], rows.delimiter, newline)
    return _ended("\n".join(lines), newline) + added


def _cell(column: str, unit: str | None, text: str) -> str:
    """Return a text with its unit as a cell of a column, which may have a unit in its heading."""
    if not unit or unit == "1" or not text or column not in FIELDS:
        return text
    kind = KINDS[FIELDS[column].kind]
    house = to_house(*split_text(text, kind), kind)
    return f"{from_house(house, unit_word(unit), kind):.10g}"


def _row(cells: list[str], delimiter: str, newline: str) -> str:
    out = io.StringIO()
    csv.writer(out, delimiter=delimiter, lineterminator=newline).writerow(cells)
    return out.getvalue()


def _ended(text: str, newline: str) -> str:
    return text if not text or text.endswith("\n") else text + newline


def _write_whole(path: Path, text: str) -> None:
    """Put a text in the place of a file in one step, so that nobody ever meets half of it."""
    made = ""
    try:
        handle, made = tempfile.mkstemp(dir=path.parent, prefix=f".{path.name}.", suffix=".part")
        with os.fdopen(handle, "wb") as file:
            file.write(text.encode())
            file.flush()
            os.fsync(file.fileno())
        if path.exists():
            shutil.copymode(path, made)
        else:
            os.chmod(made, 0o666 & ~_umask())
        os.replace(made, path)
    except OSError as refused:
        if made and os.path.exists(made):
            os.unlink(made)
        raise TableError(f"{path}: cannot be written: {refused.strerror or refused}") from refused


def _umask() -> int:
    mask = os.umask(0o022)
    os.umask(mask)
    return mask
