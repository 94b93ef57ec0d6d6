# SPDX-License-Identifier: MIT
"""Old plates whose hour lines were cut by simulated shadows of PyEphem's Sun: does the stated range hold the truth?

Usage: ephem_plates.py FITTED_CASES. Upright, level and leaning plates at latitudes from 60 S to 66 N, some cut for another meridian than
their place's. For each hour the instant is sought at which ephem's Sun, without air, stands at that hour angle on a day on which it lights
the plate; two points of the style throw their shadows by vectors written anew here, and the line runs through both. Each line was cut and
measured with a scatter of its own.

Allowed: for the fact that is true of a plate (upright, level, made for its latitude), latitude, facing, lean and shift of the hours lie in the
95 % range in 92 to 98 % of the plates. A line that was cut wrong is pointed out.
"""
import math
import random
import sys
from datetime import datetime, timedelta

import ephem

from ephem_surveys import DEGREE, board, dot, found_by, share, signed

SEED = 17870614
PLATES = 500
UPRIGHT, LEVEL, LATITUDE = 0, 1, 3


def sun_of_hour(latitude, longitude, day, hour_angle):
    """ephem's Sun, without air, at an hour angle on a day: (east, north, up)."""
    place = ephem.Observer()
    place.lat, place.lon, place.elevation, place.pressure = latitude * DEGREE, longitude * DEGREE, 0, 0
    when = day + timedelta(hours=12 - longitude / 15 + hour_angle / 15)
    for _ in range(3):
        place.date = ephem.Date(when)
        sun = ephem.Sun(place)
        at = math.degrees(place.sidereal_time() - sun.g_ra)
        when += timedelta(hours=signed(hour_angle - at) / 15)
    place.date = ephem.Date(when)
    sun = ephem.Sun(place)
    return (math.cos(sun.alt) * math.sin(sun.az), math.cos(sun.alt) * math.cos(sun.az), math.sin(sun.alt))


class Plate:
    def __init__(self, rng, fact):
        self.rng, self.fact = rng, fact
        self.latitude, self.longitude = rng.uniform(-60, 66), rng.uniform(-170, 170)
        away = 180 if self.latitude > 0 else 0
        self.facing = (away + rng.uniform(-75, 75)) % 360
        self.lean = {UPRIGHT: 0, LEVEL: 90, LATITUDE: rng.uniform(-10, 60)}[fact]
        if fact == LEVEL:
            self.facing = 0
        self.ahead = rng.choice((0, 0, rng.uniform(-40, 40)))  # minutes
        self.kind = rng.choice(("directions", "centre", "points"))
        phi = self.latitude * DEGREE
        self.u, self.v, self.n = ((1, 0, 0), (0, 1, 0), (0, 0, 1)) if fact == LEVEL else board(self.facing, self.lean, 0)
        pole = (0, math.cos(phi), math.sin(phi))
        self.style = pole if dot(pole, self.n) > 0 else tuple(-x for x in pole)
        self.turn = rng.uniform(0, 360) if fact == LEVEL else 0  # nobody knows which way a level plate lay

    def shadow(self, length, sun):
        reach = length * dot(self.style, self.n) / dot(sun, self.n)
        tip = tuple(length * p - reach * s for p, s in zip(self.style, sun))
        x, y = dot(tip, self.u), dot(tip, self.v)
        c, s = math.cos(self.turn * DEGREE), math.sin(self.turn * DEGREE)
        return x * c + y * s, y * c - x * s

    def line(self, label):
        """(label, direction from the centre) of the hour by the plate's own numerals; None where it is hardly ever lit."""
        hour_angle = 15 * (label - 12) - self.ahead / 4
        for month in (6, 12, 3):
            sun = sun_of_hour(self.latitude, self.longitude, datetime(2026, month, 21), hour_angle)
            if sun[2] > 0.03 and dot(sun, self.n) > 0.05:
                one, two = self.shadow(1.0, sun), self.shadow(2.0, sun)
                return math.degrees(math.atan2(two[0] - one[0], two[1] - one[1]))
        return None

    def lines(self, scatter):
        rng, lines = self.rng, []
        shift = (rng.uniform(-300, 300), rng.uniform(-300, 300)) if self.kind == "points" else (0, 0)
        for label in range(4, 21):
            direction = self.line(label)
            if direction is None:
                continue
            label = (label - 1) % 12 + 1
            if self.kind == "directions":
                lines.append([label, (direction + rng.gauss(0, scatter)) % 360])
                continue
            c, s = math.cos(direction * DEGREE), math.sin(direction * DEGREE)
            mm, points = 5 * scatter, []
            for reach in ((80, 290) if self.kind == "points" else (250,)):
                reach += rng.uniform(-15, 15)
                off = rng.gauss(0, mm)
                points += [shift[0] + reach * s + off * c, shift[1] + reach * c - off * s]
            lines.append([label, *points])
        return lines

    def case(self, lines, give):
        told = self.latitude + self.rng.gauss(0, give / 1.96)
        head = f"plate {self.kind} {told} {give}"
        return "\n".join([head] + [" ".join(map(str, line)) for line in lines] + ["end", ""])


