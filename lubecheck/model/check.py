"""check: one case, judged as it was described, at the worst that was left unsaid, and over its uncertain inputs.

All of these readings are rows of one kernel call. The first position is the case at the usual reading of what it
leaves out; then come the worst reading of everything left out, of each such fact alone, and the draws of the uncertain
inputs.
"""

from __future__ import annotations

import dataclasses
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Any

import numpy as np

from lubecheck.data import air
from lubecheck.model import calibration_words, draws, interval_lines, limits, side_figures, wording
from lubecheck.model.amounts import amounts
from lubecheck.model.assumptions import Fact, missing, uncertain
from lubecheck.model.calibration import FILL, NOTHING, Calibrated, Calibration
from lubecheck.model.entries import Case
from lubecheck.model.equilibrium import Air
from lubecheck.model.kernel import Outcome, judge
from lubecheck.model.limits import NEAR_CODE, STATES, UNKNOWN
from lubecheck.model.losses import account
from lubecheck.model.plan import plan_line
from lubecheck.model.points import Points, from_rows, join
from lubecheck.model.result import Damage, Grease, Heat, HeatShares, Life, Limit, Operating, PlanLine, Result
from lubecheck.model.rows import rows_of
from lubecheck.physics import friction
from lubecheck.units import Array

# Unit of the demand and the allowance of each limit, and where the limit comes from unless it says otherwise.
LIMITS: Mapping[str, tuple[str, str]] = {
    "film": ("1", "iso-281:9.3.3.1"),
    "temperature": ("degC", "common-practice"),
    "rings": ("degC", "din-623"),
    "set_point": ("degC", "user"),
    "flash_point": ("degC", "common-practice"),
    "clearance": ("mm", "iso-5753"),
    "cold_start": ("degC", "user"),
    "fill": ("1", "fill-handbooks"),
    "oil_level": ("mm", "neale"),
    "interval": ("h", "grease-handbooks"),
    "regrease_amount": ("g", "neale:A20.5"),
    "speed": ("rpm", "bearing-handbooks"),
    "acceleration": ("rad/s^2", "own-estimate"),
    "minimum_load": ("N", "common-practice"),
    "static_load": ("1", "iso-76"),
    "fatigue_life": ("h", "iso-281:9.3"),
}

Triple = tuple[float, float, float]


@dataclass(frozen=True, slots=True)
class Variants:
    """The readings of one case as positions of one outcome: 0 usual, 1 worst, then each fact alone, then the draws."""

    case: Case
    facts: tuple[Fact, ...]
    outcome: Outcome
    rows: int  # rows of one position

    @property
    def single(self) -> Mapping[str, int]:
        """The position at which one fact alone is at its worst."""
        return {fact.name: 2 + i for i, fact in enumerate(self.facts)}

    @property
    def drawn(self) -> slice:
        """The positions at which the uncertain inputs are drawn."""
        return slice(2 + len(self.facts), None)

    def uses(self, name: str) -> Array:
        """The use of a limit in every position, the interval judged as the usual reading plans it."""
        judged = self.outcome.judged[name]
        if name != "interval":
            return judged.use
        with np.errstate(all="ignore"):
            use: Array = judged.demand[0] / judged.allowed
        return use

    def band(self, of_positions: Array) -> Triple:
        """A figure's value, and the ends between which nearly all draws of the uncertain inputs lie."""
        value = float(of_positions[0])
        return value, *draws.band(value, of_positions[self.drawn])

    def row_band(self, of_rows: Array, row: int) -> Triple:
        """The same for a figure of one row."""
        return self.band(of_rows[row :: self.rows])


def check(case: Case, *, air_properties: Air = air.properties) -> Result:
    """Judge one bearing position.

    Every limit comes with its use, the demand over what is allowed; the verdict is the worst state, and what could not
    be judged is never called good.
    """
    variants = variants_of(case, air_properties)
    outcome = variants.outcome
    judged = tuple(_limit(variants, name) for name, limit in outcome.judged.items() if limit.applies[0])
    verdict = max((limit.state for limit in judged), key=STATES.index)
    operating = [_operating(variants, row) for row in range(variants.rows)]
    hottest = int(outcome.hottest[0])
    plan = plan_line(case, outcome)
    lines = interval_lines.lines(case, outcome)
    heat, shares = _heat(outcome, hottest)
    return Result(
        title=case.title,
        verdict=verdict,
        governing=governing(judged, verdict),
        limits=judged,
        operating=operating[hottest],
        duty=_hottest_seasons(operating, len(case.duty)),
        heat=heat,
        heat_shares=shares,
        grease=_grease(outcome, plan) if case.is_grease else None,
        life=_life(variants),
        loads=side_figures.loads_at(case, outcome),
        speeds=side_figures.speeds_at(case, outcome, variants.rows),
        damage=_damage(variants),
        losses=account(outcome.points.take(slice(0, variants.rows)), air_properties),
        plan=plan,
        remedies=(),
        notes=wording.notes(case, outcome),
        cautions=wording.cautions(case),
        given=case.given,
        assumed=wording.assumed(case, variants.facts),
        bearing=wording.bearing(case.bearing),
        lubricant=wording.lubricant(case.lubricant, case.analysis),
        converged_in=outcome.state.steps,
        residual=_finite(outcome.state.residual[hottest]),
        amounts=amounts(case, outcome, plan),
        interval_lines=lines,
        interval_spread=interval_lines.spread(lines),
        calibration=_calibrated(variants, hottest, air_properties),
    )


