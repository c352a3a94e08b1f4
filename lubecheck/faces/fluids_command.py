"""The command `fluids`: lubricants listed, shown, compared and added."""

from __future__ import annotations

from pathlib import Path
from typing import TYPE_CHECKING, Annotated

import typer

from lubecheck.errors import Fault, InputError, shown
from lubecheck.faces.options import LubricantsOption, Units, UnitsOption, console, own_lubricants

if TYPE_CHECKING:
    from lubecheck.data.lubricant import Lubricant
    from lubecheck.faces.fluids import Need

EPILOG = (
    "Examples: lubecheck fluids --kind grease --thickener polyurea --nu40 100..150 --up-to 140degC; "
    "lubecheck fluids mineral-vg-68 pao-vg-68 --at 60degC --for examples/oil_bath_pump.toml; "
    "lubecheck fluids motor-grease --add ours.toml --kind grease --thickener polyurea --nlgi 2 --nu40 110 "
    "--set index=95"
)
_MOST = 12  # lubricants on one chart: more lines cannot be told apart


def fluids(
    names: Annotated[
        list[str] | None,
        typer.Argument(
            metavar="[NAME]...",
            show_default=False,
            help="A lubricant to show, or several to compare; with --add the key of the new one.",
        ),
    ] = None,
    kind: Annotated[str | None, typer.Option(help="Only greases, or only oils.", metavar="grease|oil")] = None,
    thickener: Annotated[str | None, typer.Option(metavar="WORD", help="Only greases of this thickener.")] = None,
    base_oil: Annotated[str | None, typer.Option(metavar="WORD", help="Only this kind of (base) oil.")] = None,
    nlgi: Annotated[str | None, typer.Option(metavar="GRADE", help="Only greases of this consistency.")] = None,
    ep: Annotated[bool | None, typer.Option("--ep/--no-ep", help="Only with, or without, EP additives.")] = None,
    nu40: Annotated[
        str | None, typer.Option(metavar="LOW..HIGH", help="Only with this viscosity at 40 degC, in mm^2/s.")
    ] = None,
    up_to: Annotated[str | None, typer.Option(metavar="TEMP", help="Only those used up to it: 140degC.")] = None,
    down_to: Annotated[str | None, typer.Option(metavar="TEMP", help="Only those used down to it: -30degC.")] = None,
    at: Annotated[list[str] | None, typer.Option(metavar="TEMP", help="Viscosity at it; may be repeated.")] = None,
    for_case: Annotated[
        str | None,
        typer.Option("--for", metavar="CASE", help="Rule in the viscosity that this case needs (kappa 1)."),
    ] = None,
    lubricants: LubricantsOption = None,
    add: Annotated[
        str | None,
        typer.Option(metavar="FILE", help="Add a lubricant to this file (TOML or CSV); without flags, it asks."),
    ] = None,
    facts: Annotated[
        list[str] | None,
        typer.Option("--set", metavar="FIELD=VALUE", help="With --add: any field, such as index=95; may be repeated."),
    ] = None,
    json: Annotated[bool, typer.Option("--json", help="Print lubricants as JSON.")] = False,
    units: UnitsOption = Units.SI,
) -> None:
    """List generic and your own lubricants, show or compare them with a viscosity chart, or add one of your own."""
    names = names or []
    asked = {"kind": kind, "thickener": thickener, "base_oil": base_oil, "nlgi": nlgi, "nu_40": nu40, "up_to": up_to,
             "down_to": down_to}  # fmt: skip
    if add is not None:
        if at or for_case is not None or len(names) > 1:
            given = "--at" if at else "--for" if for_case is not None else " ".join(names)
            raise InputError([Fault("--add", given, "one name, the key of the new lubricant, and what it is")])
        _print_added(_added(Path(add), names, asked, ep, facts or []), add, json=json)
        return
    if facts:
        raise InputError([Fault("--set", shown(facts[0]), "no such option without --add")])
    is_filtered = ep is not None or any(text is not None for text in asked.values())
    if names and is_filtered:
        raise InputError([Fault("NAME", shown(names[0]), "either names or filters")])
    temperatures = _temperatures(at or [])
    own = own_lubricants(lubricants)
    need, of_case = (None, None) if for_case is None else _need(for_case, own, units.value)
    if names:
        _print_sheet(_by_name(names, own), own, temperatures, need, json=json, system=units.value)
    elif of_case is not None and not is_filtered:
        _print_sheet((of_case,), own, temperatures, need, json=json, system=units.value)
    else:
        _print_list(asked, ep, own, temperatures, need, json=json, system=units.value)


def _print_list(
    asked: dict[str, str | None],
    ep: bool | None,
    own: tuple[Lubricant, ...],
    temperatures: tuple[float, ...],
    need: Need | None,
    *,
    json: bool,
    system: str,
) -> None:
    from lubecheck.data import lubricants
    from lubecheck.data.lubricant_choice import read_wanted, relaxed, select

    try:
        wanted = read_wanted(asked, ep=ep)
    except InputError as refused:
        raise _by_option(refused) from None
    keys = frozenset(one.key for one in own)
    every = (*own, *(one for one in lubricants.table().values() if one.key not in keys))
    found = select(every, wanted)
    if json:
        _print_json(found, own, temperatures, need)
        return
    from lubecheck.faces import fluids as printing

    if found:
        printing.print_list(found, keys, console(), system, temperatures, need)
    else:
        printing.print_none(relaxed(every, wanted), console())


