"""Runs to the critical locus, where the determinant of (1), (2) vanishes (see oracle.py).

In y = sqrt(E - kappa) or sqrt(r^2 - b) the equations are regular up to y = 0, which is reached by
a step and not extrapolated to.
"""
from operator import mul

import gmpy2
from gmpy2 import mpfr

from arithmetic import conv, conv1, horner, step_size


def naked_cghs(kappa, y, order, tol, source):
    """From (E, p, rho, q) to E = kappa in y = sqrt(E - kappa).

    P = p y and S = (q y - 2 P)/y are regular there; (1), (2) become
      P_y = y [G (2E - kappa) - P^2]/(E P),  S_y = 2 (P^2 - G y^2)/(E P),
      rho_y = -y (2 P + y S)/(E P).
    Returns (rho, P, S) at y = 0, or None if P runs to zero (a throat is in the way).
    """
    y0 = gmpy2.sqrt(y[0] - kappa)
    P0, rho0 = y[1] * y0, y[2]
    S0 = (y[3] * y0 - 2 * P0) / y0
    for _ in range(4000):
        E = [kappa + y0 * y0, 2 * y0, mpfr(1)]
        ys = [y0, mpfr(1)]
        yy = [y0 * y0, 2 * y0, mpfr(1)]
        P, S, rho = [P0], [S0], [rho0]
        G = [gmpy2.exp(2 * rho0) if source else mpfr(0)]
        EP, inv, A, B, C, drho = [], [], [], [], [], []
        w = [2 * E[0] - kappa, 2 * E[1], 2 * E[2]]

        def short(s, c, n):
            return sum((s[k] * c[n - k] for k in range(min(n, len(s) - 1) + 1)), mpfr(0))

        U = []
        for n in range(order):
            EP.append(short(E, P, n))
            inv.append(((1 if n == 0 else 0) - conv1(EP, inv + [mpfr(0)], n)) / EP[0])
            PP = conv(P, P, n)
            U.append((short(w, G, n) if source else mpfr(0)) - PP)
            A.append(short(ys, U, n))
            B.append(2 * (PP - (short(yy, G, n) if source else mpfr(0))))
            C.append(-(2 * short(ys, P, n) + short(yy, S, n)))
            drho.append(conv(C, inv, n))
            dP, dS = conv(A, inv, n), conv(B, inv, n)
            P.append(dP / (n + 1))
            S.append(dS / (n + 1))
            rho.append(drho[n] / (n + 1))
            if source:
                G.append(2 * conv(drho, G, n) / (n + 1))
        scales = (abs(P0), max(abs(S0), abs(P0) / gmpy2.sqrt(kappa)), max(abs(rho0), mpfr(1)))
        h = step_size((P, S, rho), scales, tol)
        if h < y0 * mpfr("1e-5"):
            return None
        last = h >= y0
        h = -y0 if last else -h
        P0, S0, rho0 = horner(P, h), horner(S, h), horner(rho, h)
        if last:
            return rho0, P0, S0
        y0 = y0 + h
    return None


def naked_swave(b, y, order, tol, source):
    """From (r, p, rho, q) to r^2 = b in y = sqrt(r^2 - b).

    P = p y and S = (q y + P/r)/y are regular there; (1), (2) become
      P_y = G y/P,  S_y = -P/r^3,  rho_y = y (y S - P/r)/(r P).
    """
    y0 = gmpy2.sqrt(y[0] * y[0] - b)
    P0, rho0 = y[1] * y0, y[2]
    S0 = (y[3] * y0 + P0 / y[0]) / y0
    for _ in range(4000):
        ys = [y0, mpfr(1)]
        rr = [b + y0 * y0, 2 * y0, mpfr(1)]
        P, S, rho = [P0], [S0], [rho0]
        G = [gmpy2.exp(2 * rho0) if source else mpfr(0)]
        r, ri, ri3, ri2, Pi, J, X, drho = [], [], [], [], [], [], [], []

        def short(s, c, n):
            return sum((s[k] * c[n - k] for k in range(min(n, len(s) - 1) + 1)), mpfr(0))

        yS, yG = [], []
        for n in range(order):
            t = rr[n] if n < 3 else mpfr(0)
            if n == 0:
                r.append(gmpy2.sqrt(rr[0]))
            else:
                cross = sum(map(mul, r[1:n], r[n - 1 : 0 : -1]), mpfr(0))
                r.append((t - cross) / (2 * r[0]))
            ri.append(((1 if n == 0 else 0) - conv1(r, ri + [mpfr(0)], n)) / r[0])
            ri2.append(conv(ri, ri, n))
            ri3.append(conv(ri, ri2, n))
            Pi.append(((1 if n == 0 else 0) - conv1(P, Pi + [mpfr(0)], n)) / P[0])
            J.append(conv(ri, Pi, n))
            yS.append(short(ys, S, n) - conv(P, ri, n))
            X.append(short(ys, yS, n))
            drho.append(conv(X, J, n))
            if source:
                yG.append(short(ys, G, n))
                P.append(conv(yG, Pi, n) / (n + 1))
            else:
                P.append(mpfr(0))
            S.append(-conv(P, ri3, n) / (n + 1))
            rho.append(drho[n] / (n + 1))
            if source:
                G.append(2 * conv(drho, G, n) / (n + 1))
        scales = (abs(P0), max(abs(S0), abs(P0) / b), max(abs(rho0), mpfr(1)))
        h = step_size((P, S, rho), scales, tol)
        if h < y0 * mpfr("1e-5"):
            return None
        last = h >= y0
        h = -y0 if last else -h
        P0, S0, rho0 = horner(P, h), horner(S, h), horner(rho, h)
        if last:
            return rho0, P0, S0
        y0 = y0 + h
    return None
