"""Title, texts, symbols and maker's line: the forms they take, and where each would like to stand."""

from __future__ import annotations

from collections.abc import Callable, Iterator, Sequence
from dataclasses import dataclass, replace
from functools import partial

from dialgen.dialfile.models import FreeText
from dialgen.drawing import Letters, Point, Style
from dialgen.face.lettered.cover import Box
from dialgen.face.lettered.page import Page
from dialgen.face.lettered.room import Wish
from dialgen.face.lettered.settle import Choice, Form, Thing, lettered, stacked
from dialgen.face.lettered.signs import row_choices, signs
from dialgen.lettering import letters

_ACROSS = 3.0
"""What a millimetre off the axis costs, in millimetres up or down it."""

_GAP = 0.9
_AIR = 0.6
"""Space between the lines of a stack, and about all lettering, in heights of capitals."""

_BESIDE = 0.5
"""Clear space at either side, in heights of capitals, on top of the least."""

_ON_AXIS_MM = 0.5
_TALL = 1.6

Wishes = Callable[[Form], Sequence[Wish]]


@dataclass(frozen=True, slots=True)
class Stack:
    """What stands on the page's axis, in the order in which it was placed, and what stands aside of it."""

    page: Page
    boxes: tuple[Box, ...] = ()
    aside: tuple[Box, ...] = ()

    def joined(self, box: Box) -> Stack:
        """Return the stack with a box more."""
        if abs((box[0] + box[2]) / 2 - self.page.start[0]) < _ON_AXIS_MM:
            return replace(self, boxes=(*self.boxes, box))
        return replace(self, aside=(*self.aside, box))

    def corner_taken(self, corner: Point) -> bool:
        """Return whether something stands in a corner at the foot already."""
        (x, y), (axis, _) = corner, self.page.start
        return any(
            abs((bottom + top) / 2 - y) < top - bottom and (left < axis) == (x < axis)
            for left, bottom, _, top in self.aside
        )

    def below(self, form: Form, gap_mm: float, toll: float = 0.0) -> Wish:
        """Return the place under the lowest line, or the one where lettering begins."""
        feet = [box[1] for box in self.boxes]
        return self._wish(min(feet) - gap_mm - form.height_mm / 2 if feet else None, toll)

    def above(self, form: Form, gap_mm: float, toll: float = 0.0) -> Wish:
        """Return the place over the topmost line, or the one where lettering begins."""
        tops = [box[3] for box in self.boxes]
        return self._wish(max(tops) + gap_mm + form.height_mm / 2 if tops else None, toll)

    def _wish(self, y: float | None, toll: float) -> Wish:
        x, start_y = self.page.start
        return Wish((x, start_y if y is None else y), toll, across=_ACROSS)


def title(page: Page, stack: Stack) -> Thing:
    """Return the title: centred under the unit or over it, or beside it on a low plate."""
    said = page.file.dial.title or ""

    def wishes(form: Form) -> list[Wish]:
        return _stack_wishes(page, stack, form, page.title_mm, above=3.0)

    return _thing(_title_choices(page, said), wishes, page.title_mm)


def text(page: Page, stack: Stack, said: FreeText) -> Thing:
    """Return a line of lettering: centred under what stands on the axis."""

    def wishes(form: Form) -> list[Wish]:
        return _stack_wishes(page, stack, form, said.height, above=8.0)

    line = partial(lettered, said.say, said.height, page.look.ink, page.hand, said.angle)
    return _thing([Choice(0.0, line)], wishes, said.height)


def symbols(page: Page, stack: Stack) -> Thing:
    """Return the row of symbols: low at the left, or centred where the plate's corners are not free."""

    def wishes(form: Form) -> list[Wish]:
        left, right = _corners(page, stack, form)
        toll = 6.0 if page.wide or page.lopsided else 0.0
        centred = stack.below(form, _GAP * page.signs_mm, 0.0 if toll else 4.0)
        return [Wish(left, toll), Wish(right, toll + 2.0), centred]

    return _thing(_sign_choices(page), wishes, page.signs_mm)


