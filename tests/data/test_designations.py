"""Designations: read, written, refused with the nearest readings, and no more read out of them than they state."""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.data import designations, grades
from lubecheck.errors import InputError

NLGI = st.sampled_from(list(grades.NLGI_PENETRATION))


@pytest.mark.parametrize(
    ("text", "facts"),
    [
        # DIN 51502: K/M 120, N 140, G/H 100 degC; P extreme pressure; HC synthetic hydrocarbon, E ester, SI silicone.
        ("KP2K-30", {"nlgi": "2", "ep": True, "highest": 120, "lowest": -30, "base_oil": "mineral"}),
        ("KPHC2N-40", {"nlgi": "2", "ep": True, "highest": 140, "lowest": -40, "base_oil": "PAO"}),
        ("K1K-20", {"nlgi": "1", "ep": False, "highest": 120, "lowest": -20, "base_oil": "mineral"}),
        ("GP00G-20", {"nlgi": "00", "ep": True, "highest": 100, "lowest": -20}),
        ("KFK2U-30", {"nlgi": "2", "ep": False, "highest": 220, "base_oil": "PFPE"}),
        ("KE2R-50", {"nlgi": "2", "highest": 180, "lowest": -50, "base_oil": "ester"}),
        ("KSI3R", {"nlgi": "3", "highest": 180, "base_oil": "silicone"}),
        ("k p f 2 k - 20", {"nlgi": "2", "ep": True, "highest": 120, "lowest": -20}),
        ("DIN 51825-KP2K−30", {"nlgi": "2", "ep": True, "highest": 120, "lowest": -30}),
        # ISO 6743-9: lower B -20, upper C 120 degC, load B.
        ("ISO-L-XBCEB 2", {"nlgi": "2", "ep": True, "lowest": -20, "highest": 120}),
        ("L-XCDHA 00", {"nlgi": "00", "ep": False, "lowest": -30, "highest": 140}),
        # ISO 3448, AGMA 9005 and their equivalence.
        ("VG 68", {"kind": "oil", "iso_vg": 68}),
        ("ISO VG 150", {"kind": "oil", "iso_vg": 150}),
        ("AGMA 5 EP", {"kind": "oil", "iso_vg": 220, "ep": True}),
        ("agma no. 8a comp", {"kind": "oil", "iso_vg": 1000, "ep": False}),
        ("CLP 220", {"kind": "oil", "iso_vg": 220, "base_oil": "mineral", "ep": True}),
        ("CLP PG 460", {"kind": "oil", "iso_vg": 460, "base_oil": "PAG"}),
        ("HLP 46", {"kind": "oil", "iso_vg": 46, "base_oil": "mineral", "ep": False}),
        ("NLGI 2", {"kind": "grease", "nlgi": "2"}),
        ("NLGI grade 000", {"kind": "grease", "nlgi": "000"}),
    ],
)
def test_a_designation_states_its_facts(text: str, facts: dict[str, object]) -> None:
    read = designations.read(text)
    assert {name: read.facts[name] for name in facts} == facts


@pytest.mark.parametrize(
    ("text", "system", "name", "low", "high"),
    [
        # SAE J300 (2021) and J306 (2019), mm^2/s at 100 degC.
        ("SAE 40", "SAE J300", "nu_100", 12.5, 16.3),
        ("SAE 15W-40", "SAE J300", "nu_100", 12.5, 16.3),
        ("5w30", "SAE J300", "nu_100", 9.3, 12.5),
        ("SAE 75W-90", "SAE J306", "nu_100", 13.5, 18.5),
        ("SAE 140", "SAE J306", "nu_100", 24.0, 32.5),
        ("ISO VG 100", "ISO 3448", "nu_40", 90.0, 110.0),
        ("AGMA 6", "AGMA 9005", "nu_40", 288.0, 352.0),
    ],
)
def test_a_grade_states_its_limits_at_one_temperature(
    text: str, system: str, name: str, low: float, high: float
) -> None:
    read = designations.read(text)
    assert read.system == system
    assert set(read.ranges) == {name}
    assert read.ranges[name].low == pytest.approx(low)
    assert read.ranges[name].high == pytest.approx(high)


