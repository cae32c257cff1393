import { Ajv2020 } from "ajv/dist/2020.js";
import { afterAll, describe, expect, it } from "vitest";
import type { ClaimsFile, FileClaim } from "../../lib/audit/claims_file.ts";
import { type LedgerStep, ledgerText } from "../../lib/audit/ledger.ts";
import { runClaims } from "../../lib/audit/run_claims.ts";
import { runReady } from "../../lib/audit/run_ready.ts";
import { ledgerOf } from "../../lib/audit/ledger.ts";
import { closeAlgebra } from "../../lib/expr/proposer.ts";
import SCHEMA from "../../data/schema/ledger.schema.json" with { type: "json" };

afterAll(closeAlgebra);

const valid = new Ajv2020({ strict: true }).compile(SCHEMA);
const claim = (left: string, right: string, more: Partial<FileClaim> = {}): FileClaim => ({
  id: "c",
  statement: "s",
  left,
  right,
  ...more,
});
type Rest = Omit<ClaimsFile, "title" | "claims">;

/** The steps of a file, in the order of its claims; those made for a solution come first. */
async function steps(file: Rest, ...claims: FileClaim[]): Promise<readonly LedgerStep[]> {
  const numbered = claims.map((c, i) => ({ ...c, id: `c${i}` }));
  const ledger = await runClaims(JSON.stringify({ title: "t", ...file, claims: numbered }));
  expect(valid(ledger), JSON.stringify(valid.errors)).toBe(true);
  return ledger.parts.at(-1)!.steps;
}
const verdicts = async (file: Rest, ...claims: FileClaim[]) =>
  (await steps(file, ...claims)).map(({ verdict }) => verdict);

const shell = { on_shell: true };

describe("Claims about a model", () => {
  it("in static gauge, from the action of a catalogue model", async () => {
    const file: Rest = {
      setting: "static",
      model: "cghs",
      constants: ["q"],
      define: { E: "exp(-2*phi)" },
    };
    expect(
      await verdicts(
        file,
        claim("H", "E"),
        claim("d(V, phi)", "-2*V"),
        claim("N", "12*kappa"),
        claim("d(E, sigma, sigma) + kappa*d(rho, sigma, sigma)", "4*lambda^2*exp(2*rho)*E", shell),
        claim("d(E, sigma, sigma) + kappa*d(rho, sigma, sigma)", "4*lambda^2*exp(2*rho)*E"),
        claim("E_ell", "0", shell),
        claim("E_ell", "0"),
        claim("q", "q + 1e-30*q"),
      ),
    ).toEqual(["proved", "proved", "proved", "proved", "refuted", "proved", "refuted", "refuted"]);
  });

  it("in conformal gauge, constraints and stress tensor included", async () => {
    const divergence = "d(Tpp, xm) + d(Tpm, xp)";
    expect(
      await verdicts(
        { setting: "light-cone", model: "any" },
        claim(divergence, "2*d(rho, xp)*Tpm", shell),
        claim(divergence, "d(rho, xp)*Tpm", shell),
        claim("d(H, xp, xp) - 2*d(rho, xp)*d(H, xp) - K*d(phi, xp)^2", "-pi*Tpp", shell),
        claim("d(H, xp, xp) - 2*d(rho, xp)*d(H, xp) - K*d(phi, xp)^2", "-2*pi*Tpp", shell),
      ),
    ).toEqual(["proved", "refuted", "proved", "refuted"]);
  });

  it("of one's own: Einstein gravity reduced from five dimensions", async () => {
    // r^3 R_2 + 6 r (grad r)^2 + 6 r, reduction over the three-sphere; own derivation
    const model = { H: "pi*phi^3/4", K: "3*pi*phi/2", V: "3*pi*phi/2" };
    const f = "(1 - m/x^2)"; // Tangherlini, Nuovo Cim. 27 (1963) 636
    const file: Rest = {
      setting: "static",
      model,
      classical: true,
      constants: ["m"],
      ranges: { x: [3, 5], m: [0.3, 0.9] },
      solution: { coordinate: "x", pace: `1/${f}`, phi: "x", rho: `log${f}/2`, c: 0 },
    };
    expect(await verdicts(file, claim("R", `-d(${f}, x, x)`))).toEqual(Array(4).fill("proved"));
    const wrong = { ...file, solution: { ...file.solution!, rho: "log(1 - m/x)/2" } };
    expect((await verdicts(wrong, claim("R", "0"))).slice(0, 3)).toContain("refuted");
  });

  it("with kappa = 0 the constraint leaves a Killing vector where H'' = K", async () => {
    const still = claim("d(phi, sigma, sigma)", "2*d(rho, sigma)*d(phi, sigma)", shell);
    expect(await verdicts({ setting: "static", model: "cghs", classical: true }, still)).toEqual([
      "proved",
    ]);
    const null_ = claim("d(phi, xp, xp)", "2*d(rho, xp)*d(phi, xp)", shell);
    expect(await verdicts({ setting: "light-cone", model: "cghs", classical: true }, null_))
      .toEqual([
        "proved",
      ]);
    expect(await verdicts({ setting: "light-cone", model: "cghs" }, null_)).toEqual(["refuted"]);
  });

  it("and its solution in closed form, held against the derived equations", async () => {
    // the classical linear-dilaton hole, E = e^u + m with u = 2 sigma
    const E = "(exp(2*s) + m)";
    const file: Rest = {
      setting: "static",
      model: "cghs",
      classical: true,
      constants: ["m"],
      define: { mass: `${E} - exp(2*s)` },
      solution: {
        coordinate: "s",
        phi: `-log${E}/2`,
        rho: `s - log${E}/2 + log(lambda^(-1))`,
        c: 0,
      },
    };
    const own = claim("R", "4*lambda^2*mass/exp(-2*phi)");
    expect(await verdicts(file, own)).toEqual(["proved", "proved", "proved", "proved"]);
  });
});

