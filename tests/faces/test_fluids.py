"""Lubricants in the terminal and as a record: every figure with its unit, range and source, in both unit systems."""

from __future__ import annotations

import dataclasses
import io
import json
import re

import pytest
from conftest import EXAMPLES
from rich.console import Console

import lubecheck
from lubecheck.data import lubricants
from lubecheck.data.lubricant_choice import Wanted, relaxed
from lubecheck.faces import fluids
from lubecheck.faces.fluids_record import SCHEMA, to_json
from lubecheck.model.required import RequiredViscosity, required_viscosity
from lubecheck.sources import cite

OIL, GREASE = lubricants.find("mineral-vg-68"), lubricants.find("polyurea-110-2")
EVERY = tuple(lubricants.table().values())
NEED = fluids.Need(RequiredViscosity(13.7, 1480.0, 72.5, False), "13.7 mm^2/s, which 6309 needs at 1480 rpm")


class Utf8(io.StringIO):
    encoding = "utf-8"


def screen(width=100, *, is_plain=False, **options) -> Console:
    file = io.StringIO() if is_plain else Utf8()
    file_options = {"encoding": "ascii"} if is_plain else {}
    if is_plain:
        file = io.TextIOWrapper(io.BytesIO(), **file_options)
    return Console(file=file, width=width, _environ={}, **options)


def text_of(console: Console) -> str:
    if isinstance(console.file, io.TextIOWrapper):
        console.file.flush()
        return console.file.buffer.getvalue().decode("ascii")
    return console.file.getvalue()


def one(lubricant=OIL, *, at=(40.0, 100.0), system="si", need=None, **options) -> str:
    console = screen(**options)
    fluids.print_one(lubricant, at, console, system, need)
    return text_of(console)


def test_a_lubricant_shows_its_figures_with_unit_range_source_and_certainty() -> None:
    text = one()
    assert re.search(r"viscosity at 40 degC\s+68\.0\s+mm\^2/s\s+\(61\.2 to 74\.8\)", text)
    assert re.search(r"pour point\s+-12\s+degC\s+\(-24 to -6\)", text)
    assert re.search(r"thermal expansion\s+0\.0007\s+1/K\s+\(0\.00063 to 0\.00076\)", text)
    assert re.search(r"viscosity index\s+95", text)
    assert "typical properties of base oils" in text
    assert "from memory" in text


def test_grades_by_viscosity_name_the_edition_of_their_table() -> None:
    text = " ".join(one().split())
    for words in ("ISO VG 68 (ISO 3448:1992)", "SAE 20 (SAE J300 of 2021)", "AGMA 2 (AGMA 9005-D94 of 1994)"):
        assert words in text
    assert "Grades by viscosity" not in one(GREASE)


def test_viscosity_is_shown_at_the_temperatures_asked_for_and_outside_the_range_of_use_it_says_so() -> None:
    text = one(at=(60.0, 140.0))
    assert re.search(r"^ *60 +28\.\d +24\.\d +85\d *$", text, re.MULTILINE)
    assert re.search(r"^ *140 .*above its range of use", text, re.MULTILINE)


def test_inch_units_are_shown_with_saybolt_seconds() -> None:
    text = one(at=(340 / 9,), system="inch")
    assert "SUS" in text
    found = re.search(r"^ *100 +(\d+\.?\d*) +(\d+)", text, re.MULTILINE)
    assert found
    assert float(found[2]) == pytest.approx(4.632 * float(found[1]), rel=0.01)  # ASTM D2161 at 100 degF
    assert re.search(r"used up to\s+212\s+degF", text)


def test_what_a_case_needs_is_ruled_in_and_put_in_words() -> None:
    text = one(need=NEED)
    assert "kappa 1" in text
    assert "13.7 mm^2/s, which 6309 needs at 1480 rpm" in text
    found = re.search(r"A has it up to ([\d.]+) degC", text)
    assert found
    assert float(found[1]) == pytest.approx(81.9, abs=0.3)  # 14.5 at 80 degC, 13.7 a little above


def test_an_oil_that_has_it_beyond_its_range_says_all_over() -> None:
    need = dataclasses.replace(NEED, required=RequiredViscosity(8.0, 2960.0, 102.5, False))
    assert "all over its range of use" in one(need=need)


def test_a_limit_that_was_not_stated_is_said() -> None:
    bare = lubricants.from_figures(key="x", kind="oil", nu_40=68.0, nu_100=8.5)
    text = one(bare)
    assert re.search(r"used up to\s+not stated", text)
    assert "range of use not stated" in text
    assert "assumed: density_15" in text


@pytest.mark.parametrize("width", [80, 120])
@pytest.mark.parametrize("is_plain", [True, False])
@pytest.mark.parametrize("system", ["si", "inch"])
def test_no_line_is_wider_than_the_terminal_and_a_plain_one_gets_ascii(width, is_plain, system) -> None:
    console = screen(width, is_plain=is_plain)
    fluids.print_list(EVERY, frozenset(), console, system, (70.0,), NEED)
    for lubricant in EVERY:
        if lubricant.key.endswith(("-2-ep", "vg-68")):
            fluids.print_one(lubricant, (40.0,), console, system, NEED)
    fluids.print_several(EVERY[:12], (-20.0, 40.0), console, system, NEED)
    text = text_of(console)
    assert all(len(line.rstrip()) <= width for line in text.splitlines())
    assert "…" not in text


