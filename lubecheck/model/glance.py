"""Many cases at a glance: states, uses and key figures of each, all of them rows of one kernel call.

A check also reads each missing fact alone and each uncertain input, to name doubts and draw bands. Where hundreds of
lubricants or changes are compared, the two readings that decide the states are enough: the usual one and the worst.
"""

from __future__ import annotations

import dataclasses
from collections.abc import Sequence
from dataclasses import dataclass
from typing import Any

import numpy as np

from lubecheck.data import air
from lubecheck.model import calibration_words, limits, wording
from lubecheck.model.check import LIMITS, readings
from lubecheck.model.entries import Case
from lubecheck.model.equilibrium import Air, Equilibrium
from lubecheck.model.kernel import Outcome, judge
from lubecheck.model.limits import BEYOND, NEAR_CODE, STATES, UNKNOWN, Judged
from lubecheck.model.plan import plan_line
from lubecheck.model.points import Codes, Flags, Points, from_rows, join
from lubecheck.model.result import Declared, Figures, Limit
from lubecheck.model.rows import rows_of
from lubecheck.units import Array

READINGS = 2  # positions a case takes: usual, worst


class Key(Figures):
    """The figures that lubricants and changes are compared by."""

    temperature = Declared("degC", "temperature of the hottest duty point")
    viscosity_ratio = Declared("1", "least viscosity ratio kappa of the duty points")
    churning_power = Declared("W", "heat that overfilled grease makes")
    friction_power = Declared("W", "heat of all friction")
    first_fill = Declared("g", "grease for the first fill, as planned or proposed")
    regrease_quantity = Declared("g", "grease for each regreasing, as planned or proposed")
    interval = Declared("h", "running hours between regreasings or oil changes, as planned or proposed")
    allowed_interval = Declared("h", "running hours that the lubricant lasts")
    modified_life = Declared("h", "modified rating life at the wanted reliability")
    lowest = Declared("degC", "lowest temperature that the lubricant may be started at")


@dataclass(frozen=True, slots=True)
class Glance:
    """One case at a glance."""

    verdict: str
    governing: str
    reason: str  # what is said of the governing limit
    limits: tuple[Limit, ...]
    figures: Key

    @property
    def greatest_use(self) -> float:
        """The greatest use of all limits; infinity where one has no finite use."""
        return max(float("inf") if limit.use is None else limit.use for limit in self.limits)


@dataclass(frozen=True)
class Glances:
    """Many cases in one outcome, two positions each; positions beyond those of the cases are the caller's."""

    cases: Sequence[Case]
    outcome: Outcome
    states: Codes  # [limit, case], 0 where the limit does not apply
    uses: Array  # [limit, case], at the usual reading
    applies: Flags  # [limit, case]
    verdicts: Codes  # [case], position in limits.STATES

    def at(self, number: int, part: Outcome | None = None) -> Glance:
        """Return one case at a glance; `part` is its part of the outcome where that was cut out already."""
        case, outcome = self.cases[number], part or part_of(self.outcome, READINGS * number, READINGS)
        judged = tuple(
            Limit(name, STATES[self.states[i, number]], _finite(self.uses[i, number]), _finite(one.demand[0]),
                  _finite(one.allowed[0]), LIMITS[name][0], LIMITS[name][1], "")
            for i, (name, one) in enumerate(outcome.judged.items())
            if self.applies[i, number]
        )  # fmt: skip
        verdict = STATES[self.verdicts[number]]
        governing = _governing(judged, verdict)
        return Glance(verdict, governing.name, _reason(governing, case, outcome), judged, _key(case, outcome))

    def greatest_use(self, number: int) -> float:
        """Return the greatest use of a case's limits."""
        use = np.where(self.applies[:, number], self.uses[:, number], 0.0)
        return float(np.where(np.isnan(use), np.inf, use).max())


def points_of(cases: Sequence[Case]) -> Points:
    """Return the cases' points, each at the usual reading of what it leaves out and at the worst."""
    rows: list[dict[str, float]] = []
    for i, case in enumerate(cases):
        moving, (usual, worst, *_) = readings(case)
        said = rows_of(case, usual, READINGS * i)
        rows += said
        # Where nothing that was left out can be worse, the worst reading is the usual one.
        rows += (
            rows_of(case, worst, READINGS * i + 1) if moving else [{**row, "case": READINGS * i + 1} for row in said]
        )
    return from_rows(rows)


