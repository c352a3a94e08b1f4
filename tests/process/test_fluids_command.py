"""`fluids` and a user's own lubricants as real processes: exit codes, streams, files."""

from __future__ import annotations

import json
import os
import subprocess
import sys
from pathlib import Path

import pytest
from conftest import EXAMPLES, ROOT

OURS = """\
[[lubricant]]
key = "motor-grease"
kind = "grease"
base_oil = "mineral"
thickener = "polyurea"
nlgi = 2
nu_40 = "110 cSt"
index = 95
lowest = "-30 degC"
highest = "150 degC"
"""


def run(*arguments: str, stdin: str = "", **env: str) -> subprocess.CompletedProcess[str]:
    dropped = ("NO_COLOR", "FORCE_COLOR", "CLICOLOR", "COLUMNS", "LUBECHECK_LUBRICANTS")
    clean = {k: v for k, v in os.environ.items() if k not in dropped}
    return subprocess.run(
        [sys.executable, "-m", "lubecheck", *arguments],
        input=stdin,
        capture_output=True,
        encoding="utf-8",
        cwd=ROOT,
        env={**clean, "PYTHONIOENCODING": "utf-8", "COLUMNS": "100", **env},
        check=False,
    )


@pytest.fixture
def ours(tmp_path: Path) -> Path:
    path = tmp_path / "ours.toml"
    path.write_text(OURS, encoding="utf-8")
    return path


@pytest.fixture
def case() -> str:
    text = (EXAMPLES / "new_motor.toml").read_text(encoding="utf-8")
    return text.replace("lithium-complex-150-2", "motor-grease")


def test_the_list_is_filtered() -> None:
    done = run("fluids", "--kind", "grease", "--thickener", "polyurea", "--base-oil", "mineral", "--nu40", "100..150",
               "--up-to", "140degC", "--down-to", "-25degC")  # fmt: skip
    assert (done.returncode, done.stderr) == (0, "")
    assert "polyurea-110-2" in done.stdout
    assert "lithium" not in done.stdout


def test_every_wrong_filter_is_told_at_once_by_its_option() -> None:
    done = run("fluids", "--kind", "greese", "--nu40", "a..b", "--up-to", "140")
    assert (done.returncode, done.stdout) == (2, "")
    lines = done.stderr.splitlines()
    assert [line.split(": ")[1] for line in lines] == ["--kind", "--nu40", "--up-to"]
    assert "nearest: grease" in lines[0]


def test_a_lubricant_is_shown_by_name_at_the_temperatures_asked_for() -> None:
    done = run("fluids", "Mineral VG 68", "--at", "60degC", "--at", "176 degF")
    assert done.returncode == 0, done.stderr
    assert "28.4" in done.stdout
    assert "14.5" in done.stdout  # 176 degF is 80 degC


def test_several_are_compared_with_what_a_case_needs() -> None:
    done = run("fluids", "mineral-vg-68", "CLP HC 68", "--for", "examples/oil_bath_pump.toml")
    assert done.returncode == 0, done.stderr
    assert "kappa 1" in done.stdout
    assert "B has it up to" in done.stdout


def test_for_a_case_alone_shows_its_own_lubricant() -> None:
    done = run("fluids", "--for", "examples/new_motor.toml")
    assert done.returncode == 0, done.stderr
    assert "lithium-complex-150-2" in done.stdout
    assert "13.7 mm^2/s, which 6309 needs at 1480 rpm" in done.stdout


@pytest.mark.parametrize(
    ("arguments", "word"),
    [
        (("polyuria-110-2",), "polyurea-110-2"),
        (("a-x", "b-y"), "lubricant of the tables"),
        (("mineral-vg-68", "--at", "60"), "--at"),
        (("mineral-vg-68", "--at", "900 degC"), "ASTM D341"),
        (("mineral-vg-68", "--nlgi", "2"), "names or filters"),
        (("--for", "none.toml"), "no such file"),
        (("--set", "a=1"), "without --add"),
        (("--units", "furlong"), "furlong"),
        (tuple(f"mineral-vg-{n}" for n in range(13)), "at most 12"),
    ],
)
def test_a_bad_question_is_2_with_a_word_why_and_no_traceback(arguments: tuple[str, ...], word: str) -> None:
    done = run("fluids", *arguments)
    assert (done.returncode, done.stdout) == (2, "")
    assert word in done.stderr
    assert "Traceback" not in done.stderr


