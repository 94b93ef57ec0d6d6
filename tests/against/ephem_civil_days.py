# SPDX-License-Identifier: MIT
"""What `dialwright sun` prints against PyEphem: rise, noon and set with their azimuths, noon height, equation of time.

Usage: ephem_civil_days.py DIALWRIGHT
ephem_sun.py says what is known to differ; here the places are topocentric in PyEphem (parallax 8.8", under 3 s of rise
within 60 deg of the equator), and the program's times are whole seconds.
"""
import csv
import io
import math
import random
import subprocess
import sys
from datetime import datetime, timedelta, timezone

import ephem


def rows_of(program, lat, lon, first, last, refraction):
    words = [program, "sun", "--latitude", f"{lat:.6f}", "--longitude", f"{lon:.6f}", "--zone", "UTC", "--on", first, "--to", last, "--csv"]
    out = subprocess.run(words + ([] if refraction else ["--no-refraction"]), capture_output=True, text=True, check=True).stdout
    return list(csv.DictReader(io.StringIO(out)))


def seconds(ours, theirs):
    return abs((datetime.fromisoformat(ours) - theirs.datetime().replace(tzinfo=timezone.utc)).total_seconds())


def turn(degrees):
    return abs((degrees + 180.0) % 360.0 - 180.0)


def main():
    seed = random.randrange(2**32)
    print(f"seed {seed}")
    rng = random.Random(seed)
    worst = {"rise s": 0.0, "noon s": 0.0, "set s": 0.0, "azimuth deg": 0.0, "height deg": 0.0, "equation s": 0.0}
    count = 0
    for _ in range(60):
        lat, lon = round(rng.uniform(-60, 60), 6), round(rng.uniform(-179, 179), 6)
        first = datetime(2000, 1, 1) + timedelta(days=rng.randrange(35 * 365))
        refraction = rng.random() < 0.5
        place = ephem.Observer()
        place.lat, place.lon, place.pressure, place.elevation = str(lat), str(lon), 0, 0
        place.horizon = "-0:50" if refraction else "0"
        for row in rows_of(program, lat, lon, first.strftime("%Y-%m-%d"), (first + timedelta(days=4)).strftime("%Y-%m-%d"), refraction):
            count += 1
            midnight = ephem.Date(datetime.fromisoformat(row["date"]))
            for name, find in (("rise", place.next_rising), ("noon", place.next_transit), ("set", place.next_setting)):
                if not row[name] or " " in row[name]:
                    continue
                place.date = midnight - 5 / 86400.0
                sun = ephem.Sun()
                theirs = find(sun, start=place.date) if name == "noon" else find(sun, start=place.date, use_center=True)
                worst[f"{name} s"] = max(worst[f"{name} s"], seconds(row[name], theirs))
                place.date = theirs
                sun.compute(place)
                if name == "noon":
                    worst["height deg"] = max(worst["height deg"], abs(float(row["noon_altitude_deg"]) - math.degrees(sun.alt)))
                    mean_noon = (theirs - midnight) * 24 + lon / 15.0
                    equation_s = ((12.0 - mean_noon + 12.0) % 24.0 - 12.0) * 3600
                    worst["equation s"] = max(worst["equation s"], abs(60 * float(row["equation_of_time_min"]) - equation_s))
                else:
                    worst["azimuth deg"] = max(worst["azimuth deg"], turn(float(row[f"{name}_azimuth_deg"]) - math.degrees(sun.az)))
    print(f"{count} dates: greatest differences {worst}")
    limits = {"rise s": 5.0, "noon s": 5.0, "set s": 5.0, "azimuth deg": 0.02, "height deg": 0.004, "equation s": 5.0}
    sys.exit(0 if count == 300 and all(worst[name] <= most for name, most in limits.items()) else 1)


program = sys.argv[1]
main()
