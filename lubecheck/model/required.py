"""What viscosity a case asks for: kappa 1, whatever the lubricant and its temperature."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from lubecheck.model.entries import Case
from lubecheck.physics import film


@dataclass(frozen=True, slots=True)
class RequiredViscosity:
    """The reference viscosity of a bearing at the speed that asks for the most."""

    nu: float  # mm^2/s
    speed: float  # rpm
    pitch_diameter: float  # mm
    is_of_several: bool  # duty points of other speeds ask for less


def required_viscosity(case: Case) -> RequiredViscosity:
    """Return the viscosity at which kappa is 1 at the slowest duty point of a case (ISO 281, 9.3.3.1)."""
    pitch_diameter = (case.bearing.bore + case.bearing.outside) / 2
    speeds = np.array([duty.speed for duty in case.duty])
    slowest = float(speeds.min())
    nu = float(film.reference_viscosity.plain(np.asarray(slowest), np.asarray(pitch_diameter)))
    return RequiredViscosity(nu, slowest, pitch_diameter, bool((speeds != slowest).any()))
