"""Courses: the rows of every start and regreasing of a case, at every reading, followed in one transient.

They run from the states of the check itself: the same points, readings of what was left unsaid and ends of the
uncertain inputs, and some more for what is uncertain about the way: how much fresh grease churns, for how many
revolutions, what the housing weighs, how fast the machine warms.
"""

from __future__ import annotations

import dataclasses
from collections.abc import Collection, Mapping, Sequence
from dataclasses import dataclass

import numpy as np

from lubecheck.data import air
from lubecheck.model import check as checking
from lubecheck.model.balance import USUAL_STILL, balance_of
from lubecheck.model.check import Triple, Variants
from lubecheck.model.entries import Case
from lubecheck.model.entry import Amount
from lubecheck.model.equilibrium import Air, Equilibrium, solve
from lubecheck.model.points import Flags, Points, join
from lubecheck.model.rows import given_volume, placed
from lubecheck.model.transient import Course, History, follow
from lubecheck.physics import churning, warm_up
from lubecheck.units import Array

FIRST_START, START, AFTER_GREASING, COLD_START = "first start", "start", "after greasing", "cold start"
COURSES = (FIRST_START, START, AFTER_GREASING, COLD_START)
MEANINGS = {
    FIRST_START: "the first fill is fresh and churns until it has found its place; the machine starts cold",
    START: "a start from the ambient, the lubricant run in; the machine starts cold",
    AFTER_GREASING: "one regreasing of a position that runs steadily",
    COLD_START: "a start from the coldest temperature that is stated, in air that stays so cold",
}

# What is uncertain about the way and not about its ends: a field of Course, its low and high end over the nominal.
_OWN = (
    ("fresh", (warm_up.FRESH.low - 1) / (warm_up.FRESH.nominal - 1),
     (warm_up.FRESH.high - 1) / (warm_up.FRESH.nominal - 1)),
    ("channelling", warm_up.CHANNELLING.low / warm_up.CHANNELLING.nominal,
     warm_up.CHANNELLING.high / warm_up.CHANNELLING.nominal),
    ("housing_mass", warm_up.WALL.low / warm_up.WALL.nominal, warm_up.WALL.high / warm_up.WALL.nominal),
    ("machine_time", warm_up.MACHINE_TIME.low / warm_up.MACHINE_TIME.nominal,
     warm_up.MACHINE_TIME.high / warm_up.MACHINE_TIME.nominal),
)  # fmt: skip
_ARRAYS = tuple(field.name for field in dataclasses.fields(Course) if field.name != "points")


@dataclass(frozen=True, slots=True)
class Run:
    """One course at every reading: its rows in the history, usual first, then worst, and pairs of ends."""

    name: str
    points: Points
    history: History
    ends: Sequence[int]  # rows at an end of an uncertain input, low and high in turn
    dose: float  # g of one regreasing, planned or proposed
    is_too_hot: Flags  # rows in which there is no state below the top of the search

    @property
    def known(self) -> Array:
        """1 in every row that has a state to go to, else not a number."""
        return np.where(np.isfinite(self.history.outer[-1]), 1.0, np.nan)

    @property
    def ambient(self) -> Array:
        """Temperature of the air, degC."""
        return self.points.ambient

    @property
    def peaks(self) -> Array:
        """The most that a sensor on the housing shows, degC."""
        peaks: Array = self.history.outer.max(axis=0)
        return peaks

    @property
    def bearing_peaks(self) -> Array:
        """The most that bearing and lubricant come to, degC."""
        peaks: Array = self.history.lubricant.max(axis=0)
        return peaks

    def band(self, of_rows: Array) -> Triple:
        """A figure at the usual reading and its band."""
        return _band(of_rows, self.ends)


