"""The vectors that Rust and C answer too, one by one and in columns, equal to the bit."""

import csv
from pathlib import Path
from typing import Any

import numpy as np
import pytest

import floodmark
from floodmark import brownian

FILE = Path(__file__).parent.parent / "vectors" / "parity.csv"
ROWS = list(csv.DictReader(FILE.open(newline="")))
CONTRACTS = [row for row in ROWS if row["kind"] == "contract"]
# A quantity that does not exist has no function here.
LAWS = [row for row in ROWS if row["kind"] == "law" and row["name"]]
NUMBERS = ("spot", "strike", "barrier", "rebate", "expiry", "vol", "rate", "dividend")
PROFILE = ("touch_probability", "distance", "gap")
CHOICES = {"0": None, "1": "hit", "2": "expiry"}


def as_bits(number: float) -> str:
    return f"{int(np.float64(number).view(np.uint64)):016x}"


def terms(row: dict[str, str]) -> dict[str, Any]:
    numbers = {name: float(row[name]) for name in NUMBERS}
    return {
        "contract": row["name"] or "no such contract",
        "rebate_paid": CHOICES.get(row["rebate_paid"], "no such choice"),
        **numbers,
    }


def check_refusal(row: dict[str, str], status: str, call: Any) -> None:
    """Plain numbers raise where the status is not 0."""
    if row[status] == "0":
        call()
        return
    with pytest.raises(ValueError) as raised:
        call()
    rule = floodmark.status_text(int(row[status]))
    field = rule.split()[0]
    assert str(raised.value).startswith((rule, f"{field} '"))


def test_the_file_has_rows_of_both_kinds() -> None:
    assert {row["name"] for row in CONTRACTS} >= set(floodmark.CONTRACTS)
    assert {row["name"] for row in LAWS} == set(brownian.__all__)


def test_contracts_one_by_one() -> None:
    for row in CONTRACTS:
        call = terms(row)
        value, status = floodmark.price(**call, with_status=True)
        assert (str(status), as_bits(value)) == (row["status"], row["value"]), row
        value, _, status = floodmark.price(**call, with_status=True, error_bound=True)
        assert (str(status), as_bits(value)) == (row["status"], row["value"]), row
        greeks, status = floodmark.greeks(**call, with_status=True)
        assert str(status) == row["status"]
        assert [as_bits(number) for number in greeks] == [row[name] for name in floodmark.Greeks._fields], row
        profile, status = floodmark.barrier_profile(**call, with_status=True)
        assert str(status) == row["profile_status"]
        assert [as_bits(number) for number in profile] == [row[name] for name in PROFILE], row
        check_refusal(row, "status", lambda: floodmark.price(**call))
        check_refusal(row, "status", lambda: floodmark.greeks(**call))
        check_refusal(row, "profile_status", lambda: floodmark.barrier_profile(**call))


def test_contracts_in_columns() -> None:
    columns: dict[str, Any] = {}
    for name in ("contract", "rebate_paid", *NUMBERS):
        columns[name] = [terms(row)[name] for row in CONTRACTS]
    value, status = floodmark.price(**columns, with_status=True)
    bounded, _, same = floodmark.price(**columns, with_status=True, error_bound=True)
    greeks, greek_status = floodmark.greeks(**columns, with_status=True)
    profile, profile_status = floodmark.barrier_profile(**columns, with_status=True)
    for place, row in enumerate(CONTRACTS):
        assert [str(found[place]) for found in (status, same, greek_status)] == [row["status"]] * 3
        assert str(profile_status[place]) == row["profile_status"]
        assert as_bits(value[place]) == as_bits(bounded[place]) == row["value"], row
        for name in floodmark.Greeks._fields:
            assert as_bits(greeks[name][place]) == row[name], (name, row)
        for name in PROFILE:
            assert as_bits(profile[name][place]) == row[name], (name, row)


def law_call(row: dict[str, str]) -> tuple[list[float], dict[str, float]]:
    arguments = [float(row[name]) for name in ("first", "second") if row[name]]
    return arguments, {name: float(row[name]) for name in ("drift", "vol", "horizon")}


def test_the_law_one_by_one() -> None:
    for row in LAWS:
        function = getattr(brownian, row["name"])
        arguments, law = law_call(row)
        value, status = function(*arguments, **law, with_status=True)
        assert (str(status), as_bits(value)) == (row["status"], row["value"]), row
        check_refusal(row, "status", lambda function=function, a=arguments, law=law: function(*a, **law))


@pytest.mark.parametrize("name", brownian.__all__)
def test_the_law_in_columns(name: str) -> None:
    rows = [row for row in LAWS if row["name"] == name]
    calls = [law_call(row) for row in rows]
    arguments = list(zip(*(arguments for arguments, _ in calls), strict=True))
    law = {key: [law[key] for _, law in calls] for key in ("drift", "vol", "horizon")}
    value, status = getattr(brownian, name)(*arguments, **law, with_status=True)
    assert [str(code) for code in status] == [row["status"] for row in rows]
    assert [as_bits(number) for number in value] == [row["value"] for row in rows]
