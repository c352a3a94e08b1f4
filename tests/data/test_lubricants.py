"""The lubricant tables, a user's own lubricants, and finding one by whatever name."""

from __future__ import annotations

import csv
from pathlib import Path

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.data import lubricants
from lubecheck.data.lubricant import FIELDS, RANGED, Lubricant
from lubecheck.data.lubricant_figures import LIFE_REFERENCE, contradictions
from lubecheck.data.lubricant_files import read_file
from lubecheck.errors import InputError, TableError
from lubecheck.physics.viscosity import viscosity_index
from lubecheck.tables import path as table_path

TABLES = Path(__file__).parent.parent / "tables"
EVERY = list(lubricants.table().values())


def index_of(one: Lubricant) -> float:
    """Viscosity index of a lubricant."""
    return float(viscosity_index.plain(nu_40=np.float64(one.nu_40), nu_100=np.float64(one.nu_100)))


@pytest.mark.parametrize("one", EVERY, ids=lambda one: one.key)
def test_every_row_holds_the_schema(one: Lubricant) -> None:
    assert contradictions(one) == []
    assert one.nu_100 < one.nu_40
    assert one.lowest is not None
    assert one.highest is not None
    assert one.lowest < one.highest
    assert 750 <= one.density_15 <= 2100
    assert not one.assumed
    for name in RANGED:
        value = getattr(one, name, None)
        if value is not None:
            low, high = one.ranges[name]
            assert low <= value <= high
            assert low < high


# Usual viscosity indices by base oil, base-oil handbooks: solvent-refined mineral 90 to 105, hydrotreated 100 to 130,
# PAO 120 to 180, esters 100 to 180, PAG 130 to 300, dimethyl silicone over 300, PFPE branched 60 to 140, linear
# over 250.
INDEX = {
    "mineral": (90, 105),
    "hydrotreated": (100, 130),
    "PAO": (118, 180),
    "ester": (100, 180),
    "PAG": (130, 300),
    "silicone": (300, 700),
    "PFPE": (60, 140),
    "linear PFPE": (250, 380),
}


@pytest.mark.parametrize("one", EVERY, ids=lambda one: one.key)
def test_the_viscosity_index_of_every_row_is_one_of_its_kind_of_oil(one: Lubricant) -> None:
    assert one.base_oil is not None
    low, high = INDEX[one.base_oil]
    assert low <= index_of(one) <= high


def test_the_greases_cover_the_kinds_the_trade_has() -> None:
    greases = [one for one in EVERY if one.kind == "grease"]
    assert len(greases) >= 24
    assert {one.thickener for one in greases} == set(lubricants.THICKENERS)
    assert {one.nlgi for one in greases} >= {"00", "0", "1", "2", "3"}
    assert min(one.nu_40 for one in greases) == 15
    assert max(one.nu_40 for one in greases) == 1000
    assert {"mineral", "PAO", "ester", "silicone", "PFPE"} <= {one.base_oil for one in greases}
    assert {one.ep for one in greases} == {True, False}


def test_the_oils_cover_every_base_oil_in_iso_grades() -> None:
    oils = [one for one in EVERY if one.kind == "oil"]
    assert {one.base_oil for one in oils} == set(lubricants.BASE_OILS)
    for base_oil in ("mineral", "PAO", "PAG"):
        assert {46, 68, 100, 150, 220, 320, 460} <= {one.iso_vg for one in oils if one.base_oil == base_oil}


@pytest.mark.parametrize(
    ("key", "nu_40", "nu_100", "tolerance"),
    [
        # Typical data sheets of base oils, from memory: solvent neutral 150 (31, 5.2), 500 (96, 10.8), bright stock
        # (480, 31.5); PAO 6 (31, 5.9), PAO 8 (47, 7.8), PAO 40 (396, 39.5); dioctyl sebacate (11.6, 3.3).
        ("mineral-vg-32", 31.0, 5.2, 0.05),
        ("mineral-vg-100", 96.0, 10.8, 0.06),
        ("mineral-vg-460", 480.0, 31.5, 0.06),
        ("pao-vg-32", 31.0, 5.9, 0.05),
        ("pao-vg-46", 47.0, 7.8, 0.05),
        ("ester-vg-10", 11.6, 3.3, 0.20),
    ],
)
def test_a_row_lies_near_the_data_sheet_of_a_typical_base_oil(
    key: str, nu_40: float, nu_100: float, tolerance: float
) -> None:
    one = lubricants.find(key)
    assert one.nu_40 == pytest.approx(nu_40, rel=tolerance)
    assert one.nu_100 == pytest.approx(nu_100, rel=tolerance)


