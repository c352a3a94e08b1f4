"""Grease amounts: the room in a bearing, how much of it to fill, and how much to add.

Handbooks disagree about fills by nearly a factor of two (30 to 50 % of the free space in one, 30 to 40 % in another,
the whole bearing with a part-filled housing in a third), so bands are returned beside the nominal figures.
"""

from __future__ import annotations

import math
from typing import Annotated

import numpy as np
from numpy.typing import NDArray

from lubecheck.method import method
from lubecheck.units import Choice, Cm3, Gram, GramPerHour, Hour, KgPerM3, Mm, Rpm, Share

STEEL_DENSITY = 7.85  # g/cm^3, bearing steel; a brass cage (8.5) or ceramic balls (3.2) shift the free volume
GREASE_DENSITY = 900.0  # kg/m^3; greases with soap and mineral oil 870 to 950, with fluorinated oil up to 2000
# Low, nominal, high share of the housing's void, by how the shaft lies. Handbooks: 30 to 50 % (Neale); for an upright
# shaft one fills half of the space above the bearing and three quarters of that below, 62 % where they are alike, since
# grease sinks out of it (Neale, from memory), others as for a level one.
HOUSING_FILL = {"horizontal": (0.30, 0.40, 0.50), "vertical": (0.30, 0.50, 0.62)}
_HOUSING_FILL = np.array(list(HOUSING_FILL.values()))
_SLOW_HOUSING = (
    0.90  # high end where n dm is below 50 000: slow ones may be filled, housing too (handbooks: 90 to 100 %)
)
MAKERS_FILL = (0.25, 0.30, 0.35)  # of bearings that are filled and closed by their maker; handbooks, from memory

# Grams a mm^2 of D B, by the way or the rhythm of regreasing. Side and groove: handbooks (Neale p. A20.5 for the side
# rule); weekly and monthly: handbooks, from memory.
REGREASE_GRAMS = {"side": 0.005, "groove": 0.002, "weekly": 0.002, "monthly": 0.003}
_REGREASE_GRAMS = np.array(list(REGREASE_GRAMS.values()))
_PURGE_GRAMS = 0.01  # g/mm^2, before a restart after years at rest or with over-aged grease; handbooks, from memory
_FEED_GRAMS = (0.3e-4, 0.4e-4, 0.5e-4)  # g/(h*mm^2), low, nominal, high; handbooks, from memory

# Time to run with the way out open after greasing. Motor makers' sheets and handbooks, from memory: most say 10 to 30
# min at running speed, single ones 5 min or 2 h. At slow shafts it is the turns that matter, not the minutes: counted
# at 1500 rpm (estimate of this program, as is the longest, a shift).
PURGE_RUN = (10 / 60, 20 / 60, 30 / 60)  # h, low, nominal, high
_PURGE_SPEED = 1500.0  # rpm
_PURGE_LONGEST = 8.0  # h

Orientation = Annotated[NDArray[np.intp], Choice(tuple(HOUSING_FILL))]
SEALINGS = ("open", "closed")  # closed: shields or seals on both sides
Sealing = Annotated[NDArray[np.intp], Choice(SEALINGS)]
_OPEN = np.array(0)
RegreaseRule = Annotated[NDArray[np.intp], Choice(tuple(REGREASE_GRAMS))]

# Speed parameter n dm in mm/min: below the first a bearing is slow and may be filled, from the second it is normal.
_SLOW = 50_000.0  # handbooks
_NORMAL = 150_000.0  # own estimate: the handbooks give no end to the transition
_NEAR_LIMIT = 0.8  # share of the speed limit from which the fill falls; own estimate of "less near the speed limit"

_SPEEDS = {"speed": (1e-3, 1e6), "speed_limit": (1e-3, 1e6), "pitch_diameter": (1.0, 1e4)}
_SIZE = (0.5, 5000.0)


def _envelope(bore: Mm, outside: Mm, width: Mm) -> Cm3:
    return (math.pi / 4000) * (outside * outside - bore * bore) * width


