"""A swap as JSON, for other programs."""

from __future__ import annotations

import dataclasses
import json
from typing import Any

from lubecheck.faces.record import figures
from lubecheck.model.glance import Glance
from lubecheck.studies.plant import Plant
from lubecheck.studies.swap import Swap, Swaps

SCHEMA = "lubecheck/swap/1"
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
        "sides": [dataclasses.asdict(side) for side in one.sides],
        "compatibility": dataclasses.asdict(one.meeting),
        "seals": [dataclasses.asdict(cell) for cell in one.seals],
        "differences": list(one.differences),
        "mixture": None if one.mixture is None else dataclasses.asdict(one.mixture),
        "change_over": dataclasses.asdict(one.change_over),
    }


def _glance(glance: Glance) -> dict[str, Any]:
    return {
        "verdict": glance.verdict,
        "governing": glance.governing,
        "reason": glance.reason,
        "limits": [dataclasses.asdict(limit) for limit in glance.limits],
        "figures": figures(glance.figures),
    }


def to_json(made: Swaps | Plant) -> str:
    """Return a swap, or that of a whole plant, as JSON text."""
    record = {"schema": PLANT_SCHEMA, **dataclasses.asdict(made)} if isinstance(made, Plant) else of_swaps(made)
    return json.dumps(record, indent=2, allow_nan=False)
