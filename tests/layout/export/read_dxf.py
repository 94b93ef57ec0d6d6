# SPDX-License-Identifier: MIT
"""Reads a DXF file back with ezdxf, which first looks for faults, and prints in millimetres:
    faults COUNT                (errors and what it had to mend)
    units INSUNITS MEASUREMENT VERSION
    extent LEFT BOTTOM RIGHT TOP
    layer NAME COLOUR
    kind NAME                   (each kind of entity, sorted, once)
    entity KIND LAYER CLOSED    (in the file's order; its lines follow)
    line LAYER X0 Y0 X1 Y1      (arcs, by ezdxf's own reading, in 400 chords)
    circle LAYER X Y RADIUS
    arc LAYER X Y RADIUS START END   (degrees; of polylines too)
and asserts what holds for every line of the file: fixed-point numbers, no "-0".
"""
import math
import re
import sys

import ezdxf
from ezdxf import recover

text = open(sys.argv[1], encoding="ascii").read().split("\n")
for code, value in zip(text[0::2], text[1::2]):
    if 10 <= int(code) <= 59:
        assert re.fullmatch(r"-?\d+\.\d+", value) and not re.fullmatch(r"-[0.]+", value), (code, value)

document = ezdxf.readfile(sys.argv[1])
found = document.audit()
mended = recover.readfile(sys.argv[1])[1]
print("faults", len(found.errors) + len(found.fixes) + len(mended.errors) + len(mended.fixes))
for fault in [*found.errors, *found.fixes, *mended.errors, *mended.fixes]:
    print("fault", fault.message)
header = document.header
print("units", header["$INSUNITS"], header["$MEASUREMENT"], document.dxfversion)
low, high = header["$EXTMIN"], header["$EXTMAX"]
print("extent", low[0], low[1], high[0], high[1])
for layer in document.layers:
    print("layer", layer.dxf.name, layer.dxf.color)
for kind in sorted({entity.dxftype() for entity in document.entitydb.values() if entity.dxf.hasattr("layer")}):
    print("kind", kind)


def chords(arc):
    a, b = arc.dxf.start_angle, arc.dxf.end_angle
    if b <= a:
        b += 360
    angles = [math.radians(a + (b - a) * i / 400) for i in range(401)]
    c, r = arc.dxf.center, arc.dxf.radius
    return [(c[0] + r * math.cos(v), c[1] + r * math.sin(v)) for v in angles]


def show(entity):
    layer, kind = entity.dxf.layer, entity.dxftype()
    if kind == "LINE":
        points = [entity.dxf.start, entity.dxf.end]
    elif kind == "CIRCLE":
        c, r = entity.dxf.center, entity.dxf.radius
        print(f"circle {layer} {c[0]:.6f} {c[1]:.6f} {r:.6f}")
        points = [(c[0] + r * math.cos(i * math.pi / 360), c[1] + r * math.sin(i * math.pi / 360)) for i in range(721)]
    elif kind == "ARC":
        c = entity.dxf.center
        print(f"arc {layer} {c[0]:.6f} {c[1]:.6f} {entity.dxf.radius:.6f} {entity.dxf.start_angle:.9f} {entity.dxf.end_angle:.9f}")
        points = chords(entity)
    elif kind == "POLYLINE":
        for part in entity.virtual_entities():
            show(part)
        return
    else:
        raise AssertionError(kind)
    for a, b in zip(points, points[1:]):
        print(f"line {layer} {a[0]:.6f} {a[1]:.6f} {b[0]:.6f} {b[1]:.6f}")


for entity in document.modelspace():
    closed = entity.dxftype() == "CIRCLE" or (entity.dxftype() == "POLYLINE" and entity.is_closed)
    print("entity", entity.dxftype(), entity.dxf.layer, int(closed))
    show(entity)
