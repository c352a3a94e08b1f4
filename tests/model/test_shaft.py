"""Loads that the case does not state: by statics, by opposed bearings; the preload that cures; rapid starts."""

from __future__ import annotations

import math
import re

import pytest
from conftest import BASE, EXAMPLES, with_key

import lubecheck
from lubecheck.errors import CaseError
from lubecheck.model.reader import read_case

# BASE with its radial load from statics: 60 kg in the middle between two bearings, a level belt 100 mm outside.
FORCES = {"span": '"500 mm"', "rotor_weight": '"600 N"', "rotor_at": '"250 mm"', "belt_pull": '"1.5 kN"',
          "belt_at": '"-100 mm"', "belt_direction": '"90 deg"'}  # fmt: skip
PLAIN = with_key(BASE, "duty", "radial_load", None)
for _key in ("dynamic_rating", "static_rating", "mass", "cage"):
    PLAIN = with_key(PLAIN, "bearing", _key, None)


def with_shaft(text: str = PLAIN, table: str = "shaft", **keys: str) -> str:
    for key, value in {**FORCES, **keys}.items():
        text = with_key(text, table, key, value) if value else text
    return text


def tapered(**keys: str) -> str:
    text = with_key(BASE, "bearing", "designation", '"30213"')
    for key in ("dynamic_rating", "static_rating", "mass"):
        text = with_key(text, "bearing", key, None)
    for key, value in keys.items():
        table = "shaft" if key == "opposed" else "duty"
        text = with_key(text, table, key, value)
    return text


def load(result, name):
    return result.loads.figures[name].value


def faults(text):
    with pytest.raises(CaseError) as caught:
        read_case(text)
    return {fault.key: str(fault) for fault in caught.value.faults}


def test_the_radial_load_follows_from_the_forces():
    """By hand: the belt presses with 1500 (1 + 100/500) = 1800 N level, the rotor with 300 N down: 1824.8 N.

    The other bearing: 300 N down, 1500 100/500 = 300 N the other way: 424.3 N.
    """
    result = lubecheck.check(read_case(with_shaft()))
    assert load(result, "radial_load") == pytest.approx(math.hypot(1800, 300))
    assert load(result, "other_radial_load") == pytest.approx(math.hypot(300, 300))
    assert any("by statics: 1825 N (300 N down, 1800 N across)" in note for note in result.notes)


@pytest.mark.parametrize(
    ("keys", "radial"),
    [
        ({"belt_direction": '"0 deg"'}, 2100),
        ({"belt_direction": '"180 deg"'}, 1500),
        ({"rotor_weight": '"61.18297 kg"'}, math.hypot(1800, 300)),  # 600 N over 9.80665 m/s^2
        ({"rotor_at": '"-150 mm"'}, math.hypot(1800, 600 * 1.3)),  # overhung on this side
        ({"rotor_at": '"650 mm"'}, math.hypot(1800, 600 * 0.3)),  # an overhung fan beyond the other bearing
        ({"coupling_weight": '"100 N"', "coupling_at": '"-250 mm"'}, math.hypot(1800, 450)),
    ],
)
def test_belt_coupling_and_overhung_rotor(keys, radial):
    result = lubecheck.check(read_case(with_shaft(**keys)))
    assert load(result, "radial_load") == pytest.approx(radial, rel=1e-6)


def test_the_keys_stand_in_the_duty_as_well_and_go_before_those_of_the_shaft():
    in_duty = lubecheck.check(read_case(with_shaft(table="duty")))
    in_shaft = lubecheck.check(read_case(with_shaft()))
    assert load(in_duty, "radial_load") == load(in_shaft, "radial_load")
    tight = with_key(with_shaft(), "duty", "belt_pull", '"3 kN"')
    assert load(lubecheck.check(read_case(tight)), "radial_load") == pytest.approx(math.hypot(3600, 300))


