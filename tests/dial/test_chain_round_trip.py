"""Properties of the whole chain, over generated dials."""

import math
from contextlib import suppress

import numpy as np
import pytest
from dial_texts import Case, cases, dial_of, made
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

from dialgen.errors import NoSuchValue

many = settings(max_examples=150, suppress_health_check=[HealthCheck.too_slow], deadline=None)
fractions = st.lists(st.floats(0.0, 1.0), min_size=1, max_size=12)


def scale_of(case: Case):
    """The chain of a case's only scale."""
    return dial_of(case.text).scales[0].chain


def values_over(case: Case, shares) -> np.ndarray:
    """Values spread over the scale; to infinity evenly in x/(x + half)."""
    wired, shares = case.wired, np.array(shares)
    if math.isfinite(wired.end):
        return np.clip(wired.start + shares * (wired.end - wired.start), wired.start, wired.end)
    with np.errstate(divide="ignore"):
        return wired.start + wired.half * shares / (1.0 - shares)


@many
@given(cases(), fractions)
def test_angle_of_value_is_the_angle_over_the_scale(case, shares):
    """Between the ends of the scale angle(value(a)) is a to 1e-9 of the sweep."""
    chain = scale_of(case)
    first, last = chain.angle(np.array([case.wired.start, case.wired.end]))
    angles = first + np.array(shares) * (last - first)
    angles = np.clip(angles, min(first, last), max(first, last))
    assert np.abs(chain.angle(chain.value(angles)) - angles).max() <= 1e-9 * case.sweep


@many
@given(cases(), fractions)
def test_angle_of_value_is_the_angle_within_the_stops(case, shares):
    """Wherever the pointer can stand and a value exists, angle(value(a)) is a to 1e-9 of the sweep."""
    chain = scale_of(case)
    low, high = chain.stops_deg
    for angle in np.clip(low + np.array(shares) * (high - low), low, high):
        try:
            value = chain.value(np.array(angle))
        except NoSuchValue:
            continue
        assert abs(float(chain.angle(value)) - angle) <= 1e-9 * case.sweep


@many
@given(cases(), fractions)
def test_value_of_angle_is_the_value(case, shares):
    """value(angle(x)) is x to 1e-9 of the span plus four last places of the angle over the slope."""
    chain = scale_of(case)
    wired = case.wired
    x = values_over(case, shares)
    x = x[np.isfinite(x)]
    angles = chain.angle(x)
    back = chain.value(angles)
    bounded = math.isfinite(wired.end)
    for at, angle, got in zip(x, angles, back, strict=True):
        size = wired.end - wired.start if bounded else at + wired.half
        step = 1e-4 * max(abs(at - wired.start), 1e-6 * size)
        near = np.clip([at - step, at + step], wired.start, wired.end)
        slope = abs(float(np.diff(chain.angle(near))[0])) / (near[1] - near[0])
        grain = 4 * np.spacing(abs(angle)) / slope if slope else math.inf
        assert abs(got - at) <= 1e-9 * size + grain


@many
@given(cases())
def test_angles_move_strictly_one_way(case):
    """Over the scale the angle moves strictly one way with the value."""
    chain = scale_of(case)
    steps = np.diff(chain.angle(values_over(case, np.linspace(0.0, 1.0, 201))))
    assert (steps > 0).all() or (steps < 0).all()


@many
@given(cases(), fractions)
def test_drive_is_the_drive_by_hand(case, shares):
    """The drive reported is the circuit's formula worked by hand; without readings so is the angle."""
    chain, hand = scale_of(case), case.wired.drive
    x = values_over(case, shares)
    if hand is None:
        return
    expected = np.array([hand(float(v)) for v in x])
    assert chain.drive(x) == pytest.approx(expected, rel=1e-8, abs=1e-9)
    if case.deflection:
        turned = [math.copysign(case.deflection(abs(d)), d) for d in expected.tolist()]
        angles = case.rest + np.array(turned) * (case.full - case.rest)
        assert chain.angle(x) == pytest.approx(angles, abs=1e-6 * case.sweep)


