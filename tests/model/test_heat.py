"""The heat balance: two rings, every path, one root or the hottest of several, and what each way of cooling does."""

from __future__ import annotations

import dataclasses
import re

import numpy as np
import pytest
from conftest import BASE, EXAMPLES, with_key
from positions import points_of, random_rows
from scipy.optimize import brentq

import lubecheck
from lubecheck.faces.record import of_result
from lubecheck.model import equilibrium
from lubecheck.model.balance import PATHS, balance_of
from lubecheck.model.points import Points
from lubecheck.model.reader import load_case, read_case

ROWS = 100_000


@pytest.fixture(scope="module")
def wide() -> Points:
    return random_rows(ROWS)


@pytest.fixture(scope="module")
def solved(wide):
    return equilibrium.solve(wide)


def test_a_hundred_thousand_rows_are_solved_or_proven_to_have_no_state_below_the_top(wide, solved):
    assert (solved.is_found ^ solved.is_too_hot).all()  # no solve that did not end
    lost = np.flatnonzero(~solved.is_found)
    assert 0 < len(lost) < 0.2 * ROWS  # both kinds have to be there
    # What was not found boils over even at the top: with the lubricant there, more heat comes in than leaves.
    for i in lost[:300]:
        balance = balance_of(wide.take([i]))
        rises = np.geomspace(1e-6, equilibrium.TOP_TEMPERATURE - balance.floor[0], 400)
        with np.errstate(all="ignore"):
            heats = [balance.at(np.array([rise])) for rise in rises]
        cool = [h for h in heats if h.lubricant[0] <= equilibrium.TOP_TEMPERATURE]
        assert all(h.heat_in[0] > h.heat_out[0] for h in cool)


def test_the_balance_of_every_node_is_closed(wide, solved):
    s, p = solved, wide
    found = s.is_found
    turnover = sum(np.abs(path) for path in s.paths.values()) + s.friction_power
    whole = sum(s.paths.values()) - s.friction_power - p.machine_heat - p.solar_heat
    assert (np.abs(whole) <= 1e-9 * turnover)[found].all()
    ring = balance_of(p).ring
    inner = ring * (s.temperature - s.inner) + p.machine_heat - s.paths["free_shaft"] - s.paths["machine_shaft"]
    outside = [s.paths[name] for name in ("air", "radiation", "stated", "frame", "coolant")]
    outer = ring * (s.temperature - s.outer) + p.solar_heat - sum(outside)
    flow = turnover + ring * (np.abs(s.temperature) + np.abs(s.inner) + np.abs(s.outer) + 273)
    assert (np.abs(inner) <= 1e-9 * flow)[found].all()
    assert (np.abs(outer) <= 1e-9 * flow)[found].all()


def test_the_paths_that_are_not_there_carry_nothing(wide, solved):
    found = solved.is_found
    theirs = {"frame": "frame_conductance", "coolant": "coolant_conductance", "oil": "oil_conductance",
              "machine_shaft": "shaft_conductance"}  # fmt: skip
    for name, field in theirs.items():
        conductance = getattr(wide, field)
        assert (solved.paths[name][found & (conductance == 0)] == 0).all()
        assert (solved.paths[name][found & (conductance > 0)] != 0).mean() > 0.99
    assert set(solved.paths) == set(PATHS)


# One path open at a time: its conductance, the node it leaves from and the sink it goes to.
ALONE = {
    "stated": ("conductance", "outer", "ambient"),
    "free_shaft": ("fin_conductance", "inner", "ambient"),
    "machine_shaft": ("shaft_conductance", "inner", "shaft_temperature"),
    "frame": ("frame_conductance", "outer", "frame_temperature"),
    "coolant": ("coolant_conductance", "outer", "coolant_inlet"),
    "oil": ("oil_conductance", "temperature", "oil_inlet"),
}


