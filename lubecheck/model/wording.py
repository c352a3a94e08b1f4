"""The words of a result: why a limit stands where it does, what was assumed, what to beware of.

Faces print these texts and compute nothing; so the terminal, the record and the page say the same.
"""

from __future__ import annotations

import math
from collections.abc import Sequence

import numpy as np

from lubecheck.data.bearings import Bearing
from lubecheck.data.families import FAMILIES
from lubecheck.data.lubricants import Lubricant
from lubecheck.data.oil_analysis import OilAnalysis
from lubecheck.model import calibration_words, limits, oil_words
from lubecheck.model import given as after
from lubecheck.model.amounts import CARTRIDGE_G
from lubecheck.model.assumptions import FACTS, Fact, proposed_housing_fill
from lubecheck.model.entries import Case
from lubecheck.model.entry import entries
from lubecheck.model.equilibrium import TOP_TEMPERATURE
from lubecheck.model.interval_lines import charge_words, interval_note, percentile
from lubecheck.model.kernel import Outcome
from lubecheck.model.limits import FLASH_MARGIN, parts_rows, takes_loads
from lubecheck.model.part_entries import BearingTable
from lubecheck.model.points import BEYOND_SETTINGS
from lubecheck.model.result import Assumed
from lubecheck.model.rows import DEFAULT_KAPPA, DEFAULT_LIFE, DEFAULT_RELIABILITY, LIMIT_ORIGINS, RULE_DAYS, seasons
from lubecheck.model.shaft import loads_of
from lubecheck.model.side_figures import curing_preload, safe_speed
from lubecheck.physics import churning, cleanliness, clearance, fatigue, grease_life, oil_life
from lubecheck.units import KINDS

SAFETY = (
    "This result supports, and does not replace, the machine maker's instructions, site procedures, local codes and "
    "the judgement of a licensed engineer",
    "Isolate and lock out before any work on the machine; stay clear of the turning shaft; surfaces can be hot",
)
GREASE_SAFETY = (
    "Do not mix greases without a compatibility test (ASTM D6185)",
    "A grease gun reaches pressures that push out seals and inject grease through skin: never use force",
)
_BEARING_UNITS = {key: KINDS[entry.kinds[0]].unit for key, entry in entries(BearingTable) if entry.kinds}
WEIGH = (
    "weigh a stroke in a minute and state [grease] stroke: ten strokes on a piece of paper on a letter scale, grams "
    "over ten; guns give 0.8 to 3 g a stroke"
)
_BESIDE_THE_BEARING = ("[housing] void", "[housing] relief")  # where grease of an open bearing goes
_DIRTY = 0.05  # e_C below which dirt is likelier to end a bearing than the lubricant: estimate, from severe on
_HOT = 150.0  # degC from which ratings are lowered
LONG_LIFE = 200_000.0  # h, beyond which a fatigue life says no more than "not this"


def join(*parts: str) -> str:
    """Return the parts that say something, as one text."""
    return "; ".join(part for part in parts if part)


def doubt(facts: Sequence[Fact], use: float, *, is_open: bool) -> str:
    """Say which facts left unsaid would change the state, and what the use is at their worst."""
    names = ", ".join(fact.name for fact in facts)
    worst = f"{use:.2f}" if math.isfinite(use) else "no finite value"
    if is_open:
        return f"hangs on what was not said: state {names} (use at the worst reading: {worst})"
    return f"near at the worst reading of what was not said: {names}"


def band(low: float, high: float, lost: float = 0.0) -> str:
    """Say that the band of uncertain inputs crosses the limit, where it does, or which share of it has no number."""
    if lost >= 0.005:
        return f"without a use in {100 * lost:.0f} % of the band"
    top = f"to {high:.2f}" if math.isfinite(high) else "and without end"
    return f"the band {low:.2f} {top} crosses the limit" if low <= 1.0 < high else ""


