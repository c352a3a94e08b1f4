"""The one table of family facts: what a kind of bearing is, whatever its size.

Physics and model read these as columns, so that mixed families run in one call. Every figure is a value of the
trade with its range; `SOURCES` names where each comes from.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Literal

from lubecheck.physics.fatigue import KINDS

Kind = Literal["radial ball", "radial roller", "thrust ball", "thrust roller"]

# Where each fact comes from.
SOURCES: Mapping[str, str] = {
    "life_exponent": "iso-281",
    "load_rule": "iso-281",
    "static_safety": "iso-76",
    "interval_factor": "grease-handbooks",
    "k_f": "gft-3",
    "minimum_load_share": "common-practice",
    "grease_speed_limit": "bearing-handbooks",
    "oil_speed_limit": "bearing-handbooks",
    "free_share": "own-estimate",
    "f0": "iso-15312",
    "f1": "iso-15312",
}

# Least static safety by demand on running; memory, and handbooks differ by half a unit.
_BALL_SAFETY = {"quiet": 2.0, "normal": 1.0, "shock": 1.5}
_ROLLER_SAFETY = {"quiet": 3.0, "normal": 1.5, "shock": 3.0}
_THRUST_SPHERICAL_SAFETY = {"quiet": 4.0, "normal": 4.0, "shock": 4.0}  # ISO 76: at least 4 with ordinary support


@dataclass(frozen=True, slots=True, kw_only=True)
class Family:
    """What holds for every bearing of a family.

    Speed limits are speed parameters n dm in mm/min, with the range that handbooks give. `free_share` is the part of
    the envelope pi/4 (D^2 - d^2) B that neither rings nor rolling elements nor cage fill, with its range. `friction`
    is f0 and f1 in an oil bath by ISO dimension series; `f0` and `f1` stand in for a series that has none.
    """

    name: str
    kind: Kind
    load_rule: str  # one of physics.loads.RULES
    interval_factor: float  # K of the classical grease interval
    k_f: float
    k_f_range: tuple[float, float]
    grease_speed_limit: float
    grease_speed_range: tuple[float, float]
    oil_speed_limit: float
    oil_speed_range: tuple[float, float]
    free_share: float
    free_share_range: tuple[float, float]
    f0: float
    f1: float
    friction: Mapping[str, tuple[float, float]]

    @property
    def friction_source(self) -> str:
        """Where f0 and f1 come from: ISO 15312 lists no thrust ball and spherical thrust roller bearings."""
        return "palmgren" if self.load_rule in ("thrust ball", "thrust spherical") else SOURCES["f0"]

    @property
    def is_roller(self) -> bool:
        """Line contact: rollers, not balls."""
        return self.kind.endswith("roller")

    @property
    def is_thrust(self) -> bool:
        """Made for axial load."""
        return self.kind.startswith("thrust")

    @property
    def kind_code(self) -> int:
        """The position of the kind, as the kernel takes it."""
        return KINDS.index(self.kind)

    @property
    def life_exponent(self) -> float:
        """Exponent p of the life equation."""
        return 10 / 3 if self.is_roller else 3.0

    @property
    def minimum_load_share(self) -> float:
        """The least load that keeps the elements rolling, as a share of the dynamic rating."""
        return 0.02 if self.is_roller else 0.01

    @property
    def static_safety(self) -> Mapping[str, float]:
        """The least static safety S0 for "quiet", "normal" and "shock" running."""
        if self.load_rule == "thrust spherical":
            return _THRUST_SPHERICAL_SAFETY
        return _ROLLER_SAFETY if self.is_roller else _BALL_SAFETY

    def friction_factors(self, dimension_series: str) -> tuple[float, float]:
        """Return f0 and f1 in an oil bath for an ISO dimension series ("03"), or the family's own where it has none.

        >>> FAMILIES["deep groove ball"].friction_factors("03")
        (2.3, 0.0002)
        """
        return self.friction.get(dimension_series, (self.f0, self.f1))


def _by_series(groups: Mapping[str, tuple[float, float]]) -> Mapping[str, tuple[float, float]]:
    """Spread f0 and f1, written once for several dimension series ("00 10"), over each of them."""
    return {series: factors for group, factors in groups.items() for series in group.split()}


# interval_factor K and k_f: sources above. Speed limits: memory of handbook tables, moderate load (C/P about 10),
# ordinary cage; free shares: what published masses leave of the envelope (tests/reference/test_masses.py).
_ALL = (
    Family(
        name="deep groove ball",
        kind="radial ball",
        load_rule="deep groove",
        interval_factor=10,
        k_f=1.0,
        k_f_range=(0.9, 1.1),
        grease_speed_limit=450_000,
        grease_speed_range=(350_000, 500_000),
        oil_speed_limit=550_000,
        oil_speed_range=(500_000, 650_000),
        free_share=0.33,
        free_share_range=(0.28, 0.38),
        f0=2.0,
        f1=0.00020,
        friction=_by_series(
            {"18": (1.7, 0.00010), "19 00 10 30": (1.7, 0.00015), "02 22": (2.0, 0.00020), "03 23 04": (2.3, 0.00020)}
        ),
    ),
    Family(
        name="double row deep groove ball",
        kind="radial ball",
        load_rule="deep groove",
        interval_factor=10,
        k_f=1.5,
        k_f_range=(1.5, 1.5),
        grease_speed_limit=350_000,
        grease_speed_range=(250_000, 400_000),
        oil_speed_limit=400_000,
        oil_speed_range=(350_000, 500_000),
        free_share=0.23,
        free_share_range=(0.18, 0.3),
        f0=5.0,
        f1=0.00020,
        friction=_by_series({"22": (5.0, 0.00020), "23": (6.5, 0.00020)}),
    ),
    Family(
        name="self-aligning ball",
        kind="radial ball",
        load_rule="self-aligning ball",
        interval_factor=10,
        k_f=1.45,
        k_f_range=(1.3, 1.6),
        grease_speed_limit=450_000,
        grease_speed_range=(350_000, 500_000),
        oil_speed_limit=550_000,
        oil_speed_range=(500_000, 650_000),
        free_share=0.26,
        free_share_range=(0.22, 0.32),
        f0=3.0,
        f1=0.00008,
        friction=_by_series({"02": (2.5, 0.00008), "22": (3.0, 0.00008), "03": (3.5, 0.00008), "23": (4.0, 0.00008)}),
    ),
    Family(
        name="angular contact ball",
        kind="radial ball",
        load_rule="angular contact 40",
        interval_factor=10,
        k_f=1.6,
        k_f_range=(1.6, 1.6),
        grease_speed_limit=400_000,
        grease_speed_range=(300_000, 500_000),
        oil_speed_limit=550_000,
        oil_speed_range=(450_000, 650_000),
        free_share=0.3,
        free_share_range=(0.25, 0.35),
        f0=2.0,
        f1=0.00025,
        friction=_by_series({"19 10": (1.7, 0.00020), "02": (2.0, 0.00025), "03": (3.0, 0.00035)}),
    ),
    Family(
        name="double row angular contact ball",
        kind="radial ball",
        load_rule="double row angular contact",
        interval_factor=10,
        k_f=2.0,
        k_f_range=(2.0, 2.0),
        grease_speed_limit=300_000,
        grease_speed_range=(200_000, 350_000),
        oil_speed_limit=400_000,
        oil_speed_range=(300_000, 450_000),
        free_share=0.3,
        free_share_range=(0.25, 0.35),
        f0=5.0,
        f1=0.00035,
        friction=_by_series({"32": (5.0, 0.00035), "33": (7.0, 0.00035)}),
    ),
    Family(
        name="four-point contact ball",
        kind="radial ball",
        load_rule="four-point",
        interval_factor=10,
        k_f=1.6,
        k_f_range=(1.6, 1.6),
        grease_speed_limit=350_000,
        grease_speed_range=(250_000, 400_000),
        oil_speed_limit=500_000,
        oil_speed_range=(400_000, 550_000),
        free_share=0.18,
        free_share_range=(0.13, 0.28),
        f0=2.0,
        f1=0.00037,
        friction=_by_series({"10 02": (2.0, 0.00037), "03": (3.0, 0.00037)}),
    ),
    Family(
        name="cylindrical roller",
        kind="radial roller",
        load_rule="cylindrical",
        interval_factor=5,
        k_f=1.9,
        k_f_range=(1.8, 2.0),
        grease_speed_limit=400_000,
        grease_speed_range=(300_000, 450_000),
        oil_speed_limit=500_000,
        oil_speed_range=(400_000, 550_000),
        free_share=0.28,
        free_share_range=(0.22, 0.32),
        f0=3.0,
        f1=0.00035,
        friction=_by_series(
            {
                "10": (2.0, 0.00020),
                "02": (2.0, 0.00030),
                "22": (3.0, 0.00040),
                "03": (2.0, 0.00035),
                "23": (4.0, 0.00040),
                "04": (2.0, 0.00040),
            }
        ),
    ),
    Family(
        name="full complement cylindrical roller",
        kind="radial roller",
        load_rule="cylindrical",
        interval_factor=5,
        k_f=25.0,
        k_f_range=(25.0, 25.0),
        grease_speed_limit=150_000,
        grease_speed_range=(100_000, 200_000),
        oil_speed_limit=200_000,
        oil_speed_range=(150_000, 300_000),
        free_share=0.2,
        free_share_range=(0.15, 0.28),
        f0=8.0,
        f1=0.00055,
        friction=_by_series(
            {
                "18": (5.0, 0.00055),
                "29": (6.0, 0.00055),
                "30": (7.0, 0.00055),
                "22": (8.0, 0.00055),
                "23": (12.0, 0.00055),
            }
        ),
    ),
    Family(
        name="needle roller",
        kind="radial roller",
        load_rule="cylindrical",
        interval_factor=5,
        k_f=3.5,
        k_f_range=(3.5, 3.5),
        grease_speed_limit=300_000,
        grease_speed_range=(200_000, 350_000),
        oil_speed_limit=350_000,
        oil_speed_range=(300_000, 450_000),
        free_share=0.23,
        free_share_range=(0.18, 0.28),
        f0=5.5,
        f1=0.00050,
        friction=_by_series({"48": (5.0, 0.00050), "49": (5.5, 0.00050), "69": (10.0, 0.00050)}),
    ),
    Family(
        name="tapered roller",
        kind="radial roller",
        load_rule="tapered",
        interval_factor=1,
        k_f=4.0,
        k_f_range=(4.0, 4.0),
        grease_speed_limit=250_000,
        grease_speed_range=(200_000, 350_000),
        oil_speed_limit=350_000,
        oil_speed_range=(300_000, 400_000),
        free_share=0.27,
        free_share_range=(0.18, 0.32),
        f0=3.0,
        f1=0.00040,
        friction=_by_series({"02 03 30 29 20": (3.0, 0.00040), "22 23 13 31 32": (4.5, 0.00040)}),
    ),
    Family(
        name="spherical roller",
        kind="radial roller",
        load_rule="spherical roller",
        interval_factor=1,
        k_f=8.0,
        k_f_range=(7.0, 9.0),
        grease_speed_limit=200_000,
        grease_speed_range=(150_000, 250_000),
        oil_speed_limit=300_000,
        oil_speed_range=(220_000, 350_000),
        free_share=0.215,
        free_share_range=(0.18, 0.24),
        f0=4.5,
        f1=0.00025,
        friction=_by_series(
            {
                "03": (3.5, 0.00022),
                "22": (4.0, 0.00015),
                "23": (4.5, 0.00025),
                "30 39": (4.5, 0.00017),
                "31": (5.5, 0.00027),
                "32": (6.0, 0.00019),
                "40": (6.5, 0.00018),
                "41": (7.0, 0.00049),
            }
        ),
    ),
    # f0 1.5 to 2 and f1 0.0008 (Fa/C0)^0.33, here at 0.05 C0: Palmgren's form, memory
    Family(
        name="thrust ball",
        kind="thrust ball",
        load_rule="thrust ball",
        interval_factor=1,
        k_f=5.5,
        k_f_range=(5.0, 6.0),
        grease_speed_limit=120_000,
        grease_speed_range=(80_000, 150_000),
        oil_speed_limit=180_000,
        oil_speed_range=(140_000, 220_000),
        free_share=0.24,
        free_share_range=(0.2, 0.3),
        f0=1.5,
        f1=0.00030,
        friction={},
    ),
    Family(
        name="thrust cylindrical roller",
        kind="thrust roller",
        load_rule="thrust cylindrical",
        interval_factor=1,
        k_f=90.0,
        k_f_range=(80.0, 100.0),
        grease_speed_limit=60_000,
        grease_speed_range=(50_000, 90_000),
        oil_speed_limit=100_000,
        oil_speed_range=(80_000, 130_000),
        free_share=0.26,
        free_share_range=(0.2, 0.33),
        f0=3.0,
        f1=0.00150,
        friction=_by_series({"11": (3.0, 0.00150), "12": (4.0, 0.00150)}),
    ),
    # k_f: worksheet 3 gives none, that of the thrust cylindrical stands in (own estimate); oil is the usual choice.
    # f0 and f1 of Palmgren's form for modern design, memory, within a third
    Family(
        name="thrust spherical roller",
        kind="thrust roller",
        load_rule="thrust spherical",
        interval_factor=1,
        k_f=90.0,
        k_f_range=(80.0, 100.0),
        grease_speed_limit=130_000,
        grease_speed_range=(100_000, 150_000),
        oil_speed_limit=230_000,
        oil_speed_range=(180_000, 280_000),
        free_share=0.25,
        free_share_range=(0.2, 0.3),
        f0=3.0,
        f1=0.00040,
        friction=_by_series({"92": (2.5, 0.00030), "93": (3.0, 0.00040), "94": (3.3, 0.00050)}),
    ),
)
FAMILIES: Mapping[str, Family] = {family.name: family for family in _ALL}
