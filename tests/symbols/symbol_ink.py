"""Sees symbols as a reader does: drawn to PDF and rastered by pdfium, which knows nothing of our boxes."""

from __future__ import annotations

import numpy as np
import pypdfium2 as pdfium
from scipy import ndimage

from dialgen.drawing import Drawing, Layer, Primitive, Purpose
from dialgen.lettering import PLAIN, Hand
from dialgen.renderers import render
from dialgen.symbols import Sign, class_sign, example, items, parse, width
from dialgen.symbols.table import SYMBOLS

MM_PER_POINT = 25.4 / 72
INK = "#000000"

EXAMPLES = [example(symbol) for symbol in SYMBOLS]
FURTHER = [
    *(parse(text) for text in ("inclined 7.5", "test 5 kV", "test 1.5 kV", "test 12 kV", "Fe panel 1.5 mm")),
    *(class_sign(number, form) for number in ("0.05", "5") for form in ("limit", "length", "value")),
]
SIGNS = [*EXAMPLES, *FURTHER]


def label(sign: Sign) -> str:
    """Return a name for a test about a sign."""
    return f"{sign.symbol.name} {sign.parameter}".strip()


def inked(
    figure: tuple[Primitive, ...], half_width: float, half_height: float, px_per_mm: float
) -> np.ndarray:
    """Return which pixels of a page about the origin are inked, the uppermost row first."""
    layer = Layer(name="ink", purpose=Purpose.PRINT, items=figure)
    page = Drawing(
        left=-half_width, bottom=-half_height, width=2 * half_width, height=2 * half_height, layers=(layer,)
    )
    return inked_page(page, px_per_mm)


def inked_page(page: Drawing, px_per_mm: float) -> np.ndarray:
    """Return which pixels of a page are at least half inked, the uppermost row first."""
    document = pdfium.PdfDocument(render(page, ".pdf"))
    sheet = document[0]
    picture = sheet.render(scale=px_per_mm * MM_PER_POINT, grayscale=True).to_numpy()
    sheet.close()
    document.close()
    return picture.reshape(picture.shape[:2]) < 128


def seen(sign: Sign, height_mm: float = 4.0, px_per_mm: float = 50.0, hand: Hand = PLAIN) -> np.ndarray:
    """Return the pixels of a sign on a page a little larger than its row."""
    half = width(sign, height_mm, hand) / 2 + 1
    return inked(items(sign, (0.0, 0.0), height_mm, INK, hand), half, height_mm / 2 + 1, px_per_mm)


def span(mask: np.ndarray) -> tuple[float, float, float, float]:
    """Return left, bottom, right and top of the ink in pixels, from the middle of the picture."""
    rows, columns = np.nonzero(mask)
    middle_y, middle_x = mask.shape[0] / 2, mask.shape[1] / 2
    return (
        columns.min() - middle_x,
        middle_y - rows.max() - 1,
        columns.max() + 1 - middle_x,
        middle_y - rows.min(),
    )


def pieces(mask: np.ndarray) -> int:
    """Return how many pieces of ink hang together, corners included."""
    return int(ndimage.label(mask, np.ones((3, 3)))[1])


def holes(mask: np.ndarray) -> int:
    """Return how many white areas ink shuts in."""
    return int(ndimage.label(~mask)[1]) - 1
