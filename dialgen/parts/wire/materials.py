"""What shunts and bobbins are made of."""

from __future__ import annotations

import difflib
from collections.abc import Mapping
from dataclasses import dataclass


@dataclass(frozen=True, slots=True, kw_only=True)
class Material:
    """A metal for shunts and bobbins, at 20 °C.

    Args:
        name: what it is called.
        resistivity: what to reckon with, in Ω·mm²/m.
        least: the least that is published for it, in the same unit.
        most: the most that is published for it.
        per_k: the temperature coefficient of resistance, per kelvin; the largest of either sign.
        emf_v_per_k: the thermoelectric voltage against copper, without its sign.
        joint: how its ends are joined.
        heavy_joint: how they are joined where the current is heavy.
        source: where the figures are from.
    """

    name: str
    resistivity: float
    least: float
    most: float
    per_k: float
    emf_v_per_k: float
    joint: str
    heavy_joint: str
    source: str


_ALLOYS = (
    "resistivity of the DIN types, from memory; its other bound, and the coefficient, by Kuphaldt, "
    "Lessons in Electric Circuits V (after CRC Handbook, 78th ed.)"
)
_TINNED = "Solder the ends to copper with plenty of flux and as little heat as will do."
_BLOCKS = "Hard-solder the ends into blocks of copper or brass, and clean off the flux."

MATERIALS: Mapping[str, Material] = {
    material.name: material
    for material in (
        Material(
            name="manganin",
            resistivity=0.43,
            least=0.43,
            most=0.4821,
            per_k=0.000015,
            emf_v_per_k=1e-6,
            joint=_TINNED,
            heavy_joint=_BLOCKS,
            source=_ALLOYS,
        ),
        Material(
            name="constantan",
            resistivity=0.49,
            least=0.4538,
            most=0.49,
            per_k=-0.000074,
            emf_v_per_k=40e-6,
            joint=_TINNED,
            heavy_joint=_BLOCKS,
            source=_ALLOYS,
        ),
        Material(
            name="nichrome",
            resistivity=1.08,
            least=1.08,
            most=1.122,
            per_k=0.00017,
            emf_v_per_k=4e-6,
            joint="Soft solder does not take on nichrome: clamp, crimp or hard-solder the ends.",
            heavy_joint=_BLOCKS,
            source=f"{_ALLOYS}; thermoelectric voltage from memory",
        ),
        Material(
            name="copper",
            resistivity=1 / 58,
            least=1 / 58,
            most=1 / 56,
            per_k=0.00393,
            emf_v_per_k=0.0,
            joint="Solder the ends.",
            heavy_joint="Bolt or solder the ends to their terminals with the whole of their faces.",
            source="IEC 60028 (1925) for annealed copper; hard-drawn up to 1/56 Ω·mm²/m, from memory",
        ),
    )
}
"""By name.  The alloys' coefficients are those of any batch; within a few tens of kelvins of room
temperature good manganin is flatter still."""


def known_materials() -> str:
    """Return the names of all materials as a list to read.

    >>> known_materials()
    'manganin, constantan, nichrome or copper'
    """
    *most, last = MATERIALS
    return f"{', '.join(most)} or {last}"


def meant_material(word: str) -> str | None:
    """Return the material that a misspelt word is nearest to, if any is near."""
    near = difflib.get_close_matches(word.lower(), MATERIALS, n=1, cutoff=0.7)
    return near[0] if near else None
