"""What moves a grease interval beside load and temperature: the turning ring, air passing through, grease kind, rest.

The plain answers follow the pattern of grease_life; the figures are weaker than its own, and each says how sure it is.
"""

from __future__ import annotations

from typing import Annotated

import numpy as np
from numpy.typing import NDArray

from lubecheck.method import method
from lubecheck.physics.grease_life import CALENDAR_CEILING, Answer
from lubecheck.units import DAY_H, Choice, DegC, DeltaDegC, Hour, Mm, Number, Rpm

# The outer ring throws the oil out of its grease; handbooks 0.5 to 0.7, from memory.
TURNING_RING = (
    Answer("inner", 1.0, "the inner ring turns with the shaft"),
    Answer("outer", 0.5, "the outer ring turns: wheel hubs, pulleys, support rollers"),
)
# GfT worksheet 3, f5, from memory: slight 0.5 to 0.7, strong 0.1 to 0.5; the cautious half of each range is taken.
AIR_FLOW = (
    Answer("none", 1.0, "no air is drawn through the bearing"),
    Answer("slight", 0.5, "a light stream of air passes through it"),
    Answer("strong", 0.2, "a fan draws or blows air through it"),
)

# (temperature up to which the full interval holds, rise that halves it): the three pairs that handbooks print.
HALVING_PAIRS = ((65.0, 14.0), (70.0, 15.0), (80.0, 17.0))
_REFERENCES, _STEPS = (np.array(column) for column in zip(*HALVING_PAIRS, strict=True))

TurningRing = Annotated[NDArray[np.intp], Choice(tuple(answer.word for answer in TURNING_RING))]
AirFlow = Annotated[NDArray[np.intp], Choice(tuple(answer.word for answer in AIR_FLOW))]
_TURNING_RING, _AIR_FLOW = (np.array([a.factor for a in answers]) for answers in (TURNING_RING, AIR_FLOW))


@method(source="reliability-handbooks")
def turning_ring_factor(ring: TurningRing) -> Number:
    """Factor of the turning ring on the interval: 1 inner, 0.5 outer (published 0.5 to 0.7, from memory).

    ring: inner or outer; the plain face takes its position
    returns [1]

    >>> turning_ring_factor("outer")
    <Quantity(0.5, 'dimensionless')>
    """
    return _TURNING_RING[ring]


@method(source="gft-3:f5")
def air_flow_factor(air_flow: AirFlow) -> Number:
    """Factor of air that passes through the bearing on the interval: 1, 0.5, 0.2.

    air_flow: none, slight or strong, as AIR_FLOW says; the plain face takes its position
    returns [1]

    >>> air_flow_factor("slight")
    <Quantity(0.5, 'dimensionless')>
    """
    return _AIR_FLOW[air_flow]


@method(source="mil-hdbk-1164", valid={"reference": (0.0, 250.0)})
def halving_step(reference: DegC) -> DeltaDegC:
    """Rise of temperature that halves the life of a grease, by the temperature up to which it keeps its full interval.

    Handbooks print three pairs: 14 K above 65 degC, 15 K above 70, 17 K above 80. Linear between; greases beyond the
    pairs keep the step of the nearest, since nobody published one for them.

    reference [degC]: temperature up to which the full interval stands, any shape
    returns [delta_degC]

    >>> halving_step("75 degC").round(6)
    <Quantity(16.0, 'delta_degree_Celsius')>
    """
    step: DeltaDegC = np.interp(reference, _REFERENCES, _STEPS)
    return step


@method(source="gft-3", valid={"k_f": (0.5, 40.0), "speed": (1e-3, 1e6), "pitch_diameter": (1.0, 1e4)})
def worksheet_parameter(k_f: Number, speed: Rpm, pitch_diameter: Mm) -> Number:
    """Abscissa k_f n dm of the interval curve of GfT worksheet 3 and DIN 51825, in mm/min.

    The curve is in `grease_curve`, from memory: with this figure a reader who has the worksheet can check it there.
    Bigger k_f is shorter, the opposite sense of the classical K.

    k_f [1]: bearing type factor of the worksheet, any shape
    speed [rpm]: speed n, broadcasts
    pitch_diameter [mm]: mean diameter dm, broadcasts
    returns [1]

    >>> worksheet_parameter(1.0, "1480 rpm", "72.5 mm").round(0)
    <Quantity(107300.0, 'dimensionless')>
    """
    return k_f * speed * pitch_diameter


@method(source="mil-hdbk-1164", valid={"running_life": (0.0, 1e9), "hours_per_day": (0.1, DAY_H)})
def with_rest(*, running_life: Hour, hours_per_day: Hour) -> Hour:
    """Running hours that a grease serves where it also ages at rest.

    1/t = 1/t_run + ((24 - h)/h) / 48 months: damage adds up linearly, and at rest the grease lasts the calendar
    ceiling, by which it has bled and oxidised. The ceiling is MIL-HDBK-1164's; to add it up as ageing is an estimate
    of this program, on the cautious side.

    running_life [h]: life if it ran without a stop t_run, any shape
    hours_per_day [h]: running time in a day h, broadcasts with running_life
    returns [h]

    >>> with_rest(running_life="10000 h", hours_per_day="8 h").round(0)
    <Quantity(6368.0, 'hour')>
    """
    return 1.0 / (1.0 / running_life + (DAY_H / hours_per_day - 1.0) / CALENDAR_CEILING)