def basis(name: str, case: Case, outcome: Outcome) -> str:
    """Return the source key of a limit where it depends on the case."""
    points = outcome.points
    own = case.limits
    if name == "temperature":
        origin, source = LIMIT_ORIGINS[int(points.limit_origin[outcome.judged[name].row[0]])]
        return _stated_or(case, "lubricant.highest") if origin == "lubricant" else source
    if name == "cold_start":
        return _stated_or(case, "lubricant.lowest")
    if name == "interval" and not case.is_grease:
        is_bath_rule = outcome.lines.bath[0] <= outcome.lines.oxidation[0]
        return "bath-handbooks" if is_bath_rule or not points.is_circulating[0] else "whitby"
    if name == "interval" and points.is_sealed[0]:
        return "booser"
    stated = {"film": own.least_viscosity_ratio, "static_load": own.static_safety}
    return "user" if stated.get(name) is not None else ""


def _stated_or(case: Case, key: str) -> str:
    """Return the source of a figure of the lubricant: the user where the case states it, else that of the lubricant."""
    return "user" if key in dict(case.given) else case.lubricant.source


def limit_note(name: str, case: Case, outcome: Outcome) -> str:
    """Return what is worth saying about a limit."""
    judged = outcome.judged[name]
    row = int(judged.row[0])
    maker = _NOTES.get(name)
    read = calibration_words.over(case, outcome.points, name, row)
    by_reading = f"{read}: a reading needs no model" if read else ""
    return join(by_reading, maker(case, outcome, row) if maker else "")


def _film(case: Case, outcome: Outcome, row: int) -> str:
    kappa = outcome.kappa[row]
    if math.isnan(kappa):
        return "no temperature, so no film could be worked out"
    asked = outcome.points.least_kappa[row]
    advice = ""
    if kappa > 4:
        advice = "above 4: a thinner oil would run cooler with film enough"
    elif kappa < 0.4 and not case.lubricant.ep:
        advice = "below 0.4 an extreme pressure additive is asked for"
    return join(f"kappa is {kappa:.2f}, at least {asked:.2f} is asked for", advice, _duty(case, row))


def _not_found(outcome: Outcome, row: int) -> str:
    if outcome.state.is_too_hot[row]:
        return f"no equilibrium below {TOP_TEMPERATURE:g} degC: the heat cannot be carried off"
    return "the balance of heat was not solved, so nothing is known"


def _temperature(case: Case, outcome: Outcome, row: int) -> str:
    if not outcome.state.is_found[row]:
        return _not_found(outcome, row)
    points = outcome.points
    if math.isnan(points.highest[row]):
        return "state [lubricant] highest"
    return join(f"the lowest top temperature is that of the {LIMIT_ORIGINS[int(points.limit_origin[row])][0]}",
                _duty(case, row))  # fmt: skip


def _cold(case: Case, outcome: Outcome, row: int) -> str:
    parts = []
    if case.surroundings.coldest is None:
        parts.append("[surroundings] coldest")
    if case.lubricant.lowest is None:
        parts.append("[lubricant] lowest")
    return f"state {', '.join(parts)}" if parts else ""


def _fill(case: Case, outcome: Outcome, row: int) -> str:
    points = outcome.points
    grams = points.fill[row] * points.free_volume[row] * points.density[row] / 1000
    held = outcome.state.held_volume[row]
    said = "proposed" if case.grease.fill is None else ""
    if isinstance(case.grease.fill, str):
        said = calibration_words.found_fill(case) or "unknown fill, judged from 30 to 100 %: inspect, or purge first"
    churned = f"{held:.1f} cm^3 cannot clear and are churned" if held > 0 else ""
    over = "more than the bearing's free volume" if points.fill[row] > 1 else ""
    side = "held against the least" if outcome.judged["fill"].demand[0] != points.fill[row] else ""
    share = f"{grams:.1f} g fill {points.fill[row] * 100:.0f} % of {points.free_volume[row]:.1f} cm^3"
    return join(said, after.found(case, outcome), share, side, over, churned)