def readings(case: Case) -> tuple[tuple[Fact, ...], list[dict[str, Any]]]:
    """Return the facts a case leaves out, and its readings: usual, worst, and each fact alone at its worst."""
    facts = tuple(fact for fact in missing(case))
    usual = {fact.name: fact.usual for fact in facts}
    moving = tuple(fact for fact in facts if fact.usual != fact.worst)
    worst = {fact.name: fact.worst for fact in facts}
    return moving, [usual, worst, *({**usual, fact.name: fact.worst} for fact in moving)]


def variants_of(case: Case, air_properties: Air = air.properties, *, at_ends: bool = False) -> Variants:
    """Judge all readings of a case in one kernel call.

    With `at_ends` each uncertain input stands alone at its low and its high end instead of the draws: few rows, for
    what costs too much to follow in a thousand.
    """
    moving, said = readings(case)
    usual = from_rows(rows_of(case, said[0]))
    parts: list[Points] = [usual, *(from_rows(rows_of(case, reading)) for reading in said[1:])]
    inputs = tuple(uncertain(case))
    found = _fitted(case)
    if at_ends:
        for name, *factors in inputs:
            parts += [_at_end(case, usual, name, end, factor) for end, factor in enumerate(factors)]
        if found is not None and found.column == FILL:
            parts += [usual.changed(fill=end) for end in found.ends[FILL]]
    else:
        many = draws.drawn(usual, inputs)
        fitted = {} if found is None else {found.column: np.repeat(np.array(found.draws), len(usual))}
        parts.append(many.changed(**fitted))
    return Variants(case, moving, judge(join(parts), air_properties), len(usual))


def _fitted(case: Case) -> Calibration | None:
    """Return the calibration that a case stands on; none for a fill that was not told, or was made anew since."""
    found = case.calibration
    if (
        found is None
        or not found.is_explained
        or found.tells == NOTHING
        or (found.column == FILL and case.grease.fill != "unknown")
    ):
        return None
    return found


def _at_end(case: Case, usual: Points, name: str, end: int, factor: float) -> Points:
    """Return the usual reading with one uncertain input at an end, and what was fitted as it was fitted under that."""
    changed: dict[str, Array | float] = {name: getattr(usual, name) * factor}
    found = _fitted(case)
    if found is not None:
        changed[found.column] = found.ends.get(name, (found.value, found.value))[end]
    return usual.changed(**changed)


def _calibrated(variants: Variants, row: int, air_properties: Air) -> Calibrated | None:
    """Return what measured temperatures did to the operating point."""
    case = variants.case
    if case.calibration is None:
        return None
    plain = variants_of(dataclasses.replace(case, measured=(), calibration=None), air_properties)
    before, after = (one.row_band(one.outcome.state.temperature, row) for one in (plain, variants))
    return calibration_words.told(case, before, after, calibration_words.stop(case, variants.outcome))


def _limit(variants: Variants, name: str) -> Limit:
    judged = variants.outcome.judged[name]
    uses = variants.uses(name)
    states = limits.state_of(uses)
    unit, basis = LIMITS[name]
    state, doubt = int(states[0]), ""
    if states[1] > state:
        hinges = [fact for fact in variants.facts if states[variants.single[fact.name]] > state]
        hinges = hinges or [fact for fact in variants.facts if name in fact.limits]
        state = NEAR_CODE if states[1] == NEAR_CODE else max(state, UNKNOWN)
        doubt = wording.doubt(hinges, float(uses[1]), is_open=state != NEAR_CODE)
    doubt = calibration_words.doubt(variants.case, name) if np.isnan(uses[0]) and not doubt else doubt
    _, low, high = variants.band(uses)
    # No interval at all is allowed where a closed bearing is planned to be regreased: what its grease lasts is a note.
    is_never = name == "interval" and judged.allowed[0] == 0
    return Limit(
        name=name,
        state=STATES[state],
        use=_finite(uses[0]),
        demand=_finite(judged.demand[0]),
        allowed=None if is_never else _finite(judged.allowed[0]),
        unit=unit,
        basis=wording.basis(name, variants.case, variants.outcome) or basis,
        note=wording.join(
            doubt,
            wording.limit_note(name, variants.case, variants.outcome),
            wording.band(low, high, _lost(variants, uses)),
        ),
        use_low=_finite(low),
        use_high=_finite(high),
    )


def _lost(variants: Variants, uses: Array) -> float:
    """Return the share of the draws at which a limit has no use though it has one at the usual reading."""
    return float((~np.isfinite(uses[variants.drawn])).mean()) if np.isfinite(uses[0]) else 0.0


