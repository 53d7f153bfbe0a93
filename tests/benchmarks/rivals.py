"""How fast dialgen draws, beside matplotlib in the same run: ``python tests/benchmarks/rivals.py``.

Warm: load a dial file that has just changed, and draw it, against matplotlib drawing the same face
from finished marks.  Three faces: a full one (121 marks, 25 numerals, ten lines of text on a round
plate) and a plain panel meter whose file is long (eleven readings) and whose face is short (41
marks, five numerals).  Cold: a whole process each, the panel meter.  Chain: values through the
longest chain against one square root of the same array.  Contenders take turns, so that a busy
machine slows both; the figures printed are medians and their ratio.
"""

from __future__ import annotations

import compileall
import json
import statistics
import subprocess
import sys
import tempfile
import time
from collections.abc import Callable
from pathlib import Path

sys.path.insert(0, str(Path(__file__).parent))

import matplotlib_face
import numpy as np

import dialgen

DIAL = """
dialgen = 1
[movement]
current = "1 mA"
resistance = "75 ohm"
rest = -44.0
full = 44.0
response = {{ points = [[0, 0], [0.2, 0.19], [0.4, 0.39], [0.6, 0.605], [0.8, 0.81], [1, 1]] }}
{readings}
[circuit]
kind = "shunt"
range = "{range} A"
built = "1.885 mohm"
[[scale]]
unit = "A"
from = 0
to = 40
{law}
radius = 44.0
[plate]
size = [84, 64]
pivot = [42, 12]
corner = 2
hole = [{{ at = [-32, -4], diameter = 3.2 }}, {{ at = [32, -4], diameter = 3.2 }}]
[[text]]
say = "75 mV shunt"
at = [0, 8]
"""
READINGS = "\n".join(
    f'[[movement.reading]]\ncurrent = "{0.1 * i:.1f} mA"\nangle = {-44 + 8.8 * i + 0.3 * np.sin(i):.3f}'
    for i in range(11)
)


FULL = """
dialgen = 1
[dial]
serial = "{turn}"
[movement]
current = "1 mA"
resistance = "75 ohm"
rest = -120
full = 120
[circuit]
kind = "shunt"
range = "120 A"
[[scale]]
unit = "A"
from = 0
to = 120
radius = 40
numbered = {{ every = 5 }}
divisions = {{ every = 1 }}
[plate]
diameter = 110
pivot = [55, 55]
hole = [{{ at = [-32, -34], diameter = 3.2 }}, {{ at = [32, -34], diameter = 3.2 }}]
""" + "".join(f'[[text]]\nsay = "line {i} of text"\nat = [0, {20 - 4 * i}]\n' for i in range(10))


SCALES = """
dialgen = 1
[dial]
title = "BENCH {turn}"
[movement]
current = "100 uA"
resistance = "850 ohm"
rest = -45
full = 45
[[scale]]
unit = "V"
from = 0
to = 10
circuit = {{ kind = "multiplier", range = "10 V" }}
also = [{{ times = 5 }}]
radius = 72
[[scale]]
unit = "dB"
from = -20
to = 2
law = {{ kind = "decibel", reference = "7.746 V" }}
circuit = {{ kind = "multiplier", range = "10 V" }}
radius = 58
ink = "red"
[[scale]]
unit = "mA"
from = 0
to = 30
circuit = {{ kind = "shunt", range = "30 mA" }}
radius = 44
[[zone]]
from = 6
to = 8
colour = "green"
[[zone]]
from = 8
to = 10
colour = "amber"
[[limit]]
at = 9
[symbols]
show = ["auto", "horizontal", "attention"]
[plate]
size = [132, 100]
pivot = [66, 14]
"""


def scales_text(turn: int) -> str:
    """Return the dial file of three scales with zones and symbols, different at every turn."""
    return SCALES.format(turn=turn)


def full_text(turn: int) -> str:
    """Return the dial file of the full face, different at every turn."""
    return FULL.format(turn=turn)


def dial_text(turn: int, law: str = "") -> str:
    """Return the dial file, different at every turn."""
    return DIAL.format(readings=READINGS, range=f"40.{turn % 1000:03d}", law=law)


