"""Grades of viscosity and consistency against their standards."""

from __future__ import annotations

import itertools
import re

import pytest

from lubecheck.data import grades

# ISO 3448:1992, Table 1: grade, least and greatest kinematic viscosity at 40 degC in mm^2/s.
ISO_3448 = [
    (2.2, 1.98, 2.42),
    (3.2, 2.88, 3.52),
    (4.6, 4.14, 5.06),
    (6.8, 6.12, 7.48),
    (10, 9.00, 11.0),
    (15, 13.5, 16.5),
    (22, 19.8, 24.2),
    (32, 28.8, 35.2),
    (46, 41.4, 50.6),
    (68, 61.2, 74.8),
    (100, 90.0, 110),
    (150, 135, 165),
    (220, 198, 242),
    (320, 288, 352),
    (460, 414, 506),
    (680, 612, 748),
    (1000, 900, 1100),
    (1500, 1350, 1650),
    (2200, 1980, 2420),
    (3200, 2880, 3520),
]


@pytest.mark.parametrize(("grade", "low", "high"), ISO_3448)
def test_a_grade_has_the_limits_of_the_standard(grade: float, low: float, high: float) -> None:
    limits = grades.iso_vg_limits(grade)
    assert (limits.low, limits.high) == (pytest.approx(low), pytest.approx(high))
    assert grades.iso_vg_of(low) == grade
    assert grades.iso_vg_of(high) == grade
    assert grades.iso_vg_of(high * 1.01) is None


def test_there_are_the_20_grades_of_the_standard_and_no_other() -> None:
    assert [grade for grade, _, _ in ISO_3448] == list(grades.ISO_VG)


# AGMA 9005-D94, seen: 1 46, 2 68, 3 100, 4 150, 5 220, 6 320, 7 460, 8 680.
@pytest.mark.parametrize(
    ("number", "grade"),
    [("1", 46), ("2", 68), ("3", 100), ("4", 150), ("5", 220), ("6", 320), ("7", 460), ("8", 680)],
)
def test_an_agma_number_is_its_iso_grade(number: str, grade: int) -> None:
    assert grades.AGMA[number] == grade
    assert grades.agma_of(grade) == number


# SAE J300, seen: 20 5.6-9.3 (before 2013; 6.9 since), 30 9.3-12.5, 40 12.5-16.3, 50 16.3-21.9, 60 21.9-26.1.
@pytest.mark.parametrize(
    ("grade", "low", "high"),
    [("20", 5.6, 9.3), ("30", 9.3, 12.5), ("40", 12.5, 16.3), ("50", 16.3, 21.9), ("60", 21.9, 26.1)],
)
def test_an_sae_engine_grade_lies_in_the_limits_of_the_standard(grade: str, low: float, high: float) -> None:
    found = grades.SAE_ENGINE[grade]
    assert low <= found[0] <= 6.9 if grade == "20" else found[0] == low
    assert found[1] == high
    assert grades.sae_engine_of(high - 0.1) == grade


# Grade tables: SAE 30 is about VG 100, 40 about 150, 50 about 220 (VI 95 oils have 11.1, 14.5 and 18.8 at 100 degC).
@pytest.mark.parametrize(("nu_100", "engine", "gear"), [(11.1, "30", "85"), (14.5, "40", "90"), (18.8, "50", "110")])
def test_the_usual_equivalents_of_iso_grades_come_out(nu_100: float, engine: str, gear: str) -> None:
    assert grades.sae_engine_of(nu_100) == engine
    assert grades.sae_gear_of(nu_100) == gear


def test_the_gear_grades_join_without_gap_or_overlap() -> None:
    limits = list(grades.SAE_GEAR.values())
    assert [high for _, high in limits[:-1]] == [low for low, _ in limits[1:]]


def test_consistency_grades_are_30_wide_and_15_apart() -> None:
    # DIN 51818 / ASTM D217: 000 begins at 445, each harder grade 45 lower, each 30 wide.
    spans = list(grades.NLGI_PENETRATION.values())
    assert spans[0] == (445, 475)
    assert all(high - low == 30 for low, high in spans)
    assert all(softer[0] - harder[0] == 45 for softer, harder in itertools.pairwise(spans))


def test_every_table_of_grades_names_its_body_and_its_edition() -> None:
    assert set(grades.EDITIONS) == {"ISO VG", "SAE engine", "SAE gear", "AGMA", "NLGI"}
    for edition in grades.EDITIONS.values():
        assert re.match(r"(ISO|SAE|AGMA|DIN) ", edition)
        assert re.search(r"\b(19|20)\d\d\b", edition), edition


# SAE J306 of 2019, memory: 70 5.0 (before: 4.1), 75 6.5 (4.1), 80 8.5 (7.0), 85 11.0, 90 13.5, 110 18.5, 140 24.0, 190
# 32.5, 250 41.0 mm^2/s at 100 degC; the edition that split 65 and 70 off.
@pytest.mark.parametrize(
    ("grade", "low"),
    [("65", 3.8), ("70", 5.0), ("75", 6.5), ("80", 8.5), ("85", 11.0), ("90", 13.5), ("110", 18.5), ("140", 24.0),
     ("190", 32.5), ("250", 41.0)],
)  # fmt: skip
def test_an_sae_gear_grade_begins_where_its_edition_says(grade: str, low: float) -> None:
    assert grades.SAE_GEAR[grade][0] == low


def test_an_oil_has_its_grades_by_viscosity_alone() -> None:
    assert grades.equivalents(220.0, 18.8)["AGMA"] == "AGMA 5"
    assert "ISO VG" not in grades.equivalents(80.0, 9.0)  # between two grades there is none
    assert grades.equivalents(2.2, 0.9) == {"ISO VG": "ISO VG 2.2"}
