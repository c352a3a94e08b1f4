"""swap: may this grease or oil replace that one, in one position and for many candidates at once.

Before, after and every share of every mixture on the way are rows of one kernel call. The verdict covers film, heat,
interval, life and temperature range after the change, and whether the two may meet during it.
"""

from __future__ import annotations

import dataclasses
from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from typing import Any

from lubecheck.data import compatibility, lubricants
from lubecheck.data.compatibility import Cell, Meeting
from lubecheck.data.lubricant import Lubricant
from lubecheck.data.lubricant_files import read_entry
from lubecheck.errors import Fault, InputError, shown
from lubecheck.model import calibration_words, wording
from lubecheck.model.entries import Case
from lubecheck.model.glance import READINGS, Glance, glances, part_of, points_of
from lubecheck.model.limits import STATES
from lubecheck.studies.calibrate import calibrated
from lubecheck.studies.change_over import ChangeOver, change_over
from lubecheck.studies.mixture import Path, blends, paths, points_between

# What a meeting of two lubricants, or of one with a seal or metal, counts as beside the limits.
_STATE_OF = {"mixes": "within", "suits": "within", "test first": "near", "not known": "unknown",
             "do not mix": "beyond", "attacks": "beyond"}  # fmt: skip
CAUTIONS = (
    "Published charts contradict each other, since lubricants of one kind differ: no table replaces a test (greases "
    "ASTM D6185, oils ASTM D7155) or the word of both makers",
)


@dataclass(frozen=True, slots=True)
class Side:
    """What is judged beside the limits of the position: the meeting, the change, a seal, a metal."""

    name: str
    state: str
    reason: str
    source: str


@dataclass(frozen=True, slots=True)
class Swap:
    """One candidate: before and after, the meeting, the mixture on the way and the change-over."""

    name: str  # as it was asked for, or its key
    lubricant: str  # in words
    verdict: str
    governing: str
    reason: str
    before: Glance
    after: Glance
    sides: tuple[Side, ...]
    meeting: Meeting
    seals: tuple[Cell, ...]  # how the new oil treats each elastomer
    differences: tuple[str, ...]
    mixture: Path | None  # None where the two must not mix, or nothing changes
    change_over: ChangeOver


@dataclass(frozen=True, slots=True)
class Swaps:
    """All candidates of one position, the best first."""

    title: str
    bearing: str
    lubricant: str  # the one that is there
    candidates: tuple[Swap, ...]
    cautions: tuple[str, ...]

    @property
    def verdict(self) -> str:
        """The verdict of the best candidate."""
        return self.candidates[0].verdict


def swap(case: Case, lubricant: str | Lubricant, **options: Any) -> Swap:
    """Judge one lubricant in the place of the one a case has.

    lubricant: a name of the tables, a designation, figures ("kind=grease, nu_40=110 mm^2/s, ..."), or a Lubricant
    options: `displaced` and `is_cleaned` as for `swaps`

    Raises InputError where the lubricant is not known or is of the other kind.
    """
    return swaps(case, [lubricant], **options).candidates[0]


def swaps(
    case: Case,
    candidates: Sequence[str | Lubricant],
    *,
    own: Iterable[Lubricant] = (),
    displaced: float | None = None,
    is_cleaned: bool = False,
) -> Swaps:
    """Judge many lubricants in the place of the one a case has, all in one kernel call.

    own: lubricants of the user's, found before those of the tables
    displaced: share of what is left of the old that each regreasing takes out
    is_cleaned: the old lubricant is taken out wholly before, so that the two never meet

    Raises InputError with every candidate that was refused.
    """
    named = found(candidates, case.lubricant.kind, own)
    case = calibrated(case)
    news = [new for _, new in named]
    cases = [case, *(replaced(case, new) for new in news)]
    every = points_of(cases)
    before, after = every.take(every.case < READINGS), every.take(every.case >= READINGS)
    # Mixtures of the candidates that do not blend are rows too, and are not shown: every share has a block of all.
    judged = glances(cases, more=points_between(before, after, case.lubricant, news))
    old = judged.at(0)
    ways = paths(judged, case.lubricant, news)
    made = []
    for i, (name, new) in enumerate(named):
        outcome = part_of(judged.outcome, READINGS * (1 + i), READINGS)
        glance = judged.at(1 + i, outcome)
        meeting = compatibility.meet(case.lubricant, new)
        is_same = compatibility.is_same(case.lubricant, new)
        may_mix = not is_same and meeting.state != "do not mix" and blends(case.lubricant, new)
        between = ways[i] if may_mix else None
        sides = () if is_same else _sides(case, new, meeting, between, is_cleaned=is_cleaned)
        verdict, governing, reason = _verdict(glance, sides)
        made.append(
            Swap(
                name=name,
                lubricant=wording.lubricant(new),
                verdict=verdict,
                governing=governing,
                reason=reason,
                before=old,
                after=glance,
                sides=sides,
                meeting=meeting,
                seals=compatibility.seals(new),
                differences=differences(old, glance),
                mixture=between,
                change_over=change_over(case, new, meeting, glance, outcome, between, displaced),
            )
        )
    made.sort(key=lambda one: (STATES.index(one.verdict), one.after.greatest_use))
    return Swaps(
        title=case.title,
        bearing=wording.bearing(case.bearing),
        lubricant=wording.lubricant(case.lubricant, case.analysis),
        candidates=tuple(made),
        cautions=CAUTIONS + _measured(case) + wording.cautions(case),
    )


