"""Lubrication and thermal limits of rolling bearings: film, temperature, fill, interval and life, solved together.

>>> import lubecheck
>>> sorted(name for name in dir(lubecheck) if not name.startswith("_"))
['Case', 'CaseError', 'InputError', 'LubecheckError', 'Result', 'check', 'load_case', 'swap']
"""

from __future__ import annotations

import importlib
from typing import TYPE_CHECKING, Any

if TYPE_CHECKING:
    from lubecheck.errors import CaseError, InputError, LubecheckError
    from lubecheck.model.entries import Case
    from lubecheck.model.reader import load_case
    from lubecheck.model.result import Result
    from lubecheck.studies.remedies import check
    from lubecheck.studies.swap import swap

__version__ = "0.1.0"

__all__ = ["Case", "CaseError", "InputError", "LubecheckError", "Result", "check", "load_case", "swap"]

# Where each public name lives; loaded on first use, so that importing the package costs nothing.
_HOMES = {
    "Case": "model.entries",
    "CaseError": "errors",
    "InputError": "errors",
    "LubecheckError": "errors",
    "Result": "model.result",
    "check": "studies.remedies",
    "load_case": "model.reader",
    "swap": "studies.swap",
}


def __getattr__(name: str) -> Any:
    if name not in _HOMES:
        raise AttributeError(f"module 'lubecheck' has no attribute {name!r}")
    return getattr(importlib.import_module(f"lubecheck.{_HOMES[name]}"), name)


def __dir__() -> list[str]:
    return __all__
