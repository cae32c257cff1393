import { describe, expect, it } from "vitest";
import { compileModel } from "../../lib/model/compile.ts";
import { anomalyOf } from "../../lib/model/content.ts";
import { enginesOf } from "../../lib/observe/engines.ts";
import { denseRun } from "../../lib/observe/inner_end.ts";
import type { DenseStep } from "../../lib/solve/engine.ts";
import { conformalStress, quickTensor } from "../../lib/stress/conformal_stress.ts";
import { fieldsAt, solutionStress } from "../../lib/stress/solution_stress.ts";

const content = { scalars: 2, weyl: 1, vectors: 1 }, fields = { content, scheme: "zeta" } as const;

describe("The tensor along an s-wave solution", () => {
  it("is that of Schwarzschild where matter adds next to nothing", async () => {
    const M = 1e8, hole = { coordinate: "r", minusGtt: "1-2*M/r", grr: "1/(1-2*M/r)", radius: "r" };
    const exact = conformalStress({ ...hole, parameters: { M } }, fields);
    const places = (await solutionStress({ mass: M, kappa: 1 }, fields)).filter(({ radius }) =>
      radius > 2.2 * M && radius < 8 * M
    );
    expect(places.length).toBeGreaterThan(3);
    for (const { radius, energy, radial, tangential } of places) {
      const T = exact.quick(radius), size = Math.abs(T.energy) + Math.abs(T.radial);
      // fourth derivatives of a series of 24 terms: ten digits of the largest component
      expect(Math.abs(energy - T.energy) / size).toBeLessThan(1e-9);
      expect(Math.abs(radial - T.radial) / size).toBeLessThan(1e-9);
      expect(Math.abs(tangential - T.tangential) / size).toBeLessThan(1e-9);
    }
  });

  it("is conserved along the solution, through the throat", async () => {
    const record: DenseStep[] = [], model = await compileModel("swave");
    const input = {
      model: "swave",
      state: "boulware",
      mass: 3,
      kappa: 1,
      tolerance: 1e-10,
    } as const;
    denseRun(enginesOf(model).double(record), input, () => {});
    const tensor = quickTensor(anomalyOf(content, "zeta"));
    let checked = 0;
    for (const step of record.filter(({ code }) => code.program.independent === "sigma")) {
      const h = step.h * 1e-3, x = step.h / 2;
      const { s, a } = fieldsAt(step, x), T = tensor(fieldsAt(step, x));
      const p = (k: number) => tensor(fieldsAt(step, x + k * h)).radial;
      const slope = (8 * (p(1) - p(-1)) - (p(2) - p(-2))) / (12 * h);
      const terms = [
        slope,
        s[1]! * (T.radial + T.energy),
        2 * (s[1]! + a[1]! / a[0]!) * (T.radial - T.tangential),
      ];
      // differences with 1e-3 of a step: rounding of the derivatives over 1e-3
      expect(Math.abs(terms.reduce((u, v) => u + v)) / Math.max(...terms.map(Math.abs)))
        .toBeLessThan(1e-5);
      checked++;
    }
    expect(checked).toBeGreaterThan(5);
  });
});
