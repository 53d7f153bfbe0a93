"""Single strokes for the signs that a dial needs and the stroke font lacks, or has badly.

A sign is the width it takes and its strokes, on a grid with the baseline at 0 and capitals 21
high, small letters 14; three units to either side are left clear.  Strokes are written as in SVG
with M, L and C, and ``O x y rx ry`` is an ellipse.
"""

from __future__ import annotations

from itertools import pairwise

from dialgen.drawing import PathStep

CAPITAL = 21.0
"""Height of a capital on the grid."""

CLEAR = 3.0
"""What a sign leaves clear to either side on the grid."""

Sign = tuple[float, str]

DOT = "0.9 0.9"
"""The radii of a dot: so small a ring that its stroke fills it."""

_RING = 0.5523  # 4/3 tan(90°/4): how far the control points of a quarter circle reach

SIGNS: dict[str, Sign] = {
    "0": (18, "M 9 21 C 12.6 21 15 17 15 10.5 C 15 4 12.6 0 9 0 C 5.4 0 3 4 3 10.5 C 3 17 5.4 21 9 21"),
    "1": (18, "M 5.2 16.6 L 10.4 21 L 10.4 0"),
    "2": (
        18,
        "M 3.4 15.4 C 3.4 18.8 5.7 21 9 21 C 12.3 21 14.6 18.9 14.6 15.7 C 14.6 13.4 13.6 11.6 11.6 9.4"
        " L 3 0 L 15 0",
    ),
    "3": (
        18,
        "M 4 21 L 14 21 L 8.6 13 C 12.5 13 15 10.4 15 6.6 C 15 2.6 12.5 0 8.8 0 C 5.7 0 3.6 1.6 3 4.4",
    ),
    "4": (18, "M 11.6 0 L 11.6 21 L 3 6.2 L 15 6.2"),
    "5": (
        18,
        "M 13.6 21 L 5 21 L 4 12 C 5.2 13.2 6.8 13.8 8.8 13.8 C 12.4 13.8 15 11 15 7 C 15 2.8 12.4 0 8.8 0"
        " C 5.7 0 3.6 1.6 3 4.4",
    ),
    "6": (
        18,
        "M 13.9 18 C 13.2 19.9 11.7 21 9.6 21 C 5.4 21 3 17 3 9.5 C 3 3.4 5.3 0 9.1 0 C 12.6 0 15 2.7 15 6.6"
        " C 15 10.5 12.6 13.1 9.2 13.1 C 6.1 13.1 3.6 10.8 3.1 7.4",
    ),
    "7": (18, "M 3 21 L 15 21 L 6.4 0"),
    "8": (
        18,
        "M 9 11.6 C 6 11.6 4 13.5 4 16.3 C 4 19.1 6 21 9 21 C 12 21 14 19.1 14 16.3 C 14 13.5 12 11.6 9 11.6"
        " C 5.4 11.6 3 9.3 3 5.9 C 3 2.3 5.4 0 9 0 C 12.6 0 15 2.3 15 5.9 C 15 9.3 12.6 11.6 9 11.6",
    ),
    "9": (
        18,
        "M 4.1 3 C 4.8 1.1 6.3 0 8.4 0 C 12.6 0 15 4 15 11.5 C 15 17.6 12.7 21 8.9 21 C 5.4 21 3 18.3 3 14.4"
        " C 3 10.5 5.4 7.9 8.8 7.9 C 11.9 7.9 14.4 10.2 14.9 13.6",
    ),
    ".": (8, f"O 4 0.9 {DOT}"),
    ",": (8, "M 4.9 1.4 L 3.1 -4"),
    ":": (8, f"O 4 0.9 {DOT} O 4 11 {DOT}"),
    ";": (8, f"M 4.9 1.4 L 3.1 -4 O 4.4 11 {DOT}"),
    "!": (8, f"M 4 21 L 4 6.5 O 4 0.9 {DOT}"),
    "'": (8, "M 4 21 L 4 15.5"),
    '"': (12, "M 4 21 L 4 15.5 M 8 21 L 8 15.5"),
    "’": (8, "M 4.9 21 L 3.1 15.6"),
    "-": (14, "M 3 8 L 11 8"),
    "–": (18, "M 3 8 L 15 8"),
    "—": (28, "M 3 8 L 25 8"),
    "−": (19, "M 3 10.5 L 16 10.5"),
    "+": (19, "M 3 10.5 L 16 10.5 M 9.5 4 L 9.5 17"),
    "=": (19, "M 3 7.5 L 16 7.5 M 3 13.5 L 16 13.5"),
    "±": (19, "M 3 13 L 16 13 M 9.5 6.5 L 9.5 19.5 M 3 1.5 L 16 1.5"),
    "×": (17, "M 3 5 L 14 16 M 14 5 L 3 16"),
    "÷": (19, f"M 3 10.5 L 16 10.5 O 9.5 4.5 {DOT} O 9.5 16.5 {DOT}"),
    "·": (8, f"O 4 10 {DOT}"),
    "~": (20, "M 3 8.5 C 4.5 13.5 7.5 13.5 10 10.5 C 12.5 7.5 15.5 7.5 17 12.5"),
    "≈": (
        20,
        "M 3 5 C 4.5 10 7.5 10 10 7 C 12.5 4 15.5 4 17 9"
        " M 3 12 C 4.5 17 7.5 17 10 14 C 12.5 11 15.5 11 17 16",
    ),
    "≤": (19, "M 16 18 L 3 12 L 16 6 M 3 1.5 L 16 1.5"),
    "≥": (19, "M 3 18 L 16 12 L 3 6 M 3 1.5 L 16 1.5"),
    "/": (15, "M 3 -3 L 12 24"),
    "$": (
        18,
        "M 14.4 16.8 C 13.6 19.4 11.8 21 9 21 C 5.8 21 3.6 19.2 3.6 16.2 C 3.6 13 6 12 9 10.9"
        " C 12.2 9.8 14.8 8.6 14.8 5.2 C 14.8 2 12.4 0 9 0 C 5.8 0 3.8 1.6 3 4.4 M 9 24 L 9 -3",
    ),
    "|": (8, "M 4 -5 L 4 25"),
    "\N{FRACTION SLASH}": (7, "M -1.5 0 L 8.5 21"),
    "(": (11, "M 8 24 C 4.6 20.5 3 16 3 10.5 C 3 5 4.6 0.5 8 -3"),
    ")": (11, "M 3 24 C 6.4 20.5 8 16 8 10.5 C 8 5 6.4 0.5 3 -3"),
    "[": (11, "M 8 24 L 3 24 L 3 -3 L 8 -3"),
    "]": (11, "M 3 24 L 8 24 L 8 -3 L 3 -3"),
    "{": (
        13,
        "M 10 24 C 7 24 6 23 6 20 L 6 14 C 6 11.5 5.4 10.5 3 10.5"
        " C 5.4 10.5 6 9.5 6 7 L 6 1 C 6 -2 7 -3 10 -3",
    ),
    "}": (
        13,
        "M 3 24 C 6 24 7 23 7 20 L 7 14 C 7 11.5 7.6 10.5 10 10.5"
        " C 7.6 10.5 7 9.5 7 7 L 7 1 C 7 -2 6 -3 3 -3",
    ),
    "%": (26, "M 7 0 L 19 21 O 6.4 16.2 3.4 4.8 O 19.6 4.8 3.4 4.8"),
    "‰": (36, "M 7 0 L 19 21 O 6.4 16.2 3.4 4.8 O 19.6 4.8 3.4 4.8 O 29.6 4.8 3.4 4.8"),
    "°": (13, "O 6.5 17.3 3.5 3.7"),
    "√": (22, "M 2 9.5 L 5.2 11 L 9.5 0 L 15.5 21 L 21 21"),
    "∞": (
        30,
        "M 15 10.5 C 18 15 20 17 22.2 17 C 25.2 17 27 14.1 27 10.5 C 27 6.9 25.2 4 22.2 4 C 20 4 18 6 15 10.5"
        " C 12 15 10 17 7.8 17 C 4.8 17 3 14.1 3 10.5 C 3 6.9 4.8 4 7.8 4 C 10 4 12 6 15 10.5",
    ),
    "Ω": (
        21,
        "M 3 0 L 8 0 L 8 2.6 C 4.9 4.6 3 8.2 3 12 C 3 17.4 6.2 21 10.5 21 C 14.8 21 18 17.4 18 12"
        " C 18 8.2 16.1 4.6 13 2.6 L 13 0 L 18 0",
    ),
    "µ": (17, "M 3 14 L 3 -6.5 M 3 4.8 C 3.5 1.6 5.2 0 8 0 C 11.2 0 13.3 2.2 14 5.6 M 14 14 L 14 0"),
    "φ": (20, "O 10 7 7 7 M 10 19.5 L 10 -6.5"),
    "Φ": (22, "O 11 10.5 8 6.5 M 11 21 L 11 0"),
    "Δ": (21, "M 3 0 L 10.5 21 L 18 0 L 3 0"),
    "π": (19, "M 3 14 L 16.5 14 M 6.5 14 L 6.5 0 M 12.5 14 L 12.5 3 C 12.5 0.8 13.6 0 15.8 0"),
    "α": (
        18,
        "M 14.6 14 C 13.2 5.5 11 0 7.6 0 C 4.8 0 3 2.8 3 7 C 3 11.2 4.8 14 7.6 14 C 11 14 12.4 8.5 13.4 3.6"
        " C 13.8 1.2 14.4 0 15.8 0",
    ),
    "β": (
        18,
        "M 3 -6.5 L 3 15.5 C 3 19 5 21 8 21 C 11 21 13 19.2 13 16.5 C 13 13.6 11 11.8 8 11.8"
        " C 12.4 11.8 15 9.6 15 6 C 15 2.4 12.6 0 9 0 C 6 0 4 1.2 3 3.6",
    ),
    "γ": (17, "M 3 13.2 C 4.4 14.6 6 13.8 6.8 11.2 L 9.4 1.5 L 9.4 -6.5 M 14.6 14 L 9.4 1.5"),
    "θ": (16, "O 8 10.5 5 10.5 M 3 10.5 L 13 10.5"),
    "λ": (18, "M 3 21 C 5.4 21 6.6 20 7.6 17 L 12.6 2.4 C 13.2 0.7 14 0 15.6 0 M 9.4 11.7 L 4 0"),
    "τ": (16, "M 3 14 L 13.5 14 M 8 14 L 8 3.6 C 8 1.2 9.2 0 11.8 0"),
    "ß": (
        18,
        "M 3 0 L 3 15 C 3 18.8 5 21 8.2 21 C 11.2 21 13 19.3 13 16.8 C 13 13.6 9.6 13.2 9.6 10.8"
        " C 9.6 8.4 15 8.2 15 4.2 C 15 1.6 13.2 0 10.6 0 C 9.2 0 8.2 0.4 7.4 1.2",
    ),
    "ø": (18, "O 9 7 6 7 M 3.2 -1.5 L 14.8 15.5"),
    "Ø": (22, "O 11 10.5 8 10.5 M 3.6 -1.5 L 18.4 22.5"),
    "ı": (8, "M 4 14 L 4 0"),
    "ȷ": (9, "M 5.5 14 L 5.5 -3.5 C 5.5 -6 4.4 -7 2 -7"),
}

