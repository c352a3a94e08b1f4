"""An oil analysis in a case: it overrides, says by how much, and nothing of it is silent."""

from __future__ import annotations

import pytest
from conftest import with_key

import lubecheck
from lubecheck.data import lubricants
from lubecheck.errors import CaseError
from lubecheck.model.check import readings
from lubecheck.model.reader import read_case
from lubecheck.model.rows import rows_of
from lubecheck.physics.viscosity import kinematic_viscosity

PUMP = """\
[bearing]
designation = "6313"
dynamic_rating = "93.6 kN"
static_rating = "60 kN"
mass = "2.1 kg"
cage = "steel"

[lubricant]
name = "mineral-vg-46"

[[duty]]
speed = "2960 rpm"
radial_load = "2.1 kN"
axial_load = "3.4 kN"

[surroundings]
ambient = "25 degC"
coldest = "0 degC"
draught = "1.5 m/s"
altitude = "150 m"
vibration = "smooth"
orientation = "horizontal"

[housing]
kind = "gearbox wall"
shaft_temperature = "90 degC"

[oil]
supply = "bath"
level = "0 mm"
hours_per_day = "24 h"

[cleanliness]
setting = "bath -/17/14"
"""
UNSET = with_key(PUMP, "cleanliness", "setting", None)


def used(text: str, **keys: str) -> str:
    for key, value in keys.items():
        text = with_key(text, "lubricant", key, f'"{value}"')
    return text


def result(text: str, **keys: str) -> lubecheck.Result:
    return lubecheck.check(read_case(used(text, **keys)))


def faults(text: str, **keys: str) -> dict[str, str]:
    with pytest.raises(CaseError) as refused:
        read_case(used(text, **keys), "pump.toml")
    assert all(fault.line for fault in refused.value.faults)
    return {fault.key: str(fault) for fault in refused.value.faults}


def said(texts: tuple[str, ...], word: str) -> str:
    (found,) = [text for text in texts if word in text]
    return found


def test_a_measured_viscosity_overrides_the_fresh_one_and_says_by_how_much() -> None:
    fresh, thick = result(PUMP), result(PUMP, measured_viscosity="53 mm^2/s at 40 degC")
    at = thick.operating.temperature.m_as("degC")
    case = read_case(used(PUMP, measured_viscosity="53 mm^2/s at 40 degC"))
    expected = kinematic_viscosity.plain(at, nu_40=case.lubricant.nu_40, nu_100=case.lubricant.nu_100)
    assert thick.operating.viscosity.m_as("mm^2/s") == pytest.approx(expected, rel=1e-6)
    assert case.lubricant.nu_40 == pytest.approx(53.0)
    assert thick.operating.viscosity > fresh.operating.viscosity
    note = said(thick.notes, "oil in use")
    assert "+15 %" in note  # 53/46 = 1.152
    assert "watch" in note
    assert "common practice" in note
    assert "fresh 46" in thick.lubricant
    (shift,) = [item for item in thick.assumed if item.name == "[lubricant] nu_40, nu_100"]
    assert "D341" in shift.value
    assert "slope" in shift.value
    assert shift.basis == "astm-d341"
    assert ("lubricant.measured_viscosity", "53 mm^2/s at 40 degC") in thick.given


@pytest.mark.parametrize(
    ("nu", "word"), [("46.5", "usual, within"), ("40", "watch it"), ("60", "change the oil"), ("33", "change the oil")]
)
def test_the_note_goes_by_how_far_it_moved(nu: str, word: str) -> None:
    assert word in said(result(PUMP, measured_viscosity=f"{nu} mm^2/s at 40 degC").notes, "oil in use")


def test_thinned_oil_loses_film() -> None:
    fresh, thin = result(PUMP), result(PUMP, measured_viscosity="30 mm^2/s at 40 degC")
    assert thin.operating.viscosity_ratio < 0.85 * fresh.operating.viscosity_ratio
    assert thin.limit("film").use > fresh.limit("film").use


def test_an_oil_measured_as_fresh_is_judged_as_fresh() -> None:
    fresh, same = result(PUMP), result(PUMP, measured_viscosity="46 mm^2/s at 40 degC")
    assert same.operating.temperature.m == pytest.approx(fresh.operating.temperature.m, abs=1e-6)
    assert same.verdict == fresh.verdict


def test_the_plan_names_the_oil_to_refill_and_not_the_aged_one() -> None:
    assert result(PUMP, measured_viscosity="60 mm^2/s at 40 degC").plan.lubricant == "mineral oil, ISO VG 46"


