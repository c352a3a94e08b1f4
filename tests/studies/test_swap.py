"""swap: the candidate is judged as check would judge it, the meeting and the mixture on the way with it."""

from __future__ import annotations

import dataclasses
import itertools
import random
import runpy

import numpy as np
import pytest
from conftest import BASE, EXAMPLES, with_key
from hypothesis import given, settings
from hypothesis import strategies as st

import lubecheck
from lubecheck.data import lubricants
from lubecheck.errors import InputError
from lubecheck.model.check import check
from lubecheck.model.glance import glances
from lubecheck.model.reader import load_case, read_case
from lubecheck.physics import viscosity
from lubecheck.studies.calibrate import calibrated
from lubecheck.studies.mixture import SHARES
from lubecheck.studies.plant import fewest, plant
from lubecheck.studies.swap import swap, swaps

SWAPS = EXAMPLES / "swap"
MADE = runpy.run_path(str(SWAPS / "make_outputs.py"), run_name="outputs")


@pytest.mark.parametrize("name", MADE["TO"])
def test_the_example_prints_what_stands_beside_it(name):
    assert (SWAPS / f"{name}.txt").read_text(encoding="utf-8") == MADE["output"](name)


@pytest.mark.parametrize(
    ("name", "verdict", "governing", "way"),
    [
        ("clay_motor", "beyond", "compatibility", "clean out"),
        ("slow_fan", "within", "fill", "purge"),
        ("pag_gearbox", "beyond", "compatibility", "drain, flush and refill"),
        ("oven_conveyor", "near", "film", "purge"),
    ],
)
def test_the_examples_end_as_their_heads_say(name, verdict, governing, way):
    found = swap(load_case(SWAPS / f"{name}.toml"), MADE["TO"][name])
    assert (found.verdict, found.governing, found.change_over.way) == (verdict, governing, way)


@pytest.mark.parametrize(
    "path", [*sorted(EXAMPLES.glob("*.toml")), *sorted(SWAPS.glob("*.toml"))], ids=lambda p: p.stem
)
def test_a_lubricant_to_itself_changes_nothing_at_all(path):
    case = load_case(path)
    found = swap(case, case.lubricant)
    assert found.before == found.after  # bit for bit
    assert found.meeting.state == "mixes"
    assert (found.sides, found.differences, found.mixture, found.change_over.way) == ((), (), None, "nothing to do")
    assert found.verdict == check(calibrated(case)).verdict


def test_every_candidate_is_judged_as_a_check_of_it_would_be():
    texts = [BASE, *(with_key(BASE, table, key, None) for table, key in (
        ("surroundings", "dust"), ("housing", "shaft_temperature"), ("cleanliness", "setting"), ("grease", "interval"),
        ("surroundings", "coldest")))]  # fmt: skip
    for text in texts:
        case = read_case(text)
        for one in swaps(case, lubricants.names("grease")[::3]).candidates:
            new = lubricants.find(one.name)
            fresh = check(dataclasses.replace(case, lubricant=new))
            assert (one.after.verdict, one.after.governing) == (fresh.verdict, fresh.governing)
            assert [(limit.name, limit.state, limit.use) for limit in one.after.limits] == [
                (limit.name, limit.state, limit.use) for limit in fresh.limits
            ]
            assert one.after.figures.figures["temperature"].value == fresh.operating.figures["temperature"].value


def test_a_candidate_does_not_depend_on_the_ones_beside_it():
    case = load_case(EXAMPLES / "oil_bath_pump.toml")
    together = {one.name: one for one in swaps(case, lubricants.names("oil")).candidates}
    for name in ("mineral-vg-68", "pao-vg-46", "pag-vg-100"):
        assert swap(case, name) == together[name]


def test_candidates_are_ranked_and_each_loser_says_why():
    found = swaps(read_case(BASE), lubricants.names("grease")).candidates
    assert len(found) == len(lubricants.names("grease"))
    order = ["within", "near", "unknown", "beyond"]
    ranks = [order.index(one.verdict) for one in found]
    assert ranks == sorted(ranks)
    for one in found:
        worse = [limit.state for limit in one.after.limits] + [side.state for side in one.sides]
        assert one.verdict == max(worse, key=order.index)
        assert one.reason
        assert one.governing in {limit.name for limit in one.after.limits} | {side.name for side in one.sides}


