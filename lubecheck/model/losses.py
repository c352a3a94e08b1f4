"""The loss account: from the life at reference conditions to the life there is, and what takes the difference.

A chain of positions, each with one more thing as it is, and beside it the case with one thing alone put right: all of
them rows of one kernel call. The factors of the chain multiply to the whole exactly; what the things do to each other
is the difference between that product and the product of the single ones, and is named as the interaction.
"""

from __future__ import annotations

import dataclasses
import math
from collections.abc import Callable

import numpy as np

from lubecheck.model.equilibrium import Air
from lubecheck.model.kernel import judge
from lubecheck.model.points import Points, join
from lubecheck.model.result import Loss, LossAccount
from lubecheck.physics import film, loads, viscosity
from lubecheck.physics.fatigue import SETTINGS
from lubecheck.units import Array

REFERENCE_TEMPERATURE = 70.0  # degC, ISO 15312
REFERENCE_LOAD = 0.05  # of the static rating, ISO 15312
REFERENCE_KAPPA = 4.0  # ISO 281: a thicker film counts no more
_CLEAN = {"grease": "high", "circulating": "circulating -/13/10", "bath": "bath -/13/10"}
REFERENCE_WORDS = (
    f"bearing at {REFERENCE_TEMPERATURE:g} degC, load P of {REFERENCE_LOAD:g} C0 (both ISO 15312), an oil of kappa "
    f"{REFERENCE_KAPPA:g} there, the cleanest class of ISO 281, no water, no more grease than proposed"
)

Change = Callable[[Points], Points]


def _load(points: Points) -> Points:
    is_radial = loads.TAKES_RADIAL[points.rule]
    load = REFERENCE_LOAD * points.static_rating
    return dataclasses.replace(
        points, radial_load=np.where(is_radial, load, 0.0), axial_load=np.where(is_radial, 0.0, load)
    )


def _viscosity(points: Points) -> Points:
    """An oil of the same slope that has the reference kappa at the reference temperature."""
    needed = REFERENCE_KAPPA * film.reference_viscosity.plain(points.speed, points.pitch_diameter)
    a = viscosity.constant_through.plain(REFERENCE_TEMPERATURE, nu=needed, b=points.walther_b)
    return dataclasses.replace(points, walther_a=a)


def _temperature(points: Points) -> Points:
    return points.changed(held_temperature=REFERENCE_TEMPERATURE)


def _overfill(points: Points) -> Points:
    """A bearing filled as proposed, its housing too, where that is less than there is."""
    fill = np.where(np.isnan(points.fill), np.nan, np.fmin(points.fill, points.proposed_fill))
    housing_fill = np.minimum(points.housing_fill, points.proposed_housing_fill)
    return dataclasses.replace(points, fill=fill, housing_fill=housing_fill)


def _dirt(points: Points) -> Points:
    names = [SETTINGS[code].partition(" ")[0] for code in points.setting]
    clean = [SETTINGS.index(_CLEAN.get(name, _CLEAN["grease"])) for name in names]
    return dataclasses.replace(points, setting=np.array(clean, dtype=np.intp), water=np.zeros(len(points)))


# In the order in which they are put as they are.
PARTS: tuple[tuple[str, Change], ...] = (
    ("load", _load),
    ("dirt", _dirt),
    ("viscosity", _viscosity),
    ("temperature", _temperature),
    ("overfill", _overfill),
)


def account(points: Points, air_properties: Air) -> LossAccount:
    """Return the loss account of one position: its rows under one reading."""
    chain = []
    for done in range(len(PARTS) + 1):
        changed = points
        for _, change in PARTS[done:]:
            changed = change(changed)
        chain.append(changed)
    alone = [change(points) for _, change in PARTS]
    life: Array = judge(join([*chain, *alone]), air_properties).modified_life
    steps, single = life[: len(chain)], life[len(chain) :]
    with np.errstate(all="ignore"):
        alone_factors = steps[-1] / single
        interaction = float(steps[-1] / steps[0] / np.prod(alone_factors, where=np.isfinite(alone_factors)))
    parts = []
    known: float = steps[0]
    covers: tuple[str, ...] = ()
    for i, (name, _) in enumerate(PARTS):
        after = steps[i + 1]
        is_known = bool(np.isfinite(after) and np.isfinite(known))
        parts.append(
            Loss(
                name=name,
                factor=float(after / known) if is_known else None,
                life_after_h=_finite(after),
                life_if_right_h=_finite(single[i]),
                factor_alone=_finite(alone_factors[i]),
                covers=covers if is_known else (),
            )
        )
        known, covers = (after, ()) if is_known else (known, (*covers, name))
    return LossAccount(REFERENCE_WORDS, _finite(steps[0]), _finite(steps[-1]), tuple(parts), _finite(interaction))


def _finite(value: float) -> float | None:
    return float(value) if math.isfinite(value) else None
