"""The command `swap`: another lubricant in one position, many candidates, or a whole plant."""

from __future__ import annotations

import os
from enum import StrEnum
from typing import Annotated

import typer

from lubecheck.errors import CaseError, Fault
from lubecheck.faces.options import LubricantsOption, Units, UnitsOption, console, own_lubricants

EPILOG = (
    "Example: lubecheck swap examples/swap/slow_fan.toml --to lithium-complex-pao-220-2-ep. "
    "Exit codes: those of the best candidate's verdict, as for check; of several cases 1 where a position holds out."
)


class Kind(StrEnum):
    """Kinds of lubricant."""

    GREASE = "grease"
    OIL = "oil"


def swap(
    cases: Annotated[
        list[str],
        typer.Argument(metavar="CASE...", help="A case file, - for standard input; several or a folder: a plant."),
    ],
    to: Annotated[
        list[str] | None,
        typer.Option(
            metavar="LUBRICANT",
            help='A name of the tables, a designation or figures ("nu_40=110 mm^2/s, nu_100=12 mm^2/s, ..."); '
            "may stand several times.",
        ),
    ] = None,
    every: Annotated[bool, typer.Option("--all", help="Try every lubricant of the tables (see --kind).")] = False,
    kind: Annotated[Kind | None, typer.Option(help="With --all: greases or oils; left out, what the case has.")] = None,
    lubricants: LubricantsOption = None,
    displaces: Annotated[
        float | None,
        typer.Option(min=0.01, max=1.0, help="Share of the old grease that each regreasing takes out, such as 0.3."),
    ] = None,
    cleaned: Annotated[bool, typer.Option("--cleaned", help="The old lubricant is taken out wholly before.")] = False,
    json: Annotated[bool, typer.Option("--json", help="Print the result as JSON.")] = False,
    units: UnitsOption = Units.SI,
) -> None:
    """Tell whether another lubricant may take the place of the one a position has, and how to change over."""
    from lubecheck.data import lubricants as tables
    from lubecheck.faces.options import BEYOND, WITHIN_OR_NEAR, exit_code
    from lubecheck.model.reader import load_case

    paths = _case_paths(cases)
    own = own_lubricants(lubricants)
    loaded = {path: load_case(path, own=own) for path in paths}
    wanted = list(to or ())
    if every:
        kinds = {kind.value} if kind is not None else {case.lubricant.kind for case in loaded.values()}
        wanted += [one.key for one in own if one.kind in kinds]
        wanted += [name for one in sorted(kinds) for name in tables.names(one) if name not in wanted]
    if not wanted:
        raise typer.BadParameter("name at least one lubricant with --to, or --all")
    if len(loaded) > 1:
        from lubecheck.studies.plant import plant

        made = plant(loaded, wanted, own=own)
        if json:
            from lubecheck.faces.swap_record import to_json

            typer.echo(to_json(made))
        else:
            from lubecheck.faces.swap_terminal import print_plant

            print_plant(made, console())
        raise typer.Exit(BEYOND if made.hold_outs else WITHIN_OR_NEAR)
    from lubecheck.studies.swap import swaps

    found = swaps(loaded[paths[0]], wanted, own=own, displaced=displaces, is_cleaned=cleaned)
    if json:
        from lubecheck.faces.swap_record import to_json

        typer.echo(to_json(found))
    else:
        from lubecheck.faces.swap_terminal import print_swaps

        print_swaps(found, console(), units.value)
    raise typer.Exit(exit_code(found.verdict))


def _case_paths(given: list[str]) -> list[str]:
    """Return the case files that are named, those of a folder in the order of their names.

    Raises CaseError for a folder without any.
    """
    paths: list[str] = []
    for path in given:
        if not os.path.isdir(path):
            paths.append(path)
            continue
        inside = sorted(entry.path for entry in os.scandir(path) if entry.name.endswith(".toml"))
        if not inside:
            raise CaseError([Fault("(folder)", "no .toml file in it", "a folder of case files", where=path)])
        paths += inside
    return list(dict.fromkeys(paths))
