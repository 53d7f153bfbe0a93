"""Columns of numbers kept in a CSV file beside the dial file."""

from __future__ import annotations

import csv
import io
from dataclasses import dataclass
from pathlib import Path

from dialgen.dialfile.source import read_text
from dialgen.errors import DialFileError, Fault

MOST_ROWS = 5000


@dataclass(frozen=True, slots=True)
class Cell:
    """One cell's text and its place in the file."""

    text: str
    line: int
    column: int


@dataclass(frozen=True, slots=True)
class Sheet:
    """The rows of a CSV file, each a mapping of column name to cell; empty cells are left out."""

    name: str
    rows: tuple[dict[str, Cell], ...]
    heads: dict[str, Cell]

    def fault(self, cell: Cell, key: str, message: str) -> DialFileError:
        """Return the error that points at one cell."""
        return DialFileError(
            [Fault(file=self.name, line=cell.line, column=cell.column, key=key, message=message)]
        )


def read_sheet(path: Path, shown: str) -> Sheet:
    """Return the sheet at ``path``; the first row holds the column names.

    Raises:
        DialFileError: it cannot be read, has no head, or a row has more cells than the head.
    """
    lines = read_text(path, shown).splitlines()
    head: list[Cell] = []
    rows: list[dict[str, Cell]] = []
    sheet = Sheet(shown, (), {})
    for number, line in enumerate(lines, 1):
        if not line.strip() or line.lstrip().startswith("#"):
            continue
        cells = _cells(line, number)
        if not head:
            head = [Cell(c.text.lower(), c.line, c.column) for c in cells]
            if len(head) == 1 and ";" in head[0].text:
                raise sheet.fault(head[0], "", "the columns are parted by semicolons; part them by commas")
            continue
        if len(cells) > len(head):
            raise sheet.fault(
                cells[len(head)], "", f"a cell beyond the {len(head)} named columns; name or remove it"
            )
        rows.append({h.text: c for h, c in zip(head, cells, strict=False) if c.text})
        if len(rows) > MOST_ROWS:
            raise sheet.fault(cells[0], "", f"more than {MOST_ROWS} rows; leave some out")
    if not head:
        raise sheet.fault(Cell("", 1, 1), "", "no columns; the first line names them, such as current,angle")
    return Sheet(shown, tuple(rows), {h.text: h for h in head})


def _cells(line: str, number: int) -> list[Cell]:
    found, column = [], 1
    for text in next(csv.reader(io.StringIO(line))):
        lead = len(text) - len(text.lstrip())
        found.append(Cell(text.strip(), number, column + lead))
        # A quoted cell is longer in the file than its text by its quotes.
        quoted = 2 + text.count('"') if line[column - 1 : column] == '"' else 0
        column += len(text) + quoted + 1
    return found
