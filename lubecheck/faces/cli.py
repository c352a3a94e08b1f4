"""The commands. Results go to standard output, messages to standard error."""

from __future__ import annotations

from enum import StrEnum
from typing import Annotated

import typer

from lubecheck import __version__
from lubecheck.faces.fluids_command import EPILOG as FLUIDS_EPILOG
from lubecheck.faces.fluids_command import fluids
from lubecheck.faces.options import LubricantsOption, Units, UnitsOption, console, own_lubricants
from lubecheck.faces.swap_command import EPILOG as SWAP_EPILOG
from lubecheck.faces.swap_command import swap

WITHIN_OR_NEAR, BEYOND, REFUSED, UNKNOWN = range(4)  # exit codes

app = typer.Typer(
    name="lubecheck",
    help="Decide whether a rolling bearing's lubricant, its amount and its interval keep the bearing inside its film "
    "and temperature limits, what fatigue life is left, and what goes on the maintenance plan.",
    epilog="Example: lubecheck check examples/new_motor.toml",
    no_args_is_help=True,
    pretty_exceptions_enable=False,
    context_settings={"help_option_names": ["-h", "--help"]},
)


class FailOn(StrEnum):
    """The mildest state that makes the exit code 1."""

    BEYOND = "beyond"
    NEAR = "near"


def _version(is_asked: bool) -> None:
    if is_asked:
        typer.echo(f"lubecheck {__version__}")
        raise typer.Exit


@app.callback()
def _main(
    version: Annotated[
        bool, typer.Option("--version", callback=_version, is_eager=True, help="Print the version and stop.")
    ] = False,
) -> None:
    """Hold the commands together: with this callback a single command keeps its name."""


@app.command(
    epilog="Example: lubecheck check examples/new_motor.toml --units inch. "
    "Exit codes: 0 within or near, 1 beyond, 2 the input was refused, 3 unknown and nothing beyond."
)
def check(
    case: Annotated[str, typer.Argument(metavar="CASE", help="A case file in TOML, or - for standard input.")],
    json: Annotated[bool, typer.Option("--json", help="Print the result as JSON.")] = False,
    units: UnitsOption = Units.SI,
    lubricants: LubricantsOption = None,
    fail_on: Annotated[FailOn, typer.Option(help="The mildest state that gives exit code 1.")] = FailOn.BEYOND,
    exact_fluids: Annotated[
        bool, typer.Option("--exact-fluids", help="Ask CoolProp for air instead of the table (slower).")
    ] = False,
) -> None:
    """Judge one bearing position: film, temperature, fill, interval, speed, loads and life, solved together."""
    from lubecheck.data import air
    from lubecheck.model.reader import load_case
    from lubecheck.studies.remedies import check as judge

    result = judge(
        load_case(case, own=own_lubricants(lubricants)), air_properties=air.exact if exact_fluids else air.properties
    )
    if json:
        from lubecheck.faces.record import to_json

        typer.echo(to_json(result))
    else:
        from lubecheck.faces.terminal import print_result

        print_result(result, console(), units.value)
    raise typer.Exit(exit_code(result.verdict, fail_on.value))


app.command(epilog=SWAP_EPILOG)(swap)
app.command(epilog=FLUIDS_EPILOG)(fluids)


def exit_code(verdict: str, fail_on: str = "beyond") -> int:
    """Return the exit code of a verdict.

    >>> [exit_code(state) for state in ("within", "near", "beyond", "unknown")], exit_code("near", "near")
    ([0, 0, 1, 3], 1)
    """
    if verdict == fail_on:
        return BEYOND
    return {"within": WITHIN_OR_NEAR, "near": WITHIN_OR_NEAR, "beyond": BEYOND, "unknown": UNKNOWN}[verdict]
