"""What would explain a measured temperature that no cooling explains, each worked out, the least surprising first.

Each is one quantity of the measured state, moved alone until the estimate gives the reading; or one way to misread a
thermometer, which has to bring the reading into the band of the estimate. How surprising it is: by how much it lies
outside its usual range, in half widths of that range. The usual ranges are estimates of this program from practice.
What would have to be far outside explains nothing and is only counted; what cannot give the reading is ruled out.
"""

from __future__ import annotations

import dataclasses
import math
from collections.abc import Callable, Iterator
from dataclasses import dataclass

import numpy as np

from lubecheck.model.assumptions import STREAM_RANGE
from lubecheck.model.calibration import LIKELY, Explained, Explanation
from lubecheck.model.entries import Case
from lubecheck.model.equilibrium import Air, solve
from lubecheck.model.measured import SETTLED_AFTER_GREASING, SETTLED_AFTER_START, at_state, finds_fill
from lubecheck.model.measured_entries import Measured
from lubecheck.model.points import Points, join
from lubecheck.model.rows import SHAFT_COEFFICIENT
from lubecheck.physics import cooling, loads
from lubecheck.studies.calibrate import Sensors
from lubecheck.studies.roots import roots
from lubecheck.units import Array

USUAL_FILLS = (0.2, 0.8)  # share of the free volume, as found in service where grease is pumped until it shows
SHAFT_RISE = 60.0  # K over the air of a shaft that nobody measured: a motor's rotor side at rated load
SHAFT_KNOWN = 10.0  # K that a stated shaft temperature may be off
HEAT_KNOWN = 0.2  # of stated watts; of the friction where they are stated to be none
AIR_KNOWN = 5.0  # K that the air at the housing may differ from the stated ambient
STRONG_DRAUGHT = 3.0  # m/s at a housing that nobody blows at
PRELOAD = 0.02  # of the dynamic rating: springs and matched pairs of electric motors and spindles stay below
LOAD_KNOWN = 0.3  # of the stated load; a belt can be tighter
LARGEST_LOAD = 0.5  # of the ratings: beyond it bearings do not last a day
HOTTEST_SHAFT = 300.0  # degC, as a case may state
MOST_WATTS = 1e4
HOTTEST_AIR, COLDEST_AIR = 150.0, -60.0
MOST_DRAUGHT = 30.0  # m/s
# Rise of a motor-size bearing after regreasing, 14 to 17 K, and when it is packed full, over 28 K: field notes.
PEAK, PACKED_PEAK = 17.0, 28.0
ZERO_OF_SCALE = {"F": -32 / 1.8, "K": -273.15, "R": -273.15}  # degC, by the last letter of the unit; else degC itself
WARM_UP = 1.0  # h, time constant of a start: level after 3 to 4 h (98 % after four of them)


@dataclass(frozen=True, slots=True)
class Try:
    """One quantity that may be other than it was taken for."""

    cause: str
    unit: str
    start: float
    end: float
    usual: tuple[float, float]
    put: Callable[[Points, float], Points]
    words: Callable[[float], str]


def explanations(
    case: Case, usual: Points, sensors: Sensors, band: tuple[Array, Array, Array], air_properties: Air
) -> Explained:
    """Return what would explain the reading that is farthest outside the band of the estimate.

    usual: the measured states at the usual reading of what the case leaves out
    band: low end, estimate and high end of what the sensors would read
    """
    low, nominal, high = band
    side = np.where(sensors.temperature > nominal, high - nominal, nominal - low)
    worst = int((np.abs(sensors.temperature - nominal) / side).argmax())
    one, row = case.measured[worst], usual.take([worst])
    sensor = Sensors(sensors.temperature[[worst]], sensors.error[[worst]], (sensors.place[worst],), sensors.oil_flow)
    state = at_state(case, one)
    is_hot = bool(sensors.temperature[worst] > nominal[worst])
    tries = list(_tries(state, row, is_hot, air_properties))
    found = [*_found(tries, row, sensor, air_properties)]
    reached = {item.cause for item in found}
    ends = (float(low[worst]), float(nominal[worst]), float(high[worst]))
    found += _misread(case, worst, row, ends, is_hot)
    found += _not_settled(case, one, row, ends, is_hot)
    found.sort(key=lambda item: item.surprise)
    return Explained(
        likely=tuple(item for item in found if item.surprise <= LIKELY),
        unlikely=tuple(item for item in found if item.surprise > LIKELY),
        ruled_out=tuple(one.cause for one in tries if one.cause not in reached),
        is_hot=is_hot,
    )


def _explanation(cause: str, needed: float, unit: str, usual: tuple[float, float], words: str) -> Explanation:
    low, high = usual
    half = (high - low) / 2
    surprise = abs(needed - (low + high) / 2) / half - 1.0
    return Explanation(cause, needed, unit, low, high, surprise, words)


