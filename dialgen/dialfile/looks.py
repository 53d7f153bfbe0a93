"""The tables of looks: a named look with some of its values changed."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field, fields
from enum import StrEnum
from functools import cache
from typing import Annotated, Any, get_args, get_origin, get_type_hints

from pydantic import BaseModel, ConfigDict, Field, PlainValidator, ValidationInfo, create_model

from dialgen.dialfile import fields as read
from dialgen.dialfile.base import checked, folder_of
from dialgen.looks import LOOKS, Look, dressed
from dialgen.looks import colour as read_colour
from dialgen.looks.look import COLOUR, DISTANCE, FACTOR, FONT, LENGTH, WIDTH
from dialgen.quantity import read_length, shown

_NEAREST_MM = 50.0


@dataclass(frozen=True, slots=True)
class Dress:
    """A look's name, None for the plain one, and the values that are changed in it."""

    style: str | None = None
    changes: Mapping[str, Any] = field(default_factory=dict)


def look_of(common: Dress, own: Dress) -> Look:
    """Return the look of a scale: its own style or the common one, then the common changes, then its own."""
    return dressed(own.style or common.style, common.changes, own.changes)


def colour(given: object) -> str:
    """Return a colour as ``#rrggbb``."""
    if not isinstance(given, str):
        raise ValueError(f'a colour is text, not {shown(given)}; write "red" or "#c8201e"')
    return read_colour(given)


def read_dress(given: object, info: ValidationInfo) -> Dress:
    """Return what a look's table says.

    Raises:
        Flaws: a key of it is wrong.
    """
    if isinstance(given, str):
        given = {"style": given}
    made = checked(look_table(), given, info.context)
    changes = {name: getattr(made, name) for name in made.model_fields_set if name != "style"}
    return Dress(getattr(made, "style", None), changes)


@cache
def look_table() -> type[BaseModel]:
    """Return the model of a look's table: ``style``, and the fields of `Look`."""
    hints = get_type_hints(Look, include_extras=True)
    keys: dict[str, Any] = {
        f.name: (_reader(f.name, hints[f.name]), Field(default=None)) for f in fields(Look)
    }
    style = Annotated[Any, PlainValidator(read.one_of(*LOOKS))]
    return create_model(
        "LookTable",
        __config__=ConfigDict(extra="forbid", frozen=True),
        style=(style, Field(default=None)),
        **keys,
    )


def _distance(given: object) -> float:
    value = read_length(given, "a distance")
    if value < _NEAREST_MM:
        raise ValueError(f'a reading distance of {value:g} mm is too near to read; write for example "0.7 m"')
    return value


def _font(given: object, info: ValidationInfo) -> read.Value:
    path = folder_of(info) / read.text(given)
    from dialgen.lettering import hand

    hand(path)  # refuses what is no font
    return path


_READERS: Mapping[str, read.Value] = {
    COLOUR: colour,
    LENGTH: read.length_above,
    WIDTH: read.length_above,
    FACTOR: read.number("a factor", 0.2, 5.0),
    DISTANCE: _distance,
    FONT: _font,
}


def _reader(name: str, hint: object) -> read.Value:
    if get_origin(hint) is Annotated:
        return Annotated[Any, PlainValidator(_READERS[get_args(hint)[1]])]
    if isinstance(hint, type) and issubclass(hint, StrEnum):
        return Annotated[Any, PlainValidator(_one_of(hint))]
    if hint is bool:
        return Annotated[Any, PlainValidator(read.true_or_false)]
    raise TypeError(f"no reader for the look's {name}; annotate it with a note that has one")


def _one_of(words: type[StrEnum]) -> read.Reader:
    choose = read.one_of(*words)
    return lambda given: words(choose(given))
