"""Where the tables of data are: inside the installed package, or beside it in a checkout."""

from __future__ import annotations

import functools
from pathlib import Path

from lubecheck.errors import TableError

_PACKAGE = Path(__file__).parent
_PLACES = (_PACKAGE / "fluid_tables", _PACKAGE.parent / "fluid_tables")  # a wheel carries them in the package


@functools.cache
def path(name: str) -> Path:
    """Return where the table of this name is.

    Raises TableError when it is in neither place.
    """
    for place in _PLACES:
        if (place / name).is_file():
            return place / name
    raise TableError(f"{name} is not among the tables in {_PLACES[0]} or {_PLACES[1]}")
