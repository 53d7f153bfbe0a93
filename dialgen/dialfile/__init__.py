"""The dial file: read, validated, and its errors placed."""

from __future__ import annotations

from os import PathLike, fspath
from pathlib import Path

from pydantic import ValidationError

from dialgen.dialfile.faults import complaints, foreign_faults
from dialgen.dialfile.models import DialFile
from dialgen.dialfile.source import Source, read_text, read_toml

__all__ = ["DialFile", "Source", "parse", "read"]


def read(path: str | PathLike[str]) -> tuple[DialFile, Source]:
    """Return the dial file at ``path``, and its text for placing later errors.

    Raises:
        DialFileError: it cannot be read or is wrong; every fault found, each with its place.
    """
    name = fspath(path)
    file = Path(name)
    return parse(Source(name=name, folder=file.parent, text=read_text(file, name)))


def parse(source: Source) -> tuple[DialFile, Source]:
    """Return the dial file with the text of ``source``; raises as `read` does."""
    tables = read_toml(source)
    try:
        return DialFile.model_validate(tables, context={"folder": source.folder}), source
    except ValidationError as error:
        here = [source.fault(key, message) for key, message in complaints(error, DialFile)]
        raise source.refusal([*here, *foreign_faults(error)]) from None
