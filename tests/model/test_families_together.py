"""Every family in one call of the kernel, and what the suffixes of a designation mean to the verdict."""

from __future__ import annotations

import numpy as np
import pytest
from conftest import BASE, with_key

import lubecheck
from lubecheck.data.families import FAMILIES
from lubecheck.model.check import readings
from lubecheck.model.kernel import judge
from lubecheck.model.points import from_rows, join
from lubecheck.model.reader import read_case
from lubecheck.model.rows import rows_of

ONE_OF_EACH = {
    "6309": "deep groove ball", "4209": "double row deep groove ball", "2209": "self-aligning ball",
    "7309 B": "angular contact ball", "3209": "double row angular contact ball", "QJ 309": "four-point contact ball",
    "NU 309": "cylindrical roller", "NCF 3009": "full complement cylindrical roller", "NA 4909": "needle roller",
    "30309": "tapered roller", "22309": "spherical roller", "51109": "thrust ball",
    "81109": "thrust cylindrical roller", "29412": "thrust spherical roller", "7309 C": "angular contact ball",
    "7309 AC DB": "angular contact ball", "30309 DF": "tapered roller",
}  # fmt: skip


def case_of(designation: str, **keys: str) -> lubecheck.Case:
    text = with_key(BASE, "bearing", "designation", f'"{designation}"')
    for key in ("dynamic_rating", "static_rating", "mass", "cage"):
        text = with_key(text, "bearing", key, None)
    for name, value in keys.items():
        table, _, key = name.partition("__")
        text = with_key(text, table, key, value)
    return read_case(text)


def points_of(designation: str):
    is_thrust = FAMILIES[ONE_OF_EACH[designation]].is_thrust
    loads = {"duty__radial_load": '"0 N"' if is_thrust else '"1.9 kN"', "duty__speed": '"600 rpm"'}
    takes_axial = "cylindrical" not in FAMILIES[ONE_OF_EACH[designation]].load_rule or is_thrust
    case = case_of(designation, **loads, duty__axial_load='"900 N"' if takes_axial else '"0 N"')
    return from_rows(rows_of(case, readings(case)[1][0]))


def test_the_list_has_every_family():
    assert set(ONE_OF_EACH.values()) == set(FAMILIES)
    assert {name: case_of(name).bearing.family for name in ONE_OF_EACH} == ONE_OF_EACH


def test_mixed_families_in_one_call_give_what_each_gives_alone():
    parts = [points_of(name) for name in ONE_OF_EACH]
    together = judge(join(parts))
    for i, (name, part) in enumerate(zip(ONE_OF_EACH, parts, strict=True)):
        alone = judge(part)
        for field in ("kappa", "life_factor", "load_ratio", "rating_life", "modified_life", "allowed_interval"):
            ours, single = getattr(together, field)[i], getattr(alone, field)[0]
            assert ours == pytest.approx(single, rel=1e-12, nan_ok=True), (name, field)
        for limit, judged in alone.judged.items():
            assert together.judged[limit].state[i] == judged.state[0], (name, limit)
            use = together.judged[limit].use[i]
            assert use == pytest.approx(judged.use[0], rel=1e-12, nan_ok=True), (name, limit)
    # the call is a mixed one: each load rule and kind of contact is there
    assert len(np.unique(together.points.rule)) >= 12
    assert len(np.unique(together.points.kind)) == 4


def limit_of(designation: str, name: str, **keys: str):
    return lubecheck.check(case_of(designation, **keys)).limit(name)


def test_a_sealed_bearing_cannot_be_regreased():
    for name in ("6309-2RS", "6309-2Z/C3"):
        limit = limit_of(name, "interval")
        assert limit.state == "beyond"
        assert "do not regrease" in limit.note
    assert limit_of("6309-Z", "interval").state == "within"


# With a grease that is good for 180 degC the bearing's own parts are what limits.
@pytest.mark.parametrize(
    ("designation", "highest", "part"),
    [
        ("6309", 120, "dimensional stability of the rings"),
        ("6309 TN9", 120, "cage of polyamide"),
        ("6309 TN9 S1", 120, "cage of polyamide"),
        ("6309-2RS", 100, "seals of nitrile rubber"),
        ("6309-2RS TN9", 100, "seals of nitrile rubber"),
        ("6309-2Z", 120, "dimensional stability of the rings"),
        ("6309 M S0", 150, "dimensional stability of the rings"),
        ("6309 M S1", 180, "lubricant"),
        ("22218 E1 C3", 120, "dimensional stability of the rings"),
    ],
)
def test_cage_seals_and_heat_stabilisation_set_the_top_temperature(designation, highest, part):
    case = case_of(designation, lubricant__highest='"180 degC"')
    # Rings have a limit of their own, since they run hotter than the lubricant.
    limit = lubecheck.check(case).limit("rings" if "rings" in part else "temperature")
    assert limit.allowed == highest
    assert part in limit.note


def test_the_part_of_a_designation_that_is_not_understood_is_named():
    notes = lubecheck.check(case_of("6309 C3 XQ9")).notes
    assert "not understood in the designation: XQ9" in notes


def test_clearance_is_read():
    assert case_of("6309-2Z/C3").bearing.clearance == "C3"


@pytest.mark.parametrize(("radial", "is_judged"), [("500 N", True), ("600 N", False)])
def test_a_thrust_spherical_bearing_takes_radial_load_up_to_055_of_the_axial_one(radial, is_judged):
    loads = {"duty__radial_load": f'"{radial}"', "duty__axial_load": '"1 kN"', "duty__speed": '"600 rpm"'}
    limit = limit_of("29412", "fatigue_life", **loads)
    assert ("washers part" in limit.note) is not is_judged
    assert (limit.state == "unknown") is not is_judged
