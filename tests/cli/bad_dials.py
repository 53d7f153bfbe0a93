"""Dial files and CSVs that are wrong in one way each, and what must be said of them."""

from __future__ import annotations

from dataclasses import dataclass, field
from importlib.util import find_spec
from pathlib import Path

import dialfile_samples as samples


@dataclass(frozen=True)
class Bad:
    """A good file with one edit, and what must be said of it.

    ``place`` is line:column of the first complaint; ``key`` its key; ``piece`` part of its words.
    """

    name: str
    old: str
    new: str
    place: str
    key: str
    piece: str
    text: str = samples.SHUNT
    more: int = 0
    files: dict[str, str] = field(default_factory=dict)


READINGS = samples.SHUNT[samples.SHUNT.index("[[movement.reading]]") : samples.SHUNT.index("[movement.old]")]
FROM_CSV = samples.SHUNT.replace(READINGS, 'readings = "r.csv"\n')

TOML = [
    Bad(
        "value without quotes",
        'current = "1 mA"',
        "current = 1 mA",
        "9:13",
        "",
        "mA is left over behind the number",
    ),
    Bad("decimal comma", "rest = -44.0", "rest = -44,0", "11:11", "", "the decimal sign is a point"),
    Bad("minus of the typesetter", "rest = -44.0", "rest = −44.0", "11:8", "", "minus sign of the keyboard"),
    Bad("typographic quotes", '"1 mA"', "“1 mA”", "9:11", "", "typographic quotes"),
    Bad(
        "millimetres written",
        "radius = 44.0",
        "radius = 44.0mm",
        "38:14",
        "",
        "write millimetres and degrees bare",
    ),
    Bad("key twice", "full = 44.0", "full = 44.0\nrest = 3", "13:1", "", "rest is already given above"),
    Bad("table twice", "[plate]", "[movement]", "45:1", "", "movement is already given above"),
    Bad("text not closed", '"PB-07"', '"PB-07', "5:16", "", "the text does not end on its line"),
    Bad(
        "list not closed",
        "size = [84, 64]",
        "size = [84, 64",
        "47:1",
        "",
        "the list does not go on or end here",
    ),
    Bad("no value", "rest = -44.0", "rest =", "11:7", "", "no value behind rest"),
    Bad("no equals sign", "rest = -44.0", "rest: -44.0", "11:5", "", "no = after the key"),
    Bad("a point first", "corner = 2", "corner = .5", "48:10", "", "write a 0 before it"),
    Bad("a point last", "corner = 2", "corner = 2.", "48:11", "", "write one, such as 5.0"),
    Bad("truth in Python", "corner = 2", "corner = True", "48:10", "", "no value that can be read: True"),
    Bad("too many digits", "from = 0", "from = " + "9" * 5000, "35:8", "", "too many digits"),
    Bad("very many parts", "from = 0", ".".join("a" * 200) + " = 1", "35:1", "", "very many parts"),
    Bad("nested too deeply", "from = 0", "from = " + "[" * 5000, "1:1", "", "nested too deeply"),
    Bad("end of file", samples.SHUNT, "[movement", "1:10", "", "the name of the table does not end"),
]

