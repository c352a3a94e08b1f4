"""The terminal verdict: the state in colour and in words, each limit, the operating point, the plan, what was assumed.

Only prints a finished result. A user's text goes through rich's Text and never into markup.
"""

from __future__ import annotations

import re
from collections.abc import Iterable
from typing import Literal

from rich.console import Console
from rich.padding import Padding
from rich.table import Table
from rich.text import Text

from lubecheck.faces.display import amount, figure, in_system, is_plain, named, number, printable, shown_unit
from lubecheck.faces.losses import print_damage, print_losses
from lubecheck.faces.needs import print_needs
from lubecheck.model.calibration import Explanation
from lubecheck.model.result import Figures, Limit, PlanLine, Result
from lubecheck.sources import cite

# ISO 22324: green, yellow, red. What was not judged has no colour, and is said.
STYLES = {"within": "green", "near": "yellow", "beyond": "red", "unknown": ""}
_CAUSES = ("viscous_power", "load_power", "mixed_film_power", "seal_power", "churning_power")
# The plan line says the first three, the lines on heat the rest.
_SAID_ELSEWHERE = {
    "first_fill", "fill_share", "regrease_quantity", "regrease_interval", "inner_ring_excess", "churning_power",
    *(name.replace("_power", "_torque") for name in _CAUSES), *_CAUSES,
}  # fmt: skip
_LEAST_WATTS = 0.05
_LEAST_SHARE = 0.005
_BAR = 10  # cells of a bar that is full at the limit
_BIGGER = re.compile(r"(bigger bearing: [^(]*\()")
_WIDE = 100  # columns from which sources stand beside the limits


def print_result(result: Result, console: Console, system: str = "si", *, losses: bool = False) -> None:
    """Print a result, what has to be acted on first; its loss account where that is asked for."""
    _heading(result, console, system)
    _limits(result, console, system)
    _calibration(result, console, system)
    _plan(result, console, system)
    if result.calibration is None or result.calibration.is_explained or not result.calibration.stop:
        # Nobody knows what a change does to what nothing explains.
        _remedies(result, console, system)
        print_needs(result.needs, console, system)
    if result.warm_up is not None:
        from lubecheck.faces.warmup import print_warm_up  # only where it is asked for

        print_warm_up(result.warm_up, console, system)
    bullets("Notes", result.notes, console, system)
    _operating(result, console, system)
    _heat(result, console)
    _interval_lines(result, console, system)
    print_damage(result.damage, console, system)
    if losses:
        print_losses(result.losses, console, system)
    assumed = (f"{a.name}: {a.value} ({a.basis})" for a in result.assumed)
    bullets("Not said, so assumed", assumed, console, system)
    _sources(result, console, system)
    bullets("Cautions", result.cautions, console, system)


def _heading(result: Result, console: Console, system: str) -> None:
    if result.title:
        console.print(Text(printable(result.title), style="bold"))
    for line in (result.bearing, result.lubricant):
        console.print(Text(named(line, system)))
    governing = result.limit(result.governing)
    verdict = Text("\nVerdict: ")
    style = STYLES[result.verdict]
    verdict.append(f" {result.verdict.upper()} ", style=f"bold reverse {style}".strip())
    verdict.append(f"  governed by {_words(result.governing)}, ")
    use = "past any use" if governing.use is None else f"use {_use(governing)} of 1"
    verdict.append("which could not be judged" if governing.state == "unknown" else use)
    console.print(verdict)
    console.print(Text(_meaning(result), style="italic"))
    _stop(result, console, system)


def _stop(result: Result, console: Console, system: str, indent: int = 0) -> None:
    """Print what was read over a limit, where something was: it comes before anything else that is to be done."""
    if result.calibration is not None and result.calibration.stop:
        text = Text(in_system(_capital(result.calibration.stop), system), style=f"bold {STYLES['beyond']}")
        console.print(Padding(text, (0, 0, 0, indent)))


