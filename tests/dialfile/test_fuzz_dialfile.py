"""Dial files broken at random: they load and draw, or are refused in so many words, within two seconds."""

from __future__ import annotations

import math
import os
import re
import tempfile
import tomllib
from pathlib import Path

import dialfile_samples as samples
import pytest
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

from dialgen import api
from dialgen.cli.bill_text import bill_lines
from dialgen.dialfile import Source, parse
from dialgen.errors import DialFileError, DialgenError, NoSuchValue

_EXAMPLES = int(os.environ.get("DIALGEN_FUZZ", "200"))
_FUZZ = settings(max_examples=_EXAMPLES, deadline=2000, suppress_health_check=[HealthCheck.too_slow])

_WORDS = (  # noqa: SIM905
    "|auto|linear|shunt|direct|multiplier|logarithmic|decibel|reflection|formula|series ohmmeter|"
    "shunt ohmmeter|power|table|observed|A|kV|mA|Ω|dB|W|pH|1 mA|1 A|0 A|-1 mA|75 ohm|0 ohm|4k7|"
    "1e-12 ohm|9e17 ohm|60 mV|-60 mV|1e17 V|1 W|0.7 m|1,5 V|inf|nan|1e999 V|x|x**9|1/x|sqrt(x)|"
    "exp(x)|x*0|10**x|outward|across|inside|up|100 A/75 mV|☃|old|angle|−5|no-such-file.csv|.|/"
).split("|")
_KEYS = (  # noqa: SIM905
    "from to unit law circuit radius line centre square curve numbered every divisions marks "
    "numerals gap reading readings kind current resistance rest full stops response pointer old "
    "range built swamp leads rated half battery suppress per at_zero exponent load reference of "
    "points signal position file size diameter pivot corner hole window at say height label dialgen "
    "scale plate movement text dial value angle voltage direction power zzz"
).split(" ")

_NUMBERS = (
    st.sampled_from(
        [0, 1, -1, 0.5, 2, 5, 10, 40, 90, 180, 360, -360, 2000, 1e-9, 1e-15, 1e15, 1e-300, 1e300, 0.0, -0.0]
    )
    | st.integers(-(10**20), 10**20)
    | st.floats()
    | st.floats(-100, 100)
)
_LEAVES = _NUMBERS | st.booleans() | st.sampled_from(_WORDS) | st.text(max_size=12)
_VALUES = st.recursive(
    _LEAVES,
    lambda inner: st.lists(inner, max_size=4) | st.dictionaries(st.sampled_from(_KEYS), inner, max_size=4),
    max_leaves=8,
)


@st.composite
def broken(draw: st.DrawFn) -> str:
    """Draw a good dial file with one to three changes at random places."""
    tables = samples.tables_of(draw(st.sampled_from(sorted(samples.GOOD))))
    for _ in range(draw(st.integers(1, 3))):
        places = list(samples.paths(tables))
        place = draw(st.sampled_from(places))
        match draw(st.sampled_from(["replace", "remove", "add", "swap"])):
            case "replace":
                tables = samples.replaced(tables, place, draw(_VALUES))
            case "remove":
                tables = samples.removed(tables, place)
            case "add":
                owners = [p for p in [(), *places] if isinstance(samples.at(tables, p), dict)]
                owner = draw(st.sampled_from(owners))
                tables = samples.replaced(tables, (*owner, draw(st.sampled_from(_KEYS))), draw(_VALUES))
            case "swap":
                tables = samples.replaced(tables, place, samples.at(tables, draw(st.sampled_from(places))))
    return samples.toml(tables)


@st.composite
def stretched(draw: st.DrawFn) -> str:
    """Draw a good dial file with a few of its numbers and words changed for others of their kind."""
    tables = samples.tables_of(draw(st.sampled_from(sorted(samples.GOOD))))
    leaves = [p for p in samples.paths(tables) if not isinstance(samples.at(tables, p), (dict, list))]
    for place in draw(st.lists(st.sampled_from(leaves), min_size=1, max_size=4)):
        value = samples.at(tables, place)
        if isinstance(value, str):
            tables = samples.replaced(tables, place, draw(st.sampled_from(_WORDS)))
        elif isinstance(value, (int, float)) and not isinstance(value, bool):
            factors = st.sampled_from([0.0, -1.0, 0.5, 0.99, 1.01, 3.0, 1e3, 1e-3, 1e9, 1e-9])
            near = st.floats(-100, 100) | factors.map(lambda f, v=value: v * f)
            tables = samples.replaced(tables, place, draw(near | _NUMBERS))
    return samples.toml(tables)


