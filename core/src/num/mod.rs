//! Arithmetic that knows nothing of functions or finance: the lane, the real number in two precisions,
//! polynomials, quadrature.

mod double_double;
mod gauss_legendre;
mod lane;
mod polynomial;
mod quadrature;
mod real;

pub(crate) use double_double::DoubleDouble;
pub(crate) use gauss_legendre::{GAUSS_LEGENDRE_16, GAUSS_LEGENDRE_32};
pub(crate) use lane::Lane;
pub(crate) use polynomial::{horner, horner_extended};
pub(crate) use quadrature::integrate;
pub(crate) use real::Real;
