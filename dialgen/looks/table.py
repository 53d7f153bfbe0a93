"""The looks by name: a row each."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import replace
from types import MappingProxyType
from typing import Any

from dialgen.looks.look import End, Lettering, LineForm, Look, MarkShape

PLAIN = "plain"

LOOKS: Mapping[str, Look] = MappingProxyType(
    {
        PLAIN: Look(),
        # A fine instrument read from near: thin marks of tapering width between two hairlines.
        "bench": Look(
            line=LineForm.DOUBLE,
            mark_shape=MarkShape.TAPER,
            letter_scale=0.92,
            length_scale=1.1,
            weight_scale=0.72,
        ),
        # A switchboard across a hall: bold, no more than is needed.
        "hall": Look(letter_scale=1.3, length_scale=1.2, weight_scale=1.9),
        # Light on dark, read at night.
        "night": Look(
            ink="#f2f0e6", ground="#101214", accent="#ff6a4d", letter_scale=1.08, weight_scale=1.15
        ),
        # A restoration: warm paper, brown-black ink, filled blocks along the line.
        "parchment": Look(
            ink="#2b1d12",
            ground="#f3e6c8",
            accent="#9c2a1c",
            line=LineForm.DOUBLE,
            blocks=True,
            weight_scale=0.9,
        ),
        # For engraving and laser: every letter a single stroke, all strokes round.
        "graver": Look(
            lettering=Lettering.STROKE,
            mark_ends=End.ROUND,
            letter_scale=1.08,
        ),
    }
)
"""Looks of our own; `Look` says what each value means."""


def dressed(style: str | None, *changes: Mapping[str, Any]) -> Look:
    """Return the look of a name (the plain one of None) with some of its values changed, in turn."""
    look = LOOKS[style or PLAIN]
    for change in changes:
        look = replace(look, **change)
    return look
