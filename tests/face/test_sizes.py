"""Sizes by reading distance, against the published figures."""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from dialgen.dialfile.models import Scale
from dialgen.face.ruled.divisions import Rank
from dialgen.face.ruled.sizes import minutes_seen, seen_mm, sizes_for
from dialgen.looks import LOOKS, Look

SCALE = Scale.model_validate({"unit": "A", "from": 0, "to": 40, "radius": 44})


@pytest.mark.parametrize(
    ("minutes", "distance_mm", "height_mm"),
    [
        (16, 350, 1.629),
        (16, 500, 2.327),
        (16, 710, 3.304),
        (16, 1000, 4.654),
        (16, 2000, 9.308),
        (20, 500, 2.909),
    ],
)
def test_height_by_visual_angle(minutes: float, distance_mm: float, height_mm: float) -> None:
    """The heights that NUREG-0700 rev. 2, 1.3.1-4 gives for a visual angle and a distance."""
    # Its factor 6.283 for 2π is short by 3e-5.
    assert seen_mm(minutes, distance_mm) == pytest.approx(height_mm, abs=6e-4)


def test_marks_by_distance() -> None:
    """At 710 mm marks are 5.6, 4.1 and 2.5 mm long (MIL-STD-1472, from memory) to a tenth, 0.9 mm apart."""
    sizes = sizes_for(SCALE, Look(distance=710.0), 67.0)
    assert sizes.length_mm(Rank.NUMBERED) == pytest.approx(5.6, abs=0.1)
    assert sizes.length_mm(Rank.MIDDLE) == pytest.approx(4.1, abs=0.1)
    assert sizes.length_mm(Rank.FINE) == pytest.approx(2.5, abs=0.1)
    assert sizes.gap_mm == pytest.approx(0.9, abs=0.02)


@given(st.floats(200.0, 2000.0), st.sampled_from(sorted(LOOKS)))
def test_numerals_by_distance_are_legible_in_every_look(distance_mm: float, name: str) -> None:
    """No look letters below the 16 minutes of arc that NUREG-0700 sets as the least."""
    from dataclasses import replace

    sizes = sizes_for(SCALE, replace(LOOKS[name], distance=distance_mm), 67.0)
    assert minutes_seen(sizes.numeral_mm, distance_mm) >= 16


@given(st.floats(10.0, 300.0), st.sampled_from(sorted(LOOKS)))
def test_ranks_differ(length_mm: float, name: str) -> None:
    """Numbered marks are longer and heavier than middle ones, and those than fine ones."""
    sizes = sizes_for(SCALE, LOOKS[name], length_mm)
    assert sizes.numbered_mm > sizes.middle_mm > sizes.fine_mm > 0
    assert sizes.numbered_width_mm > sizes.middle_width_mm > sizes.fine_width_mm > 0


def test_a_size_that_is_given_stands() -> None:
    """A size in millimetres in the look is taken as it is, whatever the factors say."""
    sizes = sizes_for(SCALE, Look(numeral=3.3, fine_width=0.2, letter_scale=2.0, weight_scale=2.0), 67.0)
    assert (sizes.numeral_mm, sizes.fine_width_mm) == (3.3, 0.2)
