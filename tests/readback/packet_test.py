# SPDX-License-Identifier: MIT
"""Every example design's packet, read back with MuPDF, qpdf, poppler and Python's XML reader.

The lines on paper and in the SVG are those of numbers.json within 0.005 mm. Where a plate stands on its page is found from
the plate's outline and from how tiles are laid (their openings and overlaps), not from the lines that are tested.
"""
import math
import re
import subprocess
import unittest

import fitz
import numpy as np

from drawings import Svg, along, farthest, nearest, pdf_runs, segments_of
from program import DESIGNS, FINE, WITH_WARNINGS, Bench, faces_of, run, strict_json

CLOSE_MM = 0.005


def turned(points, degrees):
    c, s = {0: (1, 0), 90: (0, 1), 180: (-1, 0)}[degrees]
    return points @ np.array([[c, s], [-s, c]])


def setting(design, key, checked):
    """A print setting in mm: from the design, else as `check` says that it was taken."""
    found = re.search(rf"(?m)^\s+{key}: ([\d./ ]+) (mm|in)", design.read_text()) or re.search(rf"print: {key}\s+([\d./ ]+) (mm|in)", checked)
    value = sum(float(part.split("/")[0]) / float(part.split("/")[1]) if "/" in part else float(part) for part in found[1].split())
    return value * (25.4 if found[2] == "in" else 1)


