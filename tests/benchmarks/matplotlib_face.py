"""The rival: matplotlib drawing a face from finished marks, as well tuned as it can be.

It is given every mark's end points, the scale line and the numerals' places, so it does none of
the chain's work.  Marks of one rank are one LineCollection; text is drawn as outlines in both
formats.  Run as a script, it is the cold contender: ``python matplotlib_face.py MARKS.json OUT``.
"""

from __future__ import annotations

import io
import json
import math
import sys


def draw(face: dict, suffix: str) -> bytes:
    """Return the face as SVG or PDF bytes."""
    import matplotlib as mpl
    from matplotlib.collections import LineCollection
    from matplotlib.figure import Figure
    from matplotlib.font_manager import FontProperties
    from matplotlib.patches import Arc, Circle, FancyBboxPatch, PathPatch, Polygon
    from matplotlib.path import Path
    from matplotlib.textpath import TextPath
    from matplotlib.transforms import Affine2D

    mpl.rcParams["svg.fonttype"] = "path"
    left, bottom, width, height = face["page"]
    figure = Figure(figsize=(width / 25.4, height / 25.4))
    axes = figure.add_axes((0, 0, 1, 1))
    axes.set_xlim(left, left + width)
    axes.set_ylim(bottom, bottom + height)
    axes.set_axis_off()
    points = 72 / 25.4
    for group in face["lines"]:
        axes.add_collection(
            LineCollection(group["segments"], colors=group["colour"], linewidths=group["width"] * points)
        )
    for arc in face["arcs"]:
        radius = arc["radius"]
        axes.add_patch(
            Arc(
                arc["centre"],
                2 * radius,
                2 * radius,
                theta1=90 - arc["end"],
                theta2=90 - arc["start"],
                color=arc["colour"],
                linewidth=arc["width"] * points,
            )
        )
    for x, y, radius in face["circles"]:
        axes.add_patch(Circle((x, y), radius, fill=False, color="#d00000", linewidth=0.1 * points))
    for box in face["boxes"]:
        axes.add_patch(
            FancyBboxPatch(
                box[:2],
                box[2],
                box[3],
                boxstyle="round,pad=0,rounding_size=2",
                fill=False,
                edgecolor="#d00000",
                linewidth=0.1 * points,
            )
        )
    for shape in face["shapes"]:
        axes.add_patch(
            Polygon(
                shape["corners"],
                facecolor=shape["fill"] or "none",
                edgecolor=shape["stroke"] or "none",
                linewidth=shape["width"] * points,
            )
        )
    font = FontProperties(family="DejaVu Sans")
    outlines = []
    for label in face["labels"]:
        if suffix == ".svg":
            axes.text(
                label["x"],
                label["y"],
                label["text"],
                ha="center",
                va="center",
                fontsize=label["height"] * 1.4 * points,
                fontproperties=font,
            )
        else:
            # matplotlib embeds its font in a PDF; for outlines all labels become one path.
            path = TextPath((0, 0), label["text"], size=label["height"] * 1.4, prop=font)
            outlines.append(path.transformed(Affine2D().translate(label["x"], label["y"])))
    if outlines:
        axes.add_patch(PathPatch(Path.make_compound_path(*outlines), facecolor="#000000", linewidth=0))
    out = io.BytesIO()
    figure.savefig(
        out, format=suffix[1:], metadata={"Date": None} if suffix == ".svg" else {"CreationDate": None}
    )
    return out.getvalue()


def corners(outline: object) -> list[list[float]]:
    """Return an outline's corners, with points every three degrees along its arcs."""
    found = []
    for here, _, arc in outline.edges():
        found.append([here.x, here.y])
        if arc is not None:
            steps = max(1, round((arc.end_deg - arc.start_deg) / 3))
            spread = [arc.start_deg + (arc.end_deg - arc.start_deg) * i / steps for i in range(1, steps)]
            between = [list(arc.point(angle)) for angle in spread]
            found += between if here.turn_deg > 0 else between[::-1]
    return found


def describe(drawing: object) -> dict:
    """Return a drawing of ours as the plain numbers that `draw` takes."""
    from dialgen.drawing import Arc, Circle, Letters, Line, Outline

    face: dict = {
        "page": [drawing.left, drawing.bottom, drawing.width, drawing.height],
        "lines": [],
        "arcs": [],
        "circles": [],
        "boxes": [],
        "shapes": [],
        "labels": [],
    }
    groups: dict = {}
    for layer in drawing.layers:
        for item in layer.items:
            match item:
                case Line():
                    groups.setdefault(item.style, []).append([item.start, item.end])
                case Arc():
                    face["arcs"].append(
                        {
                            "centre": item.centre,
                            "radius": item.radius_mm,
                            "start": item.start_deg,
                            "end": item.end_deg,
                            "width": item.style.width_mm,
                            "colour": item.style.stroke,
                        }
                    )
                case Circle():
                    face["circles"].append([*item.centre, item.radius_mm])
                case Outline() if item.style.fill:
                    face["shapes"].append(
                        {
                            "corners": corners(item),
                            "fill": item.style.fill,
                            "stroke": item.style.stroke,
                            "width": item.style.width_mm,
                        }
                    )
                case Outline():
                    xs, ys = [v.x for v in item.vertices], [v.y for v in item.vertices]
                    face["boxes"].append([min(xs), min(ys), max(xs) - min(xs), max(ys) - min(ys)])
                case Letters():
                    placed = item.glyphs
                    middle = (placed[0].x + placed[-1].x) / 2
                    cap_mm = 0.7 * placed[0].size_mm
                    face["labels"].append(
                        {"text": item.text, "x": middle, "y": placed[0].y + cap_mm / 2, "height": cap_mm}
                    )
    face["lines"] = [
        {"segments": segments, "width": style.width_mm, "colour": style.stroke}
        for style, segments in groups.items()
    ]
    assert not any(math.isnan(v) for v in face["page"])
    return face


if __name__ == "__main__":
    with open(sys.argv[1], encoding="utf-8") as file:
        data = draw(json.load(file), "." + sys.argv[2].rsplit(".", 1)[1])
    with open(sys.argv[2], "wb") as file:
        file.write(data)