def _measured(case: Case) -> tuple[str, ...]:
    """Say that both sides stand on temperatures that were measured with the present lubricant."""
    if case.calibration is None:
        return ()
    return (f"{calibration_words.said(case.calibration)}: measured with the lubricant that is there",)


def replaced(case: Case, new: Lubricant) -> Case:
    """Return a case with a new lubricant in it: the analysis of the old oil goes, the dirt of the place stays."""
    if compatibility.is_same(case.lubricant, new):
        return case
    cleanliness = dataclasses.replace(case.cleanliness, setting=case.setting)
    return dataclasses.replace(case, lubricant=new, analysis=None, cleanliness=cleanliness)


def found(
    candidates: Sequence[str | Lubricant], kind: str, own: Iterable[Lubricant] = ()
) -> list[tuple[str, Lubricant]]:
    """Return each candidate with what it is called.

    Raises InputError with every one that is not known or is not of the kind.
    """
    own = tuple(own)
    faults: list[Fault] = []
    made: list[tuple[str, Lubricant]] = []
    for candidate in candidates:
        try:
            new = candidate if isinstance(candidate, Lubricant) else _read(candidate, kind, own)
        except InputError as refused:
            faults += [dataclasses.replace(fault, key=f"--to {fault.key}") for fault in refused.faults]
            continue
        name = new.key if isinstance(candidate, Lubricant) else candidate
        if new.kind != kind:
            faults.append(Fault("--to", shown(name), f"a lubricant of the kind that the position has: {kind}"))
        made.append((name, new))
    if faults:
        raise InputError(faults)
    return made


def _read(text: str, kind: str, own: Sequence[Lubricant]) -> Lubricant:
    """Read a candidate: figures where it has an equals sign, else a name or a designation."""
    if "=" not in text:
        return lubricants.find(text, own)
    facts: dict[str, Any] = {"kind": kind}
    for part in text.split(","):
        key, sign, value = part.partition("=")
        if not sign:
            expected = 'key = value parts, such as "nu_40 = 110 mm^2/s, nu_100 = 12 mm^2/s, thickener = polyurea"'
            raise InputError([Fault("", shown(part.strip()), expected)])
        facts[key.strip()] = value.strip()
    return read_entry(facts)


def _sides(case: Case, new: Lubricant, meeting: Meeting, between: Path | None, *, is_cleaned: bool) -> tuple[Side, ...]:
    sides = []
    if not is_cleaned:
        worst = max(meeting.cells, key=lambda cell: cell.gravity)
        sides.append(Side("compatibility", _STATE_OF[meeting.state], meeting.reason, worst.source))
        if between is not None:
            uses = [("film", between.film_use), ("temperature", between.temperature_use)]
            text = ", ".join(f"{name} {'past any use' if use is None else f'{use:.2f} of 1'}" for name, use in uses)
            dip = "worse than before and after" if between.dips else "not worse than the worse of before and after"
            sides.append(Side("mixture", between.state, f"greatest uses on the way: {text}; {dip}", "astm-d7152"))
    if case.bearing.seal == "contact seals" and new.base_oil != case.lubricant.base_oil:
        sides.append(_side("seals", compatibility.of("seal", new.base_oil, "NBR")))
    if case.bearing.cage == "brass" and new.ep and not case.lubricant.ep:
        sides.append(_side("yellow_metals", compatibility.metal(new, "brass")))
    return tuple(sides)


def _side(name: str, cell: Cell) -> Side:
    return Side(name, _STATE_OF[cell.state], compatibility.words(cell), cell.source)


def _verdict(glance: Glance, sides: Sequence[Side]) -> tuple[str, str, str]:
    """Return the worst state of limits and sides, what governs it and why; a limit goes before a side."""
    worst = max(sides, key=lambda side: STATES.index(side.state), default=None)
    if worst is None or STATES.index(worst.state) <= STATES.index(glance.verdict):
        return glance.verdict, glance.governing, glance.reason
    return worst.state, worst.name, worst.reason


_WORDS = {
    "temperature": ("K", "hotter", "cooler"),
    "viscosity_ratio": ("", "more film", "less film"),
    "churning_power": ("W", "more churning", "less churning"),
    "allowed_interval": ("h", "longer allowed interval", "shorter allowed interval"),
    "modified_life": ("h", "longer fatigue life", "shorter fatigue life"),
    "lowest": ("K", "start less cold", "start colder"),
}


def differences(before: Glance, after: Glance) -> tuple[str, ...]:
    """Say in words what changes, the limits whose state moves first; empty where nothing does."""
    states = {limit.name: limit.state for limit in before.limits}
    said = [f"{limit.name.replace('_', ' ')}: {states[limit.name]} before, {limit.state} after"
            for limit in after.limits if limit.name in states and states[limit.name] != limit.state]  # fmt: skip
    for name, (unit, more, less) in _WORDS.items():
        old, new = before.figures.figures[name].value, after.figures.figures[name].value
        if old is None or new is None or old == new:
            continue
        size = abs(new - old)
        if unit == "h" and old > 0:
            if abs(new / old - 1) >= 0.005:
                said.append(f"{more if new > old else less}: {new / old:.2f} times")
        elif size >= 0.005:
            said.append(f"{size:.2f} {unit} {more if new > old else less}".replace("  ", " "))
    return tuple(said)
