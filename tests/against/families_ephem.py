# SPDX-License-Identifier: MIT
"""Families of lines against PyEphem: its own rise and set, altitude and azimuth, and its Sun by the zone's clock.

Usage: families_ephem.py FAMILY_LINES.

Hours from rise and to set, unequal hours, altitudes, azimuths: from each drawn point the place in the sky whose shadow
falls there is found by the ray through the nodus (vectors of our own here). ephem is given a fixed body at that apparent
place, and asked for its setting after its transit, its altitude and its azimuth (no pressure; horizon 0 or -0:50 for the
centre). A fixed body and not the Sun, because a line is defined by one declination, that of the moment: the Sun's own
changes until it sets by up to 12' and moves real sunsets by up to a minute against any such dial. Allowed: 1 s of time
and 1" of altitude and azimuth (times the cosine of the altitude), the bounds at which the two programs' Suns agree.
Half a day arc is measured between ephem's transit and its setting, in sidereal time.

Clock-time curves: on each date of 365 the clocks of Europe/Berlin (Python's zoneinfo; in standard time) show 9, 12 and
15 h. ephem's Sun at that instant, averaged over the years 2025 to 2044 for which the curve is the mean, throws its
shadow on the curve within 0.03 mm: that is 0.15 s and 2", what the mean year allows, on plates where a second moves the
shadow by up to 0.1 mm. One year's own Sun stands up to three eighths of a day from the mean in the leap cycle (9' in
declination, 11 s in the equation of time), most of it along the curve: 0.2 mm across it is allowed.
"""
import math
import random
import subprocess
import sys
from datetime import datetime, timedelta
from zoneinfo import ZoneInfo

import ephem

NODUS_MM = 100.0
SEED = 20260922
SIDEREAL = 1.00273790935
DEGREE = math.pi / 180
ARCSEC = DEGREE / 3600
YEARS = range(2025, 2045)
# latitude, longitude, zone meridian, normal azimuth, normal altitude, horizon
PLANS = [(52.0, 9.5, 15.0, 0.0, 90.0, 0.0), (52.0, 9.5, 15.0, 157.0, 0.0, 0.0), (47.3, 8.1, 15.0, 215.0, 25.0, -50 / 60),
         (-34.0, 150.2, 150.0, 0.0, 90.0, -50 / 60), (-22.5, 30.0, 30.0, 70.0, -10.0, 0.0), (10.0, 104.0, 105.0, 300.0, 60.0, 0.0),
         (64.0, 20.0, 15.0, 180.0, 0.0, -50 / 60), (0.0, -78.0, -75.0, 0.0, 90.0, 0.0), (38.0, -9.0, 0.0, 90.0, 0.0, 0.0),
         (56.0, 60.0, 75.0, 350.0, 20.0, -50 / 60)]


def dot(a, b):
    return sum(x * y for x, y in zip(a, b))


def frame(azimuth, altitude):
    """u, v, n as (east, north, up)."""
    a, t = azimuth * DEGREE, altitude * DEGREE
    if altitude == 90:
        return (1, 0, 0), (0, 1, 0), (0, 0, 1)
    return ((-math.cos(a), math.sin(a), 0), (-math.sin(t) * math.sin(a), -math.sin(t) * math.cos(a), math.cos(t)),
            (math.cos(t) * math.sin(a), math.cos(t) * math.cos(a), math.sin(t)))


def sky_of(point, plan):
    """Hour angle and declination of what throws its shadow on a point: by the angles of the spherical triangle."""
    u, v, n = frame(plan[3], plan[4])
    s = [NODUS_MM * n[k] - point[0] * u[k] - point[1] * v[k] for k in range(3)]
    size = math.sqrt(dot(s, s))
    east, north, up = (x / size for x in s)
    altitude, azimuth, phi = math.asin(up), math.atan2(east, north), plan[0] * DEGREE
    declination = math.asin(math.sin(phi) * up + math.cos(phi) * math.cos(altitude) * math.cos(azimuth))
    hour_angle = math.atan2(-math.cos(altitude) * math.sin(azimuth),
                            math.cos(phi) * up - math.sin(phi) * math.cos(altitude) * math.cos(azimuth))
    return hour_angle, declination


def shadow(hour_angle, declination, plan):
    phi = plan[0] * DEGREE
    up = math.sin(phi) * math.sin(declination) + math.cos(phi) * math.cos(declination) * math.cos(hour_angle)
    s = (-math.cos(declination) * math.sin(hour_angle),
         math.cos(phi) * math.sin(declination) - math.sin(phi) * math.cos(declination) * math.cos(hour_angle), up)
    u, v, n = frame(plan[3], plan[4])
    light = dot(s, n)
    if light <= 0.02 or up <= 0.02:
        return None
    return -NODUS_MM * dot(s, u) / light, -NODUS_MM * dot(s, v) / light


def signed(angle):
    return (angle + math.pi) % (2 * math.pi) - math.pi


def observer(plan, horizon):
    place = ephem.Observer()
    place.lat, place.lon, place.pressure, place.elevation = plan[0] * DEGREE, plan[1] * DEGREE, 0, 0
    place.horizon, place.date = horizon * DEGREE, ephem.Date("2026/3/21 12:00")
    return place


def body_at(place, hour_angle, declination):
    """A fixed body whose apparent place has this hour angle and declination: aberration and nutation taken off."""
    body = ephem.FixedBody()
    body._epoch = place.date
    wanted = place.sidereal_time() - hour_angle
    body._ra, body._dec = wanted, declination
    for _ in range(4):
        body.compute(place)
        body._ra, body._dec = body._ra + signed(wanted - body.g_ra), body._dec + (declination - body.g_dec)
    body.compute(place)
    return body


