"""Cleanliness of oil: codes of ISO 4406 read, and the setting of ISO 281 that is nearest on the dirtier side."""

from __future__ import annotations

import re
from dataclasses import dataclass

from lubecheck.physics.fatigue import SETTINGS
from lubecheck.units import UnreadableText

CODE_EXPECTED = 'an ISO 4406 code, particles over 4, 6 and 14 um, such as "19/17/14", or "-/17/14" for the last two'
_GREATEST = 28  # ISO 4406: the scale numbers end there
_CODE = re.compile(r"(\d{1,2}|[-*])\s*/\s*(\d{1,2})\s*/\s*(\d{1,2})")
_TWO = re.compile(r"(\d{1,2})\s*/\s*(\d{1,2})")
_SUPPLY = "bath -/"


@dataclass(frozen=True, slots=True)
class Code:
    """A cleanliness code of ISO 4406: scale numbers of the particles over 4, 6 and 14 um in a millilitre."""

    over_4: int | None
    over_6: int
    over_14: int

    def __str__(self) -> str:
        return f"{'-' if self.over_4 is None else self.over_4}/{self.over_6}/{self.over_14}"


def read_code(text: str) -> Code:
    """Read a code of ISO 4406.

    Raises UnreadableText where it is none.

    >>> str(read_code("19/17/14")), read_code("-/17/14").over_4
    ('19/17/14', None)
    """
    text = text.strip()
    match = _CODE.fullmatch(text)
    if match is None:
        two = _TWO.fullmatch(text)
        hint = f"two numbers, of the edition of 1987, stand for 6 and 14 um: -/{two[1]}/{two[2]}" if two else ""
        raise UnreadableText(CODE_EXPECTED, hint=hint)
    first = None if match[1] in "-*" else int(match[1])
    numbers = [number for number in (first, int(match[2]), int(match[3])) if number is not None]
    if max(numbers) > _GREATEST:
        raise UnreadableText(CODE_EXPECTED, hint=f"numbers from 0 to {_GREATEST}")
    if numbers != sorted(numbers, reverse=True):
        raise UnreadableText(CODE_EXPECTED, hint="there are never more large particles than small ones")
    return Code(first, int(match[2]), int(match[3]))


def oil_settings() -> tuple[tuple[int, int, str], ...]:
    """Return the settings of ISO 281 for a bath, or circulating oil filtered off-line: over 6, over 14, the setting."""
    found = []
    for setting in SETTINGS:
        if setting.startswith(_SUPPLY):
            over_6, over_14 = setting.removeprefix(_SUPPLY).split("/")
            found.append((int(over_6), int(over_14), setting))
    return tuple(sorted(found))


def setting_of(code: Code) -> str | None:
    """Return the cleanest setting of ISO 281 that is no cleaner than a code; None where the code is beyond them all.

    The settings of a bath are those of circulating oil that is filtered off-line as well. Oil filtered in line before
    the bearing has settings of its own, more favourable; that filter has to be stated, so they are not chosen here.

    >>> setting_of(read_code("19/17/14")), setting_of(read_code("18/16/11")), setting_of(read_code("26/24/20"))
    ('bath -/17/14', 'bath -/17/14', None)
    """
    fitting = (word for over_6, over_14, word in oil_settings() if code.over_6 <= over_6 and code.over_14 <= over_14)
    return next(fitting, None)
