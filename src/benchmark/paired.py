"""Stillstand beside the numpy script that a user would write, in turn, in one run.

Usage: paired.py CLASSPATH WORK [ROUNDS]     WORK: rate two-threads curve limits deep-coral joint filter growth

Each round runs both sides once; what is printed are medians over the rounds and their ratio, by the clock and by processor
time (of the whole process, the Java machine's own threads included). On a shared machine only the second means something.
"""

import math
import os
import subprocess
import sys
import time

os.environ.setdefault("OMP_NUM_THREADS", "1")

import numpy as np

DRAWS = 10_000_000
CHUNK = 65_536
PROBABILITIES = [0.5, 0.158650, 0.841350, 0.025, 0.975]


class Java:
    def __init__(self, classpath):
        command = ["java", "-Xmx1g", "-cp", classpath, "stillstand.uplift.PairedSide"]
        self.process = subprocess.Popen(command, stdin=subprocess.PIPE, stdout=subprocess.PIPE, text=True)

    def run(self, *words):
        before = self.processor_time()
        print(*words, file=self.process.stdin, flush=True)
        line = self.process.stdout.readline()
        after = self.processor_time()
        numbers = [float(word) for word in line.split()]
        # Java itself counts in steps of 10 ms
        return np.array([numbers[0], after - before if before else numbers[1]]), numbers[2:]

    def processor_time(self):
        try:
            return time.clock_gettime((~self.process.pid << 3) | 2)
        except OSError:
            return 0.0


def timed(work):
    clock, processor = time.perf_counter(), time.process_time()
    result = work()
    return np.array([time.perf_counter() - clock, time.process_time() - processor]), result


def summary(rates):
    return [*np.quantile(rates, PROBABILITIES), rates.mean(), rates.std()]


def pinned(random, count):
    z = random.normal(61, 1, count)
    t = random.normal(122, 1.5, count)
    e = random.normal(5, 3, count)
    return (z - e) / t


class CurveReader:
    """The curve of the Java side as numpy reads it, at 123 +- 3 ka, with 3 ka of curve age and 3 m of shared error."""

    def __init__(self, java):
        table = np.array(java.run("curve-grid")[1]).reshape(-1, 4)
        self.age, self.level, self.low, self.high = table.T.copy()

    def rates(self, random, count, with_depth):
        z = random.normal(61, 1, count)
        if with_depth:
            z += random.lognormal(math.log(3), 0.6, count)
        t = random.normal(123, 3, count)
        at = t + random.normal(0, 3, count)
        u = random.normal(0, 1, count)
        band = np.where(u < 0, np.interp(at, self.age, self.low), np.interp(at, self.age, self.high))
        e = np.interp(at, self.age, self.level) + u * band + random.normal(0, 3, count)
        return (z - e) / t


def whole(draw, count, seed):
    return summary(draw(np.random.default_rng(seed), count))


def chunked(draw, count, seed):
    random = np.random.default_rng(seed)
    rates = np.empty(count)
    for start in range(0, count, CHUNK):
        end = min(count, start + CHUNK)
        rates[start:end] = draw(random, end - start)
    return summary(rates)


def told(name, times):
    clock, processor = np.median(times, axis=0)
    print(f"  {name:<38} {clock:9.4f} s by the clock {processor:9.4f} s of processors")
    return np.array([clock, processor])


def ratio(name, slow, fast):
    print(f"  {name:<38} {slow[0] / fast[0]:9.2f} by the clock   {slow[1] / fast[1]:9.2f} by processors")


def agree(ours, theirs):
    sd = theirs[6]
    worst = max(abs(a - b) / sd for a, b in zip(ours, theirs))
    print(f"  largest difference of the seven figures: {worst:.5f} standard deviations")
    assert worst < 0.01