MARKS: dict[str, str] = {
    "\N{COMBINING GRAVE ACCENT}": "M -2.2 4 L 1.8 0",
    "\N{COMBINING ACUTE ACCENT}": "M 2.2 4 L -1.8 0",
    "\N{COMBINING CIRCUMFLEX ACCENT}": "M -3.6 0 L 0 4 L 3.6 0",
    "\N{COMBINING CARON}": "M -3.6 4 L 0 0 L 3.6 4",
    "\N{COMBINING TILDE}": "M -4.4 0.6 C -3 4.2 -1.2 3.4 0 2 C 1.2 0.6 3 -0.2 4.4 3.4",
    "\N{COMBINING MACRON}": "M -4 2 L 4 2",
    "\N{COMBINING BREVE}": "M -3.6 4 C -3 -0.6 3 -0.6 3.6 4",
    "\N{COMBINING DIAERESIS}": f"O -3.3 1.6 {DOT} O 3.3 1.6 {DOT}",
    "\N{COMBINING DOT ABOVE}": f"O 0 1.6 {DOT}",
    "\N{COMBINING RING ABOVE}": "O 0 2.5 2.3 2.3",
    "\N{COMBINING DOUBLE ACUTE ACCENT}": "M -0.6 4 L -3.6 0 M 4.4 4 L 1.4 0",
}
"""Accents that stand above a letter, about its middle, from the height where they begin."""

