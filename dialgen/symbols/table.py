"""The dial symbols, a row each; how sure each fact is, `dialgen.symbols.symbol` explains."""

from __future__ import annotations

from dialgen.symbols import additions, movements, plain
from dialgen.symbols.symbol import Subject, Sure, Symbol

_S, _SEEN, _MEMORY = Subject, Sure.SEEN, Sure.MEMORY

SYMBOLS: tuple[Symbol, ...] = (
    Symbol(
        name="dc", title="direct current", number="B-1", number_sure=_SEEN,
        subject=_S.CURRENT, shape=plain.direct, sure=_MEMORY,
    ),
    Symbol(
        name="ac", title="alternating current, single-phase", number="B-2", number_sure=_SEEN,
        subject=_S.CURRENT, shape=plain.alternating, sure=_SEEN,
    ),
    Symbol(
        name="ac and dc", title="direct and alternating current", number="B-3", number_sure=_SEEN,
        subject=_S.CURRENT, shape=plain.both, sure=_SEEN,
    ),
    Symbol(
        name="3~", title="three-phase", number="B-4", number_sure=_SEEN,
        subject=_S.CURRENT, shape=plain.phases("3"), sure=_SEEN,
    ),
    Symbol(
        name="3~1E", title="three-phase, three wires, one element", number="B-6", number_sure=_SEEN,
        subject=_S.CURRENT, shape=plain.phases("3", "1E"), sure=_SEEN,
    ),
    Symbol(
        name="3N~1E", title="three-phase, four wires, one element", number="B-7", number_sure=_SEEN,
        subject=_S.CURRENT, shape=plain.phases("3N", "1E"), sure=_SEEN,
    ),
    Symbol(
        name="3~2E", title="three-phase, three wires, unbalanced, two elements",
        number="B-8", number_sure=_SEEN,
        subject=_S.CURRENT, shape=plain.phases("3", "2E"), sure=_SEEN,
    ),
    Symbol(
        name="3N~2E", title="three-phase, four wires, two elements", number="B-9", number_sure=_SEEN,
        subject=_S.CURRENT, shape=plain.phases("3N", "2E"), sure=_SEEN,
    ),
    Symbol(
        name="3N~3E", title="three-phase, four wires, three elements", number="B-10", number_sure=_SEEN,
        subject=_S.CURRENT, shape=plain.phases("3N", "3E"), sure=_SEEN,
    ),
    Symbol(
        name="test 500 V", title="insulation tested at 500 V", number="C-1", claim=True,
        subject=_S.SAFETY, shape=plain.star, sure=_SEEN,
    ),
    Symbol(
        name="test", title="insulation tested above 500 V, here 2 kV", number="C-2", claim=True,
        needs="kV", write="test 2 kV", sample="2",
        subject=_S.SAFETY, shape=plain.star, sure=_SEEN,
    ),
    Symbol(
        name="not tested", title="insulation not tested", number="C-3",
        subject=_S.SAFETY, shape=plain.untested, sure=_SEEN,
    ),
    Symbol(
        name="attention", title="see a separate document", number="F-33",
        subject=_S.SAFETY, shape=plain.attention, sure=_MEMORY,
    ),
    Symbol(
        name="vertical", title="with the dial vertical", number="D-1",
        subject=_S.POSITION, shape=plain.upright, sure=_SEEN,
    ),
    Symbol(
        name="horizontal", title="with the dial horizontal", number="D-2",
        subject=_S.POSITION, shape=plain.level, sure=_MEMORY,
    ),
    Symbol(
        name="inclined", title="with the dial inclined, here by 60°", number="D-3",
        needs="degrees", write="inclined 60", sample="60°",
        subject=_S.POSITION, shape=plain.inclined, sure=_SEEN,
    ),
    Symbol(
        name="class limit", title="per cent of the upper limit: fiducial = limit", number="E-1", claim=True,
        needs="class", write="class", sample="1.5",
        subject=_S.CLASS, shape=plain.of_limit, sure=_SEEN,
    ),
    Symbol(
        name="class length", title="per cent of the scale length: fiducial = length", number="E-2",
        claim=True, needs="class", write="class", sample="1.5",
        subject=_S.CLASS, shape=plain.of_length, sure=_MEMORY,
    ),
    Symbol(
        name="class value", title="per cent of the actual value: fiducial = value", number="E-3", claim=True,
        needs="class", write="class", sample="1.5",
        subject=_S.CLASS, shape=plain.of_value, sure=_SEEN,
    ),
    Symbol(
        name="moving coil", title="permanent magnet, moving coil", number="F-1",
        subject=_S.MOVEMENT, shape=movements.moving_coil, sure=_SEEN,
    ),
    Symbol(
        name="moving coil with rectifier", title="moving coil behind a rectifier", number="F-1, F-22",
        subject=_S.MOVEMENT, shape=movements.with_rectifier, sure=_SEEN,
    ),
    Symbol(
        name="moving coil with thermocouple", title="moving coil behind a thermocouple", number="F-1, F-18",
        subject=_S.MOVEMENT, shape=movements.with_couple, sure=_MEMORY,
    ),
    Symbol(
        name="moving coil ratiometer", title="permanent magnet, crossed coils", number="F-2",
        subject=_S.MOVEMENT, shape=movements.ratiometer, sure=_MEMORY,
    ),
    Symbol(
        name="moving iron", title="iron moved by the field of a coil", number="F-5",
        subject=_S.MOVEMENT, shape=movements.moving_iron, sure=_MEMORY,
    ),
    Symbol(
        name="electrodynamic", title="a coil moved by a coil, without iron", number="F-8",
        subject=_S.MOVEMENT, shape=movements.electrodynamic, sure=_MEMORY,
    ),
    Symbol(
        name="electrodynamic iron-cored", title="a coil moved by a coil, with an iron core", number="F-9",
        subject=_S.MOVEMENT, shape=movements.iron_cored, sure=_MEMORY,
    ),
    Symbol(
        name="induction", title="a disc or drum moved by induced currents", number="F-12",
        subject=_S.MOVEMENT, shape=movements.induction, sure=_MEMORY,
    ),
    Symbol(
        name="bimetal", title="a strip that bends when heated", number="F-15",
        subject=_S.MOVEMENT, shape=movements.bimetal, sure=_MEMORY,
    ),
    Symbol(
        name="electrostatic", title="plates that attract each other", number="F-16",
        subject=_S.MOVEMENT, shape=movements.electrostatic, sure=_MEMORY,
    ),
    Symbol(
        name="vibrating reed", title="reeds that show a frequency", number="F-17",
        subject=_S.MOVEMENT, shape=movements.reeds, sure=_MEMORY,
    ),
    Symbol(
        name="thermocouple", title="joined to its heater", number="F-18",
        subject=_S.ADDITION, shape=additions.thermocouple, sure=_MEMORY,
    ),
    Symbol(
        name="insulated thermocouple", title="insulated from its heater", number="F-19",
        subject=_S.ADDITION, shape=additions.insulated_thermocouple, sure=_MEMORY,
    ),
    Symbol(
        name="rectifier", title="between the measured circuit and the movement", number="F-22",
        subject=_S.ADDITION, shape=additions.rectifier, sure=_SEEN,
    ),
    Symbol(
        name="shunt", title="used with a separate shunt", number="F-23",
        subject=_S.ADDITION, shape=additions.shunt, sure=_MEMORY,
    ),
    Symbol(
        name="series resistor", title="used with a separate series resistor", number="F-24",
        subject=_S.ADDITION, shape=additions.series, sure=_MEMORY,
    ),
    Symbol(
        name="electrostatic screen", title="screened against electric fields", number="F-27",
        subject=_S.ADDITION, shape=additions.dashed_circle, sure=_MEMORY,
    ),
    Symbol(
        name="magnetic screen", title="screened against magnetic fields", number="F-28",
        subject=_S.ADDITION, shape=additions.circle, sure=_MEMORY,
    ),
    Symbol(
        name="earth terminal", title="terminal to be joined to earth", number="F-31",
        subject=_S.ADDITION, shape=additions.earth, sure=_MEMORY,
    ),
    Symbol(
        name="zero adjuster", title="where the zero is set", number="F-32",
        subject=_S.ADDITION, shape=additions.zero_adjuster, sure=_MEMORY,
    ),
    Symbol(
        name="Fe panel", title="for an iron panel, here 2 mm thick", number="F-37",
        needs="mm", write="Fe panel 2 mm", sample="2",
        subject=_S.ADDITION, shape=plain.panel("Fe"), sure=_MEMORY,
    ),
    Symbol(
        name="Fe", title="for an iron panel of any thickness", number="F-38",
        subject=_S.ADDITION, shape=plain.panel("Fe"), sure=_MEMORY,
    ),
    Symbol(
        name="NFe", title="for a panel without iron", number="F-39",
        subject=_S.ADDITION, shape=plain.panel("NFe"), sure=_MEMORY,
    ),
    Symbol(
        name="Fe.NFe", title="for any panel", number="F-40",
        subject=_S.ADDITION, shape=plain.panel("Fe.NFe"), sure=_MEMORY,
    ),
)  # fmt: skip
"""All of them, by subject and number."""
