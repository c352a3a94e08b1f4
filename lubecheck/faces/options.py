"""What the commands share: exit codes, unit systems, the user's own lubricants, and the console that results go to."""

from __future__ import annotations

import os
import sys
from enum import StrEnum
from typing import TYPE_CHECKING, Annotated

import typer

if TYPE_CHECKING:
    from rich.console import Console

    from lubecheck.data.lubricant import Lubricant


WITHIN_OR_NEAR, BEYOND, REFUSED, UNKNOWN = range(4)  # exit codes
GRAVITY = (WITHIN_OR_NEAR, UNKNOWN, BEYOND)  # in rising order, for the worst of several positions


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


def exit_code(verdict: str, fail_on: str = "beyond") -> int:
    """Return the exit code of a verdict.

    >>> [exit_code(state) for state in ("within", "near", "beyond", "unknown")], exit_code("near", "near")
    ([0, 0, 1, 3], 1)
    """
    if verdict == fail_on:
        return BEYOND
    return {"within": WITHIN_OR_NEAR, "near": WITHIN_OR_NEAR, "beyond": BEYOND, "unknown": UNKNOWN}[verdict]
