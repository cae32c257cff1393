/**
 * What a comparison counts and keeps while rows go by.
 *
 * @module
 */
import { ColumnTally } from "./column_change.ts";
import { type GivenDifferences, givenDifferences } from "./given.ts";
import { STAMP_PARTS, type StampPart, stampParts } from "./origin.ts";
import {
  compareRow,
  type Difference,
  ROW_CHANGES,
  type RowChange,
  type SharedColumn,
  sharedColumns,
} from "./row_change.ts";
import type { Source, SourceRow } from "./source.ts";

/** Called with every difference and what became of its row. */
export type OnDifference = (difference: Difference, change: RowChange) => void;

const zeros = <K extends string>(keys: readonly K[]) =>
  Object.fromEntries(keys.map((key) => [key, 0])) as Record<K, number>;

/** Counts of a comparison under way. */
export class Tally {
  /** Rows by what became of them. */
  readonly rows: Record<RowChange, number> = zeros(ROW_CHANGES);
  /** Rows with equal inputs whose stamp differs, by its parts. */
  readonly stamps: Record<StampPart, number> = zeros(STAMP_PARTS);
  /** Numeric columns. */
  readonly columns: ReadonlyMap<string, ColumnTally>;
  /** The first differences that are no numbers, by what they make of the row. */
  readonly others: ReadonlyMap<RowChange, Difference[]> = new Map(
    (["kind", "inputs", "added", "removed"] as const).map((change) => [change, []]),
  );
  readonly #shared: readonly SharedColumn[];
  readonly #given: GivenDifferences | undefined;
  readonly #parts: (model: string) => readonly StampPart[];
  readonly #most: number;
  readonly #onDifference: OnDifference;

  /**
   * @param sources The two tables, headers read.
   * @param most How many differences are kept of each column and each change.
   * @param onDifference Called with every difference.
   */
  constructor([a, b]: readonly [Source, Source], most: number, onDifference?: OnDifference) {
    this.#shared = sharedColumns(a.columns, b.columns);
    this.#given = givenDifferences(a, b);
    this.#parts = stampParts(a.run?.identity, b.run?.identity);
    this.#most = most;
    this.#onDifference = onDifference ?? (() => {});
    const numbers = this.#shared.filter(({ words }) => !words);
    this.columns = new Map(numbers.map(({ name }) => [name, new ColumnTally(name, most)]));
  }

  /** Whether inputs are compared by the parameter tables. */
  get tablesKnown(): boolean {
    return this.#given !== undefined;
  }

  /** Takes in a row that only one table has. */
  alone(name: string, change: "added" | "removed"): void {
    const [a, b] = change === "removed" ? [name, ""] : ["", name];
    const difference = { case: name, column: "case", a, aError: "", b, bError: "", change };
    this.rows[change]++;
    this.#keep(difference);
    this.#onDifference(difference, change);
  }

  /** Takes in two rows of one case. */
  pair({ case: name, cells: a }: SourceRow, { cells: b }: SourceRow): void {
    const { change, differences } = compareRow(a, b, this.#shared, this.#given?.(name));
    this.rows[change]++;
    for (const difference of differences) {
      this.#onDifference(difference, change);
      this.#keep(difference);
      if (change === "inputs") continue; // the answers to two questions need not agree
      if (difference.column === "stamp") this.#stamp(a["model"], differences);
      const gone = change === "kind" && (difference.a === "" || difference.b === "");
      if (difference.excess === undefined || gone) continue; // a kind has the numbers that it has
      this.columns.get(difference.column)!.add(difference);
    }
  }

  #stamp(model: string, differences: readonly Difference[]): void {
    const parts = new Set(this.#parts(model));
    if (differences.some(({ column }) => column === "tolerance")) parts.add("tolerance");
    if (parts.size === 0) parts.add("unknown");
    for (const part of parts) this.stamps[part]++;
  }

  #keep(difference: Difference): void {
    const kept = this.others.get(difference.change);
    if (kept && kept.length < this.#most) kept.push(difference);
  }
}
