"""The array shell: makes columns of the arguments of a call, asks the core, gives the results the call's shape.

floodmark._native comes here when an argument of a call is not a plain number or text.
"""

import math
from collections.abc import Callable
from typing import Any

import numpy as np

from floodmark import _native
from floodmark._arguments import codes, missing, numbers, texts
from floodmark._results import BarrierProfile, Greeks

_Array = np.ndarray[Any, Any]

_NUMBERS = ("spot", "strike", "barrier", "rebate", "expiry", "vol", "rate", "dividend")
_MAY_BE_ABSENT = ("strike", "barrier")
_TYPES: dict[str, Callable[..., Any]] = {
    "greeks": Greeks,
    "reference_greeks": Greeks,
    "barrier_profile": BarrierProfile,
}


def contracts(question: str, contract: Any, rebate_paid: Any, given: tuple[Any, ...], with_status: bool) -> Any:
    """Answers a question about contracts."""
    arrays = {"contract": texts("contract", contract), "rebate_paid": texts("rebate_paid", rebate_paid)}
    for name, argument in zip(_NUMBERS, given, strict=True):
        absent = argument is None and name in _MAY_BE_ABSENT
        arrays[name] = np.array(np.nan) if absent else numbers(name, argument)
    shape = _shape(arrays)
    columns = [_column(arrays[name], shape) for name in _NUMBERS]
    contract_codes, rebate_paid_codes = (
        _column(codes(name, arrays[name]), shape) for name in ("contract", "rebate_paid")
    )
    results, status, refused = _native.contract_columns(
        question, _rows(shape), contract_codes, rebate_paid_codes, columns
    )
    if refused and not with_status:
        row = _first(status, shape)
        contract, rebate_paid, *plain = (_element(array, shape, row) for array in arrays.values())
        if not isinstance(contract, str):
            raise ValueError(f"contract {contract!r} is not one that is known{_where(row, refused)}")
        rebate_paid = None if missing(rebate_paid) else str(rebate_paid)
        _raise(lambda: _native.contract_row(question, contract, rebate_paid, plain), row, refused)
    shaped = [_shaped(result, shape) for result in results]
    answer = _TYPES[question](*shaped) if question in _TYPES else shaped[0] if len(shaped) == 1 else tuple(shaped)
    if not with_status:
        return answer
    statuses = _shaped(status, shape)
    return (*answer, statuses) if question == "bounded_price" else (answer, statuses)


def law(quantity: str, names: tuple[str, ...], given: tuple[Any, ...], with_status: bool) -> Any:
    """Answers a question about the law of Brownian motion; names are those of the first and second argument."""
    names = ("drift", "vol", "horizon", *names)
    arrays = {name: numbers(name, argument) for name, argument in zip(names, given, strict=False)}
    shape = _shape(arrays)
    # Where there is one argument only, the second is any number.
    columns = [*(_column(array, shape) for array in arrays.values()), np.zeros(1)][:5]
    result, status, refused = _native.law_columns(quantity, _rows(shape), columns)
    if refused and not with_status:
        row = _first(status, shape)
        plain = [*(_element(array, shape, row) for array in arrays.values()), 0.0][:5]
        _raise(lambda: _native.law_row(quantity, plain), row, refused)
    answer = _shaped(result, shape)
    return (answer, _shaped(status, shape)) if with_status else answer


def special(function: str, name: str, given: Any) -> Any:
    """A function of one number for every element."""
    array = numbers(name, given)
    return _shaped(_native.special_column(function, _column(array, array.shape)), array.shape)


def _shape(arrays: dict[str, _Array]) -> tuple[int, ...]:
    try:
        return np.broadcast_shapes(*(array.shape for array in arrays.values()))
    except ValueError:
        shapes = ", ".join(f"{name} {array.shape}" for name, array in arrays.items() if array.shape != ())
        raise ValueError(f"these shapes do not broadcast: {shapes}") from None


def _rows(shape: tuple[int, ...]) -> int:
    return math.prod(shape)


def _column(array: _Array, shape: tuple[int, ...]) -> _Array:
    """One axis over all the rows, or one element for all of them; copied only where more axes demand it."""
    if array.size == 1:
        return array.reshape(1)
    return (array if array.shape == shape else np.broadcast_to(array, shape)).reshape(-1)


def _shaped(column: _Array, shape: tuple[int, ...]) -> Any:
    return column[0].item() if shape == () else column.reshape(shape)


def _first(status: _Array, shape: tuple[int, ...]) -> tuple[int, ...]:
    """The index of the first row that was refused."""
    return tuple(int(place) for place in np.unravel_index(np.flatnonzero(status)[0], shape))


def _element(array: _Array, shape: tuple[int, ...], row: tuple[int, ...]) -> Any:
    element = np.broadcast_to(array, shape)[row]
    return element.item() if isinstance(element, np.generic) else element


def _where(row: tuple[int, ...], refused: int) -> str:
    if row == ():
        return ""
    index = row[0] if len(row) == 1 else row
    return f", at index {index}" + (f", the first of {refused} refused" if refused > 1 else "")


def _raise(ask: Callable[[], Any], row: tuple[int, ...], refused: int) -> None:
    """Raises what the core says about the first row that it refused."""
    try:
        ask()
    except ValueError as error:
        raise ValueError(f"{error}{_where(row, refused)}") from None
