# Plain numbers are arrays too as far as types can tell, and the first signature that fits is the one that holds.
# mypy: disable-error-code="overload-overlap"
from collections.abc import Sequence
from typing import Any, Literal, Protocol, TypeAlias, overload

import numpy as np
from numpy.typing import NDArray

from floodmark._results import BarrierProfile, Greeks

class _HasArray(Protocol):
    def __array__(self) -> np.ndarray[Any, Any]: ...

_Number: TypeAlias = float | np.floating[Any] | np.integer[Any]
_Numbers: TypeAlias = _Number | _HasArray | Sequence[float | None] | Sequence[Sequence[float | None]]
_Texts: TypeAlias = str | _HasArray | Sequence[str]
_Choices: TypeAlias = str | None | _HasArray | Sequence[str | None]
_Array: TypeAlias = NDArray[np.float64]
_Statuses: TypeAlias = NDArray[np.int32]

__version__: str
CONTRACTS: tuple[str, ...]
REBATE_PAID: tuple[tuple[str, int], ...]
NATURAL: int
GREEKS: tuple[str, ...]

def status_text(code: int) -> str: ...

# What floodmark.price and its like have in common: plain numbers give plain numbers, anything else gives arrays.

@overload
def price(
    contract: str,
    *,
    spot: _Number,
    strike: _Number | None = None,
    barrier: _Number | None = None,
    expiry: _Number,
    vol: _Number,
    rate: _Number = 0.0,
    dividend: _Number = 0.0,
    rebate: _Number = 0.0,
    rebate_paid: str | None = None,
    with_status: Literal[False] = False,
    error_bound: Literal[False] = False,
) -> float: ...
@overload
def price(
    contract: _Texts,
    *,
    spot: _Numbers,
    strike: _Numbers | None = None,
    barrier: _Numbers | None = None,
    expiry: _Numbers,
    vol: _Numbers,
    rate: _Numbers = 0.0,
    dividend: _Numbers = 0.0,
    rebate: _Numbers = 0.0,
    rebate_paid: _Choices = None,
    with_status: Literal[False] = False,
    error_bound: Literal[False] = False,
) -> _Array: ...
@overload
def price(
    contract: str,
    *,
    spot: _Number,
    strike: _Number | None = None,
    barrier: _Number | None = None,
    expiry: _Number,
    vol: _Number,
    rate: _Number = 0.0,
    dividend: _Number = 0.0,
    rebate: _Number = 0.0,
    rebate_paid: str | None = None,
    with_status: Literal[True],
    error_bound: Literal[False] = False,
) -> tuple[float, int]: ...
@overload
def price(
    contract: _Texts,
    *,
    spot: _Numbers,
    strike: _Numbers | None = None,
    barrier: _Numbers | None = None,
    expiry: _Numbers,
    vol: _Numbers,
    rate: _Numbers = 0.0,
    dividend: _Numbers = 0.0,
    rebate: _Numbers = 0.0,
    rebate_paid: _Choices = None,
    with_status: Literal[True],
    error_bound: Literal[False] = False,
) -> tuple[_Array, _Statuses]: ...
@overload
def price(
    contract: str,
    *,
    spot: _Number,
    strike: _Number | None = None,
    barrier: _Number | None = None,
    expiry: _Number,
    vol: _Number,
    rate: _Number = 0.0,
    dividend: _Number = 0.0,
    rebate: _Number = 0.0,
    rebate_paid: str | None = None,
    with_status: Literal[False] = False,
    error_bound: Literal[True],
) -> tuple[float, float]: ...
@overload
def price(
    contract: _Texts,
    *,
    spot: _Numbers,
    strike: _Numbers | None = None,
    barrier: _Numbers | None = None,
    expiry: _Numbers,
    vol: _Numbers,
    rate: _Numbers = 0.0,
    dividend: _Numbers = 0.0,
    rebate: _Numbers = 0.0,
    rebate_paid: _Choices = None,
    with_status: Literal[False] = False,
    error_bound: Literal[True],
) -> tuple[_Array, _Array]: ...
@overload
def price(
    contract: str,
    *,
    spot: _Number,
    strike: _Number | None = None,
    barrier: _Number | None = None,
    expiry: _Number,
    vol: _Number,
    rate: _Number = 0.0,
    dividend: _Number = 0.0,
    rebate: _Number = 0.0,
    rebate_paid: str | None = None,
    with_status: Literal[True],
    error_bound: Literal[True],
) -> tuple[float, float, int]: ...
@overload
def price(
    contract: _Texts,
    *,
    spot: _Numbers,
    strike: _Numbers | None = None,
    barrier: _Numbers | None = None,
    expiry: _Numbers,
    vol: _Numbers,
    rate: _Numbers = 0.0,
    dividend: _Numbers = 0.0,
    rebate: _Numbers = 0.0,
    rebate_paid: _Choices = None,
    with_status: Literal[True],
    error_bound: Literal[True],
) -> tuple[_Array, _Array, _Statuses]: ...
@overload
def greeks(
    contract: str,
    *,
    spot: _Number,
    strike: _Number | None = None,
    barrier: _Number | None = None,
    expiry: _Number,
    vol: _Number,
    rate: _Number = 0.0,
    dividend: _Number = 0.0,
    rebate: _Number = 0.0,
    rebate_paid: str | None = None,
    with_status: Literal[False] = False,
) -> Greeks[float]: ...
@overload
def greeks(
    contract: _Texts,
    *,
    spot: _Numbers,
    strike: _Numbers | None = None,
    barrier: _Numbers | None = None,
    expiry: _Numbers,
    vol: _Numbers,
    rate: _Numbers = 0.0,
    dividend: _Numbers = 0.0,
    rebate: _Numbers = 0.0,
    rebate_paid: _Choices = None,
    with_status: Literal[False] = False,
) -> Greeks[_Array]: ...
@overload
def greeks(
    contract: str,
    *,
    spot: _Number,
    strike: _Number | None = None,
    barrier: _Number | None = None,
    expiry: _Number,
    vol: _Number,
    rate: _Number = 0.0,
    dividend: _Number = 0.0,
    rebate: _Number = 0.0,
    rebate_paid: str | None = None,
    with_status: Literal[True],
) -> tuple[Greeks[float], int]: ...
@overload
def greeks(
    contract: _Texts,
    *,
    spot: _Numbers,
    strike: _Numbers | None = None,
    barrier: _Numbers | None = None,
    expiry: _Numbers,
    vol: _Numbers,
    rate: _Numbers = 0.0,
    dividend: _Numbers = 0.0,
    rebate: _Numbers = 0.0,
    rebate_paid: _Choices = None,
    with_status: Literal[True],
) -> tuple[Greeks[_Array], _Statuses]: ...
@overload
def reference_greeks(
    contract: str,
    *,
    spot: _Number,
    strike: _Number | None = None,
    barrier: _Number | None = None,
    expiry: _Number,
    vol: _Number,
    rate: _Number = 0.0,
    dividend: _Number = 0.0,
    rebate: _Number = 0.0,
    rebate_paid: str | None = None,
    with_status: Literal[False] = False,
) -> Greeks[float]: ...
@overload
def reference_greeks(
    contract: _Texts,
    *,
    spot: _Numbers,
    strike: _Numbers | None = None,
    barrier: _Numbers | None = None,
    expiry: _Numbers,
    vol: _Numbers,
    rate: _Numbers = 0.0,
    dividend: _Numbers = 0.0,
    rebate: _Numbers = 0.0,
    rebate_paid: _Choices = None,
    with_status: Literal[False] = False,
) -> Greeks[_Array]: ...
@overload
def reference_greeks(
    contract: str,
    *,
    spot: _Number,
    strike: _Number | None = None,
    barrier: _Number | None = None,
    expiry: _Number,
    vol: _Number,
    rate: _Number = 0.0,
    dividend: _Number = 0.0,
    rebate: _Number = 0.0,
    rebate_paid: str | None = None,
    with_status: Literal[True],
) -> tuple[Greeks[float], int]: ...
@overload
def reference_greeks(
    contract: _Texts,
    *,
    spot: _Numbers,
    strike: _Numbers | None = None,
    barrier: _Numbers | None = None,
    expiry: _Numbers,
    vol: _Numbers,
    rate: _Numbers = 0.0,
    dividend: _Numbers = 0.0,
    rebate: _Numbers = 0.0,
    rebate_paid: _Choices = None,
    with_status: Literal[True],
) -> tuple[Greeks[_Array], _Statuses]: ...
@overload
def barrier_profile(
    contract: str,
    *,
    spot: _Number,
    strike: _Number | None = None,
    barrier: _Number | None = None,
    expiry: _Number,
    vol: _Number,
    rate: _Number = 0.0,
    dividend: _Number = 0.0,
    rebate: _Number = 0.0,
    rebate_paid: str | None = None,
    with_status: Literal[False] = False,
) -> BarrierProfile[float]: ...
@overload
def barrier_profile(
    contract: _Texts,
    *,
    spot: _Numbers,
    strike: _Numbers | None = None,
    barrier: _Numbers | None = None,
    expiry: _Numbers,
    vol: _Numbers,
    rate: _Numbers = 0.0,
    dividend: _Numbers = 0.0,
    rebate: _Numbers = 0.0,
    rebate_paid: _Choices = None,
    with_status: Literal[False] = False,
) -> BarrierProfile[_Array]: ...
@overload
def barrier_profile(
    contract: str,
    *,
    spot: _Number,
    strike: _Number | None = None,
    barrier: _Number | None = None,
    expiry: _Number,
    vol: _Number,
    rate: _Number = 0.0,
    dividend: _Number = 0.0,
    rebate: _Number = 0.0,
    rebate_paid: str | None = None,
    with_status: Literal[True],
) -> tuple[BarrierProfile[float], int]: ...
@overload
def barrier_profile(
    contract: _Texts,
    *,
    spot: _Numbers,
    strike: _Numbers | None = None,
    barrier: _Numbers | None = None,
    expiry: _Numbers,
    vol: _Numbers,
    rate: _Numbers = 0.0,
    dividend: _Numbers = 0.0,
    rebate: _Numbers = 0.0,
    rebate_paid: _Choices = None,
    with_status: Literal[True],
) -> tuple[BarrierProfile[_Array], _Statuses]: ...
@overload
def reference_price(
    contract: str,
    *,
    spot: _Number,
    strike: _Number | None = None,
    barrier: _Number | None = None,
    expiry: _Number,
    vol: _Number,
    rate: _Number = 0.0,
    dividend: _Number = 0.0,
    rebate: _Number = 0.0,
    rebate_paid: str | None = None,
    with_status: Literal[False] = False,
) -> float: ...
@overload
def reference_price(
    contract: _Texts,
    *,
    spot: _Numbers,
    strike: _Numbers | None = None,
    barrier: _Numbers | None = None,
    expiry: _Numbers,
    vol: _Numbers,
    rate: _Numbers = 0.0,
    dividend: _Numbers = 0.0,
    rebate: _Numbers = 0.0,
    rebate_paid: _Choices = None,
    with_status: Literal[False] = False,
) -> _Array: ...
@overload
def reference_price(
    contract: str,
    *,
    spot: _Number,
    strike: _Number | None = None,
    barrier: _Number | None = None,
    expiry: _Number,
    vol: _Number,
    rate: _Number = 0.0,
    dividend: _Number = 0.0,
    rebate: _Number = 0.0,
    rebate_paid: str | None = None,
    with_status: Literal[True],
) -> tuple[float, int]: ...
@overload
def reference_price(
    contract: _Texts,
    *,
    spot: _Numbers,
    strike: _Numbers | None = None,
    barrier: _Numbers | None = None,
    expiry: _Numbers,
    vol: _Numbers,
    rate: _Numbers = 0.0,
    dividend: _Numbers = 0.0,
    rebate: _Numbers = 0.0,
    rebate_paid: _Choices = None,
    with_status: Literal[True],
) -> tuple[_Array, _Statuses]: ...

