"""What to know at the bench of a shunt or bobbin made at home: how to make and trim it, what is too much."""

from __future__ import annotations

from collections.abc import Callable

from dialgen.parts.wire.winding import Winding
from dialgen.quantity import engineered, in_figures

PRECISE_RISE_K, RUINOUS_RISE_K = 60.0, 120.0
"""How warm a precise shunt may get, and what its solder, varnish and ageing do not stand.  Common
practice, from memory."""
DENSEST_COIL, DENSEST_STRIP = 3.0, 5.0
"""Amperes per mm² in a close winding, and in a heavy strip with its joints.  Common practice, from memory."""
_FOUR_WIRE_OHM, _HEAVY_A = 1.0, 10.0
_DRIFT_PERCENT = 0.2
_EMF_PERCENT, _EMF_DIFFERENCE_K = 0.05, 10.0
_SHORTEST_MM, _LONGEST_MM = 20.0, 200_000.0
_SET_LOW = 0.98
_METRES_MM = 1000.0


def advice(winding: Winding) -> tuple[str, ...]:
    """Return how to make and to trim it, in the order of the work; common practice but for the figures.

    Nothing where it is too short to be trimmed, as another is to be made then.
    """
    if winding.length_mm < _SHORTEST_MM:
        return ()
    return tuple(text for step in _STEPS if (text := step(winding)))


def objections(winding: Winding) -> tuple[str, ...]:
    """Return what is too hot, too dense, too short or of the wrong metal, with what would mend it."""
    return tuple(text for check in _CHECKS if (text := check(winding)))


def summary(winding: Winding) -> str:
    """Return its length, and what a metre or a millimetre of it has, in a line."""
    each = (
        f"{engineered(winding.wire.ohm_per_m, 'Ω', 4)} per metre"
        if winding.length_mm > _METRES_MM
        else f"{engineered(winding.ohm_per_mm, 'Ω', 4)} per millimetre"
    )
    return f"{_length(winding.length_mm)} of {winding.wire.name}, {each}"


def _length(length_mm: float) -> str:
    return engineered(length_mm / 1000, "m", 3)


def _batch(winding: Winding) -> str | None:
    wire = winding.wire
    if wire.measured or wire.thickness_mm is not None:
        return None
    least, most = (in_figures(each, 3) for each in (wire.material.least, wire.material.most))
    return (
        f"Measure the ohms of one metre first: {wire.material.name} has {least} to {most} Ω·mm²/m, and a "
        f"diameter wrong by 1 % is 2 % in ohms. "
        f'Write what you find behind the wire, as in "{engineered(wire.ohm_per_m, "ohm", 3)}/m".'
    )


def _joint(winding: Winding) -> str:
    material = winding.wire.material
    return material.heavy_joint if winding.current_a > _HEAVY_A else material.joint


def _bifilar(winding: Winding) -> str | None:
    if not winding.coiled:
        return None
    return (
        "Fold the wire in the middle and wind both halves side by side (bifilar), so that the bobbin has "
        f"almost no inductance. It takes about {in_figures(winding.room_cm3)} cm³ of winding space."
    )


def _age(winding: Winding) -> str | None:
    if winding.wire.material.name != "manganin":
        return None
    return (
        "Age it before the last trimming: hold it at about 140 °C for a day, or as hot as its insulation and "
        "joints stand, and let it cool. Without this its value creeps for months."
    )


def _cut(winding: Winding) -> str | None:
    if winding.wire.thickness_mm is not None:
        return None
    return (
        f"Cut {_length(winding.cut_mm)} and what its joints take, and shorten it, cold, until the value is "
        "right: "
        f"{_length(winding.thousandth_mm)} is 0.1 %."
    )


def _four_wire(winding: Winding) -> str | None:
    if winding.ohms > _FOUR_WIRE_OHM:
        return None
    percent = in_figures(100 * winding.ohm_per_mm / winding.ohms)
    return (
        "Measure with four wires: current in at the ends, voltage taken at two points inside them. One "
        f"millimetre between these points is {engineered(winding.ohm_per_mm, 'Ω', 3)}, which is {percent} %."
    )


