"""Rows: what a case says, under one reading of what it leaves out, as the columns of its points."""

from __future__ import annotations

import math
from collections.abc import Mapping
from typing import Any

import numpy as np

from lubecheck.data import coolants
from lubecheck.data.bearings import Bearing
from lubecheck.data.families import FAMILIES, Family
from lubecheck.errors import NotCalibrated
from lubecheck.model.assumptions import HOUSING_AREA, SMALLEST_AREA, at_worst
from lubecheck.model.calibration import COOLING, NOTHING
from lubecheck.model.duty_entries import Duty
from lubecheck.model.entries import Case
from lubecheck.model.entry import Amount
from lubecheck.model.measured import highest_read
from lubecheck.model.place_entries import Housing
from lubecheck.model.plan_entries import GreasePlan
from lubecheck.model.points import BEYOND_SETTINGS, FACTORS
from lubecheck.model.shaft import acceleration_of, loads_of
from lubecheck.physics import (
    churning,
    clearance,
    cooling,
    fatigue,
    friction,
    grease_amount,
    grease_corrections,
    grease_life,
    heat_paths,
    loads,
    oil_life,
    seal_friction,
    speed,
    viscosity,
)

# Position of a family's interval factor K in the classical formula's own order.
INTERVAL_FAMILY = {factor: code for code, factor in enumerate(grease_life.CLASSICAL_FACTOR.values())}

# What the user answers about the surroundings, and the factor on the grease interval that each answer stands for.
INTERVAL_ANSWERS = {
    "dust": grease_life.DUST,
    "water": grease_life.WATER,
    "vibration": grease_life.VIBRATION,
    "orientation": grease_life.ORIENTATION,
    "turning_ring": grease_corrections.TURNING_RING,
    "air_flow": grease_corrections.AIR_FLOW,
}
# The answers that reach the grease of a closed bearing too.
INSIDE_ANSWERS = ("vibration", "orientation", "turning_ring")
REGREASE_RULES = tuple(grease_amount.REGREASE_GRAMS)
RULE_DAYS = {"weekly": 7.0, "monthly": 28.0}  # the rhythm that a regrease rule is made for

# Highest temperatures of parts, degC: common practice for polyamide 66 cages and nitrile lip seals. Rings have
# a limit of their own, since they are the hottest parts.
POLYAMIDE_LIMIT = 120.0
NITRILE_LIMIT = 100.0

# What a row's highest temperature comes from: words and source, in the order of Points.limit_origin.
LIMIT_ORIGINS: tuple[tuple[str, str], ...] = (
    ("lubricant", ""),  # the lubricant's own source
    ("cage of polyamide", "common-practice"),
    ("seals of nitrile rubber", "common-practice"),
    ("your own limit", "user"),
)

DEFAULT_LIFE = 40_000.0  # h, machines in continuous service: common practice
DEFAULT_RELIABILITY = 0.9  # ISO 281: basic rating life
DEFAULT_KAPPA = 1.0  # common practice: kappa 1 to 4 in design; below 1 the surfaces touch
FIN_LENGTH = 2.0  # bores of bare shaft on the free side that act as a fin: estimate, 0 to 4
SHAFT_COEFFICIENT = 15.0  # W/(m^2*K), turning shaft in air, radiation included: estimate, 10 to 30
OIL_HEAT_CAPACITY = 1900.0  # J/(kg*K), mineral oil at 50 degC; 1700 to 2100, handbooks, from memory
STREAM_CONTACT = 0.5  # share of its warming that circulating oil takes at the bearing: estimate, 0.3 to 0.8


