"""The sheet: everything on it, nothing off it, nothing over anything else."""

from __future__ import annotations

import re
from itertools import combinations

import numpy as np
import pytest
from lxml import etree
from symbol_ink import inked_page

from dialgen.drawing import Drawing
from dialgen.renderers import render
from dialgen.symbols import SYMBOLS, sheet

PX_PER_MM = 6.0
MARGIN_MM = 20.0


@pytest.fixture(scope="module")
def drawn() -> etree._Element:
    """The sheet as SVG, read by lxml."""
    return etree.fromstring(render(sheet(), ".svg"))


@pytest.fixture(scope="module")
def masks() -> list[np.ndarray]:
    """The ink of each layer alone, on a page with a margin around the sheet."""
    page = sheet().with_margin(MARGIN_MM)
    return [inked_page(_with(page, i), PX_PER_MM) for i in range(len(page.layers))]


def _with(page: Drawing, layer: int) -> Drawing:
    return Drawing(
        left=page.left, bottom=page.bottom, width=page.width, height=page.height,
        layers=page.layers[layer : layer + 1],
    )  # fmt: skip


def _labels(root: etree._Element) -> list[str]:
    return [group.get("aria-label") for group in root.iter("{*}g") if group.get("aria-label")]


def test_the_sheet_is_a4_upright(drawn: etree._Element) -> None:
    """ISO 216: A4 is 210 by 297 mm."""
    assert (drawn.get("width"), drawn.get("height")) == ("210mm", "297mm")


def test_every_symbol_is_named_with_its_number_and_how_sure_it_is(drawn: etree._Element) -> None:
    """What to write, the meaning, the number and how sure shape and number are stand on the sheet."""
    labels = _labels(drawn)
    for symbol in SYMBOLS:
        assert labels.count(symbol.write) >= 1
        place = labels.index(symbol.title)
        assert labels[place - 1] == symbol.write
        standing = labels[place + 1]
        assert f"shape {symbol.sure};" in standing
        assert f"number {symbol.number} {symbol.number_sure}" in standing
        assert ("claim" in standing) == symbol.claim


def test_every_symbol_is_a_group_of_its_own(drawn: etree._Element) -> None:
    """A symbol can be picked from the sheet whole."""
    groups = [group for group in drawn if group.tag.endswith("}g")]
    assert len(groups) == len(SYMBOLS) + 1
    assert all(len(group) for group in groups)


def test_nothing_is_off_the_page(masks: list[np.ndarray]) -> None:
    """On a page with a margin around the sheet, the margin and 8 mm more stay white."""
    edge = int((MARGIN_MM + 8) * PX_PER_MM)
    ink = np.logical_or.reduce(masks)
    assert ink.any()
    inside = ink[edge:-edge, edge:-edge]
    assert inside.sum() == ink.sum()


def test_no_two_symbols_nor_a_symbol_and_words_overlap(masks: list[np.ndarray]) -> None:
    """Each drawn alone, no layer inks a pixel that another inks."""
    assert np.sum(masks, axis=0).max() == 1


def test_no_two_texts_overlap(drawn: etree._Element) -> None:
    """The boxes of the words, read from the file, keep clear of each other."""
    boxes = list(_boxes(drawn))
    assert len(boxes) > 3 * len(SYMBOLS)
    for one, two in combinations(boxes, 2):
        (low_a, high_a), (low_b, high_b) = one, two
        assert (high_a < low_b).any() or (high_b < low_a).any()


def _boxes(root: etree._Element) -> list[tuple[np.ndarray, np.ndarray]]:
    """Return the corners of every text's box; the control points of letters lie close about them."""
    shapes = {f"#{path.get('id')}": path.get("d") for path in root.iter("{*}path") if path.get("id")}
    found = []
    for group in root.iter("{*}g"):
        if group.get("aria-label"):
            points = np.vstack([_placed(use, shapes) for use in group.iter("{*}use")])
            found.append((points.min(axis=0), points.max(axis=0)))
    return found


def _placed(use: etree._Element, shapes: dict[str, str]) -> np.ndarray:
    points = np.array(
        re.findall(r"(-?[\d.]+),(-?[\d.]+)", shapes[use.get("{http://www.w3.org/1999/xlink}href")]),
        dtype=float,
    )
    points += [float(use.get(axis, 0)) for axis in "xy"]
    for outer in (use, *use.iterancestors()):
        if matrix := re.fullmatch(r"matrix\((.*)\)", outer.get("transform", "")):
            a, b, c, d, e, f = map(float, matrix[1].split())
            points = points @ [[a, b], [c, d]] + [e, f]
    return points
