"""The change-over: how the old lubricant gets out, how long it takes, and what to watch meanwhile."""

from __future__ import annotations

import math
from dataclasses import dataclass

from lubecheck.data import compatibility
from lubecheck.data.compatibility import Meeting
from lubecheck.data.lubricant import Lubricant
from lubecheck.model.amounts import purge_run, run_words
from lubecheck.model.entries import Case
from lubecheck.model.glance import Glance
from lubecheck.model.kernel import Outcome
from lubecheck.model.plan import weeks_of
from lubecheck.physics import grease_amount
from lubecheck.studies.mixture import Path

GONE = (0.90, 0.95, 0.99)
# Of the grease that a dose pushes in, the part that pushes old grease out rather than running past it: estimate of this
# program, 0.3 (housing with dead corners) to 0.8 (fed through the bearing).
PUSHES = 0.5
LEFT_AFTER_DRAIN = 0.1  # of the oil stays on walls and in pipes when a sump is drained: estimate, 0.05 to 0.15
SHORTER = {"mixes": 0.5, "test first": 0.25, "not known": 0.25, "do not mix": 0.25}  # of the interval: common practice


@dataclass(frozen=True, slots=True)
class Stage:
    """When a share of the old lubricant is gone."""

    gone: float
    times: int  # regreasings, or fillings of the sump
    grams: float | None  # of new grease, all together
    weeks: float | None


@dataclass(frozen=True, slots=True)
class ChangeOver:
    """The line for the change."""

    way: str  # what to do, in two or three words
    held_g: float | None  # grease in bearing and housing
    dose_g: float | None  # each regreasing
    displaced: float | None  # share of what is left of the old that each regreasing takes out
    purge_g: float | None  # all at once, in steps with the way out open
    interval_h: float | None  # meanwhile
    interval_weeks: float | None
    stages: tuple[Stage, ...]
    steps: tuple[str, ...]
    watch: tuple[str, ...]


def change_over(
    case: Case,
    new: Lubricant,
    meeting: Meeting,
    glance: Glance,
    outcome: Outcome,
    way_between: Path | None,
    displaced: float | None = None,
) -> ChangeOver:
    """Return the line for one candidate; `outcome` is the position with the new lubricant.

    displaced: share of what is left of the old that each regreasing takes out; left out, worked out from the dose.
    """
    if compatibility.is_same(case.lubricant, new):
        return ChangeOver("nothing to do", None, None, None, None, None, None, (), (), ())
    hours = _interval(glance, meeting, way_between)
    per_day = float(outcome.points.hours_per_day[0])
    if not case.is_grease:
        return _oil(meeting, hours, per_day)
    points = outcome.points
    density = float(points.density[0]) / 1000
    volume = float(min(points.fill[0], 1.0) * points.free_volume[0] + points.housing_fill[0] * points.void[0])
    dose = glance.figures.figures["regrease_quantity"].value
    if points.is_sealed[0] > 0:
        steps = ("Replace the bearing by one with the new grease: a closed bearing cannot be regreased",)
        return ChangeOver("replace the bearing", volume * density, None, None, None, None, None, (), steps, ())
    is_closed = case.housing.relief == "closed"
    is_clean = meeting.state in ("do not mix", "not known") or is_closed
    share = displaced
    if share is None and dose is not None and volume > 0:
        share = 1 - math.exp(-PUSHES * dose / density / volume)
    stages: tuple[Stage, ...] = ()
    if not is_clean and share is not None and dose is not None:
        stages = tuple(_stage(gone, share, dose, hours, per_day) for gone in GONE)
    purge = float(grease_amount.purge_quantity.plain(outside=float(points.outside[0]), width=float(points.width[0])))
    return ChangeOver(
        way="clean out" if is_clean else "purge",
        held_g=volume * density,
        dose_g=dose,
        displaced=share,
        purge_g=None if is_clean else purge,
        interval_h=hours,
        interval_weeks=weeks_of(hours, per_day),
        stages=stages,
        steps=_grease_steps(meeting, is_clean, is_closed, run_words(*purge_run(case)[::2])),
        watch=_watch(meeting, way_between),
    )