def rows_of(case: Case, reading: Mapping[str, Any], number: int = 0) -> list[dict[str, float]]:
    """Return the rows of one case under one reading of the facts it leaves out.

    `reading` maps the name of a fact ("[housing] void") to the value it is read as.

    Raises NotCalibrated where temperatures were measured and nothing was made of them.
    """
    calibrated = _calibration_columns(case, reading)
    shared = _bearing_columns(case.bearing, reading)
    family = FAMILIES[case.bearing.family]
    shared |= _lubricant_columns(case, reading)
    shared |= _surroundings_columns(case, reading)
    shared |= _housing_columns(case, reading, shared)
    shared |= _requirement_columns(case, reading, family)
    shared |= _clearance_columns(case)
    rows = []
    rubbing = _friction_columns(case, reading)
    year = seasons(case)
    for season in year:
        for duty in case.duty:
            row = shared | _duty_columns(case, duty, reading, shared, season) | rubbing
            row["share"] /= len(year)
            row |= _amount_columns(case, reading, row)
            row |= {"case": number, **dict.fromkeys(FACTORS, 1.0), **calibrated}
            rows.append(row)
    _propose_one_fill(case, rows)
    return rows


def _calibration_columns(case: Case, reading: Mapping[str, Any]) -> dict[str, float]:
    """What measured temperatures say, found under the same reading; nothing where they are not explained."""
    found = case.calibration
    outer, highest = highest_read(case)
    columns = {"is_doubted": 0.0, "read_outer": outer, "read_highest": highest}
    if found is None:
        if case.measured:
            raise NotCalibrated("measured temperatures have to be fitted first: studies.calibrate.calibrated")
        return columns
    if not found.is_explained:
        return columns | {"is_doubted": 1.0}
    # A fill that was made anew is known; one that the measurements could not tell is read as without them.
    is_asked = found.column == COOLING or (found.tells != NOTHING and case.grease.fill == "unknown")
    return columns | ({found.column: found.at(at_worst(reading))} if is_asked else {})


def _propose_one_fill(case: Case, rows: list[dict[str, float]]) -> None:
    """A bearing is filled once: what is proposed for its fastest duty point is proposed for all."""
    least = min(row["proposed_fill"] for row in rows)
    for row in rows:
        if case.is_grease and case.grease.fill is None:
            # What was given on top of a proposed fill stays on top of it.
            given = 0.0 if case.grease.given is None else row["fill"] - row["proposed_fill"]
            row["fill"] = least + given
        row["proposed_fill"] = least


def seasons(case: Case) -> tuple[float, ...]:
    """Return the ambients that a year is made of, in equal shares: its months, or one where they are not stated.

    From the coldest and the warmest month and the mean of the year, twelve months are drawn that keep all three: a
    cosine of the year bent to the mean.
    """
    around = case.surroundings
    if around.months is not None:
        return around.months
    low, high = around.ambient_lowest, around.ambient_highest
    if low is None or high is None or high == low:
        return (around.ambient,)
    wave = [(1 - math.cos(math.pi * month / 6)) / 2 for month in range(12)]  # 0 in the coldest, 1 in the warmest month
    target = 12 * (around.ambient - low) / (high - low)
    # The power that brings the sum of the months to the mean, by halving; at its ends the mean is next to an extreme.
    least, most = -8.0, 8.0
    for _ in range(60):
        middle = (least + most) / 2
        if sum(w ** math.exp(middle) for w in wave) > target:
            least = middle
        else:
            most = middle
    return tuple(low + (high - low) * w ** math.exp(least) for w in wave)


def _stated(value: float | None, assumed: float) -> float:
    return assumed if value is None else value


def _known(value: float | None) -> float:
    return math.nan if value is None else float(value)


