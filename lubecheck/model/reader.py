"""The case reader: strict, and all faults at once.

TOML in, a `Case` out. Every dimensional value is a text with its unit. An unknown key, a wrong dimension, a value out
of range, a missing need, a contradiction: one fault each, with file, line, key, what was given, what is expected and
the nearest valid name; nothing is guessed and nothing is passed over.
"""

from __future__ import annotations

import dataclasses
import math
import re
import sys
import tomllib
from collections.abc import Iterable, Iterator, Mapping, Sequence
from dataclasses import dataclass, field
from pathlib import Path
from typing import Any, TypeVar

from lubecheck.data import bearings, coolants, lubricants
from lubecheck.data.bearings import Bearing
from lubecheck.data.lubricants import Lubricant
from lubecheck.data.oil_analysis import OilAnalysis, analyse
from lubecheck.errors import CaseError, Fault, InputError, nearest, shown
from lubecheck.model import conflicts, measured
from lubecheck.model.cleanliness import contradictions
from lubecheck.model.duty_entries import Duty, Shaft
from lubecheck.model.entries import TABLES, Case, Cleanliness, Requirements
from lubecheck.model.entry import Entry, entries
from lubecheck.model.measured_entries import Measured
from lubecheck.model.part_entries import BearingTable, LubricantTable
from lubecheck.model.place_entries import Housing, Surroundings
from lubecheck.model.plan_entries import GreasePlan, OilPlan
from lubecheck.model.shaft import Problem, duty_faults, faults, opposed_faults
from lubecheck.model.toml_lines import key_lines
from lubecheck.model.values import value_of
from lubecheck.physics import friction
from lubecheck.units import KINDS, UnreadableText, is_quantity, quantity_to_house

STANDARD_INPUT = "-"
_ANALYSED = ("measured_viscosity", "water", "iso_code")  # keys of [lubricant] that are of the oil in use
_KIND_OF_GREASE = ("thickener", "base_oil", "nlgi")  # keys of [lubricant] that make it another one
_MANY = ("measured", "duty")  # tables that there may be several of
MOST_MEASURED = 100  # temperatures of one case: a year of weekly readings is 52; more is a log, not a case
_LARGEST_FILE = 1_000_000  # bytes; a case is a page of text, so more is a slip of the hand

T = TypeVar("T")


def load_case(path: str | Path, *, own: Iterable[Lubricant] = ()) -> Case:
    """Read a case file; "-" reads standard input.

    own: lubricants of the user's own, such as `lubricants.load("ours.toml").values()`, found by name before the tables

    Raises CaseError, which holds every fault found.
    """
    name = "standard input" if str(path) == STANDARD_INPUT else str(path)
    return read_case(_file_bytes(path, name), name, own=own)


def file_text(path: str | Path, name: str) -> str:
    """Return the text of a file; "-" is standard input. Raises CaseError where it cannot be read."""
    return _decoded(_file_bytes(path, name), name)


def _file_bytes(path: str | Path, name: str) -> bytes:
    try:
        return sys.stdin.buffer.read() if str(path) == STANDARD_INPUT else Path(path).read_bytes()
    except IsADirectoryError:
        raise _whole_file(name, "a directory", "a case file in TOML") from None
    except FileNotFoundError:
        raise _whole_file(name, "no such file", "a case file in TOML, or - for standard input") from None
    except (OSError, ValueError) as refused:
        reason = refused.strerror if isinstance(refused, OSError) and refused.strerror else "not a file name"
        raise _whole_file(name, reason, "a readable case file in TOML") from None


def read_case(raw: bytes | str, name: str = "case", *, own: Iterable[Lubricant] = ()) -> Case:
    """Read the text of a case; `name` is how messages call it, `own` as in `load_case`.

    Raises CaseError, which holds every fault found.
    """
    text = _decoded(raw, name)
    document = parsed(text, name)
    reading = _Reading(name, key_lines(text), tuple(own))
    case = reading.case(document)
    if reading.faults or case is None:
        raise CaseError(sorted(reading.faults, key=lambda fault: fault.line or 0))
    return case


def parsed(text: str, name: str) -> dict[str, Any]:
    """Return the tables of a text in TOML. Raises CaseError where it is none."""
    try:
        return tomllib.loads(text)
    except tomllib.TOMLDecodeError as refused:
        raise CaseError([_toml_fault(str(refused), text, name)]) from None
    except RecursionError:
        raise _whole_file(name, "values nested too deeply", "a case file in TOML") from None


