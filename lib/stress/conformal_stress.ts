/**
 * The stress tensor that the conformal anomaly gives the empty (Boulware) state on a static geometry, evaluated
 * by power series. The tensor is derived from the anomaly action by the audit, not typed in.
 *
 * What holds of it: exact trace; for fields that are conformally invariant the state-dependent rest is left
 * out, which on Schwarzschild gives D. N. Page's approximation for the scalar (Phys. Rev. D 25 (1982) 1499).
 *
 * @module
 */
import { anomalyTensor } from "../audit/anomaly_action.ts";
import { partsOf } from "../audit/jets.ts";
import { lower } from "../expr/lower.ts";
import { div, type Expr, mul, names, num, pow, substitute, sym } from "../expr/tree.ts";
import {
  type AnomalyCoefficients,
  anomalyOf,
  type BetaScheme,
  type FieldContent,
} from "../model/content.ts";
import { AGAINST_DOUBLE, bounded } from "../observe/bound.ts";
import type { Bounded } from "../observe/result.ts";
import type { Arithmetic } from "../solve/arithmetic/arithmetic.ts";
import { double } from "../solve/arithmetic/double.ts";
import { doubleDouble } from "../solve/arithmetic/double_double.ts";
import { emitEvaluateDouble } from "../solve/series/emit_double.ts";
import { constants } from "../solve/series/evaluate.ts";
import { type Derivatives, OPTICAL, opticalFields, type StaticGeometry } from "./geometry.ts";

/** A diagonal stress tensor at a point, mixed components. */
export interface StressAt<T> {
  /** -T^t_t. */
  readonly energy: T;
  /** T^x_x. */
  readonly radial: T;
  /** T^theta_theta. */
  readonly tangential: T;
}

/** The tensor on one geometry. */
export interface ConformalStress {
  /** In double precision, without bounds. */
  quick(x: number): StressAt<number>;
  /** With bounds, by a second evaluation in double-double arithmetic. */
  at(x: number): StressAt<Bounded>;
}

const COEFFICIENTS = ["c", "ae", "beta"] as const;

/** The name of a jet as a parameter: d(s, z, z) is s2. */
function flat(name: string): string {
  const { base, by } = partsOf(name);
  return (OPTICAL as readonly string[]).includes(base) ? `${base}${by.length}` : name;
}

let program: ReturnType<typeof lower> | undefined;

/** The tensor as a list of operations over the derivatives; lowered once. */
function tensorProgram(): ReturnType<typeof lower> {
  if (program) return program;
  const { tt, zz, th } = anomalyTensor().tensor;
  const scale = mul(num(16), pow(sym("pi"), num(2)));
  const rename = (e: Expr) =>
    div(substitute(e, Object.fromEntries(names(e).map((n) => [n, sym(flat(n))]))), scale);
  const jets = OPTICAL.flatMap((name) => [0, 1, 2, 3, 4].map((k) => `${name}${k}`));
  return program = lower({
    independent: "z",
    unknowns: [],
    parameters: [...jets, ...COEFFICIENTS, "pi"],
    let: [],
    derivative: {},
    series: [],
    outputs: ["tt", "zz", "th"],
  }, { tt: rename(tt), zz: rename(zz), th: rename(th) });
}

function constantsOf<T>(A: Arithmetic<T>, { c, a, beta }: AnomalyCoefficients): Record<string, T> {
  const ratio = ({ p, q }: { p: bigint; q: bigint }) => A.ratio(p, q);
  return { c: ratio(c), ae: ratio(a), beta: ratio(beta), pi: A.pi };
}

function values<T>(
  A: Arithmetic<T>,
  at: Derivatives<T>,
  coefficients: AnomalyCoefficients,
): Record<string, T> {
  const out = constantsOf(A, coefficients);
  for (const name of OPTICAL) at[name].forEach((d, k) => out[`${name}${k}`] = d);
  return out;
}

/** Evaluates the empty state's tensor from derivatives, in double precision. */
export function quickTensor(
  coefficients: AnomalyCoefficients,
): (at: Derivatives<number>) => StressAt<number> {
  const program = tensorProgram(), evaluate = emitEvaluateDouble(program);
  const none = new Float64Array(0), list = new Float64Array(program.parameters.length);
  const out = new Float64Array(3);
  const constant = constantsOf(double, coefficients);
  program.parameters.forEach((name, i) => list[i] = constant[name] ?? 0);
  const first = OPTICAL.map((name) => program.parameters.indexOf(`${name}0`));
  return (at) => {
    OPTICAL.forEach((name, j) => list.set(at[name], first[j]!)); // the five orders stand together
    evaluate(none, 0, list, out);
    return { energy: -out[0]!, radial: out[1]!, tangential: out[2]! };
  };
}

