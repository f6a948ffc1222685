"""What a type checker sees; checked by mypy --strict, and run."""

import numpy as np
from numpy.typing import NDArray
from typing_extensions import assert_type

import floodmark
from floodmark import brownian, special

Array = NDArray[np.float64]
Statuses = NDArray[np.int32]
spots = np.array([95.0, 105.0])

assert_type(floodmark.price("call", spot=100.0, strike=100, expiry=1.0, vol=0.2), float)
assert_type(floodmark.price("call", spot=np.float64(100.0), strike=100.0, expiry=1.0, vol=0.2), float)
assert_type(floodmark.price("call", spot=spots, strike=100.0, expiry=1.0, vol=0.2), Array)
assert_type(floodmark.price(["call", "put"], spot=100.0, strike=[90.0, 110.0], expiry=1.0, vol=0.2), Array)
assert_type(floodmark.price("call", spot=100.0, strike=1.0, expiry=1.0, vol=0.2, with_status=True), tuple[float, int])
assert_type(
    floodmark.price("call", spot=100.0, strike=1.0, expiry=1.0, vol=0.2, error_bound=True), tuple[float, float]
)
assert_type(
    floodmark.price("call", spot=spots, strike=1.0, expiry=1.0, vol=0.2, error_bound=True, with_status=True),
    tuple[Array, Array, Statuses],
)
assert_type(
    floodmark.price("up one-touch", spot=spots, barrier=110.0, rebate_paid=[None, "hit"], expiry=1.0, vol=0.2), Array
)
risk = floodmark.greeks("put", spot=100.0, strike=100.0, expiry=1.0, vol=0.2)
assert_type(risk, floodmark.Greeks[float])
assert_type(risk.delta, float)
assert_type(risk["vega"], float)
risks, statuses = floodmark.reference_greeks("put", spot=spots, strike=100.0, expiry=1.0, vol=0.2, with_status=True)
assert_type(risks.gamma, Array)
assert_type(statuses, Statuses)
assert_type(floodmark.barrier_profile("cash", spot=100.0, expiry=1.0, vol=0.2).gap, float)
assert_type(floodmark.reference_price("cash", spot=spots, expiry=1.0, vol=0.2), Array)
assert_type(floodmark.status_text(15), str)
assert_type(floodmark.CONTRACTS, tuple[str, ...])

assert_type(brownian.max_cdf(0.1, vol=0.2, horizon=1.0), float)
assert_type(brownian.max_cdf(spots, drift=0.1, vol=0.2, horizon=1.0), Array)
assert_type(brownian.joint_max_cdf(0.1, [0.2, 0.3], vol=0.2, horizon=1.0, with_status=True), tuple[Array, Statuses])
assert_type(brownian.first_passage_cdf(0.1, time=2.0, vol=0.2), float)
assert_type(special.normal_cdf(0.1), float)
assert_type(special.normal_quantile([0.1, 0.2]), Array)

floodmark.Greeks  # A result's type can be named at run time too.
