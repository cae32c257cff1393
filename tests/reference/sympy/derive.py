"""Field equations by SymPy's own calculus, as a second derivation.

The action S = (1/2 pi) Int sqrt(-g) [H R + K (grad phi)^2 + V - (kappa/4)(2 psi R + (grad psi)^2)],
signature (-,+), R > 0 on a sphere, is written with a metric; its curvature comes from Christoffel
symbols and its variation from sympy.calculus.euler. Reads one JSON request from standard input,

    {"kind": "static" | "light-cone", "H": text, "K": text, "V": text,
     "points": [{name: decimal text}]}

where names are those of the jets, `phi`, `d(phi, sigma)`, ..., and writes a list with one object of
equations for every point, 40 digits. With "time": true it writes how long the derivation took.

The variations are those of 2 pi S: with respect to rho, phi, psi and the lapse ell (metric
e^{2 rho} (-dt^2 + ell^2 dsigma^2), then ell = 1 and psi' = c - 2 rho'), or rho, phi, psi and the
components p = g_{++}, m = g_{--} (metric -e^{2 rho} dx+ dx- + ..., then p = m = 0).
"""

import json
import sys
import time

import sympy as sp
from sympy.calculus.euler import euler_equations

DIGITS = 40


def ricci_scalar(g, x):
    """R of a two-dimensional metric g over coordinates x."""
    n, up = len(x), g.inv()
    G = [[[sum(up[a, e] * (g[e, b].diff(x[c]) + g[e, c].diff(x[b]) - g[b, c].diff(x[e]))
               for e in range(n)) / 2 for c in range(n)] for b in range(n)] for a in range(n)]

    def ricci(b, c):
        return sum(G[a][b][c].diff(x[a]) - G[a][b][a].diff(x[c])
                   + sum(G[a][a][e] * G[e][b][c] - G[a][c][e] * G[e][b][a] for e in range(n))
                   for a in range(n))

    return sum(up[b, c] * ricci(b, c) for b in range(n) for c in range(n))


def lagrangian(request, g, root, x, phi, psi):
    kappa, up = sp.Symbol("kappa"), g.inv()
    def read(text):
        python = text.replace("^", "**").replace("lambda", "lambda_")
        return sp.sympify(python, locals=LOCALS).subs(sp.Symbol("phi"), phi)

    square = lambda f: sum(up[a, b] * f.diff(x[a]) * f.diff(x[b]) for a in range(2) for b in range(2))
    H, K, V = read(request["H"]), read(request["K"]), read(request["V"])
    R = ricci_scalar(g, x)
    return root * (H * R + K * square(phi) + V - kappa / 4 * (2 * psi * R + square(psi)))


LOCALS = {"lambda_": sp.Symbol("lambda")}  # a word of Python


def vary(L, field, x):
    return euler_equations(L, [field], x)[0].lhs


def static(request):
    t, s = sp.symbols("t sigma")
    phi, rho, psi, ell = (sp.Function(n)(s) for n in ("phi", "rho", "psi", "ell"))
    g = sp.diag(-sp.exp(2 * rho), sp.exp(2 * rho) * ell**2)
    L = lagrangian(request, g, sp.exp(2 * rho) * ell, (t, s), phi, psi)
    state = sp.Symbol("c") - 2 * rho.diff(s)
    fields = {"rho": rho, "phi": phi, "psi": psi, "ell": ell}
    out = {}
    for name, field in fields.items():
        e = vary(L, field, [s])
        for k in range(4, 0, -1):
            e = e.subs(ell.diff(s, k), 0)
            e = e.subs(psi.diff(s, k), state.diff(s, k - 1) if k > 1 else state)
        out[name] = e.subs(ell, 1).doit()
    return out, [s], {"phi": phi, "rho": rho, "psi": psi}


def light_cone(request):
    xp, xm = x = sp.symbols("xp xm")
    phi, rho, psi, p, m = (sp.Function(n)(xp, xm) for n in ("phi", "rho", "psi", "p", "m"))
    f, out, zero = -sp.exp(2 * rho) / 2, {}, sp.Integer(0)
    for name, field in {"p": p, "m": m, "rho": rho, "phi": phi, "psi": psi}.items():
        # a variation at p = m = 0 sees the other components at 0
        up, low = (p if name == "p" else zero), (m if name == "m" else zero)
        g = sp.Matrix([[up, f], [f, low]])
        e = vary(lagrangian(request, g, sp.exp(2 * rho) / 2, x, phi, psi), field, x)
        out[name] = e.subs(field, 0).doit() if name in "pm" else e
    return out, list(x), {"phi": phi, "rho": rho, "psi": psi}


def values(equation, x, fields, point):
    """The equation where every derivative has the value that the point names."""
    table = {}
    for d in equation.atoms(sp.Derivative):
        base = d.expr.func.__name__
        by = [v.name for v, n in d.variable_count for _ in range(n)]
        order = sorted(by, key=[v.name for v in x].index)
        table[d] = sp.Symbol("d(%s, %s)" % (base, ", ".join(order)))
    e = equation.xreplace(table).xreplace({f: sp.Symbol(n) for n, f in fields.items()})
    numbers = {sp.Symbol(n): sp.Float(v, DIGITS + 20) for n, v in point.items()}
    missing = e.free_symbols - set(numbers)
    if missing:
        raise SystemExit("no value for %s" % missing)
    return str(sp.N(e.xreplace(numbers), DIGITS))


def main():
    request = json.load(sys.stdin)
    begin = time.perf_counter()
    equations, x, fields = (static if request["kind"] == "static" else light_cone)(request)
    spent = time.perf_counter() - begin
    if request.get("time"):
        print(json.dumps({"seconds": spent}))
        return
    print(json.dumps([{name: values(e, x, fields, point) for name, e in equations.items()}
                      for point in request["points"]]))


main()
