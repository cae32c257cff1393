/**
 * Conventions of the literature, with exact factors between them. A quantity of convention b is
 * `conversion(quantity, a, b)` times the same quantity of convention a.
 *
 * @module
 */
import { normalForm } from "../expr/normal.ts";
import { parse } from "../expr/parse.ts";
import { div, type Expr } from "../expr/tree.ts";

/** What conventions differ in. */
export const QUANTITIES = ["kappa", "action", "curvature", "mass", "flux"] as const;
/** One of {@linkcode QUANTITIES}. */
export type Quantity = (typeof QUANTITIES)[number];

/** One way of writing things down. */
export interface Convention {
  /** Name in claims files and ledgers. */
  readonly name: string;
  /** kappa for N scalars, as text in N. */
  readonly kappa: string;
  /** What stands before Int sqrt(-g) [H R + K (grad phi)^2 + V]. */
  readonly prefactor: string;
  /** Sign of R on a sphere. */
  readonly curvature: "+" | "-";
  /** The mass of a hole in units of the m of E = e^u + m + ... times lambda. */
  readonly mass: string;
  /** The stress tensor in units of the canonical one, -2/sqrt(-g) times the variation by g^{mn}. */
  readonly flux: string;
  /** Who writes so. */
  readonly source: string;
}

const HOUSE: Convention = {
  name: "house",
  kappa: "N/12",
  prefactor: "1/(2*pi)",
  curvature: "+",
  mass: "1",
  flux: "1",
  source: "this program",
};

/** The named conventions. Sources are from memory where they say so. */
export const CONVENTIONS: readonly Convention[] = [
  HOUSE,
  {
    ...HOUSE,
    name: "pulse",
    flux: "pi",
    source: "T_{++} = (d_+ f)^2/2 for a pulse of matter: Phys. Rev. D 45 (1992) R1005, from memory",
  },
  {
    ...HOUSE,
    name: "canonical-mass",
    mass: "1/pi",
    source: "energy of the canonical stress tensor with 1/2 pi before the action, own derivation",
  },
  { ...HOUSE, name: "kappa-24", kappa: "N/24", source: "common practice, no source" },
  { ...HOUSE, name: "kappa-48", kappa: "N/48", source: "common practice, no source" },
  {
    ...HOUSE,
    name: "half-action",
    prefactor: "1/2",
    source: "first-order dilaton gravity: Phys. Rep. 369 (2002) 327, from memory",
  },
  { ...HOUSE, name: "bare-action", prefactor: "1", source: "common practice, no source" },
  {
    ...HOUSE,
    name: "four-dimensional",
    prefactor: "1/4",
    source: "4 pi/(16 pi G) with G = 1 before Int r^2 R: spherical reduction of Einstein's action",
  },
  {
    ...HOUSE,
    name: "negative-curvature",
    curvature: "-",
    source: "R negative on a sphere: S. Weinberg, Gravitation and Cosmology (1972)",
  },
];

/**
 * A convention by name.
 *
 * @throws {RangeError} if there is none of that name.
 */
export function conventionOf(name: string): Convention {
  const found = CONVENTIONS.find((c) => c.name === name);
  if (found) return found;
  throw new RangeError(
    `Cannot use the convention as its name must be one of ${
      CONVENTIONS.map((c) => c.name).join(", ")
    }: current value is ${name}`,
  );
}

/** How a quantity of a convention compares with that of all others, up to what they share. */
const UNIT: Readonly<Record<Quantity, (c: Convention) => string>> = {
  kappa: (c) => `(${c.kappa})/N`,
  action: (c) => `1/(${c.prefactor})`,
  curvature: (c) => c.curvature === "+" ? "1" : "(-1)",
  mass: (c) => c.mass,
  flux: (c) => c.flux,
};

/**
 * The exact factor between two conventions.
 *
 * @param quantity What is converted; `action` are H, K and V.
 * @param from Convention in which the value is known.
 * @param to Convention in which it is wanted.
 * @returns The factor: a rational, or one times a power of pi.
 * @example kappa = N/24 is half of kappa = N/12
 * ```ts
 * import { conventionOf, conversion, print } from "@backstamp/backstamp";
 * const factor = conversion("kappa", conventionOf("house"), conventionOf("kappa-24"));
 * if (print(factor) !== "1/2") throw new Error(print(factor));
 * ```
 */
export function conversion(quantity: Quantity, from: Convention, to: Convention): Expr {
  const unit = UNIT[quantity];
  return normalForm(div(parse(unit(to)), parse(unit(from))));
}
