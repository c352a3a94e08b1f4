"""Viscosity index by ASTM D2270 / ISO 2909, procedures A and B, and its inverse."""

from __future__ import annotations

import numpy as np

from lubecheck.method import method
from lubecheck.units import Array, Mm2PerS, Number

# ASTM D2270, Table 1: L and H, the viscosities at 40 degC of reference oils of index 0 and 100 that have the
# viscosity Y at 100 degC. The standard asks for linear interpolation. Held in tests/reference/test_astm_d2270.py to
# the standard's own quadratic equations, which stand for the same table to 0.1 %.
_Y = np.concatenate([np.arange(20, 200) / 10, np.arange(100, 150) / 5, np.arange(60, 141) / 2])
# fmt: off
_L = np.array([
    7.994, 8.64, 9.309, 10, 10.71, 11.45, 12.21, 13, 13.8, 14.63, 15.49, 16.36, 17.26, 18.18, 19.12, 20.09, 21.08,
    22.09, 23.13, 24.19, 25.32, 26.5, 27.75, 29.07, 30.48, 31.96, 33.52, 35.13, 36.79, 38.5, 40.23, 41.99, 43.76,
    45.53, 47.31, 49.09, 50.87, 52.64, 54.42, 56.2, 57.97, 59.74, 61.52, 63.32, 65.18, 67.12, 69.16, 71.29, 73.48,
    75.72, 78, 80.25, 82.39, 84.53, 86.66, 88.85, 91.04, 93.2, 95.43, 97.72, 100, 102.3, 104.6, 106.9, 109.2, 111.5,
    113.9, 116.2, 118.5, 120.9, 123.3, 125.7, 128, 130.4, 132.8, 135.3, 137.7, 140.1, 142.7, 145.2, 147.7, 150.3,
    152.9, 155.4, 158, 160.6, 163.2, 165.8, 168.5, 171.2, 173.9, 176.6, 179.4, 182.1, 184.9, 187.6, 190.4, 193.3,
    196.2, 199, 201.9, 204.8, 207.8, 210.7, 213.6, 216.6, 219.6, 222.6, 225.7, 228.8, 231.9, 235, 238.1, 241.2, 244.3,
    247.4, 250.6, 253.8, 257, 260.1, 263.3, 266.6, 269.8, 273, 276.3, 279.6, 283, 286.4, 289.7, 293, 296.5, 300, 303.4,
    306.9, 310.3, 313.9, 317.5, 321.1, 324.6, 328.3, 331.9, 335.5, 339.2, 342.9, 346.6, 350.3, 354.1, 358, 361.7,
    365.6, 369.4, 373.3, 377.1, 381, 384.9, 388.9, 392.7, 396.7, 400.7, 404.6, 408.6, 412.6, 416.7, 420.7, 424.9, 429,
    433.2, 437.3, 441.5, 445.7, 449.9, 454.2, 458.4, 462.7, 467, 471.3, 475.7, 479.7, 483.9, 488.6, 493.2, 501.5,
    510.8, 519.9, 528.8, 538.4, 547.5, 556.7, 566.4, 575.6, 585.2, 595, 604.3, 614.2, 624.1, 633.6, 643.4, 653.8,
    663.3, 673.7, 683.9, 694.5, 704.2, 714.9, 725.7, 736.5, 747.2, 758.2, 769.3, 779.7, 790.4, 801.6, 812.8, 824.1,
    835.5, 847, 857.5, 869, 880.6, 892.3, 904.1, 915.8, 927.6, 938.6, 951.2, 963.4, 975.4, 987.1, 998.9, 1011, 1023,
    1055, 1086, 1119, 1151, 1184, 1217, 1251, 1286, 1321, 1356, 1391, 1427, 1464, 1501, 1538, 1575, 1613, 1651, 1691,
    1730, 1770, 1810, 1851, 1892, 1935, 1978, 2021, 2064, 2108, 2152, 2197, 2243, 2288, 2333, 2380, 2426, 2473, 2521,
    2570, 2618, 2667, 2717, 2767, 2817, 2867, 2918, 2969, 3020, 3073, 3126, 3180, 3233, 3286, 3340, 3396, 3452, 3507,
    3563, 3619, 3676, 3734, 3792, 3850, 3908, 3966, 4026, 4087, 4147, 4207, 4268, 4329, 4392, 4455, 4517, 4580, 4645,
    4709, 4773, 4839, 4905,
])
_H = np.array([
    6.394, 6.894, 7.41, 7.944, 8.496, 9.063, 9.647, 10.25, 10.87, 11.5, 12.15, 12.82, 13.51, 14.21, 14.93, 15.66,
    16.42, 17.19, 17.97, 18.77, 19.56, 20.37, 21.21, 22.05, 22.92, 23.81, 24.71, 25.63, 26.57, 27.53, 28.49, 29.46,
    30.43, 31.4, 32.37, 33.34, 34.32, 35.29, 36.26, 37.23, 38.19, 39.17, 40.15, 41.13, 42.14, 43.18, 44.24, 45.33,
    46.44, 47.51, 48.57, 49.61, 50.69, 51.78, 52.88, 53.98, 55.09, 56.2, 57.31, 58.45, 59.6, 60.74, 61.89, 63.05,
    64.18, 65.32, 66.48, 67.64, 68.79, 69.94, 71.1, 72.27, 73.42, 74.57, 75.73, 76.91, 78.08, 79.27, 80.46, 81.67,
    82.87, 84.08, 85.3, 86.51, 87.72, 88.95, 90.19, 91.4, 92.65, 93.92, 95.19, 96.45, 97.71, 98.97, 100.2, 101.5,
    102.8, 104.1, 105.4, 106.7, 108, 109.4, 110.7, 112, 113.3, 114.7, 116, 117.4, 118.7, 120.1, 121.5, 122.9, 124.2,
    125.6, 127, 128.4, 129.8, 131.2, 132.6, 134, 135.4, 136.8, 138.2, 139.6, 141, 142.4, 143.9, 145.3, 146.8, 148.2,
    149.7, 151.2, 152.6, 154.1, 155.6, 157, 158.6, 160.1, 161.6, 163.1, 164.6, 166.1, 167.7, 169.2, 170.7, 172.3,
    173.8, 175.4, 177, 178.6, 180.2, 181.7, 183.3, 184.9, 186.5, 188.1, 189.7, 191.3, 192.9, 194.6, 196.2, 197.8,
    199.4, 201, 202.6, 204.3, 205.9, 207.6, 209.3, 211, 212.7, 214.4, 216.1, 217.7, 219.4, 221.1, 222.8, 224.5, 226.2,
    227.7, 229.5, 233, 236.4, 240.1, 243.5, 247.1, 250.7, 254.2, 257.8, 261.5, 264.9, 268.6, 272.3, 275.8, 279.6,
    283.3, 286.8, 290.5, 294.4, 297.9, 301.8, 305.6, 309.4, 313, 317, 320.9, 324.9, 328.8, 332.7, 336.7, 340.5, 344.4,
    348.4, 352.3, 356.4, 360.5, 364.6, 368.3, 372.3, 376.4, 380.6, 384.6, 388.8, 393, 396.6, 401.1, 405.3, 409.5,
    413.5, 417.6, 421.7, 432.4, 443.2, 454, 464.9, 475.9, 487, 498.1, 509.6, 521.1, 532.5, 544, 555.6, 567.1, 579.3,
    591.3, 603.1, 615, 627.1, 639.2, 651.8, 664.2, 676.6, 689.1, 701.9, 714.9, 728.2, 741.3, 754.4, 767.6, 780.9,
    794.5, 808.2, 821.9, 835.5, 849.2, 863, 876.9, 890.9, 905.3, 919.6, 933.6, 948.2, 962.9, 977.5, 992.1, 1007, 1021,
    1036, 1051, 1066, 1082, 1097, 1112, 1127, 1143, 1159, 1175, 1190, 1206, 1222, 1238, 1254, 1270, 1286, 1303, 1319,
    1336, 1352, 1369, 1386, 1402, 1419, 1436, 1454, 1471, 1488, 1506, 1523, 1541, 1558,
])
# fmt: on
_LOG_Y = np.log(_Y)
_LAST = len(_Y) - 1

