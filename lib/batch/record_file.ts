/**
 * run.json in the folder. Its rows come last, so that the head can be read, and the rows be written,
 * without holding them.
 *
 * @module
 */
import type { RowRecord, RunRecord } from "./record.ts";
import { WholeFile } from "./whole_file.ts";

/** The record without its rows. */
export type RecordHead = Omit<RunRecord, "rows">;

const ROWS = '\n  "rows": {';
const PIECE = 1 << 16;
const decoder = new TextDecoder();

/** Text up to the rows; the whole text if it is laid out otherwise. */
function headText(path: string): string {
  const file = Deno.openSync(path);
  try {
    const buffer = new Uint8Array(PIECE);
    let text = "";
    for (let n; (n = file.readSync(buffer)) !== null;) {
      const from = Math.max(0, text.length - ROWS.length);
      text += decoder.decode(buffer.subarray(0, n), { stream: true });
      const at = text.indexOf(ROWS, from);
      if (at >= 0) return `${text.slice(0, at)}\n  "rows": {}}`;
    }
    return text;
  } finally {
    decoder.decode(); // forgets half a character
    file.close();
  }
}

/**
 * Reads the head of a record.
 *
 * @param path The file.
 * @returns The head, or undefined if there is none that can be read.
 */
export function readRecordHead(path: string): RecordHead | undefined {
  try {
    const { rows, ...head } = JSON.parse(headText(path)) as RunRecord;
    return head.identity && rows && head.runs ? head : undefined;
  } catch (error) {
    if (error instanceof SyntaxError || error instanceof Deno.errors.NotFound) return undefined;
    throw error; // not ours or torn: the caller treats the folder as another's
  }
}

/** A record that is written row by row. */
export class RecordFile {
  readonly #file: WholeFile;
  #rows = 0;

  /**
   * @param path The file.
   * @param head All but the rows.
   */
  constructor(path: string, head: RecordHead) {
    this.#file = new WholeFile(path);
    this.#file.write(`${JSON.stringify(head, null, 2).slice(0, -2)},${ROWS}`);
  }

  /** Adds the part of a case. */
  add(name: string, row: RowRecord): void {
    const comma = this.#rows++ === 0 ? "" : ",";
    this.#file.write(`${comma}\n    ${JSON.stringify(name)}: ${JSON.stringify(row)}`);
  }

  /** Gives the file its name. */
  commit(): void {
    this.#file.write(`${this.#rows === 0 ? "" : "\n  "}}\n}\n`);
    this.#file.commit();
  }

  /** Drops the file. */
  discard(): void {
    this.#file.discard();
  }
}