def _print_sheet(
    found: tuple[Lubricant, ...],
    own: tuple[Lubricant, ...],
    temperatures: tuple[float, ...],
    need: Need | None,
    *,
    json: bool,
    system: str,
) -> None:
    if json:
        _print_json(found, own, temperatures, need)
        return
    from lubecheck.data.lubricant_sheet import temperatures as usual
    from lubecheck.faces import fluids as printing

    shown_at = temperatures or usual(found)
    if len(found) == 1:
        printing.print_one(found[0], shown_at, console(), system, need)
    else:
        printing.print_several(found, shown_at, console(), system, need)


def _print_json(
    found: tuple[Lubricant, ...], own: tuple[Lubricant, ...], temperatures: tuple[float, ...], need: Need | None
) -> None:
    from lubecheck.faces.fluids_record import to_json

    keys = frozenset(one.key for one in own)
    required = None if need is None else need.required
    typer.echo(to_json(found, own=keys, temperatures=temperatures or None, required=required))


def _print_added(one: Lubricant, path: str, *, json: bool) -> None:
    if json:
        _print_json((one,), (one,), (), None)
        return
    from lubecheck.faces import fluids as printing

    printing.print_added(one, path, console())


def _by_name(names: list[str], own: tuple[Lubricant, ...]) -> tuple[Lubricant, ...]:
    """Return the lubricants of some names, every unknown one told at once."""
    from lubecheck.data import lubricants

    if len(names) > _MOST:
        raise InputError([Fault("NAME", f"{len(names)} names", f"at most {_MOST} lubricants on one chart")])
    found: list[Lubricant] = []
    faults: list[Fault] = []
    for name in dict.fromkeys(names):
        try:
            found.append(lubricants.find(name, own))
        except InputError as refused:
            faults += refused.faults
    if faults:
        raise InputError(faults)
    return tuple(found)


def _temperatures(texts: list[str]) -> tuple[float, ...]:
    from lubecheck.data.lubricant_sheet import GREATEST, LEAST
    from lubecheck.units import KINDS, UnreadableText, read_text

    found: list[float] = []
    faults: list[Fault] = []
    for text in texts:
        try:
            value = read_text(text, KINDS["temperature"])
        except UnreadableText as refused:
            faults.append(Fault("--at", shown(text), refused.expected, nearest=refused.near))
            continue
        if not LEAST <= value <= GREATEST:
            faults.append(Fault("--at", shown(text), f"{LEAST:g} to {GREATEST:g} degC (ASTM D341)"))
        found.append(value)
    if faults:
        raise InputError(faults)
    return tuple(dict.fromkeys(found))


def _need(path: str, own: tuple[Lubricant, ...], system: str) -> tuple[Need, Lubricant]:
    """Return the viscosity that a case needs, and its lubricant."""
    from lubecheck.faces.display import figure
    from lubecheck.faces.fluids import Need
    from lubecheck.model.reader import load_case
    from lubecheck.model.required import required_viscosity

    case = load_case(path, own=own)
    required = required_viscosity(case)
    bearing = case.bearing.designation or f"the {case.bearing.family} bearing"
    words = f"{figure(required.nu, 'mm^2/s', system)}, which {bearing} needs at {figure(required.speed, 'rpm', system)}"
    return Need(required, words + (", its slowest duty point" if required.is_of_several else "")), case.lubricant


def _added(path: Path, names: list[str], asked: dict[str, str | None], ep: bool | None, facts: list[str]) -> Lubricant:
    """Write a lubricant of flags, or of answers where there are none, to a user's file."""
    from lubecheck.data.lubricant_writing import add

    given = _flags(asked, ep, facts)
    if names:
        given = {"key": names[0]} | given
    if not given.keys() - {"key"}:
        from lubecheck.faces.fluids_add import ask

        given = ask(given.get("key"))
    return add(path, given)


def _flags(asked: dict[str, str | None], ep: bool | None, facts: list[str]) -> dict[str, str]:
    """Return what the flags of --add say, by field."""
    fields = {"up_to": "highest", "down_to": "lowest"}
    given = {fields.get(name, name): text for name, text in asked.items() if text is not None}
    if given.get("nu_40", "").replace(".", "", 1).isdigit():
        given["nu_40"] += " mm^2/s"  # as the filter of the same name reads it
    if ep is not None:
        given["ep"] = "yes" if ep else "no"
    faults = []
    for fact in facts:
        name, equals, value = fact.partition("=")
        name = name.strip()
        if not equals or not name or not value.strip():
            faults.append(Fault("--set", shown(fact), 'a field and its value, such as "nu_100=12 mm^2/s"'))
        elif name in given:
            faults.append(Fault("--set", shown(fact), f"{name} only once"))
        else:
            given[name] = value.strip()
    if faults:
        raise InputError(faults)
    return given


def _by_option(refused: InputError) -> InputError:
    """Return the faults of filters by the names of their options."""
    from dataclasses import replace

    from lubecheck.faces.fluids import option

    return InputError(replace(fault, key=f"--{option(fault.key)}") for fault in refused.faults)
