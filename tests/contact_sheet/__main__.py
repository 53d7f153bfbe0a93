"""Draw every dial of `dials` on one sheet: ``python tests/contact_sheet OUT.png [WORD ...]``.

Words choose the dials whose names have one of them.  What the review says of a dial is printed.
"""

from __future__ import annotations

import io
import sys
import tempfile
from pathlib import Path

from dials import DIALS, Dial
from PIL import Image, ImageDraw

import dialgen
from dialgen.drawing import Purpose
from dialgen.renderers import Options

RESOLUTION_DPI = 110.0
CELL_PX = (470, 400)
COLUMNS = 6
CAPTION_PX = 16


def picture(dial: Dial, folder: Path) -> Image.Image:
    """Return a dial's face as a picture, with what the review says of it on standard error."""
    path = folder / "dial.toml"
    path.write_text(dial.text, encoding="utf-8")
    face = dialgen.load(path)
    for fault in face.warnings():
        print(f"{dial.name}: {fault.key}: {fault.message}", file=sys.stderr)
    layers = (Purpose.PRINT, Purpose.CUT)
    data = face.render(".png", margin_mm=2, layers=layers, options=Options(resolution_dpi=RESOLUTION_DPI))
    return Image.open(io.BytesIO(data)).convert("RGB")


def contact_sheet(dials: list[Dial]) -> Image.Image:
    """Return all dials on one sheet, each with its name under it, larger ones made smaller."""
    width, height = CELL_PX
    rows = -(-len(dials) // COLUMNS)
    sheet = Image.new("RGB", (COLUMNS * width, rows * height), "#e4e4e4")
    pen = ImageDraw.Draw(sheet)
    with tempfile.TemporaryDirectory() as folder:
        for i, dial in enumerate(dials):
            left, top = i % COLUMNS * width, i // COLUMNS * height
            face = picture(dial, Path(folder))
            face.thumbnail((width - 12, height - CAPTION_PX - 14), Image.Resampling.LANCZOS)
            sheet.paste(face, (left + (width - face.width) // 2, top + 6))
            pen.text((left + 8, top + height - CAPTION_PX - 4), f"{i + 1}. {dial.name}", fill="black")
    return sheet


if __name__ == "__main__":
    out, *words = sys.argv[1:]
    contact_sheet([d for d in DIALS if not words or any(word in d.name for word in words)]).save(out)