def _bearing_columns(bearing: Bearing, reading: Mapping[str, Any]) -> dict[str, float]:
    family = FAMILIES[bearing.family]
    low = {
        key: bearing.estimated[key][0] if reading.get(f"[bearing] {key}") == "low" else 1.0
        for key in ("dynamic_rating", "static_rating", "fatigue_limit")
    }
    volume = grease_amount.free_volume.plain(
        bore=bearing.bore, outside=bearing.outside, width=bearing.width, mass=bearing.mass
    )
    return {
        "bore": bearing.bore,
        "outside": bearing.outside,
        "width": bearing.width,
        "pitch_diameter": (bearing.bore + bearing.outside) / 2,
        "dynamic_rating": bearing.dynamic_rating * low["dynamic_rating"],
        "static_rating": bearing.static_rating * low["static_rating"],
        "fatigue_limit": bearing.fatigue_limit * low["fatigue_limit"],
        "contact_angle": bearing.contact_angle or 0.0,
        "f0_load": bearing.f0_load,
        "rule": loads.RULES.index(bearing.load_rule),
        "kind": fatigue.KINDS.index(family.kind),
        "exponent": family.life_exponent,
        "minimum_load_share": family.minimum_load_share,
        "interval_family": INTERVAL_FAMILY[family.interval_factor],
        "k_f": family.k_f,
        "free_volume": float(volume),
        "kinematic_limit": kinematic_limit(bearing),
        "elements_mass": bearing.elements_mass,
        "is_sealed": float(bearing.sealed_sides == 2),
        "seal_torque": _seal_torque(bearing),
        "passage": 1.0 - bearing.sealed_sides / 2 * (1.0 - churning.PASSAGE[bearing.seal]),
    }


def _seal_torque(bearing: Bearing) -> float:
    if bearing.seal != "contact seals":
        return 0.0
    form = seal_friction.seal_form(bearing.family, bearing.outside)
    torque = seal_friction.seal_torque.plain(
        seal_diameter(bearing.bore, bearing.outside),
        seals=float(bearing.sealed_sides),
        exponent=form.exponent,
        coefficient=form.coefficient,
        constant=form.constant,
    )
    return float(torque)


def kinematic_limit(bearing: Bearing) -> float:
    """Return the speed that cage and contact seals stand whatever the lubricant, rpm: rules of the trade."""
    family = FAMILIES[bearing.family]
    is_named = bearing.family.startswith("full complement")  # the family's own limit is that of no cage
    cage = 1.0 if is_named else speed.CAGE_FACTORS[bearing.cage or "steel"]
    limit = cage * family.oil_speed_limit / bearing.pitch_diameter
    if bearing.seal == "contact seals":
        rubbing = seal_diameter(bearing.bore, bearing.outside)
        limit = min(limit, float(speed.seal_speed_limit.plain(rubbing, speed.SEAL_SPEED)))
    return limit


def seal_diameter(bore: float, outside: float) -> float:
    """Return the diameter that a contact seal rubs on: the shoulder of the inner ring, estimated.

    A quarter of the section height above the bore; 0.2 to 0.33 by series and by where the lip rubs.
    """
    return bore + 0.25 * (outside - bore)


def _lubricant_columns(case: Case, reading: Mapping[str, Any]) -> dict[str, float]:
    lubricant = case.lubricant
    cage = case.bearing.cage or reading.get("[bearing] cage")
    family = FAMILIES[case.bearing.family]
    mean_diameter = (case.bearing.bore + case.bearing.outside) / 2
    a, b = viscosity.walther_constants.plain(nu_40=lubricant.nu_40, nu_100=lubricant.nu_100)
    limits = (
        _known(lubricant.highest),
        POLYAMIDE_LIMIT if cage == "polyamide" else math.inf,
        NITRILE_LIMIT if case.bearing.seal == "contact seals" else math.inf,
        math.inf if case.limits.highest_temperature is None else case.limits.highest_temperature,
    )
    # A lubricant whose top temperature nobody stated leaves the limit unknown, whatever the other parts allow.
    highest = math.nan if math.isnan(limits[0]) else min(limits)
    return {
        "is_grease": float(case.is_grease),
        "walther_a": float(a),
        "walther_b": float(b),
        "density": lubricant.density_15,
        "lowest": _known(lubricant.lowest),
        "highest": highest,
        "stabilised_to": float(case.bearing.stabilised_to),
        "flash_point": math.nan if case.is_grease else _known(lubricant.flash_point),
        "limit_origin": 0 if math.isnan(highest) else limits.index(highest),
        "life_reference": _known(lubricant.life_reference),
        "life_step": float(grease_corrections.halving_step.plain(_known(lubricant.life_reference))),
        "yield_stress": lubricant.yield_stress if lubricant.yield_stress is not None else 0.0,
        "speed_limit": (family.grease_speed_limit if case.is_grease else family.oil_speed_limit) / mean_diameter,
        "additive": fatigue.ADDITIVES.index("extreme pressure" if lubricant.ep else "none"),
    }


