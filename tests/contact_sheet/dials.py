"""The dials of the contact sheet: laws, sweeps, sizes, plates and looks, each made to be a good face."""

from __future__ import annotations

from typing import NamedTuple


class Dial(NamedTuple):
    """A dial file by name."""

    name: str
    text: str


def dial(
    name: str,
    *,
    scales: list[str],
    rest: float = -45,
    full: float = 45,
    movement: str = "",
    circuit: str = "",
    plate: str = "size = [84, 64]\npivot = [42, 11]",
    rest_of_file: str = "",
) -> Dial:
    """Return a dial of some scales; keys that are left out are those of a 90-degree panel meter."""
    parts = [
        f"dialgen = 1\n[movement]\nrest = {rest}\nfull = {full}\n{movement}",
        circuit and f"[circuit]\n{circuit}",
        *(f"[[scale]]\n{scale}" for scale in scales),
        f"[plate]\n{plate}",
        rest_of_file,
    ]
    return Dial(name, "\n".join(part for part in parts if part) + "\n")


def scale(unit: str, start: float, end: float | str, line: float | str = 44.0, *keys: str) -> str:
    """Return a scale's keys; a number for the line is its radius."""
    where = f"radius = {line}" if isinstance(line, float) else line
    return "\n".join([f'unit = "{unit}"', f"from = {start}", f"to = {end}", where, *keys])


def look(name: str, *keys: str) -> str:
    """Return the table of a look."""
    return "\n".join(["[look]", f'style = "{name}"', *keys])


ROUND = "diameter = 90\npivot = [45, 45]"
INWARD = 'marks = "inward"\nnumerals = "inside"'
COIL = 'current = "1 mA"\nresistance = "75 ohm"'
SCHOTTKY = '{ saturation = "200 nA", ideality = 1.05, resistance = "5 ohm" }'
SILICON = '{ saturation = "2.5 nA", ideality = 1.75, resistance = "0.6 ohm" }'

RANGES = [
    ("A", 0, 1),
    ("V", 0, 3),
    ("A", 0, 15),
    ("mA", 0, 40),
    ("V", 0, 250),
    ("rpm", 0, 3000),
    ("kW", 0, 7.5),
]
LOOK_NAMES = ["plain", "bench", "hall", "night", "parchment", "graver"]

