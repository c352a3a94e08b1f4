"""A calibration: what measured temperatures say of the one thing that the estimate of heat knows least.

That is the factor on all cooling by air, or, where the cooling is stated and the fill is not known, the fill. It is
found anew under every reading of what the case leaves out and under each end and draw of its uncertain inputs, so that
each of these passes through what was measured: `studies/calibrate` makes it, `rows` and `check` read it.
"""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Any

from lubecheck.model.result import Declared, Figures

USUAL, WORST = "usual", "worst"  # the readings of unsaid facts; one fact alone at its worst goes by its name
COOLING, FILL = "cooling_factor", "fill"  # the columns of points that can be the unknown
LIKELY = 3.0  # half widths outside the usual range, from which a cause explains nothing: estimate
# What is told of the unknown: itself; only the most that it can be; or, within the reading errors, nothing, so that the
# case stays as it is without the measurements.
VALUE, MOST, NOTHING = "value", "most", "nothing"
WIDEST_COOLING = 30.0  # times the estimate, or one over that: searched, so that what would be needed can be told


class MeasuredFigures(Figures):
    """One reading beside what is computed for its state."""

    measured = Declared("degC", "temperature that was read")
    reading_error = Declared("delta_degC", "what the reading is good to, 95 times of 100")
    before = Declared("degC", "temperature computed there without the measurements")
    after = Declared("degC", "temperature computed there with them")
    residual = Declared("delta_degC", "what was read less what is computed with the measurements")


class CalibrationFigures(Figures):
    """What the measurements gave."""

    cooling_factor = Declared("1", "cooling by air over the estimate for this housing; none where the fill was sought")
    admissible_factor = Declared("1", "that factor as the estimate has it, with the range that could be believed")
    conductance = Declared("W/K", "from the housing to the air at the first measured state")
    fill = Declared(
        "1", "fill of the bearing, as a share of its free volume; none where the cooling was sought, or nothing told"
    )
    chi_square = Declared("1", "sum of squares of residuals over standard errors; none of one measurement")
    error_scale = Declared("1", "times that the reading errors were taken as large, for residuals that are larger")
    before = Declared("degC", "temperature of the operating point without the measurements")
    after = Declared("degC", "temperature of the operating point with them")


@dataclass(frozen=True, slots=True)
class Explanation:
    """Something that would explain a reading that no cooling explains, and how far from usual it would have to be."""

    cause: str
    needed: float
    unit: str
    usual_low: float
    usual_high: float
    surprise: float  # 0 at the edge of the usual range, 1 half of its width outside; below 0 inside
    words: str


@dataclass(frozen=True, slots=True)
class Explained:
    """What was looked at for a reading that is not explained."""

    likely: tuple[Explanation, ...] = ()  # the least surprising first
    unlikely: tuple[Explanation, ...] = ()  # they give the reading too, but far outside of what is usual
    ruled_out: tuple[str, ...] = ()  # causes that do not give it however far they go
    is_hot: bool = False


@dataclass(frozen=True, slots=True)
class MeasuredPoint:
    """One reading, its place, and its figures."""

    place: str
    figures: MeasuredFigures


@dataclass(frozen=True, slots=True)
class Calibration:
    """What is found from the measurements of a case."""

    column: str  # COOLING or FILL
    is_explained: bool  # else nothing is calibrated, and what temperature moves is not judged
    value: float
    low: float  # the ends that the reading errors leave, 95 %
    high: float
    admissible: tuple[float, float]
    conductance: float | None
    values: Mapping[str, float]  # by the reading of unsaid facts
    ends: Mapping[str, tuple[float, float]]  # by uncertain input: the value under its low and its high end
    draws: tuple[float, ...]  # the value under each draw of all uncertain inputs, the reading errors drawn with them
    points: tuple[MeasuredPoint, ...]
    chi_square: float | None
    error_scale: float
    tells: str  # VALUE, MOST or NOTHING
    heat_of: tuple[Any, ...]  # what the temperature hangs on, as the case had it
    is_split: bool = False  # the readings disagree by more than their errors
    most_split: int = 0  # the reading that disagrees most
    explained: Explained = Explained()

    def at(self, facts: Sequence[str]) -> float:
        """Return the value under a reading, told by the facts that it reads at their worst."""
        key = USUAL if not facts else facts[0] if len(facts) == 1 else WORST
        # A fact that only a change has left open was none when the temperature was read.
        return self.values.get(key, self.values[USUAL if len(facts) < 2 else WORST])


@dataclass(frozen=True)
class Calibrated:
    """A calibration as a result tells it."""

    text: str
    is_explained: bool
    figures: CalibrationFigures
    measurements: tuple[MeasuredPoint, ...]
    explanations: tuple[Explanation, ...]
    notes: tuple[str, ...]
    stop: str  # what was read over a limit, and what that asks for; empty where nothing was