def _interval(case: Case, outcome: Outcome, row: int) -> str:
    points = outcome.points
    hottest = int(outcome.hottest[0])
    if not case.is_grease:
        bath = points.is_bath[0]
        by = "oil change by the temperature of the bath" if bath else "oil change by oxidation at the bearing"
        wet = "shortened by water" if points.water_share[0] < 1 else ""
        return join(by + ("" if case.oil.interval else ", proposed"), wet, charge_words(case, outcome))
    if points.is_sealed[0]:
        level = percentile(float(points.grease_failed[0]))
        if case.grease.interval is not None:
            hours = float(outcome.allowed_interval[0])
            lasts = f"the grease sealed in it lasts {_spaced(hours)} h ({level}): replace the bearing by then"
            out = "closed on both sides: do not regrease, and take [grease] interval out of the case"
            return join(out, lasts if math.isfinite(hours) else _uncounted(outcome))
        if uncounted := _uncounted(outcome):
            return join(uncounted, "closed on both sides: do not regrease")
        return f"closed on both sides: life of its grease ({level}) against the wanted life; do not regrease"
    said = "" if case.grease.interval is not None else "proposed"
    share = float(grease_life.classical_share.plain(points.speed[hottest], points.bore[hottest]))
    if share > grease_life.CLASSICAL_GREATEST_SHARE:
        valid = (
            f"speed is {share:.2f} of where the classical line ends, valid to {grease_life.CLASSICAL_GREATEST_SHARE:g}"
        )
        return join(said, f"{valid}: feed continuously or ask the grease's maker")
    if np.isnan(outcome.allowed_interval[0]):
        uncounted = _uncounted(outcome)
        return join(said, uncounted or "load or temperature outside the range of the classical line")
    return join(said, interval_note(case, outcome))


def _speed(case: Case, outcome: Outcome, row: int) -> str:
    points = outcome.points
    part = "cage or contact seals, not the lubricant, set it" if (
        points.kinematic_limit[row] < points.speed_limit[row]
    ) else ""  # fmt: skip
    safe = safe_speed(case, points, slice(row, row + 1))[0]
    heat = ""
    if points.speed[row] > safe:
        heat = f"above the thermally safe speed of DIN 732, {safe:.0f} rpm: look at the temperature"
    return join(part, heat, _duty(case, row) if part or heat else "")


def _acceleration(case: Case, outcome: Outcome, row: int) -> str:
    points = outcome.points
    load, mass = math.hypot(points.radial_load[row], points.axial_load[row]), points.elements_mass[row]
    held = f"traction of {load:.0f} N has to bring {mass:.3g} g of rolling elements up to speed (estimate)"
    advice = "the elements may slide at every start: start softer, or preload" if (
        outcome.judged["acceleration"].use[0] > 1
    ) else ""  # fmt: skip
    return join(held, advice, _duty(case, row))


def _rings(case: Case, outcome: Outcome, row: int) -> str:
    state = outcome.state
    if not state.is_found[row]:
        return _not_found(outcome, row)
    hotter = "inner" if state.excess[row] >= 0 else "outer"
    limit = "dimensional stability of the rings"
    return join(limit, f"the {hotter} one is hotter by {abs(state.excess[row]):.1f} K", _duty(case, row))


def _set_point(case: Case, outcome: Outcome, row: int) -> str:
    if not outcome.state.is_found[row]:
        return _not_found(outcome, row)
    return join("steady reading of a sensor on the housing; check --warmup adds the peaks on the way", _duty(case, row))


def _flash(case: Case, outcome: Outcome, row: int) -> str:
    return f"the oil's flash point of {outcome.points.flash_point[row]:.0f} degC less {FLASH_MARGIN:.0f} K"


def _clearance(case: Case, outcome: Outcome, row: int) -> str:
    points, judged = outcome.points, outcome.judged["clearance"]
    if math.isnan(points.clearance[row]):
        return f"no clearance table for {case.bearing.family} of this bore, or class"
    left = judged.allowed[0] - judged.demand[0]
    if math.isnan(left):
        return f"{case.bearing.clearance}: how much is left could not be judged, as no temperature holds"
    sign = "; below zero: the bearing is preloaded, take a class with more" if left < 0 else ""
    taken = f"{points.fit_loss[row]:.3f} mm by the fits, the rest by a warmer inner ring"
    whole = f"{left:.3f} mm are left of {judged.allowed[0]:.3f} mm on the average"
    return f"{case.bearing.clearance}: {whole}{sign}; {taken}"


def _uncounted(outcome: Outcome) -> str:
    """Say which load the family has no rule for; empty where all are counted."""
    if parts_rows(outcome.points).any():
        return "the radial load is over 0.55 of the axial one, so that the washers part"
    return "" if takes_loads(outcome.points).all() else "the family takes no load in one of the stated directions"