@method(
    source="fill-handbooks",
    valid={"bore": _SIZE, "outside": _SIZE, "width": _SIZE, "mass": (1e-2, 1e8)},
)
def free_volume(*, bore: Mm, outside: Mm, width: Mm, mass: Gram) -> Cm3:
    """Free volume of a bearing: its envelope less its steel.

    V = pi/4 (D^2 - d^2) B - m / 7.85 g/cm^3.

    A 1 % error of the mass is 2 to 4 % of the result. Where the mass fills the envelope it is not this bearing's: the
    result is NaN (refused by the unit-aware face), as that range is one of four arguments together.

    bore [mm]: bore diameter d, any shape
    outside [mm]: outside diameter D, broadcasts with bore
    width [mm]: width B, for tapered roller bearings the assembled width T, broadcasts
    mass [g]: mass m of the bearing, broadcasts
    returns [cm^3]

    >>> free_volume(bore="45 mm", outside="100 mm", width="25 mm", mass="0.83 kg").round(1)
    <Quantity(50.9, 'centimeter ** 3')>
    """
    volume = _envelope(bore, outside, width) - mass / STEEL_DENSITY
    return np.where(volume > 0, volume, np.nan)


@method(
    source="own-estimate",
    valid={"bore": _SIZE, "outside": _SIZE, "width": _SIZE, "free_share": (0.0, 1.0)},
)
def free_volume_from_share(*, bore: Mm, outside: Mm, width: Mm, free_share: Share) -> Cm3:
    """Free volume of a bearing whose mass is unknown: a share of its envelope, by family.

    V = share pi/4 (D^2 - d^2) B; the share is about 0.33 for deep groove ball bearings, 0.30 cylindrical roller and
    angular contact, 0.27 tapered, 0.21 to 0.24 spherical roller. Within about 15 %: light and heavy series differ.

    bore [mm]: bore diameter d, any shape
    outside [mm]: outside diameter D, broadcasts with bore
    width [mm]: width B, for tapered roller bearings the assembled width T, broadcasts
    free_share [1]: free share of the envelope, broadcasts
    returns [cm^3]

    >>> free_volume_from_share(bore="45 mm", outside="100 mm", width="25 mm", free_share=0.33).round(1)
    <Quantity(51.7, 'centimeter ** 3')>
    """
    return free_share * _envelope(bore, outside, width)


@method(source="common-practice", valid={"volume": (0.0, 1e9), "density": (500.0, 3000.0)})
def grease_mass(volume: Cm3, density: KgPerM3) -> Gram:
    """Mass of a volume of grease.

    volume [cm^3]: volume of grease, any shape
    density [kg/m^3]: density of the grease, broadcasts with volume; GREASE_DENSITY where it is unknown
    returns [g]

    >>> grease_mass("10 cm^3", "0.9 g/cm^3").round(6)
    <Quantity(9.0, 'gram')>
    """
    return volume * density * 1e-3


def _slowness(speed: Rpm, pitch_diameter: Mm) -> Share:
    """Return 1 for a slow bearing, 0 for one at normal speed, linear in the logarithm of n dm between."""
    span = math.log(_NORMAL / _SLOW)
    return np.clip((math.log(_NORMAL) - np.log(speed * pitch_diameter)) / span, 0.0, 1.0)


def _nearness(speed: Rpm, speed_limit: Rpm) -> Share:
    """Return 0 up to 0.8 of the speed limit, 1 at it and beyond; that it is beyond is the speed check's to say."""
    return np.clip((speed / speed_limit - _NEAR_LIMIT) / (1.0 - _NEAR_LIMIT), 0.0, 1.0)


def _fill(slow: float, normal: float, limit: float, slowness: Share, nearness: Share) -> Share:
    base = normal + (slow - normal) * slowness
    return base + (limit - base) * nearness


