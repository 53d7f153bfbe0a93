"""What parts and facts are called where others look them up: bench, picture and cautions.

The coil is `dialgen.circuit.design.COIL`.  A part of one range has the range behind its name.
"""

from __future__ import annotations

SHUNT, SWAMP, LEADS = "shunt", "swamp", "leads"
SECTION, TOTAL = "section", "total"
MULTIPLIER, LINE = "multiplier", "line"
COIL_SHUNT, LEG = "coil shunt", "leg"
SERIES, ZERO = "series resistor", "zero adjuster"
FEED, FULL = "feed resistor", "full-scale adjuster"
ARM = "arm"

RATED_CURRENT = "rated current"
SECONDARY = "secondary at full scale"
SUPPRESS = "suppressed zero"
BATTERY = "battery"
SUPPLY, BALANCE = "supply", "balance"
