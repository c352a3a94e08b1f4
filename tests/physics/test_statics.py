"""Statics of a shaft on two bearings: forces and moments balance, whatever the places."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.physics import statics

forces = st.floats(-1e6, 1e6)
directions = st.floats(-360, 360)
positions = st.floats(-3000, 5000)
spans = st.floats(50, 2000)


def both(force, direction, position, span):
    here = statics.bearing_load.plain(force, direction, position=position, span=span)
    there = statics.bearing_load.plain(force, direction, position=span - position, span=span)
    return np.array(here), np.array(there)


@given(forces, directions, positions, spans)
def test_the_two_reactions_add_up_to_the_force_and_its_moment(force, direction, position, span):
    here, there = both(force, direction, position, span)
    parts = force * np.array([np.cos(np.radians(direction)), np.sin(np.radians(direction))])
    scale = (1 + abs(position / span)) * abs(force)
    assert here + there == pytest.approx(parts, abs=1e-9 * scale + 1e-12)
    # moment about this bearing: the other one's reaction at the span balances the force at its place
    assert there * span == pytest.approx(parts * position, abs=1e-9 * scale * span + 1e-9)


@pytest.mark.parametrize(
    ("position", "here", "there"), [(0, 1, 0), (500, 0, 1), (250, 0.5, 0.5), (-125, 1.25, -0.25), (750, -0.5, 1.5)]
)
def test_a_force_over_a_bearing_between_them_and_overhung(position, here, there):
    ours, other = both(1000.0, 0.0, float(position), 500.0)
    assert ours[0] == pytest.approx(1000 * here)
    assert other[0] == pytest.approx(1000 * there)


@given(forces, directions, positions, spans, st.floats(-180, 180))
def test_turning_a_force_turns_the_reaction_and_keeps_its_size(force, direction, position, span, turn):
    sizes = [
        statics.resultant.plain(down=parts[0], across=parts[1])
        for parts in (both(force, angle, position, span)[0] for angle in (direction, direction + turn))
    ]
    assert sizes[0] == pytest.approx(sizes[1], rel=1e-9, abs=1e-9)


def test_a_bare_number_is_refused():
    with pytest.raises(Exception, match="length"):
        statics.bearing_share(position=100, span="500 mm")
