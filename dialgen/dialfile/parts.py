"""What the maker has: the drawer, the spools, and how parts are judged."""

from __future__ import annotations

from collections.abc import Mapping
from typing import Annotated

from pydantic import PlainValidator, ValidationError

from dialgen.dialfile import fields
from dialgen.dialfile.base import Table
from dialgen.errors import InputError
from dialgen.parts.bench import DRIFTS, MARGINS, OVERLOAD, OVERLOADS, TOLERANCES, Bench
from dialgen.parts.preferred import SERIES
from dialgen.parts.ratings import MARGIN, USUAL_RATINGS_V
from dialgen.parts.stock.drawer import Lot, read_stock
from dialgen.parts.wire.spool import Wire, read_wire
from dialgen.quantity import VOLT_ABOVE, Listed

_STOCK = Listed(read_stock, 1, 200, '["3.3 ohm x12", "10 ohm x5"]')
_WIRE = Listed(read_wire, 1, 12, '["manganin 0.5 mm", "constantan AWG 24"]')


def _volts(given: object) -> float:
    return VOLT_ABOVE.read(given).value


class Parts(Table):
    """The maker's drawer; all of it has a default, and nothing of it moves a mark."""

    stock: Annotated[
        tuple[Lot, ...],
        PlainValidator(fields.list_of(_STOCK)),
    ] = ()
    wire: Annotated[
        tuple[Wire, ...],
        PlainValidator(fields.list_of(_WIRE)),
    ] = ()
    series: Annotated[str | None, PlainValidator(fields.one_of(*SERIES))] = None
    """The E series that parts are bought in; None shows all."""
    tolerance: Annotated[float | None, PlainValidator(TOLERANCES.read)] = None
    """Percent, of every part; None takes each series' own."""
    margin: Annotated[float, PlainValidator(MARGINS.read)] = MARGIN
    """How many times its dissipation a resistor is rated for."""
    overload: Annotated[float, PlainValidator(OVERLOADS.read)] = OVERLOAD
    """Times full scale."""
    drift: Annotated[float | None, PlainValidator(DRIFTS.read)] = None
    """The largest wanted, in percent for a kelvin, for the swamping resistor."""
    voltage: Annotated[float, PlainValidator(_volts)] = min(USUAL_RATINGS_V.values())
    """What one resistor stands."""

    def bench(self) -> Bench:
        """Return it as the bench asks for it."""
        return Bench(
            tolerance_percent=self.tolerance,
            margin=self.margin,
            overload=self.overload,
            series=self.series,
            drift_wanted_percent_per_k=self.drift,
            lots=self.stock,
            wires=self.wire,
            voltage_v=self.voltage,
        )


def bench_of(parts: Parts | None, instead: Mapping[str, object]) -> Bench:
    """Return the bench of a file, with some of its keys said instead.

    Args:
        parts: the file's table, if it has one.
        instead: keys as they would stand in the table, with their values.

    Raises:
        InputError: one of ``instead`` is wrong, with the key in front.
    """
    try:
        said = Parts.model_validate(dict(instead))
    except ValidationError as error:
        raise InputError(_told(error)) from None
    changed = {name: getattr(said, name) for name in instead}
    return (parts or Parts()).model_copy(update=changed).bench()


def _told(error: ValidationError) -> str:
    first = error.errors(include_url=False)[0]
    cause = first.get("ctx", {}).get("error")
    return f"{first['loc'][0]}: {cause or first['msg']}"