_ENDS = st.floats(-200, 200, allow_subnormal=False) | st.integers(-50, 50)
_STEPS = st.floats(1e-3, 1e3) | st.sampled_from([1, 2, 5, 1e-15, 1e15])
_POINTS = st.lists(st.tuples(_ENDS, _ENDS), min_size=2, max_size=5).map(
    lambda points: [
        list(pair) for pair in zip(*(sorted(side) for side in zip(*points, strict=True)), strict=True)
    ]
)
_FORMULAS = [
    "x",
    "x**2",
    "x**-1",
    "exp(x)",
    "sqrt(x)",
    "log(x)",
    "tan(x)",
    "x**x",
    "1e300*x",
    "1e-300*x",
    "x - 1e9",
]
_LAWS = (
    st.sampled_from(["linear", "logarithmic", "reflection", "decibel"])
    | st.fixed_dictionaries({"kind": st.just("power"), "exponent": _ENDS})
    | st.fixed_dictionaries({"kind": st.just("formula"), "signal": st.sampled_from(_FORMULAS)})
    | st.fixed_dictionaries({"kind": st.sampled_from(["table", "observed"]), "points": _POINTS})
    | st.fixed_dictionaries(
        {"kind": st.just("thermocouple"), "type": st.sampled_from(list("BEJKNRST"))},
        optional={"reference": st.sampled_from(["0 degC", "77 degF", "1500 degC", "0 K"])},
    )
    | st.sampled_from(["pt100", "nernst"])
    | st.fixed_dictionaries(
        {
            "kind": st.just("thermistor"),
            "r25": st.sampled_from(["10 kohm", "1e-9 ohm", "1e15 ohm"]),
            "beta": st.sampled_from([3950, 1e-9, 1e6, -100]),
        }
    )
)
_DIODES = st.sampled_from(["silicon", "germanium", "schottky", "copper oxide", "ideal"]) | st.sampled_from(
    [
        {"drop": "0.7 V"},
        {"drop": "1e-12 V"},
        {"saturation": "1 pA", "ideality": 1},
        {"saturation": "1 A", "ideality": 100, "resistance": "1 Mohm"},
    ]
)
_CIRCUITS = (
    st.fixed_dictionaries({"kind": st.just("direct")}, optional={"full": _ENDS, "rest": _ENDS})
    | st.fixed_dictionaries(
        {"kind": st.just("shunt")},
        optional={
            "range": st.sampled_from(["1 A", "1e-12 A", "1e15 A"]),
            "built": st.sampled_from(["1 ohm", "1e-17 ohm"]),
        },
    )
    | st.fixed_dictionaries(
        {"kind": st.just("multiplier")},
        optional={
            "range": st.sampled_from(["10 V", "1e15 V"]),
            "suppress": st.sampled_from(["5 V", "-1e17 V"]),
        },
    )
    | st.fixed_dictionaries(
        {
            "kind": st.sampled_from(["series ohmmeter", "shunt ohmmeter"]),
            "half": st.sampled_from(["30 ohm", "1e-15 ohm", "1e15 ohm"]),
        },
        optional={
            "battery": st.sampled_from(["1.5 V", "1e-9 V", "1e9 V"]),
            "worn": st.sampled_from(["1.2 V", "1e-12 V"]),
        },
    )
    | st.fixed_dictionaries(
        {
            "kind": st.just("universal shunt"),
            "ranges": st.sampled_from([["1 A", "5 A"], ["10 mA", "50 A", "1e15 A"], ["40 A", "1 A"]]),
        },
        optional={"range": st.sampled_from(["5 A", "40 A"]), "swamp": st.sampled_from(["1 ohm", "1e15 ohm"])},
    )
    | st.fixed_dictionaries(
        {"kind": st.just("current transformer"), "ratio": st.sampled_from(["200/5", "1e-6/1e6", "4/500"])}
    )
    | st.fixed_dictionaries(
        {"kind": st.just("rectifier")},
        optional={
            "range": st.sampled_from(["10 V", "1 mV", "1e9 V"]),
            "diode": _DIODES,
            "coil_shunt": st.sampled_from(["100 ohm", "1e-12 ohm"]),
            "built": st.sampled_from(["9 kohm", "1e-9 ohm"]),
        },
    )
    | st.fixed_dictionaries(
        {
            "kind": st.just("rectifier"),
            "rectifier": st.sampled_from(["half bridge", "half wave"]),
            "diode": _DIODES,
        },
        optional={"legs": st.sampled_from(["1 kohm", "1e15 ohm", "1e-12 ohm"])},
    )
    | st.fixed_dictionaries(
        {
            "kind": st.just("bridge"),
            "supply": st.sampled_from(["1 V", "-1 V", "1e15 V"]),
            "arms": st.sampled_from([["220 ohm", "220 ohm", "100 ohm"], ["1e-9 ohm", "1e15 ohm", "1 ohm"]]),
        }
    )
)
_LINES = (
    st.fixed_dictionaries(
        {"radius": st.floats(0.01, 200)}, optional={"centre": st.lists(_ENDS, min_size=2, max_size=2)}
    )
    | st.fixed_dictionaries({"radius": st.floats(20, 80)})
    | st.fixed_dictionaries(
        {"line": st.lists(st.lists(_ENDS, min_size=2, max_size=2), min_size=2, max_size=2)},
        optional={"curve": st.floats(0.01, 200), "square": st.booleans()},
    )
)


