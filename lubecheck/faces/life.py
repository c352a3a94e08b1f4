"""What the studies of fatigue life print: a shared oil circuit, and what reaches a wanted life."""

from __future__ import annotations

import dataclasses
import json

from rich.console import Console
from rich.text import Text

from lubecheck.faces.display import amount, figure, named, number, printable
from lubecheck.faces.losses import plain_table
from lubecheck.faces.terminal import STYLES, bullets
from lubecheck.physics.fatigue import PIT_AREA
from lubecheck.studies.circuit import CircuitResult
from lubecheck.studies.system import SystemLife
from lubecheck.studies.wanted import WantedLife


def circuit_json(result: CircuitResult) -> str:
    """Return a circuit's result as JSON text; hours, degC and bare numbers, null where one is not known."""
    return json.dumps({"schema": "lubecheck/circuit/1", **dataclasses.asdict(result)}, indent=2, allow_nan=False)


def wanted_json(result: WantedLife) -> str:
    """Return a wanted life's result as JSON text."""
    return json.dumps({"schema": "lubecheck/life/1", **dataclasses.asdict(result)}, indent=2, allow_nan=False)


def print_circuit(result: CircuitResult, console: Console, system: str = "si") -> None:
    """Print a circuit: the lives of its positions in each state of its oil."""
    if result.title:
        console.print(Text(printable(result.title), style="bold"))
    shared = figure(result.oil_temperature, "degC", system)
    console.print(Text(f"{named(result.lubricant, system)}, shared at {shared}"))
    for state in result.states:
        console.print(
            Text(printable(f"  {state.name}: ISO 4406 {state.code}, filter {state.filter}, taken as {state.setting}"))
        )
    verdict = Text("\nOil as it is: ")
    verdict.append(f" {result.verdict.upper()} ", style=f"bold reverse {STYLES[result.verdict]}".strip())
    verdict.append("  by the wanted life of each position")
    console.print(verdict)
    table = plain_table("Position", *(f"{state.name}, h" for state in result.states))
    for member in result.members:
        name = printable(member.name) + (" (damaged)" if member.is_damaged else "")
        lives = [Text(f"{amount(life.life_h, 'h', system)} {life.state}", style=STYLES[life.state])
                 for life in member.lives]  # fmt: skip
        table.add_row(Text(name), *lives)
    table.add_row(Text("all together"), *(Text(amount(life, "h", system)) for life in result.system_life_h))
    if any(member.is_damaged for member in result.members):
        table.add_row(Text("without the damaged"), *(Text(amount(life, "h", system)) for life in result.others_life_h))
    console.print()
    console.print(table)
    said = []
    if result.debris_costs_h is not None:
        said.append(f"debris costs the other positions together {number(result.debris_costs_h)} h")
    if result.filter_is_worth_h is not None:
        said.append(f"the filter is worth {number(result.filter_is_worth_h)} h to them")
    if result.debris_uses is not None:
        said.append(f"the hours with debris use up {result.debris_uses * 100:.1f} % of their life")
    if said:
        console.print(Text("\nFailure travels: " + "; ".join(said), style="bold"))
    unsaid = [f"{member.name} leaves out {', '.join(member.unsaid)}" for member in result.members if member.unsaid]
    bullets("Notes", (*result.notes, *unsaid), console, system)
    bullets("Cautions", result.cautions, console, system)


def print_wanted(result: WantedLife, console: Console, system: str = "si") -> None:
    """Print what reaches a wanted life."""
    for text in (printable(result.title), named(result.bearing, system), named(result.lubricant, system)):
        if text:
            console.print(Text(text))
    percent = (1 - result.reliability) * 100
    console.print(
        Text(f"\nLife L{percent:.3g}: {figure(result.life_h, 'h', system)}, "
             f"wanted {figure(result.wanted_life_h, 'h', system)}", style="bold")
    )  # fmt: skip
    table = plain_table("One of these alone", "now", "needed", "then", "kappa")
    for answer in result.answers:
        table.add_row(
            Text(answer.question), Text(_said(answer.now, answer.unit, system)),
            Text("out of reach" if answer.needed is None else _said(answer.needed, answer.unit, system)),
            Text(figure(answer.temperature, "degC", system)), Text(number(answer.viscosity_ratio)),
        )  # fmt: skip
    console.print(table)
    bullets(
        "Notes", (*(f"{answer.question}: {answer.note}" for answer in result.answers), *result.notes), console, system
    )


def system_json(result: SystemLife) -> str:
    """Return a machine's life as JSON text."""
    return json.dumps({"schema": "lubecheck/system/1", **dataclasses.asdict(result)}, indent=2, allow_nan=False)


def print_system(result: SystemLife, console: Console) -> None:
    """Print the lives of a machine's bearings, and of all together."""
    percent = (1 - result.reliability) * 100
    table = plain_table("Bearing", f"L{percent:.3g}, h", "share of the risk")
    table.columns[0].no_wrap = False
    for part in result.parts:
        share = "-" if part.share is None else f"{part.share * 100:.0f} %"
        table.add_row(Text(printable(part.title or part.bearing)), Text(amount(part.life_h, "h", "si")), Text(share))
    table.add_row(Text("all together", style="bold"), Text(amount(result.life_h, "h", "si"), style="bold"), Text(""))
    console.print(table)
    bullets("Notes", (*result.notes, f"a rated life ends with the first pit of about {PIT_AREA:g} mm^2"), console)


def _said(value: float | str, unit: str, system: str) -> str:
    return value if isinstance(value, str) else figure(value, unit, system)
