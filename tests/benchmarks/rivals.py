"""How fast dialgen draws, beside matplotlib in the same run.  ``python tests/benchmarks/rivals.py``

Warm: load a dial file that has just changed, and draw it, against matplotlib drawing the same face
from finished marks.  Cold: a whole process each.  Chain: values through the longest chain against
one square root of the same array.  Contenders take turns, so that a busy machine slows both; the
figures printed are medians and their ratio.
"""

from __future__ import annotations

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

ROUNDS = 40
COLD_ROUNDS = 9

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


def dial_text(turn: int, law: str = "") -> str:
    """Return the dial file, different at every turn."""
    return DIAL.format(readings=READINGS, range=f"40.{turn % 1000:03d}", law=law)


def turns(ours: Callable[[int], object], theirs: Callable[[int], object], rounds: int) -> tuple[float, float]:
    """Return the median seconds of both, taken in turn."""
    times: tuple[list[float], list[float]] = ([], [])
    for turn in range(rounds + 2):
        for contender, taken in zip((ours, theirs), times, strict=True):
            start = time.perf_counter()
            contender(turn)
            taken.append(time.perf_counter() - start)
    return statistics.median(times[0][2:]), statistics.median(times[1][2:])


def show(what: str, ours_s: float, theirs_s: float, *, unit: str = "ms") -> None:
    """Print one comparison."""
    scale = {"ms": 1e3, "us": 1e6}[unit]
    ratio = theirs_s / ours_s
    words = f"{ratio:.1f} times as fast" if ratio >= 1 else f"{1 / ratio:.1f} times the time"
    print(f"{what:28} dialgen {ours_s * scale:9.2f} {unit}   rival {theirs_s * scale:9.2f} {unit}   {words}")


def warm(folder: Path) -> None:
    """Load and draw, the file changed each time."""
    file = folder / "dial.toml"
    file.write_text(dial_text(0), encoding="utf-8")
    face = matplotlib_face.describe(dialgen.load(file).drawing.with_margin(3.0))
    for suffix in (".svg", ".pdf"):

        def ours(turn: int, suffix: str = suffix) -> None:
            file.write_text(dial_text(turn), encoding="utf-8")
            dialgen.load(file).draw(folder / f"ours{suffix}")

        def theirs(turn: int, suffix: str = suffix) -> None:
            (folder / f"theirs{suffix}").write_bytes(matplotlib_face.draw(face, suffix))

        show(f"warm {suffix[1:].upper()}", *turns(ours, theirs, ROUNDS))


def cold(folder: Path) -> None:
    """Run a whole process, to SVG."""
    file, marks = folder / "dial.toml", folder / "marks.json"
    file.write_text(dial_text(0), encoding="utf-8")
    face = matplotlib_face.describe(dialgen.load(file).drawing.with_margin(3.0))
    marks.write_text(json.dumps(face), encoding="utf-8")
    ours = [sys.executable, "-m", "dialgen", "draw", str(file), "-o", str(folder / "ours.svg")]
    theirs = [sys.executable, str(Path(matplotlib_face.__file__)), str(marks), str(folder / "theirs.svg")]

    def run(command: list[str]) -> Callable[[int], object]:
        return lambda _: subprocess.run(command, check=True, capture_output=True)

    show("cold SVG, whole process", *turns(run(ours), run(theirs), COLD_ROUNDS))


def chain(folder: Path) -> None:
    """Send 100 000 values through law, circuit, response and correction."""
    file = folder / "long.toml"
    table = ", ".join(f"[{i * 4}, {i * 4 + 0.05 * i}]" for i in range(11))
    file.write_text(dial_text(0, f'law = {{ kind = "table", points = [{table}] }}'), encoding="utf-8")
    dial = dialgen.load(file)
    values = np.random.default_rng(7).uniform(0, 40, 100_000)
    show("chain, 100 000 values", *turns(lambda _: dial.angle(values), lambda _: np.sqrt(values), 60), unit="us")


def main() -> None:
    """Run all three."""
    with tempfile.TemporaryDirectory() as name:
        for benchmark in (warm, cold, chain):
            benchmark(Path(name))


if __name__ == "__main__":
    main()
