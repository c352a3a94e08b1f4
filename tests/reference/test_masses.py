"""Masses of handbook tables in kg (memory, to about 3 %) against the estimate from the free share of the envelope."""

import pytest

from lubecheck.data import bearings
from lubecheck.data.families import FAMILIES

MASSES = """
6205 0.13, 6208 0.37, 6309 0.83, 6310 1.05, 6216 1.40, 6320 7.0, 6009 0.25, 6020 1.25, 61910 0.14, 6410 1.9
NU 210 0.48, NU 310 1.15, NU 2210 0.57, NU 2310 1.75, NU 220 3.45, NU 1020 1.45, NCF 3010 0.46, NCF 2920 1.1
22210 0.61, 22218 3.4, 22220 4.9, 22310 1.85, 22320 13.0, 23040 23.3, 23120 4.3, 23220 6.6, 24024 5.3
30210 0.54, 30310 1.25, 32210 0.60, 32310 1.85, 32020 1.9, 33210 0.90, 31310 1.2, 7210 B 0.47, 7310 B 1.1, 7220 B 3.2
3310 1.95, 1210 0.53, 1310 1.2, 2210 0.60, 2310 1.65, 4210 0.64, QJ 310 1.35, QJ 212 0.99, 51110 0.15, 51210 0.37
51310 0.95, 51410 2.0, 29420 10.5, 29320 3.65, 81110 0.14, 81210 0.38, NA 4910 0.27, NA 6910 0.52, NA 4920 1.9
"""
ENTRIES = [entry.strip() for entry in MASSES.replace("\n", ",").split(",") if entry.strip()]


@pytest.mark.parametrize("entry", ENTRIES)
def test_published_masses_lie_in_the_spread_of_the_estimate(entry):
    name, mass = entry.rsplit(maxsplit=1)
    found = bearings.find(name)
    low, high = found.estimated["mass"]
    assert 0.97 * low * found.mass <= 1000 * float(mass) <= 1.03 * high * found.mass


def test_every_family_is_weighed():
    assert {bearings.find(entry.rsplit(maxsplit=1)[0]).family for entry in ENTRIES} == set(FAMILIES)
