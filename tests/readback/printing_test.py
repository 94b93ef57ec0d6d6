# SPDX-License-Identifier: MIT
"""What printing is asked for, read back from the PDF with MuPDF and poppler: a printer's error made good, layers, single sheets
again, mirrored sheets, and the page that a printer is measured with."""
import re
import subprocess
import unittest

import fitz
import numpy as np

from drawings import nearest, pdf_runs, segments_of
from program import ERROR, FINE, LEVEL, WALL, WITH_WARNINGS, Bench, contents_of, run

LAYERS = ["cut", "engrave", "fill", "drill", "score", "guide"]
HOLED = WALL.replace("600", "300").replace("750", "400") + "gnomon: {thickness: 6 mm, holes: 2, hole diameter: 3 mm}\nhours: {divide: 60 min}\n"
TONES = {"cut": (0x73, 0x14, 0x29), "drill": (0x0a, 0x66, 0x75), "score": (0xb3, 0x78, 0x1a)}  # docs/output-formats.md
GUIDE = (0x80, 0xa8, 0xbd)


class Printing(Bench):
    def made(self, text, *more):
        folder = self.folder / f"packet {len(list(self.folder.iterdir()))}"
        status, _, err = run("make", self.design(text), "--to", folder, *more)
        self.assertIn(status, (FINE, WITH_WARNINGS), err)
        return folder

    @staticmethod
    def titles_of(pdf):
        outline = subprocess.run(["mutool", "show", pdf, "outline"], check=True, capture_output=True, text=True).stdout
        return re.findall(r'(?m)^\S\s+"(.*?)"\s', outline)

    @staticmethod
    def words_of(pdf, number):
        """What poppler reads on a page, counted from 0."""
        words = subprocess.run(["pdftotext", "-raw", "-f", str(number + 1), "-l", str(number + 1), pdf, "-"], check=True, capture_output=True, text=True).stdout
        return " ".join(words.split())

    @staticmethod
    def picture_of(pdf, number, dots_an_inch=100):
        """A page as poppler draws it: rows of dots of red, green, blue."""
        ppm = subprocess.run(["pdftoppm", "-r", str(dots_an_inch), "-f", str(number + 1), "-l", str(number + 1), pdf], check=True, capture_output=True).stdout
        head = re.match(rb"P6\s+(\d+)\s+(\d+)\s+255\s", ppm)
        return np.frombuffer(ppm[head.end():], dtype=np.uint8).reshape(int(head[2]), int(head[1]), 3)

    def bars_of(self, runs):
        """Lengths of the long level and of the long upright lines that end on ticks across them."""
        pieces = segments_of(runs)
        size = np.abs(pieces[:, 2:] - pieces[:, :2])
        bars = []
        for axis in (0, 1):
            ticks = pieces[(size[:, axis] < 1e-4) & (size[:, 1 - axis] < 13)]
            long = pieces[(size[:, axis] > 90) & (size[:, 1 - axis] < 1e-4)]
            bars.append([abs(bar[2 + axis] - bar[axis]) for bar in long if all(nearest(end[None], ticks) < 1e-3 for end in (bar[:2], bar[2:]))])
        return bars