@pytest.mark.parametrize("path", PATHS)
def test_one_path_alone_carries_all_heat_to_a_thousand_millionth(wide, path):
    rows = 2000
    none = np.zeros(rows)
    closed = {field: none for field, _, _ in ALONE.values()} | {"housing_area": np.full(rows, 1e-24)}
    closed["conductance"] = np.full(rows, np.nan)
    first = wide.take(np.arange(rows))
    if path in ALONE:
        closed[ALONE[path][0]] = np.exp(np.random.default_rng(3).uniform(np.log(0.5), np.log(50.0), rows))
    else:
        closed["housing_area"] = first.housing_area
    one = dataclasses.replace(first, **closed)
    state = equilibrium.solve(one)
    found = state.is_found
    assert found.mean() > 0.5
    heat = state.friction_power + one.machine_heat + one.solar_heat
    carried = state.paths[path] if path in ALONE else state.paths["air"] + state.paths["radiation"]
    # What passes is the difference of two temperatures: their own last digits count beside the heat.
    digits = 0.0
    if path in ALONE:
        field, node, sink = ALONE[path]
        conductance = getattr(one, field) * (one.cooling_factor if path in ("stated", "free_shaft") else 1.0)
        by_hand = conductance * (getattr(state, node) - getattr(one, sink))
        digits = 1e-13 * conductance * (np.abs(getattr(one, sink)) + 273)
        assert (np.abs(by_hand - carried) <= 1e-9 * heat + digits)[found].all()
    assert (np.abs(carried - heat) <= 1e-9 * heat + digits)[found].all()


def test_two_nodes_by_hand():
    # Constant conductances and no temperature in friction: a linear network, solved here by its matrix.
    one = points_of("new_motor").changed(
        conductance=2.0, fin_conductance=0.0, shaft_conductance=0.5, shaft_temperature=90.0, f0=1e-12, mixed_factor=0.0,
        machine_heat=3.0, oil_conductance=1.0, oil_inlet=30.0,
    )  # fmt: skip
    state = equilibrium.solve(one)
    g, friction = balance_of(one).ring[0], state.friction_power[0]
    ambient = one.ambient[0]
    matrix = np.array([[g + 0.5, -g, 0.0], [-g, 2 * g + 1.0, -g], [0.0, -g, g + 2.0]])
    heat = np.array([0.5 * 90.0 + 3.0, friction + 30.0, 2.0 * ambient])
    inner, lubricant, outer = np.linalg.solve(matrix, heat)
    assert state.inner[0] == pytest.approx(inner, abs=1e-6)
    assert state.temperature[0] == pytest.approx(lubricant, abs=1e-6)
    assert state.outer[0] == pytest.approx(outer, abs=1e-6)


def test_a_thin_film_can_have_several_states_and_the_hottest_is_taken():
    # A mixed film many times stronger than real, so that heat outruns cooling over a stretch of temperature.
    one = points_of("slow_roller").changed(
        speed=400.0, radial_load=60e3, mixed_factor=25.0, conductance=2.2, fin_conductance=0.0, shaft_conductance=0.0
    )
    found_many = flagged = 0
    for conductance in np.geomspace(2.0, 60.0, 80):
        row = one.changed(conductance=conductance)
        balance = balance_of(row)
        rises = np.geomspace(1e-3, equilibrium.TOP_TEMPERATURE - balance.floor[0], 3000)
        with np.errstate(all="ignore"):
            heat = balance_of(row.take(np.zeros(len(rises), dtype=int))).at(rises)
        short = heat.heat_in > heat.heat_out
        turns = np.flatnonzero(short[:-1] & ~short[1:])  # stable states
        state = equilibrium.solve(row)
        if len(turns) > 1 and heat.lubricant[turns[-1] + 1] < equilibrium.TOP_TEMPERATURE:
            found_many += 1
            flagged += not state.is_only[0]

            def surplus(rise, balance=balance):
                h = balance.at(np.array([rise]))
                return float(h.heat_in[0] - h.heat_out[0])

            root = brentq(surplus, rises[turns[-1]], rises[turns[-1] + 1], xtol=1e-12)
            assert state.outer[0] - balance.floor[0] == pytest.approx(root, abs=1e-5)
    assert found_many > 0 < flagged


def test_hardly_any_ordinary_row_has_more_than_one_state(solved):
    assert solved.is_only.mean() > 0.99


SINKS = ("ambient", "shaft_temperature", "frame_temperature", "coolant_inlet", "oil_inlet")
CONDUCTANCES = ("conductance", "shaft_conductance", "fin_conductance", "frame_conductance", "coolant_conductance",
                "oil_conductance", "housing_area", "draught")  # fmt: skip
SOURCES = ("machine_heat", "solar_heat")


