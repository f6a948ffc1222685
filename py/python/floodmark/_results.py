"""What comes back when an answer has several numbers."""

from typing import Any, NamedTuple


class Greeks(NamedTuple):
    """Value and analytic sensitivities of one contract (floats) or of several (arrays).

    Units: in the currency of the spot; per 1.00 of spot, vol, rate and dividend, per year of time. theta and charm
    run with the calendar: they are minus the derivative in expiry. By name too: greeks["delta"].
    """

    value: Any
    delta: Any
    gamma: Any
    vega: Any
    theta: Any
    rho: Any
    dividend_rho: Any
    vanna: Any
    volga: Any
    charm: Any
    barrier_delta: Any
    strike_delta: Any

    def __getitem__(self, key):
        return _item(self, key)


class BarrierProfile(NamedTuple):
    """Where a contract stands against its barrier (floats), or several do (arrays).

    touch_probability: that the barrier is touched by expiry, in the cash measure; 1 if it is touched now, 0 without
    a barrier.
    distance: standard deviations from the spot to the barrier; 0 if touched now, infinite without a barrier or
    without volatility.
    gap: the jump of value at the barrier at expiry, touched minus untouched; 0 without a barrier.
    By name too: profile["gap"].
    """

    touch_probability: Any
    distance: Any
    gap: Any

    def __getitem__(self, key):
        return _item(self, key)


def _item(numbers, key):
    if not isinstance(key, str):
        return tuple.__getitem__(numbers, key)
    if key not in numbers._fields:
        raise KeyError(key)
    return getattr(numbers, key)
