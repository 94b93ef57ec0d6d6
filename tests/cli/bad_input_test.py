# SPDX-License-Identifier: MIT
"""What cannot be made is told where it stands, with status 2; nothing is written, and an earlier packet stays as it was."""
import os
import resource
import signal
import subprocess
import unittest

from program import (ERROR, FINE, LEVEL, PLACE, PROGRAM, TWO_FACES, WALL, WITH_WARNINGS, Bench, contents_of, run)

# At the pole itself the lower face of an equatorial dial looks down at a Sun that is never up. Elsewhere each plate that is
# not face down gets some grazing light when the Sun rises or sets within 90° of the way that it faces.
UNLIT = PLACE.replace("54.2", "90° N") + "dial:\n  kind: equatorial\n  faces: lower\nplate: {diameter: 300 mm}\n"
BOMB = "a: &a [x, x, x, x, x, x, x, x, x]\n" + "".join(
    f"{b}: &{b} [{', '.join(['*' + a] * 9)}]\n" for a, b in zip("abcdefgh", "bcdefghi"))

# name: (design, key's line:column or "", parts of the message)
CASES = {
    "unknown key": (PLACE + "dial: {kind: level}\nplate:\n  daimeter: 360 mm\n", "4:3", ['"daimeter"', 'did you mean "diameter"?']),
    "duplicate key": (LEVEL + "title: One\ntitle: Two\n", "5:1", ["title", "twice"]),
    "wrong unit": (LEVEL.replace("360 mm", "360 kg"), "3:19", ["plate: diameter", '"360 kg"', "mm"]),
    "no unit": (LEVEL.replace("360 mm", "360"), "3:19", ["plate: diameter", "has no unit"]),
    "latitude 95": (LEVEL.replace("54.2", "95°"), "1:19", ["place: latitude", '"95°"', "90° S to 90° N"]),
    "a wall that the Sun never reaches": (UNLIT, "3:9", ["dial: kind", "the Sun never lights", "level, face down", "90° 00.0' N"]),
    "a level plate face down has no kind": (LEVEL.replace("level", "ceiling"), "2:14", ["dial: kind", '"ceiling"']),
    "hours that are never lit": (WALL + "hours:\n  from: 20:00\n  to: 22:00\n", "5:9", ["hours: from", "never lit between", "it is lit from"]),
    "an hour that is never lit": (WALL + "hours:\n  from: 6:00\n  to: 23:00\n", "6:7", ["hours: to", "never lit at", "it is lit from"]),
    "a nodus that throws every date line off": (LEVEL + "gnomon:\n  nodus height: 4 m\n", "5:17", ["gnomon: nodus height", "throws every date line off", "would do"]),
    "a nodus that throws every hour's curve off": (PLACE + "dial: {kind: equatorial}\nplate: {diameter: 60 mm}\nhours: {time: clock}\ngnomon:\n  nodus height: 90 mm\n",
                                                  "6:17", ["gnomon: nodus height", "no hour line falls on the plate", "would do"]),
    "a centre far away": (LEVEL.replace("360 mm", "360 mm, centre: [0 mm, 4 m]"), "3:", ["plate: centre", "no hour line falls on the plate"]),
    "a missing font": (LEVEL + "lettering:\n  font: Elderflower Cursive\n", "5:9", ["lettering: font", '"Elderflower Cursive"', "install"]),
    "a motto that no font has": (LEVEL + "lettering:\n  motto: \"\\U000F1234 shines\"\n", "5:10", ["lettering: motto", "U+F1234"]),
    "an unknown paper": (LEVEL + "print:\n  paper: Leter\n", "5:10", ["print: paper", '"Leter"', "did you mean Letter?"]),
    "a polygon that crosses itself": (PLACE + "dial: {kind: level}\nplate:\n  corners: [[0 mm, 0 mm], [300 mm, 300 mm], [300 mm, 0 mm], [0 mm, 300 mm]]\n",
                                      "4:", ["plate: corners", "cross"]),
    "an alias bomb": (BOMB + LEVEL, "", ["alias"]),
    "an alias": (PLACE.replace("place: ", "place: &p ") + LEVEL, "1:8", ["anchor"]),
    "invalid UTF-8": (LEVEL.encode() + b"title: Gr\xe4smere\n", "4:10", ["UTF-8"]),
    "borders that leave no field": (LEVEL + "borders:\n  margin: 100 mm\n  chapter ring: 80 mm\n", "6:17", ["borders: chapter ring", "360"[:0], "smaller"]),
    "a polygon too narrow for its borders": (PLACE + "dial: {kind: level}\nplate:\n  corners: [[0 mm, 0 mm], [400 mm, 0 mm], [400 mm, 20 mm], [20 mm, 20 mm], [20 mm, 400 mm], [0 mm, 400 mm]]\nborders:\n  margin: 11 mm\n",
                                             "6:11", ["border", "no such room"]),
    "margins that leave no room on the paper": (LEVEL + "print:\n  paper: A6\n  margin: 50 mm\n", "6:11", ["print: margin", "A6 leaves no room"]),
    "an overlap that leaves no room on the paper": (LEVEL + "print:\n  overlap: 100 mm\n  paper: A5\n", "5:12", ["print: overlap", "A5 leaves no room"]),
    "too many sheets": (LEVEL.replace("360 mm", "5 m") + "print: {paper: A6}\n", "4:", ["print: paper", "sheets"]),
    "a correction plate too small to be cut": (LEVEL + "correction:\n  form: table\n  width: 50 mm\n  height: 40 mm\n", "6:10", ["correction: width", "too small for its heading", "larger"]),
    "a ring too small to be cut": (LEVEL + "cutting: {line width: 2 mm}\ncorrection:\n  form: ring\n  diameter: 80 mm\n", "7:13", ["correction: diameter", "too small for", "finer line"]),
    "tenons longer than their foot": (LEVEL.replace("360 mm", "360 mm, thickness: 12 mm") + "gnomon: {thickness: 6 mm, joint: tenons, foot: 50 mm, tenon length: 40 mm}\n", "4:34", ["gnomon: joint", "do not fit in a foot"]),
    "a socket deeper than the plate": (LEVEL.replace("360 mm", "360 mm, thickness: 10 mm") + "gnomon: {kind: rod, thickness: 5 mm, socket: 60 mm}\n", "4:46", ["gnomon: socket", "leaves the plate"]),
    "screws wider than the gnomon": (LEVEL + "gnomon: {thickness: 6 mm, holes: 2, hole diameter: 5 mm}\n", "4:21", ["gnomon: thickness", "too wide for an edge"]),
    "a tool that parts no hours": (LEVEL + "cutting: {tool: end mill, diameter: 30 mm}\n", "4:37", ["cutting: diameter", "no hour line of this plate stands clear", "a finer tool"]),
    "a kerf that closes a slot": (LEVEL.replace("360 mm", "360 mm, thickness: 20 mm") + "gnomon: {thickness: 6 mm, joint: tenons}\ncutting: {kerf: 8 mm}\n", "5:17", ["cutting: kerf", "closes a hole of \"slot for tenon 1\""]),
    "strokes that no letter has": (LEVEL + "cutting: {letters: single strokes}\nlettering: {motto: \"日\"}\n", "5:20", ["lettering: motto", "single-stroke letters have no"]),
    "not a design": (b"%PDF-1.4\n%\xe2\xe3\xcf\xd3\n", "", ["UTF-8"]),
    "nothing at all": (b"", "1:1", ["nothing in it"]),
    "a nodus among other faults": (TWO_FACES + "dail: {}\nprint: {paper: A99}\n", "4:1", ['did you mean "dial"?']),
}