# floodmark.special

@overload
def normal_pdf(x: _Number) -> float: ...
@overload
def normal_pdf(x: _Numbers) -> _Array: ...
@overload
def normal_cdf(x: _Number) -> float: ...
@overload
def normal_cdf(x: _Numbers) -> _Array: ...
@overload
def normal_tail(x: _Number) -> float: ...
@overload
def normal_tail(x: _Numbers) -> _Array: ...
@overload
def normal_log_tail(x: _Number) -> float: ...
@overload
def normal_log_tail(x: _Numbers) -> _Array: ...
@overload
def mills_ratio(x: _Number) -> float: ...
@overload
def mills_ratio(x: _Numbers) -> _Array: ...
@overload
def normal_quantile(probability: _Number) -> float: ...
@overload
def normal_quantile(probability: _Numbers) -> _Array: ...

# floodmark.brownian: the functions by the arguments they have.

class _OfTerminal(Protocol):
    @overload
    def __call__(self, terminal: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number, with_status: Literal[False] = ...) -> float: ...
    @overload
    def __call__(self, terminal: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers, with_status: Literal[False] = ...) -> _Array: ...
    @overload
    def __call__(self, terminal: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number, with_status: Literal[True]) -> tuple[float, int]: ...
    @overload
    def __call__(self, terminal: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers, with_status: Literal[True]) -> tuple[_Array, _Statuses]: ...

