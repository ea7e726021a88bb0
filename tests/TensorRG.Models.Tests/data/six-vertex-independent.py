"""Writes six-vertex-independent.csv: ln of the partition function per vertex of the six-vertex model in 50-digit arithmetic
(Python 3 with mpmath 1.3) at the exact binary values of a, b, c in each row.
Usage: python3 six-vertex-independent.py > six-vertex-independent.csv

Straight from the formulas of R. J. Baxter, Exactly Solved Models in Statistical Mechanics (1982), chapter 8 (from memory;
the tests compare the same values with diagonalised transfer matrices), with mu, w, lambda, v found from Delta and b/a by
root finding, in the original variable of integration.
"""
from mpmath import mp, mpf, acos, acosh, sin, sinh, cosh, exp, log, quad, nsum, findroot, pi, inf

mp.dps = 50


def critical(a, b, c):
    mu = acos(-(a * a + b * b - c * c) / (2 * a * b))
    w = findroot(lambda w: b * sin((mu - w) / 2) - a * sin((mu + w) / 2), (-mu * mpf("0.999"), mu * mpf("0.999")), solver="anderson")
    f = lambda x: sinh((mu + w) * x) * sinh((pi - mu) * x) / (x * sinh(pi * x) * cosh(mu * x))
    scale = 1 / (mu - w) + 1 / mu
    return log(a) + quad(f, [mpf(0)] + [scale * 2 ** k for k in range(-4, 7)] + [scale * 400])


def antiferroelectric(a, b, c):
    la = acosh(-(a * a + b * b - c * c) / (2 * a * b))
    v = findroot(lambda v: b * sinh((la - v) / 2) - a * sinh((la + v) / 2), (-la * mpf("0.999"), la * mpf("0.999")), solver="anderson")
    terms = int(130 / (la - v)) + 10
    return log(a) + (la + v) / 2 + sum(exp(-m * la) * sinh(m * (la + v)) / (m * cosh(m * la)) for m in range(1, terms))


CASES = [(1.0, 1.0, 1.0), (1.0, 0.7, 1.2), (0.7, 1.0, 0.9), (2.0, 0.01, 1.995), (1.0, 1.0, 0.001), (1.0, 1.0, 1.999999),
         (3.0, 2.5, 0.75), (1.0, 1.0, 2.00001), (1.0, 0.7, 1.75), (1.2, 0.6, 6.0), (0.001, 0.02, 5.0), (1.0, 1.0, 100.0)]

print("a,b,c,logZPerVertex")
for a, b, c in CASES:
    f = antiferroelectric if c > a + b else critical
    print(",".join([repr(a), repr(b), repr(c), mp.nstr(f(mpf(a), mpf(b), mpf(c)), 22)]))
