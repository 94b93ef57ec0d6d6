# SPDX-License-Identifier: MIT
"""The commands that are asked of a place, of the day of fixing, and of the work to come: sun, sunlight, fix, accuracy."""
import csv
import io
import unittest

import fitz

from program import DESIGNS, ERROR, FINE, LEVEL, TWO_FACES, WALL, WITH_WARNINGS, Bench, run, strict_json

MOOR = ("--latitude", "54° 12' N", "--longitude", "-1.9", "--zone", "Europe/London")


class Sun(Bench):
    def test_a_date_in_words(self):
        status, out, err = run("sun", *MOOR, "--on", "14 June 2027")
        self.assertEqual((status, err), (FINE, ""))
        self.assertIn("Monday 14 Jun 2027", out)
        for word in ("rise", "noon", "set", "day length", "declination", "dial slow", "BST", "34'"):
            self.assertIn(word, out)

    def test_a_design_gives_its_place(self):
        by_design = run("sun", self.design(LEVEL), "--on", "2027-06-14", "--json")
        by_options = run("sun", *MOOR, "--on", "2027-06-14", "--json")
        self.assertEqual(strict_json(by_design[1])["days"], strict_json(by_options[1])["days"])

    def test_table_csv_and_json_say_the_same(self):
        words = ("sun", *MOOR, "--on", "2027-03-27", "--to", "2027-03-29")
        table, rows = run(*words)[1], list(csv.DictReader(io.StringIO(run(*words, "--csv")[1])))
        days = strict_json(run(*words, "--json")[1])["days"]
        self.assertIn("GMT, BST", table)  # the clocks go forward on the 28th
        for row, day in zip(rows, days, strict=True):
            self.assertEqual(row["date"], day["date"])
            self.assertEqual(row["noon"], day["noons"][0]["clock"])
            self.assertIn(row["set"][11:19], table)
            self.assertAlmostEqual(float(row["daylight_h"]), day["daylight_h"], places=3)
        self.assertTrue(rows[0]["noon"].endswith("+00:00") and rows[1]["noon"].endswith("+01:00"))

    def test_midnight_sun_and_polar_night_in_words(self):
        north = ("--latitude", "70", "--longitude", "19", "--zone", "Europe/Oslo")
        self.assertIn("up all day and all night", run("sun", *north, "--on", "2027-06-21")[1])
        self.assertIn("stays down", run("sun", *north, "--on", "2027-12-21")[1])
        self.assertEqual(strict_json(run("sun", *north, "--on", "2027-12-21", "--json")[1])["days"][0]["daylight_h"], 0)

    def test_the_bare_horizon_makes_the_day_shorter(self):
        seen, bare = (strict_json(run("sun", *MOOR, "--on", "2027-06-14", "--json", *more)[1])["days"][0]["daylight_h"] for more in ((), ("--no-refraction",)))
        self.assertTrue(0.1 < seen - bare < 0.4)

    def test_a_sheet(self):
        sheet = self.folder / "sun.pdf"
        status, _, err = run("sun", *MOOR, "--on", "2027-06-01", "--to", "2027-06-30", "--pdf", sheet, "--paper", "Letter")
        self.assertEqual((status, err), (FINE, ""))
        self.assertTrue(sheet.read_bytes().startswith(b"%PDF"))

    def test_wrong_words(self):
        cases = {
            ("--latitude", "95", "--longitude", "1", "--zone", "UTC", "--on", "2027-06-14"): ["--latitude", "90°"],
            (*MOOR[:4], "--zone", "Europe/Lundon", "--on", "2027-06-14"): ["--zone", "Europe/London"],
            (*MOOR, "--on", "2027-02-29"): ["--on", "no 29 February"],
            (*MOOR, "--on", "14 June"): ["--on", "no year"],
            (*MOOR, "--on", "14 Jnue 2027"): ["--on", '"jnue" is not a month', "2027-06-14"],
            (*MOOR, "--on", "2127-06-14"): ["--on", "1901 to 2099"],
            (*MOOR, "--on", "tomorrow"): ["--on", "not a date"],
            (*MOOR, "--on", "2027-06-14", "--to", "2027-06-13"): ["--to", "before the first"],
            (*MOOR, "--on", "2027-06-14", "--to", "2057-06-13"): ["--to", "at most"],
            (*MOOR, "--on", "2027-06-14", "--pdf", self.folder): ["--pdf", "folder"],
            (*MOOR, "--on", "2027-06-14", "--pdf", self.folder / "a.pdf", "--paper", "A44"): ["--paper", "A4"],
            ("--on", "2027-06-14"): ["no place", "--latitude"],
            (self.folder / "none.yaml", "--on", "2027-06-14"): ["no such file"],
            MOOR: ["--on"],
        }
        for words, parts in cases.items():
            with self.subTest(words):
                status, out, err = run("sun", *words)
                self.assertEqual((status, out), (ERROR, ""))
                for part in parts:
                    self.assertIn(part, err)


