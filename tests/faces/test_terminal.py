"""The terminal verdict: words with every colour, both unit systems, 80 columns, and a user's text that is no markup."""

from __future__ import annotations

import dataclasses
import io
import re

import pytest
from conftest import BASE, EXAMPLES, ROOT, with_key
from rich.console import Console

import lubecheck
from lubecheck.faces.display import in_system
from lubecheck.faces.terminal import STYLES, print_result
from lubecheck.model.reader import read_case
from lubecheck.model.result import Remedy
from lubecheck.sources import cite


def printed(text_or_path, *, width=100, system="si", losses=False, hold=None, **options) -> str:
    case = read_case(text_or_path) if isinstance(text_or_path, str) else lubecheck.load_case(text_or_path)
    console = Console(file=io.StringIO(), width=width, _environ={}, **options)
    print_result(lubecheck.check(case, hold=hold), console, system, losses=losses)
    return console.file.getvalue()


@pytest.mark.parametrize("width", [80, 120])
@pytest.mark.parametrize("path", sorted(EXAMPLES.glob("*.toml")), ids=lambda path: path.stem)
def test_no_line_is_wider_than_the_terminal(path, width):
    assert all(len(line.rstrip()) <= width for line in printed(path, width=width).splitlines())


@pytest.mark.parametrize("path", sorted(EXAMPLES.glob("*.toml")), ids=lambda path: path.stem)
def test_every_limit_shows_its_state_in_words_and_its_source(path):
    result = lubecheck.check(lubecheck.load_case(path))
    for width in (80, 120):
        text = printed(path, width=width)
        for limit in result.limits:
            assert re.search(rf"{limit.name.replace('_', ' ')}\s+{limit.state}", text), limit.name
            assert limit.basis in text if width == 120 else limit.name.replace("_", " ") + ": " in text
            assert cite(limit.basis) in " ".join(text.split())
        assert result.verdict.upper() in text


def test_the_colours_are_those_of_the_alert_standard_and_unknown_has_none():
    assert STYLES == {"within": "green", "near": "yellow", "beyond": "red", "unknown": ""}


def test_the_plan_line_has_grams_strokes_hours_and_weeks():
    text = " ".join(printed(EXAMPLES / "new_motor.toml", width=200).split())
    for part in ("first fill 15.0 g = 12 strokes of 1.20 g", "regrease with 12.0 g = 10 strokes", "every 52 weeks",
                 "8736 running hours at 24 h a day"):  # fmt: skip
        assert part in text


def test_inch_units_convert_every_figure_that_has_a_dimension():
    text = printed(EXAMPLES / "new_motor.toml", system="inch", width=120)
    assert "degF" in text
    assert " oz" in text
    assert "lbf" in text
    assert "in^3" in text
    limits = text[text.index("Limit") : text.index("Why")]
    assert "degC" not in limits
    assert "248  degF" in limits  # 120 degC


def test_measured_temperatures_are_told_in_the_units_of_the_user():
    text = " ".join(printed(EXAMPLES / "measured_fan.toml").split())
    assert re.search(r"Calibrated on 1 measurement: cooling by air 0\.7\d times the estimate", text)
    assert re.search(r"residual 0\.0 K; temperature \d+ to \d+ degC before, \d+ to \d+ degC after", text)
    inch = " ".join(printed(EXAMPLES / "measured_fan.toml", system="inch").split())
    assert re.search(r"residual 0 delta_degF; temperature \d+ to \d+ degF before", inch)


def test_a_reading_that_nothing_explains_is_told_with_what_would_explain_it():
    text = " ".join(printed((EXAMPLES / "measured_fan.toml").read_text().replace("48 degC", "118 degC")).split())
    assert "UNKNOWN" in text
    assert "Not calibrated: 118.0 degC was measured where" in text
    assert "Each of these alone would explain it, the least surprising first: - a thermometer that shows degF" in text


def test_a_users_text_is_never_markup_nor_steers_the_terminal():
    title = 'title = "[bold red]x[/x] \\u001b[2J \\u0007 end"\n'
    text = printed(title + BASE, force_terminal=True, color_system="standard")
    assert "[bold red]x[/x]" in text
    assert "\x1b[2J" not in text
    assert "\x07" not in text


def test_cautions_and_assumptions_are_always_there():
    text = printed(BASE)
    for heading in ("Not said, so assumed", "Cautions", "For the maintenance plan", "Operating point"):
        assert heading in text
    assert "lock out" in text


def test_an_unknown_verdict_says_what_to_state_and_holds_the_plan_back():
    text = printed(with_key(BASE, "surroundings", "coldest", None))
    assert "UNKNOWN" in text
    assert "state [surroundings] coldest" in text
    assert "Only once this is settled: cold start" in text


def test_the_picture_of_the_readme_is_what_the_command_prints():
    import runpy

    made = runpy.run_path(str(ROOT / "examples" / "make_picture.py"), run_name="picture")
    assert (ROOT / "examples" / "new_motor.svg").read_text(encoding="utf-8") == made["picture"]()


