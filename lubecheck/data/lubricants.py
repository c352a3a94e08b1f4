"""Lubricants by name: the generic ones of the tables, a user's own from a file, and a designation with figures."""

from __future__ import annotations

import functools
import re
from collections.abc import Iterable, Mapping
from pathlib import Path
from typing import Any

from lubecheck.data import designations
from lubecheck.data.lubricant import BASE_OILS, LUBRICANT_KINDS, NLGI_GRADES, THICKENERS, Lubricant
from lubecheck.data.lubricant_figures import from_figures, with_given
from lubecheck.data.lubricant_files import read_entry, read_facts, read_file
from lubecheck.errors import Fault, InputError, nearest, shown
from lubecheck.tables import path as table_path

__all__ = [
    "BASE_OILS",
    "LUBRICANT_KINDS",
    "NLGI_GRADES",
    "THICKENERS",
    "Lubricant",
    "find",
    "from_figures",
    "load",
    "names",
    "read_entry",
    "table",
    "with_given",
]

FILES = {"greases.csv": "grease", "oils.csv": "oil"}


@functools.cache
def table() -> Mapping[str, Lubricant]:
    """Return all lubricants of the tables by key, each held to the schema; `find` reads the one it needs only.

    Raises TableError when a table breaks its own schema.
    """
    return {
        one.key: one
        for name, kind in FILES.items()
        for one in read_file(table_path(name), defaults={"kind": kind}, is_complete=True)
    }


@functools.cache
def _rows() -> Mapping[str, dict[str, Any]]:
    """Return the rows of the tables by key as they stand there: reading them all takes longer than a check."""
    return {
        facts["key"]: {"kind": kind, **facts}
        for name, kind in FILES.items()
        for _, facts in read_facts(table_path(name))
    }


@functools.cache
def _keys() -> Mapping[str, str]:
    """Return the key of each lubricant of the tables by its key and its name as they are compared."""
    return {_folded(row[word]): key for key, row in _rows().items() for word in ("name", "key")}


def load(path: str | Path) -> dict[str, Lubricant]:
    """Return the lubricants of a user's own CSV or TOML file by key.

    Raises TableError with every fault in it.
    """
    return {one.key: one for one in read_file(Path(path))}


def names(kind: str | None = None) -> tuple[str, ...]:
    """Return the keys of the tables: of greases, of oils, or of both.

    >>> "polyurea-110-2" in names("grease"), "mineral-vg-68" in names("oil")
    (True, True)
    """
    return tuple(key for key, row in _rows().items() if kind in (None, row["kind"]))


def find(name: str, own: Iterable[Lubricant] = ()) -> Lubricant:
    """Return a lubricant by its key or its name, whatever the case, spaces and hyphens; the user's own come first.

    A designation is taken where it states enough for both viscosities ("CLP HC 220"); otherwise the error says what
    it states, what is missing, and which lubricants of the tables fit.

    Raises InputError with the nearest names.

    >>> find("Polyurea 110-2").nu_40
    110.0
    """
    wanted = _folded(name)
    own = tuple(own)
    for one in own:
        if wanted in (_folded(one.key), _folded(one.name)):
            return one
    if wanted in _keys():
        return read_entry(_rows()[_keys()[wanted]], is_complete=True)
    try:
        read = designations.read(name)
    except InputError:
        raise InputError([_unknown(name, [one.key for one in own])]) from None
    try:
        return from_figures(designation=name)
    except InputError as refused:
        missing = "; ".join(f"{fault.key} ({fault.expected})" for fault in refused.faults)
        fitting = ", ".join(one.key for one in table().values() if _fits(one, read))
        stated = f"{read.text} by {read.system}, which does not state {missing}"
        raise InputError([Fault("name", shown(name), f"the figures too: {stated}", nearest=fitting or None)]) from None


def is_same_name(name: str, other: str) -> bool:
    """Tell whether `find` takes two names for one.

    >>> is_same_name("Mineral VG 68", "mineral-vg-68"), is_same_name("mineral-vg-68", "mineral-vg-46")
    (True, False)
    """
    return _folded(name) == _folded(other)


def _folded(name: str) -> str:
    """Return a name as it is compared: letters and digits only; ISO VG, VG and nothing are the same."""
    words = re.findall(r"[^\W_]+", name.casefold())
    text = "".join(word for word in words if word not in ("iso", "oil", "nlgi"))
    return re.sub(r"vg(?=\d)|vg$|mm2s", "", text.replace("²", "2"))


def _unknown(name: str, own: list[str]) -> Fault:
    keys = [*own, *_rows()]
    near = nearest(name, keys, count=3) or ", ".join(designations.nearest_readings(name)) or None
    where = "the tables or of your own" if own else "the tables"
    return Fault("name", shown(name), f"a lubricant of {where} ({len(keys)} names) or a designation", nearest=near)


def _fits(one: Lubricant, read: designations.Designation) -> bool:
    """Tell whether a lubricant of the tables keeps all that a designation states."""
    facts = read.facts
    limits = {"lowest": -1, "highest": 1}
    for name, sense in limits.items():
        value = getattr(one, name)
        if name in facts and (value is None or sense * (value - facts[name]) < 0):
            return False
    same = all(getattr(one, name) == facts[name] for name in ("kind", "nlgi", "base_oil", "iso_vg") if name in facts)
    in_range = all(span.low <= getattr(one, name) <= span.high for name, span in read.ranges.items())
    return same and in_range and (not facts.get("ep") or one.ep or one.kind == "oil")