def test_a_grease_designation_states_no_viscosity_and_no_thickener() -> None:
    for text in ("KP2K-30", "KPHC2N-40", "ISO-L-XBCEB 2", "NLGI 2"):
        read = designations.read(text)
        assert not read.ranges
        assert not {"nu_40", "nu_100", "thickener", "density_15"} & set(read.facts)


def test_what_is_not_stated_is_no_fact() -> None:
    assert "lowest" not in designations.read("KSI3R").facts
    assert "base_oil" not in designations.read("ISO-L-XBCEB 2").facts
    assert "base_oil" not in designations.read("KX2K-20").facts
    assert "ep" not in designations.read("NLGI 2").facts


@given(
    nlgi=NLGI,
    upper=st.sampled_from(list(designations.DIN_UPPER)),
    lower=st.sampled_from([None, *designations.DIN_LOWER]),
    ep=st.booleans(),
    solids=st.booleans(),
    base_oil=st.sampled_from([None, *designations.DIN_BASE_OIL]),
    use=st.sampled_from(list(designations.DIN_USE)),
)
def test_what_is_written_by_din_51502_is_read_back(
    nlgi: str, upper: str, lower: int | None, ep: bool, solids: bool, base_oil: str | None, use: str
) -> None:
    written = designations.din_grease(
        nlgi=nlgi, upper=upper, lower=lower, ep=ep, solids=solids, base_oil=base_oil, use=use
    )
    assert designations.read(written.text) == written


@given(
    lower=st.sampled_from(list(designations.ISO_LOWER)),
    upper=st.sampled_from(list(designations.ISO_UPPER)),
    water=st.sampled_from(list(designations.ISO_WATER)),
    ep=st.booleans(),
    nlgi=NLGI,
)
def test_what_is_written_by_iso_6743_9_is_read_back(lower: str, upper: str, water: str, ep: bool, nlgi: str) -> None:
    written = designations.iso_grease(lower=lower, upper=upper, water=water, ep=ep, nlgi=nlgi)
    assert designations.read(written.text) == written


def test_every_grade_of_every_table_is_written_and_read_back() -> None:
    written = [designations.iso_vg(grade) for grade in grades.ISO_VG]
    written += [designations.agma(number, suffix) for number in grades.AGMA for suffix in designations.AGMA_SUFFIXES]
    written += [designations.nlgi(grade) for grade in grades.NLGI_PENETRATION]
    for is_gear, hot, cold in (
        (False, grades.SAE_ENGINE, grades.SAE_ENGINE_WINTER),
        (True, grades.SAE_GEAR, grades.SAE_GEAR_WINTER),
    ):
        written += [designations.sae(winter, None, is_gear=is_gear) for winter in cold]
        written += [designations.sae(winter, summer, is_gear=is_gear) for winter in (None, *cold) for summer in hot]
    for one in written:
        assert designations.read(one.text) == one


@pytest.mark.parametrize(
    ("text", "near"),
    [
        ("KP2Q-30", "KP2P-30"),
        ("K2PK-30", "KP2K-30"),
        ("KP2K-3O", "KP2K-30"),
        ("KPP2K-30", "KP2K-30"),
        ("KP2K-25", "KP2K-20"),
        ("ISO-L-XBCEC 2", "ISO-L-XBCEB 2"),
        ("ISO VG 90", "ISO VG 100"),
        ("SAE 45", "SAE 40"),
        ("AGMA 12", "AGMA 11"),
    ],
)
def test_a_misspelled_designation_gets_the_nearest_readings(text: str, near: str) -> None:
    with pytest.raises(InputError) as refused:
        designations.read(text)
    assert near in (refused.value.faults[0].nearest or "").split(", ")


@given(st.text(max_size=40))
def test_any_text_is_read_or_refused_and_nothing_else(text: str) -> None:
    try:
        read = designations.read(text)
    except InputError:
        return
    assert designations.read(read.text) == read