def _surroundings_columns(case: Case, reading: Mapping[str, Any]) -> dict[str, float]:
    around = case.surroundings
    altitude = around.altitude if around.altitude is not None else reading.get("[surroundings] altitude", 0.0)
    factor = inside = 1.0
    for key in INTERVAL_ANSWERS:
        part = answer_factor(case, reading, key)
        factor *= part
        inside *= part if key in INSIDE_ANSWERS else 1.0
    water = around.water or reading.get("[surroundings] water")
    return {
        "inside_factor": inside,
        "oil_volume": _known(case.oil.volume),
        "oil_flow": _known(case.oil.flow or None),
        "water_share": oil_life.WATER_SHARES[water] if water is not None else 1.0,
        "coldest": _known(around.coldest),
        "pressure": float(cooling.pressure_at.plain(altitude)),
        "interval_factor": factor,
    }


def answer_factor(case: Case, reading: Mapping[str, Any], key: str) -> float:
    """Return the factor on the grease interval that an answer about the surroundings stands for; 1 without one."""
    given = getattr(case.surroundings, key)
    word = vibration_class(case, reading) if key == "vibration" else given or reading.get(f"[surroundings] {key}")
    return next((answer.factor for answer in INTERVAL_ANSWERS[key] if answer.word == word), 1.0)


def vibration_class(case: Case, reading: Mapping[str, Any]) -> str | None:
    """Return the class of vibration, from a word or a measured velocity."""
    given = case.surroundings.vibration
    if given is None or isinstance(given, str):
        return given or reading.get("[surroundings] vibration")
    factor = float(grease_life.vibration_velocity_factor.plain(given))
    return next(answer.word for answer in grease_life.VIBRATION if answer.factor == factor)


def _is_vertical(case: Case, reading: Mapping[str, Any]) -> bool:
    return (case.surroundings.orientation or reading.get("[surroundings] orientation")) == "vertical"


def _housing_columns(case: Case, reading: Mapping[str, Any], row: Mapping[str, float]) -> dict[str, float]:
    housing = case.housing
    square = row["outside"] ** 2
    area = math.nan
    if housing.area is not None:
        area = housing.area
    elif housing.conductance is None:
        kind = housing.kind or reading["[housing] kind"]
        area = (SMALLEST_AREA if kind == "smallest" else HOUSING_AREA[kind][1]) * square
    fin = float(
        cooling.fin_conductance.plain(
            diameter=row["bore"],
            length=FIN_LENGTH * row["bore"],
            coefficient=SHAFT_COEFFICIENT,
            conductivity=cooling.STEEL_CONDUCTIVITY,
        )
    )
    shaft = float(
        cooling.long_fin_conductance.plain(
            diameter=row["bore"], coefficient=SHAFT_COEFFICIENT, conductivity=cooling.STEEL_CONDUCTIVITY
        )
    )
    stream = cooling.stream_conductance.plain(case.oil.flow or 0.0, row["density"], OIL_HEAT_CAPACITY)
    sunny = area if housing.conductance is None else HOUSING_AREA["pedestal"][1] * square
    frame = 0.0
    if housing.frame_conductance is not None:
        frame = housing.frame_conductance
    elif housing.frame_temperature is not None:
        frame = float(
            heat_paths.joint_conductance.plain(heat_paths.JOINT.nominal, outside=row["outside"], width=row["width"])
        )
    return _coolant_columns(housing, row) | {
        "frame_conductance": frame,
        "solar_heat": float(heat_paths.solar_heat.plain(housing.solar or 0.0, sunny)),
        "housing_area": area,
        "conductance": _known(housing.conductance),
        "shaft_conductance": shaft,
        "fin_conductance": fin,
        "oil_conductance": (case.oil.contact or STREAM_CONTACT) * float(stream),
        "machine_heat": _stated(housing.machine_heat, reading.get("[housing] machine_heat", 0.0)),
        "held_temperature": math.nan,
    }


