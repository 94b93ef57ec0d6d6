# SPDX-License-Identifier: MIT
"""The correction plates of the example designs, read back from their SVG and held against numbers.json.

Where a plate's scales lie is found from its own lines: the field and the lines of minutes of a graph, the circles of a
ring. Lettering is outlines, so the words of a plate are tested where they are set.
"""
import math
import subprocess
import unittest

import ezdxf
import ezdxf.bbox
import fitz
import numpy as np

from drawings import Svg
from program import FINE, LEVEL, WITH_WARNINGS, Bench, run, strict_json

YEAR = 365.25


def day_of(code):
    """Noon of a date on the mean calendar: a quarter of a day for 29 February."""
    month, day = map(int, code.split("-"))
    if (month, day) == (2, 29):
        return 59.125
    lengths = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31]
    return sum(lengths[: month - 1]) + day - 0.5 + (0.25 if month > 2 else 0)


class Correction(Bench):
    def made(self, text, name):
        folder = self.folder / "packet"
        status, _, err = run("make", self.design(text), "--to", folder)
        self.assertIn(status, (FINE, WITH_WARNINGS), err)
        days = strict_json((folder / "numbers.json").read_text())["correction"]["days"]
        self.assertEqual(len(days), 366)
        return Svg(folder / f"{name}.svg"), [(day_of(entry["date"]), entry["add_min"]) for entry in days]

    def test_curve_of_a_graph(self):
        svg, days = self.made(LEVEL + "correction: {width: 300 mm, height: 160 mm}\ncutting: {line width: 0.4 mm, least gap: 0.5 mm}\n", "correction-graph")
        self.assertAlmostEqual(svg.width, 300, delta=0.5)
        strokes = [(width, run) for _, width, runs in svg.strokes for run in runs]
        curve = max(strokes, key=lambda stroke: stroke[0])[1]
        self.assertGreater(len(curve), 1000)
        left, right = curve[0][0], curve[-1][0]
        level = [(run[0][1], width) for width, run in strokes if len(run) == 2 and run[0][1] == run[1][1] and left - 0.01 <= min(run[:, 0]) and max(run[:, 0]) <= right + 0.01]
        heights = sorted({round(y, 3) for y, _ in level})
        pitch = np.diff(heights)
        self.assertLess(np.ptp(pitch), 0.003)  # a line a minute, evenly
        [nothing] = {round(y, 3) for y, width in level if abs(width - 0.4) < 1e-6}  # the widest of them
        minute = (heights[-1] - heights[0]) / (len(heights) - 1)
        x = [left + (right - left) * day / YEAR for day, _ in days]
        read = (np.interp(x, curve[:, 0], curve[:, 1]) - nothing) / minute
        worst = np.abs(read - [add for _, add in days]).max()
        self.assertLess(worst * minute, 0.01)  # mm
        self.assertLess(worst * 60, 2)  # seconds

    def test_marks_of_a_ring(self):
        svg, days = self.made(LEVEL + "correction: {form: ring, diameter: 260 mm}\ncutting: {line width: 0.3 mm, least gap: 0.4 mm}\n", "correction-ring")
        middle = (svg.edge.min(axis=0) + svg.edge.max(axis=0)) / 2
        strokes = [run - middle for layer, _, runs in svg.strokes if layer == "engrave" for run in runs]
        radii = sorted((np.hypot(*run[0]) for run in strokes if len(run) > 50), reverse=True)
        self.assertEqual(len(radii), 5)
        minutes_circle = radii[2]
        marks, stands = [], []
        for run in strokes:
            if len(run) != 2:
                continue
            outer, inner = sorted((np.hypot(*point) for point in run), reverse=True)
            a, b = sorted(run.tolist(), key=lambda point: -math.hypot(*point))
            self.assertLess(abs(a[0] * b[1] - a[1] * b[0]) / outer, 0.01)  # it points to the middle
            day = (math.atan2(a[0], a[1]) % (2 * math.pi)) / (2 * math.pi) * YEAR
            if abs(outer - minutes_circle) < 0.001 and inner > radii[3]:
                marks.append(day)
            elif abs(inner - minutes_circle) < 0.001 and outer < radii[1] - 0.01:
                stands.append(day)
        x, adds = [days[-1][0] - YEAR] + [day for day, _ in days] + [days[0][0] + YEAR], [days[-1][1]] + [add for _, add in days] + [days[0][1]]
        read = np.interp(marks, x, adds)
        self.assertGreater(len(marks), 60)
        self.assertLess(np.abs(read - np.round(read)).max() * 60, 2)  # each at a whole minute, within 2 s
        passed = {round(value) for value in read}
        self.assertEqual(passed, set(range(min(passed), max(passed) + 1)))  # and none left out
        self.assertEqual((min(passed), max(passed)), (math.ceil(min(adds)), math.floor(max(adds))))
        self.assertGreater(len(stands), 340)
        for day in stands:  # strokes for days stand at their noon
            self.assertTrue(any(abs(day - noon) < 0.005 for noon in (day_of(f"{m:02}-{d:02}") for m in range(1, 13) for d in range(1, 32) if d < 29 or m != 2)), day)

    def test_a_plate_has_its_own_pages(self):
        folder = self.folder / "packet"
        status, _, err = run("make", self.design(LEVEL + "correction: {form: table, width: 180 mm, height: 120 mm}\n"), "--to", folder)
        self.assertIn(status, (FINE, WITH_WARNINGS), err)
        svg = Svg(folder / "correction-table.svg")
        size = np.ptp(svg.edge, axis=0)
        self.assertAlmostEqual(size[0], 180, delta=0.001)
        self.assertAlmostEqual(size[1], 120, delta=0.001)
        self.assertEqual({layer for layer, _, _ in svg.strokes}, {"engrave", "cut"})
        dxf = ezdxf.readfile(folder / "correction-table.dxf")
        self.assertEqual(len(dxf.audit().errors), 0)
        box = ezdxf.bbox.extents(dxf.modelspace().query('*[layer=="CUT"]'))
        self.assertAlmostEqual(box.size.x, 180, delta=0.001)
        self.assertAlmostEqual(box.size.y, 120, delta=0.001)
        titles = subprocess.run(["mutool", "show", folder / "sheets.pdf", "outline"], check=True, capture_output=True, text=True).stdout
        for title in ('"For the owner"', '"Correction table"', '"Correction table, own size"'):
            self.assertIn(title, titles)

    def test_the_owner_is_told_how_to_come_to_the_clock(self):
        for hours, parts in (("sun", ["with the minutes of the day added", "On 11 February the dial shows 11:00. Add 22 minutes: clock time is 11:22.",
                                      "On 15 July the dial shows 15:00. Add 14 minutes, and add one hour for summer time: clock time is 16:14."]),
                             ("clock", ["nothing is added to it", "also add one hour for summer time"]),
                             ("unequal", ["no minutes of a date turn them into clock time"])):
            with self.subTest(hours):
                folder = self.folder / hours
                status, _, err = run("make", self.design(LEVEL + f"hours: {{time: {hours}}}\n"), "--to", folder)
                self.assertIn(status, (FINE, WITH_WARNINGS), err)
                self.assertFalse(list(folder.glob("correction*")))  # none was asked for
                with fitz.open(folder / "sheets.pdf") as document:
                    [card] = [page for page in document if "For the owner of this dial" in page.get_text()]
                    words = " ".join(card.get_text().split())
                for part in parts + ["Never look at the Sun", "Made by"]:
                    self.assertIn(part, words)


if __name__ == "__main__":
    unittest.main()
