"""``dialgen draw``: the plate, in one or several formats."""

from __future__ import annotations

import contextlib
import time
from collections.abc import Callable
from pathlib import Path

import click

from dialgen.cli.report import say, say_error, say_warnings
from dialgen.errors import DialgenError

_EPILOG = """\b
Examples:
  dialgen draw meter.toml -o meter.pdf
  dialgen draw meter.toml -o meter.svg -o meter.png --resolution 1200
  dialgen draw meter.toml -o cut.dxf --layers cut,print
  dialgen draw meter.toml -o meter.svg --watch
"""


def _purposes(ctx: click.Context, param: click.Parameter, text: str) -> tuple[str, ...]:
    names = tuple(part.strip() for part in text.split(",") if part.strip())
    if not names or not set(names) <= {"print", "cut", "guide"}:
        raise click.BadParameter(f"{text!r} is not a list of print, cut and guide, such as print,cut")
    return names


@click.command("draw", epilog=_EPILOG)
@click.argument("file", type=click.Path())
@click.option(
    "-o",
    "--output",
    "outputs",
    multiple=True,
    required=True,
    type=click.Path(),
    help="Where to draw; the ending says how: .svg .pdf .png .dxf. May be given several times.",
)
@click.option(
    "--margin",
    default=3.0,
    show_default=True,
    type=click.FloatRange(0, 500),
    help="Paper around the plate, mm.",
)
@click.option(
    "--layers",
    default="print,cut,guide",
    show_default=True,
    callback=_purposes,
    help="What to draw: print is ink, cut the outline and holes, guide the pivot cross and the window.",
)
@click.option(
    "--resolution",
    default=600.0,
    show_default=True,
    type=click.FloatRange(10, 10000),
    help="Of a PNG, dots per inch.",
)
@click.option(
    "--inline-glyphs",
    is_flag=True,
    help="SVG: write each letter out where it stands, for programs that cannot follow references.",
)
@click.option(
    "--watch", is_flag=True, help="Draw again whenever the dial file changes, until stopped with Ctrl-C."
)
def command(
    file: str, outputs: tuple[str, ...], margin: float, layers: tuple[str, ...],
    resolution: float, inline_glyphs: bool, watch: bool,
) -> None:  # fmt: skip
    """Draw the plate of dial file FILE at true size.

    Print it at 100 %, "actual size"; fitting to the page spoils it.  Every output is written whole
    or left as it was.
    """

    def draw() -> None:
        _draw(file, outputs, margin, layers, resolution, inline_glyphs)

    if not watch:
        draw()
        return
    _watch(file, draw)


def _draw(
    file: str,
    outputs: tuple[str, ...],
    margin: float,
    layers: tuple[str, ...],
    resolution: float,
    inline_glyphs: bool,
) -> None:
    from dialgen import api
    from dialgen.drawing import Purpose
    from dialgen.renderers import Options

    face = api.load(file)
    say_warnings(face.warnings())
    options = Options(resolution_dpi=resolution, inline_glyphs=inline_glyphs)
    purposes = [Purpose(name) for name in layers]
    api.write_files(
        [
            (path, face.render(path.suffix.lower(), margin_mm=margin, layers=purposes, options=options))
            for path in map(Path, outputs)
        ]
    )


def _watch(file: str, draw: Callable[[], None]) -> None:
    """Draw now and at every change of the dial file or a CSV beside it, until Ctrl-C."""
    with contextlib.suppress(KeyboardInterrupt):
        _draw_at_changes(file, draw)


def _draw_at_changes(file: str, draw: Callable[[], None]) -> None:
    folder = Path(file).parent
    say(f"watching {file}; Ctrl-C stops")
    seen: object = None
    while True:
        now = _stamps(folder, Path(file))
        if now != seen:
            seen = now
            try:
                draw()
                say(f"drawn at {time.strftime('%H:%M:%S')}")
            except DialgenError as error:
                say_error(error)
        time.sleep(0.3)


def _stamps(folder: Path, file: Path) -> object:
    beside = sorted(folder.glob("*.csv")) if folder.is_dir() else []
    return [(str(p), p.stat().st_mtime_ns, p.stat().st_size) for p in (file, *beside) if p.exists()]