def test_the_mixture_follows_the_blending_law_between_old_and_new():
    case = read_case(BASE)
    new = lubricants.find("polyurea-460-2")
    path = swap(case, new).mixture
    assert [share.share for share in path.shares] == [0.0, *SHARES, 1.0]
    for share in path.shares:
        expected = viscosity.blend.plain(nu_a=case.lubricant.nu_40, nu_b=new.nu_40, share_b=share.share)
        assert share.nu_40 == pytest.approx(float(expected), rel=1e-12)
    kappas = [share.viscosity_ratio for share in path.shares]
    assert kappas == sorted(kappas)
    before, after = check(case), check(dataclasses.replace(case, lubricant=new))
    assert kappas[0] == before.operating.figures["viscosity_ratio"].value
    assert kappas[-1] == after.operating.figures["viscosity_ratio"].value


def test_a_limit_that_is_passed_on_the_way_alone_is_seen():
    # A thick oil runs hot and takes the heat, the old one runs cooler: the mixture runs hot and does not take it.
    runs_at = check(read_case(BASE.replace("polyurea-110-2", "lithium-110-2"))).operating.figures["temperature"].value
    figures = f'name = "lithium-110-2"\nhighest = "{runs_at + 1} degC"\nlife_reference = "50 degC"'
    case = read_case(BASE.replace('name = "polyurea-110-2"', figures))
    found = swap(case, "lithium-complex-1000-1-ep")
    states = {one.name: one.state for one in found.after.limits}
    assert check(case).limit("temperature").state == "near"
    assert states["temperature"] == "within"
    assert found.mixture.dips
    assert (found.verdict, found.governing) == ("beyond", "mixture")
    assert found.mixture.temperature_use > 1 > check(case).limit("temperature").use


def test_the_mixture_is_softest_half_and_half():
    path = swap(load_case(SWAPS / "oven_conveyor.toml"), "aluminium-complex-150-2").mixture
    grades = [share.consistency for share in path.shares]
    assert grades[0] == grades[-1] == "2"
    assert grades[5] == path.softest == "1"


@settings(max_examples=30, deadline=None)
@given(st.floats(0.02, 0.95))
def test_regreasings_until_a_share_is_gone_follow_from_the_stated_share(displaced):
    line = swap(load_case(SWAPS / "slow_fan.toml"), "lithium-complex-220-2-ep", displaced=displaced).change_over
    left = [(1 - displaced) ** stage.times for stage in line.stages]
    before = [(1 - displaced) ** (stage.times - 1) for stage in line.stages]
    for stage, now, was in zip(line.stages, left, before, strict=True):
        assert now <= 1 - stage.gone + 1e-9 < was + 1e-9
        assert stage.grams == pytest.approx(stage.times * line.dose_g)
    assert (
        line.interval_h
        < swap(load_case(SWAPS / "slow_fan.toml"), "lithium-110-2").after.figures.figures["interval"].value
    )


def test_a_closed_housing_and_a_pair_that_does_not_mix_are_cleaned_out_by_hand():
    closed = swap(read_case(BASE), "polyurea-460-2").change_over
    assert closed.way == "clean out"
    assert closed.stages == ()
    assert any("no open relief" in step for step in closed.steps)
    opened = read_case(with_key(BASE, "housing", "relief", '"open"'))
    assert swap(opened, "polyurea-460-2").change_over.way == "purge"
    assert swap(opened, "clay-220-2").change_over.way == "clean out"


def test_a_closed_bearing_is_replaced():
    text = BASE.replace('designation = "6309"', 'designation = "6309-2Z"')
    for key in ("interval",):
        text = with_key(text, "grease", key, None)
    assert swap(read_case(text), "polyurea-460-2").change_over.way == "replace the bearing"


def test_cleaned_out_wholly_the_two_never_meet():
    case = load_case(SWAPS / "clay_motor.toml")
    assert swap(case, "polyurea-110-2").verdict == "beyond"
    assert swap(case, "polyurea-110-2", is_cleaned=True).verdict == "within"


def test_rubbing_seals_and_a_brass_cage_are_held_against_the_new_lubricant():
    text = BASE.replace('designation = "6309"', 'designation = "6309-2RS"').replace('cage = "steel"', 'cage = "brass"')
    found = swap(read_case(with_key(text, "grease", "interval", None)), "polyurea-ester-70-2")
    assert {side.name: side.state for side in found.sides}["seals"] == "near"
    found = swap(read_case(with_key(text, "grease", "interval", None)), "lithium-200-2-ep")
    assert {side.name: side.state for side in found.sides}["yellow_metals"] == "near"


