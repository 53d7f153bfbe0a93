"""Calibration readings and tables of points, in the dial file or in a CSV beside it."""

from __future__ import annotations

from collections.abc import Callable
from pathlib import Path
from typing import Annotated, Any, Self

from pydantic import PlainValidator, model_validator

from dialgen.dialfile import fields
from dialgen.dialfile.base import Table
from dialgen.dialfile.faults import complaints
from dialgen.dialfile.fields import Angle, AppliedA, AppliedV, FaceValue
from dialgen.dialfile.sheets import Cell, Sheet, read_sheet
from dialgen.errors import DialFileError, InputError

_APPLIED = ("current", "voltage", "value")
_SEEN = ("angle", "old")


class Reading(Table):
    """What was applied, and where the pointer stood."""

    current: AppliedA | None = None
    voltage: AppliedV | None = None
    value: FaceValue | None = None
    angle: Angle | None = None
    old: FaceValue | None = None
    direction: Annotated[str | None, PlainValidator(fields.one_of("up", "down"))] = None

    @model_validator(mode="after")
    def _one_of_each(self) -> Self:
        for names, what in ((_APPLIED, "what was applied"), (_SEEN, "where the pointer stood")):
            given = [name for name in names if getattr(self, name) is not None]
            if len(given) != 1:
                choice = " or ".join(names)
                raise InputError(f"a reading says {what} once, by {choice}; {_mend(given, names)}")
        return self


class ScaleReading(Reading):
    """A reading through a scale's own circuit: the applied quantity is a value on that scale."""

    @model_validator(mode="after")
    def _by_value(self) -> Self:
        if self.value is None:
            name = "current" if self.current is not None else "voltage"
            raise InputError(f"a scale's readings are values on it; write value instead of {name}", (name,))
        return self


def readings_file(model: type[Reading]) -> Callable[[object, Any], tuple[Reading, ...]]:
    """Return a reader of a CSV file's name that gives the readings in it."""

    def read(given: object, info: Any) -> tuple[Reading, ...]:
        name = fields.text(given)
        sheet = read_sheet(info.context["folder"] / name, name)
        _check_heads(sheet, (*_APPLIED, *_SEEN, "direction"))
        found, faults = [], []
        for row in sheet.rows:
            try:
                found.append(_reading(sheet, row, model))
            except DialFileError as error:
                faults += error.faults
        if faults:
            raise DialFileError(faults)
        if not found:
            raise sheet.fault(Cell("", 1, 1), "", "no readings below the column names; add a row for each")
        return tuple(found)

    return read


def table_from_file(given: dict[str, Any], folder: Path) -> dict[str, Any]:
    """Return a table law's keys with the points of its CSV file (columns value, signal) in them."""
    if "points" in given:
        raise InputError("a table's points stand in the file or in a CSV; keep one of the two", ("file",))
    try:
        name = fields.text(given["file"])
    except ValueError as error:
        raise InputError(str(error), ("file",)) from None
    sheet = read_sheet(folder / name, name)
    _check_heads(sheet, ("value", "signal"), needed=("value", "signal"))
    points = [[_number(sheet, row, "value"), _signal(sheet, row)] for row in sheet.rows]
    return {**{k: v for k, v in given.items() if k != "file"}, "points": points}


def _reading(sheet: Sheet, row: dict[str, Cell], model: type[Reading]) -> Reading:
    electrical = {name: row[name].text for name in ("current", "voltage") if name in row}
    numbers = {name: _number(sheet, row, name) for name in ("value", "angle", "old") if name in row}
    words = {"direction": row["direction"].text} if "direction" in row else {}
    first = next(iter(row.values()))
    try:
        return model.model_validate({**electrical, **numbers, **words})
    except ValueError as error:
        faults = []
        for key, message in complaints(error, model):
            name = str(key[0]) if key else ""
            faults += sheet.fault(row.get(name, first), name, message).faults
        raise DialFileError(faults) from None


def _number(sheet: Sheet, row: dict[str, Cell], name: str) -> float:
    cell = _cell(sheet, row, name)
    try:
        return float(cell.text.replace("\u2212", "-"))
    except ValueError:
        raise sheet.fault(
            cell, name, f"{cell.text!r} is not a bare number; write one, with a point"
        ) from None


def _signal(sheet: Sheet, row: dict[str, Cell]) -> float | str:
    cell = _cell(sheet, row, "signal")
    try:
        return float(cell.text.replace("\u2212", "-"))
    except ValueError:
        return cell.text


def _cell(sheet: Sheet, row: dict[str, Cell], name: str) -> Cell:
    if name not in row:
        first = next(iter(row.values()), Cell("", 1, 1))
        raise sheet.fault(first, name, f"the row has no {name}; fill it in or remove the row")
    return row[name]


def _check_heads(sheet: Sheet, known: tuple[str, ...], needed: tuple[str, ...] = ()) -> None:
    for name, cell in sheet.heads.items():
        if name not in known:
            raise sheet.fault(cell, name[:40], f"not a column here; the columns are {', '.join(known)}")
    for name in needed:
        if name not in sheet.heads:
            raise sheet.fault(next(iter(sheet.heads.values())), name, f"the column {name} is missing; add it")


def _mend(given: list[str], names: tuple[str, ...]) -> str:
    return f"leave out {' or '.join(given)}" if given else f"add {names[0]}"