def against_numpy(java, name, command, draw, rounds):
    print(f"{name}: 10^7 draws, one thread; median, 68 and 95 % intervals, mean, sd")
    java.run(command, 1)
    ours, whole_arrays, chunks = [], [], []
    for seed in range(rounds):
        seconds, answer = java.run(command, 1)
        ours.append(seconds)
        seconds, theirs = timed(lambda: whole(draw, DRAWS, seed))
        whole_arrays.append(seconds)
        seconds, theirs = timed(lambda: chunked(draw, DRAWS, seed))
        chunks.append(seconds)
    agree(answer, theirs)
    fast = told("Stillstand", ours)
    slow = np.minimum(told("numpy, whole arrays", whole_arrays), told("numpy, chunks of 65,536", chunks))
    ratio("numpy (the faster) / Stillstand", slow, fast)


def two_threads(java, rounds):
    print("pinned level: 10^7 draws, two threads against one")
    java.run("pinned", 1), java.run("pinned", 2)
    one, two = [], []
    for _ in range(rounds):
        one.append(java.run("pinned", 1)[0])
        two.append(java.run("pinned", 2)[0])
    a, b = told("one thread", one), told("two threads", two)
    print(f"  {'one / two':<38} {a[0] / b[0]:9.2f} by the clock (needs two free cores)")
    print(f"  {'processor time of two / of one':<38} {b[1] / a[1]:9.2f} (1 = no work is added by the second thread)")


def curve(java, rounds):
    print("curve of Spratt and Lisiecki with its band at 10^7 drawn ages")
    java.run("curve")
    both = np.array([java.run("curve")[1][:2] for _ in range(rounds)])
    drawing, reading = np.median(both, axis=0)
    print(f"  drawing the ages {drawing:.3f} s, reading the curve {reading:.3f} s")
    print(f"  reading / drawing: {np.median(both[:, 1] / both[:, 0]):.2f}")


def needed_draws(draw, truth, count=400_000, repeats=40):
    """Plain draws whose error (root mean square, the worse of the two limits) is 0.1 % of the interval's width."""
    errors = []
    for seed in range(repeats):
        rates = draw(np.random.default_rng(1000 + seed), count)
        errors.append(np.quantile(rates, [0.025, 0.975]) - truth)
    width = truth[1] - truth[0]
    relative = np.sqrt(np.mean(np.square(errors), axis=0)).max() / width
    return math.ceil(count * (relative / 0.001) ** 2)


def needed_blocks(java, command, truth):
    """Fewest blocks of 2^14 Sobol' points that do the same."""
    width = truth[1] - truth[0]
    for blocks in (1, 2, 3, 4, 6, 8, 10, 16, 32, 64):
        errors = [np.array(java.run(command, blocks, seed)[1][3:5]) - truth for seed in range(1, 41)]
        if np.sqrt(np.mean(np.square(errors), axis=0)).max() <= 0.001 * width:
            return blocks
    raise SystemExit("no number of blocks reaches the error")


def limits(java, rounds):
    reader = CurveReader(java)
    cases = [
        ("pinned level", "limits-pinned", pinned),
        ("123 +- 3 ka read on the curve", "limits-curve", lambda random, n: reader.rates(random, n, False)),
    ]
    for name, command, draw in cases:
        truth = np.array(java.run(command, 640, 99)[1][3:5])
        draws, blocks = needed_draws(draw, truth), needed_blocks(java, command, truth)
        print(f"{name}: error of both 95 % limits below 0.1 % of the interval's width")
        print(f"  numpy needs {draws:,} draws, Stillstand {blocks} block(s) of 16,384 Sobol' points")
        for _ in range(30):
            java.run(command, blocks, 1)
        ours, whole_arrays, chunks = [], [], []
        for seed in range(rounds):
            ours.append(java.run(command, blocks, seed + 1)[0])
            whole_arrays.append(timed(lambda: whole(draw, draws, seed))[0])
            chunks.append(timed(lambda: chunked(draw, draws, seed))[0])
        fast = told("Stillstand", ours)
        slow = np.minimum(told("numpy, whole arrays", whole_arrays), told("numpy, chunks of 65,536", chunks))
        ratio("numpy (the faster) / Stillstand", slow, fast)


