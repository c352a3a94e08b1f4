"""A whole plant: what each lubricant does to every position, and the fewest that keep all of them within."""

from __future__ import annotations

from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass

import numpy as np

from lubecheck.data import compatibility
from lubecheck.data.lubricant import Lubricant
from lubecheck.errors import Fault, InputError
from lubecheck.model.entries import Case
from lubecheck.model.glance import glances
from lubecheck.model.limits import STATES
from lubecheck.model.points import Codes, Flags
from lubecheck.studies.calibrate import calibrated
from lubecheck.studies.swap import found, replaced
from lubecheck.units import Array


@dataclass(frozen=True, slots=True)
class Count:
    """What one lubricant does to the positions of a plant."""

    name: str
    judged: int  # positions of its kind
    within: int
    near: int
    unknown: int
    beyond: int
    better: int  # a better state than now
    worse: int
    not_to_mix: int  # positions whose present lubricant it does not mix with, or may not


@dataclass(frozen=True, slots=True)
class Plant:
    """A whole plant: what each lubricant does, the fewest that keep every position within, and which hold out."""

    positions: tuple[str, ...]
    verdicts_now: tuple[str, ...]
    counts: tuple[Count, ...]
    fewest: tuple[str, ...]
    assignment: tuple[str | None, ...]  # position by position; None for one that holds out
    hold_outs: tuple[str, ...]
    hold_out_reasons: tuple[str, ...]


CHUNK = 4000  # cases a kernel call


_CLEANED = ("do not mix", "not known")  # meetings that ask for the old to be taken out wholly


def plant(cases: Mapping[str, Case], candidates: Sequence[str | Lubricant], *, own: Iterable[Lubricant] = ()) -> Plant:
    """Judge many lubricants in many positions and find the fewest that keep every position within.

    cases: positions by what they are called
    """
    kinds: set[str] = {case.lubricant.kind for case in cases.values()}
    named = _of_kinds(candidates, kinds, own)
    names, positions = list(cases), [calibrated(case) for case in cases.values()]
    now, _ = _states(positions)
    states = np.full((len(named), len(positions)), -1, dtype=np.intp)
    uses = np.full(states.shape, np.inf)
    places = [(i, j) for i, (_, new) in enumerate(named) for j, case in enumerate(positions)
              if case.lubricant.kind == new.kind]  # fmt: skip
    for first in range(0, len(places), CHUNK):
        chunk = places[first : first + CHUNK]
        got, use = _states([replaced(positions[j], named[i][1]) for i, j in chunk])
        rows, columns = np.array(chunk).T
        states[rows, columns], uses[rows, columns] = got, use
    is_good = states == 0
    cleaning = np.array([[compatibility.meet(case.lubricant, new).state in _CLEANED for case in positions]
                         for _, new in named])  # fmt: skip
    # Of several lists that are as short, the one that asks for less cleaning out, then the one with more room.
    weight = 0.9 * (cleaning & is_good).mean(axis=1) + 0.1 * np.where(is_good, uses, 1.0).mean(axis=1)
    chosen = fewest(is_good, weight)
    counts = tuple(_count(named[i][0], states[i], now, cleaning[i]) for i in range(len(named)))
    held = ~is_good.any(axis=0)
    best = np.where(is_good, uses, np.inf)
    assigned: list[str | None] = [None] * len(positions)
    for j in np.flatnonzero(~held).tolist():
        assigned[j] = named[chosen[int(best[list(chosen), j].argmin())]][0]
    return Plant(
        positions=tuple(names),
        verdicts_now=tuple(STATES[state] for state in now),
        counts=counts,
        fewest=tuple(named[i][0] for i in chosen),
        assignment=tuple(assigned),
        hold_outs=tuple(name for name, is_held in zip(names, held, strict=True) if is_held),
        hold_out_reasons=tuple(_hold_out(states[:, j], [name for name, _ in named]) for j in np.flatnonzero(held)),
    )


def fewest(is_good: Flags, weight: Array | None = None) -> tuple[int, ...]:
    """Return the fewest rows that together are good in every column that any row is good in; exact.

    weight: 0 to 1, decides between choices of as many rows: the least sum wins

    >>> fewest(np.array([[True, True, False], [False, True, True], [True, True, True]]))
    (2,)
    """
    from scipy.optimize import Bounds, LinearConstraint, milp  # slow to load, and asked for by a plant alone

    columns = np.unique(is_good[:, is_good.any(axis=0)], axis=1).T
    if not len(columns):
        return ()
    # A position that every lubricant of another one's suits as well is served along with it.
    columns = columns[np.argsort(columns.sum(axis=1), kind="stable")]
    kept = np.empty_like(columns)
    count = 0
    for column in columns:
        if not (kept[:count] <= column).all(axis=1).any():
            kept[count] = column
            count += 1
    solved = milp(
        np.ones(len(is_good))
        + (0.0 if weight is None else np.clip(weight, 0.0, 1.0) / (len(is_good) + 1)),  # under one row together
        constraints=LinearConstraint(kept[:count].astype(np.float64), lb=1.0),
        integrality=np.ones(len(is_good)),
        bounds=Bounds(0.0, 1.0),
        options={"mip_rel_gap": 0.0},
    )
    return tuple(int(i) for i in np.flatnonzero(solved.x > 0.5))


def _of_kinds(
    candidates: Sequence[str | Lubricant], kinds: set[str], own: Iterable[Lubricant]
) -> list[tuple[str, Lubricant]]:
    """Return the candidates, each of one of the kinds that the positions have."""
    own = tuple(own)
    faults: list[Fault] = []
    made: list[tuple[str, Lubricant]] = []
    for candidate in candidates:
        kind = candidate.kind if isinstance(candidate, Lubricant) else None
        refused: InputError | None = None
        for one in (kind,) if kind in kinds else sorted(kinds):
            try:
                made += found([candidate], str(one), own)
                refused = None
                break
            except InputError as error:
                refused = error
        faults += [] if refused is None else refused.faults
    if faults:
        raise InputError(faults)
    return made


def _states(cases: Sequence[Case]) -> tuple[Codes, Array]:
    """Return the verdict and the greatest use of each case."""
    made = glances(cases)
    return made.verdicts, np.array([made.greatest_use(i) for i in range(len(cases))])


def _count(name: str, states: Codes, now: Codes, cleaning: Flags) -> Count:
    is_judged = states >= 0
    within, near, unknown, beyond = (int((states == STATES.index(state)).sum()) for state in STATES)
    return Count(
        name=name,
        judged=int(is_judged.sum()),
        within=within,
        near=near,
        unknown=unknown,
        beyond=beyond,
        better=int((is_judged & (states < now)).sum()),
        worse=int((states > now).sum()),
        not_to_mix=int((cleaning & is_judged).sum()),
    )


def _hold_out(states: Codes, names: Sequence[str]) -> str:
    judged = [(STATES[state], name) for state, name in zip(states, names, strict=True) if state >= 0]
    if not judged:
        return "no lubricant of its kind among the candidates"
    state, name = min(judged, key=lambda one: STATES.index(one[0]))
    return f"none keeps it within; the best is {name}: {state}"
