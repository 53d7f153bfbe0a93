"""The program as a process: two ways to start it, its help, broken pipes, and files left whole."""

from __future__ import annotations

import codecs
import json
import os
import subprocess
import sys
import time
from pathlib import Path

import dialfile_samples as samples
import pytest
from bad_dials import READINGS

from dialgen.cli import report
from dialgen.cli.report import say_if_slow, spell

_MODULE = [sys.executable, "-m", "dialgen"]
_SCRIPT = [str(Path(sys.executable).parent / "dialgen")]


@pytest.fixture
def dial(tmp_path: Path) -> Path:
    """A good dial file in a folder of its own."""
    path = tmp_path / "dial.toml"
    path.write_text(samples.EDGEWISE, encoding="utf-8")
    return path


def _run(start: list[str], *words: str | Path, **options: object) -> subprocess.CompletedProcess[str]:
    return subprocess.run(  # type: ignore[call-overload,no-any-return]
        [*start, *map(str, words)], capture_output=True, text=True, timeout=60, check=False, **options
    )


@pytest.mark.parametrize("words", [(), ("--help",), ("draw",), ("table", "none.toml"), ("zzz",)])
def test_module_and_script_say_the_same(words: tuple[str, ...]) -> None:
    """``python -m dialgen`` and ``dialgen`` agree in status, output and errors."""
    if not Path(_SCRIPT[0]).exists():
        pytest.skip("the package is not installed in this environment")
    answers = [_run(start, *words) for start in (_MODULE, _SCRIPT)]
    assert answers[0].stdout == answers[1].stdout
    assert answers[0].stderr == answers[1].stderr
    assert answers[0].returncode == answers[1].returncode


def test_alone_it_prints_its_help() -> None:
    """Without a command the program prints its help on standard output, with status 0."""
    done = _run(_MODULE)
    assert (done.returncode, done.stderr) == (0, "")
    assert done.stdout.startswith("Usage: dialgen")
    assert done.stdout == _run(_MODULE, "--help").stdout


def test_the_shell_is_given_completions() -> None:
    """Asked the way a shell asks, the program completes the name of a command."""
    done = _run(
        [sys.executable, "-c", "from dialgen.cli import main; main()"],
        env={
            **os.environ,
            "_DIALGEN_COMPLETE": "bash_complete",
            "COMP_WORDS": "dialgen ta",
            "COMP_CWORD": "1",
        },
    )
    assert (done.returncode, done.stdout, done.stderr) == (0, "plain,table\n", "")


@pytest.mark.parametrize("redirect", ["| true", "| head -n 1", ">&-", "2>&1 | true"])
def test_a_reader_that_leaves_early_is_no_error(dial: Path, redirect: str) -> None:
    """A closed pipe or closed output ends quietly: no traceback, no complaint of Python's own."""
    done = subprocess.run(
        f'set -o pipefail; "{sys.executable}" -m dialgen table "{dial}" {redirect}',
        shell=True,
        executable="/bin/bash",
        capture_output=True,
        text=True,
        timeout=60,
        check=False,
    )
    assert done.returncode == 0
    assert "Traceback" not in done.stderr
    assert "Error" not in done.stderr
    assert "Exception" not in done.stderr


@pytest.mark.skipif(not Path("/dev/full").exists(), reason="needs a device that is always full")
def test_a_full_disk_is_one_line(dial: Path) -> None:
    """Where the answer itself cannot be written, that is said in a line, with status 2."""
    with Path("/dev/full").open("w") as full:
        done = subprocess.run(
            [*_MODULE, "table", dial], stdout=full, stderr=subprocess.PIPE, text=True, timeout=60, check=False
        )
    assert done.returncode == 2
    assert done.stderr.splitlines()[-1].startswith("cannot write the answer: no space left on device; ")
    assert "Traceback" not in done.stderr


@pytest.mark.skipif(sys.platform != "linux", reason="file names are bytes on Linux alone")
def test_a_name_of_any_bytes_stays_on_one_line(tmp_path: Path) -> None:
    """A file name with line breaks and bytes that are no text still gives one line of error."""
    done = subprocess.run(
        [*map(os.fsencode, _MODULE), b"table", os.fsencode(tmp_path) + b"/a\xff\n\x1b[31m.toml"],
        capture_output=True,
        timeout=60,
        check=False,
    )
    assert done.returncode == 2
    assert len(done.stderr.splitlines()) == 1
    assert b"cannot read the dial file" in done.stderr
    assert b"\x1b" not in done.stderr


def test_a_second_output_that_fails_leaves_the_first_as_it_was(dial: Path) -> None:
    """Of several outputs either all are written or none is touched, and nothing else is left behind."""
    first = dial.with_suffix(".svg")
    first.write_text("the old one")
    for second in ("no/such/folder.pdf", "dial.toml/x.pdf", "x.gif"):
        done = _run(_MODULE, "draw", dial, "-o", first, "-o", dial.parent / second)
        assert done.returncode == 2
        assert first.read_text() == "the old one"
        assert sorted(p.name for p in dial.parent.iterdir()) == ["dial.svg", "dial.toml"]


