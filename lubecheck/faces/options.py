"""What the commands share: their unit systems, the user's own lubricants, and the console that results go to."""

from __future__ import annotations

import os
import sys
from enum import StrEnum
from typing import TYPE_CHECKING, Annotated

import typer

if TYPE_CHECKING:
    from rich.console import Console

    from lubecheck.data.lubricant import Lubricant


class Units(StrEnum):
    """Unit systems of the terminal."""

    SI = "si"
    INCH = "inch"


UnitsOption = Annotated[Units, typer.Option(help="Units of the terminal; JSON keeps SI-derived units.")]
LubricantsOption = Annotated[
    str | None,
    typer.Option(
        "--lubricants",
        metavar="FILE",
        envvar="LUBECHECK_LUBRICANTS",
        help="Lubricants of your own, in TOML or CSV, found by name before the generic ones.",
    ),
]


def own_lubricants(path: str | None) -> tuple[Lubricant, ...]:
    """Return the lubricants of the user's own file; none without a file.

    Raises TableError with every fault in it.
    """
    if path is None:
        return ()
    from lubecheck.data import lubricants

    return tuple(lubricants.load(path).values())


def console() -> Console:
    """Return the console of standard output; NO_COLOR and CLICOLOR=0 turn colour off."""
    from rich.console import Console

    no_color = bool(os.environ.get("NO_COLOR")) or os.environ.get("CLICOLOR") == "0"
    return Console(file=sys.stdout, no_color=no_color or None, highlight=False, soft_wrap=False)
