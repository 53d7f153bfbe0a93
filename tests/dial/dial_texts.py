"""Dial files as text for the tests of the chain, and a strategy that generates them with laws by hand."""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass
from pathlib import Path

from hypothesis import strategies as st

from dialgen.dial import Dial, build
from dialgen.dialfile import Source, parse
from dialgen.errors import Refused

MOVEMENT = 'current = "1 mA"\nresistance = "75 ohm"\nrest = -44.0\nfull = 44.0\n'


def dial_text(scale: str, movement: str = MOVEMENT, rest: str = "") -> str:
    """A dial file with one scale's keys, a movement's keys, and whatever other tables."""
    return (
        f"dialgen = 1\n[movement]\n{movement}\n[plate]\nsize = [120, 120]\npivot = [60, 60]\n"
        f"{rest}\n[[scale]]\nradius = 40.0\n{scale}\n"
    )


def dial_of(text: str) -> Dial:
    """The dial that a text describes."""
    file, _ = parse(Source(name="test.toml", folder=Path(), text=text))
    return build(file)


def made(scale: str, movement: str = MOVEMENT, rest: str = "") -> Dial:
    """The dial with one scale."""
    return dial_of(dial_text(scale, movement, rest))


def refusals(scale: str, movement: str = MOVEMENT, rest: str = "") -> list[tuple[str, tuple]]:
    """What ``build`` refuses: each message with its first key."""
    try:
        made(scale, movement, rest)
    except Refused as refused:
        return [(error.message, error.keys[0]) for error in refused.errors]
    return []


@dataclass(frozen=True)
class Wired:
    """A scale's keys, its span, the drive by hand, and the value that shows half (for a scale to inf)."""

    keys: str
    start: float
    end: float
    drive: Callable[[float], float] | None
    half: float = 1.0
    negative: bool = False


@dataclass(frozen=True)
class Case:
    """A whole dial file and what is known of it."""

    text: str
    mirrored: str
    wired: Wired
    rest: float
    full: float
    deflection: Callable[[float], float] | None

    @property
    def sweep(self) -> float:
        """The angle from rest to full."""
        return abs(self.full - self.rest)


def toml(value: float) -> str:
    """A number as TOML takes it."""
    return "inf" if math.isinf(value) else repr(float(value))


def _ends(start: float, end: float) -> str:
    return f"from = {toml(start)}\nto = {toml(end)}\n"


sizes = st.floats(0.5, 500.0).map(lambda v: float(f"{v:.4g}"))
shares = st.floats(0.0, 0.9).map(lambda v: round(v, 3))


@st.composite
def shunts(draw) -> Wired:
    """Amperes or milliamperes through a shunt, often with zero inside."""
    top, prefix = draw(sizes), draw(st.sampled_from(("", "k")))
    factor = 1000.0 if prefix else 1.0
    start = draw(st.sampled_from((0.0, -1.0, -0.25, 0.3))) * top
    swamp, lead = 500.0 * draw(shares), draw(shares)
    branch = 75.0 + swamp + lead
    built = 1e-3 * branch / (factor * top - 1e-3) * draw(st.floats(0.99, 1.01))
    circuit = (
        f'circuit = {{ kind = "shunt", built = "{built!r} ohm", swamp = "{swamp!r} ohm", '
        f'leads = "{lead!r} ohm" }}'
    )
    return Wired(
        f'unit = "{prefix}A"\n{_ends(start, top)}{circuit}',
        start,
        top,
        lambda v: v * factor * built / (built + branch) / 1e-3,
        negative=start < 0,
    )


