"""A plate as cells, each free or taken, and how many of a box are taken.

The cells lie under a summed-area table: the count for a box is four look-ups, whatever its size, so
every place for a box can be tried.  A cell is taken where anything covers any of it.
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass, replace
from typing import Any, Protocol

import numpy as np
from numpy.typing import ArrayLike, NDArray

from dialgen.face.lettered.cover import Box, Cover
from dialgen.stage import Array

_MOST_CELLS = 20_000
_LEAST_CELL_MM, _MOST_CELL_MM = 0.3, 4.0
_HAIR = 1e-9

Cells = NDArray[np.intp]
"""Numbers of rows or columns of cells."""


class Field(Protocol):
    """A convex area, such as a plate or a window."""

    @property
    def box(self) -> tuple[float, float, float, float]:
        """Left, bottom, width and height in millimetres."""
        ...

    def holds(self, x: ArrayLike, y: ArrayLike) -> NDArray[np.bool_]:
        """Return whether each point lies within."""
        ...


@dataclass(frozen=True, slots=True, eq=False)
class Raster:
    """A raster of what is taken.

    Args:
        left, bottom: the lower left corner, mm.
        cell_mm: side of a cell.
        taken: whether each cell is, by row from below and column; all around there is a ring of
            cells that are.
        sums: how many cells below and left of each corner of cells are taken.
    """

    left: float
    bottom: float
    cell_mm: float
    taken: NDArray[np.bool_]
    sums: NDArray[np.int32]

    def count(self, x: Array, y: Array, width_mm: float, height_mm: float) -> NDArray[np.int32]:
        """Return how many cells are taken under boxes about (x, y), for every x (columns) and y (rows)."""
        rows, columns = self.taken.shape
        y, half = y - self.bottom, height_mm / 2
        low, high = _touched(y - half, y + half, self.cell_mm, rows)
        # A box that is off the raster altogether is laid on the ring about it, which is taken.
        strips = self.sums[np.maximum(high, 1)] - self.sums[np.minimum(low, rows - 1)]
        x, half = x - self.left, width_mm / 2
        low, high = _touched(x - half, x + half, self.cell_mm, columns)
        return np.asarray(strips[:, np.maximum(high, 1)] - strips[:, np.minimum(low, columns - 1)])

    def with_box(self, box: Box) -> Raster:
        """Return the raster with a box taken as well."""
        left, bottom, right, top = box
        edges = np.array([[left, right], [bottom, top]]) - [[self.left], [self.bottom]]
        (x1, y1), (x2, y2) = (
            _clipped(rounded(edge / self.cell_mm), max(self.taken.shape))
            for rounded, edge in ((np.floor, edges[:, 0]), (np.ceil, edges[:, 1]))
        )
        taken, sums = self.taken.copy(), self.sums.copy()
        # Only what the box adds is summed up, and carried on to the right and upwards.
        added = _accumulated(~taken[y1:y2, x1:x2])
        taken[y1:y2, x1:x2] = True
        if added.size:
            sums[y1 + 1 : y2 + 1, x1 + 1 : x2 + 1] += added
            sums[y1 + 1 : y2 + 1, x2 + 1 :] += added[:, -1:]
            sums[y2 + 1 :, x1 + 1 : x2 + 1] += added[-1]
            sums[y2 + 1 :, x2 + 1 :] += added[-1, -1]
        return replace(self, taken=taken, sums=sums)


def rasterised(fields: Sequence[Field], cover: Cover, margin_mm: float) -> Raster:
    """Return as free what lies in all fields, no nearer than a margin to their edges, and is not covered."""
    boxes = [field.box for field in fields]
    left, bottom = max(box[0] for box in boxes), max(box[1] for box in boxes)
    width = min(box[0] + box[2] for box in boxes) - left
    height = min(box[1] + box[3] for box in boxes) - bottom
    width, height = max(width, _LEAST_CELL_MM), max(height, _LEAST_CELL_MM)
    cell_mm = min(max(math.sqrt(width * height / _MOST_CELLS), _LEAST_CELL_MM), _MOST_CELL_MM)
    grid = _Grid(
        left - cell_mm,
        bottom - cell_mm,
        cell_mm,
        math.ceil(height / cell_mm) + 2,
        math.ceil(width / cell_mm) + 2,
    )
    taken = grid.boxed(cover.boxes, cover.strokes_within(grid.box)) | grid.filled(cover.edges)
    for field in fields:
        taken |= ~grid.within(field, math.ceil(margin_mm / cell_mm - _HAIR))
    return Raster(grid.left, grid.bottom, cell_mm, taken, _summed(taken))


@dataclass(frozen=True, slots=True)
class _Grid:
    """Where the cells lie."""

    left: float
    bottom: float
    cell_mm: float
    rows: int
    columns: int

    @property
    def box(self) -> Box:
        """Left, bottom, right and top of all cells."""
        right, top = self.left + self.columns * self.cell_mm, self.bottom + self.rows * self.cell_mm
        return self.left, self.bottom, right, top

    def boxed(self, boxes: Array, strokes: Array) -> NDArray[np.bool_]:
        """Return which cells boxes and strokes touch."""
        covers = np.concatenate([boxes, _beads(strokes, self.cell_mm)])
        x1, x2 = _touched(covers[:, 0] - self.left, covers[:, 2] - self.left, self.cell_mm, self.columns)
        y1, y2 = _touched(covers[:, 1] - self.bottom, covers[:, 3] - self.bottom, self.cell_mm, self.rows)
        # A box adds one at its lower left corner and at its upper right one, and takes one off at the
        # two others: summed up along both axes that is one inside it and nothing outside.
        wide = self.columns + 1
        more = np.concatenate([y1 * wide + x1, y2 * wide + x2])
        less = np.concatenate([y1 * wide + x2, y2 * wide + x1])
        layers = _tallied(more, less, (self.rows + 1, wide))
        return np.asarray(_accumulated(layers)[:-1, :-1] > 0)

    def filled(self, edges: Array) -> NDArray[np.bool_]:
        """Return which cells have their middle inside a figure; its edge is for strokes to cover."""
        if not len(edges):
            return np.zeros((self.rows, self.columns), dtype=bool)
        x1, y1, x2, y2 = edges.T
        rows1, rows2 = ((y - self.bottom) / self.cell_mm - 0.5 for y in (y1, y2))
        first = _clipped(np.ceil(np.minimum(rows1, rows2)), self.rows)
        counts = _clipped(np.ceil(np.maximum(rows1, rows2)), self.rows) - first
        edge = np.repeat(np.arange(len(edges)), counts)
        row = first[edge] + _ranks(counts)
        share = (row - rows1[edge]) / (rows2 - rows1)[edge]
        x = x1[edge] + share * (x2 - x1)[edge]
        column = _clipped(np.ceil((x - self.left) / self.cell_mm - 0.5), self.columns)
        # Seen along a row from the left, an edge that goes down enters an anticlockwise figure.
        down = (rows2 < rows1)[edge]
        places = row * (self.columns + 1) + column
        entered = _tallied(places[down], places[~down], (self.rows, self.columns + 1))
        return np.asarray(np.cumsum(entered, axis=1)[:, :-1] > 0)

    def within(self, field: Field, margin_cells: int) -> NDArray[np.bool_]:
        """Return which cells lie in a field with a margin of cells to spare on every side."""
        x = self.left + self.cell_mm * np.arange(self.columns + 1)
        y = self.bottom + self.cell_mm * np.arange(self.rows + 1)
        corners = field.holds(x[None, :], y[:, None])
        inside = np.zeros((self.rows, self.columns), dtype=bool)
        m, rows, columns = margin_cells, self.rows, self.columns
        if min(rows, columns) > 2 * m:
            # The field is convex: a square lies in it where its four corners do.
            low_y, high_y, low_x, high_x = (
                slice(rows - 2 * m),
                slice(2 * m + 1, None),
                slice(columns - 2 * m),
                slice(2 * m + 1, None),
            )
            inside[m : rows - m, m : columns - m] = (
                corners[low_y, low_x]
                & corners[low_y, high_x]
                & corners[high_y, low_x]
                & corners[high_y, high_x]
            )
        inside[[0, -1], :] = False
        inside[:, [0, -1]] = False
        return inside


def _beads(strokes: Array, spacing_mm: float) -> Array:
    """Return boxes (n, 4) that together cover strokes, strung along them no more than so far apart."""
    x1, y1, x2, y2, half = strokes.T
    counts = np.ceil(np.hypot(x2 - x1, y2 - y1) / spacing_mm - _HAIR).astype(int) + 1
    stroke = np.repeat(np.arange(len(strokes)), counts)
    share = _ranks(counts) / np.maximum(counts - 1, 1)[stroke]
    x = x1[stroke] + share * (x2 - x1)[stroke]
    y = y1[stroke] + share * (y2 - y1)[stroke]
    reach = half[stroke] + spacing_mm / 2
    return np.column_stack([x - reach, y - reach, x + reach, y + reach])


def _ranks(counts: NDArray[np.int_]) -> NDArray[np.int_]:
    """Return 0, 1, 2 ... for each count, one after the other."""
    starts = np.cumsum(counts) - counts
    return np.asarray(np.arange(int(counts.sum())) - np.repeat(starts, counts))


def _tallied(more: Cells, less: Cells, shape: tuple[int, int]) -> Cells:
    """Return how often each cell is named in the one list, less how often in the other."""
    size = shape[0] * shape[1]
    return (np.bincount(more, minlength=size) - np.bincount(less, minlength=size)).reshape(shape)


def _touched(low_mm: Array, high_mm: Array, cell_mm: float, most: int) -> tuple[Cells, Cells]:
    """Return the first cell that each stretch touches, and the one past its last."""
    return _clipped(np.floor(low_mm / cell_mm), most), _clipped(np.ceil(high_mm / cell_mm), most)


def _clipped(cells: Array, most: int) -> Cells:
    return np.minimum(np.maximum(cells, 0), most).astype(np.intp)


def _summed(taken: NDArray[np.bool_]) -> NDArray[np.int32]:
    rows, columns = taken.shape
    sums = np.zeros((rows + 1, columns + 1), dtype=np.int32)
    sums[1:, 1:] = _accumulated(taken)
    return sums


def _accumulated(counts: NDArray[Any]) -> NDArray[np.int32]:
    return np.asarray(np.cumsum(np.cumsum(counts, axis=0, dtype=np.int32), axis=1, dtype=np.int32))
