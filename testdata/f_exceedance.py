"""Writes f_exceedance.csv, beside this file: the probability that a value of
Fisher's F distribution exceeds f, through the incomplete beta function at 50
digits.

Made with mpmath 1.3.0: python3 testdata/f_exceedance.py
"""

import os

import mpmath

assert mpmath.__version__ == "1.3.0", mpmath.__version__
mpmath.mp.dps = 50

HEAD = "# Probability that a value of Fisher's F distribution exceeds f. mpmath 1.3.0 at 50 digits, by f_exceedance.py beside this file."
CASES = [
    (1, 1, "1"), (1, 2, "18.5"), (1, 30, "0.001"), (2, 3, "9.55"), (4, 20, "1.18046237440255"), (4, 20, "2.8661"),
    (4, 20, "40"), (8, 180, "21"), (11, 48, "0"), (11, 48, "0.3"), (39, 160, "1.47"), (2, 60, "150"),
    (99, 400, "1"), (99, 400, "5"), (999, 4000, "1.1"), (9999, 40000, "1.02"), (1, 40000, "300"),
]



def incomplete_beta(a, b, x):
    """The regularised incomplete beta function by its series (Abramowitz and
    Stegun, 26.5.4, from memory), whose terms are all positive."""
    if x == 1:
        return x
    total = term = mpmath.mpf(1)
    n = 0
    while term > total * mpmath.mpf(10) ** -40:
        term *= x * (a + b + n) / (a + 1 + n)
        total += term
        n += 1
    return total * mpmath.exp(a * mpmath.log(x) + b * mpmath.log(1 - x)) / (a * mpmath.beta(a, b))


with open(os.path.join(os.path.dirname(os.path.abspath(__file__)), "f_exceedance.csv"), "w") as out:
    print(HEAD, file=out)
    print("between,within,f,p", file=out)
    for between, within, f in CASES:
        x = mpmath.mpf(within) / (within + between * mpmath.mpf(f))
        p = incomplete_beta(mpmath.mpf(within) / 2, mpmath.mpf(between) / 2, x)
        print(between, within, f, mpmath.nstr(p, 17), sep=",", file=out)
