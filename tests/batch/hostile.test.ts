import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { TABLE_COLUMNS } from "../../lib/batch/columns.ts";
import { TableError } from "../../lib/batch/fault.ts";
import { profilePath } from "../../lib/batch/folder.ts";
import { RESULT_COLUMNS } from "../../lib/batch/result_columns.ts";
import { resultCells } from "../../lib/batch/result_row.ts";
import { readTable } from "../../lib/batch/table.ts";
import { readTableFile, TABLE_LIMITS } from "../../lib/batch/table_file.ts";
import type { RowResult } from "../../lib/observe/result.ts";

let folder = "";
beforeEach(() => void (folder = Deno.makeTempDirSync()));
afterEach(() => {
  vi.restoreAllMocks();
  Deno.removeSync(folder, { recursive: true });
});

const bytes = (text: string) => new TextEncoder().encode(text);
const HEADER = "case,model,state,kappa,mass";

function faultOf(act: () => unknown): string {
  try {
    act();
  } catch (error) {
    if (error instanceof TableError) return error.message;
    throw error;
  }
  return "none";
}

describe("A hostile table", () => {
  /** A file that never ends as far as the reader can tell; counts what was read of it. */
  function endless(piece: (at: number) => Uint8Array) {
    Deno.writeTextFileSync(`${folder}/table.csv`, "");
    const read = { bytes: 0 };
    vi.spyOn(Deno.FsFile.prototype, "readSync").mockImplementation((buffer: Uint8Array) => {
      const from = piece(read.bytes).subarray(0, buffer.length);
      buffer.set(from);
      read.bytes += from.length;
      return from.length;
    });
    return read;
  }

  it("is refused after the first piece that shows it: a line without end, binary junk, other text", () => {
    const line = endless(() => new Uint8Array(50_000).fill(97));
    expect(faultOf(() => readTableFile(`${folder}/table.csv`))).toMatch(
      /line 1: must be at most 65536 bytes long/,
    );
    expect(line.bytes).toBeLessThanOrEqual(2 * TABLE_LIMITS.line);
    const zeros = endless(() => new Uint8Array(50_000));
    expect(faultOf(() => readTableFile(`${folder}/table.csv`))).toMatch(/line 1: .* a byte 0/);
    expect(zeros.bytes).toBeLessThanOrEqual(2 * TABLE_LIMITS.line);
    const junk = endless(() => new Uint8Array(50_000).fill(0xfe, 0, 40_000).fill(10, 40_000));
    expect(faultOf(() => readTableFile(`${folder}/table.csv`))).toMatch(/must be UTF-8 text/);
    expect(junk.bytes).toBeLessThanOrEqual(2 * TABLE_LIMITS.line);
  });

  it("is refused at the limit of its size, on the line where that is", () => {
    const long = endless(() => bytes(`${HEADER}\n`.repeat(2000)));
    const limits = { line: 100, size: 1_000_000 };
    expect(faultOf(() => readTableFile(`${folder}/table.csv`, "the table", limits))).toMatch(
      /line \d+: must be in a file of at most 1000000 bytes/,
    );
    expect(long.bytes).toBeLessThan(1_100_000);
  });

  it("with a million columns has one fault, not a million", () => {
    const wide = `${HEADER}${",x".repeat(1_000_000)}\n`;
    Deno.writeTextFileSync(`${folder}/wide.csv`, wide);
    expect(faultOf(() => readTableFile(`${folder}/wide.csv`))).toMatch(/has 1 fault:\nline 1: /);
    expect(faultOf(() => readTable(bytes(wide)))).toMatch(
      new RegExp(`at most ${TABLE_COLUMNS.length} columns: current count is`),
    );
  });

  it("with a fault in each of many rows tells the first thousand", () => {
    const rows = Array.from({ length: 20_000 }, (_, i) => `r${i},rst,boulware,-1,1`).join("\n");
    expect(faultOf(() => readTable(bytes(`${HEADER}\n${rows}\n`)))).toMatch(/has 1000 faults/);
  });

  it("with a quotation mark that is never closed is refused", () => {
    for (const rest of ["a,rst,boulware,1,1\n", "a,rst,boulware,1,1\n".repeat(20_000)]) {
      expect(faultOf(() => readTable(bytes(`${HEADER}\n"${rest}`)))).toMatch(
        /quot(ed field|ation mark)/,
      );
    }
  });

  it("is read as it is if it is one, in pieces of any size", () => {
    const text = `${HEADER}\n${
      Array.from({ length: 9000 }, (_, i) => `r${i},rst,boulware,1,${i + 1}`).join("\n")
    }\n`;
    Deno.writeTextFileSync(`${folder}/table.csv`, `\ufeff${text}`);
    expect(readTable(readTableFile(`${folder}/table.csv`))).toHaveLength(9000);
    expect(readTableFile(`${folder}/table.csv`)).toEqual(
      Deno.readFileSync(`${folder}/table.csv`),
    );
  });

  it("cannot move the cursor or hide text in messages", () => {
    const cell = "\x1b[2J\x9b\u202e\u200bx\r";
    const header = faultOf(() => readTable(bytes(`${HEADER},${cell.slice(0, -1)}\n`)));
    const row = faultOf(() => readTable(bytes(`${HEADER}\n"${cell}\n",rst,boulware,1,1\n`)));
    for (const message of [header, row]) {
      expect(message).toMatch(/has \d faults?/);
      // deno-lint-ignore no-control-regex
      expect(message.replaceAll("\n", "")).not.toMatch(/[\x00-\x1f\x7f-\x9f\u200b\u202e]/);
    }
  });
});