KERNS: dict[str, float] = dict.fromkeys(
    ("AV", "VA", "AW", "WA", "AY", "YA", "AT", "TA", "LT", "LV", "LY", "PA", "FA", "Ty", "To", "Te", "Ta"),
    -2.0,
)
"""By how much some pairs of letters stand nearer, on the grid."""

BELOW: dict[str, str] = {
    "\N{COMBINING CEDILLA}": "M 0 0 L -0.6 -2.2 C 1.6 -2.2 2.8 -3 2.8 -4.4 C 2.8 -6 1 -6.6 -1.8 -6",
}
"""Accents that hang from a letter's foot, about its middle, from the baseline down."""


def steps(strokes: str) -> list[PathStep]:
    """Return the path that a sign's strokes are written as.

    >>> steps("M 0 0 L 10 21")
    [('M', (0.0, 0.0)), ('L', (10.0, 21.0))]
    """
    words = strokes.split()
    starts = [index for index, word in enumerate(words) if word in _COUNTS] + [len(words)]
    path: list[PathStep] = []
    for here, there in pairwise(starts):
        numbers = tuple(float(word) for word in words[here + 1 : there])
        path += _ellipse(*numbers) if words[here] == "O" else _repeated(words[here], numbers)
    return path


_COUNTS = {"M": 2, "L": 2, "C": 6, "O": 4}


def _repeated(kind: str, numbers: tuple[float, ...]) -> list[PathStep]:
    count = _COUNTS[kind]
    return [(kind, numbers[at : at + count]) for at in range(0, len(numbers), count)]


def _ellipse(x: float, y: float, rx: float, ry: float) -> list[PathStep]:
    """Return an ellipse as four curves, clockwise from its top."""
    corners = [(0.0, 1.0), (1.0, 0.0), (0.0, -1.0), (-1.0, 0.0), (0.0, 1.0)]
    path: list[PathStep] = [("M", (x, y + ry))]
    for (ax, ay), (bx, by) in pairwise(corners):
        # Either control point lies on the tangent at its end, which points along the other spoke.
        near, far = (ax + _RING * bx, ay + _RING * by), (bx + _RING * ax, by + _RING * ay)
        numbers = tuple(v for px, py in (near, far, (bx, by)) for v in (x + rx * px, y + ry * py))
        path.append(("C", numbers))
    return path
