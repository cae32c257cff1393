/**
 * `deno task bench`: the audit beside SymPy on the same derivations, as ratios of medians in one run: whole
 * processes, first derivation in a process, and later ones in the same process (SymPy keeps its cache, we
 * have none). SymPy varies by its `euler_equations`. Before it is timed, both must agree at one point.
 */
import { actionOf } from "../../lib/audit/action.ts";
import { lightConeEquations } from "../../lib/audit/light_cone.ts";
import { AUDITED_MODELS, readyAudits, TWO } from "../../lib/audit/ready/mod.ts";
import { runReady } from "../../lib/audit/run_ready.ts";
import { staticEquations } from "../../lib/audit/static.ts";
import { parse } from "../../lib/expr/parse.ts";
import { points } from "../../lib/expr/points.ts";
import { precise } from "../../lib/expr/precise.ts";
import { print } from "../../lib/expr/print.ts";
import { closeAlgebra } from "../../lib/expr/proposer.ts";
import { type Expr, names } from "../../lib/expr/tree.ts";

const ROUNDS = 3, RUNS = 3; // processes, and derivations in each
const median = (list: number[]) => [...list].sort((a, b) => a - b)[list.length >> 1]!;
const file = (path: string) => new URL(`../../${path}`, import.meta.url);
const SCRIPT = file("tests/reference/sympy/derive.py").pathname;
const WORK = { static: staticEquations, "light-cone": lightConeEquations } as const;
type Kind = keyof typeof WORK;

const OURS = (kind: Kind, model: string) => `
import { actionOf } from "${file("lib/audit/action.ts")}";
import { staticEquations } from "${file("lib/audit/static.ts")}";
import { lightConeEquations } from "${file("lib/audit/light_cone.ts")}";
const f = ${kind === "static" ? "staticEquations" : "lightConeEquations"}, out = [];
for (let i = 0; i < ${RUNS}; i++) {
  const t = performance.now();
  f(actionOf("${model}"));
  out.push((performance.now() - t) / 1000);
}
console.log(JSON.stringify(out));`;

const THEIRS = `import io, sys, json, runpy, contextlib
out = []
for _ in range(int(sys.argv[3])):
    sys.stdin, caught = io.StringIO(sys.argv[1]), io.StringIO()
    with contextlib.redirect_stdout(caught):
        runpy.run_path(sys.argv[2])
    out.append(json.loads(caught.getvalue()))
print(json.dumps(out))`;

function answer(program: string, args: string[]) {
  const begin = performance.now();
  const child = new Deno.Command(program, { args, stderr: "inherit" }).outputSync();
  if (!child.success) throw new Error(`${program} failed with status ${child.code}`);
  const spent = (performance.now() - begin) / 1000;
  return { spent, out: JSON.parse(new TextDecoder().decode(child.stdout)) };
}

function sympy(kind: Kind, model: string, more: Readonly<Record<string, unknown>>, runs: number) {
  const { H, K, V } = actionOf(model).functions!;
  const request = { kind, H: print(H), K: print(K), V: print(V), ...more };
  const args = ["-B", "-c", THEIRS, JSON.stringify(request), SCRIPT, String(runs)];
  return answer("/usr/bin/python3", args);
}

/** Both derivations at one point; the test has more points and says why 1e-30. */
async function agree(kind: Kind, model: string): Promise<void> {
  const action = actionOf(model), { evaluateScaled, evaluate } = await precise(60);
  const equations: [string, Expr][] = Object.entries(WORK[kind](action).equations);
  const [x, y] = kind === "static" ? ["sigma", "sigma"] : ["xp", "xm"];
  const jets = ["phi", "rho", "psi"].flatMap((f) =>
    [[], [x], [y], [x, x], [x, y], [y, y]].map((by) => by.length ? `d(${f}, ${by.join(", ")})` : f)
  );
  const free = Object.values(action.functions!).flatMap(names);
  const at = points([...new Set([...jets, "c", "kappa", ...free])].sort(), 5, action.ranges)();
  const { out: [[theirs]] } = sympy(kind, model, { points: [at] }, 1);
  for (const [name, e] of equations) {
    const { value, scale } = evaluateScaled(e, at);
    const other = evaluate(parse(theirs[name].replace(/^-/, "0-")), {});
    if (!value.minus(other).abs().lte(scale.times("1e-30"))) {
      throw new Error(`Cannot time ${kind} ${model} as both must agree: ${name} differs`);
    }
  }
}

console.log(`CPU: ${/model name\s*: (.*)/.exec(Deno.readTextFileSync("/proc/cpuinfo"))?.[1]}`);
console.log("derivation of all equations of a model: SymPy's time over ours");
for (const kind of ["static", "light-cone"] as const) {
  for (const model of TWO) {
    await agree(kind, model);
    const cold: number[][] = [[], []], first: number[][] = [[], []], later: number[][] = [[], []];
    for (let i = 0; i < ROUNDS; i++) {
      const ours = answer(Deno.execPath(), ["eval", OURS(kind, model).replace(`< ${RUNS}`, "< 1")]);
      const theirs = sympy(kind, model, { time: true }, 1);
      const a: number[] = answer(Deno.execPath(), ["eval", OURS(kind, model)]).out;
      const b: number[] = sympy(kind, model, { time: true }, RUNS).out
        .map((x: { seconds: number }) => x.seconds);
      [theirs.spent, ours.spent].forEach((t, k) => cold[k]!.push(t));
      [b, a].forEach(([t, ...rest], k) => {
        first[k]!.push(t!);
        later[k]!.push(...rest);
      });
    }
    const ratio = ([a, b]: number[][]) => (median(a!) / median(b!)).toFixed(0);
    console.log(
      `  ${kind} ${model}: process ${ratio(cold)}, first in a process ${ratio(first)}, ` +
        `later ${ratio(later)}`,
    );
  }
}

console.log("judging, seconds");
for (const model of AUDITED_MODELS) {
  const { parts } = await runReady({ model, workers: 1 });
  const total = parts.flatMap(({ steps }) => steps).length;
  const begin = performance.now();
  await runReady({ model, workers: 2 });
  console.log(
    `  ${model}: ${total} claims, ${
      ((performance.now() - begin) / 1000).toFixed(1)
    } s by 2 workers`,
  );
}
const begin = performance.now();
await runReady({ workers: 2 });
console.log(
  `  all ${readyAudits().length} audits: ${
    ((performance.now() - begin) / 1000).toFixed(1)
  } s by 2 workers`,
);
closeAlgebra();
