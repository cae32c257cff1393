/**
 * How far a run is, counted as its rows finish.
 *
 * @module
 */
import type { RowResult } from "../observe/result.ts";

/** How far a run is. */
export interface Counts {
  /** Rows finished by this start of the command, with or without success. */
  readonly done: number;
  /** Rows it has to do. */
  readonly total: number;
  /** Rows taken over as they were. */
  readonly kept: number;
  /** Solved rows by kind, refused and failed ones by outcome. */
  readonly kinds: Readonly<Record<string, number>>;
  /** Rows that a fault of the program, a crash or a limit ended. */
  readonly unfinished: number;
}

/** A count that grows. */
export class ProgressCounter {
  readonly #total: number;
  readonly #kept: number;
  readonly #kinds: Record<string, number> = {};
  #done = 0;
  #unfinished = 0;

  /**
   * @param rows Rows of the table.
   * @param missing Rows to do.
   */
  constructor(rows: number, missing: number) {
    this.#total = missing;
    this.#kept = rows - missing;
  }

  /**
   * Counts rows.
   *
   * @param rows Their number.
   * @param result Their result; absent if they could not be finished.
   */
  add(rows: number, result?: RowResult): void {
    this.#done += rows;
    if (result === undefined) this.#unfinished += rows;
    else {
      const key = result.kind ?? result.outcome;
      this.#kinds[key] = (this.#kinds[key] ?? 0) + rows;
    }
  }

  /** The counts at this moment; they grow on. */
  now(): Counts {
    return {
      done: this.#done,
      total: this.#total,
      kept: this.#kept,
      kinds: this.#kinds,
      unfinished: this.#unfinished,
    };
  }
}
