"""The words of an oil analysis: what moved by how much, what common practice does about it, what was read from it."""

from __future__ import annotations

from collections.abc import Iterator

from lubecheck.data.cleanliness import oil_settings, setting_of
from lubecheck.data.oil_analysis import ACT_WATER, CHANGE_CHANGE, THIRSTY_OILS, WATCH_CHANGE, WATCH_WATER, OilAnalysis
from lubecheck.model.entries import Case
from lubecheck.model.result import Assumed

_CAUSES = {
    True: "Oil thickens by oxidation, a thicker oil topped up, water in emulsion",
    False: "Oil thins by dilution, a thinner oil topped up, a viscosity improver sheared",
}


def notes(case: Case) -> Iterator[str]:
    """Yield what an analysis of the oil in use says beside the limits."""
    found = case.analysis
    if found is None:
        return
    if found.change is not None:
        yield _viscosity(found)
    if found.water is not None:
        yield _water(found)
    if found.code is not None and case.stated_setting is not None:
        read = setting_of(found.code) or "dirtier than ISO 281 has a setting for"
        yield f"cleanliness {found.code} by analysis ({read}): the stated setting {case.stated_setting} stands"
    if case.is_beyond_settings and found.code is not None:
        over_6, over_14, _ = oil_settings()[-1]
        yield (
            f"cleanliness {found.code} by analysis is dirtier than ISO 281 has a setting for (up to "
            f"-/{over_6}/{over_14}): clean or change the oil; fatigue life is not judged"
        )


def _viscosity(found: OilAnalysis) -> str:
    change = found.change or 0.0
    said = (
        f"oil in use: {found.nu:.4g} mm^2/s at {found.temperature:g} degC by analysis, {change * 100:+.0f} % against "
        f"{found.fresh_nu:.4g} fresh"
    )
    watch, act = f"+-{WATCH_CHANGE * 100:.0f} %", f"+-{CHANGE_CHANGE * 100:.0f} %"
    causes = _CAUSES[change > 0]
    return {
        "usual": f"{said}: usual, within {watch} (common practice)",
        "watch": f"{said}: watch it, beyond {watch} (common practice): sample again soon. {causes}",
        "act": f"{said}: change the oil and find the cause, beyond {act} (common practice). {causes}",
    }[found.viscosity_grade]


def _water(found: OilAnalysis) -> str:
    said = f"{(found.water or 0.0) * 1e6:.0f} ppm water by analysis"
    watch, act = f"{WATCH_WATER * 1e6:.0f} ppm", f"{ACT_WATER * 1e6:.0f} ppm"
    if found.fresh.base_oil in THIRSTY_OILS:
        judged = f"{found.fresh.base_oil} dissolves several times as much as mineral oil: hold it to its maker's figure"
    else:
        judged = {
            "usual": f"up to the {watch} that common practice allows a rolling bearing",
            "watch": f"over {watch}, which common practice watches: find where it comes in",
            "act": f"over {act}, at which common practice acts: dry or change the oil, find where it comes in",
        }[found.water_grade]
    return f"{said}: {judged}. Water shortens fatigue life: counted from 100 to 400 ppm, above that the life is unknown"


def assumed(case: Case) -> Iterator[Assumed]:
    """Yield what was read from an analysis that it does not say by itself."""
    found = case.analysis
    if found is None:
        return
    if found.change is not None:
        text = (
            f"{found.used.nu_40:.4g} mm^2/s at 40 and {found.used.nu_100:.4g} at 100 degC: the fresh oil's line "
            f"({found.fresh.nu_40:.4g} and {found.fresh.nu_100:.4g}) shifted on the D341 scale to the measured "
            "point, its slope kept"
        )
        yield Assumed("[lubricant] nu_40, nu_100", text, "astm-d341")
    if found.code is not None and case.stated_setting is None and case.setting is not None:
        text = f"{case.setting}, the cleanest that is no cleaner than {found.code} by analysis"
        if case.oil.supply == "circulating":
            text += (
                '; filtered off-line: where a filter stands in line before the bearing, state "circulating -/.../..."'
            )
        yield Assumed("[cleanliness] setting", text, "iso-281:Annex A")
