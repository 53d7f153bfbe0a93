"""Good faces, and each of them spoiled in one way: what was done, and what must be said of it."""

from __future__ import annotations

from dataclasses import dataclass

PANEL = """\
dialgen = 1
[movement]
current = "1 mA"
resistance = "75 ohm"
rest = -45
full = 45
pointer = 45
[circuit]
kind = "shunt"
range = "40 A"
[[scale]]
unit = "A"
from = 0
to = 40
radius = 44
numbered = { every = 10 }
divisions = { every = 1 }
[plate]
size = [90, 68]
pivot = [45, 12]
corner = 2
hole = [{ at = [-38, -5], diameter = 3.2 }, { at = [38, -5], diameter = 3.2 }]
[[text]]
say = "50 mV shunt"
at = [0, 10]
[look]
style = "plain"
"""

TWO = """\
dialgen = 1
[movement]
rest = -45
full = 45
pointer = 55
[[scale]]
unit = "A"
from = 0
to = 40
radius = 54
numbered = { every = 10 }
divisions = { every = 1 }
[[scale]]
unit = "%"
from = 0
to = 100
radius = 44
numbered = { every = 20 }
divisions = { every = 5 }
marks = "inward"
numerals = "inside"
[plate]
size = [110, 84]
pivot = [55, 15]
"""

ZONED = """\
dialgen = 1
[movement]
rest = -50
full = 50
[[scale]]
unit = "V"
from = 10
to = 16
radius = 48
circuit = { kind = "direct", rest = 10 }
numbered = { every = 1 }
[[zone]]
from = 12
to = 14
colour = "green"
[[zone]]
from = 14
to = 15
colour = "yellow"
place = "line"
[[limit]]
at = 15
[plate]
size = [100, 76]
pivot = [50, 14]
"""

BETWEEN = """\
dialgen = 1
[movement]
rest = -45
full = 45
pointer = 54
[[scale]]
unit = "A"
from = 0
to = 40
radius = 54
numbered = { every = 10 }
divisions = { every = 1 }
numerals = "inside"
[[scale]]
unit = "%"
from = 0
to = 100
radius = 43
numbered = { every = 20 }
divisions = { every = 5 }
numerals = "inside"
[plate]
size = [110, 80]
pivot = [55, 15]
"""

ROUND = """\
dialgen = 1
[movement]
rest = -135
full = 135
[[scale]]
unit = "V"
from = 0
to = 30
radius = 36
numbered = { every = 5 }
divisions = { every = 1 }
marks = "inward"
numerals = "inside"
[plate]
diameter = 84
pivot = [42, 42]
"""

EDGEWISE = """\
dialgen = 1
[movement]
rest = -30
full = 30
pointer = 47
[[scale]]
unit = "%"
from = 0
to = 100
line = [[-30, 46], [30, 46]]
square = true
numbered = { every = 20 }
divisions = { every = 5 }
[plate]
size = [78, 26]
pivot = [39, -32]
"""

BASES = {
    "panel": PANEL,
    "two": TWO,
    "zoned": ZONED,
    "between": BETWEEN,
    "round": ROUND,
    "edgewise": EDGEWISE,
}


@dataclass(frozen=True)
class Spoiled:
    """A good face with one change, and what the review must say: the check, the key, part of its words."""

    name: str
    base: str
    old: str
    new: str
    check: str
    key: str
    words: str

    @property
    def text(self) -> str:
        """The dial file."""
        assert self.base.count(self.old) == 1, self.old
        return self.base.replace(self.old, self.new)


