"""What is refused, and in which words."""

import re
from typing import Any

import numpy as np
import pytest

import floodmark
from floodmark import brownian, special
from strategies import GOOD

NAN = float("nan")
# Argument, value, sentence.
SENTENCES = [
    ("contract", "foo", "contract 'foo' is not one that is known"),
    ("contract", "", "contract '' is not one that is known"),
    ("contract", "it's", 'contract "it\'s" is not one that is known'),
    ("contract", "\udcff", r"contract '\udcff' is not one that is known"),
    ("rebate_paid", "never", "rebate_paid must be hit or expiry, got 'never'"),
    ("spot", -1.0, "spot must be positive and finite, got -1"),
    ("spot", NAN, "spot must be positive and finite, got NaN"),
    ("strike", 0.0, "strike must be positive and finite, got 0"),
    ("strike", None, "strike must be positive and finite, got NaN"),
    ("barrier", None, "barrier must be positive and finite, got NaN"),
    ("barrier", float("inf"), "barrier must be positive and finite, got inf"),
    ("rebate", -3.0, "rebate must be finite and at least 0, got -3"),
    ("expiry", -0.5, "expiry must be from 0 to 10000 years, got -0.5"),
    ("vol", -0.2, "vol must be from 0 to 1000, got -0.2"),
    ("rate", NAN, "rate must be from -1000 to 1000, got NaN"),
    ("dividend", 2000, "dividend must be from -1000 to 1000, got 2000"),
]
CONTRACT_FUNCTIONS = [
    floodmark.price,
    floodmark.greeks,
    floodmark.barrier_profile,
    floodmark.reference_price,
    floodmark.reference_greeks,
]


def terms(**changed: Any) -> dict[str, Any]:
    return {"contract": "up-and-out call", **GOOD, **changed}


@pytest.mark.parametrize(("name", "value", "sentence"), SENTENCES)
@pytest.mark.parametrize("function", CONTRACT_FUNCTIONS)
def test_a_plain_value_out_of_its_domain_raises_its_sentence(
    function: Any, name: str, value: Any, sentence: str
) -> None:
    with pytest.raises(ValueError) as raised:
        function(**terms(**{name: value}))
    assert str(raised.value) == sentence


@pytest.mark.parametrize(("name", "value", "sentence"), SENTENCES)
@pytest.mark.parametrize("function", CONTRACT_FUNCTIONS)
def test_an_array_raises_the_sentence_of_its_first_bad_row(
    function: Any, name: str, value: Any, sentence: str
) -> None:
    good = terms(rebate=0.0, rebate_paid="hit", rate=0.0, dividend=0.0)[name]
    with pytest.raises(ValueError) as raised:
        function(**terms(**{name: [good, good, value, good]}))
    assert str(raised.value) == f"{sentence}, at index 2"
    with pytest.raises(ValueError) as raised:
        function(**terms(**{name: [[good, value], [good, value]]}))
    assert str(raised.value) == f"{sentence}, at index (0, 1), the first of 2 refused"
    with pytest.raises(ValueError) as raised:
        function(**terms(**{name: value, "expiry": [[0.5, 0.25, 1.0]] if name != "expiry" else [[value] * 3]}))
    assert str(raised.value) == f"{sentence}, at index (0, 0), the first of 3 refused"


@pytest.mark.parametrize(("name", "value", "sentence"), SENTENCES)
def test_with_status_a_bad_row_is_nan_and_its_neighbours_are_unharmed(name: str, value: Any, sentence: str) -> None:
    good = terms(rebate=0.0, rebate_paid="hit", rate=0.0, dividend=0.0)[name]
    call = terms(**{name: [good, value, good]})
    expected = floodmark.price(**terms())
    values, status = floodmark.price(**call, with_status=True)
    assert values[0] == values[2] == expected
    assert np.isnan(values[1])
    assert status[0] == status[2] == 0
    assert floodmark.status_text(status[1]).split()[0] == sentence.split()[0]
    values, bounds, same = floodmark.price(**call, with_status=True, error_bound=True)
    assert np.isnan(values[1]) and np.isnan(bounds[1]) and not np.isnan(bounds[[0, 2]]).any()
    assert np.array_equal(status, same)
    greeks, same = floodmark.greeks(**call, with_status=True)
    assert all(np.isnan(column[1]) and not np.isnan(column[[0, 2]]).any() for column in greeks)
    assert np.array_equal(status, same)
    value, code = floodmark.price(**terms(**{name: value}), with_status=True)
    assert np.isnan(value) and code == status[1]


def test_a_hit_where_there_is_none_to_pay_at_is_refused() -> None:
    sentence = "rebate_paid is hit, but this contract has no hit to pay at"
    with pytest.raises(ValueError, match=f"^{sentence}$"):
        floodmark.price("up-and-in call", **GOOD, rebate_paid="hit")
    with pytest.raises(ValueError, match=f"^{sentence}, at index 1$"):
        floodmark.price(["up-and-out call", "up-and-in call"], **GOOD, rebate_paid="hit")


def test_an_answer_beyond_binary64_is_refused() -> None:
    terms = {"spot": 1e308, "expiry": 1.0, "vol": 0.2, "dividend": -900.0}
    for function in CONTRACT_FUNCTIONS:
        if function is floodmark.barrier_profile:
            continue
        with pytest.raises(ValueError, match="^the answer is beyond the range of a binary64 number$"):
            function("asset", **terms)
        with pytest.raises(ValueError, match="^the answer is beyond the range of a binary64 number, at index 0$"):
            function(["asset"], **terms)


