# SPDX-License-Identifier: MIT
"""Zone offsets against Python's own reader of the system's tz database (PEP 615): random zones and instants.

Usage: zone_offsets.py PRINT_ZONE
Asia/Gaza and Asia/Hebron are compared up to 2086, where their tables, longer than all others, end.
"""
import random
import subprocess
import sys
from datetime import datetime, timedelta, timezone
from zoneinfo import ZoneInfo, available_timezones


def main():
    seed = random.randrange(2**32)
    print(f"seed {seed}")
    rng = random.Random(seed)
    names = sorted(n for n in available_timezones() if n not in ("localtime", "posixrules", "Factory"))
    begin = datetime(1900, 1, 1, tzinfo=timezone.utc)
    seconds = int((datetime(2101, 1, 1, tzinfo=timezone.utc) - begin).total_seconds())
    cases = [(rng.choice(names), begin + timedelta(seconds=rng.randrange(seconds))) for _ in range(3000)]
    cases = [(name, t) for name, t in cases if t.year < 2086 or name not in ("Asia/Gaza", "Asia/Hebron")]
    lines = "".join(f"{name} {t.strftime('%Y-%m-%dT%H:%M:%SZ')}\n" for name, t in cases)
    out = subprocess.run([sys.argv[1]], input=lines, capture_output=True, text=True, check=True).stdout
    wrong = 0
    for (name, t), line in zip(cases, out.splitlines(), strict=True):
        local = t.astimezone(ZoneInfo(name))
        theirs = f"{int(local.utcoffset().total_seconds())} {local.tzname()}"
        if line != theirs:
            wrong += 1
            print(f"{name} at {t.isoformat()}: {line}, expected {theirs}")
    print(f"{len(cases)} offsets compared, {wrong} differ")
    sys.exit(1 if wrong else 0)


main()
