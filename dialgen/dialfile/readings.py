"""Calibration readings and tables of points, in the dial file or in a CSV beside it."""

from __future__ import annotations

from collections.abc import Callable, Iterator
from pathlib import Path
from typing import Annotated, Any, TypeVar

from pydantic import PlainValidator, PrivateAttr, ValidationInfo

from dialgen.dialfile import fields
from dialgen.dialfile.base import Flaws, Table, checked, folder_of, needs
from dialgen.dialfile.faults import of_flaws
from dialgen.dialfile.fields import Angle, AppliedA, AppliedV, FaceValue
from dialgen.dialfile.sheets import Cell, Sheet, read_sheet
from dialgen.errors import DialFileError, Fault, InputError
from dialgen.quantity import bare_number, shown

MOST_READINGS = 500
_APPLIED = ("current", "voltage", "value")
_SEEN = ("angle", "old")

Item = TypeVar("Item")


class Reading(Table):
    """What was applied, and where the pointer stood."""

    current: AppliedA | None = None
    voltage: AppliedV | None = None
    value: FaceValue | None = None
    angle: Angle | None = None
    old: FaceValue | None = None
    direction: Annotated[str | None, PlainValidator(fields.one_of("up", "down"))] = None
    """Kept for telling friction from error; up and down are averaged alike so far."""
    _place: tuple[str, int, int] | None = PrivateAttr(default=None)

    @property
    def place(self) -> tuple[str, int, int] | None:
        """File, line and column, for a reading that stands in a CSV."""
        return self._place

    @needs(*_APPLIED)
    def _applied_once(self) -> Iterator[InputError]:
        yield from self._once(_APPLIED, "what was applied")

    @needs(*_SEEN)
    def _seen_once(self) -> Iterator[InputError]:
        yield from self._once(_SEEN, "where the pointer stood")

    def _once(self, names: tuple[str, ...], what: str) -> Iterator[InputError]:
        given = [name for name in names if getattr(self, name) is not None]
        if not given:
            yield InputError(f"the reading does not say {what}; add {' or '.join(names)}")
        for extra in given[1:]:
            yield InputError(f"{given[0]} already says {what}; leave out {extra}", (extra,))


class ScaleReading(Reading):
    """A reading through a scale's own circuit: the applied quantity is a value on that scale."""

    @needs(*_APPLIED)
    def _by_value(self) -> Iterator[InputError]:
        for name in ("current", "voltage"):
            if self.value is None and getattr(self, name) is not None:
                yield InputError(
                    f"a scale's readings are values on it; write value instead of {name}", (name,)
                )


def readings_file(model: type[Reading]) -> Callable[[object, ValidationInfo], tuple[Reading, ...]]:
    """Return a reader of a CSV file's name that gives the readings in it."""

    def read(given: object, info: ValidationInfo) -> tuple[Reading, ...]:
        sheet = read_sheet(folder_of(info) / fields.text(given), (*_APPLIED, *_SEEN, "direction"))
        found = _each_row(sheet, lambda row: _reading(sheet, row, model))
        if not found:
            raise sheet.fault(sheet.heads[0], "", "no readings below the column names; add a row for each")
        return tuple(found)

    return read


def points_from_file(given: object, folder: Path) -> tuple[list[list[Any]], Sheet]:
    """Return the points in a CSV file (columns value, signal) that ``given`` names, and the sheet.

    Raises:
        ValueError: it cannot be opened.
        DialFileError: what the file holds is wrong.
    """
    columns = ("value", "signal")
    sheet = read_sheet(folder / fields.text(given), columns, needed=columns)
    points = _each_row(sheet, lambda row: _point(sheet, row))
    if len(points) < 2:
        raise sheet.fault(sheet.heads[0], "", f"rows with points: {len(points)}; give at least two")
    values = [value for value, _ in points]
    for before, here, row in zip(values, values[1:], sheet.rows[1:], strict=False):
        if not here > before:
            raise sheet.fault(
                row["value"], "value", f"{here:g} follows {before:g}; put the rows in ascending order"
            )
    return points, sheet


def _each_row(sheet: Sheet, read: Callable[[dict[str, Cell]], Item]) -> list[Item]:
    found: list[Item] = []
    faults: list[Fault] = []
    for row in sheet.rows:
        try:
            found.append(read(row))
        except DialFileError as error:
            faults += error.faults
    if faults:
        raise DialFileError(faults)
    return found


def _reading(sheet: Sheet, row: dict[str, Cell], model: type[Reading]) -> Reading:
    first = _first(row)
    words: dict[str, object] = {
        name: row[name].text for name in ("current", "voltage", "direction") if name in row
    }
    numbers: dict[str, object] = {
        name: _number(sheet, row, name) for name in ("value", *_SEEN) if name in row
    }
    try:
        made = checked(model, words | numbers)
    except Flaws as flaws:
        faults: list[Fault] = []
        for key, message in of_flaws(flaws, model):
            name = str(key[0]) if key else ""
            faults += sheet.fault(row.get(name, first), name, message).faults
        raise DialFileError(faults) from None
    made._place = (sheet.name, first.line, first.column)
    return made


def _number(sheet: Sheet, row: dict[str, Cell], name: str) -> float:
    cell = _cell(sheet, row, name)
    number = bare_number(cell.text)
    if number is None:
        raise sheet.fault(cell, name, f"{shown(cell.text)} is not a bare number; write one, with a point")
    return number


def _point(sheet: Sheet, row: dict[str, Cell]) -> list[Any]:
    value, cell = _number(sheet, row, "value"), _cell(sheet, row, "signal")
    number = bare_number(cell.text)
    signal = cell.text if number is None else number
    for name, read, given in (("value", fields.face_value, value), ("signal", fields.signal, signal)):
        try:
            read(given)
        except ValueError as error:
            raise sheet.fault(row[name], name, str(error)) from None
    return [value, signal]


def _cell(sheet: Sheet, row: dict[str, Cell], name: str) -> Cell:
    if name not in row:
        raise sheet.fault(_first(row), name, "the row has none; fill it in or remove the row")
    return row[name]


def _first(row: dict[str, Cell]) -> Cell:
    return next(iter(row.values()), Cell(""))
