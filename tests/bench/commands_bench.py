# SPDX-License-Identifier: MIT
"""Times whole commands, start included: usage commands_bench.py PROGRAM DESIGN [--quick]

The best of several runs counts: a machine that does other work makes runs slower, never faster. Memory is the largest
resident set, as the kernel counts it for the finished process.
"""
import os
import subprocess
import sys
import tempfile
import time

program, design = sys.argv[1:3]
times = 3 if "--quick" in sys.argv else 20


def run(words, stdin):
    """Seconds by the clock, seconds of processor, largest resident set in MB."""
    stdin.seek(0)
    start = time.perf_counter()
    child = subprocess.Popen([program, *words], stdin=stdin, stdout=subprocess.DEVNULL, stderr=subprocess.DEVNULL)
    _, status, usage = os.wait4(child.pid, 0)
    wall = time.perf_counter() - start
    child.returncode = os.waitstatus_to_exitcode(status)
    assert child.returncode in (0, 3), f"{words}: exit status {child.returncode}"
    return wall, usage.ru_utime + usage.ru_stime, usage.ru_maxrss / 1024


def line(name, words, stdin, ratio_to=None):
    runs = [run(words, stdin) for _ in range(times)]
    wall, cpu, memory = (min(one[k] for one in runs) for k in range(3))
    ratio = f"{cpu / ratio_to:8.2f}" if ratio_to else "        "
    print(f"{name:<44} {wall * 1000:8.1f} {cpu * 1000:8.1f} {memory:8.1f} {ratio}")
    return cpu


with tempfile.TemporaryDirectory() as folder, tempfile.TemporaryFile() as instants, open(os.devnull, "rb") as nothing:
    # A year in 100,000 steps of 315 seconds.
    for i in range(100_000):
        at = time.gmtime(1_767_225_600 + 315 * i)
        instants.write(time.strftime("%Y-%m-%dT%H:%M:%SZ\n", at).encode())
    print(f"{'best of ' + str(times):<44} {'wall ms':>8} {'cpu ms':>8} {'peak MB':>8} {'ratio':>8}")
    base = line("--version (the start alone)", ["--version"], nothing)
    made = line("make, to a folder in the temporary place", ["make", design, "--to", folder + "/packet"], nothing)
    large = folder + "/large.yaml"  # tiled to A4 on some 130 sheets: at most 500 ms and 150 MB; the packet above at most 120 ms
    with open(large, "w") as file:
        file.write("place: {latitude: 54.2, longitude: -1.9, zone: Europe/London}\ndial: {kind: wall, facing: S 23° E}\nplate: {width: 2 m, height: 2 m, thickness: 30 mm}\n"
                   "gnomon: {thickness: 12 mm, joint: tenons}\nhours: {divide: 5 min}\ndates: {signs: yes}\nlettering: {motto: Lux umbra Dei}\n")
    line("make, a plate of 2 m x 2 m on A4", ["make", large, "--to", folder + "/large"], nothing, made)
    line("numbers --json", ["numbers", design, "--json"], nothing, made)
    line("shadow --json, one instant", ["shadow", design, "--json", "--at", "2026-06-21T11:00:00Z"], nothing, made)
    line("shadow --json, 100,000 instants of a year", ["shadow", design, "--json", "--at-file", "-"], instants, made)