def _minimum_load(case: Case, outcome: Outcome, row: int) -> str:
    judged = outcome.judged["minimum_load"]
    if math.isnan(judged.use[0]):
        return join(_uncounted(outcome), _duty(case, row))
    advice = ""
    if judged.use[0] > 1:
        preload = curing_preload(outcome.points, row)
        advice = "the elements may slide: a smaller bearing, or more load; no axial preload helps this family"
        if math.isfinite(preload):
            advice = f"the elements may slide: an axial preload of {preload:.0f} N, or a smaller bearing, would cure it"
    return join(f"P is {judged.allowed[0]:.0f} N, at least {judged.demand[0]:.0f} N", advice, _duty(case, row))


def _static(case: Case, outcome: Outcome, row: int) -> str:
    judged = outcome.judged["static_load"]
    if math.isnan(judged.use[0]):
        return join(_uncounted(outcome), _duty(case, row))
    if math.isinf(judged.allowed[0]):
        return join("no load at all", _duty(case, row))
    return join(f"S0 is {judged.allowed[0]:.2f}, at least {judged.demand[0]:.2f}", _duty(case, row))


def _life(case: Case, outcome: Outcome, row: int) -> str:
    life = float(outcome.modified_life[0])
    reached = float(outcome.points.reliability[0]) * 100
    if math.isnan(life):
        is_doubted = bool(outcome.points.is_doubted[0])
        return "" if is_doubted else "outside the range of ISO 281: " + _outside_life(outcome)
    if life > LONG_LIFE:
        return (
            f"over {_spaced(LONG_LIFE)} h: fatigue will not end this bearing; what may is {_what_ends(case, outcome)}"
        )
    rows = outcome.points.case == 0
    has_cap = bool((outcome.life_factor[rows] >= fatigue.GREATEST_FACTOR).any())
    capped = f"a_ISO held at {fatigue.GREATEST_FACTOR:g}, the cap of the standard" if has_cap else ""
    wet = float(outcome.points.water[0])
    water = f"water of {wet * 1e6:.0f} ppm takes it to {cleanliness.water_factor.plain(wet):.2f} times" if (
        wet > cleanliness.WATER_REFERENCE
    ) else ""  # fmt: skip
    hot = "rating lowered for rings over 150 degC" if (outcome.state.temperature[rows] > _HOT).any() else ""
    return join(
        f"L{100 - reached:.3g} at the film, dirt and load it has: {reached:.4g} of 100 such bearings run longer",
        f"the end is the first pit of about {fatigue.PIT_AREA:g} mm^2: replace then, seizure or break-up can follow",
        _eater(case, outcome), capped, water, hot,
    )  # fmt: skip


def _spaced(value: float) -> str:
    return f"{value:,.0f}".replace(",", " ")


def _what_ends(case: Case, outcome: Outcome) -> str:
    """Name what is likely to end a bearing that fatigue does not: the one of interval, seals and dirt that governs."""
    points = outcome.points
    dirt = float(np.nanmin(outcome.contamination[points.case == 0], initial=np.inf))
    if dirt < _DIRTY:
        return f"dirt that wears the raceways (e_C is {dirt:.2g})"
    lubricant = "grease" if case.is_grease else "oil"
    allowed = float(outcome.allowed_interval[0])
    if points.is_sealed[0]:
        level = percentile(float(points.grease_failed[0]))
        hours = f", good for {_spaced(allowed)} h ({level})" if math.isfinite(allowed) else ""
        return f"the {lubricant} sealed in it{hours}, or its seals"
    if math.isfinite(allowed):
        return f"the {lubricant}, if it is not renewed within {_spaced(allowed)} h; then its seals"
    return f"the {lubricant} or its seals"


def _eater(case: Case, outcome: Outcome) -> str:
    """Say which duty point eats the life, where there are several."""
    count = len(case.duty)
    if count < 2:
        return ""
    points = outcome.points
    damage = points.share[:count] / outcome.row_life[:count]
    row = int(damage.argmax())
    return (
        f"duty point {row + 1} eats {damage[row] / damage.sum() * 100:.0f} % of it in "
        f"{points.share[row] / points.share[:count].sum() * 100:.0f} % of the time"
    )


