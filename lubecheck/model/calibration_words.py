"""The words of a calibration: what the measurements gave, how well they fit, and what they could not settle."""

from __future__ import annotations

import math

from lubecheck.model.assumptions import proposed_housing_fill
from lubecheck.model.calibration import (
    COOLING,
    LIKELY,
    MOST,
    NOTHING,
    WIDEST_COOLING,
    WORST,
    Calibrated,
    Calibration,
    CalibrationFigures,
    Explained,
)
from lubecheck.model.entries import Case
from lubecheck.model.kernel import MOVED_BY_HEAT, Outcome
from lubecheck.model.limits import FLASH_MARGIN
from lubecheck.model.measured import (
    READING_ERROR,
    SETTLED_AFTER_GREASING,
    SETTLED_AFTER_START,
    at_state,
)
from lubecheck.model.points import Points
from lubecheck.model.result import Assumed

Band = tuple[float, float, float]
NOT_COMPUTED = (
    "not computed here, and to be looked for: bearing damage, creep or a rubbing part, a blocked floating bearing, "
    "misalignment; check vibration, noise and a grease or oil sample"
)


def told(case: Case, before: Band, after: Band, stop: str) -> Calibrated | None:
    """Return the calibration of a case as a result tells it, with the temperature of the operating point."""
    found = case.calibration
    if found is None:
        return None
    is_cooling = found.column == COOLING
    value = (found.value, found.low, found.high)
    figures = CalibrationFigures.of(
        {
            "cooling_factor": value if is_cooling else None,
            "admissible_factor": (1.0, *found.admissible) if is_cooling else None,
            "conductance": found.conductance,
            "fill": None if is_cooling or found.tells == NOTHING else value,
            "chi_square": found.chi_square,
            "error_scale": found.error_scale,
            "before": before,
            "after": after if found.is_explained else None,
        }
    )
    text = _explained(found, before, after) if found.is_explained else unexplained(found)
    likely = found.explained.likely
    return Calibrated(text, found.is_explained, figures, found.points, likely, _notes(case, found), stop)


def _explained(found: Calibration, before: Band, after: Band) -> str:
    fitted = f"{said(found)}; {_residuals(found)}"
    # What told nothing has moved nothing.
    return fitted if found.tells == NOTHING else f"{fitted}; temperature {_span(before)} before, {_span(after)} after"


def said(found: Calibration) -> str:
    """Say in one clause what the measurements gave, for every result that rests on it."""
    if not found.is_explained:
        return unexplained(found)
    what = _many(len(found.points))
    if found.column == COOLING:
        conductance = "" if found.conductance is None else f", {found.conductance:.3g} W/K"
        return (
            f"Calibrated on {what}: cooling by air {found.value:.2f} times the estimate ({found.low:.2f} to "
            f"{found.high:.2f}{conductance})"
        )
    if found.tells == NOTHING:
        return (
            f"Not calibrated on {what}, which cannot tell the fill: any from {found.low * 100:.0f} to "
            f"{found.high * 100:.0f} % gives what was read within the reading error. So the fill stays unknown"
        )
    if found.tells == MOST:
        return (
            f"Calibrated on {what}: the bearing is filled to no more than {found.high * 100:.0f} % of its free volume, "
            f"by the reading error alone; from {found.low * 100:.0f} % up to there the reading cannot tell the fill"
        )
    return (
        f"Calibrated on {what}: the bearing is filled to {found.value * 100:.0f} % of its free volume "
        f"({found.low * 100:.0f} to {found.high * 100:.0f} % by the reading error alone)"
    )


def unexplained(found: Calibration) -> str:
    """Say that no admissible cooling, or fill, gives what was measured, or not all of it."""
    if found.is_split:
        return _split(found)
    figures = max((point.figures.figures for point in found.points), key=lambda one: abs(one["residual"].value or 0.0))
    least, most = found.admissible
    if not math.isfinite(found.value):
        needed = "it would take a balance of heat, which was not found"
    elif found.column == COOLING:
        is_end = not 1.001 / WIDEST_COOLING < found.value < WIDEST_COOLING / 1.001
        beyond = ("under " if found.value < 1 else "over ") if is_end else ""
        believed = f"{least:.2g} to {most:.2g} can be believed"
        needed = f"it would take cooling {beyond}{found.value:.2g} times the estimate, where {believed}"
        if least <= found.value <= most:  # one reading of several lies outside, the fit of all does not
            off = "that reading alone lies outside of what can be believed"
            needed = f"{off}: all readings together give {found.value:.2g} times the estimated cooling"
    else:
        needed = f"no fill gives that, from {least * 100:.0f} to {most * 100:.0f} %"
    measured, computed = (figures[name].value for name in ("measured", "before"))
    beside = "no equilibrium" if computed is None else f"{computed:.1f} degC"
    return (
        f"Not calibrated: {measured or 0.0:.1f} degC was measured where {beside} is computed, and "
        f"{needed}. So what the temperature moves is not judged"
    )


def _split(found: Calibration) -> str:
    point = found.points[found.most_split]
    read, computed, residual = (point.figures.figures[name].value or 0.0 for name in ("measured", "after", "residual"))
    side = "hotter" if residual > 0 else "colder"
    return (
        f"Not calibrated: the {len(found.points)} readings disagree by more than their errors (chi-square "
        f"{found.chi_square:.1f} for {len(found.points) - 1} degrees of freedom; {_residuals(found)}, read minus "
        f"computed). Reading {found.most_split + 1} disagrees most: {read:.1f} degC was read where the best fit of all "
        f"has {computed:.1f} degC, {abs(residual):.1f} K {side}. Check how it was taken and its state; if it is right, "
        "something changed between the readings. So what the temperature moves is not judged"
    )


