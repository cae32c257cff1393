"""The minimal sphere of the anomaly's leading tensor by mpmath.

G^t_t and G^l_l of the metric -e^{2 psi} dt^2 + dl^2 + R^2 dOmega with source -h alpha^4 diag(-3, 1, 1, 1), alpha = psi',
written with p = dR/dl as variable (another form than the program's): y = alpha R solves
gamma y^4 + 2 p y = 1 - p^2, gamma = (a + beta/2)/(pi R^2), D = 1 - p^2 + 3 gamma y^4,
d ln R/dp = 2 p/D, d psi/dp = 2 y/D. Integrated by mpmath.odefun from vacuum far out.

Usage: minimal_sphere.py DIGITS A BETA MASS ... : for each triple (rational a as p/q, double beta, double
mass) prints the triple, ln(R/M) and 2 psi on the sphere. The lines of minimal_sphere.csv were made with 40
digits, the one of mass 1e35 with 48: less leaves an error of 1e-19 in it.
"""

import sys
from fractions import Fraction

from mpmath import mp, mpf, log, sqrt, odefun

DIGITS = int(sys.argv[1])
mp.dps = DIGITS


def sphere(a, beta, mass):
    lead = mpf(a.numerator) / a.denominator + mpf(beta) / 2
    g = lead / mp.pi / mpf(mass) ** 2

    def slope(t, state):
        p, (lnR, psi) = -t, state
        gamma, rest = g * mp.exp(-2 * lnR), 1 - p * p
        y = (rest / gamma) ** mpf("0.25")
        if p > 0:
            y = min(y, rest / (2 * p))
        for _ in range(200):
            step = (gamma * y**4 + 2 * p * y - rest) / (4 * gamma * y**3 + 2 * p)
            y -= step
            if abs(step) < mpf(10) ** (-DIGITS - 5) * y:
                break
        D = rest + 3 * gamma * y**4
        return [-2 * p / D, -2 * y / D]

    R = max(mpf(10) ** 4, (g * mpf(10) ** (DIGITS - 8)) ** (mpf(1) / 6))
    p = sqrt(1 - 2 / R)
    # in pieces: the solution turns at p = 1 and, over the width gamma^(1/4), at p = 0
    state, t = [log(R), log(p)], -p
    marks = [1 - mpf(10) ** -k for k in range(3, 0, -1)] + [mpf("0.5")]
    width = (g / 4) ** mpf("0.25")
    while marks[-1] > width:
        marks.append(marks[-1] / 3)
    for mark in [m for m in marks if m < p] + [mpf(0)]:
        state = odefun(slope, t, state, tol=mpf(10) ** (7 - DIGITS))(-mark)
        t = -mark
    return state[0], 2 * state[1]


for i in range(2, len(sys.argv), 3):
    a, beta, mass = sys.argv[i : i + 3]
    lnR, lngtt = sphere(Fraction(a), float(beta), float(mass))
    print(a, beta, mass, mp.nstr(lnR, DIGITS - 8), mp.nstr(lngtt, DIGITS - 8), sep=",", flush=True)