def _capital(text: str) -> str:
    return text[:1].upper() + text[1:]


def _meaning(result: Result) -> str:
    """Say what the verdict asks of the reader."""
    unknown = [_words(limit.name) for limit in result.limits if limit.state == "unknown"]
    also = f" Not judged: {', '.join(unknown)}." if unknown else ""
    return {
        "within": "Every limit has room.",
        "near": "An alarm may sound on the way, and no limit of the bearing is passed: watch it."
        if (result.limit(result.governing).use or 0.0) > 1
        else "No limit is passed, but little room is left: watch the governing one.",
        "beyond": f"Do not run it like this: a limit is passed.{also}",
        "unknown": f"Not good until it is judged: see what to state below.{also}",
    }[result.verdict]


def _limits(result: Result, console: Console, system: str) -> None:
    table = Table(box=None, pad_edge=False, padding=(0, 2, 0, 0), title=None)
    for heading in ("Limit", "State", "Use", "", "Demand", "Allowed", ""):
        justify: Literal["left", "right"] = "right" if heading in ("Use", "Demand", "Allowed") else "left"
        table.add_column(heading, justify=justify, no_wrap=True)
    is_wide = console.width >= _WIDE
    if is_wide:
        table.add_column("Source", no_wrap=True)
    for limit in result.limits:
        style = STYLES[limit.state]
        cells = [
            Text(_words(limit.name)),
            Text(limit.state, style=style),
            Text(_use(limit)),
            _bar(limit, console),
            Text(amount(limit.demand, limit.unit, system)),
            Text(amount(limit.allowed, limit.unit, system)),
            Text(shown_unit(limit.unit, system)),
        ]
        table.add_row(*cells, *([Text(limit.basis)] if is_wide else []))
    console.print()
    console.print(table)
    notes = [(limit, limit.note) for limit in result.limits if limit.note]
    why = Table(box=None, pad_edge=False, padding=(0, 2, 0, 2), show_header=False)
    why.add_column(no_wrap=True)
    why.add_column()
    for limit, note in notes:
        why.add_row(Text(_words(limit.name), style=STYLES[limit.state]), Text(printable(in_system(note, system))))
    if notes:
        console.print(Text("\nWhy", style="bold"))
        console.print(why)


def _sources(result: Result, console: Console, system: str) -> None:
    """Print the sources: by their keys where the table shows these, else by the limits."""
    if console.width >= _WIDE:
        keys = dict.fromkeys(limit.basis for limit in result.limits)
        bullets("Sources", (f"{key}: {cite(key)}" for key in keys), console, system)
    else:
        bullets("Sources", (f"{_words(limit.name)}: {cite(limit.basis)}" for limit in result.limits), console, system)


def _words(name: str) -> str:
    return name.replace("_", " ")


def _use(limit: Limit) -> str:
    if limit.use is None:
        return "-" if limit.state == "unknown" else "no end"
    return f"{limit.use:.2f}" if limit.use < 100 else "over 99"


def _bar(limit: Limit, console: Console) -> Text:
    """Return a bar that is full at the limit; a part beyond it is marked with a plus."""
    mark, blank = ("#", ".") if is_plain(console) else ("\N{BLACK SQUARE}", "\N{MIDDLE DOT}")
    if limit.state == "unknown":
        return Text("?".ljust(_BAR + 1))
    use = 2.0 if limit.use is None else limit.use
    cells = min(_BAR, round(use * _BAR))
    return Text(mark * cells + blank * (_BAR - cells) + ("+" if use > 1 else " "), style=STYLES[limit.state])


def _calibration(result: Result, console: Console, system: str) -> None:
    """Print what measured temperatures gave, or what would explain them."""
    found = result.calibration
    if found is None:
        return
    console.print(Text("\nMeasured temperatures", style="bold" if found.is_explained else "bold yellow"))
    console.print(Padding(Text(in_system(found.text, system)), (0, 0, 0, 2)))
    if found.explanations:
        console.print(Padding(Text("Each of these alone would explain it, the least surprising first:"), (0, 0, 0, 2)))
    bullets("", (in_system(f"{item.words}{_usual(item, system)}", system) for item in found.explanations), console)
    bullets("", (in_system(note, system) for note in found.notes), console)


