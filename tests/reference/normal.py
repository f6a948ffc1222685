"""Reference table of the normal law and its tails, for the exact binary64 arguments in the rows.

    normal.py              writes normal.csv beside this file; the same file each time, in some seconds
    normal.py --check N    recomputes N rows and compares with the file

mpmath with 50 digits to spare; values are printed to 25 digits. The error function, and for far arguments the
continued fraction of Laplace as an independent route, which must agree to 25 digits; a quantile is found by Newton's
method on the error function and put back.

Arguments: powers of two and ten over all of binary64, subnormal numbers, the neighbours of 0, of the ends of the
range of every function and of the quantile's seams, and random ones (SEED fixes them).
"""

import argparse
import csv
import math
import random
import sys
from pathlib import Path

from mpmath import erfc, erfinv, exp, log, log1p, mp, mpf, nstr, pi, sqrt

HERE = Path(__file__).parent
SEED = 20240302
COLUMNS = ["function", "argument", "value"]
DIGITS = 25
LARGEST, SMALLEST, SUBNORMAL = sys.float_info.max, sys.float_info.min, 5e-324


def tail(x):
    return erfc(x / sqrt(2)) / 2


def pdf(x):
    return exp(-x * x / 2) / sqrt(2 * pi)


def mills(x):
    """The tail over the density; far out by its expansion, where the tail is too small for mpmath's functions."""
    if x > mpf(10) ** 20:
        return (1 - 1 / x**2 + 3 / x**4) / x
    return tail(x) / pdf(x)


def laplace(x):
    """The same by the continued fraction 1 / (x + 1 / (x + 2 / (x + ...))), from its far end."""
    value = mpf(0)
    for k in range(4000, 0, -1):
        value = k / (x + value)
    return 1 / (x + value)


def log_tail(x):
    return log(mills(x)) - x * x / 2 - log(2 * pi) / 2 if x > 0 else log1p(-tail(-x))


def quantile(p):
    """By Newton's method in the logarithm of the smaller side."""
    sign, small = (-1, p) if p < mpf(1) / 2 else (1, 1 - p)
    if small > mpf("0.4"):
        return sqrt(2) * erfinv(2 * p - 1)
    x = sqrt(-2 * log(small))
    for _ in range(60):
        step = (log_tail(x) - log(small)) * mills(x)
        x += step
        if abs(step) < mpf(10) ** -50 * abs(x):
            break
    assert abs(tail(x) / small - 1) < mpf(10) ** -45, p
    return sign * x


FUNCTIONS = {
    "normal_pdf": pdf,
    "normal_cdf": lambda x: tail(-x),
    "normal_tail": tail,
    "normal_log_tail": log_tail,
    "normal_quantile": quantile,
    "mills_ratio": mills,
}


def neighbours(x, count=2):
    below = above = x
    yield x
    for _ in range(count):
        below, above = math.nextafter(below, -math.inf), math.nextafter(above, math.inf)
        yield from (below, above)


def arguments(name):
    rng = random.Random(f"{SEED} {name}")
    if name == "normal_quantile":
        found = [2.0**-k for k in (*range(1, 60), *range(60, 1075, 29), 1022, 1023, 1073, 1074)]
        found += [1 - 2.0**-k for k in range(2, 54)]
        found += [0.5 + sign * 2.0**-k for k in range(3, 54, 2) for sign in (-1, 1)]
        for seam in (0.5, 0.075, 0.925, math.exp(-25), SMALLEST):
            found += neighbours(seam)
        found += [rng.random() for _ in range(100)]
        found += [math.exp(rng.uniform(-744, 0)) for _ in range(100)]
        return [p for p in dict.fromkeys(found) if 0 < p < 1]
    found = [0.0, SUBNORMAL, SMALLEST, 1e-300, 1e-100, 1e-20, 1e-17, 1e-16, 1e-10, 1e-5, 1e-3]
    found += [2.0**k for k in (*range(-60, 8), *range(8, 1024, 60), 1023)] + [10.0**k for k in range(-4, 16)]
    found += [LARGEST]
    # Where tails and density become subnormal and 0, and where Mills ratio overflows.
    for end in (1.0, 4.0, 8.3, 37.5, 37.6, 37.677, 38.0, 38.4, 38.46, 38.485, 38.5, 38.56, 38.58, 40.0):
        found += neighbours(end)
    found += [rng.uniform(0, 3) for _ in range(60)] + [rng.uniform(0, 39) for _ in range(100)]
    found += [math.exp(rng.uniform(-745, 709)) for _ in range(40)]
    return [sign * x for x in dict.fromkeys(found) for sign in ((1, -1) if x else (1,))]


def printed(value):
    """25 digits, or 0 or inf where binary64 has no more to say."""
    if abs(value) < mpf(2) ** -1076:
        return "0"
    if abs(value) > mpf(2) ** 1024:
        return "inf" if value > 0 else "-inf"
    return nstr(value, DIGITS, min_fixed=-5, max_fixed=20)


def row(name, argument):
    x = mpf(argument)
    # Beyond these the functions are their limits to any precision, and mpmath would need as many digits as they have.
    far = abs(x) > 1e5 and name != "normal_quantile"
    # Small arguments: enough digits that 1 - tail keeps its own.
    mp.dps = 60
    if not far:
        value = FUNCTIONS[name](x)
    elif name == "normal_pdf" or (name, x > 0) in (("normal_cdf", False), ("normal_tail", True)):
        value = mpf(0)
    elif name in ("normal_cdf", "normal_tail"):
        value = mpf(1)
    elif name == "mills_ratio":
        value = mills(x) if x > 1e20 else (laplace(x) if x > 0 else mpf(2) ** 2000)
    else:
        value = log(laplace(x)) - x * x / 2 - log(2 * pi) / 2 if x > 0 else mpf(0)
    if name in ("mills_ratio", "normal_log_tail") and 6 < x <= 1e5:
        other = laplace(x) if name == "mills_ratio" else log(laplace(x)) - x * x / 2 - log(2 * pi) / 2
        assert abs(other - value) < mpf(10) ** -DIGITS * abs(value), (name, argument)
    return [name, repr(argument), printed(value)]


def write():
    with (HERE / "normal.csv").open("w", newline="") as file:
        out = csv.writer(file, lineterminator="\n")
        out.writerow(COLUMNS)
        out.writerows(row(name, x) for name in FUNCTIONS for x in arguments(name))


def check(count):
    with (HERE / "normal.csv").open(newline="") as file:
        header, *records = csv.reader(file)
    assert header == COLUMNS
    for record in random.Random(count).sample(records, min(count, len(records))):
        again = row(record[0], float(record[1]))
        assert again == record, (record, again)


def main():
    parser = argparse.ArgumentParser()
    parser.add_argument("--check", type=int, metavar="N")
    arguments_given = parser.parse_args()
    if arguments_given.check is None:
        write()
    else:
        check(arguments_given.check)


if __name__ == "__main__":
    main()