def test_no_two_lubricants_share_a_name_however_it_is_typed() -> None:
    for one in EVERY:
        for typed in (one.key, one.key.upper().replace("-", " "), one.name, one.name.replace(",", "").lower()):
            assert lubricants.find(typed).key == one.key


def test_a_cautious_life_reference_is_the_low_end_of_the_tables() -> None:
    for thickener, value in LIFE_REFERENCE.items():
        rows = [one for one in EVERY if one.thickener == thickener]
        mineral = [one for one in rows if one.base_oil == "mineral" and one.nlgi in ("1", "2", "3")] or rows
        least = min(one.ranges["life_reference"][0] for one in mineral)
        # Lithium: the classical interval is printed for 70 degC.
        assert value == (70.0 if thickener == "lithium" else least), thickener


def test_the_headings_of_the_tables_are_fields_and_their_units() -> None:
    for name in lubricants.FILES:
        text = table_path(name).read_text(encoding="utf-8")
        assert text.startswith("# ")
        headings = next(csv.reader(line for line in text.splitlines() if not line.startswith("#")))
        for heading in headings:
            field, _, unit = heading.removesuffix("]").partition(" [")
            entry = FIELDS[field.removesuffix("_range")]
            assert unit == ("" if entry.unit == "1" else entry.unit)


def test_broken_greases_are_refused_with_row_and_column() -> None:
    with pytest.raises(TableError) as refused:
        read_file(TABLES / "greases_broken.csv", defaults={"kind": "grease"}, is_complete=True)
    said = str(refused.value).splitlines()
    expected = [
        "greases_broken.csv:4: row lithium-200-2-ep, column nu_100:",
        "greases_broken.csv:5: row lithium-complex-150-2, column highest:",
        "greases_broken.csv:6: row lithium-complex-220-2-ep, column density_15:",
        "greases_broken.csv:7: row polyurea-110-2, column nu_40_range:",
        "greases_broken.csv:8: row polyurea-110-3, column thickener:",
        "greases_broken.csv:9: row clay-220-2, column lowest_range:",
        "greases_broken.csv:10: row sodium-100-3, column source:",
        "greases_broken.csv:11: row calcium-100-2, column nu_40:",
        "greases_broken.csv:12: row lithium-110-2, column key:",
    ]
    assert [line[: len(start)] for line, start in zip(said, expected, strict=True)] == expected


def test_broken_oils_are_refused_with_row_and_column() -> None:
    with pytest.raises(TableError) as refused:
        read_file(TABLES / "oils_broken.csv", defaults={"kind": "oil"}, is_complete=True)
    said = str(refused.value).splitlines()
    expected = [
        "oils_broken.csv:4: row mineral-vg-100, column iso_vg:",
        "oils_broken.csv:5: row mineral-vg-150, column nu_40:",
        "oils_broken.csv:6: row mineral-vg-220, column flash_point:",
        "oils_broken.csv:7: row mineral-vg-320, column pour_point:",
        "oils_broken.csv:8: row pao-vg-46, column density_15:",
        "oils_broken.csv:9: row pao-vg-68, column expansion:",
        "oils_broken.csv:10: row pao-vg-100, column certainty:",
    ]
    assert [line[: len(start)] for line, start in zip(said, expected, strict=True)] == expected


