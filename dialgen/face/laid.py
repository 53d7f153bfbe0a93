"""Everything of a scale but its unit, layer by layer, and the check that it can be laid at all."""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from dialgen.dialfile.models import DialFile
from dialgen.drawing import Layer, Outline, Primitive, Purpose
from dialgen.errors import InputError
from dialgen.face.fitted.openings import mirror_window
from dialgen.face.inked.dots import dot_items
from dialgen.face.inked.limits import limit_items
from dialgen.face.inked.lines import line_items
from dialgen.face.inked.marks import mark_items
from dialgen.face.inked.numerals import numerals
from dialgen.face.inked.zones import zone_items
from dialgen.face.parts import Part, layer_name
from dialgen.face.plate import Outliner
from dialgen.face.ruled.ruling import RuledScale
from dialgen.looks import LineForm


def scale_layers(file: DialFile, scale: RuledScale, number: int, plate: Outliner) -> list[Layer]:
    """Return the layers of a scale in drawing order.

    Args:
        file: what is laid over its scales.
        scale: the scale.
        number: which it is, counted from 1.
        plate: the outline that its numerals are kept on.

    Raises:
        InputError: see `check_laid`.
    """
    zones = [zone for zone in file.zone if zone.scale == number]
    limits = [limit for limit in file.limit if limit.scale == number]
    parts: dict[Part, Sequence[Primitive]] = {
        Part.ZONES: zone_items(zones, scale),
        Part.LINE: [*line_items(scale), *dot_items(scale, zones)],
        Part.MARKS: mark_items(scale),
        Part.NUMERALS: [numeral.letters for numeral in numerals(scale, plate)],
        Part.LIMITS: limit_items(limits, zones, scale),
    }
    return [
        Layer(name=layer_name(number, part), purpose=Purpose.PRINT, items=tuple(items))
        for part, items in parts.items()
    ]


def mirror(file: DialFile, scale: RuledScale, layers: Sequence[Layer]) -> Outline | None:
    """Return the window for a mirror, None where none is asked for.

    Args:
        file: what says how it is to be.
        scale: the first scale, below which it lies.
        layers: what is printed of that.

    Raises:
        InputError: see `check_laid`.
    """
    return mirror_window(file.plate, scale, [item for layer in layers for item in layer.items])


def check_laid(file: DialFile, scales: Sequence[RuledScale], plate: Outliner) -> Iterator[InputError]:
    """Yield what finds no room: a second scale line, a zone, a mirror below the first scale."""
    errors = [*_check_lines(scales), *_check_zones(file, scales)]
    yield from errors
    if file.plate.mirror is not None and not errors:
        try:
            mirror(file, scales[0], scale_layers(file, scales[0], 1, plate))
        except InputError as error:
            yield error


def _check_lines(scales: Sequence[RuledScale]) -> Iterator[InputError]:
    for scale in scales:
        if scale.look.line is LineForm.DOUBLE:
            try:
                line_items(scale)
            except InputError as error:
                fault = f"there is no room for a double line: {error.message}"
                yield InputError(fault, (*scale.dial.key, "look"))


def _check_zones(file: DialFile, scales: Sequence[RuledScale]) -> Iterator[InputError]:
    for i, zone in enumerate(file.zone):
        try:
            zone_items([zone], scales[zone.scale - 1])
        except InputError as error:
            yield error.under("zone", i)
