"""What is cut out of a plate, as areas: holes, slots and the mirror's window."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import replace

from dialgen.dialfile.models import DialFile
from dialgen.drawing import Circle, Drawing, Primitive, Purpose, Style
from dialgen.errors import Key
from dialgen.face.plate import Outliner
from dialgen.face.review.things import OPENING, Sort, Thing
from dialgen.ink import shape

_SOLID = Style(fill="#000000")


def openings(file: DialFile, plate: Outliner, drawing: Drawing) -> Iterator[Thing]:
    """Yield what is cut out of the plate; the first figure that is cut is its outline."""
    others = iter(_other_openings(file))
    for layer in drawing.layers:
        if layer.purpose is not Purpose.CUT:
            continue
        for i, item in enumerate(layer.items):
            if item == plate.outline(item.style):
                continue
            name, key = _hole(file, item) or next(others, ("an opening", ("plate",)))
            if area := shape(replace(item, style=_SOLID)):
                yield Thing(Sort(OPENING, whose=name, key=key), i, item, area)


def _hole(file: DialFile, item: Primitive) -> tuple[str, Key] | None:
    """Return a hole's name and key; None of what is no hole."""
    if not isinstance(item, Circle):
        return None
    at = [i for i, hole in enumerate(file.plate.hole) if hole.at == item.centre]
    x, y = item.centre
    return (f"the hole at {x:g}, {y:g}", ("plate", "hole", at[0])) if at else None


def _other_openings(file: DialFile) -> Iterator[tuple[str, Key]]:
    """Yield the names and keys of the others, in the order in which they are cut."""
    for i in range(len(file.plate.slot)):
        yield "the slot", ("plate", "slot", i)
    if file.plate.mirror:
        yield "the mirror's window", ("plate", "mirror")
