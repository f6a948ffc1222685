"""Sensitivities and their conditioning: central differences of route A in hundreds of digits.

With a relative step of 1e-40 the differences are right to some 70 digits; the working precision covers what they lose.
"""

from flint import arb, ctx

import image

GREEKS = {
    "delta": (1, ["spot"]),
    "gamma": (1, ["spot", "spot"]),
    "vega": (1, ["vol"]),
    "theta": (-1, ["expiry"]),
    "rho": (1, ["rate"]),
    "dividend_rho": (1, ["dividend"]),
    "vanna": (1, ["spot", "vol"]),
    "volga": (1, ["vol", "vol"]),
    "charm": (-1, ["spot", "expiry"]),
    "barrier_delta": (1, ["barrier"]),
    "strike_delta": (1, ["strike"]),
}


class Differences:
    """V as a function on the grid of inputs x + i h, each point evaluated once."""

    def __init__(self, row, step_digits, digits):
        self.row = row
        self.step_digits = step_digits
        self.digits = digits
        _, self.precision = image.accurate(lambda: row.image(row.balls()), digits)
        ctx.prec = self.precision
        self.x = row.balls()
        small = arb(10) ** -step_digits
        self.steps = {f: (abs(ball) if ball != 0 else arb(1)) * small for f, ball in self.x.items()}
        self.cache = {}

    def at(self, offset):
        """V at a grid point, given as ((field, steps), …)."""
        key = tuple(sorted((f, n) for f, n in offset.items() if n))
        if key not in self.cache:
            ctx.prec = self.precision
            x = dict(self.x)
            for field, count in key:
                x[field] = x[field] + count * self.steps[field]
            self.cache[key] = self.row.image(x).mid()
        return self.cache[key]

    def moved(self, offset, field, count):
        return {**offset, field: offset.get(field, 0) + count}

    def along(self, fields, offset):
        """The derivative in one or two fields at a grid point."""
        if any(field not in self.x for field in fields):
            return arb(0)
        first = fields[0]
        step = self.steps[first]
        if fields == [first, first]:
            up, down = self.at(self.moved(offset, first, 1)), self.at(self.moved(offset, first, -1))
            return (up - 2 * self.at(offset) + down) / (step * step)
        up, down = self.moved(offset, first, 1), self.moved(offset, first, -1)
        if len(fields) == 1:
            return (self.at(up) - self.at(down)) / (2 * step)
        return (self.along(fields[1:], up) - self.along(fields[1:], down)) / (2 * step)

    def derivative(self, fields, offset=None):
        """As along, with what is below the noise of the differences set to 0."""
        result = self.along(fields, offset or {})
        size = abs(result)
        for field in fields:
            size *= self.steps.get(field, arb(1)) * arb(10) ** self.step_digits
        noise = abs(self.at({})) * arb(10) ** (len(fields) * self.step_digits + 20 - self.digits)
        return arb(0) if size <= noise else result

    def scale(self, fields):
        """Sum over the inputs of |x d/dx| of a derivative; of V itself for no fields."""
        total = arb(0)
        for field, ball in self.x.items():
            if ball != 0:
                ends = [self.along(fields, {field: n}) if fields else self.at({field: n}) for n in (1, -1)]
                total += abs(ball * (ends[0] - ends[1]) / (2 * self.steps[field]))
        return total


def conditioning(row):
    """kappa = sum over the inputs of |x dV/dx| / |V|."""
    differences = Differences(row, 40, 100)
    return differences.scale([]) / abs(differences.at({}))


def greeks(row):
    """By name, the derivative and its own scale; asserts two step sizes and the Black-Scholes equation."""
    fine, coarse = Differences(row, 50, 460), Differences(row, 40, 430)
    answers = {}
    for name, (sign, fields) in GREEKS.items():
        result = coarse.derivative(fields)
        other = fine.derivative(fields)
        # The two have different noise below which they are 0, both far below binary64.
        allowed = arb(10) ** -30 * abs(other) + arb(10) ** -320
        assert abs(result - other) <= allowed, (row, name, result.str(40), other.str(40))
        answers[name] = sign * result, coarse.scale(fields)
    if row.touched:
        return answers  # cash paid now does not accrue, so the equation does not hold
    x, value = coarse.x, coarse.at({})
    parts = [
        answers["theta"][0],
        (x["rate"] - x["dividend"]) * x["spot"] * answers["delta"][0],
        x["vol"] ** 2 * x["spot"] ** 2 * answers["gamma"][0] / 2,
        -x["rate"] * value,
    ]
    assert abs(sum(parts)) <= arb(10) ** -30 * (sum(abs(part) for part in parts) + abs(value)), (row, "equation")
    return answers
