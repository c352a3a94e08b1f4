"""The life of a machine's bearings together: the product of their reliabilities."""

from __future__ import annotations

import functools
import math
from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from lubecheck.data import air
from lubecheck.model import calibration_words, wording
from lubecheck.model.check import readings
from lubecheck.model.entries import Case
from lubecheck.model.equilibrium import Air
from lubecheck.model.kernel import judge
from lubecheck.model.points import from_rows, join
from lubecheck.model.rows import rows_of
from lubecheck.physics import fatigue
from lubecheck.studies.calibrate import calibrated

NOTE = (
    f"ln(1/R) of the bearings adds up, with the Weibull slope {fatigue.WEIBULL_SLOPE:g} of ISO/TR 1281-2: the life at "
    "which the stated share of such machines has no pitted bearing yet"
)


@dataclass(frozen=True, slots=True)
class Part:
    """One bearing of the machine."""

    title: str
    bearing: str
    reliability: float
    life_h: float | None  # modified life at that reliability
    share: float | None  # of the machine's risk that it brings


@dataclass(frozen=True, slots=True)
class SystemLife:
    """The life of all of them together; None where one of them is not known."""

    parts: tuple[Part, ...]
    life_h: float | None
    reliability: float
    notes: tuple[str, ...]


def study(cases: Sequence[Case], *, air_properties: Air = air.properties) -> SystemLife:
    """Return the life of several bearings together, each at the reliability of the first case."""
    cases = [calibrated(case, air_properties=air_properties) for case in cases]
    said = [readings(case) for case in cases]
    points = join(from_rows(rows_of(case, reading[0])) for case, (_, reading) in zip(cases, said, strict=True))
    reliability = float(points.reliability[0])
    lives = judge(points.changed(reliability=reliability), air_properties).modified_life
    together = None
    if np.isfinite(lives).all():
        together = float(functools.reduce(lambda a, b: fatigue.joint_life.plain(first=a, second=b), lives))
    parts = tuple(
        Part(
            title=case.title,
            bearing=wording.bearing(case.bearing),
            reliability=reliability,
            life_h=float(life) if math.isfinite(life) else None,
            share=None if together is None else float((together / life) ** fatigue.WEIBULL_SLOPE),
        )
        for case, life in zip(cases, lives, strict=True)
    )
    unsaid = [
        f"{case.title or wording.bearing(case.bearing)}: read as usual, not said: {fact.name}"
        for case, (facts, _) in zip(cases, said, strict=True)
        for fact in facts
        if "fatigue_life" in fact.limits
    ]
    unsaid += [
        f"{case.title or wording.bearing(case.bearing)}: {calibration_words.said(case.calibration)}"
        for case in cases
        if case.calibration is not None
    ]
    return SystemLife(parts, together, reliability, (NOTE, *unsaid))
