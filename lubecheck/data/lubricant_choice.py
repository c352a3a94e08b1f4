"""Choosing lubricants by what they have to be and to bear; and reading what somebody asks for."""

from __future__ import annotations

import functools
import re
from collections.abc import Callable, Iterable, Mapping
from dataclasses import dataclass
from typing import Any

from lubecheck.data.lubricant import FIELDS, Lubricant
from lubecheck.data.lubricant_files import read_value
from lubecheck.errors import Fault, InputError, shown
from lubecheck.units import KINDS, UnreadableText, read_text

_NUMBER = r"[0-9]+(?:\.[0-9]+)?(?:[eE][+-]?[0-9]+)?"
_RANGE = re.compile(rf"\s*({_NUMBER})?\s*\.\.\s*({_NUMBER})?\s*(\S+)?\s*")
_BARE = re.compile(rf"\s*{_NUMBER}\s*")
RANGE_EXPECTED = 'a range such as "100..150", "100.." or "..150 cSt", in mm^2/s where no unit stands'


@dataclass(frozen=True, slots=True, kw_only=True)
class Wanted:
    """What lubricants are wanted to be; None asks for nothing."""

    kind: str | None = None
    thickener: str | None = None
    base_oil: str | None = None
    nlgi: str | None = None
    ep: bool | None = None
    nu_40: tuple[float, float] | None = None  # mm^2/s
    up_to: float | None = None  # degC that it has to bear hot
    down_to: float | None = None  # degC that it has to bear cold

    def tests(self) -> Mapping[str, Callable[[Lubricant], bool]]:
        """Return a test for each thing asked for, by its name; a limit that nobody stated bears nothing."""
        found: dict[str, Callable[[Lubricant], bool]] = {
            name: functools.partial(_is, name, getattr(self, name))
            for name in ("kind", "thickener", "base_oil", "nlgi", "ep")
            if getattr(self, name) is not None
        }
        if self.nu_40 is not None:
            low, high = self.nu_40
            found["nu_40"] = lambda one: low <= one.nu_40 <= high
        if self.up_to is not None:
            hot = self.up_to
            found["up_to"] = lambda one: one.highest is not None and one.highest >= hot
        if self.down_to is not None:
            cold = self.down_to
            found["down_to"] = lambda one: one.lowest is not None and one.lowest <= cold
        return found


def _is(name: str, value: str | bool, one: Lubricant) -> bool:
    return bool(getattr(one, name) == value)


def select(lubricants: Iterable[Lubricant], wanted: Wanted) -> tuple[Lubricant, ...]:
    """Return the lubricants that are all that is wanted."""
    tests = tuple(wanted.tests().values())
    return tuple(one for one in lubricants if all(test(one) for test in tests))


def relaxed(lubricants: Iterable[Lubricant], wanted: Wanted) -> dict[str, int]:
    """Return how many lubricants there would be without each thing asked for; those that would bring none left out."""
    lubricants = tuple(lubricants)
    tests = wanted.tests()
    counts = {
        name: sum(all(test(one) for other, test in tests.items() if other != name) for one in lubricants)
        for name in tests
    }
    return {name: count for name, count in counts.items() if count}


def read_wanted(texts: Mapping[str, str | None], *, ep: bool | None = None) -> Wanted:
    """Read what is asked for, each by the name of its field in `Wanted`.

    Raises InputError with every fault; its keys are those names.

    >>> read_wanted({"thickener": "Polyurea", "nu_40": "100..150", "up_to": "140degC"}).nu_40
    (100.0, 150.0)
    """
    found: dict[str, Any] = {"ep": ep}
    faults = []
    for name, text in texts.items():
        if text is None:
            continue
        try:
            if name == "nu_40":
                found[name] = read_range(text)
            elif name in ("up_to", "down_to"):
                found[name] = read_text(text, KINDS["temperature"])
            else:
                found[name] = read_value(text, FIELDS[name])
        except UnreadableText as refused:
            faults.append(Fault(name, shown(text), refused.expected, nearest=refused.near))
    if faults:
        raise InputError(faults)
    return Wanted(**found)


def read_range(text: str) -> tuple[float, float]:
    """Read a range of kinematic viscosity, open at one end where it is left out; one value alone is a range of itself.

    Raises UnreadableText where it is none.

    >>> read_range("100..150"), read_range("1..1.5 St"), read_range("..32")
    ((100.0, 150.0), (100.0, 150.0), (0.0, 32.0))
    """
    kind = KINDS["kinematic viscosity"]
    match = _RANGE.fullmatch(text)
    if match is None and _BARE.fullmatch(text):
        return float(text), float(text)
    if match is None or not (match[1] or match[2]):
        raise UnreadableText(RANGE_EXPECTED)
    unit = match[3] or kind.unit
    try:
        low, high = (read_text(f"{end} {unit}", kind) if end else None for end in (match[1], match[2]))
    except UnreadableText as refused:
        raise UnreadableText(RANGE_EXPECTED, refused.near) from None
    low, high = (0.0 if low is None else low), (float("inf") if high is None else high)
    if low > high:
        raise UnreadableText(RANGE_EXPECTED, hint="from low to high")
    return low, high
