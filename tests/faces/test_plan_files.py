"""The plan's files, read back by other programs' readers."""

from __future__ import annotations

import csv
import datetime
import io
import json
import stat

import icalendar
import openpyxl
import pytest
from conftest import BASE, with_key

import lubecheck
from lubecheck.errors import InputError
from lubecheck.faces import files, plan
from lubecheck.faces.calendar import to_ics
from lubecheck.model.reader import read_case
from lubecheck.model.schedule import schedule

START = datetime.date(2026, 12, 1)
TITLES = (
    'Fan 3, drive end; "old" nipple\nbehind the guard, äöü κ',
    '=HYPERLINK("x")',
    "Pump | 1 <b>bold</b> \\ `code`",
    "x" * 200 + "\N{GREEK SMALL LETTER KAPPA}" * 60,
    "bell \x07 and escape \x1b[31m",
)


def titled(title: str):
    text = with_key(BASE, "grease", "last_done", '"2026-10-05"')
    return lubecheck.check(read_case(f"title = {json.dumps(title)}\n{text}".replace("\\u00", "\\u00")))


@pytest.fixture(scope="module")
def rows():
    return schedule([titled(title) for title in TITLES], START, "monthly")


def test_the_csv_is_quoted_right_with_commas_quotes_and_line_ends(rows):
    read = list(csv.DictReader(io.StringIO(plan.to_csv(rows, START).decode("utf-8"), newline=""), strict=True))
    assert len(read) == len(TITLES)
    assert read[0]["position"] == TITLES[0]
    assert read[1]["position"] == "'" + TITLES[1]  # a spreadsheet must not run it
    assert "\x1b" not in read[4]["position"]
    for row, line in zip(rows, read, strict=True):
        assert line["next_due"] == row.next_due.isoformat()
        assert float(line["amount_g"]) == pytest.approx(row.amount_g, abs=1e-4)
        assert line["steps"].split("\n") == list(row.steps)
        assert line["strokes"] == ""


def test_the_workbook_reads_back_with_real_dates_and_numbers_and_no_formula(rows):
    sheet = openpyxl.load_workbook(io.BytesIO(plan.to_xlsx(rows, START))).worksheets[0]
    head = [cell.value.replace(" ", "_") for cell in sheet[1]]
    assert head == list(plan.COLUMNS)
    for row, cells in zip(rows, sheet.iter_rows(min_row=2), strict=True):
        by_name = dict(zip(head, cells, strict=True))
        due = by_name["next_due"]
        assert due.is_date
        assert due.value.date() == row.next_due
        assert by_name["last_done"].value.date() == datetime.date(2026, 10, 5)
        assert by_name["interval_h"].value == pytest.approx(row.interval_h)
        assert isinstance(by_name["planned_days"].value, int)
        assert all(cell.data_type != "f" for cell in cells)
    assert sheet["A2"].value == TITLES[0]