class Compensation(Printing):
    def test_sheets_are_stretched_by_the_way_of_the_paper(self):
        across, along = 180 / 179.1, 260 / 261.2  # what is printed over what was measured
        said = "across feed: [180 mm, 179.1 mm], along feed: [260 mm, 261.2 mm]"
        for orientation, stretch in (("upright", (across, along)), ("lying", (along, across))):
            with self.subTest(orientation):
                text = LEVEL.replace("360 mm", "150 mm") + "hours: {divide: 60 min}\nprint: {paper: A4, orientation: " + orientation
                plain, folder = self.made(text + "}\n"), self.made(text + f", {said}}}\n")
                titles = self.titles_of(folder / "sheets.pdf")
                tile, own = titles.index("Plate"), titles.index("Plate, own size")
                pages = list(pdf_runs(folder / "sheets.pdf"))
                for number, factors, width in ((tile, stretch, [150 * f for f in stretch]), (own, (1, 1), [150, 150])):
                    size, runs = pages[number]
                    self.assertEqual(number == tile and size[0] > size[1], number == tile and orientation == "lying")
                    for bars, factor in zip(self.bars_of(runs), factors):
                        self.assertTrue(any(abs(bar - 100 * factor) < 0.003 for bar in bars), (bars, factor))
                    edges = [one for one in runs if np.abs(np.ptp(one, axis=0) - width).max() < 0.005]
                    self.assertTrue(edges)
                    if number == tile:  # about the page's middle: what is in the middle stays there
                        there = [one for one in list(pdf_runs(plain / "sheets.pdf"))[tile][1] if np.abs(np.ptp(one, axis=0) - 150).max() < 0.005]
                        middles = [(one.min(axis=0) + one.max(axis=0)) / 2 - size / 2 for one in (edges[0], there[0])]
                        self.assertLess(np.abs(middles[0] - middles[1] * stretch).max(), 0.5)  # margins may give way by as much
                self.assertIn("corrected for this printer", self.words_of(folder / "sheets.pdf", tile))
                self.assertNotIn("corrected", self.words_of(folder / "sheets.pdf", own))
                one, other = contents_of(plain), contents_of(folder)
                for name in one.keys() - {"sheets.pdf"}:  # nothing but the sheets knows of the printer
                    self.assertEqual(one[name], other[name], name)

    def test_a_compensation_that_is_too_large_is_refused(self):
        for key in ("across feed", "along feed"):
            status, out, err = run("make", self.design(LEVEL + f"print:\n  {key}: [180 mm, 234 mm]\n"), "--to", self.folder / "none")
            self.assertEqual((status, out), (ERROR, ""))
            self.assertIn(f":5:{len(key) + 5}: print: {key}", err)
            self.assertIn("5 %", err)
            self.assertFalse((self.folder / "none").exists())


