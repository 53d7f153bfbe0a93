"""Dial, face and renderers put together: what every way in stands on."""

from __future__ import annotations

import errno
import os
import shutil
from collections.abc import Callable, Iterable, Mapping, Sequence
from dataclasses import dataclass, replace
from functools import cached_property
from os import PathLike, fspath
from pathlib import Path
from typing import TYPE_CHECKING, overload

import numpy as np
from numpy.typing import ArrayLike

from dialgen import dialfile
from dialgen.dial import Chain, Dial, attempt
from dialgen.dialfile import Source
from dialgen.drawing import Drawing, Purpose
from dialgen.errors import DialFileError, Fault, Finding, InputError, OutputError, Refused, Remark
from dialgen.face.compose import compose
from dialgen.face.fitted.openings import check_openings
from dialgen.face.laid import check_laid
from dialgen.face.lettered.signs import check_signs
from dialgen.face.plate import outliner
from dialgen.face.review import Finished, review
from dialgen.face.ruled.ruling import RuledScale, rule
from dialgen.lettering import Hand, hand
from dialgen.looks import Lettering, Look
from dialgen.quantity import engineered
from dialgen.renderers import Options, render
from dialgen.stage import Array

if TYPE_CHECKING:
    from dialgen.dial.designs import Designed
    from dialgen.parts.bench import Bench
    from dialgen.parts.bill import Bill

DEFAULT_MARGIN_MM = 3.0


