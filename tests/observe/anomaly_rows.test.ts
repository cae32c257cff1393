import { execFileSync } from "node:child_process";
import process from "node:process";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { parse } from "../../lib/expr/parse.ts";
import { uniform } from "../../lib/expr/points.ts";
import { type BigNumber, precise } from "../../lib/expr/precise.ts";
import { compileModel } from "../../lib/model/compile.ts";
import type { RowInput } from "../../lib/model/input.ts";
import type { Bounded, RowResult } from "../../lib/observe/result.ts";
import { computeRow } from "../../lib/observe/row.ts";
import { minimalSphere } from "../../lib/stress/minimal_sphere.ts";
import { anomalyOf } from "../../lib/model/content.ts";

const model = await compileModel("anomaly4d");
const row = (rest: Partial<RowInput>): RowInput => ({
  model: "anomaly4d",
  state: "boulware",
  kappa: 0,
  mass: 10,
  realScalars: 1,
  diracSpinors: 0,
  vectors: 0,
  beta: 1 / 180,
  tolerance: 1e-10,
  ...rest,
});
const solved = (rest: Partial<RowInput>): RowResult => computeRow(row(rest), model).result;

const here = (name: string) => fileURLToPath(new URL(`../reference/${name}`, import.meta.url));
const python = ["/usr/bin/python3", "python3"].find((name) => {
  try {
    execFileSync(name, ["-c", "import mpmath"], { stdio: "ignore" });
    return true;
  } catch {
    return false;
  }
});
// absent on a user's machine: skipped by name; in CI its absence is a failure
const withMpmath = it.runIf(python !== undefined || process.env.CI === "true");

interface Reference {
  readonly a: string;
  readonly beta: number;
  readonly mass: number;
  readonly lnR: string;
  readonly lngtt: string;
}
const references = Deno.readTextFileSync(here("minimal_sphere.csv")).trim().split("\n").map(
  (line): Reference => {
    const [a, beta, mass, lnR, lngtt] = line.split(",") as [string, string, string, string, string];
    return { a, beta: Number(beta), mass: Number(mass), lnR, lngtt };
  },
);

/** Contents of the references by their coefficient a. */
const CONTENT: Readonly<Record<string, Partial<RowInput>>> = {
  "1/360": {},
  "5/18": { realScalars: 100 },
  "11/360": { realScalars: 0, diracSpinors: 1 },
  "31/180": { realScalars: 0, vectors: 1 },
  "11/48": { realScalars: 4, diracSpinors: 1.5, vectors: 1 }, // (8 + 33 + 124)/720
};

/** Whether a number is within its bound of an exact one. */
function within(
  { value, error }: Bounded,
  exact: BigNumber,
  big: (x: string) => BigNumber,
): boolean {
  return exact.minus(big(value.toPrecision(60))).abs().lte(big(error!.toPrecision(30)));
}

describe("Rows of model anomaly4d", () => {
  it("lie within their bounds of mpmath's values", async () => {
    const { big, evaluate } = await precise(60);
    expect(references.length).toBeGreaterThan(5);
    for (const { a, beta, mass, lnR, lngtt } of references) {
      const { numbers, kind, outcome } = solved({ ...CONTENT[a], beta, mass });
      expect([outcome, kind], `${a}, ${mass}`).toEqual(["solved", "throat"]);
      const known = { M: big(mass.toPrecision(60)), L: big(lnR), g: big(lngtt) };
      const exact = (text: string) => evaluate(parse(text), known);
      expect(within(numbers.dilaton_locus!, exact("M*exp(L)"), big), `radius ${a} ${mass}`).toBe(
        true,
      );
      expect(within(numbers.minus_gtt_locus!, exact("exp(g)"), big), `-g_tt ${a} ${mass}`).toBe(
        true,
      );
      expect(within(numbers.log10_minus_gtt_locus!, exact("g/log(10)"), big), `log ${a} ${mass}`)
        .toBe(true);
      expect(within(numbers.entropy_classical!, exact("pi*(M*exp(L))^2"), big), `S ${a} ${mass}`)
        .toBe(true);
      // and no bound is wide: an ulp at most
      for (const { value, error } of [numbers.dilaton_locus!, numbers.minus_gtt_locus!]) {
        expect(error! / value).toBeLessThan(2 ** -52);
      }
    }
  });

  withMpmath("whose references the script beside them gives", () => {
    const { a, beta, mass, lnR, lngtt } = references.find((r) => r.mass === 3)!;
    const args = ["-B", here("minimal_sphere.py"), "25", a, String(beta), String(mass)];
    const again = execFileSync(python!, args, { encoding: "utf8" }).trim().split(",");
    // 25 digits give 17
    expect(again[3]!.slice(0, 17)).toBe(lnR.slice(0, 17));
    expect(again[4]!.slice(0, 17)).toBe(lngtt.slice(0, 17));
  });

  it("agree with the library's function, for 60 random rows over the whole range of masses", () => {
    const draw = uniform(8);
    for (let i = 0; i < 60; i++) {
      const mass = 10 ** (69 * draw()), scalars = 1 + Math.floor(1000 * draw());
      const { numbers } = solved({ mass, realScalars: scalars, beta: 0 });
      const a = anomalyOf({ scalars, weyl: 0, vectors: 0 }, "zeta");
      const sphere = minimalSphere({ ...a, beta: { kind: "num", p: 0n, q: 1n } }, mass);
      expect(sphere.outcome === "solved" && sphere.radius.value).toBe(numbers.dilaton_locus!.value);
    }
  });

  it("are refused where the leading term vanishes or changes sign, by exact arithmetic", () => {
    // a = 1/360: beta = -1/180 rounds to a double above or below; the sign of a + beta/2 is that of the rounding
    const beta = -1 / 180, below = beta < -(1 / 180) ? beta : beta - 2 ** -60;
    for (const b of [below, -0.1, -1e6]) {
      const { outcome, reason, numbers } = solved({ beta: b });
      expect(outcome).toBe("refused");
      expect(reason).toMatch(/^no-leading-term: a \+ beta\/2 must be positive .* it is -/);
      expect(numbers).toEqual({});
    }
    expect(solved({ beta: -1 / 180 + 2 ** -60 }).outcome).toBe("solved");
  });

  it("say where they leave the semiclassical domain", () => {
    expect(solved({}).validity).toBe("high-curvature;few-fields");
    expect(solved({ mass: 1e30 }).validity).toBe("few-fields");
    expect(solved({ mass: 1e30, realScalars: 0, diracSpinors: 12 }).validity).toBe("inside");
  });
});
