"""The circuit's picture: a design as a schematic in the trade's signs, with every part and its value.

`draw` gives a `dialgen.drawing.Drawing`, so every renderer writes it; `LAYOUTS` has the function
that sets each kind of circuit.
"""

from dialgen.schematic.compose import draw
from dialgen.schematic.layouts import LAYOUTS

__all__ = ["LAYOUTS", "draw"]