@st.composite
def multipliers(draw) -> Wired:
    """Volts behind a multiplier with a suppressed zero, or what a sender makes into volts."""
    top = draw(sizes)
    suppress = draw(st.sampled_from((0.0, 0.3))) * top
    start = suppress + draw(st.sampled_from((0.0, 0.2, -0.4))) * top
    per = draw(st.sampled_from((None, 0.025, -0.025)))
    if per is None:
        keys, signal = 'unit = "V"\n', (lambda v: v)
    else:
        keys = f'unit = "degC"\nlaw = {{ kind = "linear", per = "{per!r} V", at_zero = "20 V" }}\n'
        signal = lambda v: 20.0 + per * v  # noqa: E731
    low, high = signal(start), signal(top)
    zero = min(low, high) if per is not None else suppress
    range_v = max(low, high) + 0.1 + (0.08 if per is not None else 0.0)
    circuit = f'circuit = {{ kind = "multiplier", range = "{range_v!r} V", suppress = "{zero!r} V" }}'
    return Wired(
        f"{keys}{_ends(start, top)}{circuit}",
        start,
        top,
        lambda v: (signal(v) - zero) / (range_v - zero),
        negative=min(low, high) < zero,
    )


@st.composite
def ohmmeters(draw) -> Wired:
    """Ohms to infinity or to a finite end, the series and the shunt kind."""
    half, to_inf = draw(sizes), draw(st.booleans())
    kind = draw(st.sampled_from(("series", "shunt")))
    end = math.inf if to_inf else half * draw(st.sampled_from((2.0, 30.0)))
    keys = f'unit = "kohm"\n{_ends(0.0, end)}circuit = {{ kind = "{kind} ohmmeter", half = "{half!r} kohm" }}'
    if kind == "series":
        return Wired(keys, 0.0, end, lambda v: half / (half + v), half)
    return Wired(keys, 0.0, end, lambda v: v / (half + v) if math.isfinite(v) else 1.0, half)


@st.composite
def tapped(draw) -> Wired:
    """Amperes at a tap of a universal shunt, or behind a current transformer with a shunt."""
    top, wider = draw(sizes), 1.0 + draw(st.floats(0.1, 20.0))
    if draw(st.booleans()):
        # The whole ring of coil and shunt stays one, so the coil's share is tap over ring.
        keys = f'circuit = {{ kind = "universal shunt", ranges = ["{top!r} A", "{top * wider!r} A"] }}'
        return Wired(f'unit = "A"\n{_ends(0.0, top)}{keys}', 0.0, top, lambda v: v / top)
    keys = 'circuit = { kind = "current transformer", ratio = "200/5" }'
    return Wired(f'unit = "A"\n{_ends(0.0, top)}{keys}', 0.0, top, lambda v: v / top)


@st.composite
def bridges(draw) -> Wired:
    """Ohms below R1, beside 100 Ω below R2, balanced at 100·R1/R2; Kirchhoff by Thevenin."""
    first, second = draw(st.floats(80.0, 500.0)), draw(st.floats(80.0, 500.0))
    rest = 100.0 * first / second
    start, end = rest * draw(st.sampled_from((0.97, 1.0))), rest * draw(st.floats(1.2, 3.0))

    def current(x: float, volts: float) -> float:
        open_v = volts * (x / (first + x) - 100.0 / (second + 100.0))
        return open_v / (first * x / (first + x) + second * 100.0 / (second + 100.0) + 75.0)

    supply = 1e-3 / current(end, 1.0)
    keys = (
        f'circuit = {{ kind = "bridge", supply = "{supply!r} V", '
        f'arms = ["{first!r} ohm", "{second!r} ohm", "100 ohm"] }}'
    )
    return Wired(
        f'unit = "ohm"\n{_ends(start, end)}{keys}',
        start,
        end,
        lambda v: current(v, supply) / 1e-3,
        negative=start < rest,
    )


