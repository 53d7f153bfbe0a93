"""Tables whose rows are loaded when they are asked for, so that a start pays only for what it uses."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from importlib import import_module
from typing import Any


class LoadedOnUse(Mapping[str, Any]):
    """A table of classes by kind.

    Args:
        package: the package they live in.
        places: kind to "module:class".
    """

    def __init__(self, package: str, places: Mapping[str, str]) -> None:
        self._package = package
        self._places = dict(places)

    def __getitem__(self, kind: str) -> Any:  # noqa: ANN401  (a class of any kind)
        module, name = self._places[kind].split(":")
        return getattr(import_module(f"{self._package}.{module}"), name)

    def __iter__(self) -> Iterator[str]:
        return iter(self._places)

    def __len__(self) -> int:
        return len(self._places)

    def __contains__(self, kind: object) -> bool:
        return kind in self._places