@method(source="fill-handbooks", valid=_SPEEDS)
def first_fill(
    *, speed: Rpm, speed_limit: Rpm, pitch_diameter: Mm, sealing: Sealing = _OPEN
) -> tuple[Share, Share, Share]:
    """First fill of a bearing as a share of its free volume: low, nominal and high.

    A bearing that is closed on both sides is filled by its maker for any speed, with 25 - 30 - 35 %. An open one:
    25 - 30 - 35 % at normal speed (handbooks); 60 - 80 - 100 % where n dm is below 50 000 mm/min (handbooks: up to 90
    to 100 %; the nominal stays lower to leave room within the allowed band), linear in log(n dm) up to 150 000; falling
    from 0.8 of the speed limit to 20 - 25 - 30 % at it (own estimate of the handbooks' "less"). Continuous throughout.
    Handbooks give the bearing of an upright shaft the same fill; the housing's share is `housing_fill`.

    speed [rpm]: speed n, any shape
    speed_limit [rpm]: speed limit of the bearing with this grease, broadcasts with speed
    pitch_diameter [mm]: mean diameter dm = (d + D)/2, broadcasts with speed
    sealing: open, or closed on both sides; the plain face takes its position in SEALINGS
    returns [1, 1, 1]

    >>> [share.magnitude for share in first_fill(speed="1480 rpm", speed_limit="4100 rpm", pitch_diameter="110 mm")]
    [0.25, 0.3, 0.35]
    """
    slowness = _slowness(speed, pitch_diameter)
    nearness = _nearness(speed, speed_limit)
    is_closed = np.asarray(sealing) == SEALINGS.index("closed")
    low, nominal, high = (
        np.where(is_closed, makers, _fill(slow, makers, limit, slowness, nearness))
        for makers, slow, limit in zip(MAKERS_FILL, (0.60, 0.80, 1.00), (0.20, 0.25, 0.30), strict=True)
    )
    return low, nominal, high


@method(source="fill-handbooks", valid={key: _SPEEDS[key] for key in ("speed", "pitch_diameter")})
def housing_fill(speed: Rpm, pitch_diameter: Mm, orientation: Orientation) -> tuple[Share, Share, Share]:
    """First fill of the space beside a bearing as a share of it: low, nominal and high.

    30 - 40 - 50 % (Neale), 30 - 50 - 62 % for an upright shaft: half of the space above, three quarters of that below.
    Where n dm is below 50 000 mm/min up to 90 % (handbooks: slow ones may be filled), linear in log(n dm) up to
    150 000; the nominal stays, so that grease of the bearing finds room.

    speed [rpm]: speed n, any shape
    pitch_diameter [mm]: mean diameter dm = (d + D)/2, broadcasts with speed
    orientation: horizontal or vertical; the plain face takes its position in HOUSING_FILL
    returns [1, 1, 1]

    >>> [share.magnitude for share in housing_fill("1480 rpm", "110 mm", "vertical")]
    [0.3, 0.5, 0.62]
    """
    low, nominal, high = np.moveaxis(_HOUSING_FILL[orientation], -1, 0)
    slowness = _slowness(speed, pitch_diameter)
    return low + 0 * slowness, nominal + 0 * slowness, high + (_SLOW_HOUSING - high) * slowness


@method(source="fill-handbooks", valid=_SPEEDS)
def allowed_fill(*, speed: Rpm, speed_limit: Rpm, pitch_diameter: Mm) -> tuple[Share, Share]:
    """Allowed share of a bearing's free volume that grease may fill in service: lower and upper.

    Lower 20 % always (own estimate below the handbooks' 25 to 30 %). Upper 50 % at normal speed (Neale: 30 to 50 %;
    other handbooks 30 to 40 %, so the wider is taken), 100 % where n dm is below 50 000 mm/min (handbooks: slow ones
    up to 90 % and full), linear in log(n dm) up to 150 000; falling from 0.8 of the speed limit to 35 % at it (own
    estimate). Some handbooks fill the bearing whole and leave the room in the housing: that grease clears as it runs
    and is judged after it has.

    speed [rpm]: speed n, any shape
    speed_limit [rpm]: speed limit of the bearing with this grease, broadcasts with speed
    pitch_diameter [mm]: mean diameter dm = (d + D)/2, broadcasts with speed
    returns [1, 1]

    >>> [share.magnitude for share in allowed_fill(speed="1480 rpm", speed_limit="4100 rpm", pitch_diameter="110 mm")]
    [0.2, 0.5]
    """
    upper = _fill(1.00, 0.50, 0.35, _slowness(speed, pitch_diameter), _nearness(speed, speed_limit))
    return np.full_like(upper, 0.20), upper


