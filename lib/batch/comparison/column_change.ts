/**
 * How the numbers of one column differ between two tables, over all rows that ask the same question.
 *
 * @module
 */
import type { Difference } from "./row_change.ts";

/** Numbers of one column. */
export interface ColumnChange {
  /** Column. */
  readonly column: string;
  /** Rows in which it differs by no more than the sum of the bounds. */
  readonly within: number;
  /** Rows in which it differs by more. */
  readonly beyond: number;
  /** The largest differences, in units of the sum of the bounds, largest first. */
  readonly worst: readonly Difference[];
  /**
   * Rows by the size of the difference: `0` for equal numbers with other bounds, `INF`, or the largest whole
   * number not above four times the decimal logarithm of the excess.
   */
  readonly sizes: ReadonlyMap<number | "0" | "INF", number>;
}

/** Bins of {@linkcode ColumnChange.sizes} in a decade. */
export const BINS_PER_DECADE = 4;

/** Bin of an excess. */
export function sizeBin(excess: number): number | "0" | "INF" {
  if (excess === 0) return "0";
  if (excess === Infinity) return "INF";
  const bin = Math.floor(BINS_PER_DECADE * Math.log10(excess));
  return excess > 1 ? Math.max(0, bin) : Math.min(-1, bin); // 1 itself is within the bounds
}

/** Collects the differences of one column. */
export class ColumnTally implements ColumnChange {
  readonly column: string;
  within = 0;
  beyond = 0;
  readonly worst: Difference[] = [];
  readonly sizes: Map<number | "0" | "INF", number> = new Map();
  readonly #most: number;

  /**
   * @param column Column.
   * @param most How many of the largest differences are kept.
   */
  constructor(column: string, most: number) {
    this.column = column;
    this.#most = most;
  }

  /** Takes a difference in; of equally large ones the first comes first. */
  add(difference: Difference): void {
    const excess = difference.excess!, bin = sizeBin(excess);
    if (excess > 1) this.beyond++;
    else this.within++;
    this.sizes.set(bin, (this.sizes.get(bin) ?? 0) + 1);
    const place = this.worst.findIndex((other) => other.excess! < excess);
    if (place >= 0) this.worst.splice(place, 0, difference);
    else if (this.worst.length < this.#most) this.worst.push(difference);
    if (this.worst.length > this.#most) this.worst.pop();
  }
}
