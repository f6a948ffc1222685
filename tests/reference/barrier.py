"""Reference tables of barrier options, touches and digitals, for the exact binary64 inputs in the rows.

    barrier.py                  writes every table beside this file; the same files each time
    barrier.py --check N        recomputes N rows of each table by both routes, compares with the files
    barrier.py --certify FILE   reads rows (the first ten columns), prints them with value and conditioning

Every value is computed by image.py (reflection formula, ball arithmetic, at least 60 digits certain) and by
integral.py (quadrature of payoff times killed or touched density), which must agree to 25 digits; the agreement
is asserted for each row. Sensitivities: derivatives.py. Values are printed to 25 digits.

kappa = sum over the inputs of |x dV/dx| / |V|; a Greek's scale is the sum over the inputs of |x dG/dx|.

How rows are drawn (SEED fixes them; rows worth less than 1e-290, and strikes equal to the barrier, are drawn again):

    everyday   spot 50 … 200, vol 5 … 100 %, 1 … 1825 days of 365, barrier 0.1 … 50 % away, strike 0.6 … 1.5 spot,
               rate -1 … 10 %, dividend 0 … 8 %, rebate 0 (one in three) … 10; numbers of few digits
    broad      spot 1 … 10,000, vol 1 … 200 %, an hour … 30 years, rate and dividend -20 … 20 %, barrier
               0.1 … 350 % away in log terms, strike around the spot by the deviation; all digits used
    extreme    a broad row with one or two of its numbers replaced, see EXTREMES
    greeks     everyday and broad rows alternating; greeks_extreme: extreme rows, after those
               of hard_rows.csv, on which Greeks of ours once failed
    one_touch  one-touches paid at hit with rate -3 %, vol 5 %, drift where the first-passage root is imaginary, or near
               the double root down to neighbouring doubles
    passage    E[exp(-discount_rate tau); tau <= horizon] of Brownian motion, likewise, and ordinary cases
"""

import argparse
import csv
import math
import multiprocessing
import random
import sys
from pathlib import Path
from typing import NamedTuple

from flint import arb, ctx

import derivatives
import image
import integral
from contracts import BY_NAME, CONTRACTS, FIELDS, Contract, touched_now

HERE = Path(__file__).parent
SEED = 20240229
INPUTS = ["contract", "rebate_paid", *FIELDS]
PRICE_COLUMNS = [*INPUTS, "value", "kappa"]
GREEK_COLUMNS = [*INPUTS, "value", *[c for g in derivatives.GREEKS for c in (g, f"{g}_scale")]]
PASSAGE_INPUTS = ["level", "drift", "vol", "horizon", "discount_rate"]
PASSAGE_COLUMNS = [*PASSAGE_INPUTS, "value"]
YEAR_SECONDS = 365 * 86400


class Row(NamedTuple):
    """One contract with its numbers; None where the contract has no use for one."""

    contract: Contract
    paid: str
    numbers: dict

    def balls(self):
        return {field: arb(number) for field, number in self.numbers.items() if number is not None}

    @property
    def touched(self):
        return touched_now(self.contract, self.numbers["spot"], self.numbers["barrier"] or 0)

    @property
    def strike_first(self):
        """Whether the strike lies on the spot's side of the barrier."""
        strike, barrier = self.numbers["strike"], self.numbers["barrier"]
        return None not in (strike, barrier) and self.contract.sign * (strike - barrier) < 0

    def image(self, x):
        defaults = dict.fromkeys(("strike", "barrier", "rebate"), arb(0))
        return image.value(self.contract, self.paid, {**defaults, **x}, self.touched, self.strike_first)

    def integral(self, x):
        defaults = dict.fromkeys(("strike", "barrier", "rebate"), arb(0))
        return integral.value(self.contract, self.paid, {**defaults, **x}, self.touched)

    def value(self):
        return image.accurate(lambda: self.image(self.balls()), 60)[0]

    def cells(self):
        numbers = ["" if self.numbers[f] is None else repr(self.numbers[f]) for f in FIELDS]
        return [self.contract.name, self.paid, *numbers]

    @staticmethod
    def of(record):
        numbers = {f: float(record[f]) if record[f] else None for f in FIELDS}
        contract = BY_NAME[record["contract"]]
        numbers["rebate"] = numbers["rebate"] or 0.0
        if not contract.has_strike:
            numbers["strike"] = None
        if contract.kind == "vanilla":
            numbers.update(barrier=None, rebate=0.0)
        natural = "hit" if contract.pays_at_hit else "expiry"
        return Row(contract, record["rebate_paid"] or natural, numbers)