@st.composite
def _scales(draw: st.DrawFn) -> dict[str, object]:
    start, end = sorted([draw(_ENDS), draw(_ENDS | st.just(float("inf")))])
    inside = st.floats(start, end, allow_nan=False, allow_infinity=False) if start < end else _ENDS
    optional = {
        "numbered": st.lists(inside, max_size=6) | st.fixed_dictionaries({"every": _STEPS}) | st.just("auto"),
        "divisions": st.fixed_dictionaries({"every": _STEPS}),
        "gap": st.floats(0.01, 50),
        "law": _LAWS,
        "circuit": _CIRCUITS,
    }
    units = st.sampled_from(["A", "mA", "V", "kV", "ohm", "dB", "", "W", "degC", "degF", "K", "pH"])
    scale = draw(st.fixed_dictionaries({"unit": units}, optional=optional))
    return {"from": start, "to": end, **draw(_LINES), **scale}


@st.composite
def nearly_right(draw: st.DrawFn) -> str:
    """Draw a dial of sensible parts that may or may not go together."""
    ends = draw(st.sampled_from([(-44, 44), (45, -45), (0, 0.02), (-140, 140), (-360, 360), (-10, 170.5)]))
    movement: dict[str, object] = dict(zip(("rest", "full"), ends, strict=True))
    movement |= draw(
        st.fixed_dictionaries(
            {},
            optional={
                "current": st.sampled_from(["1 mA", "50 uA", "5 A", "1e-15 A"]),
                "resistance": st.sampled_from(["75 ohm", "2k", "0.001 ohm", "1e15 ohm"]),
                "response": st.just("linear")
                | st.fixed_dictionaries({"power": st.floats(0.05, 20)})
                | st.fixed_dictionaries({"points": _POINTS}),
                "reading": st.lists(
                    st.fixed_dictionaries(
                        {"current": st.sampled_from(["0.2 mA", "1 mA", "-1 mA", "9 uA"]), "angle": _ENDS}
                    ),
                    max_size=4,
                ),
                "stops": st.sampled_from([[-360, 360], [-50, 50]]),
            },
        )
    )
    width = draw(st.sampled_from([50, 500, 2000]))
    plate = {"size": [width, width], "pivot": [width / 2, width / 2]}
    scales = draw(st.lists(_scales(), min_size=1, max_size=2))
    return samples.toml({"dialgen": 1, "movement": movement, "scale": scales, "plate": plate})


