"""The commands. Results go to standard output, messages to standard error."""

from __future__ import annotations

from datetime import datetime
from enum import StrEnum
from pathlib import Path
from typing import Annotated

import typer

from lubecheck import __version__
from lubecheck.faces.fluids_command import EPILOG as FLUIDS_EPILOG
from lubecheck.faces.fluids_command import fluids
from lubecheck.faces.options import (
    BEYOND,
    GRAVITY,
    UNKNOWN,
    WITHIN_OR_NEAR,
    LubricantsOption,
    Units,
    UnitsOption,
    console,
    exit_code,
    own_lubricants,
)
from lubecheck.faces.swap_command import EPILOG as SWAP_EPILOG
from lubecheck.faces.swap_command import swap

app = typer.Typer(
    name="lubecheck",
    help="Decide whether a rolling bearing's lubricant, its amount and its interval keep the bearing inside its film "
    "and temperature limits, what fatigue life is left, and what goes on the maintenance plan.",
    epilog="Example: lubecheck check examples/new_motor.toml",
    no_args_is_help=True,
    pretty_exceptions_enable=False,
    context_settings={"help_option_names": ["-h", "--help"]},
)


class Route(StrEnum):
    """Rhythms of a lubrication route."""

    WEEKLY = "weekly"
    MONTHLY = "monthly"
    QUARTERLY = "quarterly"


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
    losses: Annotated[
        bool, typer.Option("--losses", help="Print the loss account of the fatigue life too (JSON always has it).")
    ] = False,
    warmup: Annotated[
        bool, typer.Option("--warmup", help="Follow starts, regreasing and a cold start too, and judge their peaks.")
    ] = False,
    hold: Annotated[
        str | None,
        typer.Option(
            metavar="TEMPERATURE",
            help="Tell what draught, housing area, oil flow or fill alone holds a temperature such as '70 degC', or "
            "'limit' for the highest that the case allows. Told unasked where heat brings a limit near or beyond.",
        ),
    ] = None,
) -> None:
    """Judge one bearing position: film, temperature, fill, interval, speed, loads and life, solved together."""
    from lubecheck.data import air
    from lubecheck.model.reader import load_case
    from lubecheck.studies.remedies import check as judge

    result = judge(
        load_case(case, own=own_lubricants(lubricants)),
        warm_up=warmup,
        air_properties=air.exact if exact_fluids else air.properties,
        hold=hold,
    )
    if json:
        from lubecheck.faces.record import to_json

        typer.echo(to_json(result))
    else:
        from lubecheck.faces.terminal import print_result

        print_result(result, console(), units.value, losses=losses)
    raise typer.Exit(exit_code(result.verdict, fail_on.value))


@app.command(
    epilog="Example: lubecheck plan examples/new_motor.toml examples/slow_roller.toml --route monthly --to plan.xlsx. "
    "Exit codes: as check, for the worst position; nothing is written when a case is refused."
)
def plan(
    cases: Annotated[list[str], typer.Argument(metavar="CASE...", help="Case files in TOML; one may be - for stdin.")],
    to: Annotated[
        Path | None, typer.Option("--to", help="Write the plan: a name that ends in .csv, .xlsx, .ics or .md.")
    ] = None,
    json: Annotated[bool, typer.Option("--json", help="Print the plan as JSON.")] = False,
    start: Annotated[
        datetime | None, typer.Option("--from", formats=["%Y-%m-%d"], help="Day the plan begins; today if not given.")
    ] = None,
    route: Annotated[
        Route | None,
        typer.Option(
            help="Fit intervals to the rhythm of a route, rounded down, never up: weekly is 7 days, monthly 28, "
            "quarterly 91, so that each round falls on the same weekday."
        ),
    ] = None,
    stagger: Annotated[bool, typer.Option("--stagger", help="Spread first due dates, by moving some earlier.")] = False,
    units: UnitsOption = Units.SI,
    fail_on: Annotated[FailOn, typer.Option(help="The mildest state that gives exit code 1.")] = FailOn.BEYOND,
    lubricants: LubricantsOption = None,
) -> None:
    """Make the maintenance plan of one or many positions: grease, amount, strokes, interval, next due, steps."""
    from datetime import date

    from lubecheck.errors import CaseError, Fault, InputError
    from lubecheck.faces import plan as face
    from lubecheck.model.check import check as judge
    from lubecheck.model.reader import load_case
    from lubecheck.model.schedule import schedule
    from lubecheck.studies.calibrate import calibrated
    from lubecheck.studies.warmup import waited

    if to is not None:
        face.maker(to)  # a bad name is refused before anything is worked out
    faults: list[Fault] = []
    read = []
    own = own_lubricants(lubricants)
    for case in cases:
        try:
            read.append(load_case(case, own=own))
        except InputError as refused:
            faults += refused.faults
    if faults:
        raise CaseError(faults)
    fitted = [calibrated(case) for case in read]
    results = [waited(case, judge(case)) for case in fitted]
    first = date.today() if start is None else start.date()
    rows = schedule(results, first, None if route is None else route.value, is_staggered=stagger)
    if to is not None:
        face.write(rows, to, first)
        typer.echo(f"lubecheck: wrote {len(rows)} lines to {to}", err=True)
    if json:
        typer.echo(face.to_json(rows))
    elif to is None:
        face.print_plan(rows, console(), units.value)
    raise typer.Exit(max((exit_code(result.verdict, fail_on.value) for result in results), key=GRAVITY.index))


