# SPDX-License-Identifier: MIT
"""What the tests that run the whole program share: DIALWRIGHT names the program, DIALWRIGHT_SOURCE the source tree."""
import json
import os
import pathlib
import shutil
import subprocess
import tempfile
import unittest

PROGRAM = os.environ["DIALWRIGHT"]
SOURCE = pathlib.Path(os.environ["DIALWRIGHT_SOURCE"])
DESIGNS = sorted((SOURCE / "designs").glob("*.yaml"))
FINE, ERROR, WITH_WARNINGS = 0, 2, 3

PLACE = "place: {latitude: 54.2, longitude: -1.9, zone: Europe/London}\n"
LEVEL = PLACE + "dial: {kind: level}\nplate: {diameter: 360 mm}\n"
WALL = PLACE + "dial: {kind: wall, facing: S 23° E}\nplate: {width: 600 mm, height: 750 mm}\n"
TWO_FACES = PLACE + "dial: {kind: equatorial, faces: both}\nplate: {diameter: 300 mm}\n"


def run(*words, stdin=b"", **more):
    """Runs the program; gives (status, standard output, standard error) as text."""
    done = subprocess.run([PROGRAM, *map(str, words)], input=stdin, capture_output=True, timeout=120, **more)
    return done.returncode, done.stdout.decode(), done.stderr.decode()


def strict_json(text):
    """JSON as RFC 8259 has it: no NaN, no infinity, no key twice."""
    def refuse(word):
        raise ValueError(f"{word} is not JSON")

    def once(pairs):
        assert len({key for key, _ in pairs}) == len(pairs), "a key twice"
        return dict(pairs)

    return json.loads(text, parse_constant=refuse, object_pairs_hook=once)


def numbers_of(design):
    status, out, err = run("numbers", design, "--json")
    assert status == FINE, err
    return strict_json(out)


def faces_of(numbers):
    """[(name, face)]; a dial with one face has the face's keys at the top."""
    return [(face["face"], face) for face in numbers["faces"]] if "faces" in numbers else [("", numbers)]


def contents_of(folder):
    return {str(path.relative_to(folder)): path.read_bytes() for path in sorted(pathlib.Path(folder).rglob("*")) if path.is_file()}


class Bench(unittest.TestCase):
    """A test with a folder of its own."""
    maxDiff = None

    def setUp(self):
        self.folder = pathlib.Path(tempfile.mkdtemp(prefix="dialwright-"))
        self.addCleanup(shutil.rmtree, self.folder, ignore_errors=True)

    def design(self, text, name="dial.yaml"):
        path = self.folder / name
        path.write_bytes(text if isinstance(text, bytes) else text.encode())
        return path

    def same(self, before, after):
        """Folders' contents, byte for byte; says which differ (unittest's own comparison of large files takes minutes)."""
        differ = sorted(name for name in before.keys() | after.keys() if before.get(name) != after.get(name))
        self.assertEqual(differ, [])
