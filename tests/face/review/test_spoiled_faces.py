"""Each way to spoil a face is caught, by its own check and no other, and the good faces are silent."""

from __future__ import annotations

from pathlib import Path

import pytest
from spoiled_faces import BASES, BEARABLE, SPOILED, Bearable, Spoiled

import dialgen
from dialgen.errors import Finding
from dialgen.face.review import CHECKS


def reviewed(text: str, folder: Path) -> tuple[Finding, ...]:
    """Return what the review finds on the face of a dial file."""
    path = folder / "face.toml"
    path.write_text(text, encoding="utf-8")
    return dialgen.load(path).review()


@pytest.mark.parametrize("name", BASES)
def test_the_face_is_silent_before_it_is_spoiled(name: str, tmp_path: Path) -> None:
    """A good face is not remarked on: what is found on a spoiled one is due to the spoiling."""
    assert reviewed(BASES[name], tmp_path) == ()


@pytest.mark.parametrize("spoiled", SPOILED, ids=[spoiled.name for spoiled in SPOILED])
def test_a_spoiled_face_is_told_of_once(spoiled: Spoiled, tmp_path: Path) -> None:
    """One fault is one remark, by its own check, at its own key, in words that name it and a remedy."""
    (found,) = reviewed(spoiled.text, tmp_path)
    assert (found.check, found.key) == (spoiled.check, spoiled.key)
    assert spoiled.words in found.message
    assert "; " in found.message


@pytest.mark.parametrize("face", BEARABLE, ids=[face.name for face in BEARABLE])
def test_what_a_maker_may_want_is_not_nagged_at(face: Bearable, tmp_path: Path) -> None:
    """What is short of clearly wrong, or a fault elsewhere but not here, is left alone."""
    assert reviewed(face.text, tmp_path) == ()


def test_every_check_has_a_face_that_it_catches() -> None:
    """No check is without a face that it must find something on."""
    assert {spoiled.check for spoiled in SPOILED} == set(CHECKS)
