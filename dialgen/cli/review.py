"""``dialgen review``: what would be hard to read on the face, and where."""

from __future__ import annotations

import json
from typing import TYPE_CHECKING

import click

from dialgen.cli.report import say_warnings

if TYPE_CHECKING:
    from dialgen.errors import Finding

_EPILOG = """\b
Examples:
  dialgen review meter.toml
  dialgen review meter.toml --json
  dialgen review meter.toml --strict && dialgen draw meter.toml -o meter.pdf
"""
_FOUND = 1


@click.command("review", epilog=_EPILOG)
@click.argument("file", type=click.Path())
@click.option("--json", "as_json", is_flag=True, help="Print the remarks as JSON.")
@click.option("--strict", is_flag=True, help="End with status 1 if there is any remark.")
def command(file: str, as_json: bool, strict: bool) -> int:
    """Say what would be hard to read on the face of dial file FILE, and where.

    The finished face is looked over: ink over an edge or over other ink, letters and gaps too small,
    colours too much alike, a pointer too short or too long, too many marks or too few.  A place is
    in millimetres from the pivot, to the right and up.  Drawing gives the same remarks as warnings.
    """
    from dialgen import api

    face = api.load(file)
    say_warnings(face.dial_warnings())
    found = face.review()
    if as_json:
        # Plain ASCII, so that it is the same whatever the encoding of standard output.
        click.echo(json.dumps({"remarks": [_json(finding) for finding in found]}))
    else:
        click.echo("\n".join(map(str, found)) or f"{file}: nothing to remark")
    return _FOUND if strict and found else 0


def _json(finding: Finding) -> dict[str, object]:
    return {
        "check": finding.check,
        "message": finding.message,
        "key": finding.key,
        "line": finding.line,
        "place": finding.place,
    }
