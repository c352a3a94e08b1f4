"""Remedies: which changes a practitioner can make bring a position back within its limits.

Every change that makes sense is judged in one batched call; where no single one is enough, every pair of two groups.
Each remedy is edits of the case file and what they lead to: whoever applies them and checks afresh gets that verdict.
"""

from __future__ import annotations

import dataclasses
import math
from collections.abc import Sequence
from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from lubecheck.data import air
from lubecheck.model.check import check as judge_case
from lubecheck.model.entries import Case
from lubecheck.model.equilibrium import Air
from lubecheck.model.kernel import HEAT_LIMITS
from lubecheck.model.limits import NEAR, STATES, UNKNOWN, WITHIN
from lubecheck.model.plan_entries import STREAMS
from lubecheck.model.points import Codes, Flags
from lubecheck.model.reader import read_hold
from lubecheck.model.result import Limit, LimitAfter, Remedy, Result

if TYPE_CHECKING:
    from lubecheck.model.glance import Glances
    from lubecheck.studies.changes import Change

MOST = 10  # remedies that are shown
MOST_OF_A_KIND = 4  # of them with the same groups of changes, so that thirty greases do not hide the rest
CHUNK = 2000  # cases a kernel call
# Limits that one group of changes alone can move.
ONE_GROUP = {"cold_start": "lubricant", "speed": "bearing", "static_load": "bearing", "minimum_load": "bearing"}
_FAILING = ("near", "beyond")


def check(case: Case, *, warm_up: bool = False, air_properties: Air = air.properties, hold: object = None) -> Result:
    """Judge one bearing position, and where a limit is near or beyond look for what brings it back.

    Every limit comes with its use, the demand over what is allowed; the verdict is the worst state, and what could not
    be judged is never called good. With `warm_up` the way to the steady state is followed and judged as well.

    hold: temperature as a text ("70 degC") or a quantity, or "limit" for the highest that the case allows: what
    draught, oil, area or fill alone holds it. Where heat brings a limit near or beyond, that is told unasked.

    Raises CaseError where `hold` is anything else.
    """
    to_hold = None if hold is None else read_hold(hold)
    if case.measured:
        from lubecheck.studies.calibrate import calibrated  # here, so that a check without one does not load it

        case = calibrated(case, air_properties=air_properties)
    result = judge_case(case, air_properties=air_properties)
    is_failing = any(limit.state in _FAILING for limit in result.limits)
    if hold is not None or case.oil.supply in STREAMS or (
        is_failing and any(_is_used_up(limit) for limit in result.limits)
    ):  # fmt: skip
        from lubecheck.studies import needs  # here, so that the check of a cool case does not load it

        found = needs.find(case, to_hold, is_asked=hold is not None, air_properties=air_properties)
        result = dataclasses.replace(result, needs=found)
    if is_failing:
        result = dataclasses.replace(result, remedies=find(case, air_properties=air_properties))
    if case.measured and (result.remedies or result.needs.found):
        from lubecheck.studies import beside_measured  # here, as few cases have readings

        result = beside_measured.told(case, result, air_properties)
    if warm_up or case.grease.given is not None:
        from lubecheck.studies import warmup  # here, as few ask for it

        result = warmup.waited(case, result, air_properties=air_properties)
        if warm_up:
            result = warmup.judged(case, result, air_properties=air_properties)
    return result


def _is_used_up(limit: Limit) -> bool:
    """Tell a limit that heat may have brought near or beyond, at the usual reading of what was not said."""
    return limit.name in HEAT_LIMITS and limit.state in _FAILING and (limit.use is None or limit.use > NEAR)


def find(case: Case, *, air_properties: Air = air.properties) -> tuple[Remedy, ...]:
    """Return the changes that bring a case within, the least effort first, then the greatest effect."""
    from lubecheck.model.glance import glances  # here, so that a check that finds all well does not load them
    from lubecheck.studies import changes

    before = glances([case], air_properties=air_properties)
    singles = [(change,) for change in changes.possible(case, before)]
    alone = _judged(case, singles, air_properties)
    found = _cures(singles, before, alone)
    if not found:
        pairs = _pairs(singles, before, alone)
        for first in range(0, len(pairs), CHUNK):
            chunk = pairs[first : first + CHUNK]
            found += _cures(chunk, before, _judged(case, chunk, air_properties))
    kept: list[Remedy] = []
    counts: dict[tuple[str, ...], int] = {}
    for cure in sorted(_mildest(found), key=lambda cure: cure.rank):
        groups = tuple(change.group for change in cure.changes)
        counts[groups] = counts.get(groups, 0) + 1
        if counts[groups] <= MOST_OF_A_KIND and len(kept) < MOST:
            kept.append(cure.remedy)
    return tuple(kept)


class Cure(NamedTuple):
    """Changes that cure, and the remedy they make."""

    rank: tuple[int, int, float]
    changes: tuple[Change, ...]
    remedy: Remedy


