"""Grease amounts against published quantities and calculations by hand."""

import numpy as np
import pytest

from lubecheck.physics import grease_amount


@pytest.mark.parametrize(
    ("bore", "outside", "width", "mass", "low", "high"),
    # free space by two published formulas that agree within 10 % (memory): 6206 11.4 to 12.2 cm^3, NU 208 18.5 to 20.4,
    # 30208 19.3 to 20.6; masses of the bearings 200, 375 and 425 g (catalogues, memory)
    [
        (30.0, 62.0, 16.0, 200.0, 11.4, 12.2),
        (40.0, 80.0, 18.0, 375.0, 18.5, 20.4),
        (40.0, 80.0, 19.75, 425.0, 19.3, 20.6),
    ],
)
def test_free_volume_agrees_with_published_free_space(bore, outside, width, mass, low, high):
    found = grease_amount.free_volume.plain(bore=bore, outside=outside, width=width, mass=mass)
    assert found == pytest.approx((low + high) / 2, rel=0.10)


def test_free_volume_is_what_a_hand_calculation_gives():
    # 6309: pi/4 (100^2 - 45^2) 25 = 156 589 mm^3; 830 g / 7.85 = 105.73 cm^3
    found = grease_amount.free_volume(bore="45 mm", outside="100 mm", width="25 mm", mass="0.83 kg")
    assert found.to("cm^3").magnitude == pytest.approx(50.856, abs=0.001)
    # the same bearing in inches and pounds
    found = grease_amount.free_volume(
        bore="1.7716535 in", outside="3.9370079 in", width="0.98425197 in", mass="1.8298 lb"
    )
    assert found.to("cm^3").magnitude == pytest.approx(50.856, abs=0.02)


@pytest.mark.parametrize(
    ("outside", "width", "grams"),
    # Neale p. A20.5 and a motor maker's sheet: 6307 8.4 g, 6313 23.1 g; the others by hand, 0.005 D B
    [
        (80.0, 21.0, 8.4),  # 6307
        (140.0, 33.0, 23.1),  # 6313
        (52.0, 15.0, 3.9),  # 6205
        (100.0, 25.0, 12.5),  # 6309
        (170.0, 39.0, 33.15),  # 6316
        (110.0, 27.0, 14.85),  # NU 310
        (150.0, 28.0, 21.0),  # NU 217
        (160.0, 40.0, 32.0),  # 22218
        (90.0, 21.75, 9.7875),  # 30210
        (320.0, 108.0, 172.8),  # 22330
    ],
)
def test_regrease_quantity_from_the_side_is_the_published_one(outside, width, grams):
    assert grease_amount.regrease_quantity.plain(outside=outside, width=width) == pytest.approx(grams, rel=1e-9)


def test_regrease_quantity_in_ounces_and_inches_is_the_sheet_s():
    found = grease_amount.regrease_quantity(outside="1 in", width="1 in").to("oz").magnitude
    assert found == pytest.approx(0.1138, abs=0.00005)  # motor maker's sheet: 0.1138 oz/in^2; 0.1 is a known misprint


@pytest.mark.parametrize(
    ("rule", "grams"), [("side", 5.0), ("groove", 2.0), ("weekly", 2.0), ("monthly", 3.0)]
)  # handbooks: 0.005, 0.002, 0.002 and 0.003 g/mm^2 (memory but for the side rule), here on 100 mm x 10 mm
def test_other_ways_and_rhythms_take_the_published_share(rule, grams):
    found = grease_amount.regrease_quantity_by_rule(outside="100 mm", width="10 mm", rule=rule)
    assert found.to("g").magnitude == pytest.approx(grams, rel=1e-9)
    assert list(grease_amount.REGREASE_GRAMS).index(rule) == ["side", "groove", "weekly", "monthly"].index(rule)


def test_a_neglected_bearing_takes_twice_the_side_rule():
    # handbooks: D B 0.01 g/mm^2 (memory); 22218 by hand 64 g
    assert grease_amount.purge_quantity.plain(outside=160.0, width=40.0) == pytest.approx(64.0, rel=1e-9)


