"""Reference table of the law of Brownian motion and its extremes, for the exact binary64 inputs in the rows.

    law.py              writes law.csv beside this file; the same file each time, in some minutes
    law.py --check N    recomputes N rows by both routes and compares with the file

Every value is computed by two independent routes, which must agree to 25 digits; that is asserted for each row.

    route A    the formulas of a textbook (reflection principle), in ball arithmetic, at least 60 digits certain
    route B    probabilities: quadrature of the density of the end times the probability that the bridge to it
               touched or missed the level, or of the first-passage density; densities: differences of the
               probabilities of route A, mixed for the joint ones; quantiles and draws: put back into the law that
               they invert, by quadrature; weights and bridge: quotients of densities

Values are printed to 25 digits. kappa = sum over the inputs of |x dV/dx| / |V|, by differences of route A.

How rows are drawn (SEED fixes them; rows of magnitude below 1e-285 or above 1e285, and rows that are 1 to the last
digit printed, are drawn again); s is the deviation of the end, m its mean:

    everyday   drift -0.3 … 0.3, vol 5 … 100 %, horizon a day … 5 years, level 0.05 … 4 s, end m - 3 s … m + 3 s,
               probabilities 0.001 … 0.999; numbers of few digits
    extreme    drift 0 (one in six) or up to 30 s / horizon, vol 1e-6 … 10, horizon 1e-8 … 100, level 1e-8 … 8 s and
               in one case of six 8 … 35 s, end up to 8 s off its mean, or near 0, or 8 … 35 s off, time 1e-3 … 1e3
               horizons, probabilities from 1e-280 up to 1 - 2^-50; all digits used
"""

import argparse
import csv
import math
import multiprocessing
import random
from pathlib import Path

from flint import arb, ctx

import integral
from image import accurate, passage

HERE = Path(__file__).parent
SEED = 20240301
COLUMNS = ["quantity", "drift", "vol", "horizon", "first", "second", "value", "kappa"]
EVERYDAY, EXTREME = 16, 17
# Relative step of differences.
STEP = arb(2) ** -120
# Working precision of quantiles: enough for the complement of the smallest probability, 1000 bits to spare.
INVERSE_BITS = 2000

QUANTITIES = {
    "terminal_pdf": ["terminal"],
    "terminal_cdf": ["terminal"],
    "terminal_quantile": ["probability"],
    "max_pdf": ["level"],
    "max_cdf": ["level"],
    "max_tail": ["level"],
    "max_quantile": ["probability"],
    "min_pdf": ["level"],
    "min_cdf": ["level"],
    "min_tail": ["level"],
    "min_quantile": ["probability"],
    "joint_max_cdf": ["terminal", "level"],
    "joint_max_pdf": ["terminal", "level"],
    "joint_min_cdf": ["terminal", "level"],
    "joint_min_pdf": ["terminal", "level"],
    "survival": ["level"],
    "first_passage_pdf": ["level", "time"],
    "first_passage_cdf": ["level", "time"],
    "first_passage_quantile": ["level", "probability"],
    "discounted_first_passage": ["level", "discount_rate"],
    "bridge_crossing": ["terminal", "level"],
    "sample_terminal": ["uniform"],
    "sample_max": ["terminal", "uniform"],
    "sample_min": ["terminal", "uniform"],
    "drift_weight": ["terminal", "other_drift"],
}


# Route A.


def normal_cdf(x):
    return (-x / arb(2).sqrt()).erfc() / 2


def normal_pdf(x):
    return (-x * x / 2).exp() / (2 * arb.pi()).sqrt()


def terminal_cdf(mean, deviation, terminal):
    return normal_cdf((terminal - mean) / deviation)


def terminal_pdf(mean, deviation, terminal):
    return normal_pdf((terminal - mean) / deviation) / deviation


def joint_cdf(mean, deviation, terminal, level):
    """P(W_T <= terminal, M_T <= level), level > 0."""
    x = terminal if terminal < level else level
    weight = (2 * mean * level / deviation**2).exp()
    return normal_cdf((x - mean) / deviation) - weight * normal_cdf((x - 2 * level - mean) / deviation)


def joint_tail(mean, deviation, terminal, level):
    """P(W_T >= terminal, M_T >= level)."""
    if terminal > level:
        return normal_cdf((mean - terminal) / deviation)
    weight = (2 * mean * level / deviation**2).exp()
    image = normal_cdf(-(level + mean) / deviation) - normal_cdf((terminal - 2 * level - mean) / deviation)
    return normal_cdf((mean - level) / deviation) + weight * image