@pytest.mark.parametrize(
    ("text", "shown"),
    [
        ("P is 1868 N, at least 100 N", "P is 420 lbf, at least 22.5 lbf"),
        ("45 x 100 x 25 mm", "1.77 x 3.94 x 0.984 in"),
        ("warmer by 10 K; -10 to 40 degC", "warmer by 18.0 delta_degF; 14.0 to 104 degF"),
        ("110 mm^2/s at 40 degC, 5 W/K, 3 g/h, 20 W", "110 mm^2/s at 104 degF, 5 W/K, 3 g/h, 20 W"),
        ("6309 N/C3 and NU 210 mmx, 1,5 mm, v2 mm", "6309 N/C3 and NU 210 mmx, 1,5 mm, v2 mm"),
        ("50 cm^3.", "3.05 in^3."),
        ("100-120 mm and 1/2 mm", "100-120 mm and 1/2 mm"),
    ],
)
def test_figures_in_texts_are_shown_in_inch_units_and_nothing_else_is_touched(text, shown):
    assert in_system(text, "inch") == shown
    assert in_system(text, "si") == text


# Every unit of the trade that has an inch form. What has none stays: W, W/K, W/m^2, h, rpm, mm^2/s (cSt), n dm in
# mm/min, g/h of a feeder, kg/m^3, rad/s^2, MPa, ppm, and the um of filters and ISO 4406.
SI = (r"[0-9] (mm|cm|m|km|mm\^2|cm\^2|m\^2|cm\^3|dm\^3|m\^3|ml|l|mg|g|kg|t|N|kN|N\*mm|N\*m|degC|delta_degC|K|m/s|mm/s"
      r"|l/min|l/h|km/h)(?![\w/^*])")  # fmt: skip


@pytest.mark.parametrize("path", [*sorted(EXAMPLES.glob("*.toml")), *sorted((EXAMPLES / "swap").glob("*.toml"))],
                         ids=lambda path: path.stem)  # fmt: skip
def test_inch_output_has_no_unit_left_that_has_an_inch_form(path):
    text = " ".join(printed(path, width=300, system="inch", losses=True, hold="limit").split())
    found = re.search(SI, text)
    assert found is None, text[max(0, found.start() - 60) : found.end() + 20]
    assert " in " in text
    assert "degF" in text
    assert re.search(SI, " ".join(printed(path, width=300).split()))


def test_a_designation_that_ends_like_a_unit_is_left_alone():
    change = "bigger bearing: 6409 N (120 x 29 mm), ratings estimated; and bigger bearing: 22318 K (190 x 64 mm)"
    remedy = Remedy(change, 0.5, "within", "P is 900 N, 20 K less", "film", 5, (), ())
    result = dataclasses.replace(lubecheck.check(read_case(BASE)), remedies=(remedy,))
    console = Console(file=io.StringIO(), width=300, _environ={})
    print_result(result, console, "inch")
    said = console.file.getvalue()
    assert "bigger bearing: 6409 N (4.72 x 1.14 in), ratings" in said
    assert "bigger bearing: 22318 K (7.48 x 2.52 in)" in said
    assert "P is 202 lbf, 36.0 delta_degF less" in said


@pytest.mark.parametrize("arguments", [("plan", "examples/oil_bath_pump.toml", "examples/regreased_fan.toml"),
                                       ("life", "examples/oil_bath_pump.toml"),
                                       ("circuit", "examples/gearbox/circuit.toml"),
                                       ("swap", "examples/swap/slow_fan.toml", "--to", "lithium-complex-pao-220-2-ep"),
                                       ("bearings", "6309", "22218-2RS"),
                                       ("fluids", "lithium-complex-150-2")])  # fmt: skip
def test_the_other_commands_leave_none_either(arguments):
    from typer.testing import CliRunner

    from lubecheck.faces.cli import app

    said = " ".join(CliRunner().invoke(app, [*arguments, "--units", "inch"], env={"COLUMNS": "300"}).stdout.split())
    assert said
    found = re.search(SI, said)
    assert found is None, said[max(0, found.start() - 60) : found.end() + 20]


def test_a_tapered_bore_is_no_temperature():
    assert "22218 K spherical roller" in printed(
        BASE.replace('"6309"', '"22218 K"').replace('dynamic_rating = "53 kN"\n', "").replace(
            'static_rating = "31.5 kN"\n', "").replace('mass = "0.83 kg"\n', "").replace('cage = "steel"\n', ""),
        system="inch",
    )  # fmt: skip


def test_the_plan_line_has_the_housing_s_fill_as_the_plan_has():
    text = " ".join(printed(EXAMPLES / "new_motor.toml", width=200).split())
    grams = lubecheck.check(lubecheck.load_case(EXAMPLES / "new_motor.toml")).plan.housing_fill_g
    assert f"into the housing {grams:.1f} g" in text


def test_what_is_to_be_settled_first_keeps_its_indent_where_it_wraps():
    hot = with_key(with_key(BASE, "duty", "ambient", '"95 degC"'), "limits", "life", '"200000 h"')
    hot = with_key(with_key(hot, "duty", "radial_load", '"30 kN"'), "limits", "trip", '"90 degC"')
    lines = printed(hot, width=40).splitlines()
    start = next(i for i, line in enumerate(lines) if "Only once this is settled" in line)
    settled = lines[start : next(i for i in range(start, len(lines)) if "polyurea" in lines[i])]
    assert len(settled) > 1
    assert all(line.startswith("  ") and line[2] != " " for line in settled)


def test_a_use_without_end_is_said_in_words_in_the_verdict_line():
    text = printed(BASE.replace('"6309"', '"6309-2RS"'))
    assert "governed by interval, past any use\n" in "\n".join(line.rstrip() for line in text.splitlines())
    assert "no end of 1" not in text
    assert "good for 0 h" not in text
