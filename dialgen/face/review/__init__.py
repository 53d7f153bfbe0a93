"""The review: what would be hard to read on the finished face, in plain words, with the key to change.

Each check is a function of the finished face, `Finished`, that yields remarks; `CHECKS` is the table of
them.  A new check is one function and one row.  Good faces are silent: a check that nags is not read.
"""

from __future__ import annotations

from collections.abc import Callable, Iterator, Mapping
from dataclasses import replace
from types import MappingProxyType

from dialgen.errors import Remark
from dialgen.face.lettered.signs import sign_remarks
from dialgen.face.review.colours import weak_on_ground, weak_over_zone
from dialgen.face.review.edges import at_margin, behind_case, over_edge, through_opening
from dialgen.face.review.ends import narrow_break, past_line
from dialgen.face.review.finished import Finished
from dialgen.face.review.meetings import nearer_to_another, overlapping, touching
from dialgen.face.review.pointer import hides_numerals, too_short
from dialgen.face.review.sizes import too_small_to_read, too_thin_to_print
from dialgen.face.review.spacing import finer_than_class, marks_between, marks_too_near, numbered_count
from dialgen.face.review.things import scale_name
from dialgen.face.ruled.ruling import RuledScale

Check = Callable[[Finished], Iterator[Remark]]
ScaleCheck = Callable[[Finished, RuledScale, str], Iterator[Remark]]


def _each(check: ScaleCheck) -> Check:
    """Return a check of the face from one of a scale, handed its name where there are several."""

    def checked(face: Finished) -> Iterator[Remark]:
        for number, scale in enumerate(face.scales, 1):
            yield from check(face, scale, f" of {scale_name(number, scale)}" if len(face.scales) > 1 else "")

    return checked


CHECKS: Mapping[str, Check] = MappingProxyType(
    {
        "edge": over_edge,
        "opening": through_opening,
        "case": behind_case,
        "margin": at_margin,
        "touching": touching,
        "overlap": overlapping,
        "nearness": nearer_to_another,
        "line ends": _each(past_line),
        "break": _each(narrow_break),
        "pointer short": _each(too_short),
        "pointer long": _each(hides_numerals),
        "height": too_small_to_read,
        "stroke": too_thin_to_print,
        "gap": _each(marks_too_near),
        "count": _each(numbered_count),
        "between": _each(marks_between),
        "class": _each(finer_than_class),
        "contrast": weak_on_ground,
        "contrast on zone": weak_over_zone,
        "claim": lambda face: sign_remarks(face.file),
    }
)
"""Every check by the name under which its remarks are given."""


def review(face: Finished) -> tuple[Remark, ...]:
    """Return what every check remarks on, check by check."""
    return tuple(replace(remark, check=name) for name, check in CHECKS.items() for remark in check(face))


__all__ = ["CHECKS", "Check", "Finished", "review"]
