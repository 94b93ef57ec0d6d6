# SPDX-License-Identifier: MIT
"""Shadows against formulas written anew here, from docs/conventions.md alone, and against the lines as drawn.

Given the Sun's angles that the program prints, the shadow on any plate follows from three dot products; what the dial reads
follows from the hour angle; and at the instant at which it reads a whole hour, the shadow lies on that hour's line.
"""
import math
import unittest
from datetime import datetime, timedelta, timezone

from program import DESIGNS, PLACE, Bench, faces_of, numbers_of, run, strict_json

SOUTH = "place: {latitude: 33.4 S, longitude: 18.9, zone: Africa/Johannesburg}\n"
PLATE = "plate: {width: 500 mm, height: 500 mm}\n"
KINDS = {
    "level": PLACE + "dial: {kind: level}\n" + PLATE,
    "wall": PLACE + "dial: {kind: wall, facing: S 23° E}\n" + PLATE,
    "west wall": PLACE + "dial: {kind: wall, facing: west}\n" + PLATE,
    "north wall": PLACE + "dial: {kind: wall, facing: N 20° W}\n" + PLATE,
    "leaning back": PLACE + "dial: {kind: leaning, facing: S 40° W, lean: 25° back}\n" + PLATE,
    "leaning forward": PLACE + "dial: {kind: leaning, facing: S 40° E, lean: 15° forward}\n" + PLATE,
    "polar": PLACE + "dial: {kind: leaning, facing: south, lean: 35.8° back}\n" + PLATE,
    "equatorial": PLACE + "dial: {kind: equatorial, faces: both}\n" + PLATE,
    "southern level": SOUTH + "dial: {kind: level}\n" + PLATE,
    "southern wall": SOUTH + "dial: {kind: wall, facing: N 30° E}\n" + PLATE,
    "southern equatorial": SOUTH + "dial: {kind: equatorial, faces: both}\n" + PLATE,
    "thick gnomon": PLACE + "dial: {kind: level}\n" + PLATE + "gnomon: {thickness: 10 mm}\n",
    "thick gnomon, south": SOUTH + "dial: {kind: level}\n" + PLATE + "gnomon: {thickness: 10 mm}\n",
    "thick gnomon on a wall": PLACE + "dial: {kind: wall, facing: S 23° E}\n" + PLATE + "gnomon: {thickness: 8 mm}\n",
}
TIMES = {"sun": "", "zone": "hours: {time: zone}\n", "clock": "hours: {time: clock}\n"}
YEAR = [datetime(2027, 1, 3, tzinfo=timezone.utc) + timedelta(minutes=17 * 60 * i + 11 * i) for i in range(500)]


def text_of(instant):
    return instant.isoformat(timespec="microseconds").replace("+00:00", "Z")


def shadows_of(design, instants, *more):
    status, out, err = run("shadow", design, "--json", "--at-file", "-", *more, stdin="\n".join(map(text_of, instants)).encode())
    assert status == 0, err
    return strict_json(out)


def dot(a, b):
    return sum(x * y for x, y in zip(a, b))


def cross(a, b):
    return (a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0])


def unit(azimuth_deg, altitude_deg):
    a, h = math.radians(azimuth_deg), math.radians(altitude_deg)
    return (math.sin(a) * math.cos(h), math.cos(a) * math.cos(h), math.sin(h))


def axes_of(plate):
    """u, v, n; on a level plate v is north (conventions, 1)."""
    n = unit(plate["normal_azimuth_deg"], plate["normal_altitude_deg"])
    if abs(n[2]) > 1 - 1e-12:
        v = (0.0, 1.0, 0.0)
    else:
        size = math.hypot(n[0], n[1])
        v = (-n[2] * n[0] / size, -n[2] * n[1] / size, size)
    return cross(v, n), v, n


