"""Route B: payoff times density of the final spot, killed at the barrier or touched, by adaptive quadrature.

No normal distribution function occurs. With X = m + s z and distance h to the barrier the density of z is

    untouched   phi(z) (1 - exp(-2 h (h - X) / s^2))    for X < h
    touched     phi(z) exp(-2 h (h - X) / s^2)          for X < h, phi(z) beyond

and cash at the hit is the integral of exp(-r t) times the first-passage density h / (v sqrt(2 pi t^3))
exp(-(h - nu t)^2 / (2 v^2 t)), in ln t.
"""

from flint import acb, arb, ctx

from contracts import legs, line
from image import law

PRECISION = 320
TOLERANCE = arb(2) ** -125
# The integrand is left out where its exponent is this far below its highest.
NEGLIGIBLE = 300


def quadrature(function, low, high):
    return acb.integral(
        lambda z, _: function(z), acb(low.mid()), acb(high.mid()), rel_tol=TOLERANCE, abs_tol=TOLERANCE**8,
        eval_limit=2_000_000, depth_limit=20_000,
    ).real


def window(low, high, centres):
    """(low, high) cut to where one of exp(-(z - centre)^2 / 2) still counts; None is no end."""
    cuts = []
    for centre in centres:
        peak = centre
        if low is not None and low > peak:
            peak = low
        if high is not None and high < peak:
            peak = high
        reach = ((peak - centre) * (peak - centre) + 2 * NEGLIGIBLE).sqrt()
        cuts.append((centre - reach, centre + reach))
    least = min(cut[0] for cut in cuts)
    most = max(cut[1] for cut in cuts)
    low = least if low is None or low < least else low
    high = most if high is None or high > most else high
    return low, high


def gaussian(function, low, high, centres):
    """Integral of phi(z) function(z, exponent) with exponent to be folded into the Gaussian's."""
    if low is not None and high is not None and not low < high:
        return arb(0)
    low, high = window(low, high, centres)
    if not low < high:
        return arb(0)
    # Scale by the Gaussian of the nearest point, so that tolerances are relative in far tails too.
    nearest = arb(0) if low < 0 < high else (low if low > 0 else high)
    offset = nearest**2 / 2
    total = quadrature(lambda z: function(z, offset - z * z / 2), low, high)
    return total * (-offset).exp() / (2 * arb.pi()).sqrt()


def claim(contract, x, payoff, event):
    """Undiscounted expectation of a payoff under an event."""
    sign = contract.sign or 1
    mean, deviation = law(x)
    mean = sign * mean
    cash, shares, side = line(payoff, x["strike"])
    if sign == -1:
        side = {"above": "below", "below": "above", "all": "all"}[side]
    low = high = None
    if side != "all":
        strike = (sign * (x["strike"] / x["spot"]).log() - mean) / deviation
        low, high = (strike, None) if side == "above" else (None, strike)
    centres = ([arb(0)] if type(cash) is not int or cash else []) + ([sign * deviation] if shares else [])
    forward = x["spot"] * (sign * mean).exp()
    tilt = sign * deviation

    def paid(z, exponent):
        total = acb(0)
        if type(cash) is not int or cash:
            total += cash * exponent.exp()
        if shares:
            total += shares * forward * (exponent + tilt * z).exp()
        return total

    def lesser(a, b):
        return b if a is None or b < a else a

    def greater(a, b):
        return b if a is None or b > a else a

    if event == "always":
        return gaussian(paid, low, high, centres)
    height = sign * (x["barrier"] / x["spot"]).log()
    barrier = (height - mean) / deviation
    bend = 2 * height / deviation

    def crossing(z):
        return bend * (z - barrier)

    live_high = lesser(high, barrier)
    if event == "untouched":
        return gaussian(lambda z, e: -crossing(z).expm1() * paid(z, e), low, live_high, centres)
    shifted = [centre + bend for centre in centres]
    live = gaussian(lambda z, e: paid(z, e + crossing(z)), low, live_high, shifted)
    return live + gaussian(paid, greater(low, barrier), high, centres)


def passage(distance, drift, vol, horizon, rate):
    """E[exp(-rate tau); tau <= horizon]."""
    early = distance**2 / (2 * vol**2)
    late = drift * drift / (2 * vol**2) + rate
    if late > 0:
        peak = (early / late).sqrt()
        peak = peak if peak < horizon else horizon
        total = early / peak + late * peak + NEGLIGIBLE
        most = (total + (total**2 - 4 * early * late).sqrt()) / (2 * late)
        low, high = early / (late * most), (most if most < horizon else horizon)
    else:
        peak = high = horizon
        low = early / (early / horizon - late * horizon + NEGLIGIBLE)
    offset = early / peak + late * peak

    def density(log_time):
        time = log_time.exp()
        return (offset - early / time - late * time - log_time / 2).exp()

    total = quadrature(density, low.log(), high.log())
    scale = distance / (vol * (2 * arb.pi()).sqrt())
    return scale * total * (drift * distance / vol**2 - offset).exp()


def value(contract, paid, x, touched):
    """Value, assembled from integrals alone; x holds balls by field name."""
    ctx.prec = PRECISION
    total = arb(0)
    for is_rebate, what, event in legs(contract, paid, touched):
        if is_rebate and x["rebate"] == 0:
            continue
        amount = x["rebate"] if is_rebate else arb(1)
        if what == "now":
            total += amount
        elif what == "hit":
            height = contract.sign * (x["barrier"] / x["spot"]).log()
            drift = contract.sign * (x["rate"] - x["dividend"] - x["vol"] ** 2 / 2)
            total += amount * passage(height, drift, x["vol"], x["expiry"], x["rate"])
        else:
            total += amount * (-x["rate"] * x["expiry"]).exp() * claim(contract, x, what, event)
    return total