@app.command(
    epilog="Example: lubecheck circuit examples/gearbox/circuit.toml. Exit codes: those of check, for the oil as it is."
)
def circuit(
    file: Annotated[str, typer.Argument(metavar="FILE", help="A circuit file in TOML, or - for standard input.")],
    json: Annotated[bool, typer.Option("--json", help="Print the result as JSON.")] = False,
    units: Annotated[Units, typer.Option(help="Units of the terminal; JSON keeps SI-derived units.")] = Units.SI,
) -> None:
    """Tell what the debris of one bearing does to all others in its oil, and what a filter is worth, in hours."""
    from lubecheck.faces.life import circuit_json, print_circuit
    from lubecheck.model.circuit import load_circuit
    from lubecheck.studies.circuit import study

    result = study(load_circuit(file))
    if json:
        typer.echo(circuit_json(result))
    else:
        print_circuit(result, console(), units.value)
    raise typer.Exit(exit_code(result.verdict))


@app.command(
    epilog='Example: lubecheck life examples/oil_bath_pump.toml --wanted "60000 h". '
    "Exit codes: 0 the life is reached, 1 it is not, 2 the input was refused, 3 it is not known."
)
def life(
    case: Annotated[str, typer.Argument(metavar="CASE", help="A case file in TOML, or - for standard input.")],
    wanted: Annotated[str, typer.Option(help="The wanted life, in place of the case's own.")] = "",
    json: Annotated[bool, typer.Option("--json", help="Print the result as JSON.")] = False,
    units: Annotated[Units, typer.Option(help="Units of the terminal; JSON keeps SI-derived units.")] = Units.SI,
) -> None:
    """Tell which load, rating, oil or cleanliness alone would reach the wanted fatigue life."""
    from lubecheck.faces.life import print_wanted, wanted_json
    from lubecheck.model.reader import load_case, read_life
    from lubecheck.studies.wanted import study

    result = study(load_case(case), read_life(wanted) if wanted else None)
    if json:
        typer.echo(wanted_json(result))
    else:
        print_wanted(result, console(), units.value)
    if result.life_h is None:
        raise typer.Exit(UNKNOWN)
    raise typer.Exit(WITHIN_OR_NEAR if result.life_h >= result.wanted_life_h else BEYOND)


@app.command(
    epilog="Example: lubecheck system examples/new_motor.toml examples/slow_roller.toml. "
    "Exit codes: 0 known, 2 the input was refused, 3 one of the lives is not known."
)
def system(
    cases: Annotated[list[str], typer.Argument(metavar="CASE...", help="The case files of one machine's bearings.")],
    json: Annotated[bool, typer.Option("--json", help="Print the result as JSON.")] = False,
) -> None:
    """Tell the fatigue life of a machine: of all its bearings together, and which one brings the risk."""
    from lubecheck.faces.life import print_system, system_json
    from lubecheck.model.reader import load_case
    from lubecheck.studies.system import study

    result = study([load_case(case) for case in cases])
    if json:
        typer.echo(system_json(result))
    else:
        print_system(result, console())
    raise typer.Exit(UNKNOWN if result.life_h is None else WITHIN_OR_NEAR)


app.command(epilog=SWAP_EPILOG)(swap)
app.command(epilog=FLUIDS_EPILOG)(fluids)


@app.command(
    epilog='Example: lubecheck bearings 6309 22218 "NU 310". Without a designation: the families, or with --family the '
    "sizes of one. A case file stands for its bearing. Exit codes: 0 shown, 2 a designation was not found."
)
def bearings(
    designations: Annotated[
        list[str] | None,
        typer.Argument(metavar="[DESIGNATION]...", help="Designations, or case files in TOML (- for standard input)."),
    ] = None,
    family: Annotated[str, typer.Option(help="List the sizes of this family.")] = "",
    json: Annotated[bool, typer.Option("--json", help="Print as JSON.")] = False,
    units: Annotated[Units, typer.Option(help="Units of the terminal; JSON keeps SI-derived units.")] = Units.SI,
) -> None:
    """Show bearings: dimensions, ratings, limits, free volume, usual fill, and where each figure comes from."""
    from lubecheck.errors import Fault, InputError, shown
    from lubecheck.faces import bearing_list
    from lubecheck.model import bearing_sheet

    if designations and family:
        raise InputError([Fault("--family", shown(family), "no --family beside designations, which say it")])
    if not designations:
        if family:
            listed = bearing_sheet.listing(family)
            if json:
                typer.echo(bearing_list.record(listed=listed))
            else:
                bearing_list.print_listing(listed, console(), units.value)
        elif json:
            typer.echo(bearing_list.record(families=bearing_sheet.families()))
        else:
            bearing_list.print_families(bearing_sheet.families(), console())
        return
    found: list[bearing_sheet.BearingSheet] = []
    faults: list[Fault] = []
    for text in designations:
        try:
            found.append(bearing_sheet.named(text))
        except InputError as refused:
            faults += refused.faults
    if json:
        typer.echo(bearing_list.record(found))
    else:
        bearing_list.print_sheets(found, console(), units.value)
    if faults:
        raise InputError(faults)
