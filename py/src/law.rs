//! Questions about the law of Brownian motion: plain numbers are answered here, others in `floodmark._arrays`.
#![allow(unsafe_code)]

use floodmark::Status;
use floodmark::batch::{self, LawColumns, Quantity};
use numpy::{PyArray1, PyReadonlyArray1};
use pyo3::IntoPyObjectExt;
use pyo3::exceptions::PyValueError;
use pyo3::prelude::*;
use pyo3::types::PyTuple;

use crate::column::{Results, Source, in_parts};
use crate::number::Number;
use crate::sentence::refusal;
use crate::shell;

/// A quantity of the law, which Python calls by its name.
#[derive(Clone, Copy)]
pub(crate) struct Named(Quantity);

impl<'py> FromPyObject<'_, 'py> for Named {
    type Error = PyErr;

    fn extract(given: Borrowed<'_, 'py, PyAny>) -> PyResult<Named> {
        let name: String = given.extract()?;
        let unknown = || PyValueError::new_err(format!("quantity '{name}' is not one that is known"));
        Quantity::ALL.into_iter().find(|quantity| quantity.name() == name).map(Named).ok_or_else(unknown)
    }
}

/// Answers a question in one row of columns, or raises what is wrong with it.
#[pyfunction]
pub(crate) fn law_row(py: Python<'_>, quantity: Named, numbers: [f64; 5]) -> PyResult<Bound<'_, PyAny>> {
    ask(py, quantity.0, numbers.map(Number::Plain), false)
}

/// Answers a question. `numbers` are drift, vol, horizon, first and second argument; where there is one argument
/// only, the second is any number.
fn ask<'py>(
    py: Python<'py>,
    quantity: Quantity,
    numbers: [Number<'_, 'py>; 5],
    with_status: bool,
) -> PyResult<Bound<'py, PyAny>> {
    let plain = numbers.each_ref().map(Number::plain);
    let [Some(drift), Some(vol), Some(horizon), Some(first), Some(second)] = plain else {
        let mut objects = Vec::with_capacity(numbers.len());
        for number in &numbers {
            objects.push(number.object(py)?);
        }
        let names = PyTuple::new(py, quantity.arguments())?;
        return shell::arrays(py, "law", (quantity.name(), names, PyTuple::new(py, objects)?, with_status));
    };
    match batch::law_value(quantity, drift, vol, horizon, first, second) {
        Ok(found) if with_status => (found, Status::Ok.code()).into_bound_py_any(py),
        Err(error) if with_status => (f64::NAN, error.status.code()).into_bound_py_any(py),
        outcome => outcome.map_err(refusal)?.into_bound_py_any(py),
    }
}

/// Results, statuses, and how many rows were refused.
type Answers<'py> = (Bound<'py, PyArray1<f64>>, Bound<'py, PyArray1<i32>>, usize);

/// Answers a question in every row. `numbers` as in [`ask`]; a column has `rows` elements, or one that stands in
/// every row.
#[pyfunction]
pub(crate) fn law_columns<'py>(
    py: Python<'py>,
    quantity: Named,
    rows: usize,
    numbers: [PyReadonlyArray1<'py, f64>; 5],
) -> PyResult<Answers<'py>> {
    let mut sources = Vec::with_capacity(numbers.len());
    for column in &numbers {
        sources.push(Source::of(column, rows)?);
    }
    let (result, statuses) = (Results::new(py, rows), Results::new(py, rows));
    let (target, status) = (result.target(), statuses.target());
    let refused = in_parts(py, rows, |start, rows| {
        // SAFETY: the arrays live in this call, `Source::of` counted their rows, and the results are known here only.
        unsafe {
            let number = |place: usize| sources[place].column(start, rows);
            let columns = LawColumns {
                rows,
                drift: number(0),
                vol: number(1),
                horizon: number(2),
                first: number(3),
                second: number(4),
            };
            batch::law(quantity.0, &columns, &mut target.column(start, rows), &mut status.column(start, rows))
        }
    })?;
    Ok((result.array, statuses.array, refused))
}

