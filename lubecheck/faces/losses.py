"""The fatigue life taken apart for the terminal: what each duty point takes of it, and the loss account."""

from __future__ import annotations

import math

from rich.console import Console
from rich.padding import Padding
from rich.table import Table
from rich.text import Text

from lubecheck.faces.display import amount, in_system, is_plain, number, shown_unit
from lubecheck.model.result import Damage, LossAccount

_BAR = 12  # cells of the waterfall's widest bar
_DECADES = 6.0  # powers of ten that it stands for


def print_damage(points: tuple[Damage, ...], console: Console, system: str) -> None:
    """Print what each duty point takes of the life, where there are several."""
    if len(points) < 2:
        return
    console.print(Text("\nWhat each duty point takes of the fatigue life", style="bold"))
    table = plain_table(
        "Point", "time", "damage", "alone, h", shown_unit("degC", system), "kappa", "e_C", "a_ISO", "P/C"
    )
    for i, point in enumerate(points, start=1):
        damage = "-" if point.share_of_damage is None else f"{point.share_of_damage * 100:.0f} %"
        table.add_row(
            Text(str(i)), Text(f"{point.share_of_time * 100:.0f} %"), Text(damage),
            Text(number(point.life_h)), Text(amount(point.temperature, "degC", system)),
            *(Text(number(value)) for value in (point.viscosity_ratio, point.contamination_factor,
                                                point.life_modification_factor, point.load_ratio)),
        )  # fmt: skip
    console.print(table)


def print_losses(account: LossAccount, console: Console, system: str = "si") -> None:
    """Print the loss account: a table, and a waterfall of bars on a logarithmic scale."""
    console.print(Text("\nLoss account of the fatigue life", style="bold"))
    if account.reference_life_h is None or account.life_h is None:
        console.print(Text("  not worked out: the life is outside the range of ISO 281"))
        return
    console.print(Padding(Text(f"Reference: {in_system(account.reference, system)}"), (0, 0, 0, 2)))
    table = plain_table("As it is", "times", "life, h", "waterfall", "if right, h", "times")
    table.columns[3].justify = "left"
    top = account.reference_life_h
    table.add_row(Text("reference"), Text(""), Text(number(top)), _bar(top, top, console), Text(""), Text(""))
    for part in account.parts:
        life = part.life_after_h
        table.add_row(
            Text(" and ".join((*part.covers, part.name))),
            Text(number(part.factor)), Text(number(life)), _bar(life, top, console),
            Text(number(part.life_if_right_h)), Text(number(part.factor_alone)),
        )  # fmt: skip
    console.print(table)
    order = ", ".join(part.name for part in account.parts)
    console.print(
        Padding(
            Text(
                f"Each row has one more thing as it is, in the order {order}: the factors multiply to the whole, "
                f"{account.life_h / top:.2g}. On the right, one alone is put right and temperature follows; the "
                f"product of those factors leaves an interaction of {number(account.interaction)} times, since film, "
                "dirt and load act through one another. Hours over 200000 say only that fatigue is not the end there."
            ),
            (0, 0, 0, 2),
        )
    )


def _bar(life: float | None, top: float, console: Console) -> Text:
    """Return a bar of a life: a decade is a sixth of the width, below the top that is the reference."""
    if life is None or life <= 0:
        return Text("-")
    mark = "#" if is_plain(console) else "\N{BLACK SQUARE}"
    decades = max(0.0, _DECADES + math.log10(life / top))
    return Text(mark * max(1, min(_BAR, round(decades / _DECADES * _BAR))))


def plain_table(*headings: str) -> Table:
    """Return a table without lines whose first column is words and whose others are figures."""
    table = Table(box=None, pad_edge=False, padding=(0, 2, 0, 0))
    for i, heading in enumerate(headings):
        table.add_column(heading, justify="left" if i == 0 else "right", no_wrap=True)
    return table
