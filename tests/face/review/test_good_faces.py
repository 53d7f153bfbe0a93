"""Faces made to fit: whatever the law, the sweep, the size and the look, nothing is remarked on."""

from __future__ import annotations

import math

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

import dialgen
from dialgen.looks import LOOKS

SCALES = {
    "amperes": ('unit = "A"\nfrom = 0\nto = 40\n', 'kind = "direct"'),
    "centre zero": ('unit = "A"\nfrom = -60\nto = 60\n', 'kind = "direct"\nrest = -60'),
    "ohms": ('unit = "kohm"\nfrom = 0\nto = inf\n', 'kind = "series ohmmeter"\nhalf = "15 kohm"'),
    "watts": (
        'unit = "W"\nfrom = 0\nto = 1500\nlaw = { kind = "power", exponent = 0.5, load = "8 ohm" }\n',
        'kind = "multiplier"',
    ),
    "decibels": (
        'unit = "dB"\nfrom = -20\nto = 6\nlaw = { kind = "decibel", reference = "0.775 V" }\n',
        'kind = "direct"',
    ),
    "logarithmic": ('unit = "mbar"\nfrom = 1\nto = 1000\nlaw = "logarithmic"\n', 'kind = "direct"'),
}
SIDES = {"outside": ("outward", 1.36), "inside": ("inward", 1.12)}
MARGIN_MM = 3.0


def fitting_plate(sweep_deg: float, reach_mm: float) -> str:
    """Return a plate with room for all within ``reach_mm`` of the pivot; round past 180 degrees."""
    if sweep_deg > 180:
        return f"diameter = {2 * reach_mm}\npivot = [{reach_mm}, {reach_mm}]\n"
    half_mm = reach_mm * math.sin(math.radians(min(sweep_deg, 180) / 2)) + 0.1 * reach_mm + MARGIN_MM
    return f"size = [{2 * half_mm:.2f}, {reach_mm + 15:.2f}]\npivot = [{half_mm:.2f}, 15]\n"


@settings(max_examples=60, deadline=None)
@given(
    kind=st.sampled_from(sorted(SCALES)),
    sweep_deg=st.sampled_from([60, 90, 120, 180, 240, 300]),
    radius_mm=st.integers(20, 110),
    look=st.sampled_from(sorted(LOOKS)),
    numerals=st.sampled_from(sorted(SIDES)),
)
def test_a_face_made_to_fit_is_silent(
    kind: str,
    sweep_deg: float,
    radius_mm: int,
    look: str,
    numerals: str,
    tmp_path_factory: pytest.TempPathFactory,
) -> None:
    """A scale with room on its plate, divided by the program, is never remarked on."""
    scale, circuit = SCALES[kind]
    marks, reach = SIDES[numerals]
    path = tmp_path_factory.mktemp("face") / "face.toml"
    path.write_text(
        f'dialgen = 1\n[movement]\ncurrent = "1 mA"\nresistance = "75 ohm"\npointer = {radius_mm}\n'
        f"rest = {-sweep_deg / 2}\nfull = {sweep_deg / 2}\n[circuit]\n{circuit}\n"
        f'[[scale]]\n{scale}radius = {radius_mm}\nmarks = "{marks}"\nnumerals = "{numerals}"\n'
        f"[plate]\n{fitting_plate(sweep_deg, reach * radius_mm + MARGIN_MM)}"
        f'[look]\nstyle = "{look}"\n',
        encoding="utf-8",
    )
    assert dialgen.load(path).review() == ()