/// The functions as Python sees them.
macro_rules! functions {
    ($(
        $(#[$documentation:meta])*
        $name:ident($first:ident $(, $second:ident)?; horizon $(= $horizon:literal)?), $signature:literal, $quantity:ident;
    )*) => {
        $(
            $(#[$documentation])*
            #[pyfunction]
            #[pyo3(
                signature = (
                    $first, $($second,)? *, drift = Number::Plain(0.0), vol, horizon $(= Number::Plain($horizon))?,
                    with_status = false
                ),
                text_signature = $signature
            )]
            fn $name<'py>(
                py: Python<'py>,
                $first: Number<'_, 'py>,
                $($second: Number<'_, 'py>,)?
                drift: Number<'_, 'py>,
                vol: Number<'_, 'py>,
                horizon: Number<'_, 'py>,
                with_status: bool,
            ) -> PyResult<Bound<'py, PyAny>> {
                let arguments = [$first, $($second,)? Number::Plain(0.0)].into_iter();
                let [first, second] = two(arguments);
                ask(py, Quantity::$quantity, [drift, vol, horizon, first, second], with_status)
            }
        )*

        /// Adds the functions to the module.
        pub(crate) fn add(module: &Bound<'_, PyModule>) -> PyResult<()> {
            module.add_function(wrap_pyfunction!(law_row, module)?)?;
            module.add_function(wrap_pyfunction!(law_columns, module)?)?;
            $(module.add_function(wrap_pyfunction!($name, module)?)?;)*
            Ok(())
        }
    };
}

/// The first two.
fn two<'a, 'py>(mut numbers: impl Iterator<Item = Number<'a, 'py>>) -> [Number<'a, 'py>; 2] {
    std::array::from_fn(|_| numbers.next().unwrap_or(Number::Absent))
}

