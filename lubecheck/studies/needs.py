"""Needs: how much draught, housing area, oil, cooling or less fill alone holds a temperature, as exact figures.

Remedies are steps of a list; here each means is searched for the amount that just holds. Every amount that is tried is
a case of its own, edited as its file would be, and all of them are rows of one kernel call: first places from what
there is to the end of each means, then the gap in which it begins to hold, divided again and again. The first crossing
from what there is counts, so that nothing has to rise or fall all the way.
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from typing import NamedTuple

import numpy as np

from lubecheck.data import air
from lubecheck.model.check import readings
from lubecheck.model.entries import Case
from lubecheck.model.equilibrium import Air
from lubecheck.model.kernel import DECIDED_BY_HEAT, MAY_FAIL_BY_HEAT, Outcome, judge
from lubecheck.model.limits import BEYOND, NEAR, NEAR_CODE, STATES
from lubecheck.model.points import from_rows
from lubecheck.model.result import Need, Needs
from lubecheck.model.rows import rows_of
from lubecheck.studies.changes import Change, Edit, apply
from lubecheck.studies.means import Means, means_of
from lubecheck.units import Array

PLACES = 17  # at which a means is looked at first
PARTS, ROUNDS = 12, 4  # the gap is divided into parts again and again: 2e4 in all
DIGITS = 5  # of a figure, rounded to the side that holds


class _Gap(NamedTuple):
    """Two amounts next to each other, the first of which is as the position stands and the second is not."""

    first: float
    second: float


def find(
    case: Case, hold: float | None = None, *, is_asked: bool = False, air_properties: Air = air.properties
) -> Needs:
    """Return what each means alone has to be to hold what is asked, and what that is in words.

    Without a temperature to hold, the limits that heat decides are brought to a use of 0.85, where they are within:
    those near or beyond, or where none is and it was asked, all. An oil stream's need is told in any case.

    hold [degC]: temperature that the hottest duty point is to have
    """
    search = _Search(case, hold, air_properties)
    is_due = is_asked or hold is not None or search.is_short
    if search.is_blind:
        return Needs(search.words, (), is_due, search.is_blind) if is_due else Needs()
    means = list(means_of(case, search.now))
    if not is_due:
        means = [one for one in means if one.name == "oil flow" and one.now is not None]
    elif not search.is_short:
        means = [one for one in means if one.now is not None]  # what holds without a stream needs none
    found = [*search.needs(means), *(search.relief() if search.is_short else ())]
    return Needs(search.words, tuple(found), is_due, search.unsaid()) if found else Needs()


class _Search:
    """One question about one case: what is held, and how cases stand to it."""

    def __init__(self, case: Case, hold: float | None, air_properties: Air) -> None:
        self.case, self.hold, self.air = case, hold, air_properties
        self.now = self.outcome([case])
        self.names, self.words = self._asked()
        self.is_short = bool(self.names) and not self.holds(self.now)[0]
        self.is_blind = self._is_blind()

    def outcome(self, cases: Sequence[Case]) -> Outcome:
        """Judge cases in one call, each at the usual reading of what it leaves out."""
        rows = [row for i, case in enumerate(cases) for row in rows_of(case, readings(case)[1][0], i)]
        return judge(from_rows(rows), self.air)

    def _asked(self) -> tuple[tuple[str, ...], str]:
        """Return the limits that have to hold, and the question in words.

        Film and interval count where they fail and would not in a bearing as cool as the air.
        """
        if self.hold is not None:
            return ("temperature",), f"{self.hold:g} degC"
        judged = self.now.judged
        names = [name for name in DECIDED_BY_HEAT if judged[name].applies[0] and not math.isnan(judged[name].use[0])]
        failing = [name for name in MAY_FAIL_BY_HEAT if judged[name].applies[0] and judged[name].use[0] > NEAR]
        if failing:
            points = self.now.points
            cool = judge(points.changed(held_temperature=points.ambient), self.air)
            names += [name for name in failing if cool.judged[name].use[0] <= NEAR]
        told = [name for name in names if judged[name].use[0] > NEAR] or names or ["what heat decides"]
        return tuple(names), f"{_listed(told)} at a use of {NEAR:g} of 1"

    def _is_blind(self) -> str:
        """Say why there can be no figures; empty where there can."""
        made = self.case.calibration
        if made is not None and not made.is_explained:
            return "no figures: a measured temperature contradicts the computed one, and nothing was calibrated"
        state = self.now.state
        if not self.names or (self.hold is not None and not (state.is_found | state.is_too_hot).all()):
            return "no figures: what heat decides cannot be judged at the usual reading of what was not said"
        return ""

    def unsaid(self) -> str:
        """Name the facts that were not said and would ask for more at their worst; empty where there are none."""
        facts, said = readings(self.case)
        facts_said = list(zip(facts, said[2:], strict=True))
        if not facts_said:
            return ""
        rows = [row for i, (_, reading) in enumerate(facts_said) for row in rows_of(self.case, reading, i)]
        levels, now = self.level(judge(from_rows(rows), self.air)), float(self.level(self.now)[0])
        moving = [fact for fact, level in zip(facts, levels.tolist(), strict=True) if level > now]
        listed = ", ".join(f"{fact.name} ({fact.text})" for fact in moving)
        return f"at the usual reading of what was not said, more at the worst: {listed}" if moving else ""

    def level(self, outcome: Outcome) -> Array:
        """Return what is held of each position: the temperature, or the greatest use; infinite where there is none."""
        if self.hold is not None:
            heat = np.where(outcome.state.is_found, outcome.state.temperature, np.inf)
            return np.asarray(np.maximum.reduceat(heat, outcome.points.starts))
        uses = np.stack([outcome.judged[name].use for name in self.names])
        return np.asarray(np.where(np.isnan(uses), np.inf, uses).max(axis=0))

    def holds(self, outcome: Outcome) -> Array:
        """Tell which positions hold what is asked."""
        return np.asarray(self.level(outcome) <= (NEAR if self.hold is None else self.hold))

    def needs(self, means: Sequence[Means]) -> list[Need]:
        """Return what each means has to be, all of them searched together."""
        paths = [self._path(one) for one in means]
        gaps = self._gaps(means, paths)
        for _ in range(ROUNDS):
            finer = [one.between(*gap, PARTS + 1) if gap else None for one, gap in zip(means, gaps, strict=True)]
            found = self._gaps(means, finer)
            gaps = [new or old for new, old in zip(found, gaps, strict=True)]
        amounts: list[float | None] = []
        for one, gap in zip(means, gaps, strict=True):
            if gap is None:  # it never holds, or does so as far as it goes
                amounts.append(None if self.is_short else one.worse)
            else:
                held, other = (gap.second, gap.first) if self.is_short else (gap.first, gap.second)
                amounts.append(_rounded(held, away_from=other))
        return self._told(means, amounts)

    def _path(self, one: Means) -> Array | None:
        start = one.least if one.now is None else one.now
        end = one.better if self.is_short or one.now is None else one.worse
        return one.between(start, end, PLACES) if start != end else None

    def _gaps(self, means: Sequence[Means], paths: Sequence[Array | None]) -> list[_Gap | None]:
        """Return the first gap of each path in which it changes whether the amount holds; one kernel call for all."""
        tried = [(i, float(x)) for i, path in enumerate(paths) if path is not None for x in path]
        if not tried:
            return [None] * len(means)
        is_held = self.holds(self.outcome([apply(self.case, _change(means[i].edits(x))) for i, x in tried]))
        gaps: list[_Gap | None] = [None] * len(means)
        last: tuple[int, float] | None = None
        for (i, x), held in zip(tried, is_held.tolist(), strict=True):
            if gaps[i] is None and held == self.is_short:
                gaps[i] = _Gap(last[1] if last is not None and last[0] == i else x, x)
            last = (i, x)
        return gaps

    def _told(self, means: Sequence[Means], amounts: Sequence[float | None]) -> list[Need]:
        """Return the needs in figures and words; a means that is not enough is told at its better end."""
        tried = [one.better if x is None else x for one, x in zip(means, amounts, strict=True)]
        if not tried:
            return []
        edits = [one.edits(x) for one, x in zip(means, tried, strict=True)]
        outcome = self.outcome([apply(self.case, _change(part)) for part in edits])
        levels = self.level(outcome)
        needs = []
        for i, (one, x) in enumerate(zip(means, amounts, strict=True)):
            if x is None:
                note = f"no {one.name} {_up_or_down(one)} {_figure(tried[i], one)} is enough: {self._still(levels[i])}"
            else:
                end = "even that holds it" if self._is_end(one, x) else ""
                note = "; ".join(part for part in (one.note(x), end, self._beside(outcome, i, one.name)) if part)
            heat = float(outcome.state.temperature[outcome.hottest[i]])
            needs.append(Need(
                means=one.name, now=one.now, needed=x, unit=one.unit, note=note,
                temperature=heat if x is not None and math.isfinite(heat) else None,
                edits=() if x is None else edits[i],
            ))  # fmt: skip
        return needs

    def _is_end(self, one: Means, x: float) -> bool:
        return not self.is_short and x == one.worse

    def _still(self, level: float) -> str:
        if not math.isfinite(level):
            return "no end of the use there" if self.hold is None else "no equilibrium there"
        return f"the use is {level:.2f} there" if self.hold is None else f"it runs at {level:.1f} degC there"

    def _beside(self, outcome: Outcome, number: int, own: str = "") -> str:
        """Name what a need brings near or beyond, and its own limit where it leaves that so."""
        left = {
            name: STATES[int(limit.state[number])]
            for name, limit in outcome.judged.items()
            if limit.applies[number] and limit.state[number] in (NEAR_CODE, BEYOND)
            and (name == own or limit.state[number] > self.now.judged[name].state[0])
        }  # fmt: skip
        return ", ".join(f"{name.replace('_', ' ')} is {state} then" for name, state in left.items())

    def relief(self) -> list[Need]:
        """Return whether a way out for grease is enough, where grease is churned that could leave by it."""
        points = self.now.points
        is_churned = self.case.is_grease and self.now.state.held_volume[: len(points)].any()
        if not is_churned or points.is_sealed[0] > 0 or self.case.housing.relief == "open":
            return []
        edits: tuple[Edit, ...] = (("housing.relief", "open"),)
        outcome = self.outcome([apply(self.case, _change(edits))])
        is_held = bool(self.holds(outcome)[0])
        heat = float(outcome.state.temperature[outcome.hottest[0]])
        note = self._beside(outcome, 0) if is_held else f"not enough: {self._still(float(self.level(outcome)[0]))}"
        now = self.case.housing.relief or "closed"
        return [Need("relief", now, "open" if is_held else None, "", note, heat if is_held else None,
                     edits if is_held else ())]  # fmt: skip


def _listed(names: Sequence[str]) -> str:
    """Return names as people list them."""
    words = [name.replace("_", " ") for name in names]
    return " and ".join([", ".join(words[:-1]), words[-1]] if len(words) > 1 else words)


def _change(edits: tuple[Edit, ...]) -> Change:
    return Change("", "", 0, edits)


def _up_or_down(one: Means) -> str:
    return "up to" if one.now is None or one.better > one.now else "down to"


def _figure(x: float, one: Means) -> str:
    return f"{x * 100:.3g} %" if one.unit == "1" else f"{x:.3g} {one.unit}"


def _rounded(held: float, *, away_from: float) -> float:
    """Return an amount in a few digits, not nearer to the amounts that do not hold."""
    if held in (0.0, away_from):
        return held
    step = 10.0 ** (math.floor(math.log10(abs(held))) + 1 - DIGITS)
    rounded = math.ceil(held / step) if held > away_from else math.floor(held / step)
    return float(f"{rounded * step:.{DIGITS}g}")