def digits(ball, count=25):
    return ball.mid().str(count, radius=False)


def agree(one, other, about):
    ctx.prec = 400
    assert abs(one - other) <= arb(10) ** -25 * abs(one), (about, one.str(30), other.str(30))


def price_cells(row):
    value = row.value()
    agree(value, row.integral(row.balls()), row.cells())
    text = digits(value)
    return [*row.cells(), text, digits(derivatives.conditioning(row), 6)]


def greek_cells(row):
    value = row.value()
    agree(value, row.integral(row.balls()), row.cells())
    cells = [*row.cells(), digits(value)]
    for greek, scale in derivatives.greeks(row).values():
        cells += [digits(greek), digits(scale, 6)]
    return cells


def passage_cells(numbers):
    level, *rest = numbers

    def balls():
        drift, vol, horizon, rate = map(arb, rest)
        return abs(arb(level)), (drift if level > 0 else -drift), vol, horizon, rate

    value = image.accurate(lambda: image.passage(*balls()), 60)[0]
    ctx.prec = integral.PRECISION
    agree(value, integral.passage(*balls()), numbers)
    return [*map(repr, numbers), digits(value)]


# Drawing rows.


def log_uniform(rng, low, high):
    return math.exp(rng.uniform(math.log(low), math.log(high)))


def everyday(rng, contract):
    spot = round(rng.uniform(50, 200), 2)
    away = log_uniform(rng, 0.001, 0.5)
    return {
        "spot": spot,
        "strike": round(spot * rng.uniform(0.6, 1.5), 1),
        "barrier": round(spot * (1 + contract.sign * away), 3),
        "rebate": rng.choice([0.0, round(rng.uniform(0.1, 10), 2), round(rng.uniform(0.1, 10), 2)]),
        "expiry": rng.randint(1, 1825) / 365,
        "vol": round(log_uniform(rng, 0.05, 1), 4),
        "rate": round(rng.uniform(-0.01, 0.1), 4),
        "dividend": round(rng.uniform(0, 0.08), 4),
    }


def broad(rng, contract):
    spot = log_uniform(rng, 1, 1e4)
    expiry = log_uniform(rng, 1 / 8760, 30)
    vol = log_uniform(rng, 0.01, 2)
    deviation = vol * math.sqrt(expiry)
    return {
        "spot": spot,
        "strike": spot * math.exp(max(0.05, min(deviation, 1.5)) * rng.gauss(0, 1)),
        "barrier": spot * math.exp(contract.sign * log_uniform(rng, 0.001, 1.5)),
        "rebate": spot * rng.choice([0.0, 0.01, 0.1]) * rng.uniform(0.5, 2),
        "expiry": expiry,
        "vol": vol,
        "rate": rng.uniform(-0.2, 0.2),
        "dividend": rng.uniform(-0.2, 0.2),
    }


def near_barrier(rng, contract, row):
    row["barrier"] = row["spot"] * (1 + contract.sign * log_uniform(rng, 1e-15, 1e-4))


def barrier_next_to_strike(rng, contract, row):
    row["strike"] = row["barrier"] * (1 + rng.choice([-1, 1]) * log_uniform(rng, 1e-15, 1e-4))


