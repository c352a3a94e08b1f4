"""The table of what may meet: symmetric, complete, sourced, and as cautious as the charts that disagree."""

from __future__ import annotations

import itertools
from importlib import resources
from pathlib import Path

import pytest

from lubecheck.data import compatibility, lubricants
from lubecheck.data.lubricant import BASE_OILS, THICKENERS
from lubecheck.errors import TableError
from lubecheck.sources import SOURCES

BROKEN = Path(__file__).parents[1] / "tables" / "compatibility_broken.csv"
TEXT = (resources.files("lubecheck.data") / "compatibility.csv").read_text(encoding="utf-8")
SHORT = {"Na": "sodium", "AlX": "aluminium complex", "Ba": "barium complex", "Ca": "calcium", "CaX": "calcium complex",
         "clay": "clay", "Li": "lithium", "LiX": "lithium complex", "PU": "polyurea"}  # fmt: skip


@pytest.mark.parametrize(("kind", "names"), [("thickener", THICKENERS), ("base oil", BASE_OILS)])
def test_the_matrix_is_complete_symmetric_and_every_cell_has_its_source(kind, names):
    for a, b in itertools.product(names, repeat=2):
        cell = compatibility.table()[kind, a, b]
        assert cell == compatibility.table()[kind, b, a]
        assert cell.source in SOURCES
        assert cell.certainty
    assert all(compatibility.table()[kind, name, name].state == "mixes" for name in names)


def test_seals_and_metals_are_complete():
    for base, elastomer in itertools.product(BASE_OILS, compatibility.ELASTOMERS):
        assert compatibility.of("seal", base, elastomer).source in SOURCES
    for additive, metal in itertools.product(compatibility.ADDITIVES, compatibility.METALS):
        assert compatibility.of("metal", additive, metal).source in SOURCES


def test_no_state_is_better_than_the_matrix_of_fist_2_4():
    # FIST 2-4 (US Bureau of Reclamation 1990), as printed: compatible, borderline, all others incompatible.
    compatible = {("Li", "LiX"), ("LiX", "Ca"), ("LiX", "AlX")}
    borderline = {("Li", "Ca"), ("Li", "AlX")}
    for a, b in itertools.combinations(SHORT, 2):
        state = compatibility.of("thickener", SHORT[a], SHORT[b]).state
        if {(a, b), (b, a)} & compatible:
            # 21 charts on aluminium complex with lithium complex: 12 yes, 4 borderline, 5 no
            assert state == ("test first" if "AlX" in (a, b) else "mixes")
        elif {(a, b), (b, a)} & borderline:
            assert state == "test first"
        else:
            assert state == "do not mix"


def test_where_published_charts_disagree_the_text_says_so():
    cell = compatibility.of("thickener", "lithium complex", "aluminium complex")
    assert "12 say yes, 4 borderline, 5 no" in compatibility.words(cell)


def test_nothing_is_called_compatible():
    for cell in compatibility.table().values():
        text = compatibility.words(cell)
        assert "compatible" not in text.replace("FIST 2-4 says compatible; of 21 published charts", "")
        if cell.kind in ("thickener", "base oil") and cell.state in ("mixes", "test first"):
            assert "ASTM D6185" in text


def test_a_lubricant_with_itself_always_mixes():
    for one in lubricants.table().values():
        assert compatibility.meet(one, one).state == "mixes"


def test_the_meeting_does_not_depend_on_who_came_first():
    everything = list(lubricants.table().values())
    for one, other in itertools.combinations(everything[::3], 2):
        assert compatibility.meet(one, other).state == compatibility.meet(other, one).state


def test_a_thickener_that_nobody_stated_is_not_known():
    plain = lubricants.from_figures(kind="grease", nu_40=110.0, nu_100=11.8, base_oil="mineral")
    meeting = compatibility.meet(plain, lubricants.find("lithium-110-2"))
    assert meeting.state == "not known"
    assert "not stated" in meeting.reason


def test_glycol_into_mineral_oil_does_not_mix():
    assert compatibility.meet(lubricants.find("mineral-vg-220"), lubricants.find("pag-vg-220")).state == "do not mix"


def test_a_broken_table_is_refused_with_every_fault():
    with pytest.raises(TableError) as refused:
        compatibility.parse(BROKEN.read_text(encoding="utf-8"), BROKEN.name)
    text = str(refused.value)
    for complaint in ("stands twice", "state 'fine'", "source 'somebody'", "certainty 'sure'", "kind 'paint'",
                      "expected names of", "with itself mixes", "no thickener cell for clay and PTFE"):  # fmt: skip
        assert complaint in text


def test_a_table_without_one_line_or_with_other_columns_is_refused():
    line = next(line for line in TEXT.splitlines() if line.startswith("base oil,PAO,PAG"))
    with pytest.raises(TableError, match="no base oil cell for PAO and PAG"):
        compatibility.parse(TEXT.replace(line + "\n", ""), "short.csv")
    with pytest.raises(TableError, match="expected the columns"):
        compatibility.parse("a,b\n1,2\n", "other.csv")