def governing(judged: Sequence[Limit], verdict: str) -> str:
    """Return the limit with the greatest use of those in the state of the verdict; of the unknown the first."""
    inside = [limit for limit in judged if limit.state == verdict]
    if verdict == STATES[UNKNOWN]:
        return inside[0].name
    # A use that is not finite is the greatest there is.
    return max(inside, key=lambda limit: float("inf") if limit.use is None else limit.use).name


def _operating(variants: Variants, row: int) -> Operating:
    outcome = variants.outcome
    state = outcome.state
    watts = friction.power.plain(1.0, outcome.points.speed)
    arrays = {
        "temperature": state.temperature,
        "inner_ring_temperature": state.inner,
        "outer_ring_temperature": state.outer,
        "inner_ring_excess": state.excess,
        "viscosity": state.viscosity,
        "reference_viscosity": outcome.reference_viscosity,
        "viscosity_ratio": outcome.kappa,
        "friction_torque": state.friction_torque,
        "friction_power": state.friction_power,
        "churning_power": state.churning_power,
        "heat_removed": state.heat_removed,
        "viscous_torque": state.viscous_torque,
        "load_torque": state.load_torque + np.where(state.is_found, 0.0, np.nan),
        "mixed_film_torque": state.mixed_torque,
        "seal_torque": state.seal_torque + np.where(state.is_found, 0.0, np.nan),
        "churning_torque": state.churning_torque,
        "viscous_power": state.viscous_torque * watts,
        "load_power": state.load_torque * watts + np.where(state.is_found, 0.0, np.nan),
        "mixed_film_power": state.mixed_torque * watts,
        "seal_power": state.seal_torque * watts + np.where(state.is_found, 0.0, np.nan),
    }
    made: Operating = Operating.of({name: variants.row_band(array, row) for name, array in arrays.items()})
    return made


def _hottest_seasons(operating: Sequence[Operating], duties: int) -> tuple[Operating, ...]:
    """Return each duty point in the season in which it runs hottest; rows are season by season."""

    def heat(point: Operating) -> float:
        value = point.figures["temperature"].value
        return float("inf") if value is None else value

    return tuple(max(operating[duty::duties], key=heat) for duty in range(duties))


def _heat(outcome: Outcome, row: int) -> tuple[Heat, HeatShares]:
    """What leaves by each path of a row, in watts and as a share of all that leaves."""
    paths = {name: float(path[row]) for name, path in outcome.state.paths.items()}
    sources = {
        "friction": float(outcome.state.friction_power[row]),
        "machine": float(outcome.points.machine_heat[row]),
        "sun": float(outcome.points.solar_heat[row]),
    }
    whole = sum(max(0.0, watts) for watts in paths.values())
    shares = {name: max(0.0, watts) / whole if whole > 0 else None for name, watts in paths.items()}
    return Heat.of(sources | paths), HeatShares.of(shares)


def _grease(outcome: Outcome, plan: PlanLine) -> Grease:
    points = outcome.points
    volume, density = float(points.free_volume[0]), float(points.density[0]) / 1000
    made: Grease = Grease.of(
        {
            "free_volume": volume,
            "first_fill": plan.first_fill_g,
            "fill_share": None if plan.first_fill_g is None else plan.first_fill_g / density / volume,
            "regrease_quantity": plan.regrease_g,
            "regrease_interval": plan.interval_h,
        }
    )
    return made


def _life(variants: Variants) -> Life:
    outcome = variants.outcome
    rows = slice(0, variants.rows)
    a1 = outcome.reliability_factor
    with np.errstate(all="ignore"):
        factor = outcome.modified_life / (a1 * outcome.rating_life)
    made: Life = Life.of(
        {
            "load_ratio": float(outcome.load_ratio[rows].max()),
            "rating_life": float(outcome.rating_life[0]),
            "contamination_factor": float(outcome.contamination[rows].min()),
            "life_modification_factor": variants.band(factor),
            "modified_life": variants.band(outcome.modified_life),
        }
    )
    return made


def _damage(variants: Variants) -> tuple[Damage, ...]:
    outcome, points = variants.outcome, variants.outcome.points
    rows = slice(0, variants.rows)
    time = points.share[rows] / points.share[rows].sum()
    with np.errstate(all="ignore"):
        damage = time / outcome.row_life[rows] * outcome.modified_life[0]
    return tuple(
        Damage(
            share_of_time=float(time[row]),
            share_of_damage=_finite(damage[row]),
            life_h=_finite(outcome.row_life[row]),
            temperature=_finite(outcome.state.temperature[row]),
            viscosity_ratio=_finite(outcome.kappa[row]),
            contamination_factor=_finite(outcome.contamination[row]),
            life_modification_factor=_finite(outcome.life_factor[row]),
            load_ratio=float(outcome.load_ratio[row]),
        )
        for row in range(variants.rows)
    )


def _finite(value: float) -> float | None:
    return float(value) if np.isfinite(value) else None
