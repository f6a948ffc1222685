//! The C door: plain numbers in, numbers out, a status from every function.
//!
//! This crate translates and never computes; `include/floodmark.h` is made from it by `tests/tests/header.rs`.
//! The documentation of each item is written for the reader of that header.

// A C header has no markdown to mark code with.
#![allow(clippy::doc_markdown)]

// In the order that the header has: rustfmt sorts what stands together.
pub mod text;

pub mod contract;

pub mod column;

pub mod book;

pub mod exactness;

pub mod law;

mod border;
