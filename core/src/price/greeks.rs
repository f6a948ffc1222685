//! The value and its sensitivities.

/// Value and analytic sensitivities of one contract.
///
/// # Units
///
/// In the currency of the spot; per 1.00 of spot, volatility, rate and yield, per year of time.
/// `theta` and `charm` run with the calendar: they are minus the derivative in `expiry`.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Greeks {
    /// The value itself, bit for bit what [`crate::price::price`] returns.
    pub value: f64,
    /// dV / d spot
    pub delta: f64,
    /// d²V / d spot²
    pub gamma: f64,
    /// dV / d vol
    pub vega: f64,
    /// -dV / d expiry
    pub theta: f64,
    /// dV / d rate
    pub rho: f64,
    /// dV / d dividend
    pub dividend_rho: f64,
    /// d²V / d spot d vol
    pub vanna: f64,
    /// d²V / d vol²
    pub volga: f64,
    /// -d²V / d spot d expiry
    pub charm: f64,
    /// dV / d barrier
    pub barrier_delta: f64,
    /// dV / d strike
    pub strike_delta: f64,
}

impl Greeks {
    /// The names, in the order of [`Greeks::to_array`].
    pub const NAMES: [&'static str; 12] = [
        "value",
        "delta",
        "gamma",
        "vega",
        "theta",
        "rho",
        "dividend_rho",
        "vanna",
        "volga",
        "charm",
        "barrier_delta",
        "strike_delta",
    ];

    /// The numbers, in the order of [`Greeks::NAMES`].
    pub const fn to_array(self) -> [f64; 12] {
        [
            self.value,
            self.delta,
            self.gamma,
            self.vega,
            self.theta,
            self.rho,
            self.dividend_rho,
            self.vanna,
            self.volga,
            self.charm,
            self.barrier_delta,
            self.strike_delta,
        ]
    }
}
