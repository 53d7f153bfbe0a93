"""From pydantic's complaints to ours: one plain line each, with the key and the mend."""

from __future__ import annotations

import dataclasses
from collections.abc import Iterator
from functools import cache
from typing import Any, get_args

from pydantic import BaseModel, ValidationError
from pydantic_core import ErrorDetails

from dialgen.circuit.kinds import CIRCUITS
from dialgen.dialfile.base import MOST_GUESSED, Flaws, Several, keys_of, nearest_key, same_key
from dialgen.errors import DialFileError, Fault, InputError, Key
from dialgen.geometry.kinds import LAWS
from dialgen.quantity import shown

Complaint = tuple[Key, str]


def complaints(error: ValueError, model: type[BaseModel], root: type[BaseModel]) -> Iterator[Complaint]:
    """Yield the key and message of everything that ``error`` complains of in a ``model``.

    Args:
        error: what pydantic raised.
        model: the table it was raised for.
        root: the whole file's table, for saying where a misplaced key belongs.

    Raises:
        ValueError: an error of a kind that no check of ours raises.
    """
    if not isinstance(error, ValidationError):
        raise error
    items = error.errors(include_url=False, include_input=True)
    meant = _meant(items, model, root)
    for item in items:
        key, kind = tuple(item["loc"]), item["type"]
        cause = item.get("ctx", {}).get("error")
        if cause is not None:
            for inner, message in _of_cause(cause, root):
                yield (*key, *inner), message
        elif kind == "extra_forbidden":
            yield key, f"not a key here; {_suggestion(key, meant.get(key), model, root)}"
        elif kind == "missing" and key in meant.values():
            # The misspelt key says it already.
            continue
        elif not (kind == "too_short" and item["input"]):
            # A list that is too short but not empty only says that no item of it was right.
            yield key, _message(kind, key, item["input"], item.get("ctx", {}), model)


def foreign_faults(error: ValidationError) -> Iterator[Fault]:
    """Yield the faults in other files (CSV) that the error carries; they have places of their own."""
    for item in error.errors(include_url=False, include_input=False):
        cause = item.get("ctx", {}).get("error")
        if isinstance(cause, DialFileError):
            yield from cause.faults
        elif isinstance(cause, Flaws) and cause.wrong:
            yield from foreign_faults(cause.wrong)


def of_flaws(flaws: Flaws, root: type[BaseModel]) -> Iterator[Complaint]:
    """Yield the key and message of everything wrong with one table; see `complaints`."""
    at = flaws.prefix
    if flaws.wrong:
        for key, message in complaints(flaws.wrong, flaws.model, root):
            yield (*at, *key), message
    for error in flaws.crossed:
        for key, message in _of_cause(error, root):
            yield (*at, *key), message


def _of_cause(cause: ValueError, root: type[BaseModel]) -> Iterator[Complaint]:
    """Yield the key and message of everything that a reader complains of, but for faults in other files."""
    match cause:
        case Several():
            for error in cause.errors:
                yield from _of_cause(error, root)
        case Flaws():
            yield from of_flaws(cause, root)
        case InputError():
            yield cause.keys[0] if cause.keys else (), cause.message
        case DialFileError():
            return
        case _:
            yield (), str(cause)


def _meant(items: list[ErrorDetails], model: type[BaseModel], root: type[BaseModel]) -> dict[Key, Key]:
    """Return for each unknown key the known one beside it that was most likely meant."""
    unknown = [tuple(item["loc"]) for item in items if item["type"] == "extra_forbidden"]
    found: dict[Key, Key] = {}
    for key in unknown[:MOST_GUESSED]:
        name, known = str(key[-1]), _known(model, key[:-1])
        near = same_key(name, known) if name in _homes(root) else nearest_key(name, known)
        if near is not None:
            found[key] = (*key[:-1], near)
    return found


def _message(kind: str, key: Key, given: object, context: dict[str, Any], model: type[BaseModel]) -> str:
    if kind == "missing":
        return f"missing; add {_example(model, key)}"
    if kind in ("model_type", "model_attributes_type", "dict_type"):
        return f"this is a table of keys, not {shown(given)}; write its keys below [...], or in braces"
    if kind in ("tuple_type", "list_type"):
        mend = f"begin each with [[{key[-1]}]]" if key[-1] in ("scale", "text") else "write [{ ... }]"
        return f"there may be several of these, in a list, and this is {shown(given)}; {mend}"
    if kind == "too_short":
        return f"none given; add {_example(model, key)}"
    if kind == "too_long":
        return f"{context.get('actual_length')} given; at most {context.get('max_length')} are read"
    return f"{kind.replace('_', ' ')}: {shown(given)}; see the description of the dial file"


def _suggestion(key: Key, meant: Key | None, model: type[BaseModel], root: type[BaseModel]) -> str:
    if meant is not None:
        return f"did you mean {meant[-1]}?"
    if kinds := _kinds_with(key[-1], model):
        return f"it goes with kind = {' or '.join(kinds)}"
    if homes := _homes(root).get(str(key[-1])):
        return f"it belongs in {' or '.join(homes)}"
    known = _known(model, key[:-1])
    return f"the keys are {', '.join(known)}" if known else "it has no keys; leave this one out"


def _kinds_with(name: object, model: type[BaseModel]) -> list[str]:
    """Return the kinds of circuit or law that have a key, where another kind of the same was given it."""
    for table in (CIRCUITS, LAWS):
        # The model of a kind bears the name of its class, see `dialgen.dialfile.kinds`.
        if model.__name__ in {kind.__name__ for kind in table.values()}:
            return [f'"{word}"' for word, kind in table.items() if name in _field_names(kind)]
    return []


def _field_names(kind: type) -> set[str]:
    return {field.name for field in dataclasses.fields(kind)}


@cache
def _homes(root: type[BaseModel]) -> dict[str, list[str]]:
    """Return the tables of the file that have each key."""
    found: dict[str, list[str]] = {}
    for kind in CIRCUITS.values():
        found.update({field.name: ["[circuit]"] for field in dataclasses.fields(kind)})
    for name, field in root.model_fields.items():
        table = _first_model(field.annotation)
        brackets = ("[[", "]]") if "tuple" in str(field.annotation) else ("[", "]")
        for key in keys_of(table) if table else ():
            found.setdefault(key, []).append(name.join(brackets))
    return found


def _example(model: type[BaseModel], key: Key) -> str:
    inside = _model_at(model, key[:-1])
    fields = {field.alias or name: field for name, field in inside.model_fields.items()} if inside else {}
    field = fields.get(str(key[-1]))
    return field.description if field and field.description else f"{key[-1]} = ..."


def _known(model: type[BaseModel], key: Key) -> list[str]:
    inside = _model_at(model, key)
    return list(keys_of(inside)) if inside else []


def _model_at(model: type[BaseModel], key: Key) -> type[BaseModel] | None:
    """Return the model of the table at ``key``, list items skipped."""
    here: type[BaseModel] | None = model
    for part in key:
        if isinstance(part, int) or here is None:
            continue
        field = next((f for n, f in here.model_fields.items() if part in (n, f.alias)), None)
        here = _first_model(field.annotation) if field else None
    return here


def _first_model(annotation: object) -> type[BaseModel] | None:
    if isinstance(annotation, type) and issubclass(annotation, BaseModel):
        return annotation
    return next((m for a in get_args(annotation) if (m := _first_model(a))), None)
