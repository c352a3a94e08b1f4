"""Cleanliness: from a particle count, an ISO 4406 code, a filter or plain words to a setting of ISO 281, and water.

ISO 281, Annex A, draws its figures for a few classes. A code between two of them takes the dirtier, a code dirtier than
the last takes `OFF_SCALE` (e_C = 0, as the guide table of the standard has it for very severe contamination).
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Annotated

import numpy as np
from numpy.typing import NDArray

from lubecheck.method import method
from lubecheck.physics.fatigue import OFF_SCALE, SETTINGS
from lubecheck.units import Array, Choice, Number, Share

# ISO 4406: the greatest count per ml of scale numbers 0, 1, 2 ...; each step doubles, rounded as it is printed.
# Seen at 14 (160), 17 (1300) and 20 (10 000), the others from memory.
ISO_4406_UPPER = (
    0.01, 0.02, 0.04, 0.08, 0.16, 0.32, 0.64, 1.3, 2.5, 5, 10, 20, 40, 80, 160, 320, 640, 1300, 2500, 5000, 10_000,
    20_000, 40_000, 80_000, 160_000, 320_000, 640_000, 1_300_000, 2_500_000,
)  # fmt: skip
_UPPER = np.array(ISO_4406_UPPER)
GREATEST_NUMBER = len(ISO_4406_UPPER) - 1

SUPPLIES = ("circulating", "bath")  # filtered in line before the bearing; bath, or filtered off line
# Scale numbers at 6 and 14 um of the classes that Annex A has figures for, from clean to dirty
_CLASSES = {
    supply: tuple(
        (int(six), int(fourteen), SETTINGS.index(name))
        for name in SETTINGS
        if name.startswith(f"{supply} ")
        for six, fourteen in (name.split("/")[1:],)
    )
    for supply in SUPPLIES
}
_COLUMNS = max(len(classes) for classes in _CLASSES.values())
_PADDED = np.array(
    [(*_CLASSES[supply], *[(99, 99, SETTINGS.index(OFF_SCALE))] * (_COLUMNS + 1 - len(_CLASSES[supply])))
     for supply in SUPPLIES]
)  # fmt: skip

Supply = Annotated[NDArray[np.intp], Choice(SUPPLIES)]


@method(source="iso-4406", valid={"count": (0.0, ISO_4406_UPPER[-1])})
def scale_number(count: Number) -> Number:
    """Scale number of ISO 4406 for a count of particles per ml.

    The least number whose class reaches the count. Counts in older reports are per 100 ml: divide them by 100.

    count [1]: particles per ml larger than the size that the number is for (4, 6 or 14 um), any shape
    returns [1]

    >>> scale_number([100, 1000, 7000]).magnitude.tolist()
    [14.0, 17.0, 20.0]
    """
    number: Array = np.minimum(np.searchsorted(_UPPER, np.asarray(count)), GREATEST_NUMBER).astype(np.float64)
    return number


@method(source="iso-281:Annex A", valid={"at_6": (0.0, 28.0), "at_14": (0.0, 28.0)})
def setting_of_code(*, at_6: Number, at_14: Number, supply: Supply) -> Number:
    """Position in `fatigue.SETTINGS` of the class of Annex A that an ISO 4406 code falls in.

    The cleanest class that is as dirty as the code at both sizes; a code dirtier than the last is `OFF_SCALE`.

    at_6 [1]: scale number at 6 um, any shape
    at_14 [1]: scale number at 14 um, broadcasts
    supply: one of `SUPPLIES`, broadcasts
    returns [1]

    >>> SETTINGS[int(setting_of_code(at_6=16, at_14=12, supply="bath"))]
    'bath -/17/14'
    """
    classes = _PADDED[supply]
    fits = (np.asarray(at_6)[..., None] <= classes[..., 0]) & (np.asarray(at_14)[..., None] <= classes[..., 1])
    first = np.argmax(fits, axis=-1)
    setting: Array = np.take_along_axis(np.broadcast_to(classes[..., 2], fits.shape), first[..., None], axis=-1)[
        ..., 0
    ].astype(np.float64)
    return setting


# ISO 281:2007, Annex A: the filter that each class of circulating oil goes with, size in um(c) and least beta (memory)
FILTER_CLASSES = (
    (6.0, 200.0, "circulating -/13/10"),
    (12.0, 200.0, "circulating -/15/12"),
    (25.0, 75.0, "circulating -/17/14"),
    (40.0, 75.0, "circulating -/19/16"),
)


def setting_of_filter(size: float, beta: float) -> str:
    """Return the class of Annex A that an in-line filter keeps: of the size in um(c) at which it has that beta.

    A filter finer than a class and at least as sharp keeps it; one coarser or duller than the last keeps none.

    >>> setting_of_filter(10, 200), setting_of_filter(6, 75), setting_of_filter(60, 75)
    ('circulating -/15/12', 'circulating -/17/14', 'off scale')
    """
    return next((name for finest, least, name in FILTER_CLASSES if size <= finest and beta >= least), OFF_SCALE)


def worse(first: str, second: str) -> str:
    """Return the dirtier of two settings of one kind of supply."""
    return max(first, second, key=SETTINGS.index)


@dataclass(frozen=True, slots=True)
class Description:
    """A plain word for how clean a position is, and the classes it stands for."""

    word: str
    grease: str  # setting of Annex A, by the words of its table
    code: tuple[int, int]  # for oil, at 6 and 14 um: estimate of this program, one class either way
    meaning: str


# Grease by the examples that ISO 281, Annex A, gives for each class (memory); oil: estimates.
DESCRIPTIONS = (
    Description("sealed", "high", (15, 12), "greased for life behind good seals; a closed, flushed gearbox"),
    Description("shielded", "normal", (15, 12), "greased for life behind shields"),
    Description("clean hall", "normal", (15, 12), "clean assembly, good seals, clean air"),
    Description("workshop", "slight", (17, 14), "clean assembly, ordinary seals, some dust"),
    Description("dusty hall", "severe", (19, 16), "worn seals, or dust such as flour, fibre or scale about"),
    Description("dusty quarry", "very severe", (21, 18), "sand, stone or ore dust and poor seals"),
)  # fmt: skip
WORDS = tuple(one.word for one in DESCRIPTIONS)

WATER_REFERENCE = 100e-6  # Cantley 1977: the life at 100 ppm counts as 1
WATER_RANGE = (25e-6, 400e-6)  # Cantley 1977: the contents that were tested (from memory)
WATER_EXPONENT = 0.6


@method(source="cantley", valid={"content": (0.0, WATER_RANGE[1])})
def water_factor(content: Share) -> Number:
    """Factor on fatigue life for water in the oil: (100 ppm / content)^0.6, at most 1.

    From tests of tapered roller bearings in one mineral oil at 25 to 400 ppm (from memory); other steels, oils and
    additives scatter about it by a factor of 2. No credit is taken for oil drier than 100 ppm; above 400 ppm the
    effect is not known well enough to be reckoned with.

    content [1]: water in the oil, by mass, any shape
    returns [1]

    >>> water_factor("400 ppm").round(3)
    <Quantity(0.435, 'dimensionless')>
    """
    factor: Array = np.exp(-WATER_EXPONENT * np.log(np.maximum(content, WATER_REFERENCE) / WATER_REFERENCE))
    return factor


def class_of(word: str, *, is_grease: bool, is_in_line: bool) -> str:
    """Return the setting that a plain word stands for.

    >>> class_of("workshop", is_grease=True, is_in_line=False), class_of("workshop", is_grease=False, is_in_line=True)
    ('slight', 'circulating -/17/14')
    """
    one = DESCRIPTIONS[WORDS.index(word)]
    return one.grease if is_grease else setting_named(one.code, is_in_line=is_in_line)


def setting_named(code: tuple[int, int], *, is_in_line: bool) -> str:
    """Return the name of the setting of a code."""
    supply = SUPPLIES.index("circulating" if is_in_line else "bath")
    return SETTINGS[int(setting_of_code.plain(at_6=float(code[0]), at_14=float(code[1]), supply=np.intp(supply)))]


def code_of_counts(*, at_6: float, at_14: float) -> tuple[int, int]:
    """Return the scale numbers of two counts per ml.

    >>> code_of_counts(at_6=210, at_14=38)
    (15, 12)
    """
    numbers = [float(scale_number.plain(count)) for count in (at_6, at_14)]
    return (math.floor(numbers[0]), math.floor(numbers[1]))
