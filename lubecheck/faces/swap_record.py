"""A swap as JSON, for other programs."""

from __future__ import annotations

import json
from typing import Any

from lubecheck.faces.record import figures
from lubecheck.model.glance import Glance
from lubecheck.studies.plant import Plant
from lubecheck.studies.swap import Swap, Swaps

SCHEMA = "lubecheck/swap/1"
MANY = 10
PLANT_SCHEMA = "lubecheck/swap-plant/1"


def of_swaps(swaps: Swaps) -> dict[str, Any]:
    """Return all candidates of a position as plain data by the schema; "before" is the same for all of them."""
    return {
        "schema": SCHEMA,
        "title": swaps.title,
        "verdict": swaps.verdict,
        "before": _glance(swaps.candidates[0].before),
        "candidates": [_swap(one) for one in swaps.candidates],
        "cautions": list(swaps.cautions),
        "inputs": {"bearing": swaps.bearing, "lubricant": swaps.lubricant},
    }


def _swap(one: Swap) -> dict[str, Any]:
    return {
        "name": one.name,
        "lubricant": one.lubricant,
        "verdict": one.verdict,
        "governing": one.governing,
        "reason": one.reason,
        "after": _glance(one.after),
        "sides": [plain(side) for side in one.sides],
        "compatibility": plain(one.meeting),
        "seals": [plain(cell) for cell in one.seals],
        "differences": list(one.differences),
        "mixture": None if one.mixture is None else plain(one.mixture),
        "change_over": plain(one.change_over),
    }


def _glance(glance: Glance) -> dict[str, Any]:
    return {
        "verdict": glance.verdict,
        "governing": glance.governing,
        "reason": glance.reason,
        "limits": [plain(limit) for limit in glance.limits],
        "figures": figures(glance.figures),
    }


def plain(value: Any) -> Any:
    """Return dataclasses, however deep, as mappings and tuples as lists."""
    if isinstance(value, tuple):
        return [plain(item) for item in value]
    names = getattr(value, "__dataclass_fields__", None)
    return value if names is None else {name: plain(getattr(value, name)) for name in names}


def to_json(made: Swaps | Plant) -> str:
    """Return a swap, or that of a whole plant, as JSON text."""
    record = {"schema": PLANT_SCHEMA, **plain(made)} if isinstance(made, Plant) else of_swaps(made)
    # The writer's indenting is slow and a table of many candidates is for programs: they stand on one line.
    many = len(made.positions if isinstance(made, Plant) else made.candidates) > MANY
    return json.dumps(record, indent=None if many else 2, allow_nan=False)