class _OfProbability(Protocol):
    @overload
    def __call__(self, probability: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number, with_status: Literal[False] = ...) -> float: ...
    @overload
    def __call__(self, probability: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers, with_status: Literal[False] = ...) -> _Array: ...
    @overload
    def __call__(self, probability: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number, with_status: Literal[True]) -> tuple[float, int]: ...
    @overload
    def __call__(self, probability: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers, with_status: Literal[True]) -> tuple[_Array, _Statuses]: ...

class _OfLevel(Protocol):
    @overload
    def __call__(self, level: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number, with_status: Literal[False] = ...) -> float: ...
    @overload
    def __call__(self, level: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers, with_status: Literal[False] = ...) -> _Array: ...
    @overload
    def __call__(self, level: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number, with_status: Literal[True]) -> tuple[float, int]: ...
    @overload
    def __call__(self, level: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers, with_status: Literal[True]) -> tuple[_Array, _Statuses]: ...

class _OfTerminalLevel(Protocol):
    @overload
    def __call__(self, terminal: _Number, level: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number, with_status: Literal[False] = ...) -> float: ...
    @overload
    def __call__(self, terminal: _Numbers, level: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers, with_status: Literal[False] = ...) -> _Array: ...
    @overload
    def __call__(self, terminal: _Number, level: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number, with_status: Literal[True]) -> tuple[float, int]: ...
    @overload
    def __call__(self, terminal: _Numbers, level: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers, with_status: Literal[True]) -> tuple[_Array, _Statuses]: ...

