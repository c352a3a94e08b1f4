"""The two viscosities of a lubricant from whatever was stated of them: mm^2/s, an index, an ISO grade, Saybolt seconds.

Figures are in the units of `lubricant.FIELDS`, and are filled in where they stand; every fault found is noted.
"""

from __future__ import annotations

import math
from collections.abc import Mapping
from typing import Any

import numpy as np

from lubecheck.data import grades
from lubecheck.errors import Fault
from lubecheck.physics import viscosity

Figures = dict[str, Any]

# Usual viscosity index of a kind of (base) oil, as in the tables: base-oil-handbooks, from memory.
USUAL_INDEX: Mapping[str, float] = {
    "mineral": 95.0,
    "hydrotreated": 110.0,
    "PAO": 140.0,
    "ester": 140.0,
    "PAG": 205.0,
    "PFPE": 120.0,
    "linear PFPE": 330.0,
}
SECONDS_AGREE = 0.06  # Saybolt seconds beside mm^2/s of the same end: rounding of both, and twice the precision
GRADE_SECONDS_AGREE = 0.05  # the same beside an ISO grade
INDEX_AGREES = 6.0  # a stated index may differ from that of the stated viscosities: rounding, and twice its precision
SAYBOLT: Mapping[str, float] = {"saybolt_100": 340 / 9, "saybolt_210": 890 / 9}  # degC of 100 and 210 degF


def find_viscosities(
    figures: Figures, spread: dict[str, tuple[float, float]], assumed: list[str], faults: list[Fault]
) -> None:
    """Find nu_40 and nu_100 from whatever was stated of them."""
    if "iso_vg" in figures and "nu_40" not in figures and "saybolt_100" not in figures:
        limits = grades.iso_vg_limits(figures["iso_vg"])
        figures["nu_40"] = figures["iso_vg"]
        spread["nu_40"] = (limits.low, limits.high)
        assumed.append(
            f"nu_40 = {figures['nu_40']:g} mm^2/s, the middle of ISO VG {figures['iso_vg']:g} "
            f"({limits.low:g} to {limits.high:g})"
        )
    base_oil = figures.get("base_oil", "")
    measured = [name for name in ("nu_40", "nu_100", *SAYBOLT) if name in figures]
    if "index" not in figures and len(measured) == 1 and base_oil in USUAL_INDEX:
        figures["index"] = USUAL_INDEX[base_oil]
        assumed.append(f"viscosity index {figures['index']:g}, usual of {base_oil} oil")
    if any(name in figures for name in SAYBOLT):
        _from_saybolt(figures, assumed, faults)
        if faults:
            return
    index = figures.get("index")
    if "nu_40" in figures and "nu_100" in figures:
        if index is not None and figures["nu_100"] < figures["nu_40"] and figures["nu_100"] >= 2:
            found = float(
                viscosity.viscosity_index.plain(nu_40=as_array(figures["nu_40"]), nu_100=as_array(figures["nu_100"]))
            )
            if abs(found - index) > INDEX_AGREES:
                faults.append(Fault("index", f"{index:g}", f"{found:.0f}, which nu_40 and nu_100 give"))
    elif index is not None and "nu_40" in figures:
        figures["nu_100"] = float(viscosity.nu_100_from_index.plain(as_array(figures["nu_40"]), as_array(index)))
        if math.isnan(figures["nu_100"]):
            faults.append(Fault("index", f"{index:g}", "nu_100 instead: the index is not defined for so thin an oil"))
    elif index is not None and figures.get("nu_100", 0.0) >= 2:
        figures["nu_40"] = float(viscosity.nu_40_from_index.plain(as_array(figures["nu_100"]), as_array(index)))
    else:
        given = [name for name in ("nu_40", "nu_100", "index") if name in figures]
        wanted = "nu_40 and nu_100" if not given else "nu_40 or index" if "nu_100" in given else "nu_100 or index"
        key = "nu_40" if "nu_40" not in figures else "nu_100"
        oil = "base-oil viscosity, " if figures["kind"] == "grease" else "viscosity, "
        hint = "" if base_oil or not given else " (or base_oil, whose usual index is then taken)"
        faults.append(Fault(key, "nothing", f"{oil}{wanted}{hint}"))


