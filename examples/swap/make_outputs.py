"""Make the .txt beside each case of this folder: what `lubecheck swap` prints for it.

Run from anywhere: python examples/swap/make_outputs.py
A test compares them.
"""

from __future__ import annotations

import io
from pathlib import Path

from rich.console import Console

import lubecheck
from lubecheck.faces.swap_terminal import print_swaps
from lubecheck.studies.swap import swaps

HERE = Path(__file__).parent
WIDTH = 110
TO = {
    "clay_motor": "polyurea-110-2",
    "slow_fan": "lithium-complex-pao-220-2-ep",
    "pag_gearbox": "pag-vg-220",
    "oven_conveyor": "aluminium-complex-150-2",
}


def output(name: str) -> str:
    """Return what the command prints for one case, without blanks at the ends of lines."""
    console = Console(file=io.StringIO(), width=WIDTH, _environ={})
    print_swaps(swaps(lubecheck.load_case(HERE / f"{name}.toml"), [TO[name]]), console)
    assert isinstance(console.file, io.StringIO)
    return "\n".join(line.rstrip() for line in console.file.getvalue().splitlines()) + "\n"


if __name__ == "__main__":
    for case in TO:
        (HERE / f"{case}.txt").write_text(output(case), encoding="utf-8")