SCHEMA = [
    Bad("no version", "dialgen = 1\n", "\n", "1:1", "dialgen", "missing; add dialgen = 1 as the first line"),
    Bad("other version", "dialgen = 1\n", "dialgen = 2\n", "1:1", "dialgen", "version 2 of the dial file"),
    Bad("empty file", samples.SHUNT, "", "1:1", "dialgen", "missing; add dialgen = 1", more=3),
    Bad("misspelt key", "radius = 44.0", "radios = 44.0", "38:1", "scale[1].radios", "did you mean radius?"),
    Bad("another name", 'kind = "shunt"', 'type = "shunt"', "29:1", "circuit.type", "did you mean kind?"),
    Bad(
        "key of another table",
        "pointer = 50.0",
        "size = [1, 2]",
        "15:1",
        "movement.size",
        "it belongs in [plate]",
    ),
    Bad(
        "key of the circuit",
        "pointer = 50.0",
        'range = "1 A"',
        "15:1",
        "movement.range",
        "it belongs in [circuit]",
    ),
    Bad(
        "key like no other", "pointer = 50.0", "zzz = 1", "15:1", "movement.zzz", "the keys are kind, current"
    ),
    Bad("unknown table", "[[text]]", "[[legend]]", "51:3", "legend", "not a key here"),
    Bad("key missing", "full = 44.0\n", "", "7:2", "movement.full", "missing; add full = 44.0"),
    Bad(
        "table missing",
        "[plate]\nsize = [84, 64]\npivot = [42, 12]\n",
        "",
        "1:1",
        "plate",
        "add a table [plate]",
        more=2,
    ),
    Bad("single scale", "[[scale]]", "[scale]", "33:2", "scale", "begin each with [[scale]]"),
    Bad(
        "bare current",
        'current = "1 mA"',
        "current = 1",
        "9:1",
        "movement.current",
        'write for example "1 mA"',
    ),
    Bad("bare resistance", '"75 ohm"', "75", "10:1", "movement.resistance", 'write for example "75 ohm"'),
    Bad("no unit", '"75 ohm"', '"75"', "10:1", "movement.resistance", "has no unit"),
    Bad("wrong unit", '"1 mA"', '"1 mV"', "9:1", "movement.current", "is not in A"),
    Bad("small letter", '"1 mA"', '"1 ma"', "9:1", "movement.current", 'did you mean "1 mA"?'),
    Bad("comma in text", '"1 mA"', '"1,5 mA"', "9:1", "movement.current", 'write "1.5 mA"'),
    Bad("no current", '"1 mA"', '"0 A"', "9:1", "movement.current", "is not above 0"),
    Bad(
        "angle in quotes",
        "rest = -44.0",
        'rest = "-44 deg"',
        "11:1",
        "movement.rest",
        "bare number of degrees",
    ),
    Bad(
        "angle too large",
        "full = 44.0",
        "full = 361",
        "12:1",
        "movement.full",
        "write a number from -360 to 360",
    ),
    Bad(
        "angle not a number", "full = 44.0", "full = nan", "12:1", "movement.full", "must be finite, not nan"
    ),
    Bad("angle a truth value", "full = 44.0", "full = true", "12:1", "movement.full", "not true"),
    Bad("angle a date", "full = 44.0", "full = 2024-01-01", "12:1", "movement.full", "not 2024-01-01"),
    Bad(
        "length too large",
        "radius = 44.0",
        "radius = 2001",
        "38:1",
        "scale[1].radius",
        "not from 0 to 2000 mm",
    ),
    Bad(
        "length negative", "radius = 44.0", "radius = -1", "38:1", "scale[1].radius", "not from 0 to 2000 mm"
    ),
    Bad(
        "length of nothing", "radius = 44.0", "radius = 0", "38:1", "scale[1].radius", "write 0.01 mm or more"
    ),
    Bad(
        "length with comma", "radius = 44.0", 'radius = "4,4 cm"', "38:1", "scale[1].radius", 'write "4.4 cm"'
    ),
    Bad("not a pair", "pivot = [42, 12]", "pivot = 42", "47:1", "plate.pivot", "write for example [0, 8]"),
    Bad(
        "half a pair",
        "pivot = [42, 12]",
        'pivot = [42, "x"]',
        "47:14",
        "plate.pivot[2]",
        '"x" is not a length',
    ),
    Bad("kind of circuit", '"shunt"', '"shnt"', "29:1", "circuit.kind", 'did you mean "shunt"?'),
    Bad(
        "kind of law",
        '"linear"\nradius',
        '"log"\nradius',
        "37:1",
        "scale[1].law.kind",
        'did you mean "logarithmic"?',
    ),
    Bad(
        "key of a law",
        '"linear"\nradius',
        '{ kind = "power", exp = 2 }\nradius',
        "37:25",
        "scale[1].law.exp",
        "exponent?",
    ),
    Bad(
        "column in characters",
        "[0, 10, 20, 30, 40]",
        '[{ at = 0, label = "Ω" }, { at = 50 }]',
        "40:38",
        "scale[1].numbered[2]",
        "50 is outside the scale",
    ),
    Bad(
        "rating a truth value",
        'built = "1.885 mohm"',
        "rated = true",
        "31:1",
        "circuit.rated",
        "true is not a shunt's rating",
    ),
    Bad(
        "rating very long",
        'built = "1.885 mohm"',
        f'rated = "{"x" * 300}"',
        "31:1",
        "circuit.rated",
        f"\"{'x' * 36}... is not a shunt's rating",
    ),
    Bad("circuit with no kind", 'kind = "shunt"\n', "", "28:2", "circuit.kind", "the circuit has no kind"),
    Bad(
        "single hole",
        "hole = [{ at = [-32, -4], diameter = 3.2 }, ",
        "hole = { at = 1 } # ",
        "49:1",
        "plate.hole",
        "write [{ ... }]",
    ),
    Bad("marks", '"outward"', '"out"', "42:1", "scale[1].marks", 'write "outward" or "inward" or "across"'),
    Bad("response", '"linear"\npointer', '"square"\npointer', "14:1", "movement.response", "{ power = 1.8 }"),
    Bad(
        "response turns",
        '"linear"\npointer',
        "{ points = [[0, 0], [0.5, 0.6], [1, 0.5]] }\npointer",
        "14:14",
        "movement.response.points",
        "must move strictly one way",
    ),
    Bad(
        "step of nothing", '"auto"', "{ every = 0 }", "41:15", "scale[1].divisions.every", "is not above zero"
    ),
    Bad(
        "numbered in quotes", "[0, 10, 20", '[0, "10", 20', "40:16", "scale[1].numbered[2]", "without quotes"
    ),
    Bad(
        "too many numbered",
        "[0, 10, 20",
        f"[{'0, ' * 600}20",
        "40:1",
        "scale[1].numbered",
        "give at most 500",
    ),
    Bad("value too large", "to = 40", "to = 1e300", "36:1", "scale[1].to", "put a prefix"),
    Bad("value minus infinite", "from = 0", "from = -inf", "35:1", "scale[1].from", "must be finite"),
    Bad(
        "no such letter", '"50 mV shunt"', '"50 mV ☃"', "52:1", "text[1].say", "no font has the character '☃'"
    ),
    Bad(
        "line break in text",
        '"50 mV shunt"',
        '"50 mV\\nshunt"',
        "52:1",
        "text[1].say",
        "each line as a text of its own",
    ),
]

