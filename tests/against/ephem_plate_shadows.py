# SPDX-License-Identifier: MIT
"""The shadow of a nodus on random plates against PyEphem's geocentric Sun and vectors of our own here.

Usage: ephem_plate_shadows.py PLATE_SHADOWS. ephem's Sun: g_ra, g_dec (apparent place of date) and its apparent sidereal
time. The shadow here is found without the engine's formulas: altitude and azimuth by spherical trigonometry, then the
ray from the Sun through the nodus cut with the plate.

Allowed: 0.005 mm for a nodus of 100 mm, for shadows within 300 mm of its foot. The bound is there because the shadow's
shift for one turn of the Sun by e is h e / sin^2 a, a the Sun's height above the plate: at 300 mm, ten times that at
the foot, and the two Suns agree within 1" (4.8e-6): 100 mm x 4.8e-6 x 10 = 0.0048 mm. To 1 m (a factor 101) the same 1"
is 0.049 mm, which the second limit allows.
"""
import math
import random
import subprocess
import sys
from datetime import datetime, timedelta

import ephem

NODUS_MM = 100.0
LIMITS = ((300.0, 0.005), (1000.0, 0.05))
SEED = 20260621


def dot(a, b):
    return sum(x * y for x, y in zip(a, b))


def cross(a, b):
    return (a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0])


def unit(azimuth, altitude):
    return (math.cos(altitude) * math.sin(azimuth), math.cos(altitude) * math.cos(azimuth), math.sin(altitude))


def sun_direction(when, latitude, longitude):
    place = ephem.Observer()
    place.lon, place.lat, place.date = longitude, latitude, ephem.Date(when)
    sun = ephem.Sun(ephem.Date(when))
    hour_angle = place.sidereal_time() - sun.g_ra
    altitude = math.asin(math.sin(latitude) * math.sin(sun.g_dec)
                         + math.cos(latitude) * math.cos(sun.g_dec) * math.cos(hour_angle))
    # Azimuth from the south through west, by Napier's analogy; then from the north.
    azimuth = math.pi + math.atan2(math.sin(hour_angle),
                                   math.cos(hour_angle) * math.sin(latitude) - math.tan(sun.g_dec) * math.cos(latitude))
    return unit(azimuth, altitude)


def shadow(sun, azimuth, altitude):
    normal = unit(azimuth, altitude)
    if altitude == math.pi / 2:
        normal, up = (0.0, 0.0, 1.0), (0.0, 1.0, 0.0)
    else:
        rise = normal[2] / math.sqrt(1 - normal[2] ** 2)
        up = (-math.sin(azimuth) * math.sin(math.atan(rise)), -math.cos(azimuth) * math.sin(math.atan(rise)),
              math.cos(math.atan(rise)))
    right = cross(up, normal)
    height = dot(sun, normal)
    if height <= 0:
        return None
    nodus = tuple(NODUS_MM * x for x in normal)
    point = tuple(x - NODUS_MM / height * s for x, s in zip(nodus, sun))
    return dot(point, right), dot(point, up)


def random_case(rng):
    when = datetime(1972, 1, 1) + timedelta(seconds=rng.randrange(64 * 365 * 86400))
    # A quarter level and a quarter upright plates, the rest lean any way.
    altitude = rng.choice((90.0, 0.0, round(rng.uniform(-60, 89), 4), round(rng.uniform(-60, 89), 4)))
    return when, round(rng.uniform(-90, 90), 4), round(rng.uniform(-180, 180), 4), round(rng.uniform(0, 360), 4), altitude


def main(program):
    rng = random.Random(SEED)
    cases, expected = [], []
    counts = [0] * len(LIMITS)
    while counts[0] < 1000:
        case = random_case(rng)
        when, latitude, longitude, azimuth, altitude = case
        sun = sun_direction(when, math.radians(latitude), math.radians(longitude))
        point = shadow(sun, math.radians(azimuth), math.radians(altitude)) if sun[2] > 0 else None
        if point is None or math.hypot(*point) > LIMITS[-1][0]:
            continue
        cases.append(case)
        expected.append(point)
        counts = [sum(math.hypot(*p) <= reach for p in expected) for reach, _ in LIMITS]
    lines = "".join(f"{when:%Y-%m-%dT%H:%M:%SZ} {latitude} {longitude} {azimuth} {altitude}\n"
                    for when, latitude, longitude, azimuth, altitude in cases)
    out = subprocess.run([program], input=lines, capture_output=True, text=True, check=True).stdout.splitlines()
    bad = 0
    worst = [0.0] * len(LIMITS)
    for case, (u, v), line in zip(cases, expected, out, strict=True):
        off = math.inf if line == "unlit" else math.hypot(float(line.split()[0]) - u, float(line.split()[1]) - v)
        for k, (reach, allowed) in enumerate(LIMITS):
            if math.hypot(u, v) <= reach:
                worst[k] = max(worst[k], off)
                if not off <= allowed:
                    bad += 1
                    print(f"seed {SEED}: {case}: {line}, expected {u:.6f} {v:.6f}: {off:.6f} mm apart")
    for (reach, allowed), count, off in zip(LIMITS, counts, worst):
        print(f"{count} shadows within {reach:.0f} mm of the foot: greatest difference {off:.5f} mm, {allowed} allowed")
    return 1 if bad else 0


if __name__ == "__main__":
    sys.exit(main(sys.argv[1]))