def some_plates(rng, count, least, most_scatter=0.6):
    made = []
    while len(made) < count:
        plate = Plate(rng, rng.choice((UPRIGHT, LEVEL, LATITUDE)))
        if not 8 < math.degrees(math.asin(min(1, dot(plate.style, plate.n)))) < 82:
            continue
        lines = plate.lines(rng.uniform(0.1, most_scatter))
        # Some of them are unreadable.
        lines = [line for line in lines if rng.random() < 0.9]
        if len(lines) >= least:
            made.append((plate, lines))
    return made


def coverage(program, rng):
    plates = some_plates(rng, PLATES, 5)
    rows = found_by(program, "".join(plate.case(lines, 0.1) for plate, lines in plates), "plate")
    held, told, missing, strays = [0] * 4, [0] * 4, 0, 0
    for (plate, lines), (head, answers) in zip(plates, rows, strict=True):
        good = [a for a in answers if int(a[0]) == plate.fact]
        if not good:
            missing += 1
            continue
        # By its latitude alone a plate may stand in two ways: the one that leans as it did.
        best = min(good, key=lambda a: abs(float(a[7]) - plate.lean))
        figures = list(map(float, best[1:13]))
        strays += best[13].count("1")
        for i, truth in enumerate((plate.latitude, plate.facing, plate.lean, plate.ahead)):
            value, give, tells = figures[3 * i:3 * i + 3]
            if not tells:
                continue
            off = signed(value - truth) if i == 1 else value - truth
            told[i] += 1
            held[i] += abs(off) <= give
    count = sum(len(lines) for _, lines in plates)
    print(f"{PLATES} plates, {count} lines: {missing} without the solution that is true (7 allowed), {strays} good lines left out")
    bad = (missing > 7) + (strays > 0.02 * count)
    for name, i, least in (("latitude", 0, 300), ("facing", 1, 300), ("lean", 2, 120), ("shift of the hours", 3, 300)):
        bad = share(name, held[i], told[i], bad, least)
    return bad


def wrong_lines(program, rng):
    """One line of eight or more is cut 5 to 10 degrees off, the others within a third of a degree."""
    plates, put = [], []
    for plate, lines in some_plates(rng, 200, 8, 0.35):
        if plate.kind == "points":
            continue
        which = rng.randrange(len(lines))
        turn = rng.choice((-1, 1)) * rng.uniform(5, 10)
        if plate.kind == "directions":
            lines[which][1] += turn
        else:
            u, v = lines[which][1:3]
            c, s = math.cos(turn * DEGREE), math.sin(turn * DEGREE)
            lines[which][1:3] = u * c + v * s, v * c - u * s
        plates.append((plate, lines))
        put.append(which)
    rows = found_by(program, "".join(plate.case(lines, 0.1) for plate, lines in plates), "plate")
    pointed = sum(bool(answers) and answers[0][13][which] == "1" for which, (_, answers) in zip(put, rows, strict=True))
    # One at either end of a plate bends the fit after it, and among few lines hides in the scatter that it makes.
    print(f"a line cut wrong is pointed out in {pointed} of {len(plates)} (80 % wanted)")
    return pointed < 0.8 * len(plates)


def main(program):
    rng = random.Random(SEED)
    bad = coverage(program, rng) + wrong_lines(program, rng)
    print(f"seed {SEED}")
    return 1 if bad else 0


if __name__ == "__main__":
    sys.exit(main(sys.argv[1]))
