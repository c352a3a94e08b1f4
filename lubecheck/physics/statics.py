"""Statics of a shaft on two bearings: what each force on the shaft means for one of them.

Forces stand across the shaft. A position is the distance from the bearing in question towards the other one: negative
on its outer side (an overhung rotor), more than the span beyond the other bearing. A direction is turned from straight
down: 0 deg down as weight, 90 deg level, 180 deg up.
"""

from __future__ import annotations

import numpy as np

from lubecheck.method import method
from lubecheck.units import Array, Deg, Mm, Newton, Share

_PLACES = {"position": (-1e5, 1e5), "span": (1.0, 1e5)}


@method(source="statics", valid=_PLACES)
def bearing_share(*, position: Mm, span: Mm) -> Share:
    """Share of a force that a bearing carries, 1 - x/l: above 1 for an overhung force, negative where it is lifted.

    position [mm]: where the force acts, from this bearing towards the other, any shape
    span [mm]: distance of the two bearings, broadcasts
    returns [1]

    >>> bearing_share(position="-150 mm", span="600 mm").round(6)
    <Quantity(1.25, 'dimensionless')>
    """
    return 1 - position / span


@method(source="statics", valid={"force": (-1e9, 1e9), "direction": (-720.0, 720.0), **_PLACES})
def bearing_load(force: Newton, direction: Deg, *, position: Mm, span: Mm) -> tuple[Newton, Newton]:
    """Return the part of a force that one bearing carries, down and across.

    force [N]: force on the shaft, any shape
    direction [deg]: its direction, from straight down, broadcasts
    position [mm]: where it acts, from this bearing towards the other, broadcasts
    span [mm]: distance of the two bearings, broadcasts
    returns [N, N]

    >>> parts = bearing_load("1 kN", "60 deg", position="200 mm", span="800 mm")
    >>> [round(float(part.magnitude), 3) for part in parts]
    [375.0, 649.519]
    """
    carried = force * bearing_share.plain(position=position, span=span)
    angle = np.deg2rad(direction)
    return carried * np.cos(angle), carried * np.sin(angle)


@method(source="statics", valid={"down": (-1e9, 1e9), "across": (-1e9, 1e9)})
def resultant(*, down: Newton, across: Newton) -> Newton:
    """Size of a load from its two parts.

    down [N]: part straight down, any shape
    across [N]: level part, broadcasts
    returns [N]

    >>> resultant(down="300 N", across="-400 N").round(6)
    <Quantity(500.0, 'newton')>
    """
    load: Array = np.hypot(down, across)
    return load
