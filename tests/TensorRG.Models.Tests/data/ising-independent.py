"""Writes ising-independent.csv: the square Ising model in 80-digit arithmetic (Python 3 with mpmath 1.3),
at the exact binary values of T, Jx, Jy printed in each row. Usage: python3 ising-independent.py > ising-independent.csv

Independent of the C# code: ln Z from the dual-coupling form of Onsager's integral,
  ln Z / N = ln(2 sinh 2L)/2 + (1/2 pi) int_0^pi acosh(cosh 2L* cosh 2K - sinh 2L* sinh 2K cos w) dw;
energy and specific heat for Jx = Jy from the complete elliptic integrals, else from central differences of ln Z in
80-digit arithmetic; the magnetisation from Yang's and Chang's formula.
"""
from mpmath import mp, mpf, sinh, cosh, coth, tanh, asinh, acosh, log, pi, quad, cos, sin, ellipk, ellipe, sqrt

mp.dps = 80


def logz(b, jx, jy):
    k, l = b * jx, b * jy
    ls = asinh(1 / sinh(2 * l)) / 2
    # acosh(1 + 2 s) = 2 asinh(sqrt s)
    f = lambda w: 2 * asinh(sqrt(sinh(k - ls) ** 2 + sinh(2 * k) * sinh(2 * ls) * sin(w / 2) ** 2))
    scale = max(abs(sinh(k - ls)), mpf(10) ** -30)
    cuts, c = [mpf(0)], scale / 8
    while c < 3:
        cuts.append(c)
        c *= 4
    return log(2 * sinh(2 * l)) / 2 + quad(f, cuts + [pi]) / (2 * pi)


def derivatives(b, jx, jy):
    if jx == jy:
        x = 2 * b * jx
        m = (2 * sinh(x) / cosh(x) ** 2) ** 2
        p = 2 * tanh(x) ** 2 - 1
        k1, e1 = ellipk(m), ellipe(m)
        u = -jx * coth(x) * (1 + 2 / pi * p * k1)
        c = 2 / pi * (b * jx * coth(x)) ** 2 * (2 * k1 - 2 * e1 - (1 - p) * (pi / 2 + p * k1))
        return u, c
    g = abs(sinh(2 * b * jx) * sinh(2 * b * jy) - 1)
    h = b * min(mpf(10) ** -8, g / 10000)
    f = [logz(b + i * h, jx, jy) for i in (-2, -1, 0, 1, 2)]
    d1 = (8 * (f[3] - f[1]) - (f[4] - f[0])) / (12 * h)
    d2 = (16 * (f[3] + f[1]) - (f[4] + f[0]) - 30 * f[2]) / (12 * h * h)
    return -d1, b * b * d2


def magnetisation(b, jx, jy):
    s = sinh(2 * b * jx) * sinh(2 * b * jy)
    return (1 - s ** -2) ** (mpf(1) / 8) if s > 1 else mpf(0)


TC = 2.269185314213022
CASES = [(t, 1.0, 1.0) for t in (0.05, 0.1, 0.3, 0.7, 1.0, 1.5, 1.9, 2.2, 2.4, 3.7, 10.0, 1e3, 1e6)]
CASES += [(TC * (1 + s * 10.0 ** -n), 1.0, 1.0) for n in range(1, 16, 2) for s in (-1, 1)] + [(TC, 1.0, 1.0)]
CASES += [(1.3, 1.0, 0.3), (1.3288414983595283, 1.0, 0.3), (1.3288414983595283 * (1 + 1e-9), 1.0, 0.3),
          (1.3288414983595283 * (1 - 1e-12), 1.0, 0.3), (1.34, 0.3, 1.0), (2.0, 2.5, 0.01), (5.0, 0.7, 3.0), (0.4, 0.2, 0.9)]

print("temperature,jx,jy,logZPerSite,energyPerSite,specificHeatPerSite,magnetisation")
for t, jx, jy in CASES:
    b = 1 / mpf(t)
    u, c = derivatives(b, mpf(jx), mpf(jy))
    row = [logz(b, mpf(jx), mpf(jy)), u, c, magnetisation(b, mpf(jx), mpf(jy))]
    print(",".join([repr(t), repr(jx), repr(jy)] + [mp.nstr(v, 22) for v in row]))
