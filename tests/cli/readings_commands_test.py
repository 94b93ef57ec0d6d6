# SPDX-License-Identifier: MIT
"""survey, adjust and restore as their users meet them: the worked examples of their pages, what they write, and each file of
tests/bad_readings: COMMAND_name.yaml must be refused with the very lines of COMMAND_name.expect."""
import re
import subprocess
import unittest

from program import ERROR, FINE, SOURCE, WALL, WITH_WARNINGS, Bench, numbers_of, run, strict_json

SLATE = SOURCE / "designs/skelder-beck-slate.yaml"


def example(page):
    text = (SOURCE / "docs" / page).read_text(encoding="utf-8")
    return re.search(r"```yaml\n(.*?)```", text, re.DOTALL).group(1)


def printed(page):
    """The text blocks of a page: what its example is said to print."""
    text = (SOURCE / "docs" / page).read_text(encoding="utf-8")
    return re.findall(r"```text\n(.*?)```", text, re.DOTALL)


class Examples(Bench):
    def check_page(self, page, *words):
        status, out, err = run(*words)
        self.assertIn(status, (FINE, WITH_WARNINGS), err)
        for block in printed(page):
            self.assertIn(block, out)
        return out, err

    def test_survey_prints_what_its_page_says(self):
        out, err = self.check_page("survey.md", "survey", self.design(example("survey.md")))
        self.assertIn("shadow 4 ", err)
        self.assertIn("13.6 mm", err)
        self.assertIn("  facing: S 23° 4' E\n", out)

    def test_adjust_prints_what_its_page_says(self):
        self.check_page("adjust.md", "adjust", SLATE, self.design(example("adjust.md")))

    def test_restore_prints_what_its_page_says(self):
        out, err = self.check_page("restore.md", "restore", self.design(example("restore.md")))
        self.assertIn("the line of X ", err)
        self.assertRegex(out, r"\?\s+3:00 .*unreadable")


