"""Which dial symbols a face shows, what speaks against them, and the row they stand in."""

from __future__ import annotations

from collections.abc import Iterator, Mapping, Sequence
from functools import partial

from dialgen.circuit.direct import Direct
from dialgen.circuit.shunt import Shunt
from dialgen.circuit.terminals import Circuit
from dialgen.dialfile.looks import look_of
from dialgen.dialfile.models import DialFile, Scale
from dialgen.dialfile.rows import Fiducial
from dialgen.dialfile.signs import AUTO, CLASS
from dialgen.drawing import Point
from dialgen.errors import InputError, Key, Remark
from dialgen.face.lettered.settle import Choice, Form, Items, stacked
from dialgen.face.ruled.precision import fiducial
from dialgen.geometry.points import Observed
from dialgen.lettering import Hand
from dialgen.looks import Decimal
from dialgen.symbols import Form as ClassForm
from dialgen.symbols import Sign, Subject, class_sign, items, parse, width

_ANY = "any"
_CURRENTS: Mapping[str, Mapping[str, str]] = {
    "moving coil": {
        "direct": "dc",
        "shunt": "dc",
        "universal shunt": "dc",
        "multiplier": "dc",
        "rectifier": "ac",
        "series ohmmeter": "dc",
        "shunt ohmmeter": "dc",
        "bridge": "dc",
    },
    "moving iron": {
        "current transformer": "ac",
        "rectifier": "ac",
        _ANY: "ac and dc",
    },
}
"""The kind of current that a movement shows behind a circuit, by the kinds of both.

The row of any circuit stands for all that have none of their own; where there is none, nothing is said
of the current: a moving coil behind a current transformer shows none.
"""

_MOVEMENTS: Mapping[str, str] = {"moving coil": "moving coil", "moving iron": "moving iron"}
"""The symbol of a movement by its kind; those not listed have none."""

_TOGETHER: Mapping[tuple[str, str], str] = {("moving coil", "rectifier"): "moving coil with rectifier"}
"""One symbol for a movement and a kind of circuit before it."""

_FORMS: Mapping[Fiducial, ClassForm] = {
    Fiducial.LIMIT: "limit",
    Fiducial.LENGTH: "length",
    Fiducial.VALUE: "value",
}
_SPACE = 0.5
_LEAST_FOR_TWO_ROWS, _TWO_ROWS_TOLL = 3, 2.0
_KEY: Key = ("symbols", "show")


def signs(file: DialFile) -> tuple[Sign, ...]:
    """Return the signs that a file shows, in its order, each once; none without a ``[symbols]`` table."""
    asked = _asked(file)
    own = [entry for entry in asked if isinstance(entry, Sign)]
    found: list[Sign] = []
    for entry in asked:
        if isinstance(entry, Sign):
            found.append(entry)
        else:
            found += _classes(file) if entry == CLASS else _following(file, own)
    return tuple(dict.fromkeys(found))


def check_signs(file: DialFile) -> Iterator[InputError]:
    """Yield an error for every claim in the list of symbols that the file does not bear out.

    A star claims a test of the insulation, which needs its date; "class" needs a scale with one.
    """
    for key, entry in _entries(file):
        if isinstance(entry, Sign) and _is_star(entry) and file.dial.tested is None:
            yield InputError(
                "a star claims that the insulation was tested, and no test is on file; write its date, "
                "tested = 2026-05-01 under [dial], or leave the star out",
                key,
                ("dial", "tested"),
            )
        elif entry == CLASS and not _classes(file):
            yield InputError(
                "no scale has a class to show; write class = 1.5 at the scale it holds for, "
                'or leave "class" out',
                key,
                ("scale", 0, "class"),
            )


def sign_remarks(file: DialFile) -> Iterator[Remark]:
    """Yield a warning where a class is marked: a claim that the maker must have proved."""
    for key, entry in _entries(file):
        if entry == CLASS:
            said = " and ".join(sign.parameter for sign in _classes(file))
            yield Remark(
                f"marking class {said} is a claim, and no passed check of this dial is on file; "
                "prove it before the instrument leaves the shop",
                key,
            )


