"""Formulas of x: read by a whitelist of syntax nodes, run on whole arrays, inverted by bracketing.

A formula is arithmetic of numbers, x, named constants and named functions; nothing else is let
through, so it can neither reach a file nor hang.  Powers are taken in doubles: 9**9**9 overflows
at once instead of growing.
"""

from __future__ import annotations

import ast
import math
import operator
import warnings
from collections.abc import Callable
from dataclasses import dataclass
from typing import ClassVar

import numpy as np

from dialgen.errors import FormulaError
from dialgen.geometry.sampling import sample_places
from dialgen.roots import bracketed_roots
from dialgen.stage import EVERYWHERE, Array, Span, Stage

LONGEST = 400
_DEEPEST = 40

FUNCTIONS: dict[str, Callable[..., Array]] = {
    "sqrt": np.sqrt, "exp": np.exp, "log": np.log, "log10": np.log10, "log2": np.log2, "abs": np.abs,
    "sin": np.sin, "cos": np.cos, "tan": np.tan, "asin": np.arcsin, "acos": np.arccos, "atan": np.arctan,
    "sinh": np.sinh, "cosh": np.cosh, "tanh": np.tanh, "cbrt": np.cbrt,
}  # fmt: skip
CONSTANTS = {"pi": math.pi, "e": math.e}

_BINARY: dict[type[ast.operator], Callable[[Array, Array], Array]] = {
    ast.Add: operator.add,
    ast.Sub: operator.sub,
    ast.Mult: operator.mul,
    ast.Div: np.divide,
    ast.Pow: np.power,
}
_UNARY: dict[type[ast.unaryop], Callable[[Array], Array]] = {ast.UAdd: operator.pos, ast.USub: operator.neg}

Expression = Callable[[Array], Array]


@dataclass(frozen=True, slots=True, kw_only=True)
class Formula:
    """The signal as an expression in x, the bare value on the face."""

    kind: ClassVar[str] = "formula"
    signal: str

    def __post_init__(self) -> None:
        try:
            compile_formula(self.signal)
        except FormulaError as error:
            raise error.under("signal") from None

    @property
    def takes_face_values(self) -> bool:
        """Always: x is the number on the face."""
        return True

    def signal_unit(self, unit: str) -> str | None:
        """Return None: the signal is in whatever SI unit the circuit takes."""
        return None

    def stage(self, span: Span, unit: str) -> Stage:
        """Return the formula as a stage, followed on from ``span``."""
        return follow(compile_formula(self.signal), span)

    def zero(self, span: Span, unit: str) -> float | None:
        """Return 0 where the formula, followed on from the scale, reaches it; else None."""
        stage = follow(compile_formula(self.signal), span)
        places = np.append(stage.places, stage.domain[1])
        signals = stage.forward(places)
        if signals.min() < 0 < signals.max() or (math.isinf(places[-1]) and signals[-1] == 0):
            return 0.0
        end = 0 if abs(signals[0]) < abs(signals[-1]) else -1
        size = float(np.max(np.abs(stage.forward(sample_places(span, 65)))))
        # Near zero at an end counts only where the formula ends or turns there, as sqrt(x) does;
        # exp(x) comes as near as you like and still never reaches it.
        outside = places[end] + (1e-3 if end else -1e-3) * (places[-1] - places[0])
        beyond = abs(float(stage.forward(np.array(outside))))
        ends_there = not beyond <= abs(float(signals[end]))
        return 0.0 if abs(signals[end]) <= 1e-9 * size and ends_there else None


@dataclass(frozen=True, slots=True, eq=False)
class FormulaStage:
    """A compiled formula; outside the scale it holds as far as it goes on strictly one way.

    ``places`` ascend over all of its domain, densely enough to bracket roots between them.
    """

    expression: Expression
    places: Array
    domain: Span
    image: Span = EVERYWHERE

    def forward(self, x: Array) -> Array:
        """Return the signal; NaN where the formula has none, which the chain refuses."""
        return _evaluate(self.expression, x)

    def inverse(self, y: Array) -> Array:
        """Return the values whose signal is ``y``; NaN where the formula never gets there."""
        y = np.asarray(y, dtype=float)
        roots = bracketed_roots(self.forward, self.places, y)
        if math.isfinite(self.domain[1]):
            return roots
        near, limit = self.forward(np.array([self.places[-1], math.inf]))
        return np.where((y >= min(near, limit)) & (y <= max(near, limit)), math.inf, roots)