def _found(tries: list[Try], row: Points, sensor: Sensors, air_properties: Air) -> Iterator[Explanation]:
    """Search all the quantities together, and yield those that reach the reading."""
    if not tries:
        return

    def surplus(shares: Array) -> Array:
        points = join(
            one.put(row, one.start + share * (one.end - one.start)) for one, share in zip(tries, shares, strict=True)
        )
        return np.asarray(sensor.read(points, air_properties)[:, 0] - sensor.temperature[0])

    shares, is_there = roots(surplus, np.zeros(len(tries)), np.ones(len(tries)), 1e-9)
    for one, share, is_good in zip(tries, shares.tolist(), is_there.tolist(), strict=True):
        if is_good:
            needed = one.start + share * (one.end - one.start)
            yield _explanation(one.cause, needed, one.unit, one.usual, one.words(needed))


def _tries(state: Case, row: Points, is_hot: bool, air_properties: Air) -> Iterator[Try]:
    """Yield the quantities that could make the position so hot, or so cold."""
    if state.is_grease and is_hot and not finds_fill(state):
        start = float(np.clip(row.fill[0], USUAL_FILLS[0], 0.99))
        yield Try(
            "overfill", "1", start, 1.0, USUAL_FILLS,
            lambda p, fill: p.changed(fill=fill, housing_fill=1.0, is_open=0.0),
            lambda fill: f"a bearing filled to {fill * 100:.0f} % of its free volume, a full housing and no way out",
        )  # fmt: skip
    yield from _of_heat(state, row, is_hot, air_properties)
    yield from _of_load(row, is_hot)
    yield from _of_air(state, row, is_hot)
    if row.oil_conductance[0] > 0:
        most = 1 / STREAM_RANGE[0] ** 3
        yield Try(
            "oil flow", "1", 1.0, 1 / 100 if is_hot else most, STREAM_RANGE,
            lambda p, times: p.changed(oil_conductance=p.oil_conductance * times),
            lambda times: f"oil that takes {times:.2g} times the heat with it (another flow, or share of contact)",
        )  # fmt: skip


def _of_heat(state: Case, row: Points, is_hot: bool, air_properties: Air) -> Iterator[Try]:
    housing, ambient = state.housing, float(row.ambient[0])
    duty = state.duty[0]
    shaft = duty.shaft_temperature if duty.shaft_temperature is not None else housing.shaft_temperature
    path = float(
        cooling.long_fin_conductance.plain(
            diameter=row.bore[0], coefficient=SHAFT_COEFFICIENT, conductivity=cooling.STEEL_CONDUCTIVITY
        )
    )
    if is_hot or shaft is not None:
        rise = SHAFT_RISE if housing.machine_heat is None else SHAFT_KNOWN  # its heat was said in watts
        usual = (ambient, ambient + rise) if shaft is None else (shaft - SHAFT_KNOWN, shaft + SHAFT_KNOWN)
        yield Try(
            "shaft temperature", "degC", ambient if shaft is None else shaft,
            HOTTEST_SHAFT if is_hot else COLDEST_AIR, usual,
            lambda p, warm: p.changed(shaft_temperature=warm, shaft_conductance=path, machine_heat=0.0),
            lambda warm: f"a shaft of {warm:.0f} degC beside the bearing",
        )  # fmt: skip
    watts = housing.machine_heat or 0.0
    if is_hot or watts > 0:
        friction = float(solve(row, air_properties).friction_power[0])
        friction = friction if math.isfinite(friction) else 1.0
        spread = HEAT_KNOWN * (watts or friction)
        usual = (0.0, friction) if housing.machine_heat is None else (watts - spread, watts + spread)
        beside = "" if shaft is None else " besides what the shaft brings"
        yield Try(
            "machine heat", "W", watts, MOST_WATTS if is_hot else 0.0, usual,
            lambda p, heat: p.changed(machine_heat=heat),
            lambda heat: f"{heat:.3g} W of heat from the machine{beside}",
        )  # fmt: skip


def _of_load(row: Points, is_hot: bool) -> Iterator[Try]:
    rating, radial = float(row.dynamic_rating[0]), float(row.radial_load[0])
    if is_hot and loads.TAKES_AXIAL[row.rule[0]]:
        yield Try(
            "axial preload", "N", 0.0, LARGEST_LOAD * float(row.static_rating[0]), (0.0, PRELOAD * rating),
            lambda p, force: p.changed(axial_load=np.copysign(np.abs(p.axial_load) + force, p.axial_load)),
            lambda force: f"{force:.0f} N of axial preload on top of the load (bearings that brace each other)",
        )  # fmt: skip
    if is_hot and loads.TAKES_RADIAL[row.rule[0]]:
        yield Try(
            "radial preload", "N", 0.0, LARGEST_LOAD * rating, (0.0, max(LOAD_KNOWN * radial, PRELOAD * rating)),
            lambda p, force: p.changed(radial_load=p.radial_load + force),
            lambda force: f"{force:.0f} N more of radial load (clearance used up by fits, a belt too tight)",
        )  # fmt: skip
    elif not is_hot and radial > 0:
        yield Try(
            "radial load", "N", radial, 0.0, ((1 - LOAD_KNOWN) * radial, (1 + LOAD_KNOWN) * radial),
            lambda p, force: p.changed(radial_load=force),
            lambda force: f"a radial load of {force:.0f} N",
        )  # fmt: skip


