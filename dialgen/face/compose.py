"""A ruled dial as a drawing: the plate's ground, the scales, what is laid over them, lettering, cuts."""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from dialgen.dial import Dial
from dialgen.dialfile.looks import Dress, look_of
from dialgen.drawing import Drawing, Layer, Purpose, Style
from dialgen.face.fitted.fitting import guide_layer
from dialgen.face.fitted.openings import cut_layer
from dialgen.face.laid import mirror, scale_layers
from dialgen.face.lettered.layout import arrange
from dialgen.face.parts import GROUND
from dialgen.face.plate import Outliner, outliner
from dialgen.face.ruled.ruling import RuledScale
from dialgen.looks import Look

_PAPER = "#ffffff"


def compose(dial: Dial, scales: Sequence[RuledScale]) -> Drawing:
    """Return the face as a drawing whose page is exactly the plate's bounding box."""
    file, plate = dial.file, outliner(dial.file.plate)
    look = look_of(file.look, Dress())
    left, bottom, width, height = plate.box
    by_scale = [scale_layers(file, scale, i, plate) for i, scale in enumerate(scales, 1)]
    laid = [layer for layers in by_scale for layer in layers]
    fitting = [cut_layer(file.plate, mirror(file, scales[0], by_scale[0])), guide_layer(dial, scales)]
    lettering = arrange(file, look, scales, plate, [*laid, *fitting])
    layers = (*_ground(look, plate), *laid, *lettering, *fitting)
    return Drawing(
        left=left,
        bottom=bottom,
        width=width,
        height=height,
        layers=tuple(layer for layer in layers if layer.items),
        title=" ".join(part for part in (file.dial.name, file.dial.serial) if part),
    )


def _ground(look: Look, plate: Outliner) -> Iterator[Layer]:
    """Yield the plate's own colour, but for that of white paper."""
    if look.ground != _PAPER:
        yield Layer(name=GROUND, purpose=Purpose.PRINT, items=(plate.outline(Style(fill=look.ground)),))