class _OfLevelTime(Protocol):
    @overload
    def __call__(self, level: _Number, time: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number = ..., with_status: Literal[False] = ...) -> float: ...
    @overload
    def __call__(self, level: _Numbers, time: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers = ..., with_status: Literal[False] = ...) -> _Array: ...
    @overload
    def __call__(self, level: _Number, time: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number = ..., with_status: Literal[True]) -> tuple[float, int]: ...
    @overload
    def __call__(self, level: _Numbers, time: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers = ..., with_status: Literal[True]) -> tuple[_Array, _Statuses]: ...

class _OfLevelProbability(Protocol):
    @overload
    def __call__(self, level: _Number, probability: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number = ..., with_status: Literal[False] = ...) -> float: ...
    @overload
    def __call__(self, level: _Numbers, probability: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers = ..., with_status: Literal[False] = ...) -> _Array: ...
    @overload
    def __call__(self, level: _Number, probability: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number = ..., with_status: Literal[True]) -> tuple[float, int]: ...
    @overload
    def __call__(self, level: _Numbers, probability: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers = ..., with_status: Literal[True]) -> tuple[_Array, _Statuses]: ...

class _OfLevelDiscountRate(Protocol):
    @overload
    def __call__(self, level: _Number, discount_rate: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number, with_status: Literal[False] = ...) -> float: ...
    @overload
    def __call__(self, level: _Numbers, discount_rate: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers, with_status: Literal[False] = ...) -> _Array: ...
    @overload
    def __call__(self, level: _Number, discount_rate: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number, with_status: Literal[True]) -> tuple[float, int]: ...
    @overload
    def __call__(self, level: _Numbers, discount_rate: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers, with_status: Literal[True]) -> tuple[_Array, _Statuses]: ...

