"""Lines of keys: the expected lines are counted by hand, or by the writer of the document as it writes it."""

from __future__ import annotations

import json
import re
import tomllib
from collections.abc import Callable, Iterator
from functools import partial
from typing import Any

import pytest
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

from lubecheck.model.toml_lines import Path, key_lines


def paths(value: Any, path: Path = ()) -> Iterator[Path]:
    items = value.items() if isinstance(value, dict) else enumerate(value) if isinstance(value, list) else ()
    for key, inner in items:
        yield (*path, key)
        yield from paths(inner, (*path, key))


BY_HAND: dict[str, tuple[str, dict[Path, int]]] = {
    "nothing": ("", {}),
    "comments only": ("# a = 1\n# [b]", {}),
    "bare keys": ("a = 1\n\n  b-2_ = 2 # c = 3\n3 = 4", {("a",): 1, ("b-2_",): 3, ("3",): 4}),
    "quoted keys": (
        '"a b" = 1\n\'c.d\' = 2\n"" = 3\n"\\u00e9\\"" = 4\n"[e]" = 5',
        {("a b",): 1, ("c.d",): 2, ("",): 3, ('é"',): 4, ("[e]",): 5},
    ),
    "dotted keys": (
        'a.b = 1\na . "c.d" = 2\na.e.f = 3',
        {("a",): 1, ("a", "b"): 1, ("a", "c.d"): 2, ("a", "e"): 3, ("a", "e", "f"): 3},
    ),
    "tables": (
        "[a]\nx = 1\n[ b . c ]\ny = 2",
        {("a",): 1, ("a", "x"): 2, ("b",): 3, ("b", "c"): 3, ("b", "c", "y"): 4},
    ),
    "a table after its own sub-table": ("[a.b]\n\n[a]\nx = 1", {("a",): 3, ("a", "b"): 1, ("a", "x"): 4}),
    "an array of tables": (
        "[[duty]]\nspeed = 1\n\n[[duty]]\nspeed = 2",
        {("duty",): 1, ("duty", 0): 1, ("duty", 0, "speed"): 2, ("duty", 1): 4, ("duty", 1, "speed"): 5},
    ),
    "sub-tables of the last element": (
        "[[a]]\n[a.b]\nx = 1\n[[a.c]]\n[[a.c]]\ny = 2\n[[a]]\n[[a.c]]\nz = 3",
        {
            ("a",): 1,
            ("a", 0): 1,
            ("a", 0, "b"): 2,
            ("a", 0, "b", "x"): 3,
            ("a", 0, "c"): 4,
            ("a", 0, "c", 0): 4,
            ("a", 0, "c", 1): 5,
            ("a", 0, "c", 1, "y"): 6,
            ("a", 1): 7,
            ("a", 1, "c"): 8,
            ("a", 1, "c", 0): 8,
            ("a", 1, "c", 0, "z"): 9,
        },
    ),
    "inline tables": (
        'a = { b = 1, c.d = "}", e = {} }\nf = 2',
        {("a",): 1, ("a", "b"): 1, ("a", "c"): 1, ("a", "c", "d"): 1, ("a", "e"): 1, ("f",): 2},
    ),
    "an inline table over several lines": (
        "a = { b = [\n1 ], c = '''\n\n''', d = 2 }",
        {("a",): 1, ("a", "b"): 1, ("a", "b", 0): 2, ("a", "c"): 2, ("a", "d"): 4},
    ),
    "an array over several lines": (
        "a = [ 1,\n  # b = 2, ]\n  [\n    3 ],\n  { c = 4 }, # [d]\n]\ne = 5",
        {("a",): 1, ("a", 0): 1, ("a", 1): 3, ("a", 1, 0): 4, ("a", 2): 5, ("a", 2, "c"): 5, ("e",): 7},
    ),
    "empty arrays": ("a = []\nb = [\n\n]\nc = [[], []]", {("a",): 1, ("b",): 2, ("c",): 5, ("c", 0): 5, ("c", 1): 5}),
    "long basic strings": (
        'a = """\n[x]\nb = "2" # \\""" \\\\"""\nc = """"d""\n"""""\ne = """"""\nf = 1',
        {("a",): 1, ("c",): 4, ("e",): 6, ("f",): 7},
    ),
    "long literal strings": (
        "a = '''\n[x]\nb = 2 \\'''\nc = ''''d''\n'''''\ne = ''''''\nf = 1",
        {("a",): 1, ("c",): 4, ("e",): 6, ("f",): 7},
    ),
    "strings with marks in them": (
        'a = ["]", \'}\', "\\"]", \'\\\', "#", "b = 1"]\nc = "\\\\"\nd = \'"""\'\ne = "\'\'\'"\nf = 1',
        {("a",): 1, **{("a", i): 1 for i in range(6)}, ("c",): 2, ("d",): 3, ("e",): 4, ("f",): 5},
    ),
    "dates with a space": (
        "a = 1979-05-27 07:32:00\nb = [1979-05-27 07:32:00Z, 07:32:00.5 ]\nc = 1",
        {("a",): 1, ("b",): 2, ("b", 0): 2, ("b", 1): 2, ("c",): 3},
    ),
    "carriage returns": (
        'a = 1\r\n[b]\r\nc = """\r\n\r\n"""\r\nd = [\r\n1, # e\r\n]\r\n',
        {("a",): 1, ("b",): 2, ("b", "c"): 3, ("b", "d"): 6, ("b", "d", 0): 7},
    ),
    "a long row of hash marks": (f"a = 1\n{'#' * 1000}", {("a",): 1}),
}


