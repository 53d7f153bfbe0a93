"""What is known of a symbol.

Meanings, numbers and shapes are those of IEC 60051-1 as far as they are known here: the standard
itself was not read.  ``SEEN`` is what stands in a secondary source, such as a translation of the
annex or a photograph of a dial; the rest is from memory.  Number and shape are known apart from
each other, so each has its own mark.
"""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum
from typing import Literal

from dialgen.symbols.pen import Shape

Needs = Literal["kV", "degrees", "mm", "class"]
"""What a symbol's parameter is."""


class Sure(StrEnum):
    """How sure a fact is."""

    SEEN = "seen"
    MEMORY = "from memory"


class Subject(StrEnum):
    """What a symbol speaks of; the sheet is grouped by it."""

    CURRENT = "Kind of current"
    SAFETY = "Safety"
    POSITION = "Position of use"
    CLASS = "Class of accuracy"
    MOVEMENT = "Kind of movement"
    ADDITION = "Additions"


@dataclass(frozen=True, slots=True, kw_only=True)
class Symbol:
    """A dial symbol.

    Args:
        name: the plain key, lower case but for signs; a parameter stands behind it.
        title: what it means.
        subject: its group.
        shape: what draws it.
        sure: how sure the shape is.
        number: in IEC 60051-1; "" where there is none.
        number_sure: how sure that is.
        claim: whether it states what the maker must have proved.
        needs: what its parameter is, None where it takes none.
        write: an example of what to write, the name where that is all.
        sample: the example's parameter as it is lettered.
    """

    name: str
    title: str
    subject: Subject
    shape: Shape
    sure: Sure
    number: str = ""
    number_sure: Sure = Sure.MEMORY
    claim: bool = False
    needs: Needs | None = None
    write: str = ""
    sample: str = ""

    def __post_init__(self) -> None:
        """Let the name be the example where no other is given."""
        if not self.write:
            object.__setattr__(self, "write", self.name)
