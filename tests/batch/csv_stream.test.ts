import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readCsv } from "../../lib/batch/csv.ts";
import { csvRecords } from "../../lib/batch/csv_stream.ts";
import type { Fault } from "../../lib/batch/fault.ts";

/** Reads a text in pieces of the given sizes, over and over. */
async function inPieces(text: string, sizes: readonly number[]) {
  const bytes = new TextEncoder().encode(text), faults: Fault[] = [];
  async function* pieces() {
    for (let at = 0, i = 0; at < bytes.length; i++) {
      const size = sizes[i % sizes.length];
      yield bytes.subarray(at, at + size);
      at += size;
    }
  }
  const records = await Array.fromAsync(csvRecords(pieces(), faults));
  return { records, faults };
}

const sizes = fc.array(fc.integer({ min: 1, max: 9 }), { minLength: 1, maxLength: 5 });

describe("A CSV file in pieces", () => {
  it("has the records and lines of the whole file", async () => {
    const cell = fc.constantFrom(
      "",
      "a",
      "3e-5",
      "\u03ba",
      '"a,b"',
      '"two\nlines"',
      '"say ""no"""',
    );
    const row = fc.array(cell, { minLength: 1, maxLength: 4 }).map((cells) => cells.join());
    const end = fc.constantFrom("\n", "\r\n", "\n\n");
    const file = fc.array(fc.tuple(row, end)).map((rows) => rows.flat().join(""));
    await fc.assert(
      fc.asyncProperty(file, sizes, async (text, parts) => {
        expect(await inPieces(text, parts)).toEqual(readCsv(new TextEncoder().encode(text)));
      }),
    );
  });

  it("may lack the last line end and begin with a byte order mark", async () => {
    const { records } = await inPieces("\ufeffa,b\n1,2", [1]);
    expect(records).toEqual([{ fields: ["a", "b"], line: 1 }, { fields: ["1", "2"], line: 2 }]);
  });

  it("has its faults on the lines of the whole file, and is not read on", async () => {
    const early = await inPieces('a\nb\nc\nx"y\nd\n', [2]);
    expect(early.faults).toMatchObject([{ line: 4 }]);
    expect(early.records.slice(0, 3).map(({ fields }) => fields[0])).toEqual(["a", "b", "c"]);
    const twice = await inPieces('a\nx"y"\nb\nx"y"\n', [2]);
    expect(new Set(twice.faults.map(({ line }) => line))).toEqual(new Set([2]));
    const open = await inPieces('a\nb\n"c\nd\n', [3]);
    expect(open.faults).toHaveLength(1);
    expect(open.faults[0].text).toContain("closed before the end");
    const lone = await inPieces("a\nb\rc\nd\n", [3]);
    expect(lone.faults).toEqual([{ line: 2, text: expect.stringContaining("lone CR") }]);
  });
});