@dataclass(frozen=True, eq=False)
class Face:
    """A dial file made into a face: ask it for angles and values, or draw it.

    Scales count from 1, in the file's order.
    """

    source: Source
    dial: Dial
    scales: tuple[RuledScale, ...]

    def __repr__(self) -> str:
        return f"<dialgen face of {self.source.name}, {len(self.scales)} scales>"

    def chain(self, scale: int = 1) -> Chain:
        """Return the chain of a scale.

        Raises:
            InputError: there is no such scale.
        """
        if not 1 <= scale <= len(self.scales):
            raise InputError(f"there is no scale {scale}; the dial has {len(self.scales)}")
        return self.dial.scales[scale - 1].chain

    @overload
    def angle(self, value: float, scale: int = 1) -> float: ...
    @overload
    def angle(self, value: ArrayLike, scale: int = 1) -> float | Array: ...
    def angle(self, value: ArrayLike, scale: int = 1) -> float | Array:
        """Return the pointer's angle in degrees at a value, or at an array of values.

        Raises:
            NoSuchValue: a value that the scale cannot show, or beyond the stops.
        """
        return _like(value, self.chain(scale).angle(np.asarray(value, dtype=float)))

    @overload
    def value(self, angle: float, scale: int = 1) -> float: ...
    @overload
    def value(self, angle: ArrayLike, scale: int = 1) -> float | Array: ...
    def value(self, angle: ArrayLike, scale: int = 1) -> float | Array:
        """Return the value shown at an angle in degrees, or at an array of angles.

        Raises:
            NoSuchValue: an angle beyond the stops, or where no value stands.
        """
        return _like(angle, self.chain(scale).value(np.asarray(angle, dtype=float)))

    @cached_property
    def drawing(self) -> Drawing:
        """The face as a display list, on a page that is exactly the plate."""
        return compose(self.dial, self.scales)

    @cached_property
    def _findings(self) -> tuple[Finding, ...]:
        found: dict[Fault, Finding] = {}
        finished = Finished(self.dial.file, self.scales, outliner(self.dial.file.plate), self.drawing)
        for remark in review(finished):
            fault = self.source.fault(remark.key, remark.message)
            found.setdefault(fault, _finding(fault, remark))
        return tuple(found.values())

    def review(self) -> tuple[Finding, ...]:
        """Return what would be hard to read on the face, and where: nothing of a good one."""
        return self._findings

    def warnings(self) -> tuple[Fault, ...]:
        """Return what should be known of the dial, and what the review of its face finds."""
        return (*self.dial_warnings(), *self.review())

    def dial_warnings(self) -> tuple[Fault, ...]:
        """Return what should be known of the dial whatever its face looks like, such as an assumed diode."""
        remarks = self.dial.remarks
        return tuple(dict.fromkeys(self.source.fault(remark.key, remark.message) for remark in remarks))

    @cached_property
    def circuits(self) -> tuple[Designed, ...]:
        """The circuits that the scales and their rows stand on, each once.

        Raises:
            DialFileError: circuits that cannot be designed, with their places.
        """
        from dialgen.dial.designs import designs

        try:
            return designs(self.dial)
        except Refused as refused:
            raise self.source.refusal(self.source.fault_of(e) for e in refused.errors) from None

    def bench(self, instead: Mapping[str, object] | None = None) -> Bench:
        """Return the maker's bench as the file's [parts] have it, with some of its keys said instead.

        Raises:
            InputError: one of ``instead`` is wrong.
        """
        from dialgen.dialfile.parts import bench_of

        return bench_of(self.dial.file.parts, instead or {})

    def bill(
        self,
        circuit: Designed,
        bench: Bench | None = None,
        progress: Callable[[str], Callable[[int, int], None]] | None = None,
    ) -> Bill:
        """Return what the bench is told of one of `circuits`: parts, heat, drift, cautions.

        Args:
            circuit: which one.
            bench: what the maker has; the file's own where it is left out.
            progress: given a part's name, what is told how far the search for it in the drawer is.

        Raises:
            InputError: a wanted drift that nothing brings.
        """
        from dialgen.parts.bill import bill

        movement = self.dial.file.movement.kind
        return bill(
            circuit.design, bench or self.bench(), movement, reswamped=circuit.reswamped, progress=progress
        )

    def old_face(self, circuit: Designed) -> tuple[tuple[float, float], ...]:
        """Return what a face drawn for the exact values shows at its numbered marks, as built.

        Pairs of applied and indicated value; none where nothing was built, or at an infinite mark.
        """
        wiring = circuit.wiring
        if wiring is None or not wiring.built or circuit.also:
            return ()
        marks = self.scales[circuit.scale - 1].marks
        values = [m.value for m in marks if m.rank == "numbered" and np.isfinite(m.value)]
        shown = wiring.indicated(np.array(values))
        return tuple(zip(values, shown.tolist(), strict=True))

    def schematic(self, circuit: Designed, bench: Bench | None = None) -> Drawing:
        """Return the picture of one of `circuits` as a display list.

        Args:
            circuit: which one.
            bench: what the maker has, for what one resistor stands; the file's own where it is left out.

        Raises:
            InputError: it is for more than 1 kV.
        """
        from dialgen.parts.bill import splits_of
        from dialgen.parts.caution.cautions import cautions
        from dialgen.parts.caution.situation import situation_of
        from dialgen.schematic import draw

        movement, name = self.dial.file.movement, self.dial.file.dial.name
        coil = ((movement.current, "A"), (movement.resistance, "Ω"))
        design = circuit.design
        situation = situation_of(design, movement.kind, (bench or self.bench()).voltage_v)
        if situation.beyond_help:
            raise InputError(
                "above 1 kV this program gives no design help, so it draws no schematic; "
                "give the work to a specialist in high voltage"
            )
        if movement.kind == "moving iron":
            # It deflects one way whatever the current's, so its terminals have no poles.
            design = replace(design, alternating=True)
        return draw(
            design,
            title=f"{name}: {design.kind}" if name else design.kind,
            coil=tuple(engineered(value, unit) for value, unit in coil if value is not None),
            splits={each.part: each.count for each in splits_of(circuit.design, situation)},
            earthed=any(caution.id == "earthy end" for caution in cautions(situation)),
        )

    def render(
        self,
        suffix: str,
        *,
        margin_mm: float = DEFAULT_MARGIN_MM,
        layers: Iterable[Purpose] = tuple(Purpose),
        options: Options = Options(),  # noqa: B008  (frozen)
    ) -> bytes:
        """Return the face as a file of the kind that ``suffix`` (".svg" ...) names, at true size.

        Args:
            suffix: the file's ending, with its point.
            margin_mm: paper around the plate on every side.
            layers: the purposes to draw.
            options: the renderer's own choices.

        Raises:
            InputError: an ending that is not known.
            MissingExtra: the renderer's library is not installed.
        """
        return render(self.drawing.with_margin(margin_mm).only(frozenset(layers)), suffix, options)

    def draw(
        self,
        path: str | PathLike[str],
        *,
        margin_mm: float = DEFAULT_MARGIN_MM,
        layers: Iterable[Purpose] = tuple(Purpose),
        options: Options = Options(),  # noqa: B008  (frozen)
    ) -> None:
        """Write the face to ``path``, whose ending says in which format; see `render`.

        Raises:
            InputError, MissingExtra: as `render` does.
            OutputError: the file cannot be written; one already there is left as it was.
        """
        data = self.render(
            Path(fspath(path)).suffix.lower(), margin_mm=margin_mm, layers=layers, options=options
        )
        write_files([(Path(fspath(path)), data)])


