"""Remedies: each leads to exactly the verdict it promises, and none that a brute force finds is missed."""

from __future__ import annotations

import itertools
import random

import pytest
from conftest import BASE, EXAMPLES, edited, with_key

import lubecheck
from lubecheck.data import compatibility, lubricants
from lubecheck.model.check import check as plain_check
from lubecheck.model.glance import glances
from lubecheck.model.limits import STATES
from lubecheck.model.reader import load_case, read_case
from lubecheck.studies import changes

FAILING = ("near", "beyond")


def random_case(chance: random.Random) -> str:
    """Return a case in which something may well be wrong."""
    pick = chance.choice
    text = BASE
    for key in ("dynamic_rating", "static_rating", "mass"):  # the cage stays: unsaid, it is judged as polyamide too
        text = with_key(text, "bearing", key, None)
    text = with_key(
        text, "bearing", "designation", f'"{pick(["6309", "6205", "NU 310", "22218", "6312-2Z", "30210"])}"'
    )
    is_oil = chance.random() < 0.25
    kind = "oil" if is_oil else "grease"
    text = with_key(text, "lubricant", "name", f'"{pick(lubricants.names(kind))}"')
    text = with_key(text, "duty", "speed", f'"{pick([30, 120, 480, 960, 1480, 2960])} rpm"')
    text = with_key(text, "duty", "radial_load", f'"{pick([0.5, 1.5, 3, 6, 10])} kN"')
    text = with_key(text, "surroundings", "ambient", f'"{pick([0, 20, 40, 55])} degC"')
    text = with_key(text, "surroundings", "coldest", f'"{pick([-30, -10, 0, 15])} degC"')
    text = with_key(text, "surroundings", "draught", f'"{pick([0, 0.5, 2])} m/s"')
    text = with_key(text, "surroundings", "dust", f'"{pick(["clean", "normal", "dusty"])}"')
    text = with_key(text, "surroundings", "water", f'"{pick(["dry", "humid", "wet"])}"')
    text = with_key(text, "housing", "shaft_temperature", f'"{pick([40, 75, 100, 130])} degC"')
    text = with_key(text, "cleanliness", "setting", f'"{pick(["normal", "slight", "severe"])}"')
    if is_oil:
        text = text[: text.index("[grease]")] + "[cleanliness]" + text.partition("[cleanliness]")[2]
        text = with_key(text, "housing", "void", None)
        text = with_key(text, "housing", "relief", None)
        text += f'\n[oil]\nsupply = "bath"\nlevel = "{pick([0, 5, 20])} mm"\ninterval = "{pick([3, 12])} month"\n'
    else:
        text = with_key(text, "grease", "fill", f'"{pick([20, 35, 60, 100])} %"')
        text = with_key(text, "grease", "housing_fill", f'"{pick([30, 60, 100])} %"')
        text = with_key(text, "grease", "interval", f'"{pick([4, 16, 52, 104])} week"')
        text = with_key(text, "grease", "regrease_amount", f'"{pick([3, 12, 40])} g"')
    if chance.random() < 0.2:
        text = with_key(text, "surroundings", "water", None) if "water" in text else text
    return text


@pytest.fixture(scope="module")
def failing() -> list[tuple[str, lubecheck.Result]]:
    chance, found = random.Random(8), []
    while len(found) < 200:
        text = random_case(chance)
        result = lubecheck.check(read_case(text))
        if any(limit.state in FAILING for limit in result.limits):
            found.append((text, result))
    return found


def test_every_remedy_of_200_failing_cases_gives_the_verdict_it_promises(failing):
    applied = 0
    for text, result in failing:
        for remedy in result.remedies:
            fresh = plain_check(read_case(edited(text, remedy.edits)))
            assert fresh.verdict == remedy.verdict_after, (text, remedy)
            for limit in remedy.limits:
                if limit.state_after != "within" or limit.use_after:
                    assert fresh.limit(limit.name).state == limit.state_after, (text, remedy.change, limit)
                    assert fresh.limit(limit.name).use == limit.use_after
            applied += 1
    assert applied > 200
    assert sum(bool(result.remedies) for _, result in failing) > 60


