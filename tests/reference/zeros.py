"""Makes zeros.json: 390 expressions that vanish identically and 390 that nearly do.

    PYTHONHASHSEED=0 python3 zeros.py > zeros.json

`left` is a random expression of one of eight classes (seeded), `right` the same rearranged by SymPy
(`how`), so left - right = 0 for positive names. `near` is `left` with one small change (`change`): a
coefficient by a relative 1e-12 to 1e-24 or by 1/997, a sign, an exponent. mpmath evaluates both with 80
digits at three points: |left - right| < 1e-70 of the larger side, |near - right| > 1e-30 of it.
"""
import json
import random
import re

import mpmath
import sympy as sp

mpmath.mp.dps = 80
rng = random.Random(390)
NAMES = ["x", "y", "a", "b", "c"]
SYMBOLS = {n: sp.Symbol(n, positive=True) for n in NAMES}
CLASSES = [
    "polynomial",
    "rational",
    "exponential",
    "exponential times rational",
    "square root",
    "logarithm",
    "mixed",
    "symbolic power",
]


def number():
    return rng.choice([f"{rng.randint(1, 7)}", f"{rng.randint(1, 7)}/{rng.randint(2, 7)}"])


def monomial(names):
    chosen = [n for n in names if rng.random() < 0.5] or [rng.choice(names)]
    return "*".join([f"({number()})"] + [f"{n}{rng.choice(['', '', '^2', '^3'])}" for n in chosen])


def positive(names):
    return "+".join([number()] + [monomial(names) for _ in range(rng.randint(1, 2))])


def polynomial(names, most=2):
    signs = [rng.choice("+-") + monomial(names) for _ in range(rng.randint(1, most))]
    return monomial(names) + "".join(signs)


def draw(kind, names):
    n, sign = rng.choice(names), rng.choice("+-")
    if kind == "polynomial":
        return f"({polynomial(names)})*({polynomial(names)}){sign}({polynomial(names)})^2"
    if kind == "rational":
        return f"({polynomial(names)})/({positive(names)}){sign}({number()})/({positive(names)})"
    if kind == "exponential":
        rest = rng.choice([f"(exp(({number()})*{n}){sign}{monomial(names)})^2",
                           f"exp(-({number()})*{n})*({polynomial(names)}){sign}exp({n})"])
        return rest
    if kind == "exponential times rational":
        return f"exp(-({number()})*{n})*({polynomial(names)})/({positive(names)}){sign}exp({n})"
    if kind == "square root":
        return rng.choice([f"({n}{sign}sqrt({positive(names)}))^2*({number()})",
                           f"({polynomial(names)})/sqrt({positive(names)}){sign}sqrt(({number()})*{n})",
                           f"({polynomial(names)})*sqrt({n})*sqrt({positive(names)})"])
    if kind == "logarithm":
        return rng.choice([f"log({monomial(names)}/({positive(names)}))*({polynomial(names)})",
                           f"(log(({number()})*{n}){sign}({number()})*{n})^2",
                           f"log(({positive(names)})*{n}^2){sign}({number()})*log({n})"])
    if kind == "symbolic power":
        m = rng.choice(names)
        return rng.choice([f"{n}^({m}{sign}{number()})*({polynomial(names)})",
                           f"({n}^({m}){sign}({number()})*{m})^2",
                           f"{n}^({number()}*{m})/{n}^{m}*({polynomial(names)})"])
    return f"({draw(rng.choice(CLASSES[2:6]), names)}){sign}({draw(rng.choice(CLASSES[:2]), names)})"


def factor(e):
    """Without radicals, among which SymPy's factor may not end."""
    if any(not p.exp.is_integer for p in e.atoms(sp.Pow)):
        return e
    return sp.factor(e)


def apart(e):
    """Of rational functions only, for the same reason."""
    if not e.is_rational_function():
        return e
    return sp.apart(e, rng.choice(sorted(e.free_symbols, key=str)))


WAYS = {
    "expand": sp.expand,
    "factor": factor,
    "together": sp.together,
    "apart": apart,
    "cancel": sp.cancel,
    "collect": lambda e: sp.collect(sp.expand(e), sorted(e.free_symbols, key=str)[0]),
    "horner": lambda e: sp.horner(sp.expand(e)),
    "powsimp": lambda e: sp.powsimp(sp.expand(e)),
    "logcombine": lambda e: sp.logcombine(sp.expand(e)),
    "expand_log": lambda e: sp.expand_log(factor(e)),
    "radsimp": sp.radsimp,
}


def read(text):
    return sp.sympify(text.replace("^", "**"), locals=SYMBOLS, rational=True)


def rearranged(text):
    """(way, text) of a form that differs from SymPy's own reading of `text`, or None."""
    e = read(text)
    for way in rng.sample(sorted(WAYS), len(WAYS)):
        try:
            other = WAYS[way](e)
        except (sp.PolynomialError, NotImplementedError, ValueError):
            continue
        out = str(other).replace("**", "^")
        if other != e and len(out) < 400 and not re.search(r"I|zoo|nan|E", out):
            return way, out
    return None


def changed(text):
    """(change, text) with one coefficient, sign or exponent changed."""
    kind = rng.choice(["relative", "relative", "relative", "1/997", "sign", "exponent"])
    if kind in ("relative", "1/997"):
        spot = rng.choice(list(re.finditer(r"\((\d+(?:/\d+)?)\)", text)) or [None])
        size = f"1e-{rng.randint(12, 24)}" if kind == "relative" else "1/997"
        if spot is None:
            return kind, f"({text})*(1+{size})"
        return size, f"{text[:spot.start()]}({spot[1]}*(1+{size})){text[spot.end():]}"
    spots = list(re.finditer(r"(?<=[\w)])[+-](?=\()" if kind == "sign" else r"\^[23]", text))
    if not spots:
        return changed(text)
    spot = rng.choice(spots)
    new = {"+": "-", "-": "+", "^2": "^3", "^3": "^4"}[spot[0]]
    return kind, text[: spot.start()] + new + text[spot.end():]


def gap(left, right):
    """The smallest and the largest |left - right| at three points, relative to the larger side."""
    found = []
    for _ in range(3):
        at = {SYMBOLS[n]: sp.Rational(rng.randint(40, 190), 100) for n in NAMES}
        a, b = (sp.N(read(t).subs(at), 80) for t in (left, right))
        if not (a.is_real and b.is_real):
            return 0, 1
        a, b = mpmath.mpf(a), mpmath.mpf(b)
        found.append(abs(a - b) / max(abs(a), abs(b)))
    return min(found), max(found)


def main():
    entries, seen = [], set()
    while len(entries) < 390:
        kind = CLASSES[len(entries) % len(CLASSES)]
        left = draw(kind, NAMES[: rng.randint(2, 4)])
        found = None if left in seen else rearranged(left)
        if found is None:
            continue
        change, near = changed(left)
        if gap(near, found[1])[0] < 1e-30:
            continue
        assert gap(left, found[1])[1] < 1e-70, (left, found)
        seen.add(left)
        keys = ["class", "how", "change", "left", "right", "near"]
        entries.append(dict(zip(keys, [kind, found[0], change, left, found[1], near])))
    source = f"SymPy {sp.__version__} and mpmath {mpmath.__version__} (zeros.py)"
    print(json.dumps({"source": source, "entries": entries}, indent=2))


main()
