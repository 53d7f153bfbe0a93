"""Formulas: what is let through, what is refused and where, and that numpy and brentq agree."""

import math
import string
import time

import numpy as np
import pytest
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st
from scipy.optimize import brentq

from dialgen.errors import FormulaError
from dialgen.geometry.formula import CONSTANTS, FUNCTIONS, LONGEST, Formula, compile_formula, follow

REFUSED = [
    ("", 1),
    ("   ", 1),
    ("1 + 2", 1),  # no x
    ("x.real", 1),
    ("2*x.__class__", 3),
    ("().__class__.__bases__ + x", 1),
    ("__import__('os') + x", 1),
    ("  open('f') + x", 3),
    ("x + eval('1')", 5),
    ("x + spam(1)", 5),
    ("x + sqrt", 5),
    ("sqrt(x, 2)", 1),
    ("sqrt()*x", 1),
    ("sqrt(x=1) + x", 1),
    ("sqrt(*x) + x", 6),
    ("x + y", 5),
    ("x < 3", 1),
    ("x == 3", 1),
    ("x if x else 1", 1),
    ("x and 1", 1),
    ("not x", 1),
    ("~x", 1),
    ("x // 2", 3),
    ("x % 2", 3),
    ("x @ x", 3),
    ("x ^ 2", 3),
    ("x & 1", 3),
    ("x << 2", 3),
    ("(lambda: x)()", 1),
    ("x*(lambda: 1)()", 3),
    ("'x' + x", 1),
    ("x + 'a'", 5),
    ("x*b'a'", 3),
    ("f'{x}' + x", 1),
    ("x[0]", 1),
    ("[x]", 1),
    ("{x: 1}", 1),
    ("{x}", 1),
    ("[x for x in (1, 2)]", 1),
    ("(x := 3)", 2),
    ("x = 3", 3),
    ("x + None", 5),
    ("x + True", 5),
    ("x + 1j", 5),
    ("x + ...", 5),
    ("x, 1", 1),
    ("(1, x)", 1),
    ("2,5*x", 1),
    ("await x", 1),
    ("(yield x)", 2),
    ("import os", 1),
    ("x; x", 2),
    ("x #", None),
    ("x +", None),
    ("x\n+ 1", None),
    ("x + 9" + "9" * 320, 5),
    ("µ*x", 1),
    ("x*µ + 1", 3),
    ("((µµ)) + x", 3),
    ("x\0", None),
    ("1if x else 2", None),
    ("x" + "+x" * 60, None),
    ("-" * 300 + "x", None),
    ("x" * (LONGEST + 1), None),
]


@pytest.mark.parametrize(("text", "column"), [case for case in REFUSED if case[0] != "x #"])
def test_anything_but_arithmetic_is_refused_at_its_column(text, column):
    """Attributes, calls, comparisons, text and the like raise FormulaError with the column they stand at."""
    with pytest.raises(FormulaError) as caught:
        compile_formula(text)
    assert caught.value.column >= 1
    assert f"column {caught.value.column} of the formula" in str(caught.value)
    if column is not None:
        assert caught.value.column == column


@pytest.mark.parametrize(
    "text",
    ["x*9**9**9", "x + 9**9**9**9", "(9**999999999)**x", "exp(exp(exp(exp(x))))", "x**x**x**x**x"],
)
def test_towers_of_powers_return_at_once(text):
    """A tower of powers overflows in doubles instead of growing without end."""
    start = time.perf_counter()
    follow(compile_formula(text), (0.0, 10.0)).forward(np.array([1.0, 3.0]))
    assert time.perf_counter() - start < 0.5


