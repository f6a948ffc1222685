from typing import Generic, Literal, NamedTuple, SupportsIndex, TypeVar, overload

_T = TypeVar("_T")

class Greeks(NamedTuple, Generic[_T]):
    value: _T
    delta: _T
    gamma: _T
    vega: _T
    theta: _T
    rho: _T
    dividend_rho: _T
    vanna: _T
    volga: _T
    charm: _T
    barrier_delta: _T
    strike_delta: _T
    @overload
    def __getitem__(self, key: SupportsIndex | str) -> _T: ...
    @overload
    def __getitem__(self, key: slice) -> tuple[_T, ...]: ...

class BarrierProfile(NamedTuple, Generic[_T]):
    touch_probability: _T
    distance: _T
    gap: _T
    @overload
    def __getitem__(self, key: SupportsIndex | str) -> _T: ...
    @overload
    def __getitem__(self, key: slice) -> tuple[_T, ...]: ...

