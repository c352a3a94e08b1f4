"""The entry point: run a command, and turn whatever goes wrong into one plain message."""

from __future__ import annotations

import io
import os
import sys

# numpy's linear algebra is not used here, and its thread pool costs 0.1 s of CPU at every start.
os.environ.setdefault("OPENBLAS_NUM_THREADS", "1")

REFUSED = 2
SOFTWARE_FAULT = 70  # sysexits: an internal fault, neither a verdict nor a refusal
INTERRUPTED = 130  # the shell's code for Ctrl-C


def run() -> None:
    """Run the command line."""
    for stream in (sys.stdout, sys.stderr):
        if isinstance(stream, io.TextIOWrapper):
            stream.reconfigure(errors="replace")  # a letter that the terminal lacks must not cost the answer
    from lubecheck.errors import InputError, LubecheckError
    from lubecheck.faces.cli import app

    try:
        app()
    except InputError as refused:
        for fault in refused.faults:
            print(f"lubecheck: {fault}", file=sys.stderr)
        sys.exit(REFUSED)
    except LubecheckError as refused:
        for line in str(refused).splitlines():  # a table of the user's tells all its faults, one a line
            print(f"lubecheck: {line}", file=sys.stderr)
        sys.exit(REFUSED)
    except BrokenPipeError:
        # The reader of our output went away, such as `head`: stop in silence, as other tools do.
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
        sys.exit(1)
    except KeyboardInterrupt:
        sys.exit(INTERRUPTED)
    except Exception as fault:  # a fault of this program: one line for the user, no traceback
        print(
            f"lubecheck: internal fault ({type(fault).__name__}: {fault}); this is a defect of the program, "
            "please report it with the case file",
            file=sys.stderr,
        )
        sys.exit(SOFTWARE_FAULT)


if __name__ == "__main__":
    run()
