"""A swap in the terminal: before and after side by side, the ranked candidates, the meeting, the change-over.

Only prints what the study found. A user's text goes through rich's Text and never into markup.
"""

from __future__ import annotations

from collections.abc import Iterable, Sequence

from rich.console import Console
from rich.table import Table
from rich.text import Text

from lubecheck.faces.display import amount, figure, in_system, named, number, printable, shown_unit
from lubecheck.faces.terminal import STYLES, bullets
from lubecheck.model.result import Limit
from lubecheck.studies.change_over import ChangeOver
from lubecheck.studies.mixture import Path
from lubecheck.studies.plant import Plant
from lubecheck.studies.swap import Swap, Swaps

MOST_DETAILED = 3  # candidates that are shown in full; more are a ranked table and the best of them


def print_swaps(swaps: Swaps, console: Console, system: str = "si") -> None:
    """Print all candidates of a position: the ranked table where there are several, then the best in full."""
    if swaps.title:
        console.print(Text(printable(swaps.title), style="bold"))
    console.print(Text(named(swaps.bearing, system)))
    console.print(Text(f"now: {named(swaps.lubricant, system)}"))
    candidates = swaps.candidates
    if len(candidates) > 1:
        _ranked(candidates, console, system)
    for one in candidates[: MOST_DETAILED if len(candidates) <= MOST_DETAILED else 1]:
        _swap(one, console, system)
    bullets("Cautions", swaps.cautions, console, system)


def _ranked(candidates: Sequence[Swap], console: Console, system: str) -> None:
    console.print(Text(f"\n{len(candidates)} candidates, the best first", style="bold"))
    table = _table("Candidate", "Verdict", "Why", *(f">{word}" for word in ("Use", "Temp.", "kappa", "Interval")))
    table.columns[2].no_wrap = False
    for one in candidates:
        figures = one.after.figures.figures
        greatest = one.after.greatest_use
        table.add_row(
            Text(printable(one.name)),
            Text(one.verdict, style=STYLES[one.verdict]),
            Text(printable(why(one))),
            Text(f"{greatest:.2f}" if greatest < 100 else "no end"),
            *(Text(amount(figures[name].value, figures[name].unit, system))
              for name in ("temperature", "viscosity_ratio", "allowed_interval")),
        )  # fmt: skip
    console.print(table)
    unit = shown_unit("degC", system)
    console.print(
        Text(f"  Use: the greatest of all limits, 1 at the limit; temperature in {unit}; allowed interval in h")
    )


def why(one: Swap) -> str:
    """Say what keeps a candidate from being within: all of it; what governs where nothing does."""
    lost = [f"{limit.name.replace('_', ' ')} {_use(limit)} {limit.state}"
            for limit in one.after.limits if limit.state != "within"]  # fmt: skip
    lost += [one.meeting.state if side.name == "compatibility" else f"{side.name.replace('_', ' ')} {side.state}"
             for side in one.sides if side.state != "within"]  # fmt: skip
    return ", ".join(lost) or f"governed by {one.governing.replace('_', ' ')}"


def _use(limit: Limit) -> str:
    if limit.use is None:
        return "-" if limit.state == "unknown" else "no end"
    return f"{limit.use:.2f}" if limit.use < 100 else "over 99"


def _swap(one: Swap, console: Console, system: str) -> None:
    console.print()
    console.print(Text(f"to: {named(one.lubricant, system)}", style="bold"))
    verdict = Text("Verdict: ")
    verdict.append(f" {one.verdict.upper()} ", style=f"bold reverse {STYLES[one.verdict]}".strip())
    verdict.append(f"  governed by {one.governing.replace('_', ' ')}")
    console.print(verdict)
    console.print(Text(printable(in_system(one.reason, system)), style="italic"))
    _side_by_side(one, console, system)
    bullets("What changes", one.differences or ("nothing",), console, system)
    lines = [f"{side.name.replace('_', ' ')}: {side.state}; {side.reason} [{side.source}]" for side in one.sides]
    lines += [cell for cell in _cells(one) if not any(cell in line for line in lines)]
    bullets("May the two meet", lines or (one.meeting.reason,), console, system)
    if one.mixture is not None:
        _mixture(one.mixture, console, system)
    _change_over(one.change_over, console, system)


def _cells(one: Swap) -> Iterable[str]:
    from lubecheck.data.compatibility import words

    for cell in (*one.meeting.cells, *one.seals):
        yield words(cell)


