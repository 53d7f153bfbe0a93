"""All the symbols on one sheet, with what to write for each and how sure it is."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from itertools import groupby

from dialgen.drawing import Drawing, Layer, Letters, Line, Point, Primitive, Purpose, Style
from dialgen.lettering import Fit, letters
from dialgen.symbols.placing import items
from dialgen.symbols.signs import example
from dialgen.symbols.symbol import Symbol
from dialgen.symbols.table import SYMBOLS

# A4, ISO 216.
_WIDTH_MM, _HEIGHT_MM = 210.0, 297.0
_MARGIN_MM = 15.0
_COLUMN_MM, _GUTTER_MM = 84.0, 12.0
_FIRST_MM = _HEIGHT_MM - 39.5
_ROW_MM, _HEAD_MM, _ABOVE_MM = 9.6, 11.0, 2.5
_SYMBOL_MM = 5.0
_PICTURE_MM = 18.0
"""From the left edge of a column to its words; the pictures stand in the middle of it."""

_INK, _GREY = "#000000", "#505050"
_TITLE = "Dial symbols after IEC 60051-1"
_NOTES = (
    'The first line of each is what to write in a dial file: [symbols] show = ["dc", "vertical"]',
    "Seen: as a secondary source shows it. From memory: compare it with the standard before relying on it.",
    "Claim: to mark a class or a test voltage is to state what the maker must have proved.",
)


def sheet() -> Drawing:
    """Return every symbol on an A4 page, in two columns by subject; each is a layer of its own."""
    words: list[Primitive] = [_text(_TITLE, (_MARGIN_MM, _HEIGHT_MM - 18.0), 4.0, _INK)]
    words += [
        _text(note, (_MARGIN_MM, _HEIGHT_MM - 23.5 - 4.0 * row), 1.7, _GREY)
        for row, note in enumerate(_NOTES)
    ]
    symbols = []
    for column, groups in enumerate(_columns()):
        left, y = _MARGIN_MM + column * (_COLUMN_MM + _GUTTER_MM), _FIRST_MM
        for group in groups:
            words += _heading(group[0].subject, (left, y))
            y -= _HEAD_MM - _ABOVE_MM
            for symbol in group:
                symbols.append(_picture(symbol, (left + _PICTURE_MM / 2 - 1.0, y)))
                words += _words(symbol, (left + _PICTURE_MM, y))
                y -= _ROW_MM
            y -= _ABOVE_MM
    print_layer = Layer(name="words", purpose=Purpose.PRINT, items=tuple(words))
    return Drawing(
        left=0.0, bottom=0.0, width=_WIDTH_MM, height=_HEIGHT_MM,
        layers=(print_layer, *symbols), title=_TITLE,
    )  # fmt: skip


def _columns() -> tuple[Sequence[Sequence[Symbol]], Sequence[Sequence[Symbol]]]:
    """Return the groups of either column, the higher column as low as it can be."""
    groups = [tuple(group) for _, group in groupby(SYMBOLS, key=lambda symbol: symbol.subject)]

    def higher(cut: int) -> float:
        return max(map(_room, (groups[:cut], groups[cut:])))

    cut = min(range(len(groups)), key=higher)
    return groups[:cut], groups[cut:]


def _room(groups: Sequence[Sequence[Symbol]]) -> float:
    return sum(_HEAD_MM + _ROW_MM * len(group) for group in groups)


def _heading(text: str, at: Point) -> Iterator[Primitive]:
    x, y = at
    yield _text(text, (x, y), 2.4, _INK)
    yield Line((x, y - 1.6), (x + _COLUMN_MM, y - 1.6), Style(stroke=_GREY, width_mm=0.15))


def _picture(symbol: Symbol, at: Point) -> Layer:
    figure = items(example(symbol), at, _SYMBOL_MM, _INK)
    return Layer(name=symbol.name, purpose=Purpose.PRINT, items=figure)


def _words(symbol: Symbol, at: Point) -> Iterator[Letters]:
    """Yield three lines about the height ``at`` is at."""
    x, y = at
    yield _text(symbol.write, (x, y + 1.5), 2.1, _INK)
    yield _text(symbol.title, (x, y - 1.3), 1.6, _INK)
    yield _text(_standing(symbol), (x, y - 3.7), 1.4, _GREY)


def _standing(symbol: Symbol) -> str:
    """Return number, sureness and claim in words."""
    claim = "; a claim" if symbol.claim else ""
    return f"shape {symbol.sure}; number {symbol.number} {symbol.number_sure}{claim}"


def _text(text: str, at: Point, height_mm: float, ink: str) -> Letters:
    return letters(text, height_mm, at, Style(fill=ink), anchor=(0.0, 0.0), fit=Fit.LINE)
