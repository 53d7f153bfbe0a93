"""The table of dial symbols: which are shown, how high, and where."""

from __future__ import annotations

from typing import TYPE_CHECKING, Annotated, Any

from pydantic import Field, PlainValidator

from dialgen.dialfile.base import Table, each
from dialgen.dialfile.fields import LengthAbove, Position
from dialgen.quantity import shown

if TYPE_CHECKING:
    from dialgen.symbols import Sign

AUTO, CLASS = "auto", "class"
_MOST_SIGNS = 40


def _show(given: object) -> str | tuple[Sign | str, ...]:
    if given == AUTO:
        return AUTO
    if not isinstance(given, list):
        raise ValueError(f'{shown(given)} does not say what to show; write "auto" or ["dc", "vertical"]')
    if len(given) > _MOST_SIGNS:
        raise ValueError(f"{len(given)} symbols; give at most {_MOST_SIGNS}")
    return each(given, _sign)


def _sign(given: object) -> Sign | str:
    if not isinstance(given, str):
        raise ValueError(f'a symbol is text, not {shown(given)}; write for example "dc"')
    from dialgen.symbols import parse

    # "class" is drawn from each scale's own class, and "auto" may stand among others.
    return given if given in (AUTO, CLASS) else parse(given)


class Symbols(Table):
    """The row of dial symbols."""

    show: Annotated[Any, PlainValidator(_show)] = Field(default=AUTO, description='show = "auto"')
    """`AUTO`, or a tuple of signs, with `AUTO` and `CLASS` among them where the file says so."""
    at: Position | None = None
    height: LengthAbove | None = None
