//! Questions about contracts: a call of plain numbers is answered here, any other in `floodmark._arrays`.

use floodmark::terms::{Contract, Market, RebatePaid, TermSheet};
use floodmark::{Error, Status};
use pyo3::IntoPyObjectExt;
use pyo3::prelude::*;
use pyo3::types::{PyString, PyTuple};

use crate::number::Number;
use crate::question::{Question, WIDEST};
use crate::sentence::{refusal, unknown_text};
use crate::shell;

/// Why a single contract was refused.
enum Refusal<'a, 'py> {
    Number(Error),
    Text(Status, &'a Bound<'py, PyString>),
}

impl Refusal<'_, '_> {
    fn status(&self) -> Status {
        match self {
            Refusal::Number(error) => error.status,
            Refusal::Text(status, _) => *status,
        }
    }

    fn raised(&self) -> PyErr {
        match self {
            Refusal::Number(error) => refusal(*error),
            Refusal::Text(status, text) => unknown_text(*status, text),
        }
    }
}

/// Answers a question about one row of a book, or raises what is wrong with it.
#[pyfunction]
pub(crate) fn contract_row<'py>(
    py: Python<'py>,
    question: Question,
    contract: &Bound<'py, PyAny>,
    rebate_paid: Option<&Bound<'py, PyAny>>,
    numbers: [f64; 8],
) -> PyResult<Bound<'py, PyAny>> {
    ask(py, question, contract, rebate_paid, numbers.map(Number::Plain), false)
}

/// Answers a question. `numbers` are spot, strike, barrier, rebate, expiry, vol, rate, dividend.
fn ask<'py>(
    py: Python<'py>,
    question: Question,
    contract: &Bound<'py, PyAny>,
    rebate_paid: Option<&Bound<'py, PyAny>>,
    numbers: [Number<'_, 'py>; 8],
    with_status: bool,
) -> PyResult<Bound<'py, PyAny>> {
    let texts = contract.cast::<PyString>().ok().zip(match rebate_paid {
        None => Some(None),
        Some(given) => given.cast::<PyString>().ok().map(Some),
    });
    let Some(((contract, rebate_paid), numbers)) = texts.zip(plain(&numbers)) else {
        let mut objects = Vec::with_capacity(numbers.len());
        for number in &numbers {
            objects.push(number.object(py)?);
        }
        let objects = PyTuple::new(py, objects)?;
        return shell::arrays(py, "contracts", (question.name(), contract, rebate_paid, objects, with_status));
    };
    let outcome = one(question, contract, rebate_paid, numbers);
    if !with_status {
        return answer(py, question, outcome.map_err(|refusal| refusal.raised())?);
    }
    let (found, status) = match outcome {
        Ok(found) => (found, Status::Ok),
        Err(refusal) => ([f64::NAN; WIDEST], refusal.status()),
    };
    let status = status.code();
    match question {
        Question::BoundedPrice => (found[0], found[1], status).into_bound_py_any(py),
        _ => (answer(py, question, found)?, status).into_bound_py_any(py),
    }
}

/// The numbers, if all are plain; strike and barrier may be absent.
fn plain(numbers: &[Number<'_, '_>; 8]) -> Option<[f64; 8]> {
    let [spot, strike, barrier, rebate, expiry, vol, rate, dividend] = numbers;
    Some([
        spot.plain()?,
        strike.plain_or_absent()?,
        barrier.plain_or_absent()?,
        rebate.plain()?,
        expiry.plain()?,
        vol.plain()?,
        rate.plain()?,
        dividend.plain()?,
    ])
}