@pytest.mark.parametrize(
    ("text", "at", "expected"),
    [
        ("x**2", 3.0, 9.0),
        ("-x**2", 3.0, -9.0),
        ("2**3**2*x", 1.0, 512.0),
        ("\u2212x + 1", 3.0, -2.0),
        (" (x + 1)/2 ", 3.0, 2.0),
        ("e**x", 1.0, math.e),
        ("sqrt(x) + log10(x)", 100.0, 12.0),
        ("1e-3*x", 2.0, 0.002),
        ("pi*x", 1.0, math.pi),
        ("abs(-x)", 4.0, 4.0),
        ("+x", 4.0, 4.0),
        ("x - 1 - 1", 4.0, 2.0),
        ("x/2/2", 4.0, 1.0),
        ("atan(x)*4", 1.0, math.pi),
        ("0x10*x", 1.0, 16.0),
        ("1_000*x", 1.0, 1000.0),
    ],
)
def test_arithmetic_by_hand(text, at, expected):
    """Small formulas come out as worked by hand, precedence and U+2212 included."""
    assert float(compile_formula(text)(np.array(at))) == pytest.approx(expected, rel=1e-15)


NUMPY_NAMES = {"asin": "arcsin", "acos": "arccos", "atan": "arctan"}


@st.composite
def expressions(draw, depth=4):
    """Arithmetic as text, and the same thing as numpy's own calls in text."""
    kind = draw(st.sampled_from("xncfbu" if depth else "xnc"))
    if kind == "x":
        return "x", "x"
    if kind == "n":
        number = draw(st.floats(-99.0, 99.0, allow_nan=False).map(lambda v: round(v, 3)))
        return f"({number!r})", f"np.float64({number!r})"
    if kind == "c":
        name = draw(st.sampled_from(sorted(CONSTANTS)))
        return name, f"np.float64({CONSTANTS[name]!r})"
    if kind == "f":
        name = draw(st.sampled_from(sorted(FUNCTIONS)))
        ours, theirs = draw(expressions(depth - 1))
        return f"{name}({ours})", f"np.{NUMPY_NAMES.get(name, name)}({theirs})"
    if kind == "u":
        ours, theirs = draw(expressions(depth - 1))
        return f"(-{ours})", f"np.negative({theirs})"
    left, right = draw(expressions(depth - 1)), draw(expressions(depth - 1))
    sign, call = draw(
        st.sampled_from(
            [("+", "add"), ("-", "subtract"), ("*", "multiply"), ("/", "divide"), ("**", "power")]
        )
    )
    return f"({left[0]} {sign} {right[0]})", f"np.{call}({left[1]}, {right[1]})"


@settings(max_examples=150, suppress_health_check=[HealthCheck.filter_too_much])
@given(expressions(), st.lists(st.floats(-50.0, 50.0), min_size=1, max_size=5))
def test_values_are_numpys_own(pair, places):
    """A random expression gives what numpy's functions give, called by hand."""
    ours, theirs = pair
    x = np.array(places)
    with np.errstate(all="ignore"):
        expected = eval(theirs, {"np": np, "x": x}) + 0 * x
        if "x" not in theirs.replace("exp", ""):
            with pytest.raises(FormulaError, match="has no x"):
                compile_formula(ours)
            return
        if len(ours) > LONGEST:
            return
        got = compile_formula(ours)(x) + 0 * x
    np.testing.assert_array_equal(got, expected)


PLAIN = "x ( ) + ** - * / , . 9 __ os lambda : [ ] { } = := if else for in import e j and not yield @ ~ < !"
ODD = (
    "µ",
    "≤",
    "−",
    "\ud800",
    "\0",
    "\n",
    "\\",
    " ",
    '"',
    "'",
    "f'",
    "#",
    ";",
    "1if",
    "0x",
    "1e9",
    "sqrt(",
    "log(",
)
WORDS = st.sampled_from([*ODD, *PLAIN.split()])


@settings(max_examples=400, suppress_health_check=[HealthCheck.too_slow])
@given(
    st.one_of(
        st.lists(WORDS, max_size=60).map("".join),
        st.text(max_size=60),
        st.text(alphabet=string.printable, max_size=80),
        st.builds(lambda a, b, n: a * n + "x" + b * n, WORDS, WORDS, st.integers(0, 199)),
    )
)
def test_no_text_does_anything_but_compile_or_be_refused(text):
    """Whatever is written, a formula compiles or raises FormulaError, quickly and without a warning."""
    start = time.perf_counter()
    column = 1
    try:
        compile_formula(text)
    except FormulaError as error:
        column = error.column
    assert 1 <= column <= max(len(text), 1) + 1
    assert time.perf_counter() - start < 1.0


