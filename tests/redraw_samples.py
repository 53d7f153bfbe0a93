#!/usr/bin/env python3
"""Draw every sample again: ``python tests/redraw_samples.py`` writes its SVG, PDF and PNG beside it."""

from __future__ import annotations

import sys
from pathlib import Path

SAMPLES = Path(__file__).parents[1] / "samples"
RESOLUTION_DPI = 300.0
SCHEMATICS = {"shed-multimeter": 2, "lamp-voltage": 1}
"""The samples whose schematic is kept too, and of which of their circuits."""
COMMAND = "python tests/redraw_samples.py"


def dial_files() -> list[Path]:
    """Return the samples' dial files, each in a folder of its own."""
    return sorted(SAMPLES.glob("*/*.toml"))


def redraw(dial_file: Path) -> list[Path]:
    """Draw one sample in every format kept in the repository, and return what was written."""
    import dialgen
    from dialgen.renderers import Options

    face = dialgen.load(dial_file)
    for warning in face.warnings():
        print(f"warning: {warning}", file=sys.stderr)
    written = [dial_file.with_suffix(suffix) for suffix in (".svg", ".pdf", ".png")]
    for path in written:
        face.draw(path, options=Options(resolution_dpi=RESOLUTION_DPI))
    return [*written, *redraw_schematic(dial_file)]


def redraw_schematic(dial_file: Path) -> list[Path]:
    """Draw the schematic of a sample, if one is kept, and return what was written."""
    import dialgen
    from dialgen.renderers import Options, render

    if dial_file.stem not in SCHEMATICS:
        return []
    face = dialgen.load(dial_file)
    drawing = face.schematic(face.circuits[SCHEMATICS[dial_file.stem] - 1])
    written = [dial_file.with_name(f"{dial_file.stem}-circuit{suffix}") for suffix in (".svg", ".png")]
    for path in written:
        path.write_bytes(render(drawing, path.suffix, Options(resolution_dpi=RESOLUTION_DPI)))
    return written


if __name__ == "__main__":
    sys.path.insert(0, str(SAMPLES.parent))  # this checkout, not an installed one
    for sample in dial_files():
        print(*(path.relative_to(SAMPLES.parent) for path in redraw(sample)))
