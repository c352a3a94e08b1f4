"""Shared by all tests: the shipped examples, and a case to change."""

from __future__ import annotations

import re
import tomllib
from pathlib import Path

import pytest

ROOT = Path(__file__).parents[1]
EXAMPLES = ROOT / "examples"
collect_ignore = ["benchmarks"]  # scripts that are run on purpose, with paths of their own

BASE = """\
[bearing]
designation = "6309"
dynamic_rating = "53 kN"
static_rating = "31.5 kN"
mass = "0.83 kg"
cage = "steel"

[lubricant]
name = "polyurea-110-2"

[[duty]]
speed = "1480 rpm"
radial_load = "1.9 kN"
axial_load = "250 N"

[surroundings]
ambient = "40 degC"
coldest = "-10 degC"
draught = "1 m/s"
altitude = "150 m"
dust = "clean"
water = "dry"
vibration = "smooth"
orientation = "horizontal"

[housing]
kind = "motor end shield"
void = "60 cm^3"
relief = "closed"
shaft_temperature = "75 degC"

[grease]
fill = "15 g"
housing_fill = "40 %"
interval = "16 week"
hours_per_day = "24 h"

[cleanliness]
setting = "normal"
"""


def with_key(text: str, table: str, key: str, value: str | None) -> str:
    """Return a case text with one key of a table set to a TOML value, or taken out."""
    head = f"[[{table}]]" if table == "duty" else f"[{table}]"
    pattern = re.compile(rf"({re.escape(head)}\n(?:[^\[\n].*\n|\n)*?)({re.escape(key)} = .*\n)")
    if value is None:
        changed, count = pattern.subn(lambda found: found[1], text)
        assert count == 1, f"no {key} in {head}"
        return changed
    line = f"{key} = {value}\n"
    changed, count = pattern.subn(lambda found: found[1] + line, text)
    if count:
        return changed
    if head not in text:
        return f"{text}\n{head}\n{line}"
    return text.replace(f"{head}\n", f"{head}\n{line}")


def toml(document: dict) -> str:
    """Return a case as TOML text: the tables of a case hold texts, numbers and flags only."""

    def value(one):
        return str(one).lower() if isinstance(one, bool) else repr(one) if isinstance(one, int | float) else f'"{one}"'

    lines = [f"{key} = {value(one)}" for key, one in document.items() if not isinstance(one, dict | list)]
    for key, table in document.items():
        for part in table if isinstance(table, list) else [table] if isinstance(table, dict) else []:
            lines.append(f"[[{key}]]" if isinstance(table, list) else f"[{key}]")
            lines += [f"{name} = {value(one)}" for name, one in part.items()]
    return "\n".join(lines) + "\n"


def edited(text: str, edits) -> str:
    """Return the text of a case file with edits made, by nothing of the program's."""
    document = tomllib.loads(text)
    for key, value in edits:
        if isinstance(value, dict):
            document[key] = value
            continue
        table, _, name = key.partition(".")
        number = re.fullmatch(r"(duty|measured)\[(\d+)\]", table)
        part = (
            document[number[1]][int(number[2]) - 1]
            if number
            else document.setdefault(table, {})
            if value
            else document.get(table, {})
        )
        if value is None:
            part.pop(name, None)
        else:
            part[name] = value
    return toml(document)


REPORT = pytest.StashKey[list[str]]()


@pytest.fixture
def report(request: pytest.FixtureRequest) -> list[str]:
    """Lines that the tests' report closes with, whether or not a test failed."""
    return request.config.stash.setdefault(REPORT, [])


def pytest_terminal_summary(terminalreporter: pytest.TerminalReporter, config: pytest.Config) -> None:
    """Print the tables that tests compare with published ones."""
    lines = config.stash.get(REPORT, [])
    if lines:
        terminalreporter.section("beside published tables")
        for line in lines:
            terminalreporter.write_line(line)


@pytest.fixture
def base() -> str:
    """The text of a whole and good case."""
    return BASE
