"""Writes DXF files and prints, for each, the summed area and length of its outlines as ezdxf flattens them."""

import json
import math
import os
import sys

import ezdxf

SAGITTA = 1e-5
folder = sys.argv[1]
rows = []


def outlines(entities):
    """Flattened closed curves; blocks are expanded by ezdxf itself."""
    for entity in entities:
        if entity.dxftype() == "INSERT":
            inserts = entity.multi_insert() if entity.mcount > 1 else [entity]
            for insert in inserts:
                yield from outlines(insert.virtual_entities())
        else:
            yield flattened(entity)


def flattened(entity):
    # A path of ezdxf holds cubic pieces only; every curve is flattened by itself instead.
    if entity.dxftype() == "SPLINE":
        points = list(entity.construction_tool().flattening(SAGITTA, segments=64))
    elif entity.dxftype() in ("LWPOLYLINE", "POLYLINE"):
        points = []
        for piece in entity.virtual_entities():
            part = [piece.dxf.start, piece.dxf.end] if piece.dxftype() == "LINE" else list(piece.flattening(SAGITTA))
            # Arcs of a polyline come counter-clockwise, whichever way it runs.
            if points and part[0].distance(points[-1]) > part[-1].distance(points[-1]):
                part.reverse()
            points += part
    else:
        points = list(entity.flattening(SAGITTA))
    return [(p.x, p.y) for p in points]


def measure(points):
    area = length = 0.0
    for (x1, y1), (x2, y2) in zip(points, points[1:] + points[:1]):
        area += x1 * y2 - x2 * y1
        length += math.hypot(x2 - x1, y2 - y1)
    return abs(area) / 2, length


def save(name, draw, version="R2010"):
    doc = ezdxf.new(version)
    doc.header["$INSUNITS"] = 4
    draw(doc, doc.modelspace())
    doc.saveas(os.path.join(folder, name))
    measured = [measure(points) for points in outlines(doc.modelspace())]
    rows.append({"file": name, "area": sum(a for a, _ in measured), "length": sum(l for _, l in measured)})


CLOUD = [(0, 0), (40, -12), (90, 5), (110, 45), (70, 80), (25, 70), (-15, 35)]


def closed_spline(degree, weights=None):
    def draw(_, msp):
        spline = msp.add_spline(dxfattribs={"degree": degree})
        points = [(x, y, 0) for x, y in CLOUD]
        closed = points + [points[0]]
        if weights:
            spline.set_open_rational(closed, weights, degree=degree)
        else:
            spline.set_open_uniform(closed, degree=degree)
    return draw


def shape(block, bulges):
    if bulges:
        block.add_lwpolyline([(30, 0, 0), (30, 20, -0.3), (0, 20, 0), (0, 0, 0.4)], format="xyb", close=True)
    block.add_circle((60, 10), 7)
    block.add_ellipse((0, 60), major_axis=(15, 8), ratio=0.55)
    spline = block.add_spline(dxfattribs={"degree": 3})
    spline.set_open_uniform([(x / 2 + 80, y / 2 + 40, 0) for x, y in CLOUD + CLOUD[:1]], degree=3)


def inserted(bulges=True, **attributes):
    def draw(doc, msp):
        shape(doc.blocks.new("SHAPE", base_point=(5, 3)), bulges)
        pair = doc.blocks.new("PAIR")
        pair.add_blockref("SHAPE", (0, 0))
        pair.add_blockref("SHAPE", (250, 40), dxfattribs={"rotation": 35, "xscale": -1})
        msp.add_blockref("PAIR", (17, -9), dxfattribs=attributes)
    return draw


for degree in (2, 3, 5):
    save(f"spline-{degree}.dxf", closed_spline(degree))
    save(f"rational-{degree}.dxf", closed_spline(degree, [1, 3, 0.5, 2, 1, 0.7, 4, 1]))
save("ellipse.dxf", lambda _, msp: msp.add_ellipse((3, 4), major_axis=(50, 20), ratio=0.3))
save("ellipse-back.dxf", lambda _, msp: msp.add_ellipse((3, 4), (50, 20), 0.3, dxfattribs={"extrusion": (0, 0, -1)}))
save("circle-back.dxf", lambda _, msp: msp.add_circle((30, 4), 9, dxfattribs={"extrusion": (0, 0, -1)}))
save("plain.dxf", inserted())
save("old.dxf", lambda _, msp: msp.add_polyline2d([(30, 0, 0), (30, 20, -0.3), (0, 0, 0.4)], format="xyb", close=True), "R12")
save("turned.dxf", inserted(rotation=77, xscale=1.5, yscale=1.5))
save("mirrored.dxf", inserted(xscale=-2, yscale=2, rotation=10))
# Stretched, ezdxf breaks a bulged polyline into loose pieces.
save("stretched.dxf", inserted(bulges=False, xscale=1.7, yscale=0.6, rotation=-25))
save("rows.dxf", inserted(row_count=2, column_count=3, row_spacing=400, column_spacing=700, rotation=12))
save("back.dxf", inserted(extrusion=(0, 0, -1), rotation=20))
print(json.dumps(rows))
