# SPDX-License-Identifier: MIT
"""The correction from dial to clock against PyEphem's Sun and Python's reader of the tz database (PEP 615).

Usage: ephem_correction.py DIALWRIGHT

- The minutes of every date: the mean, over the design's years, of the zone's standard time less the dial's, both from
  outside, at the place's mean noon. Within 2 s; and no single year further off than the spread that is told, and 2 s.
  29 February is held against the mean of its neighbours, which is how the mean year defines it.
- The words: they are read as they stand in `numbers`, by one who knows nothing else, at random daytime instants.
  What is told must be the zone's clock, summer time and all, within the spread, 2 s, and what the Sun gains from noon.

TT - UT of ephem's forecast has run off: its Sun is taken at that of the leap seconds (ephem_sun.py says more).
"""
import json
import math
import pathlib
import random
import re
import subprocess
import sys
import tempfile
from datetime import date, datetime, timedelta, timezone
from zoneinfo import ZoneInfo

import ephem

MONTHS = ["January", "February", "March", "April", "May", "June", "July", "August", "September", "October", "November", "December"]
WEEKDAYS = ["Monday", "Tuesday", "Wednesday", "Thursday", "Friday", "Saturday", "Sunday"]
PLACES = [("Europe/London", 50.4, -4.142, "sun"), ("Europe/London", 52.2, -1.667, "zone"), ("Europe/Dublin", 53.3, -6.3, "sun"),
          ("Europe/Madrid", 42.9, -8.7, "sun"), ("Australia/Sydney", -33.9, 151.2, "sun"), ("Australia/Lord_Howe", -31.5, 159.1, "sun"),
          ("America/New_York", 40.7, -74.0, "zone"), ("America/Santiago", -33.4, -70.7, "sun"), ("Africa/Cairo", 30.0, 31.2, "sun"),
          ("Asia/Jerusalem", 31.8, 35.2, "sun"), ("America/Nuuk", 64.2, -51.7, "sun"), ("Asia/Tokyo", 35.7, 139.7, "sun"),
          ("Pacific/Kiritimati", 1.9, -157.4, "sun"), ("Asia/Kathmandu", 27.7, 85.3, "sun"), ("Europe/London", 51.5, 0.0, "clock")]


def dialwright(program, *words):
    done = subprocess.run([program, *map(str, words)], capture_output=True, text=True)
    assert done.returncode == 0, done.stderr
    return done.stdout


def signed(angle):
    return (angle + math.pi) % (2 * math.pi) - math.pi


def dial_shows(t, longitude_deg, meridian_deg, time):
    """Hours on the dial, not brought within a day: near the clock's own."""
    when = ephem.Date(t)
    at = ephem.Date(when + (69.184 - ephem.delta_t(when)) / 86400.0)
    sun = ephem.Sun()
    sun.compute(at)
    greenwich = ephem.Observer()
    greenwich.lon, greenwich.date = "0", when
    hour_angle = greenwich.sidereal_time() - sun.g_ra + math.radians(longitude_deg)
    if time == "zone":
        hour_angle -= math.radians(longitude_deg - meridian_deg)
    if time == "clock":
        return t.hour + t.minute / 60 + t.second / 3600 + t.microsecond / 3.6e9 + meridian_deg / 15
    return 12 + math.degrees(signed(hour_angle)) / 15


def wrapped_h(hours):
    return (hours + 12) % 24 - 12


def standard_h(zone, year):
    offsets = [datetime(year, month, 15, 12, tzinfo=zone).utcoffset() for month in range(1, 13)]
    return min(offsets).total_seconds() / 3600


def check_minutes(name, longitude, time, numbers):
    zone = ZoneInfo(name)
    first, last = numbers["years"]
    ahead = standard_h(zone, first)
    spread = numbers["correction"]["spread_s"]
    means, furthest = {}, 0.0
    for entry in numbers["correction"]["days"]:
        month, day = map(int, entry["date"].split("-"))
        if (month, day) == (2, 29):
            continue
        singles = []
        for year in range(first, last + 1):
            noon_h = 12 - ahead + wrapped_h(ahead - longitude / 15)  # UT of the mean Sun's noon on the zone's date
            t = datetime(year, month, day) + timedelta(hours=noon_h)
            clock = (t - datetime(t.year, t.month, t.day)).total_seconds() / 3600 + ahead
            singles.append(wrapped_h(clock - dial_shows(t, longitude, ahead * 15, time)) * 3600)
        means[entry["date"]] = sum(singles) / len(singles)
        furthest = max(furthest, max(abs(one - 60 * entry["add_min"]) for one in singles))
    means["02-29"] = (means["02-28"] + means["03-01"]) / 2
    worst = max(abs(60 * entry["add_min"] - means[entry["date"]]) for entry in numbers["correction"]["days"])
    print(f"{name} {time}: {len(means)} dates, greatest difference from the mean {worst:.2f} s; single years {furthest:.1f} s, told {spread:.1f} s")
    return len(means) == 366 and worst < 2.0 and furthest < spread + 2.0


