"""What a practitioner can change at a position, each as edits of the case file.

A change is written in the words of the case, so that whoever applies it to the file and checks afresh gets the verdict
that was promised. Changes of one group exclude each other; requirements and facts that nobody can change stay.
"""

from __future__ import annotations

import dataclasses
import functools
import math
import re
from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from typing import Any

from lubecheck.data import bearing_designation, bearings, compatibility, lubricants
from lubecheck.data.bearing_series import of_family
from lubecheck.errors import InputError
from lubecheck.model.entries import TABLES, Case
from lubecheck.model.entry import Amount, entries
from lubecheck.model.glance import Glances
from lubecheck.model.kernel import HEAT_LIMITS
from lubecheck.model.limits import BEYOND, NEAR, NEAR_CODE
from lubecheck.model.reader import read_value
from lubecheck.model.rows import running_hours
from lubecheck.physics import clearance, fatigue, grease_life, oil_life
from lubecheck.units import KINDS, UnreadableText

# A key of the case ("grease.fill", "duty[2].draught") with its new text, or None to take it out; a whole table
# ("lubricant", "bearing") with its new keys.
Edit = tuple[str, "str | Mapping[str, str] | None"]

SETTING, SWAP, TEST, REBUILD, REPLACE = range(1, 6)  # effort: a setting or dose, a swap, one to test, works, a new part
INTERVAL_SHARES = (0.95, 0.9, 0.85, 0.8, 0.7, 0.6, 0.5, 0.35, 0.25, 0.15, 0.1, 0.05)
DRAUGHTS = (1.0, 2.0, 3.0, 5.0)  # m/s: a vent, a fan cover taken off, a fan
SHIELDS = (10.0, 20.0, 30.0)  # K off the shaft's temperature: flinger disc, heat shield, cooling disc; estimate
FLOWS = (1.5, 2.0, 3.0)  # times the oil flow
COOLED = (5.0, 10.0, 20.0)  # K off the oil inlet
MORE_COOLING = (1.25, 1.5, 2.0)  # times a stated conductance
STREAMS = (10.0, 30.0, 100.0)  # times the flow that wets a bearing, so that the oil carries heat: estimate
LEAST_STREAM = 0.05  # l/min that a valve can still be set to: estimate
WARM_INLET = 40.0  # degC, of oil that comes from a cooler: common practice, 40 to 50
COOLER_MARGIN = 10.0  # K that a cooler leaves between oil and air: common practice, 8 to 15
COIL_FLOWS = (2.0, 5.0, 10.0)  # l/min of water through a cooling coil or jacket: common practice, 2 to 10
COIL_INLET = 30.0  # degC, of a plant's cooling water in summer: common practice, 20 to 32
TANK_MINUTES = 10.0  # of the flow that the tank holds: common practice, 5 to 10


@dataclass(frozen=True, slots=True)
class Change:
    """One thing to change: in words, as edits, with its effort and what has to be warned of."""

    words: str
    group: str
    effort: int
    edits: tuple[Edit, ...]
    warning: str = ""
    grade: str = ""  # what it is a step of, where it is one of several: only the mildest step that cures is offered
    step: int = 0  # its place among them, the mildest first


def apply(case: Case, *changes: Change) -> Case:
    """Return a case with changes made, each value read as the case reader reads it."""
    for change in changes:
        for key, value in change.edits:
            case = _edited(case, key, value)
    return case


def _edited(case: Case, key: str, value: str | Mapping[str, str] | None) -> Case:
    if isinstance(value, Mapping):
        words = tuple(value.items())
        if key == "lubricant":
            return dataclasses.replace(case, lubricant=_lubricant(*words), analysis=None)  # it was of the old one
        return dataclasses.replace(case, bearing=_bearing(*words))
    table, _, name = key.partition(".")
    if table == "bearing" and value is not None:
        return dataclasses.replace(case, bearing=_of_class(case.bearing, name, value))
    number = _NUMBERED.fullmatch(table)
    kind = number[1] if number else table
    read: Any = None if value is None else _read(kind, name, value)
    if number or kind == "measured":
        i = int(number[2]) - 1 if number else 0
        parts = getattr(case, kind)
        changed_part = dataclasses.replace(parts[i], **{name: read})
        whole: Any = (*parts[:i], changed_part, *parts[i + 1 :])
        return dataclasses.replace(case, **{kind: whole})
    changed: Any = dataclasses.replace(getattr(case, table), **{name: read})
    return dataclasses.replace(case, **{table: changed})


