"""``dialgen circuit``: the range circuit, its parts, their heat, its cautions."""

from __future__ import annotations

import json
from collections.abc import Callable, Iterator, Sequence
from pathlib import Path
from typing import TYPE_CHECKING

import click

from dialgen.cli.report import say, say_warnings

if TYPE_CHECKING:
    from dialgen.api import Face
    from dialgen.dial.designs import Designed
    from dialgen.parts.bench import Bench
    from dialgen.parts.bill import Bill

_EPILOG = """\b
Examples:
  dialgen circuit meter.toml
  dialgen circuit meter.toml -o circuit.svg -o circuit.pdf
  dialgen circuit meter.toml --stock "3.3 ohm x12" --stock "10 ohm x5"
  dialgen circuit meter.toml --wire "manganin 0.5 mm" --series E24
  dialgen circuit --kinds
"""


@click.command("circuit", epilog=_EPILOG)
@click.argument("file", type=click.Path(), required=False)
@click.option("--json", "as_json", is_flag=True, help="Print full figures as JSON.")
@click.option("--kinds", is_flag=True, help="List the kinds of circuit and their keys.")
@click.option(
    "-o",
    "--output",
    "outputs",
    multiple=True,
    type=click.Path(),
    help="Draw the schematic; the ending says how: .svg .pdf .png .dxf. May be given several times.",
)
@click.option("--only", type=click.IntRange(1), help="This circuit alone, counted from 1.")
@click.option("--stock", multiple=True, help='Resistors in the drawer, as "3.3 ohm x12"; several times.')
@click.option("--wire", multiple=True, help='A wire or strip to make parts of, as "manganin 0.5 mm".')
@click.option("--series", help="The E series parts are bought in, as E24; all where it is left out.")
@click.option("--tolerance", type=float, help="The parts' tolerance in percent; the series' own if left out.")
@click.option("--margin", type=float, help="How many times its dissipation a part is rated for; 2.")
@click.option("--overload", type=float, help="The overload to look at, times full scale; 1.2.")
@click.option("--voltage", help='What one resistor stands, as "350 V"; 250 V.')
@click.option("--drift", type=float, help="The largest drift wanted, percent per kelvin: finds the swamping.")
def command(
    file: str | None,
    as_json: bool,
    kinds: bool,
    outputs: tuple[str, ...],
    only: int | None,
    stock: tuple[str, ...],
    wire: tuple[str, ...],
    series: str | None,
    tolerance: float | None,
    margin: float | None,
    overload: float | None,
    drift: float | None,
    voltage: str | None,
) -> None:
    """Print the range circuits of dial file FILE: parts to buy or to make, their heat, what they do.

    The options say what a [parts] table in the file says, and go before it: stock, wire, series,
    tolerance, margin, overload, drift, voltage.  A drawer of more than twelve values is searched for networks
    of up to six parts, a smaller one of up to eight.
    """
    if kinds:
        _print_kinds(as_json)
        return
    if file is None:
        raise click.UsageError("Missing argument 'FILE'.")
    from dialgen import api

    face = api.load(file)
    say_warnings(face.dial_warnings())
    bench = _bench(
        face,
        {
            "stock": list(stock),
            "wire": list(wire),
            "series": series,
            "tolerance": tolerance,
            "margin": margin,
            "overload": overload,
            "drift": drift,
            "voltage": voltage,
        },
    )
    chosen = _chosen(face, only)
    bills = [(each, face.bill(each, bench, _progress)) for each in chosen]
    if outputs:
        _draw(face, bills, bench, outputs)
    if as_json:
        from dialgen.cli.bill_json import circuit_json

        click.echo(json.dumps({"circuits": [circuit_json(bill) for _, bill in bills]}))
    else:
        click.echo("\n".join(_lines(face, bills)))


