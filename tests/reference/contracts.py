"""The contracts by name, as the oracle reads them."""

from typing import NamedTuple

PAYOFFS = ["call", "put", "cash call", "cash put", "asset call", "asset put", "cash", "asset"]
FIELDS = ["spot", "strike", "barrier", "rebate", "expiry", "vol", "rate", "dividend"]


class Contract(NamedTuple):
    """sign is 1 for a barrier above, -1 below, 0 for none; kind is vanilla, out, in, one-touch or no-touch."""

    name: str
    kind: str
    sign: int
    payoff: str

    @property
    def has_strike(self):
        return self.payoff not in ("", "cash", "asset")

    @property
    def pays_at_hit(self):
        return self.kind in ("out", "one-touch")


CONTRACTS = (
    [Contract(payoff, "vanilla", 0, payoff) for payoff in PAYOFFS]
    + [
        Contract(f"{direction}-and-{knock} {payoff}", knock, sign, payoff)
        for direction, sign in (("up", 1), ("down", -1))
        for knock in ("out", "in")
        for payoff in PAYOFFS
    ]
    + [
        Contract(f"{direction} {kind}", kind, sign, "")
        for kind in ("one-touch", "no-touch")
        for direction, sign in (("up", 1), ("down", -1))
    ]
)
BY_NAME = {contract.name: contract for contract in CONTRACTS}


def line(payoff, strike):
    """The payoff where it pays: cash plus shares times the final spot, and on which side of the strike."""
    return {
        "call": (-strike, 1, "above"),
        "put": (strike, -1, "below"),
        "cash call": (1, 0, "above"),
        "cash put": (1, 0, "below"),
        "asset call": (0, 1, "above"),
        "asset put": (0, 1, "below"),
        "cash": (1, 0, "all"),
        "asset": (0, 1, "all"),
    }[payoff]


def legs(contract, paid, touched_now):
    """What the contract pays: legs (is_rebate, what, event).

    what is a payoff, "hit" (cash at the hit) or "now" (cash now); event is always, touched or untouched.
    """
    if contract.kind == "vanilla":
        parts = [(False, contract.payoff, "always")]
    elif contract.kind == "out":
        parts = [(False, contract.payoff, "untouched"), (True, "hit" if paid == "hit" else "cash", "touched")]
    elif contract.kind == "in":
        parts = [(False, contract.payoff, "touched"), (True, "cash", "untouched")]
    elif contract.kind == "one-touch":
        parts = [(True, "hit" if paid == "hit" else "cash", "touched")]
    else:
        parts = [(True, "cash", "untouched")]
    if not touched_now:
        return parts
    return [
        (is_rebate, "now" if what == "hit" else what, "always")
        for is_rebate, what, event in parts
        if event != "untouched"
    ]


def touched_now(contract, spot, barrier):
    """At or beyond the barrier is touched."""
    return contract.sign != 0 and contract.sign * (spot - barrier) >= 0