def _coolant_columns(housing: Housing, row: Mapping[str, float]) -> dict[str, float]:
    """Conductance into the stream of a cooling jacket, and the inlet temperature it counts from."""
    if housing.coolant is None or housing.coolant_flow is None or housing.coolant_inlet is None:
        return {"coolant_conductance": 0.0, "coolant_inlet": 0.0}
    fluid = coolants.at(housing.coolant, housing.coolant_inlet)
    section = heat_paths.DUCT * row["width"]  # mm^2, of a duct as high as its hydraulic diameter round the bearing
    wall = heat_paths.duct_coefficient.plain(
        housing.coolant_flow * 1e6 / 60 / section / 1000,
        diameter=heat_paths.DUCT,
        kinematic_viscosity=fluid.kinematic_viscosity,
        conductivity=fluid.conductivity,
        prandtl=fluid.prandtl,
    )
    area = housing.jacket_area if housing.jacket_area is not None else math.pi * row["outside"] * row["width"]
    stream = cooling.stream_conductance.plain(housing.coolant_flow, fluid.density, fluid.heat_capacity)
    conductance = heat_paths.exchanger_conductance.plain(stream=stream, wall=wall * area * 1e-6)
    return {"coolant_conductance": float(conductance), "coolant_inlet": housing.coolant_inlet}


def _clearance_columns(case: Case) -> dict[str, float]:
    """Mean clearance of the class, and what the stated fits take of it."""
    bearing, housing = case.bearing, case.housing
    if housing.shaft_fit is None:
        return {"clearance": math.nan, "fit_loss": math.nan}
    whole = clearance.initial(bearing.family, bearing.bore, bearing.clearance)
    shaft = clearance.shaft_interference.plain(bearing.bore, clearance.SHAFT_FITS.index(housing.shaft_fit))
    outer = -1.0  # loose, as bearings usually are in their housing
    if housing.housing_fit is not None:
        code = clearance.HOUSING_FITS.index(housing.housing_fit)
        outer = float(clearance.housing_interference.plain(bearing.outside, code))
    return {
        "clearance": math.nan if whole is None else sum(whole) / 2,
        "fit_loss": float(clearance.fit_loss.plain(shaft=shaft, housing=outer)),
    }


def _requirement_columns(case: Case, reading: Mapping[str, Any], family: Family) -> dict[str, float]:
    limits = case.limits
    vibration = vibration_class(case, reading)
    service = limits.service or ("shock" if vibration == grease_life.VIBRATION[-1].word else "normal")
    setting = None if case.is_beyond_settings else case.setting or reading["[cleanliness] setting"]
    water = case.water if case.water is not None else reading.get("[cleanliness] water", 0.0)
    hours = _hours_per_day(case, reading)
    return {
        "setting": BEYOND_SETTINGS if setting is None else fatigue.SETTINGS.index(setting),
        "water": water,
        "life_target": limits.life or DEFAULT_LIFE,
        "reliability": limits.reliability or DEFAULT_RELIABILITY,
        "least_kappa": limits.least_viscosity_ratio or DEFAULT_KAPPA,
        "set_point": min((point for point in (limits.alarm, limits.trip) if point is not None), default=math.nan),
        "static_safety": limits.static_safety or family.static_safety[service],
        "hours_per_day": hours,
        "grease_failed": _grease_failed(case),
        "rhythm": RULE_DAYS.get(case.grease.rule or "", math.inf) * hours,
        "ceiling": grease_life.CALENDAR_CEILING * hours / 24,
    }


