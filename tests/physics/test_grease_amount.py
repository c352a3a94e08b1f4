"""What must hold for grease amounts whatever the bearing."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.errors import ArgumentError, OutOfRange
from lubecheck.physics import grease_amount

PITCH = 100.0  # mm; with it a speed parameter n dm is a hundred times the speed
SPEEDS = np.exp(np.linspace(np.log(10.0), np.log(2e4), 4000))
LIMITS = st.floats(300.0, 15_000.0)


def first_fill(speed, limit):
    return grease_amount.first_fill.plain(speed=speed, speed_limit=limit, pitch_diameter=PITCH)


def allowed_fill(speed, limit):
    return grease_amount.allowed_fill.plain(speed=speed, speed_limit=limit, pitch_diameter=PITCH)


@given(LIMITS)
def test_the_fill_is_continuous_and_never_rises_with_speed(limit):
    for share in (
        *first_fill(SPEEDS, limit),
        *allowed_fill(SPEEDS, limit),
    ):
        assert np.all(np.diff(share) <= 1e-12)
        assert np.max(np.abs(np.diff(share))) < 0.01
        assert np.all((share > 0) & (share <= 1))


@given(st.floats(10.0, 2e4), LIMITS)
def test_a_proposed_fill_is_well_within_what_is_allowed(speed, limit):
    low, nominal, high = first_fill(speed, limit)
    lower, upper = allowed_fill(speed, limit)
    assert lower <= low < nominal < high <= upper
    assert max(nominal / upper, lower / nominal) <= 0.85  # a proposal must not be judged "near" its own limit


def test_the_fill_falls_near_the_speed_limit():
    upper = allowed_fill(np.array([3600.0, 4050.0, 4500.0]), 4500.0)[1]
    assert upper == pytest.approx([0.50, 0.425, 0.35])


# Dimension series 02 and 03 of ISO 15 and handbook masses (memory): deep groove, cylindrical, spherical roller.
BEARINGS = [
    (25.0, 52.0, 15.0, 130.0),
    (35.0, 80.0, 21.0, 460.0),
    (45.0, 100.0, 25.0, 830.0),
    (65.0, 140.0, 33.0, 2100.0),
    (50.0, 110.0, 27.0, 1140.0),
    (90.0, 160.0, 40.0, 3400.0),
]


@pytest.mark.parametrize(("bore", "outside", "width", "mass"), BEARINGS)
def test_no_regrease_quantity_exceeds_the_free_volume(bore, outside, width, mass):
    room = grease_amount.free_volume.plain(bore=bore, outside=outside, width=width, mass=mass)
    rules = np.arange(len(grease_amount.REGREASE_GRAMS))
    doses = grease_amount.regrease_quantity_by_rule.plain(outside=outside, width=width, rule=rules)
    assert np.max(doses) <= grease_amount.grease_mass.plain(room, grease_amount.GREASE_DENSITY)


@given(st.floats(10.0, 300.0), st.floats(1.3, 3.0), st.floats(5.0, 200.0), st.floats(0.1, 0.6))
def test_free_volume_by_share_and_by_mass_agree_for_the_mass_that_the_share_leaves(bore, ratio, width, share):
    size = {"bore": bore, "outside": bore * ratio, "width": width}
    by_share = grease_amount.free_volume_from_share.plain(**size, free_share=share)
    steel = by_share / share * (1 - share) * 7.85
    assert grease_amount.free_volume.plain(**size, mass=steel) == pytest.approx(by_share, rel=1e-9)


def test_a_mass_that_does_not_fit_the_bearing_is_refused():
    with pytest.raises(OutOfRange):
        grease_amount.free_volume(bore="45 mm", outside="100 mm", width="25 mm", mass="8.3 kg")


def test_sizes_are_named_not_counted_off():
    with pytest.raises(TypeError):
        grease_amount.free_volume("45 mm", "100 mm", "25 mm", "0.83 kg")
    with pytest.raises(ArgumentError, match="mass"):
        grease_amount.free_volume(bore="45 mm", outside="100 mm", width="25 mm", mass="0.83 mm")


def test_the_side_rule_is_the_first_of_the_rules():
    assert grease_amount.regrease_quantity_by_rule.plain(outside=100.0, width=25.0, rule=0) == pytest.approx(
        grease_amount.regrease_quantity.plain(outside=100.0, width=25.0), rel=1e-12
    )
