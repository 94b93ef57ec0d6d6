# SPDX-License-Identifier: MIT
"""The commands that are asked of a place: sun."""
import csv
import io
import unittest

from program import ERROR, FINE, LEVEL, Bench, run, strict_json

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
        status, _, err = run("sun", *MOOR, "--on", "2027-06-01", "--to", "2027-06-30", "--sheet", sheet, "--paper", "Letter")
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
            (*MOOR, "--on", "2027-06-14", "--sheet", self.folder): ["--sheet", "folder"],
            (*MOOR, "--on", "2027-06-14", "--sheet", self.folder / "a.pdf", "--paper", "A44"): ["--paper", "A4"],
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


if __name__ == "__main__":
    unittest.main()