# A change meets every other in a pair, so what its text says is read once.
_NUMBERED = re.compile(r"(duty|measured)\[(\d+)\]")
_read = functools.lru_cache(1000)(read_value)


@functools.lru_cache(500)
def _lubricant(*words: tuple[str, str]) -> lubricants.Lubricant:
    return lubricants.find(dict(words)["name"])


@functools.lru_cache(100)
def _bearing(*words: tuple[str, str]) -> bearings.Bearing:
    given = {name: text for name, text in words if name != "designation"}
    return bearings.with_given(bearings.find(dict(words)["designation"]), **given)


def _of_class(bearing: bearings.Bearing, name: str, text: str) -> bearings.Bearing:
    """Return the same bearing with another clearance class, said by its designation or by its own key."""
    if name == "designation":
        named = bearings.find(text)
        return dataclasses.replace(bearing, designation=named.designation, clearance=named.clearance)
    return bearings.with_given(bearing, **{name: _read("bearing", name, text)})


def possible(case: Case, before: Glances) -> list[Change]:
    """Return the single changes that make sense at a position; `before` is its outcome as it stands."""
    found = [*_surroundings(case), *_heat(case), *_lubricants(case), *_classes(case, before), *_bearings(case)]
    found += [*_grease(case, before), *_intervals(case, before)] if case.is_grease else [
        *_oil(case), *_coils(case, before), *_streams(case, before), *_intervals(case, before)]  # fmt: skip
    return [change for change in found if _is_sound(case, change)]


def _is_sound(case: Case, change: Change) -> bool:
    """Tell whether a case file may say what the change says: a multiple of a value can leave the accepted range."""
    try:
        apply(case, change)
    except (UnreadableText, InputError):
        return False
    return True


def _fails(before: Glances, *names: str) -> bool:
    """Tell whether one of some limits is near or beyond as the position stands."""
    rows = [before.outcome.names.index(name) for name in names]
    return any(before.states[i, 0] in (NEAR_CODE, BEYOND) for i in rows)


def _lubricants(case: Case) -> Iterator[Change]:
    """Every lubricant of the tables of the same kind, with what it means to bring it in."""
    for key in lubricants.names(case.lubricant.kind):
        new = _lubricant(("name", key))
        if compatibility.is_same(case.lubricant, new):
            continue
        meeting = compatibility.meet(case.lubricant, new)
        warning = {
            "mixes": "",
            "test first": f"test the mixture first: {meeting.reason}",
            "not known": f"not known whether they mix, so clean the old one out: {meeting.reason}",
            "do not mix": f"does not mix with the old one, clean it out wholly: {meeting.reason}",
        }[meeting.state]
        verb = "purge" if new.kind == "grease" else "drain"
        warning = warning or f"{verb} the old one: {meeting.reason}"
        harmed = _harmed(case, new)
        effort = {"mixes": SWAP, "test first": TEST}.get(meeting.state, REBUILD)
        same = new.thickener == case.lubricant.thickener and new.base_oil == case.lubricant.base_oil
        way = "grade " + ("up" if new.nu_40 > case.lubricant.nu_40 else "down") if same else f"other {new.kind}"
        yield Change(
            f"{way}: {new.name}", "lubricant", effort, (("lubricant", {"name": key}),),
            "; ".join([warning, *harmed]),
        )  # fmt: skip


def _harmed(case: Case, new: lubricants.Lubricant) -> list[str]:
    """Say which parts of the bearing the new lubricant has to be held against."""
    cells = []
    if case.bearing.seal == "contact seals" and new.base_oil != case.lubricant.base_oil:
        cells.append(compatibility.of("seal", new.base_oil, "NBR"))
    if case.bearing.cage == "brass" and new.ep and not case.lubricant.ep:
        cells.append(compatibility.metal(new, "brass"))
    return [compatibility.words(cell) for cell in cells if cell.gravity > 0]