MONOTONE = [
    ("x**3 + x", (-2.0, 3.0)),
    ("exp(x/2)", (0.0, 9.0)),
    ("log(x + 1)", (0.0, 50.0)),
    ("sqrt(x)", (0.0, 10.0)),
    ("-2*x + 7", (1.0, 4.0)),
    ("1/(x + 1)", (0.0, 30.0)),
    ("x**2", (0.0, 5.0)),
    ("atan(x/3)", (-20.0, 20.0)),
    ("12.5e-3*x*(1 + 2e-4*x)", (0.0, 300.0)),
]


@pytest.mark.parametrize(("text", "span"), MONOTONE)
def test_inverse_is_brentqs(text, span):
    """The inverse of a formula at values over its scale is the root that scipy's brentq finds."""
    expression = compile_formula(text)
    stage = follow(expression, span)
    exact = np.linspace(*span, 23)[1:-1]
    wanted = stage.forward(exact)
    got = stage.inverse(wanted)
    for root, target in zip(got, wanted, strict=True):
        other = brentq(
            lambda x, t=target: float(expression(np.array(x))) - t, *span, xtol=1e-14, rtol=8.9e-16
        )
        assert root == pytest.approx(other, rel=1e-13, abs=1e-13)
    assert got == pytest.approx(exact, rel=1e-13, abs=1e-13)


@pytest.mark.parametrize(
    ("text", "span", "domain"),
    [
        ("(x - 5)**2", (5.0, 9.0), (5.0, 409.0)),  # turns at 5
        ("x**2 + x", (0.0, 10.0), (-0.5, 1010.0)),  # turns at -0.5
        ("sqrt(x + 1)", (0.0, 10.0), (-1.0, 1010.0)),  # ends at -1
        ("x", (0.0, 10.0), (-1000.0, 1010.0)),  # followed for a hundred spans
        ("sin(x)", (0.0, 1.0), (-math.pi / 2, math.pi / 2)),
        ("1/(1 + x)", (0.0, math.inf), (-1.0, math.inf)),
        ("1 - 1/(1 + x)**2", (1.0, math.inf), (-1.0, math.inf)),
    ],
)
def test_formula_is_followed_until_it_turns_or_ends(text, span, domain):
    """The stage's domain reaches to where the formula turns or ends, or a hundred spans; not across."""
    got = follow(compile_formula(text), span).domain
    assert got[1] == pytest.approx(domain[1], rel=1e-6)
    # Near its turn a parabola is level to within a double over the square root of a double's grain.
    assert got[0] == pytest.approx(domain[0], abs=2e-7)


def test_formula_to_infinity_is_inverted_all_the_way():
    """A formula with a limit at infinity is inverted at large values and at the limit itself."""
    stage = follow(compile_formula("5/(5 + x)"), (0.0, math.inf))
    values = np.array([0.0, 1.0, 300.0, 1e6, 1e12])
    assert stage.inverse(stage.forward(values)) == pytest.approx(values, rel=1e-12)
    assert stage.inverse(np.array([0.0])).tolist() == [math.inf]


@pytest.mark.parametrize(
    ("text", "span", "zero"),
    [
        ("x", (0.0, 10.0), 0.0),
        ("x", (50.0, 100.0), 0.0),
        ("x - 3", (5.0, 10.0), 0.0),
        ("sqrt(x)", (1.0, 10.0), 0.0),
        ("x**2", (1.0, 10.0), 0.0),
        ("exp(x)", (0.0, 10.0), None),
        ("x**2 + 1", (0.0, 10.0), None),
        ("1/x", (1.0, 10.0), None),
        ("1/(1 + x)", (0.0, math.inf), 0.0),
    ],
)
def test_zero_signal_is_known_only_where_it_is_reached(text, span, zero):
    """A formula has a zero signal where it reaches one, and None where it never does."""
    assert Formula(signal=text).zero(span, "") == zero
