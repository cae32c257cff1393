import { bignumber } from "mathjs";
import { expect, it } from "vitest";
import { TableError } from "../../lib/batch/fault.ts";
import { resultCells } from "../../lib/batch/result_row.ts";
import type { TableRow } from "../../lib/batch/row_reader.ts";
import { readTable } from "../../lib/batch/table.ts";
import { computeRow } from "../../lib/observe/row.ts";
import { familyValues } from "../reference/closed_form.ts";
import { Tally } from "../observe/exact.ts";
import { models } from "../observe/solved.ts";
import { fuzzTable } from "./fuzz_table.ts";

/** A tenth of what is asked for on demand, with FUZZ_CASES=10000 in the environment. */
const CASES = Number(Deno.env.get("FUZZ_CASES") ?? 1000);
const STAMP = "0".repeat(64);

/** Rows of a table, or the faults it was refused for. */
function read(bytes: Uint8Array): readonly TableRow[] | TableError {
  try {
    return readTable(bytes);
  } catch (error) {
    if (error instanceof TableError) return error;
    throw error;
  }
}

/** Result and cells of a row, or what broke. */
function attempt(row: TableRow) {
  try {
    const { result } = computeRow(row.input, models[row.input.model]!);
    return { result, cells: resultCells(row, result, STAMP) };
  } catch (error) {
    return String(error);
  }
}

/** The same table with every field in quotation marks and the columns turned round. */
function rewritten(bytes: Uint8Array): Uint8Array {
  const lines = new TextDecoder().decode(bytes).split(/\r?\n/);
  const turned = lines.map((line) =>
    line === "" ? "" : line.split(",").reverse().map((f) => `"${f}"`).join(",")
  );
  return new TextEncoder().encode(turned.join("\r\n"));
}

it(`${CASES} seeded tables are refused for clear faults or come to results that hold`, () => {
  const seen = { refused: 0, rows: 0, solved: 0, compared: 0 };
  const wrong: string[] = [];
  for (let seed = 1; seed <= CASES; seed++) {
    const bytes = fuzzTable(seed), rows = read(bytes);
    const where = `seed ${seed}: ${new TextDecoder().decode(bytes).slice(0, 300)}`;
    if (rows instanceof TableError) {
      seen.refused++;
      for (const { line, text } of rows.faults) {
        if (
          !(line >= 1) ||
          !/^((column \d+ )?must|is missing|exactly one|a |at least|an? )/.test(text)
        ) {
          wrong.push(`${where}: unclear: line ${line}: ${text}`);
        }
      }
      continue;
    }
    const text = new TextDecoder().decode(bytes);
    if (!text.includes('"')) expect(read(rewritten(bytes)), where).toEqual(rows);
    for (const row of rows.slice(0, 1)) {
      seen.rows++;
      const { input } = row, came = attempt(row);
      if (typeof came === "string") {
        wrong.push(`${where}: ${came}`);
        continue;
      }
      const { result, cells: { case: __, ...cells } } = came; // a case may be named NaN
      if (Object.values(cells).some((cell) => /^(nan|undefined|null)$/i.test(cell))) {
        wrong.push(`${where}: ${JSON.stringify(cells)}`);
      }
      if (result.outcome !== "solved") continue;
      seen.solved++;
      const a = { rst: 0.5, bpp: 0, solvable: input.a }[input.model as string];
      if (a === undefined || result.kind === "undecided") continue;
      const { model: _, tolerance: ___, ...rest } = input;
      const exact = familyValues({ ...rest, a, lambda: input.lambda! } as never);
      if (exact === undefined) continue;
      seen.compared++;
      const tally = new Tally();
      if (exact.kind !== result.kind) wrong.push(`${where}: ${result.kind}, not ${exact.kind}`);
      const b = result.numbers.dilaton_locus;
      if (b && exact.dilaton) {
        tally.add(where, "dilaton", b.value, b.error, bignumber(exact.dilaton));
      }
      wrong.push(...tally.violations);
    }
  }
  expect(wrong).toEqual([]);
  // the generator reaches all of these, or the test tests nothing
  expect(Math.min(...Object.values(seen)), JSON.stringify(seen)).toBeGreaterThan(CASES / 20);
}, 3_600_000);
