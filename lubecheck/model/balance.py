"""The heat balance of a position: two rings with the lubricant between them, and every way that heat takes.

    machine shaft, free shaft, watts of the machine -- inner ring
                                                          |        circulating oil
                                                      lubricant -- (friction and churning make their heat here)
                                                          |
                     air, radiation, frame, coolant, sun -- outer ring and housing

The lubricant's temperature is that of friction and film. All paths follow from the outer ring's temperature without a
further search: what the housing gives off has come from the lubricant, which says how much warmer that is, and the
inner ring floats between the lubricant and the shaft. One unknown is left a row.

Everything is counted from the coldest sink, the floor: no node can be colder, so that every term has one sign.
"""

from __future__ import annotations

import dataclasses
from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass
from typing import Any

import numpy as np

from lubecheck.data import air
from lubecheck.model.points import Points
from lubecheck.physics import churning, cooling, film, friction, heat_paths, loads, viscosity
from lubecheck.units import Array

Air = Callable[[Array, Array], air.AirProperties]
Film = Callable[[Array, Array], air.AirFilm]

EMISSIVITY = 0.9  # painted, oily or rusted housing: handbooks, 0.85 to 0.95
GREASE_CONSISTENCY = 1 / 15  # Pa s^0.5 a Pa of yield stress: 20 at 300 Pa (NLGI 2, representative)
HOTTEST_LUBRICANT = 400.0  # degC: friction is held to its value there, so that a search may look beyond
HELD_TOGETHER = 1e12  # W/K: a stated temperature is that of the whole bearing
USUAL_STILL = 11.0  # W/(m^2*K), of still air with radiation: for a first guess, as the next three
USUAL_BLOWN = 4.0  # W/(m^2*K) for each m/s
USUAL_RISE = 25.0  # K
STILL_GROWTH = 0.22  # exponent of still air's conductance over its rise, as the next for a search's first step
RADIATION_GROWTH = 0.0045  # 1/K, of radiation's conductance
THINNING = 0.65  # exponent by which the rise follows the heat
PATHS = ("air", "radiation", "stated", "free_shaft", "machine_shaft", "frame", "coolant", "oil")


@dataclass(frozen=True, slots=True)
class Heat:
    """One evaluation of the balance."""

    floor: Array  # degC, the coldest sink
    inner_rise: Array  # K above it, as the next two
    lubricant_rise: Array
    outer_rise: Array
    viscosity: Array
    viscous_torque: Array
    mixed_torque: Array
    churning_torque: Array
    friction_power: Array
    heat_in: Array  # friction, machine, sun and warm sinks, counted from the floor
    heat_out: Array
    housing: Array  # W/K, of the housing to the ambient
    radiation: Array  # W/(m^2*K), the part of it by radiation

    @property
    def inner(self) -> Array:
        """Temperature of inner ring and shaft, degC."""
        return self.floor + self.inner_rise

    @property
    def lubricant(self) -> Array:
        """Temperature of the lubricant, degC."""
        return self.floor + self.lubricant_rise

    @property
    def outer(self) -> Array:
        """Temperature of outer ring and housing, degC."""
        return self.floor + self.outer_rise

    def take(self, rows: Any) -> Heat:
        """Return the evaluation of some of the rows."""
        return Heat(**{f.name: getattr(self, f.name)[rows] for f in dataclasses.fields(self)})


@dataclass(frozen=True, slots=True)
class Flows:
    """What each node of a position that is not in balance takes up, W."""

    inner: Array
    lubricant: Array
    outer: Array
    torque: Array  # N mm, of all friction
    housing: Array  # W/K, of the housing to the ambient


