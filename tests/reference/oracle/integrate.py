"""Taylor integration of the second-order equations in sigma (equations in oracle.py).
"""
import gmpy2
from gmpy2 import mpfr

from arithmetic import conv, conv1, horner, poly_root, step_size
from critical_end import naked_cghs, naked_swave


def series_cghs(kappa, y, order, source):
    """Taylor coefficients in sigma of (E, p, rho, q, G); source False sets G to 0."""
    E, p, rho, q = [y[0]], [y[1]], [y[2]], [y[3]]
    G = [gmpy2.exp(2 * y[2]) if source else mpfr(0)]
    Z = []
    zero = mpfr(0)
    for n in range(order):
        W = (G[n] if source else zero) - conv(p, p, n)
        Z.append((W + conv1(E, Z + [zero], n)) / (kappa - E[0]))
        EZ = conv(E, Z, n)
        E.append(-2 * conv(p, E, n) / (n + 1))
        if source:
            G.append(2 * conv(q, G, n) / (n + 1))
        rho.append(q[n] / (n + 1))
        p.append((2 * EZ - kappa * Z[n]) / (n + 1))
        q.append(2 * EZ / (n + 1))
    return E, p, rho, q, G


def series_swave(b, y, order, source):
    """Taylor coefficients in sigma of (r, p, rho, q, G)."""
    r, p, rho, q = [y[0]], [y[1]], [y[2]], [y[3]]
    G = [gmpy2.exp(2 * y[2]) if source else mpfr(0)]
    Z, rr = [], []
    zero = mpfr(0)
    for n in range(order):
        rr.append(conv(r, r, n))
        W = (G[n] if source else zero) - conv(p, p, n)
        Z.append((W + conv1(rr, Z + [zero], n)) / (b - rr[0]))
        rZ = conv(r, Z, n)
        r.append(p[n] / (n + 1))
        if source:
            G.append(2 * conv(q, G, n) / (n + 1))
        rho.append(q[n] / (n + 1))
        p.append(-rZ / (n + 1))
        q.append(Z[n] / (n + 1))
    return r, p, rho, q, G


def inward(model, k, y, c2, digits):
    """Integrate inwards to the throat or the critical locus. k = kappa (cghs), b (swave).

    Returns dict(kind, A, rho, R, check): A = E or r at the locus.
    """
    order = int(1.15 * digits)
    tol = mpfr(10) ** (-digits)
    series = series_cghs if model == "cghs" else series_swave
    naked = naked_cghs if model == "cghs" else naked_swave
    throat_sign = 1 if model == "swave" else -1  # sign of p outside
    near = mpfr("1e-2")
    for step in range(20000):
        E = y[0]
        gap = (E - k) / k if model == "cghs" else (E * E - k) / k
        # e^(2 rho) is dropped once it falls inwards (rho' > 0) and lies below the last digit of phi'^2
        lnG, lnp2 = 2 * y[2], 2 * gmpy2.log(abs(y[1]))
        source = not (lnG < lnp2 - 2.302585093 * (digits + 30) and y[3] > 0)
        # near the critical locus its regular variable is tried; a throat in the way makes that fail
        if not source or gap < near:
            end = naked(k, y, order, tol, source)
            if end is not None:
                rho, P, S = end
                G = gmpy2.exp(2 * rho)
                if model == "cghs":
                    terms = (k * S * S, -4 * P * P, -4 * G * k, -k * c2 / 4)
                    A = k
                else:
                    terms = (k * S * S, -P * P / k, -G, -k * c2 / 4)
                    A = gmpy2.sqrt(k)
                check = abs(sum(terms)) / max(map(abs, terms))
                assert P != 0
                return dict(kind="naked-singularity", A=A, rho=rho, R=None, check=check, n=step)
            near = near / 100
        cols = series(k, y, order, source)
        sG = gmpy2.sqrt(cols[4][0])
        scales = (abs(y[0]), max(abs(y[1]), sG), abs(y[3]) + sG * mpfr("1e-6"), cols[4][0])
        h = -step_size((cols[0], cols[1], cols[3], cols[4]), scales, tol)
        y1 = tuple(horner(c, h) for c in cols[:4])
        if y1[1] * throat_sign <= 0:
            t = poly_root(cols[1], h)
            A, rho, q = horner(cols[0], t), horner(cols[2], t), horner(cols[3], t)
            G = gmpy2.exp(2 * rho)
            if model == "cghs":
                R = 4 * A / (A - k)
                lhs, rhs = -4 * G * A, k * (c2 / 4 - q * q)
            else:
                R = 2 / (A * A - k)
                lhs, rhs = -G, k * (c2 / 4 - q * q)
            return dict(kind="throat", A=A, rho=rho, R=R, check=abs(lhs / rhs - 1), n=step)
        y = y1
    raise RuntimeError("step limit")


def outward(model, k, y, digits, stop):
    """Integrate outwards until A >= stop; the point where A = stop exactly."""
    order = int(1.15 * digits)
    tol = mpfr(10) ** (-digits)
    series = series_cghs if model == "cghs" else series_swave
    for _ in range(20000):
        cols = series(k, y, order, True)
        sG = gmpy2.sqrt(cols[4][0])
        scales = (abs(y[0]), max(abs(y[1]), sG), max(abs(y[3]), sG * mpfr("1e-6")), cols[4][0])
        h = step_size((cols[0], cols[1], cols[3], cols[4]), scales, tol)
        y1 = tuple(horner(c, h) for c in cols[:4])
        if y1[0] >= stop:
            shifted = [cols[0][0] - stop] + cols[0][1:]
            t = poly_root(shifted, h)
            return tuple(horner(c, t) for c in cols[:4])
        y = y1
    raise RuntimeError("step limit")
