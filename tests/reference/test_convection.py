"""Convection, radiation and fins against `ht`, a printed atmosphere, textbook examples and closed forms."""

import math

import numpy as np
import pytest
from fluids import ATMOSPHERE_1976
from ht import Nu_cylinder_Churchill_Bernstein, Nu_horizontal_cylinder_Churchill_Chu
from scipy.integrate import solve_bvp

from lubecheck.data import air
from lubecheck.physics import cooling

SEA_LEVEL = 0.101325
SIZES = np.array([60.0, 100.0, 150.0, 200.0, 300.0, 400.0, 600.0])  # mm, heights of bearing housings


def air_at(film):
    found = air.properties(np.asarray(film, dtype=float), SEA_LEVEL)
    return {
        "kinematic_viscosity": found.kinematic_viscosity_mm2,
        "conductivity": found.conductivity,
        "prandtl": found.prandtl,
    }, found.expansion


def still_air(surface, ambient, diameter):
    common, expansion = air_at((surface + ambient) / 2)
    return cooling.natural_convection.plain(
        surface=surface, ambient=ambient, diameter=diameter, expansion=expansion, **common
    )


def housing(surface, ambient, diameter, velocity):
    common, _ = air_at((surface + ambient) / 2)
    blown = cooling.forced_convection.plain(velocity=velocity, diameter=diameter, **common)
    radiated = cooling.radiation.plain(surface=surface, surroundings=ambient, emissivity=0.9)
    return cooling.mixed_convection.plain(natural=still_air(surface, ambient, diameter), forced=blown) + radiated


@pytest.mark.parametrize("diameter", [5.0, 60.0, 250.0, 1500.0])
@pytest.mark.parametrize("difference", [0.01, 5.0, 40.0, 150.0])
@pytest.mark.parametrize("prandtl", [0.69, 0.72, 7.0, 300.0])
def test_natural_convection_is_churchill_chu_as_ht_has_it(diameter, difference, prandtl):
    nu, conductivity, expansion = 17e-6, 0.027, 0.0031
    grashof = 9.80665 * expansion * difference * (diameter / 1000) ** 3 / nu**2
    expected = Nu_horizontal_cylinder_Churchill_Chu(prandtl, grashof) * conductivity / (diameter / 1000)
    found = cooling.natural_convection.plain(
        surface=20.0 + difference,
        ambient=20.0,
        diameter=diameter,
        kinematic_viscosity=17.0,
        conductivity=conductivity,
        prandtl=prandtl,
        expansion=expansion,
    )
    assert found == pytest.approx(expected, rel=1e-9)


@pytest.mark.parametrize("diameter", [5.0, 60.0, 250.0, 1500.0])
@pytest.mark.parametrize("velocity", [0.05, 1.0, 3.0, 40.0])
@pytest.mark.parametrize("prandtl", [0.69, 0.72, 7.0, 300.0])
def test_forced_convection_is_churchill_bernstein_as_ht_has_it(diameter, velocity, prandtl):
    reynolds = velocity * diameter / 1000 / 17e-6
    expected = Nu_cylinder_Churchill_Bernstein(reynolds, prandtl) * 0.027 / (diameter / 1000)
    found = cooling.forced_convection.plain(
        velocity=velocity, diameter=diameter, kinematic_viscosity=17.0, conductivity=0.027, prandtl=prandtl
    )
    assert found == pytest.approx(expected, rel=1e-12)


def test_forced_convection_meets_the_textbook_cylinder():
    # Incropera & DeWitt, Introduction to Heat Transfer 6th ed., example 7.3: Re 6071, Pr 0.70 -> Nu 40.6 (seen in ht)
    # diameter 1000 mm and conductivity 1 make the coefficient the Nusselt number
    found = cooling.forced_convection.plain(
        velocity=6.071, diameter=1000.0, kinematic_viscosity=1000.0, conductivity=1.0, prandtl=0.70
    )
    assert found == pytest.approx(40.6, abs=0.05)


