//! Random numbers that are the same on every machine and in every year.

use floodmark::special::{exp, ln};

/// A sequence fixed by a name.
pub(super) struct Random(u64);

impl Random {
    /// The sequence of this name.
    pub(super) fn named(name: &str) -> Random {
        Random(name.bytes().fold(0xcbf29ce484222325, |hash, byte| (hash ^ u64::from(byte)).wrapping_mul(0x100000001b3)))
    }

    /// 64 random bits: Steele, Lea and Flood, Fast splittable pseudorandom number generators, 2014 (from memory).
    fn bits(&mut self) -> u64 {
        self.0 = self.0.wrapping_add(0x9e3779b97f4a7c15);
        let mixed = (self.0 ^ (self.0 >> 30)).wrapping_mul(0xbf58476d1ce4e5b9);
        let mixed = (mixed ^ (mixed >> 27)).wrapping_mul(0x94d049bb133111eb);
        mixed ^ (mixed >> 31)
    }

    /// At least 0, less than 1.
    #[allow(clippy::cast_precision_loss)]
    pub(super) fn unit(&mut self) -> f64 {
        (self.bits() >> 11) as f64 / 9007199254740992.0
    }

    /// Evenly between two numbers.
    pub(super) fn between(&mut self, low: f64, high: f64) -> f64 {
        low + (high - low) * self.unit()
    }

    /// Between two positive numbers, evenly in the logarithm.
    pub(super) fn scale(&mut self, low: f64, high: f64) -> f64 {
        exp(self.between(ln(low), ln(high)))
    }

    /// Whether a thing happens that does so with this probability.
    pub(super) fn chance(&mut self, probability: f64) -> bool {
        self.unit() < probability
    }

    /// A whole number below this one.
    #[allow(clippy::cast_possible_truncation)]
    pub(super) fn below(&mut self, count: u8) -> u8 {
        (self.bits() % u64::from(count)) as u8
    }

    /// 1 or -1.
    pub(super) fn sign(&mut self) -> f64 {
        if self.chance(0.5) { 1.0 } else { -1.0 }
    }
}
