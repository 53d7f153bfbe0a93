"""What the review says of touching and of the plate's edge is what shapely finds in the SVG drawn."""

from __future__ import annotations

import math
from collections.abc import Iterator
from itertools import combinations
from pathlib import Path

import pytest
import shapely
from hypothesis import assume, given, reject, settings
from hypothesis import strategies as st
from shapely.geometry.base import BaseGeometry
from spoiled_faces import TWO
from svg_ink import svg_ink

import dialgen
from dialgen.api import Face
from dialgen.errors import DialFileError
from dialgen.looks import LOOKS

FRAME = ("zones", "line", "marks", "limits")
UNSURE_MM = 0.02
"""Ink that only just touches, or only just does not, is no matter for two reckonings of curves."""


@st.composite
def dial_texts(draw: st.DrawFn) -> str:
    """Dial files of one to three scales and some lettering, with room for all or not."""
    half = draw(st.sampled_from([30, 45, 60, 110]))
    sides = st.sampled_from([("outward", "outside"), ("inward", "inside"), ("across", "outside")])
    scales = []
    # Two scales of one radius may meet on their common line, which is for a test of its own.
    for radius in draw(st.lists(st.integers(20, 60), min_size=1, max_size=3, unique=True)):
        (marks, numerals), to = draw(sides), draw(st.sampled_from([5, 40, 150]))
        circuit = f'circuit = {{ kind = "direct", full = {to} }}'
        scales.append(
            f'[[scale]]\nunit = "V"\nfrom = 0\nto = {to}\n{circuit}\nradius = {radius}\n'
            f'marks = "{marks}"\nnumerals = "{numerals}"\n'
        )
    place = st.tuples(st.integers(-30, 30), st.integers(-10, 60))
    texts = [
        f'[[text]]\nsay = "TEXT {i}"\nat = {list(draw(place))}\n' for i in range(draw(st.integers(0, 2)))
    ]
    hole = f"hole = [{{ at = {list(draw(place))}, diameter = 3 }}]\n" if draw(st.booleans()) else ""
    width, height = draw(st.integers(110, 150)), draw(st.integers(90, 130))
    plate = f"[plate]\nsize = [{width}, {height}]\npivot = [{width / 2}, {height - 70}]\ncorner = 5\n{hole}"
    look = f'[look]\nstyle = "{draw(st.sampled_from(sorted(LOOKS)))}"\n'
    movement = f"dialgen = 1\n[movement]\nrest = {-half}\nfull = {half}\n"
    return movement + "".join(scales) + plate + "".join(texts) + look


def loaded(text: str, folder: Path) -> tuple[Face, dict[str, list[BaseGeometry]]]:
    """Return the face, and its ink as read back from the SVG, by the layers' names."""
    path = folder / "face.toml"
    path.write_text(text, encoding="utf-8")
    face = dialgen.load(path)
    return face, svg_ink(face.render(".svg"))


def drawable(text: str, folder: Path) -> tuple[Face, dict[str, list[BaseGeometry]]]:
    """Return the face and its ink, of a file made by chance; one with a mark off the plate is passed over."""
    try:
        return loaded(text, folder)
    except DialFileError:
        reject()


def kept_apart(ink: dict[str, list[BaseGeometry]]) -> Iterator[tuple[BaseGeometry, BaseGeometry]]:
    """Yield every two inks that must not touch; a scale's line and marks are one."""
    wholes: dict[str, BaseGeometry] = {}
    for name, things in ink.items():
        if not name.startswith("print-") or name == "print-ground":
            continue
        scale, _, part = name.rpartition("_")
        if part == "numerals":
            yield from combinations(things, 2)
        if name == "print-text":
            wholes |= {f"text {i}": thing for i, thing in enumerate(things)}
        else:
            owner = scale if part in FRAME else name
            wholes[owner] = shapely.union_all([wholes.get(owner, shapely.Polygon()), *things])
    _, *holes = ink["cut-outline"]
    openings = [shapely.Polygon(hole.exterior).buffer(-0.05) for hole in holes]
    yield from combinations(wholes.values(), 2)
    yield from ((whole, opening) for whole in wholes.values() for opening in openings)


def surely(one: BaseGeometry, other: BaseGeometry) -> bool | None:
    """Return whether two inks touch; None where it is by a hair that they do or do not."""
    if not one.dwithin(other, UNSURE_MM):
        return False
    return True if one.buffer(-UNSURE_MM / 2).intersects(other.buffer(-UNSURE_MM / 2)) else None


