"""A dial file as text: reading it safely, and saying where in it something is wrong."""

from __future__ import annotations

import json
import re
import tomllib
from collections.abc import Iterable, Mapping
from dataclasses import dataclass, field
from functools import cached_property
from pathlib import Path
from typing import Any

from dialgen.dialfile.places import key_places, nearest
from dialgen.dialfile.syntax import plain_words
from dialgen.errors import DialFileError, Fault, InputError, Key

LARGEST_BYTES = 128 * 1024
_LONGEST_KEY = 80
_WORD = r"""(?:[\w-]++|"[^"\n]*+"|'[^'\n]*+')"""
# tomllib takes a time that grows with the square of a dotted key's parts.
_MANY_PARTS = 20
_DEEP_KEY = re.compile(rf"""(?<![\w"'.-])(?:{_WORD}[ \t]*+\.[ \t]*+){{{_MANY_PARTS}}}""")
_BARE_KEY = re.compile("[A-Za-z0-9_-]+")
_LONG_NUMBER = re.compile("[0-9_]{4000}")


@dataclass(frozen=True)
class Source:
    """The text of a dial file, under the name the user gave it.

    ``elsewhere`` tells file, line and column of keys that stand in another file, such as the
    readings of a CSV.
    """

    name: str
    folder: Path
    text: str
    elsewhere: Mapping[Key, tuple[str, int, int]] = field(default_factory=dict)

    @cached_property
    def _places(self) -> dict[Key, tuple[int, int]]:
        return key_places(self.text)

    def fault(self, key: Key, message: str) -> Fault:
        """Return a fault at the place of ``key``, or of the nearest table around it."""
        file, line, column = self.elsewhere.get(key) or (self.name, *nearest(self._places, key))
        return Fault(file=file, line=line, column=column, key=shown_key(key), message=message)

    def fault_of(self, error: InputError) -> Fault:
        """Return the fault that an error from below stands for; its first key is the one to change."""
        return self.fault(error.keys[0] if error.keys else (), error.message)

    def refusal(self, faults: Iterable[Fault]) -> DialFileError:
        """Return the error for several faults, in file order, each once."""
        unique = dict.fromkeys(faults)
        return DialFileError(sorted(unique, key=lambda f: (f.file != self.name, f.file, f.line, f.column)))


def shown_key(key: Key) -> str:
    """Return a key path as it is shown: list items count from 1.

    >>> shown_key(("scale", 0, "to"))
    'scale[1].to'
    """
    text = ""
    for part in key:
        if isinstance(part, int):
            text += f"[{part + 1}]"
        else:
            name = part if _BARE_KEY.fullmatch(part) else json.dumps(part, ensure_ascii=False)
            text += f".{name}" if text else name
    return text if len(text) <= _LONGEST_KEY else text[: _LONGEST_KEY - 3] + "..."


def read_text(path: Path, name: str, what: str) -> str:
    """Return the text of a small UTF-8 file, with plain line ends.

    Args:
        path: where it is.
        name: the file's name in a fault.
        what: the file in a sentence.

    Raises:
        InputError: it cannot be opened.
        DialFileError: it is too large, or not UTF-8.
    """
    try:
        with path.open("rb") as file:
            raw = file.read(LARGEST_BYTES + 1)
    except (OSError, ValueError) as error:
        reason = error.strerror if isinstance(error, OSError) and error.strerror else "not a file name"
        raise InputError(f"cannot read {what}: {reason.lower()}; give the name of a file") from None
    if len(raw) > LARGEST_BYTES:
        raise _at(name, 1, 1, f"over {LARGEST_BYTES // 1024} kB; give a smaller file")
    raw = raw.removeprefix(b"\xef\xbb\xbf")
    try:
        return raw.decode().replace("\r\n", "\n")
    except UnicodeDecodeError as error:
        before = raw[: error.start].decode()
        line, column = before.count("\n") + 1, len(before) - before.rfind("\n")
        raise _at(name, line, column, "not UTF-8 text; save the file as UTF-8") from None


def read_toml(source: Source) -> dict[str, Any]:
    """Return the tables of a dial file.

    Raises:
        DialFileError: it is not TOML, or so deep or long that it would not be read in good time.
    """
    many_dots = any(line.count(".") >= _MANY_PARTS for line in source.text.split("\n"))
    for suspect, pattern, message in (
        (many_dots, _DEEP_KEY, "a key of very many parts; write it flatter"),
        (True, _LONG_NUMBER, "a number with too many digits; write it shorter"),
    ):
        if suspect and (found := pattern.search(source.text)):
            before = source.text[: found.start()]
            raise _at(source.name, before.count("\n") + 1, len(before) - before.rfind("\n"), message)
    try:
        return tomllib.loads(source.text)
    except tomllib.TOMLDecodeError as error:
        raise _at(source.name, *plain_words(str(error), source.text)) from None
    except RecursionError:
        raise _at(source.name, 1, 1, "not a dial file: nested too deeply; write it flatter") from None
    except ValueError as error:
        raise _at(source.name, 1, 1, f"not TOML: {error}; mend that value") from None


def _at(file: str, line: int, column: int, message: str) -> DialFileError:
    return DialFileError([Fault(file=file, line=line, column=column, key="", message=message)])