_SLOPE_B = 0.00715  # D2270, procedure B: index = (10^N - 1)/0.00715 + 100
_LEAST_Y = 2.0  # mm^2/s at 100 degC; the index is not defined below
_ROUNDING = 1e-9  # of ln(U) at that end: an index worked out from there has to lead back there
_LOG_MOST_Y = np.log(1e6)  # mm^2/s: upper end of the bracket of the inverse, beyond any lubricant


def _above_table(y: Array) -> tuple[Array, Array]:
    """Return L and H above 70 mm^2/s at 100 degC (D2270, equations 1 and 2)."""
    return (0.8353 * y + 14.67) * y - 216, (0.1684 * y + 11.85) * y - 97


def _reference_oils(y: Array) -> tuple[Array, Array]:
    """Return L and H at a viscosity at 100 degC."""
    beyond = y > _Y[_LAST]
    far_low, far_high = _above_table(y)
    return np.where(beyond, far_low, np.interp(y, _Y, _L)), np.where(beyond, far_high, np.interp(y, _Y, _H))


@method(source="astm-d2270", valid={"nu_40": (2.0, 1e6), "nu_100": (_LEAST_Y, 1e5)})
def viscosity_index(*, nu_40: Mm2PerS, nu_100: Mm2PerS) -> Number:
    """Viscosity index: how little an oil thins with heat, against two reference oils (not rounded).

    Procedure A, up to 100: 100 (L - U)/(L - H). Procedure B, above: (10^N - 1)/0.00715 + 100 with
    N = log(H/U)/log Y; U = nu_40, Y = nu_100. Not defined below 2 mm^2/s at 100 degC, and not a number where nu_100
    is not below nu_40. The standard prints whole numbers; its own precision is about 2.

    nu_40 [mm^2/s]: kinematic viscosity U at 40 degC, any shape
    nu_100 [mm^2/s]: kinematic viscosity Y at 100 degC, broadcasts with nu_40
    returns [1]

    >>> viscosity_index(nu_40="73.30 mm^2/s", nu_100="8.86 mm^2/s").round(0)
    <Quantity(92.0, 'dimensionless')>
    """
    low, high = _reference_oils(nu_100)
    by_a = 100 * (low - nu_40) / (low - high)
    by_b = (np.exp(np.log(high / nu_40) / np.log(nu_100) * np.log(10)) - 1) / _SLOPE_B + 100
    index = np.where(nu_40 > high, by_a, by_b)
    return np.where(nu_100 < nu_40, index, np.nan)


