"""``dialgen circuit``: the contract's JSON, the bench sheet in words, and the picture."""

from __future__ import annotations

import json
import math
import re
import subprocess
import sys
from pathlib import Path

import pytest

BASE = """\
dialgen = 1
[movement]
current = "1 mA"
resistance = "75 ohm"
rest = -44.0
full = 44.0
[plate]
size = [84, 64]
pivot = [42, 12]
[[scale]]
unit = "A"
from = 0
to = 40
radius = 44
"""
BUILT = BASE + '[scale.circuit]\nkind = "shunt"\nrange = "40 A"\nbuilt = "1.885 mohm"\n'


def run(*words: str | Path, status: int = 0) -> subprocess.CompletedProcess[str]:
    """Run the program in a process of its own, and check its exit status."""
    command = [sys.executable, "-m", "dialgen", *map(str, words)]
    done = subprocess.run(command, capture_output=True, encoding="utf-8", timeout=120, check=False)
    assert done.returncode == status, done.stderr
    return done


@pytest.fixture
def file(tmp_path: Path):
    """Write a dial file and return its path."""

    def write(text: str) -> Path:
        path = tmp_path / "dial.toml"
        path.write_text(text, encoding="utf-8")
        return path

    return write


def circuits(path: Path, *words: str) -> list[dict]:
    """The circuits as JSON."""
    return json.loads(run("circuit", path, "--json", *words).stdout)["circuits"]


def test_the_contracts_example(file) -> None:
    """A 1 mA, 75 Ω movement for 40 A: the shunt, drop, heat and rating that dialfile.md prints."""
    (circuit,) = circuits(file(BUILT))
    assert {name: circuit[name] for name in ("kind", "range", "unit")} == {
        "kind": "shunt",
        "range": 40.0,
        "unit": "A",
    }
    assert circuit["drop"] == pytest.approx(0.075, rel=1e-12)
    (part,) = circuit["parts"]
    assert part["name"] == "shunt"
    assert part["ohms"] == pytest.approx(0.001875046876, rel=1e-9)
    assert part["watts"] == pytest.approx(2.999925, rel=1e-9)
    assert part["rating"] == 6.0
    assert part["built"] == 0.001885
    assert circuit["cautions"]
    assert all(isinstance(caution, str) for caution in circuit["cautions"])


def test_sections_stand_from_the_largest_ranges_tap_outwards_then_the_total(file) -> None:
    """The published 1/5/10 A universal shunt (50 Ω, 1 mA; dc.ayrton.a), in the contract's order."""
    text = BASE.replace('"75 ohm"', '"50 ohm"').replace("to = 40", "to = 5")
    (circuit,) = circuits(
        file(text + 'circuit = { kind = "universal shunt", ranges = ["1 A", "5 A", "10 A"] }')
    )
    assert [part["name"] for part in circuit["parts"]] == ["section 1", "section 2", "section 3", "total"]
    wanted = [0.005005005005, 0.005005005005, 0.04004004004, 0.05005005005]
    assert [part["ohms"] for part in circuit["parts"]] == pytest.approx(wanted, rel=1e-9)
    assert circuit["range"] == 5.0
    # In the total as much heat as in its sections at 10 A, 9.999 A² times 5.005 mΩ, and the coil's 1 mA.
    heat_w = 9.999**2 * 0.005005005005 + 1e-6 * (0.005005005005 + 0.04004004004)
    assert circuit["parts"][-1]["watts"] == pytest.approx(heat_w, rel=1e-6)


def test_one_tapped_shunt_for_scale_and_row_is_one_circuit(file) -> None:
    """A scale and its further row on two taps of the same shunt need it once."""
    tapped = '{ kind = "universal shunt", ranges = ["10 A", "40 A"] }'
    text = BASE.replace(
        "to = 40", f"to = 10\ncircuit = {tapped}\nalso = [{{ times = 4, circuit = {tapped} }}]"
    )
    assert len(circuits(file(text))) == 1
    assert "(scale 1, 0 to 10 A; scale 1, row 2)" in run("circuit", file(text)).stdout


