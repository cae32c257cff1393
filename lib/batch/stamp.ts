/**
 * The stamp of a row: lower-case hexadecimal SHA-256 over the canonical JSON (RFC 8785) of everything that
 * can change the row's numbers. The case's name is not part of it.
 *
 * @module
 */
import canonicalize from "canonicalize";
import { createHash } from "node:crypto";
import type { RowInput } from "../model/input.ts";

/** Everything but the inputs that can change a row's numbers. */
export interface StampContext {
  /** The model's functions as text. */
  readonly expressions: Readonly<Record<string, string>>;
  /** Settings of the solver. */
  readonly settings: unknown;
  /** Digest of the files that the row solver consists of. */
  readonly core: string;
  /** Version of each package that those files import. */
  readonly pins: Readonly<Record<string, string>>;
  /** Versions of the runtime and its engine. */
  readonly runtime: Readonly<Record<string, string>>;
}

/**
 * SHA-256 of text (as UTF-8) or bytes.
 *
 * @param data What is hashed.
 * @returns 64 lower-case hexadecimal digits.
 */
export function sha256(data: string | Uint8Array): string {
  return createHash("sha256").update(data).digest("hex");
}

/**
 * Canonical JSON (RFC 8785).
 *
 * @param value A JSON value.
 * @returns Its one canonical text.
 * @throws {Error} if the value has no JSON text.
 */
export function canonicalJson(value: unknown): string {
  const text = canonicalize(value);
  if (text === undefined) {
    throw new Error(`Cannot write canonical JSON as a JSON value must be given: got ${value}`);
  }
  return text;
}

/**
 * The inputs of a row as they enter its stamp: keys are the columns of the parameter table, a parameter
 * that the row does not have has no key.
 *
 * @param input A validated row.
 * @returns A JSON object.
 */
export function stampInputs(input: RowInput): Readonly<Record<string, string | number>> {
  // Keys stand in the order in which RFC 8785 sorts them.
  const inputs: Record<string, string | number | undefined> = {
    a: input.a,
    bath_ratio_minus_one: input.bathRatioMinusOne,
    beta: input.beta,
    dirac_spinors: input.diracSpinors,
    horizon_dilaton: input.horizonDilaton,
    kappa: input.kappa,
    lambda: input.lambda,
    mass: input.mass,
    mass_above_critical: input.massAboveCritical,
    model: input.model,
    real_scalars: input.realScalars,
    state: input.state,
    tolerance: input.tolerance,
    vectors: input.vectors,
    wall_radius: input.wallRadius,
  };
  for (const name in inputs) if (inputs[name] === undefined) delete inputs[name];
  return inputs as Record<string, string | number>;
}

/**
 * Prepares the stamps of many rows that share a context: the text around the inputs is written once, and
 * what stands before them is hashed once.
 *
 * @param context What the rows share.
 * @returns A function from a row's input to its stamp.
 */
export function stamper(context: StampContext): (input: RowInput) => string {
  const { core, expressions, pins, runtime, settings } = context;
  // RFC 8785 sorts keys: core, expressions, inputs, pins, runtime, settings.
  const before = `${canonicalJson({ core, expressions }).slice(0, -1)},"inputs":`;
  const after = canonicalJson({ pins, runtime, settings }).slice(1);
  const begun = createHash("sha256").update(before);
  // Of an object with sorted keys, ASCII texts and numbers, ECMAScript's JSON is the canonical one.
  return (input) => {
    return begun.copy().update(`${JSON.stringify(stampInputs(input))},${after}`).digest("hex");
  };
}
