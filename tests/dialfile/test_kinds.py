"""The check of a law's or circuit's table, built from its dataclass."""

from __future__ import annotations

from dataclasses import dataclass

import pytest

from dialgen.dialfile.kinds import model_of


@dataclass(frozen=True)
class _Count:
    on: int


@dataclass(frozen=True)
class _Named:
    name: str | None = None


@pytest.mark.parametrize("kind", [_Count, _Named])
def test_a_field_without_a_reader_is_refused_where_the_check_is_built(kind: type) -> None:
    """A law or circuit with a field of a type that no reader is for cannot be put to use by mistake."""
    with pytest.raises(TypeError, match=r"no reader for the field (on|name) of type"):
        model_of(kind)
