"""How a key is written that is no plain quantity: the notes of annotated fields.

Beside `Measure` these say what a dial file may hold at a key of a law or circuit; its check is
built from them.  A note keeps what reading needs, so that the check knows nothing of any law or circuit.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from typing import Any

from dialgen.quantity.reading import read_number


@dataclass(frozen=True, slots=True)
class Written:
    """Something that one reader takes whole; it raises ValueError with what is wrong and the mend.

    ``example`` is shown where the key is missing, as it stands in a dial file behind the equals sign.
    """

    read: Callable[[Any], Any]
    example: str


@dataclass(frozen=True, slots=True)
class Number:
    """A bare number from ``least`` to ``most``."""

    name: str
    least: float
    most: float

    @property
    def example(self) -> str:
        """A number within the bounds."""
        return f"{min(max(1.0, self.least), self.most):g}"

    def read(self, given: object) -> float:
        """Return the number.

        Raises:
            ValueError: not a bare number, or out of bounds.
        """
        value = read_number(given, self.name)
        if not self.least <= value <= self.most:
            raise ValueError(
                f"{self.name} of {value:g} is out of bounds; "
                f"write a number from {self.least:.12g} to {self.most:.12g}"
            )
        return value


@dataclass(frozen=True, slots=True)
class Listed:
    """A list of ``least`` to ``most`` values, each read by ``read``; ``alone``: one may stand by itself.

    ``then`` looks at all of them together, and may put them in order.
    """

    read: Callable[[Any], Any]
    least: int
    most: int
    example: str
    alone: bool = False
    then: Callable[[tuple[Any, ...]], tuple[Any, ...]] = tuple