def _from_saybolt(figures: Figures, assumed: list[str], faults: list[Fault]) -> None:
    """Turn Saybolt seconds at 100 and 210 degF, or one of them with an index or the other viscosity, into figures.

    Seconds at 100 degF stand for the cold end and those at 210 degF for the hot end, where mm^2/s do not; beside mm^2/s
    of the same end they must agree with the line.
    """
    seconds = {
        name: float(viscosity.kinematic_from_saybolt.plain(as_array(figures[name]), as_array(degc)))
        for name, degc in SAYBOLT.items()
        if name in figures
    }
    ends = []
    for name, in_seconds, degc in (("nu_40", "saybolt_100", 40.0), ("nu_100", "saybolt_210", 100.0)):
        if name in figures:
            ends.append((degc, figures[name]))
        elif in_seconds in seconds:
            ends.append((SAYBOLT[in_seconds], seconds[in_seconds]))
    given = next(iter(seconds))
    if len(ends) == 1 and "index" not in figures:
        other = "saybolt_210" if ends[0][0] < SAYBOLT["saybolt_210"] else "saybolt_100"
        faults.append(Fault(other, "nothing", "seconds at the second temperature too, or index, nu_40 or nu_100"))
        return
    if len(ends) == 1:
        figures["nu_40"] = nu_40_through(ends[0][1], degc=ends[0][0], index=figures["index"])
        figures["nu_100"] = float(
            viscosity.nu_100_from_index.plain(as_array(figures["nu_40"]), as_array(figures["index"]))
        )
        if math.isnan(figures["nu_100"]):
            faults.append(
                Fault(given, f"{figures[given]:g} s", "more seconds: the index is not defined for so thin an oil")
            )
            return
    else:
        a, b, _ = viscosity.fit.plain(*(np.array(column) for column in zip(*ends, strict=True)))
        if math.isnan(b):
            faults.append(Fault(given, f"{figures[given]:g} s", "more seconds cold than hot"))
            return
        for name, at in (("nu_40", 40.0), ("nu_100", 100.0)):
            figures.setdefault(name, float(viscosity.viscosity_from_constants.plain(as_array(at), a=a, b=b)))
    if "iso_vg" in figures:
        # Labels give seconds by a grade table (ASTM D2422) that passes over the 2.2 K from 100 degF to 40 degC.
        limits = grades.iso_vg_limits(figures["iso_vg"])
        held = min(max(figures["nu_40"], limits.low), limits.high)
        if 0 < abs(figures["nu_40"] / held - 1) < GRADE_SECONDS_AGREE:
            assumed.append(
                f"nu_40 = {held:g} mm^2/s, the limit of ISO VG {figures['iso_vg']:g} next to the stated seconds"
            )
            figures["nu_40"] = held
    for name, nu in seconds.items():
        line = viscosity.kinematic_viscosity.plain(
            as_array(SAYBOLT[name]), nu_40=as_array(figures["nu_40"]), nu_100=as_array(figures["nu_100"])
        )
        if abs(nu / line - 1) > SECONDS_AGREE:
            wanted = float(viscosity.saybolt_from_kinematic.plain(line, as_array(SAYBOLT[name])))
            faults.append(Fault(name, f"{figures[name]:g} s", f"{wanted:.0f} s, which the other viscosities give"))


def nu_40_through(nu: float, *, degc: float, index: float) -> float:
    """Return the viscosity at 40 degC of the oil of an index that has a viscosity near 40 or near 100 degC.

    Found by repeating nu_40 x (wanted/found): each round takes away at least a third of what is left of the error, as
    the viscosity at 40 degC moves that at 100 degC by its 0.5th to 0.7th power. Not a number where there is none.
    """
    is_hot = degc > 70
    nu_40 = float(viscosity.nu_40_from_index.plain(as_array(nu), as_array(index))) if is_hot else nu
    for _ in range(60):
        nu_100 = float(viscosity.nu_100_from_index.plain(as_array(nu_40), as_array(index)))
        found = float(
            viscosity.kinematic_viscosity.plain(as_array(degc), nu_40=as_array(nu_40), nu_100=as_array(nu_100))
        )
        if not abs(found / nu - 1) > 1e-12:  # NaN ends it as well
            return nu_40 if found == found else math.nan
        nu_40 *= nu / found
    return nu_40


def as_array(value: float) -> Any:
    """Return a number as the plain physics functions take it."""
    return np.asarray(value, dtype=np.float64)
