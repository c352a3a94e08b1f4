"""Choosing lubricants: filters read strictly, and nothing chosen that does not keep them all."""

from __future__ import annotations

import dataclasses
import math

import pytest

from lubecheck.data import lubricants
from lubecheck.data.lubricant_choice import Wanted, read_range, read_wanted, relaxed, select
from lubecheck.errors import InputError
from lubecheck.units import UnreadableText

EVERY = tuple(lubricants.table().values())


def test_the_filters_of_a_motor_grease_find_what_they_ask_for_and_all_of_it() -> None:
    wanted = read_wanted({"kind": "grease", "thickener": "polyurea", "nu_40": "100..150", "up_to": "140degC"})
    found = select(EVERY, wanted)
    expected = [
        one.key for one in EVERY
        if one.kind == "grease" and one.thickener == "polyurea" and 100 <= one.nu_40 <= 150 and one.highest >= 140
    ]  # fmt: skip
    assert [one.key for one in found] == expected
    assert "polyurea-110-2" in expected


def test_each_filter_keeps_what_it_asks_for() -> None:
    assert {one.nlgi for one in select(EVERY, read_wanted({"nlgi": "00"}))} == {"00"}
    assert {one.base_oil for one in select(EVERY, read_wanted({"base_oil": "pao"}))} == {"PAO"}
    assert all(one.lowest <= -40 for one in select(EVERY, read_wanted({"down_to": "-40 degF"})))
    assert {one.ep for one in select(EVERY, read_wanted({}, ep=True))} == {True}
    assert {one.ep for one in select(EVERY, read_wanted({}, ep=False))} == {False}
    assert select(EVERY, Wanted()) == EVERY


def test_a_limit_that_nobody_stated_bears_nothing() -> None:
    one = dataclasses.replace(lubricants.find("polyurea-110-2"), highest=None, lowest=None, ranges={})
    assert select([one], read_wanted({"up_to": "60 degC"})) == ()
    assert select([one], read_wanted({"down_to": "0 degC"})) == ()


def test_what_stands_in_the_way_is_counted() -> None:
    wanted = read_wanted({"thickener": "polyurea", "nlgi": "00"})
    assert select(EVERY, wanted) == ()
    counts = relaxed(EVERY, wanted)
    assert counts["nlgi"] == sum(one.thickener == "polyurea" for one in EVERY)
    assert counts["thickener"] == sum(one.nlgi == "00" for one in EVERY)


@pytest.mark.parametrize(
    ("text", "span"),
    [("100..150", (100, 150)), (" 1 .. 1.5 St ", (100, 150)), ("100..", (100, math.inf)), ("..32", (0, 32)),
     ("110", (110, 110)), ("1e2..2e2", (100, 200)), ("0.5..1.5", (0.5, 1.5))],
)  # fmt: skip
def test_a_range_is_read(text: str, span: tuple[float, float]) -> None:
    assert read_range(text) == pytest.approx(span)


@pytest.mark.parametrize("text", ["150..100", "..", "", "a..b", "100-150", "100..150 N", "-5..10", "nan..3", "1...3"])
def test_a_range_that_is_none_is_refused(text: str) -> None:
    with pytest.raises(UnreadableText, match="range such as"):
        read_range(text)


def test_all_faults_come_at_once_with_the_nearest_word() -> None:
    with pytest.raises(InputError) as refused:
        read_wanted({"kind": "greese", "thickener": "poliurea", "nu_40": "x", "up_to": "140", "nlgi": "9"})
    by_key = {fault.key: fault for fault in refused.value.faults}
    assert set(by_key) == {"kind", "thickener", "nu_40", "up_to", "nlgi"}
    assert (by_key["kind"].nearest, by_key["thickener"].nearest) == ("grease", "polyurea")