def _outside_life(outcome: Outcome) -> str:
    reasons = []
    if np.nanmin(outcome.kappa, initial=np.inf) < fatigue.LEAST_VISCOSITY_RATIO:
        reasons.append("kappa is under 0.1")
    if np.nanmax(outcome.load_ratio) > fatigue.GREATEST_LOAD_RATIO:
        reasons.append("P is over 0.5 C")
    if (outcome.points.setting == BEYOND_SETTINGS).any():
        reasons.append("the oil is dirtier than it has a setting for")
    if uncounted := _uncounted(outcome):
        reasons.append(uncounted)
    if (outcome.state.temperature > outcome.points.stabilised_to).any():
        reasons.append(f"the rings are stabilised to {outcome.points.stabilised_to[0]:g} degC only")
    if cleanliness.water_factor.outside(content=outcome.points.water).any():
        reasons.append(f"water in the oil is over {cleanliness.WATER_RANGE[1] * 1e6:.0f} ppm: dry or change it")
    return ", ".join(reasons) or "no equilibrium temperature"


def _duty(case: Case, row: int) -> str:
    """Name the duty point and the month that govern, where there are several."""
    season = row // len(case.duty) % len(seasons(case))
    month = f"in month {season + 1}" if case.surroundings.months else ""
    return " ".join(filter(None, (f"at duty point {row % len(case.duty) + 1}" if len(case.duty) > 1 else "", month)))


def _regrease(case: Case, outcome: Outcome, row: int) -> str:
    points = outcome.points
    room = float(limits.room_for_grease(points)[row])
    dose = float(points.regrease_mass[row])
    if math.isinf(room):
        return ""
    if room < dose:
        return f"room for {room:.1f} g only: open a way out, or clean out, before it is greased again"
    return (
        f"without an open relief the housing is full after {math.floor(room / dose)} regreasings: clean it out by then"
    )


_NOTES = {
    "film": _film,
    "temperature": _temperature,
    "cold_start": _cold,
    "rings": _rings,
    "set_point": _set_point,
    "flash_point": _flash,
    "clearance": _clearance,
    "fill": _fill,
    "interval": _interval,
    "regrease_amount": _regrease,
    "speed": _speed,
    "acceleration": _acceleration,
    "minimum_load": _minimum_load,
    "static_load": _static,
    "fatigue_life": _life,
}


def notes(case: Case, outcome: Outcome) -> tuple[str, ...]:
    """Return what the reader should know beside the limits."""
    said = []
    if case.bearing.unread:
        said.append(f"not understood in the designation: {', '.join(case.bearing.unread)}")
    if case.bearing.estimated:
        named = ", ".join(key.replace("_", " ") for key in case.bearing.estimated)
        said.append(f"estimated, not the maker's figures: {named}; give them under [bearing] where you have them")
    if len(case.duty) > 1:
        said.append(f"operating point: the hottest of {len(case.duty)} duty points")
    said += _loads(case)
    if case.is_grease and case.grease.stroke is None and case.bearing.sealed_sides != 2:
        said.append(WEIGH)
    said += after.advice(case, outcome)
    if case.is_grease and case.grease.rule in RULE_DAYS:
        said.append(f"the {case.grease.rule} rule gives so little that it holds for that rhythm only")
    if case.surroundings.orientation == "vertical" and case.is_grease:
        said.append("the upright shaft halves the interval, not the bearing's fill: a baffle below keeps the grease in "
                    "place; of the space beside it fill half above and up to three quarters below")  # fmt: skip
    if not case.is_grease and case.oil.volume is not None and case.oil.flow and case.oil.supply == "circulating":
        dwell = float(oil_life.dwell_time.plain(case.oil.volume, case.oil.flow))
        if dwell < oil_life.LEAST_DWELL:
            said.append(f"the oil rests {dwell * 60:.1f} min in the circuit: under 5 min air and water stay in it")
    points = outcome.points
    hottest = int(outcome.hottest[0])
    churned = float(outcome.state.churning_power[hottest])
    if points.is_bath[0] and points.level[0] > 0:
        factor = float(churning.bath_factor.plain(level=points.level[0], outside=points.outside[0]))
        said.append(
            f"oil stands above the middle of the lowest element: it churns {factor:.2f} times the usual friction"
        )
    if not outcome.state.is_only[: len(case.duty)].all():
        said.append("more than one temperature would balance the heat, since the film is thin: the hottest is shown")
    if case.housing.shaft_fit is None and case.bearing.family in clearance.KINDS:
        said.append(
            join("internal clearance was not judged: state [housing] shaft_fit", _usual_clearance(case, outcome))
        )
    if churned > 0:
        power = float(outcome.state.friction_power[hottest])
        said.append(f"churning makes {churned:.1f} of {power:.1f} W: the surplus cannot leave and will not run in")
    said += oil_words.notes(case)
    return tuple(said)


