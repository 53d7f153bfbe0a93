"""What is printed on a finished face, thing by thing: its ink, its name in words, its key in the file."""

from __future__ import annotations

from collections.abc import Callable, Iterator, Mapping, Sequence
from dataclasses import dataclass

from dialgen.dialfile.models import DialFile, Limit, Zone
from dialgen.drawing import Drawing, Layer, Letters, Primitive, Purpose
from dialgen.errors import Key
from dialgen.face.parts import GROUND, MAKER, SYMBOLS, TEXT, TITLE, Part, layer_name
from dialgen.face.ruled.ruling import RuledScale
from dialgen.ink import Shape, shape

OPENING = "opening"
"""The part of what is cut out of the plate: holes, slots and the mirror's window."""

FREE = (TEXT, MAKER, TITLE, SYMBOLS, Part.UNIT)
"""What may be moved by itself."""
LETTERING = frozenset({*FREE, Part.NUMERALS})

_WORDS: Mapping[str, str] = {
    Part.ZONES: "a zone",
    Part.LINE: "the line",
    Part.MARKS: "a mark",
    Part.LIMITS: "a limit",
    TITLE: "the title",
    SYMBOLS: "a symbol",
    MAKER: "the maker's line",
}
_PLATE_KEYS: Mapping[str, Key] = {
    TITLE: ("dial", "title"),
    SYMBOLS: ("symbols",),
    MAKER: ("dial", "maker"),
}
_SCALE_KEYS: Mapping[str, str] = {
    Part.NUMERALS: "numbered",
    Part.MARKS: "divisions",
    Part.UNIT: "unit_at",
}
_LAID: Mapping[str, Callable[[DialFile], Sequence[Zone | Limit]]] = {
    Part.ZONES: lambda file: file.zone,
    Part.LIMITS: lambda file: file.limit,
}


@dataclass(frozen=True, slots=True, eq=False)
class Sort:
    """What things have in common that are of one part of one scale, or of the plate as a whole.

    Args:
        part: a `Part`, or the name of another layer, or `OPENING`.
        number: of the scale, counted from 1; None of what belongs to none.
        scale: that scale.
        whose: the scale in words, where the face has several; the name of an opening.
        key: where the dial file says something of it.
        colour: in which it is seen; None of a hatched zone, through which other ink is seen as well.
    """

    part: str
    number: int | None = None
    scale: RuledScale | None = None
    whose: str = ""
    key: Key = ()
    colour: str | None = None

    @property
    def owner(self) -> object:
        """Whatever is moved to move this: the scale, by its number, or the thing itself."""
        return self if self.number is None or self.part in FREE else self.number

    @property
    def moving_key(self) -> Key:
        """The key that moves it: that of the scale's line, or its own."""
        return self.key if self.scale is None or self.owner is self else line_key(self.scale)


@dataclass(frozen=True, slots=True, eq=False)
class Thing:
    """One thing on the face, or one opening: its sort, its number in its layer, what is drawn, its ink."""

    sort: Sort
    index: int
    item: Primitive
    shape: Shape

    @property
    def colour(self) -> str:
        """The colour in which it is seen."""
        return colour_of(self.item)

    @property
    def name(self) -> str:
        """The thing in plain words, with the scale it is of where the face has several."""
        part, whose = self.sort.part, self.sort.whose
        if part == OPENING:
            return whose
        if part in _WORDS or not isinstance(self.item, Letters):
            return _WORDS.get(part, f"the {part}") + whose
        if part == Part.NUMERALS:
            return f"the {self.item.text}{whose}" if whose else f"the numeral {self.item.text}"
        return f"the unit {self.item.text}{whose}" if part == Part.UNIT else f'the text "{self.item.text}"'


def line_key(scale: RuledScale) -> Key:
    """Return the key of a scale's line."""
    return (*scale.dial.key, "radius" if scale.spec.line is None else "line")


def scale_name(number: int, scale: RuledScale) -> str:
    """Return a scale in words, such as "scale 2 (kΩ)"."""
    unit = scale.rows[0].unit
    return f"scale {number} ({unit})" if unit else f"scale {number}"


def colour_of(item: Primitive) -> str:
    """Return the colour in which a primitive is seen; "" where it is not."""
    return item.style.fill or item.style.stroke or ""


def printed(file: DialFile, scales: Sequence[RuledScale], drawing: Drawing) -> Iterator[Thing]:
    """Yield everything that is printed, but for the plate's own colour, in drawing order."""
    parts = {layer_name(n, part): (n, part) for n in range(1, len(scales) + 1) for part in Part}
    for layer in drawing.layers:
        if layer.purpose is Purpose.PRINT and layer.name != GROUND:
            number, part = parts.get(layer.name, (None, None))
            if number is None or part is None:
                yield from _of_plate(layer)
            else:
                several = len(scales) > 1
                yield from _of_scale(file, layer, number, part, scales[number - 1], several=several)


def _of_plate(layer: Layer) -> Iterator[Thing]:
    """Yield what belongs to no scale; each text is a sort of its own."""
    sort: Sort | None = None
    for i, item in enumerate(layer.items):
        if ink := shape(item):
            if sort is None or layer.name == TEXT:
                key = (TEXT, i) if layer.name == TEXT else _PLATE_KEYS.get(layer.name, ())
                sort = Sort(layer.name, key=key, colour=colour_of(item))
            yield Thing(sort, i, item, ink)


def _of_scale(
    file: DialFile, layer: Layer, number: int, part: Part, scale: RuledScale, *, several: bool
) -> Iterator[Thing]:
    """Yield what is of one part of a scale; zones and limits of several colours are several sorts."""
    whose = f" of {scale_name(number, scale)}" if several else ""
    sorts: dict[str, Sort] = {}
    laid = _LAID[part](file) if part in _LAID else ()
    for i, item in enumerate(layer.items):
        ink = shape(item)
        if ink is None:
            continue
        colour = colour_of(item)
        apart = colour if laid else ""
        if apart not in sorts:
            index = _first(laid, number, colour)
            key = _scale_key(scale, part) if index is None else (part.removesuffix("s"), index)
            hatched = index is not None and getattr(laid[index], "hatch", False)
            sorts[apart] = Sort(part, number, scale, whose, key, None if hatched else colour)
        yield Thing(sorts[apart], i, item, ink)


def _scale_key(scale: RuledScale, part: Part) -> Key:
    return (*scale.dial.key, _SCALE_KEYS[part]) if part in _SCALE_KEYS else line_key(scale)


def _first(laid: Sequence[Zone | Limit], number: int, colour: str) -> int | None:
    """Return the number of a scale's first zone or limit of a colour, or else of its first."""
    own = [i for i, each in enumerate(laid) if each.scale == number]
    return next((i for i in own if laid[i].colour == colour), own[0] if own else None)
