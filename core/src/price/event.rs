//! A payoff that is paid always, only if the barrier was touched, or only if it was not.
//!
//! On paper, with `f` the payoff cut to the live side of the barrier (the spot's) or to the side beyond it, and
//! the image of a claim its reflection at the barrier:
//!
//! ```text
//! untouched = live - image(live),   touched = beyond + image(live)
//! ```
//!
//! so that the touched event is computed directly, from two positive claims, and not as a difference.

use crate::price::sensitivity::Sensitivity;
use crate::price::setting::Setting;
use crate::price::strip::{End, Level, Line, Strip};
use crate::terms::{Direction, Payoff};

/// Strike and barrier of one contract, and the side that the barrier is on.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Levels {
    pub(crate) direction: Direction,
    pub(crate) strike: f64,
    pub(crate) barrier: f64,
}

/// Which part of the payoff a strip covers.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum Side {
    Below,
    Above,
}

/// A strip by what its ends are.
type Ends = (Option<Level>, Option<Level>);

/// The line that a payoff is, where it pays.
fn line(payoff: Payoff, strike: f64) -> Line {
    let (shares, cash, cash_strike) = match payoff {
        Payoff::Call => (1.0, strike, 1.0),
        Payoff::Put => (-1.0, -strike, -1.0),
        Payoff::CashCall | Payoff::CashPut | Payoff::Cash => (0.0, -1.0, 0.0),
        Payoff::AssetCall | Payoff::AssetPut | Payoff::Asset => (1.0, 0.0, 0.0),
    };
    Line { shares, cash, cash_strike }
}

/// Where a payoff pays.
fn everywhere(payoff: Payoff) -> Ends {
    match payoff {
        Payoff::Call | Payoff::CashCall | Payoff::AssetCall => (Some(Level::Strike), None),
        Payoff::Put | Payoff::CashPut | Payoff::AssetPut => (None, Some(Level::Strike)),
        Payoff::Cash | Payoff::Asset => (None, None),
    }
}

impl Levels {
    /// Where a payoff pays on one side of the barrier, if anywhere.
    fn cut(&self, payoff: Payoff, side: Side) -> Option<Ends> {
        let ends = everywhere(payoff);
        let strike_below = self.strike < self.barrier;
        match (ends, side) {
            ((Some(_), _), Side::Below) => strike_below.then_some((Some(Level::Strike), Some(Level::Barrier))),
            ((Some(_), _), Side::Above) => {
                Some((Some(if strike_below { Level::Barrier } else { Level::Strike }), None))
            }
            ((_, Some(_)), Side::Below) => {
                Some((None, Some(if strike_below { Level::Strike } else { Level::Barrier })))
            }
            ((_, Some(_)), Side::Above) => (!strike_below).then_some((Some(Level::Barrier), Some(Level::Strike))),
            ((None, None), Side::Below) => Some((None, Some(Level::Barrier))),
            ((None, None), Side::Above) => Some((Some(Level::Barrier), None)),
        }
    }

    const fn live(&self) -> Side {
        match self.direction {
            Direction::Up => Side::Below,
            Direction::Down => Side::Above,
        }
    }

    const fn beyond(&self) -> Side {
        match self.direction {
            Direction::Up => Side::Above,
            Direction::Down => Side::Below,
        }
    }

    const fn at(&self, level: Level) -> f64 {
        match level {
            Level::Strike => self.strike,
            Level::Barrier => self.barrier,
        }
    }

    /// The payoff in the law of the spot.
    fn plain(&self, setting: &Setting, payoff: Payoff, ends: Ends) -> Strip {
        // A forward on the strike is half in the money, the limit of small volatility; on the barrier it touches.
        let tie = |level: Level| match (level, self.direction) {
            (Level::Strike, _) => 0.5,
            (Level::Barrier, Direction::Up) => 1.0,
            (Level::Barrier, Direction::Down) => 0.0,
        };
        let end = |level: Level| End::plain(setting, level, self.at(level), tie(level));
        Strip { line: line(payoff, self.strike), lower: ends.0.map(end), upper: ends.1.map(end) }
    }

    /// The payoff in the image law; none without volatility, as the spot then never returns from the barrier.
    fn image(&self, setting: &Setting, payoff: Payoff) -> Option<Strip> {
        let ends = if setting.still { None } else { self.cut(payoff, self.live()) }?;
        let end = |level: Level| End::image(setting, self.barrier, level, self.at(level));
        Some(Strip { line: line(payoff, self.strike), lower: ends.0.map(end), upper: ends.1.map(end) })
    }

    fn plain_side(&self, setting: &Setting, payoff: Payoff, side: Side) -> Option<Strip> {
        self.cut(payoff, side).map(|ends| self.plain(setting, payoff, ends))
    }
}

/// When a payoff is paid.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum Event {
    Always,
    Touched,
    Untouched,
}

/// Value of a payoff under an event.
pub(crate) fn value(setting: &Setting, levels: &Levels, payoff: Payoff, event: Event) -> f64 {
    let worth = |strip: Option<Strip>| strip.map_or(0.0, |strip| strip.value(setting));
    match event {
        Event::Always => levels.plain(setting, payoff, everywhere(payoff)).value(setting),
        Event::Touched => {
            worth(levels.plain_side(setting, payoff, levels.beyond())) + worth(levels.image(setting, payoff))
        }
        Event::Untouched => {
            positive(worth(levels.plain_side(setting, payoff, levels.live())) - worth(levels.image(setting, payoff)))
        }
    }
}

/// Value and derivatives of a payoff under an event.
pub(crate) fn sensitivity(setting: &Setting, levels: &Levels, payoff: Payoff, event: Event) -> Sensitivity {
    let plain = |side| {
        levels.plain_side(setting, payoff, side).map_or(Sensitivity::default(), |strip| strip.sensitivity(setting))
    };
    let image = || {
        levels
            .image(setting, payoff)
            .map_or(Sensitivity::default(), |strip| strip.sensitivity(setting).reflected(setting, levels.barrier))
    };
    match event {
        Event::Always => levels.plain(setting, payoff, everywhere(payoff)).sensitivity(setting),
        Event::Touched => plain(levels.beyond()) + image(),
        Event::Untouched => {
            let sum = plain(levels.live()) + image() * -1.0;
            Sensitivity { value: positive(sum.value), ..sum }
        }
    }
}

/// Rounding may leave a vanishing knock-out just below nothing.
fn positive(value: f64) -> f64 {
    if value < 0.0 { 0.0 } else { value }
}
