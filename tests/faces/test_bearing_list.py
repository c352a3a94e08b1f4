"""The command `bearings`: sheets, lists, where figures come from, exit codes."""

from __future__ import annotations

import json

import pytest
from typer.testing import CliRunner

from lubecheck.data import bearings
from lubecheck.data.families import FAMILIES
from lubecheck.errors import InputError
from lubecheck.faces.cli import app
from lubecheck.model.bearing_sheet import named

NEEDED = {"bore": "mm", "outside": "mm", "width": "mm", "dynamic_rating": "N", "static_rating": "N",
          "fatigue_limit": "N", "minimum_load": "N", "speed_limit_grease": "rpm", "speed_limit_oil": "rpm",
          "kinematic_limit": "rpm", "top_temperature": "degC", "free_volume": "cm^3", "usual_fill": "g"}  # fmt: skip


def run(*arguments):
    return CliRunner().invoke(app, ["bearings", *arguments], env={"COLUMNS": "120", "NO_COLOR": "1"})


def record(*arguments):
    def refuse(word):
        raise AssertionError(word)

    done = run(*arguments, "--json")
    assert done.exit_code == 0
    made = json.loads(done.stdout, parse_constant=refuse)
    assert made["schema"] == "lubecheck/bearings/1"
    return made


def test_three_designations_with_every_figure():
    made = record("6309", "22218", "NU 310")
    assert [one["designation"] for one in made["bearings"]] == ["6309", "22218", "NU 310"]
    for one in made["bearings"]:
        assert {name: one["figures"][name]["unit"] for name in NEEDED} == NEEDED
        assert one["figures"]["bore"]["status"] == "standard"
        rating = one["figures"]["dynamic_rating"]
        assert rating["status"] == "estimated"
        assert rating["low"] < rating["value"] < rating["high"]
    text = run("6309", "22218", "NU 310").stdout
    for part in ("6309 deep groove ball", "22218 spherical roller", "NU 310 cylindrical roller", "usual fill"):
        assert part in text


@pytest.mark.parametrize("family", FAMILIES)
def test_every_family_has_a_sheet_and_a_list(family):
    name = bearings.designations(family)[len(bearings.designations(family)) // 2]
    made = record(name)["bearings"][0]
    assert made["family"] == family
    assert all(figure["value"] > 0 for figure in made["figures"].values() if figure["unit"] != "deg")
    assert name in [one["designation"] for one in record("--family", family)["sizes"]]
    assert name in run("--family", family).stdout


def test_figures_of_the_user_are_called_so():
    figures = record("examples/new_motor.toml")["bearings"][0]["figures"]
    assert {figures[name]["status"] for name in ("dynamic_rating", "static_rating", "mass")} == {"user"}
    assert figures["bore"]["status"] == "standard"
    assert figures["fatigue_limit"]["status"] == "estimated"


def test_free_volume_and_usual_fill_are_those_of_handbooks():
    """6206: 11.4 to 12.2 cm^3 by two published formulas (memory); 30 % of it at 0.9 g/cm^3."""
    figures = {one.name: one for one in named("6206").figures}
    assert figures["free_volume"].value == pytest.approx(11.8, rel=0.1)
    assert figures["usual_fill"].value == pytest.approx(0.3 * 0.9 * figures["free_volume"].value)


def test_inch_units():
    text = run("6309", "--units", "inch").stdout
    assert "1.77  in" in text
    assert "lbf" in text
    assert " mm" not in text


def test_what_cannot_be_regreased_and_what_was_not_understood_is_said():
    text = run("6309-2RS/C3 XQ9").stdout
    assert "cannot be regreased" in text
    assert "not understood in the designation: XQ9" in text
    assert "regrease quantity" not in text


def test_an_unknown_designation_gives_the_nearest_and_the_others_are_shown():
    done = run("6390", "6309")
    assert isinstance(done.exception, InputError)  # exit code 2, by the entry point
    assert "nearest: 63" in str(done.exception)
    assert "6309 deep groove ball" in done.stdout


def test_an_unknown_family_gives_the_nearest():
    done = run("--family", "tapered rollers")
    assert isinstance(done.exception, InputError)
    assert "nearest: tapered roller" in str(done.exception)
    assert isinstance(run("6309", "--family", "tapered roller").exception, InputError)


def test_without_arguments_the_families_are_listed():
    made = record()
    assert [one["family"] for one in made["families"]] == list(FAMILIES)
    assert all(one["sizes"] > 0 and one["series"] for one in made["families"])
    assert "NU 10" in run().stdout


@pytest.mark.parametrize("width", ["80", "120"])
def test_no_line_is_wider_than_the_terminal_and_no_unit_is_cut(width):
    done = CliRunner().invoke(app, ["bearings", "7209 BEP", "30213"], env={"COLUMNS": width})
    assert all(len(line.rstrip()) <= int(width) for line in done.stdout.splitlines())
    assert "…" not in done.stdout
