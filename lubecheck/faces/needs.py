"""The needs on the terminal: what each means alone has to be to hold a temperature."""

from __future__ import annotations

from rich.console import Console
from rich.padding import Padding
from rich.table import Table
from rich.text import Text

from lubecheck.faces.display import in_system, number
from lubecheck.model.result import Needs


def print_needs(needs: Needs, console: Console, system: str) -> None:
    """Print the question, a line for each means and what they rest on; nothing where all is cool and nobody asked."""
    if not (needs.is_due and needs.question):
        return
    console.print(Text(f"\nWhat alone would hold {in_system(needs.question, system)}", style="bold"))
    if needs.found:
        console.print(_table(needs, system))
    if needs.note:
        console.print(Padding(Text(in_system(needs.note, system)), (0, 0, 0, 2)))


def _table(needs: Needs, system: str) -> Table:
    table = Table(box=None, pad_edge=False, padding=(0, 2, 0, 2), show_header=True)
    for heading in ("", "Now", "Needed", ""):
        table.add_column(heading, justify="right" if heading else "left", no_wrap=bool(heading))
    for need in needs.found:
        needed = "not enough" if need.needed is None else _figure(need.needed, need.unit, system)
        table.add_row(
            Text(need.means),
            Text(_figure(need.now, need.unit, system)),
            Text(needed),
            Text(in_system(need.note, system)),
        )
    return table


def _figure(value: float | str | None, unit: str, system: str) -> str:
    if value is None or isinstance(value, str):
        return value or "none"
    return f"{number(100 * value)} %" if unit == "1" else in_system(f"{number(value)} {unit}", system)
