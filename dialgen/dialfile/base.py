"""What every table of the dial file has in common."""

from __future__ import annotations

from typing import Any, TypeVar

from pydantic import BaseModel, ConfigDict, ValidationError

from dialgen.errors import InputError, Key


class Table(BaseModel):
    """A table of the dial file: frozen, and no key that is not listed."""

    model_config = ConfigDict(extra="forbid", frozen=True, arbitrary_types_allowed=True)


AnyTable = TypeVar("AnyTable", bound=BaseModel)


class Nested(ValueError):  # noqa: N818  (it carries errors, it is not one more)
    """Faults found by a model inside a field that has no single model of its own."""

    def __init__(self, prefix: Key, error: ValidationError, model: type[BaseModel]) -> None:
        super().__init__(str(error))
        self.prefix = prefix
        self.error = error
        self.model = model


def checked(model: type[AnyTable], given: Any, *prefix: str | int) -> AnyTable:
    """Return ``given`` as a model.

    Raises:
        Nested: it is not one; the faults' places start with ``prefix``.
    """
    try:
        return model.model_validate(given)
    except ValidationError as error:
        raise Nested(prefix, error, model) from None


def at_item(index: int, error: ValueError) -> InputError:
    """Return a plain reader's error as one about the list item ``index``."""
    return InputError(str(error), (index,))
