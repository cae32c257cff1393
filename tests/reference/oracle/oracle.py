#!/usr/bin/env python3
"""High-precision oracle: static solutions of the models cghs and swave.

Integrates the plain second-order static field equations in conformal gauge,
ds^2 = e^(2 rho) (-dt^2 + d sigma^2), prime = d/d sigma,

    (1)  H'' + kappa rho''                = e^(2 rho) V
    (2)  2 K phi'' + 2 H_phi rho''        = e^(2 rho) V_phi - K_phi phi'^2

for the four unknowns (phi, phi', rho, rho') by a Taylor method in many digits. The
constraint (C)  2 rho' H' + K phi'^2 - e^(2 rho) V = kappa (c^2/4 - rho'^2)  is used for
initial data only; its residual at the locus is reported as a check.

    cghs :  H = E, K = 4 E, V = 4 E, E = e^(-2 phi)      (lambda = 1, c = 2 tau)
    swave:  H = pi r^2/2, K = V = pi, phi = r            (G = 1, b = kappa/pi)

Solved for the second derivatives, with G = e^(2 rho), p = phi' (swave: r'), q = rho':

    cghs :  Z = (G - p^2)/(kappa - E),  phi'' = (2 E - kappa) Z,  rho'' = 2 E Z
    swave:  Z = (G - p^2)/(b - r^2),    r''   = -r Z,             rho'' = Z

Curvature of the two-dimensional metric: R = -2 rho'' e^(-2 rho).
Nothing here is shared with the program under test. Needs python3-mpmath, python3-gmpy2.

usage: oracle.py INPUTS.csv OUTPUT.csv [--extra DIGITS] [--far N] [--cases A,B,...]

--extra adds working digits; --far N starts N times as many decades (cghs) or N times as far (swave)
outside: both change every intermediate number and may not change a printed one.
"""
import csv
import sys

import mpmath

from arithmetic import precision, to_mpf, to_mpfr
from integrate import inward, outward
from start import asymptotic_cghs, horizon_start, start_boulware_swave, start_wall_swave

PRINTED = 36


def digits_for(model, kappa, mass):
    """Digits that survive the dilution of mass data and the smallness of -g_tt."""
    ratio = abs(mass) / kappa if model == "cghs" else mass * mass / kappa
    return 70 + int(2.3 * max(0.0, float(mpmath.log10(ratio)) if ratio > 0 else 0.0))


def solve(row, extra=0, far=1):
    """Solve one row (dict of strings: exact doubles). Returns dict of mpf values."""
    model, state = row["model"], row["state"]
    number = lambda key: float(row[key])
    scale_mass = number("mass") if row["mass"] else None
    if scale_mass is None:
        if model == "cghs":
            mpmath.mp.dps = 30
            scale_mass = mpmath.exp(-2 * mpmath.mpf(number("horizon_dilaton")))
        else:
            scale_mass = mpmath.mpf(number("horizon_dilaton")) / 2
    mpmath.mp.dps = 30
    digits = digits_for(model, mpmath.mpf(number("kappa")), mpmath.mpf(scale_mass)) + extra
    precision(digits)
    mpf = mpmath.mpf
    kappa = mpf(number("kappa"))
    k = kappa if model == "cghs" else kappa / mpmath.pi
    out = dict(digits=digits)
    if state == "hartle-hawking":
        if model == "cghs":
            Eh = mpmath.exp(-2 * mpf(number("horizon_dilaton")))
            y = horizon_start(model, to_mpfr(k), to_mpfr(Eh), digits)
            y = outward(model, to_mpfr(k), y, digits, to_mpfr(Eh + k) * (10 ** (12 * far)))
            E, p, rho, q = map(to_mpf, y)
            terms = int(digits / (11 * far)) + 6
            u = mpmath.log(E)

            def mismatch(m, eta, du):
                tau = mpf(1) / 2 * mpmath.exp(-rho) * (1 + eta)
                Es, ps, rs, qs = asymptotic_cghs(kappa, m, tau * tau, u + du, terms)
                return [
                    mpmath.log(Es / E),
                    rs - rho - mpmath.log(2 * tau),
                    ps / (2 * tau * p) - 1,
                    qs / (2 * tau * q) - 1,
                ]

            m, eta, du = newton3(mismatch, [Eh, mpf(0), mpf(0)])
            tau = mpf(1) / 2 * mpmath.exp(-rho) * (1 + eta)
            res = mismatch(m, eta, du)
            # rho' ~ m e^-u is not fitted: an independent check of the whole outward run
            check = abs(res[3])
            dilaton = mpf(number("horizon_dilaton"))
            R = 4 * Eh / (Eh - kappa)
            out.update(mass=m, eps=tau - 1)
        else:
            rh, rw = mpf(number("horizon_dilaton")), mpf(number("wall_radius"))
            y = horizon_start(model, to_mpfr(k), to_mpfr(rh), digits)
            r, p, rho, q = map(to_mpf, outward(model, to_mpfr(k), y, digits, to_mpfr(rw)))
            G = mpmath.exp(2 * rho)
            M = rw / 2 * (1 - p * p / G)
            c = 1 / mpmath.sqrt(G)
            tau = c * 2 * M * mpmath.sqrt(1 - 2 * M / rw)
            P, Q = p / mpmath.sqrt(G), q / mpmath.sqrt(G)
            lhs = 2 * Q * rw * P + P * P - 1
            check = abs((lhs + k * Q * Q) / (k * c * c / 4) - 1)
            dilaton, R = rh, 2 / (rh * rh - k)
            out.update(mass=M, eps=tau - 1)
        out.update(kind="horizon", dilaton=dilaton, lng=None, R=R, check=check)
        return out
    mass = mpf(number("mass"))
    eps = mpf(number("bath_ratio_minus_one")) if state == "thermal" else mpf(-1)
    tau = 1 + eps
    if model == "cghs":
        big = max(abs(mass), kappa * max(1, tau * tau)) * mpf(10) ** (12 * far)
        u0 = mpmath.log(big)
        start = asymptotic_cghs(kappa, mass, tau * tau, u0, int(digits / (10 * far)) + 6)
        c2 = 4 * tau * tau
    elif state == "boulware":
        r0 = 2000 * far * max(abs(mass), mpmath.sqrt(k))
        start = start_boulware_swave(k, mass, r0, int(digits / 2.8) + 6)
        c2 = mpf(0)
    else:
        rw = mpf(number("wall_radius"))
        c = tau / (2 * mass * mpmath.sqrt(1 - 2 * mass / rw))
        start = start_wall_swave(k, mass, rw, c)
        c2 = c * c
    got = inward(model, to_mpfr(k), tuple(map(to_mpfr, start)), to_mpfr(c2), digits)
    A = to_mpf(got["A"])
    out.update(
        kind=got["kind"],
        dilaton=A if model == "swave" else -mpmath.log(A) / 2,
        lng=2 * to_mpf(got["rho"]),
        R=None if got["R"] is None else to_mpf(got["R"]),
        mass=mass,
        eps=eps,
        check=to_mpf(got["check"]),
        steps=got["n"],
    )
    return out


