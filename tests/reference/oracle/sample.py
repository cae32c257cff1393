#!/usr/bin/env python3
"""Draw the seeded inputs of the oracle: 120 cghs and 120 swave rows over the whole range.

Log-uniform; 48 rows lie within 1e-6 (relative) of a boundary between kinds. The
boundary bath ratio of a thermal row is found from a Hartle-Hawking solution. Every input
is the exact double that is printed.

usage: sample.py OUTPUT.csv
"""
import csv
import math
import random
import sys

import oracle

FIELDS = oracle.FIELDS[:8]
SEED = 20251


def main(path):
    rng = random.Random(SEED)
    rows = []

    def log_uniform(lo, hi):
        return math.exp(rng.uniform(math.log(lo), math.log(hi)))

    def add(model, state, tag, **values):
        row = dict.fromkeys(FIELDS, "")
        row.update({k: repr(float(v)) for k, v in values.items()})
        row.update(case=f"{model}-{tag}-{len(rows) + 1:03d}", model=model, state=state)
        rows.append(row)
        return row

    def boundary(row):
        """(mass, bath ratio minus one) of the Hartle-Hawking solution of a row not kept."""
        rows.pop()
        got = oracle.solve(row)
        return float(got["mass"]), float(got["eps"])

    kappa_of = lambda: log_uniform(1e-12, 1e6)
    bath = lambda i: -log_uniform(1e-8, 1) if i % 2 else log_uniform(1e-8, 1)
    # ---- cghs
    for _ in range(30):
        k = kappa_of()
        add("cghs", "boulware", "b", kappa=k, mass=k * log_uniform(0.3, 1e60))
    for _ in range(10):
        k = kappa_of()
        add("cghs", "boulware", "n", kappa=k, mass=-k * log_uniform(0.3, 1e60))
    for i in range(40):
        k = kappa_of()
        add(
            "cghs", "thermal", "t", kappa=k, mass=k * log_uniform(0.3, 1e60),
            bath_ratio_minus_one=bath(i),
        )
    for _ in range(16):
        k = kappa_of()
        x = log_uniform(1.05, 1e60)
        add("cghs", "hartle-hawking", "h", kappa=k, horizon_dilaton=-math.log(k * x) / 2)
    for i in range(10):
        k = kappa_of()
        x = log_uniform(1.5, 1e6)
        m, e = boundary(add("cghs", "hartle-hawking", "x", kappa=k, horizon_dilaton=-math.log(k * x) / 2))
        e += (-1) ** i * log_uniform(1e-12, 1e-6)
        add("cghs", "thermal", "near", kappa=k, mass=m, bath_ratio_minus_one=e)
    for i in range(10):
        k = kappa_of()
        add("cghs", "boulware", "near", kappa=k, mass=(-1) ** i * k * log_uniform(1e-12, 1e-6))
    for _ in range(4):
        k = kappa_of()
        x = 1 + log_uniform(1e-11, 1e-6)
        add("cghs", "hartle-hawking", "near", kappa=k, horizon_dilaton=-math.log(k * x) / 2)
    # ---- swave
    size = lambda k: math.sqrt(k / log_uniform(1e-76, 0.1))
    for _ in range(40):
        k = kappa_of()
        add("swave", "boulware", "b", kappa=k, mass=size(k))
    for _ in range(6):
        k = kappa_of()
        add("swave", "boulware", "n", kappa=k, mass=-size(k))
    for i in range(36):
        k = kappa_of()
        M = size(k)
        add(
            "swave", "thermal", "t", kappa=k, mass=M, bath_ratio_minus_one=bath(i),
            wall_radius=M * log_uniform(3, 200),
        )
    for _ in range(14):
        k = kappa_of()
        M = size(k)
        add(
            "swave", "hartle-hawking", "h", kappa=k, horizon_dilaton=2 * M,
            wall_radius=M * log_uniform(3, 200),
        )
    for i in range(24):
        k = kappa_of()
        r, w = 2 * math.sqrt(k / log_uniform(1e-8, 0.1)), log_uniform(3, 200)
        m, e = boundary(
            add("swave", "hartle-hawking", "x", kappa=k, horizon_dilaton=r, wall_radius=r / 2 * w)
        )
        e += (-1) ** i * log_uniform(1e-12, 1e-6)
        add("swave", "thermal", "near", kappa=k, mass=m, bath_ratio_minus_one=e, wall_radius=r / 2 * w)
    with open(path, "w", newline="") as f:
        out = csv.DictWriter(f, FIELDS, lineterminator="\n")
        out.writeheader()
        out.writerows(rows)


if __name__ == "__main__":
    main(sys.argv[1])
