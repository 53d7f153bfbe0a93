"""Ink: what a primitive covers, whether two inks meet, how near they come and where.

``shape`` makes the area a primitive covers.  ``touch`` and ``clearance`` ask about two areas;
``meetings`` and ``neighbours`` about many at once, which is how a whole face is looked over in a few
milliseconds.  ``strays`` finds what leaves a figure such as the plate.  All in millimetres, y up.
"""

from dialgen.ink.bounds import strays
from dialgen.ink.pairs import TOUCH_MM, Near, clearance, meetings, neighbours, touch
from dialgen.ink.shapes import Shape, shape

__all__ = ["TOUCH_MM", "Near", "Shape", "clearance", "meetings", "neighbours", "shape", "strays", "touch"]
