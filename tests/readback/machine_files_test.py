# SPDX-License-Identifier: MIT
"""Files for machines, read back with ezdxf, Python's XML reader, MuPDF, and drawn by poppler and librsvg.

What is said of such files in docs/output-formats.md: kerf, order of work, nothing twice, true arcs or chords within their
tolerance, the same millimetres and the same hand in each format.
"""
import csv
import math
import re
import subprocess
import unittest

import fitz
import numpy as np

from drawings import Dxf, Svg, along, farthest, largest, pdf_runs, segments_of
from program import DESIGNS, FINE, PLACE, WITH_WARNINGS, Bench, run

ORDER = ["ENGRAVE", "FILL", "SCORE", "DRILL", "CUT"]  # what only marks the work before what cuts it loose
WALL = PLACE + "dial: {kind: wall, facing: S 23° E}\nplate: {width: 600 mm, height: 800 mm, thickness: 12 mm}\nhours: {divide: 60 min}\n"
JOINTS = {"tenons": "gnomon: {thickness: 6 mm, joint: tenons}\n", "flange": "gnomon: {thickness: 6 mm, joint: flange, holes: 2}\n"}


def area_and_middle(run):
    a, b = run, np.roll(run, -1, axis=0)
    turn = a[:, 0] * b[:, 1] - b[:, 0] * a[:, 1]
    return turn.sum() / 2, ((a + b) * turn[:, None]).sum(axis=0) / (3 * turn.sum())


def inside(point, run):
    """By the crossings of a ray to the right."""
    a, b = run, np.roll(run, -1, axis=0)
    over = (a[:, 1] > point[1]) != (b[:, 1] > point[1])
    x = a[over, 0] + (point[1] - a[over, 1]) * (b[over, 0] - a[over, 0]) / (b[over, 1] - a[over, 1])
    return (x > point[0]).sum() % 2 == 1


