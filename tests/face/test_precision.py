"""What a class justifies, and what a moving iron leaves unmarked."""

from __future__ import annotations

import math
from itertools import pairwise

import pytest
from hypothesis import given
from hypothesis import strategies as st

import dialgen
from dialgen.dialfile.models import Fiducial, Scale
from dialgen.face.ruled.divisions import Rank
from dialgen.face.ruled.precision import fiducial, fiducial_value, least_gap_mm, least_step


def scale(**keys: object) -> Scale:
    """Return a scale with a class."""
    return Scale.model_validate({"unit": "A", "from": 0, "to": 40, "radius": 44, "class": 2.5} | keys)


def test_permitted_error_of_class_two_and_a_half() -> None:
    """Class 2.5 with 10 A end value permits 0.25 A (published caption), so divisions are 0.5 A or more."""
    assert least_step(scale(to=10))(0.0, 10.0) == pytest.approx(2 * 0.25)


def test_zero_inside_counts_both_limits() -> None:
    """With zero inside the scale the fiducial value is the sum of the limits, signs ignored (EN 60051)."""
    assert fiducial_value(scale(**{"from": -20, "to": 30})) == 50


def test_effective_range_ends_the_fiducial_value() -> None:
    """With an effective range its end is the limit that the class counts from."""
    assert fiducial_value(scale(effective=[5, 30])) == 30


def test_actual_value_gives_steps_in_proportion() -> None:
    """A class of the actual value permits twice the step at twice the value."""
    step = least_step(scale(fiducial="value"))
    assert step(10.0, 20.0) == pytest.approx(2 * 0.025 * 10)
    assert step(20.0, 40.0) == pytest.approx(2 * step(10.0, 20.0))


def test_scale_length_gives_a_gap() -> None:
    """A class of the scale length permits marks no nearer than twice that share of the length."""
    made = scale(to=math.inf)
    assert fiducial(made) is Fiducial.LENGTH
    assert least_gap_mm(made, 60.0, 0.8) == pytest.approx(2 * 0.025 * 60)
    assert least_gap_mm(scale(), 60.0, 0.8) == 0.8


FILE = """
dialgen = 1
[movement]
kind = "{kind}"
{movement}
rest = -44
full = 44
[[scale]]
unit = "A"
from = 0
to = {to}
radius = 60
{keys}
[plate]
size = [130, 90]
pivot = [65, 15]
"""


def marks(tmp_path, *, kind: str = "moving coil", movement: str = "", to: float = 40, keys: str = ""):
    """Return the marks of a face."""
    path = tmp_path / "dial.toml"
    path.write_text(FILE.format(kind=kind, movement=movement, to=to, keys=keys), encoding="utf-8")
    return dialgen.load(path).scales[0].marks


@pytest.mark.parametrize("to", [1, 3, 15, 40, 120])
@pytest.mark.parametrize("index", [0.5, 1, 1.5, 2.5, 5])
def test_no_division_is_finer_than_twice_the_permitted_error(tmp_path, to: float, index: float) -> None:
    """ASME B40.100: no step between marks is below twice class times limit; without class they are finer."""
    values = [mark.value for mark in marks(tmp_path, to=to, keys=f"class = {index}")]
    steps = [b - a for a, b in pairwise(values)]
    numbered = [m.value for m in marks(tmp_path, to=to) if m.rank is Rank.NUMBERED]
    widest = min(b - a for a, b in pairwise(numbered))
    assert min(steps) >= min(2 * index / 100 * to, widest) * (1 - 1e-9)
    assert len(values) <= len(marks(tmp_path, to=to))


@given(st.floats(0.05, 5.0))
def test_a_coarser_class_never_permits_a_finer_step(index: float) -> None:
    """The least step rises with the class."""
    fine, coarse = (least_step(scale(**{"class": c}))(0.0, 40.0) for c in (index, 1.5 * index))
    assert coarse > fine


def test_moving_iron_is_unmarked_at_its_foot(tmp_path) -> None:
    """Common practice: a moving iron has no marks below 15 percent, but zero."""
    values = [mark.value for mark in marks(tmp_path, kind="moving iron", movement="response = { power = 2 }")]
    assert values[0] == 0
    assert values[1] >= 0.15 * 40
    coil = [mark.value for mark in marks(tmp_path, movement="response = { power = 2 }")]
    assert 0 < coil[1] < 0.15 * 40


def test_moving_iron_is_marked_where_readings_reach(tmp_path) -> None:
    """Readings taken at the foot of the scale, or an effective range, bring the marks back."""
    readings = "\n".join(
        f"[[movement.reading]]\nvalue = {v}\nangle = {-44 + 88 * (v / 40) ** 2}" for v in (4, 20, 40)
    )
    read = marks(tmp_path, kind="moving iron", movement="response = { power = 2 }", keys="")
    path = tmp_path / "read.toml"
    text = FILE.format(kind="moving iron", movement="response = { power = 2 }", to=40, keys="")
    path.write_text(text + readings, encoding="utf-8")
    assert dialgen.load(path).scales[0].marks[1].value < read[1].value
    said = marks(
        tmp_path, kind="moving iron", movement="response = { power = 2 }", keys="effective = [4, 40]"
    )
    assert said[1].value < read[1].value