@pytest.mark.parametrize("function", CONTRACT_FUNCTIONS)
@pytest.mark.parametrize("value", ["100", b"100", 1j, object(), {}, ["100"], [1.0, "2"], [[1.0], [1.0, 2.0]], [1j]])
@pytest.mark.parametrize("name", ["spot", "strike", "barrier", "rebate", "expiry", "vol", "rate", "dividend"])
def test_what_is_no_number_is_a_type_error_that_names_the_argument(function: Any, name: str, value: Any) -> None:
    with pytest.raises(TypeError, match=f"^{name} must be a number or an array of numbers, got "):
        function(**terms(**{name: value}))


@pytest.mark.parametrize("name", ["spot", "rebate", "expiry", "vol", "rate", "dividend"])
def test_nothing_is_no_number_where_one_is_needed(name: str) -> None:
    with pytest.raises(TypeError, match=f"^{name} must be a number or an array of numbers, got NoneType None$"):
        floodmark.price(**terms(**{name: None}))


def test_an_int_beyond_binary64_is_a_type_error() -> None:
    with pytest.raises(TypeError, match="^spot must be a number or an array of numbers, got int 1000"):
        floodmark.price(**terms(spot=10**400))


@pytest.mark.parametrize("value", [5, 5.0, None, b"call", [5, 6], [["call"], 5.0], np.array([b"call"])])
def test_what_is_no_text_is_a_type_error(value: Any) -> None:
    with pytest.raises(TypeError, match="^contract must be a text or an array of texts, got "):
        floodmark.price(**terms(contract=value))


@pytest.mark.parametrize("value", [1, 1.5, [1, 2], b"hit", [["hit"], "hit"]])
def test_a_rebate_paid_that_is_no_text_is_a_type_error(value: Any) -> None:
    with pytest.raises(TypeError, match="^rebate_paid must be a text or an array of texts, got "):
        floodmark.price(**terms(rebate_paid=value))


@pytest.mark.parametrize("hole", [None, NAN, 7])
def test_a_hole_among_contracts_is_a_bad_row(hole: Any) -> None:
    contracts = np.array(["call", hole, "put"], dtype=object)
    values, status = floodmark.price(contracts, **GOOD, with_status=True)
    assert status.tolist() == [0, 1, 0]
    assert np.isnan(values).tolist() == [False, True, False]
    with pytest.raises(ValueError, match=re.escape(f"contract {hole!r} is not one that is known, at index 1")):
        floodmark.price(contracts, **GOOD)


def test_shapes_that_do_not_broadcast_are_named() -> None:
    with pytest.raises(ValueError, match=r"^these shapes do not broadcast: spot \(2,\), vol \(3,\)$"):
        floodmark.price("call", **{**GOOD, "spot": [1.0, 2.0], "vol": [0.1, 0.2, 0.3]})
    with pytest.raises(ValueError, match=r"^these shapes do not broadcast: contract \(2,\), vol \(3,\)$"):
        floodmark.price(["call", "put"], **{**GOOD, "vol": [0.1, 0.2, 0.3]})
    with pytest.raises(ValueError, match=r"^these shapes do not broadcast: drift \(2,\), level \(3,\)$"):
        brownian.max_cdf([1.0, 2.0, 3.0], drift=[1.0, 2.0], vol=1.0, horizon=1.0)


def test_the_law_names_its_arguments_too() -> None:
    law = {"vol": 0.2, "horizon": 1.0}
    with pytest.raises(ValueError, match="^probability must be from 0 to 1, got 1.5$"):
        brownian.max_quantile(1.5, **law)
    with pytest.raises(ValueError, match="^probability must be from 0 to 1, got 1.5, at index 1$"):
        brownian.max_quantile([0.5, 1.5], **law)
    with pytest.raises(ValueError, match="^uniform must be strictly between 0 and 1, got 0, at index 1"):
        brownian.sample_max(0.1, [0.5, 0.0], **law)
    with pytest.raises(ValueError, match="^horizon .*, got -1$"):
        brownian.max_cdf(0.1, vol=0.2, horizon=-1.0)
    with pytest.raises(TypeError, match="^level must be a number or an array of numbers, got str 'x'$"):
        brownian.max_cdf("x", **law)
    with pytest.raises(TypeError, match="^drift must be a number or an array of numbers, got NoneType None$"):
        brownian.max_cdf(0.1, drift=None, **law)
    values, status = brownian.max_quantile([0.5, 1.5, NAN], **law, with_status=True)
    assert status.tolist() == [0, 36, 36]
    assert np.isnan(values).tolist() == [False, True, True]
    value, code = brownian.max_quantile(1.5, **law, with_status=True)
    assert np.isnan(value) and code == 36


def test_the_normal_law_names_its_argument_too() -> None:
    with pytest.raises(TypeError, match="^x must be a number or an array of numbers, got str 'a'$"):
        special.normal_cdf("a")
    with pytest.raises(TypeError, match="^probability must be a number or an array of numbers, got NoneType None$"):
        special.normal_quantile(None)


def test_a_status_has_a_sentence_even_if_it_is_none() -> None:
    assert floodmark.status_text(0) == "ok"
    assert floodmark.status_text(11) == "strike must be positive and finite"
    assert floodmark.status_text(999) == "status 999 is not one that is known"


def test_arguments_are_given_by_name_and_unknown_ones_are_refused() -> None:
    with pytest.raises(TypeError):
        floodmark.price("call", 100.0, strike=100.0, expiry=1.0, vol=0.2)  # type: ignore[call-overload]
    with pytest.raises(TypeError, match="volatility"):
        floodmark.price("call", **GOOD, volatility=0.2)
    with pytest.raises(TypeError, match="vol"):
        floodmark.price("call", spot=100.0, strike=100.0, expiry=1.0)  # type: ignore[call-overload]
