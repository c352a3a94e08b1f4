"""Fatigue life: continuity, trends, ends of range, and rows of mixed kinds."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.errors import ArgumentError, OutOfRange
from lubecheck.physics import fatigue
from lubecheck.physics.fatigue import ADDITIVES, KINDS, SETTINGS

kinds = st.integers(0, len(KINDS) - 1)
settings = st.integers(0, len(SETTINGS) - 1)
kappas = st.floats(0.1, 6)
shares = st.floats(0, 1)
load_shares = st.floats(1e-3, 20)  # C_u / P


def a_iso(kappa, share, limit, kind):
    return fatigue.life_modification_factor.plain(kappa, share, fatigue_load_limit=limit, load=1.0, kind=kind)


@pytest.mark.parametrize("kind", range(len(KINDS)))
@pytest.mark.parametrize("x", [0.01, 0.1, 0.3])
@pytest.mark.parametrize(("kappa", "step"), [(0.4, 1e-3), (1.0, 1e-9)])
def test_a_iso_is_continuous_where_the_range_of_kappa_changes(kind, x, kappa, step):
    """To the rounding of the printed constants: 0.1 % at 0.4; at 1 the two forms are the same."""
    below, at = a_iso(kappa - 1e-12, x, 1.0, kind), a_iso(kappa, x, 1.0, kind)
    assert at == pytest.approx(below, rel=step)


@given(kappas, shares, load_shares, kinds)
def test_a_iso_is_finite_and_lies_between_a_tenth_and_fifty(kappa, share, limit, kind):
    assert 0.1 - 1e-12 <= a_iso(kappa, share, limit, kind) <= 50


@given(kappas, st.floats(1.0, 3.0), shares, load_shares, kinds)
def test_a_thicker_film_never_shortens_the_life(kappa, more, share, limit, kind):
    # 0.1 % for the printed step at kappa 0.4
    assert a_iso(kappa * more, share, limit, kind) >= a_iso(kappa, share, limit, kind) * (1 - 1e-3)


@given(kappas, shares, st.floats(0.0, 1.0), load_shares, kinds)
def test_more_dirt_never_lengthens_the_life(kappa, share, less, limit, kind):
    assert a_iso(kappa, share * less, limit, kind) <= a_iso(kappa, share, limit, kind) * (1 + 1e-12)


@given(kappas, shares, st.floats(1.0, 5.0), load_shares, kinds)
def test_more_load_never_lengthens_the_life(kappa, share, more, limit, kind):
    assert a_iso(kappa, share, limit / more, kind) <= a_iso(kappa, share, limit, kind) * (1 + 1e-12)


def test_no_cleanliness_at_all_leaves_a_tenth_of_the_rating_life():
    assert a_iso(2.0, 0.0, 1.0, 0) == pytest.approx(0.1, rel=1e-12)


def test_the_cap_of_fifty_holds_where_the_bracket_is_zero_or_negative():
    assert a_iso(4.0, 1.0, 1e6, np.arange(4)) == pytest.approx([50, 50, 50, 50], rel=1e-15)


def test_kappa_above_four_counts_as_four():
    assert a_iso(40.0, 0.2, 0.3, 1) == a_iso(4.0, 0.2, 0.3, 1)
    low, high = (fatigue.contamination_factor.plain(kappa, 50.0, 2) for kappa in (4.0, 40.0))
    assert low == high


def test_kappa_below_a_tenth_is_refused_and_the_range_is_said():
    with pytest.raises(OutOfRange, match=r"viscosity_ratio 0\.1 to"):
        fatigue.life_modification_factor(0.09, 0.5, fatigue_load_limit="1 kN", load="1 kN", kind="radial ball")
    assert fatigue.life_modification_factor.outside(viscosity_ratio=np.array([0.09, 0.1])).tolist() == [True, False]


def test_mixed_kinds_in_one_call_give_what_each_gives_alone():
    kappa, kind = np.array([0.2, 0.6, 1.4, 3.0, 0.9]), np.array([0, 1, 2, 3, 1])
    together = a_iso(kappa, 0.4, 0.2, kind)
    assert together == pytest.approx([a_iso(k, 0.4, 0.2, int(c)) for k, c in zip(kappa, kind, strict=True)], rel=1e-14)


@given(kappas, st.floats(10, 2000), settings)
def test_the_contamination_factor_is_a_share(kappa, pitch_diameter, setting):
    assert 0 <= fatigue.contamination_factor.plain(kappa, pitch_diameter, setting) <= 1


@given(kappas, st.floats(10, 2000))
def test_within_one_supply_more_dirt_never_raises_the_contamination_factor(kappa, pitch_diameter):
    factors = fatigue.contamination_factor.plain(kappa, pitch_diameter, np.arange(len(SETTINGS)))
    for first, last in ((0, 5), (5, 9), (9, 14)):
        assert np.all(np.diff(factors[first:last]) <= 1e-12)


@given(st.floats(0.5, 0.9995), st.floats(0, 1))
def test_asking_less_reliability_never_shortens_the_life(reliability, less):
    relaxed = 0.5 + (reliability - 0.5) * less
    assert fatigue.reliability_factor.plain(relaxed) >= fatigue.reliability_factor.plain(reliability) - 1e-12


hours = st.floats(1, 1e7)


@given(hours, hours, hours)
def test_bearings_together_live_shorter_than_the_shortest_and_the_order_does_not_matter(a, b, c):
    join = fatigue.joint_life.plain
    ab_c = join(first=join(first=a, second=b), second=c)
    assert ab_c == pytest.approx(join(first=a, second=join(first=c, second=b)), rel=1e-12)
    assert ab_c <= min(a, b, c) * (1 + 1e-12)


@given(hours, hours, st.floats(0.5, 0.999))
def test_the_product_of_two_reliabilities_at_the_joint_life_is_the_reliability_asked_for(a, b, reliability):
    """Weibull of two parameters, slope 1.5: R = asked^((t/L)^1.5) of each bearing."""
    t = fatigue.joint_life.plain(first=a, second=b)
    product = reliability ** ((t / a) ** 1.5) * reliability ** ((t / b) ** 1.5)
    assert product == pytest.approx(reliability, rel=1e-9)


@given(st.floats(-50, 400), st.floats(0, 100))
def test_a_hotter_bearing_never_has_more_rating(temperature, more):
    cool, hot = (fatigue.hot_rating_factor.plain(t) for t in (temperature, temperature + more))
    assert hot <= cool <= 1


def test_the_fatigue_limit_is_continuous_at_100_mm():
    below, above = (fatigue.fatigue_load_limit.plain(1e5, d, np.arange(4)) for d in (100.0, 100.0 + 1e-9))
    assert above == pytest.approx(below, rel=1e-9)


@pytest.mark.parametrize(
    ("kappa", "share", "additive", "expected"),
    [
        (0.5, 0.3, "extreme pressure", 1.0),
        (0.5, 0.2, "extreme pressure", 1.0),
        (0.5, 0.19, "extreme pressure", 0.5),
        (0.5, 0.3, "none", 0.5),
        (1.7, 0.3, "extreme pressure", 1.7),
    ],
)
def test_an_additive_stands_in_for_the_film_only_when_clean_enough(kappa, share, additive, expected):
    assert fatigue.effective_viscosity_ratio(kappa, share, additive).magnitude == expected


@pytest.mark.parametrize(("without", "helped", "expected"), [(0.4, 1.2, 1.2), (0.4, 9.0, 3.0), (5.0, 9.0, 5.0)])
def test_the_gain_from_an_additive_ends_at_three(without, helped, expected):
    assert fatigue.factor_with_additive(without=without, with_additive=helped).magnitude == expected


@given(kappas, shares, load_shares, kinds)
def test_without_additive_the_rule_changes_nothing(kappa, share, limit, kind):
    same = fatigue.effective_viscosity_ratio.plain(kappa, share, ADDITIVES.index("none"))
    factor, helped = a_iso(kappa, share, limit, kind), a_iso(same, share, limit, kind)
    assert fatigue.factor_with_additive.plain(without=factor, with_additive=helped) == factor


def test_doubling_the_load_divides_the_life_by_eight_for_balls_and_ten_for_rollers():
    for exponent, expected in ((3, 8), (10 / 3, 2 ** (10 / 3))):
        light, heavy = (
            fatigue.rating_life(dynamic_rating="50 kN", load=load, exponent=exponent) for load in ("5 kN", "10 kN")
        )
        assert (light / heavy).magnitude == pytest.approx(expected)


def test_modified_life_is_the_product():
    life = fatigue.modified_life(basic_life="10000 h", reliability_factor=0.64, life_modification_factor=2.5)
    assert life.to("h").magnitude == pytest.approx(16000)


def test_an_unknown_kind_or_setting_is_refused_with_the_nearest():
    with pytest.raises(ArgumentError, match="nearest: radial ball"):
        fatigue.fatigue_load_limit("20 kN", "60 mm", "radial balls")
    with pytest.raises(ArgumentError, match="nearest: very severe"):
        fatigue.contamination_factor(1.0, "60 mm", "very-severe")


def test_floats_and_arrays_give_the_same_numbers():
    alone = fatigue.contamination_factor.plain(1.3, 72.5, 1)
    rows = fatigue.contamination_factor.plain(np.full(3, 1.3), np.full(3, 72.5), np.full(3, 1))
    assert rows == pytest.approx([alone] * 3, rel=1e-14)