@pytest.mark.parametrize(("text", "expected"), BY_HAND.values(), ids=BY_HAND)
def test_each_key_stands_on_the_line_counted_by_hand(text: str, expected: dict[Path, int]) -> None:
    assert set(paths(tomllib.loads(text))) == set(expected)
    assert key_lines(text) == expected


def test_a_deeply_nested_value_is_scanned() -> None:
    depth = 200
    text = f"a = {'[' * depth}\n1{']' * depth}"
    tomllib.loads(text)
    assert key_lines(text)[("a", *[0] * depth)] == 2


SCALARS = (
    "1",
    "-0.5e3",
    "0xDEAD_BEEF",
    "inf",
    "true",
    "1979-05-27 07:32:00.5+01:00",
    "07:32:00",
    '"1480 rpm"',
    "'''\n[[duty]]\nspeed = 1 # '' '''''",
    '"""\\\n  [a]\n\\"" # b = "c"""""',
)
COMMENTS = ("#", "# a = 1", "# [b]", "# [[c", '# "', "# '''", '# """, ]} = {[')
CHARACTERS = "ab1-_ .#=[]{},'\"\\\té💧"
BARE = re.compile(r"[A-Za-z0-9_-]+")


def basic(text: str) -> str:
    """Every character that may be escaped is; astral ones in the long form, which JSON does not have."""
    return '"' + "".join(f"\\U{ord(c):08x}" if ord(c) > 0xFFFF else json.dumps(c)[1:-1] for c in text) + '"'


def long_basic(text: str) -> str:
    return '"""' + text.replace("\\", "\\\\").replace('"""', '""\\"') + '"""'