class Sunlight(Bench):
    def test_months_add_up(self):
        status, out, err = run("sunlight", self.design(WALL), "--json")
        self.assertEqual((status, err), (FINE, ""))
        face = strict_json(out)["faces"][0]
        self.assertEqual((face["year"], len(face["days"])), (2027, 365))
        for key in ("up_h", "facing_h", "lit_h", "days_lit"):
            self.assertAlmostEqual(face["total"][key], sum(month[key] for month in face["months"]), places=4)
        for key in ("up_h", "facing_h", "lit_h"):
            self.assertAlmostEqual(face["total"][key], sum(day[key] for day in face["days"]), places=3)
        for day in face["days"]:
            self.assertTrue(day["lit_h"] <= day["facing_h"] + 1e-9 <= day["up_h"] + 2e-9)
            self.assertEqual(bool(day["lit"]), day["lit_h"] > 0)

    def test_two_faces_share_the_day(self):
        faces = strict_json(run("sunlight", self.design(TWO_FACES), "--json")[1])["faces"]
        self.assertEqual(len(faces), 2)
        self.assertTrue(abs(sum(face["total"]["lit_h"] for face in faces) - faces[0]["total"]["up_h"]) < 0.05)

    def test_walls_side_by_side(self):
        status, out, err = run("sunlight", *MOOR, "--facing", "S", "--facing", "N", "--level", "--year", "2028")
        self.assertEqual((status, err), (FINE, ""))
        self.assertIn("facing south", out.splitlines()[1])
        self.assertIn("Not lit from", out)  # the north wall in winter
        rows = list(csv.DictReader(io.StringIO(run("sunlight", *MOOR, "--facing", "S 23° E", "--year", "2028", "--csv")[1])))
        self.assertEqual(len(rows), 366)

    def test_the_skyline_takes_its_share(self):
        text = WALL.replace("zone: Europe/London", "zone: Europe/London, skyline: [[90°, 20°], [S, 10°], [270°, 20°], [N, 0°]]")
        total = strict_json(run("sunlight", self.design(text), "--json")[1])["faces"][0]["total"]
        self.assertTrue(0 < total["lit_h"] < 0.9 * total["facing_h"])
        self.assertIn("The skyline takes", run("sunlight", self.design(text))[1])

    def test_sheets(self):
        sheet = self.folder / "light.pdf"
        status, _, err = run("sunlight", self.design(WALL), "--facing", "S", "--pdf", sheet)
        self.assertEqual((status, err), (FINE, ""))
        pages = [page.get_text() for page in fitz.open(sheet)]
        self.assertEqual(len(pages), 3)
        self.assertIn("Sunlight compared", pages[0])
        self.assertIn("shaded by the skyline", pages[1])

    def test_wrong_words(self):
        wall = self.design(WALL)
        cases = {
            (): ["no plate is given"],
            MOOR: ["no plate is given"],
            ("--facing", "S"): ["no place is given"],
            (*MOOR, "--facing", "S 100° E"): ["--facing"],
            (*MOOR, "--facing", "S", "--lean", "sideways"): ["--lean"],
            (wall, "--lean", "5° back"): ["--lean goes with --facing"],
            (wall, wall, "--level"): ["name one design"],
            (wall, *MOOR): ["its own place"],
            (wall, "--year", "1850"): ["--year", "1901 to 2099"],
            (wall, "--year", "next"): ["--year", "not a year"],
            (*([wall] * 13),): ["too many"],
            (self.folder / "none.yaml",): ["no such file"],
        }
        for words, parts in cases.items():
            with self.subTest(words):
                status, out, err = run("sunlight", *words)
                self.assertEqual((status, out), (ERROR, ""))
                for part in parts:
                    self.assertIn(part, err)


