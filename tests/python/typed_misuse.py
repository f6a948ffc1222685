"""What a type checker must refuse: every line that ends in a comment of this kind is an error, and no other is."""

import floodmark
from floodmark import brownian, special


def misuse() -> None:
    floodmark.price("call", 100.0, strike=100.0, expiry=1.0, vol=0.2)  # type: ignore[call-overload]
    floodmark.price("call", spot="100", strike=100.0, expiry=1.0, vol=0.2)  # type: ignore[arg-type]
    floodmark.price("call", spot=100.0, strike=100.0, expiry=1.0)  # type: ignore[call-overload]
    floodmark.price(5, spot=100.0, expiry=1.0, vol=0.2)  # type: ignore[call-overload]
    floodmark.greeks("call", spot=100.0, volatility=0.2, expiry=1.0)  # type: ignore[call-overload]
    floodmark.greeks("call", spot=None, vol=0.2, expiry=1.0)  # type: ignore[call-overload]
    brownian.max_cdf(0.1, 0.2, vol=0.2, horizon=1.0)  # type: ignore[call-overload]
    brownian.max_cdf(0.1, vol=0.2)  # type: ignore[call-overload]
    special.normal_cdf("0.1")  # type: ignore[arg-type]
