# SPDX-License-Identifier: MIT
"""Setting out by hand, reckoned again from the lines of the DXF as ezdxf reads them.

Each end is looked for among the drawn lines; then distances, angles, chords and crossings come from the drawn lines' own
digits, and what a table or a sentence says may differ by its last printed figure only. The centre of each half-dial is where
the drawn lines meet, the edge is the outline that is cut.
"""
import csv
import math
import re
import unittest

import fitz
import numpy as np

from drawings import Dxf, largest
from program import FINE, PLACE, SOURCE, WITH_WARNINGS, Bench, run, strict_json

WALL = (PLACE + "dial: {kind: wall, facing: S 23° E}\nplate: {width: 600 mm, height: 800 mm, thickness: 12 mm}\n"
        "gnomon: {thickness: 6 mm, joint: flange, holes: 2, flange width: 50 mm}\nhours: {divide: 60 min}\n")
READ_MM = 0.005  # what follows from the DXF's four decimals, where a line is carried on to thirty times its length


def cross(a, b):
    return a[0] * b[1] - a[1] * b[0]


def length_of(text):
    """A printed length in millimetres, and how far its last figure leaves it open."""
    if "/" in text or re.fullmatch(r"-?\d+", text):
        parts = [float(np.divide(*map(float, part.split("/")))) if "/" in part else float(part) for part in text.lstrip("-").split()]
        return 25.4 * sum(parts) * (-1 if text.startswith("-") else 1), 25.4 / 128
    return float(text), 0.05


class Edge:
    """The plate's cut edge with the names that a mason measures by: corners clockwise from the lower left one, or a round edge's marks."""

    def __init__(self, dxf):
        circles = [(middle, radius) for layer, middle, radius in dxf.circles if layer == "CUT"]
        self.middle, self.radius = max(circles, key=lambda circle: circle[1], default=(None, None))
        if self.radius:
            up, right = np.array([0, self.radius]), np.array([self.radius, 0])
            self.marks = {"middle of the plate": self.middle, "top mark": self.middle + up, "right-hand mark": self.middle + right}
            return
        outline = largest(dxf.runs("cut"))[:-1]
        if sum(cross(a, b) for a, b in zip(outline, np.roll(outline, -1, axis=0))) > 0:
            outline = outline[::-1]
        self.corners = np.roll(outline, -min(range(len(outline)), key=lambda i: (round(outline[i].sum(), 2), outline[i][1])), axis=0)
        upright = len(outline) == 4 and all(min(abs(d)) < READ_MM for d in np.diff(outline, axis=0))
        names = ["lower left corner", "upper left corner", "upper right corner", "lower right corner"] if upright else [f"corner {chr(65 + i)}" for i in range(len(outline))]
        self.marks = dict(zip(names, self.corners))

    def leaves(self, a, b):
        """Where a line from a through b crosses the edge beyond both."""
        d = (b - a) / math.dist(a, b)
        if self.radius:
            e = a - self.middle
            return a + d * (-(e @ d) + math.sqrt((e @ d) ** 2 - e @ e + self.radius**2))
        ways = [cross(p - a, q - p) / cross(d, q - p) for p, q in zip(self.corners, np.roll(self.corners, -1, axis=0))
                if abs(cross(d, q - p)) > 1e-9 and -1e-9 <= cross(p - a, d) / cross(d, q - p) <= 1 + 1e-9]
        return a + d * min(way for way in ways if way > math.dist(a, b) - 1e-6)


