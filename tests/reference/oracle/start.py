"""Start data of the oracle: infinity, cavity wall, horizon (equations in oracle.py).
"""
from operator import mul

import gmpy2
import mpmath
from gmpy2 import mpfr

from arithmetic import conv, conv1, horner, step_size


def asymptotic_cghs(kappa, m, tau2, u, terms):
    """(E, phi_sigma, rho, rho_sigma) of cghs at u = 2 sigma from the series at infinity.

    E = e^u sum e_n(u) z^n, rho = sum r_n(u) z^n, z = e^-u, polynomials in u. With
    L = ln E = u + sum l_n z^n and f_u of p(u) z^n = (p' - n p) z^n, (2) and (1) read
      L_uu + L_u^2/2 + rho_uu = e^(2 rho)/2,     E_uu + kappa rho_uu = e^(2 rho) E ;
    order n is linear in (e_n, r_n), algebraic determinant n^2 (n-1)^2. The constraint
    enters by e_1 = m + kappa tau^2 u/4 alone.
    """
    mpf = mpmath.mpf
    add = lambda *ps: [sum((p[i] for p in ps if i < len(p)), mpf(0)) for i in range(max(map(len, ps)))]
    scale = lambda s, p: [s * x for x in p]

    def times(p, q):
        out = [mpf(0)] * (len(p) + len(q) - 1)
        for i, x in enumerate(p):
            for j, y in enumerate(q):
                out[i + j] += x * y
        return out

    diff = lambda p: [i * p[i] for i in range(1, len(p))] or [mpf(0)]

    def d1(p, n):
        return add(diff(p), scale(-n, p))

    def d2(p, n):
        return d1(d1(p, n), n)

    zero = [mpf(0)]
    e, r = [[mpf(1)]], [zero]
    l, lu, g = [zero], [zero], [[mpf(1)]]  # lu: (l_n' - n l_n); g: e^(2 rho)
    for n in range(1, terms + 1):
        # known parts: l_n = e_n + lk, g_n = 2 r_n + gk
        lk = zero
        for j in range(1, n):
            lk = add(lk, scale(-mpf(j) / n, times(l[j], e[n - j])))
            # n e_n = sum j l_j e_(n-j) holds for z-series with constant coefficients in z
        gk = zero
        for j in range(1, n):
            gk = add(gk, scale(mpf(2 * j) / n, times(r[j], g[n - j])))
        if n == 1:
            en = [mpf(m), kappa * tau2 / 4]
            rn = scale(mpf(1) / 2, add(d2(en, 0), scale(-1, en)))
        else:
            # (1): D_(n-1) e_n - e_n - 2 r_n = gk + sum_{0<j<n} g_j e_(n-j) - kappa D_(n-1) r_(n-1)
            k1 = gk
            for j in range(1, n):
                k1 = add(k1, times(g[j], e[n - j]))
            k1 = add(k1, scale(-kappa, d2(r[n - 1], n - 1)))
            # (2): D_n e_n + d_n e_n + D_n r_n - r_n = gk/2 - (D_n + d_n) lk - sum lu_j lu_(n-j)/2
            k2 = add(scale(mpf(1) / 2, gk), scale(-1, d2(lk, n)), scale(-1, d1(lk, n)))
            for j in range(1, n):
                k2 = add(k2, scale(-mpf(1) / 2, times(lu[j], lu[n - j])))
            size = max(len(k1), len(k2))
            en, rn = [mpf(0)] * size, [mpf(0)] * size
            det = mpf(n) ** 2 * (n - 1) ** 2
            for i in range(size - 1, -1, -1):
                # derivative parts of the degrees above, from those already known
                at = lambda p: p[i] if i < len(p) else mpf(0)
                a1 = at(k1) - at(add(diff(diff(en)), scale(-2 * (n - 1), diff(en))))
                a2 = at(k2) - at(add(diff(diff(en)), scale(-2 * n, diff(en)), diff(en)))
                a2 -= at(add(diff(diff(rn)), scale(-2 * n, diff(rn))))
                # ((n-1)^2 - 1) e - 2 r = a1 ;  (n^2 - n) e + (n^2 - 1) r = a2
                en[i] = ((n * n - 1) * a1 + 2 * a2) / det
                rn[i] = (((n - 1) ** 2 - 1) * a2 - (n * n - n) * a1) / det
        e.append(en)
        r.append(rn)
        l.append(add(en, lk))
        g.append(add(scale(2, rn), gk))
        lu.append(d1(l[n], n))
    z = mpmath.exp(-u)
    value = lambda p: mpmath.polyval(p[::-1], u)
    E = mpf(0)
    rho = q = mpf(0)
    Lu = mpf(1)
    zn = mpf(1)
    for n in range(terms + 1):
        E += value(e[n]) * zn
        if n > 0:
            rho += value(r[n]) * zn
            q += value(d1(r[n], n)) * zn
            Lu += value(lu[n]) * zn
        zn *= z
    E /= z
    # p = d phi/d sigma = 2 d/du (-L/2)
    return E, -Lu, rho, 2 * q