def test_a_lubricant_may_be_given_by_its_figures():
    text = "nu_40 = 110 mm^2/s, nu_100 = 11.8 mm^2/s, thickener = polyurea, base_oil = mineral, nlgi = 2"
    found = swap(read_case(BASE), text)
    assert found.meeting.state == "mixes"
    assert swap(load_case(EXAMPLES / "oil_bath_pump.toml"), "CLP HC 220").lubricant


@pytest.mark.parametrize("name", ["polyurea-110-22x", "mineral-vg-68", "nu_40 = 110", "nu_40 = 110 mm^2/s, what"])
def test_a_candidate_that_cannot_be_is_refused_by_name(name):
    with pytest.raises(InputError, match="--to"):
        swap(read_case(BASE), name)


def test_all_refused_candidates_are_told_at_once():
    with pytest.raises(InputError) as refused:
        swaps(read_case(BASE), ["nothing-1", "nothing-2", "mineral-vg-68"])
    assert len(refused.value.faults) == 3


def brute(is_good: np.ndarray) -> int:
    wanted = is_good.any(axis=0)
    for count in range(len(is_good) + 1):
        for rows in itertools.combinations(range(len(is_good)), count):
            if (is_good[list(rows)].any(axis=0) == wanted).all():
                return count
    raise AssertionError


def test_the_fewest_are_as_few_as_a_scan_of_all_choices_finds():
    chance = np.random.default_rng(3)
    for _ in range(40):
        is_good = chance.random((8, 30)) < chance.choice([0.1, 0.25, 0.5])
        chosen = fewest(is_good, chance.random(8))
        assert len(chosen) == brute(is_good)
        assert (is_good[list(chosen)].any(axis=0) == is_good.any(axis=0)).all()


def test_sixty_lubricants_for_five_thousand_positions_are_solved():
    chance = np.random.default_rng(1)
    thick, hot = chance.random((60, 1)), chance.random((60, 1))
    least, span, heat = (chance.random((1, 5000)) for _ in range(3))
    is_good = (thick >= 0.8 * least) & (thick <= 0.8 * least + 0.1 + 0.4 * span) & (hot >= 0.8 * heat)
    chosen = fewest(is_good)
    assert is_good[list(chosen)].any(axis=0).sum() == is_good.any(axis=0).sum()
    assert len(chosen) < 40


def plant_cases() -> dict[str, lubecheck.Case]:
    chance = random.Random(5)
    made = {}
    for i in range(12):
        text = with_key(BASE, "duty", "speed", f'"{chance.choice([20, 300, 980, 1480])} rpm"')
        text = with_key(text, "surroundings", "ambient", f'"{chance.choice([10, 40, 50])} degC"')
        made[f"position {i}"] = read_case(text)
    made["pump"] = load_case(EXAMPLES / "oil_bath_pump.toml")
    return made


def test_a_plant_is_counted_and_served_as_single_checks_say():
    cases = plant_cases()
    names = ["polyurea-110-2", "polyurea-460-2", "lithium-1000-2-ep", "lithium-ester-15-2", "polyurea-ester-70-2"]
    found = plant(cases, names)
    order = ["within", "near", "unknown", "beyond"]
    for count in found.counts:
        new = lubricants.find(count.name)
        greased = [case for case in cases.values() if case.is_grease]
        after = [check(dataclasses.replace(case, lubricant=new)).verdict for case in greased]
        now = [check(case).verdict for case in greased]
        assert [count.within, count.near, count.unknown, count.beyond] == [after.count(state) for state in order]
        pairs = list(zip(now, after, strict=True))
        assert count.better == sum(order.index(b) < order.index(a) for a, b in pairs)
        assert count.worse == sum(order.index(b) > order.index(a) for a, b in pairs)
    for place, name in zip(found.positions, found.assignment, strict=True):
        if name is None:
            assert place in found.hold_outs
        else:
            assert name in found.fewest
            assert check(dataclasses.replace(cases[place], lubricant=lubricants.find(name))).verdict == "within"
    assert "pump" in found.hold_outs
    reasons = dict(zip(found.hold_outs, found.hold_out_reasons, strict=True))
    assert reasons["pump"] == "no lubricant of its kind among the candidates"


def test_a_glance_of_many_cases_equals_single_ones():
    cases = list(plant_cases().values())
    together = glances(cases)
    for i, case in enumerate(cases):
        assert together.at(i) == glances([case]).at(0)