def test_statics_and_the_stated_load_give_the_same_verdict():
    by_statics = lubecheck.check(read_case(with_shaft()))
    text = with_key(PLAIN, "duty", "radial_load", f'"{math.hypot(1800, 300)!r} N"')
    by_load = lubecheck.check(read_case(text))
    assert [limit.use for limit in by_statics.limits] == pytest.approx([limit.use for limit in by_load.limits])


def test_load_and_forces_together_are_refused():
    found = faults(with_key(with_shaft(), "duty", "radial_load", '"1.9 kN"'))
    assert list(found) == ["duty[1].radial_load"]
    assert "both say the load" in found["duty[1].radial_load"]


@pytest.mark.parametrize("key", FORCES)
def test_forces_half_said_are_refused(key):
    keys = {name: value for name, value in FORCES.items() if name != key}
    text = PLAIN
    for name, value in keys.items():
        text = with_key(text, "shaft", name, value)
    assert f"shaft.{key}" in faults(text)


def test_a_weight_on_a_vertical_shaft_is_refused():
    assert "shaft.rotor_weight" in faults(with_key(with_shaft(), "surroundings", "orientation", '"vertical"'))


def test_forces_that_cancel_are_no_load_at_all():
    text = with_key(PLAIN, "duty", "axial_load", '"0 N"')
    for key, value in {"span": '"500 mm"', "rotor_weight": '"600 N"', "rotor_at": '"500 mm"'}.items():
        text = with_key(text, "shaft", key, value)
    assert "no load at all" in faults(text)["duty[1].radial_load"]


def test_a_misspelled_key_of_the_shaft_names_the_nearest():
    assert "nearest: belt_pull" in faults(with_shaft(belt_pul='"1 kN"'))["shaft.belt_pul"]


def test_the_thrust_of_the_opposed_bearing_counts():
    """30213, 15.1 deg: Y 0.4 cot a. Own thrust 1900/(2 Y), the other's 4000/(2 Y) with the same bearing."""
    result = lubecheck.check(read_case(tapered(opposed='"same"', opposed_radial_load='"4 kN"', axial_load='"500 N"')))
    angle = read_case(tapered()).bearing.contact_angle
    thrust = 4000 / (2 * 0.4 / math.tan(math.radians(angle)))
    assert load(result, "axial_load") == pytest.approx(500 + thrust)
    assert load(result, "induced_thrust") == pytest.approx(thrust * 1.9 / 4)
    away = lubecheck.check(read_case(tapered(opposed='"same"', opposed_radial_load='"4 kN"', axial_load='"-9 kN"')))
    assert load(away, "axial_load") == pytest.approx(thrust * 1.9 / 4)


def test_by_statics_a_tapered_bearing_needs_its_opposed_one():
    text = with_key(tapered(), "duty", "radial_load", None)
    for key, value in FORCES.items():
        text = with_key(text, "shaft", key, value)
    assert "shaft.opposed" in faults(text)
    result = lubecheck.check(read_case(with_key(text, "shaft", "opposed", '"30212"')))
    assert load(result, "other_radial_load") == pytest.approx(math.hypot(300, 300))
    # what this radial load of 1825 N sets free is more than the other's thrust, of 424 N, and the 250 N of the shaft
    assert load(result, "axial_load") == load(result, "induced_thrust")
    pushed = with_key(with_key(text, "shaft", "opposed", '"30212"'), "duty", "axial_load", '"2 kN"')
    assert load(lubecheck.check(read_case(pushed)), "axial_load") > 2000


def test_alone_a_tapered_bearing_carries_no_less_than_its_own_thrust():
    result = lubecheck.check(read_case(tapered(axial_load='"10 N"')))
    assert load(result, "axial_load") == pytest.approx(load(result, "induced_thrust"))
    assert any("[shaft] opposed" in note for note in result.notes)