def test_natural_convection_meets_the_textbook_pipe():
    # the same, example 9.4: pipe of 0.1 m at 165 degC in air of 23 degC: nu 22.8e-6, k 0.0313, Pr 0.697,
    # beta 2.725e-3 at 367 K; convection and radiation with eps 0.85 together 763 W/m (memory)
    found = cooling.natural_convection.plain(
        surface=165.0,
        ambient=23.0,
        diameter=100.0,
        kinematic_viscosity=22.8,
        conductivity=0.0313,
        prandtl=0.697,
        expansion=2.725e-3,
    )
    radiated = cooling.radiation.plain(surface=165.0, surroundings=23.0, emissivity=0.85)
    assert (found + radiated) * math.pi * 0.1 * (165 - 23) == pytest.approx(763, rel=0.01)


def test_a_painted_housing_in_still_air_gives_off_10_to_12():
    # common practice for bearing housings: 10 to 12 W/(m^2*K) with radiation, at 20 to 40 K above the air
    for difference in (20.0, 40.0):
        found = housing(20.0 + difference, 20.0, SIZES[1:5], 0.0)
        assert np.all((found > 9.6) & (found < 12.0)), found
    assert housing(55.0, 20.0, 150.0, 0.0) == pytest.approx(11, abs=1)


def test_a_painted_housing_in_a_draught_of_3_metres_a_second_gives_off_18_to_27():
    found = housing(60.0, 20.0, SIZES[1:6], 3.0)  # the same practice; heights from 100 to 400 mm
    assert np.all((found >= 18) & (found <= 27)), found


def test_still_air_gives_the_same_to_a_cold_surface_as_from_a_warm_one():
    assert still_air(40.0, 20.0, 150.0) == pytest.approx(still_air(20.0, 40.0, 150.0), rel=1e-12)


def test_no_temperature_difference_leaves_the_conduction_that_churchill_and_chu_give():
    common, expansion = air_at(20.0)
    found = cooling.natural_convection.plain(surface=20.0, ambient=20.0, diameter=100.0, expansion=expansion, **common)
    floor = 0.60**2 * common["conductivity"] / 0.1  # Nu = 0.36 at Ra = 0
    assert floor <= found < 6 * floor  # at the least difference that stands for none, 1e-6 K
    assert cooling.forced_convection.plain(velocity=0.0, diameter=100.0, **common) == pytest.approx(
        0.3 * common["conductivity"] / 0.1, rel=1e-4
    )


def test_mixed_convection_tends_to_the_stronger_of_the_two():
    assert cooling.mixed_convection.plain(natural=5.0, forced=0.0) == pytest.approx(5.0, rel=1e-12)
    assert cooling.mixed_convection.plain(natural=0.0, forced=20.0) == pytest.approx(20.0, rel=1e-12)
    assert cooling.mixed_convection.plain(natural=3.0, forced=4.0) == pytest.approx(337**0.25, rel=1e-12)


@pytest.mark.parametrize(("surface", "walls"), [(60.0, 20.0), (20.0, -30.0), (150.0, 149.9)])
def test_radiation_gives_the_power_of_the_fourth_power_law(surface, walls):
    power = 0.8 * 5.670374419e-8 * ((surface + 273.15) ** 4 - (walls + 273.15) ** 4)
    found = cooling.radiation.plain(surface=surface, surroundings=walls, emissivity=0.8)
    assert found * (surface - walls) == pytest.approx(power, rel=1e-9)


def test_radiation_to_walls_of_the_same_temperature_is_the_derivative():
    found = cooling.radiation.plain(surface=20.0, surroundings=20.0, emissivity=1.0)
    assert found == pytest.approx(4 * 5.670374419e-8 * 293.15**3, rel=1e-12)