def load(path: str | PathLike[str]) -> Face:
    """Return the face that the dial file at ``path`` describes.

    Raises:
        DialFileError: the file cannot be read or is wrong, with every fault found and its place.
    """
    file, source = dialfile.read(path)
    shape = outliner(file.plate)
    # Whatever stage finds an error, the others go on with what is sound, so that all are told at once.
    dial, errors = attempt(file)
    scales, more = rule(dial, shape, _hand_for)
    errors = [*check_openings(file.plate), *check_signs(file), *errors, *more]
    errors = errors or list(check_laid(file, scales, shape))
    if errors:
        raise source.refusal(source.fault_of(error) for error in errors)
    return Face(source, dial, scales)


def _hand_for(look: Look) -> Hand:
    try:
        return hand(look.font, strokes=look.lettering is Lettering.STROKE)
    except InputError as error:
        raise error.under("look", "font") from None


def write_files(files: Sequence[tuple[Path, bytes]]) -> None:
    """Write files whole: each to a neighbour first, and all into place only when all are written.

    A new file has the usual rights, one that is replaced keeps its own.

    Raises:
        OutputError: one cannot be written, and none is put into place; or, rarely, one cannot be
            put into place, and those before it already are.
    """
    waiting: list[tuple[Path, Path]] = []
    path = Path()
    try:
        for path, data in files:
            # Through a link the file it leads to is replaced, not the link.
            target = Path(os.path.realpath(path))
            waiting.append((_written_beside(target, data), target))
        while waiting:
            temporary, path = waiting[0]
            os.replace(temporary, path)
            waiting.pop(0)
    except (OSError, ValueError) as error:
        raise OutputError(f"{path}: cannot be written: {_why(error)}") from None
    finally:
        for temporary, _ in waiting:
            temporary.unlink(missing_ok=True)


def _why(error: OSError | ValueError) -> str:
    reason = (getattr(error, "strerror", None) or str(error)).lower()
    full = isinstance(error, OSError) and error.errno in (errno.ENOSPC, errno.EDQUOT, errno.EFBIG)
    return f"{reason}; {'make room' if full else 'give a path in a folder you may write to'}"


def _written_beside(path: Path, data: bytes) -> Path:
    """Write a new file next to ``path`` and return it."""
    if path.is_dir():
        raise IsADirectoryError(errno.EISDIR, "it is a folder", str(path))
    neighbour = path.with_name(f".{path.name[:40]}.{os.getpid()}.{os.urandom(4).hex()}.tmp")
    try:
        neighbour.write_bytes(data)
        if path.exists():
            shutil.copymode(path, neighbour)
    except BaseException:
        neighbour.unlink(missing_ok=True)
        raise
    return neighbour


def _finding(fault: Fault, remark: Remark) -> Finding:
    return Finding(
        file=fault.file,
        line=fault.line,
        column=fault.column,
        key=fault.key,
        message=fault.message,
        check=remark.check,
        place=remark.place,
    )


def _like(given: ArrayLike, made: Array) -> float | Array:
    return float(made) if np.ndim(given) == 0 else made


__all__ = ["DEFAULT_MARGIN_MM", "DialFileError", "Face", "load", "write_files"]
