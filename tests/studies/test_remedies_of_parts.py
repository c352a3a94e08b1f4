"""Remedies that put in another part: a larger clearance class, and oil that circulates in place of a bath."""

from __future__ import annotations

import tomllib

import pytest
from conftest import BASE, EXAMPLES, edited, with_key

import lubecheck
from lubecheck.data import bearing_designation
from lubecheck.model.check import check as plain_check
from lubecheck.model.glance import glances
from lubecheck.model.reader import read_case
from lubecheck.studies import changes

BARE = BASE
for _key in ("dynamic_rating", "static_rating", "mass"):
    BARE = with_key(BARE, "bearing", _key, None)


def fitted(fit: str, text: str = BASE, **bearing: str) -> str:
    """Return a case with a shaft fit, and keys of its bearing."""
    for key, value in bearing.items():
        text = with_key(text, "bearing", key, f'"{value}"')
    return with_key(text, "housing", "shaft_fit", f'"{fit}"')


def hot_bath(*more: tuple[str, str, str | None]) -> str:
    """Return the pump's oil bath in a hot room with a hotter shaft."""
    text = (EXAMPLES / "oil_bath_pump.toml").read_text()
    for table, key, value in (
        ("surroundings", "ambient", '"45 degC"'),
        ("surroundings", "coldest", '"10 degC"'),
        ("housing", "shaft_temperature", '"140 degC"'),
        *more,
    ):
        text = with_key(text, table, key, value)
    return text


def of_group(text: str, start: str) -> list[changes.Change]:
    """Return the changes of a case that begin with some words."""
    case = read_case(text)
    return [one for one in changes.possible(case, glances([case])) if one.words.startswith(start)]


def assert_kept(text: str, start: str) -> int:
    """Apply to the case file each remedy with a change that begins with some words, and hold it to its promise."""
    remedies = [one for one in lubecheck.check(read_case(text)).remedies if start in one.change]
    for remedy in remedies:
        fresh = plain_check(read_case(edited(text, remedy.edits)))
        assert fresh.verdict == remedy.verdict_after
        after = {limit.name: limit for limit in remedy.limits}
        for limit in fresh.limits:
            assert (after[limit.name].state_after, after[limit.name].use_after) == (limit.state, limit.use)
    return len(remedies)


CLASS = "same bearing with clearance class"
STREAM = "circulate the oil"

TIGHT = [
    fitted("m6"),
    fitted("n6", clearance="C3"),
    fitted("n6", BARE, designation="6309-2Z/C3", seal="open"),
    fitted("m6", BARE, designation="6309 CN"),
    fitted("k5", BARE, designation="6209 P62"),
    fitted("p6", BARE, designation="6309 p6/cn"),
]


@pytest.mark.parametrize("text", TIGHT)
def test_a_larger_class_gives_the_verdict_that_it_promises(text):
    before = plain_check(read_case(text)).limit("clearance")
    assert before.state in ("near", "beyond")
    for change in of_group(text, CLASS):
        fresh = plain_check(read_case(edited(text, change.edits))).limit("clearance")
        assert fresh.use < before.use
        assert fresh.use == plain_check(changes.apply(read_case(text), change)).limit("clearance").use
    assert_kept(text, CLASS)


def test_a_tight_bearing_is_offered_the_next_class_before_the_one_after_it():
    remedies = lubecheck.check(read_case(fitted("m6"))).remedies
    assert [dict(one.edits) for one in remedies[:2]] == [{"bearing.clearance": "C3"}, {"bearing.clearance": "C4"}]
    assert {one.verdict_after for one in remedies} == {"within"}
    tight = lubecheck.check(read_case(fitted("n6", BARE, designation="6309/C3"))).remedies
    assert [dict(one.edits)["bearing.designation"] for one in tight[:2]] == ["6309/C4", "6309/C5"]
    assert assert_kept(fitted("m6"), CLASS) >= 2


@pytest.mark.parametrize(
    ("bearing", "wanted"),
    [
        ({"designation": "6309"}, {"bearing.clearance": "C3"}),
        ({"designation": "6309 P6/CN"}, {"bearing.designation": "6309 P6/C3"}),
        ({"designation": "6309-2Z.C3"}, {"bearing.designation": "6309-2Z.C4"}),
        ({"designation": "6309 P63"}, {"bearing.designation": "6309 P64"}),
        ({"designation": "SS 6309/P62"}, {"bearing.designation": "SS 6309/P63"}),
        (
            {"designation": "6309/C3", "clearance": "CN"},
            {"bearing.designation": "6309/C3", "bearing.clearance": "C3"},
        ),
    ],
)
def test_the_case_file_says_the_class_once_and_without_contradiction(bearing, wanted):
    text = fitted("p6", BARE, **bearing)
    edits = of_group(text, CLASS)[0].edits
    assert dict(edits) == wanted
    table = tomllib.loads(edited(text, edits))["bearing"]
    made, named = read_case(edited(text, edits)).bearing, bearing_designation.read(table["designation"])
    assert named is not None
    assert named.says.get("clearance", made.clearance) == made.clearance


