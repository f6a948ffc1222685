//! Nodes and weights of Gauss-Legendre quadrature.

/// The 16-point rule on (-1, 1), as (node, weight): exact for polynomials up to degree 31.
///
/// # Source
///
/// Roots of the Legendre polynomial by Newton's method in 50 digits, weights `2 / ((1 - x^2) P'(x)^2)`.
pub(crate) const GAUSS_LEGENDRE_16: [(f64, f64); 16] = [
    (-0.9894009349916499, 0.027152459411754096),
    (-0.9445750230732326, 0.062253523938647894),
    (-0.8656312023878318, 0.09515851168249279),
    (-0.755404408355003, 0.12462897125553388),
    (-0.6178762444026438, 0.14959598881657674),
    (-0.45801677765722737, 0.16915651939500254),
    (-0.2816035507792589, 0.18260341504492358),
    (-0.09501250983763744, 0.1894506104550685),
    (0.09501250983763744, 0.1894506104550685),
    (0.2816035507792589, 0.18260341504492358),
    (0.45801677765722737, 0.16915651939500254),
    (0.6178762444026438, 0.14959598881657674),
    (0.755404408355003, 0.12462897125553388),
    (0.8656312023878318, 0.09515851168249279),
    (0.9445750230732326, 0.062253523938647894),
    (0.9894009349916499, 0.027152459411754096),
];

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn even_powers_up_to_30_are_integrated_exactly() {
        for half in 0..=15 {
            let power = 2 * half;
            let sum: f64 =
                GAUSS_LEGENDRE_16.iter().map(|&(node, weight)| weight * libm::pow(node, f64::from(power))).sum();
            let exact = 2.0 / f64::from(power + 1);
            assert!((sum - exact).abs() < 1e-15, "power {power}: {sum} against {exact}");
        }
    }
}
