"""How clean a position is: its plain word, ISO 4406 code, oil analysis and filter brought to one setting of ISO 281."""

from __future__ import annotations

from collections.abc import Iterator
from typing import TYPE_CHECKING

from lubecheck.data.cleanliness import CODE_EXPECTED, read_code
from lubecheck.physics import cleanliness
from lubecheck.units import UnreadableText

if TYPE_CHECKING:
    from lubecheck.model.entries import Cleanliness

_COUNTS = ("count_6", "count_14")
_WAYS = ("setting", "described", "code", *_COUNTS)
_FOR_OIL = ("code", *_COUNTS, "filter", "filter_size", "filter_beta", "water")


def stated_setting(said: Cleanliness, *, is_grease: bool, supply: str | None) -> str | None:
    """Return the setting of ISO 281, Annex A, that the table states in one way or another; None where it does not.

    A code that was measured stands beside the one that a filter should keep: of the two the dirtier is taken. Only a
    filter in line right before the bearing gives the cleaner figures of the annex; circulating oil whose filter is not
    said counts as one without.
    """
    if said.setting is not None:
        return said.setting
    is_in_line = not is_grease and supply == "circulating" and said.filter == "in line"
    measured = None
    numbers = numbers_of(said.code) if said.code is not None else _counted(said)
    if said.described is not None:
        measured = cleanliness.class_of(said.described, is_grease=is_grease, is_in_line=is_in_line)
    elif numbers is not None:
        measured = cleanliness.setting_named(numbers, is_in_line=is_in_line)
    if said.filter_size is None or said.filter_beta is None or not is_in_line:
        return measured
    kept = cleanliness.setting_of_filter(said.filter_size * 1000, said.filter_beta)
    return kept if measured is None else cleanliness.worse(measured, kept)


def numbers_of(code: str) -> tuple[int, int] | None:
    """Return the scale numbers of a code over 6 and 14 um, or None where it is none."""
    try:
        read = read_code(code)
    except UnreadableText:
        return None
    return read.over_6, read.over_14


def _counted(said: Cleanliness) -> tuple[int, int] | None:
    if said.count_6 is None or said.count_14 is None:
        return None
    return cleanliness.code_of_counts(at_6=said.count_6, at_14=said.count_14)


def contradictions(said: Cleanliness, *, is_grease: bool) -> Iterator[tuple[str, str, str]]:
    """Return what is wrong with a table: the key, what was given, what is expected."""
    stated = [key for key in _WAYS if getattr(said, key) is not None]
    ways = {"counts" if key in _COUNTS else key for key in stated}
    if len(ways) > 1:
        yield stated[-1], f"beside {stated[0]}", "one way to say how clean it is: setting, described, code or counts"
    if ways == {"counts"} and len(stated) == 1:
        yield stated[0], "alone", "both count_6 and count_14, as an oil analysis gives them"
    if said.code is not None and numbers_of(said.code) is None:
        yield "code", f'"{said.code[:40]}"', CODE_EXPECTED
    if is_grease:
        for key in _FOR_OIL:
            if getattr(said, key) is not None:
                yield key, "for grease", "no such key: it is about oil; say described or setting"
    if (said.filter_size is None) != (said.filter_beta is None):
        key = "filter_beta" if said.filter_size is None else "filter_size"
        yield key, "alone", "both filter_size and filter_beta: a beta holds for one particle size"
    if said.filter_size is not None and said.filter != "in line":
        yield "filter_size", f"with filter {said.filter or 'not said'}", 'filter = "in line": another keeps no class'