class BadDesigns(Bench):
    def test_each_is_refused_where_it_stands(self):
        packet = self.folder / "packet"
        status, _, err = run("make", self.design(LEVEL), "--to", packet)
        self.assertIn(status, (FINE, WITH_WARNINGS), err)
        before = contents_of(packet)
        for name, (text, place, parts) in CASES.items():
            design = self.design(text, "bad.yaml")
            for command in (["make", design, "--to", packet], ["check", design]):
                with self.subTest(name, command=command[0]):
                    status, out, err = run(*command)
                    self.assertEqual((status, out), (ERROR, ""), err)
                    self.same(before, contents_of(packet))
                    self.assertTrue(err.startswith(f"{design}:{place}"), err)
                    for part in parts:
                        self.assertIn(part, err)
                    for line in err.splitlines():
                        self.assertRegex(line, r"^.*bad\.yaml:\d+:\d+: .{10}")
                    self.assertLess(len(err.splitlines()), 30)
                    self.assertEqual([path.name for path in self.folder.iterdir() if path.name.endswith("-packet")], [])

    def test_a_new_folder_is_not_left_behind(self):
        run("make", self.design(UNLIT), "--to", self.folder / "new/packet")
        self.assertFalse((self.folder / "new").exists())

    def test_several_in_one_run(self):
        text = (PLACE.replace("54.2", "95") + "dial: {kind: wal, facing: S 23° Q}\nplate: {diameter: 360}\nprint: {paper: A99, margin: 8}\n"
                "lettering: {motto: [a]}\nhuors: {}\n")
        status, _, err = run("check", self.design(text))
        self.assertEqual(status, ERROR)
        for key in ("place: latitude", "dial: kind", "dial: facing", "plate: diameter", "print: paper", "print: margin", "lettering: motto", '"huors"'):
            self.assertIn(key, err)
        places = [tuple(map(int, line.split(": ")[0].split(":")[-2:])) for line in err.splitlines()]
        self.assertEqual(places, sorted(places))

    def test_what_the_sky_and_the_fonts_refuse_comes_in_one_run(self):
        text = WALL + "hours:\n  from: 21:00\n  to: 23:00\nlettering:\n  font: Elderflower Cursive\n"
        status, _, err = run("check", self.design(text))
        self.assertEqual(status, ERROR)
        self.assertIn(":5:9: hours: from", err)
        self.assertIn(":8:9: lettering: font", err)

    def test_no_file_and_a_folder(self):
        for path, said in ((self.folder / "none.yaml", "no such file"), (self.folder, "folder")):
            for command in ("make", "check", "numbers"):
                status, out, err = run(command, path, cwd=self.folder)
                self.assertEqual((status, out), (ERROR, ""))
                self.assertIn(said, err)


