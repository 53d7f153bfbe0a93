"""The chain composed: from a dial file to angles and values."""

from dialgen.dial.build import Dial, ScaleDial, attempt, build
from dialgen.dial.chain import Chain

__all__ = ["Chain", "Dial", "ScaleDial", "attempt", "build"]
