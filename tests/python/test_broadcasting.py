"""Arrays give, row by row, what plain numbers give, equal to the bit."""

from typing import Any

import numpy as np
import pytest
from hypothesis import given, settings

import floodmark
from floodmark import brownian, special
from strategies import GOOD, bits, calls, row

QUESTIONS = {
    "price": (floodmark.price, {}),
    "bounded price": (floodmark.price, {"error_bound": True}),
    "greeks": (floodmark.greeks, {}),
    "barrier profile": (floodmark.barrier_profile, {}),
}


def flat(answer: Any) -> list[Any]:
    """The numbers of an answer with status, the status last."""
    if isinstance(answer[0], tuple):
        return [*answer[0], answer[1]]
    return list(answer)


@pytest.mark.parametrize("question", QUESTIONS)
@given(call=calls())
@settings(max_examples=60, deadline=None)
def test_broadcast_rows_are_those_of_plain_numbers(question: str, call: Any) -> None:
    function, options = QUESTIONS[question]
    arguments, shape = call
    answers = flat(function(**arguments, **options, with_status=True))
    for answer in answers:
        assert np.shape(answer) == shape
    for index in np.ndindex(shape):
        alone = flat(function(**row(arguments, shape, index), **options, with_status=True))
        found = [np.asarray(answer)[index] for answer in answers]
        assert (bits(found) == bits(alone)).all()


@given(call=calls())
@settings(max_examples=20, deadline=None)
def test_the_reference_path_broadcasts_likewise(call: Any) -> None:
    arguments, shape = call
    values, status = floodmark.reference_price(**arguments, with_status=True)
    greeks, same = floodmark.reference_greeks(**arguments, with_status=True)
    assert np.array_equal(status, same)
    assert np.shape(values) == shape
    assert (bits(values) == bits(greeks.value)).all()
    for index in list(np.ndindex(shape))[:2]:
        alone = floodmark.reference_price(**row(arguments, shape, index), with_status=True)
        assert (bits([values if shape == () else values[index]]) == bits(alone[0])).all()


@pytest.mark.parametrize("contract", ["up-and-out call", "down-and-in put", "down one-touch", "up no-touch"])
def test_a_rebate_is_paid_at_the_hit_where_nothing_is_said_and_there_is_one(contract: str) -> None:
    terms = {**GOOD, "barrier": 110.0 if contract.startswith("up") else 98.0, "rebate": 3.0, "rate": 0.1}
    at_hit = contract in ("up-and-out call", "down one-touch")
    expected = floodmark.price(contract, **terms, rebate_paid="hit" if at_hit else "expiry")
    if at_hit:
        assert expected > floodmark.price(contract, **terms, rebate_paid="expiry")
    assert floodmark.price(contract, **terms) == expected
    assert floodmark.price(contract, **terms, rebate_paid="") == expected
    assert floodmark.price(contract, **terms, rebate_paid=["", None, np.nan]).tolist() == [expected] * 3


def test_plain_numbers_give_floats_and_arrays_give_arrays() -> None:
    for number in (105.0, 105, np.float64(105.0), np.float32(105.0), np.int64(105), np.array(105.0)):
        value = floodmark.price("call", **{**GOOD, "spot": number})
        assert type(value) is float
        assert value == floodmark.price("call", **GOOD)
        value, bound, status = floodmark.price("call", **{**GOOD, "spot": number}, error_bound=True, with_status=True)
        assert (type(value), type(bound), type(status)) == (float, float, int)
        assert type(floodmark.greeks("call", **{**GOOD, "spot": number}).delta) is float
        assert type(special.normal_cdf(number)) is float
        assert type(brownian.max_cdf(number, vol=1.0, horizon=1.0)) is float
    for array in ([105.0], [105], np.array([105.0], dtype=np.float32), np.array([[105]])):
        value = floodmark.price("call", **{**GOOD, "spot": array})
        assert isinstance(value, np.ndarray)
        assert value.dtype == np.float64
        assert value.shape == np.shape(array)
        _, status = floodmark.price("call", **{**GOOD, "spot": array}, with_status=True)
        assert status.dtype == np.int32


@pytest.mark.parametrize(
    "spot",
    [
        np.arange(80.0, 120.0, 5.0)[::-1],
        np.arange(80.0, 120.0, 2.5)[::2],
        np.arange(80, 88, dtype=np.int32),
        np.arange(80.0, 88.0).astype(">f8"),
        np.arange(80.0, 88.0).astype(np.float32),
        np.array([(1, 80.0 + place) for place in range(8)], dtype=[("pad", "u1"), ("spot", "f8")])["spot"],
        np.array([(1, 80.0 + place) for place in range(8)], dtype=[("pad", "f4"), ("spot", "f8")])["spot"],
        np.array([(1, 80.0 + place) for place in range(8)], dtype=[("pad", "f8"), ("spot", "f8")])["spot"],
        np.asfortranarray(np.arange(80.0, 88.0).reshape(2, 4)),
        np.arange(80.0, 96.0).reshape(4, 4)[::2, 1:],
        np.broadcast_to(np.float64(105.0), (3, 2)),
        np.empty(0),
        np.empty((0, 3)),
    ],
)
def test_any_layout_of_memory_is_read_right(spot: Any) -> None:
    terms = {**GOOD, "spot": spot}
    expected = [floodmark.price("up-and-out call", **{**GOOD, "spot": float(one)}) for one in spot.reshape(-1)]
    found = floodmark.price("up-and-out call", **terms)
    assert found.shape == spot.shape
    assert (bits(found).reshape(-1) == bits(expected)).all()
    level = spot / 100.0
    expected = [brownian.max_cdf(float(one), vol=0.2, horizon=1.0) for one in level.reshape(-1)]
    assert (bits(brownian.max_cdf(level, vol=0.2, horizon=1.0)).reshape(-1) == bits(expected)).all()
    expected = [special.normal_cdf(float(one)) for one in level.reshape(-1)]
    assert (bits(special.normal_cdf(level)).reshape(-1) == bits(expected)).all()


def test_a_column_longer_than_one_part_is_answered_to_its_end() -> None:
    spot = np.linspace(80.0, 119.0, 10_001)
    found = floodmark.price("up-and-out call", **{**GOOD, "spot": spot})
    for place in (0, 4095, 4096, 8191, 8192, 10_000):
        assert found[place] == floodmark.price("up-and-out call", **{**GOOD, "spot": float(spot[place])})
    uniform = (np.arange(10_001) + 0.5) / 10_001
    drawn = brownian.sample_max(0.1, uniform, vol=0.2, horizon=1.0)
    assert (np.diff(drawn) < 0).all() or (np.diff(drawn) > 0).all()
    assert (np.diff(special.normal_quantile(uniform)) > 0).all()


@pytest.mark.parametrize("name", special.__all__)
def test_a_function_of_the_normal_law_has_one_value_for_numbers_and_arrays(name: str) -> None:
    function = getattr(special, name)
    x = np.array([[-40.0, -1.5, -0.0], [0.25, 0.975, 1e300], [np.inf, -np.inf, np.nan]])
    assert (bits(function(x)) == bits([[function(one) for one in line] for line in x.tolist()])).all()