def test_a_users_toml_may_use_its_own_units_and_ways(tmp_path: Path) -> None:
    file = tmp_path / "ours.toml"
    file.write_text(
        """
        [[lubricant]]
        key = "motor-grease"
        kind = "grease"
        nu_40 = "110 cSt"
        index = 95
        thickener = "Polyurea"
        nlgi = 2
        lowest = "-22 degF"
        highest = "302 degF"
        nu_40_range = "100..120 cSt"

        [[lubricant]]
        key = "mill-oil"
        kind = "oil"
        saybolt_100 = "700 SUS"
        saybolt_210 = "78 SUS"
        """,
        encoding="utf-8",
    )
    ours = lubricants.load(file)
    motor, mill = ours["motor-grease"], ours["mill-oil"]
    assert motor.nu_100 == pytest.approx(11.8, abs=0.05)  # ASTM D2270, VI 95: 110 and 11.8
    assert (motor.lowest, motor.highest) == (pytest.approx(-30), pytest.approx(150))
    assert motor.thickener == "polyurea"
    assert motor.ranges["nu_40"] == (100, 120)
    assert any("density_15" in words for words in motor.assumed)
    assert 130 < mill.nu_40 < 140  # 700 SUS is 151 mm^2/s at 100 degF, a tenth less at 40 degC
    assert lubricants.find("Motor Grease", own=ours.values()) is motor


def test_a_users_csv_may_carry_units_in_heading_or_cell(tmp_path: Path) -> None:
    file = tmp_path / "ours.csv"
    file.write_text("key,kind,nu_40 [cSt],nu_100,note\nbath,oil,68,8.7 mm2/s,pump house\n", encoding="utf-8")
    bath = lubricants.load(file)["bath"]
    assert (bath.nu_40, bath.nu_100, bath.note) == (68, 8.7, "pump house")


@pytest.mark.parametrize(
    ("name", "text", "said"),
    [
        (
            "a.toml",
            '[[lubricant]]\nkey = "x"\nkind = "oil"\nnu_40 = "68"\nnu_100 = "8 cSt"',
            "a.toml:1: row x, column nu_40",
        ),
        ("b.toml", '[[lubricant]]\nkey = "x"\nkind = "oil"\nvisc = "68 cSt"', "visc"),
        ("c.toml", "[oil]\n", r"\[\[lubricant\]\] tables only, given oil"),
        ("d.toml", "= 3", "d.toml: "),
        ("e.csv", "key,kind,nu_40 [cSt]\nx,oil\n", "e.csv:2: 2 cells; expected 3"),
        ("f.csv", "key,key\nx,y\n", "column key stands twice"),
        ("g.csv", "Key (x),kind\nx,oil\n", "expected a field"),
        ("h.csv", "", "no lubricant in it"),
        ("i.csv", "key,kind,nu_40 [cSt],nu_100 [cSt]\nx,oil,9,90\n", "column nu_100: given 90"),
        ("j.csv", "key,kind,nu_40 [cSt],nu_100 [cSt]\nAn Oil,oil,90,9\n", "column key"),
    ],
)
def test_a_bad_file_of_the_users_is_refused_with_its_place(tmp_path: Path, name: str, text: str, said: str) -> None:
    (tmp_path / name).write_text(text, encoding="utf-8")
    with pytest.raises(TableError, match=said):
        lubricants.load(tmp_path / name)


def test_a_file_that_is_not_there_is_refused(tmp_path: Path) -> None:
    with pytest.raises(TableError, match="cannot be read"):
        lubricants.load(tmp_path / "none.csv")


def test_an_unknown_name_gets_the_nearest_ones() -> None:
    with pytest.raises(InputError) as refused:
        lubricants.find("polyuria-110-2")
    assert "polyurea-110-2" in (refused.value.faults[0].nearest or "")


def test_a_designation_without_viscosity_says_what_is_missing_and_what_fits() -> None:
    with pytest.raises(InputError) as refused:
        lubricants.find("KP2K-30")
    fault = refused.value.faults[0]
    assert "does not state nu_40" in fault.expected
    assert "lithium-200-2-ep" in (fault.nearest or "")
    with pytest.raises(InputError) as refused:
        lubricants.find("ISO VG 68")
    assert "nu_100" in refused.value.faults[0].expected
    assert "pao-vg-68" in (refused.value.faults[0].nearest or "")


def test_a_designation_that_states_grade_and_base_oil_is_enough() -> None:
    one = lubricants.find("CLP HC 220")
    assert (one.kind, one.nu_40, one.base_oil, one.ep) == ("oil", 220, "PAO", True)
    assert one.nu_100 == pytest.approx(lubricants.find("pao-vg-220").nu_100, rel=0.06)
    assert any("index" in words for words in one.assumed)


