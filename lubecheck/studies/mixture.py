"""The mixture on the way: what the position runs on while the new lubricant takes the place of the old.

Blended viscosity by ASTM D7152 at 40 and 100 degC; the mixed thickener is softer than either, most so half and half;
the temperature range is that of the weaker of the two. All shares of all candidates are rows of the swap's own call.
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from lubecheck.data import compatibility
from lubecheck.data.lubricant import Lubricant
from lubecheck.data.lubricant_figures import YIELD_STRESS
from lubecheck.model.glance import READINGS, Glances, state_of_readings
from lubecheck.model.kernel import Outcome
from lubecheck.model.limits import STATES
from lubecheck.model.points import Points
from lubecheck.physics import fatigue, viscosity
from lubecheck.units import Array

SHARES = (0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9)  # of the new lubricant, between old and new
_GRADES = {grade: math.log(stress) for grade, stress in YIELD_STRESS.items()}
# How much of its yield stress a half-and-half mixture loses, by the state of the pair: estimates of this program, from
# one grade softer (mixes, 0.2 to 0.5) to running out (do not mix, 0.6 to 0.95).
SOFTENING = {"mixes": 0.3, "test first": 0.6, "not known": 0.8, "do not mix": 0.85}


@dataclass(frozen=True, slots=True)
class Share:
    """The position with one share of the new lubricant; 0 is before and 1 after the change."""

    share: float
    nu_40: float  # mm^2/s
    viscosity_ratio: float | None
    temperature: float | None  # degC
    film_use: float | None
    consistency: str  # NLGI grade that the mixture comes to; empty for oil


@dataclass(frozen=True, slots=True)
class Path:
    """The change from old to new: each share, and the worst that each limit comes to between them."""

    shares: tuple[Share, ...]
    film_state: str
    film_use: float | None
    temperature_state: str
    temperature_use: float | None
    allowed_interval: float | None  # h, the shortest of all shares
    softest: str  # NLGI grade at the worst share; empty for oil
    dips: bool  # the film is thinner on the way than both before and after


def blends(old: Lubricant, new: Lubricant) -> bool:
    """Tell whether the two base oils make one oil, so that a blended viscosity means anything."""
    same = compatibility.is_same(old, new)
    return same or compatibility.of("base oil", old.base_oil, new.base_oil).state in ("mixes", "test first")


def points_between(before: Points, after: Points, old: Lubricant, news: Sequence[Lubricant]) -> list[Points]:
    """Return the points of every share: `before` is the old position, `after` the new ones, a block each.

    The amounts are those of the new position: what is planned stays planned on the way.
    """
    rows = len(before)
    each = np.arange(len(news)).repeat(rows)

    def of_new(name: str) -> Array:
        return np.array([getattr(new, name) for new in news], dtype=np.float64)[each]

    was = before.take(np.tile(np.arange(rows), len(news)))
    softening = np.array(
        [SOFTENING[compatibility.of("thickener", old.thickener, new.thickener).state] if new.kind == "grease" else 0.0
         for new in news]
    )[each]  # fmt: skip
    softening = np.where(np.array([compatibility.is_same(old, new) for new in news])[each], 0.0, softening)
    made = []
    for share in SHARES:
        nu_40 = viscosity.blend.plain(nu_a=old.nu_40, nu_b=of_new("nu_40"), share_b=share)
        nu_100 = viscosity.blend.plain(nu_a=old.nu_100, nu_b=of_new("nu_100"), share_b=share)
        a, b = viscosity.walther_constants.plain(nu_40=nu_40, nu_100=nu_100)
        stress = (1 - share) * was.yield_stress + share * after.yield_stress
        additive = np.where((was.additive > 0) & (after.additive > 0), fatigue.ADDITIVES.index("extreme pressure"), 0)
        made.append(
            after.changed(
                walther_a=a,
                walther_b=b,
                density=(1 - share) * was.density + share * after.density,
                yield_stress=stress * (1 - softening * 4 * share * (1 - share)),
                lowest=np.maximum(was.lowest, after.lowest),
                highest=np.minimum(was.highest, after.highest),
                life_reference=np.minimum(was.life_reference, after.life_reference),
                additive=additive,
            )
        )
    return made


def path(glances: Glances, number: int, old: Lubricant, new: Lubricant) -> Path:
    """Return the path of candidate `number`, counted from 1: case 0 is before, the shares are behind all."""
    outcome = glances.outcome
    candidates = len(glances.cases) - 1
    first = READINGS * (1 + candidates)  # positions of before and after come first
    ends = [0, *(first + READINGS * (candidates * i + number - 1) for i in range(len(SHARES))), READINGS * number]
    usual = np.array(ends)
    shares = np.array((0.0, *SHARES, 1.0))
    blend = viscosity.blend.plain(nu_a=old.nu_40, nu_b=new.nu_40, share_b=shares)
    made = tuple(
        _share(outcome, position, float(share), float(nu_40), is_grease=new.kind == "grease")
        for position, share, nu_40 in zip(ends, shares, blend, strict=True)
    )
    between = usual[1:-1]
    worst: dict[str, tuple[str, float | None]] = {}
    for name in ("film", "temperature"):
        use = outcome.judged[name].use
        states = state_of_readings(use[between], use[between + 1])
        worst[name] = STATES[int(states.max())], _finite(np.where(np.isnan(use), np.inf, use)[between].max())
    allowed = outcome.allowed_interval[usual]
    uses = outcome.judged["film"].use
    grade = min((one.consistency for one in made), key=_softness) if new.kind == "grease" else ""
    return Path(
        shares=made,
        film_state=worst["film"][0],
        film_use=worst["film"][1],
        temperature_state=worst["temperature"][0],
        temperature_use=worst["temperature"][1],
        allowed_interval=_finite(allowed.min()),
        softest=grade,
        dips=bool(uses[between].max() > max(uses[0], uses[ends[-1]]) + 1e-9),
    )


def worst_state(one: Path) -> str:
    """Return the worse of the two states on the way."""
    return max(one.film_state, one.temperature_state, key=STATES.index)


def _share(outcome: Outcome, position: int, share: float, nu_40: float, *, is_grease: bool) -> Share:
    points = outcome.points
    low, high = points.case.searchsorted((position, position + 1))
    kappa = float(outcome.kappa[low:high].min())
    return Share(
        share=share,
        nu_40=nu_40,
        viscosity_ratio=_finite(kappa),
        temperature=_finite(outcome.state.temperature[outcome.hottest[position]]),
        film_use=_finite(outcome.judged["film"].use[position]),
        consistency=nearest_grade(float(points.yield_stress[low])) if is_grease else "",
    )


def nearest_grade(stress: float) -> str:
    """Return the NLGI grade whose usual yield stress is nearest.

    >>> nearest_grade(300.0), nearest_grade(60.0)
    ('2', '00')
    """
    known = math.log(max(stress, 1.0))
    return min(_GRADES, key=lambda grade: abs(known - _GRADES[grade]))


def _softness(grade: str) -> float:
    return YIELD_STRESS[grade]


def _finite(value: float) -> float | None:
    return float(value) if np.isfinite(value) else None