SPOILED = [
    Spoiled(
        "plate too low", PANEL, "[90, 68]", "[90, 59]", "edge", "scale[1].radius", "over the plate's edge"
    ),
    Spoiled("text off", PANEL, "at = [0, 10]", "at = [40, 6]", "edge", "text[1]", '"50 mV shunt" runs over'),
    Spoiled(
        "hole in a numeral",
        PANEL,
        "hole = [",
        "hole = [{ at = [0, 51], diameter = 4 }, ",
        "opening",
        "plate.hole[1]",
        "the numeral 20 runs into the hole at 0, 51",
    ),
    Spoiled(
        "slot in the marks",
        PANEL,
        "corner = 2\n",
        "slot = [{ radius = 46, from = -10, to = 10, width = 1 }]\n",
        "opening",
        "plate.slot[1]",
        "a mark runs into the slot",
    ),
    Spoiled(
        "text in the mirror",
        PANEL,
        "corner = 2\n",
        "mirror = { radius = 10, width = 3, from = -30, to = 30 }\n",
        "opening",
        "text[1]",
        "runs into the mirror's window",
    ),
    Spoiled(
        "case too small",
        PANEL,
        "corner = 2\n",
        "window = { at = [0, 20], size = [64, 70] }\n",
        "case",
        "scale[1].radius",
        "is hidden by the case",
    ),
    Spoiled(
        "text at the edge",
        PANEL,
        "at = [0, 10]",
        "at = [37, 3]",
        "margin",
        "text[1]",
        "less than 1 mm from the plate's edge",
    ),
    Spoiled(
        "scales collide",
        TWO,
        "radius = 44",
        "radius = 57.5",
        "touching",
        "scale[2].radius",
        "of scale 1 (A) touches",
    ),
    Spoiled(
        "text on a numeral",
        PANEL,
        "at = [0, 10]",
        "at = [0, 49.7]",
        "touching",
        "text[1]",
        'the text "50 mV shunt"',
    ),
    Spoiled(
        "unit on the line",
        PANEL,
        "radius = 44\n",
        "radius = 44\nunit_at = [0, 44]\n",
        "touching",
        "scale[1].unit_at",
        "the unit A touches",
    ),
    Spoiled(
        "symbols on the marks",
        ZONED,
        "[plate]",
        '[symbols]\nshow = ["dc", "vertical"]\nat = [0, 48]\n[plate]',
        "touching",
        "symbols",
        "a symbol touches",
    ),
    Spoiled(
        "numerals overlap",
        PANEL,
        "numbered = { every = 10 }",
        "numbered = [0, 10, 20, 20.5, 21, 30, 40]",
        "overlap",
        "scale[1].numbered",
        "the numerals 20 and 20.5 overlap",
    ),
    Spoiled(
        "numerals run together",
        EDGEWISE,
        "numbered = { every = 20 }",
        "numbered = [0, 20, 40, 46, 60, 80, 100]",
        "overlap",
        "scale[1].numbered",
        "all but run together",
    ),
    Spoiled(
        "second row too wide",
        PANEL,
        "radius = 44\nnumbered = { every = 10 }",
        'radius = 44\nnumbered = { every = 5 }\nalso = [{ times = 1.23456789012, unit = "" }]',
        "overlap",
        "scale[1].numbered",
        "overlap",
    ),
    Spoiled(
        "two rows read as one number",
        PANEL,
        "radius = 44\nnumbered = { every = 10 }",
        "radius = 44\nnumbered = [0, 10, 20, 30, 38, 40]\nalso = [{ times = 100 }]",
        "overlap",
        "scale[1].numbered",
        "the numerals 38 and 4000 all but run together",
    ),
    Spoiled(
        "numeral nearer to another's marks",
        BETWEEN,
        "radius = 43",
        "radius = 45.9",
        "nearness",
        "scale[2].radius",
        "of scale 1 (A) stands nearer to a mark of scale 2 (%) than to its own",
    ),
    Spoiled(
        "line too short",
        EDGEWISE,
        "[[-30, 46], [30, 46]]",
        "[[-20, 46], [20, 46]]",
        "line ends",
        "scale[1].line",
        "past the ends given to the line",
    ),
    Spoiled(
        "ends too near",
        ROUND,
        "rest = -135\nfull = 135",
        "rest = -166\nfull = 166",
        "break",
        "movement.full",
        "less than one numbered interval",
    ),
    Spoiled(
        "pointer short",
        PANEL,
        "pointer = 45",
        "pointer = 40",
        "pointer short",
        "movement.pointer",
        "4 mm before the marks",
    ),
    Spoiled(
        "pointer long",
        PANEL,
        "pointer = 45",
        "pointer = 52",
        "pointer long",
        "movement.pointer",
        "into the numerals",
    ),
    Spoiled(
        "pointer short of a straight line",
        EDGEWISE,
        "pointer = 47",
        "pointer = 43",
        "pointer short",
        "movement.pointer",
        "before the marks",
    ),
    Spoiled(
        "pointer short of the outer scale",
        TWO,
        "pointer = 55",
        "pointer = 50",
        "pointer short",
        "movement.pointer",
        "before the marks of scale 1 (A)",
    ),
    Spoiled(
        "read from afar",
        PANEL,
        'style = "plain"',
        'distance = "0.7 m"\nnumeral = 2.0',
        "height",
        "look.numeral",
        "16 minutes",
    ),
    Spoiled(
        "tiny text",
        PANEL,
        "at = [0, 10]",
        "at = [0, 10]\nheight = 0.9",
        "height",
        "text[1].height",
        "only 0.9 mm high",
    ),
    Spoiled(
        "hair line",
        PANEL,
        'style = "plain"',
        "line_width = 0.05",
        "stroke",
        "look.line_width",
        "0.05 mm thin",
    ),
    Spoiled(
        "marks too near",
        PANEL,
        "numbered = { every = 10 }\ndivisions = { every = 1 }",
        'numbered = [0, 10, 20, 30, { at = 38, label = "" }, 40]\n'
        "divisions = [{ to = 38, every = 1 }, { to = 40, every = 0.2 }]",
        "gap",
        "scale[1].divisions",
        "too near to tell apart",
    ),
    Spoiled(
        "marks too heavy",
        PANEL,
        'style = "plain"',
        "fine_width = 1.2",
        "gap",
        "scale[1].divisions",
        "too near to tell apart",
    ),
    Spoiled(
        "too many numerals",
        PANEL,
        "numbered = { every = 10 }",
        "numbered = { every = 4 }",
        "count",
        "scale[1].numbered",
        "11 numbered marks are too many for the line, 69 mm long; number 4 to 6",
    ),
    Spoiled(
        "one numeral",
        EDGEWISE,
        "numbered = { every = 20 }\ndivisions = { every = 5 }",
        "numbered = [50]\ndivisions = { every = 10 }",
        "count",
        "scale[1].numbered",
        "1 numbered mark is too few",
    ),
    Spoiled(
        "too many marks between",
        PANEL,
        "numbered = { every = 10 }",
        "numbered = { every = 20 }",
        "between",
        "scale[1].divisions",
        "19 marks stand between",
    ),
    Spoiled(
        "finer than the class",
        PANEL,
        "radius = 44\n",
        "radius = 44\nclass = 5\n",
        "class",
        "scale[1].divisions",
        "finer than class 5 justifies, counted from the limit",
    ),
    Spoiled(
        "pale ink",
        PANEL,
        'style = "plain"',
        'ink = "#999999"',
        "contrast",
        "look.ink",
        "has a contrast of 2.8",
    ),
    Spoiled(
        "pale scale",
        TWO,
        "radius = 44\n",
        'radius = 44\nink = "amber"\n',
        "contrast",
        "scale[2].ink",
        "amber (#f2b705) on white (#ffffff)",
    ),
    Spoiled(
        "dark ground",
        PANEL,
        'style = "plain"',
        'ground = "#333333"',
        "contrast",
        "look.ground",
        "black (#000000) on #333333",
    ),
    Spoiled(
        "invisible zone", ZONED, '"green"', '"#f8f8f8"', "contrast", "zone[1].colour", "#f8f8f8 on white"
    ),
    Spoiled(
        "marks lost in a zone",
        ZONED,
        '"yellow"',
        '"brown"',
        "contrast on zone",
        "zone[2].colour",
        "black (#000000) over a zone in brown (#6b3f1d) has a contrast of 2.4, too little for the marks",
    ),
    Spoiled(
        "class claimed",
        PANEL,
        "divisions = { every = 1 }\n",
        'divisions = { every = 1 }\nclass = 1.5\n[symbols]\nshow = ["class"]\n',
        "claim",
        "symbols.show[1]",
        "is a claim",
    ),
]


