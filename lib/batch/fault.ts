/**
 * Faults of an input: where each is and what would be right there. All faults are reported at once.
 *
 * @module
 */

/** One fault of a parameter table. */
export interface Fault {
  /** Line of the file, from 1; the header is line 1 unless blank lines precede it. */
  readonly line: number;
  /** Column by name, absent where the fault is of the whole line. */
  readonly column?: string;
  /** What must hold, and what was found. */
  readonly text: string;
}

/**
 * A fault as one line of text.
 *
 * @param fault The fault.
 * @returns `line L, column C: what must hold: current value is "..."`.
 */
export function describeFault({ line, column, text }: Fault): string {
  return `line ${line}${column === undefined ? "" : `, column ${printable(column)}`}: ${text}`;
}

/** Text in which nothing can move the cursor, hide, or turn the direction of writing. */
function printable(text: string): string {
  return text.replace(
    /[\p{Cc}\p{Cf}\p{Zl}\p{Zp}\p{Co}\p{Cs}]/gu,
    (c) => `\\u${c.codePointAt(0)!.toString(16).padStart(4, "0")}`,
  );
}

/** What was found, quoted and cut to a readable length. */
export function quoted(text: string): string {
  return printable(JSON.stringify(text.length > 40 ? `${text.slice(0, 37)}...` : text));
}

/** A table or list that cannot be used; nothing was run. */
export class TableError extends Error {
  /** Every fault, by line. */
  readonly faults: readonly Fault[];

  /**
   * @param faults At least one fault.
   * @param what What has the faults.
   */
  constructor(faults: readonly Fault[], what: string = "the table") {
    const sorted = [...faults].sort((x, y) => x.line - y.line);
    const count = `${sorted.length} fault${sorted.length === 1 ? "" : "s"}`;
    super(`Cannot use ${what} as it has ${count}:\n${sorted.map(describeFault).join("\n")}`);
    this.name = "TableError";
    this.faults = sorted;
  }
}
