# SPDX-License-Identifier: MIT
"""The gnomon, its gauges and its seat on the plate, measured in the files that a machine gets.

Angles are held against the style height of numbers.json. Gnomon and plate are brought together by the nodus alone: on the
gnomon it is where the style reaches the nodus' height, on the plate its foot is where numbers.json begins to count. What the
foot has and what the plate has must then meet.
"""
import math
import unittest

import fitz
import numpy as np

from drawings import Dxf, Svg, largest, pdf_runs
from program import FINE, PLACE, WITH_WARNINGS, Bench, run, strict_json

DEGREES, CLOSE_MM = 0.01, 0.01
SOUTH = "place: {latitude: 33.4 S, longitude: 18.9, zone: Africa/Johannesburg}\n"

# name: (design, the height of the face above the lowest of the gnomon, as the design has it)
EDGES = {
    "tenons, level": (PLACE + "dial: {kind: level}\nplate: {diameter: 360 mm, thickness: 12 mm}\n"
                      "gnomon: {thickness: 6 mm, joint: tenons, proud: 3 mm, fit: 0.15 mm}\n", 12 + 3),
    "hooked tenons, declining": (PLACE + "dial: {kind: wall, facing: S 23° E}\nplate: {width: 600 mm, height: 750 mm, thickness: 8 mm}\n"
                                 "gnomon: {thickness: 3 mm, joint: hooked tenons, nodus: ball, tenons: 3, hook: 6 mm, keel: 9 mm, fit: 0.2 mm}\n", 8 + 0.2 + 9),
    "flange, declining": (PLACE + "dial: {kind: wall, facing: S 50° W}\nplate: {width: 500 mm, height: 500 mm}\n"
                          "gnomon: {thickness: 4 mm, joint: flange, holes: 3, hole diameter: 4 mm, flange width: 60 mm, flange thickness: 4 mm}\n", -4),
    "halving, leaning": (PLACE + "dial: {kind: leaning, facing: S 40° W, lean: 25° back}\nplate: {width: 400 mm, height: 400 mm, thickness: 5 mm}\n"
                         "gnomon: {thickness: 5 mm, joint: halving, keel: 12 mm, fit: 0.1 mm}\n", 5 + 0.1 + 12),
    "holes, south": (SOUTH + "dial: {kind: level}\nplate: {across: 400 mm}\ngnomon: {thickness: 8 mm, holes: 2, hole diameter: 4 mm}\n", 0),
    "tenons, centre off the plate": (PLACE + "dial: {kind: wall, facing: S 80° E}\nplate: {width: 500 mm, height: 600 mm, thickness: 10 mm}\n"
                                     "gnomon: {thickness: 5 mm, joint: tenons, proud: 0 mm, fit: 0.2 mm}\n", 10),
}


def straight_edge(outline):
    """The two ends of the longest straight edge above and to the left of all else, over any notch in it."""
    edges = []
    for a, b in zip(outline, outline[1:]):
        if math.dist(a, b) > 5 and (b - a).prod() > 1e-6:
            d = (b - a) / math.dist(a, b) * (1 if b[0] > a[0] else -1)
            if ((outline - a) @ np.array([-d[1], d[0]])).max() < 0.0005:
                edges.append((a, b, d))
    a, b, d = max(edges, key=lambda edge: math.dist(edge[0], edge[1]))
    ends = np.array([end for c, e, _ in edges for end in (c, e) if abs((c - a) @ np.array([-d[1], d[0]])) < 0.0005])
    return ends[(ends @ d).argmin()], ends[(ends @ d).argmax()]


def angle_of(a, b):
    return math.degrees(math.atan2(b[1] - a[1], b[0] - a[0]))


class Read:
    """Outline, lines and holes of a part, from its SVG or its DXF."""

    def __init__(self, folder, stem, kind):
        if kind == "dxf":
            dxf = Dxf(folder / f"{stem}.dxf")
            self.cut, self.drill, self.score = dxf.runs("cut"), dxf.runs("drill"), dxf.runs("score")
        else:
            svg = Svg(folder / f"{stem}.svg")
            self.cut, self.drill, self.score = ([run for on, _, runs in svg.strokes if on == layer for run in runs] for layer in ("cut", "drill", "score"))
        self.outline = largest(self.cut)
        self.inner = [run for run in self.cut if run is not self.outline]

    def holes(self):
        """[(middle, diameter)] of all round holes."""
        return [((run.min(axis=0) + run.max(axis=0)) / 2, np.ptp(run, axis=0)[0]) for run in self.drill if len(run) > 8]


