# SPDX-License-Identifier: MIT
"""Every command as its users see it: what it prints, where, and with which status."""
import csv
import io
import os
import re
import subprocess
import unittest

from program import (DESIGNS, ERROR, FINE, LEVEL, TWO_FACES, WALL, WITH_WARNINGS, Bench, contents_of, faces_of,
                     numbers_of, run, strict_json)

COMMANDS = ("make", "numbers", "shadow", "check")
THICK_PIN = """
place: {name: Kettle Ness, latitude: 85.35, longitude: 20, zone: Europe/Oslo}
dial: {kind: equatorial, faces: both}
plate: {diameter: 48 mm, centre: [16 mm, -9.5 mm]}
borders: {margin: 0.5 mm}
gnomon: {kind: rod, nodus height: 3.2 mm, thickness: 2.3 mm}
dates: {months: yes}
"""


class Help(Bench):
    def test_every_command_has_help(self):
        for words in ([], *[[command] for command in COMMANDS]):
            for flag in ("--help", "-h"):
                status, out, err = run(*words, flag)
                self.assertEqual((status, err), (FINE, ""), words)
                self.assertIn("--help", out)
        out = run("--help")[1]
        for command in COMMANDS:
            self.assertIn(command, out)
        for option in ("--at", "--at-file", "--face", "--json"):
            self.assertIn(option, run("shadow", "--help")[1])
        for option in ("--json", "--csv"):
            self.assertIn(option, run("numbers", "--help")[1])
        self.assertIn("--to", run("make", "--help")[1])

    def test_version(self):
        status, out, err = run("--version")
        self.assertEqual((status, err), (FINE, ""))
        self.assertRegex(out, r"^dialwright \d+\.\d+\.\d+\n$")

    def test_wrong_words(self):
        for words, said in (([], "--help"), (["mkae"], 'did you mean make?'), (["carve"], "give make, numbers, shadow, check, calibrate, sun, sunlight, fix, accuracy, survey, adjust or restore"),
                            (["make"], "DESIGN"), (["make", "--bogus", "x"], "--bogus"), (["numbers", "--json", "--csv", "x"], "--csv"),
                            (["shadow", "x", "--at"], "--at"), (["check", "a", "b"], "b")):
            status, out, err = run(*words)
            self.assertEqual((status, out), (ERROR, ""), words)
            self.assertIn(said, err)


class Numbers(Bench):
    def test_json_has_the_documented_fields(self):
        for design in DESIGNS:
            numbers = numbers_of(design)
            self.assertEqual(numbers["format"], 1)
            self.assertLessEqual({"latitude_deg", "longitude_deg", "zone"}, numbers["site"].keys())
            self.assertEqual(len(numbers["equation_of_time"]), 366)
            for day in numbers["equation_of_time"]:
                self.assertRegex(day["date"], r"^\d\d-\d\d$")
                self.assertLess(abs(day["minutes"]), 17)
            for _, face in faces_of(numbers):
                self.assertLessEqual({"normal_azimuth_deg", "normal_altitude_deg"}, face["plate"].keys())
                self.assertGreater(face["nodus"]["height_mm"], 0)
                self.assertLessEqual({"height_deg", "substyle_deg", "centre_mm"}, face["style"].keys())
                self.assertTrue(face["hour_lines"])
                self.assertTrue(face["date_lines"])
                for line in face["hour_lines"]:
                    self.assertLessEqual({"label", "time_h", "hour_angle_deg", "angle_deg", "points_mm"}, line.keys())
                for line in face["date_lines"]:
                    self.assertLessEqual({"label", "declination_deg", "points_mm"}, line.keys())
                for line in face["hour_lines"] + face["date_lines"]:
                    self.assertGreaterEqual(len(line["points_mm"]), 2)
                    for point in line["points_mm"]:
                        self.assertEqual(len(point), 2)
                        self.assertTrue(all(isinstance(value, (int, float)) for value in point))

    def test_angles_run_clockwise_from_up(self):
        # At 54.2 N, classical: tan X = sin(latitude) tan H (gnomonics.md, 4); in the afternoon the shadow lies to the east.
        numbers = numbers_of(self.design(LEVEL))
        angle = {line["label"]: line["angle_deg"] for line in numbers["hour_lines"]}
        self.assertAlmostEqual(angle["XII"] % 360, 0, places=5)
        self.assertAlmostEqual(angle["III"], 39.0445, delta=1e-3)
        self.assertAlmostEqual(angle["IX"] % 360, 360 - 39.0445, delta=1e-3)

    def test_a_polar_plate_has_no_centre(self):
        text = LEVEL.replace("kind: level", "kind: leaning, facing: south, lean: 35.8° back")
        numbers = numbers_of(self.design(text))
        self.assertIsNone(numbers["style"]["centre_mm"])
        self.assertAlmostEqual(numbers["style"]["height_deg"], 0, places=6)

    def test_csv_is_a_table_of_the_same_lines(self):
        for text in (LEVEL, WALL, TWO_FACES):
            design = self.design(text)
            status, out, err = run("numbers", design, "--csv")
            self.assertEqual((status, err), (FINE, ""))
            rows = list(csv.DictReader(io.StringIO(out)))
            lines = [(name, line) for name, face in faces_of(numbers_of(design)) for line in face["hour_lines"]]
            self.assertEqual(len(rows), len(lines))
            for row, (name, line) in zip(rows, lines):
                self.assertEqual((row["face"], row["label"]), (name, line["label"]))
                self.assertAlmostEqual(float(row["angle_deg"]), line["angle_deg"], places=5)
                self.assertAlmostEqual(float(row["outer_u_mm"]), line["points_mm"][-1][0], places=3)

    def test_text_is_laid_out(self):
        for design in DESIGNS:
            status, out, err = run("numbers", design)
            self.assertEqual((status, err), (FINE, ""))
            self.assertIn("Equation of time", out)
            self.assertRegex(out, r"style height +\d+\.\d{4}° \(\d+° \d\d\.\d'\)")
            self.assertNotRegex(out, r"nan|inf|-0\.0 |[ \t]+\n")


