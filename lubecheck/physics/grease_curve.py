"""The curve of GfT worksheet 3 and DIN 51825: grease life against k_f n dm, as it is remembered.

No figure of the chart was seen when this was written: its points are a chart reading from memory. So the line stands
beside the others with its range, and never governs.
"""

from __future__ import annotations

import numpy as np

from lubecheck.method import method
from lubecheck.units import Hour, Number

# Lithium soap with mineral oil at 70 degC, 10 % of bearings failed; from memory. k_f n dm in mm/min, hours. The chart
# begins at 100 000 h and its axis ends at 300 h.
_PARAMETER = np.array([20e3, 100e3, 200e3, 400e3, 600e3, 1000e3, 2000e3])
_LIFE = np.array([100_000.0, 30_000.0, 17_000.0, 7_500.0, 4_500.0, 2_000.0, 400.0])
_LOG_PARAMETER, _LOG_LIFE = np.log(_PARAMETER), np.log(_LIFE)
FAILED = 0.10  # share of bearings
# Times or divided by: the points may be read wrong by 1.6; with the worksheet's own range of k_f, such as 7 to 9 or 1.3
# to 1.6, that is 1.8. Estimates of this program.
CURVE_DOUBT = 1.8


@method(source="gft-3", valid={"parameter": (float(_PARAMETER[0]), float(_PARAMETER[-1]))})
def worksheet_life(parameter: Number) -> Hour:
    """Life of lithium soap grease at 70 degC by the curve of GfT worksheet 3: 10 % have failed by then.

    From memory, times or divided by 1.8 (CURVE_DOUBT); straight in log-log between its points. Light load, clean, dry,
    horizontal, inner ring turning; the worksheet's factors f1 to f6 come on top. Below its left end that end stands.

    parameter [1]: k_f n dm in mm/min, see grease_corrections.worksheet_parameter, any shape
    returns [h]

    >>> worksheet_life([2e4, 1.4142e5, 1e6]).round(-2)
    <Quantity([100000.  22600.   2000.], 'hour')>
    """
    hours: Hour = np.exp(np.interp(np.log(parameter), _LOG_PARAMETER, _LOG_LIFE))
    return hours
