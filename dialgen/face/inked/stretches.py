"""A scale line cut where its form changes: heavy over a part, another form outside the effective range."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from enum import Enum
from itertools import pairwise

import numpy as np

from dialgen.face.inked.marks import width_at_mm
from dialgen.face.ruled.ruling import RuledScale
from dialgen.looks import Outside

AT_MARK_DEG = 1e-6
"""A mark this near an angle stands at it."""


class Form(Enum):
    """How a stretch of a line is drawn."""

    PLAIN = "plain"
    HEAVY = "heavy"
    BROKEN = "broken"
    NONE = "none"


_OUTSIDE = {Outside.PLAIN: Form.PLAIN, Outside.BROKEN: Form.BROKEN, Outside.NONE: Form.NONE}


@dataclass(frozen=True, slots=True)
class Stretch:
    """A stretch of a scale line.

    Args:
        form: how it is drawn.
        first_deg: the pointer's angle at its lower value.
        last_deg: the pointer's angle at its higher value.
        starts: whether the scale starts here.
        ends: whether the scale ends here.
    """

    form: Form
    first_deg: float
    last_deg: float
    starts: bool
    ends: bool


def stretches(scale: RuledScale) -> Iterator[Stretch]:
    """Yield the stretches of a scale's line by ascending values, neighbours of one form as one."""
    spec, outside = scale.spec, _OUTSIDE[scale.look.outside]
    if spec.effective is None and spec.heavy is None:
        first_deg, last_deg = scale.ends_deg.tolist()
        yield Stretch(Form.PLAIN, first_deg, last_deg, starts=True, ends=True)
        return
    low, high = spec.effective or (spec.start, spec.end)
    first, last = spec.heavy or (spec.start, spec.start)
    values = sorted({spec.start, spec.end, low, high, first, last})
    forms = [
        Form.HEAVY if first <= v < last else Form.PLAIN if low <= v < high else outside for v in values[:-1]
    ]
    changes = [i for i in range(len(forms)) if i == 0 or forms[i] is not forms[i - 1]]
    angles = scale.dial.chain.angle(np.array(values)).tolist()
    for here, there in pairwise([*changes, len(forms)]):
        yield Stretch(forms[here], angles[here], angles[there], starts=here == 0, ends=there == len(forms))


def flush_mm(scale: RuledScale, angle_deg: float, outward_mm: float) -> float:
    """Return half the width, along what runs beside the line, of the mark at an angle; 0 without one."""
    near = [mark for mark in scale.marks if abs(mark.angle_deg - angle_deg) < AT_MARK_DEG]
    if not near:
        return 0.0
    stretch = float(scale.line.stretch(np.array([angle_deg]))[0])
    return stretch * width_at_mm(scale, near[0].rank, outward_mm) / 2
