/**
 * Compiles a model: derivatives from the verified algebra layer, the forms of its family lowered to series
 * programs. The result is plain data that a worker uses without any algebra.
 *
 * @module
 */
import { differentiate, simplify } from "../expr/algebra.ts";
import { lower, type SystemText } from "../expr/lower.ts";
import { parse } from "../expr/parse.ts";
import { print } from "../expr/print.ts";
import type { Program } from "../expr/program.ts";
import { add, type Expr, isNum, mul, num, substitute, sym } from "../expr/tree.ts";
import { decideZero } from "../expr/zero.ts";
import { CATALOGUE } from "./catalogue/mod.ts";
import { inDilaton, inRoot } from "./form/dilaton.ts";
import { linearDilaton } from "./form/linear_dilaton.ts";
import { MINIMAL_SPHERE } from "./form/minimal_sphere.ts";
import { spherical } from "./form/spherical.ts";
import type { ModelName } from "./input.ts";
import type { Family, Model } from "./model.ts";

/** A model ready for the solver: plain data, can be posted to a worker. */
export interface CompiledModel {
  /** Name in the catalogue. */
  readonly name: ModelName;
  /** Asymptotic family, or the closure in four dimensions. */
  readonly family: Family | "anomaly4d";
  /** Whether 1 + 2 h + k vanishes identically (the exactly solvable family). */
  readonly solvable: boolean;
  /** Names of the model's own parameters. */
  readonly parameters: readonly string[];
  /** Expressions as text: the action and what was derived from it. */
  readonly expressions: Readonly<Record<string, string>>;
  /** Series programs by form. */
  readonly programs: Readonly<Record<string, Program>>;
}

/** H, K, V and the derivatives that the forms use, as trees over phi, kappa and the model's parameters. */
export async function derivedFunctions(model: Model): Promise<Readonly<Record<string, Expr>>> {
  const kappa = sym("kappa"), one = { lambda: num(1) };
  const read = (text: string) => substitute(parse(text), one);
  const H1 = read(model.counterterm.H), K1 = read(model.counterterm.K);
  const H = add(read(model.classical.H), mul(kappa, H1)),
    K = add(read(model.classical.K), mul(kappa, K1));
  const V = read(model.classical.V);
  const [H_phi, K_phi, V_phi, h] = await Promise.all(
    [H, K, V, H1].map((f) => differentiate(f, "phi")),
  );
  const H_phiphi = await differentiate(H_phi!, "phi");
  const [hp, hk, delta] = await Promise.all(
    [add(num(1), h!), add(h!, K1), add(add(num(1), mul(num(2), h!)), K1)].map((e) => simplify(e)),
  );
  return {
    H,
    K,
    V,
    H_phi: H_phi!,
    H_phiphi,
    K_phi: K_phi!,
    V_phi: V_phi!,
    h: h!,
    k: K1,
    hp: hp!,
    hk: hk!,
    delta: delta!,
  };
}

/** Refuses a model whose classical part is not that of its family, or whose counterterms bend. */
async function checkFamily(model: Model, f: Readonly<Record<string, Expr>>): Promise<void> {
  const expected = model.family === "linear-dilaton"
    ? { H: "exp(-2*phi)", K: "4*exp(-2*phi)", V: "4*lambda^2*exp(-2*phi)" }
    : { H: "pi*phi^2/2", K: "pi", V: "pi" };
  for (const name of ["H", "K", "V"] as const) {
    const { verdict } = await decideZero(parse(`(${model.classical[name]})-(${expected[name]})`));
    if (verdict !== "proved") {
      throw new RangeError(
        `Cannot compile model ${model.name} as its classical ${name} must be that of the ${model.family} family: current value is ${
          model.classical[name]
        }`,
      );
    }
  }
  for (const name of ["h", "k"] as const) {
    const bend = await differentiate(f[name]!, "phi");
    if (!isNum(bend, 0)) {
      throw new RangeError(
        `Cannot compile model ${model.name} as the counterterm slope ${name} must not depend on phi: current value is ${
          print(f[name]!)
        }`,
      );
    }
  }
}

function forms(
  family: Family,
  solvable: boolean,
  own: readonly string[],
): Record<string, SystemText> {
  const slopes: SystemText = {
    independent: "z",
    unknowns: [],
    parameters: own,
    let: [],
    derivative: {},
    series: [],
    outputs: ["hp", "k", "delta"],
  };
  const action: SystemText = {
    ...slopes,
    independent: "phi",
    parameters: ["kappa", ...withPi(family, own)],
    outputs: ["H_phi", "H_phiphi", "K", "K_phi", "V", "V_phi"],
  };
  const shared = {
    action,
    slopes,
    dilaton: inDilaton(withPi(family, own)),
    root: inRoot(family, solvable, withPi(family, own)),
  };
  return family === "linear-dilaton"
    ? {
      ...shared,
      outer: linearDilaton("outer", solvable, own),
      inner: linearDilaton("inner", solvable, own),
    }
    : {
      ...shared,
      empty: spherical("empty"),
      negative: spherical("empty-negative"),
      bath: spherical("bath"),
      heavy: spherical("heavy-bath"),
    };
}

function withPi(family: Family, own: readonly string[]): readonly string[] {
  return family === "spherical" ? [...own, "pi"] : own;
}

/** The minimal sphere of the anomaly's leading tensor: no dilaton model, one form. */
const ANOMALY: CompiledModel = {
  name: "anomaly4d",
  family: "anomaly4d",
  solvable: false,
  parameters: [],
  expressions: {
    ...Object.fromEntries(MINIMAL_SPHERE.let),
    ...Object.fromEntries(
      Object.entries(MINIMAL_SPHERE.derivative).map(([n, text]) => [`${n}_u`, text]),
    ),
    lng: "log((a+beta/2)/(pi*M^2))",
  },
  programs: { closure: lower(MINIMAL_SPHERE, {}) },
};

/**
 * Compiles a catalogue model.
 *
 * @param name Name in the catalogue.
 * @returns Plain data for the solver.
 * @throws {RangeError} if the model does not belong to the family it names.
 * @example The solvable family is recognised from its expressions
 * ```ts
 * import { compileModel } from "@backstamp/backstamp";
 * if (!(await compileModel("rst")).solvable) throw new Error("RST is solvable");
 * ```
 */
export async function compileModel(name: ModelName): Promise<CompiledModel> {
  if (name === "anomaly4d") return ANOMALY;
  const model = CATALOGUE[name], f = await derivedFunctions(model);
  await checkFamily(model, f);
  const solvable = model.family === "linear-dilaton" && isNum(f.delta!, 0);
  const { k, h, ...rest } = f;
  const texts = Object.entries(forms(model.family, solvable, model.parameters));
  return {
    name,
    family: model.family,
    solvable,
    parameters: model.parameters,
    expressions: {
      ...Object.fromEntries(Object.entries(model.classical).map(([n, t]) => [`${n}_classical`, t])),
      ...Object.fromEntries(
        Object.entries(model.counterterm).map(([n, t]) => [`${n}_counterterm`, t]),
      ),
      ...Object.fromEntries(
        Object.entries({ ...rest, h: h!, k: k! }).map(([n, e]) => [n, print(e)]),
      ),
    },
    programs: Object.fromEntries(texts.map(([n, text]) => [n, lower(text, f)])),
  };
}
