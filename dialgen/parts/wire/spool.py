"""A wire or strip of resistance metal, read from what is written on its spool."""

from __future__ import annotations

import math
import re
from dataclasses import dataclass, replace

from dialgen.parts.wire.gauges import awg_diameter_mm, gauge_name, read_gauge
from dialgen.parts.wire.materials import MATERIALS, Material, known_materials, meant_material
from dialgen.quantity import OHM_ABOVE, in_figures, plain_number, read_length, shown
from dialgen.quantity.units import plain_text

_EXAMPLE = 'write for example "manganin 0.5 mm", "constantan AWG 24" or "manganin 20 x 1 mm"'
_LONGEST = 120
_LEAST_MM, _MOST_MM = 0.01, 100.0
_NUMBER = r"(?:[0-9]+\.?[0-9]*|\.[0-9]+)"
_UNIT = r"(?:mm|cm|um|µm|in)"
_FILLERS = {"wire", "strip", "ribbon", "sheet", "round", "solid", "of", "enamelled", "bare"}
_FLAT = ("strip", "ribbon", "sheet")

_PER_METRE = re.compile(
    rf"({_NUMBER}\s*[mkµu]?(?:ohms?|Ω))(\s*[·*.x]?\s*mm[2²])?\s*(?:/|per)\s*(?:metre|meter|m)(?![a-z])", re.I
)
_GAUGE = re.compile(r"(?<![a-z0-9/.])(?:awg\s*#?([0-9/.]+)|#?([0-9/.]+)\s*awg)(?![a-z0-9])", re.I)
_STRIP = re.compile(
    rf"(?<![\w.])({_NUMBER})\s*({_UNIT})?\s*[x×*]\s*({_NUMBER})\s*({_UNIT})(?![a-z0-9²])", re.I
)
_AREA = re.compile(rf"(?<![\w.])({_NUMBER})\s*(?:mm2|mm²|mm\^2|sq\.?\s?mm)(?![a-z0-9])", re.I)
_ROUND = re.compile(rf"(?<![\w.])[ø⌀]?\s*({_NUMBER}\s*{_UNIT})(?![a-z0-9²^])", re.I)


@dataclass(frozen=True, slots=True, kw_only=True)
class Wire:
    """A round wire, or a strip of rectangular section.

    Args:
        material: the metal.
        resistivity: in Ω·mm²/m at 20 °C.
        width_mm: the diameter of a wire, the greater side of a strip.
        thickness_mm: the lesser side of a strip; None for a wire.
        gauge: the AWG gauge it was given by, if it was.
        measured: whether the resistivity was given for this very spool.
    """

    material: Material
    resistivity: float
    width_mm: float
    thickness_mm: float | None = None
    gauge: int | None = None
    measured: bool = False

    @property
    def area_mm2(self) -> float:
        """The cross-section."""
        if self.thickness_mm is None:
            return math.pi / 4 * self.width_mm**2
        return self.width_mm * self.thickness_mm

    @property
    def perimeter_mm(self) -> float:
        """The way around the cross-section: the surface of each millimetre of length."""
        if self.thickness_mm is None:
            return math.pi * self.width_mm
        return 2 * (self.width_mm + self.thickness_mm)

    @property
    def ohm_per_m(self) -> float:
        """Resistivity over cross-section."""
        return self.resistivity / self.area_mm2

    @property
    def name(self) -> str:
        """What it is, in words."""
        width = in_figures(self.width_mm, 4)
        if self.thickness_mm is not None:
            return f"{self.material.name} strip {width} × {plain_number(self.thickness_mm)} mm"
        gauge = "" if self.gauge is None else f", {gauge_name(self.gauge)}"
        return f"{self.material.name} wire {width} mm{gauge}"