def test_the_nearest_bought_value_and_what_it_does(file) -> None:
    """For 9 500 Ω (LIEC, 10 V, 500 Ω) E24 has 9 100: 10 V over 9 600 Ω drives 4.17 % too far."""
    text = BASE.replace('"75 ohm"', '"500 ohm"').replace('"A"', '"V"').replace("to = 40", "to = 10")
    (circuit,) = circuits(file(text + 'circuit = "multiplier"'), "--series", "E24")
    (part,) = circuit["parts"]
    assert part["ohms"] == pytest.approx(9500.0, rel=1e-12)
    (fit,) = part["nearest"]
    assert (fit["series"], fit["ohms"]) == ("E24", 9100.0)
    assert fit["error_percent"] == pytest.approx(100 * (10_000 / 9_600 - 1), rel=1e-9)
    assert circuit["ranges"][0]["ohms_per_volt"] == pytest.approx(1000.0, rel=1e-12)


def test_the_drawer_is_in_the_file_or_in_options(file) -> None:
    """A 9 500 Ω multiplier from 19 k, 19 k and 1 k; an option goes before the file."""
    text = BASE.replace('"75 ohm"', '"500 ohm"').replace('"A"', '"V"').replace("to = 40", "to = 10")
    text += 'circuit = "multiplier"\n[parts]\nstock = ["19 kohm x2", "1 kohm"]\n'
    (search,) = circuits(file(text))[0]["stock"]
    best = search["candidates"][0]
    assert best["network"] == "19k || 19k"
    assert (best["parts"], best["error_percent"]) == (2, pytest.approx(0.0, abs=1e-9))
    # One 19 kΩ alone is twice the 9.5 kΩ, 100 % too much; the ohms tell the percent of each.
    for found in search["candidates"]:
        assert found["error_percent"] == pytest.approx(100 * (found["ohms"] / 9500 - 1), abs=1e-9)
    assert max(abs(found["error_percent"]) for found in search["candidates"]) > 1
    # Singles a, b; pairs aa and ab, in series or parallel; of a, a, b all in series, b + (a||a), a + (a||b),
    # and the same three with series and parallel changed over: 2 + 4 + 6.
    assert search["searched"] == 12
    (other,) = circuits(file(text), "--stock", "9.5 kohm")[0]["stock"]
    assert other["candidates"][0]["network"] == "9.5k"


def test_a_face_as_designed_is_told_of_at_every_numbered_mark(file) -> None:
    """As built 0.53 % too large, 40 A shows k·40 on an old face, k by current division; with the cure."""
    said = run("circuit", file(BUILT)).stdout
    factor = (1.885 / 1.8750468761719) * (1.8750468761719e-3 + 75) / (1.885e-3 + 75)
    row = next(line.split() for line in said.splitlines() if line.split()[:1] == ["40"] and "A" not in line)
    assert float(row[1]) == pytest.approx(40 * factor, abs=5e-4)
    parallel = 1 / (1 / 1.8750468761719e-3 - 1 / 1.885e-3)
    assert f"put {parallel * 1e3:.1f} mΩ across it" in said


def test_heat_overload_and_drift_are_printed(file) -> None:
    """The sheet has exact value, power (3 W), overload (4.32 W), rating (6 W) and drift of bare copper."""
    path = file(BASE + 'circuit = "shunt"')
    said = run("circuit", path).stdout
    row = next(line for line in said.splitlines() if line.startswith("shunt  "))
    cells = ["shunt", "1.875 mΩ", "40 A", "75 mV", "3 W", "4.32 W", "6 W", "+1 %"]
    assert re.split(r"\s\s+", row) == cells
    # The coil branch alone is copper: d(ln drive)/dT is -(α - β) but for the shunt's share, α of
    # IEC 60028 and 1.5e-5 of manganin as in Kuphaldt, LIEC V.
    drift = circuits(path)[0]["ranges"][0]["drift_percent_per_k"]
    assert drift == pytest.approx(-(0.393 - 0.0015), rel=1e-4)
    assert "copper does, 0.393 % per kelvin (IEC 60028), against resistors of 0.0015 %" in " ".join(
        said.split()
    )


