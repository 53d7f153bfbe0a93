"""The house: which room may know of which, and what may be loaded when."""

from __future__ import annotations

import ast
import subprocess
import sys
from pathlib import Path

import pytest

PACKAGE = Path(__file__).parents[1] / "dialgen"

FLOORS = (
    ("errors", "quantity", "drawing", "stage", "roots", "lazy"),
    ("lettering", "geometry", "circuit", "renderers", "templates"),
    ("ink", "looks", "symbols", "parts"),
    ("dialfile", "schematic"),
    ("dial",),
    ("face",),
    ("api",),
    ("cli",),
    ("__init__", "__main__"),
)
STATIONS = (
    ("parts", "plate"),
    ("ruled",),
    ("inked",),
    ("fitted",),
    ("laid",),
    ("lettered",),
    ("compose",),
    ("review",),
)
"""The floors within ``face``, in the order in which a plate is made."""
FLOOR_OF = {room: floor for floor, rooms in enumerate(FLOORS) for room in rooms}


def room_of(module: str) -> str:
    """Return the room that a module of the package belongs to."""
    parts = module.split(".")
    return parts[1] if len(parts) > 1 else "__init__"


def modules() -> list[tuple[str, Path]]:
    """Return every module's dotted name and file."""
    found = []
    for path in sorted(PACKAGE.rglob("*.py")):
        parts = path.relative_to(PACKAGE.parent).with_suffix("").parts
        name = ".".join(parts[:-1] if parts[-1] == "__init__" and len(parts) > 2 else parts)
        found.append((name, path))
    return found


def imported(path: Path) -> set[str]:
    """Return the package's modules that a file imports, anywhere in it."""
    names: set[str] = set()
    for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
        if isinstance(node, ast.Import):
            names |= {alias.name for alias in node.names}
        elif isinstance(node, ast.ImportFrom) and node.module:
            names.add(node.module)
            names |= {f"{node.module}.{alias.name}" for alias in node.names if node.module == "dialgen"}
    return {name for name in names if name == "dialgen" or name.startswith("dialgen.")}


def climbing(module: str, targets: set[str]) -> set[str]:
    """Return the imports that lead up, or across to another room of the same floor."""
    here = room_of(module)
    known = {room_of(target) for target in targets if target != "dialgen"} - {here}
    return {room for room in known if FLOOR_OF.get(room, -1) >= FLOOR_OF[here]}


@pytest.mark.parametrize(("module", "path"), modules(), ids=[name for name, _ in modules()])
def test_imports_run_downwards_only(module: str, path: Path) -> None:
    """No module imports from a floor above its own, nor from another room on its own floor."""
    targets = imported(path)
    if room_of(module) == "cli":
        # The package itself is known to the command line for its version.
        targets -= {"dialgen.__version__"}
    assert climbing(module, targets) == set()


@pytest.mark.parametrize(
    ("module", "path"), [(name, path) for name, path in modules() if name.startswith("dialgen.face.")]
)
def test_a_face_is_made_station_by_station(module: str, path: Path) -> None:
    """Within ``face`` no module imports from a later station, nor from another of the same floor."""
    station_of = {station: floor for floor, stations in enumerate(STATIONS) for station in stations}
    here = module.split(".")[2]
    inner = {target.split(".")[2] for target in imported(path) if target.startswith("dialgen.face.")}
    assert {there for there in inner - {here} if station_of[there] >= station_of[here]} == set()


def test_the_check_of_imports_can_fail() -> None:
    """A renderer that imported the face, or geometry the circuits, would be found."""
    assert climbing("dialgen.renderers.svg", {"dialgen.face.compose"}) == {"face"}
    assert climbing("dialgen.geometry.laws", {"dialgen.circuit.shunt"}) == {"circuit"}


def test_every_room_has_its_floor() -> None:
    """A new room must be given a floor before anything can be said of its imports."""
    assert {room_of(name) for name, _ in modules()} <= set(FLOOR_OF)


def loaded_by(code: str) -> set[str]:
    """Return the top-level modules loaded in a fresh process after running some code."""
    code += "\nimport sys; print(*{name.split('.')[0] for name in sys.modules})"
    run = subprocess.run([sys.executable, "-c", code], check=True, capture_output=True, text=True)
    return set(run.stdout.splitlines()[-1].split())


HELP = """
import sys
sys.argv = ["dialgen", "--help"]
from dialgen.cli import main
try:
    main()
except SystemExit:
    pass
"""


def test_help_loads_nothing_heavy() -> None:
    """``dialgen --help`` answers without numpy, pydantic or any drawing library."""
    heavy = {"numpy", "pydantic", "svgwrite", "reportlab", "ezdxf", "cairo", "uharfbuzz", "tree_sitter"}
    assert not loaded_by(HELP) & heavy


def test_drawing_svg_loads_no_other_renderer() -> None:
    """A plain draw to SVG loads neither reportlab, ezdxf nor cairo, nor the finder of error places."""
    sample = PACKAGE.parent / "samples" / "battery-ammeter" / "battery-ammeter.toml"
    code = f"import dialgen; dialgen.load({str(sample)!r}).render('.svg')"
    assert not loaded_by(code) & {"reportlab", "ezdxf", "cairo", "tree_sitter", "scipy", "matplotlib"}


def test_no_file_names_a_module_of_tests() -> None:
    """The package stands without its tests."""
    assert not [p for _, p in modules() if "import tests" in p.read_text(encoding="utf-8")]