def turns(
    ours: Callable[[], object],
    theirs: Callable[[], object],
    *,
    rounds: int,
    batch: int = 1,
    before: Callable[[int], object] = lambda _: None,
) -> tuple[float, float]:
    """Return the median seconds of both, taken in turn, a batch at a time.

    ``before`` is called with a new number before each run and is not timed; the first run of a
    batch, which finds the other's data in the caches, is not counted where there are more.
    """
    times: tuple[list[float], list[float]] = ([], [])
    number = 0
    for _ in range(rounds):
        for contender, taken in zip((ours, theirs), times, strict=True):
            for run in range(batch):
                before(number := number + 1)
                start = time.perf_counter()
                contender()
                if run or batch == 1:
                    taken.append(time.perf_counter() - start)
    return statistics.median(times[0]), statistics.median(times[1])


def show(what: str, ours_s: float, theirs_s: float, *, unit: str = "ms", rival: str = "matplotlib") -> None:
    """Print one comparison."""
    scale = {"ms": 1e3, "us": 1e6}[unit]
    ratio = theirs_s / ours_s
    words = f"{ratio:.1f} times as fast" if ratio >= 1 else f"{1 / ratio:.1f} times the time"
    print(
        f"{what:26} dialgen {ours_s * scale:9.2f} {unit}   {rival} {theirs_s * scale:9.2f} {unit}   {words}"
    )


def warm(folder: Path, name: str, text: Callable[[int], str]) -> None:
    """Load and draw, the file changed each time; what is drawn stays in memory on both sides."""
    file = folder / "dial.toml"
    file.write_text(text(0), encoding="utf-8")
    face = matplotlib_face.describe(dialgen.load(file).drawing.with_margin(3.0))
    for suffix in (".svg", ".pdf"):

        def ours(suffix: str = suffix) -> None:
            dialgen.load(file).render(suffix)

        def theirs(suffix: str = suffix) -> None:
            matplotlib_face.draw(face, suffix)

        def change(number: int) -> None:
            file.write_text(text(number), encoding="utf-8")

        show(f"warm, {name}, {suffix[1:].upper()}", *turns(ours, theirs, rounds=6, batch=11, before=change))


def cold(folder: Path) -> None:
    """Run a whole process, to SVG, with bytecode compiled as an installed package has it."""
    compileall.compile_dir(str(Path(dialgen.__file__).parent), quiet=2)
    compileall.compile_file(matplotlib_face.__file__, quiet=2)
    file, marks = folder / "dial.toml", folder / "marks.json"
    file.write_text(dial_text(0), encoding="utf-8")
    face = matplotlib_face.describe(dialgen.load(file).drawing.with_margin(3.0))
    marks.write_text(json.dumps(face), encoding="utf-8")
    script = Path(sys.executable).parent / "dialgen"
    start = [str(script)] if script.exists() else [sys.executable, "-m", "dialgen"]
    ours = [*start, "draw", str(file), "-o", str(folder / "ours.svg")]
    theirs = [sys.executable, str(Path(matplotlib_face.__file__)), str(marks), str(folder / "theirs.svg")]

    def run(command: list[str]) -> Callable[[], object]:
        return lambda: subprocess.run(command, check=True, capture_output=True)

    run(ours)(), run(theirs)()
    show("cold SVG, panel meter", *turns(run(ours), run(theirs), rounds=11))


def chain(folder: Path) -> None:
    """Send 100 000 values through law, circuit, response and correction."""
    file = folder / "long.toml"
    table = ", ".join(f"[{i * 4}, {i * 4 + 0.05 * i}]" for i in range(11))
    file.write_text(dial_text(0, f'law = {{ kind = "table", points = [{table}] }}'), encoding="utf-8")
    dial = dialgen.load(file)
    values = np.random.default_rng(7).uniform(0, 40, 100_000)
    figures = turns(lambda: dial.angle(values), lambda: np.sqrt(values), rounds=20, batch=5)
    show("chain, 100 000 values", *figures, unit="us", rival="one square root")


def main() -> None:
    """Run all three."""
    with tempfile.TemporaryDirectory() as name:
        folder = Path(name)
        warm(folder, "full face", full_text)
        warm(folder, "panel meter", dial_text)
        warm(folder, "three scales", scales_text)
        cold(folder)
        chain(folder)


if __name__ == "__main__":
    main()