@pytest.mark.parametrize(
    ("text", "key"),
    [
        (tapered(opposed='"30213"'), "duty[1].opposed_radial_load"),
        (tapered(opposed_radial_load='"2 kN"'), "shaft.opposed"),
        (tapered(opposed='"6213"', opposed_radial_load='"2 kN"'), "shaft.opposed"),
        (tapered(opposed='"30291"', opposed_radial_load='"2 kN"'), "shaft.opposed"),
        (with_key(with_key(BASE, "duty", "opposed_radial_load", '"2 kN"'), "shaft", "opposed", '"30213"'),
         "shaft.opposed"),
    ],
)  # fmt: skip
def test_opposed_bearings_that_do_not_fit_are_refused(text, key):
    assert key in faults(text)


@pytest.mark.parametrize("name", ["7309 B", "30309"])
@pytest.mark.parametrize("pair", ["DB", "DF"])
def test_a_matched_pair_counts_as_one_bearing_of_two_rows(name, pair):
    def result(designation):
        text = tapered()
        return lubecheck.check(read_case(with_key(text, "bearing", "designation", f'"{designation}"')))

    one, two = result(name), result(f"{name} {pair}")
    assert two.loads.figures["minimum_load"].value > 1.5 * one.loads.figures["minimum_load"].value
    assert two.loads.figures["induced_thrust"].value is None
    assert one.loads.figures["induced_thrust"].value > 0


@pytest.mark.parametrize("designation", ["6309", "7309 B", "2309", "30309", "22309", "3309", "QJ 309"])
def test_the_preload_of_the_note_cures_a_load_that_is_too_small(designation):
    text = with_key(PLAIN, "bearing", "designation", f'"{designation}"')
    text = with_key(with_key(text, "duty", "radial_load", '"90 N"'), "duty", "axial_load", '"20 N"')
    before = lubecheck.check(read_case(text))
    assert before.limit("minimum_load").state == "beyond"
    preload, axial = load(before, "needed_preload"), load(before, "axial_load")
    assert f"axial preload of {preload:.0f} N" in before.limit("minimum_load").note
    cured = with_key(text, "duty", "axial_load", f'"{axial + preload!r} N"')
    assert lubecheck.check(read_case(cured)).limit("minimum_load").use == pytest.approx(1.0, rel=1e-6)


def test_no_preload_cures_a_cylindrical_roller_bearing():
    text = with_key(with_key(PLAIN, "bearing", "designation", '"NU 309"'), "duty", "radial_load", '"90 N"')
    result = lubecheck.check(read_case(with_key(text, "duty", "axial_load", '"0 N"')))
    assert result.limit("minimum_load").state == "beyond"
    assert load(result, "needed_preload") is None
    assert "no axial preload helps" in result.limit("minimum_load").note


def test_a_load_that_is_enough_needs_no_preload():
    assert load(lubecheck.check(read_case(BASE)), "needed_preload") == 0


SHAKEN = with_key(with_key(BASE, "duty", "radial_load", '"600 N"'), "duty", "axial_load", '"0 N"')


@pytest.mark.parametrize(
    ("value", "demand"),
    [('"2 s"', 1480 * math.pi / 30 / 2), ('"100 rad/s^2"', 100.0), ('"50 rpm/s"', 50 * math.pi / 30)],
)
def test_a_start_is_stated_as_time_or_as_angular_acceleration(value, demand):
    limit = lubecheck.check(read_case(with_key(BASE, "duty", "acceleration", value))).limit("acceleration")
    assert limit.demand == pytest.approx(demand)
    assert limit.unit == "rad/s^2"
    assert limit.use == pytest.approx(limit.demand / limit.allowed)
    assert limit.state == "within"


def test_a_start_that_the_elements_cannot_follow_is_beyond():
    text = with_key(SHAKEN, "duty", "radial_load", '"60 N"')
    limit = lubecheck.check(read_case(with_key(text, "duty", "acceleration", '"0.08 s"'))).limit("acceleration")
    assert limit.state == "beyond"
    assert "may slide at every start" in limit.note