@dataclass(frozen=True, slots=True)
class Balance:
    """What does not depend on temperature, worked out once for every row."""

    film: Film
    floor: Array  # degC, the coldest sink
    ambient: Array
    pressure: Array
    speed: Array
    watt_a_torque: Array
    walther_a: Array
    walther_b: Array
    viscous_factor: Array  # on Palmgren's viscous torque at f0 1
    pitch_diameter: Array
    equivalent_load: Array
    load_torque: Array
    most_mixed: Array  # N mm, of the mixed film at kappa 0
    reference_viscosity: Array
    seal_torque: Array
    held_volume: Array
    free_volume: Array
    soap_churning: Array  # N mm a cm^3 of it, of yield stress and power law at 25 degC
    oil_churning: Array  # N mm a cm^3 of it and a mm^2/s of its base oil
    ring: Array  # W/K, between a ring and the lubricant
    area: Array  # m^2
    diameter: Array  # mm, of a cylinder as long as it is wide with that area
    forced: Array  # m/s
    stated: Array  # W/K, NaN where the area is known
    cooling_factor: Array
    solar_heat: Array
    machine_heat: Array
    free_shaft: Array  # W/K, and so on
    machine_shaft: Array
    frame: Array
    coolant: Array
    oil: Array
    ambient_over: Array  # K over the floor, and so on
    shaft_over: Array
    frame_over: Array
    coolant_over: Array
    oil_over: Array
    steady_out: Array  # W/K, of the outer ring's paths that do not depend on temperature
    steady_in: Array  # W, from the warm ones among all paths that do not depend on temperature

    def __len__(self) -> int:
        return len(self.floor)

    def take(self, rows: Any) -> Balance:
        """Return the balance of some of the rows."""
        taken = {f.name: getattr(self, f.name)[rows] for f in dataclasses.fields(self) if f.name != "film"}
        return Balance(film=self.film, **taken)

    def at(self, rise: Array) -> Heat:
        """Evaluate the balance with the outer ring at a rise above the floor."""
        housing, radiation = self._housing(self.floor + rise)
        given_off = housing * (rise - self.ambient_over) + self.frame * (rise - self.frame_over)
        given_off += self.coolant * (rise - self.coolant_over) - self.solar_heat
        lubricant = rise + given_off / self.ring
        # The inner ring floats between the lubricant and the shaft.
        shaft = self.machine_shaft * self.shaft_over + self.free_shaft * self.ambient_over
        inside = self.machine_shaft + self.free_shaft
        inner = (self.ring * lubricant + shaft + self.machine_heat) / (self.ring + inside)
        nu, viscous, mixed, churned = self._torques(self.floor + lubricant)
        power = self.watt_a_torque * (viscous + self.load_torque + mixed + self.seal_torque + churned)
        heat_in = power + self.steady_in + housing * self.ambient_over
        heat_out = (housing + self.steady_out) * rise + inside * inner + self.oil * lubricant
        return Heat(
            floor=self.floor,
            inner_rise=inner,
            lubricant_rise=lubricant,
            outer_rise=rise,
            viscosity=nu,
            viscous_torque=viscous,
            mixed_torque=mixed,
            churning_torque=churned,
            friction_power=power,
            heat_in=heat_in,
            heat_out=heat_out,
            housing=housing,
            radiation=radiation,
        )

    def flows(self, inner: Array, lubricant: Array, outer: Array, warmth: Array, fresh: Array) -> Flows:
        """Evaluate what each node takes up where it is not in balance: the same network and torques as `at`.

        inner, lubricant, outer: rises above the floor
        warmth: how far the machine has come from the ambient to the temperatures and watts stated of it, 0 to 1
        fresh: torque of grease that has not found its place yet, were it at 25 degC; it softens as grease does, since
            the whole of it is sheared and not its base oil alone
        """
        housing, _ = self._housing(self.floor + outer)
        temperature = self.floor + lubricant
        _, viscous, mixed, churned = self._torques(temperature)
        torque = viscous + self.load_torque + mixed + self.seal_torque + churned
        torque += fresh * churning.softening.plain(temperature)

        def over(stated: Array) -> Array:
            """What a machine's own temperature is over the floor on its way."""
            return self.ambient_over + warmth * (stated - self.ambient_over)

        to_inner, to_outer = self.ring * (lubricant - inner), self.ring * (lubricant - outer)
        shaft = self.machine_shaft * (inner - over(self.shaft_over)) + self.free_shaft * (inner - self.ambient_over)
        house = housing * (outer - self.ambient_over) + self.frame * (outer - over(self.frame_over))
        house += self.coolant * (outer - self.coolant_over) - self.solar_heat
        oil = self.oil * (lubricant - over(self.oil_over))
        return Flows(
            inner=to_inner - shaft + warmth * self.machine_heat,
            lubricant=self.watt_a_torque * torque - to_inner - to_outer - oil,
            outer=to_outer - house,
            torque=torque,
            housing=housing,
        )

    def slope(self, heat: Heat) -> Array:
        """Return d ln(heat in / heat out) / d ln(rise), near enough for a step of a search to start with."""
        # How the housing's conductance grows with its temperature, W/K^2: still air by the fourth root of its rise
        # (`STILL_GROWTH`; a draught hardly), radiation by the cube of the temperature.
        radiated = heat.radiation * self.cooling_factor * self.area
        rising = np.where(self.forced > 0, 0.0, STILL_GROWTH) * (heat.housing - radiated)
        over_air = heat.outer_rise - self.ambient_over
        growth = rising / np.maximum(np.abs(over_air), 1.0) + RADIATION_GROWTH * radiated
        growth = np.where(np.isnan(self.stated), growth, 0.0)
        outside = heat.housing + growth * over_air
        lubricant = 1.0 + (outside + self.steady_out) / self.ring
        inside = self.machine_shaft + self.free_shaft
        inner = lubricant * self.ring / (self.ring + inside)
        # d ln(nu) / dT by ASTM D341
        z = heat.viscosity + 0.7
        thinning = -self.walther_b * np.log(z) * z / (heat.viscosity * (heat.lubricant + 273.15))
        mixed = heat.mixed_torque * heat.viscosity / (self.reference_viscosity * -friction.MIXED_KAPPA)
        torque = (heat.viscous_torque * (2 / 3) + mixed) * thinning - heat.churning_torque * churning.SOFTENING
        heat_in = self.watt_a_torque * torque * lubricant + growth * self.ambient_over
        heat_out = heat.housing + growth * heat.outer_rise + self.steady_out + inside * inner + self.oil * lubricant
        return heat.outer_rise * (heat_in / heat.heat_in - heat_out / heat.heat_out)

    def guess(self) -> Array:
        """Return a first guess of the rise: the network with fixed conductances, and friction at a guessed warmth."""
        usual = self.cooling_factor * self.area * (USUAL_STILL + USUAL_BLOWN * self.forced)
        housing = np.where(np.isnan(self.stated), usual, self.stated)
        outside = housing + self.steady_out
        outside_heat = housing * self.ambient_over + self.frame * self.frame_over
        outside_heat += self.coolant * self.coolant_over + self.solar_heat
        inside = self.machine_shaft + self.free_shaft
        inside_heat = self.machine_shaft * self.shaft_over + self.free_shaft * self.ambient_over + self.machine_heat
        # What each ring passes on to the lubricant.
        to_outside, to_inside = self.ring / (self.ring + outside), self.ring / (self.ring + inside)
        whole = outside * to_outside + inside * to_inside + self.oil
        heat = outside_heat * to_outside + inside_heat * to_inside + self.oil * self.oil_over
        idle = heat / whole  # K, of the lubricant without friction
        _, viscous, mixed, churned = self._torques(self.floor + idle + USUAL_RISE)
        friction_heat = self.watt_a_torque * (viscous + self.load_torque + mixed + self.seal_torque + churned)
        # Friction falls by about 2 % a kelvin: the rise for which it falls as the heat needs.
        warm = friction_heat / whole
        rise = USUAL_RISE * np.exp(THINNING * np.log(np.maximum(warm, 1e-9) / USUAL_RISE))
        return (self.ring * (idle + rise) + outside_heat) / (self.ring + outside)

    def _torques(self, lubricant: Array) -> tuple[Array, Array, Array, Array]:
        """Viscosity, and the torques of viscous friction, mixed film and churning."""
        # Outside these bounds the search only passes through.
        temperature = np.minimum(np.maximum(lubricant, self.floor), HOTTEST_LUBRICANT)
        nu = viscosity.viscosity_from_constants.plain(temperature, a=self.walther_a, b=self.walther_b)
        viscous = friction.no_load_torque.plain(self.viscous_factor, nu, self.speed, self.pitch_diameter)
        kappa = film.viscosity_ratio.plain(nu=nu, nu_1=self.reference_viscosity)
        mixed = self.most_mixed * friction.mixed_film_share.plain(kappa)
        return nu, viscous, mixed, self._churned(temperature, nu, viscous)

    def _churned(self, temperature: Array, nu: Array, viscous: Array) -> Array:
        if not (self.held_volume > 0).any():  # most positions hold none
            return np.zeros_like(nu)
        a_volume = churning.softening.plain(temperature) * self.soap_churning + nu * self.oil_churning
        return churning.held_to_range.plain(
            churning_torque=self.held_volume * a_volume,
            run_in_torque=viscous,
            packed=churning.packed_share.plain(held=self.held_volume, free_volume=self.free_volume),
        )

    def _housing(self, outer: Array) -> tuple[Array, Array]:
        """Conductance of the housing to the ambient, W/K, and the coefficient of radiation, W/(m^2*K)."""
        found = self.film((outer + self.ambient) / 2, self.pressure)
        still = cooling.rising_air(
            surface=outer,
            ambient=self.ambient,
            diameter=self.diameter,
            kinematic_viscosity=found.kinematic_viscosity,
            conductivity=found.conductivity,
            rising=found.rising,
        )
        blown = cooling.blown_air(
            velocity=self.forced,
            diameter=self.diameter,
            kinematic_viscosity=found.kinematic_viscosity,
            conductivity=found.conductivity,
            blown=found.blown,
        )
        convection = cooling.mixed_convection.plain(natural=still, forced=blown)
        radiation = cooling.radiation.plain(surface=outer, surroundings=self.ambient, emissivity=EMISSIVITY)
        by_area = (convection + radiation) * self.area
        return self.cooling_factor * np.where(np.isnan(self.stated), by_area, self.stated), radiation

    def paths(self, heat: Heat) -> Mapping[str, Array]:
        """What leaves by each path, W; below zero: it comes in."""
        is_stated = ~np.isnan(self.stated)
        over_air = heat.outer_rise - self.ambient_over
        housing, radiated = heat.housing * over_air, heat.radiation * self.cooling_factor * self.area * over_air
        paths = (
            np.where(is_stated, 0.0, housing - radiated),
            np.where(is_stated, 0.0, radiated),
            np.where(is_stated, housing, 0.0),
            self.free_shaft * (heat.inner_rise - self.ambient_over),
            self.machine_shaft * (heat.inner_rise - self.shaft_over),
            self.frame * (heat.outer_rise - self.frame_over),
            self.coolant * (heat.outer_rise - self.coolant_over),
            self.oil * (heat.lubricant_rise - self.oil_over),
        )
        return dict(zip(PATHS, paths, strict=True))