def test_the_list_never_cuts_a_figure_or_a_name() -> None:
    console = screen(80)
    fluids.print_list(EVERY, frozenset(), console, "si")
    text = text_of(console)
    for lubricant in EVERY:
        assert re.search(rf"^{re.escape(lubricant.key)} .* {lubricant.highest:g}\s*$", text, re.MULTILINE), (
            lubricant.key
        )
    assert f"{len(EVERY)} lubricants" in text


def test_the_users_own_are_marked() -> None:
    console = screen()
    fluids.print_list([OIL, GREASE], frozenset([OIL.key]), console, "si")
    assert "mineral-vg-68 *" in text_of(console)
    assert "polyurea-110-2 *" not in text_of(console)
    assert "* your own" in text_of(console)


def test_nothing_found_says_which_filter_stands_in_the_way() -> None:
    console = screen()
    wanted = Wanted(thickener="polyurea", nlgi="00")
    fluids.print_none(relaxed(EVERY, wanted), console)
    assert "without --nlgi" in text_of(console)


def test_several_are_compared_by_letter_with_what_is_outside_marked() -> None:
    console = screen()
    fluids.print_several([OIL, lubricants.find("pao-vg-68")], (-30.0, 40.0), console, "si")
    text = text_of(console)
    assert re.search(r"^A +mineral-vg-68 +-2 to 100 degC", text, re.MULTILINE)
    assert re.search(r"^ *-30 +[\d]+! +[\d]+ *$", text, re.MULTILINE)


def test_a_users_text_is_no_markup_and_steers_no_terminal() -> None:
    wild = dataclasses.replace(OIL, name="[bold]\x1b[31mred[/x]", note="\x07[/]", key="a")
    console = screen()
    fluids.print_one(wild, (40.0,), console, "si")
    fluids.print_added(wild, "[/x]\x1b", console)
    text = text_of(console)
    assert "[bold]" in text
    assert "[/x]" in text
    assert "\x1b" not in text
    assert "\x07" not in text


def test_colours_are_not_those_of_a_verdict_and_can_be_turned_off() -> None:
    coloured, plain = screen(force_terminal=True, color_system="standard"), screen(force_terminal=True, no_color=True)
    for console in (coloured, plain):
        fluids.print_several([OIL, GREASE], (40.0,), console, "si", NEED)
    assert "\x1b[36mA" in text_of(coloured) or "\x1b[36m" in text_of(coloured)
    assert not re.search(r"\x1b\[(\d;)*3[123]m", text_of(coloured))
    assert not re.search(r"\x1b\[(\d;)*3\dm", text_of(plain))
    assert "A" in text_of(plain)


def test_the_record_holds_every_figure_with_unit_and_range_and_is_strict() -> None:
    def refuse(word: str) -> None:
        raise AssertionError(word)

    text = to_json(EVERY, own=frozenset(), temperatures=None, required=NEED.required)
    record = json.loads(text, parse_constant=refuse)
    assert record["schema"] == SCHEMA == "lubecheck/fluids/1"
    assert record["required"]["reference_viscosity"] == {"value": 13.7, "unit": "mm^2/s"}
    assert len(record["lubricants"]) == len(EVERY)
    entry = next(item for item in record["lubricants"] if item["key"] == "mineral-vg-68")
    assert entry["nu_40"] == {"value": 68.0, "unit": "mm^2/s", "low": 61.2, "high": 74.8}
    assert entry["source"]["citation"] == cite("base-oil-handbooks")
    assert entry["certainty"] == "memory"
    assert {"grade": "ISO VG 68", "edition": "ISO 3448:1992"} in entry["grades"]
    at_40 = next(state for state in entry["viscosity"] if state["temperature"]["value"] == 40.0)
    assert at_40["kinematic"]["value"] == pytest.approx(68.0)
    assert entry["kappa_1_temperature"]["value"] == pytest.approx(81.9, abs=0.3)


def test_the_viscosity_a_case_needs_is_that_of_iso_281() -> None:
    # ISO 281, 9.3.3.1: 4500 n^-0.5 Dpw^-0.5 = 4500/sqrt(1480 x 72.5) for the new motor's 6309
    required = required_viscosity(lubecheck.load_case(EXAMPLES / "new_motor.toml"))
    assert required.nu == pytest.approx(4500 / (1480 * 72.5) ** 0.5, rel=1e-9)
    assert not required.is_of_several
    # 45000 n^-0.83 Dpw^-0.5 below 1000 rpm, 22218 with a mean diameter of 125 mm
    required = required_viscosity(lubecheck.load_case(EXAMPLES / "slow_roller.toml"))
    assert required.nu == pytest.approx(45000 * 18**-0.83 / 125**0.5, rel=1e-9)


def test_of_several_duty_points_the_slowest_asks_for_the_most(base) -> None:
    from lubecheck.model.reader import read_case

    text = base.replace('axial_load = "250 N"\n', 'axial_load = "250 N"\nshare = 0.9\n')
    text += '\n[[duty]]\nspeed = "300 rpm"\nradial_load = "1.9 kN"\naxial_load = "0 N"\nshare = "10 %"\n'
    required = required_viscosity(read_case(text))
    assert required.speed == 300.0
    assert required.is_of_several
