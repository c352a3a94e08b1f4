"""Questions for a new lubricant: asked on standard error, answered on standard input."""

from __future__ import annotations

import sys
from collections.abc import Iterable

from lubecheck.data.lubricant import FIELDS
from lubecheck.data.lubricant_files import KEY_EXPECTED, is_key, read_entry, read_value
from lubecheck.errors import Fault, InputError
from lubecheck.units import UnreadableText

_FIRST = ("key", "kind", "designation")
_GREASE = ("thickener", "base_oil", "nlgi", "ep")
_OIL = ("base_oil", "ep")
_REST = ("nu_40", "nu_100", "index", "lowest", "highest", "density_15", "note")
_EXAMPLES = {"nu_40": "110 mm^2/s", "nu_100": "12 mm^2/s", "index": "95", "lowest": "-30 degC", "highest": "140 degC",
             "density_15": "890 kg/m^3", "nlgi": "2", "ep": "yes or no", "key": "motor-grease"}  # fmt: skip


def ask(key: str | None = None) -> dict[str, str]:
    """Return the facts of a lubricant from a few answers, asked again until they make one.

    Raises InputError where the answers end too soon.
    """
    facts = {} if key is None else {"key": key}
    _say("A few questions; an empty answer means: not stated.")
    _ask_all((name for name in _FIRST if name not in facts), facts)
    _ask_all(_GREASE if facts.get("kind", "").casefold() == "grease" else _OIL, facts)
    for name in _REST:
        if name == "index" and "nu_40" in facts and "nu_100" in facts:
            continue  # the two viscosities say it
        _ask_all((name,), facts)
    while True:
        try:
            read_entry(facts)
        except InputError as refused:
            for fault in refused.faults:
                _say(f"  {fault}")
            again = dict.fromkeys(fault.key for fault in refused.faults if fault.key in FIELDS)
            _ask_all(again, facts)
            continue
        return facts


def _ask_all(names: Iterable[str], facts: dict[str, str]) -> None:
    for name in names:
        facts.pop(name, None)
        answer = _answer(name)
        if answer:
            facts[name] = answer


def _answer(name: str) -> str:
    """Return an answer that can be read, or nothing where it may be left out."""
    entry = FIELDS[name]
    wanted = ", ".join(entry.words if name != "kind" else ()) or (
        f"such as {_EXAMPLES[name]}" if name in _EXAMPLES else ""
    )
    while True:
        print(f"{name}, {entry.meaning}{f' ({wanted})' if wanted else ''}: ", end="", file=sys.stderr, flush=True)
        try:
            answer = input().strip()
        except EOFError:
            _say("")
            raise InputError([Fault(name, "no answer", "an answer, or the flags of --add")]) from None
        is_need = name in ("key", "kind")
        try:
            if answer:
                read_value(answer, entry)
            if is_need and not answer:
                raise UnreadableText("an answer")
            if name == "key" and not is_key(answer):
                raise UnreadableText(KEY_EXPECTED)
        except UnreadableText as refused:
            _say(f"  expected {refused.expected}{f'; nearest: {refused.near}' if refused.near else ''}")
            continue
        return answer


def _say(text: str) -> None:
    print(text, file=sys.stderr)
