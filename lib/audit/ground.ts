/**
 * What the claims of a file stand on: the calculus, the equations, and the names of its setting, all in the
 * house convention.
 *
 * @module
 */
import { parse } from "../expr/parse.ts";
import type { Ranges } from "../expr/points.ts";
import { div, type Expr, mul, names, num, substitute, sym } from "../expr/tree.ts";
import { type Action, actionOf, classical, GENERIC } from "./action.ts";
import type { ClaimsFile } from "./claims_file.ts";
import { type Convention, conventionOf, conversion, type Quantity } from "./conventions.ts";
import { Jets, partsOf } from "./jets.ts";
import { lightConeContext } from "./light_cone.ts";
import type { Rule } from "./shell.ts";
import { staticContext, staticEquations } from "./static.ts";

type Named<T> = Readonly<Record<string, T>>;

/** The ground of a file. */
export interface Ground {
  readonly jets: Jets;
  readonly rules: readonly Rule[];
  readonly ranges: Ranges;
  /** Names that stand for expressions. */
  readonly bindings: Named<Expr>;
  /** Names that stand for themselves: coordinates, fields, open functions, constants. */
  readonly own: readonly string[];
  /** Names that conventions write with different factors. */
  readonly quantities: Named<Quantity>;
  /** The action, if there is one. */
  readonly action?: Action;
}

const HOUSE = conventionOf("house");
const SHARED: Named<Quantity> = {
  H: "action",
  K: "action",
  V: "action",
  kappa: "kappa",
  R: "curvature",
};
const SCALARS = parse("12*kappa"); // N

type Reader = (text: string | number) => Expr;

/** Reads a text of a convention whose only quantity can be kappa. */
function reader(convention: Convention): Reader {
  const kappa = mul(conversion("kappa", HOUSE, convention), sym("kappa"));
  return (text) => substitute(parse(String(text)), { kappa, N: SCALARS });
}

/** The action that a file names or writes out. */
export function actionOfFile(file: ClaimsFile, convention: Convention): Action {
  const { model } = file, read = reader(convention);
  const own = (text: string | number) => mul(conversion("action", convention, HOUSE), read(text));
  const made: Action = typeof model === "object"
    ? {
      name: "the model of the file",
      functions: { H: own(model.H), K: own(model.K), V: own(model.V) },
      source: model.source ?? "the file",
      ranges: { phi: [0.3, 1.3], rho: [-0.8, 0.9] },
    }
    : model === "any"
    ? GENERIC
    : actionOf(model ?? "");
  const set = withValues(made, file.values ?? {}, read);
  return file.classical ? classical(set) : set;
}

/** The action with exact values for some of its parameters. */
function withValues(action: Action, values: Named<string | number>, read: Reader): Action {
  const known = parametersOf(action), { functions: f } = action;
  for (const name of Object.keys(values)) {
    if (known.includes(name)) continue;
    throw new RangeError(
      `Cannot set ${name} as it must be a parameter of the model: these are ${
        known.join(", ") || "none"
      }`,
    );
  }
  const table = Object.fromEntries(Object.entries(values).map(([name, v]) => [name, read(v)]));
  const put = (e: Expr) => substitute(e, table);
  return f ? { ...action, functions: { H: put(f.H), K: put(f.K), V: put(f.V) } } : action;
}

/** Parameters of an action: what its functions hold besides phi and kappa. */
function parametersOf({ functions }: Action): string[] {
  const held = functions ? [functions.H, functions.K, functions.V].flatMap(names) : [];
  return [...new Set(held)].filter((name) => !["phi", "kappa", "pi"].includes(name));
}

