"""The law of Brownian motion with drift, of its running maximum and minimum, and of its passage times.

W_t = drift t + vol B_t on [0, horizon] from W_0 = 0, B a standard Brownian motion, watched continuously; M is its
running maximum, m its running minimum. Every argument may be an array; they broadcast as NumPy's do. Plain numbers
give a float, arrays an array of float64. With with_status=True values out of their domain do not raise: the result
is NaN there, and the statuses (int32, see floodmark.status_text) are returned with it.

Domain: vol and horizon from 1e-75 to 1e75; magnitudes of drift, level, terminal, discount_rate, other_drift up to
1e75; time at least 0; probability from 0 to 1; uniform between 0 and 1, ends excluded.

For a Monte Carlo of your own: draw ends by sample_terminal, then the extremes exactly by sample_max or sample_min
from a second uniform number; bridge_crossing says how likely a level was touched between two observations;
drift_weight turns paths of one drift into paths of another.

>>> import numpy
>>> from floodmark import brownian
>>> uniforms = numpy.random.default_rng(7).uniform(size=(2, 1000))
>>> law = {"drift": 0.1, "vol": 0.3, "horizon": 2.0}
>>> terminal = brownian.sample_terminal(uniforms[0], **law)
>>> maximum = brownian.sample_max(terminal, uniforms[1], **law)
>>> bool((maximum >= terminal).all() and (maximum >= 0.0).all())
True
"""

from floodmark._native import (
    bridge_crossing,
    discounted_first_passage,
    drift_weight,
    first_passage_cdf,
    first_passage_pdf,
    first_passage_quantile,
    joint_max_cdf,
    joint_max_pdf,
    joint_min_cdf,
    joint_min_pdf,
    max_cdf,
    max_pdf,
    max_quantile,
    max_tail,
    min_cdf,
    min_pdf,
    min_quantile,
    min_tail,
    sample_max,
    sample_min,
    sample_terminal,
    survival,
    terminal_cdf,
    terminal_pdf,
    terminal_quantile,
)

__all__ = [
    "terminal_pdf",
    "terminal_cdf",
    "terminal_quantile",
    "max_pdf",
    "max_cdf",
    "max_tail",
    "max_quantile",
    "min_pdf",
    "min_cdf",
    "min_tail",
    "min_quantile",
    "joint_max_cdf",
    "joint_max_pdf",
    "joint_min_cdf",
    "joint_min_pdf",
    "survival",
    "first_passage_pdf",
    "first_passage_cdf",
    "first_passage_quantile",
    "discounted_first_passage",
    "bridge_crossing",
    "sample_terminal",
    "sample_max",
    "sample_min",
    "drift_weight",
]