@pytest.mark.parametrize("length", [20.0, 100.0, 400.0])
def test_a_shaft_of_finite_length_conducts_as_its_differential_equation_says(length):
    diameter, coefficient, conductivity = 0.045, 14.0, 48.0
    m_squared = 4 * coefficient / (conductivity * diameter)
    reach = length / 1000 + diameter / 4
    mesh = np.linspace(0, reach, 50)
    solved = solve_bvp(
        lambda _, y: np.vstack((y[1], m_squared * y[0])),
        lambda root, tip: np.array([root[0] - 1, tip[1]]),
        mesh,
        np.vstack((np.ones_like(mesh), np.zeros_like(mesh))),
        tol=1e-8,
    )
    expected = -conductivity * math.pi / 4 * diameter**2 * solved.sol(0)[1]
    found = cooling.fin_conductance.plain(
        diameter=45.0, length=length, coefficient=coefficient, conductivity=conductivity
    )
    assert found == pytest.approx(expected, rel=1e-6)


def test_a_fin_meets_the_textbook_rod():
    # Incropera & DeWitt, example 3.9: rod of 5 mm, h 100, at 100 degC in air of 25 degC, long: copper (398 W/(m*K))
    # gives off 8.3 W, aluminium (180) 5.6 W, stainless steel (14) 1.6 W (memory)
    for conductivity, power in ((398.0, 8.3), (180.0, 5.6), (14.0, 1.6)):
        found = cooling.long_fin_conductance.plain(diameter=5.0, coefficient=100.0, conductivity=conductivity)
        assert found * 75 == pytest.approx(power, abs=0.06)


def test_a_short_stub_gives_off_heat_by_its_whole_surface_and_a_long_shaft_no_more_than_an_infinite_one():
    stub = cooling.fin_conductance.plain(diameter=50.0, length=1.0, coefficient=10.0, conductivity=48.0)
    assert stub == pytest.approx(10.0 * (math.pi * 0.05 * 0.001 + math.pi / 4 * 0.05**2), rel=2e-3)
    long = cooling.fin_conductance.plain(diameter=50.0, length=5000.0, coefficient=10.0, conductivity=48.0)
    assert long == pytest.approx(
        cooling.long_fin_conductance.plain(diameter=50.0, coefficient=10.0, conductivity=48.0), rel=1e-12
    )


def test_a_litre_of_oil_a_minute_takes_27_watts_a_kelvin():
    # mineral oil 870 kg/m^3, 1.9 kJ/(kg*K): 0.870 kg x 1900 J / 60 s, by hand 27.55
    assert cooling.stream_conductance.plain(1.0, 870.0, 1900.0) == pytest.approx(27.55, abs=0.01)


@pytest.mark.parametrize(
    ("altitude_m", "pressure_hpa"),
    # U.S. Standard Atmosphere 1976, table I, geometric altitude (memory)
    [(0, 1013.25), (1000, 898.76), (2000, 795.01), (5000, 540.48), (10000, 264.99)],
)
def test_pressure_at_altitude_is_the_printed_one(altitude_m, pressure_hpa):
    assert cooling.pressure_at.plain(altitude_m * 1000.0) * 1e4 == pytest.approx(pressure_hpa, abs=0.011)


@pytest.mark.parametrize("altitude_m", [-400, 0, 1500, 3600, 8848])
def test_pressure_at_altitude_agrees_with_an_independent_atmosphere(altitude_m):
    assert cooling.pressure_at.plain(altitude_m * 1000.0) * 1e6 == pytest.approx(
        ATMOSPHERE_1976(altitude_m).P, rel=2e-5
    )


def test_every_row_depends_on_itself_only_and_floats_serve_as_well_as_arrays():
    together = housing(np.array([30.0, 60.0, 90.0]), 20.0, np.array([80.0, 150.0, 300.0]), np.array([0.0, 1.0, 3.0]))
    alone = [housing(*row) for row in ((30.0, 20.0, 80.0, 0.0), (60.0, 20.0, 150.0, 1.0), (90.0, 20.0, 300.0, 3.0))]
    assert together == pytest.approx(alone, rel=1e-13)


@pytest.mark.parametrize("velocities", [np.linspace(0.0, 30.0, 301)])
def test_more_draught_and_more_warmth_never_cool_less(velocities):
    assert np.all(np.diff(housing(60.0, 20.0, 150.0, velocities)) > 0)
    assert np.all(np.diff(housing(np.linspace(20.0, 200.0, 181), 20.0, 150.0, 0.0)) > 0)
