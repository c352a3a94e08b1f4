"""A user's own file: as spreadsheets and editors write it, and every fault at once with its place."""

from __future__ import annotations

import contextlib
from pathlib import Path

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.data import lubricants
from lubecheck.data.lubricant_files import read_lubricants
from lubecheck.errors import TableError

HEAD = "key,kind,nu_40 [cSt],nu_100 [cSt],note\n"


def lines_of(name: str, text: str) -> list[str]:
    with pytest.raises(TableError) as refused:
        read_lubricants(Path(name), text)
    return str(refused.value).splitlines()


def test_a_cell_may_hold_a_comma_a_quote_and_a_line_break() -> None:
    text = HEAD + 'bath,oil,68,8.5,"one, ""two""\nthree"\nmill,oil,150,14.5,\n'
    first, second = read_lubricants(Path("a.csv"), text)
    assert first.note == 'one, "two"\nthree'
    assert second.key == "mill"
    # The row after one that goes over two lines is named by its own line.
    assert lines_of("a.csv", text.replace("150", "x"))[0].startswith("a.csv:4: row mill, column nu_40:")


@pytest.mark.parametrize("mark", [";", "\t"])
def test_cells_may_be_parted_as_spreadsheets_do(mark: str) -> None:
    (one,) = read_lubricants(Path("a.csv"), (HEAD + "bath,oil,68,8.5,x\n").replace(",", mark))
    assert (one.nu_40, one.nu_100) == (68, 8.5)


def test_a_decimal_comma_is_refused_with_a_word_why() -> None:
    (said,) = lines_of("a.csv", (HEAD + "bath,oil,68,8,x\n").replace(",", ";").replace("68;", "68,5;"))
    assert "column nu_40" in said
    assert "decimal point" in said


def test_all_faults_of_a_csv_come_at_once_with_line_and_column() -> None:
    text = "# ours\n" + HEAD + "bath,oil,68,8.5\nmill,oli,-5,8.5,x\n,oil,68,8.5,x\nGear,oil,220,19,x\nok,oil,68,8.5,x\n"
    places = [line.split(" given")[0].split("; expected")[0] for line in lines_of("a.csv", text)]
    assert places == [
        "a.csv:3: 4 cells",
        "a.csv:4: row mill, column kind:",
        "a.csv:4: row mill, column nu_40:",
        "a.csv:5: row (no key), column key:",
        "a.csv:6: row Gear, column key:",
    ]


def test_all_faults_of_a_toml_come_at_once_with_line_and_key() -> None:
    text = """
[[lubricant]]
key = "bath"
kind = "oil"
nu_40 = "68"
nu_100 = "8.5 cSt"
colour = "red"

[[lubricant]]
key = "bath"
kind = "oil"
nu_40 = "68 cSt"
nu_100 = "8.5 cSt"

[[lubricant]]
key = "bath"
kind = "oil"
nu_40 = "68 cSt"
nu_100 = "8.5 cSt"
"""
    places = [line.split(" given")[0] for line in lines_of("a.toml", text)]
    assert places == [
        "a.toml:2: row bath, column nu_40:",
        "a.toml:2: row bath, column colour:",
        "a.toml:15: row bath, column key:",
    ]


@pytest.mark.parametrize(
    ("raw", "word"),
    [
        (b'key,kind\n"x,oil\n', "no row of a CSV"),
        (b'key,kind\n"x"y,oil\n', "no row of a CSV"),
        (b"key,kind\n\xff,oil\n", ":2: is no text in UTF-8"),
        (b"Key?,kind,kind\nx,oil,oil\n", "kind stands twice"),
        (b"\n\n,,\n", "no lubricant in it"),
        (b"\x00", "expected a field"),
    ],
)
def test_a_file_that_is_no_table_is_refused_with_its_line(tmp_path: Path, raw: bytes, word: str) -> None:
    (tmp_path / "a.csv").write_bytes(raw)
    with pytest.raises(TableError, match=word):
        lubricants.load(tmp_path / "a.csv")


@given(st.text(max_size=200))
def test_any_text_is_a_table_or_is_refused(text: str) -> None:
    for name in ("a.csv", "a.toml"):
        found: object = None
        with contextlib.suppress(TableError):
            found = read_lubricants(Path(name), text)
        assert found != []


def test_a_directory_and_a_bad_name_are_refused(tmp_path: Path) -> None:
    for path in (tmp_path, tmp_path / "none.csv", "a\0b.csv"):
        with pytest.raises(TableError, match="cannot be read"):
            lubricants.load(path)
