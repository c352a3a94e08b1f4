"""Codes of ISO 4406, and the setting of ISO 281 that each is judged by."""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.data.cleanliness import CODE_EXPECTED, Code, oil_settings, read_code, setting_of
from lubecheck.physics.fatigue import SETTINGS
from lubecheck.units import UnreadableText


@given(st.lists(st.integers(0, 28), min_size=3, max_size=3))
def test_a_code_comes_back_as_it_was_written(numbers: list[int]) -> None:
    a, b, c = sorted(numbers, reverse=True)
    assert str(read_code(f"{a}/{b}/{c}")) == f"{a}/{b}/{c}"
    assert read_code(f" - / {b} /{c}") == Code(None, b, c)


@pytest.mark.parametrize(
    ("text", "word"),
    [
        ("17/14", "-/17/14"),  # the edition of 1987 gave two numbers
        ("14/17/19", "never more large particles"),
        ("19/17/18", "never more large particles"),
        ("30/17/14", "0 to 28"),
        ("19-17-14", ""),
        ("ISO 19/17/14", ""),
        ("19/17/14/12", ""),
        ("a/b/c", ""),
        ("-/-/-", ""),
        ("", ""),
        ("19.5/17/14", ""),
    ],
)
def test_a_wrong_code_is_refused_with_the_form_that_is_expected(text: str, word: str) -> None:
    with pytest.raises(UnreadableText) as refused:
        read_code(text)
    assert CODE_EXPECTED in refused.value.expected
    assert word in refused.value.expected


# ISO 281:2007, Annex A, codes of oil in a bath or filtered off-line: -/13/10, -/15/12, -/17/14, -/19/16, -/21/18.
@pytest.mark.parametrize(
    ("code", "setting"),
    [
        ("15/13/10", "bath -/13/10"),
        ("12/10/7", "bath -/13/10"),
        ("19/17/14", "bath -/17/14"),
        ("18/16/11", "bath -/17/14"),
        ("17/14/13", "bath -/17/14"),  # the large particles decide
        ("20/18/12", "bath -/19/16"),  # the small ones do
        ("-/21/18", "bath -/21/18"),
        ("24/22/18", None),
        ("24/21/19", None),
    ],
)
def test_the_setting_is_the_nearest_that_is_no_cleaner(code: str, setting: str | None) -> None:
    assert setting_of(read_code(code)) == setting


@given(st.integers(0, 28), st.integers(0, 28))
def test_a_chosen_setting_is_never_cleaner_than_the_oil(over_6: int, over_14: int) -> None:
    code = Code(None, max(over_6, over_14), min(over_6, over_14))
    setting = setting_of(code)
    by_name = {word: (six, fourteen) for six, fourteen, word in oil_settings()}
    if setting is None:
        assert code.over_6 > 21 or code.over_14 > 18
    else:
        six, fourteen = by_name[setting]
        assert code.over_6 <= six
        assert code.over_14 <= fourteen


def test_the_settings_are_those_of_the_fatigue_method() -> None:
    assert len(oil_settings()) == 5
    assert {word for _, _, word in oil_settings()} <= set(SETTINGS)
