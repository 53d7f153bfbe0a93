#!/usr/bin/env python3
"""Draw the golden images again: ``python tests/golden/redraw.py [WORD ...]``.

Words choose the images whose names have one of them.  Look at each before it is kept.
"""

from __future__ import annotations

import sys

from faces import FACES, FOLDER, drawing, picture


def redraw(words: list[str]) -> None:
    """Write the images that the words choose, all of them where there are none."""
    for name, text in FACES.items():
        if not words or any(word in name for word in words):
            path = FOLDER / f"{name}.png"
            picture(drawing(text)).save(path, optimize=True)
            print(path, f"{path.stat().st_size / 1000:.1f} kB")


if __name__ == "__main__":
    redraw(sys.argv[1:])