def _slide(winding: Winding) -> str | None:
    if winding.wire.thickness_mm is None:
        return None
    return (
        f"Leave the strip longer than {_length(winding.length_mm)} for its end blocks. Send a steady, known "
        "current through it (a quarter of full scale keeps it cool), and fix the two voltage points where "
        "the drop is 2 % too low: "
        f"{engineered(_SET_LOW * winding.ohms, 'V', 4)} for each ampere."
    )


def _file(winding: Winding) -> str | None:
    if winding.wire.thickness_mm is None:
        return None
    whole, tenth = (_length(winding.filed_mm(0.1, share)) for share in (1.0, 0.1))
    return (
        "Then file one long edge between these points, and let it cool before you read again. Taking "
        f"{whole} off the width over the whole length raises the value by 0.1 %; over a tenth of the "
        f"length it takes {tenth}."
    )


_STEPS: tuple[Callable[[Winding], str | None], ...] = (
    _batch, _cut, _bifilar, _joint, _age, _four_wire, _slide, _file,
)  # fmt: skip
"""In the order of the work."""


def _hot(winding: Winding) -> str | None:
    rise_k = winding.rise_k
    if rise_k <= PRECISE_RISE_K:
        return None
    about = f"about {in_figures(rise_k)} K" if rise_k < 500 else "over 500 K"
    if rise_k > RUINOUS_RISE_K:
        return (
            f"By estimate it would get {about} hotter than the air, which is too hot. "
            "Take more cross-section, and so more length."
        )
    mend = (
        "a thicker wire, which fills a larger bobbin"
        if winding.coiled
        else ("more cross-section, and so more length, or large copper blocks at its ends")
    )
    return (
        f"By estimate it gets {about} hotter than the air; precise resistors stay below "
        f"{PRECISE_RISE_K:g} K. Take {mend}."
    )


def _dense(winding: Winding) -> str | None:
    flat = winding.wire.thickness_mm is not None
    limit = DENSEST_COIL if winding.coiled else DENSEST_STRIP if flat else None
    if limit is None or winding.density_a_per_mm2 <= limit:
        return None
    built = "close windings" if winding.coiled else "strips"
    return (
        f"The current density is {in_figures(winding.density_a_per_mm2)} A/mm²; {built} are kept below "
        f"{limit:g} A/mm². Take more cross-section."
    )


def _drifts(winding: Winding) -> str | None:
    change = winding.change_percent
    if abs(change) <= _DRIFT_PERCENT or winding.rise_k > RUINOUS_RISE_K:
        return None
    way = "rises" if change > 0 else "falls"
    return (
        f"Warm from its own current the value {way} by about {in_figures(abs(change))} %. "
        "Take manganin, or more cross-section."
    )


def _copper(winding: Winding) -> str | None:
    copper = winding.wire.material
    if copper.name != "copper":
        return None
    return (
        f"Copper changes by {in_figures(100 * copper.per_k)} % for each kelvin. Take manganin, unless it is "
        "to follow the movement's coil and stays as cool as the coil."
    )


def _thermo_emf(winding: Winding) -> str | None:
    drop_v = winding.ohms * winding.current_a
    emf_v = winding.wire.material.emf_v_per_k * _EMF_DIFFERENCE_K
    if not drop_v or emf_v <= _EMF_PERCENT / 100 * drop_v:
        return None
    return (
        f"On direct current, {_EMF_DIFFERENCE_K:g} K between its two ends give "
        f"{engineered(emf_v, 'V', 2)} against copper, {in_figures(100 * emf_v / drop_v)} % of its drop. "
        + ("Keep both ends equally warm." if winding.wire.material.name == "manganin" else "Take manganin.")
    )


def _length_out(winding: Winding) -> str | None:
    if winding.length_mm < _SHORTEST_MM:
        return (
            f"{_length(winding.length_mm)} is too short to trim: its joints decide the value. "
            "Take more cross-section, so that it gets longer."
        )
    if winding.length_mm > _LONGEST_MM:
        return f"{_length(winding.length_mm)} is very long to wind. Take a thinner wire, or nichrome."
    return None


_CHECKS: tuple[Callable[[Winding], str | None], ...] = (
    _hot, _dense, _drifts, _copper, _thermo_emf, _length_out,
)  # fmt: skip
"""Gravest first."""
