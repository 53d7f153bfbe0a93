"""Columns of numbers kept in a CSV file beside the dial file."""

from __future__ import annotations

import csv
from dataclasses import dataclass
from pathlib import Path

from dialgen.dialfile.source import read_text
from dialgen.errors import DialFileError, Fault

MOST_ROWS = 5000
_MOST_COLUMNS = 50


@dataclass(frozen=True, slots=True)
class Cell:
    """One cell's text and its place in the file."""

    text: str
    line: int = 1
    column: int = 1


@dataclass(frozen=True, slots=True)
class Sheet:
    """The rows of a CSV file, each a mapping of column name to cell; empty cells are left out."""

    name: str
    rows: tuple[dict[str, Cell], ...] = ()
    heads: tuple[Cell, ...] = ()

    def fault(self, cell: Cell, key: str, message: str) -> DialFileError:
        """Return the error that points at one cell."""
        return DialFileError(
            [Fault(file=self.name, line=cell.line, column=cell.column, key=key, message=message)]
        )


def read_sheet(path: Path, columns: tuple[str, ...], needed: tuple[str, ...] = ()) -> Sheet:
    """Return the sheet at ``path``; its first row names the columns, some of ``columns``.

    Empty lines and lines that begin with # are left out.

    Raises:
        InputError: it cannot be opened.
        DialFileError: what it holds is wrong, with the place.
    """
    sheet = Sheet(str(path))
    text = read_text(path, sheet.name, sheet.name).replace("\r", "\n")
    lines = [
        _cells(line, number, sheet)
        for number, line in enumerate(text.split("\n"), 1)
        if line.strip(", \t") and not line.lstrip().startswith("#")
    ]
    if not lines:
        raise sheet.fault(Cell(""), "", "no columns; the first line names them, such as current,angle")
    heads = tuple(Cell(c.text.lower(), c.line, c.column) for c in lines[0])
    _check_heads(sheet, heads, columns, needed)
    if len(lines) - 1 > MOST_ROWS:
        raise sheet.fault(lines[MOST_ROWS + 1][0], "", f"more than {MOST_ROWS} rows; leave some out")
    return Sheet(sheet.name, tuple(_row(sheet, heads, cells) for cells in lines[1:]), heads)


def _row(sheet: Sheet, heads: tuple[Cell, ...], cells: list[Cell]) -> dict[str, Cell]:
    if len(cells) > len(heads):
        raise sheet.fault(
            cells[len(heads)],
            "",
            f"a cell more than the {len(heads)} columns named in the first line; remove it, and write "
            "decimals with a point",
        )
    return {head.text: cell for head, cell in zip(heads, cells, strict=False) if cell.text}


def _check_heads(
    sheet: Sheet, heads: tuple[Cell, ...], columns: tuple[str, ...], needed: tuple[str, ...]
) -> None:
    if len(heads) == 1 and ";" in heads[0].text:
        raise sheet.fault(
            heads[0], "", "the columns are parted by semicolons; part them by commas, with decimal points"
        )
    seen: set[str] = set()
    for head in heads:
        if head.text not in columns:
            raise sheet.fault(
                head, head.text[:40], f"not a column here; the first line names columns: {', '.join(columns)}"
            )
        if head.text in seen:
            raise sheet.fault(head, head.text, "the column is there twice; leave one out")
        seen.add(head.text)
    for name in needed:
        if name not in seen:
            raise sheet.fault(heads[0], name, "the column is missing; add it")


def _cells(line: str, number: int, sheet: Sheet) -> list[Cell]:
    try:
        texts = next(csv.reader([line]))
    except csv.Error:
        texts = [""] * (_MOST_COLUMNS + 1)
    if len(texts) > _MOST_COLUMNS:
        raise sheet.fault(
            Cell("", number), "", "not a line of a CSV file; write a few cells parted by commas"
        )
    found, column = [], 1
    for text in texts:
        lead = len(text) - len(text.lstrip())
        found.append(Cell(text.strip(), number, column + lead))
        # A quoted cell is longer in the file than its text by its quotes.
        quoted = 2 + text.count('"') if line[column - 1 : column] == '"' else 0
        column += len(text) + quoted + 1
    return found