def _chosen(face: Face, only: int | None) -> tuple[Designed, ...]:
    from dialgen.errors import InputError

    found = face.circuits
    if only is None:
        return found
    if only > len(found):
        raise InputError(f"there is no circuit {only}; the dial has {len(found)}")
    return found[only - 1 : only]


def _bench(face: Face, given: dict[str, object]) -> Bench:
    """Return the bench of the file, with what the options say instead."""
    options = {name: value for name, value in given.items() if value not in (None, [])}
    return face.bench(options)


def _progress(part: str) -> Callable[[int, int], None]:
    """Return how the search for a part is told of, once it takes longer than a second."""
    import time

    began, told = time.monotonic(), [0.0]

    def tell(done: int, whole: int) -> None:
        now = time.monotonic()
        if now - began > 1.0 and now - told[0] > 2.0:
            told[0] = now
            say(f"searching the drawer for {part}: {100 * done // max(whole, 1)} %")

    return tell


def _draw(face: Face, bills: Sequence[tuple[Designed, Bill]], bench: Bench, outputs: tuple[str, ...]) -> None:
    from dialgen import api
    from dialgen.renderers import render

    drawings = [face.schematic(each, bench) for each, _ in bills]
    files = []
    for path in map(Path, outputs):
        for number, drawing in enumerate(drawings, 1):
            # Of several circuits each has a file of its own: circuit.svg, circuit-2.svg.
            target = path if number == 1 else path.with_stem(f"{path.stem}-{number}")
            files.append((target, render(drawing, path.suffix.lower())))
    api.write_files(files)


def _lines(face: Face, bills: Sequence[tuple[Designed, Bill]]) -> Iterator[str]:
    from dialgen.cli.bill_text import bill_lines, closing_lines, heading, is_mute

    told = [(designed, bill) for designed, bill in bills if not is_mute(bill)]
    for designed, bill in told:
        yield heading(designed.design, _served(face, [designed]))
        yield from bill_lines(bill)
        yield from _old_face(face, designed, bill)
        yield ""
    if not told:
        served = _served(face, [designed for designed, _ in bills])
        yield f"Nothing to buy or to make: {_AS_IT_IS} ({served})." if served else _NO_CIRCUIT
        yield ""
    yield from closing_lines([bill for _, bill in bills])


_AS_IT_IS = "the movement is used as it is"
_NO_CIRCUIT = "Nothing to buy or to make: no scale stands on a circuit."


def _old_face(face: Face, designed: Designed, bill: Bill) -> Iterator[str]:
    from dialgen.cli.bill_making import old_face_lines
    from dialgen.quantity import shown_unit

    rows = face.old_face(designed) if bill.assessment else ()
    if rows:
        yield ""
        spec = face.dial.file.scale[designed.scale - 1]
        yield from old_face_lines(shown_unit(spec.unit), max(abs(spec.start), abs(spec.end)), rows)


def _served(face: Face, circuits: Sequence[Designed]) -> str:
    return "; ".join(_place(face, *place) for designed in circuits for place in designed.serves)


def _place(face: Face, scale: int, also: int) -> str:
    from dialgen.quantity import plain_number, shown_unit

    spec = face.dial.file.scale[scale - 1]
    if also:
        return f"scale {scale}, row {also + 1}"
    span = f"{plain_number(spec.start)} to {plain_number(spec.end)} {shown_unit(spec.unit)}"
    return f"scale {scale}, {span}".rstrip()


def _print_kinds(as_json: bool) -> None:
    from dialgen.cli.columns import columns
    from dialgen.dialfile.kinds import CIRCUIT_KEYS, circuit_keys

    rows = circuit_keys()
    if as_json:
        click.echo(json.dumps({"kinds": [dict(zip(CIRCUIT_KEYS, row, strict=True)) for row in rows]}))
        return
    heads = ("kind", "takes", "keys")
    shown = [(row[0], row[1] or "any", ", ".join(row[2])) for row in rows]
    for line in columns([heads, *shown], left=3):
        click.echo(line)