function modelGround(file: ClaimsFile, action: Action): Ground {
  const still = file.setting === "static";
  const { jets, rules, ranges, bindings } = still
    ? staticContext(action, { constraint: true })
    : lightConeContext(action);
  const read = (text: string) => jets.read(text, bindings);
  const T = (x: string) =>
    read(`-kappa/(2*pi)*(d(psi,${x},${x}) - 2*d(rho,${x})*d(psi,${x}) - d(psi,${x})^2/2)`);
  const tensor: Named<Expr> = still
    ? {
      pressure: read("kappa/(2*pi)*exp(-2*rho)*(c^2/4 - d(rho,sigma)^2)"),
      energy: read("kappa/(2*pi)*(exp(-2*rho)*(c^2/4 - d(rho,sigma)^2) - R)"),
    }
    : { Tpp: T("xp"), Tmm: T("xm"), Tpm: read("-kappa/pi*d(rho,xp,xm)") };
  const flux = Object.fromEntries(Object.keys(tensor).map((name) => [name, "flux" as const]));
  const open = action.functions ? {} : { H: sym("H"), K: sym("K"), V: sym("V") };
  return {
    jets,
    rules,
    ranges,
    bindings: { ...bindings, ...open, ...tensor, kappa: sym("kappa"), N: SCALARS },
    own: [
      ...jets.setting.coordinates,
      ...["phi", "rho", "psi"],
      ...(still ? ["c"] : []),
      ...parametersOf(action),
    ],
    quantities: { ...SHARED, ...flux },
    action,
  };
}

/** The derived equations with a solution put in: each field an expression of one coordinate. */
function solutionGround(file: ClaimsFile, action: Action, convention: Convention): Ground {
  const { coordinate, pace = 1, ...texts } = file.solution!;
  const read = reader(convention), jets = new Jets({ coordinates: [coordinate], fields: [] });
  const c = read(texts.c);
  const fields: Named<Expr> = { phi: read(texts.phi), rho: read(texts.rho), ell: num(1) };
  const along = (e: Expr) => div(jets.total(e, coordinate), read(pace));
  const put = (e: Expr) => {
    const table: Record<string, Expr> = { c };
    for (const name of names(e)) {
      const { base, by } = partsOf(name);
      if (Object.hasOwn(fields, base)) table[name] = by.reduce((x) => along(x), fields[base]!);
    }
    return substitute(e, table);
  };
  const { equations } = staticEquations(action);
  const functions = Object.entries(action.functions ?? {}).flatMap(([name, f]) => [
    [name, put(f)] as const,
    [`${name}_phi`, put(jets.partial(f, "phi"))] as const,
  ]);
  return {
    jets,
    rules: [],
    ranges: action.ranges,
    bindings: {
      ...Object.fromEntries(functions),
      phi: fields["phi"]!,
      rho: fields["rho"]!,
      c,
      R: put(jets.read("-2*rho2*exp(-2*rho)", { rho2: along(along(fields["rho"]!)) })),
      E_rho: put(equations.rho),
      E_phi: put(equations.phi),
      E_ell: put(equations.ell),
      kappa: sym("kappa"),
      N: SCALARS,
    },
    own: [coordinate, ...parametersOf(action)],
    quantities: { ...SHARED, H_phi: "action", K_phi: "action", V_phi: "action" },
    action,
  };
}

function freeGround(file: ClaimsFile): Ground {
  const { coordinates = [], fields = [], functions = {} } = file;
  return {
    jets: new Jets({ coordinates, fields, functions }),
    rules: [],
    ranges: {},
    bindings: { kappa: sym("kappa"), N: SCALARS },
    own: [...coordinates, ...fields, ...Object.keys(functions)],
    quantities: { kappa: "kappa" },
  };
}

/**
 * The ground of a file.
 *
 * @param file What the file holds.
 * @param convention Convention of the file.
 * @throws {RangeError | SyntaxError} if its model or solution cannot be used.
 */
export function groundOf(file: ClaimsFile, convention: Convention): Ground {
  if (file.setting === "free") return freeGround(file);
  const action = actionOfFile(file, convention);
  return file.solution ? solutionGround(file, action, convention) : modelGround(file, action);
}