SENSE = [
    Bad("zero span of angles", "full = 44.0", "full = -44.0", "12:1", "movement.full", "a zero span"),
    Bad("zero span of values", "to = 40", "to = 0", "36:1", "scale[1].to", "a zero span"),
    Bad("scale upside down", "to = 40", "to = -40", "36:1", "scale[1].to", "swap them"),
    Bad(
        "stops upside down",
        "[-49.0, 49.0]",
        "[49.0, -49.0]",
        "13:1",
        "movement.stops",
        "the lower angle first",
    ),
    Bad(
        "full beyond stops",
        "full = 44.0",
        "full = 60.0",
        "13:1",
        "movement.stops",
        "full at 60 degrees is beyond",
    ),
    Bad(
        "value beyond stops",
        '"40 A"\nbuilt = "1.885 mohm"',
        '"20 A"',
        "35:1",
        "scale[1].to",
        "beyond the stops -49 and 49",
    ),
    Bad(
        "radius and line",
        "centre = [0, 0]",
        "line = [[-30, 40], [30, 40]]",
        "39:1",
        "scale[1].line",
        "not both",
    ),
    Bad(
        "neither radius nor line",
        "radius = 44.0\n",
        "",
        "33:3",
        "scale[1]",
        "give radius = 44.0 for an arc, or line",
    ),
    Bad(
        "square on an arc",
        "centre = [0, 0]",
        "square = true",
        "39:1",
        "scale[1].square",
        "for a straight line",
    ),
    Bad("size and diameter", "corner = 2", "diameter = 80", "48:1", "plate.diameter", "not both"),
    Bad("corner too large", "corner = 2", "corner = 33", "48:1", "plate.corner", "give at most 32"),
    Bad(
        "unit against circuit",
        'unit = "A"',
        'unit = "V"',
        "34:1",
        "scale[1].unit",
        "the shunt takes a current in A",
    ),
    Bad(
        "law against circuit",
        'law = "linear"',
        'law = { kind = "linear", per = "1 mV" }',
        "37:1",
        "scale[1].law",
        "the shunt takes a current in A",
    ),
    Bad(
        "logarithm of nothing",
        'law = "linear"',
        'law = "logarithmic"\ncircuit = "direct"',
        "35:1",
        "scale[1].from",
        "no signal at 0",
    ),
    Bad(
        "law that turns",
        'law = "linear"',
        'law = { kind = "formula", signal = "(x - 20)**2" }',
        "37:1",
        "scale[1].law",
        "must move strictly one way",
    ),
    Bad("infinite end", "to = 40", "to = inf", "36:1", "scale[1].to", "no signal at inf"),
    Bad(
        "numbered outside",
        "30, 40]",
        "30, 50]",
        "40:28",
        "scale[1].numbered[5]",
        "50 is outside the scale, 0 to 40",
    ),
    Bad("numbered twice", "30, 40]", "30, 30]", "40:28", "scale[1].numbered[5]", "30 is numbered twice"),
    Bad(
        "divisions beyond",
        '"auto"\nmarks',
        "[{ to = 50, every = 1 }]\nmarks",
        "41:16",
        "scale[1].divisions[1].to",
        "let the pieces ascend up to 40",
    ),
    Bad(
        "too many marks",
        '"auto"',
        "{ every = 0.001 }",
        "41:15",
        "scale[1].divisions.every",
        "over 3000 marks",
    ),
    Bad(
        "no current for the shunt",
        'current = "1 mA"\nres',
        "res",
        "7:2",
        "movement.current",
        'add current = "1 mA"',
    ),
    Bad(
        "no resistance",
        'resistance = "75 ohm"\n',
        "",
        "7:2",
        "movement.resistance",
        'add resistance = "75 ohm"',
    ),
    Bad(
        "range below the movement",
        '"40 A"\nbuilt = "1.885 mohm"',
        '"0.5 mA"',
        "30:1",
        "circuit.range",
        "only widens the range",
    ),
    Bad(
        "hole off the plate", "at = [-32, -4]", "at = [-43, -4]", "49:11", "plate.hole[1].at", "off the plate"
    ),
    Bad("mark off the plate", "radius = 44.0", "radius = 64.0", "38:1", "scale[1].radius", "off the plate"),
    Bad(
        "pointer off the line",
        "centre = [0, 0]",
        "centre = [0, 80]",
        "38:1",
        "scale[1].radius",
        "does not meet the scale line",
    ),
    Bad(
        "reading twice",
        "angle = -22.4",
        "angle = -22.4\nold = 30",
        "20:1",
        "movement.reading[1].old",
        "already says where",
    ),
    Bad("reading of nothing", "angle = -22.4\n", "", "17:3", "movement.reading[1]", "add angle or old"),
    Bad(
        "reading out of order",
        "angle = -22.4",
        "angle = 30",
        "20:3",
        "movement.reading[2]",
        "must move strictly",
    ),
    Bad(
        "no old scale",
        "[movement.old]\nrest = 0\nfull = 100\n",
        "",
        "7:2",
        "movement.old",
        "add [movement.old]",
    ),
    Bad("old scale of one value", "full = 100", "full = 0", "26:1", "movement.old.full", "a zero span"),
    Bad(
        "readings and CSV",
        "pointer = 50.0",
        'readings = "r.csv"',
        "15:1",
        "movement.readings",
        "keep one of the two",
        files={"r.csv": "current,angle\n1 mA,43\n"},
    ),
    Bad("CSV not there", samples.SHUNT, FROM_CSV, "17:1", "movement.readings", "no such file"),
]

