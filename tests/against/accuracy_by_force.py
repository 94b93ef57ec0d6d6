# SPDX-License-Identifier: MIT
"""`dialwright accuracy` against brute force: the slip is made, and the whole program is asked again where the shadow falls.

Usage: accuracy_by_force.py DIALWRIGHT
- facing, lean: a design of the wall as it truly is, with the nodus where the dial made for the other wall carries it, gives the shadow
  (`shadow`); its direction from the centre is looked up among the hour lines of the dial as made (`numbers`).
- position: the dial made for the wrong latitude, its shadow by vectors of this file's own.
- style height, substyle, print, marking: by vectors of this file's own, looked up among the same lines.
- half-shadow: 16' / cos(declination) of hour angle. Equation of time: PyEphem's own years against their mean.
The Sun is put on a line by searching for the instant of 2027 at which it stands there (`shadow` too), so that nothing here knows the
program's formulas.
"""
import json
import math
import subprocess
import sys
import tempfile
from datetime import datetime, timedelta
from pathlib import Path

import ephem

LAT, LON, NODUS = 52.2, 0.0, 60.0
SEASONS = {"june": "2027-06-21", "equinox": "2027-03-20", "december": "2027-12-22"}


def ask(program, *words):
    return json.loads(subprocess.run([program, *map(str, words)], capture_output=True, text=True, check=True).stdout)


def design(folder, name, facing=157.0, lean=0.0, lat=LAT):
    file = Path(folder, f"{name}.yaml")
    file.write_text(f"place: {{latitude: {lat}, longitude: {LON}, zone: UTC}}\n"
                    f"dial: {{kind: leaning, facing: {facing}°, lean: {abs(lean)}° {'back' if lean >= 0 else 'forward'}}}\n"
                    "plate: {width: 600 mm, height: 750 mm}\nhours: {divide: 5 min}\n"
                    f"gnomon: {{kind: edge, thickness: 0 mm, nodus height: {NODUS} mm}}\n", encoding="utf-8")
    return file


class Made:
    """The dial as it was made: its centre and the directions of its hour lines."""

    def __init__(self, numbers):
        self.centre = numbers["style"]["centre_mm"]
        self.height, self.substyle = (math.radians(numbers["style"][key]) for key in ("height_deg", "substyle_deg"))
        lines = {line["time_h"]: line["angle_deg"] for line in numbers["hour_lines"] if line["angle_deg"] is not None}
        self.lines, before = [], None
        for time, angle in sorted(lines.items()):
            while before is not None and angle - before > 180:
                angle -= 360
            while before is not None and angle - before < -180:
                angle += 360
            self.lines.append((time, angle))
            before = angle

    def reads(self, u, v):
        """Hours, by the lines on both sides of the direction; cubic through four of them."""
        angle = math.degrees(math.atan2(u - self.centre[0], v - self.centre[1]))
        turned = [(t, a + 360 * round((angle - a) / 360)) for t, a in self.lines]
        nearest = min(range(len(turned)), key=lambda i: abs(turned[i][1] - angle))
        first = min(max(nearest - 2, 0), len(turned) - 4)
        four = turned[first:first + 4]
        total = 0.0
        for i, (t, a) in enumerate(four):
            weight = math.prod((angle - b) / (a - b) for j, (_, b) in enumerate(four) if j != i)
            total += t * weight
        return total


def dot(a, b):
    return sum(x * y for x, y in zip(a, b))


def cross(a, b):
    return (a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0])


def frame(facing, lean):
    a, t = math.radians(facing), math.radians(lean)
    return ((-math.cos(a), math.sin(a), 0), (-math.sin(t) * math.sin(a), -math.sin(t) * math.cos(a), math.cos(t)),
            (math.cos(t) * math.sin(a), math.cos(t) * math.cos(a), math.sin(t)))


def towards(sun):
    a, h = math.radians(sun["azimuth_deg"]), math.radians(sun["altitude_deg"])
    return (math.cos(h) * math.sin(a), math.cos(h) * math.cos(a), math.sin(h))


def instant_of(program, file, date, hour):
    """When the Sun of this date stands on the line of the hour: its hour angle, by secants, to the microsecond."""
    at = datetime.fromisoformat(date) + timedelta(hours=hour)
    for _ in range(4):
        text = at.isoformat(timespec="microseconds") + "Z"
        sun = ask(program, "shadow", file, "--at", text, "--json")[0]["sun"]
        missing = ((hour - 12) * 15 - sun["hour_angle_deg"] + 180) % 360 - 180
        at += timedelta(hours=missing / 15)
    return at.isoformat(timespec="microseconds") + "Z", sun


