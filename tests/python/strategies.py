"""Contracts, numbers and shapes for the tests to try."""

from typing import Any

import numpy as np
from hypothesis import strategies as st
from hypothesis.extra import numpy as hnp

import floodmark

NUMBERS = {
    "spot": st.floats(50.0, 200.0),
    "strike": st.floats(50.0, 200.0),
    "barrier": st.floats(50.0, 200.0),
    "rebate": st.floats(0.0, 10.0),
    "expiry": st.floats(0.0, 5.0),
    "vol": st.floats(0.0, 1.0),
    "rate": st.floats(-0.1, 0.1),
    "dividend": st.floats(-0.1, 0.1),
}
TEXTS = {
    "contract": st.sampled_from(floodmark.CONTRACTS),
    "rebate_paid": st.sampled_from([None, "", "expiry"]),
}
# Most of these are refused, some by some contracts only.
ODD = {
    "spot": st.sampled_from([0.0, -1.0, float("nan"), float("inf"), 1e-300]),
    "strike": st.sampled_from([0.0, float("nan")]),
    "barrier": st.sampled_from([0.0, float("nan")]),
    "rebate": st.just(-1.0),
    "expiry": st.sampled_from([-1.0, 1e9]),
    "vol": st.just(-0.2),
    "rate": st.just(float("nan")),
    "dividend": st.just(2e3),
    "contract": st.sampled_from(["up-and-over call", ""]),
    "rebate_paid": st.sampled_from(["hit", "never"]),
}
GOOD = {"spot": 105.0, "strike": 100.0, "barrier": 120.0, "expiry": 0.5, "vol": 0.2}


@st.composite
def calls(draw: Any) -> tuple[dict[str, Any], tuple[int, ...]]:
    """Arguments of shapes that broadcast, and the shape they broadcast to."""
    names = [*TEXTS, *NUMBERS]
    shapes = draw(hnp.mutually_broadcastable_shapes(num_shapes=len(names), max_dims=3, max_side=3))
    # One argument at most is odd, and only here and there: a row of many odd ones says nothing but that it is refused.
    odd = draw(st.none() | st.sampled_from(names))
    arguments = {}
    for name, shape in zip(names, shapes.input_shapes, strict=True):
        element = {**TEXTS, **NUMBERS}[name]
        if name == odd:
            element |= ODD[name]
        size = int(np.prod(shape))
        elements = draw(st.lists(element, min_size=size, max_size=size))
        if shape == () and draw(st.booleans()):
            arguments[name] = elements[0]
        else:
            array = np.empty(size, dtype=object if name in TEXTS else float)
            array[:] = elements
            arguments[name] = array.reshape(shape)
    return arguments, shapes.result_shape


def row(arguments: dict[str, Any], shape: tuple[int, ...], index: tuple[int, ...]) -> dict[str, Any]:
    """The plain arguments of one row."""
    picked = {}
    for name, argument in arguments.items():
        element = np.broadcast_to(np.asarray(argument, dtype=object), shape)[index]
        picked[name] = element if name in TEXTS else float(element)
    return picked


def bits(numbers: Any) -> Any:
    """The binary64 numbers as integers, so that equal means equal to the bit; every NaN counts as one."""
    numbers = np.asarray(numbers, dtype=np.float64)
    return np.where(np.isnan(numbers), np.nan, numbers).view(np.uint64)
