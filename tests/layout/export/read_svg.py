# SPDX-License-Identifier: MIT
"""Reads an SVG file of flat paths back with Python's own XML reader and prints, in the file's numbers with y turned up:
    size WIDTH HEIGHT UNIT
    tag NAME                    (each kind of element, each attribute as NAME@ATTRIBUTE; sorted, once)
    layer NAME
    line LAYER X0 Y0 X1 Y1      (arcs and curves in 100 chords)
Arcs by the centre form of the SVG standard (SVG 1.1, appendix F.6.5).
"""
import math
import re
import sys
import xml.etree.ElementTree as tree

root = tree.parse(sys.argv[1]).getroot()
box = [float(v) for v in root.get("viewBox").split()]
for side, number in (("width", box[2]), ("height", box[3])):
    assert root.get(side) == f"{number:.4f}".rstrip("0").rstrip(".") + "mm", root.get(side)
print("size", box[2], box[3], "mm")
kinds = set()
for element in root.iter():
    name = element.tag.split("}")[1]
    kinds.add(name)
    kinds.update(f"{name}@{attribute}" for attribute in element.attrib)
for kind in sorted(kinds):
    print("tag", kind)


def arc(p, r, large, sweep, q):
    x, y = (p[0] - q[0]) / 2, (p[1] - q[1]) / 2
    d2 = x * x + y * y
    r = max(r, math.sqrt(d2))
    k = math.sqrt(max(0, (r * r - d2) / d2)) * (-1 if large == sweep else 1)
    cx, cy = k * y + (p[0] + q[0]) / 2, -k * x + (p[1] + q[1]) / 2
    a = math.atan2(p[1] - cy, p[0] - cx)
    turn = math.atan2(q[1] - cy, q[0] - cx) - a
    if sweep and turn < 0:
        turn += 2 * math.pi
    if not sweep and turn > 0:
        turn -= 2 * math.pi
    return [(cx + r * math.cos(a + turn * i / 100), cy + r * math.sin(a + turn * i / 100)) for i in range(101)]


def walk(d):
    parts = re.findall(r"([MLACZ])([^MLACZ]*)", d)
    assert "".join(a + b for a, b in parts) == d, d
    at = start = None
    for letter, numbers in parts:
        assert "e" not in numbers and not re.search(r"-0(?![.\d])", numbers) and not re.search(r"\.\d{5}", numbers), numbers
        v = [float(n) for n in numbers.split()]
        if letter == "M":
            at = start = (v[0], v[1])
            continue
        if letter == "Z":
            points = [at, start]
        elif letter == "L":
            points = [at, (v[0], v[1])]
        elif letter == "A":
            assert v[0] == v[1]
            points = arc(at, v[0], v[3], v[4], (v[5], v[6]))
        else:
            p = [at, (v[0], v[1]), (v[2], v[3]), (v[4], v[5])]
            points = []
            for i in range(101):
                t = i / 100
                w = ((1 - t) ** 3, 3 * t * (1 - t) ** 2, 3 * t * t * (1 - t), t**3)
                points.append(tuple(sum(w[n] * p[n][k] for n in range(4)) for k in (0, 1)))
        for a, b in zip(points, points[1:]):
            yield a, b
        at = points[-1]


for group in root:
    print("layer", group.get("id"))
    for path in group:
        for a, b in walk(path.get("d")):
            print(f"line {group.get('id')} {a[0]:.5f} {box[3] - a[1]:.5f} {b[0]:.5f} {box[3] - b[1]:.5f}")
