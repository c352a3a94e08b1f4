"""From the figures that somebody states to a lubricant: the two viscosities, what was assumed, and what cannot be.

Figures are in the units of `lubricant.FIELDS`; a text with units is read by `lubricant_files`. Every fault is found
before any is raised.
"""

from __future__ import annotations

import dataclasses
import math
from collections.abc import Mapping
from typing import Any

from lubecheck.data import designations, grades
from lubecheck.data.lubricant import FIELDS, WAYS, Lubricant
from lubecheck.data.lubricant_viscosity import SAYBOLT, Figures, as_array, find_viscosities
from lubecheck.errors import Fault, InputError, nearest, shown
from lubecheck.physics import churning, viscosity
from lubecheck.sources import SOURCES

# Usual density at 15 degC (kg/m^3) and thermal expansion (1/K) of a kind of oil, as in the tables.
USUAL_DENSITY: Mapping[str, tuple[float, float]] = {
    "mineral": (885.0, 7.0e-4),
    "hydrotreated": (870.0, 7.0e-4),
    "PAO": (842.0, 7.6e-4),
    "ester": (955.0, 7.5e-4),
    "PAG": (1040.0, 7.8e-4),
    "silicone": (975.0, 9.5e-4),
    "PFPE": (1900.0, 1.0e-3),
    "linear PFPE": (1850.0, 1.0e-3),
}
YIELD_STRESS: Mapping[str, float] = churning.NLGI_YIELD  # Pa, an estimate good to a factor of 2
# Cautious temperature up to which a grease keeps its full interval, by thickener: the low end of the tables' ranges for
# mineral oil; for lithium the 70 degC that the classical interval is printed for.
LIFE_REFERENCE: Mapping[str, float] = {
    "lithium": 70.0,
    "lithium-calcium": 60.0,
    "lithium complex": 70.0,
    "calcium": 40.0,
    "calcium anhydrous": 55.0,
    "calcium complex": 60.0,
    "calcium sulphonate complex": 70.0,
    "aluminium complex": 65.0,
    "barium complex": 65.0,
    "sodium": 55.0,
    "polyurea": 75.0,
    "clay": 60.0,
    "PTFE": 100.0,
}
GREASE_ONLY = ("thickener", "nlgi", "yield_stress", "life_reference")
CHANGED = ", figures changed by the user"
OIL_ONLY = ("pour_point", "flash_point", "iso_vg")


def from_figures(
    *, ranges: Mapping[str, tuple[float, float]] | None = None, is_complete: bool = False, **stated: Any
) -> Lubricant:
    """Return the lubricant that the stated figures make.

    stated: figures by the names of `FIELDS`, in their units; None counts as not stated
    ranges: for a figure, how far lubricants of the kind spread
    is_complete: nothing may be assumed (a row of the tables)

    Raises InputError with every fault: a key that is unknown, a figure that cannot be, a need that is missing.
    """
    figures: Figures = {name: value for name, value in stated.items() if value is not None}
    faults = [
        Fault(name, name, "one of " + ", ".join(FIELDS), nearest=nearest(name, FIELDS))
        for name in figures
        if name not in FIELDS
    ]
    faults += [fault for name, value in figures.items() if name in FIELDS for fault in _out_of_bounds(name, value)]
    if faults:
        raise InputError(faults)
    assumed: list[str] = []
    spread = dict(ranges or {})
    if "designation" in figures:
        _expand(figures, spread, assumed, faults)
    if "kind" not in figures:
        found = "grease" if any(name in figures for name in GREASE_ONLY) else None
        if found is None:
            faults.append(Fault("kind", "nothing", "grease or oil"))
        else:
            figures["kind"] = found
    if not faults:
        find_viscosities(figures, spread, assumed, faults)
    if not faults and not is_complete:
        _fill_in(figures, assumed)
    if not faults:
        figures.setdefault("key", "given")
        figures.setdefault("name", _words(figures))
        missing = [name for name in ("density_15", "expansion") if name not in figures]
        faults += [Fault(name, "nothing", f"a value: {FIELDS[name].meaning}") for name in missing]
    if faults:
        raise InputError(faults)
    fields = {name: value for name, value in figures.items() if name not in WAYS}
    made = Lubricant(**fields, ranges=spread, assumed=tuple(assumed))
    faults = contradictions(made)
    if faults:
        raise InputError(faults)
    return made