def test_no_case_that_a_brute_force_scan_cures_is_left_without_a_remedy(failing):
    hopeless = [text for text, result in failing if not result.remedies]
    assert len(hopeless) > 20
    for text in hopeless[:20]:
        case = read_case(text)
        single = changes.possible(case, glances([case]))
        pairs = [pair for pair in itertools.combinations(single, 2) if pair[0].group != pair[1].group]
        tries = [*((one,) for one in single), *pairs]
        scan = glances([changes.apply(case, *tried) for tried in tries])
        assert (scan.verdicts > 0).all(), text
        for i in random.Random(1).sample(range(len(tries)), min(6, len(tries))):
            assert plain_check(changes.apply(case, *tries[i])).verdict == STATES[scan.verdicts[i]]


def test_a_pair_is_proposed_only_where_no_single_change_is_enough(failing):
    pairs = [(text, result) for text, result in failing if any("; and " in one.change for one in result.remedies)]
    assert pairs
    for text, result in pairs[:4]:
        assert all("; and " in remedy.change for remedy in result.remedies)
        case = read_case(text)
        single = changes.possible(case, glances([case]))
        assert all(plain_check(changes.apply(case, one)).verdict != "within" for one in single)


def test_remedies_come_by_effort_then_by_effect(failing):
    for _, result in failing:
        ranks = [(one.verdict_after != "within", one.effort) for one in result.remedies]
        assert ranks == sorted(ranks)


def test_no_lubricant_is_proposed_without_saying_what_becomes_of_the_old_one(failing):
    seen = set()
    for text, result in failing:
        old = read_case(text).lubricant
        for remedy in result.remedies:
            for key, value in remedy.edits:
                if key == "lubricant":
                    meeting = compatibility.meet(old, lubricants.find(value["name"]))
                    assert meeting.reason in remedy.note
                    seen.add(meeting.state)
    assert "do not mix" in seen


def test_a_remedy_says_what_it_does_to_every_limit(failing):
    for _, result in failing[:40]:
        for remedy in result.remedies:
            assert {limit.name for limit in remedy.limits} >= {limit.name for limit in result.limits}


def test_a_case_that_is_within_has_none():
    assert lubecheck.check(load_case(EXAMPLES / "new_motor.toml")).remedies == ()


def test_the_overfilled_motor_is_told_to_be_filled_anew():
    remedies = lubecheck.check(load_case(EXAMPLES / "overfilled_motor.toml")).remedies
    assert remedies[0].change.startswith("clean the bearing and fill it anew")
    assert remedies[0].verdict_after == "within"


def test_a_bigger_bearing_keeps_its_suffixes_and_what_was_stated():
    text = with_key(BASE, "bearing", "designation", '"6009-2Z/C3"')
    for key in ("dynamic_rating", "static_rating", "mass"):
        text = with_key(text, "bearing", key, None)
    case = read_case(text)
    bigger = [one for one in changes.possible(case, glances([case])) if one.group == "bearing"]
    assert dict(bigger[0].edits)["bearing"] == {"designation": "6209-2Z/C3", "cage": "steel"}


def test_changes_never_touch_what_is_required():
    case = load_case(EXAMPLES / "overfilled_motor.toml")
    for change in changes.possible(case, glances([case])):
        assert not any(key.startswith(("limits", "duty[1].radial")) for key, _ in change.edits)


@pytest.mark.parametrize("weeks", [130, 150, 250, 500])
def test_one_interval_is_offered_and_it_is_the_longest_that_is_within(weeks):
    text = with_key(BASE, "grease", "interval", f'"{weeks} week"')
    (remedy,) = [one for one in lubecheck.check(read_case(text)).remedies if one.edits[0][0] == "grease.interval"]
    offered = int(remedy.edits[0][1].split()[0])
    assert remedy.change == f"regrease every {offered} weeks"
    longer = with_key(BASE, "grease", "interval", f'"{offered + 1} week"')
    assert plain_check(read_case(longer)).limit("interval").state != "within"


def test_of_a_graded_change_only_the_mildest_step_that_cures_is_offered(failing):
    for text, result in failing[:60]:
        case = read_case(text)
        single = {one.words: one for one in changes.possible(case, glances([case]))}
        kinds = [
            tuple(single[word].grade or word for word in remedy.change.split("; and ")) for remedy in result.remedies
        ]
        assert len(kinds) == len(set(kinds)), result.remedies
        for remedy in result.remedies:
            one = single.get(remedy.change)
            if one is not None and one.grade and remedy.verdict_after == "within":
                milder = [other for other in single.values() if other.grade == one.grade and other.step < one.step]
                assert all(plain_check(changes.apply(case, other)).verdict != "within" for other in milder)
