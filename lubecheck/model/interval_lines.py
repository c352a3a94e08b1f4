"""The lines of lubricant life in words and figures: side by side, what each is multiplied with, which one governs."""

from __future__ import annotations

import math

from lubecheck.model import intervals
from lubecheck.model.assumptions import FACTS
from lubecheck.model.entries import Case
from lubecheck.model.kernel import Outcome
from lubecheck.model.result import IntervalLine
from lubecheck.model.rows import INTERVAL_ANSWERS, answer_factor, seasons
from lubecheck.physics import grease_corrections, grease_curve, grease_life, oil_life

Factors = tuple[tuple[str, float], ...]


def lines(case: Case, outcome: Outcome) -> tuple[IntervalLine, ...]:
    """Return the lines of the first position of an outcome."""
    return _grease_lines(case, outcome) if case.is_grease else _oil_lines(case, outcome)


def spread(found: tuple[IntervalLine, ...]) -> str:
    """Say how far the lines that give hours lie apart."""
    read = [line for line in found if line.hours is not None and line.failed is not None]
    if len(read) < 2:
        read = [line for line in found if line.hours is not None]
    if len(read) < 2:
        return "only one line can be read here, so nothing stands beside it" if read else "no line can be read here"
    low, high = min(read, key=_hours), max(read, key=_hours)
    return (
        f"the lines lie {_hours(high) / _hours(low):.1f} times apart: {low.name} {_hours(low):.0f} h, "
        f"{high.name} {_hours(high):.0f} h"
    )


def _hours(line: IntervalLine) -> float:
    return line.hours or math.nan


def percentile(failed: float) -> str:
    """Return a share failed as the trade writes it.

    >>> percentile(0.01), percentile(0.1)
    ('L01', 'L10')
    """
    return f"L{failed * 100:02.0f}" if failed >= 0.0095 else f"L{failed * 100:.1g}"


def classical_factors(case: Case, outcome: Outcome) -> Factors:
    """Return what the classical interval is multiplied with at the hottest state: the kernel's own functions."""
    p, row = outcome.points, int(outcome.hottest[0])
    heat = float(
        grease_life.temperature_halving.plain(
            temperature=outcome.state.temperature[row], reference=p.life_reference[row], step=p.life_step[row]
        )
    )
    return (
        ("temperature", heat),
        ("load", float(grease_life.load_factor.plain(outcome.load_ratio[row]))),
        *_answers(case, float(p.interval_factor[row])),
        *_percentile_factor(grease_life.L01, float(p.grease_failed[row])),
    )


def _answers(case: Case, whole: float) -> Factors:
    """Return each answer that shortens, as it was judged; what was not said stands at its usual reading."""
    usual = {fact.name: fact.usual for fact in FACTS}
    parts = tuple((key.replace("_", " "), answer_factor(case, usual, key)) for key in INTERVAL_ANSWERS)
    return tuple((key, factor) for key, factor in parts if factor != 1.0)


def _percentile_factor(known: float, wanted: float) -> Factors:
    factor = float(grease_life.weibull_scale.plain(known=known, wanted=wanted, slope=grease_life.WEIBULL_SLOPE))
    return () if math.isclose(factor, 1.0) else ((f"{percentile(known)} to {percentile(wanted)}", factor),)


def _grease_lines(case: Case, outcome: Outcome) -> tuple[IntervalLine, ...]:
    p, row = outcome.points, int(outcome.hottest[0])
    is_sealed = bool(p.is_sealed[0])
    failed = float(p.grease_failed[0])
    classical, booser = _finite(outcome.lines.classical[0]), _finite(outcome.lines.booser[0])
    inside = tuple(f for f in (("surroundings", float(p.inside_factor[row])),) if f[1] != 1.0)
    load = float(grease_life.load_factor.plain(outcome.load_ratio[row]))
    worksheet = _finite(outcome.lines.worksheet[0])
    return (
        IntervalLine(
            name="classical",
            hours=classical,
            failed=failed,
            applies=not is_sealed and classical is not None,
            governs=not is_sealed and classical is not None,
            factors=() if is_sealed else classical_factors(case, outcome),
            basis="grease-handbooks",
            note=_classical_note(outcome, row, is_sealed=is_sealed),
        ),
        IntervalLine(
            name="Booser",
            hours=booser,
            failed=failed,
            applies=is_sealed and booser is not None,
            governs=is_sealed and booser is not None,
            factors=(("load", load), *inside, *_percentile_factor(grease_life.L50, failed)),
            basis="booser",
            note=_booser_note(outcome, row, is_sealed=is_sealed),
        ),
        IntervalLine(
            name="GfT worksheet 3",
            hours=worksheet,
            failed=failed if worksheet is not None else None,
            applies=worksheet is not None,
            governs=False,
            factors=() if worksheet is None else _worksheet_factors(case, outcome, is_sealed=is_sealed),
            basis="gft-3",
            note=_worksheet_note(outcome),
        ),
    )


