"""The band of a figure: it holds what a brute-force sample of all uncertain inputs together gives."""

from __future__ import annotations

import numpy as np
import pytest
from conftest import BASE, EXAMPLES, edited

from lubecheck.model import draws
from lubecheck.model.assumptions import uncertain
from lubecheck.model.check import readings, variants_of
from lubecheck.model.kernel import judge
from lubecheck.model.points import Points, from_rows
from lubecheck.model.reader import read_case
from lubecheck.model.rows import rows_of

SAMPLES = 4000
SHARE = 0.95  # what a band promises; the ends of the inputs are declared as such ranges
END = 1.959964  # standard deviations of the normal distribution that hold 95 %

_BATH = (EXAMPLES / "oil_bath_pump.toml").read_text(encoding="utf-8")
_SLOW = (EXAMPLES / "slow_roller.toml").read_text(encoding="utf-8")
_PACKED = (EXAMPLES / "overfilled_motor.toml").read_text(encoding="utf-8")
_ESTIMATED = [(f"bearing.{key}", None) for key in ("dynamic_rating", "static_rating", "mass")]
_STREAM = [("oil.supply", "circulating"), ("oil.level", None), ("oil.flow", "2 l/min"), ("oil.inlet", "40 degC")]

CASES = {
    "a greased motor": BASE,
    "a motor in still air": edited(BASE, [("surroundings.draught", "0 m/s"), ("housing.shaft_temperature", "95 degC")]),
    "packed full": _PACKED,
    "packed full, bearing ratings estimated": edited(_PACKED, _ESTIMATED),
    "contact seals": edited(BASE, [("bearing.designation", "6309-2RS"), ("grease.interval", None)]),
    "a fast small ball bearing": edited(
        BASE,
        [("bearing.designation", "6205"), *_ESTIMATED, ("duty[1].speed", "9000 rpm"), ("duty[1].radial_load", "300 N"),
         ("duty[1].axial_load", "50 N"), ("grease.fill", "35 %"), ("housing.void", "8 cm^3")],
    ),
    "a measured conductance": edited(
        BASE, [("housing.kind", None), ("housing.conductance", "1.4 W/K"), ("housing.shaft_temperature", None),
               ("housing.machine_heat", "10 W"), ("surroundings.draught", None), ("surroundings.altitude", None)]
    ),
    "an oil bath, two duty points": _BATH,
    "circulating oil": edited(_BATH, _STREAM),
    "a cooling jacket": edited(
        _BATH, [("housing.coolant", "water"), ("housing.coolant_flow", "3 l/min"), ("housing.coolant_inlet", "20 degC")]
    ),
    "a hot frame": edited(BASE, [("housing.frame_temperature", "80 degC"), ("surroundings.ambient", "20 degC")]),
    "a slow roller with a mixed film": _SLOW,
    "a loaded roller on the way to a full film": edited(
        _SLOW, [("duty[1].speed", "220 rpm"), ("duty[1].radial_load", "60 kN"), ("bearing.dynamic_rating", None),
                ("bearing.static_rating", None)]
    ),
    "statics and a taut belt": (EXAMPLES / "belt_fan.toml").read_text(encoding="utf-8"),
    "opposed tapered bearings": (EXAMPLES / "pinion_shaft.toml").read_text(encoding="utf-8"),
}  # fmt: skip


def sample_of(case, rng: np.random.Generator) -> Points:
    """Return the case at its usual reading, over and over, with every uncertain input drawn at once.

    Lognormal and independent, with the declared ends as the 2.5 and 97.5 % quantiles; where the ends do not lie
    evenly about the usual value, each side has its own spread and half of the draws.
    """
    once = from_rows(rows_of(case, readings(case)[1][0]))
    many = once.take(np.tile(np.arange(len(once)), SAMPLES))
    values = {}
    for name, low, high in uncertain(case):
        drawn = rng.standard_normal(SAMPLES) / END
        factor = np.exp(np.where(drawn > 0, drawn * np.log(high), drawn * -np.log(low)))
        values[name] = getattr(many, name) * np.repeat(factor, len(once))
    return many.changed(case=np.repeat(np.arange(SAMPLES), len(once)), **values)