/** Which state of which fields. */
export interface ConformalFields {
  /** How many fields of each spin. */
  readonly content: FieldContent;
  /** What fixes the vectors' part of beta. */
  readonly scheme: BetaScheme;
  /** Surface gravity of the horizon that the state is regular on; absent for the empty state (Boulware). */
  readonly surfaceGravity?: number;
}

/** Energy density of the gas that scalars add to the empty state, in units of minus T^x_x: diag(-3, 1, 1, 1). */
function gasOf({ content, surfaceGravity }: ConformalFields): number {
  if (surfaceGravity === undefined) return 0;
  const { weyl, vectors } = content;
  if (weyl > 0 || vectors > 0) {
    throw new RangeError(
      "Cannot give the thermal tensor as the fields must be scalars: for spinors and vectors a gas of T^4 alone " +
        `leaves a pole at the horizon; current content has ${weyl} Weyl spinors and ${vectors} vectors`,
    );
  }
  return surfaceGravity;
}

/**
 * The stress tensor of conformal fields on a static geometry: from the anomaly in the empty state, for scalars also
 * in the state that is regular on a horizon (Page's approximation: a gas at the local temperature is added).
 *
 * Where the geometry is not Ricci-flat a multiple of the Bach tensor stays open (a finite Weyl-squared term); it is fixed
 * here by the unit of t: the proper time of a place where -g_tt = 1.
 *
 * @param geometry The metric, by formulas.
 * @param fields Content, scheme of beta, state.
 * @returns Evaluators; components in units hbar = c = 1, inverse length to the fourth.
 * @throws {SyntaxError | ReferenceError} if the geometry cannot be read.
 * @throws {RangeError} if the content is impossible, or a thermal state is asked for other fields than scalars.
 * @example Nothing on flat space
 * ```ts
 * import { conformalStress } from "@backstamp/backstamp";
 * const fields = { content: { scalars: 1, weyl: 0, vectors: 0 }, scheme: "zeta" } as const;
 * const flat = { coordinate: "r", minusGtt: "1", grr: "1", radius: "r" };
 * if (conformalStress(flat, fields).quick(2).energy !== 0) throw new Error("not empty");
 * ```
 */
export function conformalStress(
  geometry: StaticGeometry,
  fields: ConformalFields,
): ConformalStress {
  const coefficients = anomalyOf(fields.content, fields.scheme), gravity = gasOf(fields);
  const optical = opticalFields(geometry), program = tensorProgram();
  const evaluate = quickTensor(coefficients);
  /** pi^2/90 N T^4 at the local temperature: N (surface gravity)^4/(1440 pi^2 (-g_tt)^2). */
  const gas = <T>(A: Arithmetic<T>, s: T): T => {
    const k = A.from(gravity), k2 = A.mul(k, k), e = A.exp(A.mul(A.from(-4), s));
    const unit = A.mul(A.from(1440), A.mul(A.pi, A.pi));
    return A.mul(A.div(A.mul(A.from(fields.content.scalars), A.mul(k2, k2)), unit), e);
  };
  const sum = <T>(A: Arithmetic<T>, tt: T, zz: T, th: T, s: T): StressAt<T> => {
    if (gravity === 0) return { energy: A.neg(tt), radial: zz, tangential: th };
    const p = gas(A, s);
    return {
      energy: A.sub(A.mul(A.from(3), p), tt),
      radial: A.add(zz, p),
      tangential: A.add(th, p),
    };
  };
  const quick = (x: number): StressAt<number> => {
    const at = optical.double(x), { energy, radial, tangential } = evaluate(at);
    return sum(double, -energy, radial, tangential, at.s[0]!);
  };
  const at = (x: number): StressAt<Bounded> => {
    const A = doubleDouble, first = quick(x), fine = optical.wide(x);
    const { tt, zz, th } = constants(A, program, values(A, fine, coefficients));
    const wide = sum(A, tt!, zz!, th!, fine.s[0]!);
    const size = Math.max(...[tt!, zz!, th!].map(({ hi }) => Math.abs(hi)));
    // the components share what amplifies rounding: where one is right by luck another shows it
    const difference = Math.max(
      ...(["energy", "radial", "tangential"] as const).map((n) => Math.abs(wide[n].hi - first[n])),
    );
    const one = (name: keyof typeof wide) => bounded(wide[name], difference, size, AGAINST_DOUBLE);
    return { energy: one("energy"), radial: one("radial"), tangential: one("tangential") };
  };
  return { quick, at };
}
