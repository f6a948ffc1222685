"""The package as a whole: names, results, tables from data frames, threads, examples in its documentation."""

import ast
import doctest
import inspect
import pickle
import re
import signal
import threading
import time
from importlib import metadata
from pathlib import Path
from typing import Any

import numpy as np
import pandas as pd
import pytest

import floodmark
from floodmark import _native, brownian, special
from strategies import GOOD, bits

ROOT = Path(__file__).parent.parent.parent


def test_version_is_that_of_the_workspace() -> None:
    package = (ROOT / "Cargo.toml").read_text().split("[workspace.package]")[1]
    assert f'\nversion = "{floodmark.__version__}"\n' in package
    assert metadata.version("floodmark") == floodmark.__version__


def test_greeks_have_the_names_and_the_order_of_the_core() -> None:
    assert floodmark.Greeks._fields == _native.GREEKS


def test_results_are_known_by_name_place_and_attribute() -> None:
    for function in (floodmark.greeks, floodmark.barrier_profile):
        answer = function("up-and-out call", **GOOD)
        for place, name in enumerate(answer._fields):
            assert answer[name] == answer[place] == getattr(answer, name)
        assert answer[1:3] == tuple(answer)[1:3]
        assert pickle.loads(pickle.dumps(answer)) == answer
        with pytest.raises(KeyError, match="speed"):
            answer["speed"]
        with pytest.raises(KeyError, match="count"):
            answer["count"]


@pytest.mark.parametrize("name", brownian.__all__)
def test_a_function_of_the_law_has_the_arguments_of_the_core(name: str) -> None:
    parameters = inspect.signature(getattr(brownian, name)).parameters
    by_place = [key for key, parameter in parameters.items() if parameter.kind is not parameter.KEYWORD_ONLY]
    by_name = [key for key in parameters if key not in by_place]
    assert by_name == ["drift", "vol", "horizon", "with_status"]
    with pytest.raises(ValueError) as raised:
        getattr(brownian, name)(*[float("nan")] * len(by_place), vol=1.0, horizon=1.0)
    assert str(raised.value).startswith(by_place[0])
    if len(by_place) == 2:
        with pytest.raises(ValueError) as raised:
            getattr(brownian, name)(0.5, float("nan"), vol=1.0, horizon=1.0)
        assert str(raised.value).startswith(by_place[1])


def test_columns_of_a_data_frame_are_taken_as_they_are() -> None:
    frame = pd.DataFrame(
        {
            "contract": ["up-and-out call", "put", "down one-touch", "cash"],
            "spot": [105.0, 95.0, 100.0, 1.0],
            "strike": [100.0, 90.0, None, None],
            "barrier": [120.0, None, 80.0, None],
            "rebate": [3.0, 0.0, 10.0, 0.0],
            "rebate_paid": ["expiry", None, "", None],
            "expiry": [0.5, 1.0, 2.0, 1.0],
            "vol": [0.2, 0.3, 0.4, 0.5],
        }
    )
    expected = [
        floodmark.price("up-and-out call", **GOOD, rebate=3.0, rebate_paid="expiry"),
        floodmark.price("put", spot=95.0, strike=90.0, expiry=1.0, vol=0.3),
        floodmark.price("down one-touch", spot=100.0, barrier=80.0, rebate=10.0, expiry=2.0, vol=0.4),
        floodmark.price("cash", spot=1.0, expiry=1.0, vol=0.5),
    ]
    tables = [frame, frame.convert_dtypes(), frame.astype({"contract": "category"}), frame.astype(object)]
    for table in tables:
        found = floodmark.price(**{str(name): table[name] for name in table})
        assert (bits(found) == bits(expected)).all()


def test_texts_may_be_in_any_kind_of_array() -> None:
    contracts = ["up-and-out call", "up-and-in call", "call"]
    expected = floodmark.price(contracts, **GOOD)
    kinds: list[Any] = [
        tuple(contracts),
        np.array(contracts),
        np.array(contracts, dtype=object),
        np.array(contracts)[::-1][::-1],
        pd.Series(contracts),
    ]
    if hasattr(np.dtypes, "StringDType"):
        kinds.append(np.array(contracts, dtype=np.dtypes.StringDType()))
    for kind in kinds:
        assert (floodmark.price(kind, **GOOD) == expected).all()


def test_a_masked_number_is_a_bad_row() -> None:
    spot = np.ma.masked_array([105.0, 100.0], mask=[False, True])
    values, status = floodmark.price("call", **{**GOOD, "spot": spot}, with_status=True)
    assert status.tolist() == [0, 10]
    assert type(values) is np.ndarray


