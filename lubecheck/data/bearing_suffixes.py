"""What suffixes of designations mean: DIN 623-1 where it says so, common trade usage elsewhere.

A suffix can mean one thing on one family and another on the next ("B" is the 40 degree contact angle of an angular
contact ball bearing and a mere design letter elsewhere), so each lookup names the family.
"""

from __future__ import annotations

from collections.abc import Mapping

Says = Mapping[str, str | float | int]

_SHIELDS: Says = {"seal": "shields", "sealed_sides": 2}
_ONE_SHIELD: Says = {"seal": "shields", "sealed_sides": 1}
# Rubber seals that do not quite touch are counted with those that do: they share the rubber's top temperature.
_SEALS: Says = {"seal": "contact seals", "sealed_sides": 2}
_ONE_SEAL: Says = {"seal": "contact seals", "sealed_sides": 1}
_STEEL: Says = {"cage": "steel"}
_BRASS: Says = {"cage": "brass"}
_POLYAMIDE: Says = {"cage": "polyamide"}
_FULL: Says = {"cage": "full complement"}


def _each(words: str, says: Says) -> dict[str, Says]:
    return dict.fromkeys(words.split(), says)


def _words(words: str) -> frozenset[str]:
    return frozenset(words.split())


_GENERAL: Mapping[str, Says] = {
    **{name: {"clearance": name} for name in ("C2", "CN", "C3", "C4", "C5")},
    **_each("C0 CM", {"clearance": "CN"}),  # CM: a narrowed part of the normal range, for electric motors
    # tolerance class and clearance run together: P63 is P6 and C3
    **{f"P{grade}{step}": {"clearance": f"C{step}"} for grade in "654" for step in "2345"},
    # stabilised rings, DIN 623-1: dimensions hold up to this temperature, degC
    **{
        name: {"stabilised_to": limit}
        for name, limit in {"SN": 120.0, "S0": 150.0, "S1": 200.0, "S2": 250.0, "S3": 300.0, "S4": 350.0}.items()
    },
    **_each("2Z ZZ 2ZR ZZE 2ZN", _SHIELDS),
    **_each("Z ZR ZN ZNR", _ONE_SHIELD),
    **_each("2RS 2RS1 2RS2 2RSR 2RSH 2RSH2 2RSL 2RZ 2RD 2LS LLU LLB LLH DDU DD VV 2HRS 2BRS 2CS 2CS2 2NSE", _SEALS),
    **_each("RS RS1 RS2 RSR RSH RZ RD LU DU HRS", _ONE_SEAL),
    **_each("J JN JR JW JA", _STEEL),
    **_each("M MA MB ML MP MR M1 M1A M1B MPA MPB MA6 FPA Y", _BRASS),
    **_each("TN TN9 TNG TNGH TV TVH TVP TVP2 TVPB", _POLYAMIDE),
    **_each("V VH VR", _FULL),
}

_P_IS_POLYAMIDE: Mapping[str, Says] = {"P": _POLYAMIDE}
_PAIRS: Mapping[str, Says] = {
    "DB": {"arrangement": "back-to-back"},
    "DF": {"arrangement": "face-to-face"},
    "DT": {"arrangement": "tandem"},
}
_ANGULAR: Mapping[str, Says] = {
    **_each("C CD CE", {"contact_angle": 15.0}),
    **_each("AC ACD ACE", {"contact_angle": 25.0}),
    "A": {"contact_angle": 30.0},
    "B": {"contact_angle": 40.0},
}
_BY_FAMILY: Mapping[str, Mapping[str, Says]] = {
    "angular contact ball": {**_ANGULAR, **_PAIRS, **_P_IS_POLYAMIDE},
    "tapered roller": _PAIRS,
    "cylindrical roller": _P_IS_POLYAMIDE,
    "full complement cylindrical roller": _P_IS_POLYAMIDE,
}

# Bore taper, grooves, holes, snap ring, tolerance class, design: known, and no matter here.
_HARMLESS = _words("K K30 N NR N1 N2 W W20 W26 W33 W64 S E X A AS P0 P6 P6X P5 P4 P4A P2 SP UP")
_HARMLESS_BY_FAMILY: Mapping[str, frozenset[str]] = {
    "deep groove ball": _words("B"),
    "double row deep groove ball": _words("B"),
    "double row angular contact ball": _words("B"),
    "angular contact ball": _words("CA CB CC GA GB GC UA UO UL EC U"),
    "cylindrical roller": _words("EC C"),
    "full complement cylindrical roller": _words("EC C CV B"),
    "tapered roller": _words("J J2 Q XU"),
    "spherical roller": _words("CC CCJA CA CAC CD C E1 E4 EJA B"),
    "thrust spherical roller": _words("E1"),
}

# What may be taken off the front of a piece whose rest is unknown: it cannot be mistaken for anything else.
LEADING: Mapping[str, frozenset[str]] = {
    "": frozenset(
        name for name, says in _GENERAL.items() if "clearance" in says or ("seal" in says and says["sealed_sides"] == 2)
    ),
    "angular contact ball": frozenset(_ANGULAR),
}


def meaning(suffix: str, family: str) -> Says | None:
    """Return what a suffix says on a family, or None where it says nothing that is read.

    >>> meaning("C3", "deep groove ball"), meaning("B", "angular contact ball"), meaning("B", "deep groove ball")
    ({'clearance': 'C3'}, {'contact_angle': 40.0}, None)
    """
    own = _BY_FAMILY.get(family, {}).get(suffix)
    return own if own is not None else _GENERAL.get(suffix)


def harmless(suffix: str, family: str) -> bool:
    """Tell whether a suffix is known and changes nothing here."""
    return suffix in _HARMLESS or suffix in _HARMLESS_BY_FAMILY.get(family, frozenset())
