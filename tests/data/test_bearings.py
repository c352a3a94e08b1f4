"""Bearings from designations and dimensions, and the user's own figures in place of estimates."""

import math
from itertools import pairwise

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck import sources
from lubecheck.data import bearings
from lubecheck.data.bearing_series import SERIES
from lubecheck.data.families import FAMILIES
from lubecheck.errors import InputError
from lubecheck.physics import loads

FIGURES = (
    "bore",
    "outside",
    "width",
    "dynamic_rating",
    "static_rating",
    "fatigue_limit",
    "mass",
    "f0",
    "f1",
    "f0_load",
)
ALL = bearings.designations()


def faults(call, *args, **kwargs):
    with pytest.raises(InputError) as refused:
        call(*args, **kwargs)
    return {fault.key: fault for fault in refused.value.faults}


@pytest.mark.parametrize("family", FAMILIES)
def test_every_family_has_designations(family):
    names = bearings.designations(family)
    assert len(names) == len(set(names)) >= 30
    assert set(names) <= set(ALL)
    assert {bearings.find(name).family for name in names} == {family}


def test_every_bearing_is_whole_and_every_figure_has_a_source():
    for name in ALL:
        found = bearings.find(name)
        for figure in FIGURES:
            value = getattr(found, figure)
            assert math.isfinite(value), (name, figure)
            assert value > 0, (name, figure)
            assert sources.cite(found.basis[figure]), (name, figure)
        assert found.load_rule in loads.RULES
        assert {"dynamic_rating", "static_rating", "fatigue_limit", "mass"} <= set(found.estimated)
        assert all(0 < low <= 1 <= high for low, high in found.estimated.values())
        assert found.fatigue_limit < found.static_rating / 5
        assert found.mass < 7.85e-3 * math.pi / 4 * (found.outside**2 - found.bore**2) * found.width
        if found.contact_angle is not None:
            assert sources.cite(found.basis["contact_angle"])


@pytest.mark.parametrize("series", SERIES, ids=lambda series: series.name(50.0))
def test_within_a_series_a_larger_bearing_carries_more(series):
    # where the section of a series grows less than its mean diameter, as thin ones do, C0 may stand still: 1 %
    ratings = [bearings.find(series.name(bore)).static_rating for bore in sorted(series.boundaries())]
    assert all(larger > 0.99 * smaller for smaller, larger in pairwise(ratings))


def test_dimensions_give_what_the_designation_gives():
    for name in ("6309", "NU 2210", "22218", "7310", "30213", "51108", "NA 4910", "29420", "3308"):
        found = bearings.find(name)
        made = bearings.from_dimensions(found.family, bore=found.bore, outside=found.outside, width=found.width)
        assert (made.series, made.dimension_series) == (found.series, found.dimension_series), name
        assert made.dynamic_rating == pytest.approx(found.dynamic_rating), name
        assert made.basis["bore"] == "user"
        assert made.designation == ""


def test_an_inch_bearing_takes_the_series_it_is_most_like():
    made = bearings.from_dimensions("deep groove ball", bore=25.4, outside=57.15, width=15.875)  # 1 x 2 1/4 x 5/8 in
    assert made.series in ("62", "63")
    low, high = bearings.find("6205").dynamic_rating, bearings.find("6305").dynamic_rating
    assert low < made.dynamic_rating < high


def test_a_series_may_be_named_in_either_way():
    by_trade = bearings.from_dimensions("cylindrical roller", bore=50, outside=90, width=23, series="22")
    assert by_trade.dimension_series == "22"
    by_iso = bearings.from_dimensions("deep groove ball", bore=45, outside=100, width=25, series="03")
    assert by_iso.series == "63"


def test_every_fault_of_the_dimensions_is_told():
    found = faults(bearings.from_dimensions, "deep groove ball", bore=-1, outside=math.inf, width=math.nan)
    assert set(found) == {"bore", "outside", "width"}
    found = faults(bearings.from_dimensions, "deep groove ball", bore=50, outside=40, width=10)
    assert set(found) == {"outside"}
    found = faults(bearings.from_dimensions, "deep grove ball", bore=50, outside=40, width=10)
    assert found["family"].nearest == "deep groove ball"
    found = faults(
        bearings.from_dimensions, "tapered roller", bore=50, outside=90, width=20, series="999", contact_angle=60
    )
    assert set(found) == {"series", "contact_angle"}
    found = faults(bearings.from_dimensions, "spherical roller", bore=50, outside=90, width=20, rows=0)
    assert set(found) == {"rows"}


def test_a_tall_ring_still_gives_finite_ratings():
    made = bearings.from_dimensions("deep groove ball", bore=3.0, outside=90.0, width=8.0)
    assert math.isfinite(made.dynamic_rating)
    assert math.isfinite(made.static_rating)


def test_what_the_user_gives_wins_and_is_said_to_be_his():
    found = bearings.find("6309")
    mine = bearings.with_given(
        found, dynamic_rating=55300.0, static_rating=31500.0, mass=830.0, clearance="C3", seal="shields", cage="brass",
        f0=2.5, f1=0.0003,
    )  # fmt: skip
    assert (mine.dynamic_rating, mine.static_rating, mine.mass, mine.f0, mine.f1) == (55300, 31500, 830, 2.5, 0.0003)
    assert (mine.clearance, mine.seal, mine.sealed_sides, mine.cage) == ("C3", "shields", 2, "brass")
    given = ("dynamic_rating", "static_rating", "mass", "clearance", "seal", "cage", "f0", "f1")
    assert {mine.basis[key] for key in given} == {"user"}
    assert set(mine.estimated) == {"fatigue_limit"}
    assert mine.fatigue_limit == pytest.approx(31500 / 22)  # ISO 281, Annex B, up to Dpw 100 mm
    assert mine.basis["fatigue_limit"] == "iso-281"