describe("Parameters with exact values", () => {
  it("let a solution be stated in units of one of them", async () => {
    const file: Rest = {
      setting: "static",
      model: "jt",
      values: { L: 1 },
      constants: ["xh"],
      ranges: { x: [1.6, 3.1], xh: [0.4, 1.3] },
      solution: {
        coordinate: "x",
        pace: "1/(x^2-xh^2)",
        phi: "x + kappa/2",
        rho: "log(x^2-xh^2)/2",
        c: "2*xh",
      },
    };
    const half = { ...file, values: { L: "1/2" } };
    expect(await verdicts(file, claim("R", "-2"))).toEqual(Array(4).fill("proved"));
    expect(await verdicts(half, claim("R", "-2"))).toContain("refuted");
    await expect(verdicts({ ...file, values: { M: 1 } }, claim("R", "-2"))).rejects.toThrow(
      "Cannot set M as it must be a parameter of the model: these are L",
    );
  });
});

describe("Claims in a setting of one's own", () => {
  it("use fields, open functions, rules, abbreviations and ranges", async () => {
    const file: Rest = {
      setting: "free",
      coordinates: ["x"],
      fields: ["u"],
      functions: { f: "u" },
      rules: { "d(u,x,x)": "-w^2*u" },
      constants: ["w", "y"],
      ranges: { y: [-2, -1] },
      define: { energy: "d(u, x)^2 + w^2*u^2" },
    };
    expect(
      await verdicts(
        file,
        claim("d(energy, x)", "0", shell),
        claim("d(energy, x)", "0"),
        claim("d(f, x)", "d(f, u)*d(u, x)"),
        claim("d(f, x, x)", "d(f, u, u)*d(u, x)^2 - d(f, u)*w^2*u", shell),
        claim("sqrt(y^2)", "-y"),
        claim("log(y)", "log(y)*2/2*y/y + log(y) - log(y)"),
      ),
    ).toEqual(["proved", "refuted", "proved", "proved", "holds-numerically", "undecided"]);
  });

  it("know kappa in every convention", async () => {
    const claims = ["house", "kappa-24", "kappa-48"].map((convention, i) =>
      claim("kappa", `N/${12 * 2 ** i}`, { convention })
    );
    expect(await verdicts({ setting: "free" }, ...claims)).toEqual(Array(3).fill("proved"));
  });

  it("write tagged quantities with the factor of their convention", async () => {
    const file: Rest = {
      setting: "free",
      constants: ["M", "M0"],
      quantities: { M: "mass" },
    };
    expect(
      await verdicts(
        file,
        claim("M/M0", "M/M0"),
        claim("M", "M/pi", { convention: "canonical-mass" }),
      ),
    ).toEqual(["proved", "refuted"]);
  });
});

