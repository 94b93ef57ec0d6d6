# SPDX-License-Identifier: MIT
"""What the packet has for the bench, read back with ezdxf, MuPDF and Python's XML reader: gnomon, gauge, holes, mirrored
work, kerf, circles, setting out, and what the printer is told.

Each is held against numbers.json or the design, by a route of its own: angles from the corners of the parts, the setting-out
table from the DXF's lines.
"""
import csv
import math
import re
import unittest

import ezdxf
import fitz
import numpy as np

from packet_test import MM, Svg, pdf_runs, svg_runs
from program import DESIGNS, ERROR, FINE, LEVEL, WALL, WITH_WARNINGS, Bench, run, strict_json

TENONS = "gnomon: {thickness: 6 mm, joint: tenons, tenons: 2}\n"
SLATE = LEVEL.replace("360 mm", "360 mm, thickness: 20 mm") + TENONS


def dxf_runs(path):
    """[(layer, points)] of a DXF without faults; arcs in steps of a degree or less."""
    document = ezdxf.readfile(path)
    faults = document.audit()
    assert not faults.errors and not faults.fixes, (path, faults.errors, faults.fixes)
    runs = []
    for entity in document.modelspace():
        pieces = entity.virtual_entities() if entity.dxftype() == "POLYLINE" else [entity]
        points = []
        for piece in pieces:
            if piece.dxftype() == "LINE":
                found = [piece.dxf.start, piece.dxf.end]
            else:
                assert piece.dxftype() in ("ARC", "CIRCLE"), piece.dxftype()
                found = list(piece.flattening(1e-3))
                if points and points[-1].distance(found[0]) > points[-1].distance(found[-1]):
                    found.reverse()
            points += found if not points else found[1:]
        runs.append((entity.dxf.layer, np.array([[p.x, p.y] for p in points])))
    return runs


def sides(points):
    """Straight sides of a closed run: (length, direction in degrees from 0 to 180, first end, last end)."""
    made = []
    for a, b in zip(points, points[1:]):
        d = b - a
        if math.hypot(*d) > 5:  # arcs are in shorter steps
            made.append((math.hypot(*d), math.degrees(math.atan2(d[1], d[0])) % 180, a, b))
    return made


def area(points):
    x, y = points[:, 0], points[:, 1]
    return 0.5 * np.abs(np.dot(x, np.roll(y, -1)) - np.dot(y, np.roll(x, -1)))