def _stage(gone: float, share: float, dose: float, hours: float | None, per_day: float) -> Stage:
    """Return when a share is gone: each regreasing leaves 1 - share of what was left.

    >>> _stage(0.95, 0.5, 10.0, 168.0, 24.0)
    Stage(gone=0.95, times=5, grams=50.0, weeks=5.0)
    """
    times = 1 if share >= 1 else math.ceil(math.log(1 - gone) / math.log1p(-share) - 1e-9)
    weeks = None if hours is None else weeks_of(times * hours, per_day)
    return Stage(gone, times, times * dose, weeks)


def _interval(glance: Glance, meeting: Meeting, path: Path | None) -> float | None:
    """Return the interval meanwhile: a part of the shortest of plan, new lubricant and mixture."""
    known = [glance.figures.figures[name].value for name in ("interval", "allowed_interval")]
    known.append(path.allowed_interval if path is not None else None)
    finite = [hours for hours in known if hours is not None]
    return math.floor(SHORTER[meeting.state] * min(finite)) if finite and min(finite) > 2 else None


def _oil(meeting: Meeting, hours: float | None, per_day: float) -> ChangeOver:
    """Return the line for an oil: how often the sump has to be drained and filled."""
    left = LEFT_AFTER_DRAIN
    stages = tuple(
        Stage(gone, math.ceil(math.log(1 - gone) / math.log(left) - 1e-9), None, None) for gone in GONE
    )  # fmt: skip
    flush = meeting.state != "mixes"
    steps = [
        "Isolate and lock out the machine; drain while warm, at the lowest point, filters, coolers and pipes too",
        "Wipe out the sump; renew the filters",
    ]
    if flush:
        steps.append(
            "Flush with a thin oil that both makers allow, drain, then flush with the new oil and drain again: even a "
            "few per cent left behind do harm"
        )
        steps.append("Look at paint, sight glasses and seals: the makers have to allow the new oil for each")
    steps.append("Refill to the middle of the lowest rolling element at rest, or to the mark; note date and oil")
    watch = ("foam, cloudiness, sludge on the glass and filter in the first days", "temperature and leaks at the seals",
             f"draw a sample after the first day: with {left * 100:.0f} % left in a drain, {stages[-1].times} fillings "
             "bring 99 % of the old out")  # fmt: skip
    way = "drain, flush and refill" if flush else "drain and refill"
    return ChangeOver(way, None, None, left, None, hours, weeks_of(hours, per_day), stages, tuple(steps), watch)


def _grease_steps(meeting: Meeting, is_clean: bool, is_closed: bool, run: str) -> tuple[str, ...]:
    steps = [
        "Isolate and lock out the machine; wipe nipples and lines, empty the gun and load it with the new grease only"
    ]
    if meeting.state == "test first":
        steps.append("Have the mixture tested (ASTM D6185) first; without the test clean out instead of purging")
    if is_clean:
        why = "there is no open relief for the old grease to leave by" if is_closed else "the old must not stay"
        steps += [f"Take the caps off, take the old grease out of bearing, housing and lines by hand and wash: {why}",
                  "Dry, look at raceways and seals, fill anew with the amount of the plan line"]  # fmt: skip
    else:
        steps += ["Open the relief and clear it of hard grease",
                  "Push the new grease through in small portions while the shaft turns, where the site allows it, "
                  f"until clean new grease comes out; between the portions run for {run} with the relief open (common "
                  "practice)",
                  "Then regrease at the shortened interval until 95 % of the old is gone"]  # fmt: skip
    steps.append("Change the label of the nipple, the lubrication plan and the store's list on the same day")
    return tuple(steps)


def _watch(meeting: Meeting, path: Path | None) -> tuple[str, ...]:
    said = ["temperature in the first days: a rise that does not turn over means too much or a mixture that churns",
            "leakage and softening: grease that runs out of seals or the relief, oil that bleeds"]  # fmt: skip
    if path is not None and path.softest:
        said.append(f"the mixture may be as soft as NLGI {path.softest} at its worst share (estimate)")
    if path is not None and path.dips:
        said.append("film or heat is worse on the way than before and after")
    if meeting.state != "mixes":
        said.append(f"hardening as well: {meeting.reason}")
    return tuple(said)
