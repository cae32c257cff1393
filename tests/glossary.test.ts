import { parse } from "csv-parse/sync";
import { expect, it } from "vitest";
import CLAIMS from "../data/schema/claims.schema.json" with { type: "json" };
import { CONVENTIONS } from "../lib/audit/conventions.ts";
import { VERDICTS } from "../lib/audit/judge.ts";
import { PARAMETER_COLUMNS } from "../lib/batch/columns.ts";
import { COMPARISON_COLUMNS } from "../lib/batch/comparison/comparison_file.ts";
import { STAMP_PARTS } from "../lib/batch/comparison/origin.ts";
import { ROW_CHANGES } from "../lib/batch/comparison/row_change.ts";
import { RESULT_COLUMNS } from "../lib/batch/result_columns.ts";
import { AUDIT_OPTIONS } from "../lib/cli/audit_options.ts";
import { COMPARE_OPTIONS } from "../lib/cli/compare_options.ts";
import { EXECUTE_OPTIONS } from "../lib/cli/execute_options.ts";
import { GRID_OPTIONS } from "../lib/cli/grid_options.ts";
import { KERNELSPEC_OPTIONS } from "../lib/cli/kernelspec.ts";
import { HELP } from "../lib/cli/options.ts";
import { RUN_OPTIONS } from "../lib/cli/run_options.ts";
import { MODEL_NAMES, STATE_NAMES } from "../lib/model/input.ts";
import { INNER_ENDS, KINDS, PROFILE_COLUMNS } from "../lib/observe/result.ts";
import { VALIDITY_CODES } from "../lib/observe/validity.ts";
import { FIGURE_TITLES } from "../lib/show/figures.ts";

const lines: { where: string; word: string; provenance: string; used: string }[] = parse(
  Deno.readTextFileSync("data/glossary.csv"),
  { columns: true },
);

/** Codes before the colon of reasons, taken from the source. */
function reasonCodes(): string[] {
  const found = new Set<string>();
  for (const folder of ["lib/observe", "lib/batch", "lib/solve"]) {
    for (const { name } of Deno.readDirSync(folder)) {
      if (!name.endsWith(".ts")) continue;
      const code = Deno.readTextFileSync(`${folder}/${name}`).replace(/\/\*[\s\S]*?\*\//g, "");
      for (
        const m of code.matchAll(
          /(?:refused|failed|BOUNDARY =|NO_LEADING_TERM =|return)\s*\(?\s*["`]([a-z]+(?:-[a-z]+)*): /g,
        )
      ) found.add(m[1]!);
    }
  }
  return [...found];
}

const words: Record<string, readonly string[]> = {
  task: Object.keys(JSON.parse(Deno.readTextFileSync("deno.json")).tasks),
  option: [
    HELP,
    ...RUN_OPTIONS,
    ...GRID_OPTIONS,
    ...AUDIT_OPTIONS,
    ...COMPARE_OPTIONS,
    ...EXECUTE_OPTIONS,
    ...KERNELSPEC_OPTIONS,
  ].map(({ name }) => name).filter((name) => name !== ""),
  model: MODEL_NAMES,
  state: STATE_NAMES,
  "parameter column": ["case", "model", "state", ...PARAMETER_COLUMNS.map(({ name }) => name)],
  "results column": RESULT_COLUMNS.map(({ name }) => name),
  "profile column": PROFILE_COLUMNS,
  kind: KINDS,
  "inner end": INNER_ENDS,
  "validity code": ["inside", ...VALIDITY_CODES],
  "reason code": reasonCodes(),
  "comparison column": COMPARISON_COLUMNS,
  "row change": ROW_CHANGES,
  "stamp part": STAMP_PARTS,
  "figure title": FIGURE_TITLES,
  verdict: VERDICTS,
  setting: CLAIMS.properties.setting.enum,
  convention: CONVENTIONS.map(({ name }) => name),
};

it("lists every word that commands, tables and figures use, and no word that they do not use", () => {
  for (const [where, used] of Object.entries(words)) {
    const listed = lines.filter((line) => line.where === where).map(({ word }) => word);
    expect(listed.sort(), where).toEqual([...new Set(used)].sort());
  }
  expect(words["reason code"]!.length).toBeGreaterThan(3);
});

it("marks every word as trade term, open standard or own name, and says where a borrowed one is used", () => {
  for (const { word, provenance, used } of lines) {
    expect(["trade term", "open standard", "own name"], word).toContain(provenance);
    if (provenance !== "own name") expect(used, word).not.toBe("");
  }
});
