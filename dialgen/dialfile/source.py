"""A dial file as text: reading it safely, and saying where in it something is wrong."""

from __future__ import annotations

import tomllib
from collections.abc import Iterable
from dataclasses import dataclass
from functools import cached_property
from pathlib import Path
from typing import Any

from dialgen.dialfile.places import Place, key_places, nearest
from dialgen.errors import DialFileError, Fault, InputError, Key

LARGEST_BYTES = 256 * 1024


@dataclass(frozen=True)
class Source:
    """The text of a dial file, under the name the user gave it."""

    name: str
    folder: Path
    text: str

    @cached_property
    def _places(self) -> dict[Key, Place]:
        return key_places(self.text)

    def fault(self, key: Key, message: str) -> Fault:
        """Return a fault at the place of ``key``, or of the nearest table around it."""
        line, column = nearest(self._places, key)
        return Fault(file=self.name, line=line, column=column, key=shown_key(key), message=message)

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
        text += f"[{part + 1}]" if isinstance(part, int) else f".{part}" if text else part
    return text if len(text) <= 80 else text[:77] + "..."


def read_text(path: Path, shown: str) -> str:
    """Return the text of a small UTF-8 file, with plain line ends.

    Raises:
        DialFileError: it cannot be opened, is too large, or is not UTF-8.
    """
    try:
        with path.open("rb") as file:
            raw = file.read(LARGEST_BYTES + 1)
    except (OSError, ValueError) as error:
        reason = error.strerror if isinstance(error, OSError) and error.strerror else "not a file name"
        raise _whole_file(shown, f"cannot be read: {reason}; give the path of a file") from None
    if len(raw) > LARGEST_BYTES:
        raise _whole_file(shown, f"over {LARGEST_BYTES // 1024} kB; give a smaller file")
    try:
        return raw.decode("utf-8-sig").replace("\r\n", "\n")
    except UnicodeDecodeError as error:
        before = raw[: error.start].decode("utf-8-sig", errors="replace")
        line, column = before.count("\n") + 1, len(before) - before.rfind("\n")
        message = "not UTF-8 text; save the file as UTF-8"
        raise DialFileError([Fault(file=shown, line=line, column=column, key="", message=message)]) from None


def read_toml(source: Source) -> dict[str, Any]:
    """Return the tables of a dial file.

    Raises:
        DialFileError: it is not TOML.
    """
    try:
        return tomllib.loads(source.text)
    except tomllib.TOMLDecodeError as error:
        line, column, what = _toml_place(str(error), source.text)
        message = f"not TOML: {what}; mend the line, or quote the text"
    except RecursionError:
        line, column, message = 1, 1, "not a dial file: nested too deeply; write it flatter"
    except ValueError:
        line, column, message = 1, 1, "a number with too many digits; write it shorter"
    raise DialFileError([Fault(file=source.name, line=line, column=column, key="", message=message)])


def _toml_place(message: str, text: str) -> tuple[int, int, str]:
    # tomllib tells the place in words only: "... (at line 3, column 5)" or "(at end of document)".
    what, _, at = message.partition(" (at ")
    words = at.rstrip(")").replace(",", "").split()
    if words[:1] == ["line"]:
        return int(words[1]), int(words[3]), _small(what)
    lines = text.rstrip("\n").split("\n")
    return len(lines), len(lines[-1]) + 1, _small(what) + " at the end of the file"


def _small(what: str) -> str:
    return what[:1].lower() + what[1:120]


def _whole_file(shown: str, message: str) -> DialFileError:
    return DialFileError([Fault(file=shown, line=1, column=1, key="", message=message)])