def figures_of(outcome) -> dict[str, np.ndarray]:
    """Return the figures of rows that a result prints a band of."""
    state = outcome.state
    return {
        "temperature": state.temperature,
        "inner ring": state.inner,
        "outer ring": state.outer,
        "excess of the inner ring": state.excess,
        "viscosity": state.viscosity,
        "kappa": outcome.kappa,
        "friction power": state.friction_power,
        "viscous torque": state.viscous_torque,
        "mixed film torque": state.mixed_torque,
        "churning torque": state.churning_torque,
    }


def share_inside(band: tuple[float, float, float], sample: np.ndarray) -> float:
    """Return which share of a sample lies in a band; what is not a number does not."""
    _, low, high = band
    slack = 1e-9 * abs(high - low) + 1e-12 * abs(high)  # a figure that the inputs do not move
    return float(((sample >= low - slack) & (sample <= high + slack)).mean())


@pytest.mark.parametrize("name", CASES)
def test_the_band_holds_95_per_cent_of_a_brute_force_sample(name):
    case = read_case(CASES[name])
    variants = variants_of(case)
    sampled = judge(sample_of(case, np.random.default_rng(20261201)))
    banded, brute = figures_of(variants.outcome), figures_of(sampled)
    for figure, values in banded.items():
        for row in range(variants.rows):
            share = share_inside(variants.row_band(values, row), brute[figure][row :: variants.rows])
            assert share >= SHARE, (figure, row, share)
    life = variants.outcome.modified_life
    assert np.isfinite(life[0])
    assert share_inside(variants.band(life), sampled.modified_life) >= SHARE
    for limit in ("temperature", "film", "fatigue_life"):
        share = share_inside(variants.band(variants.outcome.judged[limit].use), sampled.judged[limit].use)
        assert share >= SHARE, (limit, share)


@pytest.mark.parametrize("name", CASES)
def test_the_band_is_no_wider_than_it_has_to_be(name):
    case = read_case(CASES[name])
    variants = variants_of(case)
    sampled = judge(sample_of(case, np.random.default_rng(20261202)))
    temperature = variants.row_band(variants.outcome.state.temperature, 0)
    assert share_inside(temperature, sampled.state.temperature[:: variants.rows]) <= 0.985


def test_the_cases_move_every_uncertain_input_there_is():
    moved = {name for text in CASES.values() for name, _, _ in uncertain(read_case(text))}
    assert moved >= {
        "cooling_factor", "f0_factor", "f1_factor", "mixed_factor", "ring_factor", "seal_factor", "churning_factor",
        "frame_conductance", "oil_conductance", "coolant_conductance", "shaft_conductance", "dynamic_rating",
    }  # fmt: skip


def test_a_draw_lies_between_the_declared_ends_nineteen_times_of_twenty_and_half_of_them_above_the_usual_value():
    case = read_case(BASE)
    usual = from_rows(rows_of(case, readings(case)[1][0]))
    many = draws.drawn(usual, [("f0_factor", 0.6, 1.8), ("f1_factor", 0.7, 1.5)])
    for name, low, high in (("f0_factor", 0.6, 1.8), ("f1_factor", 0.7, 1.5)):
        factor = getattr(many, name)
        assert (factor < low).mean() == pytest.approx(0.025, abs=1e-3)
        assert (factor > high).mean() == pytest.approx(0.025, abs=1e-3)
        assert (factor > 1.0).mean() == pytest.approx(0.5, abs=1e-3)
    assert abs(np.corrcoef(np.log(many.f0_factor), np.log(many.f1_factor))[0, 1]) < 0.03


def test_a_figure_that_too_many_draws_leave_without_a_value_has_no_band_and_a_few_widen_it():
    even = np.linspace(0.0, 1.0, 1000)
    low, high = draws.band(0.5, even)
    assert (low, high) == pytest.approx((0.015, 0.985), abs=2e-3)
    few, many = even.copy(), even.copy()
    few[490:500], many[400:500] = np.nan, np.nan
    wider = draws.band(0.5, few)
    assert wider[0] < low < high < wider[1]
    assert np.isnan(draws.band(0.5, many)).all()
    assert np.isnan(draws.band(np.nan, even)).all()
