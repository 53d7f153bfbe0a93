"""The line of a scale as ink: single or double, heavy over a part, filled with blocks."""

from __future__ import annotations

from collections.abc import Iterator
from itertools import pairwise

import numpy as np

from dialgen.drawing import Cap, Primitive, Style
from dialgen.face.inked.bands import bands
from dialgen.face.inked.broken import broken
from dialgen.face.inked.courses import course
from dialgen.face.inked.numerals import reaches
from dialgen.face.inked.stretches import Form, Stretch, flush_mm, stretches
from dialgen.face.ruled.divisions import Rank
from dialgen.face.ruled.ruling import RuledScale
from dialgen.looks import End, LineForm, Outside

_HEAVY = 2.6
_SAME_MM = 1e-6


def line_items(scale: RuledScale) -> list[Primitive]:
    """Return the filled blocks of a double line, and then the line or lines.

    What is whole ends flush with the sides of the marks that stand at its ends.

    Raises:
        InputError: there is no room for a second line.
    """
    parts = list(stretches(scale))
    tracks = tracks_mm(scale)
    return [
        *_blocks(scale),
        *(item for out in tracks for part in parts for item in _strokes(scale, part, out)),
    ]


def tracks_mm(scale: RuledScale) -> tuple[float, ...]:
    """Return how far outwards from the marks' points each line runs; two enclose the fine marks."""
    match scale.look.line:
        case LineForm.NONE:
            return ()
        case LineForm.SINGLE:
            return (0.0,)
        case LineForm.DOUBLE:
            return reaches(scale.spec.marks, scale.sizes)[Rank.FINE]


def _strokes(scale: RuledScale, part: Stretch, outward_mm: float) -> Iterator[Primitive]:
    """Yield a line over a stretch."""
    width_mm, rounded = scale.sizes.line_width_mm, scale.look.mark_ends is End.ROUND
    style = Style(stroke=scale.ink, width_mm=width_mm, cap=Cap.ROUND if rounded else Cap.BUTT)
    if part.form is Form.BROKEN:
        yield from broken(scale, part, outward_mm, style)
    elif part.form is Form.HEAVY and outward_mm == _main_track_mm(scale):
        yield _whole(scale, part, outward_mm, Style(stroke=scale.ink, width_mm=_HEAVY * width_mm))
    elif part.form is not Form.NONE:
        yield _whole(scale, part, outward_mm, style)


def _main_track_mm(scale: RuledScale) -> float:
    """Return which line is the heavy one of two: that on which the marks stand, or the inner one."""
    return min(tracks_mm(scale), key=abs)


def _whole(scale: RuledScale, part: Stretch, outward_mm: float, style: Style) -> Primitive:
    run = course(scale.line, part.first_deg, part.last_deg, outward_mm)
    if style.cap is Cap.ROUND:
        return run.piece(run.low, run.high, style)
    before, after = (
        flush_mm(scale, angle_deg, outward_mm) / run.unit_mm
        for angle_deg in sorted((part.first_deg, part.last_deg))
    )
    return run.piece(run.low - before, run.high + after, style)


def _blocks(scale: RuledScale) -> list[Primitive]:
    """Return every second gap between neighbouring marks of a double line, filled; the longest is not."""
    if not scale.look.blocks or scale.look.line is not LineForm.DOUBLE:
        return []
    low, high = scale.spec.effective or (scale.spec.start, scale.spec.end)
    whole = scale.look.outside is Outside.PLAIN
    angles = np.array([mark.angle_deg for mark in scale.marks if whole or low <= mark.value <= high])
    gaps_mm = np.abs(np.diff(scale.line.along(angles)))
    if not gaps_mm.size:
        return []
    longest = int(np.flatnonzero(gaps_mm >= gaps_mm.max() - _SAME_MM)[0])
    ends = list(pairwise(angles.tolist()))[1 - longest % 2 :: 2]
    if not ends:
        return []
    inner, outer = reaches(scale.spec.marks, scale.sizes)[Rank.FINE]
    starts, stops = ([end[i] for end in ends] for i in (0, 1))
    return [*bands(scale.line, starts, stops, inner, outer, Style(fill=scale.ink))]
