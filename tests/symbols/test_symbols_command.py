"""``dialgen symbols`` as a user runs it."""

from __future__ import annotations

import json
import subprocess
import sys
from pathlib import Path

import pytest

from dialgen.symbols import SYMBOLS


def run(*words: str | Path, status: int = 0) -> subprocess.CompletedProcess[str]:
    """Run the command in a process of its own, and check its exit status."""
    command = [sys.executable, "-m", "dialgen", "symbols", *map(str, words)]
    done = subprocess.run(command, capture_output=True, text=True, timeout=60, check=False)
    assert done.returncode == status, done.stderr
    return done


def test_the_list_has_a_line_for_each() -> None:
    """Alone, the command prints what to write, meaning, number and how sure, a line for each symbol."""
    _, *lines = run().stdout.splitlines()
    assert len(lines) == len(SYMBOLS)
    for symbol, line in zip(SYMBOLS, lines, strict=True):
        assert line.startswith(f"{symbol.write} ")
        assert symbol.title in line
        assert f"{symbol.number} {symbol.number_sure}" in line
        assert line.endswith(" claim") == symbol.claim


def test_json_holds_the_same() -> None:
    """``--json`` gives every fact of the table, in plain ASCII."""
    printed = run("--json").stdout
    assert printed.isascii()
    told = json.loads(printed)["symbols"]
    assert [row["name"] for row in told] == [symbol.name for symbol in SYMBOLS]
    (coil,) = [row for row in told if row["name"] == "inclined"]
    assert coil == {
        "name": "inclined", "write": "inclined 60", "title": "with the dial inclined, here by 60°",
        "subject": "Position of use", "number": "D-3", "shape_sure": "seen", "number_sure": "from memory",
        "claim": False, "needs": "degrees",
    }  # fmt: skip


def test_the_sheet_is_written_in_every_format_asked_for(tmp_path: Path) -> None:
    """Each -o gets its own format, told by its ending, and nothing is printed."""
    outputs = [tmp_path / f"sheet{ending}" for ending in (".svg", ".PDF", ".dxf")]
    done = run(*[word for path in outputs for word in ("-o", path)])
    assert (done.stdout, done.stderr) == ("", "")
    svg, pdf, dxf = (path.read_bytes() for path in outputs)
    assert svg.startswith(b"<?xml")
    assert pdf.startswith(b"%PDF")
    assert b"SECTION" in dxf[:40]


@pytest.mark.parametrize("bad", ["sheet.doc", "missing/sheet.pdf", "sheet"])
def test_files_are_replaced_whole_or_left(tmp_path: Path, bad: str) -> None:
    """Where one output cannot be written, status is 2, one line says so, and the others stay as they were."""
    good = tmp_path / "sheet.svg"
    good.write_text("mine")
    done = run("-o", good, "-o", tmp_path / bad, status=2)
    assert good.read_text() == "mine"
    assert [path.name for path in tmp_path.iterdir()] == ["sheet.svg"]
    assert len(done.stderr.splitlines()) == 1
    run("-o", good)
    assert good.read_bytes().startswith(b"<?xml")


@pytest.mark.parametrize("words", [("--all",), ("moving coil",), ("-o",)])
def test_what_the_command_does_not_take_is_wrong_input(words: tuple[str, ...]) -> None:
    """An unknown option, an argument and an output without a name are refused with status 2."""
    assert run(*words, status=2).stderr.endswith(" --help\n")


def test_the_help_warns_of_claims_and_memory() -> None:
    """The help says what a claim is, and that shapes from memory are to be compared with the standard."""
    text = " ".join(run("--help").stdout.split())
    assert "is a claim that the maker must have proved" in text
    assert 'marked "from memory" should be compared with IEC 60051-1 before relying on it' in text
