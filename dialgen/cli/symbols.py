"""``dialgen symbols``: the dial symbols, as a sheet or a list."""

from __future__ import annotations

import json
from pathlib import Path
from typing import TYPE_CHECKING

import click

if TYPE_CHECKING:
    from dialgen.symbols import Symbol

_EPILOG = """\b
Examples:
  dialgen symbols
  dialgen symbols --json
  dialgen symbols -o sheet.pdf -o sheet.svg
"""


@click.command("symbols", epilog=_EPILOG)
@click.option(
    "-o",
    "--output",
    "outputs",
    multiple=True,
    type=click.Path(),
    help="Draw them as a sheet; the ending says how: .svg .pdf .png .dxf. May be given several times.",
)
@click.option("--json", "as_json", is_flag=True, help="Print the list as JSON.")
def command(outputs: tuple[str, ...], as_json: bool) -> None:
    """List the dial symbols, or draw them all as a sheet.

    The words are what to write in the dial file: [symbols] show = ["moving coil", "inclined 60"].

    Marking a class or a test voltage is a claim that the maker must have proved.  A shape or a
    number marked "from memory" should be compared with IEC 60051-1 before relying on it; "seen" is
    as a secondary source shows it.
    """
    if outputs:
        _draw(outputs)
    if as_json:
        _print_json()
    elif not outputs:
        _print_list()


def _draw(outputs: tuple[str, ...]) -> None:
    from dialgen import api
    from dialgen.renderers import render
    from dialgen.symbols import sheet

    drawing = sheet()
    api.write_files([(path, render(drawing, path.suffix)) for path in map(Path, outputs)])


def _print_json() -> None:
    from dialgen.symbols import SYMBOLS

    click.echo(json.dumps({"symbols": [_fields(symbol) for symbol in SYMBOLS]}))


def _fields(symbol: Symbol) -> dict[str, object]:
    return {
        "name": symbol.name,
        "write": symbol.write,
        "title": symbol.title,
        "subject": symbol.subject,
        "number": symbol.number,
        "shape_sure": symbol.sure,
        "number_sure": symbol.number_sure,
        "claim": symbol.claim,
        "needs": symbol.needs,
    }


def _print_list() -> None:
    from dialgen.cli.columns import columns
    from dialgen.symbols import SYMBOLS

    heads = ("write", "meaning", "shape", "number", "")
    rows = [heads, *map(_row, SYMBOLS)]
    for line in columns(rows, left=len(heads)):
        click.echo(line)


def _row(symbol: Symbol) -> tuple[str, ...]:
    number = f"{symbol.number} {symbol.number_sure}"
    return symbol.write, symbol.title, symbol.sure, number, "claim" if symbol.claim else ""
