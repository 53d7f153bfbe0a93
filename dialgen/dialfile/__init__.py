"""The dial file: read, validated, and its errors placed."""

from __future__ import annotations

from dataclasses import replace
from os import PathLike, fspath
from pathlib import Path

from pydantic import ValidationError

from dialgen.dialfile.faults import complaints, foreign_faults
from dialgen.dialfile.models import DialFile
from dialgen.dialfile.readings import Reading
from dialgen.dialfile.source import Source, read_text, read_toml
from dialgen.errors import DialFileError, Fault, InputError, Key

__all__ = ["DialFile", "Source", "parse", "read"]


def read(path: str | PathLike[str]) -> tuple[DialFile, Source]:
    """Return the dial file at ``path``, and its text for placing later errors.

    Raises:
        DialFileError: it cannot be read or is wrong; every fault found, each with its place.
    """
    name = fspath(path)
    file = Path(name)
    try:
        text = read_text(file, name, "the dial file")
    except InputError as error:
        raise DialFileError([Fault(file=name, line=1, column=1, key="", message=error.message)]) from None
    return parse(Source(name=name, folder=file.parent, text=text))


def parse(source: Source) -> tuple[DialFile, Source]:
    """Return the dial file with the text of ``source``, and the source for placing later errors.

    Raises:
        DialFileError: as `read` does.
    """
    tables = read_toml(source)
    try:
        file = DialFile.model_validate(tables, context={"folder": source.folder})
    except ValidationError as error:
        here = [source.fault(key, message) for key, message in complaints(error, DialFile, DialFile)]
        raise source.refusal([*here, *foreign_faults(error)]) from None
    return file, replace(source, elsewhere=_rows(file))


def _rows(file: DialFile) -> dict[Key, tuple[str, int, int]]:
    """Return where the readings stand that come from a CSV."""
    owners: list[tuple[Key, tuple[Reading, ...]]] = [(("movement",), file.movement.readings)]
    owners += [(("scale", i), scale.readings) for i, scale in enumerate(file.scale)]
    return {
        (*owner, "readings", i): reading.place
        for owner, readings in owners
        for i, reading in enumerate(readings)
        if reading.place
    }
