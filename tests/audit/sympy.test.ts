import { execFileSync } from "node:child_process";
import process from "node:process";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { type Action, actionOf, GENERIC } from "../../lib/audit/action.ts";
import { partsOf } from "../../lib/audit/jets.ts";
import { lightConeEquations } from "../../lib/audit/light_cone.ts";
import { TWO } from "../../lib/audit/ready/mod.ts";
import { staticEquations } from "../../lib/audit/static.ts";
import { derive } from "../../lib/expr/derive.ts";
import { parse } from "../../lib/expr/parse.ts";
import { points } from "../../lib/expr/points.ts";
import { precise } from "../../lib/expr/precise.ts";
import { print } from "../../lib/expr/print.ts";
import { type Expr, names, substitute } from "../../lib/expr/tree.ts";

/** A Python that has SymPy; Debian's own comes first as other installations lack it. */
const python = ["/usr/bin/python3", "python3"].find((name) => {
  try {
    execFileSync(name, ["-c", "import sympy"], { stdio: "ignore" });
    return true;
  } catch {
    return false;
  }
});
// absent on a user's machine: skipped by name; in CI its absence is a failure
const withSympy = it.runIf(python !== undefined || process.env.CI === "true");

const SCRIPT = fileURLToPath(new URL("../reference/sympy/derive.py", import.meta.url));

/** Cubic polynomials stand for open functions: at one point they have any value and any derivatives. */
const cubic = (f: string) => parse(`${f}0 + ${f}1*phi + ${f}2*phi^2/2 + ${f}3*phi^3/6`);
const CUBICS = { H: cubic("h"), K: cubic("k"), V: cubic("v") };

/** An equation for open functions, with the cubics put in. */
function closed(e: Expr): Expr {
  const table: Record<string, Expr> = {};
  for (const name of names(e)) {
    const { base, by } = partsOf(name);
    if (Object.hasOwn(CUBICS, base)) {
      table[name] = by.reduce(derive, CUBICS[base as keyof typeof CUBICS]);
    }
  }
  return substitute(e, table);
}

const WORK = { static: staticEquations, "light-cone": lightConeEquations } as const;

describe("SymPy, from the same action by its own calculus, has the same", () => {
  const p = precise(60);
  const actions: Action[] = [GENERIC, ...TWO.map(actionOf)];
  for (const kind of ["static", "light-cone"] as const) {
    for (const action of actions) {
      withSympy(`${kind} equations of ${action.name}`, async () => {
        const { evaluate, evaluateScaled } = await p;
        const equations: [string, Expr][] = Object.entries(WORK[kind](action).equations)
          .map(([name, e]) => [name, closed(e)]);
        const needed = new Set([
          "phi",
          "rho",
          "psi",
          "c",
          ...equations.flatMap(([, e]) => names(e)),
        ]);
        // SymPy's equations may hold jets that ours have lost by cancellation
        for (const f of ["phi", "rho", "psi"]) {
          const [x, y] = kind === "static" ? ["sigma", "sigma"] : ["xp", "xm"];
          for (const by of [[x], [y], [x, x], [x, y], [y, y]]) {
            needed.add(`d(${f}, ${by.join(", ")})`);
          }
        }
        const { H, K, V } = action.functions ?? CUBICS;
        const functions = { H: print(H), K: print(K), V: print(V) };
        for (const f of Object.values(action.functions ?? CUBICS)) {
          for (const name of names(f)) needed.add(name);
        }
        const next = points([...needed].sort(), 31, action.ranges);
        const list = Array.from({ length: 5 }, next);
        const input = JSON.stringify({ kind, ...functions, points: list });
        const answer = execFileSync(python!, ["-B", SCRIPT], { input, encoding: "utf8" });
        const theirs: Record<string, string>[] = JSON.parse(answer);
        expect(theirs).toHaveLength(5);
        for (const [i, at] of list.entries()) {
          expect(Object.keys(theirs[i]!).sort()).toEqual(equations.map(([name]) => name).sort());
          for (const [name, e] of equations) {
            const { value, scale } = evaluateScaled(e, at);
            const other = evaluate(parse(theirs[i]![name]!.replace(/^-(.*)$/, "0-$1")), {});
            // SymPy prints 40 digits; ten are left for cancellation between terms
            const close = value.minus(other).abs().lte(scale.times("1e-30"));
            expect(close, `${name}: ${value} against ${other}`).toBe(true);
          }
        }
      });
    }
  }
});