@pytest.mark.parametrize(
    ("water", "word", "factor"),
    [("150 ppm", "up to the 200 ppm", (100 / 150) ** 0.6), ("0.03 %", "over 200 ppm", (100 / 300) ** 0.6),
     ("900 ppm", "over 500 ppm", None)],
)  # fmt: skip
def test_water_gets_a_note_and_shortens_life_by_cantleys_law_as_far_as_it_goes(
    water: str, word: str, factor: float | None
) -> None:
    dry, wet = result(PUMP), result(PUMP, water=water)
    note = said(wet.notes, "ppm water")
    assert word in note
    assert "common practice" in note
    assert "Water shortens fatigue life" in note
    if factor is None:
        assert wet.life.modified_life is None
        assert wet.limit("fatigue_life").state == "unknown"
    else:
        assert (wet.life.modified_life / dry.life.modified_life).magnitude == pytest.approx(factor)


def test_an_oil_that_takes_up_much_water_is_not_held_to_the_thresholds_of_mineral_oil() -> None:
    note = said(result(PUMP.replace("mineral-vg-46", "pag-vg-46"), water="900 ppm").notes, "ppm water")
    assert "500 ppm" not in note
    assert "several times" in note


def test_a_code_chooses_the_setting_and_says_so() -> None:
    by_code, stated = result(UNSET, iso_code="18/16/11"), result(PUMP)
    assert by_code.life.modified_life == stated.life.modified_life
    (chosen,) = [item for item in by_code.assumed if item.name == "[cleanliness] setting"]
    assert "bath -/17/14" in chosen.value
    assert "18/16/11" in chosen.value


def test_a_stated_setting_stands_before_the_code() -> None:
    text = result(PUMP, iso_code="22/20/17")
    assert text.life.modified_life == result(PUMP).life.modified_life
    note = said(text.notes, "22/20/17")
    assert "bath -/17/14 stands" in note
    assert "bath -/21/18" in note


def test_a_dirtier_code_shortens_life_and_one_beyond_the_standard_is_unknown() -> None:
    codes = ("15/13/10", "17/15/12", "19/17/14", "23/21/18")
    lives = [result(UNSET, iso_code=code).life.modified_life for code in codes]
    assert lives == sorted(lives, reverse=True)
    beyond = result(UNSET, iso_code="26/24/20")
    assert beyond.limit("fatigue_life").state == "unknown"
    assert beyond.life.modified_life is None
    assert "dirtier" in beyond.limit("fatigue_life").note
    assert "up to -/21/18" in said(beyond.notes, "26/24/20")
    assert beyond.operating.temperature == result(PUMP).operating.temperature


def test_circulating_oil_is_read_as_filtered_off_line_and_told_the_way_out() -> None:
    text = with_key(UNSET, "oil", "supply", '"circulating"').replace(
        'level = "0 mm"\n', 'flow = "1 l/min"\ninlet = "50 degC"\n'
    )
    by_code = result(text, iso_code="19/17/14")
    (chosen,) = [item for item in by_code.assumed if item.name == "[cleanliness] setting"]
    assert "in line" in chosen.value
    stated = with_key(text + '\n[cleanliness]\nsetting = "bath -/17/14"\n' if "[cleanliness]" not in text else text,
                      "cleanliness", "setting", '"bath -/17/14"')  # fmt: skip
    assert by_code.life.modified_life == result(stated).life.modified_life
    in_line = result(with_key(stated, "cleanliness", "setting", '"circulating -/17/14"'))
    assert in_line.life.modified_life > by_code.life.modified_life


def test_taking_the_code_away_never_improves_the_life() -> None:
    for designation in ("6307", "6313", "6330"):  # below and above the size at which the dirtiest code is the worst
        text = UNSET.replace("6313", designation)
        for key in ("dynamic_rating", "static_rating", "mass"):
            text = with_key(text, "bearing", key, None)
        for code in ("15/13/10", "19/17/14", "23/21/18"):
            with_code, without = result(text, iso_code=code), result(text)
            order = ["within", "near", "unknown", "beyond"]
            states = [order.index(one.limit("fatigue_life").state) for one in (with_code, without)]
            assert min(states[1], 2) >= min(states[0], 2)


def test_the_worst_reading_of_an_unsaid_oil_cleanliness_is_the_worst_there_is() -> None:
    from lubecheck.physics import fatigue

    for designation, worst in (("6307", "very severe"), ("6330", "bath -/21/18")):
        text = UNSET.replace("6313", designation)
        for key in ("dynamic_rating", "static_rating", "mass"):
            text = with_key(text, "bearing", key, None)
        case = read_case(text)
        _, said_so = readings(case)
        row = rows_of(case, said_so[1])[0]
        assert fatigue.SETTINGS[row["setting"]] == worst
        factors = [
            float(fatigue.contamination_factor.plain(1.0, row["pitch_diameter"], code))
            for code in range(len(fatigue.SETTINGS) - 1)  # the last, "off scale", cannot be stated
        ]
        assert factors[row["setting"]] == pytest.approx(min(factors), abs=1e-9)


