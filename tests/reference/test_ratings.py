"""Estimated ratings against published handbook ratings, family by family (tests/tables/handbook_ratings.csv, memory).

The shapes of the series were fitted to the same figures, so this says how well one shape describes a whole series,
and no more. `WORST` is the report: the greatest deviation of an estimate from its published figure. The aim is 15 %.
"""

import csv
import math
from pathlib import Path

import pytest

from lubecheck.data import bearings, internals
from lubecheck.data.families import FAMILIES

# Family: worst deviation of C and of C0, as estimate over published less 1. What misses the aim is irregular in print:
# 6200, 1205, 2214 and 21306 have other balls or rollers than their neighbours, 16002 and 618 are thin.
WORST = {
    "deep groove ball": (0.23, 0.24),
    "double row deep groove ball": (0.09, 0.12),
    "self-aligning ball": (0.23, 0.23),
    "angular contact ball": (0.11, 0.09),
    "double row angular contact ball": (0.21, 0.10),
    "four-point contact ball": (0.05, 0.03),
    "cylindrical roller": (0.14, 0.21),
    "full complement cylindrical roller": (0.15, 0.15),
    "needle roller": (0.15, 0.13),
    "tapered roller": (0.07, 0.08),
    "spherical roller": (0.25, 0.14),
    "thrust ball": (0.15, 0.15),
    "thrust cylindrical roller": (0.18, 0.10),
    "thrust spherical roller": (0.06, 0.06),
}
AIM = 0.15


def published():
    text = Path(__file__).parents[1].joinpath("tables", "handbook_ratings.csv").read_text(encoding="utf-8")
    rows = {}
    for row in csv.DictReader(line for line in text.splitlines() if not line.startswith("#")):
        found = bearings.find(row["designation"])
        ratings = (1000 * float(row["dynamic_rating"]), 1000 * float(row["static_rating"]))
        rows.setdefault(found.family, []).append((found, *ratings))
    return rows


PUBLISHED = published()


def test_every_family_has_published_ratings():
    assert set(PUBLISHED) == set(FAMILIES) == set(WORST)


@pytest.mark.parametrize("family", FAMILIES)
def test_the_worst_deviation_is_the_one_reported(family, report):
    dynamic = max(PUBLISHED[family], key=lambda row: abs(row[0].dynamic_rating / row[1] - 1))
    static = max(PUBLISHED[family], key=lambda row: abs(row[0].static_rating / row[2] - 1))
    worst = (dynamic[0].dynamic_rating / dynamic[1] - 1, static[0].static_rating / static[2] - 1)
    report.append(
        f"worst estimated ratings, {family}: C {worst[0]:+.1%} ({dynamic[0].designation}), "
        f"C0 {worst[1]:+.1%} ({static[0].designation})"
    )
    assert abs(worst[0]) <= WORST[family][0], dynamic[0].designation
    assert abs(worst[1]) <= WORST[family][1], static[0].designation
    # the report is kept honest: it is not a generous bound
    assert abs(worst[0]) > WORST[family][0] - 0.02
    assert abs(worst[1]) > WORST[family][1] - 0.02


@pytest.mark.parametrize("family", FAMILIES)
def test_nine_in_ten_estimates_meet_the_aim(family):
    deviations = [
        abs(estimate / print_ - 1)
        for found, dynamic, static in PUBLISHED[family]
        for estimate, print_ in ((found.dynamic_rating, dynamic), (found.static_rating, static))
    ]
    assert sum(deviation <= AIM for deviation in deviations) >= 0.9 * len(deviations)


@pytest.mark.parametrize("family", FAMILIES)
def test_nine_in_ten_published_ratings_lie_in_the_spread_of_the_estimate(family):
    spreads = internals.SPREADS[family]
    inside = [
        low <= print_ / estimate <= high
        for found, dynamic, static in PUBLISHED[family]
        for estimate, print_, (low, high) in (
            (found.dynamic_rating, dynamic, spreads.dynamic),
            (found.static_rating, static, spreads.static),
        )
    ]
    assert sum(inside) >= 0.9 * len(inside)


@pytest.mark.parametrize("family", FAMILIES)
def test_estimates_are_not_one_sided(family):
    bias = sum(math.log(found.dynamic_rating / dynamic) for found, dynamic, _ in PUBLISHED[family])
    # the memory of thrust cylindrical ratings is weak, and its C and C0 do not belong to one set of rollers
    allowed = 0.12 if family == "thrust cylindrical roller" else 0.04
    assert abs(bias / len(PUBLISHED[family])) < allowed


# Factor f0 that makers print beside C0 for deep groove bearings, to one decimal (memory).
@pytest.mark.parametrize(
    ("name", "f0"), [("6205", 14), ("6210", 14), ("6216", 15), ("6308", 13), ("6309", 13), ("6316", 13), ("6010", 16),
                     ("6020", 16), ("6410", 12)]
)  # fmt: skip
def test_f0_for_the_relative_axial_load_is_that_of_handbooks(name, f0):
    assert bearings.find(name).f0_load == pytest.approx(f0, rel=0.1)


# Fatigue load limits of handbooks in kN (memory), by the full method of ISO 281; the estimate has a spread for them.
@pytest.mark.parametrize(
    ("name", "limit"), [("6205", 0.335), ("6210", 0.98), ("6309", 1.34), ("6316", 3.2), ("NU 210", 8.8), ("NU 310", 15),
                        ("22218", 39.0), ("22320", 83.0), ("30210", 10.4), ("7309 B", 1.73)]
)  # fmt: skip
def test_fatigue_load_limits_of_handbooks_lie_in_the_spread_of_the_estimate(name, limit):
    found = bearings.find(name)
    low, high = found.estimated["fatigue_limit"]
    assert low * found.fatigue_limit <= 1000 * limit <= high * found.fatigue_limit
