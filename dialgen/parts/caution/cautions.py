"""What to beware of when a circuit is built and used, by what the circuit is.

One row of the table is one caution, gravest first.  The program knows the circuit and not the place
it is used in: the last row always stands.
"""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass

from dialgen.circuit.multiplier import Multiplier
from dialgen.circuit.rectifiers.rectifier import Rectifier
from dialgen.circuit.shunt import Shunt
from dialgen.circuit.transformer import CurrentTransformer
from dialgen.errors import InputError
from dialgen.parts.caution.situation import TOUCH_DC_V, Situation

_HEAVY_A, _WIRED_A = 10.0, 0.1
_BEHIND_RESISTORS = (Multiplier.kind, Rectifier.kind)
_PRACTICE = "common practice"
_LIMITS = "common practice; limits of IEC 60364-4-41, from memory"
_EQUAL = 1e-9


@dataclass(frozen=True, slots=True, kw_only=True)
class Caution:
    """A warning, and where it applies.

    Args:
        id: its name in tests and reports.
        text: one or two plain sentences that say what to do.
        source: the published source, or that it is common practice.
        applies: whether it belongs to a situation.
    """

    id: str
    text: str
    source: str
    applies: Callable[[Situation], bool]


def cautions(situation: Situation) -> tuple[Caution, ...]:
    """Return the cautions that apply, gravest first."""
    return tuple(caution for caution in CAUTIONS if caution.applies(situation))


def split_count(voltage_peak_v: float, rating_v: float) -> int:
    """Return into how many equal resistors in series to split one, so that none has more than its rating.

    Args:
        voltage_peak_v: the peak over the whole; 1.414 times the RMS of a sine.
        rating_v: what one resistor stands, by its data sheet; `USUAL_RATINGS_V` where there is none.

    Raises:
        InputError: the voltage is not finite, or the rating not above nothing.

    >>> split_count(354, 250), split_count(250, 250), split_count(0, 250)
    (2, 1, 1)
    """
    if not 0 < rating_v < math.inf:
        raise InputError(f"a rating of {rating_v:g} V holds nothing; give the volts that one resistor stands")
    if not math.isfinite(voltage_peak_v):
        raise InputError(f"a peak of {voltage_peak_v:g} V cannot be split; give a voltage")
    return max(math.ceil(abs(voltage_peak_v) / rating_v * (1 - _EQUAL)), 1)


def _always(_: Situation) -> bool:
    return True


