"""The coupled solve: the temperature at which friction, churning and the machine's heat equal what leaves.

Everything that depends on temperature is evaluated together at each step: viscosity, viscous torque, churning, air
properties, convection, radiation. Heat in falls with temperature (thinner oil) and heat out rises, so the balance has
one root; it is found for all rows at once.

The balance is solved as ln(heat in / heat out) over ln(T - T_0), where T_0 is the coldest sink. In these coordinates it
is nearly a straight line, so that secant steps converge in a few, and a bracket guards every step. A row stops moving
when it has converged, so a row's answer does not depend on the rows beside it.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

import numpy as np

from lubecheck.data import air
from lubecheck.model.points import Flags, Points, seal_diameter
from lubecheck.physics import churning, cooling, friction, loads, viscosity
from lubecheck.units import Array

Air = Callable[[Array, Array], air.AirProperties]

TOP_TEMPERATURE = 250.0  # degC: no lubricant of the tables is used hotter; above it the answer is "no equilibrium"
TOLERANCE = 1e-9  # of the friction power, residual of the balance
MOST_STEPS = 80  # bisection alone needs about 50
LEAST_RISE = 1e-9  # K above the coldest sink: the lower end of the bracket
EMISSIVITY = 0.9  # painted, oily or rusted housing: handbooks, 0.85 to 0.95
GREASE_CONSISTENCY = 1 / 15  # Pa s^0.5 a Pa of yield stress: 20 at 300 Pa (NLGI 2, representative)


@dataclass(frozen=True, slots=True)
class Equilibrium:
    """The state of every row; NaN temperatures where `is_found` is false."""

    temperature: Array  # degC, of the lubricant and the bearing
    is_found: Flags  # an equilibrium below TOP_TEMPERATURE exists and the solve converged to it
    residual: Array  # W, heat in less heat out
    steps: int
    equivalent_load: Array  # N
    viscosity: Array  # mm^2/s
    viscous_torque: Array  # N mm
    load_torque: Array  # N mm
    seal_torque: Array  # N mm, of rubbing seals
    churning_torque: Array  # N mm
    friction_power: Array  # W, viscous and load torque and churning together
    churning_power: Array  # W, the part of it from churning
    heat_removed: Array  # W
    held_volume: Array  # cm^3 of grease that cannot clear


@dataclass(frozen=True, slots=True)
class _Heat:
    """One evaluation of the balance."""

    viscosity: Array
    viscous_torque: Array
    churning_torque: Array
    friction_power: Array
    heat_in: Array  # friction, machine and warm sinks, counted from the coldest sink
    heat_out: Array


class Balance:
    """The heat balance of all rows, with what does not depend on temperature worked out once."""

    def __init__(self, points: Points, air_properties: Air = air.properties) -> None:
        p = points
        self.points = p
        self.air = air_properties
        self.equivalent_load = loads.dynamic_equivalent_load.plain(
            radial_load=p.radial_load,
            axial_load=p.axial_load,
            static_rating=p.static_rating,
            f0_load=p.f0_load,
            contact_angle=p.contact_angle,
            rule=p.rule,
        )
        self.load_torque = p.f1_factor * friction.load_torque.plain(p.f1, self.equivalent_load, p.pitch_diameter)
        self.seal_torque = friction.seal_torque.plain(
            seal_diameter(p.bore, p.outside), p.rubbing_seals, friction.SEAL_LINE_FRICTION.nominal
        )
        # Oil bearings have no fill: nothing is held.
        fill = np.where(p.is_grease > 0, np.minimum(np.nan_to_num(p.fill), 1.0), 0.0)
        self.held_volume = churning.held_volume.plain(
            fill=fill, free_volume=p.free_volume, void=p.void, housing_fill=p.housing_fill, is_open=p.is_open
        )
        self.rate = churning.shear_rate.plain(p.speed, bore=p.bore, outside=p.outside)
        self.floor = np.minimum(np.minimum(p.ambient, p.shaft_temperature), p.oil_inlet)
        self.is_by_area = np.isnan(p.conductance)
        self.area = np.where(self.is_by_area, p.housing_area, 1.0) * 1e-6  # m^2
        self.diameter = np.sqrt(self.area / np.pi) * 1000  # mm, of a cylinder as long as it is wide with that area

    def at(self, rise: Array) -> _Heat:
        """Evaluate the balance at a rise above the coldest sink."""
        p = self.points
        temperature = self.floor + rise
        nu = viscosity.viscosity_from_constants.plain(temperature, a=p.walther_a, b=p.walther_b)
        viscous = p.f0_factor * friction.no_load_torque.plain(p.f0, nu, p.speed, p.pitch_diameter)
        stress = churning.shear_stress.plain(
            self.rate,
            yield_stress=p.yield_stress,
            consistency=p.yield_stress * GREASE_CONSISTENCY,
            base_viscosity=nu * p.density * 1e-3,  # mm^2/s times kg/m^3 is 1e-3 mPa s
        )
        sheared = p.churning_factor * churning.shear_power.plain(self.held_volume, self.rate, stress)
        watt_a_torque = friction.power.plain(1.0, p.speed)
        churned = churning.held_to_range.plain(churning_torque=sheared / watt_a_torque, run_in_torque=viscous)
        power = watt_a_torque * (viscous + self.load_torque + self.seal_torque + churned)
        to_ambient = self._to_ambient(temperature)
        warm = (
            to_ambient * (p.ambient - self.floor)
            + p.shaft_conductance * (p.shaft_temperature - self.floor)
            + p.oil_conductance * (p.oil_inlet - self.floor)
        )
        out = (to_ambient + p.shaft_conductance + p.oil_conductance) * rise
        return _Heat(nu, viscous, churned, power, power + p.machine_heat + warm, out)

    def _to_ambient(self, temperature: Array) -> Array:
        """Conductance of the housing and the free shaft end to the ambient, W/K."""
        p = self.points
        film = self.air((temperature + p.ambient) / 2, p.pressure)
        still = cooling.natural_convection.plain(
            surface=temperature,
            ambient=p.ambient,
            diameter=self.diameter,
            kinematic_viscosity=film.kinematic_viscosity_mm2,
            conductivity=film.conductivity,
            prandtl=film.prandtl,
            expansion=film.expansion,
        )
        blown = cooling.forced_convection.plain(
            velocity=p.draught,
            diameter=self.diameter,
            kinematic_viscosity=film.kinematic_viscosity_mm2,
            conductivity=film.conductivity,
            prandtl=film.prandtl,
        )
        convection = cooling.mixed_convection.plain(natural=still, forced=blown)
        radiation = cooling.radiation.plain(surface=temperature, surroundings=p.ambient, emissivity=EMISSIVITY)
        by_area = (convection + radiation) * self.area + p.fin_conductance
        return p.cooling_factor * np.where(self.is_by_area, by_area, p.conductance)


def solve(points: Points, air_properties: Air = air.properties) -> Equilibrium:
    """Find the equilibrium of every row."""
    with np.errstate(all="ignore"):
        balance = Balance(points, air_properties)
        rise, is_found, steps = _root(balance)
        # A bearing whose temperature is stated needs no balance: its residual is the heat that holds it there.
        is_held = ~np.isnan(points.held_temperature)
        rise = np.where(is_held, points.held_temperature - balance.floor, rise)
        is_found |= is_held
        heat = balance.at(rise)
    per_torque = friction.power.plain(1.0, points.speed)
    lost = np.where(is_found, 1.0, np.nan)
    power = heat.friction_power * lost
    # What leaves by the sinks less what the warm ones bring in: in equilibrium the friction and the machine's watts.
    removed = (heat.heat_out - (heat.heat_in - heat.friction_power)) * lost + points.machine_heat
    return Equilibrium(
        temperature=np.where(is_held, points.held_temperature, (balance.floor + rise) * lost),
        is_found=is_found,
        residual=(heat.heat_in - heat.heat_out) * lost,
        steps=steps,
        equivalent_load=balance.equivalent_load,
        viscosity=heat.viscosity * lost,
        viscous_torque=heat.viscous_torque * lost,
        load_torque=balance.load_torque,
        seal_torque=balance.seal_torque,
        churning_torque=heat.churning_torque * lost,
        friction_power=power,
        churning_power=heat.churning_torque * per_torque * lost,
        heat_removed=removed,
        held_volume=balance.held_volume,
    )


def _root(balance: Balance) -> tuple[Array, Flags, int]:
    """Return the rise at which heat in equals heat out, where it was found, and the steps that took."""
    low = np.full(len(balance.points), np.log(LEAST_RISE))
    high = np.log(TOP_TEMPERATURE - balance.floor)
    top = balance.at(np.exp(high))
    y_high = np.log(top.heat_in / top.heat_out)
    has_root = y_high < 0
    # First guess: the heat at 30 K of rise over the conductance there.
    x = np.log(np.minimum(30.0, np.exp(high) / 2))
    x_old, y_old = high, y_high
    found = np.zeros(len(x), dtype=bool)
    steps = 0
    for steps in range(1, MOST_STEPS + 1):  # noqa: B007  (the count is returned)
        heat = balance.at(np.exp(x))
        y = np.log(heat.heat_in / heat.heat_out)
        found |= has_root & (np.abs(heat.heat_in - heat.heat_out) <= TOLERANCE * heat.friction_power)
        is_open = has_root & ~found
        if not is_open.any():
            break
        low = np.where(y > 0, x, low)
        high = np.where(y > 0, high, x)
        slope = (y - y_old) / (x - x_old)
        step = x - y / slope
        middle = (low + high) / 2
        is_good = (step > low) & (step < high)  # false for NaN too
        x_new = np.where(is_good, step, middle)
        x_old, y_old = np.where(is_open, x, x_old), np.where(is_open, y, y_old)
        x = np.where(is_open, x_new, x)
    return np.exp(x), found, steps