def newton3(f, x):
    """Newton for the first three components of f, difference Jacobian in extra digits."""
    x = [mpmath.mpf(v) for v in x]
    tiny = mpmath.mpf(10) ** (-(mpmath.mp.dps // 2))
    for _ in range(40):
        fx = f(*x)[:3]
        J = mpmath.matrix(3, 3)
        for j in range(3):
            h = tiny * (abs(x[j]) if x[j] != 0 else 1)
            z = list(x)
            z[j] += h
            fz = f(*z)[:3]
            for i in range(3):
                J[i, j] = (fz[i] - fx[i]) / h
        d = mpmath.lu_solve(J, mpmath.matrix([-v for v in fx]))
        x = [a + b for a, b in zip(x, d)]
        if abs(d[0]) <= abs(x[0]) * tiny and abs(d[1]) < tiny and abs(d[2]) < tiny:
            return x  # the step after one of size tiny has size tiny^2
    raise RuntimeError("no convergence")


FIELDS = (
    "case,model,state,kappa,mass,bath_ratio_minus_one,horizon_dilaton,wall_radius,"
    "kind,dilaton_locus,ln_minus_gtt_locus,minus_gtt_locus,curvature_locus,"
    "mass_result,bath_ratio_minus_one_result,digits,log10_check"
).split(",")


def text(x):
    if x is None:
        return ""
    return mpmath.nstr(x, PRINTED, strip_zeros=True, min_fixed=-1, max_fixed=1)


def result_row(row, got):
    out = {f: row.get(f, "") for f in FIELDS[:8]}
    kind = got["kind"]
    out["kind"] = kind
    out["dilaton_locus"] = text(got["dilaton"])
    if kind == "horizon":
        out["minus_gtt_locus"] = "0"
    else:
        out["ln_minus_gtt_locus"] = text(got["lng"])
        # below e^-20000 the logarithm alone is printed
        out["minus_gtt_locus"] = text(mpmath.exp(got["lng"])) if got["lng"] > -20000 else ""
    out["curvature_locus"] = "-INF" if got["R"] is None else text(got["R"])
    out["mass_result"], out["bath_ratio_minus_one_result"] = text(got["mass"]), text(got["eps"])
    out["digits"] = str(got["digits"])
    out["log10_check"] = (
        mpmath.nstr(mpmath.log10(got["check"]), 4) if got["check"] > 0 else "-999"
    )
    return out


def main(argv):
    extra = int(argv[argv.index("--extra") + 1]) if "--extra" in argv else 0
    far = int(argv[argv.index("--far") + 1]) if "--far" in argv else 1
    cases = argv[argv.index("--cases") + 1].split(",") if "--cases" in argv else None
    with open(argv[0], newline="") as f:
        rows = [r for r in csv.DictReader(f) if cases is None or r["case"] in cases]
    with open(argv[1], "w", newline="") as f:
        w = csv.DictWriter(f, FIELDS, lineterminator="\n")
        w.writeheader()
        for row in rows:
            w.writerow(result_row(row, solve(row, extra, far)))
            f.flush()


if __name__ == "__main__":
    main(sys.argv[1:])