def test_no_class_is_offered_where_the_clearance_is_within_or_not_judged():
    assert of_group(BASE, CLASS) == []
    assert of_group(fitted("h6"), CLASS) == []


def test_a_rare_class_says_so():
    assert ["seldom in stock" in one.warning for one in of_group(fitted("m6"), CLASS)] == [False, True]


BATHS = [
    hot_bath(),
    hot_bath(("oil", "level", '"20 mm"'), ("oil", "volume", '"1.2 l"')),
    hot_bath(("oil", "level", None)),
    hot_bath(("surroundings", "ambient", '"30 degC"'), ("housing", "shaft_temperature", '"200 degC"')),
]


@pytest.mark.parametrize("text", BATHS)
def test_a_circulating_stream_gives_the_verdict_that_it_promises(text):
    assert assert_kept(text, STREAM) > 0
    before = plain_check(read_case(text))
    for change in of_group(text, STREAM):
        fresh = plain_check(read_case(edited(text, change.edits)))
        assert fresh.limit("temperature").use < before.limit("temperature").use
        assert all(limit.name != "oil_level" for limit in fresh.limits)


def test_a_stream_is_said_with_its_flow_and_takes_the_level_out():
    text = hot_bath(("oil", "volume", '"1.2 l"'))
    first = of_group(text, STREAM)[0]
    assert dict(first.edits) == {
        "oil.supply": "circulating",
        "oil.flow": "0.28 l/min",  # ten times 0.6 cm^3/min for each cm^2 of 140 mm by 33 mm
        "oil.inlet": "55 degC",  # 10 K over the room
        "oil.level": None,
        "oil.volume": "2.8 l",  # ten minutes of the flow
    }
    assert "0.28 l/min" in first.words
    assert "55 degC" in first.words
    assert "pump" in first.warning


def test_a_stream_takes_more_effort_than_a_setting_a_grade_or_a_draught():
    effort = of_group(hot_bath(), STREAM)[0].effort
    assert effort > max(of_group(hot_bath(), other)[0].effort for other in ("change the oil", "draught", "grade"))


def test_no_stream_is_offered_for_grease_for_a_cool_bath_or_where_oil_circulates():
    cool = hot_bath(("surroundings", "ambient", '"20 degC"'), ("housing", "shaft_temperature", '"40 degC"'))
    stream = edited(hot_bath(), of_group(hot_bath(), STREAM)[0].edits)
    assert [of_group(text, STREAM) for text in (fitted("m6"), cool, stream)] == [[], [], []]


COIL = "cool the bath by a coil"


@pytest.mark.parametrize("text", BATHS)
def test_a_coil_in_a_hot_bath_gives_the_verdict_that_it_promises(text):
    before = plain_check(read_case(text))
    coils = of_group(text, COIL)
    uses = [plain_check(read_case(edited(text, one.edits))).limit("temperature").use for one in coils]
    assert uses == sorted(uses, reverse=True)
    assert uses[0] < before.limit("temperature").use
    assert {key for key, _ in coils[0].edits} == {
        "housing.coolant", "housing.coolant_flow", "housing.coolant_inlet"
    }  # fmt: skip


def test_a_coil_is_offered_before_oil_that_circulates_and_only_to_a_hot_bath_without_one():
    assert assert_kept(hot_bath(), COIL) == 1
    words = [one.change for one in lubecheck.check(read_case(hot_bath())).remedies]
    first = [next(i for i, word in enumerate(words) if start in word) for start in (COIL, STREAM)]
    assert first == sorted(first)
    cool = hot_bath(("surroundings", "ambient", '"20 degC"'), ("housing", "shaft_temperature", '"40 degC"'))
    has_one = edited(hot_bath(), of_group(hot_bath(), COIL)[0].edits)
    stream = edited(hot_bath(), of_group(hot_bath(), STREAM)[0].edits)
    assert [of_group(text, COIL) for text in (fitted("m6"), cool, has_one, stream)] == [[], [], [], []]


def test_oil_is_filtered_and_only_grease_asks_for_a_clean_gun():
    stream = with_key(edited(hot_bath(), of_group(hot_bath(), STREAM)[0].edits), "cleanliness", "setting", '"slight"')
    assert {one.words for one in of_group(stream, "filter the oil")} == {
        "filter the oil: cleanliness normal", "filter the oil: cleanliness high"
    }  # fmt: skip
    assert of_group(stream, "keep the grease") == []
    assert of_group(with_key(BASE, "cleanliness", "setting", '"slight"'), "keep the grease")