def max_tail(mean, deviation, level):
    weight = (2 * mean * level / deviation**2).exp()
    return normal_cdf((mean - level) / deviation) + weight * normal_cdf(-(level + mean) / deviation)


def max_pdf(mean, deviation, level):
    weight = (2 * mean * level / deviation**2).exp()
    image = 2 * mean / deviation * weight * normal_cdf(-(level + mean) / deviation)
    return (2 * normal_pdf((level - mean) / deviation) - image) / deviation


def joint_pdf(mean, deviation, terminal, level):
    way = 2 * level - terminal
    exponent = mean * terminal / deviation**2 - mean**2 / (2 * deviation**2) - way**2 / (2 * deviation**2)
    return 2 * way / (deviation**3 * (2 * arb.pi()).sqrt()) * exponent.exp()


def first_passage_cdf(drift, vol, level, time):
    sign = 1 if level > 0 else -1
    return max_tail(sign * drift * time, vol * time.sqrt(), sign * level)


def first_passage_pdf(drift, vol, level, time):
    exponent = -((level - drift * time) ** 2) / (2 * vol**2 * time)
    return abs(level) / (vol * (2 * arb.pi() * time**3).sqrt()) * exponent.exp()


def distribution(quantity, drift, vol, horizon, first, second=None):
    """The function of one number that a quantile inverts, at the number given last, and the probability wanted."""
    mean, deviation = drift * horizon, vol * horizon.sqrt()
    match quantity:
        case "terminal_quantile" | "sample_terminal":
            return lambda x: terminal_cdf(mean, deviation, x), first
        case "max_quantile":
            return lambda x: 1 - max_tail(mean, deviation, x), first
        case "min_quantile":
            return lambda x: max_tail(-mean, deviation, -x), first
        case "first_passage_quantile":
            return lambda x: first_passage_cdf(drift, vol, first, x), second
    return None


def value(quantity, drift, vol, horizon, first, second=None):
    mean, deviation = drift * horizon, vol * horizon.sqrt()
    match quantity:
        case "terminal_pdf":
            return terminal_pdf(mean, deviation, first)
        case "terminal_cdf":
            return terminal_cdf(mean, deviation, first)
        case "max_pdf":
            return max_pdf(mean, deviation, first)
        case "max_cdf":
            return joint_cdf(mean, deviation, first, first)
        case "max_tail":
            return max_tail(mean, deviation, first)
        case "min_pdf":
            return max_pdf(-mean, deviation, -first)
        case "min_cdf":
            return max_tail(-mean, deviation, -first)
        case "min_tail":
            return joint_cdf(-mean, deviation, -first, -first)
        case "joint_max_cdf":
            return joint_cdf(mean, deviation, first, second)
        case "joint_max_pdf":
            return joint_pdf(mean, deviation, first, second)
        case "joint_min_cdf":
            return joint_tail(-mean, deviation, -first, -second)
        case "joint_min_pdf":
            return joint_pdf(-mean, deviation, -first, -second)
        case "survival":
            sign = 1 if first > 0 else -1
            return joint_cdf(sign * mean, deviation, sign * first, sign * first)
        case "first_passage_pdf":
            return first_passage_pdf(drift, vol, first, second)
        case "first_passage_cdf":
            return first_passage_cdf(drift, vol, first, second)
        case "discounted_first_passage":
            sign = 1 if first > 0 else -1
            return passage(sign * first, sign * drift, vol, horizon, second)
        case "bridge_crossing":
            return (-2 * second * (second - first) / deviation**2).exp()
        case "sample_max":
            return (first + (first**2 - 2 * deviation**2 * second.log()).sqrt()) / 2
        case "sample_min":
            return (first - (first**2 - 2 * deviation**2 * second.log()).sqrt()) / 2
        case "drift_weight":
            return ((second - drift) * (first - (second + drift) * horizon / 2) / vol**2).exp()
    raise ValueError(quantity)


def slope(function, at, scale):
    step = scale * STEP
    return (function(at + step) - function(at - step)) / (2 * step)


def inverse(quantity, numbers):
    """The quantile, by halving a bracket."""
    ctx.prec = INVERSE_BITS
    drift, vol, horizon = numbers[:3]
    mean, deviation = drift * horizon, vol * horizon.sqrt()
    function, wanted = distribution(quantity, *numbers)
    reach = 60 * deviation
    sign = -1 if quantity == "min_quantile" else 1
    if quantity in ("terminal_quantile", "sample_terminal"):
        low, high, at = mean - reach, mean + reach, lambda u: u
    elif quantity == "first_passage_quantile":
        low, high, at = arb(-2000), arb(2000), arb.exp
    else:
        low, high, at = deviation.log() - 750, (reach + abs(mean)).log(), lambda u: sign * u.exp()
    low, high = low.mid(), high.mid()
    for _ in range(450):
        middle = ((low + high) / 2).mid()
        excess = sign * (function(at(middle)) - wanted)
        if excess > 0:
            high = middle
        elif excess < 0:
            low = middle
        else:
            break
    return at(middle).mid()