@pytest.mark.parametrize("name", CONDUCTANCES)
def test_more_of_any_conductance_never_heats_where_no_sink_is_warmer_than_another(wide, name):
    cold = dataclasses.replace(wide.take(np.arange(20_000)), **{sink: np.full(20_000, 20.0) for sink in SINKS})
    a = equilibrium.solve(cold)
    b = equilibrium.solve(dataclasses.replace(cold, **{name: getattr(cold, name) * 1.4}))
    found = a.is_found & b.is_found
    assert (b.is_found | ~a.is_found).all()
    for node in ("temperature", "outer"):
        assert (getattr(b, node) <= getattr(a, node) + 1e-6)[found].all()
    assert (b.temperature < a.temperature - 1e-3)[found].any()


@pytest.mark.parametrize("name", SOURCES + SINKS)
def test_more_of_any_source_never_cools(wide, name):
    some = wide.take(np.arange(20_000))
    a = equilibrium.solve(some)
    b = equilibrium.solve(dataclasses.replace(some, **{name: getattr(some, name) + 5}))
    found = a.is_found & b.is_found
    assert (b.temperature >= a.temperature - 1e-6)[found].all()
    assert (b.temperature > a.temperature + 1e-3)[found].any()


def test_the_inner_ring_is_hotter_by_what_handbooks_say_at_the_reference_speed():
    # 5 to 10 K, "more with a hot shaft" (bearing handbooks, from memory); ISO 15312 heat flow, 6309 at about 9000 rpm.
    row = points_of("new_motor").changed(speed=9000.0, shaft_conductance=0.0, ambient=20.0, draught=3.0)
    assert 3.0 < equilibrium.solve(row).excess[0] < 15.0


def result_with(*changes):
    text = BASE
    for table, key, value in changes:
        text = with_key(text, table, key, value)
    return lubecheck.check(read_case(text))


def temperature(*changes) -> float:
    return result_with(*changes).operating.temperature.m_as("degC")


def test_each_way_of_cooling_cools_and_each_source_heats():
    plain = temperature()
    jacket = [("housing", "coolant", '"water"'), ("housing", "coolant_flow", '"4 l/min"'),
              ("housing", "coolant_inlet", '"20 degC"')]  # fmt: skip
    assert temperature(*jacket) < plain - 2
    assert temperature(("housing", "frame_temperature", '"40 degC"')) < plain - 2
    assert temperature(("housing", "frame_temperature", '"90 degC"')) > plain + 2
    assert temperature(("housing", "solar", '"900 W/m^2"')) > plain + 2


def test_a_glycol_of_the_tables_and_one_that_coolprop_is_asked_for_agree():
    def with_fluid(name: str) -> float:
        return temperature(("housing", "coolant", f'"{name}"'), ("housing", "coolant_flow", '"4 l/min"'),
                           ("housing", "coolant_inlet", '"20 degC"'))  # fmt: skip

    assert with_fluid("ethylene glycol 30 %") == pytest.approx(with_fluid("INCOMP::MEG[0.3]"), abs=0.01)


@pytest.mark.parametrize(
    ("changes", "key"),
    [
        ([("housing", "coolant", '"watr"'), ("housing", "coolant_flow", '"4 l/min"'),
          ("housing", "coolant_inlet", '"20 degC"')], "housing.coolant"),
        ([("housing", "coolant", '"water"'), ("housing", "coolant_flow", '"4 l/min"')], "housing.coolant_inlet"),
        ([("housing", "coolant", '"water"'), ("housing", "coolant_flow", '"4 l/min"'),
          ("housing", "coolant_inlet", '"-10 degC"')], "housing.coolant_inlet"),
        ([("housing", "frame_conductance", '"4 W/K"')], "housing.frame_temperature"),
    ],
)  # fmt: skip
def test_a_half_stated_path_is_refused_and_names_its_key(changes, key):
    with pytest.raises(lubecheck.CaseError) as refused:
        result_with(*changes)
    assert key in str(refused.value)


