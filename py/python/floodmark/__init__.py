"""Barrier options, touches and the running maximum of Brownian motion.

Values and analytic Greeks under constant rate, dividend yield and volatility with continuous watching; the law of
Brownian motion beneath them (floodmark.brownian); the normal law (floodmark.special). Every numeric argument may be
a number, or an array, and they broadcast as NumPy's do.

>>> import floodmark
>>> values = floodmark.price(
...     ["up-and-out call", "up-and-in call", "call"], spot=105.0, strike=100.0, barrier=120.0, expiry=0.5, vol=0.2
... )
>>> bool(abs(values[0] + values[1] - values[2]) < 1e-13)
True

Model values, not advice. Validate independently before use. Local rules and licensed practice decide.
"""

from floodmark import brownian, special
from floodmark._native import (
    CONTRACTS,
    __version__,
    barrier_profile,
    greeks,
    price,
    reference_greeks,
    reference_price,
    status_text,
)
from floodmark._results import BarrierProfile, Greeks

__all__ = [
    "CONTRACTS",
    "BarrierProfile",
    "Greeks",
    "__version__",
    "barrier_profile",
    "brownian",
    "greeks",
    "price",
    "reference_greeks",
    "reference_price",
    "special",
    "status_text",
]
