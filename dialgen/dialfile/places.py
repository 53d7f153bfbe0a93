"""Where each key of a dial file stands: line and column, for errors only.

tomllib gives values without places; tree-sitter gives a syntax tree with places.  This walks the
tree once and notes the place of every key, table and list item.
"""

from __future__ import annotations

from bisect import bisect_left
from collections.abc import Iterator
from itertools import accumulate
from typing import TYPE_CHECKING

from dialgen.errors import Key

if TYPE_CHECKING:
    from tree_sitter import Node

Place = tuple[int, int]
"""Line and column, both from 1; columns in characters."""

_KEYS = ("bare_key", "quoted_key", "dotted_key")
_DEEPEST = 12
"""No key of a dial file is as deep; what lies deeper is found by the table around it."""


def key_places(text: str) -> dict[Key, Place]:
    r"""Return the place of every key in a TOML text that tomllib has already accepted.

    >>> key_places('dialgen = 1\n[plate]\nsize = [84, 64]\n')[("plate", "size")]
    (3, 1)
    """
    import tree_sitter_toml
    from tree_sitter import Language, Parser

    root = Parser(Language(tree_sitter_toml.language())).parse(text.encode()).root_node
    found: dict[Key, tuple[int, int]] = {}
    counts: dict[Key, int] = {}
    for node in root.children:
        for key, at in _statement(node, counts):
            found.setdefault(key, (at.start_point.row, at.start_point.column))
    return _in_characters(found, text)


def nearest(places: dict[Key, Place], key: Key) -> Place:
    """Return the place of a key, or of the closest table around it that the file has."""
    for end in range(len(key), 0, -1):
        if key[:end] in places:
            return places[key[:end]]
    return 1, 1


def _statement(node: Node, counts: dict[Key, int]) -> Iterator[tuple[Key, Node]]:
    if node.type == "pair":
        yield from _pair(node, ())
    elif node.type in ("table", "table_array_element"):
        head = next(child for child in node.children if child.type in _KEYS)
        prefix = _resolved(_parts(head), counts, fresh=node.type == "table_array_element")
        for end in range(1, len(prefix) + 1):
            yield prefix[:end], head
        for child in node.children:
            if child.type == "pair":
                yield from _pair(child, prefix)


def _resolved(parts: tuple[str, ...], counts: dict[Key, int], *, fresh: bool) -> Key:
    """Return the path with the index of the current item behind every array of tables."""
    path: Key = ()
    for i, part in enumerate(parts):
        path = (*path, part)
        if fresh and i == len(parts) - 1:
            counts[path] = counts.get(path, -1) + 1
        if path in counts:
            path = (*path, counts[path])
    return path


def _pair(node: Node, prefix: Key) -> Iterator[tuple[Key, Node]]:
    head, value = node.children[0], node.children[-1]
    key: Key = prefix
    for part in _parts(head):
        key = (*key, part)
        yield key, head
    yield from _inside(value, key)


def _inside(value: Node, key: Key) -> Iterator[tuple[Key, Node]]:
    if len(key) > _DEEPEST:
        return
    if value.type == "inline_table":
        for child in value.children:
            if child.type == "pair":
                yield from _pair(child, key)
    elif value.type == "array":
        items = [c for c in value.children if c.is_named and c.type != "comment"]
        for i, item in enumerate(items):
            yield (*key, i), item
            yield from _inside(item, (*key, i))


def _parts(head: Node) -> tuple[str, ...]:
    if head.type == "dotted_key":
        return tuple(part for child in head.children if child.type in _KEYS for part in _parts(child))
    text = (head.text or b"").decode()
    return (text[1:-1] if head.type == "quoted_key" else text,)


def _in_characters(found: dict[Key, tuple[int, int]], text: str) -> dict[Key, Place]:
    """Return rows and byte columns from 0 as lines and columns in characters from 1."""
    lines = text.split("\n")
    starts: dict[int, list[int]] = {}
    places: dict[Key, Place] = {}
    for key, (row, byte) in found.items():
        line = lines[row] if row < len(lines) else ""
        if not line.isascii():
            if row not in starts:
                starts[row] = list(accumulate((len(c.encode()) for c in line), initial=0))
            places[key] = row + 1, bisect_left(starts[row], byte) + 1
        else:
            places[key] = row + 1, byte + 1
    return places