def glances(cases: Sequence[Case], *, more: Sequence[Points] = (), air_properties: Air = air.properties) -> Glances:
    """Judge many cases in one call; `more` points are judged with them and stand behind them in the outcome."""
    points = points_of(cases)
    outcome = judge(join([points, *more]) if more else points, air_properties)
    count = READINGS * len(cases)
    states, uses, applies = [], [], []
    for name, one in outcome.judged.items():
        usual = one.use[0:count:READINGS]
        worst = one.use[1:count:READINGS]
        if name == "interval":  # the worst reading judges the interval that the usual one plans
            with np.errstate(all="ignore"):
                worst = one.demand[0:count:READINGS] / one.allowed[1:count:READINGS]
        applies.append(one.applies[0:count:READINGS])
        states.append(np.where(applies[-1], state_of_readings(usual, worst), limits.WITHIN))
        uses.append(usual)
    stacked = np.stack(states)
    return Glances(cases, outcome, stacked, np.stack(uses), np.stack(applies), stacked.max(axis=0))


def state_of_readings(usual: Array, worst: Array) -> Codes:
    """Return the state of a limit from its use at the usual and at the worst reading of what was not said."""
    first, second = limits.state_of(usual), limits.state_of(worst)
    doubtful = np.where(second == NEAR_CODE, NEAR_CODE, np.maximum(first, UNKNOWN))
    made: Codes = np.where(second > first, doubtful, first)
    return made


def part_of(outcome: Outcome, first: int, count: int) -> Outcome:
    """Return some positions of an outcome that follow each other as an outcome of their own."""
    low, high = (int(row) for row in outcome.points.case.searchsorted((first, first + count)))
    rows, positions = slice(low, high), slice(first, first + count)

    def cut(value: Any, by: slice) -> Any:
        return value[by] if isinstance(value, np.ndarray) else value

    points = {field.name: getattr(outcome.points, field.name)[rows] for field in dataclasses.fields(Points)}
    points["case"] = points["case"] - first
    state = {field.name: cut(getattr(outcome.state, field.name), rows) for field in dataclasses.fields(Equilibrium)}
    made: dict[str, Any] = {}
    for field in dataclasses.fields(Outcome):
        value = getattr(outcome, field.name)
        is_row = field.name in ("reference_viscosity", "kappa", "contamination", "life_factor", "load_ratio")
        made[field.name] = cut(value, rows if is_row else positions)
    made["points"], made["state"] = Points(**points), Equilibrium(**state)
    made["hottest"] = made["hottest"] - low
    made["judged"] = {
        name: Judged(
            demand=one.demand[positions],
            allowed=one.allowed[positions],
            use=one.use[positions],
            applies=one.applies[positions],
            row=one.row[positions] - low,
            state=one.state[positions],
        )
        for name, one in outcome.judged.items()
    }
    return Outcome(**made)


def _governing(judged: Sequence[Limit], verdict: str) -> Limit:
    if verdict == STATES[UNKNOWN]:
        return next(limit for limit in judged if limit.state == verdict)
    if verdict == STATES[BEYOND]:
        judged = [limit for limit in judged if limit.state == verdict]
    return max(judged, key=lambda limit: float("inf") if limit.use is None else limit.use)


def _reason(limit: Limit, case: Case, outcome: Outcome) -> str:
    use = "no finite use" if limit.use is None else f"use {limit.use:.2f} of 1"
    doubt = "" if limit.use is not None else calibration_words.doubt(case, limit.name)
    if limit.state == STATES[UNKNOWN] and limit.use is not None:
        facts = [fact.name for fact in readings(case)[0] if limit.name in fact.limits]
        doubt = f"hangs on what was not said: {', '.join(facts)}"
    return wording.join(use, doubt, wording.limit_note(limit.name, case, outcome))


def _key(case: Case, outcome: Outcome) -> Key:
    plan = plan_line(case, outcome)
    usual = outcome.points.case == 0
    hottest = int(outcome.hottest[0])
    kappa = outcome.kappa[usual]
    made: Key = Key.of(
        {
            "temperature": float(outcome.state.temperature[hottest]),
            "viscosity_ratio": float("nan") if np.isnan(kappa).any() else float(kappa.min()),
            "churning_power": float(outcome.state.churning_power[hottest]),
            "friction_power": float(outcome.state.friction_power[hottest]),
            "first_fill": plan.first_fill_g,
            "regrease_quantity": plan.regrease_g,
            "interval": plan.interval_h,
            "allowed_interval": float(outcome.allowed_interval[0]),
            "modified_life": float(outcome.modified_life[0]),
            "lowest": case.lubricant.lowest,
        }
    )
    return made


def _finite(value: float) -> float | None:
    return float(value) if np.isfinite(value) else None