def test_the_calendar_opens_in_a_strict_parser(rows):
    raw = to_ics(rows, START)
    read = icalendar.Calendar.from_ical(raw)
    events = list(read.walk("VEVENT"))
    assert len(events) == len(TITLES)
    assert not any(component.errors for component in read.walk())
    assert events[0]["SUMMARY"] == f"regrease: {TITLES[0]}"
    assert events[3]["SUMMARY"] == f"regrease: {TITLES[3]}"
    for row, event in zip(rows, events, strict=True):
        assert event.decoded("DTSTART") == row.next_due
        assert event.decoded("DTEND") - event.decoded("DTSTART") == datetime.timedelta(days=1)
        assert dict(event["RRULE"])["FREQ"] == ["WEEKLY"]
        assert dict(event["RRULE"])["INTERVAL"] == [row.planned_days // 7]
        assert row.steps[0] in event["DESCRIPTION"]
    assert len({str(event["UID"]) for event in events}) == len(events)


def test_every_line_of_the_calendar_is_at_most_75_octets_and_ends_in_crlf(rows):
    raw = to_ics(rows, START)
    assert raw.count(b"\r\n") == raw.count(b"\n")
    assert all(len(line) <= 75 for line in raw.split(b"\r\n"))
    assert raw.decode("utf-8")  # no letter is cut in two


def test_a_position_keeps_its_name_from_plan_to_plan_and_two_alike_have_two(rows):
    def names(some):
        return [str(event["UID"]) for event in icalendar.Calendar.from_ical(to_ics(some, START)).walk("VEVENT")]

    assert names(rows[::-1]) == names(rows)[::-1]
    assert len(set(names([rows[0], rows[0]]))) == 2


def test_markdown_has_a_row_a_position_and_a_user_s_text_is_no_markup(rows):
    text = plan.to_markdown(rows, START).decode("utf-8")
    table = [line for line in text.splitlines() if line.startswith("|")]
    assert len(table) == 2 + len(TITLES)
    assert len({line.replace("\\|", "").count("|") for line in table}) == 1
    assert "<b>" not in text
    assert "\x1b" not in text


def test_json_has_a_line_a_position_and_no_endless_number(rows):
    record = json.loads(plan.to_json(rows))
    assert record["schema"] == "lubecheck/plan/1"
    assert record["lines"][0]["next_due"] == rows[0].next_due.isoformat()
    assert set(record["lines"][0]) == set(plan.COLUMNS)


@pytest.mark.parametrize("ending", ["csv", "xlsx", "ics", "md", "CSV"])
def test_each_ending_is_written(rows, tmp_path, ending):
    path = tmp_path / f"plan.{ending}"
    plan.write(rows, path, START)
    assert path.stat().st_size > 500
    assert [item.name for item in tmp_path.iterdir()] == [path.name]
    assert stat.S_IMODE(path.stat().st_mode) & 0o400


def test_an_unknown_ending_is_refused_with_the_nearest(rows, tmp_path):
    with pytest.raises(InputError, match=r"\.xlsx"):
        plan.write(rows, tmp_path / "plan.xls", START)


def test_a_failure_leaves_the_old_file_and_nothing_beside_it(tmp_path, monkeypatch):
    path = tmp_path / "plan.csv"
    path.write_bytes(b"old")

    def full(_: int) -> None:
        raise OSError(28, "No space left on device")

    monkeypatch.setattr(files.os, "fsync", full)
    with pytest.raises(InputError, match="No space left"):
        files.write_whole(path, b"new")
    assert path.read_bytes() == b"old"
    assert [item.name for item in tmp_path.iterdir()] == ["plan.csv"]


def test_a_folder_that_is_not_there_is_refused(tmp_path):
    with pytest.raises(InputError, match="No such file"):
        files.write_whole(tmp_path / "none" / "plan.csv", b"x")


def test_grams_in_files_are_those_of_a_scale_and_still_numbers():
    text = with_key(with_key(BASE, "grease", "fill", '"15.2671 g"'), "grease", "stroke", '"1.234 g"')
    made = schedule([lubecheck.check(read_case(text))], START, "quarterly")
    (line,) = csv.DictReader(io.StringIO(plan.to_csv(made, START).decode("utf-8"), newline=""), strict=True)
    sheet = openpyxl.load_workbook(io.BytesIO(plan.to_xlsx(made, START))).worksheets[0]
    cells = dict(zip((cell.value.replace(" ", "_") for cell in sheet[1]), sheet[2], strict=True))
    for name in ("first_fill_g", "housing_fill_g", "amount_g", "grease_g_per_year", "rounding_g_per_year"):
        shown = float(line[name])
        assert shown == round(shown, 1) == pytest.approx(getattr(made[0], name), abs=0.05)
        assert cells[name].value == pytest.approx(shown)
    assert line["first_fill_g"] == "15.3"
    assert line["stroke_g"] == "1.234"
