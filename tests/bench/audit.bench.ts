/**
 * `deno task bench`: the audit beside SymPy on the same derivations, as ratios of medians in one run. The two are
 * first checked to agree by `tests/audit/sympy.test.ts`.
 */
import { actionOf } from "../../lib/audit/action.ts";
import { lightConeEquations } from "../../lib/audit/light_cone.ts";
import { AUDITED_MODELS, readyAudits, TWO } from "../../lib/audit/ready/mod.ts";
import { runReady } from "../../lib/audit/run_ready.ts";
import { staticEquations } from "../../lib/audit/static.ts";
import { closeAlgebra } from "../../lib/expr/proposer.ts";
import { print } from "../../lib/expr/print.ts";

const ROUNDS = 5;
const median = (list: number[]) => list.sort((a, b) => a - b)[list.length >> 1]!;
const SCRIPT = new URL("../reference/sympy/derive.py", import.meta.url).pathname;
const WORK = { static: staticEquations, "light-cone": lightConeEquations } as const;

/** Seconds that SymPy takes for the derivation, and its process from start to end. */
function sympy(kind: string, model: string): { derive: number; process: number } {
  const { H, K, V } = actionOf(model).functions!;
  const request = { kind, H: print(H), K: print(K), V: print(V), time: true };
  const begin = performance.now();
  const child = new Deno.Command("/usr/bin/python3", {
    args: [
      "-c",
      `import io,sys,runpy\nsys.stdin=io.StringIO(sys.argv[1])\nrunpy.run_path(sys.argv[2])`,
    ]
      .concat([JSON.stringify(request), SCRIPT]),
    stderr: "inherit",
  }).outputSync();
  const { seconds } = JSON.parse(new TextDecoder().decode(child.stdout));
  return { derive: seconds, process: (performance.now() - begin) / 1000 };
}

function seconds(work: () => void): number {
  const begin = performance.now();
  work();
  return (performance.now() - begin) / 1000;
}

console.log(`CPU: ${/model name\s*: (.*)/.exec(Deno.readTextFileSync("/proc/cpuinfo"))?.[1]}`);
console.log("derivation of all equations of a model: SymPy's time over ours");
for (const kind of ["static", "light-cone"] as const) {
  for (const model of TWO) {
    const cold = seconds(() => WORK[kind](actionOf(model)));
    const ours = Array.from({ length: ROUNDS }, () => seconds(() => WORK[kind](actionOf(model))));
    const theirs = Array.from({ length: ROUNDS }, () => sympy(kind, model));
    const d = median(theirs.map((t) => t.derive)), p = median(theirs.map((t) => t.process));
    const warm = median(ours);
    console.log(
      `  ${kind} ${model}: ${(d / warm).toFixed(0)} (process of SymPy ${(p / warm).toFixed(0)}; ` +
        `ours first time ${(cold / warm).toFixed(1)} times the median)`,
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