describe("A case", () => {
  it("cannot lead out of the folder, nor be a device", () => {
    const names = ["..", "../x", "/etc/x", "a/b", "a\\b", ".hidden", "C:x", "a\0b", "", "~", "-x"];
    for (const name of [...names, "con", "COM1", "nul.x", "Lpt9.a.b", "a".repeat(65), "é"]) {
      expect(faultOf(() => readTable(bytes(`${HEADER}\n${name},rst,boulware,1,1\n`))), name)
        .toMatch(/line 2/);
      expect(() => profilePath(name), name).toThrow(/Cannot name a profile/);
    }
    expect(profilePath("a..b")).toBe("profiles/a..b.csv");
    expect(profilePath("console")).toBe("profiles/console.csv");
  });
});

describe("A cell that a spreadsheet takes for a formula", () => {
  const FORMULAS = ["=1+1", "+cmd", "-2+3", "@SUM(A1)", "\t=1", "\r=1", "=HYPERLINK(1)", "'=1"];
  it("is never read from a table, in no column; signed numbers are", () => {
    for (const formula of FORMULAS) {
      const cell = `"${formula}"`;
      for (const at of [0, 1, 2, 3, 4]) {
        const cells = ["x", "rst", "boulware", "1", "1"].with(at, cell).join(",");
        expect(faultOf(() => readTable(bytes(`${HEADER}\n${cells}\n`))), cells).toMatch(/line 2/);
      }
      const header = `${HEADER},${cell}\nx,rst,boulware,1,1,\n`;
      expect(faultOf(() => readTable(bytes(header))), header).toMatch(/line 1/);
    }
    expect(readTable(bytes(`${HEADER}\nx,rst,boulware,+1,-1\n`))[0]!.input.mass).toBe(-1);
  });

  it("is never written to results: the row is left out instead", () => {
    const row = readTable(bytes(`${HEADER}\nx,rst,boulware,1,2\n`))[0]!;
    const solved: RowResult = {
      outcome: "solved",
      reason: "",
      kind: "throat",
      numbers: { dilaton_locus: { value: -0.5, error: 0 } },
      innerEnd: "undecided",
      validity: "inside",
      evidence: {},
    };
    const stamp = "0".repeat(64);
    expect(resultCells(row, solved, stamp)["dilaton_locus"]).toBe("-0.5");
    for (const formula of FORMULAS) {
      for (const key of ["outcome", "reason", "kind", "innerEnd", "validity"] as const) {
        const hostile = { ...solved, [key]: formula } as RowResult;
        expect(() => resultCells(row, hostile, stamp), `${key} ${formula}`).toThrow();
      }
    }
    const texts = RESULT_COLUMNS.filter(({ datatype }) => datatype !== "double");
    for (const { name, datatype } of texts) {
      const format = new RegExp(`^(${(datatype as { format: string }).format})$`);
      for (const formula of FORMULAS) expect(format.test(formula), name).toBe(false);
    }
  });
});
