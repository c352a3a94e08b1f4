"""After the fact: so many strokes were given on a day, and it runs hot. What is in there now, and what to do about it.

The found fill is judged like any other, by the same points and limits; here are the words.
"""

from __future__ import annotations

from lubecheck.model import limits
from lubecheck.model.entries import Case
from lubecheck.model.entry import Amount
from lubecheck.model.kernel import Outcome
from lubecheck.model.rows import fill_found, given_volume, volume_of

# After regreasing: +14 to 17 K can be normal, over 28 K is a concern; it levels in 3 to 4 h and is back within about
# 24 h. Field notes of 2016, a band and not a model.
NORMAL_RISE = "14 to 17 K"
CONCERN_RISE = "28 K"
BACK_WITHIN = "24 h"


def found(case: Case, outcome: Outcome) -> str:
    """Say what was given and what fill is found; empty where nothing was given."""
    plan = case.grease
    if plan.given is None:
        return ""
    points = outcome.points
    per_cm3 = float(points.density[0]) / 1000
    grams = given_volume(plan, float(points.free_volume[0]), per_cm3) * per_cm3
    volume = float(points.free_volume[0])
    stated = plan.fill
    start = float(points.proposed_fill[0])
    if isinstance(stated, Amount):
        start = volume_of(stated, volume, per_cm3) / volume
    elif stated is not None:
        start = 0.5  # "unknown": the usual reading
    share = fill_found(plan, start, volume, per_cm3)
    inside = share * volume * per_cm3
    whole = (volume + float(points.void[0])) * per_cm3
    over = f"; bearing and housing hold {whole:.1f} g, so some has left or been pressed through the seals"
    strokes = f"{plan.given.value:.0f} strokes = " if plan.given.kind == "strokes" else ""
    day = f" on {plan.given_on}" if plan.given_on else ""
    before = "the proposed first fill" if plan.fill is None else "the stated fill"
    times = f" and {plan.regreasings:.0f} regreasing{'s' * (plan.regreasings != 1)}" if plan.regreasings else ""
    return (
        f"found: {strokes}{grams:.1f} g given{day} on top of {before}{times} make {inside:.1f} g ({share * 100:.0f} %)"
        + (over if inside > whole else "")
    )


def advice(case: Case, outcome: Outcome) -> tuple[str, ...]:
    """Return what to do about what was given."""
    plan = case.grease
    if plan.given is None:
        return ()
    judged = outcome.judged["fill"]
    points = outcome.points
    per_cm3 = float(points.density[0]) / 1000
    full = float(points.free_volume[0]) * per_cm3
    fill, proposed = float(points.fill[0]), float(points.proposed_fill[0])
    watch = (
        f"after greasing a rise of {NORMAL_RISE} can be normal, levels in 3 to 4 h and is back within about "
        f"{BACK_WITHIN} (field notes, a band); a rise of more than {CONCERN_RISE} is a concern: stop and look"
    )
    if float(judged.demand[0]) > fill and judged.use[0] > 1:
        return (f"after the fact: too little: give {(proposed - fill) * full:.1f} g more, in portions", watch)
    held = float(outcome.state.held_volume[int(outcome.hottest[0])]) * per_cm3
    if judged.state[0] in (limits.WITHIN, limits.NEAR_CODE) and held <= 0:
        return ("after the fact: what was given has room: give no more, and run", watch)
    if case.housing.relief == "open":
        return (
            f"after the fact: too much, but the relief is open: leave it open and run {BACK_WITHIN}; if it is not back "
            "to its usual temperature by then, the way out is blocked: clean it out",
            watch,
        )
    return (
        f"after the fact: too much: {held:.1f} g cannot clear by themselves. Stop, open the relief or take off the "
        f"lower cap, run {BACK_WITHIN} with it open; if nothing comes out or there is no relief, clean the bearing out "
        f"and fill it with {proposed * full:.1f} g",
        watch,
    )
