"""One body, two faces: what the decorator checks at import and at a call."""

from __future__ import annotations

import math

import numpy as np
import pint
import pytest

from lubecheck.errors import ArgumentError, DeclarationError, OutOfRange
from lubecheck.method import method
from lubecheck.physics import fatigue, film, friction
from lubecheck.units import Array, DegC, DeltaDegC, Mm, Rpm


@method(source="common-practice", valid={"temperature": (-50.0, 150.0)})
def warmed(temperature: DegC, rise: DeltaDegC) -> DegC:
    """Return a temperature and a rise, added.

    temperature [degC]: where it starts
    rise [delta_degC]: how much warmer
    returns [degC]
    """
    return temperature + rise


def test_quantities_texts_lists_and_arrays_broadcast_alike():
    registry = pint.UnitRegistry()  # not the application registry: a caller may have its own
    expected = film.reference_viscosity.plain(np.array([1000.0, 1500.0]), 72.5)
    given = (
        ["1000 rpm", "1500 rpm"],
        registry.Quantity([1000, 1500], "rpm"),
        registry.Quantity(np.array([1000.0, 1500.0]), "1/min"),
        [registry.Quantity(1000, "rpm"), "25 Hz"],
    )
    for speed in given:
        answer = film.reference_viscosity(speed, "72.5 mm")
        assert np.allclose(answer.m_as("mm^2/s"), expected, rtol=1e-12)


def test_hertz_of_a_shaft_are_turns_and_radians_are_not():
    registry = pint.get_application_registry()
    turns = film.reference_viscosity(registry.Quantity(25, "Hz"), "72.5 mm")
    assert turns == film.reference_viscosity("1500 rpm", "72.5 mm")
    radians = film.reference_viscosity(registry.Quantity(25, "rad/s"), "72.5 mm")
    assert math.isclose(radians.magnitude, film.reference_viscosity.plain(25 * 30 / math.pi, 72.5))


@pytest.mark.parametrize("speed", [1480, 1480.0, [1480], np.array([1480.0]), True, None, {"rpm": 1480}])
def test_a_bare_number_is_refused_where_a_dimension_is_needed(speed):
    with pytest.raises(ArgumentError, match="a speed with its unit"):
        film.reference_viscosity(speed, "72.5 mm")


def test_all_faults_of_a_call_are_told_at_once():
    with pytest.raises(ArgumentError) as caught:
        film.reference_viscosity(1480, "72.5 N")
    assert [fault.key for fault in caught.value.faults] == ["speed", "pitch_diameter"]


def test_a_wrong_dimension_is_refused():
    with pytest.raises(ArgumentError, match="length"):
        film.reference_viscosity("1480 rpm", pint.get_application_registry().Quantity(72.5, "N"))


def test_a_temperature_and_a_difference_are_never_mixed_up():
    registry = pint.get_application_registry()
    assert warmed("40 degC", "15 K").m_as("degC") == 55.0
    assert warmed(registry.Quantity(313.15, "K"), registry.Quantity(15, "K")).m_as("degC") == pytest.approx(55.0)
    assert warmed("40 degC", registry.Quantity(27, "delta_degF")).m_as("degC") == pytest.approx(55.0)
    with pytest.raises(ArgumentError):
        warmed("40 degC", "15 degC")
    with pytest.raises(ArgumentError, match="not a temperature"):
        warmed("40 degC", registry.Quantity(15, "degC"))
    with pytest.raises(ArgumentError, match="not a temperature difference"):
        warmed(registry.Quantity(15, "delta_degC"), "15 K")


@pytest.mark.parametrize("bad", ["nan degC", pint.get_application_registry().Quantity(math.nan, "degC"),
                                 pint.get_application_registry().Quantity([20.0, math.inf], "degC")])  # fmt: skip
def test_nan_and_infinity_never_enter(bad):
    with pytest.raises(ArgumentError):
        warmed(bad, "15 K")


def test_outside_the_range_of_validity_is_an_error_that_names_it():
    with pytest.raises(OutOfRange, match="temperature -50 to 150 degC"):
        warmed("200 degC", "1 K")
    assert warmed.outside(temperature=np.array([0.0, 200.0, math.nan])).tolist() == [False, True, True]


def test_a_word_that_is_no_choice_gets_the_nearest():
    with pytest.raises(ArgumentError, match="nearest: radial ball"):
        fatigue.fatigue_load_limit("31.5 kN", "72.5 mm", "radial bal")


def test_the_plain_face_is_the_body_and_the_aware_face_calls_it():
    plain = friction.load_torque.plain(np.array(0.0002), np.array(5000.0), np.array(100.0))
    assert friction.load_torque(0.0002, "5 kN", "10 cm").m_as("N*mm") == pytest.approx(float(plain))


def test_a_declaration_without_a_unit_fails_at_import():
    with pytest.raises(DeclarationError, match="argument speed declares no unit"):

        @method(source="common-practice")
        def nameless(speed: Array) -> Mm:
            """Nothing."""
            return speed


def test_a_docstring_that_disagrees_fails_at_import():
    with pytest.raises(DeclarationError, match=r"does not say 'speed \[rpm\]'"):

        @method(source="common-practice")
        def wrong(speed: Rpm) -> Mm:
            """Wrong.

            speed [1/s]: the speed
            returns [mm]
            """
            return speed


def test_arguments_of_one_dimension_have_to_be_keywords():
    with pytest.raises(DeclarationError, match="keyword-only"):

        @method(source="common-practice")
        def mixed(bore: Mm, outside: Mm) -> Mm:
            """Mix.

            bore [mm]: d
            outside [mm]: D
            returns [mm]
            """
            return bore + outside


def test_a_source_that_is_not_in_the_bibliography_fails_at_import():
    with pytest.raises(KeyError):

        @method(source="hearsay")
        def heard(bore: Mm) -> Mm:
            """Hear.

            bore [mm]: d
            returns [mm]
            """
            return bore