def _usual(item: Explanation, system: str) -> str:
    """Say what would be usual, where that has a unit to be said in."""
    if item.surprise <= 0 or item.unit in ("1", "delta_degC"):
        return ""
    return f" (usual: {amount(item.usual_low, item.unit, system)} to {figure(item.usual_high, item.unit, system)})"


def _operating(result: Result, console: Console, system: str) -> None:
    console.print(Text("\nOperating point", style="bold"))
    table = Table(box=None, pad_edge=False, padding=(0, 2, 0, 2), show_header=False)
    for justify in ("left", "right", "left", "left"):
        table.add_column(justify=justify, no_wrap=justify != "left")
    groups: list[Figures] = [result.operating, result.life, result.loads, result.speeds]
    if result.grease is not None:
        groups.append(result.grease)
    for group in groups:
        for name, item in group.figures.items():
            if name in _SAID_ELSEWHERE:
                continue
            if group in (result.loads, result.speeds) and not item.value:
                continue  # not every position has them, or needs a preload
            band = ""
            if item.low is not None and item.high is not None and number(item.low) != number(item.high):
                band = f"({amount(item.low, item.unit, system)} to {amount(item.high, item.unit, system)})"
            table.add_row(
                Text(_words(name)),
                Text(amount(item.value, item.unit, system)),
                Text(shown_unit(item.unit, system)),
                Text(band),
            )
    console.print(table)


def _interval_lines(result: Result, console: Console, system: str) -> None:
    """Print the lines of lubricant life side by side, whether or not they govern."""
    if not result.interval_lines:
        return
    console.print(Text("\nInterval, line by line", style="bold"))
    table = Table(box=None, pad_edge=False, padding=(0, 2, 0, 2), show_header=False)
    for justify in ("left", "right", "left", "left"):
        table.add_column(justify=justify, no_wrap=justify == "right")
    for line in result.interval_lines:
        use = "governs" if line.governs else "applies" if line.applies else "does not apply"
        hours = "not read" if line.hours is None else f"{amount(line.hours, 'h', 'si')} h"
        factors = " x ".join(f"{name} {number(factor)}" for name, factor in line.factors)
        told = "; ".join(part for part in (factors if line.applies else "", line.note) if part)
        table.add_row(Text(line.name), Text(hours), Text(use), Text(in_system(told, system)))
    console.print(table)
    console.print(Padding(Text(in_system(result.interval_spread, system)), (0, 0, 0, 2)))


def _heat(result: Result, console: Console) -> None:
    """One line each: what makes the heat, and by which ways it leaves."""
    causes = {name.removesuffix("_power"): item.value for name, item in result.operating.figures.items()
              if name in _CAUSES}  # fmt: skip
    causes |= {name: result.heat.figures[name].value for name in ("machine", "sun")}
    ways = {name: item.value for name, item in result.heat_shares.figures.items()}
    brings = {name: -(result.heat.figures[name].value or 0.0) for name in ways}
    made = [f"{_words(name)} {number(watts)} W" for name, watts in causes.items() if watts and watts >= _LEAST_WATTS]
    made += [f"{_words(name)} {number(watts)} W" for name, watts in brings.items() if watts >= _LEAST_WATTS]
    lost = [f"{_words(name)} {share * 100:.0f} %" for name, share in ways.items() if share and share >= _LEAST_SHARE]
    if made and lost:
        console.print(Text("\nHeat", style="bold"))
        console.print(Padding(Text(f"from {', '.join(made)}"), (0, 0, 0, 2)))
        console.print(Padding(Text(f"leaves by {', '.join(lost)}"), (0, 0, 0, 2)))