def runs_of(
    case: Case, air_properties: Air = air.properties, *, wanted: Collection[str] = COURSES
) -> Mapping[str, Run]:
    """Follow the wanted courses of the case, where it has them, at every reading, all in one transient."""
    variants = checking.variants_of(case, air_properties, at_ends=True)
    ways = _from_here(case, variants, air_properties, wanted)
    cold = _in_the_cold(case) if COLD_START in wanted else None
    if cold is not None:
        ways[COLD_START] = _start(checking.variants_of(cold, air_properties, at_ends=True), cold, is_fresh=False)
    spread = {name: _with_own_ends(case, way) for name, way in ways.items()}
    history = follow(_together(list(spread.values())), air_properties)
    planned, proposed = variants.outcome.points.regrease_mass[0], variants.outcome.proposed_regrease[0]
    dose = float(proposed if np.isnan(planned) else planned)
    runs, first = {}, 0
    for name, way in spread.items():
        rows = slice(first, first + len(way.points))
        part = History(**{field.name: getattr(history, field.name)[:, rows] for field in dataclasses.fields(History)})
        before_own = len(ways[name].points)
        inputs = range(2 + len(variants.facts), before_own)
        ends = [*inputs, *range(before_own, len(way.points))]
        end = solve(way.points, air_properties)
        runs[name] = Run(name, way.points, _only_found(part, end), ends, dose, end.is_too_hot)
        first = rows.stop
    return runs


def _only_found(history: History, end: Equilibrium) -> History:
    """Return a history in which rows that have no equilibrium to go to are not numbers."""
    lost = np.where(end.is_found, 1.0, np.nan)
    return History(history.time, *(getattr(history, name) * lost for name in ("inner", "lubricant", "outer", "torque")))


def _from_here(case: Case, variants: Variants, air_properties: Air, wanted: Collection[str]) -> dict[str, Course]:
    """Return the courses of the case in its own air."""
    ways: dict[str, Course] = {}
    if FIRST_START in wanted and case.is_grease:
        ways[FIRST_START] = _start(variants, case, is_fresh=True)
    if START in wanted:
        ways[START] = _start(variants, case, is_fresh=False)
    if AFTER_GREASING in wanted and case.is_grease and case.bearing.sealed_sides < 2:
        ways[AFTER_GREASING] = _regreased(variants, case, air_properties)
    return ways


def _rows(variants: Variants) -> tuple[Points, Equilibrium]:
    """Return the hottest row of the usual reading, in every reading of the case."""
    hottest = int(variants.outcome.hottest[0])
    rows = np.arange(hottest, len(variants.outcome.points), variants.rows)
    state = variants.outcome.state
    picked = {
        field.name: getattr(state, field.name)[rows]
        for field in dataclasses.fields(Equilibrium)
        if isinstance(getattr(state, field.name), np.ndarray)
    }
    return variants.outcome.points.take(rows), dataclasses.replace(state, **picked)


def _housing(case: Case, points: Points) -> Array:
    """Mass of the housing in every row, stated or estimated, g."""
    if case.housing.mass is not None:
        return np.full(len(points), case.housing.mass)
    area = np.where(np.isnan(points.housing_area), points.conductance / USUAL_STILL * 1e6, points.housing_area)
    mass: Array = warm_up.housing_mass.plain(area)
    return mass


def _start(variants: Variants, case: Case, *, is_fresh: bool) -> Course:
    """A start at the ambient, with grease that has found its place already or with a fresh fill."""
    points, steady = _rows(variants)
    none = np.zeros(len(points))
    clearing = none
    if is_fresh:
        excess = np.maximum(np.nan_to_num(points.fill) - churning.CLEAR_SHARE, 0.0) * points.free_volume
        clearing = np.maximum(excess - steady.held_volume, 0.0)
    return Course(
        points=points,
        inner=points.ambient,
        lubricant=points.ambient,
        outer=points.ambient,
        housing_mass=_housing(case, points),
        fresh=_fresh(points, steady, np.ones(len(points)), clearing) if is_fresh else none,
        clearing=clearing,
        channelling=np.full(len(points), warm_up.CHANNELLING.nominal),
        machine_time=np.full(len(points), warm_up.MACHINE_TIME.nominal),
    )


