"""Designations of lubricants by standards: read, written, and the nearest readings of a misspelled one.

A designation gives what it states and nothing more: a grease designation states no base-oil viscosity and no
thickener, a viscosity grade states limits at one temperature. Neither temperature limit of a grease designation is a
statement about the film: the lower one comes from a flow-pressure test, the upper one from a life test.
"""

from __future__ import annotations

import difflib
import re
from collections.abc import Callable, Iterator, Mapping
from dataclasses import dataclass, field
from typing import Any

from lubecheck.data import grades
from lubecheck.data.grades import Limits
from lubecheck.errors import Fault, InputError, shown

# DIN 51502: letter of the upper temperature, seen to M, from memory above. Each pair differs in water resistance.
DIN_UPPER = {
    "C": 60, "D": 60, "E": 80, "F": 80, "G": 100, "H": 100, "K": 120, "M": 120,
    "N": 140, "P": 160, "R": 180, "S": 200, "T": 220, "U": 220,
}  # fmt: skip
# DIN 51807-1, grades 0 (no change) to 3 (strong change) in water of 40 or 90 degC; from memory.
DIN_WATER = {
    "C": "0 or 1 at 40 degC", "D": "2 or 3 at 40 degC", "E": "0 or 1 at 40 degC", "F": "2 or 3 at 40 degC",
    "G": "0 or 1 at 90 degC", "H": "2 or 3 at 90 degC", "K": "0 or 1 at 90 degC", "M": "2 or 3 at 90 degC",
}  # fmt: skip
DIN_LOWER = (-10, -20, -30, -40, -50, -60)
DIN_USE = {"K": "rolling bearings", "G": "closed gears", "OG": "open gears", "M": "plain bearings and seals"}
# Symbol of the base oil: what it means, and the word of lubricant.BASE_OILS where there is one.
DIN_BASE_OIL: Mapping[str, tuple[str, str | None]] = {
    "E": ("organic ester", "ester"),
    "FK": ("perfluorinated fluid", "PFPE"),
    "HC": ("synthetic hydrocarbon", "PAO"),
    "PH": ("phosphoric ester", None),
    "PG": ("polyglycol", "PAG"),
    "SI": ("silicone", "silicone"),
    "X": ("another synthetic", None),
}
# ISO 6743-9 (2003) / ISO 12924 (2010), seen.
ISO_LOWER = {"A": 0, "B": -20, "C": -30, "D": -40, "E": -40}
ISO_UPPER = {"A": 60, "B": 90, "C": 120, "D": 140, "E": 160, "F": 180, "G": 180}
_WATER = ("dry", "damp", "washed with water")
_RUST = ("no rust protection", "rust protection in fresh water", "rust protection in salt water")
ISO_WATER = {letter: (_WATER[i // 3], _RUST[i % 3]) for i, letter in enumerate("ABCDEFGHI")}
# DIN 51517 and DIN 51524 lubricating and hydraulic oils, from memory: the letters, and whether they state EP or wear
# additives.
DIN_OILS = {"C": False, "CL": False, "CLP": True, "HL": False, "HLP": True, "HLPD": True, "HVLP": True, "HVLPD": True}
AGMA_SUFFIXES = {"": "rust and oxidation inhibited", "EP": "extreme pressure", "S": "synthetic", "COMP": "compounded"}


@dataclass(frozen=True, slots=True)
class Designation:
    """What a designation states: figures by the names of `lubricant.FIELDS`, limits of viscosity, and words."""

    system: str
    text: str
    source: str
    facts: Mapping[str, Any]
    ranges: Mapping[str, Limits] = field(default_factory=dict)
    words: tuple[str, ...] = ()


def read(text: str) -> Designation:
    """Read a designation of any of the known systems.

    Raises InputError with the nearest readings when it is none.

    >>> read("KP2K-30").facts["highest"], read("iso vg 68").ranges["nu_40"]
    (120.0, Limits(low=61.2, high=74.8))
    """
    found = _parse(text)
    if found is not None:
        return found
    near = nearest_readings(text)
    expected = (
        "a designation such as KP2K-30, ISO-L-XBCEB 2, ISO VG 68, CLP 220, SAE 15W-40, SAE 75W-90, AGMA 5 EP, NLGI 2"
    )
    raise InputError([Fault("designation", shown(text), expected, nearest=", ".join(near) or None)])


def nearest_readings(text: str, *, count: int = 3) -> tuple[str, ...]:
    """Return the designations one slip away from a text, the likeliest first; for no grade, the next grades.

    >>> nearest_readings("KP2Q-30")[0], nearest_readings("ISO VG 90")
    ('KP2P-30', ('ISO VG 100', 'ISO VG 68'))
    """
    folded = _fold(text)
    number = re.fullmatch(r"(?:ISO)?-?VG-?(\d+(?:\.\d+)?)", folded)
    if number and float(number[1]) > 0:
        return tuple(f"ISO VG {grade:g}" for grade in grades.nearest_iso_vg(float(number[1])))
    number = re.fullmatch(r"SAE-?(\d+)", folded)
    if number:
        hot = sorted({*grades.SAE_ENGINE, *grades.SAE_GEAR}, key=lambda grade: abs(float(grade) - float(number[1])))
        return tuple(f"SAE {grade}" for grade in hot[:2])
    if len(folded) > 24:
        return ()
    found: dict[str, float] = {}
    for rank, candidate in _one_slip_away(folded):
        parsed = _parse(candidate)
        if parsed is not None:
            likeness = rank + difflib.SequenceMatcher(None, folded, _fold(parsed.text)).ratio()
            found[parsed.text] = max(likeness, found.get(parsed.text, 0.0))
    return tuple(sorted(found, key=lambda name: -found[name])[:count])


_ALPHABET = "ABCDEFGHIKLMNOPRSTUVWX0123456789-"
_LOOK_ALIKE = {
    ("O", "0"),
    ("0", "O"),
    ("I", "1"),
    ("1", "I"),
    ("L", "1"),
    ("S", "5"),
    ("5", "S"),
    ("Z", "2"),
    ("B", "8"),
}


def _one_slip_away(text: str) -> Iterator[tuple[float, str]]:
    """Yield the texts one swap, omission, addition or confusion away from a text, with a bonus for likely slips."""
    for i in range(len(text)):
        if i + 1 < len(text):
            yield 0.5, text[:i] + text[i + 1] + text[i] + text[i + 2 :]
        yield 0.3, text[:i] + text[i + 1 :]
        for letter in _ALPHABET:
            is_alike = (text[i], letter) in _LOOK_ALIKE
            is_near = abs(ord(text[i]) - ord(letter)) == 1
            yield 0.6 if is_alike else 0.1 if is_near else 0.0, text[:i] + letter + text[i + 1 :]
    for i in range(len(text) + 1):
        for letter in _ALPHABET:
            yield 0.4 if letter == "-" else 0.2, text[:i] + letter + text[i:]


def _fold(text: str) -> str:
    """Return a text in capitals, with plain dashes and single spaces only where they part two numbers."""
    text = re.sub("[\N{EN DASH}\N{MINUS SIGN}\N{HYPHEN}\N{NON-BREAKING HYPHEN}_]", "-", text.strip().upper())
    return re.sub(r"(?<=\d)\s+(?=\d)|\s+", lambda gap: " " if _parts_numbers(text, gap) else "", text)


def _parts_numbers(text: str, gap: re.Match[str]) -> bool:
    return text[gap.start() - 1].isdigit() and text[gap.end()].isdigit()


def _parse(text: str) -> Designation | None:
    folded = _fold(text)
    for reader in _READERS:
        found = reader(folded)
        if found is not None:
            return found
    return None


_DIN_GREASE = re.compile(
    r"(?:DIN(?:51825|51502)[-:]?)?(OG|K|G|M)(P?F?)(E|FK|HC|PH|PG|SI|X)?(P?F?)(000|00|[0-6])([CDEFGHKMNPRSTU])(?:-?(\d0))?"
)


def _din_grease(text: str) -> Designation | None:
    match = _DIN_GREASE.fullmatch(text)
    if match is None or (match[2] and match[4]) or (match[7] and -int(match[7]) not in DIN_LOWER):
        return None
    additives = match[2] or match[4]
    return din_grease(
        nlgi=match[5],
        upper=match[6],
        lower=-int(match[7]) if match[7] else None,
        ep="P" in additives,
        solids="F" in additives,
        base_oil=match[3],
        use=match[1],
    )


def din_grease(
    *,
    nlgi: str,
    upper: str,
    lower: int | None = None,
    ep: bool = False,
    solids: bool = False,
    base_oil: str | None = None,
    use: str = "K",
) -> Designation:
    """Return the designation of a grease by DIN 51502 (for rolling bearings DIN 51825) from its parts.

    nlgi: consistency grade
    upper: letter of `DIN_UPPER`
    lower: one of `DIN_LOWER`, or None where it is not stated
    base_oil: symbol of `DIN_BASE_OIL`, None for mineral oil

    >>> din_grease(nlgi="2", upper="N", lower=-40, ep=True, base_oil="HC").text
    'KPHC2N-40'
    """
    oil, word = DIN_BASE_OIL[base_oil] if base_oil else ("mineral oil", "mineral")
    over = "over " if upper == "U" else "up to "
    facts: dict[str, Any] = {"kind": "grease", "nlgi": nlgi, "ep": ep, "highest": float(DIN_UPPER[upper])}
    words = [f"grease for {DIN_USE[use]}", f"base oil: {oil}", f"{over}{DIN_UPPER[upper]} degC"]
    words.append(f"water resistance {DIN_WATER[upper]} (DIN 51807-1)" if upper in DIN_WATER else "water: by agreement")
    if solids:
        words.append("solid lubricants")
    if lower is not None:
        facts["lowest"] = float(lower)
        words.append(f"flow pressure at {lower} degC (DIN 51805)")
    if word is not None:
        facts["base_oil"] = word
    text = use + ("P" if ep else "") + ("F" if solids else "") + (base_oil or "") + nlgi + upper
    return Designation("DIN 51502", text + ("" if lower is None else f"{lower}"), "din-51825", facts, {}, tuple(words))


_ISO_GREASE = re.compile(r"(?:ISO-?)?(?:L-?)?X-?([A-E])([A-G])([A-I])([AB])-?(000|00|[0-6])")


def _iso_grease(text: str) -> Designation | None:
    match = _ISO_GREASE.fullmatch(text)
    if match is None:
        return None
    return iso_grease(lower=match[1], upper=match[2], water=match[3], ep=match[4] == "B", nlgi=match[5])


def iso_grease(*, lower: str, upper: str, water: str, ep: bool, nlgi: str) -> Designation:
    """Return the designation of a grease by ISO 6743-9 / ISO 12924 from its letters.

    >>> iso_grease(lower="B", upper="C", water="E", ep=True, nlgi="2").text
    'ISO-L-XBCEB 2'
    """
    wet, rust = ISO_WATER[water]
    facts = {
        "kind": "grease",
        "nlgi": nlgi,
        "ep": ep,
        "lowest": float(ISO_LOWER[lower]),
        "highest": float(ISO_UPPER[upper]),
    }
    words = (
        f"{'below ' if lower == 'E' else 'from '}{ISO_LOWER[lower]} degC",
        f"{'over ' if upper == 'G' else 'up to '}{ISO_UPPER[upper]} degC",
        wet,
        rust,
    )
    text = f"ISO-L-X{lower}{upper}{water}{'B' if ep else 'A'} {nlgi}"
    return Designation("ISO 6743-9", text, "iso-6743-9", facts, {}, words)


def _iso_vg(text: str) -> Designation | None:
    match = re.fullmatch(r"(?:ISO)?-?VG-?(\d+(?:\.\d+)?)", text)
    return iso_vg(float(match[1])) if match and float(match[1]) in grades.ISO_VG else None


def iso_vg(grade: float) -> Designation:
    """Return the designation of an ISO 3448 viscosity grade.

    >>> iso_vg(68).text
    'ISO VG 68'
    """
    facts = {"kind": "oil", "iso_vg": grade}
    return Designation("ISO 3448", f"ISO VG {grade:g}", "iso-3448", facts, {"nu_40": grades.iso_vg_limits(grade)})


def _din_oil(text: str) -> Designation | None:
    match = re.fullmatch(r"(HVLPD|HVLP|HLPD|HLP|HL|CLP|CL|C)-?(HC|PG|E)?-?(?:ISO)?(?:VG)?-?(\d+)", text)
    if match is None or float(match[3]) not in grades.ISO_VG or (match[2] and match[1] != "CLP"):
        return None
    oil, word = DIN_BASE_OIL[match[2]] if match[2] else ("mineral oil", "mineral")
    grade = float(match[3])
    facts = {"kind": "oil", "base_oil": word, "iso_vg": grade, "ep": match[1] == "CLP"}
    words = [f"base oil: {oil}"]
    if DIN_OILS[match[1]] and match[1] != "CLP":
        words.append("wear additives")
    if match[1].startswith("HV"):
        words.append("viscosity index at least 140")
        facts["index"] = 140.0
    name = " ".join(part for part in (match[1], match[2], f"{grade:g}") if part)
    return Designation("DIN 51502", name, "din-51502-oils", facts, {"nu_40": grades.iso_vg_limits(grade)}, tuple(words))


def _sae(text: str) -> Designation | None:
    match = re.fullmatch(r"(?:SAE|(?:SAE)?GEAR)?-?(\d+W)?[-/]?(\d+)?", text)
    if match is None or not (match[1] or match[2]) or not (match[1] or text.startswith(("SAE", "GEAR"))):
        return None
    for engine in (True, False):
        hot = grades.SAE_ENGINE if engine else grades.SAE_GEAR
        cold = grades.SAE_ENGINE_WINTER if engine else grades.SAE_GEAR_WINTER
        if (match[1] is None or match[1] in cold) and (match[2] is None or match[2] in hot):
            return sae(match[1], match[2], is_gear=not engine)
    return None


def sae(winter: str | None, summer: str | None, *, is_gear: bool = False) -> Designation:
    """Return the designation of an SAE engine (J300) or gear (J306) grade: winter part, hot part, or both.

    >>> sae("75W", "90", is_gear=True).ranges["nu_100"]
    Limits(low=13.5, high=18.5)
    """
    hot = grades.SAE_GEAR if is_gear else grades.SAE_ENGINE
    cold = grades.SAE_GEAR_WINTER if is_gear else grades.SAE_ENGINE_WINTER
    low, high = hot[summer] if summer else (0.0, float("inf"))
    words = ["gear oil" if is_gear else "engine oil"]
    if winter:
        least, temperature = cold[winter]
        low = max(low, least)
        words.append(f"{'150,000' if is_gear else '60,000'} mPa*s at most at {temperature:g} degC")
    system, source = ("SAE J306", "sae-j306") if is_gear else ("SAE J300", "sae-j300")
    text = "SAE " + "-".join(part for part in (winter, summer) if part)
    return Designation(system, text, source, {"kind": "oil"}, {"nu_100": Limits(low, high)}, tuple(words))


def _agma(text: str) -> Designation | None:
    match = re.fullmatch(r"AGMA-?(?:NO\.?)?(8A|1[01]|\d)-?(EP|S|COMP)?", text)
    return agma(match[1], match[2] or "") if match and match[1] in grades.AGMA else None


def agma(number: str, suffix: str = "") -> Designation:
    """Return the designation of an AGMA lubricant number, with the suffix EP, S (synthetic) or COMP (compounded).

    >>> agma("5", "EP").facts["iso_vg"]
    220.0
    """
    grade = float(grades.AGMA[number])
    facts = {"kind": "oil", "iso_vg": grade, "ep": suffix == "EP"}
    text = f"AGMA {number}" + (f" {suffix.title() if suffix == 'COMP' else suffix}" if suffix else "")
    ranges = {"nu_40": grades.iso_vg_limits(grade)}
    return Designation("AGMA 9005", text, "agma-9005", facts, ranges, ("gear oil", AGMA_SUFFIXES[suffix]))


def _nlgi(text: str) -> Designation | None:
    match = re.fullmatch(r"NLGI-?(?:GRADE|NO\.?)?-?(000|00|[0-6])", text)
    return nlgi(match[1]) if match else None


def nlgi(grade: str) -> Designation:
    """Return the designation of an NLGI consistency grade.

    >>> nlgi("2").words
    ('worked penetration 265 to 295 (0.1 mm, 25 degC)',)
    """
    low, high = grades.NLGI_PENETRATION[grade]
    words = (f"worked penetration {low} to {high} (0.1 mm, 25 degC)",)
    return Designation("NLGI", f"NLGI {grade}", "nlgi", {"kind": "grease", "nlgi": grade}, {}, words)


_READERS: tuple[Callable[[str], Designation | None], ...] = (
    _din_grease,
    _iso_grease,
    _iso_vg,
    _din_oil,
    _sae,
    _agma,
    _nlgi,
)
