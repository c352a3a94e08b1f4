"""The error family.

LubecheckError                 anything this package raises on purpose
├── InputError                 what the user gave was refused; carries every fault at once
│   ├── CaseError              ... in a case file or a table of the user's
│   └── ArgumentError          ... in a call of a unit-aware function
├── OutOfRange                 a method was asked outside its published range of validity
├── TableError                 a shipped or user table breaks its own schema
├── NotCalibrated              measured temperatures came to the model before they were fitted (for developers)
└── DeclarationError           a physics function is declared wrongly (raised at import, for developers)
"""

from __future__ import annotations

import difflib
from collections.abc import Iterable
from dataclasses import dataclass


class LubecheckError(Exception):
    """Anything this package raises on purpose."""


@dataclass(frozen=True, slots=True)
class Fault:
    """One thing wrong with what the user gave, with all that is needed to put it right."""

    key: str
    given: str
    expected: str
    where: str = ""
    line: int | None = None
    nearest: str | None = None

    def __str__(self) -> str:
        place = ":".join(part for part in (self.where, "" if self.line is None else str(self.line)) if part)
        text = f"{place}: {self.key}: " if place else f"{self.key}: "
        text += f"given {self.given}; expected {self.expected}"
        return text + (f"; nearest: {self.nearest}" if self.nearest else "")


class InputError(LubecheckError):
    """What the user gave was refused. `faults` holds every fault found, not just the first."""

    def __init__(self, faults: Iterable[Fault]) -> None:
        self.faults: tuple[Fault, ...] = tuple(faults)
        super().__init__("\n".join(str(fault) for fault in self.faults))


class CaseError(InputError):
    """A case file, or another file of the user's, was refused."""


class ArgumentError(InputError):
    """The arguments of a unit-aware function were refused."""


class OutOfRange(LubecheckError):
    """A method was asked for a value outside its published range of validity."""


class TableError(LubecheckError):
    """A table of data breaks its own schema; the message names the row and the column."""


class NotCalibrated(LubecheckError):
    """A case with measured temperatures was about to be judged without them."""


class DeclarationError(LubecheckError, TypeError):
    """A physics function is declared without a unit, or its docstring disagrees with its declaration."""


def nearest(word: str, valid: Iterable[str], *, count: int = 1) -> str | None:
    """Return the valid word(s) closest in spelling to `word`, or None when nothing is close.

    >>> nearest("radail_load", ["radial_load", "axial_load"])
    'radial_load'
    """
    known = {name.casefold(): name for name in valid}
    close = difflib.get_close_matches(word.casefold(), list(known), n=count, cutoff=0.55)
    return ", ".join(known[name] for name in close) or None


def shown(value: object, *, length: int = 60) -> str:
    """Return a value as it can stand in a one-line message: printable, quoted, cut to a length.

    >>> shown("45 mm"), shown(45)
    ('"45 mm"', '45')
    """
    text = f'"{value}"' if isinstance(value, str) else str(value)
    text = "".join(c if c.isprintable() else "\N{REPLACEMENT CHARACTER}" for c in text)
    return text if len(text) <= length else text[: length - 1] + "…"
