"""Values of a case: one value read by the entry of its key, or refused with what the key takes."""

from __future__ import annotations

import dataclasses
import datetime
import math
import re
from typing import Any

from lubecheck.errors import nearest
from lubecheck.model.entry import Amount, Entry
from lubecheck.units import KINDS, UnreadableText, split_text, to_house

_STROKES = re.compile(r"([0-9]{1,4})\s*strokes?")


def value_of(value: Any, entry: Entry) -> Any:
    """Read one value by its entry; raises UnreadableText where it is not what the entry takes."""
    if entry.form == "date":
        return _date(value, entry)
    if entry.form == "months":
        if not isinstance(value, list) or len(value) != 12:
            raise UnreadableText(entry.expected)
        one = dataclasses.replace(entry, form="")
        return tuple(value_of(item, one) for item in value)
    if entry.form == "strokes" and isinstance(value, str) and (count := _STROKES.fullmatch(value.strip())):
        return Amount(float(count[1]), "strokes", "strokes")
    if not entry.kinds:
        return _word(value, entry)
    if isinstance(value, str) and value in entry.words:
        return value
    amount = _amount(value, entry)
    highest = 1.0 if amount.kind == "share" and len(entry.kinds) > 1 else entry.high
    if not entry.low <= amount.value <= highest or (entry.low == 0 and len(entry.kinds) > 1 and amount.value == 0):
        raise UnreadableText(entry.expected)
    return amount if len(entry.kinds) > 1 or (entry.kinds == ("time",) and entry.role == "decision") else amount.value


def _date(value: Any, entry: Entry) -> str:
    """Read a date, as a text or as TOML's own."""
    try:
        day = datetime.date.fromisoformat(value) if isinstance(value, str) and len(value) == 10 else value
    except ValueError:
        raise UnreadableText(entry.expected) from None
    if not isinstance(day, datetime.date) or isinstance(day, datetime.datetime) or not 1990 <= day.year <= 2200:
        raise UnreadableText(entry.expected)
    return day.isoformat()


def _word(value: Any, entry: Entry) -> Any:
    if entry.words:
        folded = str(value) if isinstance(value, int) and not isinstance(value, bool) else value
        if isinstance(folded, str):
            for word in entry.words:
                if folded.casefold() == word.casefold():
                    return word
        raise UnreadableText(entry.expected, nearest(folded, entry.words) if isinstance(folded, str) else None)
    if entry.meaning.endswith("true or false"):
        if isinstance(value, bool):
            return value
        raise UnreadableText("true or false")
    if isinstance(value, str) and value.strip() and len(value) <= 100:
        return value
    raise UnreadableText(f"a text such as {entry.example}" if entry.example else "a text")


def _amount(value: Any, entry: Entry) -> Amount:
    """Read a quantity of the first kind that fits."""
    if isinstance(value, bool) or not isinstance(value, (str, int, float)):
        raise UnreadableText(entry.expected)
    if not isinstance(value, str):
        bare = next((name for name in entry.kinds if KINDS[name].is_bare), None)
        if bare is None or not math.isfinite(value):
            raise UnreadableText(entry.expected)
        return Amount(float(value), bare, "1")
    refusals: list[UnreadableText] = []
    for name in entry.kinds:
        try:
            number, word = split_text(value, KINDS[name])
            return Amount(to_house(number, word, KINDS[name]), name, word)
        except UnreadableText as refused:
            refusals.append(refused)
    near = next((refused.near for refused in refusals if refused.near), None)
    raise UnreadableText(entry.expected, near, refusals[0].hint)
