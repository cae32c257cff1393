#!/usr/bin/env python3
"""Outward against inward: the (mass, bath ratio) read off from horizon data, fed back from outside.

With a bath ratio 1e-20 below the Hartle-Hawking one the inward run must find a throat next to the
horizon it came from, with 1e-20 above a naked singularity: this fails if mass or bath ratio is
wrong in the 20th digit. Prints one line a run: model, sign, kind, relative distance from the
horizon's E or r.

usage: round_trip.py
"""
import mpmath

import oracle
from arithmetic import to_mpf, to_mpfr
from integrate import inward
from start import asymptotic_cghs, start_wall_swave

OFFSET = "1e-20"


def horizon_row(model, kappa, dilaton, wall):
    return dict(
        model=model, state="hartle-hawking", kappa=kappa, mass="",
        bath_ratio_minus_one="", horizon_dilaton=dilaton, wall_radius=wall,
    )


def back(model, row, sign):
    mpf = mpmath.mpf
    got = oracle.solve(row, 40)
    digits, m = got["digits"], got["mass"]
    tau = 1 + got["eps"] + sign * mpf(OFFSET)
    k = mpf(float(row["kappa"]))
    if model == "cghs":
        u0 = mpmath.log(mpf(10) ** 12 * (m + k))
        start = asymptotic_cghs(k, m, tau * tau, u0, digits // 10 + 6)
        c2, at = 4 * tau * tau, mpmath.exp(-2 * got["dilaton"])
    else:
        k = k / mpmath.pi
        wall = mpf(float(row["wall_radius"]))
        c = tau / (2 * m * mpmath.sqrt(1 - 2 * m / wall))
        start = start_wall_swave(k, m, wall, c)
        c2, at = c * c, got["dilaton"]
    to = to_mpfr
    end = inward(model, to(k), tuple(map(to, start)), to(c2), digits)
    print(model, sign, end["kind"], mpmath.nstr(abs(to_mpf(end["A"]) / at - 1), 4))


def main():
    for sign in (-1, 1):
        back("cghs", horizon_row("cghs", "1.0", "-0.55", ""), sign)
        back("swave", horizon_row("swave", "0.1", "2.0", "20.0"), sign)


if __name__ == "__main__":
    main()
