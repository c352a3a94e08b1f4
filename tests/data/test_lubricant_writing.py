"""Adding to a user's own file: valid, kept, refused twice, whole or not at all."""

from __future__ import annotations

import os
from pathlib import Path

import pytest

from lubecheck.data import lubricant_writing, lubricants
from lubecheck.data.lubricant_writing import add
from lubecheck.errors import InputError, TableError

FACTS = {"key": "motor-grease", "kind": "grease", "thickener": "polyurea", "nlgi": "2", "nu_40": "110 cSt",
         "index": "95", "ep": "no", "highest": "302 degF"}  # fmt: skip
OIL = {"key": "mill-oil", "kind": "oil", "base_oil": "mineral", "nu_40": "0.68 St", "nu_100": "8.5 cSt",
       "note": 'drum 7, "left" [b]\\ ü'}  # fmt: skip


@pytest.mark.parametrize("name", ["ours.toml", "ours.csv"])
def test_what_is_added_is_read_back_and_the_first_stays(tmp_path: Path, name: str) -> None:
    path = tmp_path / name
    first, second = add(path, FACTS), add(path, OIL)
    found = lubricants.load(path)
    assert list(found) == ["motor-grease", "mill-oil"]
    assert found["motor-grease"] == first
    assert found["mill-oil"] == second
    assert (first.nu_40, first.highest, first.ep) == (110.0, pytest.approx(150.0), False)
    assert second.note == OIL["note"]


def test_what_stood_in_a_file_stays_to_the_byte(tmp_path: Path) -> None:
    path = tmp_path / "ours.toml"
    old = (
        b'\xef\xbb\xbf# our oils\r\n\r\n[[lubricant]] # bath\r\nkey = "bath"\r\nkind = "oil"\r\n'
        b'nu_40 = "68 cSt"\r\nnu_100 = "8.5 cSt"'
    )
    path.write_bytes(old)
    os.chmod(path, 0o640)
    add(path, FACTS)
    new = path.read_bytes()
    assert new.startswith(old + b"\r\n")
    assert b"\n" not in new.replace(b"\r\n", b"")
    assert path.stat().st_mode & 0o777 == 0o640
    assert list(lubricants.load(path)) == ["bath", "motor-grease"]


def test_a_csv_with_units_in_its_headings_gets_numbers_and_the_columns_it_lacks(tmp_path: Path) -> None:
    path = tmp_path / "ours.csv"
    path.write_text('# ours\nkey;kind;nu_40 [St];nu_100;note\n\nbath;oil;0.68;8.5 cSt;"two\nlines"\n', encoding="utf-8")
    before = lubricants.load(path)["bath"]
    add(path, FACTS)
    lines = path.read_text(encoding="utf-8").splitlines()
    assert lines[0] == "# ours"
    assert lines[1] == "key;kind;nu_40 [St];nu_100;note;thickener;nlgi;ep;index;highest"
    assert lines[-1] == "motor-grease;grease;1.1;;;polyurea;2;no;95;302 degF"
    found = lubricants.load(path)
    assert found["bath"] == before
    assert found["motor-grease"].nu_40 == pytest.approx(110.0)


@pytest.mark.parametrize(
    ("key", "word"),
    [
        ("motor-grease", "has it already"),
        ("Motor Grease", "small letters"),
        ("motor.grease", "has it already"),  # the same when it is called by name
        ("polyurea-110-2", "generic lubricant"),
        ("", "a short name"),
        ("-x", "small letters"),
    ],
)
def test_a_key_that_is_taken_or_none_is_refused(tmp_path: Path, key: str, word: str) -> None:
    path = tmp_path / "ours.toml"
    add(path, FACTS)
    before = path.read_bytes()
    with pytest.raises(InputError, match=word):
        add(path, {**FACTS, "key": key})
    assert path.read_bytes() == before


def test_all_faults_of_an_entry_come_at_once_and_nothing_is_written(tmp_path: Path) -> None:
    path = tmp_path / "ours.toml"
    with pytest.raises(InputError) as refused:
        add(path, {**FACTS, "key": "Bad Key", "nu_40": "5 N", "colour": "red"})
    assert {fault.key for fault in refused.value.faults} == {"key", "nu_40", "colour"}
    assert list(tmp_path.iterdir()) == []


@pytest.mark.parametrize(
    ("name", "text"),
    [
        ("ours.toml", '[[lubricant]]\nkey = "x"\nkind = "oil"\nnu_40 = "5 N"\n'),
        ("ours.toml", 'lubricant = [{key = "x", kind = "oil", nu_40 = "68 cSt", nu_100 = "8 cSt"}]\n'),
        ("ours.toml", "[oil]\n"),
        ("ours.csv", "key,kind\nx,oil,1\n"),
    ],
)
def test_a_file_that_is_not_sound_is_not_added_to(tmp_path: Path, name: str, text: str) -> None:
    path = tmp_path / name
    path.write_text(text, encoding="utf-8")
    with pytest.raises(TableError):
        add(path, FACTS)
    assert path.read_text(encoding="utf-8") == text
    assert [one.name for one in tmp_path.iterdir()] == [name]


def test_a_fault_while_writing_leaves_the_old_file_and_no_part(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    path = tmp_path / "ours.toml"
    add(path, FACTS)
    before = path.read_bytes()

    def full(_: int) -> None:
        raise OSError(28, "No space left on device")

    monkeypatch.setattr(lubricant_writing.os, "fsync", full)
    with pytest.raises(TableError, match="No space left"):
        add(path, OIL)
    assert path.read_bytes() == before
    assert [one.name for one in tmp_path.iterdir()] == ["ours.toml"]


def test_a_folder_that_is_not_there_is_refused(tmp_path: Path) -> None:
    with pytest.raises(TableError, match="cannot be written"):
        add(tmp_path / "none" / "ours.toml", FACTS)
    with pytest.raises(TableError):
        add(tmp_path, FACTS)


def test_a_link_stays_a_link(tmp_path: Path) -> None:
    (tmp_path / "store").mkdir()
    link = tmp_path / "ours.toml"
    link.symlink_to(tmp_path / "store" / "real.toml")
    add(link, FACTS)
    assert link.is_symlink()
    assert list(lubricants.load(tmp_path / "store" / "real.toml")) == ["motor-grease"]


def test_a_range_may_be_added_too(tmp_path: Path) -> None:
    path = tmp_path / "ours.toml"
    one = add(path, {**FACTS, "nu_40_range": "100..120 cSt"})
    assert one.ranges == {"nu_40": (100.0, 120.0)}
    assert lubricants.load(path)["motor-grease"] == one