class _OfUniform(Protocol):
    @overload
    def __call__(self, uniform: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number, with_status: Literal[False] = ...) -> float: ...
    @overload
    def __call__(self, uniform: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers, with_status: Literal[False] = ...) -> _Array: ...
    @overload
    def __call__(self, uniform: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number, with_status: Literal[True]) -> tuple[float, int]: ...
    @overload
    def __call__(self, uniform: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers, with_status: Literal[True]) -> tuple[_Array, _Statuses]: ...

class _OfTerminalUniform(Protocol):
    @overload
    def __call__(self, terminal: _Number, uniform: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number, with_status: Literal[False] = ...) -> float: ...
    @overload
    def __call__(self, terminal: _Numbers, uniform: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers, with_status: Literal[False] = ...) -> _Array: ...
    @overload
    def __call__(self, terminal: _Number, uniform: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number, with_status: Literal[True]) -> tuple[float, int]: ...
    @overload
    def __call__(self, terminal: _Numbers, uniform: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers, with_status: Literal[True]) -> tuple[_Array, _Statuses]: ...

class _OfTerminalOtherDrift(Protocol):
    @overload
    def __call__(self, terminal: _Number, other_drift: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number, with_status: Literal[False] = ...) -> float: ...
    @overload
    def __call__(self, terminal: _Numbers, other_drift: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers, with_status: Literal[False] = ...) -> _Array: ...
    @overload
    def __call__(self, terminal: _Number, other_drift: _Number, *, drift: _Number = ..., vol: _Number, horizon: _Number, with_status: Literal[True]) -> tuple[float, int]: ...
    @overload
    def __call__(self, terminal: _Numbers, other_drift: _Numbers, *, drift: _Numbers = ..., vol: _Numbers, horizon: _Numbers, with_status: Literal[True]) -> tuple[_Array, _Statuses]: ...

terminal_pdf: _OfTerminal
terminal_cdf: _OfTerminal
terminal_quantile: _OfProbability
max_quantile: _OfProbability
min_quantile: _OfProbability
max_pdf: _OfLevel
max_cdf: _OfLevel
max_tail: _OfLevel
min_pdf: _OfLevel
min_cdf: _OfLevel
min_tail: _OfLevel
survival: _OfLevel
joint_max_cdf: _OfTerminalLevel
joint_max_pdf: _OfTerminalLevel
joint_min_cdf: _OfTerminalLevel
joint_min_pdf: _OfTerminalLevel
bridge_crossing: _OfTerminalLevel
first_passage_pdf: _OfLevelTime
first_passage_cdf: _OfLevelTime
first_passage_quantile: _OfLevelProbability
discounted_first_passage: _OfLevelDiscountRate
sample_terminal: _OfUniform
sample_max: _OfTerminalUniform
sample_min: _OfTerminalUniform
drift_weight: _OfTerminalOtherDrift

# What the array shell asks.

def contract_columns(
    question: str,
    rows: int,
    contract: np.ndarray[Any, np.dtype[np.uint8]],
    rebate_paid: np.ndarray[Any, np.dtype[np.uint8]],
    numbers: Sequence[_Array],
) -> tuple[list[_Array], _Statuses, int]: ...
def contract_row(question: str, contract: str, rebate_paid: str | None, numbers: Sequence[float]) -> Any: ...
def law_columns(quantity: str, rows: int, numbers: Sequence[_Array]) -> tuple[_Array, _Statuses, int]: ...
def law_row(quantity: str, numbers: Sequence[float]) -> float: ...
def special_column(function: str, x: _Array) -> _Array: ...
