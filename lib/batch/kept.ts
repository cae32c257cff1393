/**
 * What an output folder already holds of a run.
 *
 * @module
 */
import { FILES, profilePath, readIfPresent } from "./folder.ts";
import type { Plan } from "./plan.ts";
import type { RowRecord, RunRecord } from "./record.ts";
import type { ResultCells } from "./result_row.ts";
import { readResults } from "./results_file.ts";
import { sha256 } from "./stamp.ts";

/** A finished row: its cells and what the record keeps of it. */
export interface FinishedRow {
  /** Cells of results.csv. */
  readonly cells: ResultCells;
  /** Its part of run.json. */
  readonly record: RowRecord;
}

function profileHeld(folder: string, name: string, record: RowRecord): boolean {
  if (record.profile === null) return true;
  if (record.profile === undefined) return false;
  const profile = readIfPresent(`${folder}/${profilePath(name)}`);
  return profile !== undefined && sha256(profile) === record.profile;
}

/**
 * Finds the rows that need not be solved again: their stamps agree, results.csv is as it was written, and
 * so is the profile where one is wanted.
 *
 * @param plan The run.
 * @param folder Its output folder.
 * @param record The folder's record of this run, if it has one.
 * @returns Finished rows by their place in the table.
 */
export function keptRows(
  plan: Plan,
  folder: string,
  record: RunRecord | undefined,
): Map<number, FinishedRow> {
  const kept = new Map<number, FinishedRow>();
  const bytes = record && readIfPresent(`${folder}/${FILES.results}`);
  if (!bytes || sha256(bytes) !== record.results?.sha256) return kept;
  const results = readResults(bytes);
  for (const [i, { case: name }] of plan.rows.entries()) {
    const cells = results.get(name), known = record.rows[name], stamp = plan.stamps[i];
    if (!cells || cells["stamp"] !== stamp || known?.stamp !== stamp) continue;
    if (plan.profiles.has(name) && !profileHeld(folder, name, known)) continue;
    kept.set(i, { cells, record: known });
  }
  return kept;
}

/**
 * Whether the files beside results.csv are there.
 *
 * @param folder Output folder.
 * @returns True if none is missing.
 */
export function companionsHeld(folder: string): boolean {
  return [FILES.metadata, FILES.table, FILES.profilesMetadata].every((name) =>
    readIfPresent(`${folder}/${name}`) !== undefined
  );
}
