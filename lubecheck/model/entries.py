"""A case: what the user said of one bearing position, one dataclass a table, one entry a key.

A field is a *fact* of the position (left out: a listed, cautious reading or `unknown`), a *decision* of the user (left
out: proposed), or a *requirement* (left out: a listed default).
"""

from __future__ import annotations

from dataclasses import dataclass

from lubecheck.data import lubricants
from lubecheck.data.bearings import Bearing
from lubecheck.data.cleanliness import setting_of
from lubecheck.data.oil_analysis import OilAnalysis
from lubecheck.model.calibration import Calibration
from lubecheck.model.cleanliness import stated_setting
from lubecheck.model.duty_entries import Duty, Shaft
from lubecheck.model.entry import entry_of
from lubecheck.model.measured_entries import Measured
from lubecheck.model.part_entries import BearingTable, LubricantTable
from lubecheck.model.place_entries import Housing, Surroundings
from lubecheck.model.plan_entries import GreasePlan, OilPlan
from lubecheck.physics import cleanliness, fatigue

FILTERS = ("in line", "off line", "none")
SERVICES = ("quiet", "normal", "shock")


@dataclass(frozen=True, slots=True, kw_only=True)
class Cleanliness:
    """[cleanliness]: what dirt the lubricant carries."""

    setting: str | None = entry_of("fact", words=fatigue.SETTINGS[:-1], meaning="cleanliness by ISO 281 annex A")
    described: str | None = entry_of("fact", words=cleanliness.WORDS, meaning="cleanliness in plain words")
    code: str | None = entry_of("fact", meaning="cleanliness of the oil by ISO 4406", example='"18/15/12"')
    count_6: float | None = entry_of(
        "fact", "number", 0, 2.5e6, meaning="oil analysis: particles over 6 um per ml", example="210"
    )
    count_14: float | None = entry_of(
        "fact", "number", 0, 2.5e6, meaning="oil analysis: particles over 14 um per ml", example="38"
    )
    filter: str | None = entry_of("fact", words=FILTERS, meaning="where the oil is filtered")
    filter_size: float | None = entry_of(
        "fact", "length", 1e-4, 1, meaning="particle size that the filter's beta is for", example='"12 um"'
    )
    filter_beta: float | None = entry_of(
        "fact", "number", 1, 1e5, meaning="filter beta: particles before over those after it", example="200"
    )
    water: float | None = entry_of("fact", "share", 0, 1, meaning="water in the oil, by mass", example='"100 ppm"')


@dataclass(frozen=True, slots=True, kw_only=True)
class Requirements:
    """[limits]: the user's own limits, replacing the defaults."""

    life: float | None = entry_of(
        "requirement", "time", 10, 1e6, meaning="modified rating life wanted", example='"40000 h"'
    )
    reliability: float | None = entry_of(
        "requirement", "share", 0.5, 0.9995, meaning="reliability of that life", example='"90 %"'
    )
    grease_reliability: float | None = entry_of(
        "requirement",
        "share",
        0.5,
        0.999,
        example='"99 %"',
        meaning="share of bearings whose grease still serves at the end of its interval or life",
    )
    highest_temperature: float | None = entry_of(
        "requirement", "temperature", 20, 350, example='"95 degC"', meaning="highest bearing temperature"
    )
    alarm: float | None = entry_of(
        "requirement", "temperature", 20, 350, example='"90 degC"', meaning="alarm set-point of the housing's sensor"
    )
    trip: float | None = entry_of(
        "requirement", "temperature", 20, 350, example='"100 degC"', meaning="trip set-point of the housing's sensor"
    )
    start_torque: float | None = entry_of(
        "requirement", "torque", 0.1, 1e9, example='"8 N*m"', meaning="torque that the drive has for this bearing"
    )
    least_viscosity_ratio: float | None = entry_of(
        "requirement", "number", 0.1, 10, example="1.0", meaning="least viscosity ratio kappa"
    )
    static_safety: float | None = entry_of(
        "requirement", "number", 0.3, 20, meaning="least static safety S0", example="2"
    )
    service: str | None = entry_of("requirement", words=SERVICES, meaning="class of running for static safety")


@dataclass(frozen=True, slots=True, kw_only=True)
class Case:
    """One bearing position, as the user described it."""

    title: str = ""
    note: str = ""
    bearing: Bearing
    lubricant: lubricants.Lubricant
    duty: tuple[Duty, ...]
    surroundings: Surroundings
    shaft: Shaft = Shaft()
    opposed: Bearing | None = None  # the bearing that [shaft] opposed names
    housing: Housing = Housing()
    grease: GreasePlan = GreasePlan()
    oil: OilPlan = OilPlan()
    cleanliness: Cleanliness = Cleanliness()
    limits: Requirements = Requirements()
    measured: tuple[Measured, ...] = ()
    calibration: Calibration | None = None  # what `measured` says, once studies/calibrate has found it
    analysis: OilAnalysis | None = None  # of the oil in use; `lubricant` is then the oil as it is now
    given: tuple[tuple[str, str], ...] = ()  # "table.key" and the text the user wrote, in their order

    @property
    def is_grease(self) -> bool:
        """The position is grease lubricated."""
        return self.lubricant.kind == "grease"

    @property
    def setting(self) -> str | None:
        """The cleanliness as stated, or else by the code of the oil in use."""
        stated = self.stated_setting
        if stated is not None or self.analysis is None or self.analysis.code is None:
            return None if stated == fatigue.OFF_SCALE else stated
        return setting_of(self.analysis.code)

    @property
    def is_beyond_settings(self) -> bool:
        """The oil is dirtier than ISO 281 has a setting for, by what is stated or else by the oil in use."""
        if self.stated_setting is not None:
            return self.stated_setting == fatigue.OFF_SCALE
        return self.setting is None and self.analysis is not None and self.analysis.code is not None

    @property
    def stated_setting(self) -> str | None:
        """The cleanliness as [cleanliness] states it, in one way or another."""
        return stated_setting(self.cleanliness, is_grease=self.is_grease, supply=self.oil.supply)

    @property
    def water(self) -> float | None:
        """Water in the oil as stated, or else by the analysis of the oil in use."""
        if self.cleanliness.water is not None or self.analysis is None:
            return self.cleanliness.water
        return self.analysis.water


TABLES: dict[str, type] = {
    "bearing": BearingTable,
    "lubricant": LubricantTable,
    "duty": Duty,
    "shaft": Shaft,
    "surroundings": Surroundings,
    "housing": Housing,
    "grease": GreasePlan,
    "oil": OilPlan,
    "cleanliness": Cleanliness,
    "limits": Requirements,
    "measured": Measured,
}
