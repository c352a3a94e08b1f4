"""Make new_motor.svg, the README's picture of the terminal verdict, from the example beside it.

Run from anywhere: python examples/make_picture.py
The picture is rich's own SVG export of what `lubecheck check examples/new_motor.toml` prints; a test compares it.
"""

from __future__ import annotations

import io
import re
from pathlib import Path

from rich.console import Console
from rich.terminal_theme import TerminalTheme

import lubecheck
from lubecheck.faces.terminal import print_result

HERE = Path(__file__).parent
PICTURE = HERE / "new_motor.svg"
WIDTH = 110
# Dark ground, plain colours; yellow and red are told apart by brightness as well as by hue.
THEME = TerminalTheme(
    (20, 24, 28),
    (224, 228, 232),
    [(20, 24, 28), (214, 76, 70), (92, 184, 92), (240, 200, 80), (90, 140, 220), (180, 120, 200), (90, 190, 200),
     (224, 228, 232)],
)  # fmt: skip


def picture() -> str:
    """Return the picture as SVG text."""
    console = Console(record=True, width=WIDTH, file=io.StringIO(), force_terminal=True, color_system="standard",
                      legacy_windows=False, _environ={})  # fmt: skip
    print_result(lubecheck.check(lubecheck.load_case(HERE / "new_motor.toml")), console)
    svg = console.export_svg(title="lubecheck check examples/new_motor.toml", theme=THEME, unique_id="new-motor")
    return re.sub(r"@font-face \{.*?\}\s*", "", svg, flags=re.DOTALL)  # fetch no fonts: any monospace one will do


if __name__ == "__main__":
    PICTURE.write_text(picture(), encoding="utf-8")
