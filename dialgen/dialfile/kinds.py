"""The check of a law's or circuit's table, built from the very dataclass that does its work."""

from __future__ import annotations

import dataclasses
from functools import cache
from typing import Annotated, Any, Literal, get_args, get_origin, get_type_hints

from pydantic import BaseModel, ConfigDict, Field, PlainValidator, create_model

from dialgen.dialfile import fields
from dialgen.dialfile.base import checked
from dialgen.errors import InputError


def read_kind(given: object, table: dict[str, type], noun: str) -> Any:
    """Return the law or circuit that ``given`` names: its kind alone, or a table with its keys.

    Raises:
        InputError: the kind is not in ``table``.
        Nested: a key of it is wrong, with places relative to it.
    """
    if isinstance(given, str):
        given = {"kind": given}
    if not isinstance(given, dict):
        raise InputError(f'a {noun} is a name or a table; write for example {noun} = "{next(iter(table))}"')
    kind = given.get("kind")
    if not isinstance(kind, str) or kind not in table:
        known = ", ".join(f'"{k}"' for k in table)
        what = f"the {noun} has no kind" if kind is None else f"{kind!r} is not a kind of {noun}"
        raise InputError(f"{what}; there are {known}", ("kind",))
    keys = checked(model_of(table[kind]), {k: v for k, v in given.items() if k != "kind"})
    return table[kind](**{name: getattr(keys, name) for name in keys.model_fields_set})


@cache
def model_of(kind: type) -> type[BaseModel]:
    """Return the pydantic model with the fields of a law or circuit; unknown keys are refused."""
    hints = get_type_hints(kind, include_extras=True)
    made: dict[str, Any] = {f.name: (_field(hints[f.name]), _default(f)) for f in dataclasses.fields(kind)}
    return create_model(kind.__name__, __config__=ConfigDict(extra="forbid", frozen=True), **made)


def _field(hint: Any) -> Any:
    return Annotated[Any, PlainValidator(_reader(hint))]


def _reader(hint: Any) -> fields.Reader:
    if get_origin(hint) is Annotated:
        return fields.reader_for(get_args(hint)[1])
    if get_origin(hint) is Literal:
        return fields.one_of(*get_args(hint))
    return fields.formula_text if hint is str else fields.number("this")


def _default(field: dataclasses.Field[Any]) -> Any:
    if field.default is not dataclasses.MISSING:
        return Field(default=field.default)
    return Field(description=f"{field.name} = ...")
