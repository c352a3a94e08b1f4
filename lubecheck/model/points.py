"""Points: the struct of arrays that the kernel takes, one row a duty point.

Every row carries all that is known of its position, so that rows of different bearings, lubricants and readings mix in
one call. All values are in house units; NaN stands for "not known", and what depends on it is judged `unknown`.
"""

from __future__ import annotations

import dataclasses
from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass
from typing import Any

import numpy as np
from numpy.typing import NDArray

from lubecheck.units import Array

Codes = NDArray[np.intp]
Flags = NDArray[np.bool_]
BEYOND_SETTINGS = -1  # Points.setting of oil dirtier than ISO 281 has a setting for
FACTORS = ("cooling_factor", "f0_factor", "f1_factor", "churning_factor", "mixed_factor", "seal_factor", "ring_factor")


@dataclass(frozen=True, slots=True)
class Points:
    """One row a duty point; all arrays have the same length."""

    case: Codes  # which position the row belongs to: 0, 1, 2 ... in rising order
    share: Array  # of the running time
    # duty
    speed: Array
    radial_load: Array
    axial_load: Array
    acceleration: Array  # rad/s^2 of starts and stops
    # bearing
    bore: Array
    outside: Array
    width: Array
    pitch_diameter: Array
    dynamic_rating: Array
    static_rating: Array
    fatigue_limit: Array
    contact_angle: Array
    f0_load: Array
    rule: Codes
    kind: Codes
    exponent: Array
    f0: Array  # for the lubrication at hand
    f1: Array
    load_z: Array  # of f1 = z (P0/C0)^y; 0 where f1 is constant
    load_y: Array
    minimum_load_share: Array
    speed_limit: Array  # rpm, of the family with the lubricant at hand
    kinematic_limit: Array  # rpm, of cage and contact seals
    elements_mass: Array  # g, of all rolling elements
    interval_family: Codes
    k_f: Array  # bearing type factor of GfT worksheet 3
    free_volume: Array
    is_sealed: Array  # shielded or sealed on both sides
    seal_torque: Array  # N mm, of rubbing seals
    # lubricant
    is_grease: Array
    walther_a: Array
    walther_b: Array
    density: Array
    lowest: Array
    highest: Array  # of lubricant, cage, seals and the user's limit
    limit_origin: Codes
    stabilised_to: Array  # degC, of the rings
    flash_point: Array  # degC; NaN for grease and where it is not known
    life_reference: Array
    life_step: Array  # rise that halves the life of the grease
    grease_failed: Array  # share of bearings whose grease may have failed at the end of its interval or life
    yield_stress: Array
    additive: Codes
    # surroundings and heat
    ambient: Array
    coldest: Array
    draught: Array
    pressure: Array
    housing_area: Array  # NaN where the conductance is given
    conductance: Array  # NaN where the area is known
    frame_temperature: Array
    frame_conductance: Array
    coolant_inlet: Array
    coolant_conductance: Array
    solar_heat: Array
    shaft_temperature: Array
    shaft_conductance: Array  # towards the machine, to shaft_temperature
    fin_conductance: Array  # of the free shaft end, to the ambient
    oil_inlet: Array
    oil_conductance: Array
    machine_heat: Array
    is_doubted: Array  # a temperature was measured that nothing admissible explains
    read_outer: Array  # degC, the highest that was read on housing or outer ring; NaN where none was
    read_highest: Array  # degC, the highest that was read anywhere; NaN where none was
    held_temperature: Array  # degC at which the bearing is held; NaN where it is solved for
    interval_factor: Array  # dust, water, vibration, orientation, turning ring, air flow together
    inside_factor: Array  # the part of it that reaches the grease of a closed bearing
    water_share: Array  # of an oil change interval
    oil_volume: Array  # cm^3 of a bath or circuit; NaN where it is not stated
    oil_flow: Array  # l/min of a circuit; NaN without one
    # amounts
    fill: Array
    void: Array
    housing_fill: Array
    is_open: Array
    passage: Array  # share of surplus grease that seals or shields let out
    clearance: Array  # mm, mean of the class; NaN where there is none to judge
    fit_loss: Array  # mm; NaN where no fit is stated
    proposed_fill: Array
    proposed_housing_fill: Array  # share of the space beside it
    is_proposed_fill: Array
    interval: Array  # running hours; NaN where none is planned
    hours_per_day: Array
    regrease_mass: Array  # g; NaN where none is planned
    regrease_rule: Codes
    rhythm: Array  # running hours of the rhythm that the regrease rule is made for; infinite without one
    is_bath: Array
    is_circulating: Array
    level: Array
    # requirements
    setting: Codes
    water: Array  # in the oil, by mass
    life_target: Array
    reliability: Array
    least_kappa: Array
    static_safety: Array
    set_point: Array  # degC, of the housing's sensor; NaN where none is stated
    ceiling: Array  # running hours of the calendar ceiling
    # factors of uncertain inputs, 1 nominal
    cooling_factor: Array
    f0_factor: Array
    f1_factor: Array
    churning_factor: Array
    mixed_factor: Array
    seal_factor: Array
    ring_factor: Array

    def __len__(self) -> int:
        return len(self.speed)

    @property
    def cases(self) -> int:
        """How many positions the rows belong to."""
        return int(self.case[-1]) + 1 if len(self) else 0

    @property
    def starts(self) -> Codes:
        """The first row of each position."""
        if self.cases == len(self):
            return np.arange(len(self))
        return np.flatnonzero(np.r_[True, np.diff(self.case) > 0])

    def changed(self, **values: Any) -> Points:
        """Return the points with some fields replaced; a scalar is broadcast to all rows."""
        return dataclasses.replace(
            self,
            **{key: np.broadcast_to(np.asarray(value, getattr(self, key).dtype), (len(self),))
               for key, value in values.items()},
        )  # fmt: skip

    def take(self, rows: Any) -> Points:
        """Return some of the rows; the positions are numbered anew."""
        taken = {field.name: getattr(self, field.name)[rows] for field in dataclasses.fields(self)}
        taken["case"] = np.unique(taken["case"], return_inverse=True)[1].astype(np.intp)
        return Points(**taken)


_CODES = {field.name for field in dataclasses.fields(Points) if field.type == "Codes"}


def from_rows(rows: Sequence[Mapping[str, float]]) -> Points:
    """Return points from one mapping a row."""
    columns: dict[str, Any] = {}
    for field in dataclasses.fields(Points):
        dtype = np.intp if field.name in _CODES else np.float64
        columns[field.name] = np.array([row[field.name] for row in rows], dtype=dtype)
    return Points(**columns)


def join(parts: Iterable[Points]) -> Points:
    """Return several points as one, the positions numbered on."""
    parts = list(parts)
    columns = {
        field.name: np.concatenate([getattr(part, field.name) for part in parts])
        for field in dataclasses.fields(Points)
    }
    offsets = np.cumsum([0, *(part.cases for part in parts[:-1])])
    columns["case"] = np.concatenate([part.case + offset for part, offset in zip(parts, offsets, strict=True)])
    return Points(**columns)