def test_a_start_that_nobody_stated_is_judged_at_the_shortest_that_a_case_may_state():
    light = with_key(SHAKEN, "duty", "radial_load", '"60 N"')
    silent = lubecheck.check(read_case(light))
    assert silent.limit("acceleration").state == "unknown"
    assert "[[duty]] acceleration" in silent.limit("acceleration").note
    assert any(item.name == "[[duty]] acceleration" for item in silent.assumed)
    shortest = 1e-3 * 72.5
    stated = lubecheck.check(read_case(with_key(light, "duty", "acceleration", f'"{shortest!r} s"')))
    worst = re.search(r"use at the worst reading: ([\d.]+)", silent.limit("acceleration").note)
    assert stated.limit("acceleration").use == pytest.approx(float(worst[1]), abs=0.005)
    assert "is a shock" not in str(stated)
    assert (
        "a shock and not a start" in faults(with_key(light, "duty", "acceleration", '"0.05 s"'))["duty[1].acceleration"]
    )


def test_speeds_are_told_beside_the_limit():
    result = lubecheck.check(lubecheck.load_case(EXAMPLES / "pinion_shaft.toml"))
    speeds = {name: figure.value for name, figure in result.speeds.figures.items()}
    assert all(value > 0 for value in speeds.values())
    assert result.limit("speed").allowed == min(speeds["lubricant_limit"], speeds["kinematic_limit"])


def test_a_speed_above_the_thermally_safe_one_says_to_look_at_the_temperature():
    text = with_key((EXAMPLES / "pinion_shaft.toml").read_text(encoding="utf-8"), "duty", "speed", '"3750 rpm"')
    result = lubecheck.check(read_case(text))
    assert "thermally safe speed of DIN 732" in result.limit("speed").note


def test_contact_seals_and_a_missing_cage_set_the_kinematic_limit():
    plain = lubecheck.check(read_case(BASE)).speeds.figures
    sealed = BASE.replace('designation = "6309"', 'designation = "6309-2RS"')
    sealed_limit = lubecheck.check(read_case(sealed)).limit("speed")
    rubbing = 45 + 0.25 * 55  # the shoulder of the inner ring: a quarter of the section height
    assert sealed_limit.allowed == pytest.approx(13.5 * 60_000 / (math.pi * rubbing))
    assert "cage or contact seals" in sealed_limit.note
    without = with_key(BASE, "bearing", "cage", '"full complement"')
    limit = lubecheck.check(read_case(without)).limit("speed")
    assert limit.allowed == pytest.approx(0.4 * plain["kinematic_limit"].value)


GRAVITY = {"within": 0, "near": 1, "unknown": 2, "beyond": 2}
TAKEN = [
    *((with_shaft(), table, key) for table, key in (("shaft", key) for key in FORCES)),
    (with_key(with_shaft(), "duty", "acceleration", '"0.1 s"'), "duty", "acceleration"),
    (with_key(SHAKEN, "duty", "acceleration", '"0.0725 s"'), "duty", "acceleration"),
    (tapered(opposed='"30213"', opposed_radial_load='"9 kN"'), "shaft", "opposed"),
    (tapered(opposed='"30213"', opposed_radial_load='"9 kN"'), "duty", "opposed_radial_load"),
    (with_shaft(coupling_weight='"100 N"', coupling_at='"-250 mm"'), "shaft", "coupling_weight"),
]


@pytest.mark.parametrize(("text", "table", "key"), TAKEN)
def test_taking_a_fact_of_the_loads_away_never_improves_the_verdict(text, table, key):
    before = lubecheck.check(read_case(text))
    try:
        after = lubecheck.check(read_case(with_key(text, table, key, None)))
    except CaseError:
        return  # half said: refused
    for limit in before.limits:
        assert GRAVITY[after.limit(limit.name).state] >= GRAVITY[limit.state], limit.name