def _of_air(state: Case, row: Points, is_hot: bool) -> Iterator[Try]:
    ambient, draught = float(row.ambient[0]), float(row.draught[0])
    # What nobody stated is at the temperature of the air, and moves with it.
    with_air = [name for name in ("shaft_temperature", "oil_inlet", "frame_temperature") if
                float(getattr(row, name)[0]) == ambient]  # fmt: skip
    yield Try(
        "ambient", "degC", ambient, HOTTEST_AIR if is_hot else COLDEST_AIR, (ambient - AIR_KNOWN, ambient + AIR_KNOWN),
        lambda p, warm: p.changed(ambient=warm, **dict.fromkeys(with_air, warm)),
        lambda warm: f"air of {warm:.0f} degC at the housing",
    )  # fmt: skip
    if state.housing.conductance is None and (draught > 0 or not is_hot):
        usual = (0.0, STRONG_DRAUGHT) if draught == 0 else (0.5 * draught, 1.5 * draught)
        yield Try(
            "draught", "m/s", draught, 0.0 if is_hot else MOST_DRAUGHT, usual,
            lambda p, speed: p.changed(draught=speed),
            lambda speed: f"a draught of {speed:.2g} m/s at the housing",
        )  # fmt: skip


def _misread(
    case: Case, number: int, row: Points, band: tuple[float, float, float], is_hot: bool
) -> Iterator[Explanation]:
    """Yield the ways to misread the thermometer that bring the reading into the band."""
    low, nominal, high = band
    read, ambient = case.measured[number].temperature, float(row.ambient[0])
    text = dict(case.given).get("measured.temperature", dict(case.given).get(f"measured[{number + 1}].temperature", ""))
    in_fahrenheit = (read - 32.0) / 1.8
    in_celsius = 1.8 * read + 32.0
    is_fahrenheit = text.strip().endswith(("F", "R"))
    tries = []
    if not is_fahrenheit:
        words = f"a thermometer that shows degF, written down as degC: it showed {in_fahrenheit:.1f} degC"
        tries.append(("degF read as degC", in_fahrenheit, words))
    if is_fahrenheit or not text:
        words = f"a thermometer that shows degC, written down as degF: it showed {in_celsius:.1f} degC"
        tries.append(("degC read as degF", in_celsius, words))
    if not is_hot:
        rise = read - ZERO_OF_SCALE.get(text.strip()[-1:], 0.0)  # the number that was written, in kelvins
        words = f"a rise of {rise:.0f} K over the air, written down as a temperature: {rise + ambient:.1f} degC"
        tries.append(("rise read as temperature", rise + ambient, words))
    for cause, true, words in tries:
        if low <= true <= high:
            wide = max(high - nominal, nominal - low)
            yield _explanation(cause, true, "degC", (nominal - wide, nominal + wide), words)


def _not_settled(
    case: Case, one: Measured, row: Points, band: tuple[float, float, float], is_hot: bool
) -> Iterator[Explanation]:
    """Yield a reading that was taken too soon: after greasing it is too hot, after a start too cold."""
    _, nominal, _ = band
    time = one.running_time
    if is_hot:
        excess = one.temperature - nominal
        if case.is_grease and excess <= PACKED_PEAK and (time is None or time < SETTLED_AFTER_GREASING):
            words = (
                f"fresh grease that has not run in yet: {excess:.0f} K too hot, where 14 to 17 K are usual in the "
                f"first hours; read it again after {SETTLED_AFTER_GREASING:g} h"
            )
            yield _explanation("not settled after greasing", excess, "delta_degC", (0.0, PEAK), words)
        return
    ambient = float(row.ambient[0])
    if time is not None or not ambient < one.temperature < nominal:
        return
    hours = -WARM_UP * math.log(1 - (one.temperature - ambient) / (nominal - ambient))
    words = f"a start about {hours:.1f} h before the reading: read it again after {SETTLED_AFTER_START:g} h"
    yield dataclasses.replace(
        _explanation("not settled after a start", hours, "h", (SETTLED_AFTER_START, 2 * SETTLED_AFTER_START), words),
        surprise=SETTLED_AFTER_START / max(hours, 1e-3) - 1.0,
    )