class Shadow(Bench):
    def test_text(self):
        status, out, err = run("shadow", self.design(LEVEL), "--at", "2026-06-21T11:00:00Z", "--at", "2026-12-21T20:00:00Z")
        self.assertEqual((status, err), (FINE, ""))
        head, noon, night = out.splitlines()
        self.assertIn("reads", head)
        self.assertIn("2026-06-21T12:00:00 BST", noon)
        self.assertIn("2026-12-21T20:00:00 GMT", night)
        self.assertIn("Sun down", night)

    def test_json_of_several_instants(self):
        design = self.design(LEVEL)
        listed = self.folder / "times.txt"
        listed.write_bytes(b"\xef\xbb\xbf2026-06-21T11:00:00Z\r\n\r\n  2026-06-21T13:00:00.25+02:00 \t\r\n2026-06-21T06:00:00-05:00")
        status, out, err = run("shadow", design, "--at", "2026-01-01T00:00Z", "--at", "2026-06-21T11:00Z", "--at-file", listed, "--json")
        self.assertEqual((status, err), (FINE, ""))
        reports = strict_json(out)
        self.assertEqual([report["at"] for report in reports],
                         ["2026-01-01T00:00Z", "2026-06-21T11:00Z", "2026-06-21T11:00:00Z", "2026-06-21T13:00:00.25+02:00", "2026-06-21T06:00:00-05:00"])
        night, *day = reports
        self.assertEqual((night["lit"], night["shadow_mm"], night["reads"]), (False, None, None))
        self.assertLess(night["sun"]["altitude_deg"], 0)
        self.assertEqual(day[0]["shadow_mm"], day[1]["shadow_mm"])
        self.assertEqual(day[0]["shadow_mm"], day[3]["shadow_mm"])
        self.assertNotEqual(day[0]["shadow_mm"], day[2]["shadow_mm"])
        for report in reports:
            self.assertEqual(report["sun"].keys(), {"altitude_deg", "azimuth_deg", "declination_deg", "hour_angle_deg", "equation_of_time_min"})
            self.assertTrue(0 <= report["sun"]["azimuth_deg"] < 360)
            self.assertTrue(-180 <= report["sun"]["hour_angle_deg"] <= 180)
        for report in day:
            self.assertTrue(report["lit"])
            self.assertRegex(report["reads"], r"^\d\d:\d\d:\d\d$")

    def test_standard_input_and_a_hundred_thousand_lines(self):
        lines = [f"2026-{1 + i // 3600 % 12:02}-{1 + i // 43200 % 28:02}T{i // 60 % 24:02}:{i % 60:02}:00Z" for i in range(100000)]
        status, out, err = run("shadow", self.design(LEVEL), "--at-file", "-", "--json", stdin="\n".join(lines).encode())
        self.assertEqual((status, err), (FINE, ""))
        reports = strict_json(out)
        self.assertEqual([report["at"] for report in reports], lines)

    def test_bad_instants_are_told_each_with_its_line(self):
        design = self.design(LEVEL)
        listed = self.folder / "times.txt"
        listed.write_text("2026-06-21T11:00:00Z\n2026-06-21T11:00:00\nnoon\n2026-02-29T00:00Z\n")
        status, out, err = run("shadow", design, "--at", "1782039600", "--at-file", listed, "--json")
        self.assertEqual((status, out), (ERROR, ""))
        for part in ('--at: "1782039600" is not an instant', f'{listed}:2:1: "2026-06-21T11:00:00" is not', f'{listed}:3:1: "noon"',
                     f'{listed}:4:1: "2026-02-29T00:00Z"', "2026-06-21T12:00:00+01:00"):
            self.assertIn(part, err)
        self.assertEqual(len(err.splitlines()), 4)

    def test_no_instant_no_file_a_folder(self):
        design = self.design(LEVEL)
        for words, said in (([], "no instant is given"), (["--at-file", self.folder / "none"], "cannot be read"),
                            (["--at-file", self.folder], "folder"), (["--at-file", "-"], "no instant is given"),
                            (["--at", "9999-01-01T00:00Z"], "1800 to 2199")):
            status, out, err = run("shadow", design, "--json", *words)
            self.assertEqual((status, out), (ERROR, ""), words)
            self.assertIn(said, err)

    def test_faces(self):
        design = self.design(TWO_FACES)
        summer, winter, night = "2026-06-21T12:00Z", "2026-12-21T12:00Z", "2026-12-21T22:00Z"
        words = [word for at in (summer, winter, night) for word in ("--at", at)]
        reports = strict_json(run("shadow", design, "--json", *words)[1])
        self.assertEqual([(report["face"], report["lit"]) for report in reports], [("upper", True), ("lower", True), ("upper", False)])
        for face, lit in (("upper", [True, False, False]), ("lower", [False, True, False])):
            reports = strict_json(run("shadow", design, "--json", "--face", face, *words)[1])
            self.assertEqual([report["lit"] for report in reports], lit)
            self.assertEqual({report["face"] for report in reports}, {face})
        status, out, err = run("shadow", design, "--face", "back", "--at", summer)
        self.assertEqual((status, out), (ERROR, ""))
        self.assertIn("upper and lower", err)
        status, out, err = run("shadow", self.design(LEVEL), "--face", "upper", "--at", summer)
        self.assertEqual((status, out), (ERROR, ""))
        self.assertIn("only one", err)
        self.assertNotIn("face", strict_json(run("shadow", self.design(LEVEL), "--json", "--at", summer)[1])[0])


