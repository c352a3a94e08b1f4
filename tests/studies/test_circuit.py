"""A shared oil circuit: failure travels, a filter is worth hours, and a fault of a circuit file is refused."""

from __future__ import annotations

import dataclasses
import json

import pytest
from conftest import EXAMPLES

import lubecheck
from lubecheck.errors import CaseError
from lubecheck.faces.life import circuit_json
from lubecheck.model.circuit import load_circuit
from lubecheck.studies.circuit import study

FOLDER = EXAMPLES / "gearbox"


@pytest.fixture(scope="module")
def circuit():
    return load_circuit(FOLDER / "circuit.toml")


@pytest.fixture(scope="module")
def result(circuit):
    return study(circuit)


def changed(circuit, **keys):
    return study(dataclasses.replace(circuit, table=dataclasses.replace(circuit.table, **keys)))


def test_debris_shortens_the_life_of_every_other_position_and_the_filter_gives_it_back(result):
    for member in result.members:
        now, debris, filtered = (life.life_h for life in member.lives)
        assert debris < 0.5 * now
        assert filtered == pytest.approx(now)
    assert result.filter_is_worth_h == pytest.approx(result.others_life_h[2] - result.others_life_h[1])
    assert result.debris_costs_h == pytest.approx(result.others_life_h[0] - result.others_life_h[1])
    assert result.debris_uses == pytest.approx(560 / result.others_life_h[1])


def test_the_system_is_the_product_of_the_reliabilities(result):
    """Weibull of slope 1.5: sum of L^-1.5 (ISO/TR 1281-2)."""
    for state, together in enumerate(result.system_life_h):
        lives = [member.lives[state].life_h for member in result.members]
        assert together == pytest.approx(sum(life**-1.5 for life in lives) ** (-1 / 1.5))
        assert together < min(lives)


def test_one_oil_temperature_and_one_cleanliness_hold_for_all(circuit, result):
    assert {member.temperature for member in result.members} == {62.0}
    hotter = changed(circuit, oil_temperature=80.0)
    for cool, hot in zip(result.members, hotter.members, strict=True):
        assert hot.viscosity_ratio < cool.viscosity_ratio
        assert hot.lives[0].life_h <= cool.lives[0].life_h


def test_an_oil_temperature_that_is_not_said_is_that_of_the_hottest_position(circuit):
    found = changed(circuit, oil_temperature=None)
    hottest = max(lubecheck.check(member.case).operating.temperature.m_as("degC") for member in circuit.members)
    assert found.oil_temperature >= hottest - 1e-6  # the worst reading may be hotter still
    assert "oil temperature not said" in found.notes[0]


def test_the_circuits_figures_are_those_of_a_check_at_the_same_oil(circuit, result):
    """The pinion's own check, with its bearing at 62 degC by a conductance found by halving."""
    from lubecheck.model.check import readings
    from lubecheck.model.kernel import judge
    from lubecheck.model.points import from_rows
    from lubecheck.model.rows import rows_of

    case = circuit.members[0].case
    points = from_rows(rows_of(case, readings(case)[1][0])).changed(held_temperature=62.0)
    assert judge(points).modified_life[0] == pytest.approx(result.members[0].lives[0].life_h)


def test_a_dirtier_code_never_lengthens_a_life(circuit):
    codes = ("-/13/10", "-/15/12", "-/17/14", "-/19/16", "-/21/18")
    lives = [changed(circuit, debris_code=code).others_life_h[1] for code in codes]
    assert lives == sorted(lives, reverse=True)
    assert lives[-1] < lives[0]


def test_oil_dirtier_than_the_standard_covers_is_unknown(circuit):
    lost = changed(circuit, debris_code="-/23/20")
    assert [life.state for member in lost.members for life in member.lives[1:2]] == ["unknown"] * 3
    assert lost.others_life_h[1] is None


def test_an_in_line_filter_is_worth_more_than_one_off_line(circuit, result):
    assert changed(circuit, filtered_by="in line").filter_is_worth_h > result.filter_is_worth_h


def test_water_in_the_common_oil_shortens_every_life(circuit, result):
    wet = changed(circuit, water=300e-6)
    assert wet.others_life_h[0] == pytest.approx(result.others_life_h[0] * (100 / 300) ** 0.6)


def test_one_position_that_is_not_known_leaves_the_system_unknown(circuit):
    lost = changed(circuit, water=0.01)
    assert lost.verdict == "unknown"
    assert lost.system_life_h == (None, None, None)
    assert lost.filter_is_worth_h is None
    json.loads(circuit_json(lost), parse_constant=pytest.fail)


def write(folder, text, **cases):
    for name in ("pinion", "middle", "output"):
        source = (FOLDER / f"{name}.toml").read_text(encoding="utf-8")
        (folder / f"{name}.toml").write_text(cases.get(name, source), encoding="utf-8")
    (folder / "circuit.toml").write_text(text, encoding="utf-8")
    return folder / "circuit.toml"


GOOD = 'title = "x"\n[circuit]\ncases = ["pinion.toml", "middle.toml"]\ncode = "-/15/12"\n'


@pytest.mark.parametrize(
    ("text", "named"),
    [
        (GOOD.replace("cases", "case"), "nearest: cases|circuit.case"),
        (GOOD.replace('"middle.toml"', '"midle.toml"'), "no such file"),
        (GOOD.replace(', "middle.toml"', ""), "2 to 200 case files"),
        (GOOD.replace('"middle.toml"', '"pinion.toml"'), "each position once"),
        (GOOD.replace('code = "-/15/12"\n', ""), "circuit.code"),
        (GOOD.replace("-/15/12", "12/15"), "ISO 4406"),
        (GOOD + 'damaged = "middel"\n', "nearest: middle"),
        (GOOD + 'filtered_code = "-/15/12"\n', "no debris_code"),
        (GOOD + 'hours_with_debris = "5 h"\n', "no debris_code"),
        (GOOD + 'oil_temperature = "62"\n', "temperature"),
        (GOOD + "[circuits]\n", "nearest: circuit"),
        ("title = 3\n" + GOOD.partition("\n")[2], "a text"),
        ("[circuit\n", "TOML"),
    ],
)
def test_a_fault_of_a_circuit_file_is_refused(tmp_path, text, named):
    with pytest.raises(CaseError, match=named):
        load_circuit(write(tmp_path, text))


def test_a_position_with_grease_or_another_oil_is_refused(tmp_path):
    other = (FOLDER / "middle.toml").read_text(encoding="utf-8").replace("mineral-vg-220", "mineral-vg-320")
    with pytest.raises(CaseError, match="one oil for all positions"):
        load_circuit(write(tmp_path, GOOD, middle=other))
    greased = (EXAMPLES / "new_motor.toml").read_text(encoding="utf-8")
    with pytest.raises(CaseError, match="middle with grease"):
        load_circuit(write(tmp_path, GOOD, middle=greased))