def _grease_failed(case: Case) -> float:
    wanted = case.limits.grease_reliability
    if wanted is not None:
        return 1.0 - wanted
    return grease_life.L10 if case.bearing.sealed_sides == 2 else grease_life.L01


def _hours_per_day(case: Case, reading: Mapping[str, Any]) -> float:
    plan = case.grease if case.is_grease else case.oil
    table = "grease" if case.is_grease else "oil"
    hours = plan.hours_per_day if plan.hours_per_day is not None else reading.get(f"[{table}] hours_per_day", 24.0)
    return float(hours)


def _duty_columns(
    case: Case, duty: Duty, reading: Mapping[str, Any], row: Mapping[str, float], season: float
) -> dict[str, float]:
    around = case.surroundings
    ambient = season if duty.ambient is None else duty.ambient
    draught = duty.draught if duty.draught is not None else around.draught
    shaft = duty.shaft_temperature if duty.shaft_temperature is not None else case.housing.shaft_temperature
    # The shaft towards the machine carries heat where its temperature is stated; where the machine's heat is stated in
    # watts, or all paths together as one conductance, it is in there already.
    is_path = shaft is not None or (case.housing.machine_heat is None and case.housing.conductance is None)
    if shaft is None:
        shaft = ambient
    on_bearing = loads_of(case, duty)
    frame = case.housing.frame_temperature
    return {
        "share": 1.0 if duty.share is None else duty.share,
        "speed": duty.speed,
        "radial_load": on_bearing.radial,
        "axial_load": on_bearing.axial,
        "acceleration": acceleration_of(duty, case.bearing, reading.get("[[duty]] acceleration", "ordinary")),
        "ambient": ambient,
        "draught": draught or 0.0,
        "shaft_temperature": shaft,
        "shaft_conductance": row["shaft_conductance"] if is_path else 0.0,
        "oil_inlet": case.oil.inlet if case.oil.inlet is not None else ambient,
        "frame_temperature": ambient if frame is None else frame,
    }


def _friction_columns(case: Case, reading: Mapping[str, Any]) -> dict[str, float]:
    bearing = case.bearing
    supply = "grease" if case.is_grease else case.oil.supply or reading["[oil] supply"]
    shaft = "vertical" if _is_vertical(case, reading) else "horizontal"
    factor = friction.LUBRICATION[supply, shaft].nominal
    if supply == "bath":
        factor *= float(churning.bath_factor.plain(level=_level(case, reading), outside=bearing.outside))
    z, y = (0.0, 0.0)
    if bearing.load_torque == "load dependent":
        z, y = friction.LOAD_FORM[bearing.family]
    return {"f0": bearing.f0 * factor, "f1": bearing.f1, "load_z": z, "load_y": y}


def _level(case: Case, reading: Mapping[str, Any]) -> float:
    """Return the oil level from the centre of the lowest element; flooded reaches over the bearing."""
    if case.oil.level is not None:
        return case.oil.level
    return case.bearing.outside if reading.get("[oil] level") == "flooded" else 0.0


