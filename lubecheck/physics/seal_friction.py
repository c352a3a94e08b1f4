"""Friction of the rubbing seals of a bearing, by the form that bearing handbooks print.

M = K1 ds^beta + K2 for a bearing sealed on both sides, with constants by bearing family and size. Shields and gap seals
do not rub.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass

from lubecheck.method import method
from lubecheck.physics.friction import Factor
from lubecheck.units import Mm, NMm, Number


@dataclass(frozen=True, slots=True)
class SealForm:
    """The constants of one family up to one size."""

    up_to: float  # mm, outside diameter of the bearing
    exponent: float  # beta, of ds in mm
    coefficient: float  # K1
    constant: float  # K2, N mm


# All from memory, for run-in nitrile lips of the ordinary contact seal. Each family's last row also stands for larger
# bearings than the table has (about 160 mm for deep groove, 120 mm for the other ball bearings, 360 mm for rollers).
_DEEP_GROOVE = (
    SealForm(62.0, 2.25, 0.023, 2.0),
    SealForm(80.0, 2.25, 0.018, 20.0),
    SealForm(100.0, 2.25, 0.018, 15.0),
    SealForm(float("inf"), 2.25, 0.018, 0.0),
)
_ANGULAR = (SealForm(float("inf"), 2.0, 0.014, 10.0),)
_CYLINDRICAL = (SealForm(float("inf"), 2.0, 0.032, 50.0),)
_SPHERICAL = (SealForm(float("inf"), 2.0, 0.057, 50.0),)
SEAL_FORMS: Mapping[str, tuple[SealForm, ...]] = {
    "deep groove ball": _DEEP_GROOVE,
    "angular contact ball": _ANGULAR,
    "double row angular contact ball": _ANGULAR,
    "self-aligning ball": _ANGULAR,
    "cylindrical roller": _CYLINDRICAL,
    "full complement cylindrical roller": _CYLINDRICAL,
    "spherical roller": _SPHERICAL,
}
# Handbooks print nothing for the other families: the deep groove seal then stands for all of them, by this program.
OTHER_FAMILIES = _DEEP_GROOVE

# The older additive form of handbooks, ((d + D) / 20)^2 + 25 N mm (from memory, less sure), gives 0.35 to 0.7 of the
# form above for bores of 25 to 60 mm; new lips rub up to about twice as hard as run in.
SEAL_RANGE = Factor(1.0, 0.35, 2.0, "bearing-handbooks", "two published forms differ by up to 3; new lips double")


def seal_form(family: str, outside: float) -> SealForm:
    """Return the constants for a bearing of a family with an outside diameter in mm."""
    return next(form for form in SEAL_FORMS.get(family, OTHER_FAMILIES) if outside <= form.up_to)


@method(
    source="bearing-handbooks",
    valid={"seal_diameter": (1.0, 1000.0), "seals": (0.0, 2.0), "exponent": (0.0, 3.0), "coefficient": (0.0, 1.0)},
)
def seal_torque(seal_diameter: Mm, *, seals: Number, exponent: Number, coefficient: Number, constant: NMm) -> NMm:
    """Friction torque of the rubbing seals of a bearing: (K1 ds^beta + K2) / 2 a seal.

    From memory, constants in `SEAL_FORMS`, for run-in seals; about 0.35 to 2 times for one bearing (`SEAL_RANGE`).

    seal_diameter [mm]: diameter ds of the shoulder that the lip rubs on, any shape
    seals [1]: number of rubbing lips, broadcasts as all the others do
    exponent [1]: beta
    coefficient [1]: K1, for ds in mm and torque in N mm
    constant [N*mm]: K2
    returns [N*mm]

    >>> seal_torque("50 mm", seals=2, exponent=2, coefficient=0.014, constant="10 N*mm").round(6)
    <Quantity(45.0, 'newton * millimeter')>
    """
    return seals / 2 * (coefficient * seal_diameter**exponent + constant)