class Plate:
    """One face, from its numbers."""

    def __init__(self, face, site):
        latitude_deg, self.skyline = site["latitude_deg"], site["skyline_deg"]
        self.u, self.v, self.n = axes_of(face["plate"])
        self.height = face["nodus"]["height_mm"]
        phi = math.radians(latitude_deg)
        pole = (0.0, math.cos(phi), math.sin(phi))
        self.pole = pole if latitude_deg >= 0 else tuple(-c for c in pole)
        self.half = face["gnomon"]["thickness_mm"] / 2
        # The gnomon's plane holds the pole and the plate's normal; its edges stand half a thickness to either side.
        side = cross(self.pole, self.n)
        self.over = tuple(a - dot(self.n, self.pole) * b for a, b in zip(self.n, self.pole))  # square to the style, off the plate
        size = math.sqrt(dot(side, side))
        self.side = tuple(c / size for c in side) if size > 1e-9 and self.half > 0 else (0.0, 0.0, 0.0)

    def skyline_at(self, sun):
        """Altitude of the skyline under the Sun, straight from mark to mark and round from the last to the first."""
        if not self.skyline:
            return 0.0
        first = self.skyline[0][0]
        azimuth = (math.degrees(math.atan2(sun[0], sun[1])) - first) % 360
        marks = [(a - first, h) for a, h in self.skyline] + [(360.0, self.skyline[0][1])]
        for (a, low), (b, high) in zip(marks, marks[1:]):
            if a <= azimuth <= b:
                return low + (high - low) * (azimuth - a) / (b - a)
        raise AssertionError("azimuths rise")

    def shadow(self, sun):
        if dot(sun, self.n) <= 0 or sun[2] <= math.sin(math.radians(self.skyline_at(sun))):
            return None
        # The shadow of the slab between the edges is bounded by the edge on the far side from the Sun; but when the Sun
        # stands below the style's plane (on a level dial, before 6 and after 18), the slab's foot hides that one, and
        # the near edge bounds the shadow. So does Waugh, Sundials, ch. 6, from memory.
        towards = dot(sun, self.side) * dot(sun, self.over)
        edge = -math.copysign(self.half, towards) if self.half else 0.0
        reach = self.height / dot(sun, self.n)
        return (edge * dot(self.side, self.u) - reach * dot(sun, self.u), edge * dot(self.side, self.v) - reach * dot(sun, self.v))


def from_the_horizon(numbers, report):
    """Hours since rising, since setting, left until setting, or twelfths of the day: from half the day's arc."""
    phi, d = math.radians(numbers["site"]["latitude_deg"]), math.radians(report["sun"]["declination_deg"])
    a = math.radians(numbers["horizon_deg"])
    arc = math.degrees(math.acos((math.sin(a) - math.sin(phi) * math.sin(d)) / (math.cos(phi) * math.cos(d))))
    h = (report["sun"]["hour_angle_deg"] + 180) % 360 - 180
    return {"since sunrise": (h + arc) / 15 % 24, "since sunset": (h - arc) / 15 % 24, "hours left": (arc - h) / 15 % 24,
            "unequal": 6 + 6 * h / arc}[numbers["time"]]


def reading(numbers, report):
    """Seconds of the day on the dial's own scale; of a clock dial, by the instant's own equation of time."""
    hours = 12 + report["sun"]["hour_angle_deg"] / 15
    if numbers["time"] not in ("sun", "zone", "clock"):
        return 3600 * from_the_horizon(numbers, report)
    if numbers["time"] != "sun":
        hours -= (numbers["site"]["longitude_deg"] - numbers["site"]["zone_meridian_deg"]) / 15
    if numbers["time"] == "clock":
        hours -= report["sun"]["equation_of_time_min"] / 60
    return hours * 3600


def seconds(text):
    h, m, s = text.split(":")
    return 3600 * int(h) + 60 * int(m) + int(s)


def apart(a, b):
    return abs((a - b + 43200) % 86400 - 43200)


def beside(p, a, b):
    """How far a point stands beside the line through two others, and whether it lies between these."""
    d, e = (b[0] - a[0], b[1] - a[1]), (p[0] - a[0], p[1] - a[1])
    size = math.hypot(*d)
    return abs(d[0] * e[1] - d[1] * e[0]) / size, 0 <= (d[0] * e[0] + d[1] * e[1]) / size**2 <= 1