class Packets(Bench):
    def each(self):
        for design in DESIGNS:
            folder = self.folder / design.stem
            status, out, err = run("make", design, "--to", folder)
            self.assertIn(status, (FINE, WITH_WARNINGS), err)
            yield design, folder, int(re.search(r": (\d+) sheets", out)[1]), strict_json((folder / "numbers.json").read_text())

    @staticmethod
    def svg_of(folder, name):
        return Svg(folder / f"plate{'-' + name if name else ''}.svg")

    def lines_on(self, svg, numbers, face, level):
        """The drawn lines in the SVG's frame, from the plate's middle and the way that its reader faces."""
        middle = (svg.edge.min(axis=0) + svg.edge.max(axis=0)) / 2
        turn = 180 if level and numbers["site"]["latitude_deg"] < 0 else 0
        return [middle + turned(np.array(line["points_mm"]) - face["plate"]["middle_mm"], turn) for line in face["hour_lines"] + face["date_lines"]]

    def test_lines_in_svg_own_size_page_and_tiles(self):
        for design, folder, sheets, numbers in self.each():
            level = "kind: level" in design.read_text()
            checked = run("check", design)[1]
            pages = list(pdf_runs(folder / "sheets.pdf"))
            outline = subprocess.run(["mutool", "show", folder / "sheets.pdf", "outline"], check=True, capture_output=True, text=True).stdout
            titles = re.findall(r'(?m)^\S\s+"(.*?)"\s', outline)
            self.assertEqual(len(titles), sheets)
            faces = faces_of(numbers)
            for name, face in faces:
                part = f"Plate, {name} face" if name else "Plate"
                svg = self.svg_of(folder, name)
                lines = self.lines_on(svg, numbers, face, level)
                points = np.concatenate([along(line) for line in lines])
                with self.subTest(design.name, face=name, on="SVG"):
                    drawn = [run for layer, _, runs in svg.strokes if layer == "engrave" for run in runs]
                    self.assertLess(farthest(points, segments_of(drawn)), CLOSE_MM)
                    for line in lines:  # and each as one run, from end to end
                        self.assertTrue(any(max(math.dist(run[0], line[0]), math.dist(run[-1], line[-1])) < CLOSE_MM for run in drawn))
                with self.subTest(design.name, face=name, on="own size"):
                    size, runs = pages[titles.index(f"{part}, own size")]
                    edge = max(runs, key=lambda run: np.ptp(run, axis=0).prod() if np.abs(np.ptp(run, axis=0) - np.ptp(svg.edge, axis=0)).max() < 0.02 else 0)
                    self.assertLess(np.abs(np.ptp(edge, axis=0) - np.ptp(svg.edge, axis=0)).max(), 0.02)
                    shift = (edge.min(axis=0) + edge.max(axis=0)) / 2 - (svg.edge.min(axis=0) + svg.edge.max(axis=0)) / 2
                    self.assertLess(farthest(points + shift, segments_of(runs)), CLOSE_MM)
                self.on_tiles(design, name, part, svg, points, pages, titles, setting(design, "overlap", checked))

    def on_tiles(self, design, name, part, svg, points, pages, titles, overlap):
        """Rows from the top and columns from the left, each a step from the last; the whole about the work's middle."""
        found = [re.fullmatch(re.escape(part) + r", sheet ([A-Z])(\d+)", title) for title in titles]
        first = next((i for i, title in enumerate(found) if title), None)
        if first is None:
            self.assertIn(part, titles)  # on one sheet, whose page is that of its own size but for the paper
            return
        cells = [(ord(title[1]) - ord("A"), int(title[2]) - 1) for title in found if title]
        last = first + len(cells)
        self.assertEqual(cells, sorted(set(cells)))
        self.assertTrue(all(found[first:last]))
        openings = [self.opening(runs) for _, runs in pages[first:last]]
        left, bottom, width, height = openings[0]
        rows, columns = (1 + max(cell[k] for cell in cells) for k in (0, 1))
        whole = np.array([width + (columns - 1) * (width - overlap), height + (rows - 1) * (height - overlap)])
        middle = np.array([svg.width, svg.height]) / 2
        seen = {}
        for turn in (0, 90):
            worst, count = 0.0, 0
            for (row, column), (_, runs) in zip(cells, pages[first:last]):
                corner = np.array([column * (width - overlap), whole[1] - height - row * (height - overlap)])
                placed = turned(points - middle, turn) + whole / 2 - corner + [left, bottom]
                inside = ((placed > [left + 0.5, bottom + 0.5]) & (placed < [left + width - 0.5, bottom + height - 0.5])).all(axis=1)
                count += inside.sum()
                if inside.any():
                    worst = max(worst, farthest(placed[inside], segments_of(runs)))
            seen[turn] = (worst, count)
        with self.subTest(design.name, face=name, on=f"tiles {titles[first]} to {titles[last - 1]}"):
            worst, count = min(seen.values())
            self.assertLess(worst, CLOSE_MM)
            self.assertGreaterEqual(count, 0.9 * len(points))

    def opening(self, runs):
        """The frame of a tile: the largest upright rectangle of five points."""
        frames = [run for run in runs if len(run) in (5, 6) and np.allclose(run[0], run[4]) and all(min(abs(d)) < 1e-6 for d in np.diff(run[:5], axis=0))]
        frame = max(frames, key=lambda run: np.ptp(run, axis=0).prod())
        return (*frame.min(axis=0), *np.ptp(frame, axis=0))

    def test_no_lettering_touches_a_line_or_other_lettering(self):
        for design, folder, _, numbers in self.each():
            for name, face in faces_of(numbers):
                with self.subTest(design.name, face=name):
                    svg = self.svg_of(folder, name)
                    # What is filled and has curves is lettering; the noon mark and the like are straight.
                    texts = [np.concatenate(runs) for layer, d, runs in svg.fills if layer == "engrave" and "C" in d]
                    self.assertGreater(len(texts), 5)
                    lines = [(width, segments_of(runs)) for layer, width, runs in svg.strokes if layer == "engrave"]
                    for i, text in enumerate(texts):
                        low, high = text.min(axis=0), text.max(axis=0)
                        for width, pieces in lines:
                            a, b = np.minimum(pieces[:, :2], pieces[:, 2:]), np.maximum(pieces[:, :2], pieces[:, 2:])
                            near = pieces[((a <= high + 1) & (b >= low - 1)).all(axis=1)]
                            if len(near):
                                self.assertGreater(nearest(text, near), width / 2, f"lettering at {text.mean(axis=0).round(1)} mm touches a line")
                        for other in texts[i + 1:]:
                            if ((other.min(axis=0) <= high) & (other.max(axis=0) >= low)).all():
                                self.assertGreater(np.sqrt(((text[:, None] - other) ** 2).sum(axis=2)).min(), 0.1, f"two letterings meet at {text.mean(axis=0).round(1)} mm")

    def test_bars_pages_and_words(self):
        for design, folder, sheets, numbers in self.each():
            pdf = folder / "sheets.pdf"
            with self.subTest(design.name):
                done = subprocess.run(["qpdf", "--check", pdf], capture_output=True, text=True)
                self.assertEqual(done.returncode, 0, done.stdout + done.stderr)
                self.assertNotIn("WARNING", done.stdout + done.stderr)
                document = fitz.open(pdf)
                self.assertEqual(len(document), sheets)
                preferences = document.xref_get_key(document.pdf_catalog(), "ViewerPreferences")[1]
                self.assertRegex(preferences if "<<" in preferences else document.xref_object(int(preferences.split()[0])), r"/PrintScaling\s*/None")
                fonts = subprocess.run(["pdffonts", pdf], capture_output=True, text=True).stdout.splitlines()[2:]
                self.assertTrue(fonts)
                for font in fonts:  # embedded, cut down, and with a way back to the words
                    self.assertEqual(font.split()[-5:-2], ["yes", "yes", "yes"], font)
            margin = setting(design, "margin", run("check", design)[1])
            for number, (page, (size, runs)) in enumerate(zip(document, pdf_runs(pdf)), 1):
                with self.subTest(design.name, page=number):
                    words = " ".join(subprocess.run(["pdftotext", "-f", str(number), "-l", str(number), "-raw", pdf, "-"], capture_output=True, text=True).stdout.split())
                    paper = re.search(r"Paper: (.*?), (?:[\d.]+ × [\d.]+ in \()?([\d.]+) × ([\d.]+) mm", words)
                    self.assertIsNotNone(paper, words)
                    # As said, in whole millimetres or tenths.
                    self.assertLess(np.abs(np.sort(size) - np.sort([float(paper[2]), float(paper[3])])).max(), 0.51)
                    self.assertIn(numbers["title"], words)
                    self.assertIn("100 %", words)
                    self.assertIn("fit to page", words)
                    bars = [float(mm) for mm in re.findall(r"([\d.]+) mm(?: and [\d.]+ in)? from the middle", words)] or [100.0, 100.0]
                    pieces = segments_of(runs)
                    for axis, bar in zip((0, 1), bars):
                        length = np.abs(pieces[:, 2 + axis] - pieces[:, axis])
                        straight = np.abs(pieces[:, 3 - axis] - pieces[:, 1 - axis]) < 1e-4
                        self.assertTrue((np.abs(length[straight] - bar) < 0.005).any(), f"no bar of {bar} mm along {'xy'[axis]}")
                    picture = page.get_pixmap(matrix=fitz.Matrix(101.6 / 72, 101.6 / 72), colorspace=fitz.csGRAY)  # 4 dots a mm
                    dots = np.frombuffer(picture.samples, dtype=np.uint8).reshape(picture.height, picture.stride)[:, :picture.width]
                    inside = int(margin * 4) - 1
                    dots = dots.copy()
                    dots[inside:-inside, inside:-inside] = 255
                    self.assertEqual(dots.min(), 255, "something is drawn beyond the printable area")


if __name__ == "__main__":
    unittest.main()