def test_a_refused_dial_leaves_the_old_drawing(dial: Path) -> None:
    """A dial file with a fault leaves the drawing of yesterday as it was."""
    old = dial.with_suffix(".svg")
    old.write_text("the old one")
    dial.write_text(samples.EDGEWISE.replace("to = 50", "to = 0"), encoding="utf-8")
    done = _run(_MODULE, "draw", dial, "-o", old)
    assert done.returncode == 2
    assert old.read_text() == "the old one"


def test_an_output_is_replaced_whole(dial: Path) -> None:
    """A drawing that is written again replaces the old file whole, and leaves no other file behind."""
    old = dial.with_suffix(".svg")
    old.write_text("x" * 10_000_000)
    done = _run(_MODULE, "draw", dial, "-o", old)
    assert done.returncode == 0, done.stderr
    assert old.read_text(encoding="utf-8").rstrip().endswith("</svg>")
    assert sorted(p.name for p in dial.parent.iterdir()) == ["dial.svg", "dial.toml"]


@pytest.mark.parametrize("error", ["ZeroDivisionError('by\\nzero')", "OSError(5, 'no\\nanswer')"])
def test_a_fault_of_the_program_itself_is_one_line_too(dial: Path, error: str) -> None:
    """An unforeseen error is a line with status 70, and raised only where the environment asks for it."""
    code = (
        "import dialgen.api, dialgen.cli, sys\n"
        f"def load(path): raise {error}\n"
        "dialgen.api.load = load\n"
        f"sys.argv = ['dialgen', 'table', {str(dial)!r}]\n"
        "dialgen.cli.main()\n"
    )
    done = _run([sys.executable, "-c", code])
    assert done.returncode == 70
    assert done.stderr.startswith(f"a fault in dialgen itself, {error.partition('(')[0]}: ")
    assert "DIALGEN_TRACEBACK=1" in done.stderr
    assert len(done.stderr.splitlines()) == 1
    asked = _run([sys.executable, "-c", code], env={**os.environ, "DIALGEN_TRACEBACK": "1"})
    assert "Traceback" in asked.stderr


@pytest.mark.skipif(not Path("/dev/full").exists(), reason="needs a device that is always full")
def test_errors_that_cannot_be_said_leave_the_status(dial: Path) -> None:
    """Where standard error takes nothing, the status is still that of the work."""
    with Path("/dev/full").open("w") as full:
        for words, status in ((["table", dial], 0), (["table", "none.toml"], 2)):
            done = subprocess.run(
                [*_MODULE, *words], stdout=subprocess.PIPE, stderr=full, timeout=60, check=False
            )
            assert done.returncode == status
            assert bool(done.stdout) == (status == 0)


@pytest.mark.parametrize("encoding", ["ascii", "cp1252", "latin-1"])
def test_another_encoding_spells_out_what_it_lacks(dial: Path, encoding: str) -> None:
    """Without UTF-8 a minus is a hyphen, kΩ kohm and ∞ inf, never a figure that looks like another."""
    text = samples.SHUNT.replace(READINGS, "")
    for old, new in {
        'kind = "shunt"\nrange = "40 A"\nbuilt = "1.885 mohm"': 'kind = "direct"\nrest = -20',
        'unit = "A"\nfrom = 0': 'unit = "kohm"\nfrom = -20',
        "[0, 10, 20, 30, 40]": '[{ at = -20, label = "∞" }, { at = 40, label = "µ°" }]',
    }.items():
        text = text.replace(old, new)
    dial.write_text(text, encoding="utf-8")
    environment = {**os.environ, "PYTHONIOENCODING": encoding}
    done = subprocess.run(
        [*_MODULE, "table", dial], capture_output=True, timeout=60, check=False, env=environment
    )
    lines = done.stdout.decode(encoding).splitlines()
    assert lines[0] == "-20 to 40 kohm", done.stderr
    assert lines[3].split()[:2] == ["-20", "inf"]
    assert lines[-1].split()[:2] == ["40", "udeg" if encoding == "ascii" else "µ°"]
    json_text = subprocess.run(
        [*_MODULE, "table", dial, "--json"], capture_output=True, timeout=60, check=False, env=environment
    ).stdout
    (scale,) = json.loads(json_text)["scales"]
    assert [m["label"] for m in scale["marks"] if m["label"]] == ["∞", "µ°"]


@pytest.mark.parametrize(
    ("written", "spelt"),
    [("−20", b"-20"), ("kΩ k\u2126", b"kohm kohm"), ("µA \u03bcA", b"uA uA"), ("∞ °C ☺é", b"inf degC ??")],
)
def test_signs_are_spelt_out(written: str, spelt: bytes) -> None:
    """Each sign that meters use has a spelling in plain letters, and anything else is a question mark."""
    codecs.register_error("dialgen-test", spell)
    assert written.encode("ascii", "dialgen-test") == spelt


def test_only_what_is_slow_is_said(
    monkeypatch: pytest.MonkeyPatch, capfd: pytest.CaptureFixture[str]
) -> None:
    """A drawing that takes longer than the limit is named on standard error, a quick one is not."""
    with say_if_slow("drawing quick.png ..."):
        pass
    monkeypatch.setattr(report, "SLOW_S", 0.01)
    with say_if_slow("drawing slow.png ..."):
        time.sleep(0.5)
    assert capfd.readouterr().err == "drawing slow.png ...\n"
