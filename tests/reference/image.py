"""Route A: the reflection formula with plain normal distribution functions, in ball arithmetic.

On paper (Merton 1973; Reiner and Rubinstein 1991; from memory), for X = sign ln(final spot / spot), normal with mean m
and deviation s, running maximum M and distance h = sign ln(barrier / spot) > 0:

    P(X <= x, M < h) = N((x - m) / s) - exp(2 m h / s^2) N((x - 2 h - m) / s)    for x <= h
    E[exp(-r tau); tau <= T] = sum over w = +-sqrt(nu^2 + 2 r v^2) of exp((nu - w) h / v^2) N((w T - h) / s)

and touched = always - untouched. The subtractions cancel; the working precision is raised until enough digits remain.
"""

from flint import acb, arb, ctx

from contracts import legs, line


class Cancelled(Exception):
    """No digits are left at any precision tried."""


def cdf(x):
    return (-x / arb(2).sqrt()).erfc() / 2


def law(x):
    """Mean and deviation of ln(final spot / spot) in the cash measure."""
    deviation = x["vol"] * x["expiry"].sqrt()
    mean = (x["rate"] - x["dividend"]) * x["expiry"] - deviation**2 / 2
    return mean, deviation


def probability(contract, x, side, event, mean, deviation, strike_first):
    """That the final spot is on a side of the strike, under an event; strike_first: met before the barrier."""
    sign = contract.sign or 1
    mean = sign * mean
    if contract.sign == -1:
        side = {"above": "below", "below": "above", "all": "all"}[side]
    strike = sign * (x["strike"] / x["spot"]).log() if side != "all" else None

    def always():
        below = arb(1) if side == "all" else cdf((strike - mean) / deviation)
        return 1 - below if side == "above" else below

    def untouched():
        height = sign * (x["barrier"] / x["spot"]).log()
        weight = (2 * mean * height / deviation**2).exp()

        def joint(level):
            return cdf((level - mean) / deviation) - weight * cdf((level - 2 * height - mean) / deviation)

        if side == "all" or (side == "below" and not strike_first):
            return joint(height)
        if side == "below":
            return joint(strike)
        return joint(height) - joint(strike) if strike_first else arb(0)

    if event == "always":
        return always()
    return untouched() if event == "untouched" else always() - untouched()


def passage(distance, drift, vol, horizon, rate):
    """E[exp(-rate tau); tau <= horizon] for a level at a positive distance, drift counted towards it."""
    square = drift * drift + 2 * rate * vol**2
    real = square > 0
    root = square.sqrt() if real else acb(square).sqrt()
    deviation = vol * horizon.sqrt()

    def term(root):
        score = (root * horizon - distance) / deviation
        return ((drift - root) * distance / vol**2).exp() * (-score / arb(2).sqrt()).erfc() / 2

    total = term(root) + term(-root)
    return total if real else total.real


def value(contract, paid, x, touched, strike_first):
    """Value at the current precision; x holds balls by field name."""
    total = arb(0)
    for is_rebate, what, event in legs(contract, paid, touched):
        if is_rebate and x["rebate"] == 0:
            continue
        amount = x["rebate"] if is_rebate else arb(1)
        if what == "now":
            total += amount
        elif what == "hit":
            sign = contract.sign
            height = sign * (x["barrier"] / x["spot"]).log()
            drift = sign * (x["rate"] - x["dividend"] - x["vol"] ** 2 / 2)
            total += amount * passage(height, drift, x["vol"], x["expiry"], x["rate"])
        else:
            cash, shares, side = line(what, x["strike"])
            mean, deviation = law(x)
            if type(cash) is not int or cash:
                discounted = amount * cash * (-x["rate"] * x["expiry"]).exp()
                total += discounted * probability(contract, x, side, event, mean, deviation, strike_first)
            if shares:
                discounted = amount * shares * x["spot"] * (-x["dividend"] * x["expiry"]).exp()
                total += discounted * probability(
                    contract, x, side, event, mean + deviation**2, deviation, strike_first
                )
    return total


def accurate(compute, digits, ceiling=40_000):
    """The ball that compute() returns once it has this many digits, and the precision that took; 0 if it is 0."""
    precision = int(digits * 3.33) + 60
    while precision <= ceiling:
        ctx.prec = precision
        ball = compute()
        if ball.is_finite() and (ball == 0 or ball.rel_accuracy_bits() >= digits * 3.33):
            return ball, precision
        if ball.is_finite() and abs(ball) < arb(10) ** -400:
            return arb(0), precision
        precision *= 2
    raise Cancelled