class Fix(Bench):
    def test_two_pages_at_most_for_every_design(self):
        for design in DESIGNS:
            for dates in (("--on", "2027-06-14"), ("--on", "2027-03-25", "--to", "2027-04-20")):
                with self.subTest(design.name, dates=dates):
                    sheet = self.folder / "fix.pdf"
                    status, out, err = run("fix", design, *dates, "--pdf", sheet)
                    self.assertEqual((status, err), (FINE, ""))
                    self.assertNotIn("nan", out)
                    pages = [page.get_text() for page in fitz.open(sheet)]
                    self.assertTrue(1 <= len(pages) <= 2)
                    for words in ("Fixing: ", "North by shadows", "Level and plumb", "Never look at the Sun"):
                        self.assertIn(words, "".join(pages))

    def test_the_same_words_give_the_same_bytes(self):
        design, sheets = self.design(WALL), [self.folder / name for name in ("a.pdf", "b.pdf")]
        said = [run("fix", design, "--on", "2027-06-14", "--pdf", sheet, env={"TZ": tz, "PATH": "/usr/bin", "HOME": str(self.folder)})
                for sheet, tz in zip(sheets, ("Pacific/Auckland", "America/Lima"))]
        self.assertEqual(said[0], said[1])
        self.assertEqual(sheets[0].read_bytes(), sheets[1].read_bytes())

    def test_summer_time_is_in_the_clock(self):
        dates = strict_json(run("fix", self.design(LEVEL), "--on", "2027-03-27", "--to", "2027-03-28", "--json")[1])["dates"]
        self.assertEqual([date["noon"][11:16] for date in dates], ["12:13", "13:12"])
        self.assertEqual([date["noon"][-6:] for date in dates], ["+00:00", "+01:00"])

    def test_answers_are_what_the_plate_does(self):
        """A level plate laid with its east edge down is the plate of a place farther west: 4 minutes a degree at the equator."""
        text = LEVEL.replace("54.2", "0.001")
        answers = strict_json(run("fix", self.design(text), "--on", "2027-03-21", "--json")[1])["answers"]
        for answer in answers:
            self.assertAlmostEqual(answer["roll_min_per_deg"], 4, delta=0.001)
        # An equatorial plate turns about the Earth's axis in its own plane: clockwise as seen from the pole's side.
        equatorial = LEVEL.replace("level", "equatorial")
        answers = strict_json(run("fix", self.design(equatorial), "--on", "2027-06-21", "--json")[1])["answers"]
        for answer in answers:
            self.assertAlmostEqual(answer["roll_min_per_deg"], -4, delta=0.001)

    def test_csv_and_json_say_the_same(self):
        words = ("fix", self.design(TWO_FACES), "--on", "2027-06-21")
        rows = list(csv.DictReader(io.StringIO(run(*words, "--csv")[1])))
        dates = strict_json(run(*words, "--json")[1])["dates"]
        self.assertEqual([(row["clock"], row["face"], row["reads"]) for row in rows], [(row["clock"], row["face"], row["reads"]) for row in dates[0]["rows"]])
        self.assertEqual([row["on_plate"] == "yes" for row in rows], [row["on_plate"] for row in dates[0]["rows"]])

    def test_the_packet_has_it_where_the_design_names_days(self):
        for text, there in ((WALL, False), (WALL + "fixing: {on: 2027-06-14}\n", True)):
            packet = self.folder / f"packet-{there}"
            status, _, err = run("make", self.design(text), "--to", packet)
            self.assertIn(status, (FINE, WITH_WARNINGS), err)
            pages = "".join(page.get_text() for page in fitz.open(packet / "sheets.pdf"))
            self.assertEqual("Fixing: " in pages, there)

    def test_wrong_words(self):
        wall = self.design(WALL)
        cases = {
            (wall,): ["--on"],
            (wall, "--on", "soon"): ["--on", "not a date"],
            (wall, "--on", "2027-06-14", "--to", "2027-08-14"): ["--to", "at most 31 days"],
            (self.folder / "none.yaml", "--on", "2027-06-14"): ["no such file"],
            (self.design(WALL.replace("23°", "123°"), "bad.yaml"), "--on", "2027-06-14"): ["dial: facing"],
        }
        for words, parts in cases.items():
            with self.subTest(words):
                status, out, err = run("fix", *words)
                self.assertEqual((status, out), (ERROR, ""))
                for part in parts:
                    self.assertIn(part, err)


