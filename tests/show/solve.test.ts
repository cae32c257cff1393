import { describe, expect, it } from "vitest";
import { DISPLAY, OptionsError, readRun, solve, type SolveOptions } from "@backstamp/backstamp";
import { runTable } from "../../lib/batch/run.ts";
import { execute } from "./notebook/notebooks.ts";

/** Options as somebody may type them without a type checker. */
const loose = (options: Record<string, unknown>): Promise<unknown> =>
  solve(options as unknown as SolveOptions);

describe("solve", () => {
  it("returns kind, numbers with bounds, stamp and profile", async () => {
    const [kappa, mass] = [1, 10];
    const solution = await solve({ model: "rst", state: "boulware", kappa, mass });
    expect(solution.outcome).toBe("solved");
    expect(solution.kind).toBe("throat");
    const { value: phi = NaN, error = NaN } = solution.numbers.dilaton_locus ?? {};
    // closed form of RST (Russo, Susskind and Thorlacius 1992) at the throat, where e^u = kappa/4
    const right = kappa / 4 * (1 - Math.log(kappa / 4)) + mass;
    const left = Math.exp(-2 * phi) + kappa / 2 * phi;
    // d left/d phi = kappa/2 - 2 e^(-2 phi) is about -22; 1e-14 is the round-off of the sums here
    expect(Math.abs(left - right)).toBeLessThan(22 * error + 1e-14);
    expect(solution.stamp).toMatch(/^[0-9a-f]{64}$/);
    const profile = solution.profile()!;
    // the profile is stepped in doubles: 1e-10 is the default tolerance
    expect(Math.abs(profile.dilaton[profile.proper_distance.indexOf(0)] - phi)).toBeLessThan(1e-10);
    expect(solution.figures()).toHaveLength(1);
    expect(solution.figures()[0].svg).toMatch(/^<svg [^]*rst, boulware/);
    expect(solution.observables().find((o) => o.name === "mass")).toEqual({
      name: "mass",
      title: "Mass",
      unit: "mass",
      value: 10,
      error: 0,
    });
  });

  it("says what a run of the same row writes, stamp included", async () => {
    const folder = await Deno.makeTempDir();
    const text = "case,model,state,kappa,mass,bath_ratio\nx,cghs,thermal,2,7,0.5\n";
    await runTable({ table: new TextEncoder().encode(text), folder, workers: 1 });
    const [cells] = readRun(folder).rows;
    const solution = await solve({
      model: "cghs",
      state: "thermal",
      kappa: 2,
      mass: 7,
      bathRatio: 0.5,
    });
    expect(solution.stamp).toBe(cells.stamp);
    for (const { name, value, error } of solution.observables()) {
      expect([String(value), String(error)]).toEqual([cells[name], cells[`${name}_err`]]);
    }
    await Deno.remove(folder, { recursive: true });
  });

  it("returns a refusal of the physics as a value that shows its reason", async () => {
    const solution = await solve({ model: "rst", state: "hartle-hawking", kappa: 1, mass: -5 });
    expect(solution.outcome).toBe("refused");
    expect(solution.reason).toMatch(/^below-critical: /);
    expect(solution.profile()).toBeUndefined();
    expect(solution.figures()).toHaveLength(0);
    expect(solution[DISPLAY]()["text/plain"]).toContain("below-critical");
  });

  it("refuses wrong options at once, all of them, with the nearest right name", async () => {
    const wrong = loose({ model: "rts", state: "bulware", kapa: 1, mass: "10" });
    await expect(wrong).rejects.toThrow(OptionsError);
    await expect(wrong).rejects.toThrow(/4 faults/);
    await expect(wrong).rejects.toThrow(/model: .*\(nearest: rst\)/);
    await expect(wrong).rejects.toThrow(/state: .*\(nearest: boulware\)/);
    await expect(wrong).rejects.toThrow(/kapa: .*\(nearest: kappa\)/);
    await expect(wrong).rejects.toThrow(/mass: must be a number: current value is "10"/);
    const absent = loose({ model: "rst", state: "thermal", kappa: 1, mass: 1, wallRadius: 9 });
    await expect(absent).rejects.toThrow(
      "exactly one of bathRatio, bathRatioMinusOne must be given",
    );
    await expect(absent).rejects.toThrow(
      "wallRadius: must be absent as model rst has no wallRadius",
    );
    await expect(loose({ model: "rst", state: "boulware", kappa: 0, mass: NaN })).rejects.toThrow(
      /kappa: must be > 0[^]*mass: must be a finite number/,
    );
  });

  it("shows itself in a notebook as a card in HTML and in plain text", async () => {
    const { notebook, failure } = await execute([
      'import { solve } from "@backstamp/backstamp";\n' +
      'await solve({ model: "rst", state: "boulware", kappa: 1, mass: 10 });',
    ]);
    expect(failure).toBeUndefined();
    expect(notebook.cells[0].outputs).toHaveLength(1);
    const { data } = notebook.cells[0].outputs?.[0] as { data: Record<string, string> };
    expect(data["text/plain"]).toMatch(
      /^rst, boulware: throat\nMass +10\n[^]*\nStamp +[0-9a-f]{12}$/,
    );
    expect(data["text/html"]).toMatch(/<strong>rst, boulware: throat<[^]*<table>[^]*<polyline /);
  });
});

/** Compiled only: each wrong option below must be a type error. */
export function wrongOptions(): void {
  const a = (_: SolveOptions): void => {};
  a({ model: "solvable", a: 1, state: "thermal", kappa: 1, massAboveCritical: 1, bathRatio: 0.5 });
  a({ model: "cghs", state: "hartle-hawking", nScalars: 12, horizonDilaton: -1, lambda: 2 });
  a({ model: "swave", state: "thermal", kappa: 1, mass: 10, bathRatio: 1, wallRadius: 40 });
  // @ts-expect-error unknown model
  a({ model: "rts", state: "boulware", kappa: 1, mass: 10 });
  // @ts-expect-error unknown option
  a({ model: "rst", state: "boulware", kappa: 1, mass: 10, bath: 1 });
  // @ts-expect-error neither kappa nor nScalars
  a({ model: "rst", state: "boulware", mass: 10 });
  // @ts-expect-error both kappa and nScalars
  a({ model: "rst", state: "boulware", kappa: 1, nScalars: 12, mass: 10 });
  // @ts-expect-error no mass
  a({ model: "rst", state: "boulware", kappa: 1 });
  // @ts-expect-error not of the solvable family
  a({ model: "cghs", state: "boulware", kappa: 1, massAboveCritical: 1 });
  // @ts-expect-error a bath that the state does not have
  a({ model: "rst", state: "boulware", kappa: 1, mass: 10, bathRatio: 0 });
  // @ts-expect-error a wall that the model does not have
  a({ model: "rst", state: "thermal", kappa: 1, mass: 10, bathRatio: 1, wallRadius: 9 });
  // @ts-expect-error no wall around an swave bath
  a({ model: "swave", state: "thermal", kappa: 1, mass: 10, bathRatio: 1 });
  // @ts-expect-error a scale that the model does not have
  a({ model: "swave", state: "boulware", kappa: 1, mass: 10, lambda: 1 });
  // @ts-expect-error family parameter missing
  a({ model: "solvable", state: "boulware", kappa: 1, mass: 10 });
}
