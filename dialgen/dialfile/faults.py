"""From pydantic's complaints to ours: one plain line each, with the key and the mend."""

from __future__ import annotations

import difflib
from collections.abc import Iterator
from typing import Any, get_args

from pydantic import BaseModel, ValidationError

from dialgen.dialfile.base import Nested
from dialgen.errors import DialFileError, InputError, Key

Complaint = tuple[Key, str]


def complaints(error: ValueError, model: type[BaseModel]) -> Iterator[Complaint]:
    """Yield the key and message of everything that ``error`` complains of in a ``model``.

    Raises:
        ValueError: an error of a kind that no check of ours raises.
    """
    if not isinstance(error, ValidationError):
        raise error
    for item in error.errors(include_url=False, include_input=True):
        key: Key = tuple(item["loc"])
        cause = item.get("ctx", {}).get("error")
        if isinstance(cause, Nested):
            for inner, message in complaints(cause.error, cause.model):
                yield (*key, *cause.prefix, *inner), message
        elif isinstance(cause, InputError):
            yield (*key, *(cause.keys[0] if cause.keys else ())), cause.message
        elif isinstance(cause, DialFileError) or (item["type"] == "too_short" and item["input"]):
            # The one has places of its own; the other only says that no item of a list was right.
            continue
        elif cause is not None:
            yield key, str(cause)
        else:
            yield key, _message(item["type"], key, item["input"], item.get("ctx", {}), model)


def foreign_faults(error: ValidationError) -> list[Any]:
    """Return the faults in other files (CSV) that the error carries; they have places of their own."""
    found: list[Any] = []
    for item in error.errors(include_url=False, include_input=False):
        cause = item.get("ctx", {}).get("error")
        if isinstance(cause, DialFileError):
            found += cause.faults
        elif isinstance(cause, Nested):
            found += foreign_faults(cause.error)
    return found


def _message(kind: str, key: Key, given: Any, context: dict[str, Any], model: type[BaseModel]) -> str:
    if kind == "missing":
        return f"missing; add {_example(model, key)}"
    if kind == "extra_forbidden":
        return f"not a key here; {_suggestion(str(key[-1]), _known(model, key[:-1]))}"
    if kind in ("model_type", "model_attributes_type", "dict_type"):
        return f"this is a table, not {_short(given)}; write it with its own keys"
    if kind in ("tuple_type", "list_type"):
        double = f"[[{'.'.join(str(k) for k in key if isinstance(k, str))}]]"
        return f"this is a list of tables, not {_short(given)}; begin each with {double}"
    if kind == "too_short":
        return f"none given; add {_example(model, key)}"
    if kind == "too_long":
        return f"{context.get('actual_length')} given; at most {context.get('max_length')} are read"
    return f"{kind.replace('_', ' ')}: {_short(given)}; see the dial file's description"


def _suggestion(key: str, known: list[str]) -> str:
    close = difflib.get_close_matches(key, known, n=1, cutoff=0.5)
    if close:
        return f"did you mean {close[0]}?"
    return f"the keys are {', '.join(known)}"


def _example(model: type[BaseModel], key: Key) -> str:
    inside = _model_at(model, key[:-1])
    for name, field in inside.model_fields.items() if inside else ():
        if key[-1] in (name, field.alias):
            return field.description or f"{key[-1]} = ..."
    return f"{key[-1]} = ..."


def _known(model: type[BaseModel], key: Key) -> list[str]:
    inside = _model_at(model, key)
    return [field.alias or name for name, field in inside.model_fields.items()] if inside else []


def _model_at(model: type[BaseModel], key: Key) -> type[BaseModel] | None:
    """Return the model of the table at ``key``, list items skipped."""
    here: type[BaseModel] | None = model
    for part in key:
        if isinstance(part, int) or here is None:
            continue
        field = next((f for n, f in here.model_fields.items() if part in (n, f.alias)), None)
        here = _first_model(field.annotation) if field else None
    return here


def _first_model(annotation: Any) -> type[BaseModel] | None:
    if isinstance(annotation, type) and issubclass(annotation, BaseModel):
        return annotation
    return next((m for a in get_args(annotation) if (m := _first_model(a))), None)


def _short(given: Any) -> str:
    shown = repr(given)
    return shown if len(shown) <= 40 else shown[:37] + "..."