def test_swamping_for_a_wanted_drift(file) -> None:
    """0.1 %/K of 75 Ω of copper takes a branch of about four times that, and its drop (IEC 60028)."""
    (circuit,) = circuits(file(BASE + 'circuit = "shunt"'), "--drift", "0.1")
    swamp = circuit["swamping"]["ohms"]
    # Copper's share of the branch times copper's rise over manganin's, to the shunt's share.
    assert (0.00393 - 1.5e-5) * 75 / (75 + swamp) == pytest.approx(0.001, rel=1e-4)
    assert circuit["swamping"]["drop"] == pytest.approx(1e-3 * (75 + swamp), rel=1e-6)
    # The shunt is another: of the branch's drop over 40 A less the coil's 1 mA (Kirchhoff).
    (part,) = circuit["swamping"]["parts"]
    assert (part["name"], part["before"]) == ("shunt", pytest.approx(0.075 / 39.999, rel=1e-9))
    assert part["ohms"] == pytest.approx(1e-3 * (75 + swamp) / 39.999, rel=1e-9)


@pytest.mark.parametrize(("built", "before"), [("", "1.875 mΩ"), ('built = "1.885 mohm"', "1.885 mΩ")])
def test_swamping_tells_of_the_shunt_that_goes_with_it(file, built, before) -> None:
    """The sentence names the new shunt and the one that is there; its four figures are then as wanted."""
    text = BASE + f'[scale.circuit]\nkind = "shunt"\n{built}\n'
    said = " ".join(run("circuit", file(text), "--drift", "0.1").stdout.split())
    swamp, shunt = re.search(r'swamp = "(\S+) ohm" with a shunt of (\S+) mΩ in place of', said).groups()
    assert f"in place of {before} brings the drift" in said
    # By hand: copper's share of the branch, and the branch's drop over 39.999 A.
    branch_ohm = (0.00393 - 1.5e-5) * 75 / 0.001
    assert float(swamp) == pytest.approx(branch_ohm - 75, rel=1e-3)
    assert float(shunt) == pytest.approx(branch_ohm / 39.999, rel=1e-3)
    followed = BASE + f'[scale.circuit]\nkind = "shunt"\nswamp = "{swamp} ohm"\n'
    assert "Swamping: not needed" in run("circuit", file(followed), "--drift", "0.1").stdout


def test_figures_are_told_of_the_pointer_and_not_of_the_reading(file) -> None:
    """On 10 to 15 V with a suppressed zero a percent of deflection is no percent of the reading."""
    text = BASE.replace('"A"', '"V"').replace("from = 0", "from = 10").replace("to = 40", "to = 15")
    for dial in (text + 'circuit = { kind = "multiplier", suppress = "10 V" }\n', BUILT):
        said = " ".join(run("circuit", file(dial)).stdout.split())
        assert "1 % more moves it" in said
        assert "percent of the pointer's deflection" in said
        assert not re.search(r"1 % more reads|alone reads|to the reading", said)
    assert "which alone moves the pointer by +0.531 % at full scale" in said


RATED = """
[scale.circuit]
kind = "shunt"
rated = "100 A/75 mV"
"""


def test_a_bought_shunt_may_be_good_enough(file) -> None:
    """Of 20 Ω of copper in 75 Ω 0.15 %/K is met: nothing to fit, and the sheet says so."""
    path = file(BASE.replace('"75 ohm"', '"20 ohm"').replace("to = 40", "to = 100") + RATED)
    (circuit,) = circuits(path, "--drift", "0.15")
    assert circuit["swamping"]["ohms"] == 0
    drift = 100 * (0.00393 - 1.5e-5) * 20 / 75
    assert circuit["swamping"]["drift_percent_per_k"] == pytest.approx(-drift, rel=1e-4)
    assert "not needed, the drift is" in run("circuit", path, "--drift", "0.15").stdout