class Check(Bench):
    def test_every_design_can_be_made_and_says_what_was_assumed(self):
        for design in DESIGNS:
            status, out, err = run("check", design)
            self.assertIn(status, (FINE, WITH_WARNINGS), err)
            self.assertEqual(status == WITH_WARNINGS, "note: " in out, design)
            self.assertIn("can be made", out)
        status, out, _ = run("check", self.design(LEVEL))
        for key in ("title", "hours: divide", "lettering: font", "print: paper", "gnomon: nodus height", "borders: chapter ring"):
            self.assertRegex(out, rf"(?m)^  {key}  +\S")

    def test_a_nodus_that_loses_some_dates_is_told_with_one_that_keeps_more(self):
        text = LEVEL + "gnomon: {nodus height: 90 mm}\n"
        _, out, _ = run("check", self.design(text))
        found = re.search(r"a nodus 90\.0 mm above the plate throws (\d) of its date lines off it \(.*\): about ([\d.]+) mm would keep more", out)
        self.assertTrue(found, out)
        _, better, _ = run("check", self.design(text.replace("90 mm", f"{found[2]} mm")))
        self.assertNotIn("of its date lines off it", better)

    def test_a_nodus_is_not_said_to_be_wrong_where_no_other_can_be_made(self):
        """The height that the plate would take is too low for a pin as thick as this one."""
        _, out, err = run("check", self.design(THICK_PIN))
        self.assertIn("can be made", out, err)
        self.assertIn("their lines miss the field", out)
        self.assertNotIn("throws", out)

    def test_what_the_named_tool_cannot_cut_is_told_with_its_place(self):
        fine = run("check", self.design(LEVEL + "cutting: {tool: laser, diameter: 0.1 mm}\n"))[1]
        self.assertNotIn("the tool leaves no line", fine)
        status, out, _ = run("check", self.design(LEVEL + "cutting: {tool: end mill, diameter: 3 mm}\n"))
        self.assertEqual(status, WITH_WARNINGS)
        place = r"\d+ mm (right|left) and \d+ mm (up|down) from the plate's middle"
        self.assertRegex(out, r"the tool leaves no line finer than 3\.00 mm, and letters .* " + place)
        self.assertRegex(out, r'"hour line \w+" and "date line 21 Jun" leave [\d.]+ mm between them ' + place)

    def test_it_writes_nothing(self):
        design = self.design(LEVEL)
        before = contents_of(self.folder)
        run("check", design, cwd=self.folder)
        self.same(before, contents_of(self.folder))


