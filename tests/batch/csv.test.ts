import { stringify } from "csv-stringify/sync";
import { parse } from "csv-parse/sync";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readCsv } from "../../lib/batch/csv.ts";
import { csvLines } from "../../lib/batch/csv_writer.ts";

const bytes = (text: string) => new TextEncoder().encode(text);
const field = fc.string({ unit: fc.constantFrom("a", "1", ",", '"', "\n", " ", "=", "é", "") });
const records = fc.array(fc.array(field, { minLength: 2, maxLength: 4 }), { minLength: 1 });
/** Text without quotation marks, which takes the way without a parser. */
const plain = fc.string({
  unit: fc.constantFrom("a", "1", ",", "\n", "\r\n", " ", "é"),
  maxLength: 60,
});

describe("CSV", () => {
  it("is written as csv-stringify writes it, and read back", () => {
    fc.assert(fc.property(records, (rows) => {
      const text = csvLines(rows);
      expect(text).toBe(stringify(rows, { record_delimiter: "\n" }));
      expect(readCsv(bytes(text)).records.map(({ fields }) => fields)).toEqual(rows);
    }));
  });

  it("without quotation marks is read as csv-parse reads it, each record with its line", () => {
    fc.assert(
      fc.property(plain, (text) => {
        const { records, faults } = readCsv(bytes(text));
        const options = { relax_column_count: true, skip_empty_lines: true } as const;
        expect(faults).toEqual([]);
        expect(records.map(({ fields }) => fields)).toEqual(
          parse(text, { ...options, record_delimiter: ["\r\n", "\n"] }),
        );
        const lines = text.split(/\r?\n/).flatMap((line, i) => line === "" ? [] : [i + 1]);
        expect(records.map(({ line }) => line)).toEqual(lines);
      }),
      { numRuns: 500 },
    );
  });
});
