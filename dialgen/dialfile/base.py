"""What every table of the dial file has in common: its keys are known, and checked against each other.

Pydantic checks each key by itself.  What several keys of one table must satisfy together stands in
methods marked `needs`; they run even where other keys of the table are wrong, so that a person
sees everything at once, but never on a key that is wrong itself.
"""

from __future__ import annotations

import difflib
from collections.abc import Callable, Iterable, Iterator, Sequence
from functools import cache
from typing import Annotated, Any, Self, TypeVar

from pydantic import (
    BaseModel,
    ConfigDict,
    ModelWrapValidatorHandler,
    TypeAdapter,
    ValidationError,
    ValidationInfo,
    model_validator,
)

from dialgen.errors import InputError, Key

_LONGEST_KEY = 40

Check = TypeVar("Check", bound=Callable[[Any], Iterator[InputError]])


class Flaws(ValueError):  # noqa: N818  (it carries errors, it is not one more)
    """Everything wrong with one table.

    Args:
        model: what the table should have been.
        wrong: pydantic's complaints about its keys, if any.
        crossed: what its keys do not satisfy together, with keys relative to the table.
        prefix: the table's own place below the field that holds it.
    """

    def __init__(
        self,
        model: type[BaseModel],
        wrong: ValidationError | None,
        crossed: Sequence[InputError] = (),
        prefix: Key = (),
    ) -> None:
        super().__init__(f"{model.__name__} has flaws")
        self.model = model
        self.wrong = wrong
        self.crossed = tuple(crossed)
        self.prefix = prefix


def needs(*names: str) -> Callable[[Check], Check]:
    """Mark a method that yields what is wrong between the fields ``names``; it runs if each is sound."""

    def mark(check: Check) -> Check:
        check.needs = frozenset(names)  # type: ignore[attr-defined]
        return check

    return mark


class Table(BaseModel):
    """A table of the dial file: frozen, no key that is not listed, checked across its keys."""

    model_config = ConfigDict(extra="forbid", frozen=True, arbitrary_types_allowed=True)

    @model_validator(mode="wrap")
    @classmethod
    def _whole(cls, given: Any, handler: ModelWrapValidatorHandler[Self], info: ValidationInfo) -> Self:
        wrong: ValidationError | None = None
        unsound: set[str] = set()
        try:
            made = handler(given)
        except ValidationError as error:
            if not isinstance(given, dict):
                raise
            wrong, unsound = error, set(_unsound(cls, error))
            made = _sound_part(cls, given, unsound, info.context)
        crossed = [e for check in _checks(cls) if not check.needs & unsound for e in check(made)]
        if wrong or crossed:
            raise Flaws(cls, wrong, crossed)
        return made


AnyTable = TypeVar("AnyTable", bound=BaseModel)


def checked(model: type[AnyTable], given: Any, *prefix: str | int) -> AnyTable:
    """Return ``given`` as a model.

    Raises:
        Flaws: it is not one; the faults' places start with ``prefix``.
    """
    try:
        return model.model_validate(given)
    except ValidationError as error:
        raise Flaws(model, error, prefix=prefix) from None


def at_item(index: int, error: ValueError) -> InputError:
    """Return an error about a single value as one about the list item ``index``."""
    return error.under(index) if isinstance(error, InputError) else InputError(str(error), (index,))


def nearest_key(key: object, known: Iterable[str]) -> str | None:
    """Return the known key that ``key`` was most likely meant to be, or None.

    >>> nearest_key("radios", ["radius", "line"])
    'radius'
    """
    close = difflib.get_close_matches(str(key)[:_LONGEST_KEY].lower(), known, n=1, cutoff=0.6)
    return close[0] if close else None


def keys_of(model: type[BaseModel]) -> dict[str, str]:
    """Return a table's keys as they are written in the file, each with the name of its field."""
    return {field.alias or name: name for name, field in model.model_fields.items()}


@cache
def _checks(table: type[Table]) -> tuple[Any, ...]:
    named = {name: value for part in reversed(table.__mro__) for name, value in vars(part).items()}
    return tuple(value for value in named.values() if hasattr(value, "needs"))


def _unsound(table: type[Table], error: ValidationError) -> Iterator[str]:
    """Yield the fields that are wrong, and those that a misspelt key was meant for."""
    keys = keys_of(table)
    for item in error.errors(include_url=False, include_input=False, include_context=False):
        key = item["loc"][0] if item["loc"] else ""
        near = key if key in keys else nearest_key(key, keys)
        if near is not None:
            yield keys[str(near)]


def _sound_part(table: type[AnyTable], given: dict[str, Any], unsound: set[str], context: Any) -> AnyTable:
    """Return the table without its unsound fields; these are not there at all."""
    found = {}
    for key, name in keys_of(table).items():
        if name not in unsound:
            reader = _reader(table, name)
            found[name] = (
                reader.validate_python(given[key], context=context)
                if key in given
                else table.model_fields[name].default
            )
    return table.model_construct(**found)


@cache
def _reader(table: type[BaseModel], name: str) -> TypeAdapter[Any]:
    field = table.model_fields[name]
    return TypeAdapter(Annotated[field.annotation, *field.metadata, "one field"])
