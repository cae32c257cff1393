/**
 * Four dimensions: deriving and verifying the anomaly's tensor, evaluating it, and a table of hierarchies. Times of one
 * run, and their ratio to what is asked of them.
 *
 * Run by `deno task bench`.
 *
 * @module
 */
import { runAudit } from "../../lib/audit/audit.ts";
import { anomalyActionAudit } from "../../lib/audit/ready/anomaly4d.ts";
import { closeAlgebra } from "../../lib/expr/proposer.ts";
import { compileModel } from "../../lib/model/compile.ts";
import { computeRow } from "../../lib/observe/row.ts";
import { conformalStress } from "../../lib/stress/conformal_stress.ts";

async function seconds(work: () => unknown): Promise<number> {
  const begin = performance.now();
  await work();
  return (performance.now() - begin) / 1000;
}

function report(what: string, spent: number, asked: number): void {
  console.log(
    `${what}: ${spent.toFixed(3)} s, ${(spent / asked).toFixed(3)} of the ${asked} s asked`,
  );
}

console.log(`CPU: ${/model name\s*: (.*)/.exec(Deno.readTextFileSync("/proc/cpuinfo"))?.[1]}`);
report(
  "derive and verify the tensor, cold",
  await seconds(() => runAudit(anomalyActionAudit())),
  60,
);

const hole = {
  coordinate: "r",
  minusGtt: "1-2*M/r",
  grr: "1/(1-2*M/r)",
  radius: "r",
  parameters: { M: 1 },
};
const content = { scalars: 1, weyl: 0, vectors: 0 };
const stress = conformalStress(hole, { content, scheme: "zeta" });
const places = Array.from({ length: 10_000 }, (_, i) => 2.1 + i / 100);
let sink = 0;
const evaluate = () => {
  for (const r of places) sink += stress.quick(r).energy;
};
await seconds(evaluate); // warm
report("evaluate it at 10^4 points", await seconds(evaluate), 0.2);

const model = await compileModel("anomaly4d");
const table = () => {
  for (let i = 0; i < 100; i++) {
    const row = {
      model: "anomaly4d",
      state: "boulware",
      kappa: 0,
      realScalars: 1,
      diracSpinors: 0,
      vectors: 0,
    } as const;
    computeRow({ ...row, beta: 1 / 180, mass: Math.exp(2 + 0.75 * i), tolerance: 1e-10 }, model);
  }
};
report("100 rows with bounds, cold", await seconds(table), 5);
if (sink === 1) console.log(sink); // keeps the engine from deleting the work
closeAlgebra();