def _plan(result: Result, console: Console, system: str) -> None:
    plan = result.plan
    console.print(Text("\nFor the maintenance plan", style="bold"))
    _stop(result, console, system, indent=2)
    if result.verdict in ("beyond", "unknown"):
        open_limits = [_words(limit.name) for limit in result.limits if limit.state == result.verdict]
        settled = Text(f"Only once this is settled: {', '.join(open_limits)}", style=STYLES[result.verdict])
        console.print(Padding(settled, (0, 0, 0, 2)))
    console.print(
        Padding(
            Text((" | " if is_plain(console) else " · ").join(plan_parts(plan, system)), style="bold"), (0, 0, 0, 2)
        )
    )
    for i, step in enumerate(plan.steps, start=1):
        console.print(Padding(Text(f"{i}. {in_system(step, system)}"), (0, 0, 0, 2)))


def plan_parts(plan: PlanLine, system: str) -> list[str]:
    """Return the parts of the plan line in words."""
    proposed = {
        key: " (proposed)" if key in plan.is_proposed else "" for key in ("fill", "interval", "regrease_amount")
    }
    parts = [printable(plan.lubricant)]
    if plan.is_as_supplied:
        parts.append("as supplied, closed on both sides")
    if plan.first_fill_g is not None:
        strokes = _strokes(plan.first_fill_strokes, plan.stroke_g, system)
        parts.append(f"first fill {figure(plan.first_fill_g, 'g', system)}{strokes}{proposed['fill']}")
        if plan.housing_fill_g is not None:
            parts.append(f"into the housing {figure(plan.housing_fill_g, 'g', system)}")
    if plan.regrease_g is not None:
        strokes = _strokes(plan.regrease_strokes, plan.stroke_g, system)
        parts.append(f"regrease with {figure(plan.regrease_g, 'g', system)}{strokes}{proposed['regrease_amount']}")
    is_oil = plan.first_fill_g is None and not plan.is_as_supplied
    if plan.interval_h is not None and plan.interval_weeks is not None and (is_oil or plan.regrease_g is not None):
        weeks = f"{plan.interval_weeks:.1f}".removesuffix(".0")
        verb = "change the oil every" if is_oil else "every"
        parts.append(
            f"{verb} {weeks} weeks ({number(plan.interval_h)} running hours at {plan.hours_per_day:g} h a day)"
            f"{proposed['interval']}"
        )
    return parts


def _remedies(result: Result, console: Console, system: str) -> None:
    """Print the changes that bring the verdict back, with what each does to the limits."""
    lines = (f"{one.change} -> {one.verdict_after}. {one.note}" for one in result.remedies)
    bullets(
        "What would bring it back, least effort first", (_but_designations(line, system) for line in lines), console
    )


def _but_designations(line: str, system: str) -> str:
    """Return a line with its figures in a system: the name of a bigger bearing may end in what reads like a unit."""
    parts = _BIGGER.split(line)
    return "".join(part if i % 2 else in_system(part, system) for i, part in enumerate(parts))


def _strokes(strokes: int | None, stroke_g: float | None, system: str) -> str:
    if strokes is None or stroke_g is None:
        return ""
    if strokes == 0:
        return f" (less than one stroke of {figure(stroke_g, 'g', system)}: weigh it)"
    return f" = {strokes} strokes of {figure(stroke_g, 'g', system)} ({figure(strokes * stroke_g, 'g', system)})"


def bullets(heading: str, lines: Iterable[str], console: Console, system: str = "si") -> None:
    """Print lines under a heading, or under none, their figures in a unit system; nothing where there are no lines."""
    lines = tuple(lines)
    if not lines:
        return
    if heading:
        console.print(Text(f"\n{heading}", style="bold"))
    table = Table(box=None, pad_edge=False, padding=(0, 1, 0, 0), show_header=False)
    table.add_column(width=3, justify="right")
    table.add_column()
    for line in lines:
        table.add_row(Text("-"), Text(printable(in_system(line, system))))
    console.print(table)
