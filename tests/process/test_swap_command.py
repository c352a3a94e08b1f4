"""`lubecheck swap` as a real process: one candidate, many, a plant, and what it loads."""

from __future__ import annotations

import json
import os
import subprocess
import sys

import pytest
from conftest import BASE, EXAMPLES, ROOT


def run(*arguments: str, stdin: str | None = None) -> subprocess.CompletedProcess[str]:
    return subprocess.run(
        [sys.executable, "-m", "lubecheck", *arguments], input=stdin, capture_output=True, encoding="utf-8", cwd=ROOT,
        env={**os.environ, "PYTHONIOENCODING": "utf-8", "COLUMNS": "120", "NO_COLOR": "1"}, check=False,
    )  # fmt: skip


def record(*arguments: str, stdin: str | None = None) -> dict:
    def refuse(word: str) -> None:
        raise AssertionError(word)

    return json.loads(run(*arguments, "--json", stdin=stdin).stdout, parse_constant=refuse)


@pytest.mark.parametrize(
    ("case", "to", "code"),
    [("clay_motor", "polyurea-110-2", 1), ("slow_fan", "lithium-complex-pao-220-2-ep", 0),
     ("pag_gearbox", "pag-vg-220", 1), ("oven_conveyor", "aluminium-complex-150-2", 0)],
)  # fmt: skip
def test_the_exit_code_is_the_verdict(case, to, code):
    done = run("swap", f"examples/swap/{case}.toml", "--to", to)
    assert done.returncode == code, done.stderr
    assert "Before" in done.stdout
    assert not done.stderr


def test_the_record_has_the_schema_and_no_figure_without_unit():
    made = record("swap", "examples/swap/slow_fan.toml", "--to", "lithium-complex-pao-220-2-ep")
    assert made["schema"] == "lubecheck/swap/1"
    one = made["candidates"][0]
    keys = ("name", "verdict", "governing", "reason", "after", "sides", "compatibility", "seals", "differences",
            "mixture", "change_over")  # fmt: skip
    assert set(keys) <= set(one)
    assert all({"value", "unit"} <= set(figure) for figure in one["after"]["figures"].values())
    assert {limit["name"] for limit in one["after"]["limits"]} == {limit["name"] for limit in made["before"]["limits"]}


def test_the_whole_table_is_searched_and_ranked():
    made = record("swap", "-", "--all", "--kind", "grease", stdin=BASE)
    assert len(made["candidates"]) == 40
    done = run("swap", "-", "--all", stdin=BASE)
    assert "40 candidates, the best first" in done.stdout
    assert "do not mix" in done.stdout


def test_a_file_of_your_own_and_several_names(tmp_path):
    own = tmp_path / "mine.toml"
    own.write_text('[[lubricant]]\nkey = "store-7"\nname = "store 7"\nkind = "grease"\nthickener = "polyurea"\n'
                   'base_oil = "mineral"\nnlgi = "2"\nnu_40 = "115 mm^2/s"\nnu_100 = "12 mm^2/s"\nlowest = "-30 degC"\n'
                   'highest = "150 degC"\n', encoding="utf-8")  # fmt: skip
    made = record("swap", "-", "--to", "store-7", "--to", "clay-220-2", "--lubricants", str(own), stdin=BASE)
    assert [one["name"] for one in made["candidates"]] == ["store-7", "clay-220-2"]


def test_a_folder_is_a_plant():
    made = record("swap", "examples/swap", "--to", "lithium-complex-pao-220-2-ep", "--to", "polyurea-110-2")
    assert made["schema"] == "lubecheck/swap-plant/1"
    assert len(made["positions"]) == 4
    done = run("swap", "examples/swap", "--to", "lithium-complex-pao-220-2-ep", "--to", "polyurea-110-2")
    assert done.returncode == 1  # the gearbox is oil lubricated
    assert "Hold out" in done.stdout


@pytest.mark.parametrize(
    "arguments",
    [("swap", "examples/new_motor.toml"), ("swap", "examples/new_motor.toml", "--to", "nothing"),
     ("swap", "examples/new_motor.toml", "--to", "mineral-vg-68"), ("swap", "tests/tables", "--to", "clay-220-2"),
     ("swap", "examples/new_motor.toml", "--all", "--kind", "oil"),
     ("swap", "examples/new_motor.toml", "--to", "clay-220-2", "--lubricants", "none.csv")],
)  # fmt: skip
def test_bad_usage_is_2_without_a_traceback(arguments):
    done = run(*arguments)
    assert done.returncode == 2
    assert "Traceback" not in done.stderr + done.stdout
    assert done.stderr


def test_help_has_an_example():
    done = run("swap", "--help")
    assert done.returncode == 0
    assert "Example" in done.stdout


def test_a_swap_of_one_position_starts_light():
    script = (
        "import sys\nsys.argv = ['lubecheck', 'swap', 'examples/new_motor.toml', '--all']\n"
        "from lubecheck.__main__ import run\n"
        "try:\n    run()\nexcept SystemExit:\n    pass\nprint('\\n'.join(sys.modules), file=sys.stderr)\n"
    )
    done = subprocess.run([sys.executable, "-c", script], capture_output=True, text=True, cwd=ROOT, check=True)
    roots = {name.partition(".")[0] for name in done.stderr.split()}
    assert not roots & {"CoolProp", "scipy", "pint", "pandas"}


def test_a_failing_check_says_what_would_bring_it_back():
    done = run("check", "examples/overfilled_motor.toml")
    assert "What would bring it back" in done.stdout
    made = json.loads(run("check", "examples/overfilled_motor.toml", "--json").stdout)
    assert made["remedies"][0]["verdict_after"] == "within"
    assert {"change", "use_after", "verdict_after", "note"} <= set(made["remedies"][0])
    assert (EXAMPLES / "overfilled_motor.toml").exists()