class Survey(Bench):
    def test_json(self):
        status, out, _ = run("survey", self.design(example("survey.md")), "--json")
        made = strict_json(out)
        self.assertEqual((status, made["format"], len(made["answers"])), (WITH_WARNINGS, 1, 1))
        answer = made["answers"][0]
        self.assertAlmostEqual(answer["facing_deg"]["value"], 157, delta=answer["facing_deg"]["range"])
        self.assertAlmostEqual(answer["lean_deg"]["value"], 1.5, delta=answer["lean_deg"]["range"])
        self.assertEqual([shadow["left_out"] for shadow in answer["shadows"]], [False] * 3 + [True] + [False] * 3)
        self.assertTrue(made["good_to_cut"])

    def test_a_bearing_or_a_lean_that_the_shadows_contradict_is_left_out(self):
        for wrong, said in (("compass: {bearing: S 61° E ± 3°, variation: 1° W}\n", "the compass bearing was off by 3"),
                            ("lean: 1.4° forward ± 0.2°\n", "the lean was measured wrong by 2")):
            readings = self.design(example("survey.md") + wrong)
            self.assertIn("note: " + said, run("survey", readings)[2])
            [answer] = strict_json(run("survey", readings, "--json")[1])["answers"]
            self.assertAlmostEqual(answer["facing_deg"]["value"], 157, delta=answer["facing_deg"]["range"])
            self.assertAlmostEqual(answer["lean_deg"]["value"], 1.5, delta=answer["lean_deg"]["range"])

    def test_sheet(self):
        sheet = self.folder / "survey.pdf"
        run("survey", self.design(example("survey.md")), "--pdf", sheet)
        text = subprocess.run(["pdftotext", "-layout", sheet, "-"], capture_output=True, text=True, check=True).stdout
        for said in ("Facing S 23° 4' E ± 12'", "left out", "Rings: where the answer puts them"):
            self.assertIn(said, text)

    def test_into_changes_two_values_and_nothing_else(self):
        wall = self.design("# mine\n" + WALL.replace("S 23° E", "S 40° E"), "wall.yaml")
        wall.chmod(0o640)
        link = self.folder / "link.yaml"
        link.symlink_to(wall)
        before = wall.read_text(encoding="utf-8")
        status, out, _ = run("survey", self.design(example("survey.md"), "readings.yaml"), "--into", link)
        self.assertEqual(status, WITH_WARNINGS)
        self.assertIn("written into", out)
        self.assertTrue(link.is_symlink())
        self.assertEqual(wall.read_text(encoding="utf-8"), before.replace("S 40° E", "S 23° 4' E, lean: 1° 24' back"))

    def test_into_refuses_what_is_not_settled(self):
        wall = self.design(WALL, "wall.yaml")
        place = "place: {latitude: 51.5, longitude: -2.2, zone: Europe/London}\n"
        rough = self.design(place + "compass: {bearing: S 20° E ± 12°, variation: 1° W}\n", "rough.yaml")
        status, out, err = run("survey", rough, "--into", wall)
        self.assertEqual((status, out), (ERROR, ""))
        self.assertIn("not settled enough", err)
        self.assertEqual(wall.read_text(encoding="utf-8"), WALL)
        level = self.design(WALL.replace("kind: wall, facing: S 23° E", "kind: level"), "level.yaml")
        before = level.read_bytes()
        status, _, err = run("survey", self.design(example("survey.md"), "readings.yaml"), "--into", level)
        self.assertEqual((status, level.read_bytes()), (ERROR, before))
        self.assertIn("nothing was changed", err)

    def test_compass_warns_of_iron_and_claims_no_lean(self):
        place = "place: {latitude: 51.5, longitude: -2.2, zone: Europe/London}\n"
        status, out, err = run("survey", self.design(place + "compass: {bearing: S 20° E ± 3°, variation: 1° W ± 0.5°}\n"))
        self.assertEqual(status, WITH_WARNINGS)
        self.assertIn("iron", err)
        self.assertIn("facing       S 21° E", out)
        self.assertIn("lean         not told", out)

    def test_a_slow_clock_gets_two_answers_and_no_lines_to_paste(self):
        slow = re.sub(r"at: (\S+) (\d\d):", lambda m: f"at: {m[1]} {int(m[2]) - 1:02}:", example("survey.md"))
        status, out, err = run("survey", self.design(slow))
        self.assertEqual(status, WITH_WARNINGS, err)
        self.assertIn("the clock was", out + err)
        self.assertIn("whole hour", err)
        if out.count("facing ") > 1:
            self.assertNotIn("For the design file", out)

    def test_board(self):
        board = self.folder / "board.pdf"
        status, out, err = run("survey", "--board", board)
        self.assertEqual((status, err), (FINE, ""))
        text = subprocess.run(["pdftotext", "-layout", board, "-"], capture_output=True, text=True, check=True).stdout
        for said in ("Never look at the Sun", "plumb line", "100.0 mm", "-80", "200"):
            self.assertIn(said, text)
        first = board.read_bytes()
        run("survey", "--board", board)
        self.assertEqual(board.read_bytes(), first)
        self.assertEqual(run("survey", "--board", board, "--paper", "A33")[0], ERROR)

    def test_words(self):
        for words, said in (([], "--board FILE"), (["--into", "x.yaml", "--board", self.folder / "b.pdf"], "no readings"),
                            (["nothing.yaml"], "no such file"), ([self.folder], "folder")):
            status, out, err = run("survey", *words)
            self.assertEqual((status, out), (ERROR, ""))
            self.assertIn(said, err)


class Adjust(Bench):
    def test_json_and_sheet(self):
        sheet = self.folder / "fitter.pdf"
        status, out, _ = run("adjust", SLATE, self.design(example("adjust.md")), "--json", "--pdf", sheet)
        made = strict_json(out)
        self.assertEqual(status, FINE)
        answer = made["answers"][0]
        self.assertEqual(answer["fault"], "fixing")
        for key, truth in (("turn_deg", 3), ("top_deg", -1.2), ("right_deg", 0.4)):
            self.assertAlmostEqual(answer[key]["value"], truth, delta=answer[key]["range"])
        self.assertEqual(len(answer["steps"]), 2)
        text = subprocess.run(["pdftotext", sheet, "-"], capture_output=True, text=True, check=True).stdout
        self.assertIn("Turn it 2.7°", text)
        self.assertIn("Never look at the Sun", text)

    def test_near_an_equinox_tilts_are_not_told(self):
        readings = "day: 2027-03-21\nreadings:\n" + "".join(
            f"  - {{at: {hour}:00, reads: {hour}:{minute:02}}}\n" for hour, minute in zip(range(9, 17), (0, 1, 0, 59, 0, 1, 0, 0)))
        readings = readings.replace("reads: 12:59", "reads: 12:00")
        status, out, err = run("adjust", SLATE, self.design(readings))
        self.assertEqual(status, WITH_WARNINGS)
        self.assertIn("not told by these readings", out)
        self.assertIn("equinox", err)
        self.assertIn("If a level and a plumb line find the plate right:", out)

    def test_moved(self):
        out = run("adjust", SLATE, "--latitude", "50° N")[1]
        self.assertIn("no turn", out)
        self.assertIn("a wedge of 4.45° under its edge towards south", out)
        made = strict_json(run("adjust", SLATE, "--latitude", "50° N", "--json")[1])
        self.assertAlmostEqual(made["wedge_deg"], 4.45, places=6)
        self.assertAlmostEqual(made["normal_altitude_deg"], 85.55, places=6)

    def test_words(self):
        readings = self.design(example("adjust.md"))
        for words, said in ((["x"], "--latitude"), ([SLATE], "--latitude"), ([SLATE, readings, "--latitude", "50"], "--latitude"),
                            ([SLATE, "--latitude", "95"], "no latitude"), ([SLATE, "--zone", "London/Europe"], "time zone"),
                            ([SLATE, readings, "--face", "upper"], "no such face")):
            status, out, err = run("adjust", *words)
            self.assertEqual((status, out), (ERROR, ""), words)
            self.assertIn(said, err)