@st.composite
def rectifiers(draw) -> Wired:
    """Volts AC behind real diodes; behind ideal ones in proportion."""
    top = draw(st.floats(3.0, 500.0))
    form = draw(st.sampled_from(("bridge", "half wave", "half bridge")))
    diode = draw(st.sampled_from(("silicon", "germanium", "schottky", "copper oxide", "ideal")))
    legs = ', legs = "1 kohm"' if form == "half bridge" else ""
    keys = f'circuit = {{ kind = "rectifier", rectifier = "{form}", diode = "{diode}"{legs} }}'
    hand = (lambda v: v / top) if diode == "ideal" else None
    return Wired(f'unit = "V"\n{_ends(0.0, top)}{keys}', 0.0, top, hand)


@st.composite
def sensors(draw) -> Wired:
    """A temperature by a thermocouple behind a millivoltmeter, or by a Pt100 or a thermistor direct."""
    start, end = draw(st.sampled_from(((0.0, 300.0), (20.0, 90.0), (60.0, 850.0))))
    which = draw(st.sampled_from((*tuple("JKNTERS"), "pt100", "thermistor")))
    if which == "T" and end > 400:
        end = 400.0
    law = {
        "pt100": 'law = "pt100"',
        "thermistor": 'law = { kind = "thermistor", r25 = "10 kohm", beta = 3950 }',
    }.get(which, f'law = {{ kind = "thermocouple", type = "{which}" }}')
    return Wired(f'unit = "degC"\n{_ends(start, end)}{law}', start, end, None)


def _direct(keys: str, start: float, end: float, signal: Callable[[float], float], zero: float) -> Wired:
    full = signal(end)
    return Wired(
        f"{keys}\n{_ends(start, end)}",
        start,
        end,
        lambda v: (signal(v) - zero) / (full - zero),
        negative=(signal(start) - zero) / (full - zero) < 0,
    )


def _ratio(value: float) -> float:
    return 1.0 if math.isinf(value) else (value - 1.0) / (value + 1.0)


FORMULAS: list[tuple[str, float, float, Callable[[float], float], float]] = [
    ("x**2 + 3*x", 0.0, 10.0, lambda x: x**2 + 3 * x, 0.0),
    ("sqrt(x)", 0.0, 25.0, math.sqrt, 0.0),
    ("exp(x/4)", 0.0, 10.0, lambda x: math.exp(x / 4), 1.0),
    ("log10(x)", 0.1, 100.0, math.log10, 0.0),
    ("atan(x)", -3.0, 3.0, math.atan, 0.0),
    ("-2*x - x**2", 0.0, 10.0, lambda x: -2 * x - x**2, 0.0),
    ("sqrt(x + 1) - 1", 0.0, 8.0, lambda x: math.sqrt(x + 1) - 1, 0.0),
    ("1/(4 + x)", 0.0, 40.0, lambda x: 1 / (4 + x), 0.25),
]


@st.composite
def directs(draw) -> Wired:  # noqa: PLR0911  (a row for each law)
    """A movement that takes the law's signal as it comes."""
    which = draw(
        st.sampled_from(("linear", "power", "decibel", "log", "reflection", "table", "formula", "formula"))
    )
    top = draw(sizes)
    if which == "linear":
        start = draw(st.sampled_from((-1.0, 0.0, 0.5))) * top
        rest = draw(st.sampled_from((None, start)))
        keys = f'unit = "Pa"\ncircuit = {{ kind = "direct", rest = {rest!r} }}' if rest else 'unit = "Pa"'
        return _direct(keys, start, top, lambda v: v, rest or 0.0)
    if which == "power":
        exponent, start = draw(st.sampled_from((0.5, 1.5, 2.0, 3.0))), draw(shares) * top
        keys = f'unit = "kW"\nlaw = {{ kind = "power", exponent = {exponent} }}'
        return _direct(keys, start, top, lambda v: (1000 * v) ** exponent, 0.0)
    if which == "decibel":
        start, end = (round(draw(st.floats(*ends)), 2) for ends in ((-40.0, -5.0), (0.0, 6.0)))
        of, per = draw(st.sampled_from((("amplitude", 20.0), ("power", 10.0))))
        keys = f'unit = "dB"\nlaw = {{ kind = "decibel", of = "{of}" }}'
        return _direct(keys, start, end, lambda v: 10.0 ** (v / per), 0.0)
    if which == "log":
        start = top / 10 ** draw(st.floats(0.5, 5.0))
        return _direct('unit = "Hz"\nlaw = "logarithmic"', start, top, math.log10, math.log10(start))
    if which == "reflection":
        end = draw(st.sampled_from((math.inf, 3.0, 10.0)))
        return _direct('unit = ""\nlaw = "reflection"', 1.0, end, _ratio, 0.0)
    if which == "table":
        return draw(tables())
    text, start, end, signal, zero = draw(st.sampled_from(FORMULAS))
    keys = f'unit = "x"\nlaw = {{ kind = "formula", signal = "{text}" }}'
    # log10 is followed on to its zero; exp and 1/(4 + x) rest at the scale's start.
    return _direct(keys, start, end, signal, zero)


