"""Which load, rating, oil or cleanliness reaches the wanted life of a position, temperature and film following.

Each question is one bracketed search; all of them are halved together, each step one kernel call.
"""

from __future__ import annotations

import dataclasses
import math
from collections.abc import Callable
from dataclasses import dataclass

import numpy as np

from lubecheck.data import air
from lubecheck.model import calibration_words, wording
from lubecheck.model.check import readings
from lubecheck.model.entries import Case
from lubecheck.model.equilibrium import Air
from lubecheck.model.kernel import judge
from lubecheck.model.points import BEYOND_SETTINGS, Points, from_rows, join
from lubecheck.model.rows import rows_of
from lubecheck.physics import fatigue, viscosity
from lubecheck.physics.wanted_life import bracketed_root
from lubecheck.studies.calibrate import calibrated
from lubecheck.units import Array


@dataclass(frozen=True, slots=True)
class Answer:
    """What one thing alone would have to be; None where it cannot reach the wanted life within ISO 281."""

    question: str
    unit: str  # empty for cleanliness, whose figures are words
    now: float | str
    needed: float | str | None
    factor: float | None  # on what there is
    temperature: float | None  # degC, of the hottest duty point then
    viscosity_ratio: float | None
    note: str


@dataclass(frozen=True, slots=True)
class WantedLife:
    """The wanted life of a position, and what each thing alone would have to be for it."""

    title: str
    bearing: str
    lubricant: str
    wanted_life_h: float
    reliability: float
    life_h: float | None
    answers: tuple[Answer, ...]
    notes: tuple[str, ...]


def _loaded(points: Points, factor: float) -> Points:
    """A smaller load is asked for as a greater divisor, so that life rises with the factor."""
    return dataclasses.replace(points, radial_load=points.radial_load / factor, axial_load=points.axial_load / factor)


def _rated(points: Points, factor: float) -> Points:
    return dataclasses.replace(
        points,
        dynamic_rating=points.dynamic_rating * factor,
        static_rating=points.static_rating * factor,
        fatigue_limit=points.fatigue_limit * factor,
    )


def _thick(points: Points, factor: float) -> Points:
    at = viscosity.viscosity_from_constants.plain
    nu_40, nu_100 = (
        factor * at(np.full(len(points), t), a=points.walther_a, b=points.walther_b) for t in (40.0, 100.0)
    )
    a, b = viscosity.walther_constants.plain(nu_40=nu_40, nu_100=nu_100)
    return dataclasses.replace(points, walther_a=a, walther_b=b)


_CHANGES: tuple[Callable[[Points, float], Points], ...] = (_loaded, _rated, _thick)
_THINNEST = 0.02  # of the viscosity there is
_NOTE = {
    "load": "largest load, radial and axial together",
    "rating": "smallest rating of a bearing of the same size, C0 and Cu in proportion",
    "viscosity": "thinnest oil at 40 degC, in proportion at 100 degC",
    "cleanliness": "dirtiest class of ISO 281 for this supply",
}


def study(case: Case, life: float | None = None, *, air_properties: Air = air.properties) -> WantedLife:
    """Return what reaches the wanted life: the case's own, or the one given in hours."""
    case = calibrated(case, air_properties=air_properties)
    facts, said = readings(case)
    points = from_rows(rows_of(case, said[0]))
    wanted = life if life is not None else float(points.life_target[0])
    now = judge(points, air_properties)

    def surplus(factors: Array) -> Array:
        changed = [change(points, float(x)) for change, x in zip(_CHANGES, np.atleast_1d(factors), strict=True)]
        return np.asarray(judge(join(changed), air_properties).modified_life / wanted - 1.0)

    kappa = float(np.nanmin(now.kappa, initial=np.inf))
    heaviest = float(now.load_ratio.max()) / fatigue.GREATEST_LOAD_RATIO
    thickest = max(1.0, fatigue.GREATEST_VISCOSITY_RATIO / kappa) if math.isfinite(kappa) else 1.0
    low = np.array([heaviest, heaviest, _THINNEST])
    roots = bracketed_root(surplus, low, np.array([1e4 * heaviest, 1e4 * heaviest, thickest]))
    is_found = np.isfinite(roots)
    at = judge(
        join(change(points, float(x) if math.isfinite(x) else 1.0) for change, x in zip(_CHANGES, roots, strict=True)),
        air_properties,
    )
    present = (
        ("load", float(now.state.equivalent_load.max()), "N"),
        ("rating", float(points.dynamic_rating[0]), "N"),
        ("viscosity", case.lubricant.nu_40, "mm^2/s"),
    )
    answers = []
    for i, (name, value, unit) in enumerate(present):
        factor = 1 / roots[i] if name == "load" else roots[i]
        row = int(at.hottest[i])
        answers.append(
            Answer(
                question=name,
                unit=unit,
                now=value,
                needed=float(value * factor) if is_found[i] else None,
                factor=float(factor) if is_found[i] else None,
                temperature=_finite(at.state.temperature[row]) if is_found[i] else None,
                viscosity_ratio=_finite(at.kappa[row]) if is_found[i] else None,
                note=_NOTE[name],
            )
        )
    answers.append(_cleanliness(points, wanted, air_properties))
    notes = [f"not said, read as usual: {fact.name}" for fact in facts if "fatigue_life" in fact.limits]
    notes += [] if case.calibration is None else [calibration_words.said(case.calibration)]
    notes.append("one thing is changed at a time and the rest is as it is; temperature and film follow")
    return WantedLife(
        title=case.title,
        bearing=wording.bearing(case.bearing),
        lubricant=wording.lubricant(case.lubricant),
        wanted_life_h=wanted,
        reliability=float(points.reliability[0]),
        life_h=_finite(now.modified_life[0]),
        answers=tuple(answers),
        notes=tuple(notes),
    )


def _cleanliness(points: Points, wanted: float, air_properties: Air) -> Answer:
    """Return the dirtiest class of the same supply that reaches the life."""
    code = int(points.setting[0])
    present = fatigue.OFF_SCALE if code == BEYOND_SETTINGS else fatigue.SETTINGS[code]
    supply = present.partition(" -/")[0] if " -/" in present else ""
    classes = [name for name in fatigue.SETTINGS if (name.partition(" -/")[0] if " -/" in name else "") == supply]
    classes = [name for name in classes if name != fatigue.OFF_SCALE]
    outcome = judge(join(points.changed(setting=fatigue.SETTINGS.index(name)) for name in classes), air_properties)
    reaching = [i for i in range(len(classes)) if outcome.modified_life[i] >= wanted]
    if not reaching:
        return Answer("cleanliness", "", present, None, None, None, None, _NOTE["cleanliness"])
    best = reaching[-1]
    row = int(outcome.hottest[best])
    return Answer(
        question="cleanliness",
        unit="",
        now=present,
        needed=classes[best],
        factor=None,
        temperature=_finite(outcome.state.temperature[row]),
        viscosity_ratio=_finite(outcome.kappa[row]),
        note=_NOTE["cleanliness"],
    )


def _finite(value: float) -> float | None:
    return float(value) if math.isfinite(value) else None
