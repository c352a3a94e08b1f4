"""May the two meet: thickener and thickener, base oil and base oil, base oil and seal, additive and metal.

Published charts contradict each other, since two greases of one thickener differ; so a cell says how sure it is, where
charts disagree, and never more than that the two mix as a rule. ASTM D6185 is the test that settles it.
"""

from __future__ import annotations

import csv
import functools
import importlib.resources
from collections.abc import Iterable, Mapping
from dataclasses import dataclass

from lubecheck.data.lubricant import BASE_OILS, CERTAINTIES, THICKENERS, Lubricant
from lubecheck.errors import TableError
from lubecheck.sources import SOURCES

TEST = "ASTM D6185"  # of mixtures of greases
OIL_TEST = "ASTM D6185 for greases, ASTM D7155 for oils"
ELASTOMERS = ("NBR", "FKM", "EPDM", "polyurethane")
METALS = ("brass", "bronze", "copper", "white metal")
ADDITIVES = ("none", "extreme pressure")
STATES = ("mixes", "test first", "not known", "do not mix")  # in rising order of gravity
CONTACT_STATES = ("suits", "test first", "not known", "attacks")  # of an oil or additive with a seal or metal

# What stands on either side of a kind of cell, and the words it takes; where both sides are one list, a pair holds both
# ways round.
KINDS: Mapping[str, tuple[tuple[str, ...], tuple[str, ...], tuple[str, ...]]] = {
    "thickener": (THICKENERS, THICKENERS, STATES),
    "base oil": (BASE_OILS, BASE_OILS, STATES),
    "additive": (ADDITIVES, ADDITIVES, STATES),
    "seal": (BASE_OILS, ELASTOMERS, CONTACT_STATES),
    "metal": (ADDITIVES, METALS, CONTACT_STATES),
}
Key = tuple[str, str, str]
_COLUMNS = ["kind", "a", "b", "state", "source", "certainty", "note"]


@dataclass(frozen=True, slots=True)
class Cell:
    """What is known of one pair."""

    kind: str
    a: str
    b: str
    state: str
    source: str
    certainty: str
    note: str = ""

    @property
    def gravity(self) -> int:
        """0 good, 1 test first, 2 not known, 3 bad."""
        return KINDS[self.kind][2].index(self.state)


@dataclass(frozen=True, slots=True)
class Meeting:
    """Whether two lubricants may meet: the worst of their cells, and each of them."""

    state: str
    reason: str
    cells: tuple[Cell, ...]


@functools.cache
def table() -> Mapping[Key, Cell]:
    """Return every cell, either way round."""
    name = "compatibility.csv"
    return parse(importlib.resources.files(__package__).joinpath(name).read_text(encoding="utf-8"), name)


def parse(text: str, name: str) -> Mapping[Key, Cell]:
    """Read the text of a table; `name` is said where the table breaks its schema. Lines that begin with # are remarks.

    Raises TableError with every fault: a word that is none, a pair that stands twice or is missing.
    """
    faults: list[str] = []
    made: dict[Key, Cell] = {}
    rows = csv.DictReader(line for line in text.splitlines() if not line.startswith("#"))
    if rows.fieldnames != _COLUMNS:
        raise TableError(f"{name}: expected the columns {', '.join(_COLUMNS)}")
    for row in rows:
        faults += [f"{name}: {fault}" for fault in _row_faults(row, made)]
        if row["kind"] not in KINDS:
            continue
        cell = Cell(*(row[column] or "" for column in _COLUMNS))
        made[cell.kind, cell.a, cell.b] = cell
        if _is_mutual(cell.kind):
            made[cell.kind, cell.b, cell.a] = cell
    faults += [f"{name}: no {kind} cell for {a} and {b}" for kind, a, b in _all_keys() if (kind, a, b) not in made]
    if faults:
        raise TableError("\n".join(faults))
    return made


def _is_mutual(kind: str) -> bool:
    return KINDS[kind][0] is KINDS[kind][1]