def test_what_cannot_be_swamped_is_told_in_full(file) -> None:
    """Of 1 V on 1 mA 75 Ω in 1 kΩ are copper; 0.01 %/K asks for so many times the signal, by hand."""
    path = file(BASE.replace('"A"', '"V"').replace("to = 40", "to = 1") + 'circuit = "multiplier"')
    (circuit,) = circuits(path, "--drift", "0.01")
    found = circuit["swamping"]
    assert found["ohms"] is None
    assert found["copper_share"] == pytest.approx(0.075, rel=1e-4)
    factor = 0.075 / ((1e-4 - 1.5e-5) / (0.00393 - 1.5e-5))
    assert found["range_factor"] == pytest.approx(factor, rel=1e-4)
    said = " ".join(run("circuit", path, "--drift", "0.01").stdout.split())
    assert f"a signal {factor:.2g} times as large" in said


def test_two_bridges_on_different_supplies_are_two_circuits(file) -> None:
    """The same arms on 2 V and on 3 V drive the coil differently; on the same supply they are one."""
    bridge = 'circuit = {{ kind = "bridge", supply = "{}", arms = ["1 kohm", "1 kohm", "100 ohm"] }}\n'
    scale = '[[scale]]\nunit = "ohm"\nfrom = 100\nto = 150\nradius = {}\n'
    top = BASE[: BASE.index("[[scale]]")]

    def text(second: str) -> str:
        return top + scale.format(44) + bridge.format("2 V") + scale.format(36) + bridge.format(second)

    assert len(circuits(file(text("3 V")))) == 2
    assert len(circuits(file(text("2 V")))) == 1


def test_a_face_with_zero_alone_numbered(file) -> None:
    """A built shunt beside a scale that is numbered at 0 only is told of at 0, with no error there."""
    text = BASE.replace("to = 40", "to = 40\nnumbered = [0]") + BUILT[len(BASE) :]
    said = run("circuit", file(text)).stdout
    rows = said.split("On a face drawn for the exact values, as built:")[1].splitlines()
    assert rows[2].split() == ["0", "0", "0", "0", "%"]
    assert rows[3] == ""


def test_wound_parts_have_no_rows_of_a_series(file) -> None:
    """A shunt of 1.875 mΩ is wound or filed: the sheet names the option, and no E6 value 17 % off."""
    path = file(BASE + 'circuit = "shunt"')
    said = run("circuit", path).stdout
    assert "nearest value" not in said
    assert "shunt: below 1 Ω, so wound or filed" in said
    (part,) = circuits(path)[0]["parts"]
    assert [fit["series"] for fit in part["nearest"]] == ["E6", "E12", "E24", "E48", "E96", "E192"]
    wired = run("circuit", path, "--wire", "manganin 20 x 1 mm").stdout
    assert "below 1 Ω" not in wired
    assert "shunt made at home: 8.72 cm" in wired or "shunt made at home: 87.2 mm" in wired


def test_what_is_there_has_no_rating_and_no_series(file) -> None:
    """For a bought shunt nothing is to be bought; its swamping resistor has rating and nearest values."""
    path = file(BASE.replace('"75 ohm"', '"20 ohm"').replace("to = 40", "to = 100") + RATED)
    said = run("circuit", path).stdout.splitlines()
    shunt = next(line for line in said if line.startswith("shunt  "))
    swamp = next(line for line in said if line.startswith("swamp  "))
    assert "16 W" not in shunt  # twice its 7.5 W
    assert "0.125 W" in swamp
    assert sum(line.startswith("swamp  ") for line in said) == 2
    assert sum(line.startswith("shunt  ") for line in said) == 1


def test_ranges_ascend_and_the_scales_own_is_marked(file) -> None:
    """Of 1, 5 and 10 A on the 5 A scale the sheet goes upwards, says which it is, and titles them all."""
    text = BASE.replace('"75 ohm"', '"50 ohm"').replace("to = 40", "to = 5")
    path = file(text + 'circuit = { kind = "universal shunt", ranges = ["10 A", "5 A", "1 A"] }')
    said = run("circuit", path).stdout
    assert said.startswith("universal shunt, 1 A to 10 A, the scale shows 5 A (scale 1, 0 to 5 A)\n")
    rows = said[said.index("range ") :].splitlines()[1:4]
    assert [row.split("  ")[0] for row in rows] == ["1 A", "5 A, on the scale", "10 A"]
    # The drop of the contract's "drop" is that of the scale's own range, Im·(ring - tap), by hand.
    ring = 50 + 0.05 / 0.999
    assert circuits(path)[0]["drop"] == pytest.approx(1e-3 * (ring - ring * 1e-3 / 5), rel=1e-9)


