"""The record of lubricants as JSON, for other programs; NaN and infinity cannot leave."""

from __future__ import annotations

import json
from collections.abc import Sequence
from typing import Any

from lubecheck.data import lubricant_sheet as sheet
from lubecheck.data.grades import EDITIONS, equivalents
from lubecheck.data.lubricant import FIELDS, Lubricant
from lubecheck.model.required import RequiredViscosity
from lubecheck.sources import cite

SCHEMA = "lubecheck/fluids/1"


def of_lubricant(
    one: Lubricant, *, is_own: bool, temperatures: Sequence[float], required: RequiredViscosity | None
) -> dict[str, Any]:
    """Return a lubricant as plain data: words as they are, figures as value and unit with their range."""
    record: dict[str, Any] = {}
    for name, entry in FIELDS.items():
        if not hasattr(one, name):
            continue
        value = getattr(one, name)
        if entry.is_number and value is not None:
            value = {"value": value, "unit": entry.unit}
            if name in one.ranges:
                value["low"], value["high"] = one.ranges[name]
        record[name] = value
    index = sheet.index_of(one)
    record |= {
        "source": {"key": one.source, "citation": cite(one.source)},
        "is_own": is_own,
        "assumed": list(one.assumed),
        "viscosity_index": None if index is None else _figure(index, "1"),
        "grades": [
            {"grade": text, "edition": EDITIONS[name]}
            for name, text in (equivalents(one.nu_40, one.nu_100) if one.kind == "oil" else {}).items()
        ],
        "viscosity": [_state(one, temperature) for temperature in temperatures],
        "kappa_1_temperature": None,
    }
    if required is not None:
        meet = sheet.temperature_of(one, required.nu)
        record["kappa_1_temperature"] = None if meet is None else _figure(meet, "degC")
    return record


def _state(one: Lubricant, temperature: float) -> dict[str, Any]:
    state = sheet.state(one, temperature)
    return {
        "temperature": _figure(temperature, "degC"),
        "kinematic": _figure(state.nu, "mm^2/s"),
        "dynamic": None if state.dynamic is None else _figure(state.dynamic, "mPa*s"),
        "density": None if state.density is None else _figure(state.density, "kg/m^3"),
        "range_of_use": state.place,
    }


def _figure(value: float, unit: str) -> dict[str, Any]:
    return {"value": value, "unit": unit}


def to_json(
    found: Sequence[Lubricant],
    *,
    own: frozenset[str],
    temperatures: Sequence[float] | None,
    required: RequiredViscosity | None,
) -> str:
    """Return lubricants as JSON text; without temperatures each is shown at its own usual ones."""
    record = {
        "schema": SCHEMA,
        "required": None
        if required is None
        else {
            "reference_viscosity": _figure(required.nu, "mm^2/s"),
            "speed": _figure(required.speed, "rpm"),
            "pitch_diameter": _figure(required.pitch_diameter, "mm"),
        },
        "lubricants": [
            of_lubricant(
                one,
                is_own=one.key in own,
                temperatures=sheet.temperatures([one]) if temperatures is None else temperatures,
                required=required,
            )
            for one in found
        ],
    }
    return json.dumps(record, indent=2, allow_nan=False)