@many
@given(cases(), st.lists(st.floats(0.0, 1.0), min_size=1, max_size=7))
def test_arrays_equal_their_elements(case, shares):
    """Angles, values and drives of an array are, bit for bit, those of its elements one by one."""
    chain = scale_of(case)
    x = values_over(case, shares)
    angles = chain.angle(x)
    assert angles.tolist() == [float(chain.angle(np.array(v))) for v in x]
    assert chain.value(angles).tolist() == [float(chain.value(np.array(a))) for a in angles]
    assert chain.drive(x).tolist() == [float(chain.drive(np.array(v))) for v in x]


@many
@given(cases(), st.sampled_from([(), (0,), (1,), (2, 3), (2, 0, 3), (2, 1, 2)]))
def test_shapes_are_kept(case, shape):
    """Arrays of any shape, none at all included, come back in their shape."""
    chain = scale_of(case)
    x = np.full(shape, case.wired.start)
    assert chain.angle(x).shape == chain.drive(x).shape == chain.value(chain.angle(x)).shape == shape


def test_long_arrays_equal_short_ones():
    """Arrays longer than the chain's blocks are worked block by block without a seam."""
    chain = made('unit = "dB"\nfrom = -20\nto = 3\nlaw = { kind = "decibel" }').scales[0].chain
    x = np.linspace(-20.0, 3.0, 20_001)
    angles = chain.angle(x)
    parts = [chain.angle(part) for part in np.array_split(x, 11)]
    assert angles.tolist() == np.concatenate(parts).tolist()
    assert chain.value(angles.reshape(3, 6667)).ravel() == pytest.approx(x, abs=1e-9)


@many
@given(cases(), st.lists(st.floats(), min_size=1, max_size=20))
def test_never_nan_and_never_a_warning(case, wild):
    """Any double at all gives a finite angle within the stops, or is refused by name."""
    chain = scale_of(case)
    low, high = chain.stops_deg
    extremes = [0.0, -0.0, math.nan, math.inf, -math.inf, 1e308, -1e308, 5e-324, case.wired.start - 1e-9]
    for x in [*wild, *extremes]:
        with suppress(NoSuchValue):
            assert low <= float(chain.angle(np.array(x))) <= high
        with suppress(NoSuchValue):
            assert not math.isnan(float(chain.value(np.array(x))))


@many
@given(cases(), fractions)
def test_mirrored_meter_has_mirrored_angles(case, shares):
    """With rest, full, stops and readings mirrored every angle is mirrored, and no value moves."""
    chain, mirror = scale_of(case), dial_of(case.mirrored).scales[0].chain
    x = values_over(case, shares)
    assert mirror.angle(x) == pytest.approx(-chain.angle(x), abs=1e-9 * case.sweep)


@many
@given(cases(), st.floats(1e-6, 100.0))
def test_beyond_the_stops_is_refused(case, beyond):
    """An angle beyond the stops has no value, and a value that would stand there has no angle."""
    chain = scale_of(case)
    low, high = chain.stops_deg
    for angle in (low - beyond, high + beyond):
        with pytest.raises(NoSuchValue, match="beyond the stops"):
            chain.value(np.array([0.0, angle]))


def test_a_value_beyond_the_stops_names_itself():
    """A value whose angle is beyond the stops is refused with value, angle and key."""
    chain = made('unit = "Pa"\nfrom = 0\nto = 10').scales[0].chain
    with pytest.raises(NoSuchValue, match=r"11 Pa would stand at 52\.8 degrees, beyond the stops") as caught:
        chain.angle(np.array([1.0, 11.0, 12.0]))
    assert caught.value.keys == (("movement", "stops"),)


