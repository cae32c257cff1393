/**
 * The end of a run: the tables are made from the journal, row by row in table order.
 *
 * @module
 */
import { readAnswer, rowRecord } from "./answer.ts";
import { FILES } from "./folder.ts";
import { type Held, profileHeld } from "./kept.ts";
import { profilesMetadata, resultsMetadata } from "./metadata.ts";
import { pauses } from "./pause.ts";
import type { Plan } from "./plan.ts";
import { RecordFile, type RecordHead } from "./record_file.ts";
import { resultCells } from "./result_row.ts";
import { RESULTS_HEADER, resultsLines } from "./results_file.ts";
import { GrowingSummary, type Summary } from "./summary.ts";
import { WholeFile, writeWhole } from "./whole_file.ts";

/** Rows that are read together. */
const PIECE = 500;

/** What the tables came to. */
export interface Tables {
  /** SHA-256 and rows of results.csv. */
  readonly results: { readonly sha256: string; readonly rows: number };
  /** Cases with a profile, or of which one was asked in vain, in table order. */
  readonly profiled: ReadonlySet<string>;
  /** Counts and extremes. */
  readonly summary: Summary;
}

/** Finished rows in table order, in pieces; ends early if the signal says so. */
async function* pieces(
  plan: Plan,
  { journal, places }: Held,
  signal?: AbortSignal,
): AsyncGenerator<readonly { readonly index: number; readonly text: string }[]> {
  const pause = pauses();
  for (let from = 0; from < plan.rows.length; from += PIECE) {
    const piece: { index: number; text: string }[] = [];
    for (let index = from; index < Math.min(from + PIECE, plan.rows.length); index++) {
      const place = places.get(plan.stamps[index]!);
      if (place) piece.push({ index, text: journal.read(place) });
    }
    yield piece;
    await pause();
    if (signal?.aborted) return;
  }
}

/**
 * Writes results.csv and the metadata.
 *
 * @param plan The run.
 * @param held Its finished rows.
 * @param folder Output folder.
 * @param signal Stops; then the old results.csv stays.
 * @returns What they came to, or undefined if it was stopped.
 */
export async function writeTables(
  plan: Plan,
  held: Held,
  folder: string,
  signal?: AbortSignal,
): Promise<Tables | undefined> {
  const file = new WholeFile(`${folder}/${FILES.results}`), summary = new GrowingSummary();
  const profiled = new Set<string>(), withFile: string[] = [];
  let rows = 0;
  file.write(RESULTS_HEADER);
  try {
    for await (const piece of pieces(plan, held, signal)) {
      const cells = piece.map(({ index, text }) => {
        const { result, profile } = readAnswer(text), row = plan.rows[index]!;
        const wanted = plan.profiles.has(row.case);
        if (wanted || (profile && profileHeld(folder, row.case, profile))) {
          profiled.add(row.case);
          if (profile) withFile.push(row.case);
        }
        return resultCells(row, result, plan.stamps[index]!);
      });
      for (const row of cells) summary.add(row);
      rows += cells.length;
      if (cells.length > 0) file.write(resultsLines(cells));
    }
  } catch (error) {
    file.discard();
    throw error;
  }
  if (signal?.aborted) {
    file.discard();
    return undefined;
  }
  const sha256 = file.commit();
  writeJson(`${folder}/${FILES.metadata}`, resultsMetadata());
  writeJson(`${folder}/${FILES.profilesMetadata}`, profilesMetadata(withFile));
  return { results: { sha256, rows }, profiled, summary };
}

function writeJson(path: string, value: unknown): void {
  writeWhole(path, `${JSON.stringify(value, null, 2)}\n`);
}

/**
 * Writes run.json.
 *
 * @param head All but the rows.
 * @param folder Output folder.
 * @param rows The run, its finished rows and the cases with a profile; absent while it goes on.
 */
export async function writeRecord(
  head: RecordHead,
  folder: string,
  rows?: { readonly plan: Plan; readonly held: Held; readonly profiled: ReadonlySet<string> },
): Promise<void> {
  const file = new RecordFile(`${folder}/${FILES.record}`, head);
  try {
    for await (const piece of rows ? pieces(rows.plan, rows.held) : []) {
      for (const { index, text } of piece) {
        const { case: name } = rows!.plan.rows[index]!;
        file.add(name, rowRecord(text, rows!.plan.stamps[index]!, rows!.profiled.has(name)));
      }
    }
  } catch (error) {
    file.discard();
    throw error;
  }
  file.commit();
}
