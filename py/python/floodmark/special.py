"""The normal law and its tails, each good to a few units in the last place over all of binary64.

The argument may be a number, which gives a float, or an array, which gives an array of float64.

>>> from floodmark import special
>>> special.normal_tail([0.0, 10.0])
array([5.00000000e-01, 7.61985302e-24])
"""

from floodmark._native import mills_ratio, normal_cdf, normal_log_tail, normal_pdf, normal_quantile, normal_tail

__all__ = [
    "mills_ratio",
    "normal_cdf",
    "normal_log_tail",
    "normal_pdf",
    "normal_quantile",
    "normal_tail",
]
