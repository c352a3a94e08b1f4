"""What a lubricant is: its fields, their units and meanings, and the words they take.

One catalogue serves tables, the user's own files, messages and help alike.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Literal

LUBRICANT_KINDS = ("grease", "oil")
THICKENERS = (
    "lithium",
    "lithium-calcium",
    "lithium complex",
    "calcium",
    "calcium anhydrous",
    "calcium complex",
    "calcium sulphonate complex",
    "aluminium complex",
    "barium complex",
    "sodium",
    "polyurea",
    "clay",
    "PTFE",
)
BASE_OILS = ("mineral", "hydrotreated", "PAO", "ester", "PAG", "silicone", "PFPE", "linear PFPE")
NLGI_GRADES = ("000", "00", "0", "1", "2", "3", "4", "5", "6")
CERTAINTIES = ("checked", "seen", "memory", "estimate")


@dataclass(frozen=True, slots=True, kw_only=True)
class Lubricant:
    """A grease or an oil. Values are in house units; `ranges` holds how far lubricants of the kind spread.

    `nu_40`, `nu_100` and `expansion` of a grease are its base oil's; `density_15` is the grease's own. A limit that
    is not known is None. `assumed` lists what nobody stated and was filled in, in words.
    """

    key: str
    name: str
    kind: Literal["grease", "oil"]
    nu_40: float  # mm^2/s
    nu_100: float  # mm^2/s
    density_15: float  # kg/m^3
    expansion: float  # 1/K
    lowest: float | None = None  # degC
    highest: float | None = None  # degC
    life_reference: float | None = None  # degC; greases: up to here the full regreasing interval holds
    thickener: str | None = None
    base_oil: str | None = None
    nlgi: str | None = None
    ep: bool = False
    yield_stress: float | None = None  # Pa
    pour_point: float | None = None  # degC
    flash_point: float | None = None  # degC
    iso_vg: float | None = None
    source: str = "user"
    certainty: str = "seen"
    note: str = ""
    ranges: Mapping[str, tuple[float, float]] = field(default_factory=dict, hash=False)
    assumed: tuple[str, ...] = ()


@dataclass(frozen=True, slots=True)
class Field:
    """A field of an entry: how it is read, the unit that `Lubricant` holds it in, and what values are sane."""

    name: str
    meaning: str
    kind: str = "text"  # a kind of units.KINDS, or "text", "flag" or "word"
    unit: str = "1"
    words: tuple[str, ...] = ()
    least: float = float("-inf")
    most: float = float("inf")

    @property
    def is_number(self) -> bool:
        """The field holds a number, and so may have a range."""
        return self.kind not in ("text", "flag", "word")


def _temperature(name: str, meaning: str, least: float, most: float) -> Field:
    return Field(name, meaning, "temperature", "degC", least=least, most=most)


# Bounds refuse what is no lubricant of a bearing, or a slip of unit; they are no advice.
FIELDS: Mapping[str, Field] = {
    entry.name: entry
    for entry in (
        Field("key", "short name to call it by"),
        Field("name", "name in trade words"),
        Field("designation", "standard designation such as KP2K-30, ISO VG 68, SAE 40"),
        Field("kind", "grease or oil", "word", words=LUBRICANT_KINDS),
        Field("thickener", "what thickens a grease", "word", words=THICKENERS),
        Field("base_oil", "kind of oil, or of base oil", "word", words=BASE_OILS),
        Field("nlgi", "consistency grade of a grease", "word", words=NLGI_GRADES),
        Field("ep", "has extreme-pressure additives", "flag"),
        Field("iso_vg", "ISO 3448 viscosity grade", "number", least=2.2, most=3200),
        Field("nu_40", "kinematic viscosity at 40 degC", "kinematic viscosity", "mm^2/s", least=0.5, most=1e5),
        Field("nu_100", "kinematic viscosity at 100 degC", "kinematic viscosity", "mm^2/s", least=0.21, most=1e4),
        Field("index", "viscosity index", "number", least=-200, most=1000),
        Field("saybolt_100", "Saybolt Universal seconds at 100 degF", "Saybolt viscosity", "s", least=32, most=5e5),
        Field("saybolt_210", "Saybolt Universal seconds at 210 degF", "Saybolt viscosity", "s", least=32, most=5e4),
        Field("density_15", "density at 15 degC", "density", "kg/m^3", least=750, most=2100),
        Field("expansion", "thermal expansion", "thermal expansion", "1/K", least=2e-4, most=2e-3),
        Field("yield_stress", "yield stress of a grease at rest", "pressure", "Pa", least=1, most=1e4),
        _temperature("pour_point", "pour point", -100, 60),
        _temperature("flash_point", "flash point", 60, 400),
        _temperature("lowest", "lowest temperature of use", -100, 60),
        _temperature("highest", "highest temperature of use", 20, 350),
        _temperature("life_reference", "temperature up to which a grease keeps its full interval", 20, 250),
        Field("source", "source key of the bibliography"),
        Field("certainty", "how the figures came here", "word", words=CERTAINTIES),
        Field("note", "a remark"),
    )
}
# Fields that are ways to say the two viscosities, and no fields of `Lubricant`.
WAYS = ("designation", "index", "saybolt_100", "saybolt_210")
RANGED = tuple(name for name, entry in FIELDS.items() if entry.is_number and name not in ("iso_vg", *WAYS))