def _amount_columns(case: Case, reading: Mapping[str, Any], row: Mapping[str, float]) -> dict[str, float]:
    plan = case.grease
    volume, grams_per_cm3 = row["free_volume"], row["density"] / 1000
    void = case.housing.void if case.housing.void is not None else reading.get("[housing] void", 0.0)
    _, proposed, _ = grease_amount.first_fill.plain(
        speed=row["speed"], speed_limit=row["speed_limit"], pitch_diameter=row["pitch_diameter"],
        sealing=grease_amount.SEALINGS.index("closed" if case.bearing.sealed_sides == 2 else "open"),
    )  # fmt: skip
    if plan.fill is None:
        fill = float(proposed)
    elif isinstance(plan.fill, str):
        fill = reading["[grease] fill"]
    else:
        fill = volume_of(plan.fill, volume, grams_per_cm3) / volume
    room = volume if void is None else void
    housing_fill = plan.housing_fill
    proposed_beside = grease_amount.HOUSING_FILL["vertical" if _is_vertical(case, reading) else "horizontal"][1]
    if housing_fill is None:
        housing_fill = reading.get("[grease] housing_fill", proposed_beside)
    if plan.given is not None:
        # What the bearing has no room for went into the space beside it.
        found = fill_found(plan, fill, volume, grams_per_cm3)
        fill, housing_fill = (float(share) for share in placed(found, volume, housing_fill, room))
    relief = case.housing.relief or reading.get("[housing] relief")
    interval = case.grease.interval if case.is_grease else case.oil.interval
    mass = math.nan if plan.regrease_amount is None else volume_of(plan.regrease_amount, volume, grams_per_cm3)
    return {
        "fill": fill if case.is_grease else math.nan,
        "void": room,
        "housing_fill": housing_fill,
        "is_open": float(relief == "open"),
        "proposed_fill": float(proposed) if case.is_grease else math.nan,
        "proposed_housing_fill": proposed_beside,
        "is_proposed_fill": float(plan.fill is None and plan.given is None),
        "interval": math.nan if interval is None else running_hours(interval, row["hours_per_day"]),
        "regrease_mass": mass * grams_per_cm3,
        "regrease_rule": REGREASE_RULES.index(plan.rule or "side"),
        "is_bath": float(not case.is_grease and (case.oil.supply or reading.get("[oil] supply")) == "bath"),
        "level": _level(case, reading),
        "is_circulating": float(not case.is_grease and case.oil.supply == "circulating"),
    }


def placed(found: Any, free_volume: Any, housing_fill: Any, room: Any) -> tuple[Any, Any]:
    """Return the fills of bearing and housing: what the bearing has no room for goes into the space beside it.

    found: grease there is, as a share of the bearing's free volume; floats or arrays
    """
    over = np.maximum(0.0, found - 1.0) * free_volume
    with np.errstate(all="ignore"):
        beside = np.where(np.asarray(room) > 0, np.divide(over, room), 0.0)
    return np.minimum(found, 1.0), np.minimum(1.0, housing_fill + beside)


def fill_found(plan: GreasePlan, before: float, free_volume: float, grams_per_cm3: float) -> float:
    """Return the fill that is found after what was given: what was there, the regreasings since, and the last dose.

    A share of the free volume, above 1 where more was given than it holds: all that was given is taken to be there
    still, in the bearing or beside it.
    """
    if plan.given is None:
        return before
    dose = volume_of(plan.regrease_amount, free_volume, grams_per_cm3) if plan.regrease_amount is not None else 0.0
    last = given_volume(plan, free_volume, grams_per_cm3)
    return before + ((plan.regreasings or 0.0) * dose + last) / free_volume


def given_volume(plan: GreasePlan, free_volume: float, grams_per_cm3: float) -> float:
    """Return what was given last, in cm^3; strokes by what one was weighed at."""
    given = plan.given
    if given is None:
        return 0.0
    if given.kind != "strokes":
        return volume_of(given, free_volume, grams_per_cm3)
    return given.value * (0.0 if plan.stroke is None else volume_of(plan.stroke, free_volume, grams_per_cm3))


def volume_of(amount: Amount, free_volume: float, grams_per_cm3: float) -> float:
    """Return an amount of grease, however stated, as a volume in cm^3."""
    if amount.kind == "mass":
        return amount.value / grams_per_cm3
    return amount.value * (free_volume if amount.kind == "share" else 1.0)


def running_hours(interval: Amount, hours_per_day: float) -> float:
    """Return an interval as running hours; one stated by the calendar runs only some hours a day."""
    return interval.value * (hours_per_day / 24 if interval.is_calendar else 1.0)
