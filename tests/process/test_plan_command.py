"""lubecheck plan as a real process."""

from __future__ import annotations

import json
import os
import subprocess
import sys

import pytest
from conftest import BASE, ROOT


def run(*arguments: str, stdin: str | None = None) -> subprocess.CompletedProcess[str]:
    env = {k: v for k, v in os.environ.items() if k not in ("NO_COLOR", "FORCE_COLOR", "CLICOLOR", "COLUMNS")}
    return subprocess.run(
        [sys.executable, "-m", "lubecheck", *arguments], input=stdin, capture_output=True, encoding="utf-8", cwd=ROOT,
        env={**env, "PYTHONIOENCODING": "utf-8", "COLUMNS": "120"}, check=False,
    )  # fmt: skip


GOOD, BAD = "examples/new_motor.toml", "examples/slow_roller.toml"


def test_the_plan_of_many_cases_ends_with_the_worst_verdict():
    assert run("plan", GOOD, "--from", "2026-12-01").returncode == 0
    done = run("plan", GOOD, BAD, "--from", "2026-12-01", "--route", "monthly")
    assert done.returncode == 1
    assert "next due 2026-12-01" in done.stdout
    assert "10 strokes of 1.20 g" in done.stdout
    assert not done.stderr


@pytest.mark.parametrize("ending", ["csv", "xlsx", "ics", "md"])
def test_a_file_is_written_and_said_on_standard_error(tmp_path, ending):
    path = tmp_path / f"plan.{ending}"
    done = run("plan", GOOD, "--to", str(path))
    assert done.returncode == 0, done.stderr
    assert path.exists()
    assert not done.stdout
    assert "wrote 1 lines" in done.stderr


def test_json_and_standard_input():
    done = run("plan", "-", "--json", "--from", "2026-12-01", stdin=BASE)
    assert json.loads(done.stdout)["lines"][0]["planned_days"] == 112


def test_a_measured_temperature_reaches_the_plan_and_one_that_nothing_explains_holds_it_back():
    text = (ROOT / "examples" / "measured_fan.toml").read_text(encoding="utf-8")
    assert run("plan", "-", stdin=text).returncode == 0
    hotter = run("plan", "-", "--json", stdin=text.replace("48 degC", "51 degC"))
    assert hotter.returncode == 1  # the planned year is too long for a bearing that runs so hot
    assert json.loads(hotter.stdout)["lines"][0]["governing"] == "interval"
    assert run("plan", "-", stdin=text.replace("48 degC", "90 degC")).returncode == 3


def test_every_fault_of_every_case_is_told_and_nothing_is_written(tmp_path):
    path = tmp_path / "plan.csv"
    done = run("plan", GOOD, "none.toml", "-", "--to", str(path), stdin=BASE.replace('"1480 rpm"', '"1480"'))
    assert done.returncode == 2
    assert len(done.stderr.splitlines()) == 2
    assert not path.exists()
    assert "Traceback" not in done.stderr


@pytest.mark.parametrize("arguments", [("--to", "plan.doc"), ("--route", "hourly"), ("--from", "soon"),
                                       ("--to", "/none/plan.csv")])  # fmt: skip
def test_bad_usage_is_refused_without_a_traceback(arguments):
    done = run("plan", GOOD, *arguments)
    assert done.returncode == 2
    assert done.stderr
    assert "Traceback" not in done.stderr


def test_help_has_an_example():
    done = run("plan", "--help")
    assert done.returncode == 0
    assert "Example" in done.stdout


def test_a_workbook_writer_is_loaded_only_when_a_workbook_is_asked_for():
    script = (
        f"import sys\nsys.argv = ['lubecheck', 'plan', {GOOD!r}]\nfrom lubecheck.__main__ import run\n"
        "try:\n    run()\nexcept SystemExit:\n    pass\nprint('\\n'.join(sys.modules), file=sys.stderr)\n"
    )
    done = subprocess.run([sys.executable, "-c", script], capture_output=True, text=True, cwd=ROOT, check=True)
    roots = {name.partition(".")[0] for name in done.stderr.split()}
    assert "lubecheck" in roots
    assert not roots & {"openpyxl", "icalendar", "CoolProp", "scipy", "pint", "pandas"}


def test_what_was_given_is_told_with_how_long_to_wait():
    done = run("plan", "examples/regreased_fan.toml", "--from", "2026-12-01")
    assert "by the warm-up" in " ".join(done.stdout.split())


def test_the_help_says_how_long_the_rounds_of_a_route_are():
    told = " ".join(run("plan", "--help").stdout.replace("\u2502", " ").split())
    assert "weekly is 7 days, monthly 28, quarterly 91" in told


def test_a_reading_over_the_trip_is_the_first_step_of_the_plan():
    case = BASE + '\n[limits]\nalarm = "85 degC"\ntrip = "95 degC"\n\n[measured]\ntemperature = "110 degC"\n'
    done = run("plan", "-", "--json", stdin=case)
    assert done.returncode == 1
    steps = json.loads(done.stdout)["lines"][0]["steps"]
    assert steps[0].startswith("Read 110 degC, trip 95 degC: stop")