def join(parts: Sequence[Balance]) -> Balance:
    """Return the balances of several sets of rows in the same air as one."""
    names = [f.name for f in dataclasses.fields(Balance) if f.name != "film"]
    joined = {name: np.concatenate([getattr(part, name) for part in parts]) for name in names}
    return Balance(film=parts[0].film, **joined)


def balance_of(points: Points, air_properties: Air = air.properties) -> Balance:
    """Work out the balance of every row as far as it does not depend on temperature."""
    p = points
    equivalent = loads.dynamic_equivalent_load.plain(
        radial_load=p.radial_load,
        axial_load=p.axial_load,
        static_rating=p.static_rating,
        f0_load=p.f0_load,
        contact_angle=p.contact_angle,
        rule=p.rule,
    )
    load_torque = p.f1_factor * friction.load_torque.plain(_load_factor(p), equivalent, p.pitch_diameter)
    # Oil bearings have no fill: nothing is held.
    fill = np.where(p.is_grease > 0, np.minimum(np.nan_to_num(p.fill), 1.0), 0.0)
    is_by_area = np.isnan(p.conductance)
    area = np.where(is_by_area, p.housing_area, 1.0) * 1e-6
    free_shaft = p.cooling_factor * np.where(is_by_area, p.fin_conductance, 0.0)
    sinks = (
        (p.frame_conductance, p.frame_temperature),
        (p.coolant_conductance, p.coolant_inlet),
        (p.shaft_conductance, p.shaft_temperature),
        (p.oil_conductance, p.oil_inlet),
        (free_shaft, p.ambient),
    )
    floor = p.ambient
    for conductance, temperature in sinks:
        floor = np.where(conductance > 0, np.minimum(floor, temperature), floor)
    warm = sum((conductance * (temperature - floor) for conductance, temperature in sinks), np.zeros(len(p)))
    return Balance(
        # The laws of convection read their own columns of the table of air; any other air is asked for its properties.
        film=air.film if air_properties is air.properties else lambda at, under: air.film_of(air_properties(at, under)),
        floor=floor,
        ambient=p.ambient,
        pressure=p.pressure,
        speed=p.speed,
        watt_a_torque=friction.power.plain(1.0, p.speed),
        walther_a=p.walther_a,
        walther_b=p.walther_b,
        viscous_factor=p.f0_factor * p.f0,
        pitch_diameter=p.pitch_diameter,
        equivalent_load=equivalent,
        load_torque=load_torque,
        most_mixed=p.mixed_factor * load_torque,
        reference_viscosity=film.reference_viscosity.plain(p.speed, p.pitch_diameter),
        seal_torque=p.seal_factor * p.seal_torque,
        held_volume=churning.held_volume.plain(
            fill=fill,
            free_volume=p.free_volume,
            void=p.void,
            housing_fill=p.housing_fill,
            is_open=p.is_open,
            passage=p.passage,
        ),
        free_volume=p.free_volume,
        soap_churning=_churning_a_volume(p, p.yield_stress, 0.0),
        oil_churning=_churning_a_volume(p, 0.0, p.density * 1e-3),  # mm^2/s times kg/m^3 is 1e-3 mPa s
        ring=np.where(
            np.isnan(p.held_temperature),
            p.ring_factor * heat_paths.ring_conductance.plain(p.speed, pitch_diameter=p.pitch_diameter, width=p.width),
            HELD_TOGETHER,
        ),
        area=area,
        diameter=np.sqrt(area / np.pi) * 1000,
        forced=p.draught,
        stated=p.conductance,
        cooling_factor=p.cooling_factor,
        solar_heat=p.solar_heat,
        machine_heat=p.machine_heat,
        free_shaft=free_shaft,
        machine_shaft=p.shaft_conductance,
        frame=p.frame_conductance,
        coolant=p.coolant_conductance,
        oil=p.oil_conductance,
        ambient_over=p.ambient - floor,
        shaft_over=p.shaft_temperature - floor,
        frame_over=p.frame_temperature - floor,
        coolant_over=p.coolant_inlet - floor,
        oil_over=p.oil_inlet - floor,
        steady_out=p.frame_conductance + p.coolant_conductance,
        steady_in=warm + p.machine_heat + p.solar_heat,
    )