def follow(expression: Expression, span: Span) -> FormulaStage:
    """Return the formula as a stage over ``span``, and on as far as it is finite and strictly one way.

    It is followed to zero and up to a hundred spans beyond either end, but not past infinity.
    """
    low, high = span
    inside = sample_places(span, 257)
    first, last = _evaluate(expression, inside[[0, -1]])
    rising = bool(last > first)
    bounded = math.isfinite(high)
    width = high - low if bounded else max(abs(low), 1.0)
    reach = np.geomspace(1e-3, 100.0, 120) * width
    below = np.unique(np.append(low - reach, 0.0 if low > 0 else low - reach[0]))[::-1]
    down = _on(expression, low, below, not rising)
    if bounded:
        above = np.unique(np.append(high + reach, 0.0 if high < 0 else high + reach[0]))
    else:
        above = np.geomspace(2.0 * float(inside[-1]), 1e300, 600)
    up = _on(expression, float(inside[-1]), above, rising)
    places = np.concatenate((down[::-1], inside, up))
    far = float(places[-1])
    if not bounded and _holds_to_infinity(expression, np.append(above, high), rising):
        far = high
    return FormulaStage(expression, places, (float(places[0]), far))


def _evaluate(expression: Expression, x: Array) -> Array:
    with np.errstate(all="ignore"):
        return np.asarray(expression(np.asarray(x, dtype=float)) + np.zeros(np.shape(x)))


def _holds_to_infinity(expression: Expression, above: Array, rising: bool) -> bool:
    signals = _evaluate(expression, above)
    with np.errstate(invalid="ignore"):
        steps = np.diff(signals) if rising else -np.diff(signals)
    sizes = np.abs(signals[np.isfinite(signals)])
    rounding = 1e-12 * float(sizes.max()) if sizes.size else 0.0
    return not (np.isnan(signals).any() or (steps < -rounding).any())


def _on(expression: Expression, start: float, places: Array, rising: bool) -> Array:
    """Return the first of ``places`` while going on from ``start`` strictly one way."""
    signals = _evaluate(expression, np.concatenate(([start], places)))
    with np.errstate(invalid="ignore"):
        steps = np.diff(signals) if rising else -np.diff(signals)
    bad = np.flatnonzero(~(np.isfinite(signals[1:]) & (steps > 0)))
    if not len(bad):
        return places
    good = places[: bad[0]]
    # The formula turns, or ends, between two places; a turn may lie before the last good one.
    sure = [start, *good.tolist()][max(len(good) - 1, 0)]
    edge = _edge(expression, sure, float(places[bad[0]]), rising)
    kept = good[:-1]
    return np.append(kept, edge) if edge != sure else kept


def _edge(expression: Expression, good: float, bad: float, rising: bool) -> float:
    """Return how far from ``good`` towards ``bad`` the formula goes on, to the grain of a level turn."""
    step = 1e-7 * (bad - good)
    sign = 1.0 if rising else -1.0
    value = float(_evaluate(expression, np.array(good)))
    for _ in range(60):
        middle = (good + bad) / 2
        before, signal = _evaluate(expression, np.array([middle - step, middle])).tolist()
        # Both must hold: past a turn the slope is wrong, past a pole the signal.
        if math.isfinite(signal) and sign * signal > max(sign * value, sign * before):
            good, value = middle, signal
        else:
            bad = middle
    return good