def with_given(lubricant: Lubricant, **given: Any) -> Lubricant:
    """Return a lubricant with figures of the user's own in place of the table's.

    One viscosity given alone, in mm^2/s or in Saybolt seconds, keeps the viscosity index of the table and moves the
    other, and says so.

    Raises InputError as `from_figures` does.
    """
    stated = {name: value for name, value in given.items() if value is not None}
    if not stated:
        return lubricant
    figures = {
        entry.name: getattr(lubricant, entry.name)
        for entry in dataclasses.fields(Lubricant)
        if entry.name not in ("ranges", "assumed")
    }
    assumed = list(lubricant.assumed)
    measured = [name for name in ("nu_40", "nu_100", *SAYBOLT) if name in stated]
    if measured:
        figures["nu_40"] = figures["nu_100"] = figures["iso_vg"] = None  # the grade was the table's
    if len(measured) == 1 and "index" not in stated:
        alone = measured[0]
        index = float(
            viscosity.viscosity_index.plain(nu_40=as_array(lubricant.nu_40), nu_100=as_array(lubricant.nu_100))
        )
        stated["index"] = index
        unit = FIELDS[alone].unit if alone in SAYBOLT else "mm^2/s"
        assumed.append(f"viscosity index {index:.0f} of {lubricant.key} kept for {alone} = {stated[alone]:g} {unit}")
    ranges = {name: span for name, span in lubricant.ranges.items() if name not in stated and figures[name] is not None}
    made = from_figures(ranges=ranges, **{**figures, **stated})
    is_changed = any(
        _differs(getattr(made, name), getattr(lubricant, name)) for name in stated.keys() | {"nu_40", "nu_100"}
        if name not in (*WAYS, "name")
    )  # fmt: skip
    name = made.name + (CHANGED if is_changed and not made.name.endswith(CHANGED) else "")
    return dataclasses.replace(made, name=name, assumed=(*assumed, *made.assumed))


def _differs(one: Any, other: Any) -> bool:
    """Tell whether two figures differ by more than rounding."""
    if isinstance(one, float) and isinstance(other, float):
        return not math.isclose(one, other, rel_tol=1e-6)
    return bool(one != other)


def contradictions(lubricant: Lubricant) -> list[Fault]:
    """Return what cannot be true together in a lubricant."""
    faults = []

    def demand(is_met: bool, key: str, given: object, expected: str) -> None:
        if not is_met:
            faults.append(Fault(key, str(given), expected))

    one = lubricant
    demand(one.nu_100 < one.nu_40, "nu_100", f"{one.nu_100:g} mm^2/s", f"less than nu_40, {one.nu_40:g} mm^2/s")
    if one.lowest is not None and one.highest is not None:
        demand(one.lowest < one.highest, "highest", f"{one.highest:g} degC", f"above lowest, {one.lowest:g} degC")
    if one.life_reference is not None and one.highest is not None:
        demand(
            one.life_reference <= one.highest, "life_reference", f"{one.life_reference:g} degC",
            f"at most highest, {one.highest:g} degC",
        )  # fmt: skip
    if one.pour_point is not None and one.lowest is not None:
        demand(
            one.pour_point <= one.lowest, "pour_point", f"{one.pour_point:g} degC",
            f"at most lowest, {one.lowest:g} degC",
        )  # fmt: skip
    if one.flash_point is not None and one.highest is not None:
        demand(
            one.highest < one.flash_point, "flash_point", f"{one.flash_point:g} degC",
            f"above highest, {one.highest:g} degC",
        )  # fmt: skip
    for name in GREASE_ONLY if one.kind == "oil" else OIL_ONLY:
        demand(getattr(one, name) is None, name, getattr(one, name), f"nothing: no fact of {one.kind}")
    if one.iso_vg is not None:
        limits = grades.iso_vg_limits(one.iso_vg)
        known = one.iso_vg in grades.ISO_VG
        near = ", ".join(f"{grade:g}" for grade in grades.nearest_iso_vg(one.iso_vg))
        demand(known, "iso_vg", f"{one.iso_vg:g}", f"a grade of ISO 3448 (nearest: {near})")
        demand(
            not known or limits.low <= one.nu_40 <= limits.high, "nu_40", f"{one.nu_40:g} mm^2/s",
            f"{limits.low:g} to {limits.high:g} mm^2/s, the limits of ISO VG {one.iso_vg:g}",
        )  # fmt: skip
    demand(one.source.partition(":")[0] in SOURCES, "source", one.source, "a key of the bibliography")
    for name, (low, high) in one.ranges.items():
        value = getattr(one, name)
        demand(
            value is not None and low <= value <= high, f"{name}_range", f"{low:g}..{high:g}",
            f"a range that holds {name}, {value if value is None else format(value, 'g')}",
        )  # fmt: skip
    return faults