def joint(java, rounds):
    blocks, paths = 60, 1_000_000
    java.run("joint", blocks), java.run("paths", paths)
    print("joint draws at eight ages of one curve, one thread")
    whole_draws = told("heights, ages and curve", [java.run("joint", blocks)[0] for _ in range(rounds)])
    errors = told("the curve's errors alone", [java.run("paths", paths)[0] for _ in range(rounds)])
    print(f"  ages read a second of processor time: {blocks * 16384 * 8 / whole_draws[1]:,.0f} whole,")
    print(f"  {paths * 8 / errors[1]:,.0f} errors alone; by the clock {blocks * 16384 * 8 / whole_draws[0]:,.0f} whole")


def normal_below(x):
    """The normal distribution function; scipy's where there is one, else a table read by numpy."""
    try:
        from scipy.special import ndtr

        return ndtr(x)
    except ImportError:
        return np.interp(x, *_TABLE)


_TABLE_X = np.linspace(-9, 9, 180_001)
_TABLE = (_TABLE_X, np.array([0.5 * math.erfc(-x / math.sqrt(2)) for x in _TABLE_X]))


class NumpyFilter:
    """The shoreline filter over a chunk of rates at once, for the flight of FlightCases: n levels, m rows."""

    def __init__(self, levels, rows, cells):
        self.rows = [
            (80 + 40 * j, 2 + 0.4 * j, (0, -20, -8)[j % 3], 4 + 0.2 * j) for j in range(rows)
        ]
        top = 0.3 * (80 + 40 * rows)
        self.edges = np.linspace(2, top, cells + 1)
        self.middles = (self.edges[:-1] + self.edges[1:]) / 2
        height = top * (np.arange(levels) + 0.7) / levels
        self.dates = [None if i % 2 == 0 else (z / 0.3, 0.03 * z / 0.3) for i, z in enumerate(height)]
        below = normal_below((self.edges[None, :] - height[:, None]) / 2)
        self.kernel = np.diff(below, axis=1) / (self.edges[1] - self.edges[0])
        self.stray = np.array([0.8 / (top - 2) / (1 if date is None else 1000) for date in self.dates])

    def log_evidence(self, rates):
        q, n, count = 0.7, len(self.stray), len(rates)
        f = np.zeros((n + 1, count, len(self.middles)))
        nothing, above = np.zeros((n + 1, count)), np.zeros((n + 1, count))
        nothing[0] = 1
        for age, age_sigma, level, level_sigma in self.rows:
            mean = level + rates * age
            variance = level_sigma**2 + rates**2 * age_sigma**2
            below = normal_below((self.edges[None, :] - mean[:, None]) / np.sqrt(variance)[:, None])
            w = np.diff(below, axis=1)
            low, top = below[:, 0], 1 - below[:, -1]
            under = low[:, None] + np.cumsum(w, axis=1) - w / 2
            slope = rates * age_sigma**2 / variance
            date_mean = age + slope[:, None] * (self.middles[None, :] - mean[:, None])
            date_variance = age_sigma**2 - slope * rates * age_sigma**2
            sums = np.cumsum(f, axis=2)
            lower = nothing[:, :, None] + sums - f / 2
            total = nothing + sums[:, :, -1]
            new = f * under + (1 - q) * lower * w
            skipped = lower[0]
            for i in range(n):
                taken = q * skipped * self.kernel[i] * w
                if self.dates[i] is not None:
                    a, sigma = self.dates[i]
                    v = (date_variance + sigma**2)[:, None]
                    taken = taken * np.exp(-((a - date_mean) ** 2) / (2 * v)) / np.sqrt(2 * np.pi * v)
                new[i + 1] += taken
                skipped = lower[i + 1] + self.stray[i] * skipped
            f = new
            above += total * top
            nothing = nothing * low
        rest = np.append(np.cumprod(self.stray[::-1])[::-1], 1)
        z = np.exp(-0.8) * ((nothing + above + f.sum(axis=2)) * rest[:, None]).sum(axis=0)
        return np.log(z)

    def all(self, rates, chunk):
        parts = [self.log_evidence(rates[k : k + chunk]) for k in range(0, len(rates), chunk)]
        return np.concatenate(parts)


