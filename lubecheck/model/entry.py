"""An entry: what one key of a case takes and means, as data on the field of its table.

The reader, the help, the listing of assumptions and the schema all read these, so that a key is described once.
"""

from __future__ import annotations

import dataclasses
from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from typing import Any

from lubecheck.physics import grease_life
from lubecheck.units import KINDS


@dataclass(frozen=True, slots=True)
class Entry:
    """One key of a case: the kinds or words it takes, the accepted range in the house unit, and what it means."""

    role: str  # "fact", "decision", "requirement" or "label"
    kinds: tuple[str, ...]  # unit kinds; empty for words and text
    low: float
    high: float
    words: tuple[str, ...]
    meaning: str
    example: str
    is_need: bool
    form: str = ""  # "date", "months" or "strokes" where the value is read in a way of its own

    @property
    def expected(self) -> str:
        """What the key takes, in words for a message."""
        if self.form == "date":
            return f"a date as year-month-day, such as {self.example}"
        if self.form == "months":
            return f"twelve temperatures, January first, {self.low:g} to {self.high:g} degC, such as {self.example}"
        parts = []
        if self.form == "strokes":
            parts.append(f"a count of strokes such as {self.example}, or")
        if len(self.kinds) > 1:
            units = " or ".join(KINDS[name].unit for name in self.kinds if not KINDS[name].is_bare)
            share = ", or a share of at most 100 %" if "share" in self.kinds else ""
            named = " or ".join(name for name in self.kinds if name != "share")
            parts.append(f"a {named}, {self.low:g} to {self.high:g} {units}{share}, such as {self.example}")
        elif self.kinds:
            kind = KINDS[self.kinds[0]]
            unit = "" if kind.is_bare else f" {kind.unit}"
            parts.append(f"a {kind.name}, {self.low:g} to {self.high:g}{unit}, such as {self.example}")
        if self.words:
            parts.append("one of " + ", ".join(self.words) if not self.kinds else f"or {' or '.join(self.words)}")
        return " ".join(parts) or "a text"


def words_of(answers: Sequence[grease_life.Answer]) -> tuple[str, ...]:
    """Return the words of a table of answers."""
    return tuple(answer.word for answer in answers)


def entry_of(
    role: str,
    kinds: str | tuple[str, ...] = (),
    low: float = 0.0,
    high: float = 0.0,
    *,
    words: tuple[str, ...] = (),
    meaning: str,
    example: str = "",
    need: bool = False,
    form: str = "",
) -> Any:
    """Return a field of a table that carries its entry; without `need` it is None where the key is left out."""
    kinds = (kinds,) if isinstance(kinds, str) else kinds
    entry = Entry(role, kinds, low, high, words, meaning, example, need, form)
    if need:
        return dataclasses.field(metadata={"entry": entry})
    return dataclasses.field(default=None, metadata={"entry": entry})


@dataclass(frozen=True, slots=True)
class Amount:
    """A quantity that may come in more than one kind: its number in the house unit of the kind it came in."""

    value: float
    kind: str
    word: str  # the unit the user wrote

    @property
    def is_calendar(self) -> bool:
        """A time in days, weeks, months or years runs by the calendar; one in hours or less is running time."""
        return self.kind == "time" and self.word not in ("h", "hour", "hours", "hr", "min", "s")


def entries(table: type) -> Iterator[tuple[str, Entry]]:
    """Return each key of a table with its entry."""
    for field in dataclasses.fields(table):
        yield field.name, field.metadata["entry"]
