"""Time and memory of runs of 500, 1,500 and 5,000 invented levels at 10^5 draws each.

Usage: levels.py JAR
"""

import os
import resource
import subprocess
import sys
import tempfile
import time

LEVELS_OF_A_SITE = 10


def write(folder, levels):
    with open(os.path.join(folder, "study.json"), "w") as file:
        file.write('{"title": "Invented levels, to measure time"}\n')
    with open(os.path.join(folder, "sites.csv"), "w") as file:
        file.write("site\n")
        file.writelines(f"S{site}\n" for site in range(levels // LEVELS_OF_A_SITE))
    stages = ["5a", "5c", "5e", "7a", "9e", "11c"]
    with open(os.path.join(folder, "levels.csv"), "w") as file:
        file.write("site,level,elevation_m,elevation_1sigma_m,highstand\n")
        for i in range(levels):
            site, level = divmod(i, LEVELS_OF_A_SITE)
            stage = level % len(stages)
            height = 20 + 25 * stage + 0.1 * site % 7
            file.write(f"S{site},L{level},{height:.2f},{0.5 + 0.1 * level:.1f},{stages[stage]}\n")


def main():
    for levels in (500, 1_500, 5_000):
        with tempfile.TemporaryDirectory() as folder:
            write(folder, levels)
            command = ["java", "-Xmx1g", "-jar", sys.argv[1], "run", folder, "--draws", "100000", "--quiet"]
            before = resource.getrusage(resource.RUSAGE_CHILDREN)
            start = time.perf_counter()
            subprocess.run(command, check=True)
            seconds = time.perf_counter() - start
            after = resource.getrusage(resource.RUSAGE_CHILDREN)
            processor = after.ru_utime + after.ru_stime - before.ru_utime - before.ru_stime
            print(
                f"{levels:6,} levels: {seconds:7.1f} s by the clock, {processor:7.1f} s of processors, "
                f"{1000 * processor / levels:5.2f} ms a level, largest process so far {after.ru_maxrss / 2**20:.2f} GiB",
                flush=True,
            )


main()