def _regreased(variants: Variants, case: Case, air_properties: Air) -> Course:
    """One regreasing of a steady position: what the case says was given, else the dose that is planned or proposed."""
    points, _ = _rows(variants)
    per_cm3 = points.density / 1000
    if case.grease.given is not None:
        volume = given_volume(case.grease, float(points.free_volume[0]), float(per_cm3[0]))
        dose = np.full(len(points), volume)
        nothing = dataclasses.replace(case.grease, given=Amount(0.0, "mass", "g"))
        earlier = checking.variants_of(dataclasses.replace(case, grease=nothing), air_properties, at_ends=True)
        before, _ = _rows(earlier)
        after = points
    else:
        planned = np.where(np.isnan(points.regrease_mass), variants.outcome.proposed_regrease[0], points.regrease_mass)
        dose = planned / per_cm3
        before = points
        fill, beside = placed(
            points.fill + dose / points.free_volume, points.free_volume, points.housing_fill, points.void
        )
        after = points.changed(fill=fill, housing_fill=beside)
    steady = solve(before, air_properties)
    later = solve(after, air_properties)
    most = (1.0 - churning.CLEAR_SHARE) * points.free_volume
    clearing = np.maximum(np.minimum(steady.held_volume + dose, most) - later.held_volume, 0.0)
    share = np.minimum(1.0, dose / (churning.CLEAR_SHARE * points.free_volume))
    return Course(
        points=after,
        inner=steady.inner,
        lubricant=steady.temperature,
        outer=steady.outer,
        housing_mass=_housing(case, points),
        fresh=_fresh(after, steady, share, clearing),
        clearing=clearing,
        channelling=np.full(len(points), warm_up.CHANNELLING.nominal),
        machine_time=np.zeros(len(points)),
    )


def _fresh(points: Points, steady: Equilibrium, share: Array, clearing: Array) -> Array:
    """Torque of fresh grease as if at 25 degC, N mm; with what is churned it stays in the published range."""
    balance = balance_of(points)
    churned = dataclasses.replace(balance, held_volume=balance.held_volume + clearing).at(
        steady.outer - balance.floor
    ).churning_torque  # fmt: skip
    added = warm_up.fresh_torque.plain(steady.viscous_torque, fresh=share, factor=warm_up.FRESH.nominal)
    room = np.maximum(churning.MOST_CHURNING * steady.viscous_torque - churned, 0.0)
    fresh: Array = np.minimum(added, room) / churning.softening.plain(steady.temperature)
    return fresh


def _with_own_ends(case: Case, way: Course) -> Course:
    """Return a way with rows more: the usual reading at the ends of what is uncertain about the way."""
    rows = [way]
    for name, *ends in _OWN:
        if name == "housing_mass" and case.housing.mass is not None:
            continue
        for factor in ends:
            usual = Course(points=way.points.take([0]), **{n: getattr(way, n)[:1] for n in _ARRAYS})
            rows.append(dataclasses.replace(usual, **{name: getattr(usual, name) * factor}))
    return _together(rows)


def _together(ways: Sequence[Course]) -> Course:
    """Return several courses as one, their rows one after the other."""
    arrays = {name: np.concatenate([getattr(way, name) for way in ways]) for name in _ARRAYS}
    return Course(points=join(way.points for way in ways), **arrays)


def _in_the_cold(case: Case) -> Case | None:
    """Return the case in the coldest air that it says of a start; none where that is not said."""
    around = case.surroundings
    if around.coldest is None:
        return None
    said = [around.ambient, around.ambient_lowest, *(around.months or ()), *(duty.ambient for duty in case.duty)]
    coldest = min(around.coldest, *(one for one in said if one is not None))
    cold = dataclasses.replace(around, ambient=coldest, months=None, ambient_lowest=None, ambient_highest=None)
    return dataclasses.replace(
        case, surroundings=cold, duty=tuple(dataclasses.replace(duty, ambient=None) for duty in case.duty)
    )


def _band(figure: Array, ends: Sequence[int]) -> Triple:
    """Return a figure's value, its first, and its band: the uncertain inputs' effects, as the root of their squares.

    ends: where the figure stands with an input at its low and at its high end, in turn
    """
    value = figure[0]
    with np.errstate(invalid="ignore"):  # what is without end has no band
        change = figure[list(ends)].reshape(-1, 2) - value
    up = np.maximum(change.max(axis=1, initial=0.0), 0.0)
    down = np.minimum(change.min(axis=1, initial=0.0), 0.0)
    low = value - np.sqrt((down**2).sum())
    if (figure >= 0).all():  # a figure that has no other side stays on its own
        low = np.maximum(low, 0.0)
    return float(value), float(low), float(value + np.sqrt((up**2).sum()))