def over(case: Case, points: Points, name: str, row: int) -> str:
    """Say what was read and which limit that is over; empty where it is over none."""
    read = float((points.read_outer if name == "set_point" else points.read_highest)[row])
    if math.isnan(read):
        return ""
    if name == "set_point":
        set_points = (("trip", case.limits.trip), ("alarm", case.limits.alarm))
        passed = [f"{key} {point:g} degC" for key, point in set_points if point is not None and read >= point]
    else:
        tops = {
            "temperature": ("highest allowed", points.highest[row]),
            "rings": ("rings stabilised to", points.stabilised_to[row]),
            "flash_point": (f"flash point less {FLASH_MARGIN:g} K", points.flash_point[row] - FLASH_MARGIN),
        }
        what, top = tops.get(name, ("", math.inf))
        passed = [f"{what} {top:g} degC"] if read > top else []
    return f"read {read:g} degC, {passed[0]}" if passed else ""


def stop(case: Case, outcome: Outcome) -> str:
    """Say what was read over a limit of the first position, and what that asks for; empty where nothing was."""
    for name in ("set_point", "temperature", "rings", "flash_point"):
        judged = outcome.judged[name]
        if judged.applies[0] and (said := over(case, outcome.points, name, int(judged.row[0]))):
            return f"{said}: stop, and find the cause before {'greasing' if case.is_grease else 'changing the oil'}"
    return ""


def doubt(case: Case, name: str) -> str:
    """Say that a limit was not judged because a measured temperature contradicts what it rests on."""
    found = case.calibration
    if found is None or found.is_explained or name not in MOVED_BY_HEAT:
        return ""
    if found.is_split:
        return "not judged: the measured temperatures contradict one another"
    return "not judged: a measured temperature contradicts the computed one"


def found_fill(case: Case) -> str:
    """Say what a calibration found of an unknown fill; empty where it found none."""
    found = case.calibration
    if found is None or not found.is_explained or found.column == COOLING or found.tells == NOTHING:
        return ""
    if found.tells == MOST:
        return (
            f"no lower end found by the measured temperature: taken as {found.value * 100:.0f} % (at worst "
            f"{found.values[WORST] * 100:.0f} %)"
        )
    return f"found by the measured temperature: {found.value * 100:.0f} % (at worst {found.values[WORST] * 100:.0f} %)"


def assumed(case: Case) -> tuple[Assumed, ...]:
    """Return what the measurements left out, and how it was read."""
    said = {}
    for one in case.measured:
        if one.reading_error is None:
            said["reading_error"] = f"{READING_ERROR:g} K, good 95 times of 100"
        if one.running_time is None:
            text = f"settled: more than {SETTLED_AFTER_START:g} h after a start"
            after = f", more than {SETTLED_AFTER_GREASING:g} h after greasing" if case.is_grease else ""
            said["running_time"] = text + after
        if one.place is None:
            said["place"] = "on the housing or the outer ring"
        if case.is_grease and at_state(case, one).grease.fill is None:
            stated = case.grease.housing_fill
            share = proposed_housing_fill(case) if stated is None else stated
            said["fill"] = f"as proposed, with the housing at {share * 100:.0f} %"
    return tuple(Assumed(f"[measured] {key}", text, "common-practice") for key, text in said.items())


def _notes(case: Case, found: Calibration) -> tuple[str, ...]:
    said = []
    if found.is_explained and found.error_scale > 1 and found.chi_square is not None:
        said.append(
            f"the residuals are larger than the reading errors: chi-square {found.chi_square:.1f} for "
            f"{len(found.points) - 1} degrees of freedom, so the errors are taken {found.error_scale:.1f} times as "
            "large; something differed between the readings that the case does not say"
        )
    if not found.is_explained:
        said += _looked_at(found.explained)
    times = [one.running_time for one in case.measured if one.running_time is not None]
    if case.is_grease and times and min(times) < SETTLED_AFTER_GREASING:
        said.append(
            f"a reading {min(times):g} h after greasing is not steady: the rise after greasing is gone after about "
            f"{SETTLED_AFTER_GREASING:g} h; if that time counts from a start it has settled"
        )
    if found.is_explained and found.tells != NOTHING:
        said.append(
            "what [measured] leaves out is read from the rest of the case: after a change there, say in [measured] "
            "how it was at the reading, or measure again"
        )
    return tuple(said)


def _looked_at(explained: Explained) -> list[str]:
    said = []
    if explained.unlikely:
        count = len(explained.unlikely)
        causes = "1 cause is" if count == 1 else f"{count} causes are"
        said.append(f"{causes} not listed: each would lie over {LIKELY:g} half widths outside of its usual range")
    if explained.ruled_out:
        said.append(f"ruled out: {', '.join(explained.ruled_out)}, which cannot give it alone however far they go")
    if not explained.likely:
        said.append(
            "nothing alone is likely to explain it: check thermometer and state, and look for several causes together"
        )
    return [*said, NOT_COMPUTED] if explained.is_hot else said


def _residuals(found: Calibration) -> str:
    residuals = [round(point.figures.figures["residual"].value or 0.0, 1) + 0.0 for point in found.points]
    if len(residuals) == 1:
        return f"residual {residuals[0]:.1f} K"
    return f"residuals {', '.join(f'{one:.1f} K' for one in residuals)}"


def _many(count: int) -> str:
    return "1 measurement" if count == 1 else f"{count} measurements"


def _span(band: Band) -> str:
    value, low, high = band
    if not math.isfinite(value):
        return "not found"
    return f"{low:.0f} to {high:.0f} degC" if math.isfinite(high - low) else f"{value:.0f} degC, of no known band"
