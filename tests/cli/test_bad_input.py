"""Wrong dial files and wrong command lines: for each, the place, the key, the words and the status."""

from __future__ import annotations

import re
from pathlib import Path

import click
import dialfile_samples as samples
import pytest
from bad_dials import CSV, FROM_CSV, READINGS, SCHEMA, SENSE, TOML, Bad

from dialgen.cli import program
from dialgen.cli.report import guarded

_LINE = re.compile(r"^(?P<file>[^:]*):(?P<line>\d+):(?P<column>\d+): (?:(?P<key>[\w.\[\]]+): )?(?P<what>.*)$")


def _say(folder: Path, capsys: pytest.CaptureFixture[str], *words: str) -> tuple[int, list[str], str]:
    """Run the program in this process; return its status, lines of standard error and output."""
    status = _run(*words)
    said = capsys.readouterr()
    assert "Traceback" not in said.err
    return status, said.err.replace(f"{folder}/", "").splitlines(), said.out


def _run(*words: str) -> int:
    class Program(click.Group):
        def main(self, **options: object) -> object:  # type: ignore[override]
            return program.main(args=list(words), **options)  # type: ignore[arg-type]

    return guarded(Program())


@pytest.mark.parametrize("bad", [*TOML, *SCHEMA, *SENSE], ids=lambda bad: bad.name)
def test_a_wrong_dial_file_is_refused_at_its_place(
    bad: Bad, tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    """Each fault is one line with the place and key to change, what is wrong and the mend; status 2."""
    assert bad.old in bad.text
    (tmp_path / "dial.toml").write_text(bad.text.replace(bad.old, bad.new, 1), encoding="utf-8")
    for name, text in bad.files.items():
        (tmp_path / name).write_text(text, encoding="utf-8")
    status, lines, out = _say(tmp_path, capsys, "table", f"{tmp_path}/dial.toml")
    assert (status, out) == (2, "")
    first = _LINE.match(lines[0])
    assert first, lines
    assert (f"{first['line']}:{first['column']}", first["key"] or "") == (bad.place, bad.key), lines
    assert bad.piece in first["what"]
    assert "; " in first["what"]
    assert len(lines) == 1 + bad.more, lines


@pytest.mark.parametrize("bad", CSV, ids=lambda bad: bad.name)
def test_a_wrong_csv_is_refused_at_its_place(
    bad: Bad, tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    """What is wrong in a CSV of readings is placed in the CSV, in line and column of the cell."""
    (tmp_path / "dial.toml").write_text(FROM_CSV, encoding="utf-8")
    (tmp_path / "r.csv").write_text(bad.new, encoding="utf-8")
    status, lines, _ = _say(tmp_path, capsys, "table", f"{tmp_path}/dial.toml")
    assert status == 2
    assert lines[0].startswith(f"r.csv:{bad.place}: {bad.key}"), lines
    assert bad.piece in lines[0]


@pytest.mark.parametrize(
    ("words", "piece"),
    [
        (["draw"], "dialgen draw: missing argument 'FILE'; see dialgen draw --help"),
        (["draw", "good.toml"], "dialgen draw: missing option '-o' / '--output'"),
        (["draw", "good.toml", "-o"], "option '-o' requires an argument"),
        (["draw", "good.toml", "-o", "x.gif"], "no file of the kind '.gif' can be drawn; use one of .svg"),
        (["draw", "good.toml", "-o", "x"], "no file of the kind '' can be drawn"),
        (["draw", "good.toml", "-o", "no/x.svg"], "no/x.svg: cannot be written: no such file or directory; "),
        (["draw", "good.toml", "-o", "folder.svg"], "folder.svg: cannot be written: it is a folder; "),
        (
            ["draw", "good.toml", "-o", "good.toml/x.svg"],
            "good.toml/x.svg: cannot be written: not a directory; ",
        ),
        (["draw", "good.toml", "-o", "x.svg", "--margin", "-1"], "-1.0 is not in the range"),
        (["draw", "good.toml", "-o", "x.svg", "--margin", "wide"], "'wide' is not a number"),
        (
            ["draw", "good.toml", "-o", "x.svg", "--layers", "ink"],
            "'ink' is not a list of print, cut and guide",
        ),
        (["draw", "good.toml", "-o", "x.svg", "--colour"], "no such option"),
        (["draw", "none.toml", "-o", "x.svg"], "none.toml:1:1: cannot read the dial file: no such file"),
        (["table"], "dialgen table: missing argument 'FILE'"),
        (["table", "folder.svg"], "folder.svg:1:1: cannot read the dial file: is a directory"),
        (["table", "good.toml/x.toml"], "cannot read the dial file: not a directory"),
        (
            ["table", "good.toml", "--at", "notanumber"],
            "'notanumber' is not a number; see dialgen table --help",
        ),
        (["table", "good.toml", "--at", "nan"], "'nan' is not a number"),
        (["table", "good.toml", "--at", "99"], "99 A would stand at 175 degrees, beyond the stops"),
        (["table", "good.toml", "--at", "inf"], "is outside what the law"),
        (["table", "good.toml", "--scale", "9"], "there is no scale 9; the dial has 1"),
        (["table", "good.toml", "--scale", "0"], "0 is not in the range"),
        (["table", "good.toml", "extra"], "unexpected extra argument"),
        (["table", "large.toml"], "large.toml:1:1: over 128 kB; give a smaller file"),
        (["table", "latin.toml"], "latin.toml:2:9: not UTF-8 text; save the file as UTF-8"),
        (["table", "utf16.toml"], "utf16.toml:1:1: not UTF-8 text"),
        (["new"], "dialgen new: give a template and a file, or --list to see the templates"),
        (
            ["new", "square-panle", "x.toml"],
            "there is no template 'square-panle'; did you mean square-panel?",
        ),
        (["new", "zzz", "x.toml"], "there is no template 'zzz'; dialgen new --list shows them"),
        (["new", "square-panel", "good.toml"], "good.toml: is there already; give another name, or --force"),
        (["new", "square-panel", "no/x.toml"], "no/x.toml: cannot be written"),
        (["new", "square-panel", "x" * 300], "cannot be written: file name too long; "),
        (["tabel"], "dialgen: no such command 'tabel', did you mean table"),
        (["zzz"], "dialgen: no such command 'zzz'; see dialgen --help"),
        (["--zzz"], "dialgen: no such option"),
    ],
    ids=lambda value: " ".join(value) if isinstance(value, list) else "",
)
def test_a_wrong_command_line_is_refused_in_one_line(
    words: list[str],
    piece: str,
    tmp_path: Path,
    capsys: pytest.CaptureFixture[str],
    monkeypatch: pytest.MonkeyPatch,
) -> None:
    """A wrong option, name or path ends with status 2 and one line, and writes or changes no file."""
    monkeypatch.chdir(tmp_path)
    Path("good.toml").write_text(samples.SHUNT.replace(READINGS, ""), encoding="utf-8")
    Path("large.toml").write_bytes(b"#" * 10_000_000)
    Path("latin.toml").write_bytes(b"dialgen = 1\n#Ohms: \xc3\xa9\xe9\n")
    Path("utf16.toml").write_text(samples.SHUNT, encoding="utf-16")
    Path("folder.svg").mkdir()
    before = {path.name: path.stat().st_mtime_ns for path in tmp_path.iterdir()}
    status, lines, out = _say(tmp_path, capsys, *words)
    assert (status, len(lines), out) == (2, 1, ""), lines
    assert piece in lines[0]
    assert {path.name: path.stat().st_mtime_ns for path in tmp_path.iterdir()} == before


def test_everything_wrong_is_said_at_once_in_file_order(
    tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    """Nine faults in one file give the first six in the order of the file, and a line for the rest."""
    text = samples.SHUNT
    edits = {
        '"1 mA"': "1",
        '"75 ohm"': '"75"',
        "rest = -44.0": "rest = 44.0",
        "pointer": "ponter",
        "to = 40": "to = 0",
        "radius = 44.0": "radios = 44.0",
        '"outward"': '"out"',
        "pivot": "pivit",
        "height": "hight",
    }
    for old, new in edits.items():
        text = text.replace(old, new, 1)
    (tmp_path / "dial.toml").write_text(text, encoding="utf-8")
    status, lines, _ = _say(tmp_path, capsys, "table", f"{tmp_path}/dial.toml")
    assert status == 2
    assert [line.split(": ")[1] for line in lines[:6]] == [
        "movement.current",
        "movement.resistance",
        "movement.full",
        "movement.ponter",
        "scale[1].to",
        "scale[1].radios",
    ]
    assert re.fullmatch(r"and \d+ more", lines[6])
    assert len(lines) == 7


def test_the_table_of_bad_input_is_long_enough() -> None:
    """There are at least a hundred wrong dial files and CSVs, no two of one name."""
    names = [bad.name for bad in (*TOML, *SCHEMA, *SENSE, *CSV)]
    assert len(names) == len(set(names)) >= 100
