# SPDX-License-Identifier: MIT
"""What `dialwright fix` prints against PyEphem, and against `dialwright shadow`.

Usage: ephem_fixing.py DIALWRIGHT
With PyEphem (topocentric: its Sun stands 8.8" lower at the horizon): the Sun's height and azimuth at each quarter hour, the nodus' shadow
by vectors of this file's own, the dial's reading as the Sun's hour angle, noon, and the pairs of equal heights.
With `shadow`, the same program by another way: each row's shadow and reading.
"""
import json
import math
import random
import subprocess
import sys
import tempfile
from datetime import datetime
from pathlib import Path

import ephem

ARCSEC = math.pi / 180 / 3600


def run(program, *words):
    return json.loads(subprocess.run([program, *map(str, words)], capture_output=True, text=True, check=True).stdout)


def vector(azimuth, altitude):
    return (math.cos(altitude) * math.sin(azimuth), math.cos(altitude) * math.cos(azimuth), math.sin(altitude))


def dot(a, b):
    return sum(x * y for x, y in zip(a, b))


def seconds_of(clock):
    h, m, s = map(int, clock.split(":"))
    return 3600 * h + 60 * m + s


class Place:
    def __init__(self, lat, lon):
        self.site = ephem.Observer()
        self.site.lat, self.site.lon, self.site.pressure, self.site.elevation = str(lat), str(lon), 0, 0

    def sun(self, text):
        self.site.date = ephem.Date(datetime.fromisoformat(text.replace("Z", "+00:00")).replace(tzinfo=None) if text.endswith("Z")
                                    else datetime.utcfromtimestamp(datetime.fromisoformat(text).timestamp()))
        sun = ephem.Sun(self.site)
        return sun, (self.site.sidereal_time() - sun.ra + math.pi) % (2 * math.pi) - math.pi


def main(program):
    seed = random.randrange(2**32)
    print(f"seed {seed}")
    rng = random.Random(seed)
    worst = {"height arcsec": 0.0, "shadow mm": 0.0, "reading s": 0.0, "noon s": 0.0, "pair arcsec": 0.0, "middle deg": 0.0, "against shadow mm": 0.0, "against shadow s": 0.0}

    def note(key, value):
        worst[key] = max(worst[key], value)

    rows_seen = pairs_seen = 0
    with tempfile.TemporaryDirectory() as folder:
        for _ in range(12):
            lat, lon = round(rng.uniform(-60, 60), 4), round(rng.uniform(-10, 10), 4)
            facing, lean = round(rng.uniform(90, 270) + (180 if lat < 0 else 0), 2) % 360, round(rng.uniform(-5, 60), 2)
            file = Path(folder, "wall.yaml")
            file.write_text(f"place: {{latitude: {lat}, longitude: {lon}, zone: Europe/London}}\n"
                            f"dial: {{kind: leaning, facing: {facing}°, lean: {abs(lean)}° {'back' if lean >= 0 else 'forward'}}}\n"
                            "plate: {width: 400 mm, height: 500 mm}\ngnomon: {thickness: 0 mm, nodus height: 40 mm}\n", encoding="utf-8")
            first = f"{rng.randrange(2026, 2034)}-{rng.randrange(1, 13):02}-{rng.randrange(1, 27):02}"
            fixing = run(program, "fix", file, "--on", first, "--json")
            place = Place(lat, lon)
            a, t = math.radians(facing), math.radians(lean)
            u, v, n = (-math.cos(a), math.sin(a), 0), (-math.sin(t) * math.sin(a), -math.sin(t) * math.cos(a), math.cos(t)), vector(a, t)
            date = fixing["dates"][0]
            for row in date["rows"]:
                sun, hour_angle = place.sun(row["instant"])
                note("height arcsec", abs(math.radians(row["sun_altitude_deg"]) - sun.alt) / ARCSEC)
                towards = vector(sun.az, sun.alt)
                if dot(towards, n) < 0.2:
                    continue
                rows_seen += 1
                shadow = [-40 * dot(towards, axis) / dot(towards, n) for axis in (u, v)]
                note("shadow mm", max(abs(x - y) for x, y in zip(shadow, row["shadow_mm"])))
                theirs = (12 + 12 * hour_angle / math.pi) * 3600
                note("reading s", abs((seconds_of(row["reads"]) - theirs + 43200) % 86400 - 43200))
            instants = [word for row in date["rows"] for word in ("--at", row["instant"])]
            if instants:
                for row, shadow in zip(date["rows"], run(program, "shadow", file, "--json", *instants), strict=True):
                    if math.hypot(*row["shadow_mm"]) < 200:  # farther out, the table of the Sun's places tells (0.005")
                        note("against shadow mm", max(abs(x - y) for x, y in zip(row["shadow_mm"], shadow["shadow_mm"])))
                    note("against shadow s", abs(seconds_of(row["reads"]) - seconds_of(shadow["reads"])))
            sun, hour_angle = place.sun(date["noon"])
            note("noon s", abs(hour_angle) * 43200 / math.pi)
            for pair in date["equal_altitudes"]:
                pairs_seen += 1
                before, after = place.sun(pair["before"])[0], place.sun(pair["after"])[0]
                # Whole seconds are printed: 15" of the Sun's way for each.
                note("pair arcsec", abs(before.alt - after.alt) / ARCSEC)
                middle = math.degrees((before.az + (after.az - before.az) % (2 * math.pi) / 2) % (2 * math.pi))
                off = (middle + 90) % 180 - 90
                note("middle deg", abs(off - pair["middle_off_deg"]))
    print(f"{rows_seen} rows, {pairs_seen} pairs: greatest differences {worst}")
    limits = {"height arcsec": 12, "shadow mm": 0.05, "reading s": 2, "noon s": 2, "pair arcsec": 20, "middle deg": 0.02, "against shadow mm": 1e-4, "against shadow s": 0}
    sys.exit(0 if rows_seen > 100 and pairs_seen > 20 and all(worst[key] <= most for key, most in limits.items()) else 1)


main(sys.argv[1])
