//! Arithmetic that knows nothing of functions or finance: the lane, polynomials, quadrature nodes.

mod gauss_legendre;
mod lane;
mod polynomial;

pub(crate) use gauss_legendre::GAUSS_LEGENDRE_16;
pub(crate) use lane::Lane;
pub(crate) use polynomial::horner;
