"""Positions for the tests of kernel, heat and transient: random, wide, and admissible."""

from __future__ import annotations

import dataclasses

import numpy as np
from conftest import EXAMPLES

from lubecheck.model.check import readings
from lubecheck.model.points import Points, from_rows, join
from lubecheck.model.reader import load_case
from lubecheck.model.rows import rows_of


def points_of(name: str) -> Points:
    case = load_case(EXAMPLES / f"{name}.toml")
    return from_rows(rows_of(case, readings(case)[1][0]))


def random_points(rows: int = 10_000, seed: int = 20261201) -> Points:
    """Return positions of mixed bearings, lubricants and surroundings, wide but admissible."""
    rng = np.random.default_rng(seed)
    seeds = [points_of(name).take([0]) for name in ("new_motor", "overfilled_motor", "slow_roller", "oil_bath_pump")]
    base = join(seeds).take(rng.integers(0, len(seeds), rows))

    def spread(low: float, high: float) -> np.ndarray:
        return np.exp(rng.uniform(np.log(low), np.log(high), rows))

    size = spread(0.4, 2.5)
    grease = base.is_grease > 0
    return dataclasses.replace(
        base,
        case=np.arange(rows),
        share=np.ones(rows),
        bore=base.bore * size,
        outside=base.outside * size,
        width=base.width * size,
        pitch_diameter=base.pitch_diameter * size,
        dynamic_rating=base.dynamic_rating * size**2,
        static_rating=base.static_rating * size**2,
        fatigue_limit=base.fatigue_limit * size**2,
        free_volume=base.free_volume * size**3,
        speed=np.minimum(base.speed * spread(0.05, 3.0), 1.2 * base.speed_limit / size),
        speed_limit=base.speed_limit / size,
        radial_load=base.dynamic_rating * spread(0.002, 0.2),
        axial_load=base.dynamic_rating * spread(0.0005, 0.05) * rng.choice([-1, 0, 1], rows),
        ambient=rng.uniform(-30, 60, rows),
        coldest=rng.uniform(-50, 30, rows),
        draught=rng.choice([0.0, 0.5, 3.0, 10.0], rows),
        housing_area=base.housing_area * size**2 * spread(0.3, 3.0),
        conductance=np.where(rng.random(rows) < 0.2, spread(0.05, 20.0), np.nan),
        shaft_temperature=rng.uniform(-20, 160, rows),
        machine_heat=rng.choice([0.0, 5.0, 60.0], rows),
        solar_heat=rng.choice([0.0, 20.0], rows),
        frame_conductance=rng.choice([0.0, 0.5, 5.0], rows),
        frame_temperature=rng.uniform(-20, 100, rows),
        coolant_conductance=rng.choice([0.0, 0.0, 10.0], rows),
        coolant_inlet=rng.uniform(5, 40, rows),
        oil_conductance=np.where(grease, 0.0, rng.choice([0.0, 5.0, 50.0], rows)),
        oil_inlet=rng.uniform(20, 60, rows),
        passage=rng.choice([1.0, 0.5, 0.0], rows),
        fill=np.where(grease, rng.uniform(0.05, 1.2, rows), np.nan),
        void=base.void * size**3 * rng.choice([0.0, 1.0], rows),
        is_open=rng.choice([0.0, 1.0], rows),
        water=rng.choice([0.0, 50e-6, 250e-6, 600e-6], rows),
        stabilised_to=rng.choice([120.0, 150.0, 200.0], rows),
        interval=np.where(rng.random(rows) < 0.5, spread(100, 30000), np.nan),
    )


def random_rows(rows: int, seed: int = 5) -> Points:
    """Return rows with every heat path at work, far wider than any machine."""
    rng = np.random.default_rng(seed)
    seeds = [points_of(name).take([0]) for name in ("new_motor", "overfilled_motor", "slow_roller", "oil_bath_pump")]
    base = join(seeds).take(rng.integers(0, len(seeds), rows))

    def spread(low: float, high: float) -> np.ndarray:
        return np.exp(rng.uniform(np.log(low), np.log(high), rows))

    def some(values: np.ndarray) -> np.ndarray:
        return np.where(rng.random(rows) < 0.5, values, 0.0)

    return dataclasses.replace(
        base,
        case=np.arange(rows),
        speed=base.speed * spread(0.02, 5.0),
        radial_load=base.dynamic_rating * spread(0.001, 0.5),
        ambient=rng.uniform(-40, 80, rows),
        draught=some(spread(0.05, 30.0)),
        housing_area=base.housing_area * spread(0.1, 10.0),
        conductance=np.where(rng.random(rows) < 0.2, spread(0.02, 100.0), np.nan),
        shaft_temperature=rng.uniform(-40, 200, rows),
        shaft_conductance=some(spread(0.01, 10.0)),
        fin_conductance=some(spread(0.01, 10.0)),
        frame_temperature=rng.uniform(-40, 150, rows),
        frame_conductance=some(spread(0.01, 50.0)),
        coolant_inlet=rng.uniform(-20, 60, rows),
        coolant_conductance=some(spread(0.1, 200.0)),
        oil_inlet=rng.uniform(0, 100, rows),
        oil_conductance=some(spread(0.1, 500.0)),
        machine_heat=some(spread(0.1, 300.0)),
        solar_heat=some(spread(1.0, 100.0)),
        fill=np.where(base.is_grease > 0, rng.uniform(0.05, 1.2, rows), np.nan),
        passage=rng.choice([0.0, 0.5, 1.0], rows),
        ring_factor=spread(0.1, 10.0),
    )