def compile_formula(text: str) -> Expression:
    """Return the formula as a function of an array.

    Raises:
        FormulaError: anything but arithmetic of x, numbers, constants and known functions; or too
            long or too deep.

    >>> float(compile_formula("sqrt(x)*2 + 1")(np.array(9.0)))
    7.0
    """
    if len(text) > LONGEST:
        raise FormulaError(f"the formula has {len(text)} characters; at most {LONGEST} are read", LONGEST)
    plain = text.replace("\u2212", "-")
    start = len(plain) - len(plain.lstrip())
    if not plain.strip():
        raise FormulaError("the formula is empty; write an expression in x", 1)
    if "\n" in plain or "\r" in plain:
        raise FormulaError("the formula has a line break; write it on one line", start + 1)
    try:
        with warnings.catch_warnings():
            # What Python only warns of ("1if x") is no arithmetic either.
            warnings.simplefilter("error")
            tree = ast.parse(plain.strip(), mode="eval")
    except SyntaxError as error:
        raise FormulaError("not an expression; write arithmetic in x", start + (error.offset or 1)) from None
    except (ValueError, RecursionError, MemoryError):
        raise FormulaError("not an expression; write arithmetic in x", start + 1) from None
    try:
        _refuse_commas(tree.body)
        if not any(isinstance(node, ast.Name) and node.id == "x" for node in ast.walk(tree)):
            raise _Unread("the formula has no x, so every value looks alike; write one in x", tree.body)
        return _build(tree.body, 0)
    except _Unread as error:
        # Syntax nodes count in bytes of the stripped text; people count characters of their own.
        raw = plain.strip().encode()
        before = raw[: _offset(error.node, raw)].decode(errors="replace")
        raise FormulaError(error.message, start + len(before) + 1) from None


def _offset(node: ast.expr, raw: bytes) -> int:
    """Return where a node that is not arithmetic begins; of two operands it is their operator."""
    if not isinstance(node, ast.BinOp) or type(node.op) in _BINARY:
        return node.col_offset
    end = node.left.end_col_offset or 0
    return end + len(raw[end:]) - len(raw[end:].lstrip(b" )"))


class _Unread(Exception):
    """A syntax node that is not arithmetic, and why."""

    def __init__(self, message: str, node: ast.expr) -> None:
        super().__init__(message)
        self.message = message
        self.node = node


def _refuse_commas(body: ast.expr) -> None:
    if isinstance(body, ast.Tuple):
        raise _Unread("the formula has a comma; the decimal sign is a point", body)


def _build(node: ast.expr, depth: int) -> Expression:
    if depth > _DEEPEST:
        raise _Unread("the formula is nested too deeply; write it flatter", node)
    match node:
        case ast.Constant(value=int() | float() as number) if not isinstance(number, bool):
            return _constant(number, node)
        case ast.Name(id="x"):
            return lambda x: x
        case ast.Name(id=name) if name in CONSTANTS:
            return _constant(CONSTANTS[name], node)
        case ast.BinOp(left=left, op=op, right=right) if type(op) in _BINARY:
            return _binary(_BINARY[type(op)], _build(left, depth + 1), _build(right, depth + 1))
        case ast.UnaryOp(op=op, operand=operand) if type(op) in _UNARY:
            return _unary(_UNARY[type(op)], _build(operand, depth + 1))
        case ast.Call(func=ast.Name(id=name), args=[argument], keywords=[]) if name in FUNCTIONS:
            return _unary(FUNCTIONS[name], _build(argument, depth + 1))
    raise _Unread(_unknown(node), node)


def _constant(number: float, node: ast.expr) -> Expression:
    try:
        value = np.float64(number)
    except OverflowError:
        raise _Unread("the number is too large; write a smaller one", node) from None
    return lambda _: value  # type: ignore[return-value]  # numpy broadcasts a scalar as it is


def _binary(act: Callable[[Array, Array], Array], left: Expression, right: Expression) -> Expression:
    return lambda x: act(left(x), right(x))


def _unary(act: Callable[[Array], Array], operand: Expression) -> Expression:
    return lambda x: act(operand(x))


def _unknown(node: ast.expr) -> str:  # noqa: PLR0911  (a table of what people write)
    known = ", ".join(sorted(FUNCTIONS))
    match node:
        case ast.Name(id=name) if name in FUNCTIONS:
            return f"{name} needs its argument in brackets; write {name}(x)"
        case ast.Name(id=name):
            return f"{name!r} is not known; write in x, pi, e and the functions {known}"
        case ast.Call(func=ast.Name(id=name)) if name in FUNCTIONS:
            return f"{name} takes one argument; write {name}(x)"
        case ast.Call(func=ast.Name(id=name)):
            return f"the function {name!r} is not known; there are {known}"
        case ast.BinOp(op=ast.BitXor()):
            return "^ is not read as a power; write **"
        case ast.Constant():
            return "only numbers may stand here; write arithmetic in x"
    return "this is not arithmetic; write +, -, *, /, **, brackets and the functions " + known
