"""The circuit read back from its picture: joined as it should be, and working as the design does."""

from __future__ import annotations

import math

import pytest
from covered import drawn
from netlist import Net
from pictured import COIL_A, COIL_OHM, COIL_TEXT, DESIGNS
from shapely import Polygon, unary_union

from dialgen.circuit.design import COIL
from dialgen.circuit.network import Branch, Feed, solve
from dialgen.schematic import draw
from dialgen.schematic.compose import laid
from dialgen.schematic.pieces import Kind

every_design = pytest.mark.parametrize("name", DESIGNS)


@every_design
def test_wires_join(name):
    """No wire ends in the air, three wires never meet without a dot, and all is one net."""
    net = Net(laid(DESIGNS[name], COIL_TEXT))
    assert net.loose_ends() == []
    assert net.undotted() == []
    expected = 2 if DESIGNS[name].kind == "current transformer" else 1
    # What a switch is not on is joined by its part alone; an empty contact has no wire.
    assert net.pieces_apart() == expected


@every_design
def test_the_ink_itself_joins(name):
    """Wires, terminals and parts as drawn make one piece of ink; a transformer's bar and core stand apart."""
    drawing = draw(DESIGNS[name], coil=COIL_TEXT)
    by_name = {layer.name: layer.items for layer in drawing.layers}
    # A cell's plates and a movement's pointer stand apart within their sign.
    parts = unary_union([drawn(item).buffer(0.65) for item in by_name["parts"]])
    parts = unary_union([Polygon(part.exterior) for part in getattr(parts, "geoms", [parts])])
    rest = [drawn(item) for key in ("wires", "joints") for item in by_name.get(key, ())]
    whole = unary_union([parts, *rest, *map(drawn, by_name.get("terminals", ()))])
    pieces = list(getattr(whole, "geoms", [whole]))
    loose = switch_contacts(DESIGNS[name])
    bars = 1 if DESIGNS[name].kind == "current transformer" else 0
    assert len(pieces) == 1 + bars + loose


def switch_contacts(design):
    """How many pieces of ink a switch leaves apart: its pivot's side, or a contact with nothing at it."""
    # The pivot of an ohmmeter's switch is on the rail, and its largest range has no part.
    # The pivot of the multipliers' is on the terminal, and all contacts are joined behind their parts.
    switched = ("shunt ×", "multiplier ")
    several = len(design.cases) > 1
    return 1 if several and any(part.name.startswith(switched) for part in design.parts) else 0


CURRENT = ["shunt", "shunt with all", "shunt bought", "shunt bought, leads", "shunt of 40 A"]
VOLTAGE = ["multiplier", "multiplier with all"]


@pytest.mark.parametrize("name", CURRENT)
def test_a_shunt_as_drawn_divides_the_current(name):
    """By Kirchhoff the circuit read from its picture gives the coil its full current at the range."""
    design = DESIGNS[name]
    net = Net(laid(design, COIL_TEXT))
    feed = Feed(net.terminal(f"{design.case.name} +"), net.terminal("−"), design.range)
    coil_a = solve(net.branches(design.ohms), feed).loads[COIL].current_a
    expected = design.case.work(design.ohms, design.range).drive * COIL_A
    assert coil_a == pytest.approx(expected, rel=1e-9)
    assert coil_a == pytest.approx(COIL_A, rel=2e-5)


def test_a_universal_shunt_as_drawn_works_at_every_terminal():
    """A range's current into its own terminal drives the coil fully, on each of ten ranges."""
    design = DESIGNS["universal, ten ranges"]
    net = Net(laid(design, COIL_TEXT))
    for case in design.cases:
        feed = Feed(net.terminal(f"{case.name} +"), net.terminal("−"), case.signal)
        assert solve(net.branches(design.ohms), feed).loads[COIL].current_a == pytest.approx(COIL_A, rel=1e-9)


@pytest.mark.parametrize("name", VOLTAGE)
def test_a_multiplier_as_drawn_limits_the_current(name):
    """The range's voltage across the two terminals drives exactly the coil's current through it."""
    design = DESIGNS[name]
    net = Net(laid(design, COIL_TEXT))
    source = Branch("source", net.terminal("−"), net.terminal(f"{design.case.name} +"), 0.0, design.range)
    assert solve([*net.branches(design.ohms), source]).loads[COIL].current_a == pytest.approx(COIL_A)


