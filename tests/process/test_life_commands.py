"""circuit, life and --losses as a user runs them."""

from __future__ import annotations

import json
import os
import subprocess
import sys

import pytest
from conftest import ROOT


def run(*arguments, stdin=None, **environment):
    return subprocess.run(
        [sys.executable, "-m", "lubecheck", *arguments], capture_output=True, text=True, cwd=ROOT, check=False,
        input=stdin, env={**os.environ, "COLUMNS": "100", **environment},
    )  # fmt: skip


def test_circuit_prints_every_position_in_every_state_and_its_json_is_strict():
    done = run("circuit", "examples/gearbox/circuit.toml")
    assert done.returncode == 0, done.stderr
    for words in ("pinion (damaged)", "middle", "output", "all together", "Failure travels", "the filter is worth"):
        assert words in " ".join(done.stdout.split())
    record = json.loads(run("circuit", "examples/gearbox/circuit.toml", "--json").stdout)
    assert record["schema"] == "lubecheck/circuit/1"
    assert [state["name"] for state in record["states"]] == ["as it is", "with debris", "filtered"]


def test_life_answers_with_exit_codes_by_whether_it_is_reached():
    assert run("life", "examples/oil_bath_pump.toml").returncode == 0
    short = run("life", "examples/oil_bath_pump.toml", "--wanted", "60000 h", "--json")
    assert short.returncode == 1
    record = json.loads(short.stdout)
    assert record["schema"] == "lubecheck/life/1"
    assert {one["question"] for one in record["answers"]} == {"load", "rating", "viscosity", "cleanliness"}
    refused = run("life", "examples/oil_bath_pump.toml", "--wanted", "60000")
    assert refused.returncode == 2
    assert "expected" in refused.stderr
    assert not refused.stdout


def test_losses_prints_the_account_and_check_without_it_does_not():
    with_it = run("check", "examples/overfilled_motor.toml", "--losses").stdout
    assert "Loss account of the fatigue life" in with_it
    assert "overfill" in with_it
    assert "Loss account" not in run("check", "examples/overfilled_motor.toml").stdout


def test_system_prints_each_bearing_and_all_together():
    cases = ("examples/new_motor.toml", "examples/oil_bath_pump.toml")
    done = run("system", *cases)
    assert done.returncode == 0, done.stderr
    assert "all together" in done.stdout
    record = json.loads(run("system", *cases, "--json").stdout)
    assert record["schema"] == "lubecheck/system/1"
    assert record["life_h"] < min(part["life_h"] for part in record["parts"])


@pytest.mark.parametrize("command", ["circuit", "life", "system"])
def test_help_has_an_example_and_a_missing_file_is_refused(command):
    assert "Example: lubecheck" in " ".join(run(command, "--help").stdout.split())
    done = run(command, "no/such.toml")
    assert (done.returncode, done.stdout) == (2, "")
    assert "no such file" in done.stderr


@pytest.mark.parametrize("width", ["80", "120"])
def test_no_line_is_wider_than_the_terminal(width):
    for arguments in (("circuit", "examples/gearbox/circuit.toml"), ("life", "examples/oil_bath_pump.toml"),
                      ("system", "examples/oil_bath_pump.toml", "examples/new_motor.toml"),
                      ("check", "examples/oil_bath_pump.toml", "--losses")):  # fmt: skip
        text = run(*arguments, COLUMNS=width).stdout
        assert text
        assert all(len(line.rstrip()) <= int(width) for line in text.splitlines()), arguments


def test_a_case_from_standard_input():
    case = (ROOT / "examples" / "oil_bath_pump.toml").read_text(encoding="utf-8")
    assert run("life", "-", stdin=case).stdout == run("life", "examples/oil_bath_pump.toml").stdout