def _grease(case: Case, before: Glances) -> Iterator[Change]:
    if case.bearing.sealed_sides == 2 or before.outcome.points.is_sealed[0] > 0:
        return
    proposed = round(float(before.outcome.points.proposed_fill[0]) * 100)
    least = round(100 * float(before.outcome.points.proposed_fill[0]) * 0.85)
    for step, share in enumerate(sorted({proposed, least}, reverse=True)):
        yield Change(f"clean the bearing and fill it anew to {share} % of its free volume, the housing to 30 %", "fill",
                     SWAP, (("grease.fill", f"{share} %"), ("grease.housing_fill", "30 %")), grade="fill",
                     step=step)  # fmt: skip
    if case.housing.relief != "open":
        yield Change("open a way out for surplus grease (relief or drain plug)", "relief", SETTING,
                     (("housing.relief", "open"),))  # fmt: skip
    dose = float(before.outcome.proposed_regrease[0])
    if case.grease.regrease_amount is not None:
        yield Change(f"give {dose:.3g} g at each regreasing", "dose", SETTING,
                     (("grease.regrease_amount", f"{dose:.3g} g"),))  # fmt: skip


def _intervals(case: Case, before: Glances) -> Iterator[Change]:
    table = "grease" if case.is_grease else "oil"
    plan = case.grease if case.is_grease else case.oil
    outcome = before.outcome
    if not before.applies[outcome.names.index("interval"), 0]:
        return
    if case.is_grease and outcome.points.is_sealed[0] > 0:
        if plan.interval is not None:
            yield Change("do not regrease: the bearing is closed on both sides", "interval", SETTING,
                         ((f"{table}.interval", None), ("grease.regrease_amount", None)))  # fmt: skip
        return
    now, per_day = float(outcome.interval[0]), float(outcome.points.hours_per_day[0])
    if not math.isfinite(now):
        return
    wanted = {share * now for share in INTERVAL_SHARES}
    wanted |= {float(hours) for hours in outcome.proposed_interval[:2] if 0 < hours < now}
    # The longest that is within, at the usual reading of what was not said and at its worst.
    wanted |= {NEAR * float(hours) for hours in outcome.allowed_interval[:2] if 0 < NEAR * hours < now}
    texts: dict[str, None] = {}
    for hours in sorted(wanted, reverse=True):
        weeks = math.floor(hours / (7 * per_day) + 1e-9)
        text = f"{weeks} week" if weeks >= 1 else f"{math.floor(hours)} h"
        if hours >= 1 and running_hours(_amount(table, text), per_day) < now:
            texts[text] = None
    verb = "regrease" if case.is_grease else "change the oil"
    for step, text in enumerate(texts):
        yield Change(f"{verb} every {_plural(text)}", "interval", SETTING, ((f"{table}.interval", text),),
                     grade="interval", step=step)  # fmt: skip


def _plural(time: str) -> str:
    return f"{time}s" if time.endswith("week") and not time.startswith("1 ") else time


def _amount(table: str, text: str) -> Amount:
    amount: Amount = read_value(table, "interval", text)
    return amount


def _oil(case: Case) -> Iterator[Change]:
    oil = case.oil
    if oil.level is not None and oil.level != 0 and oil.supply in (None, "bath"):
        yield Change("set the oil level to the middle of the lowest element at rest", "supply", SETTING,
                     (("oil.level", "0 mm"),))  # fmt: skip
    if oil.flow is not None and oil.supply == "circulating":
        for step, times in enumerate(FLOWS):
            flow = f"{oil.flow * times:.4g} {_unit('oil', 'flow')}"
            yield Change(f"oil flow {flow} ({times:g} times)", "flow", REBUILD, (("oil.flow", flow),), grade="flow",
                         step=step)  # fmt: skip
    if oil.inlet is not None and oil.supply == "circulating":
        for step, less in enumerate(COOLED):
            if oil.inlet - less > case.surroundings.ambient:
                inlet = f"{oil.inlet - less:g} degC"
                yield Change(f"cool the oil to {inlet} at the inlet", "inlet", REBUILD, (("oil.inlet", inlet),),
                             grade="inlet", step=step)  # fmt: skip


def usual_inlet(case: Case) -> float:
    """Return the inlet temperature in degC of oil that comes from a cooler in the warmest air of a case."""
    around = case.surroundings
    air = max(one for one in (around.ambient, around.ambient_highest, *(around.months or ()),
                              *(duty.ambient for duty in case.duty)) if one is not None)  # fmt: skip
    return max(WARM_INLET, math.ceil(air + COOLER_MARGIN))


