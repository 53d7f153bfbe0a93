"""Dial files and CSVs that are wrong in one way each, and what must be said of them."""

from __future__ import annotations

from dataclasses import dataclass, field

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
