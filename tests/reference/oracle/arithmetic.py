"""Power series and precision of the oracle (gmpy2 for the runs, mpmath for start data).
"""
from operator import mul

import gmpy2
import mpmath
from gmpy2 import mpfr


def precision(digits):
    """Set the working precision of both libraries."""
    mpmath.mp.dps = digits
    gmpy2.get_context().precision = int(digits * 3.3219280948873626) + 16
    gmpy2.get_context().emin = -(2**62) + 10
    gmpy2.get_context().emax = 2**62 - 10


def to_mpf(x):
    m, e = x.as_mantissa_exp()
    return mpmath.ldexp(mpmath.mpf(int(m)), int(e))


def to_mpfr(x):
    x = mpmath.mpf(x)
    sign, man, exp, _ = x._mpf_
    y = gmpy2.mul_2exp(mpfr(int(man)), exp) if exp >= 0 else gmpy2.div_2exp(mpfr(int(man)), -exp)
    return -y if sign else y


def conv(a, b, n):
    """Coefficient n of the product of two series."""
    return sum(map(mul, a[: n + 1], b[n::-1]), mpfr(0))


def conv1(a, b, n):
    """As conv, without the term a[0] b[n]."""
    return sum(map(mul, a[1 : n + 1], b[n - 1 :: -1]), mpfr(0)) if n > 0 else mpfr(0)


def horner(c, h):
    s = mpfr(0)
    for x in reversed(c):
        s = s * h + x
    return s


def horner_prime(c, h):
    s = mpfr(0)
    for n in range(len(c) - 1, 0, -1):
        s = s * h + n * c[n]
    return s


def root_of(x, n):
    """n-th root of a positive mpfr of any exponent, to few digits (step control only)."""
    return gmpy2.exp(gmpy2.log(x) / n)


def step_size(columns, scales, tol):
    """Largest step whose last Taylor terms are below tol times the scale."""
    h = None
    for c, s in zip(columns, scales):
        for n in (len(c) - 1, len(c) - 2):
            a = abs(c[n])
            if a > 0 and s > 0:
                t = root_of(tol * s / a, n)
                h = t if h is None or t < h else h
    return h


def poly_root(c, h):
    """Root in [0, h] (h of either sign) of the polynomial c; c changes sign there once."""
    lo, hi = mpfr(0), h
    flo = c[0]
    for _ in range(40):
        mid = (lo + hi) / 2
        f = horner(c, mid)
        if (f > 0) == (flo > 0):
            lo = mid
        else:
            hi = mid
    x = (lo + hi) / 2
    for _ in range(12):
        x = x - horner(c, x) / horner_prime(c, x)
    return x
