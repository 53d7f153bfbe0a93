"""What a numeral says: the value in the unit that is printed, with its signs, as each row writes it."""

from __future__ import annotations

from dataclasses import dataclass

from dialgen.dialfile.models import Scale
from dialgen.looks import Decimal, Look
from dialgen.quantity import folded_unit, plain_number, shown_unit

_SPACED_DIGITS = 5
_THIN_SPACE = "\N{NARROW NO-BREAK SPACE}"


@dataclass(frozen=True, slots=True, kw_only=True)
class Caption:
    """How a row of numerals is written.

    Args:
        times: what a value of the scale is multiplied by.
        unit: the unit as printed.
        signed: whether values above zero have a plus sign.
        decimal: the decimal sign.
        spaced: whether groups of three digits are parted, from five digits up (ISO 80000-1).
    """

    times: float
    unit: str
    signed: bool
    decimal: Decimal
    spaced: bool

    def text(self, value: float) -> str:
        """Return a value of the scale as it is lettered in this row."""
        number = float(f"{value * self.times:.12g}")
        whole, point, rest = plain_number(number).partition(".")
        if self.spaced:
            whole = _parted(whole)
        sign = "+" if self.signed and number > 0 else ""
        return sign + whole + ("," if point and self.decimal is Decimal.COMMA else point) + rest


def captions(scale: Scale, look: Look, largest: float) -> tuple[Caption, ...]:
    """Return how the scale's own numerals are written, and then those of each further row.

    Args:
        scale: the scale.
        look: how numbers are written.
        largest: how large the values of the scale are.
    """
    foldable = largest if look.fold else None
    # A row that names its unit is written in it, however many digits that takes.
    rows = (
        _caption(scale, look, row.times, row.unit or scale.unit, None if row.unit else foldable)
        for row in scale.also
    )
    return (_caption(scale, look, 1.0, scale.unit, foldable), *rows)


def _caption(scale: Scale, look: Look, times: float, unit: str, folded_for: float | None) -> Caption:
    """Return how a row is written, its prefix folded so that values as large as ``folded_for`` stay short."""
    folded, printed = 1.0, shown_unit(unit)
    if folded_for is not None:
        folded, printed = folded_unit(unit, folded_for * times)
    return Caption(
        times=times * folded,
        unit=printed,
        signed=scale.sign == "always",
        decimal=look.decimal,
        spaced=look.thousands,
    )


def _parted(whole: str) -> str:
    sign = whole[: len(whole) - len(whole.lstrip("−"))]
    figures = whole[len(sign) :]
    if len(figures) < _SPACED_DIGITS:
        return whole
    head = len(figures) % 3 or 3
    groups = [figures[:head], *(figures[i : i + 3] for i in range(head, len(figures), 3))]
    return sign + _THIN_SPACE.join(groups)
