"""A shared oil circuit: several positions that one oil joins, described in a file of their own beside the cases."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from lubecheck.data.cleanliness import CODE_EXPECTED
from lubecheck.errors import CaseError, Fault, nearest, shown
from lubecheck.model.cleanliness import numbers_of
from lubecheck.model.entries import FILTERS, Case
from lubecheck.model.entry import entry_of
from lubecheck.model.reader import STANDARD_INPUT, file_text, load_case, parsed, read_table

MOST_POSITIONS = 200  # of one circuit: an engine or a large gearbox has tens; more is a slip


@dataclass(frozen=True, slots=True, kw_only=True)
class CircuitTable:
    """[circuit]: what all its positions have in common, and what debris and a filter do to it."""

    code: str = entry_of("fact", meaning="cleanliness of the oil as it is, by ISO 4406", example='"-/15/12"', need=True)
    filter: str | None = entry_of("fact", words=FILTERS, meaning="where the oil is filtered as it is")
    oil_temperature: float | None = entry_of(
        "fact", "temperature", -20, 200, meaning="temperature of the oil that all share", example='"62 degC"'
    )
    water: float | None = entry_of("fact", "share", 0, 1, meaning="water in the oil, by mass", example='"100 ppm"')
    damaged: str | None = entry_of("fact", meaning="file name of the position that sheds debris", example='"pinion"')
    debris_code: str | None = entry_of("fact", meaning="code with its debris in the oil", example='"-/21/18"')
    hours_with_debris: float | None = entry_of(
        "fact", "time", 0.1, 1e6, meaning="running time in that oil until it is filtered", example='"560 h"'
    )
    filtered_code: str | None = entry_of("decision", meaning="code that a filter brings it to", example='"-/15/12"')
    filtered_by: str | None = entry_of("decision", words=FILTERS[:2], meaning="where that filter stands")


@dataclass(frozen=True, slots=True)
class Member:
    """One position of a circuit."""

    name: str  # of its file, without the ending
    case: Case


@dataclass(frozen=True, slots=True)
class Circuit:
    """A circuit and its positions."""

    title: str
    table: CircuitTable
    members: tuple[Member, ...]


def load_circuit(path: str | Path) -> Circuit:
    """Read a circuit file and the cases it names, whose paths count from the file's own folder.

    Raises CaseError, which holds the faults found.
    """
    name = "standard input" if str(path) == STANDARD_INPUT else str(path)
    folder = Path() if str(path) == STANDARD_INPUT else Path(path).parent
    text = file_text(path, name)
    document = parsed(text, name)
    circuit = document.get("circuit")
    listed = circuit.get("cases") if isinstance(circuit, dict) else None
    faults = [
        Fault(key, shown(key), "title or [circuit]", where=name, nearest=nearest(key, ("title", "circuit")))
        for key in document
        if key not in ("title", "circuit")
    ]
    if not isinstance(document.get("title", ""), str):
        faults.append(Fault("title", shown(document["title"]), "a text", where=name))
    is_list = isinstance(listed, list) and all(isinstance(item, str) for item in listed)
    if not is_list or not 2 <= len(listed or ()) <= MOST_POSITIONS:
        expected = f'cases = ["a.toml", "b.toml"], 2 to {MOST_POSITIONS} case files'
        given = "nothing" if listed is None else shown(listed)
        faults.append(Fault("circuit.cases", given, expected, where=name))
        listed = []
    table, refused = read_table(_without_cases(document), text, name, "circuit", CircuitTable)
    faults += refused
    members = []
    for item in listed or ():
        try:
            members.append(Member(Path(item).stem, load_case(folder / item)))
        except CaseError as fault:
            faults += fault.faults
    if table is not None:
        faults += _contradictions(table, members, name)
    if faults or table is None:
        raise CaseError(faults)
    return Circuit(document.get("title", ""), table, tuple(members))


def _without_cases(document: Mapping[str, Any]) -> dict[str, Any]:
    circuit = document.get("circuit")
    if not isinstance(circuit, dict):
        return {key: value for key, value in document.items() if key == "circuit"}
    return {"circuit": {key: value for key, value in circuit.items() if key != "cases"}}


def _contradictions(table: CircuitTable, members: list[Member], name: str) -> list[Fault]:
    faults = []
    for key in ("code", "debris_code", "filtered_code"):
        code = getattr(table, key)
        if code is not None and numbers_of(code) is None:
            faults.append(Fault(f"circuit.{key}", shown(code), CODE_EXPECTED, where=name))
    names = [member.name for member in members]
    if table.damaged is not None and members and table.damaged not in names:
        near = nearest(table.damaged, names)
        faults.append(Fault("circuit.damaged", shown(table.damaged), f"one of {', '.join(names)}", name, nearest=near))
    if len(set(names)) < len(names):
        faults.append(Fault("circuit.cases", "one file name twice", "each position once, by a name of its own", name))
    if table.filtered_code is not None and table.debris_code is None:
        faults.append(Fault("circuit.filtered_code", "no debris_code", "the code with debris, which is filtered", name))
    if table.hours_with_debris is not None and table.debris_code is None:
        faults.append(Fault("circuit.hours_with_debris", "no debris_code", "the code with debris", name))
    oils = {(member.case.lubricant.nu_40, member.case.lubricant.nu_100) for member in members}
    greased = [member.name for member in members if member.case.is_grease]
    if greased:
        faults.append(Fault("circuit.cases", f"{', '.join(greased)} with grease", "positions with oil", name))
    elif len(oils) > 1:
        given = ", ".join(f"{member.name}: {member.case.lubricant.name}" for member in members)
        faults.append(Fault("circuit.cases", given, "one oil for all positions of a circuit", name))
    return faults
