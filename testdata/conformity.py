"""Writes conformity.csv, beside this file: the probability that a measurand lies
inside its limits, for normal and Student's distributions.

JCGM 106, 7.2: Y has the distribution of value + standard T, where T is Student's
with dof degrees of freedom (normal where they are infinite), and the
probability of conformity is F((max - value)/standard) - F((min - value)/standard).

Made with SciPy 1.10.1: python3 testdata/conformity.py
"""

import math
import os

import scipy
from scipy.stats import norm, t

assert scipy.__version__ == "1.10.1", scipy.__version__

HEAD = (
    "# Probability of conformity (JCGM 106, 7.2) for normal (dof inf) and Student's distributions,"
    " by testdata/conformity.py with SciPy " + scipy.__version__ + "."
    " Blank limit: open side. The first two cases are examples of JCGM 106, from memory: 0.92 and 0.66."
)

DOFS = [1, 2, 3, 4, 4.7, 9, 16.7, 30, 120, 1e4, 1e6, math.inf]
# Distances of the limit from the value, in standard uncertainties.
RATIOS = [-6, -4, -2.5, -1.96, -1.645, -1, -0.5, -0.1, 0, 0.1, 0.5, 1, 1.645, 1.96, 2.5, 4, 6]
# Limits on both sides of the value, in standard uncertainties.
BANDS = [(-1.96, 1.96), (-1, 1), (-0.2, 0.2), (-3, 0), (0, 3), (-1, 4), (-8, 1.645), (1, 3), (-5, -2), (-6, 6), (0.5, 0.5)]
# Value and standard uncertainty, as they come about on different metals.
PLACES = [(330.0, 12.5), (22.3, 0.81), (151.7, 19.0)]


def probability(dof, value, standard, least, greatest):
    z_lo, z_hi = (least - value) / standard, (greatest - value) / standard
    distribution = norm() if math.isinf(dof) else t(dof)
    if z_lo > 0:  # the far tail without cancellation
        return distribution.sf(z_lo) - distribution.sf(z_hi)
    return distribution.cdf(z_hi) - distribution.cdf(z_lo)


def cases():
    yield math.inf, -5.47, 0.05, -math.inf, -5.40  # breakdown voltage of a diode, at most -5.40 V
    yield math.inf, 13.6, 1.8, 12.5, 16.3  # viscosity of an oil, 12.5 to 16.3 mm2/s
    for i, dof in enumerate(DOFS):
        value, standard = PLACES[i % len(PLACES)]
        for ratio in RATIOS:
            yield dof, value, standard, -math.inf, value + ratio * standard
        for ratio in RATIOS:
            yield dof, value, standard, value + ratio * standard, math.inf
        for lo, hi in BANDS:
            yield dof, value, standard, value + lo * standard, value + hi * standard


def cell(x):
    return "" if math.isinf(x) else repr(x)


with open(os.path.join(os.path.dirname(os.path.abspath(__file__)), "conformity.csv"), "w") as f:
    print(HEAD, file=f)
    print("dof,value,standard,min,max,probability", file=f)
    for dof, value, standard, least, greatest in cases():
        p = float(probability(dof, value, standard, least, greatest))
        print(f"{dof!r},{value!r},{standard!r},{cell(least)},{cell(greatest)},{p!r}", file=f)
