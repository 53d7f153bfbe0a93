"""What is too small: numerals for the reading distance, lettering and strokes for any."""

from __future__ import annotations

from collections.abc import Iterator

from dialgen.drawing import Letters
from dialgen.errors import Key, Remark
from dialgen.face.parts import SYMBOLS, TEXT, Part
from dialgen.face.review.finished import Finished
from dialgen.face.review.things import LETTERING, Sort, Thing
from dialgen.face.review.wording import grouped
from dialgen.face.ruled.sizes import LEAST_NUMERAL_MINUTES, minutes_seen, seen_mm
from dialgen.lettering.fonts import EM_CAPS

LEAST_LETTER_MM = 1.2
"""The least height of printed lettering that is read without a glass; common practice."""
LEAST_STROKE_MM = 0.085
"""The thinnest stroke that comes out whole: two dots of 600 dpi; common practice."""

_READ_FROM_AFAR = frozenset({Part.NUMERALS, Part.UNIT})
_HAIR = 1e-9


def too_small_to_read(face: Finished) -> Iterator[Remark]:
    """Yield a remark on numerals and units under 16 minutes of arc (NUREG-0700), and on tiny lettering."""
    for things in _lettering(face):
        smallest = min(things, key=_height_mm)
        sort, height_mm = smallest.sort, _height_mm(smallest)
        distance_mm = sort.scale.look.distance if sort.scale and sort.part in _READ_FROM_AFAR else None
        if distance_mm is not None:
            least_mm = seen_mm(LEAST_NUMERAL_MINUTES, distance_mm)
            if height_mm < least_mm * (1 - _HAIR):
                yield Remark(
                    f"{_plural(sort, smallest)} {height_mm:.2g} mm high, too small to read from "
                    f"{distance_mm / 1000:g} m, {minutes_seen(height_mm, distance_mm):.2g} minutes of arc; "
                    f"make them at least {least_mm:.2g} mm, {LEAST_NUMERAL_MINUTES:g} minutes (NUREG-0700)",
                    _height_key(face, sort),
                )
        elif height_mm < LEAST_LETTER_MM * (1 - _HAIR):
            yield Remark(
                f"{_plural(sort, smallest)} only {height_mm:.2g} mm high; "
                f"make it at least {LEAST_LETTER_MM:g} mm to be read without a glass",
                _height_key(face, sort),
            )


def too_thin_to_print(face: Finished) -> Iterator[Remark]:
    """Yield a remark on strokes that a printer loses."""
    thin = [thing for thing in face.things if 0 < _stroke_mm(thing) < LEAST_STROKE_MM - _HAIR]
    for things in grouped((thing.sort.owner, thing) for thing in thin):
        thinnest = min(things, key=_stroke_mm)
        sort = thinnest.sort
        widths = ("fine_width", "middle_width", "numbered_width", "line_width", "weight_scale", "distance")
        key = sort.key if sort.scale is None else face.look_key(sort.scale, *widths)
        yield Remark(
            f"{thinnest.name} is drawn {_stroke_mm(thinnest):.2g} mm thin; "
            f"give strokes at least {LEAST_STROKE_MM:g} mm, or a printer may lose them",
            key,
        )


def _lettering(face: Finished) -> list[list[Thing]]:
    return grouped(
        (thing.sort, thing)
        for thing in face.things
        if thing.sort.part in LETTERING and thing.sort.part != SYMBOLS and _height_mm(thing) > 0
    )


def _height_mm(thing: Thing) -> float:
    """Return the height of capitals; that of the largest letter, as powers are smaller."""
    glyphs = thing.item.glyphs if isinstance(thing.item, Letters) else ()
    return max((placed.size_mm for placed in glyphs), default=0.0) / EM_CAPS


def _stroke_mm(thing: Thing) -> float:
    return thing.item.style.width_mm if thing.item.style.stroke else 0.0


def _plural(sort: Sort, thing: Thing) -> str:
    return f"the numerals{sort.whose} are" if sort.part == Part.NUMERALS else f"{thing.name} is"


def _height_key(face: Finished, sort: Sort) -> Key:
    if sort.part == TEXT:
        return (*sort.key, "height")
    name = "unit" if sort.part == Part.UNIT else "numeral"
    return face.look_key(sort.scale, name, "letter_scale", "distance", "numeral")
