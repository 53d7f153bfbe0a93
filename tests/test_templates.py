"""The templates: dial files to start from, which must be right as they stand."""

from __future__ import annotations

import json
import re
import subprocess
import sys
from collections.abc import Iterator
from pathlib import Path

import pytest

import dialgen
from dialgen import templates

ROOT = Path(__file__).parents[1]
FOLDER = ROOT / "templates"
NAMES = sorted(path.stem for path in FOLDER.glob("*.toml"))
WANTED = {"square-panel", "wide-angle", "centre-zero", "edgewise", "ohms", "decibel"}
CIRCUITS = {
    "universal-shunt": "universal shunt",
    "ac-volts": "rectifier",
    "pyrometer": "multiplier",
    "resistance-thermometer": "bridge",
    "current-transformer": "current transformer",
    "ohms": "series ohmmeter",
}
HAZARDS = {
    "ohms": "dead",
    "square-panel": "shunt",
    "centre-zero": "battery",
    "wide-angle": "multiplier",
    "several-scales": "multiplier",
    "moving-iron": "mains",
    "power": "mains",
    "universal-shunt": "switch off",
    "ac-volts": "isolating transformer",
    "pyrometer": "elements",
    "current-transformer": "never open the secondary",
}


def _run(*words: str, folder: Path = ROOT) -> subprocess.CompletedProcess[str]:
    return subprocess.run(
        [sys.executable, "-m", "dialgen", *words],
        cwd=folder,
        capture_output=True,
        encoding="utf-8",
        env={"PYTHONPATH": str(ROOT), "PYTHONUTF8": "1"},
        check=False,
    )


def test_the_six_kinds_asked_for_are_there() -> None:
    """Square panel, wide angle, centre zero, edgewise, ohms and decibel each have a template."""
    assert set(NAMES) >= WANTED


@pytest.mark.parametrize("name", CIRCUITS)
def test_the_circuit_of_a_template_is_designed_without_a_remark(name: str) -> None:
    """``dialgen circuit`` works out the kind of circuit that the template is for, and prints no warning."""
    done = _run("circuit", f"templates/{name}.toml", "--json")
    assert (done.returncode, done.stderr) == (0, "")
    assert json.loads(done.stdout)["circuits"][0]["kind"] == CIRCUITS[name]


def test_templates_are_found_in_a_checkout() -> None:
    """The program's own list is the folder beside the package, file by file and word by word."""
    assert templates.names() == NAMES
    assert all(templates.text(n) == (FOLDER / f"{n}.toml").read_text(encoding="utf-8") for n in NAMES)


@pytest.mark.parametrize("name", NAMES)
def test_template_loads_without_a_warning(name: str) -> None:
    """A template is a good dial file as it stands: no error, and nothing to remark on."""
    assert dialgen.load(FOLDER / f"{name}.toml").warnings() == ()


@pytest.mark.parametrize("name", NAMES)
def test_every_line_of_a_template_has_a_comment(name: str) -> None:
    """Beside every key, and every key shown as an example, stands what to fill in; no line is endless."""
    for line in (FOLDER / f"{name}.toml").read_text(encoding="utf-8").splitlines():
        assert len(line) <= 120
        assert "\t" not in line
        example = line.startswith("# ") and (" = " in line or line.startswith("# ["))
        if line and (not line.startswith("#") or example):
            assert line.lstrip("# ").partition("# ")[2].strip(), f"no comment beside: {line}"


def _examples(lines: list[str]) -> Iterator[tuple[int, int]]:
    """Yield where each example that is commented out starts and ends: a key, or a table with its keys."""
    at = 0
    while at < len(lines):
        end = at + 1
        if lines[at].startswith("# ["):
            while end < len(lines) and lines[end].startswith("# "):
                end += 1
            yield at, end
        elif re.match(r"# \w+ = ", lines[at]):
            yield at, end
        at = end


def _without(key: str, lines: list[str]) -> list[str]:
    """Return a table's lines so far without the one that sets ``key``, looking back to the table's head."""
    for i in range(len(lines) - 1, -1, -1):
        if lines[i].startswith("["):
            break
        if lines[i].startswith(f"{key} = "):
            return lines[:i] + lines[i + 1 :]
    return lines


@pytest.mark.parametrize("name", NAMES)
def test_what_is_commented_out_can_be_put_in(name: str, tmp_path: Path) -> None:
    """Each example, with its # taken away, is a key of today's dial file, and the file loads with it."""
    lines = (FOLDER / f"{name}.toml").read_text(encoding="utf-8").splitlines()
    file = tmp_path / "tried.toml"
    found = list(_examples(lines))
    for start, end in found:
        example = [line[2:] for line in lines[start:end]]
        before = lines[:start]
        if not example[0].startswith("["):
            before = _without(example[0].split()[0], before)
        file.write_text("\n".join([*before, *example, *lines[end:]]), encoding="utf-8")
        dialgen.load(file)
    assert len(found) >= 4


def test_hazards_have_their_caution() -> None:
    """Where work can hurt someone one comment says so and leaves it to local code and licensed people."""
    for name, word in HAZARDS.items():
        caution = templates.text(name).partition("# Caution:")[2].partition("[dial]")[0]
        caution = " ".join(caution.replace("\n# ", " ").split())
        assert word in caution
        assert "local code" in caution
        assert "licensed people" in caution


def test_list_shows_each_with_its_first_line() -> None:
    """``dialgen new --list`` prints a line for each template: its name and what its first line says."""
    listed = _run("new", "--list").stdout.splitlines()
    firsts = [(FOLDER / f"{n}.toml").read_text(encoding="utf-8").splitlines()[0] for n in NAMES]
    assert [line.split(maxsplit=1) for line in listed] == [
        [name, first.removeprefix("# ")] for name, first in zip(NAMES, firsts, strict=True)
    ]
    assert all(first.startswith("# ") and len(first) <= 100 for first in firsts)


def test_new_writes_a_file_that_draws(tmp_path: Path) -> None:
    """What ``new`` writes is the template to the letter, and ``draw`` makes a plate of it without a word."""
    made = _run("new", "ohms", "mine.toml", folder=tmp_path)
    assert (made.returncode, made.stderr) == (0, "")
    assert (tmp_path / "mine.toml").read_bytes() == (FOLDER / "ohms.toml").read_bytes()
    drawn = _run("draw", "mine.toml", "-o", "mine.svg", folder=tmp_path)
    assert (drawn.returncode, drawn.stderr) == (0, "")
    assert (tmp_path / "mine.svg").read_text(encoding="utf-8").startswith("<?xml")