def _streams(case: Case, before: Glances) -> Iterator[Change]:
    """Oil that circulates through a cooler in place of a bath that is too hot."""
    oil, bearing = case.oil, case.bearing
    if oil.supply not in (None, "bath") or bearing.sealed_sides == 2 or not _fails(before, *HEAT_LIMITS):
        return
    inlet = f"{usual_inlet(case):g} degC"
    wetting = float(oil_life.guide_flow.plain(outside=bearing.outside, width=bearing.width))
    flows = dict.fromkeys(float(f"{max(times * wetting, LEAST_STREAM):.2g}") for times in STREAMS)
    for step, flow in enumerate(flows):
        edits: list[Edit] = [("oil.supply", "circulating"), ("oil.flow", f"{flow:g} {_unit('oil', 'flow')}"),
                             ("oil.inlet", inlet)]  # fmt: skip
        edits += [("oil.level", None)] if oil.level is not None else []
        tank = f"{TANK_MINUTES * flow:.2g} l"
        edits += [("oil.volume", tank)] if oil.volume is not None else []  # no longer that of the bath
        yield Change(
            f"circulate the oil in place of the bath: {flow:g} l/min, {inlet} at the inlet", "supply", REPLACE,
            tuple(edits), f"takes a pump, a cooler, a tank of about {tank} and a wide, free drain", "stream", step,
        )  # fmt: skip


def _coils(case: Case, before: Glances) -> Iterator[Change]:
    """Water in a coil or jacket that cools a bath that is too hot."""
    housing = case.housing
    is_bath = case.oil.supply in (None, "bath") and case.bearing.sealed_sides < 2
    if (
        not is_bath
        or housing.coolant is not None
        or housing.conductance is not None
        or not _fails(before, *HEAT_LIMITS)
    ):
        return
    for step, flow in enumerate(COIL_FLOWS):
        edits: tuple[Edit, ...] = (
            ("housing.coolant", "water"),
            ("housing.coolant_flow", f"{flow:g} {_unit('housing', 'coolant_flow')}"),
            ("housing.coolant_inlet", f"{COIL_INLET:g} degC"),
        )
        yield Change(
            f"cool the bath by a coil or jacket with {flow:g} l/min of water at {COIL_INLET:g} degC", "coolant",
            REBUILD, edits, "mind leaks: water in the oil ruins it; shut the water off at standstill", "coil", step,
        )  # fmt: skip


def _unit(table: str, key: str) -> str:
    return KINDS[dict(entries(TABLES[table]))[key].kinds[0]].unit


def _surroundings(case: Case) -> Iterator[Change]:
    around = case.surroundings
    for key, answers in (("dust", grease_life.DUST), ("water", grease_life.WATER)):
        words = [answer.word for answer in answers]
        word = getattr(around, key)
        if case.is_grease and word is not None:
            for step, better in enumerate(reversed(words[: words.index(word)])):
                yield Change(
                    f"keep {key} out with a cover or a better seal: {key} {better}",
                    key,
                    TEST,
                    ((f"surroundings.{key}", better),),
                    grade=key,
                    step=step,
                )
    setting = case.cleanliness.setting
    if setting is not None:
        circuit = setting.partition(" -/")[0] if " -/" in setting else ""
        alike = [one for one in fatigue.SETTINGS if (one.partition(" -/")[0] if " -/" in one else "") == circuit]
        for step, cleaner in enumerate(reversed(alike[: alike.index(setting)])):
            verb = "keep the grease, the gun and the seals cleaner" if case.is_grease else "filter the oil"
            yield Change(f"{verb}: cleanliness {cleaner}", "cleanliness", TEST,
                         (("cleanliness.setting", cleaner),), grade="cleanliness", step=step)  # fmt: skip


