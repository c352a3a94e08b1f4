"""Whatever a user writes ends in a verdict or in a refusal: never in another error, never in a number that is none."""

from __future__ import annotations

import dataclasses
import json
import re

import pytest
from conftest import BASE, EXAMPLES, with_key
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

import lubecheck
from lubecheck.faces.record import to_json
from lubecheck.model.entries import TABLES
from lubecheck.model.entry import entries
from lubecheck.model.reader import read_case
from lubecheck.units import KINDS

KEYS = [(table, key, entry) for table, form in TABLES.items() for key, entry in entries(form)]
DESIGNATIONS = ["6309", "6205-2RS", "NU 2210", "22218 EK/C3", "7309 B", "30213", "51108", "29320", "81112", "NA 4905",
                "QJ 212", "3206", "2210", "618/8", "16010", "NJ 310", "NCF 2924", "608-2Z"]  # fmt: skip
LUBRICANTS = [
    "polyurea-110-2",
    "clay-460-1-ep",
    "ptfe-pfpe-460-2",
    "mineral-vg-10",
    "pao-vg-1000",
    "lithium-ester-15-2",
]


@st.composite
def changes(draw):
    """Return one key with a value that may or may not be good for it."""
    table, key, entry = draw(st.sampled_from(KEYS))
    if entry.kinds and draw(st.integers(0, 9)):
        kind = KINDS[draw(st.sampled_from(entry.kinds))]
        low, high = max(entry.low, -1e9), min(entry.high, 1e9)
        number = draw(st.one_of(st.sampled_from([low, high, 0.0, 1.0]), st.floats(low, high)))
        value = f'"{number!r} {kind.unit}"' if not kind.is_bare else repr(number)
    elif entry.words:
        value = f'"{draw(st.sampled_from(entry.words))}"'
    elif key == "designation" and table == "bearing":
        value = f'"{draw(st.sampled_from(DESIGNATIONS))}"'
    elif key == "name":
        value = f'"{draw(st.sampled_from(LUBRICANTS))}"'
    else:
        value = draw(st.sampled_from(['""', '"x"', "true", "0", "-1", "[1]", '"\\u0000"']))
    return table, key, value


@settings(max_examples=300, deadline=None, suppress_health_check=[HealthCheck.too_slow])
@given(st.lists(changes(), min_size=1, max_size=4), st.booleans())
def test_any_case_ends_in_a_verdict_or_a_refusal(changed, without_ratings):
    text = BASE
    if without_ratings:  # so that other designations are not refused for the ratings of this one
        for key in ("dynamic_rating", "static_rating", "mass", "cage"):
            text = with_key(text, "bearing", key, None)
    for table, key, value in changed:
        text = with_key(text, table, key, value)
    try:
        result = lubecheck.check(read_case(text))
    except lubecheck.InputError as refused:
        complete = [bool(fault.key and fault.expected) for fault in refused.faults]
    else:
        complete = []
        check_record(result)
        check_texts(dataclasses.asdict(result))
    assert all(complete)


def check_texts(part):
    """No text of a result may print a number that is none."""
    if isinstance(part, dict):
        part = [*part.keys(), *part.values()]
    if isinstance(part, str):
        assert not re.search(r"(?<![\w-])-?(nan|inf|None)(?!\w)", part), part
    elif isinstance(part, (list, tuple)):
        for item in part:
            check_texts(item)


UNCOUNTED = [
    ("NU 210", "0 N", "2 kN"),
    ("51108", "1 kN", "2 kN"),
    ("29320", "3 kN", "5 kN"),
    ("NU 210-2Z", "0 N", "2 kN"),
]


@pytest.mark.parametrize(("designation", "radial", "axial"), UNCOUNTED)
def test_loads_that_the_family_has_no_rule_for_are_unknown_and_no_number(designation, radial, axial):
    text = with_key(with_key(BASE, "duty", "radial_load", f'"{radial}"'), "duty", "axial_load", f'"{axial}"')
    for key in ("dynamic_rating", "static_rating", "mass", "cage"):
        text = with_key(text, "bearing", key, None)
    text = with_key(with_key(text, "bearing", "designation", f'"{designation}"'), "grease", "fill", None)
    result = lubecheck.check(read_case(with_key(text, "grease", "interval", None)))
    for name in ("static_load", "minimum_load", "interval", "fatigue_life"):
        assert result.limit(name).state == "unknown", name
        assert result.limit(name).note, name
    check_texts(dataclasses.asdict(result))


@pytest.mark.parametrize("name", ["new_motor", "oil_bath_pump", "measured_fan", "pinion_shaft", "belt_fan"])
@pytest.mark.parametrize("read", [("-20 degC",), ("100 degC",), ("110 degC",), ("172 degC",), ("390 degC",),
                                  ("60 degC", "90 degC", "40 degC")])  # fmt: skip
def test_no_text_beside_a_measurement_that_nothing_explains_prints_a_number_that_is_none(name, read):
    text = (EXAMPLES / f"{name}.toml").read_text()
    if "\n[measured]" in text:
        text = text.rpartition("\n[measured]")[0]
    for key, value in (("shaft_fit", '"k5"'), ("housing_fit", '"H7"')):
        text = with_key(text, "housing", key, value)
    text = with_key(with_key(text, "limits", "alarm", '"85 degC"'), "limits", "trip", '"95 degC"')
    text += "".join(f'\n[[measured]]\nduty = 1\nambient = "20 degC"\ntemperature = "{one}"\n' for one in read)
    result = lubecheck.check(read_case(text))
    assert not result.calibration.is_explained
    check_record(result)
    check_texts(dataclasses.asdict(result))


def check_record(result):
    record = json.loads(to_json(result), parse_constant=pytest.fail)
    assert record["verdict"] in ("within", "near", "beyond", "unknown")
    for limit in record["limits"]:
        if limit["state"] in ("within", "near"):
            assert limit["use"] is not None
            assert limit["use"] <= 1.0


@given(st.text(max_size=300))
@settings(max_examples=200, deadline=None)
def test_any_text_is_refused_without_another_error(text):
    with pytest.raises(lubecheck.CaseError):
        read_case(text)


@given(st.binary(max_size=200), st.integers(0, 1500))
@settings(max_examples=200, deadline=None)
def test_an_example_with_bytes_pushed_in_ends_in_a_verdict_or_a_refusal(noise, place):
    raw = (EXAMPLES / "new_motor.toml").read_bytes()
    try:
        case = read_case(raw[:place] + noise + raw[place:])
    except lubecheck.CaseError:
        return
    assert lubecheck.check(case).verdict
