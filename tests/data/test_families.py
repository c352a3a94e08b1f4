"""The table of family facts is whole, consistent, and speaks the words that physics speaks."""

import pytest

from lubecheck import sources
from lubecheck.data import families
from lubecheck.data.bearing_series import SERIES
from lubecheck.data.families import FAMILIES
from lubecheck.physics import fatigue, loads

NAMES = [
    "deep groove ball", "double row deep groove ball", "self-aligning ball", "angular contact ball",
    "double row angular contact ball", "four-point contact ball", "cylindrical roller",
    "full complement cylindrical roller", "needle roller", "tapered roller", "spherical roller", "thrust ball",
    "thrust cylindrical roller", "thrust spherical roller",
]  # fmt: skip


def test_the_names_are_those_a_case_may_use():
    assert list(FAMILIES) == NAMES


@pytest.mark.parametrize("family", FAMILIES.values(), ids=lambda family: family.name)
def test_words_are_those_of_physics(family):
    assert family.kind in fatigue.KINDS
    assert fatigue.KINDS[family.kind_code] == family.kind
    assert family.load_rule in loads.RULES


@pytest.mark.parametrize("family", FAMILIES.values(), ids=lambda family: family.name)
def test_figures_lie_in_their_ranges(family):
    for name in ("k_f", "grease_speed", "oil_speed", "free_share"):
        value = getattr(family, name if hasattr(family, name) else f"{name}_limit")
        low, high = getattr(family, f"{name}_range")
        assert 0 < low <= value <= high, name
    assert family.grease_speed_limit < family.oil_speed_limit
    assert family.free_share_range[1] < 0.5


@pytest.mark.parametrize("family", FAMILIES.values(), ids=lambda family: family.name)
def test_rollers_and_balls_differ_as_the_standards_say(family):
    is_roller = "roller" in family.name
    assert family.is_roller is is_roller
    assert family.life_exponent == pytest.approx(10 / 3 if is_roller else 3)
    assert family.minimum_load_share == (0.02 if is_roller else 0.01)
    assert family.is_thrust is family.name.startswith("thrust")
    assert family.static_safety["normal"] >= (1.5 if is_roller else 1.0)


def test_spherical_thrust_bearings_need_four_static():
    assert set(FAMILIES["thrust spherical roller"].static_safety.values()) == {4.0}


@pytest.mark.parametrize(
    ("family", "series", "factors"),
    [
        ("deep groove ball", "02", (2.0, 0.0002)),  # Palmgren and ISO 15312, Annex A (memory)
        ("cylindrical roller", "23", (4.0, 0.0004)),
        ("full complement cylindrical roller", "23", (12.0, 0.00055)),
        ("spherical roller", "22", (4.0, 0.00015)),
        ("spherical roller", "41", (7.0, 0.00049)),
        ("needle roller", "69", (10.0, 0.0005)),
    ],
)
def test_friction_factors_by_dimension_series(family, series, factors):
    assert FAMILIES[family].friction_factors(series) == factors


def test_a_series_without_factors_takes_those_of_its_family():
    family = FAMILIES["cylindrical roller"]
    assert family.friction_factors("99") == (family.f0, family.f1)


@pytest.mark.parametrize("family", FAMILIES.values(), ids=lambda family: family.name)
def test_friction_is_listed_only_for_series_that_exist(family):
    made = {series.dimension_series for series in SERIES if series.family == family.name}
    spare = {"tapered roller": {"29"}}.get(family.name, set())
    assert set(family.friction) - spare <= made


def test_every_fact_names_a_source_of_the_bibliography():
    for name, key in families.SOURCES.items():
        assert sources.cite(key), name
    assert {family.friction_source for family in FAMILIES.values()} <= set(sources.SOURCES)