class Layers(Printing):
    def shown(self, pdf, number):
        """How many dots of a page are of each tone, and dark at all. A thin line is paler than its tone: it lies on the way
        from the tone to white, and nearer to it than to another's."""
        dots = self.picture_of(pdf, number).reshape(-1, 3)
        dots = dots[dots.min(axis=1) < 155]
        ink = 255 - dots[np.ptp(dots, axis=1) > 20].astype(int)
        off = {}
        for name, tone in (*TONES.items(), ("guide", GUIDE)):
            full = 255 - np.array(tone)
            off[name] = np.abs(ink - (ink @ full / (full @ full))[:, None] * full).max(axis=1)
        least = np.min(list(off.values()), axis=0)
        return {name: int(((off[name] < 4) & (off[name] == least)).sum()) for name in TONES} | {"dark": int((dots.max(axis=1) < 100).sum())}

    def tones_on(self, pdf, number):
        return {name for name, count in self.shown(pdf, number).items() if count and name in TONES}

    def test_a_viewer_shows_them_by_themselves(self):
        """MuPDF switches layers in the file; poppler shows what is on."""
        pdf, switched = self.made(HOLED + "print: {paper: A2, layers: in the viewer}\n") / "sheets.pdf", self.folder / "switched.pdf"
        page = self.titles_of(pdf).index("Plate")
        with fitz.open(pdf) as document:
            groups = {group["name"]: xref for xref, group in document.get_ocgs().items()}
            self.assertEqual(list(groups), LAYERS)
            self.assertTrue(all(group["on"] for group in document.get_ocgs().values()))
            self.assertEqual([item["text"] for item in document.layer_ui_configs()], LAYERS)

            def with_only(*names):
                document.set_layer(-1, on=[groups[name] for name in names], off=[xref for name, xref in groups.items() if name not in names])
                document.save(switched)
                return self.shown(switched, page)

            whole, notes = with_only(*LAYERS), with_only()
            self.assertTrue(all(count > 30 for count in whole.values()), whole)
            self.assertEqual({notes[layer] for layer in TONES}, {0})
            self.assertTrue(200 < notes["dark"] < whole["dark"] / 2)  # bars and words are no layer
            for layer in TONES:
                with self.subTest(layer):
                    seen = with_only(layer)
                    self.assertGreater(seen[layer], 0.9 * whole[layer])
                    self.assertEqual({other for other in TONES if seen[other]}, {layer})
            self.assertGreater(with_only("engrave")["dark"], 0.9 * whole["dark"])
        with fitz.open(self.made(HOLED + "print: {paper: A2}\n") / "sheets.pdf") as document:
            self.assertEqual(document.get_ocgs(), {})

    def test_one_by_one_on_the_same_tiles(self):
        folder, together = self.made(HOLED + "print: {paper: A3, layers: one by one}\n"), self.made(HOLED + "print: {paper: A3}\n")
        pages = list(pdf_runs(folder / "sheets.pdf"))
        whole = {title: runs for title, (_, runs) in zip(self.titles_of(together / "sheets.pdf"), pdf_runs(together / "sheets.pdf"))}
        found = {}
        for number, title in enumerate(self.titles_of(folder / "sheets.pdf")):
            if match := re.fullmatch(r"Plate, layer (\w+)(, sheet \w+)?", title):
                found.setdefault(match[1], []).append(match[2])
                self.assertIn(f"layer {match[1]}", self.words_of(folder / "sheets.pdf", number))
                self.assertLessEqual(self.tones_on(folder / "sheets.pdf", number), {match[1]})
                # At the place where it is among the others: a layer's lines are those of the whole sheet.
                of_whole = {tuple(one.round(3).ravel()) for one in whole["Plate" + (match[2] or "")]}
                same = sum(tuple(one.round(3).ravel()) in of_whole for one in pages[number][1])
                self.assertGreater(same, 0.8 * len(pages[number][1]), title)
        self.assertEqual(set(found), {"cut", "engrave", "score", "drill", "guide"})
        self.assertTrue(all(None not in sheets for sheets in found.values()), found)

    def test_chosen_layers_alone(self):
        folder = self.made(HOLED + "print: {paper: A2}\n", "--layers", "cut,drill")
        self.assertEqual([path.name for path in folder.iterdir()], ["sheets-cut-drill.pdf"])
        plates = [number for number, title in enumerate(self.titles_of(folder / "sheets-cut-drill.pdf")) if title == "Plate"]
        self.assertEqual(len(plates), 1)
        self.assertEqual(self.tones_on(folder / "sheets-cut-drill.pdf", plates[0]), {"cut", "drill"})


class Sheets(Printing):
    def test_one_sheet_again_is_that_sheet(self):
        whole, again = self.made(HOLED), self.made(HOLED, "--sheet", "B2")
        self.assertEqual([path.name for path in again.iterdir()], ["sheets-B2.pdf"])
        titles = self.titles_of(again / "sheets-B2.pdf")
        self.assertEqual(titles[0], "Plate, sheet B2")
        self.assertTrue(all(title.endswith(", sheet B2") for title in titles))
        [first] = [number for number, title in enumerate(self.titles_of(whole / "sheets.pdf")) if title == "Plate, sheet B2"]
        self.assertTrue(np.array_equal(self.picture_of(whole / "sheets.pdf", first), self.picture_of(again / "sheets-B2.pdf", 0)))
        self.assertFalse(np.array_equal(self.picture_of(whole / "sheets.pdf", first + 1), self.picture_of(again / "sheets-B2.pdf", 0)))
        words = [re.sub(r"Sheet \d+ of \d+", "", self.words_of(*page)) for page in ((whole / "sheets.pdf", first), (again / "sheets-B2.pdf", 0))]
        self.assertEqual(*words)

    def test_no_such_sheet(self):
        status, out, err = run("make", self.design(HOLED), "--to", self.folder / "none", "--sheet", "Z99")
        self.assertEqual((status, out), (ERROR, ""))
        self.assertIn("Z99", err)
        self.assertFalse((self.folder / "none").exists())

    def test_mirrored_sheets_say_so(self):
        folder = self.made(HOLED + "print: {paper: A3, mirrored: yes}\ncutting: {mirrored: yes}\n")
        names = {path.name for path in folder.iterdir()}
        self.assertIn("sheets-mirrored.pdf", names)
        self.assertNotIn("sheets.pdf", names)
        drawn = {name for name in names if name.endswith((".svg", ".dxf"))}
        self.assertTrue(drawn and all("-mirrored." in name for name in drawn), drawn)
        titles = self.titles_of(folder / "sheets-mirrored.pdf")
        told = 0
        for number, title in enumerate(titles):
            if title.startswith(("Plate", "The gnomon")):
                self.assertIn("MIRRORED", self.words_of(folder / "sheets-mirrored.pdf", number), title)
                told += 1
        self.assertGreater(told, 2)
        index = (folder / "contents.txt").read_text()
        self.assertIn("sheets-mirrored.pdf", index)
        self.assertEqual(index.count("MIRRORED"), len({name for name in drawn if name.endswith(".svg")}))


