"""Changes of a case with measured temperatures: what a reading leaves out stays as it was when it was made.

A reading inherits what it does not say from the rest of the case. Whoever makes a change there has to say in [measured]
how it was, or the fit would be made anew on a state that nobody measured. So the edits of a change carry that along;
where [measured] has no key for it (a housing, a lubricant, an oil flow), the row says to measure again.
"""

from __future__ import annotations

import dataclasses
from collections.abc import Iterator, Sequence
from typing import Any, TypeVar

import numpy as np

from lubecheck.data import air
from lubecheck.model.calibration import FILL
from lubecheck.model.check import readings
from lubecheck.model.entries import Case
from lubecheck.model.equilibrium import Air
from lubecheck.model.measured import at_state
from lubecheck.model.points import join
from lubecheck.model.result import Need, Remedy, Result
from lubecheck.model.rows import rows_of
from lubecheck.studies.calibrate import sensors_of, states_of, unknown_of
from lubecheck.studies.changes import Change, Edit, apply

AGAIN = "measure again after it"
SAME = 1e-6  # K that a computed reading may move by the digits of an edit's text
Row = TypeVar("Row", Remedy, Need)

_UNITS = {"draught": "m/s", "shaft_temperature": "degC"}


def told(case: Case, result: Result, air_properties: Air = air.properties) -> Result:
    """Return a result whose remedies and needs hold when their edits are written beside what was measured."""
    remedies, needs = result.remedies, result.needs.found
    edits = [*(one.edits for one in remedies), *(one.edits for one in needs)]
    rows = _kept(case, edits, air_properties)
    changed_remedies = tuple(_with(one, *kept) for one, kept in zip(remedies, rows[: len(remedies)], strict=True))
    changed_needs = tuple(_with(one, *kept) for one, kept in zip(needs, rows[len(remedies) :], strict=True))
    return dataclasses.replace(
        result, remedies=changed_remedies, needs=dataclasses.replace(result.needs, found=changed_needs)
    )


def _with(row: Row, edits: tuple[Edit, ...], is_again: bool) -> Row:
    said = dict.fromkeys(_words(key, str(value)) for key, value in edits if key.startswith("measured"))
    first = AGAIN if is_again else f"say in [measured] {' and '.join(said)}" if said else ""
    return dataclasses.replace(row, edits=edits, note="; ".join(part for part in (first, row.note) if part))


def _words(key: str, text: str) -> str:
    """Say an old value as people write it: its edit has all digits."""
    number, unit = text.split()
    return f"{key.partition('.')[2]} {float(number):.4g} {unit}"


def _kept(case: Case, many: Sequence[tuple[Edit, ...]], air_properties: Air) -> list[tuple[tuple[Edit, ...], bool]]:
    """Return each change's edits with what keeps the readings as they were, and whether some of them is not kept."""
    kept = [(*edits, *_old_values(case, edits)) if edits else () for edits in many]
    changed = [apply(case, Change("", "", 0, edits)) for edits in kept]
    sensors, unknown, usual = sensors_of(case), unknown_of(case), readings(case)[1][0]
    made = case.calibration
    value = made.value if made is not None and made.is_explained else float(unknown.value(unknown.nominal))
    points = join([states_of(one, readings(one)[1][0]) for one in changed] + [states_of(case, usual)])
    read = sensors.read(points.changed(**{unknown.column: value}), air_properties)
    is_same = (np.abs(read[:-1] - read[-1]) < SAME).all(axis=1).tolist()
    return [
        (edits, bool(edits) and not (same and unknown_of(one) == unknown))
        for edits, one, same in zip(kept, changed, is_same, strict=True)
    ]


def _old_values(case: Case, edits: tuple[Edit, ...]) -> Iterator[Edit]:
    """Return the edits of [measured] that say what a change would alter there; none where it was never said."""
    changed = apply(case, Change("", "", 0, edits))
    is_list = any(name.startswith("measured[") for name, _ in case.given)
    for i, one in enumerate(case.measured):
        table = f"measured[{i + 1}]" if is_list else "measured"
        old, new = at_state(case, one), at_state(changed, one)
        for key, unit in _UNITS.items():
            was = _of_state(old, key)
            if was is not None and was != _of_state(new, key):
                yield f"{table}.{key}", f"{was:.12g} {unit}"
        if one.fill is None and case.grease.fill != "unknown" and _filling(old) != _filling(new):
            share = float(rows_of(old, readings(old)[1][0])[0][FILL])
            if 0 < share <= 1:
                yield f"{table}.fill", f"{100 * share:.12g} %"


def _of_state(state: Case, key: str) -> float | None:
    """Return a figure of a measured state: its duty point's own, else that of the position."""
    own: float | None = getattr(state.duty[0], key)
    around: float | None = getattr(state.surroundings if key == "draught" else state.housing, key)
    return around if own is None else own


def _filling(state: Case) -> tuple[Any, ...]:
    return state.grease.fill, state.grease.given, state.grease.regreasings
