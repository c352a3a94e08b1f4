"""The tables of boundary dimensions: no size falls where the next bore is greater, and a broken table is refused."""

from itertools import pairwise
from pathlib import Path

import pytest

from lubecheck.data import bearing_series, dimensions
from lubecheck.data.bearing_series import SERIES
from lubecheck.errors import TableError

TABLES = Path(__file__).parents[1] / "tables"


@pytest.mark.parametrize("standard", dimensions.STANDARDS)
def test_a_greater_bore_is_never_in_a_smaller_bearing(standard):
    by_series = {}
    for (series, bore), size in dimensions.table(standard).items():
        by_series.setdefault(series, []).append((bore, size.outside, size.width))
    for series, sizes in by_series.items():
        for smaller, larger in pairwise(sorted(sizes)):
            assert larger[1] > smaller[1] or standard == "iso-9628", (series, larger)
            assert larger[2] >= smaller[2], (series, larger)


def test_a_higher_width_series_is_never_narrower():
    table = dimensions.table("iso-15")
    for (series, bore), size in table.items():
        for wider in "12346":
            if wider > series[0] and (wider + series[1], bore) in table:
                other = table[wider + series[1], bore]
                assert other.width >= size.width, (series, bore)
                assert other.outside == size.outside


@pytest.mark.parametrize("series", SERIES, ids=lambda series: series.name(50.0))
def test_every_series_has_sizes_within_its_bores(series):
    bores = sorted(series.boundaries())
    assert len(bores) >= 9
    assert bores[0] >= series.least
    assert bores[-1] <= series.most


@pytest.mark.parametrize(
    "digits", ["60", "62", "63", "160", "618", "619", "72", "73", "222", "223", "302", "320", "511"]
)
def test_common_series_reach_200_mm(digits):
    series = next(series for series in SERIES if series.digits == digits and series.letters == ("",))
    assert max(series.boundaries()) >= 200
    assert min(series.boundaries()) <= 35


@pytest.mark.parametrize("digits", ["10", "2", "22", "3", "23"])
def test_cylindrical_series_reach_200_mm(digits):
    series = next(one for one in bearing_series.of_family("cylindrical roller") if one.digits == digits)
    assert max(series.boundaries()) >= 200


@pytest.mark.parametrize(
    ("text", "complaint"),
    [
        ("diameter_series,bore,outside,w0\n3,45,100,x\n", "w0"),
        ("diameter_series,bore,outside,w0\n3,45,40,25\n", "outside"),
        ("diameter_series,bore,outside,w0\n3,-45,100,25\n", "bore"),
        ("diameter_series,bore,outside,w0\n3,45,inf,25\n", "outside"),
        ("diameter_series,bore,outside,w0\n3,45,100,25\n3,45,100,26\n", "twice"),
    ],
)
def test_a_broken_row_is_refused_by_name(text, complaint):
    with pytest.raises(TableError, match=complaint):
        dimensions.parse(text, "iso-15", "iso_15.csv")


def test_the_broken_twin_is_refused():
    text = TABLES.joinpath("iso_355_broken.csv").read_text(encoding="utf-8")
    with pytest.raises(TableError, match=r"iso_355_broken\.csv: contact_angle"):
        dimensions.parse(text, "iso-355", "iso_355_broken.csv")
