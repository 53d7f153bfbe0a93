"""Colours and their contrast."""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from dialgen.errors import InputError
from dialgen.looks import COLOURS, LOOKS, colour, contrast

colours = st.integers(0, 0xFFFFFF).map(lambda n: f"#{n:06x}")


@pytest.mark.parametrize(
    ("one", "other", "ratio"),
    [
        # WCAG 2.1 defines black on white as 21; the greys are the usual examples of its two limits,
        # 4.54 and 4.48 (known from memory, to two decimals).
        ("#000000", "#ffffff", 21.0),
        ("#767676", "#ffffff", 4.54),
        ("#777777", "#ffffff", 4.48),
        ("#ff0000", "#ffffff", 4.00),
    ],
)
def test_contrast_ratio(one: str, other: str, ratio: float) -> None:
    """The ratio is that of WCAG 2.1."""
    assert contrast(one, other) == pytest.approx(ratio, abs=0.005)


@given(colours, colours)
def test_contrast_is_between_1_and_21_and_has_no_order(one: str, other: str) -> None:
    """Which colour is the ink and which the ground makes no difference."""
    assert 1 <= contrast(one, other) == contrast(other, one) <= 21 + 1e-9


def test_names_are_colours_and_others_are_refused() -> None:
    """Every name stands for #rrggbb; what is neither is refused with the names."""
    assert all(colour(name) == colour(hexed) for name, hexed in COLOURS.items())
    for wrong in ("rde", "#12345", "#gggggg", "", "#1234567"):
        with pytest.raises(InputError, match="write #rrggbb or one of black"):
            colour(wrong)


@pytest.mark.parametrize("name", sorted(LOOKS))
def test_every_look_can_be_read(name: str) -> None:
    """Ink stands out from the ground by the 4.5 that WCAG asks of text, the accent by the 3 of graphics."""
    look = LOOKS[name]
    assert contrast(look.ink, look.ground) >= 4.5
    assert contrast(look.accent, look.ground) >= 3.0
