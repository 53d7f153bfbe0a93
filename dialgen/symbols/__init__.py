"""The dial symbols of IEC 60051-1, drawn as shapes.

`parse` reads what a user writes, `class_sign` makes the sign of a class of accuracy; `width` and
`items` place a sign, and `sheet` draws them all.  `SYMBOLS` is the table, with how sure each is.
"""

from dialgen.symbols.placing import items, width
from dialgen.symbols.sheet import sheet
from dialgen.symbols.signs import Form, Sign, class_sign, example, parse
from dialgen.symbols.symbol import Subject, Sure, Symbol
from dialgen.symbols.table import SYMBOLS

__all__ = [
    "SYMBOLS", "Form", "Sign", "Subject", "Sure", "Symbol", "class_sign", "example", "items", "parse",
    "sheet", "width",
]  # fmt: skip
