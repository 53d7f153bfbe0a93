"""A sign: a symbol with its parameter, read from what a user writes."""

from __future__ import annotations

import difflib
import re
from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Literal

from dialgen.errors import InputError
from dialgen.quantity import VOLT_ABOVE, bare_number, plain_number, read_length, shown
from dialgen.symbols.symbol import Symbol
from dialgen.symbols.table import SYMBOLS

Form = Literal["limit", "length", "value"]
"""What a class is a percentage of: the upper limit, the scale length or the actual value."""

_NAMED = {symbol.name.casefold(): symbol for symbol in SYMBOLS if symbol.needs is None}
_WITH_PARAMETER = {
    symbol.name.casefold(): symbol for symbol in SYMBOLS if symbol.needs not in (None, "class")
}
_CLASSES = {symbol.name: symbol for symbol in SYMBOLS if symbol.needs == "class"}
_TILDES = str.maketrans({"\N{TILDE OPERATOR}": "~", "\N{SMALL TILDE}": "~"})
_CLASS_NUMBER = re.compile(r"[0-9]+([.,][0-9]+)?")
_TESTED_EMPTY_V = 500.0
_MOST_IN_A_STAR = 3


@dataclass(frozen=True, slots=True)
class Sign:
    """A symbol, and its parameter as it is lettered: "2" (kV), "60°", "1.5"; "" where it takes none."""

    symbol: Symbol
    parameter: str = ""


def parse(text: str) -> Sign:
    """Return the sign that ``text`` names, such as "moving coil", "inclined 60" or "test 2 kV".

    Capitals and the number of spaces do not matter.

    Raises:
        InputError: no such symbol, with the nearest name; or a parameter that is missing or odd.

    >>> parse("test 2 kV").parameter, parse("Moving  coil").symbol.number
    ('2', 'F-1')
    """
    words = " ".join(text.translate(_TILDES).split())
    if found := _NAMED.get(words.casefold()):
        return Sign(found)
    for name, symbol in _WITH_PARAMETER.items():
        if words.casefold() == name or words.casefold().startswith(f"{name} "):
            return _READERS[symbol.needs or ""](symbol, words[len(name) :].strip(), text)
    raise InputError(f"no symbol {shown(text)}; {_instead(words)}")


def class_sign(number_text: str, form: Form) -> Sign:
    """Return the sign of a class of accuracy.

    Args:
        number_text: the class as it is lettered.
        form: what it is a percentage of.

    Raises:
        InputError: not a number, or no such form.

    >>> class_sign("1.5", "value").symbol.number
    'E-3'
    """
    if not _CLASS_NUMBER.fullmatch(number_text):
        raise InputError(f"{shown(number_text)} is not a class; write a number such as 1.5")
    symbol = _CLASSES.get(f"class {form}")
    if symbol is None:
        raise InputError(f"a class has no form {shown(form)}; use limit, length or value")
    return Sign(symbol, number_text)


def example(symbol: Symbol) -> Sign:
    """Return a symbol with the parameter of its example."""
    return Sign(symbol, symbol.sample)


def _instead(words: str) -> str:
    if words.casefold().split()[:1] == ["class"]:
        return 'write "class" alone, and the number at the scale it holds for: class = 1.5'
    names = {}
    for symbol in SYMBOLS:
        if symbol.needs != "class":
            names[symbol.title.casefold()] = symbol.write
            names[symbol.name.casefold()] = names[symbol.write.casefold()] = symbol.write
    near = difflib.get_close_matches(words.casefold(), names, n=1)
    if near:
        return f"did you mean {shown(names[near[0]])}?"
    return 'write one that "dialgen symbols" lists'


def _kilovolts(symbol: Symbol, given: str, text: str) -> Sign:
    try:
        volts = VOLT_ABOVE.read(given).value
    except ValueError:
        raise InputError(
            f'{shown(text)} needs a test voltage with its unit; write for example "test 2 kV" or "test 500 V"'
        ) from None
    if volts == _TESTED_EMPTY_V:
        return Sign(_NAMED["test 500 v"])
    if volts < _TESTED_EMPTY_V:
        raise InputError(f'{shown(text)} is below 500 V, the least that has a star; write "not tested"')
    number = plain_number(volts / 1000)
    if len(number) > _MOST_IN_A_STAR:
        raise InputError(
            f'{shown(text)} does not fit in a star; write kilovolts of three signs at most, "test 2.2 kV"'
        )
    return Sign(symbol, number)


def _degrees(symbol: Symbol, given: str, text: str) -> Sign:
    angle = bare_number(re.sub("( ?(°|deg|degrees))?$", "", given))
    if angle is None:
        raise InputError(f'{shown(text)} needs its angle in degrees; write for example "{symbol.write}"')
    if not 0 < angle < 90:
        raise InputError(
            f'{shown(text)} is not between 0 and 90 degrees; write for example "{symbol.write}", '
            'or "horizontal" or "vertical"'
        )
    return Sign(symbol, f"{plain_number(angle)}°")


def _millimetres(symbol: Symbol, given: str, text: str) -> Sign:
    bare = bare_number(given)
    try:
        thickness = read_length(given if bare is None else bare, "thickness", 0.1)
    except ValueError:
        raise InputError(
            f'{shown(text)} needs the thickness of the panel; write for example "{symbol.write}", or "Fe"'
        ) from None
    return Sign(symbol, plain_number(thickness))


_READERS: Mapping[str, Callable[[Symbol, str, str], Sign]] = {
    "kV": _kilovolts, "degrees": _degrees, "mm": _millimetres,
}  # fmt: skip
"""What reads a parameter, by what it is: given the symbol, the parameter and the whole text."""
