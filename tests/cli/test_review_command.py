"""``dialgen review``: its answer in words and as JSON, and its status."""

from __future__ import annotations

import json
import subprocess
import sys
from pathlib import Path

import pytest

GOOD = """\
dialgen = 1
[movement]
rest = -45
full = 45
[[scale]]
unit = "A"
from = 0
to = 40
radius = 44
[plate]
size = [90, 68]
pivot = [45, 12]
[[text]]
say = "HOUSE"
at = [0, 10]
"""
OFF = GOOD.replace("at = [0, 10]", "at = [44, 10]")
TEXT_LINE = GOOD.splitlines().index("[[text]]") + 1


def run(*words: str | Path, status: int) -> subprocess.CompletedProcess[str]:
    """Run the program in a process of its own, and check its exit status."""
    command = [sys.executable, "-m", "dialgen", *map(str, words)]
    done = subprocess.run(command, capture_output=True, text=True, timeout=60, check=False)
    assert done.returncode == status, done.stderr
    return done


@pytest.fixture
def good(tmp_path: Path) -> Path:
    """A face that nothing is said of."""
    path = tmp_path / "good.toml"
    path.write_text(GOOD, encoding="utf-8")
    return path


@pytest.fixture
def off(tmp_path: Path) -> Path:
    """A face with a text over the plate's right edge, which is 45 mm from the pivot."""
    path = tmp_path / "off.toml"
    path.write_text(OFF, encoding="utf-8")
    return path


def test_a_good_face_passes_a_strict_review(good: Path) -> None:
    """Nothing is found, which is said in words, as an empty list in JSON, and by status 0."""
    assert run("review", good, "--strict", status=0).stdout == f"{good}: nothing to remark\n"
    assert json.loads(run("review", good, "--json", "--strict", status=0).stdout) == {"remarks": []}


def test_remarks_are_printed_as_places_in_the_file(off: Path) -> None:
    """A remark is the answer, on standard output, in the form of an error; the status is 0."""
    done = run("review", off, status=0)
    (line,) = done.stdout.splitlines()
    assert line.startswith(f"{off}:{TEXT_LINE}:3: text[1]: ")
    assert "over the plate's edge" in line
    assert not done.stderr


def test_a_strict_review_ends_with_status_1(off: Path) -> None:
    """``--strict`` turns a remark into status 1; the answer is the same."""
    assert run("review", off, "--strict", status=1).stdout == run("review", off, status=0).stdout
    assert run("review", off, "--strict", "--json", status=1).stdout


def test_json_has_check_message_key_line_and_place(off: Path) -> None:
    """The keys of a remark are those of the contract, and its place lies over the edge."""
    (remark,) = json.loads(run("review", off, "--json", status=0).stdout)["remarks"]
    assert set(remark) == {"check", "message", "key", "line", "place"}
    assert (remark["check"], remark["key"], remark["line"]) == ("edge", "text[1]", TEXT_LINE)
    x, y = remark["place"]
    assert x > 45
    assert y == pytest.approx(10, abs=1.2)


def test_json_has_null_where_there_is_no_place(good: Path) -> None:
    """What is true of the whole scale has no place."""
    good.write_text(GOOD.replace("radius = 44", "radius = 44\nnumbered = { every = 4 }"), encoding="utf-8")
    (remark,) = json.loads(run("review", good, "--json", status=0).stdout)["remarks"]
    assert (remark["key"], remark["place"]) == ("scale[1].numbered", None)


def test_wrong_input_ends_with_status_2(good: Path, tmp_path: Path) -> None:
    """A dial file that is wrong, or is not there, is refused as everywhere."""
    good.write_text(GOOD.replace("to = 40", "to = -1"), encoding="utf-8")
    done = run("review", good, "--strict", status=2)
    assert "scale[1].to" in done.stderr
    assert not done.stdout
    run("review", tmp_path / "absent.toml", "--json", status=2)


def test_drawing_gives_the_same_remarks_as_warnings(off: Path) -> None:
    """``draw`` says on standard error what ``review`` answers, marked as a warning, with status 0."""
    (line,) = run("review", off, status=0).stdout.splitlines()
    drawn = run("draw", off, "-o", off.with_suffix(".svg"), status=0)
    assert drawn.stderr.splitlines() == [line.replace(": text[1]", ": warning: text[1]")]


def test_what_is_known_of_the_dial_alone_is_no_remark(good: Path) -> None:
    """An assumed rest point is a warning beside the review, and does not fail a strict one."""
    reading = "[[movement.reading]]\nvalue = 20\nangle = 0.4\n"
    good.write_text(GOOD.replace("[[scale]]", reading + "[[scale]]"), encoding="utf-8")
    done = run("review", good, "--strict", status=0)
    assert "assumed" in done.stderr
    assert "nothing to remark" in done.stdout