def start_boulware_swave(b, M, r0, terms):
    """(r, r', rho, rho') at r = r0 from the power series in x = 1/r (state c = 0).

    p = r', q = x^2 Q, L = e^(2 rho):  (x^2 Q)_x = -x p_x  and  p L_x = -2 Q L  and
    L - p^2 = p (x^2 Q)_x (1 - b x^2)   [(2), definition of q, (1)];  Q_0 = M.
    """
    mpf = mpmath.mpf
    p, L, Q = [mpf(1)], [mpf(1)], []
    for n in range(1, terms + 1):
        # unknowns Q_(n-1); p_n = -(n+1) Q_(n-1)/n;  n L_n = -2 [Q L]_(n-1) - sum p_i (n-i) L_(n-i)
        Ln = sum((-2 * Q[i] * L[n - 1 - i] for i in range(n - 1)), mpf(0))
        Ln -= sum((p[i] * (n - i) * L[n - i] for i in range(1, n)), mpf(0))
        Ln /= n
        pp = sum((p[i] * p[n - i] for i in range(1, n)), mpf(0))
        # S_k = (k+1) Q_(k-1): coefficients of (x^2 Q)_x
        S = lambda k: (k + 1) * Q[k - 1] if 1 <= k <= len(Q) else mpf(0)
        rest = sum((p[i] * S(n - i) for i in range(1, n)), mpf(0))
        rest -= b * sum((p[i] * S(n - 2 - i) for i in range(0, n - 1)), mpf(0))
        # Ln - 2 Q/n - 2 p_n - pp = (n+1) Q + rest, p_n = -(n+1) Q/n  ->  (n-1) Q = Ln - pp - rest
        if n == 1:
            Q.append(mpf(M))
        else:
            Q.append((Ln - pp - rest) / (n - 1))
        p.append(-(n + 1) * Q[n - 1] / n)
        L.append(Ln - 2 * Q[n - 1] / n)
    x = 1 / mpf(r0)
    P = mpmath.polyval(p[::-1], x)
    Lv = mpmath.polyval(L[::-1], x)
    return mpf(r0), P, mpmath.log(Lv) / 2, x * x * mpmath.polyval(Q[::-1], x)


def start_wall_swave(b, M, rw, c):
    """(r, r', rho, rho') at a cavity wall: rho = 0, r' from the mass, rho' from (C)."""
    p = mpmath.sqrt(1 - 2 * M / rw)
    # b q^2 + 2 rw p q + p^2 - 1 - b c^2/4 = 0, root that stays finite for b -> 0
    A = 1 - p * p + b * c * c / 4
    return rw, p, mpmath.mpf(0), A / (rw * p + mpmath.sqrt(rw * rw * p * p + b * A))


def horizon_start(model, k, A0, digits):
    """Point (A, p, rho, q) just outside a regular horizon, time scaled to surface gravity 1/2.

    In x = e^sigma: A = sum A_n x^n, e^(2 rho) = A0^2 or 1 times x (1 + ...), theta = x d/dx = prime.
    """
    order = int(1.15 * digits)
    G0 = A0 * A0 if model == "swave" else mpfr(1)  # sets the origin of sigma
    A, p, q, G, Z, rr = [A0], [mpfr(0)], [mpfr(1) / 2], [mpfr(0), G0], [mpfr(0)], [A0 * A0]
    rho = [gmpy2.log(G0) / 2]  # rho - sigma/2
    for n in range(1, order):
        # p_n = n phi_n, phi''_n = n p_n; E' = -2 p E
        W = G[n] - conv(p + [mpfr(0)], p + [mpfr(0)], n)  # p_0 = 0: only known terms
        if model == "cghs":
            Zn = (W + sum(map(mul, A[1:n], Z[n - 1 : 0 : -1]), mpfr(0))) / (k - A0)
            Z.append(Zn)
            EZ = A0 * Zn + sum(map(mul, A[1:n], Z[n - 1 : 0 : -1]), mpfr(0))
            p.append((2 * EZ - k * Zn) / n)
            q.append(2 * EZ / n)
            A.append(-2 * conv1(p, A + [mpfr(0)], n) / n)
        else:
            Zn = (W + sum(map(mul, rr[1:n], Z[n - 1 : 0 : -1]), mpfr(0))) / (k - rr[0])
            Z.append(Zn)
            rZ = A0 * Zn + sum(map(mul, A[1:n], Z[n - 1 : 0 : -1]), mpfr(0))
            p.append(-rZ / n)
            q.append(Zn / n)
            A.append(p[n] / n)
            rr.append(conv(A, A, n))
        rho.append(q[n] / n)
        # theta G = 2 q G: (n+1) G_(n+1) = 2 sum_(j=0..n) q_j G_(n+1-j), j = 0 gives G_(n+1)
        G.append(2 * sum(map(mul, q[1 : n + 1], G[n:0:-1]), mpfr(0)) / n)
    tol = mpfr(10) ** (-digits)
    sG = gmpy2.sqrt(G0)
    x = step_size((A, p, q), (abs(A0), sG if model == "swave" else mpfr(1), mpfr(1) / 2), tol)
    sigma = gmpy2.log(x)
    return horner(A, x), horner(p, x), horner(rho, x) + sigma / 2, horner(q, x)