BARE = "dialgen = 1\n[movement]\nrest = -44.0\nfull = 44.0\n[plate]\nsize = [84, 64]\npivot = [42, 12]\n"
PLAIN = '[[scale]]\nunit = "%"\nfrom = 0\nto = 100\nradius = {}\n'


def test_a_dial_without_circuits_says_so_in_a_line(file) -> None:
    """Two direct scales of a movement that is not known in ohms are one line and the general cautions."""
    said = run("circuit", file(BARE + PLAIN.format(44) + PLAIN.format(36))).stdout.splitlines()
    assert said[0].startswith("Nothing to buy or to make: the movement is used as it is (scale 1, 0 to ")
    assert "; scale 2, 0 to " in said[0]
    assert said[1:3] == ["", "Cautions"]


def test_an_observed_scale_says_so_in_a_line(file) -> None:
    """A scale that was only observed stands on no circuit: one line, and no bare head of cautions."""
    text = BARE + PLAIN.format(44) + 'law = { kind = "observed", points = [[0, -44], [50, 2], [100, 44]] }\n'
    said = run("circuit", file(text)).stdout
    assert said.splitlines()[0].startswith("Nothing to buy or to make: ")
    assert not said.rstrip().endswith("Cautions")


def test_a_direct_scale_is_silent_beside_a_circuit(file) -> None:
    """Where another scale has a shunt, a direct one without figures is left out."""
    text = BASE + 'circuit = "shunt"\n' + PLAIN.format(36)
    said = run("circuit", file(text)).stdout
    assert "(scale 1, 0 to 40 A)" in said
    assert "scale 2" not in said
    assert len(circuits(file(text))) == 2


def test_a_burden_is_in_volt_amperes(file) -> None:
    """5 A in 20 mΩ are 0.5 VA, which no one calls 500 mVA."""
    text = BASE.replace('"1 mA"', '"5 A"').replace('"75 ohm"', '"0.02 ohm"').replace("to = 40", "to = 200")
    said = run("circuit", file(text + 'circuit = { kind = "current transformer", ratio = "200/5" }')).stdout
    assert "burden: 0.5 VA" in said


@pytest.mark.parametrize("suffix", ["svg", "pdf", "dxf"])
def test_the_schematic_is_drawn(file, suffix, tmp_path) -> None:
    """Each picture is a file of its kind, and the answer is still printed."""
    out = tmp_path / f"circuit.{suffix}"
    run("circuit", file(BUILT), "-o", out)
    assert out.stat().st_size > 500
    assert out.read_bytes().lstrip().startswith({"svg": b"<?xml", "pdf": b"%PDF", "dxf": b"0"}[suffix])


def test_several_circuits_have_a_file_each(file, tmp_path) -> None:
    """The second circuit's picture stands beside the first's with a number; --only takes one."""
    text = BASE + 'circuit = "shunt"\nalso = [{ times = 5, circuit = "shunt" }]\n'
    run("circuit", file(text), "-o", tmp_path / "c.svg")
    assert (tmp_path / "c-2.svg").exists()
    assert [each["range"] for each in circuits(file(text), "--only", "2")] == [200.0]


def test_kinds_are_those_of_the_check() -> None:
    """The list of kinds has every row of the table that dial files are checked with, and its keys."""
    from dialgen.circuit.kinds import CIRCUITS

    kinds = json.loads(run("circuit", "--kinds", "--json").stdout)["kinds"]
    assert [row["kind"] for row in kinds] == list(CIRCUITS)
    assert next(row for row in kinds if row["kind"] == "shunt") == {
        "kind": "shunt",
        "takes": "A",
        "keys": ["range", "built", "swamp", "leads", "rated"],
    }
    words = run("circuit", "--kinds").stdout
    assert all(kind in words for kind in CIRCUITS)