functions! {
    /// Density of the end W_T at `terminal`.
    ///
    /// >>> from floodmark.brownian import terminal_pdf
    /// >>> terminal_pdf(0.0, vol=1.0, horizon=1.0)
    /// 0.3989422804014327
    terminal_pdf(terminal; horizon),
    "(terminal, *, drift=0.0, vol, horizon, with_status=False)",
    TerminalPdf;
    /// Probability that the end is at most `terminal`.
    ///
    /// >>> from floodmark.brownian import terminal_cdf
    /// >>> round(terminal_cdf(0.4, drift=0.2, vol=0.2, horizon=2.0), 12)
    /// 0.5
    terminal_cdf(terminal; horizon),
    "(terminal, *, drift=0.0, vol, horizon, with_status=False)",
    TerminalCdf;
    /// The end that is not exceeded with `probability`; infinite at 0 and 1.
    ///
    /// >>> from floodmark.brownian import terminal_quantile
    /// >>> terminal_quantile(0.5, drift=0.25, vol=0.2, horizon=2.0)
    /// 0.5
    terminal_quantile(probability; horizon),
    "(probability, *, drift=0.0, vol, horizon, with_status=False)",
    TerminalQuantile;
    /// Density of the running maximum at `level`; 0 below 0.
    ///
    /// >>> from floodmark.brownian import max_pdf
    /// >>> max_pdf(-1.0, vol=0.2, horizon=2.0)
    /// 0.0
    max_pdf(level; horizon),
    "(level, *, drift=0.0, vol, horizon, with_status=False)",
    MaxPdf;
    /// Probability that the running maximum is at most `level`.
    ///
    /// >>> from floodmark.brownian import max_cdf
    /// >>> max_cdf([0.1, 0.2], vol=0.2, horizon=1.0).round(6)
    /// array([0.382925, 0.682689])
    max_cdf(level; horizon),
    "(level, *, drift=0.0, vol, horizon, with_status=False)",
    MaxCdf;
    /// Probability that the running maximum is at least `level`.
    ///
    /// >>> from floodmark.brownian import max_tail
    /// >>> max_tail([0.1, 0.2], vol=0.2, horizon=1.0).round(6)
    /// array([0.617075, 0.317311])
    max_tail(level; horizon),
    "(level, *, drift=0.0, vol, horizon, with_status=False)",
    MaxTail;
    /// The level that the running maximum does not exceed with `probability`.
    ///
    /// >>> from floodmark.brownian import max_quantile
    /// >>> round(max_quantile(0.682689, vol=0.2, horizon=1.0), 5)
    /// 0.2
    max_quantile(probability; horizon),
    "(probability, *, drift=0.0, vol, horizon, with_status=False)",
    MaxQuantile;
    /// Density of the running minimum at `level`; 0 above 0.
    ///
    /// >>> from floodmark.brownian import min_pdf
    /// >>> min_pdf(1.0, vol=0.2, horizon=2.0)
    /// 0.0
    min_pdf(level; horizon),
    "(level, *, drift=0.0, vol, horizon, with_status=False)",
    MinPdf;
    /// Probability that the running minimum is at most `level`.
    ///
    /// >>> from floodmark.brownian import min_cdf
    /// >>> round(min_cdf(-0.2, vol=0.2, horizon=1.0), 6)
    /// 0.317311
    min_cdf(level; horizon),
    "(level, *, drift=0.0, vol, horizon, with_status=False)",
    MinCdf;
    /// Probability that the running minimum stays at or above `level`.
    ///
    /// >>> from floodmark.brownian import min_tail
    /// >>> round(min_tail(-0.2, vol=0.2, horizon=1.0), 6)
    /// 0.682689
    min_tail(level; horizon),
    "(level, *, drift=0.0, vol, horizon, with_status=False)",
    MinTail;
    /// The level that the running minimum does not exceed with `probability`.
    ///
    /// >>> from floodmark.brownian import min_quantile
    /// >>> min_quantile(1.0, vol=0.2, horizon=1.0) == 0.0
    /// True
    min_quantile(probability; horizon),
    "(probability, *, drift=0.0, vol, horizon, with_status=False)",
    MinQuantile;
    /// Probability that the end is at most `terminal` and the running maximum at most `level`.
    ///
    /// >>> from floodmark.brownian import joint_max_cdf, max_cdf
    /// >>> joint_max_cdf(0.2, 0.2, vol=0.2, horizon=1.0) == max_cdf(0.2, vol=0.2, horizon=1.0)
    /// True
    joint_max_cdf(terminal, level; horizon),
    "(terminal, level, *, drift=0.0, vol, horizon, with_status=False)",
    JointMaxCdf;
    /// Joint density of the end at `terminal` and the running maximum at `level`.
    ///
    /// >>> from floodmark.brownian import joint_max_pdf
    /// >>> joint_max_pdf(0.3, 0.2, vol=0.2, horizon=1.0)
    /// 0.0
    joint_max_pdf(terminal, level; horizon),
    "(terminal, level, *, drift=0.0, vol, horizon, with_status=False)",
    JointMaxPdf;
    /// Probability that the end is at most `terminal` and the running minimum at most `level`.
    ///
    /// >>> from floodmark.brownian import joint_min_cdf
    /// >>> round(joint_min_cdf(5.0, -0.2, vol=0.2, horizon=1.0), 6)
    /// 0.317311
    joint_min_cdf(terminal, level; horizon),
    "(terminal, level, *, drift=0.0, vol, horizon, with_status=False)",
    JointMinCdf;
    /// Joint density of the end at `terminal` and the running minimum at `level`.
    ///
    /// >>> from floodmark.brownian import joint_min_pdf
    /// >>> joint_min_pdf(-0.3, -0.2, vol=0.2, horizon=1.0)
    /// 0.0
    joint_min_pdf(terminal, level; horizon),
    "(terminal, level, *, drift=0.0, vol, horizon, with_status=False)",
    JointMinPdf;
    /// Probability that `level` is not touched by the horizon: watched above the start if
    /// positive, below if negative; 0 at 0.
    ///
    /// >>> from floodmark.brownian import survival
    /// >>> survival([-0.2, 0.0, 0.2], vol=0.2, horizon=1.0).round(6)
    /// array([0.682689, 0.      , 0.682689])
    survival(level; horizon),
    "(level, *, drift=0.0, vol, horizon, with_status=False)",
    Survival;
    /// Density at `time` of the moment at which `level` is first touched.
    ///
    /// `level` is not 0; `horizon` plays no part.
    ///
    /// >>> from floodmark.brownian import first_passage_pdf
    /// >>> round(first_passage_pdf(0.2, 1.0, vol=0.2), 6)
    /// 0.241971
    first_passage_pdf(level, time; horizon = 1.0),
    "(level, time, *, drift=0.0, vol, horizon=1.0, with_status=False)",
    FirstPassagePdf;
    /// Probability that `level` is touched by `time`, which may be infinite.
    ///
    /// `horizon` plays no part.
    ///
    /// >>> from floodmark.brownian import first_passage_cdf
    /// >>> first_passage_cdf(0.2, [0.0, 1.0, float("inf")], vol=0.2).round(6)
    /// array([0.      , 0.317311, 1.      ])
    first_passage_cdf(level, time; horizon = 1.0),
    "(level, time, *, drift=0.0, vol, horizon=1.0, with_status=False)",
    FirstPassageCdf;
    /// The time by which `level` is touched with `probability`; infinite if that never comes.
    ///
    /// `horizon` plays no part.
    ///
    /// >>> from floodmark.brownian import first_passage_quantile
    /// >>> first_passage_quantile(0.2, 0.999, drift=-0.3, vol=0.2)
    /// inf
    first_passage_quantile(level, probability; horizon = 1.0),
    "(level, probability, *, drift=0.0, vol, horizon=1.0, with_status=False)",
    FirstPassageQuantile;
    /// What one unit paid at the moment of touching `level` is worth, E[exp(-discount_rate tau); tau <= horizon].
    ///
    /// Any sign of the rate.
    ///
    /// >>> from floodmark.brownian import discounted_first_passage
    /// >>> discounted_first_passage(0.0, 0.03, vol=0.2, horizon=1.0)
    /// 1.0
    discounted_first_passage(level, discount_rate; horizon),
    "(level, discount_rate, *, drift=0.0, vol, horizon, with_status=False)",
    DiscountedFirstPassage;
    /// Probability that `level` was touched on the way, given that the path ends at `terminal`.
    ///
    /// >>> from floodmark.brownian import bridge_crossing
    /// >>> bridge_crossing([0.0, 0.3], 0.2, vol=0.2, horizon=1.0).round(6)
    /// array([0.135335, 1.      ])
    bridge_crossing(terminal, level; horizon),
    "(terminal, level, *, drift=0.0, vol, horizon, with_status=False)",
    BridgeCrossing;
    /// An end, drawn by the inverse of its distribution from a number between 0 and 1.
    ///
    /// >>> from floodmark.brownian import sample_terminal
    /// >>> sample_terminal(0.5, drift=0.25, vol=0.2, horizon=2.0)
    /// 0.5
    sample_terminal(uniform; horizon),
    "(uniform, *, drift=0.0, vol, horizon, with_status=False)",
    SampleTerminal;
    /// The running maximum of a path that ends at `terminal`, drawn exactly from a number between 0 and 1.
    ///
    /// >>> from floodmark.brownian import sample_max
    /// >>> sample_max(0.1, [0.1, 0.9], vol=0.2, horizon=1.0) >= 0.1
    /// array([ True,  True])
    sample_max(terminal, uniform; horizon),
    "(terminal, uniform, *, drift=0.0, vol, horizon, with_status=False)",
    SampleMax;
    /// The running minimum of a path that ends at `terminal`, drawn exactly from a number between 0 and 1.
    ///
    /// >>> from floodmark.brownian import sample_min
    /// >>> sample_min(0.1, [0.1, 0.9], vol=0.2, horizon=1.0) <= 0.0
    /// array([ True,  True])
    sample_min(terminal, uniform; horizon),
    "(terminal, uniform, *, drift=0.0, vol, horizon, with_status=False)",
    SampleMin;
    /// The likelihood of paths that end at `terminal` under another drift, over that under this one.
    ///
    /// >>> from floodmark.brownian import drift_weight
    /// >>> drift_weight(0.1, 0.05, drift=0.05, vol=0.2, horizon=1.0)
    /// 1.0
    drift_weight(terminal, other_drift; horizon),
    "(terminal, other_drift, *, drift=0.0, vol, horizon, with_status=False)",
    DriftWeight;
}