def test_a_chain_as_drawn_works_at_every_terminal():
    """Each range's voltage at its own terminal of the chain drives the coil fully."""
    design = DESIGNS["chain, ten ranges"]
    net = Net(laid(design, COIL_TEXT))
    for case in design.cases:
        source = Branch("source", net.terminal("−"), net.terminal(f"{case.name} +"), 0.0, case.signal)
        solved = solve([*net.branches(design.ohms), source])
        assert solved.loads[COIL].current_a == pytest.approx(COIL_A)


def test_the_switch_stands_on_the_range_of_the_scale():
    """Of separate multipliers the switch takes the one whose range the scale shows."""
    design = DESIGNS["multipliers"]
    net = Net(laid(design, COIL_TEXT))
    source = Branch("source", net.terminal("−"), net.terminal("+"), 0.0, design.range)
    loads = solve([*net.branches(design.ohms), source]).loads
    assert loads[COIL].current_a == pytest.approx(COIL_A)
    assert loads["multiplier 50 V"].current_a == pytest.approx(COIL_A)
    assert loads["multiplier 10 V"].current_a == pytest.approx(0.0, abs=1e-15)


@pytest.mark.parametrize("name", ["multiplier with all", "multipliers, line", "chain, ten ranges"])
def test_a_line_leads_to_the_instrument_from_outside(name):
    """The line's own resistance lies left of all else, between the lower terminal and where it begins."""
    net = Net(laid(DESIGNS[name], COIL_TEXT))
    (line,) = [sign for sign in net.signs if sign.part == "line"]
    assert max(line.start[0], line.end[0]) < min(sign.start[0] for sign in net.signs if sign is not line)
    (begins,) = [t for t in net.terminals if t.name == "−"]
    (unnamed,) = [t for t in net.terminals if not t.name and t.at[1] == begins.at[1]]
    assert begins.at[0] < line.start[0] < unnamed.at[0]
    assert unnamed.at[0] == max(t.at[0] for t in net.terminals if t.name)


def test_one_range_has_no_switch():
    """Where an ohmmeter's only range has a shunt of its own, it is there without a switch."""
    net = Net(laid(DESIGNS["series ohmmeter, low"], COIL_TEXT))
    assert net.arms == []
    assert [sign.part for sign in net.signs].count("shunt ×1") == 1


def test_a_zener_stands_against_the_current():
    """The diode of a suppressed zero has its cathode towards the upper terminal, so that it breaks down."""
    design = DESIGNS["multiplier, suppressed"]
    net = Net(laid(design, COIL_TEXT))
    (anode, cathode), (plus, _) = net.kinds(Kind.ZENER)[0], net.ends_of(COIL)
    assert anode == plus
    assert cathode in net.ends_of("swamp")


def ideally(net, values, source):
    """The coil's current with ideal diodes: the one state in which all of them agree (Kirchhoff)."""
    diodes = net.kinds(Kind.DIODE)
    found = []
    for state in range(2 ** len(diodes)):
        on = [bool(state >> i & 1) for i in range(len(diodes))]
        # A closed diode of a milliohm and an open one of a gigaohm, so that no loop of wires is left.
        branches = [
            Branch(f"diode {i}", *ends, 1e-3 if closed else 1e9)
            for i, (ends, closed) in enumerate(zip(diodes, on, strict=True))
        ]
        solved = solve([*net.branches(values), *branches, source])
        currents = [solved.loads[branch.name].current_a for branch in branches]
        if all((current > 0) is closed for current, closed in zip(currents, on, strict=True)):
            found.append(solved.loads[COIL].current_a)
    return found


RECTIFIED = {
    "rectifier": lambda v, ohms: (v / (ohms["multiplier"] + COIL_OHM),) * 2,
    "half wave": lambda v, ohms: (v / (ohms["multiplier"] + COIL_OHM), 0.0),
    # i·(Rm + R/2 + Rx/(4k)) = v/(2k), k = 1 + Rx/(2R): Thévenin's source of a half bridge (dialfile.md).
    "half bridge": lambda v, ohms: (
        (v / (2 * k(ohms)) / (COIL_OHM + ohms["leg 1"] / 2 + ohms["multiplier"] / (4 * k(ohms))),) * 2
    ),
}


def k(values):
    """1 + Rx/(2R)."""
    return 1 + values["multiplier"] / (2 * values["leg 1"])


@pytest.mark.parametrize("name", RECTIFIED)
def test_a_rectifier_as_drawn_rectifies(name):
    """With ideal diodes both half waves, or the one, drive the coil forwards as by formula."""
    design = DESIGNS[name]
    net = Net(laid(design, COIL_TEXT))
    for volts_, expected in zip((10.0, -10.0), RECTIFIED[name](10.0, design.ohms), strict=True):
        source = Branch("source", net.terminal("~"), net.terminal("10 V ~"), 0.0, volts_)
        (coil_a,) = ideally(net, design.ohms, source)
        assert coil_a == pytest.approx(expected, rel=1e-4, abs=1e-6)