def test_above_a_kilovolt_nothing_is_told_but_cautions(file) -> None:
    """A 2 kV voltmeter gets no parts and no advice, only what to beware of."""
    text = BASE.replace('"A"', '"V"').replace("to = 40", "to = 2000")
    (circuit,) = circuits(file(text + 'circuit = "multiplier"'))
    assert circuit["parts"] == []
    assert any("1 kV" in caution for caution in circuit["cautions"])


def test_a_multiplier_for_mains_is_split_by_voltage(file) -> None:
    """At 250 V AC behind a rectifier, 354 V of peak, parts that stand 250 V are two in series."""
    text = BASE.replace('"A"', '"V"').replace("to = 40", "to = 250")
    (circuit,) = circuits(file(text + 'circuit = { kind = "rectifier", diode = "ideal" }'))
    (split,) = circuit["splits"]
    assert split["count"] == math.ceil(250 * math.sqrt(2) / 250)
    assert split["ohms"] == pytest.approx(circuit["parts"][0]["ohms"] / 2)


@pytest.mark.parametrize(("volts", "pieces"), [("150 V", 3), ("350 V", 2), ("400 V", 1)])
def test_the_voltage_of_a_resistor_governs_split_and_caution(file, volts, pieces) -> None:
    """Of 354 V of peak parts for 150 V are three, for 350 V two; for 400 V one, and nothing is said of it."""
    text = BASE.replace('"A"', '"V"').replace("to = 40", "to = 250")
    text += 'circuit = { kind = "rectifier", diode = "ideal" }\n'
    by_option = circuits(file(text), "--voltage", volts)[0]
    by_file = circuits(file(text + f'[parts]\nvoltage = "{volts}"\n'))[0]
    for circuit in (by_option, by_file):
        assert [split["count"] for split in circuit["splits"]] == ([pieces] if pieces > 1 else [])
        assert any("equal resistors in series" in each for each in circuit["cautions"]) == (pieces > 1)


@pytest.mark.parametrize(
    ("words", "piece"),
    [
        (["--stock", "3.3"], "stock"),
        (["--stock", "3.3 ohm x"], "3.3 ohm x"),
        (["--wire", "gold 1 mm"], "gold"),
        (["--series", "E7"], 'write "E6"'),
        (["--margin", "0"], "margin"),
        (["--only", "4"], "there is no circuit 4; the dial has 1"),
        (["--overload", "x"], "is not a number"),
        (["-o", "c.gif"], "no file of the kind '.gif'"),
    ],
)
def test_a_wrong_option_is_one_plain_line(file, words, piece) -> None:
    """What is wrong in an option is told in one line with the mend; status 2, nothing printed."""
    done = run("circuit", file(BUILT), *words, status=2)
    (line,) = done.stderr.splitlines()
    assert piece in line
    assert ";" in line
    assert done.stdout == ""


def test_a_circuit_that_cannot_be_designed_is_told_at_its_place(file) -> None:
    """Without the coil's resistance the ohms curve is drawn, but parts cannot be sized: told at its key."""
    text = BASE.replace('resistance = "75 ohm"\n', "").replace('"A"', '"ohm"').replace("to = 40", "to = inf")
    text += 'circuit = { kind = "series ohmmeter", half = "1 kohm", battery = "1.5 V" }'
    done = run("circuit", file(text), status=2)
    assert "movement.resistance" in done.stderr
    assert done.stderr.startswith(str(file(text)))


def test_above_a_kilovolt_no_schematic_is_drawn(file, tmp_path) -> None:
    """What the sheet does not advise on the picture does not either: one line, status 2, no file."""
    text = BASE.replace('"A"', '"V"').replace("to = 40", "to = 5000") + 'circuit = "multiplier"'
    done = run("circuit", file(text), "-o", tmp_path / "c.svg", status=2)
    assert "above 1 kV" in done.stderr
    assert not (tmp_path / "c.svg").exists()