def test_a_designation_with_figures_makes_a_grease_and_keeps_its_limits() -> None:
    one = lubricants.from_figures(designation="KPHC2N-40", nu_40=150.0, index=145.0, thickener="lithium complex")
    assert (one.kind, one.lowest, one.highest, one.nlgi, one.ep, one.base_oil) == ("grease", -40, 140, "2", True, "PAO")
    with pytest.raises(InputError, match="KPHC2N-40 states"):
        lubricants.from_figures(designation="KPHC2N-40", nu_40=150.0, index=145.0, nlgi="3")
    with pytest.raises(InputError, match="SAE 40"):
        lubricants.from_figures(designation="SAE 40", nu_40=100.0, nu_100=11.0)


def test_an_sae_grade_with_a_base_oil_takes_its_middle_and_says_so() -> None:
    one = lubricants.from_figures(designation="SAE 30", base_oil="mineral")
    assert one.nu_100 == pytest.approx((9.3 * 12.5) ** 0.5)
    assert 85 < one.nu_40 < 115  # SAE 30 is about ISO VG 100, grade tables
    assert any("SAE 30" in words for words in one.assumed)


@pytest.mark.parametrize(
    ("stated", "key"),
    [
        ({"nu_40": 100.0, "nu_100": 11.0}, "kind"),
        ({"kind": "oil"}, "nu_40"),
        ({"kind": "oil", "nu_40": 100.0}, "nu_100"),
        ({"kind": "oil", "nu_40": 11.0, "nu_100": 100.0}, "nu_100"),
        ({"kind": "oil", "nu_40": 100.0, "nu_100": 11.0, "index": 150.0}, "index"),
        ({"kind": "oil", "nu_40": 3.0, "index": 100.0}, "index"),
        ({"kind": "oil", "nu_40": 100.0, "nu_100": 11.0, "nlgi": "2"}, "nlgi"),
        ({"kind": "grease", "nu_40": 100.0, "nu_100": 11.0, "lowest": 20.0, "highest": 20.0}, "highest"),
        ({"kind": "oil", "nu_40": float("nan"), "nu_100": 11.0}, "nu_40"),
        ({"kind": "oil", "nu_4": 100.0, "nu_100": 11.0}, "nu_4"),
        ({"kind": "oil", "saybolt_100": 700.0}, "saybolt_210"),
        ({"kind": "oil", "saybolt_100": 70.0, "saybolt_210": 700.0}, "saybolt_100"),
    ],
)
def test_figures_that_cannot_be_are_refused_by_name(stated: dict[str, object], key: str) -> None:
    with pytest.raises(InputError) as refused:
        lubricants.from_figures(**stated)
    assert key in {fault.key for fault in refused.value.faults}


def test_figures_of_the_users_own_replace_the_tables() -> None:
    table = lubricants.find("polyurea-110-2")
    both = lubricants.with_given(table, nu_40=100.0, nu_100=11.0)
    assert (both.nu_40, both.nu_100, both.highest) == (100, 11, table.highest)
    assert "nu_40" not in both.ranges
    alone = lubricants.with_given(table, nu_40=120.0)
    assert index_of(alone) == pytest.approx(index_of(table), abs=0.1)
    assert any("index" in words for words in alone.assumed)
    assert lubricants.with_given(table) is table
    with pytest.raises(InputError):
        lubricants.with_given(table, highest=-40.0)


@given(nu_40=st.floats(15, 1000), index=st.floats(60, 300), lowest=st.floats(-60, 0), highest=st.floats(60, 200))
def test_any_sound_grease_is_accepted_and_keeps_what_was_stated(
    nu_40: float, index: float, lowest: float, highest: float
) -> None:
    one = lubricants.from_figures(kind="grease", nu_40=nu_40, index=index, lowest=lowest, highest=highest)
    assert (one.nu_40, one.lowest, one.highest) == (nu_40, lowest, highest)
    assert index_of(one) == pytest.approx(index, abs=0.5)