class Shadows(Bench):
    def all_designs(self):
        for kind, text in KINDS.items():
            for time, hours in TIMES.items():
                yield f"{kind}, {time}", self.design(text + hours)
        for path in DESIGNS:
            yield path.name, path

    def test_against_three_dot_products(self):
        lit = 0
        for name, design in self.all_designs():
            numbers = numbers_of(design)
            for face_name, face in faces_of(numbers):
                plate = Plate(face, numbers["site"])
                reports = shadows_of(design, YEAR, *(["--face", face_name] if face_name else []))
                for report in reports:
                    with self.subTest(name, face=face_name, at=report["at"]):
                        sun = unit(report["sun"]["azimuth_deg"], report["sun"]["altitude_deg"])
                        expected = plate.shadow(sun)
                        over_skyline = sun[2] - math.sin(math.radians(plate.skyline_at(sun)))
                        if min(abs(dot(sun, plate.n)), abs(over_skyline)) < 1e-6:
                            continue  # too near to the edge of light for angles of seven decimals
                        self.assertEqual(report["lit"], expected is not None)
                        if expected is None:
                            continue
                        lit += 1
                        # The printed angles' last digit grows with the shadow: 1e-4 mm up to 20 times the nodus' height.
                        slack = 1e-4 * max(1.0, (math.hypot(*expected) / plate.height / 20) ** 2 * plate.height / 25)
                        if plate.half == 0 or min(abs(dot(sun, plate.side)), abs(dot(sun, plate.over))) > 1e-8:
                            self.assertLess(math.dist(report["shadow_mm"], expected), slack)
        self.assertGreater(lit, 6000)

    def test_the_suns_angles_agree_with_each_other(self):
        """Altitude and azimuth from hour angle and declination (conventions, 2)."""
        for latitude, text in ((54.2, KINDS["level"]), (-33.4, KINDS["southern level"])):
            phi = math.radians(latitude)
            for report in shadows_of(self.design(text), YEAR):
                h, d = (math.radians(report["sun"][key]) for key in ("hour_angle_deg", "declination_deg"))
                east = -math.cos(d) * math.sin(h)
                north = math.cos(phi) * math.sin(d) - math.sin(phi) * math.cos(d) * math.cos(h)
                up = math.sin(phi) * math.sin(d) + math.cos(phi) * math.cos(d) * math.cos(h)
                told = unit(report["sun"]["azimuth_deg"], report["sun"]["altitude_deg"])
                self.assertLess(math.dist(told, (east, north, up)), 5e-9)

    def test_what_the_dial_reads(self):
        for name, design in self.all_designs():
            numbers = numbers_of(design)
            # On clock-time curves the line holds for the mean year, in which the day's equation of time is up to a
            # quarter of a day's change off: 8 s; near the solstices, where declination stands still, days apart: 40 s.
            slack = 0.51 if numbers["time"] != "clock" else 10
            for report in shadows_of(design, YEAR):
                if report["reads"] is None:
                    continue
                near_solstice = abs(report["sun"]["declination_deg"]) > 23.2
                with self.subTest(name, at=report["at"]):
                    self.assertLess(apart(seconds(report["reads"]), reading(numbers, report)),
                                    slack if numbers["time"] != "clock" or not near_solstice else 60)

    def test_at_a_whole_hour_the_shadow_lies_on_its_line(self):
        met = {}
        for name, design in self.all_designs():
            numbers = numbers_of(design)
            if numbers["time"] not in ("sun", "zone"):
                continue
            for day in (datetime(2028, month, 9, tzinfo=timezone.utc) for month in (1, 4, 6, 10)):
                self.on_the_lines(name, design, numbers, day, met)
        for name, design in self.all_designs():
            numbers = numbers_of(design)
            hours = [line for _, face in faces_of(numbers) for line in face["hour_lines"]]
            if numbers["time"] in ("sun", "zone") and len(hours) > 2:
                self.assertGreater(met.get(name, 0), 1, name)

    def on_the_lines(self, name, design, numbers, day, met):
        """All whole hours of one day at once: each instant is moved by what its reading is off, three times."""
        hours = list(range(24))
        instants = [day + timedelta(hours=hour) for hour in hours]
        for _ in range(4):
            reports = shadows_of(design, instants)
            off = [(reading(numbers, report) - 3600 * hour + 43200) % 86400 - 43200 for hour, report in zip(hours, reports)]
            if max(map(abs, off)) < 2e-5:
                break
            instants = [instant - timedelta(seconds=seconds_off) for instant, seconds_off in zip(instants, off)]
        self.assertLess(max(map(abs, off)), 1e-4)
        faces = dict(faces_of(numbers))
        for hour, report in zip(hours, reports):
            if not report["lit"]:
                continue
            face = faces[report.get("face", "")]
            lines = [line["points_mm"] for line in face["hour_lines"] if abs(line["time_h"] - hour) < 1e-9]
            # A line is broken by labels and ends at the border, short of a shadow now and then; it points there all the same.
            met_here = [beside(report["shadow_mm"], points[0], points[-1]) for points in lines]
            if not met_here:
                continue
            with self.subTest(name, hour=hour, day=day.date().isoformat()):
                self.assertTrue(hour * 3600 == seconds(report["reads"]))
                off_mm, between = min(met_here)
                self.assertLess(off_mm, 0.01)
                met[name] = met.get(name, 0) + any(near < 0.01 and inside for near, inside in met_here)


if __name__ == "__main__":
    unittest.main()
