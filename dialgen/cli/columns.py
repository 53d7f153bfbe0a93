"""Rows of words as columns, for a terminal or a printed page."""

from __future__ import annotations

import re
import textwrap
from collections.abc import Sequence

from dialgen.quantity import plain_number

WIDTH = 100
_AMOUNT = re.compile(r"(\d) ((?:[pnµmkMG]?(?:A|V|W|Ω|VA|m)|mm|K|%|°C)(?!\w))")


def columns(rows: Sequence[Sequence[str]], left: int = 1, gap: str = "  ") -> list[str]:
    """Return a line for each row; the first ``left`` columns begin together, the others end together."""
    widths = [max(map(len, column)) for column in zip(*rows, strict=True)]
    return [
        gap.join(
            cell.ljust(width) if i < left else cell.rjust(width)
            for i, (cell, width) in enumerate(zip(row, widths, strict=True))
        ).rstrip()
        for row in rows
    ]


def table(heads: Sequence[str], rows: Sequence[Sequence[str]], left: int = 1) -> list[str]:
    """Return lines as `columns` does, with heads above, and without columns that no row has anything in."""
    filled = [i for i in range(len(heads)) if i < left or any(row[i] for row in rows)]
    return columns([[row[i] for i in filled] for row in (heads, *rows)], left)


def wrapped(text: str, first: str = "", rest: str = "  ") -> list[str]:
    """Return a text in lines of readable width, the first and the others behind their own beginning."""
    # A number stays with its unit.
    kept = _AMOUNT.sub("\\1\u00a0\\2", text)
    lines = textwrap.wrap(
        kept,
        WIDTH,
        initial_indent=first,
        subsequent_indent=rest,
        break_long_words=False,
        break_on_hyphens=False,
    )
    return [line.replace("\u00a0", " ") for line in lines]


def percent(value: float, digits: int = 3) -> str:
    """Return a signed percentage of so many figures.

    >>> percent(0.0), percent(-1.2345), percent(12.345), percent(-0.9998, 2)
    ('0 %', '−1.23 %', '+12.3 %', '−1 %')
    """
    rounded = float(f"{value:.{digits}g}") if abs(value) >= 5e-7 else 0.0
    return ("+" if rounded > 0 else "") + f"{plain_number(rounded)} %"


def listed(names: Sequence[str]) -> str:
    """Return names as a list to read.

    >>> listed(["shunt"]), listed(["section 1", "section 2", "section 3"])
    ('shunt', 'section 1, section 2 and section 3')
    """
    *most, last = names
    return f"{', '.join(most)} and {last}" if most else last
