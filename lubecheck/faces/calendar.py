"""A plan as a calendar by RFC 5545, so that any calendar program can take it in."""

from __future__ import annotations

import datetime
import hashlib
from collections import Counter
from collections.abc import Sequence

from lubecheck.model.schedule import PlanRow

_LINE = 75  # octets, RFC 5545 3.1


def to_ics(rows: Sequence[PlanRow], start: datetime.date) -> bytes:
    """Return a plan as a calendar: one repeated all-day event a position that has a date."""
    lines = ["BEGIN:VCALENDAR", "VERSION:2.0", "PRODID:-//lubecheck//plan//EN", "CALSCALE:GREGORIAN"]
    seen: Counter[str] = Counter()
    for row in rows:
        if row.next_due is not None and row.planned_days is not None:
            # The same position keeps its name from plan to plan, so that a calendar renews its event and adds none.
            key = f"{row.position}\n{row.action}"
            lines += _event(f"{key}\n{seen[key]}", row, start)
            seen[key] += 1
    lines.append("END:VCALENDAR")
    return "".join(f"{_folded(line)}\r\n" for line in lines).encode("utf-8")


def _event(key: str, row: PlanRow, start: datetime.date) -> list[str]:
    days, due = row.planned_days or 1, row.next_due or start
    weeks, rest = divmod(days, 7)
    rule = f"FREQ=WEEKLY;INTERVAL={weeks}" if rest == 0 else f"FREQ=DAILY;INTERVAL={days}"
    name = hashlib.sha256(key.encode()).hexdigest()[:24]
    said = (f"{row.lubricant}: {_amount(row)}", *row.steps, *row.notes, *row.cautions)
    return [
        "BEGIN:VEVENT",
        f"UID:{name}@lubecheck.invalid",
        f"DTSTAMP:{start:%Y%m%d}T000000Z",
        f"DTSTART;VALUE=DATE:{due:%Y%m%d}",
        f"DTEND;VALUE=DATE:{due + datetime.timedelta(days=1):%Y%m%d}",
        f"RRULE:{rule}",
        f"SUMMARY:{_escaped(f'{row.action}: {row.position}')}",
        f"DESCRIPTION:{_escaped(chr(10).join(said))}",
        "TRANSP:TRANSPARENT",
        "END:VEVENT",
    ]


def _amount(row: PlanRow) -> str:
    if row.amount_g is not None:
        strokes = f" = {row.strokes} strokes" if row.strokes else ""
        return f"{row.amount_g:.1f} g{strokes}"
    return f"{row.amount_cm3:.0f} cm3" if row.amount_cm3 is not None else "amount as the position needs"


def _escaped(text: str) -> str:
    """Return a text by RFC 5545 3.3.11, without control characters."""
    text = text.replace("\r\n", "\n").replace("\r", "\n")
    text = "".join(c if c.isprintable() or c == "\n" else " " for c in text)
    return text.replace("\\", "\\\\").replace(";", "\\;").replace(",", "\\,").replace("\n", "\\n")


def _folded(line: str) -> str:
    """Return a line folded at 75 octets, never inside a character."""
    parts, used = [""], 0
    for letter in line:
        size = len(letter.encode("utf-8"))
        if used + size > _LINE:
            parts.append("")
            used = 1  # the blank that begins a folded line counts
        parts[-1] += letter
        used += size
    return "\r\n ".join(parts)
