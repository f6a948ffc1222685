//! The law of Brownian motion with drift and of its extremes.