@method(source="neale:A20.5", valid={"outside": _SIZE, "width": _SIZE})
def regrease_quantity(*, outside: Mm, width: Mm) -> Gram:
    """Quantity of grease for one regreasing from the side of the bearing.

    G = 0.005 g/mm^2 D B (0.114 oz/in^2).

    outside [mm]: outside diameter D, any shape
    width [mm]: width B, for thrust bearings the height, broadcasts with outside
    returns [g]

    >>> regrease_quantity(outside="140 mm", width="33 mm").round(3)
    <Quantity(23.1, 'gram')>
    """
    return REGREASE_GRAMS["side"] * outside * width


@method(source="fill-handbooks", valid={"outside": _SIZE, "width": _SIZE})
def regrease_quantity_by_rule(*, outside: Mm, width: Mm, rule: RegreaseRule) -> Gram:
    """Quantity of grease for one regreasing, by the way it gets in or the rhythm it is done in.

    G = x D B with x in g/mm^2: side 0.005 (the usual rule), groove 0.002 (through the groove and holes of the outer
    ring, straight between the rows), weekly 0.002, monthly 0.003.

    outside [mm]: outside diameter D, any shape
    width [mm]: width B, for thrust bearings the height, broadcasts with outside
    rule: side, groove, weekly or monthly; the plain face takes its position in REGREASE_GRAMS
    returns [g]

    >>> regrease_quantity_by_rule(outside="160 mm", width="40 mm", rule="groove").round(3)
    <Quantity(12.8, 'gram')>
    """
    return _REGREASE_GRAMS[rule] * outside * width


@method(source="fill-handbooks", valid={"outside": _SIZE, "width": _SIZE})
def purge_quantity(*, outside: Mm, width: Mm) -> Gram:
    """Quantity of grease that renews what is in a neglected bearing, or one that stood for years.

    G = 0.01 g/mm^2 D B, given in steps while it turns slowly, with the way out open. From memory; the quantity is
    right when clean grease comes out. It flows through, and in a small bearing it is more than the free volume holds:
    never to be given at once, nor into a closed housing.

    outside [mm]: outside diameter D, any shape
    width [mm]: width B, for thrust bearings the height, broadcasts with outside
    returns [g]

    >>> purge_quantity(outside="100 mm", width="25 mm").round(3)
    <Quantity(25.0, 'gram')>
    """
    return _PURGE_GRAMS * outside * width


@method(source="common-practice", valid={"speed": (1e-3, 1e6)})
def purge_run(speed: Rpm) -> tuple[Hour, Hour, Hour]:
    """Time to run with the way out open after greasing, and between the steps of a purge: low, nominal, high.

    10 - 20 - 30 min from 1500 rpm up, as many turns (15 000 to 45 000) below it, at most a shift of 8 h. A range of
    common practice, from memory, and no measured end: it is over when the temperature has turned over and nothing more
    comes out.

    speed [rpm]: running speed n, any shape
    returns [h, h, h]

    >>> [round(time.to("min").magnitude) for time in purge_run("300 rpm")]
    [50, 100, 150]
    """
    slow = np.maximum(1.0, _PURGE_SPEED / speed)
    low, nominal, high = (np.minimum(time * slow, _PURGE_LONGEST) for time in PURGE_RUN)
    return low, nominal, high


@method(source="fill-handbooks", valid={"outside": _SIZE, "width": _SIZE})
def continuous_feed(*, outside: Mm, width: Mm) -> tuple[GramPerHour, GramPerHour, GramPerHour]:
    """Rate of continuous feeding, where an interval would be too short: low, nominal, high.

    Q = (0.3 - 0.4 - 0.5) 10^-4 g/(h mm^2) D B. From memory. The nominal rate is one quantity of the side rule in 125 h.

    outside [mm]: outside diameter D, any shape
    width [mm]: width B, for thrust bearings the height, broadcasts with outside
    returns [g/h, g/h, g/h]

    >>> [round(rate.magnitude, 4) for rate in continuous_feed(outside="160 mm", width="40 mm")]
    [0.192, 0.256, 0.32]
    """
    area = outside * width
    low, nominal, high = _FEED_GRAMS
    return low * area, nominal * area, high * area