def conditioning(quantity, numbers, found):
    """sum |x dV/dx| / |V| by differences; a quantile's by those of the function that it inverts."""

    def moved(of, index):
        x = numbers[index]
        return x * slope(lambda y: of(*numbers[:index], y, *numbers[index + 1 :]), x, x) if x != 0 else arb(0)

    def total():
        indices = range(3 + len(QUANTITIES[quantity]))
        if distribution(quantity, *numbers) is None:
            return 1 + sum(abs(moved(lambda *xs: value(quantity, *xs), index)) for index in indices) / abs(found)

        def excess(*xs):
            function, wanted = distribution(quantity, *xs)
            return function(found) - wanted

        steepness = slope(distribution(quantity, *numbers)[0], found, found)
        return 1 + sum(abs(moved(excess, index)) for index in indices) / abs(found * steepness)

    return accurate(total, 12)[0] - 1


# Route B.


def strip(low, high, centre=arb(0), log_weight=arb(0), factor=None):
    """Integral over (low, high), None where it has no end, of exp(log_weight) phi(z - centre) factor(z)."""
    if low is not None and high is not None and not low < high:
        return arb(0)
    peak = centre
    if low is not None and low > peak:
        peak = low
    if high is not None and high < peak:
        peak = high
    # Products and not powers, which have no value where a ball contains 0.
    fall = (peak - centre) * (peak - centre)
    reach = (fall + 2 * integral.NEGLIGIBLE).sqrt()
    low = centre - reach if low is None or low < centre - reach else low
    high = centre + reach if high is None or high > centre + reach else high

    def integrand(z):
        bell = ((fall - (z - centre) * (z - centre)) / 2).exp()
        return bell if factor is None else bell * factor(z)

    return integral.quadrature(integrand, low, high) * (log_weight - fall / 2).exp() / (2 * arb.pi()).sqrt()


def untouched_below(mean, deviation, terminal, level):
    """P(W_T <= terminal, M_T <= level)"""
    bend, barrier = 2 * level / deviation, (level - mean) / deviation
    at = (terminal - mean) / deviation
    return strip(None, at if at < barrier else barrier, factor=lambda z: -(bend * (z - barrier)).expm1())


def touched_above(mean, deviation, terminal, level):
    """P(W_T >= terminal, M_T >= level); no terminal is no condition on the end."""
    bend, barrier = 2 * level / deviation, (level - mean) / deviation
    at = None if terminal is None else (terminal - mean) / deviation
    way = strip(at, barrier, centre=bend, log_weight=bend**2 / 2 - bend * barrier)
    return way + strip(at if at is not None and at > barrier else barrier, None)


def inverted(below, above, wanted, complement):
    """How far a probability by quadrature is from the one that the quantile was asked for, on its smaller side."""
    return below() - wanted if wanted < complement else complement - above()


def second_route(quantity, numbers, found):
    drift, vol, horizon, first, *rest = numbers
    second = rest[0] if rest else None
    mean, deviation = drift * horizon, vol * horizon.sqrt()
    match quantity:
        case "terminal_cdf":
            return strip(None, (first - mean) / deviation)
        case "max_cdf" | "min_tail" | "survival":
            sign = 1 if first > 0 else -1
            return untouched_below(sign * mean, deviation, sign * first, sign * first)
        case "max_tail" | "min_cdf":
            sign = 1 if first > 0 else -1
            return touched_above(sign * mean, deviation, None, sign * first)
        case "joint_max_cdf":
            return untouched_below(mean, deviation, first, second)
        case "joint_min_cdf":
            return touched_above(-mean, deviation, -first, -second)
        case "first_passage_cdf" | "discounted_first_passage":
            sign = 1 if first > 0 else -1
            time, rate = (second, arb(0)) if quantity == "first_passage_cdf" else (horizon, second)
            return integral.passage(sign * first, sign * drift, vol, time, rate)
    if distribution(quantity, *numbers) is not None:
        return found + inverse_gap(quantity, numbers, found)
    return accurate(lambda: differences(quantity, numbers, found), 40)[0]