def test_many_threads_get_the_same_bits() -> None:
    spot = np.linspace(60.0, 119.0, 20_000)
    contract = np.array(floodmark.CONTRACTS)[np.arange(spot.size) % len(floodmark.CONTRACTS)]
    call = {"contract": contract, **GOOD, "spot": spot, "rebate": 2.0}
    expected = bits(floodmark.price(**call))
    found: list[Any] = []
    workers = [threading.Thread(target=lambda: found.append(floodmark.price(**call))) for _ in range(4)]
    for worker in workers:
        worker.start()
    for worker in workers:
        worker.join()
    assert len(found) == 4
    assert all((bits(one) == expected).all() for one in found)


def test_other_threads_run_while_a_column_is_valued() -> None:
    spot = np.linspace(60.0, 119.0, 4096)
    during = []
    at_work, done = threading.Event(), threading.Event()

    def watch() -> None:
        at_work.wait()
        while not done.is_set():
            during.append(None)
            done.wait(0.0005)

    watcher = threading.Thread(target=watch)
    watcher.start()
    at_work.set()
    # One part: the interpreter is let go of in the middle of a call or not at all.
    floodmark.reference_greeks("up-and-out call", **{**GOOD, "spot": spot})
    count = len(during)
    done.set()
    watcher.join()
    assert count > 20


def test_a_long_call_can_be_interrupted() -> None:
    spot = np.linspace(60.0, 119.0, 400_000)

    class Interrupt(Exception):
        pass

    def interrupt(*_: Any) -> None:
        raise Interrupt

    def value(spot: Any) -> float:
        """Values the rows and says how long that took."""
        begin = time.perf_counter()
        try:
            floodmark.reference_greeks("up-and-out call", **{**GOOD, "spot": spot})
        finally:
            seconds.append(time.perf_counter() - begin)
        return seconds[-1]

    seconds: list[float] = []
    whole = 100 * value(spot[::100])
    before = signal.signal(signal.SIGALRM, interrupt)
    try:
        signal.setitimer(signal.ITIMER_REAL, 0.05)
        with pytest.raises(Interrupt):
            value(spot)
    finally:
        signal.setitimer(signal.ITIMER_REAL, 0.0)
        signal.signal(signal.SIGALRM, before)
    assert seconds[-1] < whole / 4


PUBLIC = [
    *((floodmark.__name__, name, getattr(floodmark, name)) for name in floodmark.__all__),
    *((module.__name__, name, getattr(module, name)) for module in (brownian, special) for name in module.__all__),
]


@pytest.mark.parametrize(("module", "name", "item"), PUBLIC, ids=[f"{module}.{name}" for module, name, _ in PUBLIC])
def test_examples_say_what_is_so(module: str, name: str, item: Any) -> None:
    if name in ("__version__", "CONTRACTS"):
        return
    assert item.__doc__
    found = doctest.DocTestParser().get_doctest(item.__doc__, {"floodmark": floodmark}, f"{module}.{name}", None, None)
    runner = doctest.DocTestRunner(optionflags=doctest.NORMALIZE_WHITESPACE)
    runner.run(found)
    assert runner.failures == 0
    if callable(item) and not isinstance(item, type):
        assert found.examples, "every function has an example"


def test_every_example_of_the_package_itself_is_run() -> None:
    assert re.search(r"^>>> ", floodmark.__doc__ or "", re.MULTILINE)


def test_arguments_of_contract_functions_are_the_same_everywhere() -> None:
    expected = list(inspect.signature(floodmark.greeks).parameters.values())
    for function in (floodmark.barrier_profile, floodmark.reference_price, floodmark.reference_greeks):
        assert list(inspect.signature(function).parameters.values()) == expected
    assert list(inspect.signature(floodmark.price).parameters.values())[:-1] == expected


def test_every_default_in_the_stub_is_that_of_the_function() -> None:
    # The stub checker is lenient where signatures are overloaded.
    stub = ast.parse((Path(floodmark.__file__).parent / "_native.pyi").read_text())
    checked = 0
    for function in stub.body:
        if isinstance(function, ast.FunctionDef) and function.args.kwonlyargs:
            parameters = inspect.signature(getattr(_native, function.name)).parameters
            for argument, default in zip(function.args.kwonlyargs, function.args.kw_defaults, strict=True):
                if default is not None:
                    assert ast.literal_eval(default) == parameters[argument.arg].default, (function.name, argument.arg)
                    checked += 1
    assert checked > 100