class Scribe:
    """Writes a random document and notes the line of each path as it writes it."""

    def __init__(self, draw: Callable[[st.SearchStrategy[Any]], Any]) -> None:
        self.draw = draw
        self.newline: str = draw(st.sampled_from(["\n", "\r\n"]))
        self.text = ""
        self.line = 1
        self.lines: dict[Path, int] = {}
        self.postponed: list[Callable[[], object]] = []

    def write(self, text: str) -> None:
        self.text += text.replace("\n", self.newline)
        self.line += text.count("\n")

    def any_of(self, *options: Any) -> Any:
        return self.draw(st.sampled_from(options))

    def count(self, least: int, most: int) -> int:
        return int(self.draw(st.integers(least, most)))

    def note(self, table: Path, *names: str) -> Path:
        for name in names:
            table = (*table, name)
            self.lines.setdefault(table, self.line)
        return table

    def space(self) -> None:
        self.write(self.any_of("", " ", "\t "))

    def end_line(self) -> None:
        self.space()
        for _ in range(self.count(1, 2)):
            self.write(self.any_of("", *COMMENTS) + "\n")
            self.space()

    def gap(self) -> None:
        """Between the marks of an array, lines may end."""
        self.space()
        if self.any_of(False, False, True):
            self.end_line()

    def key(self, names: tuple[str, ...]) -> None:
        for i, name in enumerate(names):
            if i:
                self.space()
                self.write(".")
                self.space()
            forms = [basic(name), f'"{name}"' if not {'"', "\\"} & set(name) else basic(name)]
            if "'" not in name:
                forms.append(f"'{name}'")
            if BARE.fullmatch(name):
                forms.extend([name] * 4)
            self.write(self.any_of(*forms))
        self.space()

    def names(self, most: int) -> list[str]:
        name = st.sampled_from("abcd") | st.text(CHARACTERS, max_size=4)
        return list(self.draw(st.lists(name, max_size=most, unique=True)))

    def keys(self, most: int) -> list[tuple[str, ...]]:
        """Draw keys, some dotted, none of which runs through another's value."""
        kept: list[tuple[str, ...]] = []
        for _ in range(self.count(0, most)):
            new = tuple(self.names(3)) or ("a",)
            if all(new[: len(old)] != old[: len(new)] for old in kept):
                kept.append(new)
        return kept

    def entry(self, table: Path, key: tuple[str, ...], depth: int) -> None:
        path = self.note(table, *key)
        self.key(key)
        self.write("=")
        self.space()
        self.value(path, depth)

    def value(self, path: Path, depth: int) -> None:
        kind = self.any_of("scalar", "string", "array", "inline table") if depth else "scalar"
        if kind == "scalar":
            self.write(self.any_of(*SCALARS))
        elif kind == "string":
            self.string(self.draw(st.text(CHARACTERS + "\n", max_size=12) | st.text("\"'\\\n", max_size=8)))
        elif kind == "array":
            self.array(path, depth - 1)
        else:
            self.inline_table(path, depth - 1)

    def string(self, text: str) -> None:
        forms = [basic(text), long_basic(text)]
        if not {"'", "\n"} & set(text):
            forms.append(f"'{text}'")
        if "'''" not in text:
            forms.append(f"'''{text}'''")
        self.write(self.any_of(*forms))

    def array(self, path: Path, depth: int) -> None:
        self.write("[")
        length = self.count(0, 3)
        for i in range(length):
            self.gap()
            self.lines[(*path, i)] = self.line
            self.value((*path, i), depth)
            self.gap()
            self.write("," if i < length - 1 else self.any_of("", ","))
        self.gap()
        self.write("]")

    def inline_table(self, path: Path, depth: int) -> None:
        self.write("{")
        self.space()
        for i, key in enumerate(self.keys(3)):
            self.write(", " if i else "")
            self.entry(path, key, depth)
            self.space()
        self.write("}")

    def body(self, table: Path, header: tuple[str, ...], depth: int) -> None:
        """Write what stands under a header: entries, then sub-tables, at once or after what follows."""
        taken = self.entries(table)
        sections = partial(self.sections, table, header, taken, depth, least=0)
        if all(isinstance(step, str) for step in table) and self.any_of(False, True):
            self.postponed.append(sections)
        else:
            sections()

    def entries(self, table: Path, taken: tuple[str, ...] = ()) -> set[str]:
        keys = [key for key in self.keys(3) if key[0] not in taken]
        for key in keys:
            self.entry(table, key, 2)
            self.end_line()
        return {key[0] for key in keys}

    def sections(self, table: Path, header: tuple[str, ...], taken: set[str], depth: int, least: int) -> list[str]:
        names = [name for name in self.names(2) if name not in taken] if depth else []
        if len(names) < least:
            names = ["only"]
        for name in names:
            self.section((*table, name), (*header, name), depth - 1)
        return names

    def section(self, path: Path, header: tuple[str, ...], depth: int) -> None:
        kind = self.any_of("table", "array", "implied", "header last") if depth > 0 else "table"
        if kind == "table":
            self.header(path, header, "[", "]")
            self.body(path, header, depth)
        elif kind == "array":
            for i in range(self.count(1, 3)):
                self.header((*path, i), header, "[[", "]]")
                self.body((*path, i), header, depth)
        else:
            taken = self.sections(path, header, set(), depth, least=1)
            if kind == "header last":
                self.header(path, header, "[", "]")
                self.entries(path, tuple(taken))

    def header(self, path: Path, header: tuple[str, ...], opening: str, closing: str) -> None:
        for length in range(1, len(path)):
            self.lines.setdefault(path[:length], self.line)
        self.lines[path] = self.line
        self.write(opening)
        self.space()
        self.key(header)
        self.write(closing)
        self.end_line()

    def document(self) -> tuple[str, dict[Path, int]]:
        self.gap()
        self.body((), (), 3)
        while self.postponed:
            self.postponed.pop(self.count(0, len(self.postponed) - 1))()
        return self.text.rstrip("\r\n") if self.any_of(False, True) else self.text, self.lines


@st.composite
def documents(draw: Callable[[st.SearchStrategy[Any]], Any]) -> tuple[str, dict[Path, int]]:
    return Scribe(draw).document()


@settings(deadline=None, max_examples=200, suppress_health_check=[HealthCheck.too_slow, HealthCheck.data_too_large])
@given(documents())
def test_every_path_of_a_random_document_stands_where_it_was_written(document: tuple[str, dict[Path, int]]) -> None:
    text, written = document
    assert set(paths(tomllib.loads(text))) == set(written)
    assert key_lines(text) == written