def _heat(case: Case) -> Iterator[Change]:
    housing, around = case.housing, case.surroundings
    if housing.conductance is None:
        for step, speed in enumerate(DRAUGHTS):
            blown: list[Edit] = [("surroundings.draught", f"{speed:g} m/s")] if (around.draught or 0.0) < speed else []
            blown += [(f"duty[{i}].draught", f"{speed:g} m/s") for i, duty in enumerate(case.duty, start=1)
                      if duty.draught is not None and duty.draught < speed]  # fmt: skip
            if blown:
                yield Change(f"draught of {speed:g} m/s at the housing", "cooling", REBUILD, tuple(blown),
                             grade="draught", step=step)  # fmt: skip
    else:
        for step, times in enumerate(MORE_COOLING):
            text = f"{housing.conductance * times:.4g} {_unit('housing', 'conductance')}"
            yield Change(f"cool the housing better: {text} ({times:g} times)", "cooling", REBUILD,
                         (("housing.conductance", text),), grade="conductance", step=step)  # fmt: skip
    if housing.machine_heat:
        for step, share in enumerate((0.5, 0.25)):
            text = f"{housing.machine_heat * share:.4g} W"
            yield Change(f"shield against the machine's heat: {text} left", "shield", REBUILD,
                         (("housing.machine_heat", text),), grade="machine heat", step=step)  # fmt: skip
    for step, less in enumerate(SHIELDS):
        edits: list[Edit | None] = []
        if housing.shaft_temperature is not None:
            edits.append(_shielded("housing", housing.shaft_temperature, less, around.ambient))
        edits += [_shielded(f"duty[{i}]", duty.shaft_temperature, less,
                            around.ambient if duty.ambient is None else duty.ambient)
                  for i, duty in enumerate(case.duty, start=1) if duty.shaft_temperature is not None]  # fmt: skip
        kept = tuple(edit for edit in edits if edit is not None)
        if kept:
            yield Change(f"shield against heat along the shaft (disc, shield): {less:g} K less", "shield", REBUILD,
                         kept, grade="shaft heat", step=step)  # fmt: skip


def _shielded(table: str, now: float, less: float, ambient: float) -> Edit | None:
    return (f"{table}.shaft_temperature", f"{max(now - less, ambient):g} degC") if now > ambient else None


def _classes(case: Case, before: Glances) -> Iterator[Change]:
    """The same bearing with the next two larger clearance classes, where fits and warmth take too much of its own."""
    bearing = case.bearing
    if not _fails(before, "clearance"):
        return
    place = clearance.CLASSES.index(bearing.clearance) + 1
    for larger, effort in zip(clearance.CLASSES[place:], (REBUILD, REPLACE), strict=False):
        edits = _class_edits(case, larger)
        stock = ", seldom in stock" if larger in ("C4", "C5") else ""
        if edits:
            yield Change(
                f"same bearing with clearance class {larger} for {bearing.clearance}", "bearing",
                effort, edits,
                f"order it anew in this class{stock}: it has more play when cold, so mind noise and position",
            )  # fmt: skip


# What names the clearance class in a designation: "C3", or the 3 of "P63", the tolerance class P6 and C3 in one.
_CLASS = re.compile(r"(?<=P[654])[2-5]|C[2-5N0M]", re.IGNORECASE)


def _class_edits(case: Case, larger: str) -> tuple[Edit, ...]:
    """Return what the case file has to say, none where a designation that names a class cannot name this one."""
    key: Edit = ("bearing.clearance", larger)
    stated = next((text for name, text in case.given if name == "bearing.designation"), case.bearing.designation or "")
    old = bearing_designation.read(stated)
    if old is None or "clearance" not in old.says:
        return (key,)
    wanted = (old.base, {**old.says, "clearance": larger}, old.unread)
    for found in _CLASS.finditer(stated):
        word = larger.removeprefix("C") if found[0].isdigit() else larger
        text = stated[: found.start()] + word + stated[found.end() :]
        new = bearing_designation.read(text)
        if new is not None and (new.base, new.says, new.unread) == wanted:
            is_stated = case.bearing.basis.get("clearance") == "user"
            return (("bearing.designation", text), *((key,) if is_stated else ()))
    return ()


def _bearings(case: Case) -> Iterator[Change]:
    """Heavier series of the same bore, with the suffixes of the old one and what was stated of it."""
    old = case.bearing
    read = bearing_designation.read(old.designation) if old.designation else None
    if read is None or old.arrangement != "single":
        return
    suffix = old.designation[len(read.base) :]
    stated = {key: getattr(old, key) for key in ("seal", "clearance", "cage") if old.basis.get(key) == "user"}
    for series in of_family(old.family):
        boundary = series.boundaries().get(old.bore)
        if boundary is None or boundary.outside <= old.outside or boundary.width < old.width:
            continue
        name = series.name(old.bore) + suffix
        try:
            bigger = bearings.find(name)
        except InputError:  # a suffix that the heavier series does not have
            continue
        if bigger.dynamic_rating > old.dynamic_rating and bigger.family == old.family and not bigger.unread:
            yield Change(f"bigger bearing: {name} ({bigger.outside:g} x {bigger.width:g} mm), ratings estimated",
                         "bearing", REPLACE, (("bearing", {"designation": name, **stated}),),
                         "shaft, housing and seals have to be made to fit")  # fmt: skip