class SettingOut(Bench):
    def near(self, printed, true, what):
        value, open_by = length_of(printed)
        self.assertLess(abs(value - true), open_by + READ_MM, what)

    def setUp(self):
        super().setUp()
        self.counted = {}

    def read(self, design):
        folder = self.folder / "packet"
        status, _, err = run("make", design, "--to", folder)
        self.assertIn(status, (FINE, WITH_WARNINGS), err)
        dxf, numbers = Dxf(folder / "plate.dxf"), strict_json((folder / "numbers.json").read_text())
        with (folder / "setting-out.csv").open(encoding="utf-8", newline="") as file:
            rows = [{key.removesuffix("_mm").removesuffix("_in"): value for key, value in row.items()} for row in csv.DictReader(file)]
        with fitz.open(folder / "sheets.pdf") as document:
            pages = [page.get_text() for page in document]
        words = " ".join(" ".join(pages).split())
        return dxf, numbers, rows, words[words.index("Prove it before you cut"):]

    def held_against_the_dxf(self, design):
        dxf, numbers, rows, words = self.read(design)
        edge = Edge(dxf)
        [datum] = [edge.marks[row["point"]] for row in rows if row["line"] == "datum"]
        runs = [run for run in dxf.runs("engrave") if len(run) >= 2 and math.dist(run[0], run[-1]) > 1e-3]
        ends = np.array([[*run[0], *run[-1]] for run in runs])
        turn = -1 if numbers["plate"]["normal_altitude_deg"] == 90 and numbers["site"]["latitude_deg"] < 0 else 1
        box = largest(dxf.runs("cut"))
        middle = (box.min(axis=0) + box.max(axis=0)) / 2
        placed = lambda point: middle + turn * (np.array(point) - numbers["plate"]["middle_mm"])
        zero = np.array([0, {"straight up": 1, "straight down": -1}[next(row["point"] for row in rows if row["line"] == "chord circle")]])
        radius_of_chords = length_of(next(row["radius"] for row in rows if row["line"] == "chord circle"))[0]

        def drawn(first, last):
            """The drawn run between two printed points, from the first to the last."""
            p, slack = [], 0
            for row in (first, last):
                (x, open_by), (y, _) = length_of(row["x"]), length_of(row["y"])
                p, slack = [*p, datum[0] + x, datum[1] + y], open_by + READ_MM
            for order in ([0, 1, 2, 3], [2, 3, 0, 1]):
                off = np.abs(ends[:, order] - p).max(axis=1)
                if off.min() < slack:
                    found = runs[off.argmin()]
                    return found if order[0] == 0 else found[::-1]
            self.fail(f"no line is drawn from {first} to {last}")

        # Gathered line by line: the rows from one end to the other, with those before and after that meet the edge.
        pieces, open_end, before = [], None, []
        for row in rows:
            if row["point"] in ("inner end", "goes on", "first end"):
                open_end, inside = row, []
            elif row["point"] in ("outer end", "breaks off", "last end"):
                pieces.append((open_end, row, drawn(open_end, row), inside, before, []))
                before, open_end = [], None
            elif open_end is not None:
                inside.append(row)
            elif row["point"].startswith("meets the "):
                same = pieces and pieces[-1][1]["line"] == row["line"] and not pieces[-1][5]
                (pieces[-1][5] if same else before).append(row)
        self.assertGreater(len(pieces), 10)

        # The centres, from the lines that run from them.
        poles = {"nodus' foot": placed([0, 0])}
        if numbers["style"]["centre_mm"]:
            poles["dial's centre"] = placed(numbers["style"]["centre_mm"])
        for name in {row["pole"] for row in rows if row["pole"].endswith(" centre") and row["pole"] != "dial's centre"}:
            lines = [line for first, _, line, *_ in pieces if first["pole"] == name and len(line) == 2 and first["point"] != "first end"]
            self.assertGreater(len(lines), 3)
            square = np.array([[a[1] - b[1], b[0] - a[0]] / np.hypot(*(b - a)) for a, b in lines])
            poles[name] = np.linalg.lstsq(square, np.array([s @ line[0] for s, line in zip(square, lines)]), rcond=None)[0]
            self.assertLess(np.abs(square @ poles[name] - [s @ line[0] for s, line in zip(square, lines)]).max(), READ_MM)
        for row in rows:
            if row["line"] == "pole":
                self.near(row["x"], poles[row["point"]][0] - datum[0], row)
                self.near(row["y"], poles[row["point"]][1] - datum[1], row)

        def held(row, at):
            self.near(row["x"], at[0] - datum[0], row)
            self.near(row["y"], at[1] - datum[1], row)
            ray = at - poles[row["pole"]]
            self.near(row["radius"], np.hypot(*ray), row)
            angle = -math.degrees(math.atan2(cross(zero, ray), zero @ ray))
            open_by = 0.00006 + math.degrees(READ_MM / max(np.hypot(*ray), 1))
            self.assertLess(abs((float(row["angle_deg"]) - angle + 180) % 360 - 180), open_by, row)
            degrees, minutes = re.fullmatch(r"-?(\d+)° (\d\d\.\d)'", row["angle"]).groups()
            self.assertAlmostEqual(int(degrees) + float(minutes) / 60, abs(float(row["angle_deg"])), delta=0.05001 / 60 + 0.0001)
            self.assertEqual(row["angle"].startswith("-"), float(row["angle_deg"]) < -0.0008, row)
            self.near(row["chord"], 2 * radius_of_chords * abs(math.sin(math.radians(angle) / 2)), row)
            if row["border"]:
                self.near(row["along"], math.dist(edge.marks[row["from"].split(", ")[0]], at), row)

        for first, last, line, inside, before, after in pieces:
            held(first, line[0])
            held(last, line[-1])
            for rows_out, a, b in ((before, line[-1], line[0]), (after, line[0], line[-1])):
                for row in rows_out:
                    self.assertTrue(row["border"])
                    held(row, edge.leaves(a, b))
                    self.counted["meets"] = self.counted.get("meets", 0) + 1
            for row in inside:
                hours = [other for start, _, other, *_ in pieces if "on " + start["line"] == row["point"] and start["point"] != "first end"]
                at = min(self.crossings(line, hours), key=lambda p: math.dist(p, datum + [length_of(row["x"])[0], length_of(row["y"])[0]]))
                held(row, at)
                self.counted["on"] = self.counted.get("on", 0) + 1
        holes = [row for row in rows if row["point"] == "drill"]
        drilled = [(middle, radius) for layer, middle, radius in dxf.circles if layer == "DRILL"]
        self.assertEqual(len(holes), len(drilled))
        for row in holes:
            at, radius = min(drilled, key=lambda hole: math.dist(hole[0], datum + [length_of(row["x"])[0], length_of(row["y"])[0]]))
            held(row, at)
            self.near(row["diameter"], 2 * radius, row)
        self.counted["holes"] = self.counted.get("holes", 0) + len(holes)
        self.proofs(words, edge, pieces)

    @staticmethod
    def crossings(line, others):
        found = []
        for c, d in ((other[0], other[-1]) for other in others):
            for a, b in zip(line, line[1:]):
                turn = cross(b - a, d - c)
                if abs(turn) > 1e-12 and -1e-6 <= cross(c - a, d - c) / turn <= 1 + 1e-6 and -1e-3 <= cross(c - a, b - a) / turn <= 1.001:
                    found.append(a + (b - a) * cross(c - a, d - c) / turn)
        return found

    def proofs(self, words, edge, pieces):
        """The sentences at the end of the sheets, which say each thing once."""
        words = re.sub(r"\([\d /]+ in\)", "", words).replace("  ", " ")
        if edge.radius:
            [across] = re.findall(r"the edge is ([\d.]+) mm across, every way", words)
            self.near(across, 2 * edge.radius, "across")
        elif "lower left corner" in edge.marks:
            [diagonals] = re.findall(r"both diagonals of the edge measure ([\d.]+) mm", words)
            for i in (0, 1):
                self.near(diagonals, math.dist(edge.corners[i], edge.corners[i + 2]), "diagonals")
        else:
            diagonals = re.findall(r"corner A to (corner [B-Z]) measures ([\d.]+) mm", words)
            self.assertEqual(len(diagonals), len(edge.corners) - 3)
            for corner, length in diagonals:
                self.near(length, math.dist(edge.corners[0], edge.marks[corner]), corner)
        hours = {}
        for first, last, line, *_ in pieces:
            label = first["line"].removeprefix("hour line ")
            if first["point"] != "first end" and re.fullmatch(r"[IVX]+|\d+", label):
                hours.setdefault(label, []).append(line)
        mark = "(" + "|".join(edge.marks) + ")"
        reach = re.findall(rf"the outer end of the (\w+) line(?: from the \w+ centre)? is ([\d.]+) mm from the {mark} and ([\d.]+) mm from the {mark}", words)
        self.assertGreaterEqual({label for label, *_ in reach}, hours.keys())
        self.assertEqual(len(set(reach)), len(reach))
        for label, one, mark_one, two, mark_two in reach:
            for printed, name in ((one, mark_one), (two, mark_two)):
                true = [math.dist(line[-1], edge.marks[name]) for line in hours[label]]
                self.assertLess(min(abs(length_of(printed)[0] - value) for value in true), 0.05 + READ_MM, (label, printed, name))
        meets = re.findall(rf"the (\w+) line(?: from the \w+ centre)? meets the (?:[\w ]+?) ([\d.]+) mm (from|left of|right of) the {mark}", words)
        self.assertEqual(len(set(meets)), len(meets))
        self.assertTrue(meets)
        for label, printed, _, name in meets:
            true = [math.dist(edge.leaves(*ways), edge.marks[name]) for line in hours[label] for ways in ((line[0], line[-1]), (line[-1], line[0]))]
            self.assertLess(min(abs(length_of(printed)[0] - value) for value in true), 0.05 + READ_MM, (label, printed, name))

    def test_each_point_is_where_the_dxf_has_it(self):
        designs = [self.design(WALL, "wall.yaml")] + [SOURCE / "designs" / f"{name}.yaml" for name in (
            "skelder-beck-slate", "karoo-garden-south", "alder-creek-inches", "mirador-polar", "linden-slab-leaning", "crag-end-great-decliner")]
        for design in designs:
            with self.subTest(design.name):
                self.held_against_the_dxf(design)
        for what in ("meets", "on", "holes"):
            self.assertGreater(self.counted.get(what, 0), 3, what)


if __name__ == "__main__":
    unittest.main()