@pytest.mark.parametrize(
    ("scale", "at_inf"),
    [
        ('unit = "ohm"\nfrom = 0\nto = inf\ncircuit = { kind = "series ohmmeter", half = "15 ohm" }', -44.0),
        ('unit = "Mohm"\nfrom = 0\nto = inf\ncircuit = { kind = "shunt ohmmeter", half = "15 ohm" }', 44.0),
        ('unit = ""\nfrom = 1\nto = inf\nlaw = "reflection"', 44.0),
        ('unit = "x"\nfrom = 0\nto = inf\nlaw = { kind = "formula", signal = "1/(1 + x)" }\n'
         'circuit = { kind = "direct", full = 0 }', -44.0),
        ('unit = "pieces"\nfrom = 0\nto = inf\nlaw = { kind = "formula", signal = "100*x" }\n'
         'circuit = { kind = "series ohmmeter", half = "1 kohm" }', -44.0),
        ('unit = "mm"\nfrom = 0\nto = inf\nlaw = { kind = "linear", per = "2 ohm" }\n'
         'circuit = { kind = "series ohmmeter", half = "1 kohm" }', -44.0),
        ('unit = "ohm"\nfrom = 0\nto = inf\ncircuit = { kind = "series ohmmeter", half = "15 ohm" }\n'
         'law = { kind = "observed", points = [[0, 43], [15, 1], [inf, -43.5]] }', -43.5),
    ],
)  # fmt: skip
def test_infinity_has_a_finite_angle(scale, at_inf):
    """On ohms, reflection and other scales with a limit, infinity stands at a finite angle, and back."""
    chain = made(scale).scales[0].chain
    assert float(chain.angle(np.array(math.inf))) == pytest.approx(at_inf, abs=1e-12)
    assert float(chain.value(np.array(at_inf))) == math.inf


steps = st.lists(st.floats(0.2, 2.0), min_size=2, max_size=6)


@many
@given(steps, st.lists(st.floats(1.0, 15.0), min_size=6, max_size=6), st.booleans(), st.booleans(), fractions)
def test_observed_scales_go_there_and_back(sizes, turns, falls, to_inf, shares):
    """On observed scales, to infinity beside an ohms circuit or not, angles and values undo each other."""
    values = np.cumsum([0.0, *sizes])
    angles = (np.cumsum([-45.0, *turns])[: len(values)]) * (-1.0 if falls else 1.0)
    points = [[float(v), float(a)] for v, a in zip(values, angles, strict=True)]
    keys = f'unit = "ohm"\nfrom = 0\nto = {"inf" if to_inf else values[-1]}\n'
    if to_inf:
        points[-1][0] = math.inf
        keys += 'circuit = { kind = "series ohmmeter", half = "2 ohm" }\n'
    scale = f'{keys}law = {{ kind = "observed", points = {str(points).replace("inf", "+inf")} }}'
    chain = made(scale, "rest = -46.0\nfull = 46.0\nstops = [-90.0, 90.0]\n").scales[0].chain
    assert [float(chain.angle(np.array(v))) for v, _ in points] == pytest.approx(angles, abs=1e-12)
    low, high = min(angles), max(angles)
    wanted = np.clip(low + np.array(shares) * (high - low), low, high)
    back = chain.angle(chain.value(wanted))
    assert np.abs(back - wanted).max() <= 1e-9 * 92.0
    for beyond in (-89.0, 89.0):
        with suppress(NoSuchValue):
            there = chain.value(np.array(beyond))
            assert float(chain.angle(there)) == pytest.approx(beyond, abs=1e-9 * 92.0)


def test_observed_drive_is_the_deflection():
    """On an observed scale the drive reported is the deflection."""
    dial = made('unit = "%"\nfrom = 0\nto = 10\nlaw = { kind = "observed", points = [[0, -44], [10, 22]] }')
    assert dial.scales[0].chain.drive(np.array([0.0, 10.0])) == pytest.approx([0.0, 0.75])


@pytest.mark.parametrize(
    ("keys", "end_deg"),
    [
        ('unit = "degC"\nfrom = -200\nto = 850\nlaw = "pt100"', -45.0),
        ('unit = "degF"\nfrom = -328\nto = 1562\nlaw = "pt100"', -45.0),
        ('unit = "K"\nfrom = 73.15\nto = 1123.15\nlaw = "pt100"', -45.0),
        (
            'unit = "K"\nfrom = 3.15\nto = 1200\nlaw = { kind = "thermocouple", type = "K" }\n'
            'circuit = { kind = "direct", rest = 3.15 }',
            -45.0,
        ),
    ],
)
def test_the_end_of_a_sensors_range_survives_the_way_back(keys: str, end_deg: float) -> None:
    """A scale that begins where its sensor's standard does is read back there from its own angle."""
    (scale,) = made(keys, "rest = -45\nfull = 45\n").scales
    angles = scale.chain.angle(np.array([scale.spec.start, scale.spec.end]))
    assert angles[0] == pytest.approx(end_deg)
    assert scale.chain.angle(scale.chain.value(angles)) == pytest.approx(angles, abs=1e-9 * 90)