class BadFolders(Bench):
    def setUp(self):
        super().setUp()
        self.dial = self.design(LEVEL)
        self.packet = self.folder / "packet"
        run("make", self.dial, "--to", self.packet)
        self.before = contents_of(self.packet)
        self.changed = self.design(LEVEL.replace("360", "300"), "changed.yaml")

    def refused(self, to, *parts, before=(), **more):
        status, out, err = run("make", self.changed, "--to", to, *before, **more)
        self.assertEqual((status, out), (ERROR, ""), err)
        for part in parts:
            self.assertIn(part, err)
        self.assertEqual(len(err.splitlines()), 1, err)
        self.same(self.before, contents_of(self.packet))
        self.assertFalse([path for path in self.folder.rglob("*") if path.name.endswith(".part")])

    def test_a_file_where_the_folder_should_be(self):
        self.refused(self.dial, "cannot write", "dial.yaml", "Not a directory")
        self.refused(self.dial / "inside/packet", "cannot write", "dial.yaml", "Not a directory")
        self.refused("/dev/null", "cannot write", "Not a directory")

    def test_a_folder_where_a_file_should_be(self):
        for name in ("sheets.pdf", "numbers.json"):
            packet = self.folder / f"with {name}"
            (packet / name).mkdir(parents=True)
            self.refused(packet, "cannot write", name, "Is a directory", "nothing was changed")
            self.assertEqual(contents_of(packet), {})

    def test_an_unwritable_folder(self):
        words = [PROGRAM, "make", self.changed, "--to"]
        if os.geteuid() == 0:  # modes do not bind root: the program runs as nobody
            words = ["setpriv", "--reuid=65534", "--regid=65534", "--clear-groups", *words]
        self.folder.chmod(0o555)
        self.packet.chmod(0o555)
        self.addCleanup(self.folder.chmod, 0o755)
        self.addCleanup(self.packet.chmod, 0o755)
        self.changed.chmod(0o644)
        for to in (self.packet, self.folder / "new"):
            done = subprocess.run([*words, to], capture_output=True, env={**os.environ, "HOME": "/"})
            if b"setpriv" in done.stderr or done.returncode in (126, 127):
                self.skipTest(f"no other user can run the program here: {done.stderr.decode()}")
            self.assertEqual((done.returncode, done.stdout), (ERROR, b""), done.stderr)
            self.assertIn(b"cannot write", done.stderr)
            self.assertIn(b"Permission denied", done.stderr)
        self.same(self.before, contents_of(self.packet))
        self.assertFalse((self.folder / "new").exists())

    def test_a_full_disk(self):
        disk = self.folder / "disk"
        disk.mkdir()
        done = subprocess.run(["mount", "-t", "tmpfs", "-o", "size=160k", "tmpfs", disk], capture_output=True)
        if done.returncode != 0:
            self.skipTest(f"no small disk can be mounted here: {done.stderr.decode().strip()}")
        self.addCleanup(subprocess.run, ["umount", disk], check=True)
        (disk / "sheets.pdf").write_text("the earlier one")
        self.refused(disk, "cannot write", "No space left", "nothing was changed")
        self.assertEqual(contents_of(disk), {"sheets.pdf": b"the earlier one"})
        self.refused(disk / "new", "cannot write", "No space left")
        self.assertFalse((disk / "new").exists())

    def test_a_file_size_limit(self):
        """As a full disk, for those who may not mount one: no file may grow beyond 100 kB."""
        def limited():
            signal.signal(signal.SIGXFSZ, signal.SIG_IGN)
            resource.setrlimit(resource.RLIMIT_FSIZE, (100_000, 100_000))

        self.refused(self.packet, "cannot write", "sheets.pdf", "File too large", preexec_fn=limited)

    def test_full_standard_output(self):
        for words in (["numbers", self.dial, "--json"], ["numbers", self.dial], ["check", self.dial], ["shadow", self.dial, "--at", "2026-06-21T11:00Z"]):
            with open("/dev/full", "wb") as full:
                done = subprocess.run([PROGRAM, *words], stdout=full, stderr=subprocess.PIPE)
            self.assertEqual(done.returncode, ERROR, words)
            self.assertIn(b"standard output", done.stderr)


if __name__ == "__main__":
    unittest.main()
