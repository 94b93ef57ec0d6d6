# SPDX-License-Identifier: MIT
"""What the tests that read a packet back share: readers of its drawings, in millimetres with y up, and distances.

SVG by Python's own XML reader, DXF by ezdxf, PDF by MuPDF. A run is an array of points; arcs and curves are in chords.
"""
import math
import re
import subprocess
import xml.etree.ElementTree as tree

import ezdxf
import ezdxf.path
import numpy as np

MM = 25.4 / 72


def curve(a, b, c, d, count=24):
    t = np.linspace(0, 1, count + 1)[1:, None]
    return (1 - t) ** 3 * a + 3 * t * (1 - t) ** 2 * b + 3 * t * t * (1 - t) * c + t**3 * d


def arc(p, r, large, sweep, q, count=180):
    """By the centre form of SVG 1.1, appendix F.6.5."""
    x, y = (p - q) / 2
    d2 = x * x + y * y
    r = max(r, math.sqrt(d2))
    k = math.sqrt(max(0.0, (r * r - d2) / d2)) * (-1 if large == sweep else 1)
    middle = np.array([k * y, -k * x]) + (p + q) / 2
    start, end = (math.atan2(*(point - middle)[::-1]) for point in (p, q))
    turn = (end - start) % (2 * math.pi) if sweep else -((start - end) % (2 * math.pi))
    angles = start + turn * np.linspace(0, 1, count + 1)[1:]
    return middle + r * np.stack([np.cos(angles), np.sin(angles)], axis=1)


def svg_runs(d):
    """The runs of a path's data as arrays of points, y still downward."""
    runs = []
    for letter, numbers in re.findall(r"([MLACZ])([^MLACZ]*)", d):
        v = np.array([float(n) for n in numbers.split()])
        if letter == "M":
            runs.append([v])
            continue
        at = runs[-1][-1]
        if letter == "L":
            runs[-1].append(v)
        elif letter == "C":
            runs[-1].extend(curve(at, v[:2], v[2:4], v[4:]))
        elif letter == "A":
            runs[-1].extend(arc(at, v[0], v[3], v[4], v[5:]))
        else:
            runs[-1].append(runs[-1][0])
    return [np.array(run) for run in runs]


class Svg:
    """Marks of a plate's SVG, y up."""

    def __init__(self, path):
        root = tree.parse(path).getroot()
        self.width, self.height = (float(v) for v in root.get("viewBox").split()[2:])
        assert root.get("width") == f"{self.width:.4f}".rstrip("0").rstrip(".") + "mm"
        self.strokes, self.fills, self.edge = [], [], None  # [(layer, width, runs)]
        for group in root:
            for mark in group:
                runs = [np.array([0, self.height]) + run * [1, -1] for run in svg_runs(mark.get("d"))]
                if mark.get("fill") == "none":
                    self.strokes.append((group.get("id"), float(mark.get("stroke-width")), runs))
                else:
                    self.fills.append((group.get("id"), mark.get("d"), runs))
                if group.get("id") == "cut" and (self.edge is None or np.ptp(runs[0], axis=0).prod() > np.ptp(self.edge, axis=0).prod()):
                    self.edge = runs[0]


def pdf_runs(path):
    """For each page, its stroked runs in millimetres from the lower left corner."""
    traced = tree.fromstring(subprocess.run(["mutool", "trace", path], check=True, capture_output=True).stdout)
    for page in traced.iter("page"):
        box = [float(v) for v in page.get("mediabox").split()]
        pages = []
        for stroke in page.iter("stroke_path"):
            m = [float(v) for v in stroke.get("transform").split()]
            runs = []
            for step in stroke:
                v = {key: float(value) for key, value in step.attrib.items()}
                if step.tag == "moveto":
                    runs.append([np.array([v["x"], v["y"]])])
                elif step.tag == "lineto":
                    runs[-1].append(np.array([v["x"], v["y"]]))
                elif step.tag == "curveto":
                    runs[-1].extend(curve(runs[-1][-1], *(np.array([v[f"x{i}"], v[f"y{i}"]]) for i in (1, 2, 3))))
                else:
                    runs[-1].append(runs[-1][0])
            for run in runs:
                points = np.array(run)
                placed = np.stack([m[0] * points[:, 0] + m[2] * points[:, 1] + m[4], m[1] * points[:, 0] + m[3] * points[:, 1] + m[5]], axis=1)
                pages.append((placed * [1, -1] + [0, box[3]]) * MM)
        yield np.array(box[2:]) * MM, pages


def segments_of(runs):
    return np.concatenate([np.hstack([run[:-1], run[1:]]) for run in runs if len(run) > 1])


def farthest(points, segments):
    """The largest distance of any point from its nearest segment."""
    a, d = segments[:, :2], segments[:, 2:] - segments[:, :2]
    size = np.maximum((d**2).sum(axis=1), 1e-18)
    worst = 0.0
    for part in np.array_split(points, max(1, len(points) * len(segments) // 2_000_000)):
        e = part[:, None, :] - a
        t = np.clip((e * d).sum(axis=2) / size, 0, 1)
        worst = max(worst, np.sqrt((((e - t[..., None] * d) ** 2).sum(axis=2)).min(axis=1)).max(initial=0.0))
    return worst


def nearest(points, segments):
    """The least distance of any point from any segment."""
    a, d = segments[:, :2], segments[:, 2:] - segments[:, :2]
    e = points[:, None, :] - a
    t = np.clip((e * d).sum(axis=2) / np.maximum((d**2).sum(axis=1), 1e-18), 0, 1)
    return np.sqrt(((e - t[..., None] * d) ** 2).sum(axis=2)).min()


def along(line):
    """A line's points, and more between them: one each 3 mm."""
    points = [line[:1]]
    for a, b in zip(line, line[1:]):
        count = max(1, math.ceil(math.dist(a, b) / 3))
        points.append(a + (b - a) * np.linspace(0, 1, count + 1)[1:, None])
    return np.concatenate(points)


class Dxf:
    """Entities of a DXF in the file's order, as ezdxf reads them: [(layer, kind, closed, run)]."""

    def __init__(self, path):
        self.document = ezdxf.readfile(path)
        self.faults = [fault.message for found in [self.document.audit()] for fault in [*found.errors, *found.fixes]]
        self.entities = [(entity.dxf.layer, entity.dxftype(), entity.dxftype() == "CIRCLE" or getattr(entity, "is_closed", False), self.run_of(entity))
                         for entity in self.document.modelspace()]
        self.circles = [(entity.dxf.layer, np.array(entity.dxf.center)[:2], entity.dxf.radius) for entity in self.document.modelspace().query("CIRCLE")]

    @staticmethod
    def run_of(entity):
        path = ezdxf.path.make_path(entity)
        straight = not path.has_curves
        return np.array([(p.x, p.y) for p in (path.control_vertices() if straight else path.flattening(0.001))])

    def runs(self, layer):
        return [run for on, _, _, run in self.entities if on == layer.upper()]


def largest(runs):
    """The run with the largest box round it: a part's outline."""
    return max(runs, key=lambda run: np.ptp(run, axis=0).prod())