def _usual_clearance(case: Case, outcome: Outcome) -> str:
    """Say what a usual fit would leave of the clearance at the operating point; empty where there is no table."""
    bearing, row = case.bearing, int(outcome.hottest[0])
    whole = clearance.initial(bearing.family, bearing.bore, bearing.clearance)
    excess = float(outcome.state.excess[row])
    if whole is None or math.isnan(excess):
        return ""
    fit = clearance.usual_shaft_fit(bearing.bore, is_ball=FAMILIES[bearing.family].life_exponent == 3)
    interference = clearance.shaft_interference.plain(bearing.bore, clearance.SHAFT_FITS.index(fit))
    lost = float(clearance.fit_loss.plain(shaft=interference, housing=-1.0))  # loose in its housing, as is usual
    lost += float(clearance.thermal_loss.plain(excess, bore=bearing.bore, outside=bearing.outside))
    left, mean = (sum(whole) / 2 - lost) * 1000, sum(whole) / 2 * 1000
    told = f"with a usual {fit} shaft about {left:.0f} um of {mean:.0f} would be left ({bearing.clearance})"
    return told + (": nothing, so mind the fit, or take a class with more" if left < 0 else "")


def _loads(case: Case) -> list[str]:
    """Say how the loads came about where the case does not state them."""
    said = []
    for i, duty in enumerate(case.duty):
        on_bearing = loads_of(case, duty)
        place = f" at duty point {i + 1}" if len(case.duty) > 1 else ""
        if on_bearing.down is not None and on_bearing.across is not None and on_bearing.other_radial is not None:
            said.append(
                f"radial load by statics{place}: {on_bearing.radial:.0f} N ({on_bearing.down:.0f} N down, "
                f"{abs(on_bearing.across):.0f} N across); the other bearing carries {on_bearing.other_radial:.0f} N"
            )
        if case.opposed is not None and abs(on_bearing.axial - duty.axial_load) > 0.5:
            said.append(
                f"axial load with the thrust of opposed bearings{place}: {on_bearing.axial:.0f} N, from "
                f"{duty.axial_load:.0f} N of the shaft, {on_bearing.own_thrust:.0f} N set free here and "
                f"{on_bearing.other_thrust:.0f} N in the opposed bearing"
            )
        elif case.opposed is None and on_bearing.own_thrust > abs(duty.axial_load):
            said.append(
                f"axial load{place} taken as {on_bearing.own_thrust:.0f} N, the thrust that the radial load sets free "
                "in this bearing; state [shaft] opposed to count that of the other"
            )
    return said


def cautions(case: Case) -> tuple[str, ...]:
    """Return the cautions that are always shown."""
    return SAFETY + GREASE_SAFETY if case.is_grease else SAFETY