def by_deviation(rng, contract, row, low, high):
    """Barrier and strike counted in deviations of the final spot."""
    deviation = min(row["vol"] * math.sqrt(row["expiry"]), 5.0)
    row["barrier"] = row["spot"] * math.exp(contract.sign * deviation * rng.uniform(low, high))
    row["strike"] = row["spot"] * math.exp(deviation * rng.choice([-1, 1]) * rng.uniform(low, high))


def quiet(rng, contract, row):
    row["vol"] = log_uniform(rng, 1e-6, 1e-2)
    by_deviation(rng, contract, row, 0.01, 5)


def loud(rng, contract, row):
    row["vol"] = log_uniform(rng, 2, 10)


def short(rng, contract, row):
    row["expiry"] = log_uniform(rng, 1, 3600) / YEAR_SECONDS
    by_deviation(rng, contract, row, 0.01, 5)


def long(rng, contract, row):
    row["expiry"] = rng.uniform(30, 100)


def wild_rates(rng, contract, row):
    row["rate"], row["dividend"] = rng.uniform(-1, 1), rng.uniform(-1, 1)


def other_scale(rng, contract, row):
    factor = log_uniform(rng, 1e-12, 1e12) / row["spot"]
    for field in ("spot", "strike", "barrier", "rebate"):
        row[field] *= factor


def deep_tail(rng, contract, row):
    by_deviation(rng, contract, row, 4, 30)


def at_the_barrier(rng, contract, row):
    row["barrier"] = row["spot"]


def beyond_the_barrier(rng, contract, row):
    row["barrier"] = row["spot"] / math.exp(contract.sign * log_uniform(rng, 1e-10, 1))


EXTREMES = [
    near_barrier, barrier_next_to_strike, quiet, loud, short, long, wild_rates, other_scale, deep_tail,
    at_the_barrier, beyond_the_barrier,
]


def extreme(rng, contract):
    row = broad(rng, contract)
    for change in rng.sample(EXTREMES, rng.choice([1, 2])):
        change(rng, contract, row)
    return row


def draw(rng, contract, sampler):
    """A row worth more than 1e-290."""
    paid = rng.choice(["hit", "expiry"]) if contract.pays_at_hit else "expiry"
    while True:
        numbers = sampler(rng, contract)
        if numbers["strike"] == numbers["barrier"]:
            continue
        if contract.kind.endswith("touch") and numbers["rebate"] == 0:
            numbers["rebate"] = 1.0
        row = Row.of({"contract": contract.name, "rebate_paid": paid} | {f: repr(numbers[f]) for f in FIELDS})
        if row.touched and sampler is not extreme:
            continue
        value = row.value()
        if arb(10) ** -290 < value < arb(10) ** 290:
            return row


def drawn(name, sampler, count):
    rng = random.Random(f"{SEED} {name}")
    offset = 0 if count >= len(CONTRACTS) else rng.randrange(len(CONTRACTS))
    return [draw(rng, CONTRACTS[(i + offset) % len(CONTRACTS)], sampler) for i in range(count)]


def imaginary_or_double_root(rng, vol, rate):
    """A drift whose square is below -2 rate vol^2, or about equal to it."""
    edge = math.sqrt(-2 * rate) * vol
    kind = rng.randrange(3)
    if kind == 0:
        return edge * rng.uniform(-1, 1)
    if kind == 1:
        return rng.choice([-1, 1]) * edge * (1 + rng.choice([-1, 1]) * log_uniform(rng, 1e-16, 1e-2))
    ends = rng.choice([-math.inf, math.inf])
    return rng.choice([-1, 1]) * rng.choice([edge, math.nextafter(edge, ends)])


def one_touches(count):
    rng = random.Random(f"{SEED} one-touch")
    rows = []
    while len(rows) < count:
        contract = BY_NAME[rng.choice(["up one-touch", "down one-touch"])]
        expiry = log_uniform(rng, 0.02, 10)
        drift = imaginary_or_double_root(rng, 0.05, -0.03)
        away = 0.05 * math.sqrt(expiry) * log_uniform(rng, 0.01, 5)
        rows.append(Row(contract, "hit", {
            "spot": 100.0, "strike": None, "barrier": 100 * math.exp(contract.sign * away), "rebate": 1.0,
            "expiry": expiry, "vol": 0.05, "rate": -0.03, "dividend": -0.03 - 0.05**2 / 2 - drift,
        }))
    return rows