def _load_and_draw(text: bytes) -> None:
    """Load and draw a dial file; whatever is refused must be placed in the file and be said in a line."""
    with tempfile.TemporaryDirectory() as folder:
        file = Path(folder) / "dial.toml"
        file.write_bytes(text)
        try:
            face = api.load(file)
            for warning in face.warnings():
                assert "nan" not in warning.message.split()
            drawn = face.render(".svg")
        except DialFileError as error:
            for fault in error.faults:
                assert fault.line >= 1
                assert fault.column >= 1
                assert fault.message
                assert "\n" not in fault.message
            return
        assert not re.search(rb' (?:d|x|y|x1|y1|cx|cy|r|transform)="[^"]*(?:nan|inf)', drawn)
        for scale in face.scales:
            angles = [mark.angle_deg for mark in scale.marks]
            assert angles in (sorted(angles), sorted(angles, reverse=True))
        for number in range(1, len(face.scales) + 1):
            _ask(face, number)
        _bill(face)


def _bill(face: api.Face) -> None:
    """Work out the circuits: figures come out finite or as nothing, or the file is refused with a place."""
    try:
        bills = [face.bill(circuit) for circuit in face.circuits]
    except DialFileError as error:
        assert all(fault.line >= 1 and "; " in fault.message for fault in error.faults)  # noqa: PT017
        return
    for bill in bills:
        assert bill.cautions
        for part in bill.assessment.parts if bill.assessment else ():
            assert math.isfinite(part.full.watts)
            assert part.rating_w >= 2 * part.full.watts * (1 - 1e-6)
        words = "\n".join(bill_lines(bill))
        assert "nan" not in words
        assert "inf" not in words.replace("infinit", "")


def _ask(face: api.Face, scale: int) -> None:
    """Ask a face for angles and values far outside it: it answers with a number or refuses."""
    for asked in (0.0, -1.0, 1e-300, 1e300, -1e300, math.inf, -math.inf, math.nan, 50.0, 359.0):
        for answer in (face.angle, face.value):
            try:
                assert not math.isnan(answer(asked, scale))
            except NoSuchValue as error:
                assert "; " in error.message  # noqa: PT017


@_FUZZ
@given(broken())
def test_a_broken_dial_file_is_drawn_or_refused(text: str) -> None:
    """A good dial file with random changes is drawn, or refused with the place of every fault."""
    _load_and_draw(text.encode())


@_FUZZ
@given(stretched())
def test_a_dial_with_other_numbers_is_drawn_or_refused(text: str) -> None:
    """A good dial file with other numbers and words in it is drawn, or refused with the place."""
    _load_and_draw(text.encode())


@_FUZZ
@given(nearly_right())
def test_a_dial_of_sensible_parts_is_drawn_or_refused(text: str) -> None:
    """A dial put together at random from sensible parts is drawn, or refused with the place."""
    _load_and_draw(text.encode())


@_FUZZ
@given(st.binary(max_size=400) | st.text(max_size=400).map(lambda t: t.encode("utf-8", "surrogatepass")))
def test_bytes_that_are_no_dial_file_are_refused(raw: bytes) -> None:
    """Whatever bytes a file holds, reading it ends in a refusal with a place."""
    _load_and_draw(raw)


@_FUZZ
@given(st.data())
def test_text_cut_and_stirred_is_drawn_or_refused(data: st.DataObject) -> None:
    """A good file's text with a piece cut out, doubled or replaced is drawn, or refused with the place."""
    text = samples.GOOD[data.draw(st.sampled_from(sorted(samples.GOOD)))]
    first = data.draw(st.integers(0, len(text)))
    last = data.draw(st.integers(first, min(first + 30, len(text))))
    middle = data.draw(
        st.sampled_from(["", text[first:last] * 2, '"', "[", "]]", ",", "=", "\n", "{", "−", "Ω", "inf"])
    )
    _load_and_draw((text[:first] + middle + text[last:]).encode())


@pytest.mark.parametrize("name", sorted(samples.GOOD))
def test_the_good_files_are_good(name: str) -> None:
    """The files that the others are broken from do load, and their writer writes what they hold."""
    tables = samples.tables_of(name)
    assert tomllib.loads(samples.toml(tables)) == tables
    parse(Source(name=name, folder=Path(), text=samples.GOOD[name]))


def test_every_refusal_is_an_error_of_ours() -> None:
    """A dial file's error is a DialgenError and a ValueError, so that either catches it."""
    assert issubclass(DialFileError, DialgenError)
    assert issubclass(DialFileError, ValueError)