class Gnomons(Bench):
    def made(self, text):
        folder = self.folder / f"packet {len(list(self.folder.iterdir()))}"
        status, _, err = run("make", self.design(text), "--to", folder)
        self.assertIn(status, (FINE, WITH_WARNINGS), err)
        return folder, strict_json((folder / "numbers.json").read_text())

    def seat_frame(self, plate, numbers, text):
        """Points of the plate's file along the substyle from the nodus' foot, and to its left."""
        middle = (plate.outline.min(axis=0) + plate.outline.max(axis=0)) / 2
        turn = -1 if "kind: level" in text and numbers["site"]["latitude_deg"] < 0 else 1
        substyle = math.radians(numbers["style"]["substyle_deg"])
        along = np.array([math.sin(substyle), math.cos(substyle)])
        axes = np.array([along, [-along[1], along[0]]]).T
        return lambda points: ((points - middle) * turn + numbers["plate"]["middle_mm"]) @ axes

    def test_edge_and_joint(self):
        for name, (text, face_up) in EDGES.items():
            folder, numbers = self.made(text)
            height, nodus = numbers["style"]["height_deg"], numbers["nodus"]["height_mm"]
            for kind in ("dxf", "svg"):
                with self.subTest(name, file=kind):
                    gnomon, plate = Read(folder, "gnomon", kind), Read(folder, "plate", kind)
                    low, high = straight_edge(gnomon.outline)
                    self.assertGreater(math.dist(low, high), 1.2 * nodus)
                    self.assertAlmostEqual(angle_of(low, high), height, delta=DEGREES)
                    face = gnomon.outline[:, 1].min() + face_up
                    over_foot = low + (high - low) * (face + nodus - low[1]) / (high[1] - low[1])
                    self.assertTrue(low[0] < over_foot[0] < high[0])
                    outline = gnomon.outline - [over_foot[0], face]
                    # The notch is centred on the nodus: the style breaks off as far below it as above.
                    on_style = np.abs((gnomon.outline - over_foot) @ np.array([low[1] - high[1], high[0] - low[0]])) / math.dist(low, high) < 0.0005
                    from_nodus = np.sort((gnomon.outline[on_style] - over_foot) @ (high - low) / math.dist(low, high))
                    self.assertAlmostEqual(from_nodus[from_nodus < 0].max(), -from_nodus[from_nodus > 0].min(), delta=CLOSE_MM)
                    to_seat = self.seat_frame(plate, numbers, text)
                    getattr(self, name.split(",")[0].replace(" ", "_"))(outline, face_up, gnomon, plate, to_seat, folder, kind)

    def slots_of(self, plate, to_seat, width):
        slots = sorted((to_seat(run) for run in plate.inner), key=lambda slot: slot[:, 0].min())
        for slot in slots:
            self.assertAlmostEqual(slot[:, 1].max(), width / 2, delta=CLOSE_MM)
            self.assertAlmostEqual(slot[:, 1].min(), -width / 2, delta=CLOSE_MM)
        return [(slot[:, 0].min(), slot[:, 0].max()) for slot in slots]

    @staticmethod
    def stems_of(outline, level):
        """From where to where what goes through the plate is, at a level."""
        crossed = sorted(a[0] + (b[0] - a[0]) * (level - a[1]) / (b[1] - a[1]) for a, b in zip(outline, outline[1:]) if (a[1] - level) * (b[1] - level) < 0)
        return list(zip(crossed[0::2], crossed[1::2]))

    def pairs(self, found, wanted):
        self.assertEqual(len(found), len(wanted))
        self.assertTrue(found)
        self.assertLess(np.abs(np.array(found) - np.array(wanted)).max(), CLOSE_MM)

    def tenons(self, outline, face_up, gnomon, plate, to_seat, *_):
        stems = self.stems_of(outline, -1)
        thickness, fit = (6, 0.15) if face_up == 15 else (5, 0.2)
        self.assertEqual(len(stems), 2)
        self.pairs(self.slots_of(plate, to_seat, thickness + fit), [(a - fit / 2, b + fit / 2) for a, b in stems])
        self.foot(outline, plate, to_seat, thickness)

    def foot(self, outline, plate, to_seat, thickness):
        """The scored outline is where the gnomon stands."""
        [scored] = [to_seat(run) for run in plate.score]
        at_face = outline[np.abs(outline[:, 1]) < 0.002][:, 0]
        self.assertAlmostEqual(scored[:, 0].max(), at_face.max(), delta=CLOSE_MM)
        self.assertAlmostEqual(scored[:, 0].min(), at_face.min(), delta=CLOSE_MM)
        self.assertAlmostEqual(scored[:, 1].max(), thickness / 2, delta=CLOSE_MM)
        self.assertAlmostEqual(scored[:, 1].min(), -thickness / 2, delta=CLOSE_MM)

    def hooked_tenons(self, outline, face_up, gnomon, plate, to_seat, *_):
        stems, hooks = self.stems_of(outline, -4), self.stems_of(outline, -8 - 0.2 - 4)
        self.assertEqual(len(stems), 3)
        # Slid home, a stem's front bears; before that the hook goes in behind it with the fit to spare.
        self.pairs(self.slots_of(plate, to_seat, 3.2), [(a - 6 - 0.2, b) for a, b in stems])
        self.pairs(hooks, [(a, b + 6) for a, b in stems])
        self.foot(outline, plate, to_seat, 3)

    def flange(self, outline, face_up, gnomon, plate, to_seat, folder, kind):
        flange = Read(folder, "gnomon-flange", kind)
        heel = outline[np.abs(outline[:, 1] - 4) < 0.002][:, 0].max()  # where the gnomon ends on the flange
        box = flange.outline.min(axis=0), flange.outline.max(axis=0)
        self.assertAlmostEqual(box[1][1] - box[0][1], 60, delta=CLOSE_MM)
        origin = np.array([box[1][0] - heel, (box[0][1] + box[1][1]) / 2])
        by_place = lambda hole: hole[0].round(1).tolist()
        of_flange = [[*at, size] for at, size in sorted(((middle - origin, size) for middle, size in flange.holes()), key=by_place)]
        of_plate = [[*at, size] for at, size in sorted(((to_seat(middle), size) for middle, size in plate.holes()), key=by_place)]
        self.assertEqual(len(of_plate), 6)
        self.pairs(of_plate, of_flange)
        self.assertTrue(all(abs(size - 4) < CLOSE_MM for _, _, size in of_plate))

    def halving(self, outline, face_up, gnomon, plate, to_seat, *_):
        # The plate's slot comes in from its edge; the gnomon's, as high as the plate with the fit, from the heel.
        [slot] = self.slots_of(plate, to_seat, 5.1)
        level = outline[np.abs(outline[:, 1] + 5.1) < 0.002]
        self.assertAlmostEqual(slot[1], level[:, 0].min(), delta=CLOSE_MM)
        [(start, stop)] = self.stems_of(outline, -2.5)
        self.assertAlmostEqual(stop, slot[1], delta=CLOSE_MM)
        self.assertLess(slot[0], start)
        self.foot(outline, plate, to_seat, 5)

    def holes(self, outline, face_up, gnomon, plate, to_seat, *_):
        axes = sorted(run[0][0] for run in gnomon.drill if len(run) == 2 and abs(run[0][0] - run[1][0]) < 1e-4)
        shift = outline[:, 0].min() - gnomon.outline[:, 0].min()
        found = sorted((*to_seat(middle), size) for middle, size in plate.holes())
        self.assertEqual(len(found), 2)
        self.pairs(found, [(x + shift, 0, 4) for x in axes])
        self.foot(outline, plate, to_seat, 8)

    def test_gauges(self):
        for facing in ("S 23° E", "S 50° W", "N 60° W"):
            folder, numbers = self.made(PLACE + f"dial: {{kind: wall, facing: {facing}}}\nplate: {{width: 600 mm, height: 750 mm}}\n"
                                        "gnomon: {kind: rod, thickness: 5 mm}\n")
            style = numbers["style"]
            noon = 0 if facing.startswith("N") else 180  # which way the noon line runs from the centre
            from_noon = (style["substyle_deg"] - noon + 180) % 360 - 180
            for kind in ("dxf", "svg"):
                with self.subTest(facing, file=kind):
                    gauge = Read(folder, "gauge", kind).outline
                    low, high = straight_edge(gauge)
                    self.assertGreater(math.dist(low, high), 80)
                    self.assertAlmostEqual(angle_of(low, high), style["height_deg"], delta=DEGREES)
                    # It stands on a straight base, longer than the edge is over it.
                    base = gauge[np.abs(gauge[:, 1] - gauge[:, 1].min()) < 1e-4][:, 0]
                    self.assertGreater(np.ptp(base), 0.8 * (high[0] - low[0]))
                    if noon == 0:  # the noon line never falls on this wall
                        self.assertFalse((folder / f"substyle-gauge.{kind}").exists())
                        continue
                    turned = Read(folder, "substyle-gauge", kind).outline * [1, -1 if from_noon > 0 else 1]
                    self.assertAlmostEqual(angle_of(*straight_edge(turned)), abs(from_noon), delta=DEGREES)

    def test_rod_and_drilling_jig_on_paper(self):
        folder, numbers = self.made(PLACE + "dial: {kind: wall, facing: S 23° E}\nplate: {width: 300 mm, height: 400 mm, thickness: 40 mm}\n"
                                    "gnomon: {kind: rod, thickness: 6 mm}\n")
        height = numbers["style"]["height_deg"]
        with fitz.open(folder / "sheets.pdf") as document:
            [page] = [number for number, page in enumerate(document) if "drilling jig, full size" in " ".join(page.get_text().split())]
        lines = [(a, b) for run in list(pdf_runs(folder / "sheets.pdf"))[page][1] for a, b in zip(run, run[1:]) if math.dist(a, b) > 20 and (a != b).all()]
        slanting = [(a, b) for a, b in lines if min(abs(b - a)) > 1]
        for a, b in slanting:  # a degree in 36: a stroke of 20 mm is placed within 0.003 mm
            self.assertAlmostEqual(angle_of(*sorted((a.tolist(), b.tolist()))), height, delta=DEGREES)
        # How far apart neighbours are: the rod's two sides, and the bore's.
        square = np.array([-math.sin(math.radians(height)), math.cos(math.radians(height))])
        apart = [abs((c - a) @ square) for i, (a, _) in enumerate(slanting) for c, _ in slanting[i + 1:]]
        self.assertGreaterEqual(sum(abs(gap - 6) < CLOSE_MM for gap in apart), 2)


if __name__ == "__main__":
    unittest.main()
