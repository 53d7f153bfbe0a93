"""The one tree of errors.

    DialgenError                    anything dialgen refuses
    +-- InputError (ValueError)     what the user gave is wrong; carries the keys it concerns
    |   +-- NoSuchValue             a value that no angle stands for, or an angle no value
    |   +-- FormulaError            a formula that cannot be read; carries its column
    |   +-- CharacterError          a character that no font has
    +-- Refused (ValueError)        several InputErrors found together
    +-- DialFileError (ValueError)  a file with one or more faults, each with its place
    +-- OutputError (OSError)       a file that cannot be written
    +-- MissingExtra (ImportError)  an optional part that is not installed

A message says what is wrong, then after a semicolon what would be right.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

Key = tuple[str | int, ...]
"""A path into a dial file, such as ``("scale", 0, "to")``; list items count from 0."""


class DialgenError(Exception):
    """The base of every error that dialgen raises on purpose."""


class InputError(DialgenError, ValueError):
    """Something the user gave is wrong.

    Args:
        message: what is wrong; what would be right.
        keys: the key paths it concerns, the one to change first at the front.
    """

    def __init__(self, message: str, *keys: Key) -> None:
        super().__init__(message)
        self.message = message
        self.keys = keys

    def under(self, *prefix: str | int) -> InputError:
        """Put every key under ``prefix``, in place, for the caller that knows where; return this error."""
        self.keys = tuple((*prefix, *key) for key in self.keys) or (prefix,)
        return self


class NoSuchValue(InputError):
    """A value outside what the chain can show, or an angle that no value stands at."""


class FormulaError(InputError):
    """A formula that cannot be read; ``column`` counts from 1 within the formula."""

    def __init__(self, message: str, column: int, *keys: Key) -> None:
        super().__init__(f"{message} (column {column} of the formula)", *keys)
        self.column = column


class CharacterError(InputError):
    """A character that none of the fonts has."""

    def __init__(self, character: str, text: str) -> None:
        super().__init__(
            f"no font has the character {character!r} (U+{ord(character):04X}) in {text!r}; "
            "leave it out or write it another way"
        )
        self.character = character


class Refused(DialgenError, ValueError):
    """Several things wrong, found together."""

    def __init__(self, errors: Sequence[InputError]) -> None:
        super().__init__("\n".join(str(error) for error in errors))
        self.errors = tuple(errors)


@dataclass(frozen=True, slots=True)
class Remark:
    """Something worth knowing that is not wrong: printed as a warning.

    Args:
        message: what is so, and what would mend it.
        key: the key it concerns.
        place: where it is on the plate, in millimetres from the pivot, if it is in one place.
        check: the check of the finished face that found it, if one did.
    """

    message: str
    key: Key = ()
    place: tuple[float, float] | None = None
    check: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Fault:
    """One thing wrong in one place of one file; lines and columns count from 1, in characters."""

    file: str
    line: int
    column: int
    key: str
    message: str

    def __str__(self) -> str:
        where = f"{self.file}:{self.line}:{self.column}: "
        return where + (f"{self.key}: {self.message}" if self.key else self.message)


@dataclass(frozen=True, slots=True, kw_only=True)
class Finding(Fault):
    """What a check of the finished face found: its name, and the place on the plate as in `Remark`."""

    check: str
    place: tuple[float, float] | None = None


class DialFileError(DialgenError, ValueError):
    """A dial file that cannot be used, with every fault found, in file order."""

    def __init__(self, faults: Sequence[Fault]) -> None:
        super().__init__("\n".join(str(fault) for fault in faults))
        self.faults = tuple(faults)


class OutputError(DialgenError, OSError):
    """A file that cannot be written."""


class MissingExtra(DialgenError, ImportError):
    """An optional part that is not installed; the message says how to install it."""