def _worksheet_factors(case: Case, outcome: Outcome, *, is_sealed: bool) -> Factors:
    p, row = outcome.points, int(outcome.hottest[0])
    named = classical_factors(case, outcome)
    kept = [pair for pair in named if pair[0] in ("temperature", "load")]
    whole = float(p.inside_factor[row] if is_sealed else p.interval_factor[row])
    answers = (("surroundings", whole),) if is_sealed and whole != 1.0 else () if is_sealed else _answers(case, whole)
    return (*kept, *answers, *_percentile_factor(grease_curve.FAILED, float(p.grease_failed[0])))


def _worksheet_note(outcome: Outcome) -> str:
    p, row = outcome.points, int(outcome.hottest[0])
    parameter, hours = float(outcome.lines.worksheet_parameter[0]), float(outcome.lines.worksheet[0])
    left, right = grease_curve.worksheet_life.valid["parameter"]
    where = f"k_f n dm is {parameter:.3g} mm/min"
    if parameter > right:
        return f"{where}: the curve ends at {right:.3g}"
    if math.isnan(hours):
        return f"{where}: load or temperature outside its range"
    end = ", read at the curve's left end" if parameter < left else ""
    doubt = grease_curve.CURVE_DOUBT
    at = grease_corrections.worksheet_parameter.plain(p.k_f[row], p.speed[row], p.pitch_diameter[row])
    raw = float(grease_curve.worksheet_life.plain(at))
    return (
        f"{where}{end}: {raw:.0f} h before the factors, lithium soap at 70 degC, L10; from memory, "
        f"times or divided by {doubt:g}: "
        f"{hours / doubt:.0f} to {hours * doubt:.0f} h; the curve is only remembered, so it never governs"
    )


def _classical_note(outcome: Outcome, row: int, *, is_sealed: bool) -> str:
    p = outcome.points
    if is_sealed:
        return "for open bearings only"
    share = float(grease_life.classical_share.plain(p.speed[row], p.bore[row]))
    if share > grease_life.CLASSICAL_GREATEST_SHARE:
        return f"speed is {share:.2f} of where the line ends, valid to {grease_life.CLASSICAL_GREATEST_SHARE:g}"
    if math.isnan(outcome.lines.classical[0]):
        return "load or temperature outside its range"
    raw = float(grease_life.classical_interval.plain(p.speed[row], p.bore[row], p.interval_family[row]))
    many = " (linear damage over all states)" if (p.case == 0).sum() > 1 else ""
    return f"{raw:.0f} h before the factors{many}; published motor tables give 0.9 to 2.3 times that"


def _booser_note(outcome: Outcome, row: int, *, is_sealed: bool) -> str:
    low, high = grease_life.booser_median_life.valid["temperature"]
    range_said = f"valid {low:g} to {high:g} degC" + (
        ", read at its cool end" if outcome.state.temperature[row] < low else ""
    )
    if math.isnan(outcome.lines.booser[0]):
        return f"load or temperature outside its range: {range_said}"
    doubt = "its constant is remembered with a doubt of a factor of 2, and this is the cautious reading"
    use = "" if is_sealed else "for grease that is never renewed, so it does not govern here; "
    return f"{use}{range_said}; {doubt}"


def _oil_lines(case: Case, outcome: Outcome) -> tuple[IntervalLine, ...]:
    p, found = outcome.points, outcome.lines
    bath, oxidation = _finite(found.bath[0]), _finite(found.oxidation[0])
    is_bath, is_circulating = bool(p.is_bath[0]), bool(p.is_circulating[0])
    hot = "the bath is hotter than the rule goes"
    low, high = oil_life.OXIDATION_RANGE

    def factors(rule: intervals.OilRule) -> Factors:
        found = (("water", float(p.water_share[0])), ("volume", _charge(outcome, rule)))
        return tuple(factor for factor in found if factor[1] != 1.0 and math.isfinite(factor[1]))

    return (
        IntervalLine(
            name="bath rule",
            hours=bath,
            failed=None,
            applies=is_bath and bath is not None,
            governs=bool(is_bath and bath is not None and bath == found.allowed[0]),
            factors=factors(grease_life.bath_change_interval),
            basis="bath-handbooks",
            note=("12 months up to 50 degC, 3 at 100 degC" if bath is not None else hot)
            if is_bath
            else "for baths only",
        ),
        IntervalLine(
            name="oxidation rule",
            hours=oxidation,
            failed=None,
            applies=(is_bath or is_circulating) and oxidation is not None,
            governs=bool(oxidation is not None and oxidation == found.allowed[0]),
            factors=factors(oil_life.oxidation_life),
            basis="whitby",
            note=f"4 years up to 70 degC, halved each 10 K; published rates {low:g} to {high:g} times each 10 K; read "
            f"at the bearing's temperature, the hottest place of the oil, valid to {oil_life.OXIDATION_TOP:g} degC",
        ),
    )


