/**
 * Static spherical geometries given by formulas, and their Taylor coefficients at a point.
 *
 * @module
 */
import { lower } from "../expr/lower.ts";
import { parse } from "../expr/parse.ts";
import { call, div, names, num, sym } from "../expr/tree.ts";
import { double } from "../solve/arithmetic/double.ts";
import { type DoubleDouble, doubleDouble } from "../solve/arithmetic/double_double.ts";
import { doubleDoubleCode, DoubleDoubleWalker } from "../solve/series/double_double_walker.ts";
import { doubleCode, DoubleWalker } from "../solve/series/double_walker.ts";
import type { Walker } from "../solve/series/walker.ts";

/** ds^2 = -minusGtt dt^2 + grr dx^2 + radius^2 dOmega; formulas in the grammar of expressions. */
export interface StaticGeometry {
  /** Name of the coordinate x. */
  readonly coordinate: string;
  /** -g_tt, positive. */
  readonly minusGtt: string;
  /** g_xx, positive. */
  readonly grr: string;
  /** Areal radius. */
  readonly radius: string;
  /** Values of the other names. */
  readonly parameters?: Readonly<Record<string, number>>;
}

/** Fields of the optical form: g = e^{2 s} (-dt^2 + N^2 dx^2 + a^2 dOmega). */
export const OPTICAL = ["s", "N", "a"] as const;
/** Highest derivative that a stress tensor of the anomaly needs. */
export const ORDER = 4;

/** Derivatives of s, N and a at a point, orders 0 to 4, in one arithmetic. */
export type Derivatives<T> = Readonly<Record<(typeof OPTICAL)[number], readonly T[]>>;

/** Derivatives of the optical fields, in both arithmetics. */
export interface OpticalFields {
  double(x: number): Derivatives<number>;
  wide(x: number): Derivatives<DoubleDouble>;
}

/**
 * The optical fields of a geometry by power series.
 *
 * @throws {SyntaxError} if a formula is not an expression.
 * @throws {ReferenceError} if a name has no value.
 */
export function opticalFields(geometry: StaticGeometry): OpticalFields {
  const { coordinate, minusGtt, grr, radius, parameters = {} } = geometry;
  const texts = { minusGtt, grr, radius };
  for (const [part, text] of Object.entries(texts)) {
    for (const name of names(parse(text))) {
      if (name === coordinate || Object.hasOwn(parameters, name) || name === "pi") continue;
      throw new ReferenceError(
        `Cannot use the geometry as every name must have a value: ${part} holds ${name}`,
      );
    }
  }
  // names that no formula can hold
  const f = sym("@f"), h = sym("@h"), r = sym("@r"), root = call("sqrt", f);
  const program = lower({
    independent: coordinate,
    unknowns: [],
    parameters: [...Object.keys(parameters), "pi"],
    let: [["@f", minusGtt], ["@h", grr], ["@r", radius]],
    derivative: {},
    series: OPTICAL.map((name) => `@${name}`),
    outputs: OPTICAL.map((name) => `@${name}`),
  }, {
    "@s": div(call("log", f), num(2)),
    "@N": div(call("sqrt", h), root),
    "@a": div(r, root),
  });
  const accuracy = { order: ORDER, tolerance: 2 ** -52 }; // of the step, which is not used
  const narrow = doubleCode(program, accuracy), wide = doubleDoubleCode(program, accuracy);
  const given = Object.entries(parameters);
  const varying = new Set(
    Object.entries(program.series).flatMap(([name, i]) => program.varies[i] ? [name] : []),
  );
  const A = doubleDouble, exact = given.map(([name, v]) => [name, A.from(v)] as const);
  const quick = new DoubleWalker(narrow, { ...parameters, pi: double.pi }, {}, 1);
  const slow = new DoubleDoubleWalker(wide, { ...Object.fromEntries(exact), pi: A.pi }, {}, 1);
  return {
    double: (x) => derivativesAt(quick, varying, x),
    wide: (x) => derivativesAt(slow, varying, A.from(x)),
  };
}

const FACTORIALS = [1, 1, 2, 6, 24]; // of orders 0 to 4

function derivativesAt<T>(walker: Walker<T>, varying: ReadonlySet<string>, x: T): Derivatives<T> {
  const A = walker.arithmetic;
  walker.place(x, []);
  walker.expand([...varying]);
  const values = walker.outputs();
  const of = (name: string) =>
    FACTORIALS.map((n, k) =>
      k === 0
        ? values[name]!
        : varying.has(name)
        ? A.mul(A.from(n), walker.coefficient(name, k))
        : A.from(0)
    );
  return { s: of("@s"), N: of("@N"), a: of("@a") };
}
