r"""Where each key of a TOML text stands, so that a fault in a case file can name its line.

tomllib tells no positions. This scan runs after it, on a text that it has parsed without error, and so only has to
tell keys, headers, brackets and strings apart, not to judge them.
"""

from __future__ import annotations

import itertools
import re
import tomllib
from collections.abc import Iterator

Path = tuple[str | int, ...]

_BASIC = r'"[^"\\\n]*(?:\\.[^"\\\n]*)*"'
_LITERAL = r"'[^'\n]*'"
# A long string may end in up to two quotes of its own before the three that close it.
_LONG_BASIC = r'"""[^"\\]*(?:(?:\\[\s\S]|"(?!""))[^"\\]*)*"{3,5}'
_LONG_LITERAL = r"'''[\s\S]*?'{3,5}"
_SCALAR = r"[^\s\[\]{},#][^\[\]{},#\n]*"  # up to the next mark: a date may hold a space
_NAME = rf"(?:[A-Za-z0-9_-]+|{_BASIC}|{_LITERAL})"
_KEY = rf"{_NAME}(?:[ \t]*\.[ \t]*{_NAME})*"
_ASSIGNED = rf"({_KEY})[ \t]*="

_NAMES = re.compile(_NAME)
_STATEMENT = re.compile(rf"\s*(?:#[^\n]*\n\s*)*(?:{_ASSIGNED}|(\[\[?)[ \t]*({_KEY})[ \t]*\]\]?)")
_TOKEN = re.compile(
    r"([\s,]*(?:#[^\n]*\n[\s,]*)*)"
    rf"(?:{_ASSIGNED}|([\[{{])|([\]}}])|{_LONG_BASIC}|{_LONG_LITERAL}|{_BASIC}|{_LITERAL}|{_SCALAR})"
)


def key_lines(text: str) -> dict[Path, int]:
    r"""Return the 1-based line of each key, table and array element of a text that tomllib has parsed without error.

    A path counts the elements of `[[tables]]` and of `[1, 2]` alike by integer index. A table stands at its header, or,
    without one, where a key or another header first implies it; an array of tables stands at its first header.

    >>> key_lines('title = "Pump"\n[[duty]]\nspeed = "1480 rpm"')
    {('title',): 1, ('duty',): 2, ('duty', 0): 2, ('duty', 0, 'speed'): 3}
    """
    lines: dict[Path, int] = {}
    latest: dict[Path, int] = {}  # array of tables -> index of its last element, the one that headers refer to
    table: Path = ()
    line, at = 1, 0
    while statement := _STATEMENT.match(text, at):
        key, brackets, header = statement.groups()
        line += text.count("\n", at, statement.end())
        at = statement.end()
        if key:
            line, at = _scan_value(text, at, line, _place(key, table, line, lines), lines)
        else:
            table = _enter(header, brackets == "[[", line, lines, latest)
    return lines


def _scan_value(text: str, at: int, line: int, path: Path, lines: dict[Path, int]) -> tuple[int, int]:
    """Place what is inside one value; return the line and the position where it ends."""
    brackets: list[tuple[Path, Iterator[int] | None]] = []  # an open array has the indices to come, a table has none
    while token := _TOKEN.match(text, at):
        blank, key, opening, closing = token.groups()
        line += blank.count("\n")
        at = token.end()
        if key:
            path = _place(key, brackets[-1][0], line, lines)
            continue
        if closing:
            brackets.pop()
        elif brackets and (indices := brackets[-1][1]):
            path = (*brackets[-1][0], next(indices))
            lines[path] = line
        if opening:
            brackets.append((path, itertools.count() if opening == "[" else None))
        elif not closing:
            line += text.count("\n", token.end(1), at)  # inside a long string
        if not brackets:
            break
    return line, at


def _place(key: str, table: Path, line: int, lines: dict[Path, int]) -> Path:
    """Place a key, and each table that its dots imply; return its path."""
    path = table
    for name in _names(key):
        path = (*path, name)
        lines.setdefault(path, line)
    return path


def _enter(header: str, is_array: bool, line: int, lines: dict[Path, int], latest: dict[Path, int]) -> Path:
    """Place a header and each table that its dots imply; return the path of the table that it opens."""
    *parents, name = _names(header)
    path: Path = ()
    for parent in parents:
        path = (*path, parent)
        lines.setdefault(path, line)
        if path in latest:
            path = (*path, latest[path])
    path = (*path, name)
    if is_array:
        lines.setdefault(path, line)
        latest[path] = latest.get(path, -1) + 1
        path = (*path, latest[path])
    lines[path] = line  # also where an earlier header has implied it
    return path


def _names(key: str) -> list[str]:
    """Return the names in a key, bare, quoted or dotted."""
    return [_unquoted(name) if name[0] in "\"'" else name for name in _NAMES.findall(key)]


def _unquoted(name: str) -> str:
    if name[0] == '"' and "\\" in name:
        value: str = tomllib.loads(f"name = {name}")["name"]  # escapes as tomllib itself reads them
        return value
    return name[1:-1]
