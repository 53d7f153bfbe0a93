"""A mechanically suppressed zero: the pointer lies against its stop, short of where it would rest."""

from __future__ import annotations

from pathlib import Path

import pytest

from dialgen.dial import build
from dialgen.dialfile import Source, parse
from dialgen.errors import NoSuchValue

TEXT = """\
dialgen = 1
[movement]
current = "5 mA"
resistance = "20 ohm"
rest = -80.0
full = 40.0
stops = [-45.0, 45.0]
[circuit]
kind = "multiplier"
range = "30 V"
[[scale]]
unit = "V"
from = 10
to = 30
radius = 40
[plate]
size = [100, 70]
pivot = [50, 12]
"""


def test_rest_may_lie_beyond_the_stop() -> None:
    """By proportion 10 V of 30 V stands a third of the way from -80 to 40 degrees, at -40."""
    (scale,) = build(parse(Source(name="x", folder=Path(), text=TEXT))[0]).scales
    assert scale.chain.angle([10.0, 30.0]) == pytest.approx([-40.0, 40.0], abs=1e-9)


def test_values_below_the_stop_are_refused() -> None:
    """A value at which the pointer lies against the stop has no angle."""
    (scale,) = build(parse(Source(name="x", folder=Path(), text=TEXT))[0]).scales
    with pytest.raises(NoSuchValue, match="beyond the stops"):
        scale.chain.angle([5.0])
