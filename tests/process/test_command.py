"""The command as a real process: exit codes, streams, standard input, and what it imports."""

from __future__ import annotations

import json
import os
import subprocess
import sys

import pytest
from conftest import BASE, EXAMPLES, ROOT, with_key


def run(*arguments: str, stdin: str | None = None, **env: str) -> subprocess.CompletedProcess[str]:
    clean = {k: v for k, v in os.environ.items() if k not in ("NO_COLOR", "FORCE_COLOR", "CLICOLOR", "COLUMNS")}
    return subprocess.run(
        [sys.executable, "-m", "lubecheck", *arguments],
        input=stdin,
        capture_output=True,
        encoding="utf-8",
        cwd=ROOT,
        env={**clean, "PYTHONIOENCODING": "utf-8", "COLUMNS": "120", **env},
        check=False,
    )


@pytest.mark.parametrize(
    ("example", "options", "code"),
    [
        ("new_motor", (), 0),
        ("oil_bath_pump", (), 0),
        ("oil_bath_pump", ("--fail-on", "near"), 1),
        ("new_motor", ("--fail-on", "near"), 0),
        ("overfilled_motor", (), 1),
        ("slow_roller", (), 1),
        ("slow_roller", ("--json",), 1),
        ("measured_fan", (), 0),
        ("measured_fan", ("--warmup", "--fail-on", "near"), 1),
    ],
)
def test_the_exit_code_is_the_verdict(example, options, code):
    done = run("check", f"examples/{example}.toml", *options)
    assert done.returncode == code, done.stderr
    assert not done.stderr
    assert done.stdout


def test_unknown_and_nothing_beyond_is_3():
    done = run("check", "-", stdin=with_key(BASE, "surroundings", "coldest", None))
    assert done.returncode == 3
    assert "UNKNOWN" in done.stdout
    assert "[surroundings] coldest" in done.stdout


def test_a_refused_case_is_2_with_one_line_a_fault_on_standard_error():
    done = run("check", "-", stdin=with_key(with_key(BASE, "bearing", "mass", "1"), "duty", "speed", '"5"'))
    assert done.returncode == 2
    assert not done.stdout
    lines = done.stderr.splitlines()
    assert len(lines) == 2
    assert all(line.startswith("lubecheck: standard input:") for line in lines)
    assert "Traceback" not in done.stderr


@pytest.mark.parametrize("arguments", [("check",), ("chek", "x"), ("check", "none.toml"), ("check", "examples"),
                                       ("check", "examples/new_motor.toml", "--units", "furlong")])  # fmt: skip
def test_bad_usage_is_2_without_a_traceback(arguments):
    done = run(*arguments)
    assert done.returncode == 2
    assert "Traceback" not in done.stderr + done.stdout
    assert done.stderr


def test_a_designation_that_is_not_in_the_tables_is_2_with_the_nearest():
    done = run("bearings", "22218", "22291")
    assert done.returncode == 2
    assert "22218 spherical roller" in done.stdout
    assert done.stderr.startswith("lubecheck: designation: given")
    assert "nearest: 222" in done.stderr


def test_standard_input_is_read():
    by_name = run("check", "examples/new_motor.toml", "--json")
    by_stream = run("check", "-", "--json", stdin=(EXAMPLES / "new_motor.toml").read_text(encoding="utf-8"))
    assert by_name.stdout == by_stream.stdout


def test_version_and_help_with_an_example():
    assert run("--version").stdout.startswith("lubecheck 0.")
    for arguments in (("--help",), ("check", "--help"), ("bearings", "--help")):
        done = run(*arguments)
        assert done.returncode == 0
        assert "Example" in done.stdout


def test_shell_completion_is_offered():
    done = run("--show-completion", "bash", _TYPER_COMPLETE_TEST_DISABLE_SHELL_DETECTION="1")
    assert done.returncode == 0
    assert "complete" in done.stdout


def test_json_is_strict_and_has_the_schema():
    def refuse(word: str) -> None:
        raise AssertionError(word)

    done = run("check", "examples/slow_roller.toml", "--json")
    record = json.loads(done.stdout, parse_constant=refuse)
    assert list(record)[:7] == ["schema", "title", "verdict", "governing", "limits", "operating", "duty"]
    assert record["schema"] == "lubecheck/check/1"