def _all_keys() -> Iterable[Key]:
    return ((kind, a, b) for kind, (ones, others, _) in KINDS.items() for a in ones for b in others)


def _row_faults(row: Mapping[str, str], made: Mapping[Key, Cell]) -> Iterable[str]:
    kind, a, b = row["kind"], row["a"], row["b"]
    if kind not in KINDS:
        yield f"kind {kind!r} is none of {', '.join(KINDS)}"
        return
    ones, others, states = KINDS[kind]
    place = f"{kind} cell of {a} and {b}"
    if a not in ones or b not in others:
        yield f"{place}: expected names of {', '.join(ones)} and {', '.join(others)}"
    if (kind, a, b) in made:
        yield f"{place} stands twice"
    if row["state"] not in states:
        yield f"{place}: state {row['state']!r} is none of {', '.join(states)}"
    elif a == b and row["state"] != states[0]:
        yield f"{place}: a kind with itself {states[0]}"
    if (row["source"] or "").partition(":")[0] not in SOURCES:
        yield f"{place}: source {row['source']!r} is not in the bibliography"
    if row["certainty"] not in CERTAINTIES:
        yield f"{place}: certainty {row['certainty']!r} is none of {', '.join(CERTAINTIES)}"


def of(kind: str, a: str | None, b: str | None) -> Cell:
    """Return the cell of a pair; where one side was not stated it is not known.

    >>> of("thickener", "clay", "polyurea").state, of("base oil", "PAG", "mineral").state
    ('do not mix', 'do not mix')
    """
    if a is None or b is None:
        said = "was not stated" if a is None and b is None else "of one was not stated"
        return Cell(kind, a or "not stated", b or "not stated", "not known", "user", "seen", f"the {kind} {said}")
    return table()[kind, a, b]


def is_same(one: Lubricant, other: Lubricant) -> bool:
    """Tell whether two are one lubricant: every figure and word alike, whatever they are called."""
    labels = ("key", "name", "source", "certainty", "note", "ranges", "assumed")
    fields = [name for name in one.__slots__ if name not in labels]
    return all(getattr(one, name) == getattr(other, name) for name in fields)


def meet(old: Lubricant, new: Lubricant) -> Meeting:
    """Say whether an old and a new lubricant may meet in the bearing.

    A lubricant with itself always mixes. A grease and an oil meet as grease and base oil; the thickener has nothing to
    meet.
    """
    if is_same(old, new):
        return Meeting("mixes", "the same lubricant", ())
    pairs = [("base oil", old.base_oil, new.base_oil)]
    if old.kind == new.kind == "grease":
        pairs.insert(0, ("thickener", old.thickener, new.thickener))
    pairs.append(("additive", _additive(old), _additive(new)))
    cells = tuple(of(*pair) for pair in pairs)
    worst = max(cells, key=lambda cell: cell.gravity)
    return Meeting(worst.state, words(worst), cells)


def seals(lubricant: Lubricant) -> tuple[Cell, ...]:
    """Return how the (base) oil of a lubricant treats each elastomer."""
    return tuple(of("seal", lubricant.base_oil, elastomer) for elastomer in ELASTOMERS)


def metal(lubricant: Lubricant, name: str) -> Cell:
    """Return how the additives of a lubricant treat a metal."""
    return of("metal", _additive(lubricant), name)


def _additive(lubricant: Lubricant) -> str:
    return ADDITIVES[1] if lubricant.ep else ADDITIVES[0]


def words(cell: Cell) -> str:
    """Return a cell as one line of text, never without its test."""
    test = TEST if cell.kind == "thickener" else OIL_TEST
    says = {"mixes": f"mixes as a rule; {test} settles it", "suits": "suits as a rule"}.get(cell.state, cell.state)
    if cell.state == "test first" and cell.kind not in ("seal", "metal"):
        says = f"test first ({test})"
    note = f"; {cell.note}" if cell.note else ""
    return f"{cell.kind} {cell.a} and {cell.b}: {says}{note} ({cell.certainty})"
