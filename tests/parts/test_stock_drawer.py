"""Entries of the list of what is in the drawer."""

import pytest

from dialgen.parts.stock.drawer import Lot, merged, read_stock


@pytest.mark.parametrize(
    ("given", "ohms", "count"),
    [
        ("3.3 ohm x12", 3.3, 12),
        ("10 ohm", 10.0, 1),
        ("4k7 x 3", 4700.0, 3),
        ("4k7x3", 4700.0, 3),
        ("3.3 ohm ×12", 3.3, 12),
        ("R22 X2", 0.22, 2),
        (" 5 mohm x 2 ", 0.005, 2),
        ("1 Mohm", 1e6, 1),
    ],
)
def test_entries_are_read_as_makers_write_them(given, ohms, count):
    """A value by any of its spellings, and the pieces after an x; without one it is a single piece."""
    assert read_stock(given) == Lot(ohms, count)


@pytest.mark.parametrize(
    ("given", "said"),
    [
        ("3.3 ohm x0", "no count"),
        ("3.3 ohm x1.5", "no count"),
        ("3.3 ohm x-2", "no count"),
        ("3.3 ohm x", "no count"),
        ("3.3 ohm x 12 pcs", "no count"),
        ("3.3 ohm x" + "9" * 5000, "no count"),
        ("x12", "no value"),
        ("0 ohm x3", "not above 0"),
        ("-10 ohm", "not above 0"),
        ("3,3 ohm x3", "comma"),
        ("10 x3", "no unit"),
        ("10 V x3", "not in Ω"),
        ("", "not a resistance"),
        (10, "needs its unit"),
        (None, "text with its unit"),
    ],
)
def test_what_is_no_entry_is_refused(given, said):
    """Anything else is refused, with what is wrong and after a semicolon what would be right."""
    with pytest.raises(ValueError, match=said) as caught:
        read_stock(given)
    assert "; " in str(caught.value)


def test_lots_of_one_value_are_one():
    """Lots that agree to rounding are taken together, and the drawer is in order of value."""
    lots = [Lot(10.0, 5), Lot(0.1 + 0.2, 1), Lot(10.0, 2), Lot(0.3, 4)]
    assert merged(lots) == (Lot(0.3, 5), Lot(10.0, 7))