class Calibrate(Printing):
    def test_its_bars_are_as_long_as_they_say(self):
        for paper, options, unit in (("A4", [], 1), ("A3", ["--paper", "A3"], 1), ("Letter", ["--paper", "Letter", "--inches"], 25.4)):
            with self.subTest(paper):
                pdf = self.folder / f"{paper}.pdf"
                status, out, err = run("calibrate", pdf, *options)
                self.assertEqual((status, err), (FINE, ""))
                self.assertIn(str(pdf), out)
                words = self.words_of(pdf, 0)
                [(size, runs)] = pdf_runs(pdf)
                self.assertLess(np.abs(size - {"A4": [210, 297], "A3": [297, 420], "Letter": [215.9, 279.4]}[paper]).max(), 0.02)
                for axis, way in ((0, "across"), (1, "along")):
                    [said] = re.findall(rf"([\d.]+) (?:mm|in) printed, {way} the feed", words)
                    bars = self.bars_of(runs)[axis]
                    self.assertTrue(any(abs(bar - float(said) * unit) < 0.003 for bar in bars), (said, bars))
                    self.assertGreater(float(said) * unit, 0.75 * size[axis])
                    # And what it says to write into the design is read by the program.
                    self.assertRegex(words, rf"{way} feed: \[{re.escape(said)} (mm|in), _+\]")
                    unit_name = "in" if unit > 1 else "mm"
                    status, _, err = run("check", self.design(LEVEL + f"print: {{{way} feed: [{said} {unit_name}, {float(said) * 1.01:.2f} {unit_name}]}}\n"))
                    self.assertIn(status, (FINE, WITH_WARNINGS), err)

    def test_the_same_bytes_again(self):
        for name in ("one.pdf", "two.pdf"):
            run("calibrate", self.folder / name)
        self.assertEqual((self.folder / "one.pdf").read_bytes(), (self.folder / "two.pdf").read_bytes())

    def test_what_is_wrong_is_told_and_nothing_written(self):
        for words, said in ((["--paper", "Leter"], ["--paper", "Letter"]), ([], ["PDF"]), (["--bogus"], ["--bogus"])):
            pdf = [self.folder / "page.pdf"] if words else []
            status, out, err = run("calibrate", *pdf, *words)
            self.assertEqual((status, out), (ERROR, ""), err)
            for part in said:
                self.assertIn(part, err)
            self.assertFalse((self.folder / "page.pdf").exists())
        (self.folder / "folder").mkdir()
        status, out, err = run("calibrate", self.folder / "folder")
        self.assertEqual((status, out, err), (ERROR, "", f"{self.folder}/folder is a folder: give the name of a file in it\n"))
        (self.folder / "file").write_text("not a folder")
        status, out, err = run("calibrate", self.folder / "file/page.pdf")
        self.assertEqual((status, out), (ERROR, ""), err)
        self.assertIn("cannot write", err)


if __name__ == "__main__":
    unittest.main()
