"""The two ends of a scale: past the ends of their line, or too near to each other."""

from __future__ import annotations

import math
from collections.abc import Iterator

import numpy as np

from dialgen.errors import Remark
from dialgen.face.review.finished import Finished
from dialgen.face.ruled.divisions import Rank
from dialgen.face.ruled.ruling import RuledScale
from dialgen.geometry.lines import ArcLine

_PAST_MM = 0.1
_NEARLY_FULL_DEG = 300.0
_CLOSED_DEG = 0.01
_HAIR = 1e-6


def past_line(face: Finished, scale: RuledScale, name: str) -> Iterator[Remark]:
    """Yield a remark where marks stand beyond the ends that a straight scale line was given."""
    if scale.spec.line is None or not scale.marks:
        return
    start, end = np.array(scale.spec.line)
    along = (end - start) / math.dist(start, end)
    places = (np.array([(mark.x, mark.y) for mark in scale.marks]) - start) @ along
    past = np.maximum(-places, places - math.dist(start, end))
    worst = int(past.argmax())
    if past[worst] > _PAST_MM:
        mark = scale.marks[worst]
        yield Remark(
            f"marks{name} stand up to {past[worst]:.2g} mm past the ends given to the line; move the ends",
            (*scale.dial.key, "line"),
            place=(mark.x, mark.y),
        )


def narrow_break(face: Finished, scale: RuledScale, name: str) -> Iterator[Remark]:
    """Yield a remark where the ends of a nearly full circle are nearer than one numbered interval.

    After NUREG-0700 rev. 2, 1.6.4-11.  A full circle is meant to close.
    """
    if not isinstance(scale.line, ArcLine):
        return
    first, last = scale.line.about_centre(scale.ends_deg).tolist()
    broken_deg = 360.0 - abs(last - first)
    angles = np.array([mark.angle_deg for mark in scale.marks if mark.rank is Rank.NUMBERED])
    if len(angles) < 3 or not _CLOSED_DEG < broken_deg < 360.0 - _NEARLY_FULL_DEG:
        return
    steps = np.abs(np.diff(scale.line.about_centre(angles)))
    interval_deg = min(steps[0], steps[-1])
    if broken_deg < interval_deg * (1 - _HAIR):
        yield Remark(
            f"the ends of the scale{name} are {broken_deg:.3g} degrees apart, less than one numbered "
            f"interval of {interval_deg:.3g}; leave a wider break, so that it is seen where the scale ends",
            ("movement", "full"),
        )
