"""The warm-up in the terminal and in the record."""

from __future__ import annotations

import io

import pytest
from conftest import BASE
from rich.console import Console

from lubecheck.faces.course_chart import Line, course_chart
from lubecheck.faces.record import of_result
from lubecheck.faces.terminal import print_result
from lubecheck.model.reader import read_case
from lubecheck.studies.remedies import check
from lubecheck.studies.warmup import judged


@pytest.fixture(scope="module")
def result():
    case = read_case(BASE + '\n[limits]\nalarm = "65 degC"\ntrip = "100 degC"\nstart_torque = "8 N*m"\n')
    return judged(case, check(case))


def printed(result, width: int, system: str = "si", encoding: str = "utf-8") -> str:
    class Stream(io.StringIO):
        @property
        def encoding(self):
            return encoding

    stream = Stream()
    print_result(result, Console(file=stream, width=width, no_color=True), system)
    return stream.getvalue()


@pytest.mark.parametrize("width", [80, 120])
def test_courses_and_chart_fit_the_terminal(result, width):
    text = printed(result, width)
    assert max(len(line) for line in text.splitlines()) <= width
    part = " ".join(text[text.index("Warm-up") :].split())
    for word in ("F first start", "S start", "G after greasing", "C cold start", "hours", "alarm at 65.0 degC",
                 "trip at 100 degC", "the drive has 8000 N*mm"):  # fmt: skip
        assert word in part
    assert "…" not in part


def test_a_plain_terminal_gets_plain_letters(result):
    text = printed(result, 80, encoding="ascii")
    assert text[text.index("Warm-up") : text.index("Not said")].isascii()


def test_inch_units_reach_the_chart(result):
    part = printed(result, 100, "inch")
    part = part[part.index("Warm-up") : part.index("Not said")]
    assert "degF" in part
    assert "degC" not in part
    assert "lbf*in" in part


def test_a_check_without_it_has_none():
    record = of_result(check(read_case(BASE)))
    assert record["warm_up"] is None


def test_the_record_has_curves_figures_and_crossings(result):
    record = of_result(result)["warm_up"]
    assert [course["name"] for course in record["courses"]] == ["first start", "start", "after greasing", "cold start"]
    for course in record["courses"]:
        curve = course["curve"]
        assert len(curve["time"]["values"]) == len(curve["sensor"]["values"]) == len(curve["bearing"]["values"]) > 20
        assert (curve["time"]["unit"], curve["sensor"]["unit"]) == ("h", "degC")
        assert {"value", "unit", "low", "high"} == set(course["figures"]["peak"])
        assert [crossing["name"] for crossing in course["crossings"]] == ["alarm", "trip"]
    assert record["cold_start"]["drive"] == {"value": 8000.0, "unit": "N*mm"}


def test_a_line_stands_where_its_temperature_is():
    lines = course_chart([Line("A", (0.0, 10.0), (20.0, 70.0))], until=10.0, width=70, is_plain=True)
    rows = [str(line) for line in lines if "A" in str(line)]
    assert len(rows) >= 11
    columns = [row.index("A") for row in rows]
    assert columns == sorted(columns, reverse=True)  # a rising line: the lowest row has the earliest time


def test_a_level_far_above_the_courses_does_not_flatten_them():
    def drawn(trip: float) -> str:
        return "\n".join(
            str(line)
            for line in course_chart(
                [Line("A", (0.0, 1.0), (20.0, 25.0))], until=1.0, width=60, is_plain=True, levels={"trip": trip}
            )
        )

    assert "trip" in drawn(27.0)
    assert "trip" not in drawn(150.0)
