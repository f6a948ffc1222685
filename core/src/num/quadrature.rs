//! Quadrature of a smooth integrand whose finest scales lie at the ends of its interval.

use crate::num::Real;

/// Visits the nodes and weights of a composite Gauss-Legendre rule from `from` to `to`.
///
/// Panels start with width `finest` at either end and double inwards, never wider than `widest`: an integrand
/// that decays, grows or vanishes exponentially fast from an end is met at its own scale there.
pub(crate) fn integrate<R: Real>(from: R, to: R, finest: f64, widest: f64, mut visit: impl FnMut(R, R)) {
    let length = (to - from).nearest();
    // Even a scale that underflows must not make the number of panels boundless.
    let finest = finest.max(1e-9 * length);
    let mut done = 0.0;
    let mut left = from;
    while done < length {
        let rest = length - done;
        let width = widest.min(finest.max(done)).min(finest.max(0.5 * rest));
        let last = rest <= 1.01 * width;
        let right = if last { to } else { from + R::of(done + width) };
        let half = (right - left).times(0.5);
        let middle = (right + left).times(0.5);
        R::each_node(|node, weight| visit(middle + half * node, half * weight));
        done = if last { length } else { done + width };
        left = right;
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::num::DoubleDouble;

    fn exponential_integral<R: Real>(rate: f64, exp: impl Fn(R) -> R) -> R {
        let mut sum = R::of(0.0);
        integrate(R::of(0.0), R::of(8.0), 4.0 / rate, 1.0, |node, weight| {
            sum = sum + weight * exp(node.times(-rate));
        });
        sum.times(rate)
    }

    #[test]
    fn a_fast_decay_is_met_at_its_own_scale() {
        for rate in [1.0, 10.0, 1e3, 1e6, 1e9] {
            let sum: f64 = exponential_integral(rate, libm::exp);
            assert!((sum + libm::exp(-8.0 * rate) - 1.0).abs() < 1e-14, "{rate}: {sum}");
        }
    }

    #[test]
    fn both_precisions_agree() {
        let fine = exponential_integral(10.0, |x: DoubleDouble| DoubleDouble::of(libm::exp(x.nearest())));
        assert!((fine.nearest() - 1.0).abs() < 1e-14);
    }
}