class Accuracy(Bench):
    def test_every_design_is_judged_on_one_page_a_face(self):
        for design in DESIGNS:
            with self.subTest(design.name):
                sheet = self.folder / "accuracy.pdf"
                status, out, err = run("accuracy", design, "--pdf", sheet)
                self.assertEqual((status, err), (FINE, ""))
                self.assertNotRegex(out, r"\bnan\b|\binf\b")
                faces = strict_json(run("accuracy", design, "--json")[1])["faces"]
                pages = [page.get_text() for page in fitz.open(sheet)]
                self.assertEqual(len(pages), len(faces))
                for face, page in zip(faces, pages, strict=True):
                    self.assertTrue("It supports a reading to" in page or not face["supported"])
                    self.assertTrue(face["lines"])

    def test_squares_add_up_and_csv_says_the_same(self):
        design = self.design(WALL)
        lines = strict_json(run("accuracy", design, "--json")[1])["faces"][0]["lines"]
        rows = list(csv.DictReader(io.StringIO(run("accuracy", design, "--csv")[1])))
        cells = [(line, season, cell) for line in lines for season, cell in line["at"].items() if cell]
        self.assertEqual(len(rows), len(cells))
        for row, (line, season, cell) in zip(rows, cells, strict=True):
            self.assertEqual((row["label"], row["season"]), (line["label"], season))
            self.assertAlmostEqual(float(row["total_min"]), cell["total_min"], places=3)
            self.assertAlmostEqual(cell["total_min"] ** 2, sum(minutes ** 2 for minutes in cell["slips_min"].values()), places=3)
            self.assertEqual(cell["slips_min"][cell["most"]], max(cell["slips_min"].values()))
            self.assertEqual(row["level_min"], "")  # a wall has none

    def test_the_designs_own_figures_count(self):
        def worst(text, slip):
            lines = strict_json(run("accuracy", self.design(text), "--json")[1])["faces"][0]["lines"]
            return max(cell["slips_min"][slip] for line in lines for cell in line["at"].values() if cell)

        for key, given, slip in (("marking", "0.1 mm", "marking"), ("style height", "0.1°", "style_height"), ("substyle", "0.1°", "substyle"),
                                 ("facing", "0.1°", "facing"), ("lean", "0.1°", "lean"), ("print", "0.01 mm", "print"), ("position", "0.001°", "position")):
            with self.subTest(key):
                self.assertLess(worst(WALL + f"accuracy: {{{key}: {given}}}\n", slip), 0.5 * worst(WALL, slip))

    def test_the_packet_has_the_page(self):
        packet = self.folder / "packet"
        status, _, err = run("make", self.design(WALL), "--to", packet)
        self.assertIn(status, (FINE, WITH_WARNINGS), err)
        self.assertIn("How good it will be", "".join(page.get_text() for page in fitz.open(packet / "sheets.pdf")))

    def test_wrong_words(self):
        for words, part in (((self.folder / "none.yaml",), "no such file"), ((self.design(WALL), "--pdf", self.folder), "folder"),
                            ((self.design(WALL), "--json", "--csv"), "--json")):
            status, out, err = run("accuracy", *words)
            self.assertEqual((status, out), (ERROR, ""))
            self.assertIn(part, err)


if __name__ == "__main__":
    unittest.main()
