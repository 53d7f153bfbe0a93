"""The check of a law's or circuit's table, built from the very dataclass that does its work."""

from __future__ import annotations

import dataclasses
from collections.abc import Mapping
from functools import cache
from typing import Annotated, Any, Literal, get_args, get_origin, get_type_hints

from pydantic import BaseModel, ConfigDict, Field, PlainValidator, ValidationError, create_model

from dialgen.circuit.direct import FACE_END, FACE_VALUE
from dialgen.circuit.kinds import CIRCUITS
from dialgen.dialfile import fields
from dialgen.dialfile.base import Flaws, nearest_key
from dialgen.errors import InputError
from dialgen.geometry.points import CALIBRATION, FACE_POINTS, SIGNAL_POINTS
from dialgen.quantity import OHM_ABOVE, TEMPERATURE, Listed, Measure, Number, Written, shown

_MOST = 1e6
_NOTES: dict[object, fields.Reader] = {
    FACE_VALUE: fields.face_value,
    FACE_END: fields.face_end,
    SIGNAL_POINTS: fields.points(fields.face_value, fields.signal, '[[0, "0 mV"], [100, "12 mV"]]'),
    FACE_POINTS: fields.points(
        fields.face_end, fields.number("a position", -_MOST, _MOST), "[[0, -44], [10, -20.5]]"
    ),
    CALIBRATION: fields.points(
        TEMPERATURE.read, OHM_ABOVE.read, '[["0 degC", "32.65 kohm"], ["25 degC", ...], ...]', least=0
    ),
}
"""Readers for the notes that are no more than a name, as they read values of the face."""


def read_kind(given: object, table: Mapping[str, type[Any]], noun: str) -> fields.Value:
    """Return the law or circuit that ``given`` names: its kind alone, or a table with its keys.

    Raises:
        InputError: the kind is not in ``table``, or its keys do not go together.
        Flaws: a key of it is wrong, with places relative to it.
    """
    if isinstance(given, str):
        given = {"kind": given}
    if not isinstance(given, dict):
        example = f'{noun} = "{next(iter(table))}"'
        raise InputError(f"a {noun} is a name or a table, not {shown(given)}; write for example {example}")
    kind = given.get("kind")
    if kind is None and (meant := _kind_elsewhere(given, table)):
        raise InputError("not a key here; did you mean kind?", (meant,))
    if not isinstance(kind, str) or kind not in table:
        raise InputError(_no_such_kind(kind, table, noun), ("kind",))
    keys = {k: v for k, v in given.items() if k != "kind"}
    made: Any = table[kind]
    model = model_of(made)
    try:
        return _made(made, model.model_validate(keys))
    except ValidationError as error:
        raise Flaws(model, error, _crossed(made, model, keys)) from None


@cache
def model_of(kind: type) -> type[BaseModel]:
    """Return the pydantic model with the fields of a law or circuit; unknown keys are refused."""
    hints = get_type_hints(kind, include_extras=True)
    made: dict[str, Any] = {
        f.name: (_field(f.name, hints[f.name]), _default(f, hints[f.name])) for f in dataclasses.fields(kind)
    }
    return create_model(kind.__name__, __config__=ConfigDict(extra="forbid", frozen=True), **made)


def _kind_elsewhere(given: dict[str, Any], table: Mapping[str, type[Any]]) -> str | None:
    """Return the key under which the kind stands by mistake, if one does."""
    return next((k for k, v in given.items() if nearest_key(k, ["kind"]) and v in list(table)), None)


CIRCUIT_KEYS = ("kind", "takes", "keys")


def circuit_keys() -> list[tuple[str, str | None, tuple[str, ...]]]:
    """Return every kind of circuit with the unit it takes and its keys, from the table of the check."""
    return [
        (kind, made.takes, tuple(field.name for field in dataclasses.fields(made)))
        for kind, made in CIRCUITS.items()
    ]


def _made(kind: type, keys: BaseModel) -> fields.Value:
    return kind(**{name: getattr(keys, name) for name in keys.model_fields_set})


def _crossed(kind: type, model: type[BaseModel], keys: dict[str, Any]) -> list[InputError]:
    """Return what the keys do not satisfy together, where only unknown ones among them are wrong."""
    try:
        _made(kind, model.model_validate({k: v for k, v in keys.items() if k in model.model_fields}))
    except ValidationError:
        return []
    except InputError as error:
        return [error]
    return []


def _no_such_kind(kind: object, table: Mapping[str, type[Any]], noun: str) -> str:
    known = ", ".join(f'"{k}"' for k in table)
    if kind is None:
        return f"the {noun} has no kind; add kind = with one of {known}"
    near: list[str] = []
    if isinstance(kind, str):
        closest = nearest_key(kind, table)
        near = [name for name in table if kind.lower() in name.split()] or ([closest] if closest else [])
    names = " or ".join(f'"{name}"' for name in near)
    mend = f"did you mean {names}?" if near else f"write one of {known}"
    return f"{shown(kind)} is not a kind of {noun}; {mend}"


def _field(name: str, hint: object) -> fields.Value:
    return Annotated[Any, PlainValidator(_reader(name, hint))]


def _reader(name: str, hint: object) -> fields.Reader:
    if get_origin(hint) is Annotated:
        note = get_args(hint)[1]
        if isinstance(note, Listed):
            return fields.list_of(note)
        return note.read if isinstance(note, (Measure, Number, Written)) else _NOTES[note]
    if get_origin(hint) is Literal:
        return fields.one_of(*get_args(hint))
    if hint is bool:
        return fields.true_or_false
    if hint is str:
        return fields.formula_text
    if hint is float:
        return fields.number(name, -_MOST, _MOST)
    raise TypeError(f"no reader for the field {name} of type {hint}; annotate it with a note that has one")


def _default(field: dataclasses.Field[Any], hint: object) -> fields.Value:
    if field.default is not dataclasses.MISSING:
        return Field(default=field.default)
    return Field(description=f"{field.name} = {_example(hint)}")


def _example(hint: object) -> str:
    """Return what may stand behind a key's equals sign."""
    if get_origin(hint) is Literal:
        return f'"{get_args(hint)[0]}"'
    note = get_args(hint)[1] if get_origin(hint) is Annotated else None
    if isinstance(note, Measure):
        return f'"{note.example}"'
    return note.example if isinstance(note, (Listed, Number, Written)) else "..."