def test_no_color_takes_the_colour_away_and_the_words_stay():
    coloured = run("check", "examples/overfilled_motor.toml", FORCE_COLOR="1")
    plain = run("check", "examples/overfilled_motor.toml", FORCE_COLOR="1", NO_COLOR="1")
    assert "\x1b[31m" in coloured.stdout or "\x1b[1;7;31m" in coloured.stdout
    assert "31m" not in plain.stdout
    assert "BEYOND" in plain.stdout


def test_a_terminal_that_cannot_show_every_letter_gets_an_answer():
    done = run("check", "examples/new_motor.toml", PYTHONIOENCODING="ascii")
    assert done.returncode == 0, done.stderr
    assert "WITHIN" in done.stdout


def test_a_reader_that_goes_away_is_no_fault():
    shell = f"{sys.executable} -m lubecheck check examples/new_motor.toml | head -n 1"
    done = subprocess.run(["bash", "-c", shell], capture_output=True, text=True, cwd=ROOT, check=False)
    assert "Traceback" not in done.stderr
    assert "internal fault" not in done.stderr


def imported_by(*arguments: str) -> set[str]:
    script = (
        "import sys\n"
        f"sys.argv = ['lubecheck', *{list(arguments)!r}]\n"
        "from lubecheck.__main__ import run\n"
        "try:\n    run()\n"
        "except SystemExit:\n    pass\n"
        "print('\\n'.join(sys.modules), file=sys.stderr)\n"
    )
    done = subprocess.run([sys.executable, "-c", script], capture_output=True, text=True, cwd=ROOT, check=True)
    return set(done.stderr.split())


@pytest.mark.parametrize("options", [(), ("--json",)])
@pytest.mark.parametrize("example", ["new_motor", "measured_fan"])
def test_check_starts_light(example, options):
    modules = imported_by("check", f"examples/{example}.toml", *options)
    roots = {name.partition(".")[0] for name in modules}
    assert "lubecheck" in roots
    assert not roots & {"CoolProp", "scipy", "pint", "pandas", "pydantic", "dask", "xarray", "mpmath", "unittest"}


def test_the_check_of_a_cool_case_loads_no_search():
    assert not {"lubecheck.studies.needs", "lubecheck.studies.changes"} & imported_by(
        "check", "examples/new_motor.toml"
    )
    assert "lubecheck.studies.needs" in imported_by("check", "examples/overfilled_motor.toml")


def test_a_temperature_to_hold_that_is_none_is_refused():
    for text in ("banana", "", "70"):
        done = run("check", "examples/new_motor.toml", "--hold", text)
        assert done.returncode == 2
        assert done.stderr.startswith(f'lubecheck: hold: given "{text}"; expected a temperature')


def test_a_temperature_to_hold_is_asked_for_by_an_option():
    done = run("check", "examples/oil_bath_pump.toml", "--hold", "62 degC")
    assert done.returncode == 0, done.stderr
    assert "What alone would hold 62 degC" in done.stdout
    needs = json.loads(run("check", "examples/oil_bath_pump.toml", "--hold", "62 degC", "--json").stdout)["needs"]
    assert {"means", "now", "needed", "unit", "note"} <= set(needs[0])
    assert "oil flow" in {need["means"] for need in needs}
    assert "What alone would hold" not in run("check", "examples/oil_bath_pump.toml").stdout
    refused = run("check", "examples/oil_bath_pump.toml", "--hold", "62 mm")
    assert refused.returncode == 2
    assert 'hold: given "62 mm"' in refused.stderr


def test_exact_fluids_asks_coolprop():
    assert "CoolProp" in imported_by("check", "examples/new_motor.toml", "--exact-fluids")


def test_importing_the_package_loads_next_to_nothing():
    script = "import sys, lubecheck; print('\\n'.join(sys.modules))"
    done = subprocess.run([sys.executable, "-c", script], capture_output=True, text=True, cwd=ROOT, check=True)
    assert "numpy" not in done.stdout.split()
