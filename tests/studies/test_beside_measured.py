"""Remedies and needs beside measured temperatures: written into the file, they hold with the reading as it was made."""

from __future__ import annotations

import pytest
from conftest import EXAMPLES, edited, with_key

import lubecheck
from lubecheck.model.reader import load_case, read_case
from lubecheck.studies import calibrate

AGAIN = "measure again after it"
FAN = (EXAMPLES / "measured_fan.toml").read_text(encoding="utf-8")
SILENT = with_key(FAN, "measured", "shaft_temperature", None)
MANY = FAN.replace("[measured]", "[[measured]]").replace(
    "[cleanliness]",
    '[[measured]]\ntemperature = "58 degC"\nambient = "28 degC"\nshaft_temperature = "83 degC"\ndraught = "0.1 m/s"\n\n'
    "[cleanliness]",
)


def changed(text: str, *changes: tuple[str, str, str | None]) -> str:
    for change in changes:
        text = with_key(text, *change)
    return text


PACKED = changed(FAN, ("grease", "fill", '"90 %"'), ("housing", "void", '"0 cm^3"'), ("measured", "temperature",
                 '"55 degC"'), ("limits", "highest_temperature", '"80 degC"'))  # fmt: skip
# Filled, strokes given since, and more of both than may stay: the fill of the reading counts them.
GIVEN = changed(PACKED, ("grease", "fill", '"15 g"'), ("grease", "given", '"22 g"'))
CASES = {
    "fan": FAN,
    "shaft temperature inherited": SILENT.replace('"48 degC"', '"53 degC"'),
    "two readings": MANY,
    "a draught of its own": changed(FAN, ("duty", "draught", '"0.5 m/s"'), ("duty", "shaft_temperature", '"99 degC"')),
    "packed full": PACKED,
    "grease given": GIVEN,
}


@pytest.fixture(scope="module", params=CASES)
def solved(request):
    text = CASES[request.param]
    hold = 73 if text in (PACKED, GIVEN) else 62
    return text, hold, lubecheck.check(read_case(text), hold=f"{hold} degC")


def test_each_remedy_beside_a_reading_gives_the_verdict_that_it_promises(solved):
    text, _, result = solved
    assert result.calibration.is_explained
    applied = 0
    for remedy in result.remedies:
        if AGAIN in remedy.note:
            continue
        fresh = lubecheck.check(read_case(edited(text, remedy.edits)))
        assert fresh.verdict == remedy.verdict_after, remedy
        after = {limit.name: limit for limit in remedy.limits}
        for limit in fresh.limits:
            assert limit.state == after[limit.name].state_after, remedy
            assert limit.use == pytest.approx(after[limit.name].use_after, abs=1e-6), remedy
        applied += 1
    assert applied or all("way out" in remedy.change for remedy in result.remedies)


def test_each_need_beside_a_reading_holds_what_was_asked(solved):
    text, hold, result = solved
    applied = 0
    for need in result.needs.found:
        if AGAIN in need.note or need.needed is None:
            continue
        fresh = lubecheck.check(read_case(edited(text, need.edits)))
        factor, before = (one.calibration.figures.cooling_factor for one in (fresh, result))
        assert factor.m == pytest.approx(before.m, rel=1e-6)
        assert fresh.operating.temperature.m_as("degC") == pytest.approx(need.temperature, abs=1e-4)
        assert fresh.operating.temperature.m_as("degC") <= hold + 1e-4
        applied += 1
    assert applied >= 2


def test_the_fan_says_its_old_draught_and_the_draught_keeps_its_promise():
    result = lubecheck.check(read_case(FAN))
    (draught,) = [one for one in result.remedies if one.change.startswith("draught of 1 m/s")]
    assert draught.note.startswith("say in [measured] draught 0 m/s; uses: ")
    assert dict(draught.edits) == {"surroundings.draught": "1 m/s", "measured.draught": "0 m/s"}
    fresh = lubecheck.check(read_case(edited(FAN, draught.edits)))
    assert fresh.verdict == "within"
    (promised,) = [limit.use_after for limit in draught.limits if limit.name == "interval"]
    assert fresh.limit("interval").use == pytest.approx(promised, abs=5e-4)


def test_what_a_reading_has_no_key_for_is_to_be_measured_again():
    result = lubecheck.check(read_case(FAN))
    (area,) = [need for need in result.needs.found if need.means == "housing area"]
    assert area.note.startswith(AGAIN)
    others = [one for one in result.remedies if "lubricant" in dict(one.edits)]
    assert others
    assert all(one.note.startswith(AGAIN) for one in others)
    assert not any(AGAIN in one.note for one in result.remedies if one not in others)


def test_a_reading_that_says_how_it_was_is_not_said_again():
    text = with_key(FAN, "measured", "draught", '"0 m/s"')
    for one in (*lubecheck.check(read_case(text)).remedies, *lubecheck.check(read_case(text)).needs.found):
        assert not any(key.startswith("measured") for key, _ in one.edits)


def test_several_readings_are_named_by_their_number_and_only_where_they_leave_it_out():
    (draught,) = [one for one in lubecheck.check(read_case(MANY), hold="62 degC").needs.found if one.means == "draught"]
    assert [key for key, _ in draught.edits] == ["surroundings.draught", "measured[1].draught"]


def test_without_readings_nothing_is_said_of_measuring():
    result = lubecheck.check(load_case(EXAMPLES / "overfilled_motor.toml"))
    assert result.remedies
    assert not any(AGAIN in one.note for one in (*result.remedies, *result.needs.found))


def test_the_inherited_fill_is_said_as_the_share_that_was_there():
    found = lubecheck.check(read_case(PACKED), hold="73 degC").needs.found
    (fill,) = [one for one in found if one.means == "fill"]
    assert fill.needed is not None
    assert dict(fill.edits)["measured.fill"] == "90 %"
    fresh = read_case(edited(PACKED, fill.edits))
    assert calibrate.calibrated(fresh).calibration.value == pytest.approx(
        calibrate.calibrated(read_case(PACKED)).calibration.value, rel=1e-6
    )
