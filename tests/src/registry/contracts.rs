//! Contracts and markets drawn from the regions of the domain of prices.

use floodmark::special::exp;
use floodmark::terms::{Contract, Direction, Market, RebatePaid, TermSheet};

use crate::registry::Region;
use crate::registry::random::Random;

pub(super) const EVERYDAY: Region = Region {
    name: "everyday",
    domain: "vol 5 … 100 %, expiry a day … 5 years, rates -5 … 10 %, barrier 0.1 … 50 % away, strike within 40 %",
};
pub(super) const BROAD: Region = Region {
    name: "broad",
    domain: "vol 1 … 200 %, expiry an hour … 30 years, rates -20 … 20 %, barrier 0.03 … 150 % away, strike within 100 %",
};
pub(super) const NEAR: Region = Region {
    name: "near barrier",
    domain: "contracts with a barrier; as broad, the barrier 1e-8 … 1e-2 standard deviations away, strike within 50 %",
};
pub(super) const CLOSING: Region = Region {
    name: "strike near barrier",
    domain: "contracts with barrier and strike; vol 10 … 200 %, expiry a day … 5 years, rates -20 … 20 %, barrier \
             0.01 … 3 standard deviations away, strike inside it by 1e-12 … 1e-2 of the way",
};
pub(super) const QUIET: Region = Region {
    name: "small total vol",
    domain: "total vol 1e-6 … 1e-2, barrier 0.01 … 6 standard deviations away, strike within 5 of the forward",
};
pub(super) const WILD: Region =
    Region { name: "huge total vol", domain: "total vol 3 … 30, barrier 0.1 … 150 % away, strike within 100 %" };
pub(super) const EXTREME: Region = Region {
    name: "extreme",
    domain: "spot 1e-12 … 1e12, vol 1e-6 … 10, expiry a second … 100 years, rates -100 … 100 %, barrier and strike 1e-12 … 10 away in the logarithm",
};

/// All of them.
pub(super) const REGIONS: &[Region] = &[EVERYDAY, BROAD, NEAR, CLOSING, QUIET, WILD, EXTREME];

/// Market, expiry, and the logarithms of strike and barrier over spot, the barrier's without its sign.
struct Draw {
    market: Market,
    expiry: f64,
    strike: f64,
    barrier: f64,
}

/// A contract of any kind in a region.
pub(super) fn contract(region: &Region, random: &mut Random) -> (TermSheet, Market) {
    let contract = kind(region, random);
    let side = if contract.direction() == Some(Direction::Down) { -1.0 } else { 1.0 };
    let Draw { market, expiry, strike, barrier } = draw(region, random, side);
    let rebate = if random.chance(0.5) { 0.0 } else { market.spot * random.between(0.0, 0.2) };
    let at_hit = contract.pays_at_hit() && random.chance(0.6);
    let paid = if at_hit { RebatePaid::Hit } else { RebatePaid::Expiry };
    let sheet = TermSheet::new(contract, expiry)
        .strike(market.spot * exp(strike))
        .barrier(market.spot * exp(side * barrier))
        .rebate(rebate, paid);
    (sheet, market)
}

/// A contract that has what the region speaks of.
fn kind(region: &Region, random: &mut Random) -> Contract {
    loop {
        let contract = Contract::from_code(random.below(Contract::COUNT)).expect("a code below the count");
        let barred = contract.direction().is_some();
        if !matches!(*region, NEAR | CLOSING) || (barred && (*region == NEAR || contract.has_strike())) {
            return contract;
        }
    }
}

fn draw(region: &Region, random: &mut Random, side: f64) -> Draw {
    let yields = |random: &mut Random, low, high| (random.between(low, high), random.between(low, high));
    let market = |spot, vol, (rate, dividend)| Market { spot, vol, rate, dividend };
    match *region {
        EVERYDAY => Draw {
            expiry: random.scale(1.0 / 365.0, 5.0),
            strike: random.between(-0.4, 0.4),
            barrier: random.scale(0.001, 0.5),
            market: market(random.scale(1.0, 1000.0), random.between(0.05, 1.0), yields(random, -0.05, 0.1)),
        },
        QUIET => {
            let expiry = random.scale(0.003, 5.0);
            let deviation = random.scale(1e-6, 1e-2);
            let (rate, dividend) = yields(random, -0.05, 0.05);
            Draw {
                expiry,
                strike: (rate - dividend) * expiry + deviation * random.between(-5.0, 5.0),
                barrier: deviation * random.scale(0.01, 6.0),
                market: market(random.scale(1.0, 1000.0), deviation / expiry.sqrt(), (rate, dividend)),
            }
        }
        WILD => {
            let expiry = random.scale(0.1, 30.0);
            Draw {
                expiry,
                strike: random.between(-1.0, 1.0),
                barrier: random.scale(0.001, 1.5),
                market: market(
                    random.scale(1.0, 1000.0),
                    random.scale(3.0, 30.0) / expiry.sqrt(),
                    yields(random, -0.2, 0.2),
                ),
            }
        }
        EXTREME => Draw {
            expiry: random.scale(3e-8, 100.0),
            strike: random.sign() * random.scale(1e-12, 10.0),
            barrier: random.scale(1e-12, 10.0),
            market: market(random.scale(1e-12, 1e12), random.scale(1e-6, 10.0), yields(random, -1.0, 1.0)),
        },
        CLOSING => {
            let (expiry, vol) = (random.scale(1.0 / 365.0, 5.0), random.scale(0.1, 2.0));
            let barrier = vol * expiry.sqrt() * random.scale(0.01, 3.0);
            Draw {
                expiry,
                strike: side * barrier * (1.0 - random.scale(1e-12, 1e-2)),
                barrier,
                market: market(random.scale(1.0, 1000.0), vol, yields(random, -0.2, 0.2)),
            }
        }
        _ => {
            let expiry = random.scale(1.0 / 8760.0, 30.0);
            let vol = random.scale(0.01, 2.0);
            let spot = random.scale(0.1, 10000.0);
            let (barrier, strike) = if *region == NEAR {
                (vol * expiry.sqrt() * random.scale(1e-8, 1e-2), random.between(-0.5, 0.5))
            } else {
                (random.scale(0.0003, 1.5), random.between(-1.0, 1.0))
            };
            Draw { expiry, strike, barrier, market: market(spot, vol, yields(random, -0.2, 0.2)) }
        }
    }
}