def style_shadow(made, sun_uvn, point, style):
    """Where the shadow of a style through the centre passes nearest to a point of the plate."""
    m = cross(style, sun_uvn)
    square = m[0] ** 2 + m[1] ** 2
    off = (m[0] * (point[0] - made.centre[0]) + m[1] * (point[1] - made.centre[1])) / square
    return point[0] - off * m[0], point[1] - off * m[1]


def style_at(height, substyle):
    return (math.cos(height) * math.sin(substyle), math.cos(height) * math.cos(substyle), math.sin(height))


def spread_of_years(date):
    """Minutes by which PyEphem's equation of time of single years, 2027 to 2046, strays from their mean at most."""
    values = []
    for year in range(2027, 2047):
        noon = ephem.Date(f"{year}/{date[5:7]}/{date[8:]} 12:00")
        greenwich = ephem.Observer()
        greenwich.lon, greenwich.date = "0", noon
        sun = ephem.Sun()
        sun.compute(noon)
        values.append((((greenwich.sidereal_time() - sun.g_ra) + math.pi) % (2 * math.pi) - math.pi) * 720 / math.pi)
    mean = sum(values) / len(values)
    return max(abs(value - mean) for value in values)


def main(program):
    worst, seen = {}, 0
    with tempfile.TemporaryDirectory() as folder:
        file = design(folder, "made")
        made, (u, v, n) = Made(ask(program, "numbers", file, "--json")), frame(157.0, 0.0)
        # The whole dial on a wall that truly looks elsewhere: its shadow is that of a wall so turned.
        others = {("facing", sign): design(folder, f"f{sign}", facing=157.0 + sign) for sign in (1, -1)}
        others.update({("lean", sign): design(folder, f"l{sign}", lean=0.5 * sign) for sign in (1, -1)})
        face = ask(program, "accuracy", file, "--json")["faces"][0]
        for line in face["lines"]:
            for season, date in SEASONS.items():
                cell = line["at"][season]
                if cell is None:
                    continue
                hour, at, slips = line["time_h"], cell["at_mm"], cell["slips_min"]
                text, sun = instant_of(program, file, date, hour)
                s = towards(sun)
                if dot(s, n) < 0.1 or s[2] < 0.05:
                    continue
                seen += 1
                b = (dot(s, u), dot(s, v), dot(s, n))
                force = {}

                def worse(key, minutes):
                    force[key] = max(force.get(key, 0.0), abs(minutes))

                for (key, _), other in others.items():
                    shadow = ask(program, "shadow", other, "--at", text, "--json")[0]["shadow_mm"]
                    worse(key, 60 * (made.reads(*shadow) - hour))
                for sign in (1, -1):
                    worse("style_height", 60 * (made.reads(*style_shadow(made, b, at, style_at(made.height + sign * math.radians(0.5), made.substyle))) - hour))
                    worse("substyle", 60 * (made.reads(*style_shadow(made, b, at, style_at(made.height, made.substyle + sign * math.radians(0.5)))) - hour))
                    scale = 1 + 0.002 * sign
                    worse("print", 60 * (made.reads(made.centre[0] + (at[0] - made.centre[0]) / scale, at[1]) - hour))
                    worse("half_shadow", 16 / 60 / math.cos(math.radians(sun["declination_deg"])) * 4)
                away = math.hypot(at[0] - made.centre[0], at[1] - made.centre[1])
                across = (-(at[1] - made.centre[1]) / away, (at[0] - made.centre[0]) / away)
                for sign in (1, -1):
                    worse("marking", 60 * (made.reads(at[0] + sign * 0.5 * across[0], at[1] + sign * 0.5 * across[1]) - hour))
                # Made for 0.01° elsewhere in latitude: its style stands so in this plate; 0.01° of longitude is 0.04 min.
                pole = (0, math.cos(math.radians(LAT - 0.01)), math.sin(math.radians(LAT - 0.01)))
                elsewhere = Made(ask(program, "numbers", design(folder, "elsewhere", lat=LAT - 0.01), "--json"))
                moved = style_shadow(elsewhere, b, at, (dot(pole, u), dot(pole, v), dot(pole, n)))
                worse("position", math.hypot(60 * (elsewhere.reads(*moved) - hour), 0.04))
                worse("equation", spread_of_years(date))
                for key, minutes in force.items():
                    worst[key] = max(worst.get(key, 0.0), abs(minutes - slips[key]))
                total = math.sqrt(sum(minutes ** 2 for minutes in slips.values()))
                worst["total"] = max(worst.get("total", 0.0), abs(total - cell["total_min"]))
    print(f"{seen} cells: greatest differences in minutes {({key: round(value, 4) for key, value in worst.items()})}")
    # The season's own Sun of 2027 and the mean year's differ by up to 0.1 deg of declination at the equinox.
    sys.exit(0 if seen >= 15 and max(worst.values()) < 0.03 else 1)


main(sys.argv[1])