CAUTIONS: tuple[Caution, ...] = (
    Caution(
        id="above 1 kV",
        text="Above 1 kV this program gives no design help. Give the work to a specialist in high voltage.",
        source="limit of this program",
        applies=lambda s: s.beyond_help,
    ),
    Caution(
        id="secondary open",
        text="Never open the secondary of a current transformer while current flows in the primary: its "
        "voltage can kill. Short the secondary and earth one side of it before you work on the meter.",
        source="UFC 3-560-01 (2006) §9-5.2",
        applies=lambda s: s.kind == CurrentTransformer.kind,
    ),
    Caution(
        id="touch",
        text="This voltage can kill: switch off, lock off and prove dead before you touch any part. "
        "Cover live parts so that no finger reaches them.",
        source=_LIMITS,
        applies=lambda s: s.dangerous,
    ),
    Caution(
        id="primary dead",
        text="Fit or change a current transformer only with its primary conductor dead. Take one whose "
        "insulation is made for the voltage of that conductor.",
        source=_PRACTICE,
        applies=lambda s: s.kind == CurrentTransformer.kind,
    ),
    Caution(
        id="ohmmeter on live circuit",
        text="Switch the circuit off and discharge its capacitors before you connect an ohmmeter. "
        "A live circuit burns the movement and can hurt you.",
        source="NEETS modules 3 and 16",
        applies=lambda s: s.battery,
    ),
    Caution(
        id="live leads",
        text="Put a fuse in each live lead where it leaves the supply, one that can break the supply's full "
        "fault current. Keep the distances through air and along surfaces (clearance and creepage) that the "
        "local code asks for.",
        source=_LIMITS,
        applies=lambda s: s.helped,
    ),
    Caution(
        id="direct current arc",
        text="Take fuses and switches that are rated for direct current at this voltage. "
        "A DC arc does not go out by itself.",
        source=_PRACTICE,
        applies=lambda s: s.may_be_dc and s.volts > TOUCH_DC_V and not s.beyond_help,
    ),
    Caution(
        id="split",
        text="Make the multiplier of several equal resistors in series, so that none has more than its rated "
        "voltage at the peak. If no data sheet tells it, count on 250 V for 0.25 W and 350 V for 0.5 W.",
        source="common practice; the ratings from memory",
        applies=lambda s: (
            s.kind in _BEHIND_RESISTORS
            and not s.beyond_help
            and split_count(s.resistor_peak_v, s.resistor_rating_v) > 1
        ),
    ),
    Caution(
        id="earthy end",
        text="Put the multiplier in the live lead, and the movement at the earthed end: the neutral, or the "
        "earthed pole of a DC supply.",
        source=_PRACTICE,
        applies=lambda s: s.helped and s.kind in _BEHIND_RESISTORS,
    ),
    Caution(
        id="zero screw",
        text="The zero screw, the scale plate and the pointer may be live. Set the zero with the circuit "
        "off, and do not leave the meter without its cover.",
        source=_PRACTICE,
        applies=lambda s: s.dangerous,
    ),
    Caution(
        id="ammeter on live line",
        text="An ammeter has the full voltage of its line on its terminals, zero screw and plate. Above 50 V "
        "AC or 120 V DC treat them all as live.",
        source=_LIMITS,
        applies=lambda s: s.takes == "A" and s.kind != CurrentTransformer.kind and s.range >= _WIRED_A,
    ),
    Caution(
        id="shunt before leads",
        text="Bolt the shunt in before you connect the movement to it, and take the movement off first. "
        "A movement without its shunt takes the whole current and burns.",
        source=_PRACTICE,
        applies=lambda s: s.kind == Shunt.kind and s.shunt_a > 0,
    ),
    Caution(
        id="sense fuse",
        text="Put a small fuse in each sense lead close to the shunt, and count its ohms with the leads. "
        "Without it a lead that touches metal carries the fault current of the supply.",
        source=_PRACTICE,
        # Behind a transformer there is no supply to feed a fault, and nothing may open.
        applies=lambda s: s.shunt_a > _HEAVY_A and s.kind != CurrentTransformer.kind,
    ),
    Caution(
        id="heavy shunt",
        text="Bolt the cables flat and tight on clean faces of the shunt's outer terminals: a loose joint "
        "burns. Give the shunt free air, and keep what can melt or catch fire away from it.",
        source=_PRACTICE,
        applies=lambda s: s.shunt_a > _HEAVY_A,
    ),
    Caution(
        id="moving coil on AC",
        text="A moving coil shows nothing on AC, and its coil can burn while the pointer stays at rest. "
        "Behind a current transformer take a moving iron, or a rectifier made for it.",
        source=_PRACTICE,
        applies=lambda s: s.kind == CurrentTransformer.kind and s.movement == "moving coil",
    ),
    Caution(
        id="moving iron with shunt",
        text="Do not shunt a moving iron movement on AC: its coil has inductance, and the current does not "
        "divide as the ohms say. Take a current transformer that gives the movement's own current.",
        source=_PRACTICE,
        applies=lambda s: s.movement == "moving iron" and s.may_be_ac and s.shunt_a > 0,
    ),
    Caution(
        id="suppressed zero",
        text="Use a suppressed zero on smooth, true direct current only. Ripple or AC makes it read wrong.",
        source=_PRACTICE,
        applies=lambda s: s.suppressed,
    ),
    Caution(
        id="highest range first",
        text="Start on the highest range and work down.",
        source="NEETS module 3",
        applies=lambda s: s.ranges > 1 and s.takes in ("A", "V"),
    ),
    Caution(
        id="radium",
        text="Do not open an old meter with yellow or brown luminous paint. It may be radium, which stays "
        "radioactive when it no longer glows.",
        source="EPA, Radioactive antiques; 10 CFR 31.12",
        applies=_always,
    ),
    Caution(
        id="sealed meters",
        text="Do not re-scale a sealed meter that is used for billing or trade, or any meter of an aircraft "
        "or of a medical device.",
        source=_PRACTICE,
        applies=_always,
    ),
    Caution(
        id="marks lost",
        text="A changed meter has lost its measuring category (CAT) and its test marks: leave them off the "
        "new scale. A scale plate made at home carries no category of its own.",
        source=_PRACTICE,
        applies=_always,
    ),
    Caution(
        id="codes",
        text="Local codes and licensed people come first: where they say otherwise, follow them.",
        source=_PRACTICE,
        applies=_always,
    ),
)
"""Gravest first: what kills, what burns, what misleads, what the law says."""
