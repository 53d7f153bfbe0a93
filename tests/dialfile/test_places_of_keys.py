"""Where a key stands: lines and columns in characters, in every form that TOML has for a key."""

from __future__ import annotations

import tomllib
from pathlib import Path

import dialfile_samples as samples
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from dialgen.dialfile.places import key_places, nearest
from dialgen.dialfile.source import Source, shown_key

_SPOTS = [
    ("a = 1", ("a",), (1, 1)),
    ("\n  a = 1", ("a",), (2, 3)),
    ("[m]\na = 1", ("m",), (1, 2)),
    ("[m]\na = 1", ("m", "a"), (2, 1)),
    ("[m.n]\na = 1", ("m", "n", "a"), (2, 1)),
    ("m.n.a = 1", ("m", "n", "a"), (1, 1)),
    ("[[s]]\n[[s]]\na = 1", ("s", 1), (2, 3)),
    ("[[s]]\n[[s]]\na = 1", ("s", 1, "a"), (3, 1)),
    ("[[s]]\n[s.law]\na = 1\n[[s]]\n[s.law]\na = 2", ("s", 1, "law", "a"), (6, 1)),
    ("[[m.r]]\na = 1\n[[m.r]]\na = 2", ("m", "r", 1, "a"), (4, 1)),
    ("m = { a = 1, b = 2 }", ("m", "b"), (1, 14)),
    ('m = { a = "Ω", b = 2 }', ("m", "b"), (1, 16)),
    ('m = { a = "😀µ−", b = 2 }', ("m", "b"), (1, 18)),
    ("m = [1, [2, 3]]", ("m", 1, 1), (1, 13)),
    ("m = [\n  1, # one\n  # two\n  2,\n]", ("m", 1), (4, 3)),
    ("m = [{ a = 1 }, { a = 2 }]", ("m", 1, "a"), (1, 19)),
    ("'q' = 1\n\"Ω\".b = 2", ("Ω", "b"), (2, 1)),
    ('a = """\nx\n"""\nb = 1', ("b",), (4, 1)),
    ("a = 1 # Ω\n\tb = 2", ("b",), (2, 2)),
]


@pytest.mark.parametrize(("text", "key", "place"), _SPOTS)
def test_a_key_is_found_where_an_editor_shows_it(
    text: str, key: tuple[str | int, ...], place: object
) -> None:
    """Lines and columns count from 1, columns in characters, whatever form the key has."""
    assert key_places(text)[key] == place


@pytest.mark.parametrize(
    ("key", "place"),
    [
        (("m", "a"), (2, 1)),
        (("m", "b"), (1, 2)),
        (("m", "a", "x", 3), (2, 1)),
        (("zzz",), (1, 1)),
        ((), (1, 1)),
    ],
)
def test_a_key_that_is_not_there_is_placed_at_the_table_around_it(
    key: tuple[str, ...], place: object
) -> None:
    """A missing key is shown at its table, and a missing table at the head of the file."""
    assert nearest(key_places("[m]\na = 1"), key) == place


@pytest.mark.parametrize("name", sorted(samples.GOOD))
def test_every_key_of_a_good_file_has_a_place_of_its_own_name(name: str) -> None:
    """Every key that tomllib reads is found, and the text at its place begins with the key."""
    text = samples.GOOD[name]
    places, lines = key_places(text), text.split("\n")
    for path in samples.paths(tomllib.loads(text)):
        line, column = places[path]
        name = next(part for part in reversed(path) if isinstance(part, str))
        if isinstance(path[-1], str):
            assert name in lines[line - 1][column - 1 :]


@settings(max_examples=200, deadline=2000)
@given(
    st.recursive(
        st.integers(0, 9) | st.text('aΩ−"\\ é', max_size=4),
        lambda inner: (
            st.lists(inner, max_size=3) | st.dictionaries(st.text("abΩ. ", max_size=3), inner, max_size=3)
        ),
        max_leaves=12,
    )
)
def test_no_key_of_any_toml_is_missed(value: object) -> None:
    """Whatever tomllib accepts, every key without an escape in it has a place."""
    text = samples.toml({"top": value})
    places = key_places(text)
    for path in samples.paths(tomllib.loads(text)):
        assert path in places


@pytest.mark.parametrize(
    ("key", "text"),
    [
        ((), ""),
        (("Ω", "a b", "c\n"), '"Ω"."a b"."c\\n"'),
        (("scale", 0, "to"), "scale[1].to"),
        (("a", "b", 2, 0), "a.b[3][1]"),
        (("x" * 99,), "x" * 77 + "..."),
    ],
)
def test_keys_are_shown_counted_from_1(key: tuple[str | int, ...], text: str) -> None:
    """A path is shown with points and with list items from 1, cut short where it is long."""
    assert shown_key(key) == text


def test_faults_stand_in_file_order_once_each_and_other_files_last() -> None:
    """Faults are sorted by line and column, said once each, with those of a CSV behind them."""
    text = "a = 1\nb = { c = 1, d = 2 }\n"
    source = Source(name="dial.toml", folder=Path(), text=text, elsewhere={("r", 0): ("a.csv", 3, 4)})
    keys = [("r", 0), ("b", "d"), ("b", "c"), ("a",), ("a",)]
    faults = source.refusal(source.fault(key, "x; y") for key in keys).faults
    assert [str(fault) for fault in faults] == [
        "dial.toml:1:1: a: x; y",
        "dial.toml:2:7: b.c: x; y",
        "dial.toml:2:14: b.d: x; y",
        "a.csv:3:4: r[1]: x; y",
    ]
