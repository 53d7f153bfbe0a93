"""What tomllib says of broken TOML, in words for somebody who knows meters and not TOML."""

from __future__ import annotations

import re

_HEAD = re.compile(r"""\s*\[*\s*([\w."' -]*?)\s*\]*\s*(?:#.*)?""")
_BEFORE_VALUE = re.compile(r"""\s*[\w."'-]+\s*=\s*(.*)""")
_LONGEST = 30

_QUOTES = 'write millimetres and degrees bare, text and electrical values in quotes: "1 mA"'

_TWICE = ("Cannot ", "Duplicate ")
_PLAIN = (
    ("Expected '='", "no = after the key; write key = value"),
    ("Unterminated", "the text does not end; close it with the quote that begins it"),
    (r"Illegal character '\n'", "the text does not end on its line; close it with the quote that begins it"),
    ("Unclosed array", "the list does not go on or end here; part its values by commas and close it with ]"),
    (
        "Unclosed inline table",
        "the table in braces does not go on or end here; keep it on one line and close it with }",
    ),
    ("Expected ']", "the name of the table does not end; close it with as many ] as it has ["),
    ("Unescaped", "a backslash in a text; leave it out, or write single quotes around the text"),
)
"""How a message of tomllib begins, and what we say instead."""


def plain_words(message: str, text: str) -> tuple[int, int, str]:
    """Return line, column and what is wrong, from tomllib's message about ``text``.

    >>> plain_words("Expected newline or end of document after a statement (at line 1, column 11)",
    ...             "rest = -44,0")
    (1, 11, 'a comma in a number; the decimal sign is a point')
    """
    what, _, at = message.partition(" (at ")
    words = at.rstrip(")").replace(",", "").split()
    lines = text.split("\n")
    if words[:1] == ["line"]:
        line, column = int(words[1]), int(words[3])
    else:
        line = max((i for i, row in enumerate(lines, 1) if row.strip()), default=1)
        column = len(lines[line - 1].rstrip()) + 1
    row = lines[line - 1]
    if what.startswith(_TWICE):
        return line, len(row) - len(row.lstrip()) + 1, _given_twice(what, row)
    return line, column, _in_plain_words(what, row, row[column - 1 :])


def _in_plain_words(what: str, row: str, rest: str) -> str:
    """Return what is wrong and the mend, from the row and what of it could not be read."""
    if typed := _typographic(rest[:1]):
        return typed
    if what.startswith("Expected newline"):
        return _left_over(row, rest)
    if what.startswith("Invalid "):
        return _unreadable(what, row, rest)
    for begins, words in _PLAIN:
        if what.startswith(begins):
            return words
    return f"not TOML: {what[:1].lower()}{what[1:120]}; mend the line"


def _typographic(character: str) -> str:
    if character and character in "“”„‘’«»":
        return f'typographic quotes, {character}; write plain ones, "'
    if character and character in "−–—":
        return f"{character} is not the minus sign of the keyboard; write -"
    return ""


def _given_twice(what: str, row: str) -> str:
    inline = re.fullmatch("Duplicate inline table key '(.*)'", what)
    found = inline or _HEAD.fullmatch(row.partition("=")[0])
    name = found[1][:_LONGEST] if found else "this"
    listed = "" if "=" in row else ", or write [[...]] at each if there may be several"
    return f"{name} is already given above; leave one of the two out{listed}"


def _unreadable(what: str, row: str, rest: str) -> str:
    if what == "Invalid statement":
        return f"neither a key nor a table: {_word(rest)}; write key = value or [table]"
    if what != "Invalid value":
        return f"no key that can be read: {_word(rest) or 'nothing'}; write key = value"
    if re.match("[+-]?[.][0-9]", rest):
        return "a number that begins with a point; write a 0 before it, such as 0.5"
    if rest.partition("#")[0].strip():
        return f"no value that can be read: {_word(rest)}; {_QUOTES}"
    return f"no value behind {row.partition('=')[0].strip()[:_LONGEST]}; write one"


def _left_over(row: str, rest: str) -> str:
    found = _BEFORE_VALUE.fullmatch(row)
    number = found[1].removesuffix(rest).strip() if found else ""
    if not re.fullmatch(r"[+-]?[0-9.]+", number):
        return f"{_word(rest)} is left over; write one key = value to a line, and text in quotes"
    if re.match(r",\s*[0-9]", rest):
        return "a comma in a number; the decimal sign is a point"
    if rest[:1] == ".":
        return "a point without digits behind it; write one, such as 5.0"
    if number.lstrip("+-") == "0" and rest[:1].isdigit():
        return "a number that begins with 0; leave the 0 out"
    return f"{_word(rest)} is left over behind the number; {_QUOTES}"


def _word(rest: str) -> str:
    text = rest.partition("#")[0].strip() or rest.strip()
    return text if len(text) <= _LONGEST else text[: _LONGEST - 3] + "..."