def maker(page: Page, stack: Stack) -> Thing:
    """Return the maker's line: small, at the foot, on the axis or in the middle."""

    def wishes(form: Form) -> list[Wish]:
        left, bottom, right, _ = page.inner
        foot = bottom + _AIR * page.maker_mm + form.height_mm / 2
        low_left, low_right = _corners(page, stack, form)
        # What stands in one corner is balanced by what stands in the other.
        balance = 6.0 if stack.corner_taken(low_left) else 0.0
        return [
            Wish((page.start[0], foot), balance, across=_ACROSS),
            Wish(((left + right) / 2, foot), balance + 1.0, across=_ACROSS),
            Wish(low_right, 3.0),
            Wish(low_left, 5.0),
        ]

    line = partial(lettered, page.file.dial.maker or "", page.maker_mm, page.look.ink, page.hand)
    return _thing([Choice(0.0, line)], wishes, page.maker_mm)


def _corners(page: Page, stack: Stack, form: Form) -> tuple[Point, Point]:
    """Return where a form lies low at the left and at the right; on a strip, level with its stack."""
    left, bottom, right, _ = page.inner
    air_mm = _AIR * page.signs_mm
    across, up = air_mm + form.width_mm / 2, air_mm + form.height_mm / 2
    y = bottom + up
    if page.strip and stack.boxes:
        y = (min(box[1] for box in stack.boxes) + max(box[3] for box in stack.boxes)) / 2
    return (left + across, y), (right - across, y)


def given_text(page: Page, said: FreeText, at: Point) -> Letters:
    """Return a line of lettering at the place that the file gives it."""
    style = Style(fill=page.look.ink)
    return letters(said.say, said.height, at, style, angle_deg=said.angle, hand=page.hand)


def given_symbols(page: Page) -> Form:
    """Return the row of symbols as it stands where the file gives it a place."""
    return _sign_choices(page)[0].make()


def _sign_choices(page: Page) -> list[Choice]:
    return row_choices(signs(page.file), page.signs_mm, page.look.ink, page.hand)


def _stack_wishes(page: Page, stack: Stack, form: Form, height_mm: float, above: float) -> list[Wish]:
    """Return the places on the axis, and beside it.

    Args:
        page: the page.
        stack: what stands there already.
        form: what is to be placed.
        height_mm: of its capitals.
        above: the toll of standing over the stack.
    """
    gap_mm, (x, y) = _GAP * height_mm, page.start
    below, over = stack.below(form, gap_mm), stack.above(form, gap_mm, above)
    if page.wide and all(box[1] > 0 for box in stack.boxes):
        # The lower half balances the upper one: as far under the pivot as lettering begins above it.
        return [Wish((x, -y), across=_ACROSS), replace(below, toll=3.0), over, *_beside(page)]
    foot = Wish((x, -page.hub_mm - form.height_mm), 6.0, across=_ACROSS)
    return [below, over, foot, *_beside(page)]


def _beside(page: Page) -> Iterator[Wish]:
    """Yield the middles of both halves of the strip along a straight line, or beside an arc's unit."""
    left, _, right, _ = page.inner
    x, y = page.start
    toll = 3.0 if page.strip else 12.0
    yield Wish(((left + x) / 2, y), toll, up=_ACROSS)
    yield Wish(((right + x) / 2, y), toll + 0.5, up=_ACROSS)


def _thing(choices: Sequence[Choice], wishes: Wishes, height_mm: float) -> Thing:
    return Thing(choices, wishes, air_mm=_AIR * height_mm, beside_mm=_BESIDE * height_mm)


def _title_choices(page: Page, said: str) -> list[Choice]:
    """Return a title in one line, in two, and on a tall plate turned to be read upwards."""
    line = partial(lettered, height_mm=page.title_mm, ink=page.look.ink, hand=page.hand)
    choices = [Choice(0.0, partial(line, said))]
    if halves := _halves(said):
        choices.append(Choice(2.5, lambda: stacked([line(half) for half in halves], _GAP * page.title_mm)))
    _, _, width, height = page.plate.box
    if height > _TALL * width:
        choices.append(Choice(9.0, partial(line, said, angle_deg=-90.0)))
    return choices


def _halves(said: str) -> tuple[str, str] | None:
    """Return a text of several words in two lines, as equal as may be; None for a single word."""
    words = said.split()
    breaks = [(" ".join(words[:i]), " ".join(words[i:])) for i in range(1, len(words))]
    return min(breaks, key=lambda lines: max(map(len, lines)), default=None)