@pytest.mark.parametrize(
    ("key", "value", "word"),
    [
        ("measured_viscosity", "98", "at a temperature, such as"),
        ("measured_viscosity", "98 mm^2/s at 40", "at a temperature, such as"),
        ("measured_viscosity", "300 mm^2/s at 40 degC", "another oil"),
        ("water", "200", "such as"),
        ("water", "200 mm", "such as"),
        ("water", "20 %", "such as"),
        ("iso_code", "17/14", "19/17/14"),
        ("iso_code", "14/17/19", "19/17/14"),
        ("iso_code", "dirty", "19/17/14"),
    ],
)
def test_a_wrong_entry_is_refused_with_line_key_and_the_expected_form(key: str, value: str, word: str) -> None:
    told = faults(PUMP, **{key: value})
    assert list(told) == [f"lubricant.{key}"]
    assert word in told[f"lubricant.{key}"]


def test_all_faults_of_an_analysis_come_at_once() -> None:
    told = faults(PUMP, measured_viscosity="98", iso_code="17/14", water="x")
    assert set(told) == {"lubricant.measured_viscosity", "lubricant.iso_code", "lubricant.water"}


def test_grease_has_no_oil_analysis_and_mist_no_code(base: str) -> None:
    told = faults(base, measured_viscosity="98 mm^2/s at 40 degC", water="100 ppm", iso_code="19/17/14")
    assert set(told) == {"lubricant.measured_viscosity", "lubricant.water", "lubricant.iso_code"}
    mist = with_key(UNSET, "oil", "supply", '"mist"').replace('level = "0 mm"\n', "")
    assert "mist" in faults(mist, iso_code="19/17/14")["lubricant.iso_code"]


# What data sheets and drum labels give, inline in a case, and the viscosity that it comes to (mm^2/s at 40 degC).
@pytest.mark.parametrize(
    ("lines", "nu_40"),
    [
        ('designation = "ISO VG 46"\nindex = 95', 46.0),
        ('designation = "CLP HC 220"', 220.0),
        ('designation = "SAE 30"\nbase_oil = "mineral"', 97.0),
        ('designation = "AGMA 5 EP"\nindex = 95', 220.0),
        ('kind = "oil"\nnu_40 = "46 cSt"\nindex = 110', 46.0),
        ('kind = "oil"\nsaybolt_100 = "315 SUS"\nsaybolt_210 = "54 SUS"', 61.0),
        ('kind = "oil"\nsaybolt_100 = "315 SUS"\nindex = 95', 60.8),
        ('designation = "ISO VG 68"\nsaybolt_100 = "315 SUS"\nindex = 95', 61.2),
        ('kind = "oil"\nsaybolt_210 = "54 SUS"\nbase_oil = "mineral"', 65.0),  # a second of rounding is 4 % there
    ],
)
def test_whatever_a_label_gives_becomes_a_viscosity(lines: str, nu_40: float) -> None:
    case = read_case(PUMP.replace('name = "mineral-vg-46"', lines))
    assert case.lubricant.nu_40 == pytest.approx(nu_40, rel=0.03)
    assert lubecheck.check(case).operating.viscosity.m > 0


def test_a_grease_designation_needs_its_base_oil_and_then_is_enough(base: str) -> None:
    alone = base.replace('name = "polyurea-110-2"', 'designation = "KP2K-30"')
    assert "nu_40" in next(iter(faults(alone).values()))
    case = read_case(alone.replace('KP2K-30"', 'KP2K-30"\nnu_40 = "150 mm^2/s"\nindex = 95\nthickener = "lithium"'))
    assert (case.lubricant.highest, case.lubricant.lowest, case.lubricant.ep) == (120.0, -30.0, True)
    assert case.lubricant.nu_100 == pytest.approx(14.6, abs=0.1)  # ASTM D2270, VI 95


def test_a_lubricant_of_the_users_own_is_found_by_name(tmp_path) -> None:
    path = tmp_path / "ours.csv"
    path.write_text("key,kind,base_oil,nu_40 [cSt],nu_100 [cSt],lowest [degC],highest [degC]\n"
                    "mill-oil,oil,mineral,68,8.5,-10,100\n", encoding="utf-8")  # fmt: skip
    text = PUMP.replace("mineral-vg-46", "Mill Oil")
    with pytest.raises(CaseError, match=r"lubricant\.name"):
        read_case(text)
    case = read_case(text, own=lubricants.load(path).values())
    assert case.lubricant.key == "mill-oil"
    (tmp_path / "case.toml").write_text(text, encoding="utf-8")
    assert lubecheck.load_case(tmp_path / "case.toml", own=lubricants.load(path).values()).lubricant == case.lubricant