class ForTheBench(Bench):
    def made(self, text, name="packet", *more):
        design = self.design(text, name + ".yaml") if isinstance(text, str) else text
        folder = self.folder / name
        status, out, err = run("make", design, "--to", folder, *more)
        self.assertIn(status, (FINE, WITH_WARNINGS), err)
        return folder

    @staticmethod
    def numbers(folder):
        return strict_json((folder / "numbers.json").read_text())

    def outline(self, folder, stem):
        """The part's outline in SVG and in DXF; both are in millimetres, y up."""
        svg = [run for layer, _, runs in Svg(folder / f"{stem}.svg").strokes if layer == "cut" for run in runs]
        dxf = [points for layer, points in dxf_runs(folder / f"{stem}.dxf") if layer.lower() == "cut"]
        self.assertEqual(len(svg), len(dxf), stem)
        return [max(runs, key=lambda r: np.ptp(r, axis=0).prod()) for runs in (svg, dxf)]

    def test_angles_of_gnomon_and_gauge(self):
        for text in (SLATE, WALL + "gnomon: {thickness: 4 mm}\n", LEVEL.replace("54.2", "-33.9") + "gnomon: {thickness: 5 mm, joint: flange}\n"):
            folder = self.made(text, f"angles{len(text)}")
            height = self.numbers(folder)["style"]["height_deg"]
            for stem in ("gnomon", "gauge"):
                for points in self.outline(folder, stem):
                    level = max((s for s in sides(points) if min(s[1], 180 - s[1]) < 1e-3), key=lambda s: s[0])  # foot, or base
                    sloping = [s for s in sides(points) if 0.5 * level[0] < s[0] and 1 < s[1] < 179]
                    best = min(abs(min(s[1], 180 - s[1]) - height) for s in sloping)
                    self.assertLess(best, 0.01, (text, stem))

    def test_plate_and_gnomon_have_their_joint_in_one_place(self):
        folder = self.made(SLATE)
        numbers = self.numbers(folder)
        plate = Svg(folder / "plate.svg")
        middle = (plate.edge.min(axis=0) + plate.edge.max(axis=0)) / 2
        centre = middle + np.array(numbers["style"]["centre_mm"]) - numbers["plate"]["middle_mm"]
        slots = sorted((run for layer, _, runs in plate.strokes if layer == "cut" for run in runs if np.ptp(run, axis=0).max() < 100), key=lambda r: r[:, 1].min())
        self.assertEqual(len(slots), 2)
        for outline in self.outline(folder, "gnomon"):
            # The face of the plate is the level of the foot between the tenons; the style's line meets it at the dial's centre.
            level = [s for s in sides(outline) if min(s[1], 180 - s[1]) < 1e-3]
            low = min(s[2][1] for s in level)
            foot = min(s[2][1] for s in level if s[2][1] > low + 1)
            tenons = sorted((s for s in level if abs(s[2][1] - low) < 1e-3), key=lambda s: min(s[2][0], s[3][0]))
            self.assertEqual(len(tenons), 2)
            height = numbers["style"]["height_deg"]
            style = min(sides(outline), key=lambda s: abs(min(s[1], 180 - s[1]) - height))
            a, b = style[2], style[3]
            at_centre = a[0] + (b - a)[0] * (foot - a[1]) / (b - a)[1]
            away = sorted(((min(s[2][0], s[3][0]) - at_centre, max(s[2][0], s[3][0]) - at_centre) for s in tenons), key=lambda t: abs(t[0]))
            away = [tuple(sorted(map(abs, t))) for t in away]
            for slot, tenon in zip(slots, away):
                self.assertAlmostEqual(np.ptp(slot[:, 0]), numbers["gnomon"]["thickness_mm"], delta=0.5)
                self.assertAlmostEqual((slot[:, 0].min() + slot[:, 0].max()) / 2, middle[0], delta=0.01)
                low_gap = tenon[0] - (slot[:, 1].min() - centre[1])
                high_gap = (slot[:, 1].max() - centre[1]) - tenon[1]
                self.assertAlmostEqual(low_gap, high_gap, delta=0.01)  # the fit's play, the same at both ends
                self.assertTrue(0 <= low_gap < 0.3, low_gap)

    def test_flange_and_plate_have_their_holes_in_one_place(self):
        folder = self.made(LEVEL + "gnomon: {thickness: 5 mm, joint: flange, holes: 4}\n")

        def holes(name):
            return sorted(tuple(np.round(run.mean(axis=0), 6)) for layer, _, runs in Svg(folder / name).strokes if layer in ("drill", "cut")
                          for run in runs if len(run) > 20 and np.ptp(run, axis=0).max() < 15)
        flange = next(p.name for p in folder.iterdir() if "flange" in p.name and p.suffix == ".svg")
        apart = [sorted(math.dist(a, b) for i, a in enumerate(found) for b in found[i + 1:]) for found in (holes("plate.svg"), holes(flange))]
        self.assertGreaterEqual(len(apart[0]), 6)
        np.testing.assert_allclose(*apart, atol=0.01)

    def letter_f(self, runs):
        """The largest filled contour that is no border: the motto's F."""
        return max((r for r in runs if 29 < np.ptp(r, axis=0)[1] < 40), key=lambda r: np.ptp(r, axis=0)[1])

    def test_an_f_through_all_formats_and_in_the_mirror(self):
        text = WALL + "lettering: {motto: F, motto height: 30 mm}\nprint: {own size: yes%s}\ncutting: {mirrored: %s}\n"
        places = {}
        for hand, folder in (("plain", self.made(text % ("", "no"), "plain")), ("mirrored", self.made(text % (", mirrored: yes", "yes"), "mirror"))):
            tail = "" if hand == "plain" else "-mirrored"
            svg = Svg(folder / f"plate{tail}.svg")
            corner = svg.edge.min(axis=0)
            places[hand, "svg"] = self.letter_f([r for _, _, runs in svg.fills for r in runs]) - corner
            dxf = dxf_runs(folder / f"plate{tail}.dxf")
            edge = max((p for layer, p in dxf if layer.lower() == "cut"), key=lambda p: np.ptp(p, axis=0).prod())
            box = lambda p: np.array([p.min(axis=0), p.max(axis=0)])
            places[hand, "dxf"] = min((p - edge.min(axis=0) for _, p in dxf), key=lambda p: np.abs(box(p) - box(places[hand, "svg"])).max())
            with fitz.open(folder / f"sheets{tail}.pdf") as book:
                page = next(p for p in reversed(list(book)) if p.rect.width * MM > 590)
                self.assertEqual("MIRRORED" in page.get_text(), hand == "mirrored")
                drawn = page.get_drawings()
                rim = max((d["rect"] for d in drawn if abs(d["rect"].width * MM - 600) < 0.1), key=lambda r: r.width * r.height)
                shapes = [d["rect"] for d in drawn if d["fill"] and 29 < d["rect"].height * MM < 40 and d["rect"].width * MM < 40]
                self.assertEqual(len(shapes), 1)
                places[hand, "pdf"] = np.array([[(shapes[0].x0 - rim.x0) * MM, (rim.y1 - shapes[0].y1) * MM], [(shapes[0].x1 - rim.x0) * MM, (rim.y1 - shapes[0].y0) * MM]])
            for kind in ("svg", "dxf"):
                box = np.array([places[hand, kind].min(axis=0), places[hand, kind].max(axis=0)])
                np.testing.assert_allclose(box, places[hand, "pdf"], atol=0.02)  # MuPDF's rectangles are in single precision
        # An F has more ink to the left of its middle; in the mirror to the right, about the plate's own middle.
        for kind in ("svg", "dxf"):
            plain, mirrored = places["plain", kind], places["mirrored", kind]
            lean = [np.mean([p[0] for p in f]) - (f[:, 0].min() + f[:, 0].max()) / 2 for f in (plain, mirrored)]
            self.assertAlmostEqual(lean[0], -lean[1], delta=0.01)
            self.assertGreater(abs(lean[0]), 0.3)
            self.assertAlmostEqual(area(plain), area(mirrored), delta=0.05)
            np.testing.assert_allclose(600 - plain[:, 0].max(), mirrored[:, 0].min(), atol=0.005)
            np.testing.assert_allclose(plain[:, 1].min(), mirrored[:, 1].min(), atol=0.005)

    def test_a_circle_of_a_metre_radius(self):
        folder = self.made(LEVEL.replace("360 mm", "2 m"))
        plate = Svg(folder / "plate.svg")
        rim = plate.edge
        middle = (rim.min(axis=0) + rim.max(axis=0)) / 2
        self.assertLess(np.abs(np.hypot(*(rim - middle).T) - 1000).max(), 0.001)
        _, points = max(dxf_runs(folder / "plate.dxf"), key=lambda r: np.ptp(r[1], axis=0).prod() if r[0].lower() == "cut" else 0)
        at = (points.min(axis=0) + points.max(axis=0)) / 2
        self.assertLess(np.abs(np.hypot(*(points - at).T) - 1000).max(), 0.001)
        size, runs = list(pdf_runs(folder / "sheets.pdf"))[-1]
        rim = max((r for r in runs if len(r) > 40), key=lambda r: np.ptp(r, axis=0).prod())
        at = (rim.min(axis=0) + rim.max(axis=0)) / 2
        self.assertLess(np.abs(np.hypot(*(rim - at).T) - 1000).max(), 0.001)

    def test_setting_out_again_from_the_dxf(self):
        folder = self.made(WALL)
        lines = [points for layer, points in dxf_runs(folder / "plate.dxf") if layer.lower() == "engrave" and len(points) == 2]
        edge = max((p for layer, p in dxf_runs(folder / "plate.dxf") if layer.lower() == "cut"), key=lambda p: np.ptp(p, axis=0).prod())
        corner = edge.min(axis=0)
        with open(folder / "setting-out.csv", newline="") as table:
            rows = list(csv.DictReader(table))
        value = lambda row, key: float(row[key])
        pole = next(np.array([value(r, "x_mm"), value(r, "y_mm")]) for r in rows if r["line"] == "pole")
        circle = next(value(r, "radius_mm") for r in rows if r["line"] == "chord circle")
        seen = 0
        for row in rows:
            if not row["line"].startswith("hour line") or row["point"] not in ("outer end", "inner end") and not row["point"].startswith("meets"):
                continue
            at = np.array([value(row, "x_mm"), value(row, "y_mm")])
            if row["point"].startswith("meets"):
                ends = [r for r in rows if r["line"] == row["line"] and r["point"] in ("outer end", "inner end")]
                near = np.array([value(ends[-1], "x_mm"), value(ends[-1], "y_mm")])
                line = min(lines, key=lambda p: np.abs(p - corner - near).sum(axis=1).min())
                a, d = line[0] - corner, (line[1] - line[0]) / math.dist(*line)
                meets = {"bottom edge": (1, 0.0), "left edge": (0, 0.0), "right edge": (0, 600.0), "top edge": (1, 750.0)}[row["border"]]
                cross = a + d * (meets[1] - a[meets[0]]) / d[meets[0]]
                self.assertLess(math.dist(cross, at), 0.08, row)
                start = {"lower left corner": (0, 0), "lower right corner": (600, 0), "upper left corner": (0, 750), "upper right corner": (600, 750)}[row["from"]]
                self.assertAlmostEqual(math.dist(cross, start), value(row, "along_mm"), delta=0.051)
                found = cross
            else:
                found = min((p - corner for line in lines for p in line), key=lambda p: math.dist(p, at))
                self.assertLess(math.dist(found, at), 0.075, row)
            away = found - pole
            self.assertAlmostEqual(math.hypot(*away), value(row, "radius_mm"), delta=0.13)  # the pole too is rounded
            turn = math.degrees(math.atan2(-away[0], -away[1]))  # from straight down, clockwise as the reader sees it
            if math.hypot(*away) > 100:
                self.assertAlmostEqual(turn, value(row, "angle_deg"), delta=0.06)
            self.assertAlmostEqual(2 * circle * math.sin(math.radians(abs(value(row, "angle_deg"))) / 2), value(row, "chord_mm"), delta=0.051)
            seen += 1
        self.assertGreater(seen, 100)

    def test_kerf(self):
        plain, cut = (self.made(SLATE + f"cutting: {{kerf: {kerf}}}\n", name) for kerf, name in (("0 mm", "plain"), ("0.4 mm", "cut")))
        before, after = Svg(plain / "plate.svg"), Svg(cut / "plate.svg")
        np.testing.assert_allclose(np.ptp(after.edge, axis=0), np.ptp(before.edge, axis=0) + 0.4, atol=1e-3)
        shift = (after.edge.min(axis=0) + after.edge.max(axis=0)) / 2 - (before.edge.min(axis=0) + before.edge.max(axis=0)) / 2
        lines = [[run for layer, _, runs in svg.strokes if layer == "engrave" for run in runs] for svg in (before, after)]
        for a, b in zip(*lines):
            np.testing.assert_allclose(a + shift, b, atol=2e-4)
        slots = [[run for layer, _, runs in svg.strokes if layer == "cut" for run in runs if np.ptp(run, axis=0).max() < 100] for svg in (before, after)]
        for a, b in zip(*slots):
            np.testing.assert_allclose(np.ptp(a, axis=0) - 0.4, np.ptp(b, axis=0), atol=1e-3)

    def test_files_for_machines_are_in_order_and_draw_nothing_twice(self):
        order = ["guide", "engrave", "fill", "score", "drill", "cut"]
        for design in DESIGNS:
            folder = self.made(design, design.stem)
            for path in folder.glob("*.dxf"):
                runs = dxf_runs(path)
                layers = [order.index(layer.lower()) for layer, _ in runs if layer.lower() in order]
                self.assertEqual(layers, sorted(layers), path)
                keys = [(layer, frozenset(map(tuple, np.round(points, 3)))) for layer, points in runs]
                twice = [key for key in set(keys) if keys.count(key) > 1]
                self.assertFalse(twice, (path, twice[:3]))
                holes = [(i, p) for i, (layer, p) in enumerate(runs) if layer.lower() == "cut"]
                if holes:  # the largest outline comes last
                    self.assertEqual(max(holes, key=lambda h: np.ptp(h[1], axis=0).prod())[0], holes[-1][0], path)

    def test_a_printer_that_is_off_is_met_on_paper_alone(self):
        """100 mm that came out as 99 mm across the feed, and as 100.5 mm along it."""
        plain = self.made(LEVEL, "plain")
        told = self.made(LEVEL + "print: {across feed: [100 mm, 99 mm], along feed: [100 mm, 100.5 mm]}\n", "told")
        for name in ("plate.svg", "plate.dxf", "setting-out.csv"):
            self.assertEqual((plain / name).read_bytes(), (told / name).read_bytes())

        def tile(folder):
            titles = [title for _, title, _ in fitz.open(folder / "sheets.pdf").get_toc()]
            size, runs = list(pdf_runs(folder / "sheets.pdf"))[titles.index("Plate, sheet A1")]
            return size, [run for run in runs if len(run) == 2]

        def bars(runs):
            """Level and upright bars: lines of 100 mm, or what became of them."""
            lengths = [np.abs(run[1] - run[0]) for run in runs]
            return {tuple(np.round(length, 2)) for length in lengths if 95 < length.max() < 105 and length.min() < 1e-6}
        size, runs = tile(plain)
        self.assertEqual(bars(runs), {(100.0, 0.0), (0.0, 100.0)})
        size, runs = tile(told)
        across, along = (0, 1) if size[0] < size[1] else (1, 0)  # across is the short side
        wanted = np.zeros((2, 2))
        wanted[0][across], wanted[1][along] = 100 / 0.99, 100 / 1.005
        self.assertEqual(bars(runs), {tuple(np.round(length, 2)) for length in wanted})

    def test_layers_that_a_viewer_shows_by_themselves(self):
        with fitz.open(self.made(LEVEL, "plain") / "sheets.pdf") as book:
            self.assertFalse(book.get_ocgs())
        folder = self.made(SLATE + "print: {layers: in the viewer}\n", "layered")
        with fitz.open(folder / "sheets.pdf") as book:
            groups = {group["name"]: number for number, group in book.get_ocgs().items()}
            self.assertLessEqual({"cut", "engrave"}, groups.keys())
            number = next(p.number for p in book if p.rect.width * MM > 350)

            def ink(off):
                book.set_layer(-1, off=off)
                with fitz.open("pdf", book.tobytes()) as again:
                    return 255 - np.frombuffer(again[number].get_pixmap(dpi=40).samples, np.uint8).astype(int)
            whole, without, bare = (ink(off).sum() for off in ([], [groups["engrave"]], list(groups.values())))
        self.assertGreater(whole, 1.5 * without)
        self.assertGreater(without, bare)

    def test_one_sheet_again_and_some_layers_alone(self):
        design = self.design(LEVEL + "print: {layers: together}\n")
        folder = self.folder / "packet"
        self.assertIn(run("make", design, "--to", folder)[0], (FINE, WITH_WARNINGS))
        before = {path.name: path.read_bytes() for path in folder.iterdir()}
        self.assertEqual(run("make", design, "--to", folder, "--sheet", "B2")[0], FINE)
        self.assertEqual(before, {path.name: path.read_bytes() for path in folder.iterdir() if path.name != "sheets-B2.pdf"})
        whole, one = list(pdf_runs(folder / "sheets.pdf")), list(pdf_runs(folder / "sheets-B2.pdf"))
        titles = [title for _, title, _ in fitz.open(folder / "sheets.pdf").get_toc()]
        self.assertEqual(len(one), 1)
        same = whole[titles.index("Plate, sheet B2")][1]
        self.assertEqual(len(one[0][1]), len(same))
        for a, b in zip(one[0][1], same):
            np.testing.assert_allclose(a, b, atol=1e-3)
        self.assertEqual(run("make", design, "--to", folder, "--sheet", "Q9")[0], ERROR)
        self.assertEqual(run("make", design, "--to", folder, "--layers", "cut")[0], FINE)
        cut = list(pdf_runs(folder / "sheets-cut.pdf"))
        self.assertTrue(cut)
        self.assertLess(sum(len(runs) for _, runs in cut), 0.5 * sum(len(runs) for _, runs in whole))

    def test_the_calibration_sheet(self):
        status, _, err = run("calibrate", self.folder / "printer.pdf")
        self.assertEqual((status, err), (FINE, ""))
        [(size, runs)] = list(pdf_runs(self.folder / "printer.pdf"))
        np.testing.assert_allclose(size, (210, 297), atol=0.01)
        lengths = sorted({round(float(np.abs(r[1] - r[0]).max()), 2) for r in runs if len(r) == 2 and np.abs(r[1] - r[0]).min() < 1e-6})
        with fitz.open(self.folder / "printer.pdf") as book:
            named = [float(n) for n in re.findall(r"(\d+(?:\.\d+)?) mm", book[0].get_text())]
        long = [length for length in lengths if length > 120]
        self.assertGreaterEqual(len(long), 2)  # one bar each way
        for length in long[-2:]:
            self.assertTrue(any(abs(length - n) < 0.01 for n in named), (length, named))
        status, _, err = run("make", self.design(LEVEL + "print: {across feed: [100 mm, 130 mm]}\n"))
        self.assertEqual(status, ERROR)
        self.assertIn("across feed", err)


if __name__ == "__main__":
    unittest.main()
