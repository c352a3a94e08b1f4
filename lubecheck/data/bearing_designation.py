"""The designation reader: "NU 2210 ECP/C3" into a series, a bore, and what the suffixes say.

The basic designation follows DIN 623-1. Suffixes are common trade usage: those that matter to lubrication, loads or
temperature are read into `Reading.says`, those known to be harmless are passed over, and the rest is named in
`Reading.unread`, never dropped.
"""

from __future__ import annotations

import re
from collections.abc import Iterator, Mapping
from dataclasses import dataclass, field

from lubecheck.data.bearing_series import SERIES, Series
from lubecheck.data.bearing_suffixes import LEADING, harmless, meaning
from lubecheck.data.dimensions import Boundary

# Prefixes for another ring material: they change nothing that is read from the designation, so they are named.
_MATERIAL_PREFIXES = ("SS", "HC", "S", "W")
_BORE_CODES: Mapping[str, float] = {"00": 10.0, "01": 12.0, "02": 15.0, "03": 17.0}
_SEPARATORS = re.compile(r"[\s./,;()+-]+")


@dataclass(frozen=True, slots=True)
class Reading:
    """What a designation says."""

    series: Series
    boundary: Boundary
    base: str  # the basic designation as DIN 623-1 writes it
    suffix: str  # what followed it, as given
    says: Mapping[str, str | float | int] = field(default_factory=dict)
    unread: tuple[str, ...] = ()


def read(text: str) -> Reading | None:
    """Read a designation; None where its basic part names no bearing of the tables.

    >>> made = read("nu2210-ecp/c3")
    >>> made.base, made.says["cage"], made.says["clearance"], made.unread
    ('NU 2210', 'polyamide', 'C3', ())
    """
    folded = re.sub(r"[‐-―−_]", "-", text).upper().strip()
    for prefix in ("", *_MATERIAL_PREFIXES):
        if folded.startswith(prefix):
            body = folded[len(prefix) :].lstrip(" .-")
            for letters, rest in _letters(body):
                found = _basic(letters, rest)
                if found is not None:
                    series, boundary, base, tail = found
                    says, unread = _suffixes(tail, series.family)
                    extra = (prefix,) if prefix else ()
                    return Reading(series, boundary, base, tail.strip(), says, extra + unread)
    return None


def _letters(body: str) -> Iterator[tuple[str, str]]:
    """Yield the ways to take a series' letters off the front, the longest first."""
    known = sorted({letters for series in SERIES for letters in series.letters}, key=len, reverse=True)
    for letters in known:
        rest = body[len(letters) :].lstrip(" .-")
        if body.startswith(letters) and rest[:1].isdigit():
            yield letters, rest


def _basic(letters: str, rest: str) -> tuple[Series, Boundary, str, str] | None:
    """Find series and size from what follows the letters; also the basic designation and what is left over."""
    stroke = re.match(r"(\d+)\s*/\s*(\d+)(?!\d)(.*)", rest, re.DOTALL)
    if stroke is not None:
        found = _size(letters, stroke[1], float(stroke[2]))
        if found is not None:
            return *found, stroke[3]
    together = re.match(r"(\d+)(.*)", rest, re.DOTALL)
    apart = re.match(r"(\d+)[\s.-]+(\d+)(?![\dA-Z])(.*)", rest, re.DOTALL)
    for digits, tail in (
        *(((together[1], together[2]),) if together else ()),
        *(((apart[1] + apart[2], apart[3]),) if apart else ()),
    ):
        for split in (2, 1):
            code = digits[-split:]
            bore = bore_of(code)
            is_written_so = (split == 1) == (bore < 10)
            found = _size(letters, digits[:-split], bore) if is_written_so and len(digits) > split else None
            if found is not None:
                return *found, tail
    return None


def bore_of(code: str) -> float:
    """Return the bore that one or two digits stand for, mm.

    >>> bore_of("8"), bore_of("02"), bore_of("09")
    (8.0, 15.0, 45.0)
    """
    return float(code) if len(code) == 1 else _BORE_CODES.get(code, 5.0 * int(code))


def _size(letters: str, digits: str, bore: float) -> tuple[Series, Boundary, str] | None:
    for series in SERIES:
        if letters in series.letters and series.digits == digits:
            boundary = series.boundaries().get(bore)
            if boundary is not None:
                return series, boundary, series.name(bore, letters)
    return None


def _suffixes(tail: str, family: str) -> tuple[dict[str, str | float | int], tuple[str, ...]]:
    """Read the suffixes of a family: what they say, and the pieces that are not understood."""
    says: dict[str, str | float | int] = {}
    unread: list[str] = []
    for place, piece in enumerate(filter(None, _SEPARATORS.split(tail))):
        tokens, left = _tokens(piece, family)
        for token in tokens:
            said = dict(meaning(token, family) or {})
            if place > 0 or "contact_angle" in says:  # a contact angle stands first; later the letter means less
                said.pop("contact_angle", None)
            says.update(said)
        if left:
            unread.append(left)
    return says, tuple(unread)


def _tokens(piece: str, family: str) -> tuple[list[str], str]:
    """Split a piece into known suffixes; where that fails, take only what leads unmistakably and leave the rest."""
    whole = _split(piece, family)
    if whole is not None:
        return whole, ""
    for end in range(len(piece) - 1, 0, -1):
        if piece[:end] in LEADING.get(family, ()) or piece[:end] in LEADING[""]:
            tokens, left = _tokens(piece[end:], family)
            return [piece[:end], *tokens], left
    return [], piece


def _split(piece: str, family: str) -> list[str] | None:
    """Split a piece into known suffixes without a remainder, the longest first; None where there is no such way."""
    if not piece:
        return []
    for end in range(len(piece), 0, -1):
        head = piece[:end]
        if meaning(head, family) is not None or harmless(head, family):
            tokens = _split(piece[end:], family)
            if tokens is not None:
                return [head, *tokens]
    return None
