//! Results that must have the same bits in this program and in any other: the test compiles this file too.

use floodmark::batch::law_value;
use floodmark::brownian::Quantity;
use floodmark::price::greeks;
use floodmark::special::{exp, expm1, ln, log1p, mills_ratio, normal_cdf, normal_log_tail, normal_quantile};
use floodmark::terms::{Contract, Market, RebatePaid, TermSheet};

/// Hands out the bits of the Greeks of every contract in two markets, of every quantity of the law, and of the
/// special functions on a grid.
pub(crate) fn values(keep: &mut dyn FnMut(u64)) {
    let markets = [
        Market { spot: 100.0, vol: 0.25, rate: 0.08, dividend: 0.04 },
        Market { spot: 101.5, vol: 0.05, rate: -0.03, dividend: -0.029 },
    ];
    for market in markets {
        for code in 0..Contract::COUNT {
            let Ok(contract) = Contract::from_code(code) else { continue };
            for barrier in [95.0, 112.5] {
                let sheet = TermSheet::new(contract, 0.5)
                    .strike(100.0)
                    .barrier(barrier)
                    .rebate(3.0, RebatePaid::natural(contract));
                match greeks(&sheet, &market) {
                    Ok(found) => found.to_array().into_iter().for_each(|number| keep(number.to_bits())),
                    Err(error) => keep(u64::from(error.status.code().unsigned_abs())),
                }
            }
        }
    }
    for quantity in Quantity::ALL {
        for (first, second) in [(0.1, 0.3), (0.25, 0.75), (0.9, 0.0), (-0.2, 0.5)] {
            match law_value(quantity, 0.05, 0.2, 1.5, first, second) {
                Ok(number) => keep(number.to_bits()),
                Err(error) => keep(u64::from(error.status.code().unsigned_abs())),
            }
        }
    }
    let functions = [exp, expm1, ln, log1p, mills_ratio, normal_cdf, normal_log_tail, normal_quantile];
    for step in -40..40 {
        for function in functions {
            keep(function(f64::from(step) * 0.173).to_bits());
        }
    }
}
