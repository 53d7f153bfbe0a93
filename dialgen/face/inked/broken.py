"""Broken scale lines: the dashes of a stretch outside the effective range."""

from __future__ import annotations

from collections.abc import Iterator

from dialgen.drawing import Cap, Primitive, Style
from dialgen.face.inked.courses import course, courses
from dialgen.face.inked.dashes import dash_count, even_dashes, mark_dashes
from dialgen.face.inked.stretches import AT_MARK_DEG, Stretch, flush_mm
from dialgen.face.ruled.ruling import RuledScale


def broken(scale: RuledScale, stretch: Stretch, outward_mm: float, style: Style) -> Iterator[Primitive]:
    """Yield the dashes of a line over a stretch.

    They begin at the end of the scale, if the stretch lies at one.

    Args:
        scale: the scale.
        stretch: the stretch.
        outward_mm: how far outwards from the marks' points the line runs.
        style: how it is drawn; a rounded dash is as long over all as a square one.

    Raises:
        InputError: the pointer does not meet the line.
    """
    near_deg, far_deg = _directed(stretch)
    run = course(scale.line, near_deg, far_deg, outward_mm)
    origin, unit_mm = (run.low, run.unit_mm) if near_deg < far_deg else (run.high, -run.unit_mm)
    for start, end in _spans(scale, stretch, outward_mm, style.width_mm):
        inset = min(style.width_mm, end - start) / 2 if style.cap is Cap.ROUND else 0.0
        low, high = sorted(origin + at / unit_mm for at in (start + inset, end - inset))
        yield run.piece(low, high, style)


def _spans(
    scale: RuledScale, stretch: Stretch, outward_mm: float, width_mm: float
) -> list[tuple[float, float]]:
    near_deg, far_deg = _directed(stretch)
    near_mm, far_mm = (flush_mm(scale, angle_deg, outward_mm) for angle_deg in (near_deg, far_deg))
    along_mm = _marks_along_mm(scale, stretch, outward_mm)
    # The line itself says how many dashes there are, so that of two lines both have as many.
    count = dash_count(_marks_along_mm(scale, stretch, 0.0)[-1], width_mm)
    if not (stretch.starts or stretch.ends):
        return even_dashes(along_mm[-1], count, None, far_mm)
    kept = mark_dashes(along_mm, count, scale.sizes.fine_width_mm / 2, near_mm, width_mm)
    return kept or even_dashes(along_mm[-1], count, near_mm, far_mm)


def _directed(stretch: Stretch) -> tuple[float, float]:
    """Return the angle where the dashes begin, and the one where they end."""
    ends_deg = stretch.first_deg, stretch.last_deg
    return ends_deg[::-1] if stretch.ends else ends_deg


def _marks_along_mm(scale: RuledScale, stretch: Stretch, outward_mm: float) -> list[float]:
    """Return how far from where the dashes begin the marks stand along a line, and the stretch ends."""
    near_deg, far_deg = _directed(stretch)
    low, high = min(near_deg, far_deg) + AT_MARK_DEG, max(near_deg, far_deg) - AT_MARK_DEG
    between = sorted(
        (mark.angle_deg for mark in scale.marks if low < mark.angle_deg < high), reverse=far_deg < near_deg
    )
    angles = [near_deg, *between, far_deg]
    at_marks = courses(scale.line, angles, angles, outward_mm)
    return [abs(at.low - at_marks[0].low) * at.unit_mm for at in at_marks]
