"""``dialgen table``: where every mark falls."""

from __future__ import annotations

import json
import math
from collections.abc import Mapping, Sequence
from typing import TYPE_CHECKING

import click

from dialgen.cli.columns import columns
from dialgen.cli.report import say_lines, say_warnings

if TYPE_CHECKING:
    from dialgen.face.ruled.ruling import Mark, RuledScale, Spot

_EPILOG = """\b
Examples:
  dialgen table meter.toml
  dialgen table meter.toml --json
  dialgen table meter.toml --at 12.5 --at 30
"""

_HEADS = {
    "value": "",
    "label": "",
    "drive": "",
    "angle": "deg",
    "x": "mm",
    "y": "mm",
    "linear face off by": "",
}
"""The columns, and their units."""


@click.command("table", epilog=_EPILOG)
@click.argument("file", type=click.Path())
@click.option("--json", "as_json", is_flag=True, help="Print full figures as JSON.")
@click.option(
    "--at",
    "values",
    multiple=True,
    callback=lambda ctx, param, texts: tuple(_value(text) for text in texts),
    help="Answer for this value instead; may be given several times.",
)
@click.option("--scale", "only", type=click.IntRange(1), help="Of this scale alone, counted from 1.")
def command(file: str, as_json: bool, values: tuple[float, ...], only: int | None) -> None:
    """Print where every mark of dial file FILE falls.

    Angles are degrees from straight up, clockwise; x and y millimetres from the pivot.  The last
    column is what an evenly divided face would have been wrong by at that mark: the worth of
    the correction.  Labels are shown where one is not the plain number.
    """
    from dialgen import api

    face = api.load(file)
    say_warnings(face.warnings())
    if only is not None:
        face.chain(only)  # refuses a scale that is not there
    chosen = {i: s for i, s in enumerate(face.scales, 1) if only in (None, i)}
    shown = _at(chosen, values, file) if values else [(s, s.marks) for s in chosen.values()]
    if as_json:
        # Plain ASCII, so that it is the same whatever the encoding of standard output.
        click.echo(json.dumps({"scales": [_scale_json(s, marks) for s, marks in shown]}))
        return
    click.echo("\n\n".join(_scale_text(s, marks) for s, marks in shown))
    for line in _spreads(chosen):
        click.echo(line)


def _value(text: str) -> float:
    from dialgen.quantity import bare_number

    value = math.inf if text == "inf" else bare_number(text)
    if value is None:
        point = f"; the decimal sign is a point: {text.replace(',', '.')}" if "," in text else ""
        raise click.BadParameter(f"{text!r} is not a number{point}", param_hint="'--at'")
    return value


def _at(
    scales: dict[int, RuledScale], values: tuple[float, ...], file: str
) -> list[tuple[RuledScale, Sequence[Spot | Mark]]]:
    """Return where the values fall on each scale that can show them, and say which cannot.

    Raises:
        Refused: none can.
    """
    from dialgen.errors import NoSuchValue, Refused
    from dialgen.face.ruled.ruling import spots

    found: list[tuple[RuledScale, Sequence[Spot | Mark]]] = []
    refusals = []
    for number, scale in scales.items():
        try:
            found.append((scale, spots(scale.dial, scale.line, values)))
        except NoSuchValue as error:
            refusals.append(NoSuchValue(f"{file}: scale {number}: {error}"))
    if not found:
        raise Refused(refusals)
    say_lines(str(refusal) for refusal in refusals)
    return found


def _scale_json(scale: RuledScale, marks: Sequence[Spot | Mark]) -> dict[str, object]:
    spec = scale.spec
    return {
        "unit": spec.unit,
        "from": spec.start,
        "to": _number(spec.end),
        "marks": [
            {
                "value": _number(m.value),
                "rank": getattr(m, "rank", None),
                "label": getattr(m, "label", None),
                **({"also": list(getattr(m, "further", ()))} if spec.also else {}),
                "drive": m.drive,
                "angle": m.angle_deg,
                "x": m.x,
                "y": m.y,
            }
            for m in marks
        ],
    }


def _number(value: float) -> float | str:
    return value if math.isfinite(value) else "inf" if value > 0 else "-inf"


def _scale_text(scale: RuledScale, marks: Sequence[Spot | Mark]) -> str:
    from dialgen.face.ruled.worth import linear_errors
    from dialgen.quantity import plain_number, shown_unit

    unit = shown_unit(scale.spec.unit)
    rows: list[tuple[str, ...]] = []
    for m, off in zip(marks, linear_errors(scale, marks), strict=True):
        rows.append(
            (
                plain_number(m.value),
                getattr(m, "label", None) or "",
                f"{_rounded(m.drive):.6f}",
                f"{m.angle_deg:.4f}",
                f"{m.x:.4f}",
                f"{m.y:.4f}",
                "" if off is None else f"{_rounded(off):+.4g}",
            )
        )
    title = f"{plain_number(scale.spec.start)} to {plain_number(scale.spec.end)} {unit}".rstrip()
    return "\n".join([title, *_columns(rows)])


def _rounded(off: float) -> float:
    # Rounding noise of an even scale is shown as nothing.
    return 0.0 if abs(off) < 1e-9 else off


def _columns(rows: list[tuple[str, ...]]) -> list[str]:
    table = [tuple(_HEADS), tuple(_HEADS.values()), *rows]
    if all(label in ("", value) for value, label, *_ in rows):
        table = [(value, *rest) for value, _, *rest in table]
    return columns(table, left=0)


def _spreads(scales: Mapping[int, RuledScale]) -> list[str]:
    """Return a line for each point with several readings; those of the movement serve every scale."""
    lines = []
    for number, scale in scales.items():
        whose = f"scale {number}: " if scale.spec.all_readings() else ""
        for point in scale.dial.correction.points:
            if point.count > 1:
                lines.append(
                    f"{whose}{point.count} readings at {point.nominal_deg:.4g} deg nominal, "
                    f"spread {point.spread_deg:.3g} deg, averaged"
                )
    return list(dict.fromkeys(lines))