CSV = [
    Bad("comma for a point", "", "current,angle\n1 mA,44,0\n", "2:9", "", "write decimals with a point"),
    Bad("semicolons", "", "current;angle\n1 mA;44\n", "1:1", "", "part them by commas"),
    Bad("unknown column", "", "current,degrees\n1 mA,44\n", "1:9", "degrees", "not a column here"),
    Bad("column twice", "", "current,angle,angle\n1 mA,44,44\n", "1:15", "angle", "there twice"),
    Bad("no unit in a cell", "", "current,angle\n# note\n1 mA,44\n0.5,0\n", "4:1", "current", "has no unit"),
    Bad("unit in an angle", "", "current, angle\n1 mA, 44 deg\n", "2:7", "angle", "is not a bare number"),
    Bad("hole in the table", "", "current,angle\n1 mA,\n", "2:1", "", "add angle or old"),
    Bad("no rows", "", "current,angle\n", "1:1", "", "add a row for each"),
    Bad("empty CSV", "", "", "1:1", "", "the first line names them"),
    Bad("not finite", "", "value,angle\nnan,44\n", "2:1", "value", "is not a bare number"),
    Bad("direction", "", "value,angle,direction\n40,44,left\n", "2:7", "direction", 'write "up" or "down"'),
    Bad(
        "after a quoted cell",
        "",
        'value,angle,direction\n"40","44",Ωp\n',
        "2:11",
        "direction",
        'write "up" or "down"',
    ),
    Bad(
        "pointer moves back",
        "",
        "value,angle\n10,-22\n\n20,-30\n",
        "4:1",
        "movement.readings[2]",
        "must move strictly",
    ),
    Bad("value off the law", "", "value,old\n10,24\n20,1e16\n", "3:4", "old", "beyond what a face can show"),
]

DRESSED = """\
dialgen = 1
[dial]
title = "BATTERY"
maker = "Alder Lane Works"
tested = 2026-05-01
[movement]
current = "1 mA"
resistance = "75 ohm"
rest = -44
full = 44
[look]
style = "bench"
ink = "black"
distance = "0.5 m"
[[scale]]
unit = "V"
from = 0
to = 10
circuit = "multiplier"
radius = 60
class = 1.5
fiducial = "limit"
effective = [2, 10]
also = [{ times = 5, unit = "V" }]
sign = "always"
look = { letter_scale = 1.1 }
[plate]
size = [120, 100]
pivot = [60, 20]
mirror = { width = 4 }
[[plate.slot]]
width = 3
radius = 20
from = -30
to = 30
[plate.window]
at = [0, 33]
size = [114, 84]
[[zone]]
from = 2
to = 4
colour = "green"
[[limit]]
at = 8
[symbols]
show = ["auto", "test 2 kV", "class"]
"""
"""A good dial file with every table that says how a face is dressed."""

_ZONE = '[[zone]]\nfrom = 2\nto = 4\ncolour = "green"\n'
_FONT = Path(find_spec("matplotlib").submodule_search_locations[0]) / "mpl-data/fonts/ttf/DejaVuSans.ttf"
_DC = '"dc", '
_FOLDER = {"f.ttf": "no font"}

