"""The templates shipped with the program: dial files to start from.

In an installed wheel they lie in the package; in a checkout they are the folder ``templates``
beside it.
"""

from __future__ import annotations

import difflib
from importlib.resources import files
from importlib.resources.abc import Traversable
from pathlib import Path

from dialgen.errors import InputError


def _folder() -> Traversable:
    inside = files("dialgen") / "templates"
    return inside if inside.is_dir() else Path(__file__).parents[1] / "templates"


def names() -> list[str]:
    """Return the names of the templates, in order."""
    return sorted(
        item.name.removesuffix(".toml") for item in _folder().iterdir() if item.name.endswith(".toml")
    )


def text(name: str) -> str:
    """Return a template's text.

    Raises:
        InputError: there is none of that name.
    """
    if name not in names():
        close = difflib.get_close_matches(name, names(), n=1)
        hint = f"did you mean {close[0]}?" if close else "dialgen new --list shows them"
        raise InputError(f"there is no template {name!r}; {hint}")
    return (_folder() / f"{name}.toml").read_text(encoding="utf-8")


def summary(name: str) -> str:
    """Return a template's first line, which says in one line what it is for."""
    return text(name).splitlines()[0].lstrip("# ").rstrip()
