"""A face too crowded to look at everything is looked at where it is fullest, and told of in good time."""

from __future__ import annotations

import time
from pathlib import Path

import numpy as np
from hypothesis import given
from hypothesis import strategies as st
from spoiled_faces import PANEL

import dialgen
from dialgen.drawing import Circle, Style
from dialgen.ink import neighbours, shape

INK = Style(fill="#000000")
discs = st.tuples(st.floats(-5, 5), st.floats(-5, 5)).map(lambda at: Circle(at, 1.0, INK))


@given(st.lists(discs, min_size=2, max_size=30), st.integers(0, 2))
def test_less_effort_finds_some_of_the_same(items: list[Circle], seed: int) -> None:
    """What is found with little effort is part of what is found with all; with enough it is the same."""
    shapes = [shape(item) for item in items]
    groups = np.random.default_rng(seed).integers(0, 3, len(shapes)).tolist()
    whole = neighbours(shapes, 0.2, groups)
    assert set(neighbours(shapes, 0.2, groups, effort=1)) <= set(whole)
    assert neighbours(shapes, 0.2, groups, effort=10**9) == whole


@given(st.lists(st.floats(-1, 1), min_size=3, max_size=30, unique=True))
def test_least_effort_finds_what_has_most_in_common(places: list[float]) -> None:
    """Of equal discs in a row that all touch, the pair whose middles are nearest is the one looked at."""
    shapes = [shape(Circle((x, 0.0), 1.5, INK)) for x in places]
    (found,) = neighbours(shapes, 0.0, effort=1)
    apart = min(b - a for a, b in zip(sorted(places), sorted(places)[1:], strict=False))
    assert abs(abs(places[found.one] - places[found.other]) - apart) < 1e-6


def test_hundreds_of_numerals_on_each_other_are_told_of_in_seconds(tmp_path: Path) -> None:
    """401 numerals on a line 2 mm long, 80 000 pairs of them, are one remark within a few seconds."""
    path = tmp_path / "crowded.toml"
    crowded = PANEL.replace("radius = 44", "radius = 1").replace("every = 10", "every = 0.1")
    path.write_text(crowded.replace("pointer = 45\n", ""), encoding="utf-8")
    face = dialgen.load(path)
    assert face.drawing
    start = time.perf_counter()
    found = [finding for finding in face.review() if finding.check == "overlap"]
    assert time.perf_counter() - start < 5
    assert len(found) == 1
    assert "many more of its pairs" in found[0].message