/// The core's answer for one contract.
fn one<'a, 'py>(
    question: Question,
    contract: &'a Bound<'py, PyString>,
    rebate_paid: Option<&'a Bound<'py, PyString>>,
    numbers: [f64; 8],
) -> Result<[f64; WIDEST], Refusal<'a, 'py>> {
    let [spot, strike, barrier, rebate, expiry, vol, rate, dividend] = numbers;
    let text = contract.to_str().unwrap_or_default();
    let contract = Contract::parse(text).ok_or(Refusal::Text(Status::Contract, contract))?;
    let rebate_paid = match rebate_paid {
        None => RebatePaid::natural(contract),
        Some(paid) => match paid.to_str().unwrap_or("?") {
            "" => RebatePaid::natural(contract),
            text => RebatePaid::parse(text).ok_or(Refusal::Text(Status::RebatePaid, paid))?,
        },
    };
    let sheet = TermSheet { contract, strike, barrier, rebate, rebate_paid, expiry };
    question.answer(&sheet, &Market { spot, vol, rate, dividend }).map_err(Refusal::Number)
}

/// The numbers as Python has them.
fn answer(py: Python<'_>, question: Question, numbers: [f64; WIDEST]) -> PyResult<Bound<'_, PyAny>> {
    match question {
        Question::Price | Question::ReferencePrice => numbers[0].into_bound_py_any(py),
        Question::BoundedPrice => (numbers[0], numbers[1]).into_bound_py_any(py),
        Question::BarrierProfile => shell::barrier_profile(py)?.call1((numbers[0], numbers[1], numbers[2])),
        Question::Greeks | Question::ReferenceGreeks => shell::greeks(py)?.call1(PyTuple::new(py, numbers)?),
    }
}

/// A function of Python that asks one question.
macro_rules! contract_function {
    ($(#[$documentation:meta])* $name:ident, $signature:literal, $question:expr $(, $flag:ident)?) => {
        $(#[$documentation])*
        #[pyfunction]
        #[pyo3(
            signature = (
                contract, *, spot, strike = Number::Absent, barrier = Number::Absent, expiry, vol,
                rate = Number::Plain(0.0), dividend = Number::Plain(0.0), rebate = Number::Plain(0.0),
                rebate_paid = None, with_status = false $(, $flag = false)?
            ),
            text_signature = $signature
        )]
        pub(crate) fn $name<'py>(
            py: Python<'py>,
            contract: &Bound<'py, PyAny>,
            spot: Number<'_, 'py>,
            strike: Number<'_, 'py>,
            barrier: Number<'_, 'py>,
            expiry: Number<'_, 'py>,
            vol: Number<'_, 'py>,
            rate: Number<'_, 'py>,
            dividend: Number<'_, 'py>,
            rebate: Number<'_, 'py>,
            rebate_paid: Option<&Bound<'py, PyAny>>,
            with_status: bool,
            $($flag: bool,)?
        ) -> PyResult<Bound<'py, PyAny>> {
            let numbers = [spot, strike, barrier, rebate, expiry, vol, rate, dividend];
            ask(py, $question, contract, rebate_paid, numbers, with_status)
        }
    };
}

contract_function! {
    /// What is a contract worth now?
    ///
    /// The expectation of what it pays, discounted at `rate`, under dX = (rate - dividend) X dt + vol X dW, the
    /// barrier watched continuously. Every argument may be an array; they broadcast as NumPy's do. Plain numbers give
    /// a `float`, arrays an array of float64.
    ///
    /// contract: "call", "put", "cash call", "cash put", "asset call", "asset put", "cash", "asset", or one of these
    /// after "up-and-out ", "up-and-in ", "down-and-out ", "down-and-in "; "up one-touch", "down one-touch",
    /// "up no-touch", "down no-touch" (see `floodmark.CONTRACTS`).
    /// spot, strike, barrier: positive and finite; a strike or barrier that the contract does not have is ignored.
    /// expiry: years, 0 to 10000. vol: per square root of a year, 0 to 1000.
    /// rate, dividend: per year, continuously compounded, -1000 to 1000.
    /// rebate: of a knock contract, or the amount of a touch; finite and at least 0.
    /// rebate_paid: "hit" (knock-outs and one-touches only), "expiry", or None: hit where that is possible.
    /// with_status: do not raise for values out of their domain; return NaN for them, and with the result the
    /// statuses (int32, 0 where all is well; see `floodmark.status_text`).
    /// error_bound: return also how far the value can be from that of the exact inputs.
    ///
    /// Raises ValueError with a sentence that names argument, value and, for arrays, the first such row; TypeError
    /// for what is no number or text.
    ///
    /// >>> import floodmark
    /// >>> value = floodmark.price("up-and-out call", spot=105.0, strike=100.0, barrier=120.0, expiry=0.5, vol=0.2)
    /// >>> round(value, 12)
    /// 2.106375455693
    price,
    "(contract, *, spot, strike=None, barrier=None, expiry, vol, rate=0.0, dividend=0.0, rebate=0.0, \
      rebate_paid=None, with_status=False, error_bound=False)",
    if error_bound { Question::BoundedPrice } else { Question::Price },
    error_bound
}