def test_opening_a_sealed_bearing_leaves_no_sealed_side():
    mine = bearings.with_given(bearings.find("6309-2RS1"), seal="open")
    assert (mine.seal, mine.sealed_sides) == ("open", 0)


def test_a_given_fatigue_limit_stays():
    mine = bearings.with_given(bearings.find("6309"), static_rating=31500.0, fatigue_limit=1340.0)
    assert mine.fatigue_limit == 1340.0
    assert mine.basis["fatigue_limit"] == "user"
    assert "fatigue_limit" not in mine.estimated


def test_none_counts_as_not_given():
    found = bearings.find("6309")
    assert bearings.with_given(found, dynamic_rating=None, clearance=None) == found


def test_a_given_contact_angle_changes_what_follows_from_it():
    found = bearings.find("7309 B")
    mine = bearings.with_given(found, contact_angle=25.0)
    assert mine.load_rule == "angular contact 25"
    assert mine.dynamic_rating > found.dynamic_rating  # cos(a)^0.7
    assert mine.basis["contact_angle"] == "user"
    assert mine.designation == found.designation
    kept = bearings.with_given(bearings.with_given(found, dynamic_rating=61000.0), contact_angle=25.0)
    assert kept.dynamic_rating == 61000.0
    spherical = bearings.with_given(bearings.find("22218"), contact_angle=9.1)
    assert (spherical.contact_angle, "contact_angle" in spherical.estimated) == (9.1, False)


@pytest.mark.parametrize(
    ("name", "given", "key"),
    [
        ("6309", {"dynamic_rating": 55.3}, "dynamic_rating"),  # kN for N
        ("6309", {"static_rating": 3.15e7}, "static_rating"),
        ("6309", {"mass": 0.83}, "mass"),  # kg for g
        ("6309", {"fatigue_limit": 40000.0, "static_rating": 31500.0}, "fatigue_limit"),
        ("6309", {"contact_angle": 25.0}, "contact_angle"),
        ("7309 B", {"contact_angle": 60.0}, "contact_angle"),
        ("51108", {"contact_angle": 45.0}, "contact_angle"),
        ("6309", {"clearance": "C9"}, "clearance"),
        ("6309", {"seal": "shield"}, "seal"),
        ("6309", {"cage": "wood"}, "cage"),
        ("6309", {"f0": 0.0}, "f0"),
        ("6309", {"f1": math.nan}, "f1"),
        ("6309", {"f1": True}, "f1"),
        ("6309", {"colour": "red"}, "colour"),
    ],
)
def test_an_impossible_figure_is_refused(name, given, key):
    assert set(faults(bearings.with_given, bearings.find(name), **given)) == {key}


def test_all_impossible_figures_are_told_at_once():
    found = faults(bearings.with_given, bearings.find("6309"), dynamic_rating=-1.0, clearance="C9", seal="shield")
    assert set(found) == {"dynamic_rating", "clearance", "seal"}
    assert found["seal"].nearest == "shields"


def test_a_pair_back_to_back_carries_both_ways_and_a_tandem_does_not():
    single, back, tandem = (bearings.find(f"7310 B{pair}") for pair in ("", " DB", " DT"))
    assert back.width == tandem.width == 2 * single.width
    assert back.rows == tandem.rows == 2
    # ISO 281: 2^0.7 C, ISO 76: 2 C0
    assert back.dynamic_rating / single.dynamic_rating == pytest.approx(2**0.7)
    assert tandem.static_rating / single.static_rating == pytest.approx(2)
    assert back.mass == pytest.approx(2 * single.mass)
    assert (back.load_rule, tandem.load_rule) == ("double row angular contact", "angular contact 40")
    tapered = bearings.find("30213 DF")
    assert tapered.load_rule == "spherical roller"  # X and Y of tapered pairs are those of spherical roller bearings
    assert tapered.dynamic_rating / bearings.find("30213").dynamic_rating == pytest.approx(2 ** (7 / 9))


def test_friction_factors_of_a_series_that_the_standard_does_not_list_are_marked_as_estimates():
    assert {"f0", "f1"} <= set(bearings.find("51108").estimated)
    assert not {"f0", "f1"} & set(bearings.find("6309").estimated)


def test_an_unnamed_contact_angle_is_marked_as_an_estimate():
    assert "contact_angle" in bearings.find("7309").estimated
    assert "contact_angle" not in bearings.find("7309 B").estimated


@given(
    st.sampled_from(list(FAMILIES)), st.floats(5, 500), st.floats(1.1, 3.0), st.floats(0.1, 2.0),
)  # fmt: skip
def test_any_sensible_outside_gives_a_whole_bearing(family, bore, ratio, slenderness):
    outside = bore * ratio
    made = bearings.from_dimensions(family, bore=bore, outside=outside, width=slenderness * (outside - bore) / 2)
    for figure in FIGURES:
        assert math.isfinite(getattr(made, figure)), figure
        assert getattr(made, figure) > 0, figure
