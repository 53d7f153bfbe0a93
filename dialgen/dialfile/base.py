"""What every table of the dial file has in common: its keys are known, and checked against each other.

Pydantic checks each key by itself.  What several keys of one table must satisfy together stands in
methods marked `needs`; they run even where other keys of the table are wrong, so that a person
sees everything at once, but never on a key that is wrong itself.
"""

from __future__ import annotations

import difflib
from collections.abc import Callable, Collection, Iterable, Iterator, Sequence
from functools import cache
from pathlib import Path
from types import FunctionType
from typing import Annotated, Any, Self, TypeAlias, TypeVar

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
_TELLING = 3
_OTHER_NAMES = {
    "type": "kind", "model": "kind", "center": "centre", "width": "size", "height": "size", "min": "from",
    "max": "to", "start": "from", "end": "to", "step": "every", "text": "say", "label": "say",
    "position": "at", "zero": "rest", "length": "pointer", "arc": "radius", "color": "colour",
}  # fmt: skip
MOST_GUESSED = 200
"""Of how many unknown keys in one table it is guessed what they were meant to be."""

Item = TypeVar("Item")
Check = TypeVar("Check", bound=Callable[[Any], Iterator[InputError]])


class Flaws(ValueError):
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

    def under(self, *prefix: str | int) -> Flaws:
        """Return these flaws with every place below ``prefix``."""
        self.prefix = (*prefix, *self.prefix)
        return self


class Several(ValueError):
    """Everything wrong with the items of a list, each with its place."""

    def __init__(self, errors: Sequence[Placed]) -> None:
        super().__init__("\n".join(str(error) for error in errors))
        self.errors = tuple(errors)

    def under(self, *prefix: str | int) -> Several:
        """Return these errors with every place below ``prefix``."""
        return Several([error.under(*prefix) for error in self.errors])


Placed: TypeAlias = InputError | Flaws | Several
"""An error that knows which part of a value is wrong."""


def needs(*names: str) -> Callable[[Check], Check]:
    """Mark a method that yields what is wrong between the fields ``names``; it runs if each is sound."""

    def mark(check: Check) -> Check:
        check.needs = frozenset(names)  # type: ignore[attr-defined]
        return check

    return mark


class Table(BaseModel):
    """A table of the dial file: frozen, no key that is not listed, checked across its keys."""

    model_config = ConfigDict(
        extra="forbid",
        frozen=True,
        arbitrary_types_allowed=True,
        # Only the whole file and the tables a file uses are ever built: half the start-up.
        defer_build=True,
    )

    @model_validator(mode="wrap")
    @classmethod
    def _whole(cls, given: object, handler: ModelWrapValidatorHandler[Self], info: ValidationInfo) -> Self:
        wrong: ValidationError | None = None
        unsound: set[str] = set()
        try:
            made = handler(given)
        except ValidationError as error:
            if not (isinstance(given, dict) and _checks(cls)):
                raise
            wrong, unsound = error, set(_unsound(cls, error))
            made = _sound_part(cls, given, unsound, info.context)
        crossed = [e for check in _checks(cls) if not check.needs & unsound for e in check(made)]
        if wrong or crossed:
            raise Flaws(cls, wrong, crossed)
        return made


AnyTable = TypeVar("AnyTable", bound=BaseModel)


def checked(model: type[AnyTable], given: object, context: object = None) -> AnyTable:
    """Return ``given`` as a model; ``context`` is for its readers.

    Raises:
        Flaws: it is not one.
    """
    try:
        return model.model_validate(given, context=context)
    except ValidationError as error:
        raise Flaws(model, error) from None


def placed(error: ValueError, part: str | int) -> Placed:
    """Return an error about a value as one about the ``part`` of a larger one."""
    if isinstance(error, (InputError, Flaws, Several)):
        return error.under(part)
    return InputError(str(error), (part,))


def each(items: Sequence[object], read: Callable[[Any], Item]) -> tuple[Item, ...]:
    """Return every list item as ``read`` gives it.

    Raises:
        Several: with what is wrong of every item that is.
    """
    found: list[Item] = []
    errors: list[Placed] = []
    for i, item in enumerate(items):
        try:
            found.append(read(item))
        except ValueError as error:
            errors.append(placed(error, i))
    if errors:
        raise Several(errors)
    return tuple(found)


def folder_of(info: ValidationInfo) -> Path:
    """Return the folder of the dial file that is being read, where its CSV files lie."""
    folder = (info.context or {}).get("folder", Path())
    return Path(folder)


def nearest_key(key: str, known: Iterable[str]) -> str | None:
    """Return the known key that ``key`` was most likely meant to be, or None.

    >>> nearest_key("radios", ["radius", "line"]), nearest_key("type", ["kind", "range"])
    ('radius', 'kind')
    """
    known = list(known)
    if (same := same_key(key, known)) or (same := _begun(key, known)):
        return same
    close = difflib.get_close_matches(key[:_LONGEST_KEY].lower(), known, n=1, cutoff=0.6)
    return close[0] if close else None


def same_key(key: str, known: Collection[str]) -> str | None:
    """Return the known key that goes by the name ``key`` elsewhere, or None."""
    name = _OTHER_NAMES.get(key.lower())
    return name if name in known else None


def _begun(key: str, known: Iterable[str]) -> str | None:
    return next((name for name in known if name.startswith(key) and len(key) >= _TELLING), None)


def keys_of(model: type[BaseModel]) -> dict[str, str]:
    """Return a table's keys as they are written in the file, each with the name of its field."""
    return {field.alias or name: name for name, field in model.model_fields.items()}


@cache
def _checks(table: type[Table]) -> tuple[Any, ...]:
    named = {name: value for part in reversed(table.__mro__) for name, value in vars(part).items()}
    # Plain functions alone: asking pydantic's own attributes would build a validator for every table.
    return tuple(v for v in named.values() if isinstance(v, FunctionType) and hasattr(v, "needs"))


def _unsound(table: type[Table], error: ValidationError) -> Iterator[str]:
    """Yield the fields that are wrong, and those that a misspelt key was meant for."""
    keys = keys_of(table)
    items = error.errors(include_url=False, include_input=False, include_context=False)
    found = [str(item["loc"][0]) for item in items if item["loc"]]
    yield from (keys[key] for key in found if key in keys)
    unknown = [key for key in found if key not in keys]
    yield from (keys[near] for key in unknown[:MOST_GUESSED] if (near := nearest_key(key, keys)))


def _sound_part(table: type[AnyTable], given: dict[str, Any], unsound: set[str], context: object) -> AnyTable:
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
    note: Any = Annotated[field.annotation, *field.metadata, "one field"]
    return TypeAdapter(note)