class Make(Bench):
    def test_it_says_what_it_wrote(self):
        design = self.design(TWO_FACES, "two faces.yaml")
        status, out, err = run("make", design, cwd=self.folder)
        self.assertIn(status, (FINE, WITH_WARNINGS), err)
        self.assertEqual(status == WITH_WARNINGS, "note: " in err)
        packet = self.folder / "two faces-packet"
        files = contents_of(packet)
        self.assertEqual(files.keys(), {"sheets.pdf", "plate-upper.svg", "plate-upper.dxf", "plate-lower.svg", "plate-lower.dxf", "parts.csv", "setting-out-upper.csv",
                                        "setting-out-lower.csv", "hour-lines.csv", "numbers.txt", "numbers.json", "contents.txt"})
        for name in files:
            self.assertIn(f"two faces-packet/{name}", out)
        self.assertEqual(files["numbers.json"].decode(), run("numbers", design, "--json")[1])
        self.assertEqual(files["numbers.txt"].decode(), run("numbers", design)[1])
        self.assertEqual(files["hour-lines.csv"].decode(), run("numbers", design, "--csv")[1])

    def test_the_same_bytes_again_and_elsewhere(self):
        """Twice, in another folder, with another time zone and language, and with the machine's clock of no matter."""
        german = self.folder / "locale"
        german.mkdir()
        env = {**os.environ, "TZ": "Pacific/Kiritimati", "LC_ALL": "de_DE.UTF-8", "LANG": "de_DE.UTF-8", "LOCPATH": str(german)}
        made = subprocess.run(["localedef", "-i", "de_DE", "-f", "UTF-8", german / "de_DE.UTF-8"], capture_output=True)
        if made.returncode not in (0, 1):  # 1: made with warnings
            print("no German locale could be made here; LC_ALL names one that is not there:", made.stderr.decode().strip())
        for design in DESIGNS:
            packets = [self.folder / name / design.stem for name in ("one", "two", "three")]
            for packet, more in zip(packets, ({}, {}, {"env": env, "cwd": "/"})):
                status, _, err = run("make", design, "--to", packet, **more)
                self.assertIn(status, (FINE, WITH_WARNINGS), err)
            first, *others = map(contents_of, packets)
            for other in others:
                self.same(first, other)

    def test_other_files_in_the_folder_stay(self):
        packet = self.folder / "packet"
        packet.mkdir()
        (packet / "survey.txt").write_text("mine")
        run("make", self.design(LEVEL), "--to", packet)
        self.assertEqual((packet / "survey.txt").read_text(), "mine")
        self.assertFalse([name for name in contents_of(packet) if name.endswith(".part")])

    def test_folders_above_are_made(self):
        for to in ("a/b/c", "d/e/"):
            status, _, err = run("make", self.design(LEVEL), "--to", f"{self.folder}/{to}")
            self.assertIn(status, (FINE, WITH_WARNINGS), err)
            self.assertTrue((self.folder / to / "sheets.pdf").is_file())


if __name__ == "__main__":
    unittest.main()