def test_the_record_tells_where_the_heat_goes_and_what_makes_it():
    record = of_result(result_with(("bearing", "designation", '"6309-2RS"'), ("grease", "interval", None)))
    shares = [figure["value"] for figure in record["heat_shares"].values()]
    assert sum(shares) == pytest.approx(1.0)
    causes = ("viscous_power", "load_power", "mixed_film_power", "seal_power", "churning_power")
    operating = record["operating"]
    assert sum(operating[name]["value"] for name in causes) == pytest.approx(operating["friction_power"]["value"])
    assert operating["seal_power"]["value"] > 0
    torques = ("viscous_torque", "load_torque", "mixed_film_torque", "seal_torque", "churning_torque")
    assert sum(operating[name]["value"] for name in torques) == pytest.approx(operating["friction_torque"]["value"])
    heat = {name: figure["value"] for name, figure in record["heat"].items()}
    leaves = sum(heat[name] for name in PATHS)
    assert leaves == pytest.approx(heat["friction"] + heat["machine"] + heat["sun"], rel=1e-9)


def test_both_forms_of_the_load_torque_are_there_and_differ_by_less_than_the_published_spread():
    constant = result_with().operating.load_torque.m
    dependent = result_with(("bearing", "load_torque", '"load dependent"')).operating.load_torque.m
    assert dependent != constant
    assert 0.5 < dependent / constant < 2.0
    text = BASE.replace('"6309"', '"22218"')
    for key in ("dynamic_rating", "static_rating", "mass"):
        text = with_key(text, "bearing", key, None)
    text = with_key(text, "bearing", "load_torque", '"load dependent"')
    with pytest.raises(lubecheck.CaseError, match="constant for spherical roller"):
        read_case(text)


def test_surplus_grease_stays_behind_shields():
    def churned(designation: str) -> float:
        changes = [("bearing", "designation", f'"{designation}"'), ("grease", "fill", '"90 %"'),
                   ("grease", "interval", None)]  # fmt: skip
        return result_with(*changes).operating.churning_power.m

    assert churned("6309") == 0 < churned("6309-Z") < churned("6309-2Z") < churned("6309-2RS")


def test_clearance_is_judged_where_the_fit_is_stated_and_warns_below_zero():
    assert "clearance" not in {limit.name for limit in result_with().limits}
    assert any("shaft_fit" in note for note in result_with().notes)
    wide = result_with(("bearing", "clearance", '"C4"'), ("housing", "shaft_fit", '"k5"')).limit("clearance")
    assert wide.state == "within"
    tight = result_with(("bearing", "clearance", '"C2"'), ("housing", "shaft_fit", '"n6"')).limit("clearance")
    assert tight.state == "beyond"
    assert "below zero" in tight.note
    # 6309, C4: 30 to 51 um (ISO 5753-1, from memory)
    assert wide.allowed == pytest.approx(0.0405)


def test_oil_stays_clear_of_its_flash_point(request):
    oil = lubecheck.check(load_case(EXAMPLES / "oil_bath_pump.toml"))
    limit = oil.limit("flash_point")
    assert limit.demand == pytest.approx(
        max(oil.operating.inner_ring_temperature, oil.operating.outer_ring_temperature, oil.operating.temperature).m_as(
            "degC"
        )
    )
    assert "flash_point" not in {limit.name for limit in result_with().limits}


def test_rings_have_the_limit_of_their_stabilisation():
    plain = result_with().limit("rings")
    stable = result_with(("bearing", "designation", '"6309 S1"')).limit("rings")
    assert (plain.allowed, stable.allowed) == (120.0, 200.0)
    assert plain.demand == pytest.approx(result_with().operating.inner_ring_temperature.m_as("degC"))


def test_an_oil_level_above_the_lowest_element_warms_and_says_so():
    def pump(level: str):
        text = (
            (EXAMPLES / "oil_bath_pump.toml")
            .read_text(encoding="utf-8")
            .replace('level = "0 mm"', f'level = "{level}"')
        )
        return lubecheck.check(read_case(text))

    low, high = pump("0 mm"), pump("60 mm")
    assert high.operating.temperature > low.operating.temperature
    assert any("above the middle" in note for note in high.notes)
    assert not any("above the middle" in note for note in low.notes)


def test_without_a_fit_the_clearance_that_a_usual_one_would_leave_is_told():
    (said,) = (note for note in lubecheck.check(read_case(BASE)).notes if "internal clearance" in note)
    assert "shaft_fit" in said
    told = re.search(r"usual k5 shaft about (-?\d+) um of (\d+)", said)
    stated = lubecheck.check(read_case(with_key(BASE, "housing", "shaft_fit", '"k5"')))
    limit = stated.limit("clearance")
    assert int(told[1]) == round((limit.allowed - limit.demand) * 1000)
    assert int(told[2]) == round(limit.allowed * 1000)
