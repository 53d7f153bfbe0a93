"""What a user writes is read as the sign meant, or refused with what to write."""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from dialgen.errors import InputError
from dialgen.symbols import SYMBOLS, Sure, class_sign, example, parse

PLAIN = [symbol for symbol in SYMBOLS if symbol.needs != "class"]
BY_NAME = {symbol.name: symbol for symbol in SYMBOLS}


@pytest.mark.parametrize("symbol", PLAIN, ids=lambda symbol: symbol.name)
def test_what_the_table_says_to_write_is_read_as_that_symbol(symbol: object) -> None:
    """Each row's own example is read back as the row's symbol, with the parameter it is drawn with."""
    assert parse(symbol.write) == example(symbol)


def test_names_and_numbers_tell_symbols_apart() -> None:
    """No two rows share a name or a number."""
    assert len(BY_NAME) == len(SYMBOLS)
    assert len({symbol.number for symbol in SYMBOLS}) == len(SYMBOLS)


def test_numbers_seen_in_a_translation_of_the_annex() -> None:
    """B-1 to B-10 of IEC 60051-1 stand for the kinds of current as a stored translation lists them."""
    listed = {
        "B-1": "dc", "B-2": "ac", "B-3": "ac and dc", "B-4": "3~", "B-6": "3~1E", "B-7": "3N~1E",
        "B-8": "3~2E", "B-9": "3N~2E", "B-10": "3N~3E",
    }  # fmt: skip
    assert {s.number: s.name for s in SYMBOLS if s.number_sure is Sure.SEEN} == listed


def test_only_test_voltages_and_classes_are_claims() -> None:
    """What the maker must have proved: a tested insulation and a class, in all their forms."""
    claims = {symbol.name for symbol in SYMBOLS if symbol.claim}
    assert claims == {"test 500 V", "test", "class limit", "class length", "class value"}


@pytest.mark.parametrize(
    ("text", "name", "parameter"),
    [
        ("Moving  Coil", "moving coil", ""),
        (" dc ", "dc", ""),
        ("3∼1e", "3~1E", ""),
        ("3n~2E", "3N~2E", ""),
        ("inclined 45", "inclined", "45°"),
        ("inclined 7.5°", "inclined", "7.5°"),
        ("inclined 30 deg", "inclined", "30°"),
        ("test 2 kV", "test", "2"),
        ("test 2000 V", "test", "2"),
        ("test 1.5kV", "test", "1.5"),
        ("test 0.5 kV", "test 500 V", ""),
        ("TEST 500 V", "test 500 V", ""),
        ("Fe panel 1.5", "Fe panel", "1.5"),
        ("Fe panel 0.2 cm", "Fe panel", "2"),
        ("fe", "Fe", ""),
    ],
)
def test_spellings_of_one_sign(text: str, name: str, parameter: str) -> None:
    """Capitals, spaces, both tildes and any prefix of the volt are read."""
    sign = parse(text)
    assert (sign.symbol, sign.parameter) == (BY_NAME[name], parameter)


@pytest.mark.parametrize(
    ("text", "advice"),
    [
        ("movin coil", 'did you mean "moving coil"?'),
        ("moving-iron", 'did you mean "moving iron"?'),
        ("DCC", 'did you mean "dc"?'),
        ("direct current", 'did you mean "dc"?'),
        ("rectifer", 'did you mean "rectifier"?'),
        ("inclind 60", 'did you mean "inclined 60"?'),
        ("untested", 'did you mean "not tested"?'),
        ("qqq", '"dialgen symbols" lists'),
        ("", '"dialgen symbols" lists'),
        ("class 1.5", 'write "class" alone'),
        ("inclined", 'write for example "inclined 60"'),
        ("inclined sixty", 'write for example "inclined 60"'),
        ("inclined 7,5", 'write for example "inclined 60"'),
        ("inclined 0", 'or "horizontal" or "vertical"'),
        ("inclined 90", 'or "horizontal" or "vertical"'),
        ("inclined -5", 'or "horizontal" or "vertical"'),
        ("test", 'write for example "test 2 kV"'),
        ("test 2", 'write for example "test 2 kV"'),
        ("test 2 kA", 'write for example "test 2 kV"'),
        ("test -2 kV", 'write for example "test 2 kV"'),
        ("test 400 V", 'write "not tested"'),
        ("test 2.25 kV", "of three signs at most"),
        ("Fe panel", 'write for example "Fe panel 2 mm"'),
        ("Fe panel 0", 'write for example "Fe panel 2 mm"'),
    ],
)
def test_what_is_refused_says_what_to_write(text: str, advice: str) -> None:
    """A slip is met with the nearest name, a missing or odd parameter with an example."""
    with pytest.raises(InputError) as refusal:
        parse(text)
    wrong, _, right = str(refusal.value).partition("; ")
    assert wrong
    assert advice in right


@given(st.one_of(st.text(max_size=40), st.sampled_from([s.name for s in PLAIN]).flatmap(
    lambda name: st.text(max_size=12).map(lambda rest: f"{name} {rest}")
)))  # fmt: skip
def test_any_text_is_a_sign_or_refused(text: str) -> None:
    """No text does anything but name a sign or raise InputError."""
    try:
        sign = parse(text)
    except InputError:
        return
    assert (sign.symbol.needs is None) == (sign.parameter == "")


@pytest.mark.parametrize(("form", "number"), [("limit", "E-1"), ("length", "E-2"), ("value", "E-3")])
def test_the_three_forms_of_a_class(form: str, number: str) -> None:
    """A class is bare, above an angle or in a circle, by what it is a percentage of."""
    sign = class_sign("2.5", form)
    assert (sign.symbol.number, sign.parameter) == (number, "2.5")


@pytest.mark.parametrize(
    ("text", "form"), [("", "limit"), ("fine", "limit"), ("-1", "value"), ("1", "square")]
)
def test_a_class_that_is_none_is_refused(text: str, form: str) -> None:
    """Neither words nor other forms make a class."""
    with pytest.raises(InputError, match=r"; (write|use) "):
        class_sign(text, form)
