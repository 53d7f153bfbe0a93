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

WIRED = """\
dialgen = 1
[movement]
current = "1 mA"
resistance = "30 ohm"
rest = -44
full = 44
[circuit]
kind = "universal shunt"
ranges = ["1 A", "5 A", "10 A"]
range = "5 A"
swamp = "20 ohm"
built = ["5 mohm", "5 mohm", "40 mohm"]
[parts]
stock = ["3.3 ohm x12", "10 ohm x5"]
wire = ["manganin 0.5 mm"]
series = "E24"
tolerance = 1
drift = 0.05
voltage = "250 V"
[[scale]]
unit = "A"
from = 0
to = 5
radius = 220
[[scale]]
unit = "A"
from = 0
to = 100
circuit = { kind = "shunt", leads = "0.1 ohm", rated = "100 A/75 mV" }
radius = 196
[[scale]]
unit = "A"
from = 0
to = 200
circuit = { kind = "current transformer", ratio = "200/5" }
radius = 172
[[scale]]
unit = "degC"
from = 0
to = 1000
law = { kind = "thermocouple", type = "K", reference = "20 degC" }
circuit = { kind = "multiplier", line = "2 ohm" }
radius = 148
[[scale]]
unit = "V"
from = 0
to = 10
circuit = { kind = "rectifier", rectifier = "half bridge", diode = "ideal", legs = "2 kohm" }
radius = 124
[[scale]]
unit = "ohm"
from = 0
to = inf
circuit = { kind = "series ohmmeter", half = "500 ohm", battery = "1.5 V", times = [1, 2] }
radius = 100
[[scale]]
unit = "degC"
from = 0
to = 100
law = "pt100"
circuit = { kind = "bridge", supply = "600 mV", arms = ["100 ohm", "100 ohm", "100 ohm"] }
radius = 76
[[scale]]
unit = "degC"
from = 0
to = 100
law = { kind = "thermistor", r25 = "10 kohm", beta = 3950 }
circuit = "direct"
radius = 52
[[scale]]
unit = "pH"
from = 0
to = 14
law = { kind = "nernst", temperature = "25 degC" }
circuit = { kind = "direct", rest = 0 }
radius = 28
[plate]
size = [500, 280]
pivot = [250, 20]
"""
"""A good dial file with most kinds of circuit, the laws of all sensors and a maker's drawer."""

_TAPS = WIRED[WIRED.index("ranges") : WIRED.index("[parts]")]