def test_json_has_the_schema_for_a_list_one_and_several(ours: Path) -> None:
    for arguments in ((), ("mineral-vg-68",), ("mineral-vg-68", "pao-vg-68", "--at", "60degC")):
        record = json.loads(run("fluids", *arguments, "--json", "--lubricants", str(ours)).stdout)
        assert record["schema"] == "lubecheck/fluids/1"
        assert all(item["viscosity"] for item in record["lubricants"])
    assert [item["key"] for item in record["lubricants"]] == ["mineral-vg-68", "pao-vg-68"]
    assert [state["temperature"]["value"] for state in record["lubricants"][0]["viscosity"]] == [60.0]
    assert json.loads(run("fluids", "--nlgi", "5", "--json").stdout)["lubricants"] == []


def test_a_case_calls_the_users_own_lubricant_by_option_or_environment(ours: Path, case: str) -> None:
    refused = run("check", "-", stdin=case)
    assert refused.returncode == 2
    assert "motor-grease" in refused.stderr
    by_option = run("check", "-", "--json", "--lubricants", str(ours), stdin=case)
    by_environment = run("check", "-", "--json", stdin=case, LUBECHECK_LUBRICANTS=str(ours))
    assert by_option.returncode in (0, 1)
    assert by_option.stdout == by_environment.stdout
    assert "polyurea" in json.loads(by_option.stdout)["inputs"]["lubricant"]
    wrong = run("check", "-", "--lubricants", str(ours), stdin=case.replace("motor-grease", "motor-greese"))
    assert "nearest: motor-grease" in wrong.stderr


def test_the_option_goes_before_the_environment(ours: Path, case: str) -> None:
    done = run("check", "-", "--lubricants", str(ours), stdin=case, LUBECHECK_LUBRICANTS="none.csv")
    assert done.returncode in (0, 1), done.stderr
    assert run("check", "examples/new_motor.toml", LUBECHECK_LUBRICANTS="").returncode == 0


@pytest.mark.parametrize("command", [("check", "examples/new_motor.toml"), ("fluids",)])
def test_a_broken_file_of_the_users_is_2_with_every_fault_on_a_line(tmp_path: Path, command: tuple[str, ...]) -> None:
    path = tmp_path / "ours.csv"
    path.write_text("key,kind,nu_40,nu_100\nx,oil,5 N,1\ny,fish,68 cSt,8 cSt\n", encoding="utf-8")
    done = run(*command, "--lubricants", str(path))
    assert (done.returncode, done.stdout) == (2, "")
    starts = ["lubecheck: ours.csv:2: row x, column nu_40:", "lubecheck: ours.csv:2: row x, column nu_100:",
              "lubecheck: ours.csv:3: row y, column kind:"]  # fmt: skip
    assert [line[: len(start)] for line, start in zip(done.stderr.splitlines(), starts, strict=True)] == starts


def test_the_users_own_stand_in_the_list(ours: Path) -> None:
    done = run("fluids", "--thickener", "polyurea", "--lubricants", str(ours))
    assert "motor-grease *" in done.stdout


ADDED = ("--kind", "grease", "--thickener", "polyurea", "--base-oil", "mineral", "--nlgi", "2", "--no-ep", "--nu40",
         "110", "--up-to", "150degC", "--down-to", "-30degC", "--set", "index=95")  # fmt: skip