def inverse_gap(quantity, numbers, found):
    """How far the quantile is off, by the law that it inverts as quadrature has it."""
    drift, vol, horizon, *arguments = numbers
    mean, deviation = drift * horizon, vol * horizon.sqrt()
    wanted = arguments[-1]
    at = (found - mean) / deviation
    match quantity:
        case "terminal_quantile" | "sample_terminal":
            gap = inverted(lambda: strip(None, at), lambda: strip(at, None), wanted, 1 - wanted)
        case "max_quantile":
            gap = inverted(
                lambda: untouched_below(mean, deviation, found, found),
                lambda: touched_above(mean, deviation, None, found), wanted, 1 - wanted,
            )
        case "min_quantile":
            gap = inverted(
                lambda: touched_above(-mean, deviation, None, -found),
                lambda: untouched_below(-mean, deviation, -found, -found), wanted, 1 - wanted,
            )
        case "first_passage_quantile":
            sign = 1 if arguments[0] > 0 else -1
            distance, toward, spread = sign * arguments[0], sign * drift * found, vol * found.sqrt()
            gap = inverted(
                lambda: integral.passage(distance, sign * drift, vol, found, arb(0)),
                lambda: untouched_below(toward, spread, distance, distance), wanted, 1 - wanted,
            )
    return gap / accurate(lambda: slope(distribution(quantity, *numbers)[0], found, found), 20)[0]


def differences(quantity, numbers, found):
    drift, vol, horizon, first, *rest = numbers
    second = rest[0] if rest else None
    mean, deviation = drift * horizon, vol * horizon.sqrt()

    def crossed(terminal, level):
        """P(level touched | W_T = terminal), the level on either side."""
        sign = 1 if level > 0 else -1
        touched = slope(lambda x: joint_tail(sign * mean, deviation, x, sign * level), sign * terminal, deviation)
        return -touched / terminal_pdf(mean, deviation, terminal)

    match quantity:
        case "terminal_pdf":
            return slope(lambda x: terminal_cdf(mean, deviation, x), first, deviation)
        case "max_pdf" | "min_pdf":
            sign = 1 if first > 0 else -1
            return -slope(lambda a: max_tail(sign * mean, deviation, a), sign * first, sign * first)
        case "joint_max_pdf" | "joint_min_pdf":
            sign = 1 if second > 0 else -1

            def in_terminal(a):
                return slope(lambda x: joint_cdf(sign * mean, deviation, x, a), sign * first, deviation)

            return slope(in_terminal, sign * second, sign * second)
        case "first_passage_pdf":
            return slope(lambda time: first_passage_cdf(drift, vol, first, time), second, second)
        case "bridge_crossing":
            return crossed(first, second)
        case "sample_max" | "sample_min":
            steepness = (2 * first - 4 * found) / deviation**2
            return found + (second - crossed(first, found)) / (second * steepness)
        case "drift_weight":
            return terminal_pdf(second * horizon, deviation, first) / terminal_pdf(mean, deviation, first)
    raise ValueError(quantity)


# Drawing rows.


def between_in_log(rng, low, high):
    return math.exp(rng.uniform(math.log(low), math.log(high)))


def signed(rng):
    return rng.choice((-1.0, 1.0))


def everyday(rng, names):
    drift, vol = rng.uniform(-0.3, 0.3), rng.uniform(0.05, 1.0)
    horizon = rng.randint(1, 1825) / 365
    mean, deviation = drift * horizon, vol * math.sqrt(horizon)
    drawn = {
        "level": lambda: signed(rng) * deviation * between_in_log(rng, 0.05, 4),
        "terminal": lambda: mean + deviation * rng.uniform(-3, 3),
        "time": lambda: horizon * between_in_log(rng, 0.1, 10),
        "probability": lambda: rng.uniform(0.001, 0.999),
        "uniform": lambda: rng.uniform(0.001, 0.999),
        "discount_rate": lambda: rng.uniform(-0.05, 0.15),
        "other_drift": lambda: rng.uniform(-0.3, 0.3),
    }
    return [float(f"{x:.4g}") for x in (drift, vol, horizon, *[drawn[name]() for name in names])]