def read_table(
    document: Mapping[str, Any], text: str, name: str, key: str, table: type[T]
) -> tuple[T | None, list[Fault]]:
    """Read one table of another file by its entries: the table, or None, and what was refused."""
    reading = _Reading(name, key_lines(text))
    read = reading._table(document, key, table, is_need=True)
    return read, reading.faults


def read_life(text: str) -> float:
    """Return a wanted life in hours from its text. Raises CaseError where it is none."""
    entry = dict(entries(Requirements))["life"]
    try:
        return float(value_of(text, entry))
    except UnreadableText as refused:
        raise CaseError([Fault("life", shown(text), refused.expected, nearest=refused.near)]) from None


def read_hold(value: object) -> float | None:
    """Return a temperature to hold in degC, of a text or a quantity; None for "limit", the highest that a case allows.

    Raises CaseError for anything else.
    """
    if isinstance(value, str) and value.strip().casefold() == "limit":
        return None
    entry = dict(entries(Requirements))["highest_temperature"]
    try:
        return _temperature(value, entry) if is_quantity(value) else float(value_of(value, entry))
    except UnreadableText as refused:
        expected = f'{entry.expected}, or "limit" for the highest that the case allows'
        raise CaseError([Fault("hold", shown(value), expected, nearest=refused.near)]) from None


def _temperature(value: object, entry: Entry) -> float:
    """Return a quantity in degC; UnreadableText where it is no single temperature in the range of the entry."""
    found = quantity_to_house(value, KINDS["temperature"])
    if found.ndim or not entry.low <= found <= entry.high:
        raise UnreadableText(entry.expected)
    return float(found)


def _whole_file(name: str, given: str, expected: str, line: int | None = None) -> CaseError:
    return CaseError([Fault("(whole file)", given, expected, where=name, line=line)])


def _decoded(raw: bytes | str, name: str) -> str:
    if len(raw) > _LARGEST_FILE:
        raise _whole_file(name, f"{len(raw)} bytes", f"a case file of at most {_LARGEST_FILE} bytes")
    try:
        text = raw if isinstance(raw, str) else raw.decode("utf-8-sig")
    except UnicodeDecodeError as refused:
        line = raw[: refused.start].count(b"\n") + 1 if isinstance(raw, bytes) else None
        given = f"byte 0x{refused.object[refused.start]:02x} at position {refused.start}"
        raise _whole_file(name, given, "text in UTF-8", line) from None
    if not text.strip():
        raise _whole_file(name, "an empty file", "a case with [bearing], [lubricant], [[duty]] and [surroundings]")
    return text


def _toml_fault(message: str, text: str, name: str) -> Fault:
    place = re.search(r"\(at line (\d+), column \d+\)", message)
    reason = message[: place.start()].strip() if place else message
    lines = text.splitlines()
    number = min(int(place[1]), len(lines)) if place else len(lines)
    content = lines[number - 1].strip() if lines else ""
    key = content.partition("=")[0].strip(" []\"'") or "(whole file)"
    if content.startswith("[") and key in _MANY and reason.startswith(("Cannot overwrite", "Cannot declare")):
        expected = f"several of them as [[{key}]], each one: write both as [[{key}]]"
        return Fault(key, shown(content), expected, where=name, line=number)
    return Fault(key[:40], shown(content), f'TOML, such as key = "45 mm" ({reason})', where=name, line=number)


