"""Correct values of the inputs in known_wrong.json, which the algebra system gets wrong.

    python3 known_wrong.py < known_wrong.json > new.json

Reads `op`, `input`, `variable` and `at` of every entry and writes `value` anew, with 25 digits: the value
at the point `at` of the input itself (expand, simplify, factor), of its derivative (diff) or of the
integrand (integrate). SymPy differentiates and evaluates in exact rationals and then 40 digits; mpmath
evaluates the text again with 60 digits, derivatives by its own difference formula. Both must agree to
28 digits.
"""
import json
import re
import sys

import mpmath
import sympy

FUNCTIONS = {"exp", "log", "sqrt"}


def value(op, text, variable, at):
    source = re.sub(
        r"(?<![\w.])[A-Za-z]\w*", lambda m: m[0] if m[0] in FUNCTIONS else f"n_{m[0]}", text
    ).replace("^", "**")
    symbols = {f"n_{n}": sympy.Symbol(f"n_{n}", positive=True) for n in at}
    expression = sympy.sympify(source, locals=symbols, rational=True)
    point = {symbols[f"n_{n}"]: sympy.Rational(v) for n, v in at.items()}
    if op == "diff":
        answer = sympy.diff(expression, symbols[f"n_{variable}"])
    else:
        answer = expression
    first = mpmath.mpf(sympy.N(answer.subs(point), 40))

    digits = re.sub(r"(?<![\w.])(\d+(?:\.\d+)?(?:[eE][+-]?\d+)?)", r"mpf('\1')", source)
    values = {f"n_{n}": mpmath.mpf(v) for n, v in at.items()}
    tools = {f: getattr(mpmath, f) for f in FUNCTIONS} | {"mpf": mpmath.mpf}
    plain = lambda changed: eval(digits, tools, values | changed)
    if op == "diff":
        x = f"n_{variable}"
        second = mpmath.diff(lambda t: plain({x: t}), values[x])
    else:
        second = plain({})
    assert abs(first - second) < mpmath.mpf(10) ** -28 * abs(second), (op, text, first, second)
    return mpmath.nstr(first, 25, strip_zeros=False)


def main():
    mpmath.mp.dps = 60
    entries = json.load(sys.stdin)["entries"]
    for e in entries:
        e["value"] = value(e["op"], e["input"], e.get("variable"), e["at"])
    source = f"SymPy {sympy.__version__} and mpmath {mpmath.__version__} (known_wrong.py)"
    print(json.dumps({"source": source, "entries": entries}, indent=2))


main()
