# SPDX-License-Identifier: MIT
"""Reads a PDF back with MuPDF and prints what is drawn, in millimetres from each page's lower left corner:
    page W H
    line X0 Y0 X1 Y1 WIDTH      (curves in chords within 0.0005 mm; WIDTH 0 for filled shapes)
    text LEFT BOTTOM RIGHT TOP SIZE WORDS
"""
import math
import subprocess
import sys
import xml.etree.ElementTree as tree

import fitz

MM = 25.4 / 72


def chords(a, b, c, d):
    bend = max(math.dist(a, (2 * b[0] - c[0], 2 * b[1] - c[1])), math.dist(b, (2 * c[0] - d[0], 2 * c[1] - d[1])))
    count = max(1, math.ceil(math.sqrt(6 * bend * MM / 8 / 0.0005)))
    for i in range(1, count + 1):
        t, s = i / count, 1 - i / count
        yield tuple(s**3 * a[k] + 3 * s * s * t * b[k] + 3 * s * t * t * c[k] + t**3 * d[k] for k in (0, 1))


def lines_of(path, height):
    m = [float(v) for v in path.get("transform").split()]
    width = float(path.get("linewidth", 0)) * MM

    def placed(p):
        return (m[0] * p[0] + m[2] * p[1] + m[4]) * MM, (height - (m[1] * p[0] + m[3] * p[1] + m[5])) * MM

    at = start = None
    for step in path:
        v = {key: float(value) for key, value in step.attrib.items()}
        if step.tag == "moveto":
            at = start = (v["x"], v["y"])
            continue
        if step.tag == "lineto":
            points = [(v["x"], v["y"])]
        elif step.tag == "curveto":
            points = list(chords(at, (v["x1"], v["y1"]), (v["x2"], v["y2"]), (v["x3"], v["y3"])))
        else:
            assert step.tag == "closepath", step.tag
            points = [start]
        for to in points:
            (x0, y0), (x1, y1) = placed(at), placed(to)
            print(f"line {x0:.5f} {y0:.5f} {x1:.5f} {y1:.5f} {width:.4f}")
            at = to


trace = tree.fromstring(subprocess.run(["mutool", "trace", sys.argv[1]], check=True, capture_output=True).stdout)
for page, traced in zip(fitz.open(sys.argv[1]), trace.iter("page"), strict=True):
    height = page.rect.height
    print(f"page {page.rect.width * MM:.5f} {height * MM:.5f}")
    for path in traced.iter():
        if path.tag in ("stroke_path", "fill_path"):
            lines_of(path, height)
    for block in page.get_text("dict")["blocks"]:
        for text_line in block.get("lines", []):
            for span in text_line["spans"]:
                l, t, r, b = span["bbox"]
                print(f"text {l * MM:.3f} {(height - b) * MM:.3f} {r * MM:.3f} {(height - t) * MM:.3f} "
                      f"{span['size'] * MM:.3f} {span['text']}")