def extreme(rng, names):
    vol, horizon = between_in_log(rng, 1e-6, 10), between_in_log(rng, 1e-8, 100)
    deviation = vol * math.sqrt(horizon)

    def any_drift():
        return 0.0 if rng.randrange(6) == 0 else signed(rng) * between_in_log(rng, 1e-3, 30) * deviation / horizon

    drift = any_drift()
    mean = drift * horizon

    def level():
        far = rng.randrange(6) == 0
        return signed(rng) * deviation * (rng.uniform(8, 35) if far else between_in_log(rng, 1e-8, 8))

    def terminal():
        match rng.randrange(6):
            case 0:
                return deviation * signed(rng) * between_in_log(rng, 1e-8, 1)
            case 1:
                return mean + deviation * signed(rng) * rng.uniform(8, 35)
            case _:
                return mean + deviation * rng.uniform(-8, 8)

    def probability():
        match rng.randrange(3):
            case 0:
                return between_in_log(rng, 1e-280, 1e-3)
            case 1:
                return 1 - between_in_log(rng, 2**-50, 0.5)
            case _:
                return rng.random()

    def discount_rate():
        double_root = -((drift / vol) ** 2) / 2
        match rng.randrange(3):
            case 0:
                return double_root * (1 + signed(rng) * between_in_log(rng, 1e-12, 1))
            case 1:
                return -between_in_log(rng, 1e-3, 500) / horizon
            case _:
                return between_in_log(rng, 1e-3, 500) / horizon

    drawn = {
        "level": level,
        "terminal": terminal,
        "time": lambda: horizon * between_in_log(rng, 1e-3, 1e3),
        "probability": probability,
        "uniform": probability,
        "discount_rate": discount_rate,
        "other_drift": any_drift,
    }
    return [drift, vol, horizon, *[drawn[name]() for name in names]]


def meaningful(quantity, inputs):
    """Whether the answer is one that a formula gives, no constant; a first test, before anything is computed."""
    arguments = dict(zip(QUANTITIES[quantity], inputs[3:], strict=True))
    level = arguments.get("level", 0.0)
    terminal = arguments.get("terminal", 0.0)
    if quantity.startswith(("max_", "joint_max_")) and level < 0:
        return False
    if quantity.startswith(("min_", "joint_min_")) and level > 0:
        return False
    if quantity in ("joint_max_pdf", "joint_min_pdf", "bridge_crossing") and not abs(terminal - level) > 0:
        return False
    sign = math.copysign(1.0, level)
    if quantity in ("joint_max_pdf", "joint_min_pdf", "bridge_crossing") and sign * terminal >= sign * level:
        return False
    if quantity == "first_passage_quantile":
        drift, vol = inputs[:2]
        ctx.prec = 200
        ever = (2 * arb(drift) * arb(level) / arb(vol) ** 2).exp()
        return arguments["probability"] < ever or drift * level >= 0
    return True


def answer(quantity, inputs):
    numbers = [arb(x) for x in inputs]
    if distribution(quantity, *numbers) is not None:
        return inverse(quantity, numbers)
    return accurate(lambda: value(quantity, *numbers), 60)[0].mid()


def row(task):
    quantity, draw, index = task
    rng = random.Random(f"{SEED} {quantity} {draw.__name__} {index}")
    while True:
        inputs = draw(rng, QUANTITIES[quantity])
        if meaningful(quantity, inputs):
            found = answer(quantity, inputs)
            if arb(10) ** -285 < abs(found) < arb(10) ** 285 and abs(found - 1) > arb(10) ** -25:
                return cells(quantity, inputs)


def cells(quantity, inputs):
    numbers = [arb(x) for x in inputs]
    found = answer(quantity, inputs)
    kappa = conditioning(quantity, numbers, found)
    ctx.prec = integral.PRECISION
    other = second_route(quantity, numbers, found)
    ctx.prec = 400
    about = (quantity, inputs, found.str(30), other.str(30))
    assert abs(found - other) <= arb(10) ** -25 * abs(found), about
    texts = [repr(x) for x in inputs] + [""] * (5 - len(inputs))
    return [quantity, *texts, found.mid().str(25, radius=False), kappa.mid().str(6, radius=False)]


def write():
    counts = ((everyday, EVERYDAY), (extreme, EXTREME))
    tasks = [(quantity, draw, i) for quantity in QUANTITIES for draw, count in counts for i in range(count)]
    with multiprocessing.Pool() as pool, (HERE / "law.csv").open("w", newline="") as file:
        out = csv.writer(file, lineterminator="\n")
        out.writerow(COLUMNS)
        out.writerows(pool.imap(row, tasks, chunksize=4))


def check(count):
    with (HERE / "law.csv").open(newline="") as file:
        header, *records = csv.reader(file)
    assert header == COLUMNS
    for record in random.Random(count).sample(records, min(count, len(records))):
        again = cells(record[0], [float(x) for x in record[1:6] if x])
        assert again == record, (record, again)


def main():
    parser = argparse.ArgumentParser()
    parser.add_argument("--check", type=int, metavar="N")
    arguments = parser.parse_args()
    if arguments.check is None:
        write()
    else:
        check(arguments.check)


if __name__ == "__main__":
    main()
