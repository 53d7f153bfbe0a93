"""Ink where there is no plate, or none to be seen: over the edge, through an opening, behind the case."""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from dialgen.dialfile.models import Window
from dialgen.errors import Remark
from dialgen.face.parts import Part
from dialgen.face.plate import Disc, Outliner, Rectangle
from dialgen.face.review.finished import Finished, Stray
from dialgen.face.review.things import LETTERING, OPENING
from dialgen.face.review.wording import and_so, at, grouped, move, weight

NUMERAL_MARGIN_MM = 0.5
LETTER_MARGIN_MM = 1.0


def over_edge(face: Finished) -> Iterator[Remark]:
    """Yield a remark on ink over the plate's edge, once for each scale and each lettering."""
    for strayed in _by_owner(face.over_edge):
        told = _first(strayed)
        more = and_so(len(strayed) - 1)
        yield Remark(
            f"{told.thing.name} runs over the plate's edge {at(told.place)}{more}; "
            "move it or enlarge the plate",
            told.thing.sort.moving_key,
            place=told.place,
        )


def through_opening(face: Finished) -> Iterator[Remark]:
    """Yield a remark on ink that a hole, a slot or the mirror's window cuts into."""
    cut = [pair for pair in face.pairs if pair.other.sort.part == OPENING and pair.touches]
    for pairs in grouped(((p.one.sort.owner, p.other.sort), p) for p in cut):
        told = min(pairs, key=lambda p: weight(p.one))
        more = and_so(len(pairs) - 1)
        yield Remark(
            f"{told.one.name} runs into {told.other.name} {at(told.place)}{more}; move one of them",
            told.one.sort.key if told.one.sort.owner is told.one.sort else told.other.sort.key,
            place=told.place,
        )


def behind_case(face: Finished) -> Iterator[Remark]:
    """Yield a remark on ink that the case hides."""
    window = face.file.plate.window
    if window is None:
        return
    over = {stray.thing for stray in face.over_edge}
    hidden = face.leaving(tuple(t for t in face.things if t not in over), _seen(window))
    for strayed in _by_owner(hidden):
        told = _first(strayed)
        more = and_so(len(strayed) - 1, verbs=("is", "are"))
        yield Remark(
            f"{told.thing.name} is hidden by the case {at(told.place)}{more}; "
            "move it into the window, or enlarge that",
            told.thing.sort.moving_key,
            place=told.place,
        )


def at_margin(face: Finished) -> Iterator[Remark]:
    """Yield a remark on lettering so near to an edge that a cut or a case a hair off would spoil it."""
    figures = [("the plate's edge", face.plate)]
    if face.file.plate.window:
        figures.append(("the case's window", _seen(face.file.plate.window)))
    for name, figure in figures:
        lettering = tuple(thing for thing in face.things if thing.sort.part in LETTERING)
        out = {stray.thing for stray in face.leaving(lettering, figure)}
        near = [
            stray
            for margin_mm in (NUMERAL_MARGIN_MM, LETTER_MARGIN_MM)
            for stray in face.leaving(
                tuple(t for t in lettering if t not in out and _margin_mm(t.sort.part) == margin_mm),
                inset(figure, margin_mm),
            )
        ]
        for strayed in _by_owner(near):
            told = _first(strayed)
            yield Remark(
                f"{told.thing.name} stands less than {_margin_mm(told.thing.sort.part):g} mm from {name} "
                f"{at(told.place)}, and a cut is never exact; {move(told.thing)}",
                told.thing.sort.moving_key,
                place=told.place,
            )


def inset(figure: Outliner, margin_mm: float) -> Outliner:
    """Return a figure smaller by a margin on every side."""
    if isinstance(figure, Disc):
        return Disc(figure.centre, max(figure.radius_mm - margin_mm, 0.0))
    left, bottom, width, height = figure.box
    corner_mm = figure.corner_mm if isinstance(figure, Rectangle) else 0.0
    margin_mm = min(margin_mm, width / 2, height / 2)
    box = (left + margin_mm, bottom + margin_mm, width - 2 * margin_mm, height - 2 * margin_mm)
    return Rectangle(box, max(corner_mm - margin_mm, 0.0))


def _margin_mm(part: str) -> float:
    return NUMERAL_MARGIN_MM if part == Part.NUMERALS else LETTER_MARGIN_MM


def _seen(window: Window) -> Rectangle:
    (x, y), (width, height) = window.at, window.size
    return Rectangle((x - width / 2, y - height / 2, width, height), window.corner)


def _by_owner(strays: Sequence[Stray]) -> list[list[Stray]]:
    return grouped((stray.thing.sort.owner, stray) for stray in strays)


def _first(strays: Sequence[Stray]) -> Stray:
    return min(strays, key=lambda stray: weight(stray.thing))
