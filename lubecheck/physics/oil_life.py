"""Oil: how long a charge serves, by oxidation, and what water and a large charge do to it.

`grease_life.bath_change_interval` holds the handbooks' rule for baths; here is the rule of oxidation beside it.
"""

from __future__ import annotations

import math
from typing import Annotated

import numpy as np
from numpy.typing import NDArray

from lubecheck.method import method
from lubecheck.units import YEAR_H, Choice, Cm3, DegC, Hour, LPerMin, Mm, Number, Watt

_OXIDATION_COOL, _OXIDATION_YEARS, _OXIDATION_STEP = 70.0, 4.0, 10.0  # Whitby, TLT Nov 2009
OXIDATION_TOP = 110.0  # degC; own estimate: one step beyond the published points at 70 to 100
OXIDATION_RANGE = (2.0, 3.0)  # an oil ages 2 to 3 times as fast each 10 K (Whitby)
LEAST_DWELL = 5 / 60  # h, that circulating oil should rest in its tank; common practice 5 to 10 min, from memory

# How large an ordinary charge is, so that the change rules stand for it as they are printed. A sump: 5 to 10 l for each
# kW that is lost in it (gear handbooks, from memory). A circuit: 5 to 10 min of the pump's flow (common practice).
ORDINARY_SUMP = (5.0, 10.0)  # cm^3 a W of friction, which is l a kW
ORDINARY_DWELL = (LEAST_DWELL, 2 * LEAST_DWELL)  # h
# A larger charge ages more slowly: handbooks agree and print no figure. In proportion above the ordinary range and at
# most doubled is an estimate of this program (1 to 4 times can be true); a smaller charge is told and gains nothing,
# and so does one that nobody stated: 1 is the cautious end. No charge is given longer than the longest that a rule
# prints, which is for a cool oil.
MOST_BY_CHARGE = 2.0

# Share of the change interval that is left with water about: estimates of this program; only "half where water gets
# in" is met in handbooks, from memory.
WATER_SHARES = {"dry": 1.0, "humid": 1.0, "damp": 0.5, "wet": 0.25}
_WATER_SHARES = np.array(list(WATER_SHARES.values()))
Water = Annotated[NDArray[np.intp], Choice(tuple(WATER_SHARES))]


@method(source="whitby", valid={"temperature": (-40.0, OXIDATION_TOP)})
def oxidation_life(temperature: DegC) -> Hour:
    """Calendar time after which a mineral oil is worn out by oxidation.

    4 years up to 70 degC, halved each 10 K from there: 2 at 80, 1 at 90, 1/2 at 100. Published rates lie between 2 and
    3 times each 10 K (OXIDATION_RANGE). Hotter oils are outside its range.

    temperature [degC]: temperature of the oil where it is hottest for long, any shape
    returns [h]

    >>> oxidation_life(["60 degC", "90 degC"]).to("year").round(6)
    <Quantity([4. 1.], 'year')>
    """
    over = np.maximum(temperature - _OXIDATION_COOL, 0.0)
    return _OXIDATION_YEARS * YEAR_H * np.exp((-math.log(2.0) / _OXIDATION_STEP) * over)


@method(source="own-estimate")
def water_share(water: Water) -> Number:
    """Share of an oil change interval that is left where water gets about: 1, 1, 0.5, 0.25.

    water: dry, humid, damp or wet, as grease_life.WATER says; the plain face takes its position
    returns [1]

    >>> water_share("damp")
    <Quantity(0.5, 'dimensionless')>
    """
    return _WATER_SHARES[water]


@method(source="common-practice", valid={"volume": (0.0, 1e9), "flow": (1e-6, 1e5)})
def dwell_time(volume: Cm3, flow: LPerMin) -> Hour:
    """Time that circulating oil rests in its tank: volume over flow; 5 to 10 min let air and water part from it.

    volume [cm^3]: oil in the circuit, any shape
    flow [l/min]: flow of the pump, broadcasts with volume
    returns [h]

    >>> dwell_time("20 l", "2 l/min").to("min").round(6)
    <Quantity(10.0, 'minute')>
    """
    return volume / (flow * 60e3)


@method(source="own-estimate", valid={"volume": (1.0, 1e8), "power": (0.0, 1e6)})
def sump_share(volume: Cm3, power: Watt) -> Number:
    """Factor on the change interval of a bath by its size: 1 up to 10 l/kW of friction heat, in proportion, at most 2.

    volume [cm^3]: oil in the bath, any shape
    power [W]: friction heat that goes into it, broadcasts with volume
    returns [1]

    >>> sump_share(["0.4 l", "1.2 l", "9 l"], "80 W").round(6)
    <Quantity([1.  1.5 2. ], 'dimensionless')>
    """
    specific = volume / np.maximum(power, 1e-9)
    return np.clip(specific / ORDINARY_SUMP[1], 1.0, MOST_BY_CHARGE)


@method(source="own-estimate", valid={"dwell": (0.0, 1e6)})
def circuit_share(dwell: Hour) -> Number:
    """Factor on the change interval of circulating oil by how seldom it turns over: 1 up to 10 min, at most 2.

    dwell [h]: time that the oil rests in its tank, any shape
    returns [1]

    >>> circuit_share(["4 min", "15 min", "1 h"]).round(6)
    <Quantity([1.  1.5 2. ], 'dimensionless')>
    """
    return np.clip(dwell / ORDINARY_DWELL[1], 1.0, MOST_BY_CHARGE)


@method(source="neale:C8.5", valid={"outside": (0.5, 5000.0), "width": (0.5, 5000.0)})
def guide_flow(*, outside: Mm, width: Mm) -> LPerMin:
    """Flow of circulating oil as a guide: 0.6 cm^3/min for each cm^2 of D B.

    outside [mm]: outside diameter D, any shape
    width [mm]: width B, broadcasts with outside
    returns [l/min]

    >>> guide_flow(outside="140 mm", width="33 mm").round(5)
    <Quantity(0.02772, 'liter / minute')>
    """
    return 0.6e-5 * outside * width
