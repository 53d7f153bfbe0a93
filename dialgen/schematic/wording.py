"""What is written in a picture: parts with their values, ranges, signs of polarity."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass

from dialgen.circuit.design import COIL, Design, Fact, Part
from dialgen.circuit.names import SHUNT
from dialgen.errors import InputError
from dialgen.quantity import engineered
from dialgen.schematic.pieces import Item, Kind, Label

AC, PLUS, MINUS = "~", "+", "−"


@dataclass(frozen=True, slots=True, eq=False)
class Plan:
    """A design with all that is written about it.

    Args:
        design: the circuit.
        coil: what is written beside the movement, in lines: its current and resistance.
        splits: of how many equal resistors in series a part is made, by its name; of one where left out.
        earthed: whether the lower terminal, behind the movement, is marked as the earthed end.

    Raises:
        InputError: a split is of no part of the design, or into fewer than one.
    """

    design: Design
    coil: tuple[str, ...]
    splits: Mapping[str, int]
    earthed: bool

    def __post_init__(self) -> None:
        names = [part.name for part in self.design.parts]
        for name, count in self.splits.items():
            if name not in names:
                raise InputError(f"there is no part {name!r} to split; there is {', '.join(names) or 'none'}")
            if count < 1:
                raise InputError(f"{name} cannot be made of {count}; give 1 or more")

    def named(self, *starts: str) -> list[Part]:
        """Return the parts whose names are, or start with a word that is, one of ``starts``."""
        return [
            p for p in self.design.parts if any(p.name == s or p.name.startswith(f"{s} ") for s in starts)
        ]

    def fact(self, name: str) -> Fact | None:
        """Return the fact of that name, if there is one."""
        return next((fact for fact in self.design.facts if fact.name == name), None)

    def known(self, name: str) -> float:
        """Return the value of a fact that every design of its kind has."""
        return next(fact.value for fact in self.design.facts if fact.name == name)

    def label(self, part: Part) -> Label:
        """Return a part's name, what is stamped on it, its value and, if it was measured, that as built."""
        return Label(part.name, tuple(self._values(part)))

    def item(self, part: Part) -> Item:
        """Return a part as it stands in the picture."""
        kind = Kind.ADJUSTABLE if part.adjustable else Kind.RESISTOR
        return Item(kind, self.label(part), part.name)

    def items(self, *starts: str) -> list[Item]:
        """Return the parts of those names as they stand in the picture."""
        return [self.item(part) for part in self.named(*starts)]

    def wire_items(self, name: str) -> list[Item]:
        """Return what a wire's own resistance is drawn as: nothing where it has none."""
        ohms = self.design.ohms.get(name, 0.0)
        if not ohms or self.named(name):
            return self.items(name)
        return [Item(Kind.RESISTOR, Label(name, (engineered(ohms, "Ω"),)), name)]

    def movement(self) -> Item:
        """Return the movement, its current and its resistance each on a line of its own."""
        return Item(Kind.MOVEMENT, Label("", self.coil), COIL, plus=not self.alternating_at_coil)

    @property
    def alternating_at_coil(self) -> bool:
        """Whether the movement itself sees alternating current: it is meant for it, with no rectifier."""
        return self.design.alternating and self.design.kind != "rectifier"

    @property
    def upper(self) -> str:
        """What is written at the upper terminal: the range and the sign of its current."""
        return self.at_plus(self._range())

    @property
    def lower(self) -> str:
        """What is written at the lower terminal."""
        sign = AC if self.design.alternating else MINUS
        return f"earthed end {sign}" if self.earthed else sign

    def at_plus(self, range_text: str) -> str:
        """Return a range with the sign of its current."""
        return f"{range_text} {AC if self.design.alternating else PLUS}".strip()

    def _range(self) -> str:
        if self.design.case:
            return self.design.case.name
        known = self.design.range is not None and self.design.unit in ("A", "V")
        return engineered(self.design.range or 0.0, self.design.unit) if known else ""

    def _values(self, part: Part) -> Iterator[str]:
        if part.name == SHUNT and part.given and self.design.stamp:
            yield self.design.stamp
        count = self.splits.get(part.name, 1)
        each = engineered(part.ohms / count, "Ω")
        yield each if count == 1 else f"{count} × {each}"
        if part.built is not None and engineered(part.built, "Ω") != engineered(part.ohms, "Ω"):
            yield f"as built {engineered(part.built, 'Ω')}"
