"""Points along the ink, against the letters' own paths walked in steps of a thousandth."""

import cmath
import math
import time
from itertools import pairwise

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from letter_fonts import DEJAVU, INK, STIX, build

from dialgen.drawing import Glyph, Letters, Placed
from dialgen.lettering import PLAIN, hand, ink_points, letters
from dialgen.lettering.edges import _points

HANDS = {"plain": PLAIN, "strokes": hand(strokes=True), "DejaVu": hand(DEJAVU), "STIX": hand(STIX)}


def walked(placed):
    """Return each contour of a placed glyph as points in mm, x + iy, less than 0.001 em apart."""
    contours = []
    for kind, numbers in placed.glyph.path:
        points = [complex(x, y) for x, y in zip(numbers[::2], numbers[1::2], strict=True)]
        if kind == "M":
            contours.append([points])
            continue
        level = [contours[-1][-1][-1], *(points or [contours[-1][0][0]])]
        count = 2 + math.ceil(3000 * sum(abs(b - a) for a, b in pairwise(level)))
        t = np.linspace(0, 1, count)
        while len(level) > 1:
            level = [(1 - t) * a + t * b for a, b in pairwise(level)]
        contours[-1].append(level[0])
    turn = cmath.rect(placed.size_mm, -math.radians(placed.angle_deg))
    return [
        np.concatenate([np.atleast_1d(part) for part in c]) * turn + complex(placed.x, placed.y)
        for c in contours
    ]


def farthest_along(contour, points):
    """Return how far along a contour any of its points is from the nearest of the given ones on it."""
    along = np.concatenate([[0.0], np.cumsum(np.abs(np.diff(contour)))])
    gaps = np.abs(points[:, None] - contour[None, :])
    # Where a stroke crosses itself a point lies on it twice.
    marks = along[(gaps < 1e-3).any(axis=0)]
    before, after = marks[0], along[-1] - marks[-1]
    if abs(contour[0] - contour[-1]) < 1e-9:
        before = after = (before + after) / 2
    return max(before, after, *(np.diff(marks) / 2))


@pytest.mark.parametrize("of", HANDS.values(), ids=HANDS)
@pytest.mark.parametrize("character", "0168∞Ω%gW⁻½.√")
def test_near_enough(of, character):
    """No point of the edge is farther along it than 0.03 capitals from one of the points."""
    found = letters(character, 1.0, (3.0, 4.0), INK, angle_deg=20.0, hand=of)
    for placed in found.glyphs:
        points = ink_points(Letters("", (placed,), INK))
        for contour in walked(placed):
            assert farthest_along(contour, points @ [1, 1j]) <= 0.0305


def test_small_capitals(tmp_path):
    """The same holds for a font whose capitals are a quarter of its em."""
    of = hand(build(tmp_path / "own.otf", "HO", capital=500))
    (placed,) = letters("O", 1.0, (0.0, 0.0), INK, hand=of).glyphs
    points = ink_points(Letters("O", (placed,), INK))
    assert farthest_along(walked(placed)[0], points @ [1, 1j]) <= 0.0305


def test_measure_can_fail():
    """The measure above finds a point left out."""
    found = letters("0", 1.0, (0.0, 0.0), INK)
    points = ink_points(found) @ [1, 1j]
    outer = walked(found.glyphs[0])[0]
    assert farthest_along(outer, np.delete(points, 5)) > 0.0305


@given(
    st.text(alphabet="0158−∞. µΩgÄ", min_size=1, max_size=6),
    st.floats(0.5, 20),
    st.tuples(st.floats(-100, 100), st.floats(-100, 100)),
    st.floats(-360, 360),
    st.sampled_from(list(HANDS.values())),
)
def test_points_lie_on_the_edge(text, height_mm, at, angle_deg, of):
    """Every point lies on a letter's path where it stands, and every letter has some."""
    found = letters(text, height_mm, at, INK, angle_deg=angle_deg, hand=of)
    points = ink_points(found)
    assert points.shape[1:] == (2,)
    contours = [contour for placed in found.glyphs for contour in walked(placed)]
    if contours:
        flat = points[::7] @ [1, 1j]
        every = np.concatenate(contours)
        assert max(np.abs(every - point).min() for point in flat) < 1e-3 * height_mm
        assert (
            max(np.abs(points @ [1, 1j] - contour[0]).min() for contour in contours) < 1e-9 + 1e-9 * height_mm
        )
    else:
        assert len(points) == 0


def test_kept_points_cannot_be_changed():
    """A glyph's own points are made once and read-only; what is returned is the caller's."""
    found = letters("1", 1.0, (0.0, 0.0), INK)
    kept = _points(found.glyphs[0].glyph)
    assert _points(found.glyphs[0].glyph) is kept
    with pytest.raises(ValueError, match="read-only"):
        kept[0] = 0
    ink_points(found)[:] = 0.0
    assert np.abs(ink_points(found)).max() > 0


def test_mixed_sizes():
    """Letters of different sizes and turns in one string are each where they stand."""
    bar = Glyph("bar", (("M", (0.0, 0.0)), ("L", (0.0, 0.01))), (0.0, 0.0, 0.0, 0.01), stroked=True)
    points = ink_points(Letters("", (Placed(bar, 1.0, 2.0, 100.0), Placed(bar, 5.0, 5.0, 200.0, 90.0)), INK))
    assert points == pytest.approx(np.array([[1, 2], [1, 3], [5, 5], [7, 5]]))


def test_fast():
    """A numeral of three figures takes tens of microseconds."""
    found = letters("100", 2.2, (1.0, 40.0), INK, angle_deg=7.0)
    ink_points(found)

    def timed():
        start = time.perf_counter()
        ink_points(found)
        return time.perf_counter() - start

    assert min(timed() for _ in range(200)) < 100e-6