DIALS = [
    *(
        dial(f"{unit} 0 to {end}, {style}", scales=[scale(unit, start, end)], rest_of_file=look(style))
        for (unit, start, end), style in zip(RANGES, [*LOOK_NAMES, "plain"], strict=True)
    ),
    *(
        dial(
            f"{sweep} degrees, {style}",
            rest=-sweep / 2,
            full=sweep / 2,
            scales=[scale("V", 0, 300, 36.0, INWARD)],
            plate=ROUND,
            rest_of_file=look(style),
        )
        for sweep, style in [
            (120, "bench"),
            (180, "hall"),
            (240, "night"),
            (270, "parchment"),
            (300, "graver"),
        ]
    ),
    *(
        dial(
            f"centre zero, {style}",
            scales=[scale("A", -30, 30, 44.0, 'sign = "always"')],
            movement=COIL,
            circuit='kind = "shunt"\nrange = "30 A"',
            rest=0,
            full=45,
            rest_of_file=look(style),
        )
        for style in ("plain", "hall", "night")
    ),
    dial(
        "edgewise, level",
        rest=-18,
        full=18,
        scales=[scale("bar", 0, 16, "line = [[-30, 90], [30, 90]]", "square = true")],
        plate="size = [84, 22]\npivot = [42, -82]",
    ),
    dial(
        "edgewise, upright, bench",
        rest=108,
        full=72,
        scales=[scale("m", 0, 6, "line = [[90, -30], [90, 30]]", "square = true")],
        plate="size = [24, 84]\npivot = [-80, 42]",
        rest_of_file=look("bench"),
    ),
    dial(
        "curved edgewise, graver",
        rest=-25,
        full=25,
        scales=[scale("V", 0, 50, "line = [[-31, 70], [31, 70]]", "curve = 70")],
        plate="size = [84, 22]\npivot = [42, -62]",
        rest_of_file=look("graver"),
    ),
    dial(
        "corner, lower right",
        rest=-90,
        full=0,
        scales=[scale("A", 0, 60, 52.0)],
        plate="size = [72, 72]\npivot = [62, 10]",
    ),
    dial(
        "corner, lower left, hall",
        rest=0,
        full=90,
        scales=[scale("V", 0, 500, 52.0)],
        plate="size = [78, 76]\npivot = [10, 10]",
        rest_of_file=look("hall"),
    ),
    dial("right-hand zero", rest=45, full=-45, scales=[scale("A", 0, 25)]),
    dial(
        "60 degrees, large",
        rest=-30,
        full=30,
        scales=[scale("V", 0, 150, 90.0)],
        plate="size = [130, 96]\npivot = [65, -8]",
    ),
    dial("small, 20 mm", scales=[scale("V", 0, 15, 20.0)], plate="size = [42, 34]\npivot = [21, 6]"),
    dial(
        "large, 110 mm, night",
        scales=[scale("A", 0, 600, 110.0)],
        plate="size = [200, 150]\npivot = [100, 20]",
        rest_of_file=look("night"),
    ),
    dial(
        "arc off the pivot",
        rest=-40,
        full=40,
        scales=[scale("V", 0, 30, 60.0, "centre = [0, -16]")],
    ),
    dial("decibels", scales=[scale("dB", -20, 3, 44.0, 'law = "decibel"', 'sign = "always"')]),
    dial(
        "decibels over per cent",
        scales=[
            scale("dB", -20, 5, 44.0, 'law = "decibel"'),
            scale("%", 0, 100, 37.0, INWARD, 'circuit = { kind = "direct", full = 100 }'),
        ],
    ),
    dial(
        "ohms",
        movement=COIL,
        circuit='kind = "series ohmmeter"\nhalf = "1500 ohm"',
        rest=-45,
        full=45,
        scales=[scale("kohm", 0, "inf")],
    ),
    dial(
        "ohms to 15 k, folded",
        movement=COIL,
        circuit='kind = "series ohmmeter"\nhalf = "15 kohm"',
        scales=[scale("ohm", 0, "inf")],
    ),
    dial("watts, square law", scales=[scale("W", 0, 50, 44.0, 'law = { kind = "power", exponent = 2 }')]),
    dial("standing wave", scales=[scale("SWR", 1, 3, 44.0, 'law = "reflection"')]),
    dial("logarithmic", scales=[scale("counts/s", 1, 1000, 44.0, 'law = "logarithmic"')]),
    dial(
        "moving iron", movement='kind = "moving iron"\nresponse = { power = 1.8 }', scales=[scale("A", 0, 50)]
    ),
    dial(
        "two rows",
        scales=[scale("V", 0, 10, 42.0, "also = [{ times = 5 }]")],
        plate="size = [84, 68]\npivot = [42, 11]",
    ),
    dial(
        "three rows, bench",
        scales=[scale("V", 0, 6, 50.0, "also = [{ times = 5 }, { times = 25 }]")],
        plate="size = [110, 84]\npivot = [55, 12]",
        rest_of_file=look("bench"),
    ),
    dial(
        "one line, two sides",
        scales=[
            scale("psi", 0, 60, 42.0),
            scale("kPa", 0, 413.685, 42.0, INWARD, "numbered = [0, 100, 200, 300, 400]"),
        ],
        plate="size = [84, 66]\npivot = [42, 11]",
    ),
    dial(
        "zones",
        scales=[scale("°C", 0, 120)],
        rest_of_file=(
            '[[zone]]\nfrom = 0\nto = 40\ncolour = "blue"\n[[zone]]\nfrom = 70\nto = 95\ncolour = "green"\n'
            '[[zone]]\nfrom = 95\nto = 120\ncolour = "red"\n[[limit]]\nat = 110'
        ),
    ),
    dial(
        "hatched zones, graver",
        scales=[scale("bar", 0, 10)],
        rest_of_file=(
            '[[zone]]\nfrom = 6\nto = 8\ncolour = "black"\nhatch = true\n'
            '[[limit]]\nat = 8\nshape = "triangle"\ncolour = "black"\n' + look("graver")
        ),
    ),
    dial(
        "mirror, bench",
        scales=[scale("mV", 0, 150, 66.0)],
        plate="size = [126, 90]\npivot = [63, 14]\nmirror = { width = 4 }",
        rest_of_file=look("bench"),
    ),
    dial("class 2.5", scales=[scale("A", 0, 40, 44.0, "class = 2.5")]),
    dial(
        "class 0.5, bench",
        scales=[scale("A", 0, 1, 80.0, "class = 0.5")],
        plate="size = [150, 110]\npivot = [75, 18]",
        rest_of_file=look("bench"),
    ),
    dial("effective range", scales=[scale("A", 0, 40, 44.0, "effective = [8, 40]")]),
    dial(
        "read from 0.7 m",
        scales=[scale("A", 0, 40, 60.0)],
        plate="size = [120, 90]\npivot = [60, 12]",
        rest_of_file=look("plain", 'distance = "0.7 m"'),
    ),
    dial(
        "read from 2 m, night",
        rest=-60,
        full=60,
        scales=[scale("V", 0, 500, 95.0)],
        plate="size = [256, 176]\npivot = [128, 40]",
        rest_of_file=look("night", 'distance = "2 m"'),
    ),
    dial(
        "numerals across",
        scales=[scale("V", 0, 250)],
        rest_of_file=look("parchment", 'turn = "across"'),
    ),
    dial(
        "numerals along",
        rest=-120,
        full=120,
        scales=[scale("A", 0, 100, 36.0, INWARD)],
        plate=ROUND,
        rest_of_file=look("plain", 'turn = "along"'),
    ),
    dial(
        "title, symbols, maker",
        movement='kind = "moving coil"\n' + COIL,
        circuit='kind = "shunt"\nrange = "40 A"',
        scales=[scale("A", 0, 40)],
        rest_of_file=(
            '[dial]\ntitle = "BATTERY"\nmaker = "Ambleshaw Works"\n[symbols]\nshow = ["auto", "vertical"]'
        ),
    ),
    dial(
        "labels of words",
        scales=[
            scale(
                "", 0, 4, 44.0, 'numbered = [{ at = 0, label = "OFF" }, 1, 2, 3, { at = 4, label = "MAX" }]'
            )
        ],
    ),
    dial(
        "AC volts to 3",
        movement=COIL,
        scales=[scale("V", 0, 3, 44.0, f'circuit = {{ kind = "rectifier", diode = {SCHOTTKY} }}')],
        rest_of_file='[symbols]\nshow = ["auto"]',
    ),
    dial(
        "AC volts to 10, graver",
        movement=COIL,
        scales=[scale("V", 0, 10, 44.0, f'circuit = {{ kind = "rectifier", diode = {SILICON} }}')],
        rest_of_file='[symbols]\nshow = ["auto"]\n' + look("graver"),
    ),
    dial(
        "type K, hall",
        scales=[scale("degC", 0, 1200, 60.0, 'law = { kind = "thermocouple", type = "K" }')],
        plate="size = [116, 86]\npivot = [58, 13]",
        rest_of_file=look("hall"),
    ),
    dial(
        "type J in Fahrenheit, bench",
        scales=[
            scale(
                "degF",
                32,
                1400,
                60.0,
                'law = { kind = "thermocouple", type = "J" }',
                "divisions = { every = 20 }",
            )
        ],
        plate="size = [116, 86]\npivot = [58, 13]",
        rest_of_file=look("bench"),
    ),
    dial(
        "Pt100 in a bridge",
        movement='current = "100 uA"\nresistance = "239 ohm"',
        circuit='kind = "bridge"\nsupply = "2.5 V"\narms = ["2.7 kohm", "2.7 kohm", "100 ohm"]',
        scales=[scale("degC", 0, 150, 44.0, 'law = "pt100"')],
    ),
    dial(
        "thermistor in a bridge, parchment",
        movement='current = "50 uA"\nresistance = "2.7 kohm"',
        circuit='kind = "bridge"\nsupply = "-1.1 V"\narms = ["10 kohm", "10 kohm", "32.65 kohm"]',
        scales=[scale("degC", 0, 60, 44.0, 'law = { kind = "thermistor", r25 = "10 kohm", beta = 3892 }')],
        rest_of_file=look("parchment"),
    ),
    dial(
        "pH, 7 in the middle",
        rest=0,
        full=45,
        scales=[scale("pH", 0, 14, 44.0, 'law = "nernst"', 'circuit = { kind = "direct", full = 14 }')],
    ),
    dial(
        "ohms of three ranges, bench",
        movement='current = "50 uA"\nresistance = "1.8 kohm"',
        circuit='kind = "series ohmmeter"\nhalf = "200 ohm"\nbattery = "1.5 V"\ntimes = [1, 10, 100]',
        scales=[scale("ohm", 0, "inf", 60.0)],
        plate="size = [120, 86]\npivot = [60, 13]",
        rest_of_file=look("bench") + '\n[[text]]\nsay = "×1  ×10  ×100"\nheight = 2.4',
    ),
    dial(
        "signal strength, night",
        scales=[
            scale(
                "dB",
                -54,
                60,
                44.0,
                'law = { kind = "table", points = [[-54, 0], [-24, 0.28], [0, 0.5], [20, 0.68], [60, 1]] }',
                'numbered = [{ at = -48, label = "S1" }, { at = -24, label = "5" }, { at = 0, label = "9" }, '
                '{ at = 20, label = "+20" }, { at = 40, label = "+40" }, { at = 60, label = "+60" }]',
                "divisions = [{ to = 0, every = 6 }, { to = 60, every = 10 }]",
                "heavy = [0, 60]",
            )
        ],
        rest_of_file=look("night"),
    ),
    dial(
        "comma, thousands",
        scales=[scale("r/min", 0, 12000)],
        rest_of_file=look("plain", 'decimal = "comma"'),
    ),
]