def _out_of_bounds(name: str, value: Any) -> list[Fault]:
    """Refuse a figure that is not finite or no lubricant's, and a word that is not of the field's."""
    entry = FIELDS[name]
    if entry.kind == "word" and value not in entry.words:
        return [Fault(name, f'"{value}"', "one of " + ", ".join(entry.words), nearest=nearest(str(value), entry.words))]
    if entry.is_number and (isinstance(value, bool) or not isinstance(value, int | float)):
        return [Fault(name, shown(value), f"a number in {entry.unit}")]
    if entry.is_number and not (math.isfinite(value) and entry.least <= value <= entry.most):
        unit = "" if entry.unit == "1" else f" {entry.unit}"
        return [Fault(name, f"{value:g}{unit}", f"{entry.least:g} to {entry.most:g}{unit}: {entry.meaning}")]
    return []


def _expand(figures: Figures, spread: dict[str, tuple[float, float]], assumed: list[str], faults: list[Fault]) -> None:
    """Put what a designation states among the figures; a figure stated beside it must not contradict it."""
    try:
        read = designations.read(figures["designation"])
    except InputError as refused:
        faults.extend(refused.faults)
        return
    figures.setdefault("name", read.text)
    figures.setdefault("source", read.source)
    for name, value in read.facts.items():
        if name in figures and figures[name] != value and name in ("kind", "nlgi", "base_oil", "iso_vg"):
            faults.append(Fault(name, f"{figures[name]}", f"{value}, as {read.text} states"))
        figures.setdefault(name, value)
    for name, limits in read.ranges.items():
        if "iso_vg" in read.facts:
            continue  # the grade says its own middle and limits
        if name in figures:
            if not limits.low * 0.999 <= figures[name] <= limits.high * 1.001:
                faults.append(
                    Fault(name, f"{figures[name]:g} mm^2/s", f"{limits.low:g} to {limits.high:g} mm^2/s: {read.text}")
                )
            continue
        figures[name] = limits.middle
        high = limits.high if math.isfinite(limits.high) else limits.middle
        spread[name] = (limits.low, high)
        assumed.append(f"{name} = {limits.middle:.4g} mm^2/s, the middle of {read.text} ({limits.low:g} to {high:g})")


def _fill_in(figures: Figures, assumed: list[str]) -> None:
    """Fill in what has a usual value, and say so; limits of temperature are never filled in."""
    base_oil = figures.get("base_oil", "mineral")
    density, expansion = USUAL_DENSITY[base_oil]
    unsaid = "" if "base_oil" in figures else ", as mineral: base_oil was not stated"
    if "density_15" not in figures:
        figures["density_15"] = density + (15.0 if figures["kind"] == "grease" else 0.0)  # the thickener is denser
        assumed.append(f"density_15 = {figures['density_15']:g} kg/m^3, usual of {base_oil} {figures['kind']}{unsaid}")
    if "expansion" not in figures:
        figures["expansion"] = expansion
    thickener = figures.get("thickener")
    if figures["kind"] == "grease" and thickener is not None and "life_reference" not in figures:
        figures["life_reference"] = min(LIFE_REFERENCE[thickener], figures.get("highest", math.inf))
        assumed.append(f"life_reference = {figures['life_reference']:g} degC, cautious for {thickener} grease")
    if figures["kind"] == "grease" and "yield_stress" not in figures:
        grade = figures.get("nlgi", "2")
        figures["yield_stress"] = YIELD_STRESS[grade]
        words = f"usual of NLGI {grade}" + ("" if "nlgi" in figures else ", the usual grade: nlgi was not stated")
        assumed.append(f"yield_stress = {figures['yield_stress']:g} Pa, {words} (factor of 2 either way)")


def _words(figures: Figures) -> str:
    """Name a lubricant by what is known of it."""
    grade = f"NLGI {figures['nlgi']}" if "nlgi" in figures else None
    parts = [figures.get("thickener"), figures.get("base_oil"), f"{figures['nu_40']:g} mm²/s at 40 degC", grade]
    return f"{figures['kind']}: " + ", ".join(part for part in parts if part)
