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
  const inputs: Record<string, string | number | undefined> = {
    model: input.model,
    state: input.state,
    kappa: input.kappa,
    lambda: input.lambda,
    mass: input.mass,
    mass_above_critical: input.massAboveCritical,
    horizon_dilaton: input.horizonDilaton,
    bath_ratio_minus_one: input.bathRatioMinusOne,
    a: input.a,
    wall_radius: input.wallRadius,
    real_scalars: input.realScalars,
    dirac_spinors: input.diracSpinors,
    vectors: input.vectors,
    beta: input.beta,
    tolerance: input.tolerance,
  };
  const present = Object.entries(inputs).filter(([, value]) => value !== undefined);
  return Object.fromEntries(present) as Record<string, string | number>;
}

/**
 * Prepares the stamps of many rows that share a context: the text around the inputs is written once.
 *
 * @param context What the rows share.
 * @returns A function from a row's input to its stamp.
 */
export function stamper(context: StampContext): (input: RowInput) => string {
  const { core, expressions, pins, runtime, settings } = context;
  // RFC 8785 sorts keys: core, expressions, inputs, pins, runtime, settings.
  const before = canonicalJson({ core, expressions }).slice(0, -1);
  const after = canonicalJson({ pins, runtime, settings }).slice(1);
  return (input) => sha256(`${before},"inputs":${canonicalJson(stampInputs(input))},${after}`);
}
