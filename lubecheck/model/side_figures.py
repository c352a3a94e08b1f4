"""Figures that stand beside the verdict: how the loads come about, what would cure a light one, and thermal speeds."""

from __future__ import annotations

import math
from typing import Any

import numpy as np

from lubecheck.model.entries import Case
from lubecheck.model.kernel import Outcome
from lubecheck.model.points import Points
from lubecheck.model.result import Loads, Speeds
from lubecheck.model.shaft import induces_thrust, loads_of
from lubecheck.physics import loads, speed, viscosity
from lubecheck.units import Array

_THRUST_BALL = loads.RULES.index("thrust ball")  # ISO 15312 does not cover it


def curing_preload(points: Points, row: int) -> float:
    """Return the axial force that, on top of what is there, brings P to the minimum load; NaN where none does, N."""
    p = points
    least = p.minimum_load_share[row] * p.dynamic_rating[row]
    needed = loads.axial_load_for.plain(
        radial_load=p.radial_load[row], wanted=least, static_rating=p.static_rating[row], f0_load=p.f0_load[row],
        contact_angle=p.contact_angle[row], rule=p.rule[row],
    )  # fmt: skip
    return float(np.maximum(needed - abs(p.axial_load[row]), 0.0))


def loads_at(case: Case, outcome: Outcome) -> Loads:
    """Return the loads of the duty point whose load comes nearest to being too small."""
    row = int(outcome.judged["minimum_load"].row[0])
    points = outcome.points
    on_bearing = loads_of(case, case.duty[row % len(case.duty)])
    made: Loads = Loads.of(
        {
            "radial_load": on_bearing.radial,
            "axial_load": on_bearing.axial,
            "equivalent_load": float(outcome.state.equivalent_load[row]),
            "minimum_load": float(points.minimum_load_share[row] * points.dynamic_rating[row]),
            "needed_preload": curing_preload(points, row),
            "other_radial_load": on_bearing.other_radial,
            "induced_thrust": on_bearing.own_thrust if induces_thrust(case.bearing) else None,
        }
    )
    return made


def speeds_at(case: Case, outcome: Outcome, rows: int) -> Speeds:
    """Return the speed limits at the duty point that runs hottest."""
    row = min(int(outcome.hottest[0]), rows - 1)
    points = outcome.points
    at = slice(row, row + 1)
    made: Speeds = Speeds.of(
        {
            "lubricant_limit": float(points.speed_limit[row]),
            "kinematic_limit": float(points.kinematic_limit[row]),
            "thermal_reference_speed": reference_speed(
                f0=case.bearing.f0, f1=case.bearing.f1, static_rating=points.static_rating[row],
                bore=case.bearing.bore, outside=case.bearing.outside, width=case.bearing.width, rule=points.rule[row],
            ),
            "thermally_safe_speed": float(safe_speed(case, points, at)[0]),
        }
    )  # fmt: skip
    return made


def reference_speed(
    *, f0: float, f1: float, static_rating: float, bore: float, outside: float, width: float, rule: int
) -> float:
    """Return the thermal reference speed of ISO 15312 (oil bath), NaN for thrust ball bearings, rpm."""
    if rule == _THRUST_BALL:
        return math.nan
    return float(
        speed.thermal_reference_speed.plain(
            f0, f1, static_rating=static_rating, bore=bore, outside=outside, width=width,
            position=np.intp(loads.IS_THRUST[rule]),
        )
    )  # fmt: skip


def safe_speed(case: Case, points: Points, rows: Any) -> Array:
    """Return the thermally safe speed of DIN 732 of some rows, rpm.

    At the highest temperature that lubricant, cage, seals, rings and user allow; the heat that leaves is that of the
    seats, as the standard has it, and of the oil, less the watts that the machine is stated to send. NaN where the
    highest temperature is not known, where nothing can leave, and for thrust ball bearings.
    """
    p = points.take(rows)
    position = loads.IS_THRUST[p.rule].astype(np.intp)
    area = speed.heat_area.plain(bore=p.bore, outside=p.outside, width=p.width, position=position)
    heat = (
        speed.seat_heat_flow.plain(area, p.highest - p.ambient, position)
        + speed.oil_heat_flow.plain(case.oil.flow or 0.0, np.maximum(p.highest - p.oil_inlet, 0.0))
        - p.machine_heat
    )
    load = loads.dynamic_equivalent_load.plain(
        radial_load=p.radial_load, axial_load=p.axial_load, static_rating=p.static_rating, f0_load=p.f0_load,
        contact_angle=p.contact_angle, rule=p.rule,
    )  # fmt: skip
    with np.errstate(all="ignore"):
        nu = viscosity.viscosity_from_constants.plain(p.highest, a=p.walther_a, b=p.walther_b)
        safe = speed.thermal_safe_speed.plain(
            p.f0, p.f1, nu=nu, load=load, pitch_diameter=p.pitch_diameter, heat_flow=np.where(heat > 0, heat, np.nan)
        )
    return np.where(p.rule == _THRUST_BALL, np.nan, safe)
