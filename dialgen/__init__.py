"""True-size, printable scale plates for analogue meters.

>>> import dialgen
>>> dial = dialgen.load("battery.toml")       # doctest: +SKIP
>>> dial.angle(12.5), dial.value(0.0)         # doctest: +SKIP
>>> dial.draw("battery.pdf")                  # doctest: +SKIP
"""

from __future__ import annotations

from os import PathLike
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from dialgen.api import Face

__all__ = ["__version__", "load"]
__version__ = "0.3.0"


def load(path: str | PathLike[str]) -> Face:
    """Read the dial file at ``path``; see `dialgen.api.load`.

    The work is imported on the first call, so that ``dialgen --help`` need not wait for it.
    """
    from dialgen import api

    return api.load(path)
