"""``dialgen circuit``: the contract's JSON, the bench sheet in words, and the picture."""

from __future__ import annotations

import json
import math
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
    assert "(scale 1, scale 1 row 2)" in run("circuit", file(text)).stdout


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
    """A 9 500 Ω multiplier from 10 k, 1 k and 190 k: an option says what else the file would."""
    text = BASE.replace('"75 ohm"', '"500 ohm"').replace('"A"', '"V"').replace("to = 40", "to = 10")
    text += 'circuit = "multiplier"\n[parts]\nstock = ["19 kohm x2", "1 kohm"]\n'
    (search,) = circuits(file(text))[0]["stock"]
    best = search["candidates"][0]
    assert best["network"] == "19k || 19k"
    assert (best["parts"], best["error"]) == (2, pytest.approx(0.0, abs=1e-9))
    # Three pieces of two values: 5 networks of one or two parts from (19k, 19k, 1k), 4 wirings with
    # three different places: counted by hand, 2 + 4 + 6 = single, pairs, triples.
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
    said = run("circuit", file(BUILT)).stdout
    assert "1.875047 mΩ" in said
    assert "4.32 W" in said
    assert "6 W" in said
    # The coil branch alone is copper: d(ln drive)/dT is -(α - 1e-5) but for the shunt's share.
    assert "−0.392 %" in said


def test_swamping_for_a_wanted_drift(file) -> None:
    """0.1 %/K of 75 Ω of copper: 0.00393·75/0.001 minus the rest; at a few ohms of it (IEC 60028)."""
    (circuit,) = circuits(file(BASE + 'circuit = "shunt"'), "--drift", "0.1")
    swamp = circuit["swamping"]["ohms"]
    # Copper's share of the branch times copper's rise over manganin's 1e-5, to the shunt's share.
    assert 0.00392 * 75 / (75 + swamp) == pytest.approx(0.001, rel=1e-3)
    assert circuit["swamping"]["drop"] == pytest.approx(1e-3 * (75 + swamp), rel=1e-6)


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