def row_choices(shown: Sequence[Sign], height_mm: float, ink: str, hand: Hand) -> list[Choice]:
    """Return the ways to set signs: in a row, and where they are several in two, one under the other.

    Args:
        shown: the signs, in order.
        height_mm: of a row.
        ink: their colour.
        hand: the hand of their letters.
    """
    widths = [width(sign, height_mm, hand) for sign in shown]
    space_mm = _SPACE * height_mm

    def row(part: slice) -> Form:
        whole_mm = sum(widths[part]) + space_mm * (len(widths[part]) - 1)

        def draw(at: Point, share: float) -> Items:
            drawn: Items = ()
            x = at[0] - share * whole_mm / 2
            for sign, width_mm in zip(shown[part], widths[part], strict=True):
                drawn += items(sign, (x + share * width_mm / 2, at[1]), share * height_mm, ink, hand)
                x += share * (width_mm + space_mm)
            return drawn

        return Form(whole_mm, height_mm, draw)

    choices = [Choice(0.0, lambda: row(slice(None)))]
    if len(shown) >= _LEAST_FOR_TWO_ROWS:
        half = (len(shown) + 1) // 2
        two = partial(stacked, space_mm=space_mm)
        choices.append(Choice(_TWO_ROWS_TOLL, lambda: two([row(slice(half)), row(slice(half, None))])))
    return choices


def _asked(file: DialFile) -> tuple[Sign | str, ...]:
    if file.symbols is None:
        return ()
    show = file.symbols.show
    return (AUTO,) if show == AUTO else tuple(show)


def _entries(file: DialFile) -> Iterator[tuple[Key, Sign | str]]:
    """Yield what the list of symbols says, each with its place."""
    for i, entry in enumerate(_asked(file)):
        yield (*_KEY, i), entry


def _following(file: DialFile, own: Sequence[Sign]) -> list[Sign]:
    """Return the signs that follow from movement and circuits, but for subjects the list speaks of itself."""
    spoken = {sign.symbol.subject for sign in own}
    movement = file.movement.kind
    kinds = list(_circuit_kinds(file))
    currents = [_current(movement, kind) for kind in kinds or [_ANY]]
    joint = next((_TOGETHER[movement, kind] for kind in kinds if (movement, kind) in _TOGETHER), None)
    names = [joint or _MOVEMENTS.get(movement), *currents]
    found = [parse(name) for name in dict.fromkeys(names) if name]
    found = [sign for sign in found if sign.symbol.subject not in spoken]
    return [*found, parse("shunt")] if _bought_shunt(file) else found


def _current(movement: str, circuit: str) -> str | None:
    row = _CURRENTS.get(movement, {})
    return row.get(circuit) or row.get(_ANY)


def _circuits(file: DialFile) -> Iterator[Circuit]:
    """Yield the circuit of every scale and row of numerals that has one."""
    for scale in file.scale:
        for circuit in (scale.circuit or file.circuit, *(row.circuit for row in scale.also)):
            if circuit is not None:
                yield circuit


def _circuit_kinds(file: DialFile) -> Iterator[str]:
    """Yield the kinds of the circuits that are known; an observed scale without one could have any."""
    yield from (circuit.kind for circuit in _circuits(file))
    if any(
        scale.circuit is file.circuit is None and not isinstance(scale.law, Observed) for scale in file.scale
    ):
        yield Direct.kind


def _bought_shunt(file: DialFile) -> bool:
    return any(isinstance(circuit, Shunt) and circuit.rated is not None for circuit in _circuits(file))


def _classes(file: DialFile) -> list[Sign]:
    """Return the sign of every scale's class, equal ones once."""
    return list(dict.fromkeys(_class(file, scale) for scale in file.scale if scale.accuracy_class))


def _class(file: DialFile, scale: Scale) -> Sign:
    number = f"{scale.accuracy_class:g}"
    if look_of(file.look, scale.look).decimal is Decimal.COMMA:
        number = number.replace(".", ",")
    return class_sign(number, _FORMS[fiducial(scale)])


def _is_star(sign: Sign) -> bool:
    return sign.symbol.subject is Subject.SAFETY and sign.symbol.claim
