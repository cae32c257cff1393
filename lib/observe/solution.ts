/**
 * What one solve in one arithmetic says of a row.
 *
 * @module
 */
import type { Kind, NumericColumn } from "./result.ts";

/** A solve in one arithmetic. */
export type Solution<T> =
  | {
    readonly outcome: "solved";
    readonly kind: Kind;
    /** Computed numbers; the logarithm ln(-g_tt) stands for both of its columns. */
    readonly numbers: Readonly<Partial<Record<NumericColumn, T>>> & { readonly lngtt?: T };
    /** Columns that are exactly known: inputs' consequences, zeros and divergences. */
    readonly exact: Readonly<Partial<Record<NumericColumn, number>>>;
    /** Quantities whose sign decided the kind. */
    readonly evidence: Readonly<Record<string, T>>;
    /** Distance of the locus from the critical one, relative to it (for validity). */
    readonly separation?: T;
  }
  | { readonly outcome: "refused" | "failed"; readonly reason: string };

/** A solved record without numbers. */
export function bare<T>(kind: Kind, evidence: Readonly<Record<string, T>> = {}): Solution<T> {
  return { outcome: "solved", kind, numbers: {}, exact: {}, evidence };
}

/** A refusal. */
export function refused<T>(reason: string): Solution<T> {
  return { outcome: "refused", reason };
}

/** A failure. */
export function failed<T>(reason: string): Solution<T> {
  return { outcome: "failed", reason };
}