@st.composite
def tables(draw) -> Wired:
    """A table whose own points are known."""
    steps = st.floats(0.2, 2.0)
    values, signals = [draw(st.floats(-5.0, 5.0))], [0.0]
    for _ in range(draw(st.integers(1, 6))):
        values.append(values[-1] + draw(steps))
        signals.append(signals[-1] + draw(steps))
    points = [[round(v, 6), round(s, 6)] for v, s in zip(values, signals, strict=True)]
    keys = f'unit = "%"\nlaw = {{ kind = "table", points = {points} }}\n'
    start, end = points[0][0], points[-1][0]
    return Wired(f"{keys}{_ends(start, end)}", start, end, None)


@dataclass(frozen=True)
class Response:
    """A response's key, and the deflection by hand where it is simple."""

    key: str
    hand: Callable[[float], float] | None


RESPONSES = [
    Response("", lambda d: d),
    Response("response = { power = 1.8 }", lambda d: d**1.8),
    Response("response = { power = 0.7 }", lambda d: d**0.7),
    Response("response = { points = [[0, 0], [0.4, 0.37], [1, 1]] }", None),
    Response("response = { points = [[0, 0], [0.2, 0.25], [0.6, 0.7], [1, 1]] }", None),
]


@st.composite
def cases(draw) -> Case:
    """A whole dial: any law and circuit, response, readings, meters turned round, stops."""
    wired = draw(
        st.one_of(
            *(shunts(), multipliers(), ohmmeters(), directs()),
            *(tapped(), bridges(), rectifiers(), sensors()),
        )
    )
    rest, sweep = round(draw(st.floats(-150.0, 150.0)), 2), round(draw(st.floats(20.0, 200.0)), 2)
    turn = draw(st.sampled_from((1.0, -1.0)))
    full = rest + turn * sweep
    response = draw(st.sampled_from([r for r in RESPONSES if not (wired.negative and "power" in r.key)]))
    low = -1.2 if wired.negative else -0.15
    ends = sorted((rest + turn * sweep * low, rest + turn * sweep * 1.25))
    departures = draw(st.lists(st.floats(-0.008, 0.008), max_size=3))
    readings = [(0.3 * (i + 1), round(d * sweep, 3)) for i, d in enumerate(departures)]
    nominal = response.hand or (lambda d: d)

    def text(sign: float) -> str:
        movement = 'current = "1 mA"\nresistance = "75 ohm"\n'
        movement += f"rest = {toml(sign * rest)}\nfull = {toml(sign * full)}\n{response.key}\n"
        stops = sorted(sign * min(max(end, -360.0), 360.0) for end in ends)
        movement += f"stops = {stops}\n"
        for drive, off in readings:
            angle = sign * (rest + turn * sweep * nominal(drive) + off)
            movement += f'[[movement.reading]]\ncurrent = "{drive!r} mA"\nangle = {angle!r}\n'
        return dial_text(wired.keys, movement)

    hand = response.hand if not readings else None
    return Case(text(1.0), text(-1.0), wired, rest, full, hand)
