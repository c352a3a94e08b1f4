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
    dips: bool  # film or heat is worse on the way than both before and after
    state: str  # of what is worse on the way than at both ends; the ends have their own verdict


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


def paths(glances: Glances, old: Lubricant, news: Sequence[Lubricant]) -> list[Path]:
    """Return the path of every candidate: case 0 is before, the candidates come after it, the shares behind all."""
    outcome, count = glances.outcome, len(news)
    first = READINGS * (1 + count)
    numbers = np.arange(count)
    shares = np.array((0.0, *SHARES, 1.0))
    columns = [np.zeros(count, dtype=np.intp)]
    columns += [first + READINGS * (count * i + numbers) for i in range(len(SHARES))]
    ends = np.stack([*columns, READINGS * (1 + numbers)], axis=1)  # positions by candidate and share
    starts = outcome.points.starts
    nu_40 = viscosity.blend.plain(
        nu_a=old.nu_40, nu_b=np.array([new.nu_40 for new in news])[:, None], share_b=shares[None, :]
    )
    kappa = np.minimum.reduceat(outcome.kappa, starts)[ends]
    temperature = outcome.state.temperature[outcome.hottest[ends]]
    stress = outcome.points.yield_stress[starts[ends]]
    film, heat = (outcome.judged[name].use for name in ("film", "temperature"))
    between = ends[:, 1:-1]
    film_states, heat_states = (state_of_readings(use[between], use[between + 1]).max(axis=1) for use in (film, heat))
    film_uses, heat_uses = (np.where(np.isnan(use), np.inf, use)[between].max(axis=1) for use in (film, heat))
    film_dips, heat_dips = (
        use.max(axis=1) > np.nan_to_num(ends_of[ends[:, [0, -1]]], nan=np.inf).max(axis=1) + 1e-9
        for use, ends_of in ((film[between], film), (heat[between], heat))
    )
    states = np.maximum(np.where(film_dips, film_states, 0), np.where(heat_dips, heat_states, 0))
    allowed = outcome.allowed_interval[ends].min(axis=1)
    made = []
    for i, new in enumerate(news):
        is_grease = new.kind == "grease"
        columns_of = (nu_40[i].tolist(), kappa[i].tolist(), temperature[i].tolist(), film[ends[i]].tolist())
        grades = [nearest_grade(one) if is_grease else "" for one in stress[i].tolist()]
        made.append(
            Path(
                shares=tuple(
                    Share(share, nu, _finite(ratio), _finite(degrees), _finite(use), grade)
                    for share, nu, ratio, degrees, use, grade in zip(shares.tolist(), *columns_of, grades, strict=True)
                ),
                film_state=STATES[int(film_states[i])],
                film_use=_finite(film_uses[i]),
                temperature_state=STATES[int(heat_states[i])],
                temperature_use=_finite(heat_uses[i]),
                allowed_interval=_finite(allowed[i]),
                softest=min(grades, key=lambda grade: YIELD_STRESS[grade]) if is_grease else "",
                dips=bool(film_dips[i] or heat_dips[i]),
                state=STATES[int(states[i])],
            )
        )
    return made


def nearest_grade(stress: float) -> str:
    """Return the NLGI grade whose usual yield stress is nearest.

    >>> nearest_grade(300.0), nearest_grade(60.0)
    ('2', '00')
    """
    known = math.log(max(stress, 1.0))
    return min(_GRADES, key=lambda grade: abs(known - _GRADES[grade]))


def _finite(value: float) -> float | None:
    return float(value) if math.isfinite(value) else None
