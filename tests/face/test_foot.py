"""The foot of a scale: where the pointer scarcely moves from rest, the first marks are left out."""

from __future__ import annotations

import itertools
import math
from pathlib import Path

import numpy as np
import pytest
from face_rulers import exact, mantissa
from hypothesis import given, settings
from hypothesis import strategies as st
from laid_scales import Laid, laid

import dialgen
from dialgen.face.ruled.divisions import Rank

ROOT = Path(__file__).parents[2]
COIL = 'kind = "moving coil"\ncurrent = "1 mA"\nresistance = "75 ohm"'
BARE = 'kind = "moving coil"'
VOLTS = 'unit = "V"\nfrom = 0\nto = {top}\ncircuit = {{ kind = "rectifier", range = "{top} V"{diode} }}'
SILICON, THRESHOLD = "", ', diode = { drop = "0.6 V" }'
SQUARE = 'unit = "A"\nfrom = 0\nto = {top}\nlaw = {{ kind = "power", exponent = {exponent} }}'
EVEN = 'unit = "V"\nfrom = 0\nto = {top}'


def face(scale: str, movement: str = BARE, *, half_deg: float = 45.0, radius_mm: float = 44.0) -> Laid:
    """A dial of one scale from rest on a large plate."""
    return laid(
        f"dialgen = 1\n[movement]\n{movement}\nrest = {-half_deg}\nfull = {half_deg}\n"
        f"[[scale]]\nradius = {radius_mm}\n{scale}\n[plate]\nsize = [400, 400]\npivot = [200, 200]\n"
    )


def places(made: Laid) -> np.ndarray:
    """Where the marks stand along an arc about the pivot: the angle in radians by the radius, mm."""
    return np.radians([mark.angle_deg for mark in made.scale.marks]) * made.scale.spec.radius


crowding = st.one_of(
    st.builds(
        lambda top, diode: (VOLTS.format(top=top, diode=diode), COIL),
        st.sampled_from((3, 5, 6, 10, 12, 15, 30)),
        st.sampled_from((SILICON, THRESHOLD)),
    ),
    st.builds(
        lambda top, exponent: (SQUARE.format(top=top, exponent=exponent), BARE),
        st.sampled_from((1, 1.5, 3, 10, 25, 60)),
        st.sampled_from((1.8, 2, 3)),
    ),
)
sizes = {"half_deg": st.floats(30, 120), "radius_mm": st.floats(25, 100)}


@settings(max_examples=80, deadline=None)
@given(crowding, st.fixed_dictionaries(sizes))
def test_marks_of_a_foot_are_apart_and_of_one_division(
    scale: tuple[str, str], size: dict[str, float]
) -> None:
    """None are nearer than the least gap; one 1-2-5 step holds from the first to the numeral."""
    made = face(*scale, **size)
    least_mm = made.scale.sizes.gap_mm
    numbered = [mark.value for mark in made.scale.marks if mark.rank is Rank.NUMBERED]
    assert np.diff(places(made)).min() >= least_mm * (1 - 1e-6)
    shown = [exact(value) for value in (*[v for v in values_of(made) if v < numbered[1]], numbered[1])][1:]
    steps = {b - a for a, b in itertools.pairwise(shown)}
    assert len(steps) <= 1
    assert all(mantissa(step) in (1, 2, 5) for step in steps)
    assert all((value / step).denominator == 1 for step in steps for value in shown)
    assert len(shown) - 1 <= 10


@settings(max_examples=80, deadline=None)
@given(crowding, st.fixed_dictionaries(sizes))
def test_a_foot_is_left_out_only_where_its_marks_would_crowd(
    scale: tuple[str, str], size: dict[str, float]
) -> None:
    """One more mark below the first, at the foot's own step, would crowd it, the start, or one above it."""
    made = face(*scale, **size)
    values, numbered = values_of(made), [m.value for m in made.scale.marks if m.rank is Rank.NUMBERED]
    shown = [v for v in values if 0 < v <= numbered[1]]
    if len(shown) < 2 or shown[0] <= (shown[1] - shown[0]) * (1 + 1e-9):
        return
    step = shown[1] - shown[0]
    below = [made.angle(v) for v in (shown[0] - step, shown[0])]
    before_mm, after_mm = (
        math.radians(a - b) * made.scale.spec.radius
        for a, b in ((below[0], made.angle(0.0)), (below[1], below[0]))
    )
    assert min(before_mm, after_mm) < made.scale.sizes.gap_mm * (1 + 1e-6)


def values_of(made: Laid) -> list[float]:
    """The values of all marks."""
    return [mark.value for mark in made.scale.marks]


@settings(max_examples=40, deadline=None)
@given(st.sampled_from((1, 2.5, 10, 12, 40, 300)), st.fixed_dictionaries(sizes))
def test_an_even_scale_has_no_foot(top: float, size: dict[str, float]) -> None:
    """An even scale that starts from rest has all the marks of its one step, the first among them."""
    made = face(EVEN.format(top=top), **size)
    steps = np.diff(values_of(made))
    assert steps == pytest.approx([steps[0]] * len(steps), rel=1e-9)


def test_a_square_law_shows_its_foot_from_where_marks_have_room() -> None:
    """By hand: 0 to 10 on 69.1 mm puts 1 at 0.69 mm, 1.5 at 1.56, 2 at 2.76; the least gap is 0.8."""
    made = face(SQUARE.format(top=10, exponent=2))
    assert made.scale.sizes.gap_mm == pytest.approx(0.8, abs=0.1)
    assert [v for v in values_of(made) if v < 3] == [0, 1.5, 2, 2.5]


def test_diodes_with_a_threshold_show_no_mark_below_it() -> None:
    """Two drops of 0.6 V take a sine's crest of 1.2 V, 0.849 V RMS: nothing is marked from 0 to there."""
    threshold = 2 * 0.6 / math.sqrt(2)
    values = values_of(face(VOLTS.format(top=3, diode=THRESHOLD), COIL))
    assert all(v == 0 or v > threshold for v in values)
    assert [v for v in values if v <= 1.5] == pytest.approx([0, 1, 1.1, 1.2, 1.3, 1.4, 1.5])


@pytest.mark.parametrize("path", ["templates/ac-volts.toml", "samples/lamp-voltage/lamp-voltage.toml"])
def test_rectifier_faces_are_marked_to_within_a_tenth_of_their_length(path: str) -> None:
    """A template and a sample behind a rectifier are not left bare between zero and their first mark."""
    scale = dialgen.load(ROOT / path).scales[0]
    first, last = (abs(scale.marks[i].angle_deg - scale.marks[0].angle_deg) for i in (1, -1))
    assert first < last / 10
    assert scale.marks[1].rank is not Rank.NUMBERED