def passages(count):
    rng = random.Random(f"{SEED} passage")
    rows = []
    while len(rows) < count:
        horizon = log_uniform(rng, 0.02, 10)
        if len(rows) % 3:
            vol, rate = 0.05, -0.03
            if len(rows) % 3 == 2:
                vol, rate = log_uniform(rng, 0.02, 1), -log_uniform(rng, 1e-3, 0.2)
            drift = imaginary_or_double_root(rng, vol, rate)
        else:
            vol, rate = log_uniform(rng, 0.02, 1), rng.uniform(-0.1, 0.2)
            drift = vol * rng.uniform(-1, 1)
        level = rng.choice([-1, 1]) * vol * math.sqrt(horizon) * log_uniform(rng, 0.01, 5)
        rows.append((level, drift, vol, horizon, rate))
    return rows


def mixed(count):
    everydays, broads = drawn("greeks everyday", everyday, count // 2), drawn("greeks broad", broad, count // 2)
    return [row for pair in zip(everydays, broads, strict=True) for row in pair]


def hard():
    with (HERE / "hard_rows.csv").open(newline="") as file:
        return [Row.of(record) for record in csv.DictReader(file)]


TABLES = {
    "price_everyday": (PRICE_COLUMNS, price_cells, lambda: drawn("everyday", everyday, 616)),
    "price_broad": (PRICE_COLUMNS, price_cells, lambda: drawn("broad", broad, 792)),
    "price_extreme": (PRICE_COLUMNS, price_cells, lambda: drawn("extreme", extreme, 308)),
    "greeks": (GREEK_COLUMNS, greek_cells, lambda: mixed(308)),
    "greeks_extreme": (GREEK_COLUMNS, greek_cells, lambda: [*hard(), *drawn("greeks extreme", extreme, 132)]),
    "one_touch": (PRICE_COLUMNS, price_cells, lambda: one_touches(60)),
    "passage": (PASSAGE_COLUMNS, passage_cells, lambda: passages(150)),
}


def write(pool):
    for name, (columns, cells, rows) in TABLES.items():
        with (HERE / f"{name}.csv").open("w", newline="") as file:
            out = csv.writer(file, lineterminator="\n")
            out.writerow(columns)
            out.writerows(pool.imap(cells, rows(), chunksize=4))
        print(name, "written", flush=True)


def check(count):
    rng = random.Random(count)
    for name, (columns, cells, _) in TABLES.items():
        with (HERE / f"{name}.csv").open(newline="") as file:
            header, *records = csv.reader(file)
        assert header == columns, name
        for record in rng.sample(records, min(count, len(records))):
            if cells is passage_cells:
                again = cells(tuple(map(float, record[: len(PASSAGE_INPUTS)])))
            else:
                again = cells(Row.of(dict(zip(columns, record, strict=True))))
            assert again == record, (name, record, again)
        print(name, "agrees")


def certify(path, pool):
    with open(path, newline="") as file:
        rows = [Row.of(record) for record in csv.DictReader(file)]
    out = csv.writer(sys.stdout, lineterminator="\n")
    out.writerow(PRICE_COLUMNS)
    out.writerows(pool.imap(price_cells, rows, chunksize=4))


def main():
    parser = argparse.ArgumentParser()
    parser.add_argument("--check", type=int, metavar="N")
    parser.add_argument("--certify", metavar="FILE")
    arguments = parser.parse_args()
    if arguments.check is not None:
        check(arguments.check)
        return
    with multiprocessing.Pool() as pool:
        if arguments.certify:
            certify(arguments.certify, pool)
        else:
            write(pool)


if __name__ == "__main__":
    main()
