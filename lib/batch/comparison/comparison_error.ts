/**
 * Faults of tables that are compared, all at once.
 *
 * @module
 */
import { describeFault, type Fault } from "../fault.ts";

/** Tables that cannot be compared. */
export class ComparisonError extends Error {
  /**
   * Makes the error.
   *
   * @param faults What must hold, one line each.
   */
  constructor(faults: readonly string[]) {
    super(faults.join("\n"));
    this.name = "ComparisonError";
  }
}

/** A table and what was found wrong with it. */
export interface Faulty {
  /** Where it is. */
  readonly place: string;
  /** What is wrong. */
  readonly faults: readonly Fault[];
}

/** Faults that are kept of one table: more would not help. */
export const MOST_FAULTS = 100;

/** The faults of a table as one text, undefined if it has none. */
export function faultText({ place, faults }: Faulty): string | undefined {
  if (faults.length === 0) return undefined;
  const lines = faults.slice(0, MOST_FAULTS).map(describeFault);
  if (faults.length > MOST_FAULTS) lines.push("and more");
  return `Cannot compare ${place} as it must be a results table:\n${lines.join("\n")}`;
}
