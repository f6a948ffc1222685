"""Reference table of exponentials, logarithms and what a barrier profile says, for the exact binary64 arguments.

    elementary.py              writes elementary.csv beside this file; the same file each time, in some seconds
    elementary.py --check N    recomputes N rows and compares with the file

mpmath with 60 digits and the digits that cancel on top; each value is computed at two working precisions, which must
agree to 40 digits, and printed to 40.

    exp, expm1, ln, log1p   of `a`
    ln_ratio                ln(a / b)
    distance                |ln(a / b)| / (c sqrt(d)): standard deviations from spot `b` to barrier `a`, vol `c`, expiry `d`
    gap                     a - (b - c): rebate less what a call pays at the barrier `b` with the strike `c`, b > c

Arguments: all of the range, powers of two, the neighbours of 0 and 1 and of the ends of the range, and random ones
(SEED fixes them).
"""

import argparse
import csv
import math
import random
import sys
from pathlib import Path

from mpmath import exp, expm1, log, log1p, mp, mpf, nstr, sqrt

HERE = Path(__file__).parent
SEED = 20240303
COLUMNS = ["function", "a", "b", "c", "d", "value"]
DIGITS = 40
LARGEST, SMALLEST, SUBNORMAL = sys.float_info.max, sys.float_info.min, 5e-324

FUNCTIONS = {
    "exp": exp,
    "expm1": expm1,
    "ln": log,
    "log1p": log1p,
    "ln_ratio": lambda a, b: log(a / b),
    "distance": lambda a, b, c, d: abs(log(a / b)) / (c * sqrt(d)),
    "gap": lambda a, b, c: a - (b - c),
}


def neighbours(x, count=3):
    below = above = x
    yield x
    for _ in range(count):
        below, above = math.nextafter(below, -math.inf), math.nextafter(above, math.inf)
        yield from (below, above)


def scale(rng, low, high):
    return math.exp(rng.uniform(math.log(low), math.log(high)))


def near_one(rng):
    return 1 + rng.choice((-1, 1)) * scale(rng, 2.0**-52, 0.5)


def exponents(rng):
    yield from (sign * 2.0**k for k in range(-60, 10) for sign in (-1, 1))
    yield from (rng.uniform(-708, 709) for _ in range(1500))
    yield from (rng.uniform(-1, 1) for _ in range(500))
    yield from (rng.choice((-1, 1)) * scale(rng, 1e-20, 1) for _ in range(300))


def arguments(name):
    rng = random.Random(f"{SEED} {name}")
    if name in ("exp", "expm1"):
        found = [x for x in exponents(rng) if abs(x) <= 709]
        found += neighbours(709.782712893384)
        if name == "exp":
            found += [rng.uniform(-745, -708) for _ in range(100)]
        return [(x,) for x in found]
    if name in ("ln", "log1p"):
        found = [2.0**k for k in range(-1074, 1024, 7)] + [SUBNORMAL, SMALLEST, LARGEST]
        found += [scale(rng, 1e-300, 1e300) for _ in range(1000)] + [near_one(rng) for _ in range(1000)]
        if name == "log1p":
            found += [-x for x in found if x < 1] + [rng.uniform(-0.5, 1) for _ in range(1000)]
            for seam in (-0.29, 0.41):
                found += neighbours(seam)
        else:
            found += [*neighbours(1.0), *neighbours(math.sqrt(2)), *neighbours(math.sqrt(0.5))]
        return [(x,) for x in found]
    if name == "ln_ratio":
        pairs = [(scale(rng, 1e-300, 1e300), scale(rng, 1e-300, 1e300)) for _ in range(800)]
        close = [scale(rng, 1e-12, 1e12) for _ in range(1600)]
        pairs += [(b * near_one(rng), b) for b in close]
        pairs += [(a, b) for b in close[:150] for a in neighbours(b, 1)]
        pairs += [(LARGEST, SUBNORMAL), (SUBNORMAL, LARGEST), (SUBNORMAL, SMALLEST), (1.5, 3e-320)]
        return pairs
    if name == "distance":
        spots = [scale(rng, 1e-12, 1e12) for _ in range(1500)]
        return [
            (spot * math.exp(rng.choice((-1, 1)) * scale(rng, 1e-14, 10)), spot, scale(rng, 1e-6, 10), scale(rng, 1e-8, 100))
            for spot in spots
        ]
    barriers = [scale(rng, 1e-3, 1e6) for _ in range(1500)]
    return [(b * scale(rng, 1e-6, 1), b, b * (1 - scale(rng, 1e-12, 0.9))) for b in barriers]


def at(digits, name, row):
    mp.dps = digits
    return nstr(FUNCTIONS[name](*map(mpf, row)), DIGITS, min_fixed=-5, max_fixed=20)


def value(name, row):
    # A logarithm of 1 + 1e-300 loses 300 digits.
    digits = 400 if name in ("expm1", "log1p", "ln_ratio") else 60
    first, second = at(digits, name, row), at(digits + 40, name, row)
    assert first == second, (name, row, first, second)
    return first


def rows():
    for name in FUNCTIONS:
        for row in dict.fromkeys(arguments(name)):
            result = value(name, row)
            if mpf(result) != 0 and abs(mpf(result)) < mpf(2) ** 1024:
                yield [name, *map(repr, row), *[""] * (4 - len(row)), result]


def main():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("--check", type=int, metavar="N")
    count = parser.parse_args().check
    path = HERE / "elementary.csv"
    if count is None:
        with path.open("w", newline="") as file:
            writer = csv.writer(file, lineterminator="\n")
            writer.writerow(COLUMNS)
            writer.writerows(rows())
        return
    with path.open() as file:
        known = list(csv.reader(file))[1:]
    for name, *cells, expected in random.sample(known, min(count, len(known))):
        found = value(name, [float(cell) for cell in cells if cell])
        assert found == expected, (name, cells, found, expected)


if __name__ == "__main__":
    main()