def assumed(case: Case, moving: Sequence[Fact]) -> tuple[Assumed, ...]:
    """Return everything that was not said, with the reading or the default that stood in for it."""
    said = []
    judged_too = {fact.name for fact in moving}
    comes_filled = _comes_filled(case)
    for fact in FACTS:
        is_beside = comes_filled and fact.name in _BESIDE_THE_BEARING
        if fact.is_missing(case) and not is_beside and fact.usual != "estimate":  # estimates are listed below
            worst = " (judged at its worst as well)" if fact.name in judged_too else ""
            found = calibration_words.found_fill(case) if fact.name == "[grease] fill" else ""
            said.append(Assumed(fact.name, found or fact.text + worst, fact.basis))
    own = case.limits
    defaults = (
        ("[limits] life", own.life, f"{DEFAULT_LIFE:.0f} h, continuous service", "common-practice"),
        ("[limits] reliability", own.reliability, f"{DEFAULT_RELIABILITY * 100:.0f} %", "iso-281"),
        ("[limits] least_viscosity_ratio", own.least_viscosity_ratio, f"{DEFAULT_KAPPA:g}", "common-practice"),
    )
    said += [Assumed(name, text, source) for name, value, text, source in defaults if value is None]
    is_proposed = case.grease.housing_fill is None and case.grease.fill != "unknown"
    if case.is_grease and is_proposed and not comes_filled:
        said.append(
            Assumed("[grease] housing_fill", f"{proposed_housing_fill(case) * 100:.0f} % proposed", "fill-handbooks")
        )
    for key, (low, high) in case.bearing.estimated.items():
        value = getattr(case.bearing, key)
        source = case.bearing.basis.get(key, "own-estimate")
        unit = _BEARING_UNITS.get(key, "")
        said.append(Assumed(f"[bearing] {key}", f"{value:.4g} {unit}, {low:.2f} to {high:.2f} times that", source))
    if not case.is_grease and case.water is None and not any(item.name == "[cleanliness] water" for item in said):
        ppm = cleanliness.WATER_REFERENCE * 1e6
        said.append(Assumed("[cleanliness] water", f"dry: no more than {ppm:.0f} ppm in the oil", "cantley"))
    said += [Assumed("[lubricant]", text, "common-practice") for text in case.lubricant.assumed]
    said += oil_words.assumed(case)
    said += calibration_words.assumed(case)
    around = case.surroundings
    if case.is_grease and around.turning_ring is None:
        said.append(Assumed("[surroundings] turning_ring", "the inner ring turns", "common-practice"))
    if case.is_grease and around.air_flow is None:
        said.append(Assumed("[surroundings] air_flow", "no air is drawn through the bearing", "common-practice"))
    if case.is_grease and case.limits.grease_reliability is None:
        share = "90 %, closed bearings" if case.bearing.sealed_sides == 2 else "99 %, bearings that are regreased"
        said.append(Assumed("[limits] grease_reliability", share, "grease-handbooks"))
    if case.is_grease and case.bearing.sealed_sides != 2 and case.grease.cartridge is None:
        said.append(Assumed("[grease] cartridge", f"{CARTRIDGE_G:g} g", "common-practice"))
    if case.is_grease and case.bearing.sealed_sides != 2 and case.grease.rule is None:
        said.append(Assumed("[grease] rule", "side: the grease goes in beside the bearing", "neale:A20.5"))
    if not case.is_grease and case.oil.volume is None and case.oil.supply != "mist":
        said.append(Assumed("[oil] volume", "not known: no change quantity, and an ordinary charge", "common-practice"))
    if case.bearing.cage is None:
        said.append(Assumed("[bearing] cage", "metal", "common-practice"))
    return tuple(said)


def _comes_filled(case: Case) -> bool:
    """Tell whether a bearing is as its maker filled and closed it: what is beside it is no question then."""
    return case.is_grease and case.bearing.sealed_sides == 2 and case.grease.fill is None and case.grease.given is None


def bearing(bearing: Bearing) -> str:
    """Return a bearing in words."""
    name = f"{bearing.designation} " if bearing.designation else ""
    return f"{name}{bearing.family}, {bearing.bore:g} x {bearing.outside:g} x {bearing.width:g} mm"


def lubricant(lubricant: Lubricant, analysis: OilAnalysis | None = None) -> str:
    """Return a lubricant in words, with the fresh oil's figures where an analysis has replaced them."""
    kind = f"{lubricant.kind}, " if lubricant.kind not in lubricant.name else ""
    figures = f"{lubricant.nu_40:.4g} mm^2/s at 40 degC, {lubricant.nu_100:.3g} at 100 degC"
    if analysis is not None and analysis.change is not None:
        fresh = analysis.fresh
        figures += f", in use by analysis; fresh {fresh.nu_40:.4g} and {fresh.nu_100:.3g}"
    return f"{lubricant.name} ({kind}{figures})"