@pytest.mark.parametrize("name", ["ours.toml", "ours.csv"])
def test_a_lubricant_is_added_by_flags_and_used_in_a_case(tmp_path: Path, case: str, name: str) -> None:
    path = tmp_path / name
    done = run("fluids", "motor-grease", "--add", str(path), *ADDED)
    assert (done.returncode, done.stderr) == (0, "")
    assert "Added motor-grease" in done.stdout
    assert "assumed" in done.stdout
    judged = run("check", "-", "--lubricants", str(path), stdin=case)
    assert judged.returncode in (0, 1), judged.stderr
    before = path.read_bytes()
    again = run("fluids", "motor-grease", "--add", str(path), *ADDED)
    assert again.returncode == 2
    assert "has it already" in again.stderr
    assert path.read_bytes() == before
    second = run("fluids", "fan-grease", "--add", str(path), *ADDED, "--json")
    assert json.loads(second.stdout)["lubricants"][0]["key"] == "fan-grease"
    listed = json.loads(run("fluids", "--json", "--lubricants", str(path)).stdout)["lubricants"]
    assert [item["key"] for item in listed if item["is_own"]] == ["motor-grease", "fan-grease"]


def test_wrong_flags_of_an_addition_are_told_at_once_and_write_nothing(tmp_path: Path) -> None:
    path = tmp_path / "ours.toml"
    done = run("fluids", "Bad Key", "--add", str(path), "--kind", "greese", "--nu40", "5 N", "--set", "colour=red")
    assert done.returncode == 2
    assert len(done.stderr.splitlines()) == 4
    assert not path.exists()
    for arguments in (("a", "b"), ("a", "--at", "60degC"), ("a", "--for", "examples/new_motor.toml"),
                      ("a", "--set", "index"), ("a", "--kind", "oil", "--set", "kind=oil")):  # fmt: skip
        assert run("fluids", *arguments, "--add", str(path)).returncode == 2
    assert not path.exists()


def test_without_flags_it_asks_and_asks_again_until_the_answers_make_a_lubricant(tmp_path: Path) -> None:
    path = tmp_path / "ours.toml"
    answers = ["Mill Oil", "mill-oil", "fish", "oil", "", "mineral", "no", "68", "68 cSt", "", "", "-20 degC",
               "400 degC", "", "", "100 degC"]  # fmt: skip
    # The key and the kind are asked again at once, nu_40 has no unit, and highest is asked again at the end.
    done = run("fluids", "--add", str(path), stdin="\n".join(answers) + "\n")
    assert done.returncode == 0, done.stderr
    assert "small letters" in done.stderr
    assert "Added mill-oil" in done.stdout
    text = path.read_text(encoding="utf-8")
    assert 'nu_40 = "68 cSt"' in text
    assert 'highest = "100 degC"' in text


def test_answers_that_end_too_soon_are_2_and_write_nothing(tmp_path: Path) -> None:
    path = tmp_path / "ours.toml"
    done = run("fluids", "--add", str(path), stdin="mill-oil\noil\n")
    assert done.returncode == 2
    assert "Traceback" not in done.stderr
    assert not path.exists()


def test_a_terminal_of_ascii_gets_a_chart_and_no_color_takes_the_colour_away() -> None:
    plain = run(
        "fluids", "mineral-vg-68", "pao-vg-68", "--for", "examples/oil_bath_pump.toml", PYTHONIOENCODING="ascii"
    )
    assert plain.returncode == 0, plain.stderr
    assert plain.stdout.isascii()
    assert "?" not in plain.stdout
    coloured = run("fluids", "mineral-vg-68", "pao-vg-68", FORCE_COLOR="1")
    bare = run("fluids", "mineral-vg-68", "pao-vg-68", FORCE_COLOR="1", NO_COLOR="1")
    assert "\x1b[36m" in coloured.stdout
    assert "\x1b[36m" not in bare.stdout


def test_help_has_examples_that_work() -> None:
    done = run("fluids", "--help")
    assert done.returncode == 0
    assert "Example" in done.stdout
    assert "LUBECHECK_LUBRICANTS" in done.stdout