def half_day(plan, hour_angle, declination):
    """From ephem's transit to its setting, as an angle."""
    place = observer(plan, plan[5])
    body = body_at(place, 0.0, declination)
    place.date -= 0.01
    transit = place.next_transit(body)
    place.date = transit
    return (place.next_setting(body) - transit) * SIDEREAL * 2 * math.pi


def compare_point(family, value, point, plan):
    """What is found and what is allowed, in the same unit: seconds of time, or of arc."""
    hour_angle, declination = sky_of(point, plan)
    if family in ("altitude", "azimuth"):
        body = body_at(observer(plan, 0.0), hour_angle, declination)
        if family == "altitude":
            return "altitude", abs(body.alt - value * DEGREE) / ARCSEC
        return "azimuth", abs(signed(body.az - value * DEGREE)) * math.cos(body.alt) / ARCSEC
    arc, count = half_day(plan, hour_angle, declination), value * 15 * DEGREE
    expected = {"since_sunrise": count - arc, "to_sunset": arc - count, "since_sunset": arc + count,
                "unequal": (value / 6 - 1) * arc}[family]
    return "hours", abs(signed(hour_angle - expected)) / ARCSEC / 15


def lines_of(program, plans):
    text = "".join(" ".join(map(repr, plan)) + "\n" for plan in plans)
    out = subprocess.run([program, "12"], input=text, capture_output=True, text=True, check=True).stdout.splitlines()
    made, current = [], []
    for row in out:
        if row == "end":
            made.append(current)
            current = []
            continue
        family, value, *points = row.split()
        current.append((family, float(value), [tuple(map(float, p.split(","))) for p in points]))
    return made


def compare_points(made):
    rng, worst, counts, bad, unset = random.Random(SEED), {}, {}, 0, 0
    for plan, lines in zip(PLANS, made, strict=True):
        for family, value, points in lines:
            if family == "clock":
                continue
            for point in rng.sample(points, min(4, len(points))):
                try:
                    kind, off = compare_point(family, value, point, plan)
                except (ephem.AlwaysUpError, ephem.NeverUpError):
                    unset += 1  # at the very limit of polar day ephem may find no setting
                    continue
                worst[kind], counts[family] = max(worst.get(kind, 0), off), counts.get(family, 0) + 1
                if not off <= 1.0:
                    bad += 1
                    print(f"seed {SEED}: {family} {value:g} at {point} on {plan}: off by {off:.3f}")
    print("points compared: " + ", ".join(f"{n} {family}" for family, n in sorted(counts.items()))
          + f"; {unset} without a setting (5 allowed)")
    print(f"greatest difference: hours {worst['hours']:.3f} s, altitude {worst['altitude']:.3f}\", "
          f"azimuth {worst['azimuth']:.3f}\"; 1 allowed")
    return bad + (0 if len(counts) == 6 and min(counts.values()) > 50 and unset <= 5 else 1)


def sun_at(clock, longitude):
    """Hour angle and declination of ephem's Sun when Berlin's clocks, in standard time, show this."""
    aware = clock.replace(tzinfo=ZoneInfo("Europe/Berlin"))
    utc = clock - (aware.utcoffset() - aware.dst())
    place = ephem.Observer()
    place.lon, place.lat, place.date = longitude * DEGREE, 0, ephem.Date(utc)
    sun = ephem.Sun(place.date)
    return signed(place.sidereal_time() - sun.g_ra), float(sun.g_dec)


def off_curve(point, pieces):
    least = math.inf
    for piece in pieces:
        for (au, av), (bu, bv) in zip(piece, piece[1:]):
            du, dv = bu - au, bv - av
            square = du * du + dv * dv
            t = min(1, max(0, ((point[0] - au) * du + (point[1] - av) * dv) / square)) if square else 0
            least = min(least, math.hypot(point[0] - au - t * du, point[1] - av - t * dv))
    return least


def compare_clock(made):
    worst_mean = worst_year = 0.0
    shadows = bad = 0
    for clock_h in (9, 12, 15):
        for day in range(365):
            date = datetime(2025, 1, 1, clock_h) + timedelta(days=day)
            suns = [sun_at(date.replace(year=year), PLANS[0][1]) for year in YEARS]
            mean = [sum(x) / len(suns) for x in zip(*suns)]
            for plan, lines in zip(PLANS[:2], made):
                pieces = [points for family, value, points in lines if family == "clock" and value == clock_h]
                point = shadow(*mean, plan)
                if point is None or max(map(abs, point)) > 390:
                    continue
                shadows += 1
                off = off_curve(point, pieces)
                worst_mean = max(worst_mean, off)
                own = shadow(*suns[day % len(suns)], plan)
                worst_year = max(worst_year, off_curve(own, pieces))
                if not off <= 0.03:
                    bad += 1
                    print(f"{date:%d %B} {clock_h} h on {plan}: the mean shadow lies {off:.4f} mm from the curve")
    print(f"{shadows} shadows by the zone's clock: mean of the years within {worst_mean:.4f} mm of the curve (0.03 allowed), "
          f"single years within {worst_year:.4f} mm (0.2 allowed)")
    return bad + (0 if shadows > 1000 and worst_year <= 0.2 else 1)


def main(program):
    made = lines_of(program, PLANS)
    return 1 if compare_points(made) + compare_clock(made) else 0


if __name__ == "__main__":
    sys.exit(main(sys.argv[1]))