def _churning_a_volume(points: Points, yield_stress: Any, base_viscosity: Any) -> Array:
    """Torque that shears a cm^3 of held grease, N mm: linear in its yield stress and its base oil's viscosity."""
    p = points
    rate = churning.shear_rate.plain(p.speed, bore=p.bore, outside=p.outside)
    stress = churning.shear_stress.plain(
        rate,
        yield_stress=yield_stress,
        consistency=yield_stress * GREASE_CONSISTENCY,
        base_viscosity=base_viscosity,
    )
    power: Array = churning.shear_power.plain(1.0, rate, stress)
    return p.churning_factor * power / friction.power.plain(1.0, p.speed)


def _load_factor(points: Points) -> Array:
    """f1 of every row: constant, or z (P0/C0)^y where the case asks for that form."""
    p = points
    rows = np.flatnonzero(p.load_z > 0)
    if not len(rows):
        return p.f1
    load = loads.static_equivalent_load.plain(
        radial_load=p.radial_load[rows],
        axial_load=p.axial_load[rows],
        contact_angle=p.contact_angle[rows],
        rule=p.rule[rows],
    )
    factor = p.f1.copy()
    factor[rows] = friction.load_coefficient.plain(
        p.load_z[rows], p.load_y[rows], static_load=load, static_rating=p.static_rating[rows]
    )
    return factor
