"""The record: a result as JSON, for other programs.

Every key is declared by the result's own dataclasses; a figure is {"value", "unit"} with "low" and "high" where it has
a band, null where it could not be worked out. NaN and infinity cannot leave: the writer refuses them.
"""

from __future__ import annotations

import dataclasses
import json
import math
from typing import Any

from lubecheck.model.calibration import Calibrated
from lubecheck.model.result import Figures, Result, WarmUp

SCHEMA = "lubecheck/check/1"


def figures(group: Figures | None) -> dict[str, Any] | None:
    """Return a group of figures as it stands in the record."""
    if group is None:
        return None
    record: dict[str, Any] = {}
    for name, figure in group.figures.items():
        record[name] = {"value": figure.value, "unit": figure.unit}
        if figure.low is not None or figure.high is not None:
            record[name] |= {"low": figure.low, "high": figure.high}
    return record


def _finite(value: float) -> float | None:
    return value if math.isfinite(value) else None


def of_result(result: Result) -> dict[str, Any]:
    """Return a result as plain data by the schema."""
    return {
        "schema": SCHEMA,
        "title": result.title,
        "verdict": result.verdict,
        "governing": result.governing,
        "limits": [dataclasses.asdict(limit) for limit in result.limits],
        "operating": figures(result.operating),
        "duty": [figures(point) for point in result.duty],
        "heat": figures(result.heat),
        "heat_shares": figures(result.heat_shares),
        "grease": figures(result.grease),
        "life": figures(result.life),
        "loads": figures(result.loads),
        "speeds": figures(result.speeds),
        "interval_lines": [
            dataclasses.asdict(line) | {"factors": {name: _finite(factor) for name, factor in line.factors}}
            for line in result.interval_lines
        ],
        "interval_spread": result.interval_spread,
        "amounts": figures(result.amounts),
        "damage": [dataclasses.asdict(point) for point in result.damage],
        "losses": dataclasses.asdict(result.losses),
        "calibration": _calibration(result.calibration),
        "plan": dataclasses.asdict(result.plan),
        "remedies": [dataclasses.asdict(remedy) for remedy in result.remedies],
        "needs": [dataclasses.asdict(need) for need in result.needs.found],
        "needs_for": result.needs.question,
        "needs_note": result.needs.note,
        "warm_up": warm_up(result.warm_up),
        "notes": list(result.notes),
        "cautions": list(result.cautions),
        "inputs": {
            "bearing": result.bearing,
            "lubricant": result.lubricant,
            "given": dict(result.given),
            "assumed": [dataclasses.asdict(item) for item in result.assumed],
        },
    }


def warm_up(found: WarmUp | None) -> dict[str, Any] | None:
    """Return a warm-up as it stands in the record; None where it was not asked for."""
    if found is None:
        return None
    return {
        "courses": [
            {
                "name": course.name,
                "meaning": course.meaning,
                "figures": figures(course.figures),
                "curve": {
                    "time": {"values": list(course.time_h), "unit": "h"},
                    "sensor": {"values": list(course.sensor), "unit": "degC"},
                    "bearing": {"values": list(course.bearing), "unit": "degC"},
                },
                "crossings": [dataclasses.asdict(crossing) for crossing in course.crossings],
            }
            for course in found.courses
        ],
        "cold_start": figures(found.cold),
        "notes": list(found.notes),
    }


def _calibration(found: Calibrated | None) -> dict[str, Any] | None:
    if found is None:
        return None
    return {
        "text": found.text,
        "is_explained": found.is_explained,
        **(figures(found.figures) or {}),
        "measurements": [{"place": point.place, **(figures(point.figures) or {})} for point in found.measurements],
        "explanations": [dataclasses.asdict(item) for item in found.explanations],
        "notes": list(found.notes),
        "stop": found.stop,
    }


def to_json(result: Result) -> str:
    """Return a result as JSON text."""
    return json.dumps(of_result(result), indent=2, allow_nan=False)