def shoreline_filter(java, rounds):
    rates = 0.05 + 0.95 * np.arange(600) / 599
    numpy_side = NumpyFilter(8, 20, 100)
    chunk = min((1, 4, 8, 16, 32, 64, 150, 600), key=lambda c: timed(lambda: numpy_side.all(rates, c))[0][1])
    print(f"shoreline filter, 8 levels x 20 highstands x 100 cells, 600 rates; numpy's best chunk: {chunk}")
    for _ in range(5):
        java.run("filter", 1), java.run("filter", 2)
    one, two, theirs = [], [], []
    for _ in range(rounds):
        seconds, ours = java.run("filter", 1)
        one.append(seconds)
        two.append(java.run("filter", 2)[0])
        seconds, logs = timed(lambda: numpy_side.all(rates, chunk))
        theirs.append(seconds)
    worst = np.abs(np.array(ours) - logs).max()
    print(f"  largest difference of the logarithms of 600 evidences: {worst:.2g}")
    assert worst < 1e-6
    a, b = told("Stillstand, one thread", one), told("Stillstand, two threads", two)
    ratio("numpy / Stillstand, one thread", told("numpy", theirs), a)
    print(f"  one thread / two: {a[0] / b[0]:.2f} by the clock; processor time of two / of one {b[1] / a[1]:.2f}")
    site = [java.run("whole-site")[0] for _ in range(3)]
    told("whole site, 600 rates, 250 + 500 cells", site[1:])
    preview = [java.run("preview")[0] for _ in range(60)]
    told("preview, 10 levels, 400 rates, warm", preview[30:])


def growth(java, rounds):
    base = dict(levels=8, rows=20, cells=100, rates=600)
    print("shoreline filter, microseconds of processor a rate, when one size grows (medians)")
    for size, factors in (("levels", (1, 2, 4)), ("rows", (1, 2, 4)), ("cells", (1, 2, 4)), ("rates", (1, 2, 4))):
        told_times = []
        for factor in factors:
            now = {**base, size: base[size] * factor}
            words = ["filter-growth", *now.values()]
            for _ in range(25):
                java.run(*words)
            seconds = np.median([java.run(*words)[0] for _ in range(rounds)], axis=0)[1]
            told_times.append(f"{now[size]}: {1e6 * seconds / now['rates']:.1f}")
        print(f"  {size:<7}", "   ".join(told_times))


def main():
    classpath, work = sys.argv[1], sys.argv[2]
    rounds = int(sys.argv[3]) if len(sys.argv) > 3 else 7
    java = Java(classpath)
    load = os.getloadavg()
    print(f"numpy {np.__version__}, load {load[0]:.1f}, {rounds} rounds")
    if work == "rate":
        against_numpy(java, "pinned level", "pinned", pinned, rounds)
    elif work == "two-threads":
        two_threads(java, rounds)
    elif work == "curve":
        curve(java, rounds)
    elif work == "limits":
        limits(java, rounds)
    elif work == "deep-coral":
        reader = CurveReader(java)
        against_numpy(java, "coral of log-normal depth read on the curve", "deep-coral",
                      lambda random, n: reader.rates(random, n, True), rounds)
    elif work == "joint":
        joint(java, rounds)
    elif work == "filter":
        shoreline_filter(java, rounds)
    elif work == "growth":
        growth(java, rounds)
    else:
        raise SystemExit(__doc__)


main()