contract_function! {
    /// What is a contract worth now, and how does that change with each input?
    ///
    /// Arguments and errors as `floodmark.price`. Returns `floodmark.Greeks`, analytic derivatives in one pass with
    /// the value: per 1.00 of spot, vol, rate, dividend, per year of time; theta and charm run with the calendar.
    ///
    /// >>> import floodmark
    /// >>> risk = floodmark.greeks("call", spot=100.0, strike=100.0, expiry=1.0, vol=0.2)
    /// >>> risk.delta == risk["delta"]
    /// True
    /// >>> round(risk.vega, 6)
    /// 39.695255
    greeks,
    "(contract, *, spot, strike=None, barrier=None, expiry, vol, rate=0.0, dividend=0.0, rebate=0.0, \
      rebate_paid=None, with_status=False)",
    Question::Greeks
}

contract_function! {
    /// How likely is the barrier touched, how far is it, and what is at stake there?
    ///
    /// Arguments and errors as `floodmark.price`. Returns `floodmark.BarrierProfile`.
    ///
    /// >>> import floodmark
    /// >>> floodmark.barrier_profile("down one-touch", spot=100.0, barrier=90.0, rebate=5.0, expiry=0.0, vol=0.2)
    /// BarrierProfile(touch_probability=0.0, distance=inf, gap=5.0)
    barrier_profile,
    "(contract, *, spot, strike=None, barrier=None, expiry, vol, rate=0.0, dividend=0.0, rebate=0.0, \
      rebate_paid=None, with_status=False)",
    Question::BarrierProfile
}

contract_function! {
    /// What is a contract worth now, correct to the last place: the slow path, for audits and tests.
    ///
    /// Arguments and errors as `floodmark.price`.
    ///
    /// >>> import floodmark
    /// >>> terms = {"spot": 105.0, "strike": 100.0, "barrier": 120.0, "expiry": 0.5, "vol": 0.2}
    /// >>> value, bound = floodmark.price("up-and-out call", **terms, error_bound=True)
    /// >>> abs(value - floodmark.reference_price("up-and-out call", **terms)) <= bound
    /// True
    reference_price,
    "(contract, *, spot, strike=None, barrier=None, expiry, vol, rate=0.0, dividend=0.0, rebate=0.0, \
      rebate_paid=None, with_status=False)",
    Question::ReferencePrice
}

contract_function! {
    /// What is a contract worth now and how does that change with each input, by the slow path.
    ///
    /// Arguments and errors as `floodmark.price`, result as `floodmark.greeks`.
    ///
    /// >>> import floodmark
    /// >>> risk = floodmark.reference_greeks("put", spot=100.0, strike=100.0, expiry=1.0, vol=0.2)
    /// >>> round(risk.gamma, 6)
    /// 0.019848
    reference_greeks,
    "(contract, *, spot, strike=None, barrier=None, expiry, vol, rate=0.0, dividend=0.0, rebate=0.0, \
      rebate_paid=None, with_status=False)",
    Question::ReferenceGreeks
}
