"""The reader of "45 mm", and every unit word against pint."""

from __future__ import annotations

import math

import pint
import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.units import KINDS, UnreadableText, from_house, read_text, split_text, to_house, unit_word

# Words that pint spells in another way, or means something else by (25 Hz of a shaft are turns, pint counts radians).
PINT_WORDS = {"fl_oz": "floz", "gal": "gallon", "L": "liter"}
SHAFT_WORDS = {"1/min": "rpm", "r/min": "rpm", "rev/min": "rpm", "1/s": "turn/s", "rev/s": "turn/s", "Hz": "turn/s"}


@pytest.mark.parametrize(
    ("kind", "word"),
    # Saybolt seconds are no unit of pint's: a viscosity that is measured as a time.
    [(k, w) for k in KINDS.values() for w in k.words if k.unit != "1" and k.name != "Saybolt viscosity"],
)
def test_every_unit_word_agrees_with_pint(kind, word):
    registry = pint.get_application_registry()
    pint_word = SHAFT_WORDS.get(word, word) if kind.name == "speed" else PINT_WORDS.get(word, word)
    expected = registry.Quantity(7.0, pint_word).to(kind.unit).magnitude
    assert math.isclose(to_house(7.0, word, kind), expected, rel_tol=1e-9)


@pytest.mark.parametrize(
    ("text", "kind", "value"),
    [
        ("45 mm", "length", 45.0),
        ("45mm", "length", 45.0),
        (" 1.75 in ", "length", 44.45),
        ("-10 °C", "temperature", -10.0),
        ("\N{MINUS SIGN}10 degC", "temperature", -10.0),
        ("313.15 K", "temperature", 40.0),
        ("15 K", "temperature difference", 15.0),
        ("27 delta_degF", "temperature difference", 15.0),
        ("1480 1/min", "speed", 1480.0),
        ("25 Hz", "speed", 1500.0),
        ("110 mm²/s", "kinematic viscosity", 110.0),
        ("110 mm2/s", "kinematic viscosity", 110.0),
        ("110 cSt", "kinematic viscosity", 110.0),
        ("1e3 N", "force", 1000.0),
        ("250 lbf", "force", 1112.0554),
        ("18 week", "time", 3024.0),
        ("35 %", "share", 0.35),
        ("0.35", "share", 0.35),
        ("2 fl oz", "volume", 59.1470591),
        ("0.12 m^2", "area", 120000.0),
    ],
)
def test_a_text_is_read_into_the_house_unit(text, kind, value):
    assert math.isclose(read_text(text, KINDS[kind]), value, rel_tol=1e-7, abs_tol=1e-9)


@pytest.mark.parametrize(
    ("text", "kind", "hint"),
    [
        ("1,5 mm", "length", "decimal point"),
        ("12 000 h", "time", "without a separator"),
        ("12_000 h", "time", "separator"),
        ("45 mm + 1 m", "length", "no arithmetic"),
        ("nan mm", "length", "finite"),
        ("inf mm", "length", "finite"),
        ("1e999 mm", "length", "finite"),
        ("mm", "length", ""),
        ("45", "length", ""),
        ("", "length", ""),
        ("9**9**9 mm", "length", ""),
        ("45 mm mm", "length", ""),
        ("70 C", "temperature", ""),
        ("0x10 mm", "length", ""),
        ("1001/s", "shear rate", ""),
        ("4" * 100 + " mm", "length", ""),
    ],
)
def test_a_text_that_is_not_one_number_and_one_unit_is_refused(text, kind, hint):
    with pytest.raises(UnreadableText) as caught:
        read_text(text, KINDS[kind])
    assert hint in caught.value.hint
    assert KINDS[kind].name in caught.value.expected


def test_the_nearest_unit_word_is_named():
    with pytest.raises(UnreadableText) as caught:
        split_text("1480 rmp", KINDS["speed"])
    assert caught.value.near == "rpm"


@given(st.text(max_size=30), st.sampled_from(sorted(KINDS)))
def test_any_text_is_read_or_refused_and_what_is_read_is_finite(text, name):
    try:
        value = read_text(text, KINDS[name])
    except UnreadableText:
        return
    assert math.isfinite(value)


@given(st.floats(-1e6, 1e6), st.sampled_from([(k.name, w) for k in KINDS.values() for w in k.words]))
def test_to_the_house_unit_and_back_is_the_same_number(number, pair):
    kind = KINDS[pair[0]]
    back = from_house(to_house(number, pair[1], kind), pair[1], kind)
    assert math.isclose(back, number, rel_tol=1e-9, abs_tol=1e-6)


def test_typed_forms_fold_to_one_word():
    assert {unit_word(word) for word in ("mm²/s", "mm2/s", "mm**2/s", "mm^2/s")} == {"mm^2/s"}
