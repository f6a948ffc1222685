//! A payoff that is paid always, only if the barrier was touched, or only if it was not.
//!
//! On paper, with `f` the payoff cut to the live side of the barrier (the spot's) or to the side beyond it, and
//! the image of a claim its reflection at the barrier:
//!
//! ```text
//! untouched = live - image(live),   touched = beyond + image(live)
//! ```
//!
//! so that the touched event is computed directly, from two positive claims, and not as a difference. The code
//! departs from it where the difference cancels: the untouched event is then one integral ([`positive`]).

use crate::price::positive;
use crate::price::sensitivity::Sensitivity;
use crate::price::setting::Setting;
use crate::price::strip::{End, Ends, Level, Line, Place, Strip, Sum};
use crate::special::Functions;
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

    /// Strike and barrier as places, each logarithm taken once; a payoff without a strike has none to take.
    fn places<R: Functions>(&self, setting: &Setting<R>, payoff: Payoff, event: Event) -> Places<R> {
        let zero = R::of(0.0);
        let barred = event != Event::Always;
        let way = |needed: bool, from: f64, to: f64| if needed { R::ln_ratio(from, to) } else { zero };
        Places {
            strike: Place {
                level: Level::Strike,
                at: self.strike,
                from_spot: way(payoff.has_strike(), setting.spot, self.strike),
                from_barrier: way(payoff.has_strike() && barred, self.barrier, self.strike),
            },
            barrier: Place {
                level: Level::Barrier,
                at: self.barrier,
                from_spot: way(barred, setting.spot, self.barrier),
                from_barrier: zero,
            },
        }
    }

    /// The strips that a payoff under an event is made of.
    pub(crate) fn claim<R: Functions>(&self, setting: &Setting<R>, payoff: Payoff, event: Event) -> Claim<R> {
        let places = self.places(setting, payoff, event);
        // A forward on the strike is half in the money, the limit of small volatility; on the barrier it touches.
        let tie = |level: Level| match (level, self.direction) {
            (Level::Strike, _) => 0.5,
            (Level::Barrier, Direction::Up) => 1.0,
            (Level::Barrier, Direction::Down) => 0.0,
        };
        let plain = |level: Level| End::plain(setting, places.at(level), tie(level));
        let image = |level: Level| End::image(setting, places.at(level), -places.barrier.from_spot);
        let line = line(payoff, self.strike);
        let live = self.cut(payoff, self.live());
        let ends = match event {
            Event::Always => Some(everywhere(payoff)),
            Event::Touched => self.cut(payoff, self.beyond()),
            Event::Untouched => live,
        };
        // Without volatility the spot never returns from the barrier, and there is no image.
        let mirrored = if setting.still || event == Event::Always { None } else { live };
        Claim {
            barrier: self.barrier,
            event,
            plain: ends.map(|ends| Strip::cut(line, ends, plain)),
            image: mirrored.map(|ends| Strip::cut(line, ends, image)),
        }
    }
}

/// Where the ends of strips can lie.
struct Places<R> {
    strike: Place<R>,
    barrier: Place<R>,
}

impl<R: Functions> Places<R> {
    fn at(&self, level: Level) -> Place<R> {
        match level {
            Level::Strike => self.strike,
            Level::Barrier => self.barrier,
        }
    }
}

/// When a payoff is paid.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum Event {
    Always,
    Touched,
    Untouched,
}

/// A payoff under an event, as strips: a plain one and the image of one, added or subtracted as the event has it.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Claim<R> {
    barrier: f64,
    event: Event,
    pub(crate) plain: Option<Strip<R>>,
    pub(crate) image: Option<Strip<R>>,
}

/// A value, and whether it is the integral of a positive integrand, since the difference of plain and image
/// cancels.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Worth<R> {
    pub(crate) value: R,
    pub(crate) integrated: bool,
}

impl<R: Functions> Claim<R> {
    pub(crate) fn worth(&self, setting: &Setting<R>) -> Worth<R> {
        let zero = R::of(0.0);
        if let (Event::Untouched, Some(live), Some(image)) = (self.event, &self.plain, &self.image) {
            let (plain, mirrored) = (live.closed(setting), image.closed(setting));
            let sum = Sum { value: plain.value - mirrored.value, terms: plain.terms + mirrored.terms };
            if sum.cancelled() {
                return Worth { value: positive::value(setting, live, Some(self.barrier)), integrated: true };
            }
            return Worth { value: sum.value, integrated: false };
        }
        let strip = |strip: &Option<Strip<R>>| strip.as_ref().map_or(zero, |strip| positive::worth(setting, strip));
        // Without volatility a strike at the forward leaves the rounding of a difference.
        Worth { value: (strip(&self.plain) + strip(&self.image)).larger(zero), integrated: false }
    }

    pub(crate) fn sensitivity(&self, setting: &Setting<R>) -> Sensitivity<R> {
        let of = |strip: &Strip<R>| strip.sensitivity(setting);
        let plain = self.plain.as_ref().map_or_else(Sensitivity::none, of);
        let image =
            self.image.as_ref().map_or_else(Sensitivity::none, |image| of(image).reflected(setting, self.barrier));
        let sum = if self.event == Event::Untouched { plain - image } else { plain + image };
        // The density at the strike can vanish by itself, with the value of a digital far from vanishing.
        let strike = Sum { value: sum.strike, terms: plain.strike.magnitude() + image.strike.magnitude() };
        let delicate = sum.delicate || self.delicate(setting) || strike.delicate();
        Sensitivity { value: self.worth(setting).value, delicate, ..sum }
    }

    /// Whether the derivatives lose digits that the strips' own do not: where a plain strip and its image cancel, or
    /// where the value that an image's power multiplies is itself what is left of a difference.
    fn delicate(&self, setting: &Setting<R>) -> bool {
        let Some(image) = &self.image else { return false };
        let mirrored = image.closed(setting);
        match (self.event, &self.plain) {
            (Event::Untouched, Some(live)) => {
                let plain = live.closed(setting);
                let alike = Sum { value: plain.value - mirrored.value, terms: plain.value + mirrored.value };
                // What share and cash leave of each other weighs half as much.
                let small = Sum { value: alike.value.times(2.0), terms: plain.terms + mirrored.terms };
                alike.delicate() || small.delicate()
            }
            _ => mirrored.delicate(),
        }
    }
}
