"""The wheel: what a user installs holds the templates and works away from the checkout."""

from __future__ import annotations

import os
import subprocess
import sys
import zipfile
from pathlib import Path

import pytest

from dialgen import templates

ROOT = Path(__file__).parents[1]


@pytest.fixture(scope="module")
def wheel(tmp_path_factory: pytest.TempPathFactory) -> Path:
    """The wheel of this checkout, built without the network."""
    folder = tmp_path_factory.mktemp("wheel")
    words = ["-m", "build", "--wheel", "--no-isolation", "--outdir", str(folder), str(ROOT)]
    done = subprocess.run([sys.executable, *words], capture_output=True, text=True, check=False)
    assert done.returncode == 0, done.stdout + done.stderr
    (found,) = folder.glob("*.whl")
    return found


def test_the_wheel_holds_every_template_and_the_typing_mark(wheel: Path) -> None:
    """Each template of the checkout is in the wheel, byte for byte, and so is py.typed."""
    with zipfile.ZipFile(wheel) as archive:
        assert "dialgen/py.typed" in archive.namelist()
        for name in templates.names():
            kept = (ROOT / "templates" / f"{name}.toml").read_bytes()
            assert archive.read(f"dialgen/templates/{name}.toml") == kept


def test_the_installed_wheel_finds_its_templates_and_draws(wheel: Path, tmp_path: Path) -> None:
    """Unpacked away from the checkout, the program lists, copies and draws a template."""
    with zipfile.ZipFile(wheel) as archive:
        archive.extractall(tmp_path / "site")
    env = {**os.environ, "PYTHONPATH": str(tmp_path / "site")}

    def run(*words: str) -> str:
        command = [sys.executable, "-m", "dialgen", *words]
        done = subprocess.run(command, capture_output=True, text=True, cwd=tmp_path, env=env, check=True)
        return done.stdout

    where = subprocess.run(
        [sys.executable, "-c", "import dialgen; print(dialgen.__file__)"],
        capture_output=True, text=True, cwd=tmp_path, env=env, check=True,
    ).stdout  # fmt: skip
    assert where.startswith(str(tmp_path))
    assert [line.split()[0] for line in run("new", "--list").splitlines()] == templates.names()
    run("new", "ohms", "ohms.toml")
    run("draw", "ohms.toml", "-o", "ohms.svg")
    assert (tmp_path / "ohms.svg").stat().st_size > 1000


def test_the_wheels_metadata_names_no_part_that_the_package_does_not_import(wheel: Path) -> None:
    """Every required part is imported somewhere in the package, so nobody installs one in vain."""
    with zipfile.ZipFile(wheel) as archive:
        (metadata,) = [n for n in archive.namelist() if n.endswith(".dist-info/METADATA")]
        lines = archive.read(metadata).decode().splitlines()
        code = "\n".join(archive.read(n).decode() for n in archive.namelist() if n.endswith(".py"))
    required = [line.removeprefix("Requires-Dist: ") for line in lines if line.startswith("Requires-Dist:")]
    for part in (line for line in required if "extra ==" not in line):
        # A module may be spelt otherwise than its package: with capitals, or without hyphens.
        name = part.split(">")[0].split("[")[0].strip().replace("-", "")
        assert name.lower() in code.lower().replace("_", ""), part