describe("A verdict", () => {
  it("names the constant that repairs a side or a term", async () => {
    const found = await steps(
      { setting: "free", constants: ["x", "y"] },
      claim("x^2 + y", "x^2 - y"),
      claim("x", "-x"),
      claim("2*x/3", "x"),
      claim("x + pi*y", "x + y"),
      claim("x + y", "x + y + x*y"),
      claim("exp(x)*y*x^3", "y"),
    );
    expect(found.map(({ repair }) => repair)).toEqual([
      "right side with the other sign of the term -y",
      "left side = (-1) * right side",
      "left side = (2/3) * right side",
      "right side with pi times the term y",
      "right side without the term x*y",
      "left side = (x^3*exp(x)) * right side",
    ]);
  });

  it("up to a factor names the factor, and is undecided where it knows no name for it", async () => {
    const up = { up_to_factor: true };
    const found = await steps(
      { setting: "free", constants: ["x", "y"] },
      claim("3*x - 3*y", "y - x", up),
      claim("exp(x)*(x - y)", "2*(x - y)*x", up),
      claim("sqrt(2)*(x + y)", "x + y", up),
      claim("log(2)*(x + y)", "x + y", up),
      claim("x + y", "x - y", up),
      claim("(x - y)^2", "x - y", up),
    );
    expect(found.map(({ verdict, factor }) => [verdict, factor])).toEqual([
      ["proved", "-3"],
      ["proved", "exp(x)/(2*x)"],
      ["proved", "sqrt(2)"],
      ["undecided", ""],
      ["refuted", ""],
      ["refuted", ""],
    ]);
  });

  it("of refutation comes with a point at which both sides can be worked out", async () => {
    const [step] = await steps({ setting: "free", constants: ["x"] }, claim("x^2", "2*x"));
    const x = Number(step!.evidence.at!["x"]);
    // both sides to 15 digits, doubles to 16
    expect(Number(step!.evidence.left) / x ** 2).toBeCloseTo(1, 13);
    expect(Number(step!.evidence.right) / (2 * x)).toBeCloseTo(1, 13);
  });

  it("is the same bytes each time, and other points with another seed", async () => {
    const file = { title: "t", setting: "static", model: "rst", claims: [claim("R", "2*R")] };
    const texts = await Promise.all(
      [file, file, { ...file, seed: 7 }].map(async (f) =>
        ledgerText(await runClaims(JSON.stringify(f)))
      ),
    );
    expect(texts[0]).toBe(texts[1]);
    const at = (text: string) => JSON.parse(text).parts[1].steps[0].evidence.at;
    expect(at(texts[2]!)).not.toEqual(at(texts[0]!));
  });
});

describe("The claims files that come with the program", () => {
  it("are proved, the one in README included", async () => {
    const [, block] = /```yaml\n([\s\S]*?)```/.exec(Deno.readTextFileSync("README.md"))!;
    const texts = [...Deno.readDirSync("data/claims")].map(({ name }) =>
      Deno.readTextFileSync(`data/claims/${name}`)
    );
    expect(texts.length).toBeGreaterThan(0);
    for (const text of [block!, ...texts]) {
      const { counts, parts } = await runClaims(text);
      expect(counts.proved).toBe(parts.flatMap((part) => part.steps).length);
    }
  });
});

describe("The ledger of the ready audits", () => {
  it("has the form of its schema and does not depend on the number of workers", async () => {
    const about = { title: "t", input: "", versions: {} };
    const one = await runReady({ model: "jt", workers: 1 }),
      two = await runReady({ model: "jt", workers: 2 });
    const ledger = ledgerOf(one.parts, about);
    expect(valid(ledger), JSON.stringify(valid.errors)).toBe(true);
    expect(ledgerText(ledgerOf(two.parts, about))).toBe(ledgerText(ledger));
    expect(ledger.counts.proved).toBe(one.parts.flatMap(({ steps }) => steps).length);
  });
});
