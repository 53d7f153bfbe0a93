"""Where lettering stands that has no place of its own: units, title, texts, symbols, maker's line.

What the file gives a place stands exactly there, and in the way of the rest.  The others are placed
one after the other in the room that is left; what finds none stands where it would have liked to,
for the review to tell.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from dialgen.dialfile.models import DialFile
from dialgen.drawing import Layer, Letters, Purpose
from dialgen.face.lettered import legends
from dialgen.face.lettered.cover import cover, letters_box
from dialgen.face.lettered.page import Page, page_for
from dialgen.face.lettered.room import Room
from dialgen.face.lettered.settle import CLEAR_MM, Settled, Thing, settle, settled
from dialgen.face.lettered.signs import signs
from dialgen.face.lettered.units import given_unit, lone_unit, row_units, several_units
from dialgen.face.parts import MAKER, SYMBOLS, TEXT, TITLE, Part, layer_name
from dialgen.face.plate import Outliner
from dialgen.face.ruled.ruling import RuledScale
from dialgen.looks import Look

_BESIDE = 1.5
"""Space kept beside what is placed, in its own heights."""

Slot = tuple[str, int]
"""A layer's name, and the number of a thing on it."""


def arrange(
    file: DialFile, look: Look, scales: Sequence[RuledScale], plate: Outliner, laid: Sequence[Layer]
) -> Iterator[Layer]:
    """Yield the layers of all lettering beside the numerals, each where the plate is free.

    Args:
        file: what is to be said.
        look: how the lettering that belongs to no scale is drawn.
        scales: the scales, for their units.
        plate: the plate's outline.
        laid: the layers that are laid already, ink, cut lines and all.
    """
    board = _Board(page_for(file, look, scales, plate), scales, laid)
    board.place_units()
    board.place_legends()
    for name in _layer_names(len(scales)):
        items = tuple(item for thing in board.on(name) for item in thing.items)
        yield Layer(name=name, purpose=Purpose.PRINT, items=items)


def _layer_names(scales: int) -> list[str]:
    return [*(layer_name(n, Part.UNIT) for n in range(1, scales + 1)), TITLE, TEXT, SYMBOLS, MAKER]


class _Board:
    """What stands in its place so far, and the room that is left."""

    def __init__(self, page: Page, scales: Sequence[RuledScale], laid: Sequence[Layer]) -> None:
        self.page, self.scales = page, scales
        self.words = [_words(laid, layer_name(n, Part.NUMERALS)) for n in range(1, len(scales) + 1)]
        self.placed: dict[Slot, Settled] = dict(_given(page, scales))
        boxes = [thing.box for thing in self.placed.values()]
        covered = cover([*laid, page.hub()], page.plate, boxes)
        self.room = Room(page.fields, covered, max(page.edge_mm - CLEAR_MM, 0.0))
        self.stack = legends.Stack(page)

    def on(self, name: str) -> list[Settled]:
        """Return what is placed on a layer, in its own order."""
        return [self.placed[slot] for slot in sorted(self.placed) if slot[0] == name]

    def place_units(self) -> None:
        """Place the units of the scales, then those of their further rows of numerals."""
        free = [
            (slot, scale)
            for n, scale in enumerate(self.scales, 1)
            if scale.rows[0].unit and (slot := (layer_name(n, Part.UNIT), 0)) not in self.placed
        ]
        if len(self.scales) == 1:
            units = tuple(lone_unit(self.room, scale, self.words[0]) for _, scale in free)
        else:
            units = several_units(self.room, [scale for _, scale in free], self.scales, self.words)
        for (name, _), given in self.placed.items():
            if name not in (TEXT, SYMBOLS):
                self.stack = self.stack.joined(given.box)
        for (slot, _), unit in zip(free, units, strict=True):
            self._put(slot, unit)
        for n, scale in enumerate(self.scales, 1):
            name = layer_name(n, Part.UNIT)
            for row, unit in enumerate(
                row_units(self.room, scale, self.placed.get((name, 0)), self.words[n - 1]), 1
            ):
                self._put((name, row), unit)

    def place_legends(self) -> None:
        """Place title, texts, symbols and maker's line, in this order."""
        page, file = self.page, self.page.file
        if file.dial.title:
            self._settle((TITLE, 0), legends.title(page, self.stack))
        for i, text in enumerate(file.text):
            self._settle((TEXT, i), legends.text(page, self.stack, text))
        if signs(file):
            self._settle((SYMBOLS, 0), legends.symbols(page, self.stack))
        if file.dial.maker:
            self._settle((MAKER, 0), legends.maker(page, self.stack))

    def _settle(self, slot: Slot, thing: Thing) -> None:
        if slot not in self.placed:
            self._put(slot, settle(self.room, thing))

    def _put(self, slot: Slot, thing: Settled) -> None:
        self.placed[slot] = thing
        left, bottom, right, top = thing.box
        # Words in a line stand farther apart than lines do.
        beside_mm = _BESIDE * (top - bottom)
        self.room = self.room.with_box((left - beside_mm, bottom, right + beside_mm, top))
        self.stack = self.stack.joined(thing.box)


def _words(laid: Sequence[Layer], name: str) -> list[Letters]:
    """Return the lettering of a layer."""
    return [item for layer in laid if layer.name == name for item in layer.items if isinstance(item, Letters)]


def _given(page: Page, scales: Sequence[RuledScale]) -> Iterator[tuple[Slot, Settled]]:
    """Yield what the file gives a place."""
    for n, scale in enumerate(scales, 1):
        if scale.rows[0].unit and scale.spec.unit_at:
            unit = given_unit(scale, scale.spec.unit_at, alone=len(scales) == 1)
            yield (layer_name(n, Part.UNIT), 0), unit
    for i, text in enumerate(page.file.text):
        if text.at:
            word = legends.given_text(page, text, text.at)
            yield (TEXT, i), Settled((word,), letters_box(word) or (*text.at, *text.at))
    asked = page.file.symbols
    if asked and asked.at and signs(page.file):
        yield (SYMBOLS, 0), settled(legends.given_symbols(page), asked.at)
