"""Inks that touch, or all but do, though they must not."""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from dialgen.errors import Key, Remark
from dialgen.face.inked.numerals import figure_mm
from dialgen.face.parts import Part
from dialgen.face.review.finished import FIGURE_GAP, OWN_SPACE, ROW_GAP, Finished, Pair
from dialgen.face.review.rules import over_zone
from dialgen.face.review.things import OPENING, Thing, line_key
from dialgen.face.review.wording import and_so, at, grouped, move, weight
from dialgen.face.ruled.ruling import RuledScale


def touching(face: Finished) -> Iterator[Remark]:
    """Yield a remark on each two scales, or lettering and scale, whose inks touch."""
    for pairs in _meetings(face):
        told = min(pairs, key=_weight)
        one, other = sorted((told.one, told.other), key=weight)
        key, remedy = _mended(one, other)
        more = and_so(len(pairs) - 1, "of their parts")
        yield Remark(
            f"{one.name} touches {other.name} {at(told.place)}{more}; {remedy}", key, place=told.place
        )


def overlapping(face: Finished) -> Iterator[Remark]:
    """Yield a remark on the numerals of a scale that lie over each other, or else read as one number."""
    for pairs in grouped((pair.one.sort, pair) for pair in face.pairs if _both_numerals(pair)):
        over = [pair for pair in pairs if pair.touches]
        tight = [pair for pair in pairs if _in_a_row(pair)]
        if over:
            yield _overlap("overlap", over)
        elif tight:
            yield _overlap("all but run together", tight)


def _overlap(what: str, pairs: Sequence[Pair]) -> Remark:
    told = pairs[0]
    texts = f"{_text(told.one)} and {_text(told.other)}{told.one.sort.whose}"
    remedy = "number fewer values"
    if _of_two_rows(told):
        remedy += ", or set a row on the other side"
    more = and_so(len(pairs) - 1, "of its pairs")
    return Remark(
        f"the numerals {texts} {what} {at(told.place)}{more}; {remedy}", told.one.sort.key, place=told.place
    )


def nearer_to_another(face: Finished) -> Iterator[Remark]:
    """Yield a remark on numerals that stand nearer to another scale's marks than to their own."""
    clashing = {_owners(pairs[0]) for pairs in _meetings(face)}
    near = [pair for pair in face.pairs if _strays_to_another(pair) and _owners(pair) not in clashing]
    for pairs in grouped((_owners(pair), pair) for pair in near):
        told = pairs[0]
        one, other = sorted((told.one, told.other), key=weight)
        yield Remark(
            f"{one.name} stands nearer to {other.name} than to its own {at(told.place)}"
            f"{and_so(len(pairs) - 1, 'of its numerals')}; draw the two lines farther apart",
            _later_line(one, other),
            place=told.place,
        )


def _meetings(face: Finished) -> list[list[Pair]]:
    """Return the pairs that touch, by who must be moved, without what other checks tell of."""
    met = [
        pair
        for pair in face.pairs
        if pair.touches
        and pair.other.sort.part != OPENING
        and not _both_numerals(pair)
        and not over_zone(pair.one.sort, pair.other.sort)
    ]
    return grouped((_owners(pair), pair) for pair in met)


def _owners(pair: Pair) -> frozenset[object]:
    return frozenset((pair.one.sort.owner, pair.other.sort.owner))


def _weight(pair: Pair) -> list[tuple[int, int]]:
    return sorted((weight(pair.one), weight(pair.other)))


def _both_numerals(pair: Pair) -> bool:
    return pair.one.sort is pair.other.sort and pair.one.sort.part == Part.NUMERALS


def _mended(one: Thing, other: Thing) -> tuple[Key, str]:
    """Return what would mend two things that touch: the key to change, and how."""
    if one.sort.owner is one.sort:
        return one.sort.key, move(one)
    if one.sort.number == other.sort.number:
        return one.sort.key, "number other values, or set the numerals on the other side of the line"
    return _later_line(one, other), "draw the two lines farther apart"


def _later_line(one: Thing, other: Thing) -> Key:
    """Return the line's key of the later of two scales."""
    scales = [(t.sort.number, t.sort.scale) for t in (one, other) if t.sort.number and t.sort.scale]
    _, scale = max(scales, key=lambda found: found[0])
    return line_key(scale)


def _text(thing: Thing) -> str:
    return str(getattr(thing.item, "text", ""))


def _of_two_rows(pair: Pair) -> bool:
    """Return whether two numerals of a scale are of different rows."""
    scale = pair.one.sort.scale
    return scale is not None and _row(scale, pair.one.index) != _row(scale, pair.other.index)


def _row(scale: RuledScale, index: int) -> int:
    """Return the row that a numeral belongs to, in its layer's order: the scale's own is first."""
    own = sum(bool(mark.label) for mark in scale.marks)
    further = sum(bool(mark.further) for mark in scale.marks)
    return 0 if index < own else 1 + (index - own) // further


def _in_a_row(pair: Pair) -> bool:
    """Return whether two numerals stand side by side, so near that they may be read as one."""
    scale = pair.one.sort.scale
    if scale is None:
        return False
    height_mm = scale.sizes.numeral_mm
    (_, low, _, high), (_, bottom, _, top) = pair.one.shape.box, pair.other.shape.box
    near_mm = FIGURE_GAP * figure_mm(scale) if _of_two_rows(pair) else ROW_GAP * height_mm
    return min(high, top) - max(low, bottom) > height_mm / 2 and pair.gap_mm < near_mm


def _strays_to_another(pair: Pair) -> bool:
    """Return whether one is a numeral, the other a mark of another scale, nearer than the numeral's own."""
    one, other = sorted((pair.one, pair.other), key=weight)
    if (one.sort.part, other.sort.part) != (Part.NUMERALS, Part.MARKS) or one.sort.scale is None:
        return False
    return one.sort.number != other.sort.number and pair.gap_mm < OWN_SPACE * one.sort.scale.sizes.space_mm
