"""Files that are written whole or not at all."""

from __future__ import annotations

import os
import tempfile
from pathlib import Path

from lubecheck.errors import Fault, InputError


def write_whole(path: Path, content: bytes) -> None:
    """Write a file beside its place and move it there in one step; what stood there stays until then.

    Raises InputError where it cannot be written.
    """
    try:
        handle, name = tempfile.mkstemp(prefix=f".{path.name}.", dir=path.parent)
    except OSError as refused:
        raise _refused(path, refused) from None
    beside = Path(name)
    try:
        with os.fdopen(handle, "wb") as file:
            file.write(content)
            file.flush()
            os.fsync(file.fileno())
        mask = os.umask(0)
        os.umask(mask)
        beside.chmod(0o666 & ~mask)  # mkstemp makes it private
        beside.replace(path)
    except OSError as refused:
        raise _refused(path, refused) from None
    finally:
        beside.unlink(missing_ok=True)


def _refused(path: Path, refused: OSError) -> InputError:
    return InputError([Fault("--to", str(path), f"a file that can be written ({refused.strerror})")])