class Files(Bench):
    def same_millimetres(self, dxf, svg, flatten=0.1):
        """The DXF's origin is the SVG's lower left corner; letters are in chords within their tolerance."""
        drawn = [one for _, _, runs in svg.strokes + svg.fills for one in runs]
        self.assertEqual(sum(len(runs) for _, _, runs in svg.strokes + svg.fills), len(dxf.entities))
        low, high = (getattr(np.concatenate(drawn), end)(axis=0) for end in ("min", "max"))
        # The page is as large as the work, with half of its outline's stroke on each side.
        self.assertLess(np.abs(np.concatenate([low, [svg.width, svg.height] - high]) - 0.1).max(), 0.02)
        points = np.concatenate([one for *_, one in dxf.entities])
        self.assertLess(np.abs(np.concatenate([points.min(axis=0) - low, points.max(axis=0) - high])).max(), flatten + 0.002)
        # One by one, in the same order.
        step = max(1, len(dxf.entities) // 60)
        for (_, _, _, one), other in zip(dxf.entities[::step], [one for runs in svg.in_order for one in runs][::step]):
            self.assertLess(farthest(one, segments_of([other])), flatten + 0.002)

    def made(self, text, *more):
        folder = self.folder / f"packet {len(list(self.folder.iterdir()))}"
        status, _, err = run("make", text if hasattr(text, "stem") else self.design(text), "--to", folder, *more)
        self.assertIn(status, (FINE, WITH_WARNINGS), err)
        return folder


class Kerf(Files):
    def runs_of(self, file):
        """Cut runs, and all others."""
        if file.suffix == ".dxf":
            dxf = Dxf(file)
            return dxf.runs("cut"), [one for layer, _, _, one in dxf.entities if layer != "CUT"]
        svg = Svg(file)
        rest = [one for layer, _, runs in svg.strokes for one in runs if layer != "cut"] + [one for _, _, runs in svg.fills for one in runs]
        return [one for layer, _, runs in svg.strokes for one in runs if layer == "cut"], rest

    def test_outlines_move_out_holes_in_and_nothing_else(self):
        half = 0.15
        for joint, gnomon in JOINTS.items():
            plain, kerfed = self.made(WALL + gnomon), self.made(WALL + gnomon + "cutting: {kerf: 0.3 mm}\n")
            for file in sorted(plain.glob("*.dxf")) + sorted(plain.glob("*.svg")):
                with self.subTest(joint, file=file.name):
                    (true, rest), (moved, rest_moved) = self.runs_of(file), self.runs_of(kerfed / file.name)
                    self.assertEqual((len(true), len(rest)), (len(moved), len(rest_moved)))
                    # The lower left corner of a file is its own: what is not cut shows how far the work stands from it; and where
                    # nothing else is on the part, the lowest and the rightmost of its outline, which are flat or round.
                    if rest:
                        shift = rest_moved[0][0] - rest[0][0]
                        for a, b in zip(rest, rest_moved):
                            self.assertLess(np.abs(a + shift - b).max(), 0.0003)
                    else:
                        a, b = largest(true), largest(moved)
                        shift = np.array([b[:, 0].max() - half - a[:, 0].max(), b[:, 1].min() + half - a[:, 1].min()])
                    outline = largest(true)
                    for path in true:
                        middles = (path[:-1] + path[1:]) / 2
                        middles = middles[np.hypot(*np.diff(path, axis=0).T) > 4 * half]
                        hole = path is not outline
                        mate = min(moved, key=lambda other: np.abs(np.concatenate([other.min(axis=0) - path.min(axis=0), other.max(axis=0) - path.max(axis=0)]) - np.tile(shift, 2)).max())
                        away = [farthest(one[None] + shift, segments_of([mate])) for one in middles]
                        self.assertLess(np.abs(np.array(away) - half).max(), 0.003)
                        for one in middles[:: max(1, len(middles) // 40)]:
                            self.assertNotEqual(inside(one + shift, mate), hole)
                    if file.name == "plate.dxf":
                        self.assertEqual([radius for *_, radius in Dxf(file).circles], [radius for *_, radius in Dxf(kerfed / file.name).circles])

    def test_the_part_list_and_the_sheets_know_nothing_of_it(self):
        plain, kerfed = self.made(WALL + JOINTS["tenons"]), self.made(WALL + JOINTS["tenons"] + "cutting: {kerf: 0.3 mm}\n")
        self.assertEqual((plain / "parts.csv").read_bytes(), (kerfed / "parts.csv").read_bytes())
        self.assertEqual((plain / "setting-out.csv").read_bytes(), (kerfed / "setting-out.csv").read_bytes())
        with (plain / "parts.csv").open(encoding="utf-8") as file:
            sizes = {row["part"]: row for row in csv.DictReader(file)}
        for part in ("plate", "gnomon", "gauge"):
            box = np.ptp(largest(Dxf(plain / f"{part}.dxf").runs("cut")), axis=0)
            self.assertAlmostEqual(float(sizes[part]["width_mm"]), box[0], delta=0.051)
            self.assertAlmostEqual(float(sizes[part]["height_mm"]), box[1], delta=0.051)


class EveryDesign(Files):
    def test_clean_in_order_and_nothing_twice(self):
        # Letters in coarse chords are read in a third of the time; how fine they are by themselves is tested below.
        def coarse(text):
            return text.replace("\ncutting:\n", "\ncutting:\n  flatten: 0.1 mm\n") if "\ncutting:" in text else text + "cutting: {flatten: 0.1 mm}\n"
        texts = {design.name: coarse(design.read_text(encoding="utf-8")) for design in DESIGNS}
        texts["single strokes"] = WALL + JOINTS["tenons"] + "cutting: {letters: single strokes, kerf: 0.2 mm, flatten: 0.1 mm}\n"
        for design, text in texts.items():
            folder = self.made(text)
            files = sorted(folder.glob("*.dxf"))
            self.assertTrue(files)
            for file in files:
                with self.subTest(design, file=file.name):
                    dxf, svg = Dxf(file), Svg(file.with_suffix(".svg"))
                    self.assertEqual(dxf.faults, [])
                    self.assertLessEqual({kind for _, kind, _, _ in dxf.entities}, {"LINE", "ARC", "CIRCLE", "POLYLINE"})
                    layers = [ORDER.index(layer) for layer, *_ in dxf.entities]
                    self.assertEqual(layers, sorted(layers))
                    layers = [ORDER.index(layer.upper()) for layer, *_ in svg.strokes]
                    self.assertEqual(layers, sorted(layers))
                    self.inner_first([one for layer, _, closed, one in dxf.entities if layer == "CUT" and closed])
                    self.inner_first([runs[0] for layer, _, runs in svg.strokes if layer == "cut"])
                    self.nothing_twice(dxf)
                    self.same_millimetres(dxf, svg)

    def inner_first(self, contours):
        for i, one in enumerate(contours):
            for other in contours[i + 1:]:
                self.assertFalse(inside(other[0], one), "an outline is cut before what lies inside it")

    def nothing_twice(self, dxf):
        seen, on_line = set(), {}
        for layer, kind, closed, one in dxf.entities:
            points = one.round(3) + 0.0
            key = (layer, min(points.tobytes(), points[::-1].tobytes())) if not closed else (layer, *sorted(map(tuple, points)))
            self.assertFalse(key in seen, f"{layer} {kind}: in the file twice, from {one[0].tolist()}")
            seen.add(key)
            if kind == "LINE" and math.dist(*one) > 0.05:
                d = (one[1] - one[0]) / math.dist(*one)
                d = d if (d[0], d[1]) > (0, 0) else -d
                along_it = sorted(one @ d)
                on_line.setdefault((layer, round(math.atan2(d[1], d[0]), 4), round(float(one[0] @ [-d[1], d[0]]), 1)), []).append(along_it + [one, d])
        for lines in on_line.values():
            for i, (low, high, one, d) in enumerate(lines):
                for low_2, high_2, other, _ in lines[i + 1:]:
                    if min(high, high_2) - max(low, low_2) > 0.01:
                        aside = np.abs((other - one[0]) @ [-d[1], d[0]]).max()
                        self.assertGreater(aside, 0.001, f"a line is worked twice from {one.tolist()}")


class Shapes(Files):
    def test_arcs_are_arcs_unless_they_are_flattened(self):
        true = self.made(WALL + JOINTS["tenons"])
        for cutting, within in (("cutting: {arcs: no}\n", 0.01), ("cutting: {arcs: no, flatten: 0.2 mm}\n", 0.2)):
            flat = self.made(WALL + JOINTS["tenons"] + cutting)
            for part in ("gnomon", "gauge", "plate"):
                with self.subTest(cutting, part=part):
                    arcs, chords = Dxf(true / f"{part}.dxf"), Dxf(flat / f"{part}.dxf")
                    self.assertEqual((arcs.arcs > 0, chords.arcs), (True, 0))
                    for layer in ("cut", "drill", "score", "engrave"):
                        for one, other in list(zip(arcs.runs(layer), chords.runs(layer), strict=True))[:30]:
                            self.assertLess(farthest(along(other), segments_of([one])), within + 0.0015)

    def test_circles_of_a_metre(self):
        folder = self.made(PLACE + "dial: {kind: level}\nplate: {diameter: 2 m}\nprint: {paper: A0}\n")
        # As written in the SVG: from arc to arc, with the radius that each names.
        svg = Svg(folder / "plate.svg")
        middle = (svg.edge.min(axis=0) + svg.edge.max(axis=0)) / 2
        [path] = re.findall(r'<g id="cut">\s*<path d="([^"]*)"', (folder / "plate.svg").read_text())
        self.assertEqual(set(re.findall("[A-Z]", path)), {"M", "A", "Z"})
        self.assertEqual({tuple(map(float, numbers)) for numbers in re.findall(r"A([\d.]+) ([\d.]+)", path)}, {(1000.0, 1000.0)})
        self.assertLess(np.abs(np.hypot(*(svg.edge - middle).T) - 1000).max(), 0.001)
        self.assertGreater(len(svg.edge), 300)
        # In the DXF, where a circle is one.
        [(at, radius)] = [(at, radius) for layer, at, radius in Dxf(folder / "plate.dxf").circles if layer == "CUT"]
        self.assertLess(max(*np.abs(at - middle), abs(radius - 1000)), 0.001)
        # In the PDF, on the page of the work's own size, and where it crosses the tiles.
        pages = list(pdf_runs(folder / "sheets.pdf"))
        [own] = [one for size, runs in pages for one in runs if np.abs(np.ptp(one, axis=0) - 2000).max() < 0.1]
        middle = (own.min(axis=0) + own.max(axis=0)) / 2
        self.assertGreater(len(own), 250)
        self.assertLess(np.abs(np.hypot(*(own - middle).T) - 1000).max(), 0.001)
        tiled = 0
        for size, runs in pages:
            if size.max() < 1500:
                for one in runs:
                    if len(one) > 40 and np.ptp(one, axis=0).max() > 300:
                        # Its middle by least squares: |p|² = 2 p·m + k.
                        found = np.linalg.lstsq(np.column_stack([2 * one, np.ones(len(one))]), (one**2).sum(axis=1), rcond=None)[0]
                        radius = math.sqrt(found[2] + found[:2] @ found[:2])
                        if abs(radius - 1000) < 1:  # a part of a circle tells its shape sharply, its radius less so
                            tiled += 1
                            self.assertLess(np.abs(np.hypot(*(one - found[:2]).T) - radius).max(), 0.001)
                            self.assertLess(abs(radius - 1000), 0.01)
        self.assertGreaterEqual(tiled, 4)


class LetterF(Files):
    """A letter without symmetry, 20 mm high: where it stands on the plate, and which way it looks."""
    TEXT = WALL + "gnomon: {nodus height: 120 mm}\nlettering: {motto: F, motto height: 20 mm, numeral height: 30 mm}\nprint: {paper: B1"

    def letter(self, runs, edge):
        """Corners of the letter's box from the plate's lower left corner, and the side of its ink's middle."""
        [one] = [one for one in runs if abs(np.ptp(one, axis=0)[1] - 20) < 0.4 and 8 < np.ptp(one, axis=0)[0] < 16]
        low, high = one.min(axis=0), one.max(axis=0)
        _, ink = area_and_middle(one)
        self.assertGreater(ink[1], (low + high)[1] / 2 + 0.5)  # it stands on its foot
        return np.concatenate([low, high]) - np.tile(edge.min(axis=0), 2), "left" if ink[0] < (low + high)[0] / 2 - 0.5 else "right"

    def picture(self, file, number=None):
        """A page or a file as poppler or librsvg draws it, four dots a millimetre, in the plate's frame, its lower left corner first."""
        if file.suffix == ".pdf":
            pgm = subprocess.run(["pdftoppm", "-r", "101.6", "-gray", "-f", str(number), "-l", str(number), file], check=True, capture_output=True).stdout
        else:
            png = subprocess.run(["rsvg-convert", "--dpi-x", "101.6", "--dpi-y", "101.6", "--background-color", "white", file], check=True, capture_output=True).stdout
            pgm = self.fitz_gray(png)
        head = re.match(rb"P5\s+(\d+)\s+(\d+)\s+255\s", pgm)
        width, height = int(head[1]), int(head[2])
        return np.frombuffer(pgm[head.end():], dtype=np.uint8).reshape(height, width)[::-1] < 128

    @staticmethod
    def fitz_gray(png):
        picture = fitz.Pixmap(fitz.csGRAY, fitz.Pixmap(png))
        picture = fitz.Pixmap(picture, 0) if picture.alpha else picture
        return b"P5 %d %d 255\n" % (picture.width, picture.height) + picture.samples

    def seen_in(self, dots, corner, box):
        """Whether ink fills the letter's box and no more, and which side is heavier."""
        left, low, right, high = ((np.tile(corner, 2) + box) * 4).round().astype(int)
        ink = dots[low - 4:high + 5, left - 4:right + 5]
        rows, columns = np.nonzero(ink)
        self.assertLessEqual(np.abs(np.array([columns.min(), rows.min(), ink.shape[1] - 1 - columns.max(), ink.shape[0] - 1 - rows.max()]) - 4).max(), 2)  # half a millimetre
        return "left" if columns.mean() < ink.shape[1] / 2 - 1 else "right"

    def test_same_place_and_same_hand(self):
        plain = self.made(self.TEXT + "}\n")
        mirrored = self.made(self.TEXT + ", mirrored: yes}\ncutting: {mirrored: yes}\n")
        found = {}
        for hand, folder, end in (("plain", plain, ""), ("mirrored", mirrored, "-mirrored")):
            svg, dxf = Svg(folder / f"plate{end}.svg"), Dxf(folder / f"plate{end}.dxf")
            self.same_millimetres(dxf, svg, 0.01)
            pdf = folder / f"sheets{end}.pdf"
            found[hand, "svg"] = self.letter([one for layer, _, runs in svg.fills for one in runs], svg.edge)
            found[hand, "dxf"] = self.letter(dxf.runs("engrave"), largest(dxf.runs("cut")))
            strokes, fills = list(pdf_runs(pdf)), list(pdf_runs(pdf, "fill_path"))
            for name, number in (("pdf, own size", len(strokes) - 1), ("pdf, sheet", 1)):
                edge = min((one for one in strokes[number][1] if len(one) == 5), key=lambda one: np.abs(np.ptp(one, axis=0) - [600, 800]).max())
                self.assertLess(np.abs(np.ptp(edge, axis=0) - [600, 800]).max(), 0.01)
                found[hand, name] = self.letter(fills[number][1], edge)
                self.assertEqual(self.seen_in(self.picture(pdf, number + 1), edge.min(axis=0), found[hand, "svg"][0]), found[hand, "svg"][1])
            self.assertEqual(self.seen_in(self.picture(folder / f"plate{end}.svg"), svg.edge.min(axis=0), found[hand, "svg"][0]), found[hand, "svg"][1])
        self.assertEqual(len(found), 8)
        left, low, right, high = found["plain", "svg"][0]
        for (hand, name), (box, side) in found.items():
            with self.subTest(hand, file=name):
                self.assertEqual(side, {"plain": "left", "mirrored": "right"}[hand])
                self.assertLess(np.abs(box - ([left, low, right, high] if hand == "plain" else [600 - right, low, 600 - left, high])).max(), 0.01)


if __name__ == "__main__":
    unittest.main()
