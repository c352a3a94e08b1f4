"""The README says what the program does today."""

from __future__ import annotations

import re

from conftest import EXAMPLES, ROOT

import lubecheck

README = (ROOT / "README.md").read_text(encoding="utf-8")


def test_the_readme_opens_with_exactly_two_commands_that_set_up_run_and_test():
    blocks = re.findall(r"^```sh\n(.*?)^```", README, flags=re.MULTILINE | re.DOTALL)
    assert len(blocks) == 2
    assert all(len(block.splitlines()) == 1 for block in blocks)
    assert "lubecheck check examples/new_motor.toml" in blocks[0]
    assert "pytest" in blocks[1]


def test_the_table_of_examples_tells_each_governing_limit():
    rows = re.findall(r"^\| `(\w+)\.toml` \| .* \| ([\w ]+), (\w+) \|$", README, flags=re.MULTILINE)
    assert rows
    for name, limit, verdict in rows:
        result = lubecheck.check(lubecheck.load_case(EXAMPLES / f"{name}.toml"))
        assert (result.governing.replace("_", " "), result.verdict) == (limit, verdict), name


def test_every_example_is_in_the_table():
    assert all(f"`{path.name}`" in README for path in EXAMPLES.glob("*.toml"))


def test_the_worked_reading_quotes_todays_figures():
    good, bad = (
        lubecheck.check(lubecheck.load_case(EXAMPLES / f"{name}_motor.toml")) for name in ("new", "overfilled")
    )
    temperature = good.operating.temperature.m_as("degC")
    band = good.operating.figures["temperature"]
    assert f"found: {temperature:.1f} °C, in a band of {band.low:.0f} to {band.high:.0f} °C" in README
    assert (
        f"uses {good.limit('interval').use:.2f} of the {good.limit('interval').allowed:,.0f}".replace(",", " ")
        in README
    )
    assert f"heats it by {bad.operating.temperature.m_as('degC') - temperature:.0f} K" in README


def test_the_measured_example_is_quoted_with_todays_figures():
    result = lubecheck.check(lubecheck.load_case(EXAMPLES / "measured_fan.toml"))
    figures = result.calibration.figures.figures
    text = " ".join(README.split())
    assert f"cooling {figures['cooling_factor'].value:.2f} times the estimate" in text
    before, after = figures["before"], figures["after"]
    assert f"{before.low:.0f} to {before.high:.0f} °C before, is {after.low:.0f} to {after.high:.0f} °C" in text
    (reading,) = result.calibration.measurements
    assert f"{reading.figures.figures['measured'].value:.0f} °C at 18 °C of air" in text


def test_the_table_of_swaps_tells_each_verdict():
    import runpy

    made = runpy.run_path(str(EXAMPLES / "swap" / "make_outputs.py"), run_name="outputs")["TO"]
    rows = re.findall(r"^\| `(\w+)` \| .* \| (within|near|beyond)", README, flags=re.MULTILINE)
    assert {name for name, _ in rows} == set(made)
    for name, verdict in rows:
        assert lubecheck.swap(lubecheck.load_case(EXAMPLES / "swap" / f"{name}.toml"), made[name]).verdict == verdict


def test_no_heading_of_the_texts_stands_twice():
    for name in ("README.md", "DEVELOPERS.md"):
        headings = re.findall(r"^#+ .*$", (ROOT / name).read_text(encoding="utf-8"), flags=re.MULTILINE)
        assert len(headings) == len(set(headings)), name
