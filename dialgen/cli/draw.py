"""``dialgen draw``: the plate, in one or several formats."""

from __future__ import annotations

import contextlib
import re
import time
from collections.abc import Callable, Iterator
from pathlib import Path

import click

from dialgen.cli.report import say, say_error, say_if_slow, say_warnings
from dialgen.errors import DialgenError

_EPILOG = """\b
Examples:
  dialgen draw meter.toml -o meter.pdf
  dialgen draw meter.toml -o meter.svg -o meter.png --resolution 1200
  dialgen draw meter.toml -o cut.dxf --layers cut,print
  dialgen draw meter.toml -o meter.svg --watch
"""


_LAYERS = ("print", "cut", "guide")
_NAMED = re.compile(r"""\b(?:readings|file)["']?\s*=\s*(?:"([^"\n]+)"|'([^'\n]+)')""")
"""A key of the dial file that names a CSV file."""


def _purposes(ctx: click.Context, param: click.Parameter, text: str) -> tuple[str, ...]:
    names = tuple(part.strip() for part in text.split(",") if part.strip())
    if not names or not set(names) <= set(_LAYERS):
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
    default=",".join(_LAYERS),
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
    "--watch",
    is_flag=True,
    help="Draw again whenever the dial file or a CSV it names changes, until stopped with Ctrl-C.",
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
    files = []
    for path in map(Path, outputs):
        with say_if_slow(f"drawing {path} ..."):
            data = face.render(path.suffix.lower(), margin_mm=margin, layers=purposes, options=options)
        files.append((path, data))
    api.write_files(files)


def _watch(file: str, draw: Callable[[], None]) -> None:
    """Draw now and at every change of the dial file or a CSV it names, until Ctrl-C."""
    with contextlib.suppress(KeyboardInterrupt):
        _draw_at_changes(Path(file), draw)


def _draw_at_changes(file: Path, draw: Callable[[], None]) -> None:
    say(f"watching {file}; Ctrl-C stops")
    seen: object = None
    while True:
        now = list(_stamps(file))
        if now != seen:
            seen = now
            try:
                draw()
                say(f"drawn at {time.strftime('%H:%M:%S')}")
            except DialgenError as error:
                say_error(error)
        time.sleep(0.3)


def _stamps(file: Path) -> Iterator[tuple[str, int, int]]:
    """Return name, time and size of the dial file and of each CSV it names, of those that are there."""
    text = ""
    with contextlib.suppress(OSError):
        text = file.read_text(encoding="utf-8", errors="replace")
    for path in (file, *(file.parent / (plain or literal) for plain, literal in _NAMED.findall(text))):
        # A file may be away for a moment, while an editor puts a new one in its place.
        with contextlib.suppress(OSError, ValueError):
            stat = path.stat()
            yield str(path), stat.st_mtime_ns, stat.st_size