class Restore(Bench):
    def test_json(self):
        made = strict_json(run("restore", self.design(example("restore.md")), "--json")[1])
        way = made["ways"][0]
        self.assertEqual((way["if"], way["known"], way["for_this_place"], made["settled"]), ("upright", True, True, True))
        self.assertAlmostEqual(way["latitude_deg"]["value"], 53.9, delta=way["latitude_deg"]["range"])
        self.assertAlmostEqual(way["facing_deg"]["value"], 157, delta=way["facing_deg"]["range"])
        self.assertEqual([line["hour"] for line in made["lines"] if line["left_out"]], ["X"])

    def test_sheet(self):
        sheet = self.folder / "plate.pdf"
        run("restore", self.design(example("restore.md")), "--pdf", sheet, "--paper", "Letter")
        text = subprocess.run(["pdftotext", "-layout", sheet, "-"], capture_output=True, text=True, check=True).stdout
        for said in ("If it stood upright (which is known)", "cut or read wrong", "Black: as measured"):
            self.assertIn(said, text)

    def test_the_recut_plate_has_the_old_lines(self):
        recut = self.folder / "recut.yaml"
        lines = self.design(example("restore.md"))
        self.assertEqual(run("restore", lines, "--recut", recut)[0], WITH_WARNINGS)
        cut = {line["label"]: line["angle_deg"] for line in numbers_of(recut)["hour_lines"] if line["angle_deg"] is not None}
        measured = re.findall(r"hour: ([IVX]+), direction: ([\d.]+)°", example("restore.md"))
        self.assertGreater(len(measured), 7)
        for hour, direction in measured:
            if hour != "X":
                off = (cut[hour] - float(direction) + 180) % 360 - 180
                self.assertLess(abs(off), 0.8, hour)
        before = recut.read_bytes()
        status, _, err = run("restore", lines, "--recut", recut)
        self.assertEqual((status, recut.read_bytes()), (ERROR, before))
        self.assertIn("there is a file of this name", err)

    def test_several_plates_want_a_choice(self):
        # Nothing is known but the lines: hours shifted, so that no fact comes out by itself.
        lines = re.sub(r"stood: upright\n", "", example("restore.md"))
        lines = re.sub(r"place:\n(  .*\n)+", "", lines).replace("noon: certain\n", "") + "noon: uncertain\n"
        file = self.design(lines)
        status, out, err = run("restore", file, "--recut", self.folder / "one.yaml")
        self.assertEqual((status, out), (ERROR, ""))
        self.assertIn("--as ", err)
        self.assertFalse((self.folder / "one.yaml").exists())
        self.assertIn("stood:", run("restore", file)[2])
        status, _, err = run("restore", file, "--recut", self.folder / "one.yaml", "--as", "upright")
        self.assertEqual(status, WITH_WARNINGS, err)
        numbers_of(self.folder / "one.yaml")
        self.assertIn("no such plate", run("restore", file, "--recut", self.folder / "two.yaml", "--as", "round")[2])


class BadReadings(Bench):
    def test_each_is_refused_with_its_lines(self):
        folder = SOURCE / "tests/bad_readings"
        files = sorted(folder.glob("*.yaml"))
        self.assertGreaterEqual(len(files), 20)
        self.assertEqual([f.stem for f in files], sorted(f.stem for f in folder.glob("*.expect")))
        for file in files:
            command = file.stem.split("_")[0]
            words = [command, SLATE, file.name] if command == "adjust" else [command, file.name]
            status, out, err = run(*words, cwd=folder)
            with self.subTest(file.name):
                self.assertEqual((status, out), (ERROR, ""))
                self.assertEqual(err, file.with_suffix(".expect").read_text(encoding="utf-8"))


if __name__ == "__main__":
    unittest.main()