def _charge(outcome: Outcome, rule: intervals.OilRule) -> float:
    """Return the factor by the size of the oil charge that a rule takes at the hottest state."""
    found = intervals.charge_in_effect(outcome.points, outcome.state.temperature, outcome.state.friction_power, rule)
    return float(found[int(outcome.hottest[0])])


def charge_words(case: Case, outcome: Outcome) -> str:
    """Say how large the oil charge is beside an ordinary one, where it was stated."""
    p, row = outcome.points, int(outcome.hottest[0])
    volume = float(p.oil_volume[row])
    share = float(intervals.charge_share(p, outcome.state.friction_power)[row])
    is_bath_rule = bool(p.is_bath[0]) and not outcome.lines.bath[0] > outcome.lines.oxidation[0]
    taken = _charge(outcome, grease_life.bath_change_interval if is_bath_rule else oil_life.oxidation_life)
    if p.is_bath[0]:
        figure = volume / float(outcome.state.friction_power[row])
        low, high = oil_life.ORDINARY_SUMP
        unit = "l a kW of friction"
    elif p.is_circulating[0]:
        figure = float(oil_life.dwell_time.plain(p.oil_volume[row], p.oil_flow[row])) * 60
        low, high = (60 * end for end in oil_life.ORDINARY_DWELL)
        unit = "min of the flow"
    else:
        return ""
    if not math.isfinite(figure) or low <= figure <= high:
        return ""
    size = f"{figure:.2g} {unit}, ordinary are {low:g} to {high:g} {unit.split()[0]}"
    if figure < low:
        return f"a small charge, {size}: the rule may be too long for it, look at the oil or change it earlier"
    if not math.isfinite(taken):
        return f"a large charge, {size}"
    longest = "12 months" if is_bath_rule else "4 years"
    cap = f", not past the {longest} that a cool oil serves" if taken < share else ""
    return f"a large charge, {size}: x {taken:.2f} (estimate){cap}"


def interval_note(case: Case, outcome: Outcome) -> str:
    """Return the chain of the governing line of an open grease bearing, and what else bounds it."""
    p, row = outcome.points, int(outcome.hottest[0])
    raw = float(grease_life.classical_interval.plain(p.speed[row], p.bore[row], p.interval_family[row]))
    named = dict(classical_factors(case, outcome))
    surroundings = float(p.interval_factor[row])
    states = len(case.duty) * len(seasons(case))
    many = states > 1
    running, allowed = float(outcome.lines.classical[0]), float(outcome.allowed_interval[0])
    place = "at the hottest state " if many else ""
    said = [f"{place}classical {raw:.0f} h x temperature {named['temperature']:.2f} x load {named['load']:.2f} "
            f"x surroundings {surroundings:.2f}"]  # fmt: skip
    percent = float(p.grease_failed[0])
    to_wanted = _percentile_factor(grease_life.L01, percent)
    if to_wanted:
        said[0] += f" x {to_wanted[0][0]} {to_wanted[0][1]:.2f}"
    chain = raw * surroundings * named["temperature"] * named["load"]
    chain *= to_wanted[0][1] if to_wanted else 1.0
    said[0] += f" = {chain:.0f} h"
    if many:
        said.append(f"{running:.0f} h over all {states} states: the shares of time over their intervals, added up")
    hours_per_day = float(p.hours_per_day[0])
    if allowed >= p.ceiling[0]:
        said.append("held to the calendar ceiling of 48 months")
    elif hours_per_day < 24 and allowed < 0.995 * running:
        said.append(f"ageing at rest takes it from {running:.0f} to {allowed:.0f} h")
    if allowed < 7 * hours_per_day:
        said.append("under a week: feed continuously or use oil")
    said.append(f"{percent * 100:.3g} % of bearings have failed by then ({percentile(percent)})")
    return "; ".join(said)


def _finite(value: float) -> float | None:
    return float(value) if math.isfinite(value) else None
