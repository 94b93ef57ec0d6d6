# SPDX-License-Identifier: MIT
"""What the packet has for the bench, read back with ezdxf, MuPDF and Python's XML reader: mirrored work, kerf, circles, the
order of files for machines, and what the printer is told.
"""
import re
import unittest

import fitz
import numpy as np

from drawings import MM, Dxf, Svg, pdf_runs
from program import DESIGNS, ERROR, FINE, LEVEL, WALL, WITH_WARNINGS, Bench, run

TENONS = "gnomon: {thickness: 6 mm, joint: tenons, tenons: 2}\n"
SLATE = LEVEL.replace("360 mm", "360 mm, thickness: 20 mm") + TENONS


def dxf_runs(path):
    """[(layer, points)] of a DXF without faults."""
    read = Dxf(path)
    assert not read.faults, (path, read.faults)
    return [(layer, run) for layer, _, _, run in read.entities]


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
        _, at, radius = max(Dxf(folder / "plate.dxf").circles, key=lambda circle: circle[2])
        self.assertAlmostEqual(radius, 1000, delta=0.001)
        np.testing.assert_allclose(at, middle, atol=0.001)
        size, runs = list(pdf_runs(folder / "sheets.pdf"))[-1]
        rim = max((r for r in runs if len(r) > 40), key=lambda r: np.ptp(r, axis=0).prod())
        at = (rim.min(axis=0) + rim.max(axis=0)) / 2
        self.assertLess(np.abs(np.hypot(*(rim - at).T) - 1000).max(), 0.001)

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