def day_said(words, year):
    """The date that the words name, and whether they say its end."""
    end = words.startswith("the end of ")
    words = words.removeprefix("the end of ")
    if found := re.fullmatch(r"the (last|first|second|third|fourth|fifth) (\w+) of (\w+)", words):
        nth, weekday, month = found[1], WEEKDAYS.index(found[2]), MONTHS.index(found[3]) + 1
        days = [d for d in range(1, 32) if (month != 2 or d < 29) and (d < 31 or month in (1, 3, 5, 7, 8, 10, 12)) and date(year, month, d).weekday() == weekday]
        return date(year, month, days[-1] if nth == "last" else days[("first", "second", "third", "fourth", "fifth").index(nth)]), end
    found = re.fullmatch(r"the (\w+) from (\d+) to (\d+) (\w+)", words)
    assert found, words
    month = MONTHS.index(found[4]) + 1
    [day] = [d for d in range(int(found[2]), int(found[3]) + 1) if date(year, month, d).weekday() == WEEKDAYS.index(found[1])]
    return date(year, month, day), end


def summer_said_s(sentence, day):
    """What the sentence adds on a day, in seconds."""
    if sentence == "The zone keeps no summer time.":
        return 0
    for split in re.finditer(" to ", sentence):  # a range within the words has a "to" of its own
        parts = re.fullmatch(r"From (.+)", sentence[:split.start()]), re.fullmatch(r"(.+), also add (one hour|two hours|30 minutes) for summer time\.", sentence[split.end():])
        try:
            begins, ends = day_said(parts[0][1], day.year), day_said(parts[1][1], day.year)
        except (AssertionError, TypeError):
            continue
        begins, ends = (d + timedelta(days=end) for d, end in (begins, ends))
        summer = begins <= day < ends if begins < ends else day >= begins or day < ends
        return {"one hour": 3600, "two hours": 7200, "30 minutes": 1800}[parts[1][2]] if summer else 0
    raise AssertionError(sentence)


def check_words(rng, name, longitude, time, text, numbers, count):
    zone = ZoneInfo(name)
    lines = [line.strip() for line in text[text.index("Correction, from the dial"):].splitlines()]
    summer = next(line for line in lines if line.startswith(("From ", "The zone keeps no")))
    minutes = {}
    for line in lines:
        if found := re.match(r"(\w{3})   1: ", line):
            month = [m[:3] for m in MONTHS].index(found[1]) + 1
            for day, way, whole, seconds in re.findall(r"(\d+): (add|take) (\d+) min (\d\d) s", line):
                minutes.setdefault((month, int(day)), (int(whole) * 60 + int(seconds)) * (1 if way == "add" else -1))
        if line.startswith("Equation of time"):
            break
    assert time == "clock" or len(minutes) == 36, text
    if time == "clock":
        assert "nothing is added to it, and nothing taken from it" in text
        minutes = {(month, day): 0 for month in range(1, 13) for day in (1, 11, 21)}
    first, last = numbers["years"]
    ahead = standard_h(zone, first)
    worst = 0.0
    for _ in range(count):
        (month, day), year = rng.choice(sorted(minutes)), rng.randint(first, last)
        local = datetime(year, month, day, rng.randint(8, 16), rng.randint(0, 59), tzinfo=zone)
        t = local.astimezone(timezone.utc).replace(tzinfo=None)
        said_s = dial_shows(t, longitude, ahead * 15, time) * 3600 + minutes[month, day] + summer_said_s(summer, local.date())
        true_s = local.hour * 3600 + local.minute * 60
        off = abs((said_s - true_s + 43200) % 86400 - 43200)
        allowed = (0 if time == "clock" else numbers["correction"]["spread_s"] + 31 * 8 / 24) + 2
        if off > allowed:
            print(f"{name} at {local}: the words give {off:.1f} s off the clock")
            return False
        worst = max(worst, off)
    print(f"{name} {time}: words followed at {count} instants, {worst:.1f} s off at most")
    return True


def main():
    program = sys.argv[1]
    seed = random.randrange(2**32)
    print(f"seed {seed}")
    rng = random.Random(seed)
    good = []
    with tempfile.TemporaryDirectory() as folder:
        for i, (name, latitude, longitude, time) in enumerate(PLACES):
            design = pathlib.Path(folder) / "dial.yaml"
            design.write_text(f"place: {{latitude: {latitude}, longitude: {longitude}, zone: {name}}}\ndial: {{kind: level}}\n"
                              f"plate: {{diameter: 400 mm}}\nhours: {{time: {time}}}\n")
            numbers = json.loads(dialwright(program, "numbers", design, "--json"))
            if i % 4 == 0:
                good.append(check_minutes(name, longitude, time, numbers))
            good.append(check_words(rng, name, longitude, time, dialwright(program, "numbers", design), numbers, 300))
    sys.exit(0 if all(good) else 1)


main()
