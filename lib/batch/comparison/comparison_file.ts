/**
 * comparison.csv: every difference of two results tables, one a line, written while the tables are read.
 *
 * @module
 */
import { csvLines } from "../csv_writer.ts";
import { writeNumber } from "../number.ts";
import type { OnDifference } from "./tally.ts";

/** Columns of comparison.csv; `excess` is the distance over a_err + b_err, `change` is of the whole row. */
export const COMPARISON_COLUMNS = [
  "case",
  "column",
  "a",
  "a_err",
  "b",
  "b_err",
  "excess",
  "change",
] as const;

/** Lines that are written at once. */
const BATCH = 1000;

/** Writes a comparison; its name never stands for half of it. */
export class ComparisonFile {
  readonly #path: string;
  readonly #file: Deno.FsFile;
  #lines: string[][] = [[...COMPARISON_COLUMNS]];

  /** @param path File; one that is there is replaced when this one is whole. */
  constructor(path: string) {
    this.#path = path;
    this.#file = Deno.openSync(`${path}.tmp`, { write: true, create: true, truncate: true });
  }

  /** Adds a difference. */
  readonly add: OnDifference = (difference, change) => {
    const { case: name, column, a, aError, b, bError, excess } = difference;
    const size = excess === undefined ? "" : writeNumber(excess);
    this.#lines.push([name, column, a, aError, b, bError, size, change]);
    if (this.#lines.length >= BATCH) this.#flush();
  };

  /** Closes the file: under its name if it is whole, else it is removed. */
  close(whole: boolean): void {
    if (whole) this.#flush();
    this.#file.close();
    if (whole) Deno.renameSync(`${this.#path}.tmp`, this.#path);
    else Deno.removeSync(`${this.#path}.tmp`);
  }

  #flush(): void {
    let bytes = new TextEncoder().encode(csvLines(this.#lines));
    this.#lines = [];
    while (bytes.length > 0) bytes = bytes.subarray(this.#file.writeSync(bytes));
  }
}