def _side_by_side(one: Swap, console: Console, system: str) -> None:
    console.print()
    table = _table("", ">Before", "", ">After", "", "Unit")
    before = {limit.name: limit for limit in one.before.limits}
    after = {limit.name: limit for limit in one.after.limits}
    for name in dict.fromkeys((*before, *after)):
        cells = [Text(name.replace("_", " "))]
        for limit in (before.get(name), after.get(name)):
            cells += [Text("-"), Text("")] if limit is None else [
                Text(_use(limit)), Text(limit.state, style=STYLES[limit.state])]  # fmt: skip
        table.add_row(*cells, Text("use, 1 at the limit"))
    olds, news = one.before.figures.figures, one.after.figures.figures
    for name, old in olds.items():
        table.add_row(
            Text(name.replace("_", " ")),
            Text(amount(old.value, old.unit, system)),
            Text(""),
            Text(amount(news[name].value, old.unit, system)),
            Text(""),
            Text(shown_unit(old.unit, system)),
        )
    console.print(table)


def _mixture(path: Path, console: Console, system: str) -> None:
    console.print(Text("\nOn the way, by share of the new", style="bold"))
    grade, heat = in_system(">nu at 40 degC", system), f">Temp. {shown_unit('degC', system)}"
    table = _table(">Share", grade, ">kappa", ">Film use", heat, ">NLGI")
    for share in path.shares:
        table.add_row(
            Text(f"{share.share * 100:.0f} %"),
            Text(number(share.nu_40)),
            Text(number(share.viscosity_ratio)),
            Text("no end" if share.film_use is None else f"{share.film_use:.2f}"),
            Text(amount(share.temperature, "degC", system)),
            Text(share.consistency or "-"),
        )
    console.print(table)


def _change_over(line: ChangeOver, console: Console, system: str) -> None:
    console.print(Text(f"\nChange-over: {line.way}", style="bold"))
    said = []
    if line.held_g is not None:
        said.append(f"held in bearing and housing: {figure(line.held_g, 'g', system)}")
    if line.stages and line.dose_g is not None and line.displaced is not None:
        said.append(f"each regreasing of {figure(line.dose_g, 'g', system)} takes out "
                    f"{line.displaced * 100:.0f} % of what is left of the old")  # fmt: skip
    for stage in line.stages:
        if stage.grams is None:
            said.append(f"{stage.gone * 100:.0f} % gone after {stage.times} filling{'s' if stage.times > 1 else ''}")
        else:
            weeks = "" if stage.weeks is None else f", {stage.weeks:g} weeks at the shortened interval"
            said.append(f"{stage.gone * 100:.0f} % gone after {stage.times} regreasings, "
                        f"{figure(stage.grams, 'g', system)}{weeks}")  # fmt: skip
    if line.purge_g is not None:
        said.append(
            f"or the bearing itself at once, in steps, the housing later: about {figure(line.purge_g, 'g', system)}"
        )
    if line.interval_h is not None and line.interval_weeks is not None:
        said.append(f"interval meanwhile: {number(line.interval_h)} running hours ({line.interval_weeks:g} weeks)")
    bullets("", said, console)
    bullets("Steps", line.steps, console, system)
    bullets("Watch", line.watch, console, system)


def print_plant(plant: Plant, console: Console) -> None:
    """Print what each candidate does to a plant, the fewest that keep every position within, and the hold-outs."""
    count = len(plant.positions)
    console.print(Text(f"{count} positions, {len(plant.counts)} candidates", style="bold"))
    now = ", ".join(f"{plant.verdicts_now.count(state)} {state}" for state in STYLES)
    console.print(Text(f"now: {now}\n"))
    heads = (">Judged", ">Within", ">Near", ">Unknown", ">Beyond", ">Better", ">Worse", ">Not to mix")
    table = _table("Candidate", *heads)
    ordered = sorted(plant.counts, key=lambda one: (-one.within, -one.near, one.name))
    for one in ordered:
        numbers = (one.judged, one.within, one.near, one.unknown, one.beyond, one.better, one.worse, one.not_to_mix)
        table.add_row(Text(printable(one.name)), *(Text(str(value)) for value in numbers))
    console.print(table)
    console.print(Text("\nThe fewest that keep every position within", style="bold"))
    served = [one for one in plant.assignment if one is not None]
    bullets("", [f"{name}: {served.count(name)} positions" for name in plant.fewest] or ["none does"], console)
    bullets("Positions", [f"{place}: {name}" for place, name in zip(plant.positions, plant.assignment, strict=True)
                          if name is not None], console)  # fmt: skip
    reasons = zip(plant.hold_outs, plant.hold_out_reasons, strict=True)
    bullets("Hold out", [f"{place}: {reason}" for place, reason in reasons], console)


def _table(*heads: str) -> Table:
    """Return a plain table; a head that begins with > is of a column of numbers."""
    table = Table(box=None, pad_edge=False, padding=(0, 2, 0, 0))
    for head in heads:
        table.add_column(head.removeprefix(">"), justify="right" if head.startswith(">") else "left", no_wrap=True)
    return table
