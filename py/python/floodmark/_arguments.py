"""Arguments as arrays: numbers as float64, texts as codes, anything else refused by the name it has in the call."""

from typing import Any

import numpy as np

from floodmark._native import CONTRACTS, NATURAL, REBATE_PAID

# No contract and no choice of rebate_paid has this code: the core refuses such a row and says so.
UNKNOWN = 255


def missing(element: Any) -> bool:
    """Whether an element of a table stands for nothing: None, NaN, or what a data frame puts there."""
    if element is None:
        return True
    try:
        return bool(element != element)
    except (TypeError, ValueError):  # A missing value may refuse to say whether it differs from itself.
        return not isinstance(element, (np.ndarray, list, tuple))


class _Contracts(dict[Any, int]):
    """Codes by text."""

    def __missing__(self, text: Any) -> int:
        return UNKNOWN


class _RebatePaid(dict[Any, int]):
    """Codes by text; nothing at all means what is natural."""

    def __missing__(self, text: Any) -> int:
        return NATURAL if missing(text) else UNKNOWN


_MAY_BE_MISSING = ("rebate_paid",)
_CODES = {
    "contract": _Contracts((text, code) for code, text in enumerate(CONTRACTS)),
    "rebate_paid": _RebatePaid([("", NATURAL), (None, NATURAL), *REBATE_PAID]),
}


def texts(name: str, given: Any) -> np.ndarray[Any, Any]:
    """The argument as an array of texts."""
    array = _array(name, given, "text")
    if array.dtype.kind == "f" and np.isnan(array).all():  # A column of a data frame that is all holes.
        array = array.astype(object)
    alone = array[()] if array.shape == () else ""
    if array.dtype.kind not in "UOT" or not (isinstance(alone, str) or name in _MAY_BE_MISSING and missing(alone)):
        raise TypeError(_expected(name, given, "text"))
    return array


def codes(name: str, array: np.ndarray[Any, Any]) -> np.ndarray[Any, np.dtype[np.uint8]]:
    """The codes of these texts."""
    code_of = _CODES[name].__getitem__
    try:
        found = np.fromiter(map(code_of, array.reshape(-1).tolist()), dtype=np.uint8, count=array.size)
    except TypeError:
        raise TypeError(_expected(name, array, "text")) from None
    return found.reshape(array.shape)


def numbers(name: str, given: Any) -> np.ndarray[Any, np.dtype[np.float64]]:
    """The argument as an array of float64, NaN where a table has nothing."""
    if type(given) is float:
        return np.array(given)
    if given is None:
        raise TypeError(_expected(name, given, "number"))
    array = _array(name, given, "number")
    if array.dtype.kind == "O":
        plain = [_number(name, element) for element in array.reshape(-1).tolist()]
        array = np.array(plain, dtype=np.float64).reshape(array.shape)
    elif array.dtype.kind not in "biuf":
        raise TypeError(_expected(name, given, "number"))
    found = np.asarray(array, dtype=np.float64)
    if not found.flags.aligned:  # A field of a packed record: not at a whole number of elements from the next.
        found = found.copy()
    return np.where(given.mask, np.nan, found) if isinstance(given, np.ma.MaskedArray) else found


def _array(name: str, given: Any, kind: str) -> np.ndarray[Any, Any]:
    try:
        return np.asarray(given)
    except (TypeError, ValueError):
        raise TypeError(_expected(name, given, kind)) from None


def _number(name: str, element: Any) -> float:
    if missing(element):
        return float("nan")
    try:
        if not isinstance(element, (str, bytes)):
            return float(element)
    except (TypeError, ValueError, OverflowError):
        pass
    raise TypeError(_expected(name, element, "number"))


def _expected(name: str, given: Any, kind: str) -> str:
    shown = repr(given)
    shown = shown if len(shown) <= 60 else f"{shown[:60]}..."
    return f"{name} must be a {kind} or an array of {kind}s, got {type(given).__name__} {shown}"
