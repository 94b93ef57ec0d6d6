# SPDX-License-Identifier: MIT
"""What `dialwright sunlight` prints against counting with PyEphem: three times a minute, is the Sun up, on the face's side, over the skyline?

Usage: ephem_sunlight.py DIALWRIGHT
Asked: within 1 minute a day. Counting itself is off by 10 s at most for each begin and end; the parallax that PyEphem takes
into account (8.8") is 2 s of them.
"""
import csv
import io
import math
import random
import subprocess
import sys
import tempfile
from datetime import datetime, timedelta
from pathlib import Path

import ephem

STEP_S = 20


def design(lat, lon, facing, lean, marks):
    pairs = ", ".join(f"[{azimuth}°, {altitude}°]" for azimuth, altitude in marks)
    return (f"place: {{latitude: {lat}, longitude: {lon}, zone: UTC, skyline: [{pairs}]}}\n"
            f"dial: {{kind: leaning, facing: {facing}°, lean: {lean}° back}}\nplate: {{width: 400 mm, height: 500 mm}}\n")


def skyline_at(marks, azimuth):
    """Straight between marks in azimuth and altitude, and round from the last to the first."""
    for (a, low), (b, high) in zip(marks, marks[1:] + [(marks[0][0] + 360.0, marks[0][1])]):
        turn = (azimuth - a) % 360.0
        if turn < b - a:
            return low + (high - low) * turn / (b - a)
    return marks[0][1]


def counted_hours(lat, lon, facing, lean, marks, date):
    place = ephem.Observer()
    place.lat, place.lon, place.pressure, place.elevation = str(lat), str(lon), 0, 0
    a, t = math.radians(facing), math.radians(lean)
    normal = (math.cos(t) * math.sin(a), math.cos(t) * math.cos(a), math.sin(t))
    begin, sun = ephem.Date(date), ephem.Sun()
    up = facing_count = lit = 0
    for i in range(86400 // STEP_S):
        place.date = begin + (i + 0.5) * STEP_S / 86400.0
        sun.compute(place)
        if sun.alt <= 0:
            continue
        up += 1
        towards = (math.cos(sun.alt) * math.sin(sun.az), math.cos(sun.alt) * math.cos(sun.az), math.sin(sun.alt))
        if sum(x * y for x, y in zip(towards, normal)) <= 0:
            continue
        facing_count += 1
        lit += math.degrees(sun.alt) > skyline_at(marks, math.degrees(sun.az))
    return [n * STEP_S / 3600.0 for n in (up, facing_count, lit)]


def main(program):
    seed = random.randrange(2**32)
    print(f"seed {seed}")
    rng = random.Random(seed)
    worst = [0.0, 0.0, 0.0]
    with tempfile.TemporaryDirectory() as folder:
        for _ in range(8):
            lat, lon = round(rng.uniform(-66, 66), 4), round(rng.uniform(-180, 180), 4)
            facing, lean = round(rng.uniform(0, 360), 2), round(rng.uniform(0, 80), 2)
            marks = [(azimuth + round(rng.uniform(0, 20), 1), round(rng.uniform(0, 20), 1)) for azimuth in range(0, 350, 25)]
            file = Path(folder, "wall.yaml")
            file.write_text(design(lat, lon, facing, lean, marks), encoding="utf-8")
            year = rng.randrange(2000, 2035)
            out = subprocess.run([program, "sunlight", file, "--year", str(year), "--csv"], capture_output=True, text=True, check=True).stdout
            rows = {row["date"]: row for row in csv.DictReader(io.StringIO(out))}
            for _ in range(4):
                date = datetime(year, 1, 1) + timedelta(days=rng.randrange(365))
                row = rows[date.strftime("%Y-%m-%d")]
                for i, (name, theirs) in enumerate(zip(("up_h", "facing_h", "lit_h"), counted_hours(lat, lon, facing, lean, marks, date))):
                    worst[i] = max(worst[i], abs(float(row[name]) - theirs) * 60)
    print(f"32 days on 8 walls: greatest differences {worst[0]:.2f} min up, {worst[1]:.2f} min facing, {worst[2]:.2f} min lit")
    sys.exit(0 if max(worst) < 1.0 else 1)


main(sys.argv[1])