_FACE = (
    ("style of no such name", 'style = "bench"', 'style = "bensh"', "12:1", "look.style",
     '"bensh" is not known here; write "plain" or "bench"'),
    ("several looks", "[look]", "[[look]]", "11:3", "look", "this is a table of keys, not [a table]"),
    ("style a number", 'style = "bench"', "style = 3", "12:1", "look.style", "3 is not known here"),
    ("look of a scale by a wrong name", "look = { letter_scale = 1.1 }", 'look = "hal"', "26:1",
     "scale[1].look.style", '"hal" is not known here'),
    ("look of a scale a number", "look = { letter_scale = 1.1 }", "look = 3", "26:1", "scale[1].look",
     "this is a table of keys, not 3"),
    ("key of a look misspelt", 'ink = "black"', "wieght_scale = 1.2", "13:1", "look.wieght_scale",
     "did you mean weight_scale?"),
    ("key of a look like no other", 'ink = "black"', "zzz = 1", "13:1", "look.zzz", "the keys are style"),
    ("key of a look of a scale", "{ letter_scale = 1.1 }", "{ leter_scale = 1.1 }", "26:10",
     "scale[1].look.leter_scale", "did you mean letter_scale?"),
    ("colour a number", 'ink = "black"', "ink = 3", "13:1", "look.ink",
     'a colour is text, not 3; write "red" or "#c8201e"'),
    ("colour of no such name", 'ink = "black"', 'ink = "blak"', "13:1", "look.ink",
     '"blak" is no colour; write #rrggbb or one of black'),
    ("colour of three digits", 'ink = "black"', 'ground = "#fff"', "13:1", "look.ground",
     '"#fff" is no colour'),
    ("colour of letters", 'ink = "black"', 'accent = "#gg0000"', "13:1", "look.accent",
     '"#gg0000" is no colour'),
    ("distance too near", '"0.5 m"', '"20 mm"', "14:1", "look.distance",
     'a reading distance of 20 mm is too near to read; write for example "0.7 m"'),
    ("distance with comma", '"0.5 m"', '"0,7 m"', "14:1", "look.distance", 'write "0.7 m"'),
    ("distance in yards", '"0.5 m"', '"1 yd"', "14:1", "look.distance", "is not a length"),
    ("distance across the road", '"0.5 m"', '"20 m"', "14:1", "look.distance", "not from 0 to 2000 mm"),
    ("scale line of three", 'ink = "black"', 'line = "triple"', "13:1", "look.line",
     'write "single" or "double" or "none"'),
    ("blocks in quotes", 'ink = "black"', 'blocks = "yes"', "13:1", "look.blocks",
     'true or false, not "yes"; write it without quotes'),
    ("shape of marks", 'ink = "black"', 'mark_shape = "wedge"', "13:1", "look.mark_shape",
     'write "bar" or "taper"'),
    ("ends of marks", 'ink = "black"', 'mark_ends = "pointed"', "13:1", "look.mark_ends",
     'write "square" or "round"'),
    ("outside the effective range", 'ink = "black"', 'outside = "dotted"', "13:1", "look.outside",
     'write "plain" or "broken" or "none"'),
    ("turn of numerals", 'ink = "black"', 'turn = "radial"', "13:1", "look.turn",
     'write "upright" or "along" or "across"'),
    ("lettering", 'ink = "black"', 'lettering = "engraved"', "13:1", "look.lettering",
     'write "outline" or "single stroke"'),
    ("decimal sign itself", 'ink = "black"', 'decimal = ","', "13:1", "look.decimal",
     'write "point" or "comma"'),
    ("thousands in quotes", 'ink = "black"', 'thousands = "no"', "13:1", "look.thousands", "true or false"),
    ("fold a number", 'ink = "black"', "fold = 1", "13:1", "look.fold", "true or false, not 1"),
    ("factor in per cent", 'ink = "black"', "letter_scale = 120", "13:1", "look.letter_scale",
     "a factor of 120 is out of bounds; write a number from 0.2 to 5"),
    ("factor in quotes", 'ink = "black"', 'weight_scale = "1.2"', "13:1", "look.weight_scale",
     "without quotes"),
    ("factor of nothing", 'ink = "black"', "length_scale = 0", "13:1", "look.length_scale", "out of bounds"),
    ("numeral of nothing", 'ink = "black"', "numeral = 0", "13:1", "look.numeral", "write 0.01 mm or more"),
    ("mark too long", 'ink = "black"', 'numbered = "3 m"', "13:1", "look.numbered", "not from 0 to 2000 mm"),
    ("width in points", 'ink = "black"', 'line_width = "1 pt"', "13:1", "look.line_width",
     '"1 pt" is not a length'),
    ("font not there", 'ink = "black"', 'font = "none.ttf"', "13:1", "look.font", "none.ttf"),
    ("font that is none", 'ink = "black"', 'font = "f.ttf"', "13:1", "look.font",
     "is not a font; give a TrueType or OpenType file"),
    ("font a number", 'ink = "black"', "font = 3", "13:1", "look.font", "this is text, not 3"),
    ("font of a scale not there", "{ letter_scale = 1.1 }", '{ font = "none.ttf" }', "26:10",
     "scale[1].look.font", "none.ttf"),
    ("font in single strokes", 'ink = "black"', f'font = "{_FONT}"\nlettering = "single stroke"', "13:1",
     "look.font", "outlines, not single strokes"),
    ("font of a scale in single strokes", "{ letter_scale = 1.1 }",
     f'{{ font = "{_FONT}", lettering = "single stroke" }}', "26:10", "scale[1].look.font",
     "outlines, not single strokes"),
    # a scale's class, stretches and rows
    ("class of nothing", "class = 1.5", "class = 0", "21:1", "scale[1].class",
     "a class of 0 is out of bounds; write a number from 0.005 to 20"),
    ("class too coarse", "class = 1.5", "class = 25", "21:1", "scale[1].class",
     "a class of 25 is out of bounds"),
    ("class in quotes", "class = 1.5", 'class = "1.5"', "21:1", "scale[1].class", "without quotes"),
    ("fiducial of no such name", '"limit"', '"end"', "22:1", "scale[1].fiducial",
     'write "limit" or "length" or "value"'),
    ("fiducial without class", "class = 1.5\nfiducial", "fiducial", "21:1", "scale[1].fiducial",
     "give class, or leave it out"),
    ("effective off the scale", "[2, 10]", "[2, 12]", "23:1", "scale[1].effective",
     "2 to 12 is no part of the scale, 0 to 10; give two values of it, the lower first"),
    ("effective below the scale", "[2, 10]", "[-1, 10]", "23:1", "scale[1].effective",
     "-1 to 10 is no part of the scale"),
    ("effective reversed", "[2, 10]", "[10, 2]", "23:1", "scale[1].effective", "the lower first"),
    ("effective of one value", "effective = [2, 10]", "effective = 2", "23:1", "scale[1].effective",
     "write for example [10, 40]"),
    ("effective in words", "[2, 10]", '[2, "end"]', "23:17", "scale[1].effective[2]", 'a number, not "end"'),
    ("heavy off the scale", "effective = [2, 10]", "heavy = [5, 15]", "23:1", "scale[1].heavy",
     "5 to 15 is no part of the scale"),
    ("heavy of nothing", "effective = [2, 10]", "heavy = [5, 5]", "23:1", "scale[1].heavy",
     "is no part of the scale"),
    ("sign of no such name", '"always"', '"plus"', "25:1", "scale[1].sign", 'write "minus" or "always"'),
    ("ink of a scale", 'sign = "always"', 'ink = "scarlet"', "25:1", "scale[1].ink",
     '"scarlet" is no colour'),
    ("unit at a word", 'sign = "always"', 'unit_at = "left"', "25:1", "scale[1].unit_at",
     "write for example [0, 8]"),
    ("row without its factor", "{ times = 5, unit", "{ unit", "24:9", "scale[1].also[1].times",
     "missing; add times = 5"),
    ("row times nothing", "times = 5", "times = 0", "24:11", "scale[1].also[1].times",
     "a factor of 0 is not above zero"),
    ("row times less than nothing", "times = 5", "times = -5", "24:11", "scale[1].also[1].times",
     "not above zero"),
    ("row times a word", "times = 5", 'times = "x5"', "24:11", "scale[1].also[1].times",
     "a factor is a number"),
    ("row times far too much", "times = 5", "times = 1e300", "24:11", "scale[1].also[1].times",
     "beyond what a face can show"),
    ("row that is no table", '[{ times = 5, unit = "V" }]', "[5]", "24:9", "scale[1].also[1]",
     "this is a table of keys, not 5"),
    ("row outside a list", '[{ times = 5, unit = "V" }]', "{ times = 5 }", "24:1", "scale[1].also",
     "write [{ ... }]"),
    ("too many rows", '[{ times = 5, unit = "V" }]',
     f"[{', '.join(f'{{ times = {n} }}' for n in range(2, 9))}]", "24:1", "scale[1].also",
     "7 of them; give at most 6"),
    ("row on no side", 'unit = "V" }', 'numerals = "above" }', "24:22", "scale[1].also[1].numerals",
     'write "outside" or "inside"'),
    ("unit of a row a number", 'unit = "V" }', "unit = 5 }", "24:22", "scale[1].also[1].unit",
     "this is text"),
    ("unit of a row not to be lettered", 'unit = "V" }', 'unit = "☃" }', "24:22", "scale[1].also[1].unit",
     "no font has the character"),
    ("key of a row", 'unit = "V" }', "factor = 2 }", "24:22", "scale[1].also[1].factor",
     "the keys are times, unit, circuit, numerals"),
    ("circuit of a row", 'unit = "V" }', 'circuit = "multiplyer" }', "24:22", "scale[1].also[1].circuit.kind",
     'did you mean "multiplier"?'),
    ("circuit of a row of another kind", 'unit = "V" }', 'circuit = "shunt" }', "24:9",
     "scale[1].also[1].unit", "the shunt takes a current in A"),
    ("range of a row too small", 'unit = "V" }', 'circuit = { kind = "multiplier", range = "10 mV" } }',
     "24:55", "scale[1].also[1].circuit.range", "take a larger range"),
    # zones and limits
    ("zone without a start", "[[zone]]\nfrom = 2\n", "[[zone]]\n", "39:3", "zone[1].from",
     "missing; add from = 30"),
    ("zone without an end", "to = 4\n", "", "39:3", "zone[1].to", "missing; add to = 40"),
    ("zone without a colour", 'colour = "green"\n', "", "39:3", "zone[1].colour",
     'missing; add colour = "green"'),
    ("zone of no such colour", '"green"', '"gren"', "42:1", "zone[1].colour", '"gren" is no colour'),
    ("zone in American", "colour =", "color =", "42:1", "zone[1].color", "did you mean colour?"),
    ("zone reversed", "from = 2\nto = 4", "from = 4\nto = 2", "41:1", "zone[1].to",
     "a zone from 4 to 2 covers nothing; give the lower value first"),
    ("zone of nothing", "to = 4", "to = 2", "41:1", "zone[1].to", "covers nothing"),
    ("zone begins off the scale", "from = 2\nto = 4", "from = -2\nto = 4", "40:1", "zone[1].from",
     "-2 is outside the scale, 0 to 10; keep it within"),
    ("zone ends off the scale", "to = 4", "to = 14", "41:1", "zone[1].to",
     "14 is outside the scale, 0 to 10"),
    ("zone to infinity", "to = 4", "to = inf", "41:1", "zone[1].to", "inf is outside the scale"),
    ("zone of a scale that is not there", 'colour = "green"', 'colour = "green"\nscale = 2', "43:1",
     "zone[1].scale", "there is no scale 2; the file has 1, counted from 1"),
    ("zone of scale nought", 'colour = "green"', 'colour = "green"\nscale = 0', "43:1", "zone[1].scale",
     "from 1 up, not 0; write scale = 1"),
    ("zone of a scale by its unit", 'colour = "green"', 'colour = "green"\nscale = "V"', "43:1",
     "zone[1].scale", 'not "V"'),
    ("zone in no such place", 'colour = "green"', 'colour = "green"\nplace = "above"', "43:1",
     "zone[1].place", 'write "line" or "inside" or "outside"'),
    ("zone of no width", 'colour = "green"', 'colour = "green"\nwidth = 0', "43:1", "zone[1].width",
     "write 0.01 mm or more"),
    ("hatch a word", 'colour = "green"', 'colour = "green"\nhatch = "left"', "43:1", "zone[1].hatch",
     "true or false"),
    ("zone wider than the scale is far", 'colour = "green"', 'colour = "green"\nplace = "inside"\nwidth = 70',
     "44:1", "zone[1].width", "the pointer meets nothing; keep nearer to the line"),
    ("single zone", "[[zone]]", "[zone]", "39:2", "zone", "and this is a table; write [{ ... }]"),
    ("too many zones", _ZONE, "[[zone]]\n" * 101, "39:3", "zone", "101 of them; give at most 100"),
    ("limit without a value", "at = 8\n", "", "43:3", "limit[1].at", "missing; add at = 35"),
    ("limit off the scale", "at = 8", "at = 80", "44:1", "limit[1].at",
     "80 is outside the scale, 0 to 10; keep it within"),
    ("limit of a scale that is not there", "at = 8", "at = 8\nscale = 3", "45:1", "limit[1].scale",
     "there is no scale 3"),
    ("limit of no such shape", "at = 8", 'at = 8\nshape = "arrow"', "45:1", "limit[1].shape",
     'write "line" or "triangle"'),
    ("limit of no such colour", "at = 8", 'at = 8\ncolour = "rde"', "45:1", "limit[1].colour",
     '"rde" is no colour'),
    ("limit a word", "at = 8", 'at = "8 V"', "44:1", "limit[1].at", 'a number, not "8 V"'),
    ("limit to infinity", "at = 8", "at = inf", "44:1", "limit[1].at", "must be finite"),
    # symbols
    ("symbols not a list", 'show = ["auto", "test 2 kV", "class"]', 'show = "dc"', "46:1", "symbols.show",
     '"dc" does not say what to show; write "auto" or ["dc", "vertical"]'),
    ("too many symbols", '["auto", "test 2 kV", "class"]', f"[{_DC * 41}]", "46:1", "symbols.show",
     "41 symbols; give at most 40"),
    ("symbol a number", '"test 2 kV"', "3", "46:17", "symbols.show[2]",
     'a symbol is text, not 3; write for example "dc"'),
    ("symbol of no such name", '"test 2 kV"', '"moving cole"', "46:17", "symbols.show[2]", "moving coil"),
    ("symbol like no other", '"test 2 kV"', '"zzz"', "46:17", "symbols.show[2]", 'no symbol "zzz"'),
    ("star of no voltage", '"test 2 kV"', '"test"', "46:17", "symbols.show[2]", "kV"),
    ("star of an odd voltage", '"test 2 kV"', '"test two kV"', "46:17", "symbols.show[2]", "kV"),
    ("inclined by nothing", '"test 2 kV"', '"inclined"', "46:17", "symbols.show[2]", "inclined 60"),
    ("inclined past upright", '"test 2 kV"', '"inclined 190"', "46:17", "symbols.show[2]",
     'is not between 0 and 90 degrees; write for example "inclined 60"'),
    ("class by its number", '"test 2 kV"', '"class 1.5"', "46:17", "symbols.show[2]",
     'write "class" alone, and the number at the scale it holds for'),
    ("star without a test", "tested = 2026-05-01\n", "", "45:17", "symbols.show[2]",
     "a star claims that the insulation was tested, and no test is on file"),
    ("class without a class", 'class = 1.5\nfiducial = "limit"\n', "", "44:30", "symbols.show[3]",
     "no scale has a class to show"),
    ("symbols at a word", "[symbols]", '[symbols]\nat = "right"', "46:1", "symbols.at",
     "write for example [0, 8]"),
    ("symbols of no height", "[symbols]", "[symbols]\nheight = 0", "46:1", "symbols.height",
     "write 0.01 mm or more"),
    ("double line without room", "radius = 60", 'radius = 1\nmarks = "inward"', "27:1", "scale[1].look",
     "there is no room for a double line: ", 1),
    ("numbered by a word", 'sign = "always"', 'numbered = "all"', "25:1", "scale[1].numbered",
     '"all" does not say what to number; write "auto", { every = 10 } or [0, 10, 20]'),
    ("numbered by a step misspelt", 'sign = "always"', "numbered = { evry = 2 }", "25:14",
     "scale[1].numbered.evry", "did you mean every?"),
    ("numbered too often", 'sign = "always"', "numbered = { every = 0.001 }", "25:14",
     "scale[1].numbered.every", "a step of 0.001 gives over 3000 numerals; take a larger one"),
    ("numbered by a step of less than nothing", 'sign = "always"', "numbered = { every = -2 }", "25:14",
     "scale[1].numbered.every", "a step of -2 is not above zero"),
    ("numbered in steps without end", 'unit = "V"\nfrom = 0\nto = 10\ncircuit = "multiplier"',
     'unit = "kohm"\nfrom = 0\nto = inf\ncircuit = { kind = "series ohmmeter", half = "5 kohm" }\n'
     "numbered = { every = 10 }",
     "20:14", "scale[1].numbered.every", 'a step never reaches inf; write a list of values, or "auto"'),
    ("label a number", 'sign = "always"', "numbered = [0, { at = 5, label = 5 }]", "25:26",
     "scale[1].numbered[2].label", "this is text, not 5"),
    ("label not to be lettered", 'sign = "always"', 'numbered = [0, { at = 5, label = "☃" }]', "25:26",
     "scale[1].numbered[2].label", "no font has the character"),
    ("label at no value", 'sign = "always"', 'numbered = [0, { label = "OFF" }]', "25:16",
     "scale[1].numbered[2].at", "missing; add at = 20"),
    ("divided by a number", 'sign = "always"', "divisions = 5", "25:1", "scale[1].divisions",
     '5 does not say how to divide; write "auto", { every = 2 } or [{ to = 10, every = 1 }]'),
    ("divided into no pieces", 'sign = "always"', "divisions = []", "25:1", "scale[1].divisions",
     "0 pieces of divisions; give 1 to 100"),
    ("piece without an end", 'sign = "always"', "divisions = [{ every = 1 }]", "25:14",
     "scale[1].divisions[1].to", "missing; add to = 10"),
    ("piece without a step", 'sign = "always"', "divisions = [{ to = 10 }]", "25:14",
     "scale[1].divisions[1].every", "missing; add every = 10"),
    ("pieces out of order", 'sign = "always"', "divisions = [{ to = 6, every = 1 }, { to = 4, every = 2 }]",
     "25:39", "scale[1].divisions[2].to", "a piece up to 4 does not follow 6"),
    ("numerals on no side", 'sign = "always"', 'numerals = "below"', "25:1", "scale[1].numerals",
     'write "outside" or "inside"'),
    ("gap in quotes", 'sign = "always"', 'gap = "wide"', "25:1", "scale[1].gap", '"wide" is not a length'),
    ("line of one point", "radius = 60", "line = [[0, 60], [0, 60]]", "20:1", "scale[1].line",
     "both ends of the line are one point; give two points"),
    ("key of the symbols", "[symbols]", "[symbols]\nshwo = []", "46:1", "symbols.shwo", "did you mean show?"),
    # what the dial is
    ("test on a day in words", "tested = 2026-05-01", 'tested = "May 2026"', "5:1", "dial.tested",
     'this is a date, not "May 2026"; write for example 2026-05-01'),
    ("test at an hour", "tested = 2026-05-01", "tested = 2026-05-01T10:00:00", "5:1", "dial.tested",
     "this is a date"),
    ("test in a year alone", "tested = 2026-05-01", "tested = 2026", "5:1", "dial.tested",
     "this is a date, not 2026"),
    ("title not to be lettered", '"BATTERY"', '"BATTERY ☃"', "3:1", "dial.title",
     "no font has the character"),
    ("maker a number", '"Alder Lane Works"', "7", "4:1", "dial.maker", "this is text, not 7"),
    # openings of the plate
    ("slot without a course", "radius = 20\nfrom = -30\nto = 30\n", "", "31:3", "plate.slot[1]",
     "the slot has no course; give radius, from and to for an arc, or line = [[x, y], [x, y]]"),
    ("slot with half a course", "to = 30\n", "", "31:3", "plate.slot[1]", "the slot has no course"),
    ("slot of two courses", "to = 30", "to = 30\nline = [[-20, 30], [20, 30]]", "36:1", "plate.slot[1].line",
     "an arc or straight, not both"),
    ("slot reversed", "from = -30\nto = 30", "from = 30\nto = -30", "35:1", "plate.slot[1].to",
     "a slot from 30 to -30 degrees covers nothing; give the lower angle first"),
    ("slot of no width", "width = 3\n", "", "31:3", "plate.slot[1].width", "missing; add width = 3"),
    ("slot along a point", "radius = 20\nfrom = -30\nto = 30", "line = [[-20, 30], 4]", "33:20",
     "plate.slot[1].line[2]", "this is a pair of values in brackets, not 4"),
    ("slot off the plate", "radius = 20", "radius = 90", "31:3", "plate.slot[1]",
     "the slot runs off the plate; coordinates count from the pivot"),
    ("slot that closes on itself", "from = -30\nto = 30", "from = -180\nto = 178", "32:1",
     "plate.slot[1].width", "does not fit its arc; make it narrower or shorter"),
    ("mirror reversed", "mirror = { width = 4 }", "mirror = { from = 20, to = -20 }", "30:23",
     "plate.mirror.to", "a mirror from 20 to -20 degrees covers nothing"),
    ("mirror of no such ends", "mirror = { width = 4 }", 'mirror = { ends = "pointed" }', "30:12",
     "plate.mirror.ends", 'write "round" or "square"'),
    ("mirror of no width", "mirror = { width = 4 }", "mirror = { width = 0 }", "30:12", "plate.mirror.width",
     "write 0.01 mm or more"),
    ("mirror wider than there is room", "mirror = { width = 4 }", "mirror = { width = 200 }", "30:1",
     "plate.mirror", "there is no room for a mirror"),
    ("mirror off the plate", "mirror = { width = 4 }", "mirror = { from = -130, to = 0 }", "30:1",
     "plate.mirror", "the mirror runs off the plate"),
    ("mirror across a slot", "mirror = { width = 4 }", "mirror = { radius = 21 }", "30:1", "plate.mirror",
     "the mirror meets a slot"),
    ("mirror across a hole", "mirror = { width = 4 }",
     "mirror = { width = 4 }\nhole = [{ at = [0, 50], diameter = 5 }]", "30:1", "plate.mirror",
     "the mirror meets a hole"),
    ("window without a size", "size = [114, 84]\n", "", "36:2", "plate.window.size",
     "missing; add size = [70, 40]"),
    ("window without a place", "at = [0, 33]\n", "", "36:2", "plate.window.at", "missing; add at = [0, 20]"),
    ("corner too large for the window", "[plate.window]", "[plate.window]\ncorner = 43", "37:1",
     "plate.window.corner", "a corner of 43 mm does not fit the window; give at most 42"),
)  # fmt: skip

FACE = [Bad(*row[:6], text=DRESSED, more=sum(row[6:]), files=_FOLDER) for row in _FACE]
SENSE += FACE