@pytest.mark.parametrize("name", ["rectifier", "half wave", "half bridge"])
def test_a_coil_shunt_is_across_the_coil(name):
    """The shunt of the coil lies between the very nodes of the movement."""
    other = {"rectifier": "rectifier, coil shunt"}.get(name, f"{name}, coil shunt")
    net = Net(laid(DESIGNS[other], COIL_TEXT))
    assert set(net.ends_of("coil shunt")) == set(net.ends_of(COIL))


OHMMETERS = {
    "series ohmmeter": (0.0, "−", "+"),
    "series ohmmeter, zero in series": (0.0, "−", "+"),
    "series ohmmeter, three ranges": (0.0, "−", "+"),
    "series ohmmeter, low": (0.0, "−", "+"),
    "shunt ohmmeter": (math.inf, "+", "−"),
    "shunt ohmmeter, series resistor": (math.inf, "+", "−"),
}


@pytest.mark.parametrize("name", OHMMETERS)
def test_an_ohmmeter_as_drawn_works_as_designed(name):
    """With its adjuster where the design has it, the picture gives the design's drive, also half way."""
    design = DESIGNS[name]
    full_ohm, upper, lower = OHMMETERS[name]
    net = Net(laid(design, COIL_TEXT))
    values = dict(design.ohms)
    for adjuster in ("zero adjuster", "full-scale adjuster"):
        if adjuster in values:
            (share,) = [f.value for f in design.facts if f.name == f"{adjuster}, new"]
            values[adjuster] *= share / 100
    plus, minus = net.ends_of("battery")
    battery = Branch("battery", minus, plus, 0.0, 1.5)
    for unknown_ohm in (full_ohm, design.range):
        unknown = Branch("unknown", net.terminal(upper), net.terminal(lower), unknown_ohm)
        solved = solve([*net.branches(values), battery, unknown])
        expected = design.case.work(design.ohms, unknown_ohm).drive
        assert solved.loads[COIL].current_a / COIL_A == pytest.approx(expected, rel=1e-9)
        assert expected == pytest.approx(1.0 if unknown_ohm == full_ohm else 0.5, rel=1e-6)


@pytest.mark.parametrize("name", ["bridge", "bridge, poles changed"])
def test_a_bridge_as_drawn_is_wheatstones(name):
    """The picture balances at R1·R3/R2 and drives the coil forwards as the design does elsewhere."""
    design = DESIGNS[name]
    net = Net(laid(design, COIL_TEXT))
    plus, minus = net.ends_of("supply")
    battery = Branch("supply", minus, plus, 0.0, 1.5)
    balance_ohm = design.ohms["arm R1"] * design.ohms["arm R3"] / design.ohms["arm R2"]
    for sensor_ohm in (80.0, balance_ohm, 150.0):
        solved = solve([*net.branches({**design.ohms, "sensor": sensor_ohm}), battery])
        expected = design.case.work(design.ohms, sensor_ohm).drive * COIL_A
        assert solved.loads[COIL].current_a == pytest.approx(expected, rel=1e-9, abs=1e-15)


def test_the_secondary_is_earthed_and_feeds_the_movement():
    """The winding, the shunt and the movement are in parallel, and the earth is at their foot."""
    net = Net(laid(DESIGNS["transformer"], COIL_TEXT))
    assert set(net.kinds(Kind.WINDING)[0]) == set(net.ends_of(COIL)) == set(net.ends_of("shunt"))
    assert net.kinds(Kind.EARTH)[0][0] in net.ends_of(COIL)


def test_a_large_shunt_has_four_terminals():
    """From 10 A, or bought, a shunt is joined to the movement's branch at two inner terminals."""
    for name in ("shunt bought", "shunt of 40 A"):
        net = Net(laid(DESIGNS[name], COIL_TEXT))
        places = sorted(terminal.at[0] for terminal in net.terminals)
        (shunt,) = [sign for sign in net.signs if sign.part == "shunt"]
        assert len(places) == 4
        assert places[1] < shunt.start[0] < shunt.end[0] < places[2]
        sensed = {end for end in net.ends() if end[1] > 0 and end[1] < 2}
        assert {x for x, _ in sensed} == {places[1], places[2]}
    assert len(Net(laid(DESIGNS["shunt"], COIL_TEXT)).terminals) == 2