_CIRCUIT = (
    # circuits: shunts
    ("ranges of a shunt by another name", 'ranges = ["1 A", "5 A", "10 A"]',
     'ranges_ = ["1 A", "5 A", "10 A"]', "9:1", "circuit.ranges_", "did you mean ranges?"),
    ("ranges not in a list", 'ranges = ["1 A", "5 A", "10 A"]', 'ranges = "10 A"', "9:1", "circuit.ranges",
     'not "10 A"; write for example ["1 A", "5 A", "10 A"]'),
    ("ranges out of order", 'ranges = ["1 A", "5 A", "10 A"]', 'ranges = ["1 A", "10 A", "5 A"]', "9:26",
     "circuit.ranges[3]", "the ranges 10 A and 5 A are out of order; list each range once"),
    ("ranges with one twice", 'ranges = ["1 A", "5 A", "10 A"]', 'ranges = ["1 A", "5 A", "5.0 A"]', "9:25",
     "circuit.ranges[3]", "list each range once"),
    ("smallest range the movement's own", _TAPS, 'ranges = ["1 mA", "5 A", "10 A"]\n', "9:1",
     "circuit.ranges",
     "the smallest range of 1 mA is not above the movement's own 1 mA; take larger ranges"),
    ("range of none of the taps", 'range = "5 A"', 'range = "2 A"', "10:1", "circuit.range",
     "2 A is not one of the ranges 1 A, 5 A, 10 A; give range, one of them"),
    ("range a bare number", 'range = "5 A"', "range = 5", "10:1", "circuit.range",
     "a current needs its unit, 5 has none"),
    ("range left out and no tap for the end", 'ranges = ["1 A", "5 A", "10 A"]\nrange = "5 A"\n',
     'ranges = ["1 A", "4 A", "10 A"]\n', "7:2", "circuit.range",
     "5 A is not one of the ranges 1 A, 4 A, 10 A; give range"),
    ("sections too few", 'built = ["5 mohm", "5 mohm", "40 mohm"]', 'built = ["5 mohm", "45 mohm"]', "12:1",
     "circuit.built",
     "2 sections as built, for 3 ranges; give one for each, from the tap of the largest range"),
    ("section of nothing", 'built = ["5 mohm", "5 mohm", "40 mohm"]',
     'built = ["5 mohm", "0 ohm", "40 mohm"]', "12:20", "circuit.built[2]",
     "a section of 0 Ω makes two ranges one; measure it again"),
    ("swamping of less than nothing", 'swamp = "20 ohm"', 'swamp = "-20 ohm"', "11:1", "circuit.swamp",
     '"-20 ohm" is below 0'),
    ("swamping a bare number", 'swamp = "20 ohm"', "swamp = 20", "11:1", "circuit.swamp",
     'write for example "20 ohm"'),
    ("sense leads of a universal shunt", 'swamp = "20 ohm"', 'leads = "0.1 ohm"', "11:1", "circuit.leads",
     'it goes with kind = "shunt" or "current transformer"'),
    ("ranges of a plain shunt", 'kind = "universal shunt"\nranges = ["1 A", "5 A", "10 A"]\n',
     'kind = "shunt"\nranges = ["1 A", "5 A", "10 A"]\n', "9:1", "circuit.ranges",
     'it goes with kind = "universal shunt"', 1),
    ("kind half written", '"universal shunt"', '"universal"', "8:1", "circuit.kind",
     'did you mean "universal shunt"?'),
    ("kind in capitals", '"universal shunt"', '"Universal Shunt"', "8:1", "circuit.kind",
     'did you mean "universal shunt"?'),
    ("key of two circuits", 'rated = "100 A/75 mV"', 'rated = "100 A/75 mV", ratio = "200/5"', "29:71",
     "scale[2].circuit.ratio", 'it goes with kind = "current transformer"'),
    ("rating the wrong way round", 'rated = "100 A/75 mV"', 'rated = "75 mV/100 A"', "29:48",
     "scale[2].circuit.rated", '"75 mV" is not in A'),
    ("rating without units", 'rated = "100 A/75 mV"', 'rated = "100/75"', "29:48", "scale[2].circuit.rated",
     '"100" has no unit; write for example "100 A/75 mV"'),
    ("rating by its current alone", 'rated = "100 A/75 mV"', 'rated = "100 A"', "29:48",
     "scale[2].circuit.rated", "\"100 A\" is not a shunt's rating; write for example \"100 A/75 mV\""),
    ("rating with a comma between", 'rated = "100 A/75 mV"', 'rated = "100 A, 75 mV"', "29:48",
     "scale[2].circuit.rated", 'write for example "100 A/75 mV"'),
    ("rating of no drop", 'rated = "100 A/75 mV"', 'rated = "100 A/0 mV"', "29:48", "scale[2].circuit.rated",
     '"0 mV" is not above 0; write for example "100 A/75 mV"'),
    ("bought shunt with too little drop", 'rated = "100 A/75 mV"', 'rated = "100 A/25 mV"', "29:48",
     "scale[2].circuit.rated",
     "this shunt drops 25 mV, less than the 30.1 mV that coil and leads need; take a shunt with more"),
    ("leads a bare number", 'leads = "0.1 ohm"', "leads = 0.1", "29:29", "scale[2].circuit.leads",
     'write for example "0.1 ohm"'),
    ("leads in metres", 'leads = "0.1 ohm"', 'leads = "2 m"', "29:29", "scale[2].circuit.leads",
     '"2 m" is not in Ω'),
    ("shunt below the movement", 'rated = "100 A/75 mV"', 'range = "0.5 mA"', "29:48",
     "scale[2].circuit.range",
     "a range of 500 µA is below the movement's own 1 mA; a shunt only widens the range"),
    ("range beyond anything", 'rated = "100 A/75 mV"', 'range = "1e30 A"', "29:48", "scale[2].circuit.range",
     "is beyond anything a meter has"),
    ("four-wire reading of other keys", 'rated = "100 A/75 mV"',
     'built = { voltage = "75 mV", current = "100 A" }', "29:58", "scale[2].circuit.built.voltage",
     'not a key of a four-wire reading; write built = "1.885 mohm", or {'),
    ("four-wire reading without amperes", 'rated = "100 A/75 mV"', 'built = { volts = "75 mV" }', "29:48",
     "scale[2].circuit.built", "a four-wire reading has volts and amps, amps is missing; write"),
    ("four-wire reading crossed", 'rated = "100 A/75 mV"', 'built = { volts = "100 A", amps = "75 mV" }',
     "29:58", "scale[2].circuit.built.volts", '"100 A" is not in V'),
    ("four-wire reading of no current", 'rated = "100 A/75 mV"', 'built = { volts = "75 mV", amps = "0 A" }',
     "29:75", "scale[2].circuit.built.amps", '"0 A" is not above 0'),
    ("built shunt of a thousand times its ohms", 'rated = "100 A/75 mV"', 'built = "1 ohm"', "29:48",
     "scale[2].circuit.built", "times the designed 301 µΩ"),
    ("built shunt of nothing", 'rated = "100 A/75 mV"', 'built = "0 ohm"', "29:48", "scale[2].circuit.built",
     '"0 ohm" is not above 0'),
    ("built shunt a bare number", 'rated = "100 A/75 mV"', "built = 0.00075", "29:48",
     "scale[2].circuit.built", "a resistance needs its unit, 0.00075 has none"),
    # circuits: current transformers and multipliers
    ("ratio a number", 'ratio = "200/5"', "ratio = 40", "35:43", "scale[3].circuit.ratio",
     'write primary over secondary amperes, for example "200/5"'),
    ("ratio with a colon", 'ratio = "200/5"', 'ratio = "200:5"', "35:43", "scale[3].circuit.ratio",
     "\"200:5\" is not a transformer's ratio"),
    ("ratio with nothing behind it", 'ratio = "200/5"', 'ratio = "200/0"', "35:43", "scale[3].circuit.ratio",
     "\"200/0\" is not a transformer's ratio"),
    ("ratio of less than nothing", 'ratio = "200/5"', 'ratio = "-200/5"', "35:43", "scale[3].circuit.ratio",
     "\"-200/5\" is not a transformer's ratio"),
    ("ratio left out", ', ratio = "200/5"', "", "35:1", "scale[3].circuit.ratio", "missing; add ratio = "),
    ("transformer with a rating", 'ratio = "200/5"', 'ratio = "200/5", rated = "5 A/60 mV"', "35:60",
     "scale[3].circuit.rated", 'it goes with kind = "shunt"'),
    ("secondary below the movement", 'ratio = "200/5"', 'ratio = "200/5", range = "20 mA"', "35:60",
     "scale[3].circuit.range",
     "at 20 mA the secondary gives 500 µA, below the movement's own current; take a range of 40 mA"),
    ("line of less than nothing", 'line = "2 ohm"', 'line = "-2 ohm"', "42:34", "scale[4].circuit.line",
     '"-2 ohm" is below 0'),
    ("suppressed by a current", 'line = "2 ohm"', 'suppress = "5 mA"', "42:34", "scale[4].circuit.suppress",
     '"5 mA" is not in V'),
    ("chain of one range", 'line = "2 ohm"', "chain = true", "42:34", "scale[4].circuit.chain",
     "a chain has several ranges; give ranges = ["),
    ("chain in quotes", 'line = "2 ohm"', 'ranges = ["40 mV", "1 V"], chain = "yes"', "42:61",
     "scale[4].circuit.chain", 'this is true or false, not "yes"'),
    ("resistors too few", 'line = "2 ohm"', 'ranges = ["40 mV", "1 V"], range = "40 mV", built = "10 ohm"',
     "42:78", "scale[4].circuit.built", "for 2 ranges; give one for each range, the smallest range first"),
    ("line that the couple cannot feed", 'line = "2 ohm"', 'line = "20 ohm"', "42:34",
     "scale[4].circuit.line", "20 mV for the line, 30 mV for the coil; with this movement line may have "),
    ("ranges below the movement", 'line = "2 ohm"', 'ranges = ["20 mV", "1 V"], range = "1 V"', "42:44",
     "scale[4].circuit.ranges[1]", "a range of 20 mV has too little: it takes 30 mV for the coil; take a"),
    ("suppressed up to the range", 'line = "2 ohm"', 'range = "50 mV", suppress = "50 mV"', "42:51",
     "scale[4].circuit.suppress", "which leaves nothing of a range of 50 mV; take a smaller suppress"),
    ("leads of a multiplier", 'line = "2 ohm"', 'leads = "2 ohm"', "42:34", "scale[4].circuit.leads",
     'it goes with kind = "shunt"'),
    # circuits: rectifiers
    ("connection of another name", 'rectifier = "half bridge", diode = "ideal", legs = "2 kohm"',
     'rectifier = "full wave"', "48:33", "scale[5].circuit.rectifier",
     '"full wave" is not known here; write "bridge" or "half bridge" or "half wave"'),
    ("half bridge without legs", ', legs = "2 kohm"', "", "48:1", "scale[5].circuit.legs",
     'a half bridge has two equal resistors in place of two diodes; add legs = "2 kohm"'),
    ("legs of nothing", ', legs = "2 kohm"', ', legs = "0 ohm"', "48:77", "scale[5].circuit.legs",
     '"0 ohm" is not above 0'),
    ("legs one by one", ', legs = "2 kohm"', ', legs = ["2 kohm", "2 kohm"]', "48:77",
     "scale[5].circuit.legs", "a resistance is text with its unit, not ["),
    ("legs of a bridge", 'rectifier = "half bridge"', 'rectifier = "bridge"', "48:72",
     "scale[5].circuit.legs", 'a bridge has no legs; leave them out, or write rectifier = "half bridge"'),
    ("diode a number", 'diode = "ideal"', "diode = 0.7", "48:60", "scale[5].circuit.diode",
     "a diode is a name or a table, not 0.7; write for example diode = { saturation"),
    ("diode a voltage", 'diode = "ideal"', 'diode = "0.7 V"', "48:60", "scale[5].circuit.diode",
     'or { drop = "0.7 V" }, or one of "silicon", "germanium", "schottky", "copper oxide", "ideal"'),
    ("diode in capitals", 'diode = "ideal"', 'diode = "Silicon"', "48:60", "scale[5].circuit.diode",
     '"Silicon" is not a diode known here; did you mean "silicon"?'),
    ("diode without ideality", 'diode = "ideal"', 'diode = { saturation = "2.5 nA" }', "48:60",
     "scale[5].circuit.diode", "this diode has no ideality; "),
    ("diode with a key misspelt", 'diode = "ideal"',
     'diode = { saturation = "2.5 nA", ideality = 1.75, resistence = "1 ohm" }', "48:60",
     "scale[5].circuit.diode", "resistence is not a key of such a diode; "),
    ("diode of two sorts", 'diode = "ideal"', 'diode = { drop = "0.7 V", ideality = 1.75 }', "48:60",
     "scale[5].circuit.diode", "ideality is not a key of such a diode; "),
    ("diode that drops a bare number", 'diode = "ideal"', "diode = { drop = 0.7 }", "48:60",
     "scale[5].circuit.diode", "a voltage needs its unit, 0.7 has none"),
    ("diode of no saturation", 'diode = "ideal"', 'diode = { saturation = "0 A", ideality = 1.75 }', "48:60",
     "scale[5].circuit.diode", '"0 A" is not above 0'),
    ("diode of ideality in per cent", 'diode = "ideal"', 'diode = { saturation = "2.5 nA", ideality = 175 }',
     "48:60", "scale[5].circuit.diode", "ideality of 175 is out of bounds; a junction has 1 to 2"),
    ("range eaten by the diodes", 'rectifier = "half bridge", diode = "ideal", legs = "2 kohm"',
     'range = "1 V", diode = { drop = "0.7 V" }', "48:33", "scale[5].circuit.range",
     "even without a multiplier, diodes and coil take so much; take a range of "),
    ("coil shunt of nothing", ', legs = "2 kohm"', ', legs = "2 kohm", coil_shunt = "0 ohm"', "48:94",
     "scale[5].circuit.coil_shunt", '"0 ohm" is not above 0'),
    ("coil shunt in amperes", ', legs = "2 kohm"', ', legs = "2 kohm", coil_shunt = "1 mA"', "48:94",
     "scale[5].circuit.coil_shunt", '"1 mA" is not in Ω'),
    ("alternating volts below nothing", "from = 0\nto = 10\n", "from = -10\nto = 10\n", "46:1",
     "scale[5].from", "a rectifier shows nothing below 0 V"),
    ("swamping of a rectifier", ', legs = "2 kohm"', ', legs = "2 kohm", swamp = "5 ohm"', "48:94",
     "scale[5].circuit.swamp", "not a key here; it goes with kind = "),
    # circuits: ohmmeters and bridges
    ("resistance below nothing", "from = 0\nto = inf", "from = -5\nto = inf", "52:1", "scale[6].from",
     "a series ohmmeter shows nothing below 0 Ω"),
    ("half left out", 'half = "500 ohm", ', "", "54:1", "scale[6].circuit.half", "missing; add half = "),
    ("half of nothing", 'half = "500 ohm"', 'half = "0 ohm"', "54:39", "scale[6].circuit.half",
     '"0 ohm" is not above 0'),
    ("half a bare number", 'half = "500 ohm"', "half = 500", "54:39", "scale[6].circuit.half",
     'write for example "500 ohm"'),
    ("half beyond the battery", 'half = "500 ohm"', 'half = "2 kohm"', "54:39", "scale[6].circuit.half",
     "1.5 V drives full deflection through at most 1.5 kΩ, not 4 kΩ; take a smaller half"),
    ("battery in amperes", 'battery = "1.5 V"', 'battery = "1.5 A"', "54:57", "scale[6].circuit.battery",
     '"1.5 A" is not in V'),
    ("battery the wrong way round", 'battery = "1.5 V"', 'battery = "-1.5 V"', "54:57",
     "scale[6].circuit.battery", '"-1.5 V" is not above 0'),
    ("worn above new", "times = [1, 2]", 'worn = "1.6 V"', "54:76", "scale[6].circuit.worn",
     "a worn cell of 1.6 V is not below the new one's 1.5 V; "),
    ("worn beyond the adjuster", "times = [1, 2]", 'worn = "0.5 V"', "54:76", "scale[6].circuit.worn",
     "at 500 mV the zero can no longer be set; change the cell at "),
    ("worn without a battery", 'half = "500 ohm", battery = "1.5 V", times = [1, 2]',
     'half = "500 ohm", worn = "1.2 V"', "54:57", "scale[6].circuit.worn",
     'worn says how far the battery falls; add battery = "1.5 V"'),
    ("zero by its ohms", "times = [1, 2]", 'zero = "5 kohm"', "54:76", "scale[6].circuit.zero",
     '"5 kohm" is not known here; write "across" or "series"'),
    ("times nothing", "times = [1, 2]", "times = 0", "54:76", "scale[6].circuit.times",
     "times of 0 is out of bounds; write a number from 0.001 to 1000000"),
    ("times in quotes", "times = [1, 2]", 'times = ["x1", "x10"]', "54:85", "scale[6].circuit.times[1]",
     'times is a number, not "x1"', 1),
    ("times one twice", "times = [1, 2]", "times = [1, 1]", "54:76", "scale[6].circuit.times",
     "a range is there twice; list each once"),
    ("times of no end", "times = [1, 2]", "times = [1, inf]", "54:88", "scale[6].circuit.times[2]",
     "times must be finite, not inf"),
    ("times beyond the battery", "times = [1, 2]", "times = [1, 10]", "54:76", "scale[6].circuit.times",
     "not the 5 kΩ of ×10; leave that range out or take a battery of 5 V or more"),
    ("built ohmmeter", "times = [1, 2]", 'built = "500 ohm"', "54:76", "scale[6].circuit.built",
     "not a key here; it goes with kind = "),
    ("arms of two", 'arms = ["100 ohm", "100 ohm", "100 ohm"]', 'arms = ["100 ohm", "100 ohm"]', "61:49",
     "scale[7].circuit.arms", '2 of them; give 3, such as ["100 ohm", "1 kohm", "1 kohm"], R1 above'),
    ("bridge without a supply", 'supply = "600 mV", ', "", "61:1", "scale[7].circuit.supply",
     "missing; add supply = "),
    ("bridge on nothing", 'supply = "600 mV"', 'supply = "0 V"', "61:30", "scale[7].circuit.supply",
     'a bridge on 0 V does not move whatever the sensor does; write supply = "1.5 V"'),
    ("bridge with a range", 'arms = ["100 ohm", "100 ohm", "100 ohm"]',
     'arms = ["100 ohm", "100 ohm", "100 ohm"], range = "1 V"', "61:91", "scale[7].circuit.range",
     "not a key here; it goes with kind = "),
    # laws of sensors
    ("couple left out", 'type = "K", reference = "20 degC"', 'reference = "20 degC"', "41:1",
     "scale[4].law.type", "missing; add type = "),
    ("couple of no such letter", 'type = "K", reference = "20 degC"', 'type = "Z"', "41:32",
     "scale[4].law.type", '"Z" is not known here; write "B" or "E"'),
    ("couple of a small letter", 'type = "K", reference = "20 degC"', 'type = "k"', "41:32",
     "scale[4].law.type", '"k" is not known here'),
    ("couple with a key cut short", 'type = "K", reference = "20 degC"', 'type = "K", ref = "20 degC"',
     "41:44", "scale[4].law.ref", "did you mean reference?"),
    ("reference a bare number", 'type = "K", reference = "20 degC"', 'type = "K", reference = 20', "41:44",
     "scale[4].law.reference", 'a temperature needs its unit, 20 has none; write for example "20 degC"'),
    ("reference in coulombs", 'type = "K", reference = "20 degC"', 'type = "K", reference = "20 C"', "41:44",
     "scale[4].law.reference", 'did you mean "20 degC"?'),
    ("reference in volts", 'type = "K", reference = "20 degC"', 'type = "K", reference = "20 V"', "41:44",
     "scale[4].law.reference", '"20 V" is not in °C, °F or K'),
    ("reference beyond the couple", 'type = "K", reference = "20 degC"',
     'type = "K", reference = "2000 degC"', "41:44", "scale[4].law.reference",
     "a reference junction at 2000 °C is outside type K, -270 to 1372 °C; "),
    ("reference below absolute zero", 'type = "K", reference = "20 degC"',
     'type = "K", reference = "-300 degC"', "41:44", "scale[4].law.reference", "is not above absolute zero"),
    ("couple beyond its range", "to = 1000", "to = 1400", "40:1", "scale[4].to",
     "a type K thermocouple shows -270 to 1372 °C, and the scale ends at 1400; "),
    ("couple whose voltage turns", 'type = "K", reference = "20 degC"', 'type = "B"', "39:1",
     "scale[4].from", "whose EMF turns near 21 °C, shows 50 to 1820 °C, and the scale begins at 0; "),
    ("temperatures in farads", 'unit = "degC"\nfrom = 0\nto = 1000', 'unit = "F"\nfrom = 0\nto = 1000',
     "38:1", "scale[4].unit", 'not in "F"; write unit = "degF"'),
    ("temperatures in coulombs", 'unit = "degC"\nfrom = 0\nto = 1000', 'unit = "C"\nfrom = 0\nto = 1000',
     "38:1", "scale[4].unit", 'not in "C"; write unit = "degC"'),
    ("temperatures of no unit", 'unit = "degC"\nfrom = 0\nto = 1000', 'unit = ""\nfrom = 0\nto = 1000',
     "38:1", "scale[4].unit", 'not without a unit; write unit = "degC"'),
    ("Pt100 of another resistance", '"pt100"', '"pt1000"', "60:1", "scale[7].law.kind",
     '"pt1000" is not a kind of law; did you mean "pt100"?'),
    ("Pt100 under a multiplier",
     'kind = "bridge", supply = "600 mV", arms = ["100 ohm", "100 ohm", "100 ohm"]', 'kind = "multiplier"',
     "60:1", "scale[7].law",
     "the multiplier takes a voltage in V, but the scale's signal is a resistance in Ω; change"),
    ("Pt100 too cold", 'from = 0\nto = 100\nlaw = "pt100"', 'from = -250\nto = 100\nlaw = "pt100"', "58:1",
     "scale[7].from", "a Pt100 shows -200 to 850 °C, and the scale begins at -250; "),
    ("thermistor without beta", 'r25 = "10 kohm", beta = 3950', 'r25 = "10 kohm"', "67:30",
     "scale[8].law.r25", "no law follows from r25 without beta; add beta = 3950"),
    ("thermistor of nothing", ', r25 = "10 kohm", beta = 3950', "", "67:1", "scale[8].law",
     "give r25 and beta, or a, b and c, or three points"),
    ("thermistor of two laws", 'r25 = "10 kohm", beta = 3950',
     'r25 = "10 kohm", beta = 3950, a = 1e-3, b = 2e-4, c = 8e-8', "67:60", "scale[8].law.a",
     "r25, beta, a, b and c are figures of 2 laws; keep r25 and beta, or a, b and c"),
    ("beta with its unit", 'r25 = "10 kohm", beta = 3950', 'r25 = "10 kohm", beta = "3950 K"', "67:47",
     "scale[8].law.beta", 'beta in kelvin is a number, not "3950 K"'),
    ("beta of less than nothing", 'r25 = "10 kohm", beta = 3950', 'r25 = "10 kohm", beta = -3950', "67:47",
     "scale[8].law.beta", "beta in kelvin of -3950 is out of bounds"),
    ("coefficients without the third", 'r25 = "10 kohm", beta = 3950', "a = 1.129e-3, b = 2.341e-4", "67:30",
     "scale[8].law.a", "no law follows from a and b without c; add c = "),
    ("coefficients that rise", 'r25 = "10 kohm", beta = 3950', "a = 1.129e-3, b = -2.341e-4, c = 8.767e-8",
     "67:30", "scale[8].law.a", "check signs and powers of ten"),
    ("thermistor through two points", 'r25 = "10 kohm", beta = 3950',
     'points = [["0 degC", "32.65 kohm"], ["25 degC", "10 kohm"]]', "67:30", "scale[8].law.points",
     "a thermistor's law goes through three points, not 2; give three"),
    ("thermistor that rises", 'r25 = "10 kohm", beta = 3950',
     'points = [["0 degC", "3 kohm"], ["25 degC", "10 kohm"], ["50 degC", "36 kohm"]]', "67:30",
     "scale[8].law.points", "the resistance does not fall from point to point as it warms; "),
    ("thermistor through bare degrees", 'r25 = "10 kohm", beta = 3950',
     'points = [[0, "32.65 kohm"], ["25 degC", "10 kohm"], ["50 degC", "3.6 kohm"]]', "67:40",
     "scale[8].law.points[1]", "a temperature needs its unit, 0 has none"),
    ("buffer at a bare temperature", 'temperature = "25 degC"', "temperature = 25", "74:26",
     "scale[9].law.temperature", "a temperature needs its unit, 25 has none"),
    ("buffer below absolute zero", 'temperature = "25 degC"', 'temperature = "-300 degC"', "74:26",
     "scale[9].law.temperature", "is not above absolute zero"),
    ("isopotential in quotes", 'temperature = "25 degC"', 'temperature = "25 degC", isopotential = "7"',
     "74:51", "scale[9].law.isopotential", 'isopotential is a number, not "7"'),
    ("slope of its own", 'temperature = "25 degC"', 'temperature = "25 degC", slope = 59', "74:51",
     "scale[9].law.slope", "not a key here; the keys are temperature, isopotential"),
    ("acid and alkali on one side", 'circuit = { kind = "direct", rest = 0 }', 'circuit = "direct"', "72:1",
     "scale[9].from", "0 pH would stand at -132 degrees, beyond the stops"),
    # the drawer
    ("drawer twice", "[parts]", "[[parts]]", "13:3", "parts", "this is a table of keys, not [a table]"),
    ("drawer by another name", "[parts]", "[part]", "13:2", "part", "did you mean parts?"),
    ("stock not in a list", 'stock = ["3.3 ohm x12", "10 ohm x5"]', 'stock = "10 ohm x5"', "14:1",
     "parts.stock", 'write for example ["3.3 ohm x12", "10 ohm x5"]'),
    ("stock of bare ohms", 'stock = ["3.3 ohm x12", "10 ohm x5"]', 'stock = ["3.3 ohm x12", "10"]', "14:25",
     "parts.stock[2]", '"10" has no unit'),
    ("stock of a number", 'stock = ["3.3 ohm x12", "10 ohm x5"]', "stock = [10]", "14:10", "parts.stock[1]",
     "a resistance needs its unit, 10 has none"),
    ("stock of no pieces", 'stock = ["3.3 ohm x12", "10 ohm x5"]', 'stock = ["10 ohm x0"]', "14:10",
     "parts.stock[1]",
     'has no count of pieces from 1 to 999999 after its x; write for example "3.3 ohm x12"'),
    ("stock with the count first", 'stock = ["3.3 ohm x12", "10 ohm x5"]', 'stock = ["5x 10 ohm"]', "14:10",
     "parts.stock[1]", '"5x 10 ohm" has no count of pieces'),
    ("stock with a comma", 'stock = ["3.3 ohm x12", "10 ohm x5"]', 'stock = ["3,3 ohm x12"]', "14:10",
     "parts.stock[1]", 'the decimal sign is a point: write "3.3 ohm"'),
    ("stock of nothing", 'stock = ["3.3 ohm x12", "10 ohm x5"]', "stock = []", "14:1", "parts.stock",
     "0 of them; give 1 to 200, such as ["),
    ("stock misspelt", 'stock = ["3.3 ohm x12", "10 ohm x5"]', 'stok = ["3.3 ohm x12", "10 ohm x5"]', "14:1",
     "parts.stok", "did you mean stock?"),
    ("wire without a size", 'wire = ["manganin 0.5 mm"]', 'wire = ["manganin"]', "15:9", "parts.wire[1]",
     '"manganin" has no size with its unit; write for example "manganin 0.5 mm"'),
    ("wire of a size alone", 'wire = ["manganin 0.5 mm"]', 'wire = ["0.5 mm"]', "15:9", "parts.wire[1]",
     '"0.5 mm" names no metal; write one of manganin'),
    ("wire of brass", 'wire = ["manganin 0.5 mm"]', 'wire = ["brass 0.5 mm"]', "15:9", "parts.wire[1]",
     "the metals are manganin, constantan, nichrome or copper"),
    ("wire of a metal misspelt", 'wire = ["manganin 0.5 mm"]', 'wire = ["nichrom 0.5 mm"]', "15:9",
     "parts.wire[1]", "did you mean nichrome?"),
    ("wire of no such gauge", 'wire = ["manganin 0.5 mm"]', 'wire = ["manganin AWG 99"]', "15:9",
     "parts.wire[1]", 'AWG has no gauge 99; write "AWG 24", from 4/0 to 50'),
    ("wire with a comma", 'wire = ["manganin 0.5 mm"]', 'wire = ["manganin 0,5 mm"]', "15:9",
     "parts.wire[1]", "has a comma in a number; the decimal sign is a point"),
    ("series of no such name", 'series = "E24"', 'series = "E25"', "16:1", "parts.series",
     '"E25" is not known here; write "E6" or "E12" or "E24"'),
    ("series by its number", 'series = "E24"', "series = 24", "16:1", "parts.series", "24 is not known here"),
    ("tolerance with its sign", "tolerance = 1", 'tolerance = "5 %"', "17:1", "parts.tolerance",
     'a tolerance is a number, not "5 %"'),
    ("tolerance of nothing", "tolerance = 1", "tolerance = 0", "17:1", "parts.tolerance",
     "a tolerance of 0 is out of bounds"),
    ("margin below one", "tolerance = 1", "margin = 0.5", "17:1", "parts.margin",
     "a margin of 0.5 is out of bounds; write a number from 1 to 100"),
    ("overload in per cent", "tolerance = 1", "overload = 120", "17:1", "parts.overload",
     "an overload of 120 is out of bounds"),
    ("drift with its unit", "drift = 0.05", 'drift = "0.05 %/K"', "18:1", "parts.drift",
     'a drift is a number, not "0.05 %/K"'),
    ("drift of nothing", "drift = 0.05", "drift = 0", "18:1", "parts.drift", "a drift of 0 is out of bounds"),
    ("voltage a bare number", 'voltage = "250 V"', "voltage = 250", "19:1", "parts.voltage",
     'write for example "250 V"'),
    ("rating of the drawer", 'voltage = "250 V"', 'rating = "0.25 W"', "19:1", "parts.rating",
     "not a key here; the keys are stock, wire"),
)  # fmt: skip

CIRCUIT = [Bad(*row[:6], text=WIRED, more=sum(row[6:])) for row in _CIRCUIT]
SENSE += CIRCUIT