def read_wire(given: object) -> Wire:
    """Return the wire or strip that a text describes.

    It names the metal and the size in any order: a diameter in mm or AWG, a cross-section in mm², or
    width x thickness.  What the spool really has may follow, as "2.19 ohm/m" or "0.45 ohm mm2/m".

    Raises:
        ValueError: not text, no known metal, no size or two of them, or words that say nothing.

    >>> read_wire("manganin 0.5 mm").name
    'manganin wire 0.5 mm'
    >>> read_wire("24 AWG constantan").name
    'constantan wire 0.5106 mm, AWG 24'
    >>> read_wire("manganin 20 x 1 mm").area_mm2
    20.0
    """
    if not isinstance(given, str):
        raise ValueError(f"a wire is text, not {shown(given)}; {_EXAMPLE}")
    text = plain_text(given).strip()
    if len(text) > _LONGEST:
        raise ValueError(f"a wire of {len(text)} characters; {_EXAMPLE}")
    if "," in re.sub(r",(?=\s|$)", "", text):
        raise ValueError(f"{shown(given)} has a comma in a number; the decimal sign is a point")
    text, spool = _taken(_PER_METRE, text.replace(",", " "))
    width_mm, thickness_mm, gauge, words = _size(text, given)
    material = _material(words, given)
    if thickness_mm is None and (flat := next((w for w in words.split() if w.lower() in _FLAT), None)):
        raise ValueError(f'a {flat} has a width and a thickness; write "{material.name} 20 x 1 mm"')
    wire = Wire(
        material=material,
        resistivity=material.resistivity,
        width_mm=width_mm,
        thickness_mm=thickness_mm,
        gauge=gauge,
    )
    return wire if spool is None else _of_spool(wire, spool)


def _size(text: str, given: str) -> tuple[float, float | None, int | None, str]:
    """Return width, thickness (or None), gauge (or None), and the text without what gave them."""
    text, gauge = _taken(_GAUGE, text)
    text, strip = _taken(_STRIP, text)
    text, area = _taken(_AREA, text)
    text, across = _taken(_ROUND, text)
    sizes = [each for each in (gauge, strip, area, across) if each]
    if len(sizes) != 1 or _ROUND.search(text) or _GAUGE.search(text):
        many = "no size with its unit" if not sizes else "more than one size"
        raise ValueError(f"{shown(given)} has {many}; {_EXAMPLE}")
    if gauge:
        number = read_gauge(gauge[1] or gauge[2])
        return awg_diameter_mm(number), None, number, text
    if strip:
        sides = sorted(
            _side_mm(f"{n} {unit or strip[4]}") for n, unit in ((strip[1], strip[2]), strip.group(3, 4))
        )
        return sides[1], sides[0], None, text
    if area:
        # A solid wire, or a stranded one taken as solid: its cross-section alone is stated.
        return _within(math.sqrt(float(area[1]) * 4 / math.pi)), None, None, text
    return _side_mm(across[1] if across else ""), None, None, text


def _taken(pattern: re.Pattern[str], text: str) -> tuple[str, re.Match[str] | None]:
    found = pattern.search(text)
    return (f"{text[: found.start()]} {text[found.end() :]}" if found else text), found


def _side_mm(written: str) -> float:
    return _within(read_length(written.lower(), "a size"))


def _within(side_mm: float) -> float:
    if not _LEAST_MM <= side_mm <= _MOST_MM:
        raise ValueError(f"{side_mm:.3g} mm is no wire; give {_LEAST_MM:g} to {_MOST_MM:g} mm")
    return side_mm


def _material(words: str, given: str) -> Material:
    left = words.lower().split()
    named = [word for word in left if word in MATERIALS]
    strange = [word for word in left if word not in MATERIALS and word not in _FILLERS]
    if strange:
        near = None if named else meant_material(strange[0])
        mend = f"did you mean {near}?" if near else f"the metals are {known_materials()}"
        raise ValueError(f"{shown(strange[0])} says nothing of a wire; {mend}")
    if len(set(named)) != 1:
        many = "more than one metal" if named else "no metal"
        raise ValueError(f"{shown(given)} names {many}; write one of {known_materials()}")
    return MATERIALS[named[0]]


def _of_spool(wire: Wire, spool: re.Match[str]) -> Wire:
    """Return the wire with the resistivity of its own spool."""
    stated = OHM_ABOVE.read(spool[1]).value
    resistivity = stated if spool[2] else stated * wire.area_mm2
    material = wire.material
    if not material.least / 2 <= resistivity <= material.most * 2:
        raise ValueError(
            f"{shown(spool[0].strip())} makes {resistivity:.3g} Ω·mm²/m, but {material.name} has about "
            f"{material.resistivity:.3g}; check metal, size and ohms"
        )
    return replace(wire, resistivity=resistivity, measured=True)