@method(source="astm-d2270", valid={"nu_40": (2.0, 1e6), "index": (-200.0, 1000.0)})
def nu_100_from_index(nu_40: Mm2PerS, index: Number) -> Mm2PerS:
    """Kinematic viscosity at 100 degC from that at 40 degC and the viscosity index: the inverse of D2270.

    U(Y) of a given index rises with Y: the row of Table 1 that encloses U is found by halving, then Newton steps on
    the log-log scale, held inside that row (above 70 mm^2/s inside the reach of the standard's equations). Exact to
    rounding. Not a number where the viscosity at 100 degC would be below 2 mm^2/s: the index is not defined there.

    nu_40 [mm^2/s]: kinematic viscosity at 40 degC, any shape
    index [1]: viscosity index, broadcasts with nu_40
    returns [mm^2/s]

    >>> nu_100_from_index("100 mm^2/s", 95).round(2)
    <Quantity(11.07, 'millimeter ** 2 / second')>
    """
    nu_40, index = np.broadcast_arrays(np.asarray(nu_40, dtype=np.float64), np.asarray(index, dtype=np.float64))
    target = np.log(nu_40)
    by_a = index <= 100
    share = np.minimum(index, 100) / 100  # of H in U, procedure A
    power = np.log10(1 + _SLOPE_B * (np.maximum(index, 100) - 100))  # N, procedure B

    def log_u(low: Array, high: Array, log_y: Array) -> Array:
        return np.log(np.where(by_a, low + share * (high - low), high)) - power * log_y

    first = np.zeros(nu_40.shape, dtype=np.intp)
    last = np.full(nu_40.shape, _LAST + 1, dtype=np.intp)  # the row after the last one stands for the equations
    for _ in range(_LAST.bit_length()):
        middle = (first + last) // 2
        is_right = (last - first > 1) & (log_u(_L[middle], _H[middle], _LOG_Y[middle]) <= target)
        is_left = (last - first > 1) & ~is_right
        first, last = np.where(is_right, middle, first), np.where(is_left, middle, last)

    in_table = first < _LAST
    after = np.minimum(first + 1, _LAST)
    start, end = _LOG_Y[first], np.where(in_table, _LOG_Y[after], _LOG_MOST_Y)
    width = np.where(in_table, _Y[after] - _Y[first], 1.0)
    slope_low, slope_high = (_L[after] - _L[first]) / width, (_H[after] - _H[first]) / width
    log_y = start
    for _ in range(6):  # in a row of the table 3 steps reach rounding, above the table 5
        y = np.exp(log_y)
        far_low, far_high = _above_table(y)
        low = np.where(in_table, _L[first] + slope_low * (y - _Y[first]), far_low)
        high = np.where(in_table, _H[first] + slope_high * (y - _Y[first]), far_high)
        low_rise = np.where(in_table, slope_low, 2 * 0.8353 * y + 14.67)
        high_rise = np.where(in_table, slope_high, 2 * 0.1684 * y + 11.85)
        rise = np.where(by_a, low_rise + share * (high_rise - low_rise), high_rise)
        level = np.where(by_a, low + share * (high - low), high)
        step = (log_u(low, high, log_y) - target) / (rise * y / level - power)
        log_y = np.clip(log_y - step, start, end)
    least = log_u(_L[0], _H[0], _LOG_Y[0])
    return np.where(target >= least - _ROUNDING, np.exp(log_y), np.nan)


@method(source="astm-d2270", valid={"nu_100": (_LEAST_Y, 1e5), "index": (-200.0, 1000.0)})
def nu_40_from_index(nu_100: Mm2PerS, index: Number) -> Mm2PerS:
    """Kinematic viscosity at 40 degC from that at 100 degC and the viscosity index (D2270, solved for U).

    nu_100 [mm^2/s]: kinematic viscosity at 100 degC, any shape
    index [1]: viscosity index, broadcasts with nu_100
    returns [mm^2/s]

    >>> nu_40_from_index("8.86 mm^2/s", 92).round(1)
    <Quantity(73.5, 'millimeter ** 2 / second')>
    """
    low, high = _reference_oils(nu_100)
    power = np.log10(1 + _SLOPE_B * (np.maximum(index, 100) - 100))
    by_a = low + np.minimum(index, 100) / 100 * (high - low)
    return np.where(np.asarray(index) <= 100, by_a, high * np.exp(-power * np.log(nu_100)))