@dataclass
class _Reading:
    """One reading of one document: collects the faults on the way."""

    name: str
    lines: Mapping[tuple[str | int, ...], int]
    own: tuple[Lubricant, ...] = ()
    faults: list[Fault] = field(default_factory=list)
    given: list[tuple[str, str]] = field(default_factory=list)

    def fault(
        self, path: tuple[str | int, ...], given: object, expected: str, near: str | None = None, *, plain: bool = False
    ) -> None:
        """Note one fault at a key; `plain` given text is already words and is not quoted."""
        line = self.lines.get(path) or self.lines.get(path[:-1])
        text = str(given) if plain else shown(given)
        self.faults.append(Fault(_dotted(path), text, expected, where=self.name, line=line, nearest=near))

    def case(self, document: Mapping[str, Any]) -> Case | None:
        """Read the whole document; None where a part that everything else needs was refused."""
        for key in document:
            if key not in TABLES and key not in ("title", "note"):
                known = [*TABLES, "title", "note"]
                self.fault((key,), key, f"one of {', '.join(known)}", nearest(key, known))
        title, note = (self._text(document, key) for key in ("title", "note"))
        bearing = self._bearing(self._table(document, "bearing", BearingTable, is_need=True))
        lubricant_table = self._table(document, "lubricant", LubricantTable, is_need=True)
        lubricant = self._lubricant(lubricant_table)
        analysis = self._analysis(lubricant_table, lubricant)
        duty = self._duty(document)
        surroundings = self._table(document, "surroundings", Surroundings, is_need=True)
        shaft = self._table(document, "shaft", Shaft) or Shaft()
        opposed = self._opposed(shaft, bearing)
        before = len(self.faults)
        self._problems(faults(shaft, duty, surroundings))
        if bearing is not None and (opposed is not None or shaft.opposed is None):
            self._problems(opposed_faults(shaft, duty, bearing, opposed))
        is_whole = len(self.faults) == before and (opposed is not None or shaft.opposed is None)
        housing = self._table(document, "housing", Housing) or Housing()
        grease = self._table(document, "grease", GreasePlan) or GreasePlan()
        oil = self._table(document, "oil", OilPlan) or OilPlan()
        cleanliness = self._table(document, "cleanliness", Cleanliness) or Cleanliness()
        limits = self._table(document, "limits", Requirements) or Requirements()
        temperatures = self._measured(document)
        self._problems(conflicts.of_place(housing, duty, surroundings))
        self._problems(conflicts.of_stream(oil))
        self._problems(conflicts.of_set_points(limits, surroundings))
        self._coolant(housing)
        if grease.given is not None and grease.given.kind == "strokes" and grease.stroke is None:
            self.fault(("grease", "stroke"), "nothing", 'a weighed stroke such as "1.2 g", as strokes were given',
                       plain=True)  # fmt: skip
        if lubricant is not None:
            unused = "oil" if lubricant.kind == "grease" else "grease"
            if unused in document:
                self.fault(
                    (unused,), f"[{unused}]", f"no [{unused}] table: the lubricant is {lubricant.kind}", plain=True
                )
            if surroundings is not None and isinstance(cleanliness.setting, str):
                self._problems(conflicts.of_setting(cleanliness.setting, lubricant, oil))
            if lubricant.kind == "oil":
                self._problems(conflicts.of_still_oil(oil))
            if analysis is not None and analysis.code is not None and oil.supply == "mist":
                self.fault(
                    ("lubricant", "iso_code"), str(analysis.code), "no such key for mist: ISO 281 has no setting"
                )
            for key, given, expected in contradictions(cleanliness, is_grease=lubricant.kind == "grease"):
                self.fault(("cleanliness", key), given, expected, plain=True)
        if bearing is None or lubricant is None or not duty or surroundings is None or not is_whole:
            return None
        case = Case(
            title=title, note=note, bearing=bearing, lubricant=analysis.used if analysis else lubricant, duty=duty,
            surroundings=surroundings, shaft=shaft, opposed=opposed, housing=housing, grease=grease, oil=oil,
            cleanliness=cleanliness, limits=limits, measured=temperatures, analysis=analysis, given=tuple(self.given),
        )  # fmt: skip
        self._problems(duty_faults(case))
        if not any(fault.key.startswith("measured") for fault in self.faults):
            self._problems(measured.faults(case, is_list=isinstance(document.get("measured"), list)))
        return case

    def _problems(self, problems: Iterator[Problem]) -> None:
        """Note what is wrong between keys, once each: keys of [shaft] hold for all duty points."""
        for path, given, expected in dict.fromkeys(problems):
            self.fault(path, given, expected, plain=True)

    def _opposed(self, shaft: Shaft, bearing: Bearing | None) -> Bearing | None:
        """Find the bearing that [shaft] opposed names."""
        if shaft.opposed is None:
            return None
        if shaft.opposed.casefold() == "same":
            return bearing
        try:
            return bearings.find(shaft.opposed)
        except InputError as refused:
            self.faults += [
                dataclasses.replace(
                    fault, key="shaft.opposed", where=self.name, line=self.lines.get(("shaft", "opposed"))
                )
                for fault in refused.faults
            ]
            return None

    def _text(self, document: Mapping[str, Any], key: str) -> str:
        value = document.get(key, "")
        if not isinstance(value, str):
            self.fault((key,), value, "a text")
            return ""
        return value

    def _table(self, document: Mapping[str, Any], key: str, table: type[T], *, is_need: bool = False) -> T | None:
        """Read one table; None where it is missing or a need in it is missing."""
        if key not in document:
            if is_need:
                self.fault((key,), "nothing", f"a [{key}] table", plain=True)
            return None
        value = document[key]
        if not isinstance(value, dict):
            many = isinstance(value, list)
            given = f"{len(value)} of [[{key}]]" if many else shown(value)
            self.fault((key,), given, f"one [{key}] table", plain=True)
            return None
        return self._keys((key,), value, table)

    def _duty(self, document: Mapping[str, Any]) -> tuple[Duty, ...]:
        value = document.get("duty")
        expected = "at least one [[duty]] table with speed, radial_load and axial_load"
        if value is None:
            self.fault(("duty",), "nothing", expected, plain=True)
            return ()
        if not isinstance(value, list) or not value or not all(isinstance(item, dict) for item in value):
            self.fault(("duty",), "[duty]" if isinstance(value, dict) else shown(value), expected, plain=True)
            return ()
        points = [self._keys(("duty", i), item, Duty) for i, item in enumerate(value)]
        read = tuple(point for point in points if point is not None)
        self._shares(value)
        if len(read) < len(points):
            return ()
        return read

    def _measured(self, document: Mapping[str, Any]) -> tuple[Measured, ...]:
        """Read the measured temperatures: one [measured] table, or several of [[measured]]."""
        value = document.get("measured", [])
        if isinstance(value, dict):
            one = self._keys(("measured",), value, Measured)
            return () if one is None else (one,)
        if not isinstance(value, list) or not all(isinstance(item, dict) for item in value):
            self.fault(("measured",), shown(value), "a [measured] table, or several [[measured]]", plain=True)
            return ()
        if len(value) > MOST_MEASURED:
            self.fault(("measured",), f"{len(value)} of [[measured]]", f"at most {MOST_MEASURED}", plain=True)
            return ()
        read = [self._keys(("measured", i), item, Measured) for i, item in enumerate(value)]
        return tuple(one for one in read if one is not None)

    def _shares(self, points: Sequence[Mapping[str, Any]]) -> None:
        """Several duty points need their shares of the running time, and the shares have to add up."""
        entry = dict(entries(Duty))["share"]
        total = 0.0
        missing = [i for i, point in enumerate(points) if "share" not in point]
        for i in missing if len(points) > 1 else ():
            self.fault(("duty", i, "share"), "nothing",
                       "a share of the running time, since there are several duty points", plain=True)  # fmt: skip
        if missing:
            return
        for point in points:
            try:
                total += float(value_of(point["share"], entry))
            except UnreadableText:
                return  # told already, where the key was read
        if not math.isclose(total, 1.0, abs_tol=1e-3):
            self.fault(("duty", len(points) - 1, "share"), f"shares that add up to {total:.4g}",
                       "shares that add up to 1 (100 %)", plain=True)  # fmt: skip

    def _keys(self, path: tuple[str | int, ...], values: Mapping[str, Any], table: type[T]) -> T | None:
        """Read the keys of one table."""
        known = dict(entries(table))
        read: dict[str, Any] = {}
        is_whole = True
        for key, value in values.items():
            here = (*path, key)
            if key not in known:
                self.fault(here, key, "one of " + ", ".join(known), nearest(key, known))
                continue
            self.given.append((_dotted(here), str(value)))
            try:
                read[key] = value_of(value, known[key])
            except UnreadableText as refused:
                self.fault(here, value, refused.expected, refused.near)
                is_whole = is_whole and not known[key].is_need
        for key, entry in known.items():
            if entry.is_need and key not in values:
                self.fault((*path, key), "nothing", entry.expected, plain=True)
                is_whole = False
        return table(**read) if is_whole else None

    def _bearing(self, table: BearingTable | None) -> Bearing | None:
        if table is None:
            return None
        dimensions = (table.bore, table.outside, table.width)
        path: tuple[str | int, ...] = ("bearing",)
        before = len(self.faults)
        if table.bore is not None and table.outside is not None and table.bore >= table.outside:
            self.fault(
                (*path, "bore"),
                f"{table.bore:g} mm",
                f"less than the outside diameter {table.outside:g} mm",
                plain=True,
            )
        if table.designation is not None:
            for key in ("family", "bore", "outside", "width"):
                if getattr(table, key) is not None:
                    self.fault(
                        (*path, key), getattr(table, key), "no such key beside a designation, which already says it"
                    )
        elif table.family is None or None in dimensions:
            absent = [key for key in ("family", "bore", "outside", "width") if getattr(table, key) is None]
            if not any(fault.key.startswith("bearing.") for fault in self.faults):
                self.fault(
                    (*path, "designation"),
                    "nothing",
                    f"a designation, or family, bore, outside and width (missing: {', '.join(absent)})",
                    plain=True,
                )
        if len(self.faults) > before or (table.designation is None and (table.family is None or None in dimensions)):
            return None
        given = {
            key: getattr(table, key)
            for key in ("dynamic_rating", "static_rating", "fatigue_limit", "mass", "contact_angle", "clearance",
                        "seal", "cage", "f0", "f1", "load_torque")
            if getattr(table, key) is not None
        }  # fmt: skip
        try:
            if table.designation is not None:
                found = bearings.find(table.designation)
            else:
                found = bearings.from_dimensions(
                    str(table.family),
                    bore=float(table.bore or 0),
                    outside=float(table.outside or 0),
                    width=float(table.width or 0),
                )
            if table.load_torque == "load dependent" and found.family not in friction.LOAD_FORM:
                expected = (
                    f"constant for {found.family}: load dependent is published for {', '.join(friction.LOAD_FORM)}"
                )
                raise InputError([Fault("load_torque", shown(table.load_torque), expected)])
            return bearings.with_given(found, **given)
        except InputError as refused:
            self._carry(path, refused)
            return None

    def _lubricant(self, table: LubricantTable | None) -> Lubricant | None:
        if table is None:
            return None
        path: tuple[str | int, ...] = ("lubricant",)
        apart = ("name", "designation", "index", *_ANALYSED)
        inline = [name for name, _ in entries(LubricantTable) if name not in apart]
        stated = {key: getattr(table, key) for key in inline if getattr(table, key) is not None}
        if table.name is not None and table.designation is not None:
            self.fault((*path, "designation"), table.designation, "a name or a designation, not both")
            return None
        try:
            if table.name is not None:
                said_by_name = [key for key in ("index", *_KIND_OF_GREASE) if getattr(table, key) is not None]
                for key in said_by_name:
                    figures = "" if key == "index" else "; another lubricant is given by its figures, without a name"
                    self.fault(
                        (*path, key), getattr(table, key), f"no such key beside a name, which already says it{figures}"
                    )
                if said_by_name:
                    return None
                return lubricants.with_given(lubricants.find(table.name, self.own), **stated)
            if any(fault.key.startswith("lubricant.") for fault in self.faults):
                return None
            return lubricants.from_figures(designation=table.designation, index=table.index, **stated)
        except InputError as refused:
            self._carry(path, refused)
            return None

    def _analysis(self, table: LubricantTable | None, lubricant: Lubricant | None) -> OilAnalysis | None:
        if table is None or lubricant is None:
            return None
        try:
            return analyse(lubricant, **{key: getattr(table, key) for key in _ANALYSED})
        except InputError as refused:
            self._carry(("lubricant",), refused)
            return None

    def _carry(self, path: tuple[str | int, ...], refused: InputError) -> None:
        """Take over the faults of a table look-up, with the place in this file."""
        for fault in refused.faults:
            here = (*path, fault.key)
            self.faults.append(
                dataclasses.replace(
                    fault,
                    key=_dotted(here),
                    where=self.name,
                    line=self.lines.get(here) or self.lines.get(path),
                )
            )

    def _coolant(self, housing: Housing) -> None:
        """Refuse a cooling jacket whose fluid is none."""
        if all(getattr(housing, key) is not None for key in conflicts.JACKET):
            try:
                coolants.at(str(housing.coolant), float(housing.coolant_inlet or 0.0))
            except InputError as refused:
                self._carry(("housing",), refused)


def _dotted(path: tuple[str | int, ...]) -> str:
    """Return a path as messages name it: duty[1].speed, counted from 1 as people do."""
    text = ""
    for part in path:
        text += f"[{part + 1}]" if isinstance(part, int) else ("." if text else "") + part
    return text


def read_value(table: str, key: str, text: str) -> Any:
    """Read one value of a case from its text.

    Raises UnreadableText where it is not what the key takes.

    >>> read_value("surroundings", "draught", "2 m/s")
    2.0
    """
    return value_of(text, dict(entries(TABLES[table]))[key])