def test_continuous_feeding_lies_within_a_second_handbook_s_wider_range():
    # one handbook: 0.3 to 0.5 10^-4 D B g/h; another: 0.5 to 20 kg/h a m^3 of free volume (both memory); 6309
    low, nominal, high = grease_amount.continuous_feed.plain(outside=100.0, width=25.0)
    assert [low, nominal, high] == pytest.approx([0.075, 0.1, 0.125], rel=1e-9)
    assert 0.5 * 50.9e-3 <= low <= high <= 20 * 50.9e-3  # of its 50.9 cm^3


@pytest.mark.parametrize("speed", [1500.0, 2000.0, 3000.0])  # n dm 150 000 to 300 000 of a limit of 450 000
def test_fill_at_normal_speed_is_the_handbooks(speed):
    low, nominal, high = grease_amount.first_fill.plain(speed=speed, speed_limit=4500.0, pitch_diameter=100.0)
    assert [low, nominal, high] == pytest.approx([0.25, 0.30, 0.35])  # handbooks: 25 to 35 %
    lower, upper = grease_amount.allowed_fill.plain(speed=speed, speed_limit=4500.0, pitch_diameter=100.0)
    assert upper == pytest.approx(0.50)  # Neale: 30 to 50 %
    assert lower == pytest.approx(0.20)


def test_fill_of_a_slow_bearing_may_be_whole():
    low, nominal, high = grease_amount.first_fill.plain(
        speed=np.array([50.0, 500.0]), speed_limit=4500.0, pitch_diameter=100.0
    )
    assert np.all(high >= 0.9)  # handbooks: up to 90 to 100 % below 50 000
    assert np.all((low < nominal) & (nominal < high))
    _, upper = grease_amount.allowed_fill.plain(speed=500.0, speed_limit=4500.0, pitch_diameter=100.0)
    assert upper == pytest.approx(1.0)


def test_a_closed_bearing_is_filled_by_its_maker_whatever_its_speed():
    # handbooks, memory: 25 to 35 % of the free space
    for speed in (5.0, 500.0, 1500.0, 4400.0):
        found = grease_amount.first_fill.plain(speed=speed, speed_limit=4500.0, pitch_diameter=100.0, sealing=1)
        assert [float(share) for share in found] == [0.25, 0.30, 0.35]


def test_the_space_beside_a_bearing_is_filled_by_orientation_and_speed():
    # Neale: 30 to 50 %; upright half above and three quarters below (memory): 62 % of both; slow ones 90 to 100 %
    level = [float(x) for x in grease_amount.housing_fill.plain(1500.0, 100.0, 0)]
    assert level == pytest.approx([0.30, 0.40, 0.50])
    upright = [float(x) for x in grease_amount.housing_fill.plain(1500.0, 100.0, 1)]
    assert upright[2] == pytest.approx((0.5 + 0.75) / 2, abs=0.006)
    assert level[1] < upright[1] < upright[2]
    assert float(grease_amount.housing_fill.plain(50.0, 100.0, 0)[2]) == pytest.approx(0.90)


def test_grease_of_ordinary_density_weighs_900_grams_a_litre():
    assert grease_amount.grease_mass("1 l", "0.9 g/cm^3").to("g").magnitude == pytest.approx(900.0)
    assert grease_amount.GREASE_DENSITY == 900.0


def test_the_time_with_the_way_out_open_is_that_of_common_practice():
    # Motor makers' sheets, memory: 10 to 30 min at 4 and 2 poles; at 300 rpm the same turns take five times as long
    for speed, minutes in ((1480.0, (10.1, 20.3, 30.4)), (2960.0, (10, 20, 30)), (300.0, (50, 100, 150))):
        found = np.array(grease_amount.purge_run.plain(speed)) * 60
        assert found == pytest.approx(np.array(minutes), rel=0.01)
    assert grease_amount.purge_run.plain(1.0) == (8.0, 8.0, 8.0)
    slower = np.array(grease_amount.purge_run.plain(np.geomspace(1.0, 1e5, 500)))
    assert np.all(np.diff(slower, axis=1) <= 0)