@settings(max_examples=40, deadline=None)
@given(text=dial_texts())
def test_touching_is_what_shapely_finds(text: str, tmp_path_factory: pytest.TempPathFactory) -> None:
    """A face is told of for inks that touch exactly if two that must be apart do on the drawn plate."""
    face, ink = drawable(text, tmp_path_factory.mktemp("face"))
    truth = [surely(*pair) for pair in kept_apart(ink)]
    assume(True in truth or None not in truth)
    told = [f for f in face.review() if f.check in ("touching", "opening") or " overlap at " in f.message]
    assert bool(told) == (True in truth), told


@settings(max_examples=40, deadline=None)
@given(text=dial_texts())
def test_inside_the_plate_is_what_shapely_finds(text: str, tmp_path_factory: pytest.TempPathFactory) -> None:
    """A face is told of for ink over the edge exactly if ink lies outside the outline that is cut."""
    face, ink = drawable(text, tmp_path_factory.mktemp("face"))
    (rim, *_) = ink["cut-outline"]
    plate = shapely.Polygon(rim.exterior).buffer(-0.05)
    printed = plate_ink(ink)
    over = printed.difference(plate)
    far_mm = max((shapely.Point(at).distance(plate) for at in shapely.get_coordinates(over)), default=0.0)
    assume(far_mm == 0 or far_mm > UNSURE_MM)
    told = [finding for finding in face.review() if finding.check == "edge"]
    assert bool(told) == (far_mm > 0)
    for finding in told:
        assert printed.distance(shapely.Point(finding.place)) < UNSURE_MM
        assert plate.distance(shapely.Point(finding.place)) > 0


def plate_ink(ink: dict[str, list[BaseGeometry]]) -> BaseGeometry:
    """Return all that is printed but the ground."""
    names = [name for name in ink if name.startswith("print-") and name != "print-ground"]
    return shapely.union_all([thing for name in names for thing in ink[name]])


def test_two_colliding_scales_are_told_by_name_and_place(tmp_path: Path) -> None:
    """Both scales are named with their units, and the place told is on the ink of both."""
    face, ink = loaded(TWO.replace("radius = 44", "radius = 57.5"), tmp_path)
    (found,) = face.review()
    assert "scale 1 (A)" in found.message
    assert "scale 2 (%)" in found.message
    place = shapely.Point(found.place)
    assert f"{place.x:.1f}, {place.y:.1f}" in found.message
    for number in (1, 2):
        own = [t for name, ts in ink.items() if name.startswith(f"print-scale_{number}_") for t in ts]
        assert shapely.union_all(own).distance(place) < UNSURE_MM


def test_two_scales_may_share_a_line_on_its_two_sides(tmp_path: Path) -> None:
    """Marks outward of one scale and inward of the other meet at their common line, as they should."""
    face, ink = loaded(TWO.replace("radius = 44", "radius = 54"), tmp_path)
    one, other = (shapely.union_all(ink[f"print-scale_{n}_marks"]) for n in (1, 2))
    assert one.distance(other) == pytest.approx(0, abs=1e-4)
    assert face.review() == ()


def test_two_scales_may_not_share_a_line_on_one_side(tmp_path: Path) -> None:
    """Marks of two scales on one side of one line cannot be told apart."""
    same = TWO.replace("radius = 44", "radius = 54").replace('"inward"\nnumerals = "inside"', '"outward"')
    (found,) = (f for f in loaded(same, tmp_path)[0].review() if f.check == "touching")
    assert "scale 1 (A)" in found.message
    assert "scale 2 (%)" in found.message


@pytest.mark.parametrize(("gap_mm", "told"), [(0.01, False), (-0.01, True)])
def test_touching_is_told_to_a_hundredth(gap_mm: float, told: bool, tmp_path: Path) -> None:
    """A limit drawn as far as a hundredth of a millimetre from the text is clear of it; nearer it touches.

    The bottom of the capital I is a straight edge at half its height below the text's middle.
    """
    height_mm, top_mm = 2.0, 44.0
    y = top_mm + height_mm / 2 + gap_mm
    text = (
        "dialgen = 1\n[movement]\nrest = 45\nfull = -45\n[plate]\nsize = [90, 70]\npivot = [45, 12]\n"
        f'[[scale]]\nunit = ""\nfrom = 0\nto = 40\nline = [[-44, {top_mm}], [44, {top_mm}]]\n'
        'marks = "inward"\nnumerals = "inside"\nsquare = true\n[look]\nline_width = 0.2\n'
        f'[[text]]\nsay = "I"\nat = [0, {y + 0.1}]\nheight = {height_mm}\n'
    )
    found = [finding for finding in loaded(text, tmp_path)[0].review() if finding.check == "touching"]
    assert bool(found) is told
    assert not found or math.isclose(found[0].place[1], top_mm + 0.1, abs_tol=0.02)