def _mildest(found: Sequence[Cure]) -> list[Cure]:
    """Return of the cures that differ in the steps of graded changes only the one with the fewest."""
    mildest: dict[tuple[str, ...], tuple[tuple[int, int], Cure]] = {}
    for cure in found:
        kind = tuple(change.grade or change.words for change in cure.changes)
        steps = (cure.rank[0], sum(change.step for change in cure.changes))
        if kind not in mildest or steps < mildest[kind][0]:
            mildest[kind] = (steps, cure)
    return [cure for _, cure in mildest.values()]


def _judged(case: Case, tries: Sequence[tuple[Change, ...]], air_properties: Air) -> Glances | None:
    from lubecheck.model.glance import glances
    from lubecheck.studies.changes import apply

    return glances([apply(case, *changes) for changes in tries], air_properties=air_properties) if tries else None


def _cures(tries: Sequence[tuple[Change, ...]], before: Glances, after: Glances | None) -> list[Cure]:
    """Return the tries that cure, with their rank."""
    found: list[Cure] = []
    if after is None:
        return found
    for i in np.flatnonzero(_is_cured(before, after)).tolist():
        changes, verdict = tries[i], int(after.verdicts[i])
        rank = (int(verdict != WITHIN), sum(change.effort for change in changes), after.greatest_use(i))
        found.append(Cure(rank, changes, _remedy(changes, before, after, i)))
    return found


def _pairs(singles: Sequence[tuple[Change, ...]], before: Glances, alone: Glances | None) -> list[tuple[Change, ...]]:
    """Return the pairs of changes of two groups that can cure.

    The limits of `ONE_GROUP` are moved by one group alone, so that a pair's state is known from its members': only
    pairs that leave each of them good are tried.
    """
    if alone is None:
        return []
    names = before.outcome.names
    groups = np.array([change.group for (change,) in singles])
    is_good = np.ones((len(singles), len(singles)), dtype=bool)
    for name, group in ONE_GROUP.items():
        i = names.index(name)
        good_before = bool(_good(before.states[i, :1], before.states[i, 0])[0])
        good = np.where(groups == group, _good(alone.states[i], before.states[i, 0]), good_before)
        is_mover = groups == group
        is_good &= np.where(is_mover[:, None], good[:, None], np.where(is_mover[None, :], good[None, :], good_before))
    first, second = np.triu_indices(len(singles), 1)
    kept = is_good[first, second] & (groups[first] != groups[second])
    return [singles[a] + singles[b] for a, b in zip(first[kept].tolist(), second[kept].tolist(), strict=True)]


def _good(states: Codes, before: int) -> Flags:
    """Tell which states of a limit are within, or as unknown as before."""
    good: Flags = (states == WITHIN) | ((states == UNKNOWN) & (before == UNKNOWN))
    return good


def _is_cured(before: Glances, after: Glances) -> Flags:
    """Tell which outcomes have every limit within, but for those that could not be judged before either."""
    good = [_good(states, int(before.states[i, 0])) for i, states in enumerate(after.states)]
    is_good: Flags = np.logical_and.reduce(good)
    return is_good


def _remedy(changes: Sequence[Change], before: Glances, after: Glances, number: int) -> Remedy:
    names = before.outcome.names
    limits = tuple(
        LimitAfter(name, STATES[before.states[i, 0]], _finite(before.uses[i, 0]), STATES[after.states[i, number]],
                   _finite(after.uses[i, number]))
        for i, name in enumerate(names)
        if before.applies[i, 0] or after.applies[i, number]
    )  # fmt: skip
    failing = [limit for limit in limits if limit.state_before in _FAILING]
    governing = max(failing, key=lambda limit: math.inf if limit.use_before is None else limit.use_before)
    return Remedy(
        change="; and ".join(change.words for change in changes),
        use_after=governing.use_after,
        verdict_after=STATES[after.verdicts[number]],
        note="; ".join([*(change.warning for change in changes if change.warning), _effects(limits)]),
        governing=governing.name,
        effort=sum(change.effort for change in changes),
        edits=tuple(edit for change in changes for edit in change.edits),
        limits=limits,
    )


def _effects(limits: Sequence[LimitAfter]) -> str:
    """Say what the change does to every limit that it moves."""
    parts = []
    for limit in limits:
        before, after = limit.use_before, limit.use_after
        is_still = before is not None and after is not None and abs(after - before) < 0.005
        if limit.state_before != limit.state_after or not is_still:
            shown = ["no end" if use is None else f"{use:.2f}" for use in (before, after)]
            parts.append(f"{limit.name.replace('_', ' ')} {shown[0]} to {shown[1]}")
    return "uses: " + (", ".join(parts) or "no other limit moves")


def _finite(value: float) -> float | None:
    return float(value) if math.isfinite(value) else None