@dataclass(frozen=True)
class Bearable:
    """A good face with a change that a maker may want, and that nothing must be said of."""

    name: str
    base: str
    old: str
    new: str

    @property
    def text(self) -> str:
        """The dial file."""
        assert self.base.count(self.old) == 1, self.old
        return self.base.replace(self.old, self.new)


BEARABLE = [
    Bearable("pointer a millimetre short", PANEL, "pointer = 45", "pointer = 43"),
    Bearable("pointer to the ends of the marks", PANEL, "pointer = 45", "pointer = 46.8"),
    Bearable("pointer right for the ends of a straight line", EDGEWISE, "pointer = 47", "pointer = 49"),
    Bearable("pointer far past the inner scale", TWO, "pointer = 55", "pointer = 57"),
    Bearable("fewer numerals than published", PANEL, "numbered = { every = 10 }", "numbered = { every = 8 }"),
    Bearable("more numerals than published", PANEL, "numbered = { every = 10 }", "numbered = { every = 5 }"),
    Bearable("no numerals at all", PANEL, "numbered = { every = 10 }", "numbered = []\n#"),
    Bearable(
        "two words for numerals",
        PANEL,
        "numbered = { every = 10 }\ndivisions = { every = 1 }",
        'numbered = [{ at = 0, label = "EMPTY" }, { at = 40, label = "FULL" }]\ndivisions = { every = 10 }',
    ),
    Bearable(
        "ends numbered alone where the law crowds",
        PANEL,
        "from = 0\nto = 40\nradius = 44\nnumbered = { every = 10 }\ndivisions = { every = 1 }",
        'from = 1\nto = 1000\nradius = 44\nlaw = "logarithmic"\ncircuit = "direct"\nnumbered = [1000]',
    ),
    Bearable("divisions as fine as the error", PANEL, "radius = 44\n", "radius = 44\nclass = 2.5\n"),
    Bearable(
        "class from the length", PANEL, "radius = 44\n", 'radius = 44\nclass = 2.5\nfiducial = "length"\n'
    ),
    Bearable("dark zone under the line", ZONED, '"green"', '"brown"'),
    Bearable("dark hatched zone under the marks", ZONED, '"yellow"', '"brown"\nhatch = true'),
    Bearable("neighbouring zones", ZONED, "from = 14\nto = 15", "from = 14\nto = 16"),
    Bearable(
        "text over a light zone", ZONED, '"green"', '"yellow"\nwidth = 10\n[[text]]\nsay = "OK"\nat = [0, 43]'
    ),
    Bearable(
        "full circle",
        ROUND,
        'rest = -135\nfull = 135\n[[scale]]\nunit = "V"\nfrom = 0\nto = 30\nradius = 36\n'
        "numbered = { every = 5 }\ndivisions = { every = 1 }",
        'rest = -180\nfull = 180\n[[scale]]\nunit = ""\nfrom = 0\nto = 360\nradius = 36\n'
        'numbered = [{ at = 0, label = "N" }, 90, 180, 270]\ndivisions = { every = 10 }',
    ),
    Bearable("read from near", PANEL, 'style = "plain"', 'distance = "0.45 m"'),
    Bearable(
        "window just large enough", PANEL, "corner = 2\n", "window = { at = [0, 22], size = [84, 60] }\n"
    ),
    Bearable("hole between the numerals", PANEL, "hole = [", "hole = [{ at = [8, 53], diameter = 3 }, "),
]
