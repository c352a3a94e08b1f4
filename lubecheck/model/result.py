"""The result: frozen dataclasses whose figures are pint quantities, each declared once with its unit and meaning.

A figure is stored as a plain float with its band, and becomes a quantity when it is asked for by name, so that a face
which only prints needs no pint. Faces walk `declared()` and `figures`; they compute nothing.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from typing import TYPE_CHECKING, Any, overload

from lubecheck.units import quantity

if TYPE_CHECKING:
    import pint

    from lubecheck.model.calibration import Calibrated


@dataclass(frozen=True, slots=True)
class Figure:
    """A number in a house unit, with the band that its uncertain inputs give it where there is one."""

    value: float | None  # None: could not be worked out
    unit: str
    low: float | None = None
    high: float | None = None

    @property
    def quantity(self) -> pint.Quantity[Any] | None:
        """The value as a quantity."""
        return None if self.value is None else quantity(self.value, self.unit)


class Declared:
    """Declares a figure of a result: its unit and what it means."""

    def __init__(self, unit: str, meaning: str) -> None:
        self.unit = unit
        self.meaning = meaning
        self.name = ""

    def __set_name__(self, owner: type, name: str) -> None:
        self.name = name

    @overload
    def __get__(self, group: None, owner: type | None = None) -> Declared: ...
    @overload
    def __get__(self, group: Figures, owner: type | None = None) -> pint.Quantity[Any] | None: ...
    def __get__(self, group: Figures | None, owner: type | None = None) -> Declared | pint.Quantity[Any] | None:
        return self if group is None else group.figures[self.name].quantity


@dataclass(frozen=True)
class Figures:
    """A group of declared figures.

    A subclass only declares them and needs no decorator of its own, which would cost a start half a millisecond each.
    """

    figures: Mapping[str, Figure]

    @classmethod
    def declared(cls) -> dict[str, Declared]:
        """Return the figures that the group declares, in their order."""
        return {name: item for name, item in vars(cls).items() if isinstance(item, Declared)}

    @classmethod
    def of(cls, values: Mapping[str, float | tuple[float, float, float] | None]) -> Any:
        """Return a group from values, or (value, low, high); what is not finite becomes None."""
        figures = {}
        for name, item in cls.declared().items():
            given = values[name]
            value, low, high = given if isinstance(given, tuple) else (given, None, None)
            figures[name] = Figure(_finite(value), item.unit, _finite(low), _finite(high))
        return cls(figures)


def _finite(value: float | None) -> float | None:
    return None if value is None or value != value or value in (float("inf"), float("-inf")) else float(value)


class Operating(Figures):
    """The operating point: the state of the duty point that runs hottest."""

    temperature = Declared("degC", "temperature of bearing and lubricant")
    inner_ring_temperature = Declared("degC", "temperature of inner ring and shaft")
    outer_ring_temperature = Declared("degC", "temperature of outer ring and housing, what a sensor there reads")
    inner_ring_excess = Declared("delta_degC", "what the inner ring is warmer than the outer")
    viscosity = Declared("mm^2/s", "kinematic viscosity of the (base) oil at that temperature")
    reference_viscosity = Declared("mm^2/s", "viscosity that the bearing needs (ISO 281)")
    viscosity_ratio = Declared("1", "viscosity ratio kappa, what there is over what is needed")
    friction_torque = Declared("N*mm", "torque of viscous friction, load, seals and churning together")
    friction_power = Declared("W", "heat of all that friction")
    churning_power = Declared("W", "the part of it that overfilled grease makes")
    heat_removed = Declared("W", "heat that leaves by housing, shaft and oil, net of what comes in by them")
    viscous_torque = Declared("N*mm", "torque that the oil's viscosity makes")
    load_torque = Declared("N*mm", "torque that the load makes on a full film")
    mixed_film_torque = Declared("N*mm", "what the load torque grows by where the surfaces touch")
    seal_torque = Declared("N*mm", "torque of rubbing seals")
    churning_torque = Declared("N*mm", "torque of churned grease")
    viscous_power = Declared("W", "heat of the viscous torque")
    load_power = Declared("W", "heat of the load torque")
    mixed_film_power = Declared("W", "heat of the mixed film")
    seal_power = Declared("W", "heat of rubbing seals")


class Heat(Figures):
    """Where the heat of the operating point comes from and goes to; a path below zero brings heat in."""

    friction = Declared("W", "from friction and churning")
    machine = Declared("W", "from the machine, stated in watts")
    sun = Declared("W", "from the sun")
    air = Declared("W", "from the housing to the air by convection")
    radiation = Declared("W", "from the housing by radiation")
    stated = Declared("W", "by the stated conductance, all paths from the housing together")
    free_shaft = Declared("W", "along the free end of the shaft")
    machine_shaft = Declared("W", "along the shaft towards the machine")
    frame = Declared("W", "into the base or frame")
    coolant = Declared("W", "into the cooling jacket")
    oil = Declared("W", "with circulating oil")


class HeatShares(Figures):
    """The same as shares of all the heat that leaves; 0 for a path that brings heat in."""

    air = Declared("1", "from the housing to the air by convection")
    radiation = Declared("1", "from the housing by radiation")
    stated = Declared("1", "by the stated conductance, all paths from the housing together")
    free_shaft = Declared("1", "along the free end of the shaft")
    machine_shaft = Declared("1", "along the shaft towards the machine")
    frame = Declared("1", "into the base or frame")
    coolant = Declared("1", "into the cooling jacket")
    oil = Declared("1", "with circulating oil")


class Grease(Figures):
    """Amounts and interval of a grease-lubricated position."""

    free_volume = Declared("cm^3", "free volume of the bearing")
    first_fill = Declared("g", "grease for the first fill of the bearing, as planned or proposed")
    fill_share = Declared("1", "that fill as a share of the free volume")
    regrease_quantity = Declared("g", "grease for each regreasing, as planned or proposed")
    regrease_interval = Declared("h", "running hours between regreasings, as planned or proposed")


class Amounts(Figures):
    """Every amount that a plan may ask for; what does not apply to the position has no value."""

    bearing_fill = Declared("g", "first fill of the bearing, with the range that handbooks give")
    housing_fill = Declared("g", "first fill of the space beside the bearing, with its range")
    regrease_quantity = Declared("g", "grease for each regreasing by the rule of the case")
    allowed_least = Declared("g", "least grease in the bearing in service")
    allowed_most = Declared("g", "most grease in the bearing in service")
    purge_quantity = Declared(
        "g", "grease that renews a neglected or over-aged filling, in steps, with the way out open"
    )
    purge_run = Declared("h", "time to run with the way out open after greasing, and between the steps of a purge")
    continuous_feed = Declared("g/h", "rate of continuous feeding, where an interval would be too short")
    grease_per_year = Declared("g", "grease given in a year by the plan line")
    cartridges_per_year = Declared("1", "cartridges that this is")
    oil_change_quantity = Declared("cm^3", "oil of one change")
    oil_level_from_outside = Declared("mm", "oil level at rest above the lowest point of the bearing's outside")


@dataclass(frozen=True, slots=True)
class IntervalLine:
    """One published line of lubricant life, as it reads for the position."""

    name: str
    hours: float | None  # running hours at `failed`; None where it cannot be read
    failed: float | None  # share of bearings that have failed by then; None where the line does not say
    applies: bool
    governs: bool
    factors: tuple[tuple[str, float], ...]  # what the line's own figure is multiplied with, at the hottest state
    basis: str
    note: str


class Life(Figures):
    """Fatigue life of the position."""

    load_ratio = Declared("1", "load ratio P/C of the heaviest duty point")
    rating_life = Declared("h", "basic rating life L10h")
    contamination_factor = Declared("1", "contamination factor e_C of the worst duty point")
    life_modification_factor = Declared("1", "life modification factor a_ISO, over the whole duty")
    modified_life = Declared("h", "modified rating life at the wanted reliability")


class Loads(Figures):
    """Loads at the duty point whose load comes nearest to being too small."""

    radial_load = Declared("N", "radial load on this bearing, as stated or by statics")
    axial_load = Declared("N", "axial load on this bearing, thrust of the opposed bearing included")
    equivalent_load = Declared("N", "dynamic equivalent load P")
    minimum_load = Declared("N", "least load under which the rolling elements roll")
    needed_preload = Declared("N", "axial preload that would bring P to that least load; 0 where none is needed")
    other_radial_load = Declared("N", "radial load on the other bearing of the shaft, where it follows from [shaft]")
    induced_thrust = Declared("N", "axial force that the radial load sets free in this bearing")


class Speeds(Figures):
    """Speed limits beside the one that is judged, at the duty point that runs hottest."""

    lubricant_limit = Declared("rpm", "speed that the family takes with this kind of lubricant, by n dm")
    kinematic_limit = Declared("rpm", "speed that cage and contact seals stand, rules of the trade")
    thermal_reference_speed = Declared("rpm", "thermal reference speed of ISO 15312; none for thrust ball bearings")
    thermally_safe_speed = Declared("rpm", "thermally safe speed of DIN 732 at this load, oil and highest temperature")


@dataclass(frozen=True, slots=True)
class Limit:
    """One limit and how much of it is used."""

    name: str
    state: str
    use: float | None
    demand: float | None
    allowed: float | None
    unit: str
    basis: str  # source key
    note: str
    use_low: float | None = None
    use_high: float | None = None


@dataclass(frozen=True, slots=True)
class PlanLine:
    """What goes on the maintenance plan."""

    lubricant: str
    first_fill_g: float | None
    first_fill_strokes: int | None
    regrease_g: float | None
    regrease_strokes: int | None
    stroke_g: float | None  # what one stroke of the user's gun gives
    interval_h: float | None
    interval_weeks: float | None
    hours_per_day: float
    is_proposed: tuple[str, ...]  # "fill", "interval", "regrease_amount": what the user left to be proposed
    steps: tuple[str, ...]
    is_as_supplied: bool = False  # closed on both sides: filled by its maker, never by the user
    housing_fill_g: float | None = None
    feed_g_per_h: float | None = None  # stands in for an interval that is too short
    oil_change_cm3: float | None = None
    calendar_days: int | None = None  # the interval by the calendar, whole days, standstills of the plant counted in
    last_done: str | None = None
    hours_run: float | None = None


@dataclass(frozen=True, slots=True)
class Assumed:
    """One thing that the user did not say: what it was read as, why, and whether the verdict hangs on it."""

    name: str
    value: str
    basis: str


@dataclass(frozen=True, slots=True)
class LimitAfter:
    """What a change does to one limit."""

    name: str
    state_before: str
    use_before: float | None
    state_after: str
    use_after: float | None


@dataclass(frozen=True, slots=True)
class Remedy:
    """A change that brings the verdict back."""

    change: str
    use_after: float | None  # of the limit that governed
    verdict_after: str
    note: str
    governing: str
    effort: int  # 1 a setting or a dose ... 5 a new part; of a pair the sum
    edits: tuple[tuple[str, str | Mapping[str, str] | None], ...]  # of the case file: key or table, and what it becomes
    limits: tuple[LimitAfter, ...]


@dataclass(frozen=True, slots=True)
class Need:
    """What one means alone has to be to hold a temperature."""

    means: str
    now: float | str | None  # None: there is none of it yet
    needed: float | str | None  # None: it cannot do it alone
    unit: str
    note: str
    temperature: float | None  # degC, of the hottest duty point then
    edits: tuple[tuple[str, str | Mapping[str, str] | None], ...]  # of the case file, as of a remedy


@dataclass(frozen=True, slots=True)
class Needs:
    """What each means alone has to be, and for what."""

    question: str = ""  # what is to be held, in words; empty where nothing was asked
    found: tuple[Need, ...] = ()
    is_due: bool = False  # it was asked, or heat brings a limit near or beyond
    note: str = ""  # what the figures rest on that was not said, or why there are none


@dataclass(frozen=True, slots=True)
class Damage:
    """What one duty point takes of the fatigue life."""

    share_of_time: float
    share_of_damage: float | None  # None: the life could not be worked out
    life_h: float | None  # modified life, were this point all there is
    temperature: float | None  # degC
    viscosity_ratio: float | None
    contamination_factor: float | None
    life_modification_factor: float | None
    load_ratio: float


@dataclass(frozen=True, slots=True)
class Loss:
    """One part of the loss account: the factor on life of having one more thing as it is."""

    name: str
    factor: float | None
    life_after_h: float | None  # with this thing and those before it as they are
    life_if_right_h: float | None  # the case as it is with this thing alone at its reference
    factor_alone: float | None  # the life there is over that
    covers: tuple[str, ...]  # parts before it whose own step is outside ISO 281: the factor is of all together


@dataclass(frozen=True, slots=True)
class LossAccount:
    """What the case takes of the life at reference conditions, in the order of the parts; their product is exact."""

    reference: str
    reference_life_h: float | None
    life_h: float | None
    parts: tuple[Loss, ...]
    interaction: float | None  # of the parts: the whole over the product of the single factors that are known


class CourseFigures(Figures):
    """What is to be read off a course of temperatures; the sensor is one on the housing, at the outer ring."""

    start = Declared("degC", "temperature that a sensor on the housing shows at the start")
    peak = Declared("degC", "the most that it shows")
    rise = Declared("delta_degC", "what that is over the start")
    time_of_peak = Declared("h", "when that is")
    end = Declared("degC", "what it shows once nothing moves any more")
    time_to_steady = Declared("h", "from when on it stays within 1 K of that")
    bearing_peak = Declared("degC", "the most that bearing and lubricant come to")
    start_torque = Declared("N*mm", "friction torque at running speed at the start")


@dataclass(frozen=True, slots=True)
class Crossing:
    """A set-point and whether a course passes it."""

    name: str  # "alarm" or "trip"
    set_point: float  # degC
    state: str
    at_h: float | None  # when it is passed at the usual reading of all inputs; None: not
    for_h: float | None  # how long it stays passed; None: not passed, or for good
    use: float | None  # rise of the peak over the ambient, as a share of what the set-point leaves
    use_low: float | None
    use_high: float | None


@dataclass(frozen=True)
class Course:
    """One course of temperatures, from a start or from a regreasing until nothing moves."""

    name: str
    meaning: str
    figures: CourseFigures
    time_h: tuple[float, ...]
    sensor: tuple[float, ...]  # degC, at the times
    bearing: tuple[float, ...]  # degC, of bearing and lubricant
    crossings: tuple[Crossing, ...]


class ColdTorque(Figures):
    """Torque of the bearing at a start in the cold, against what the drive has for it."""

    temperature = Declared("degC", "temperature of the start, the coldest that is stated")
    viscosity = Declared("mm^2/s", "kinematic viscosity of the (base) oil there")
    running = Declared("N*mm", "friction torque at running speed before anything has warmed")
    breakaway = Declared("N*mm", "most that grease at rest may take to break away; none for oil")
    starts_from = Declared("degC", "temperature from which on the drive has enough; none where it always or never has")
    drive = Declared("N*mm", "what the drive has for this bearing, as stated")


@dataclass(frozen=True)
class WarmUp:
    """What happens before the position is in balance."""

    courses: tuple[Course, ...]
    cold: ColdTorque | None  # None where no coldest temperature is stated
    notes: tuple[str, ...]


@dataclass(frozen=True)
class Result:
    """The verdict on one bearing position, with all that it rests on."""

    title: str
    verdict: str
    governing: str
    limits: tuple[Limit, ...]
    operating: Operating
    duty: tuple[Operating, ...]  # the same figures for each duty point
    heat: Heat  # of the operating point
    heat_shares: HeatShares
    grease: Grease | None  # None for oil
    life: Life
    loads: Loads
    speeds: Speeds
    damage: tuple[Damage, ...]  # of each duty point
    losses: LossAccount
    plan: PlanLine
    remedies: tuple[Remedy, ...]
    notes: tuple[str, ...]
    cautions: tuple[str, ...]
    given: tuple[tuple[str, str], ...]
    assumed: tuple[Assumed, ...]
    bearing: str
    lubricant: str
    converged_in: int  # steps of the coupled solve
    residual: float | None  # W left over in the balance of the operating point
    amounts: Amounts | None = None
    interval_lines: tuple[IntervalLine, ...] = ()
    interval_spread: str = ""  # how far the lines lie apart, in words
    warm_up: WarmUp | None = None  # where it was asked for
    calibration: Calibrated | None = None  # None where no temperature was measured
    needs: Needs = Needs()

    def limit(self, name: str) -> Limit:
        """Return a limit by its name.

        Raises KeyError where the case has no such limit.
        """
        for limit in self.limits:
            if limit.name == name:
                return limit
        raise KeyError(name)
