/**
 * What an output folder already holds of a run.
 *
 * @module
 */
import { readAnswer } from "./answer.ts";
import { FILES, profilePath, readIfPresent } from "./folder.ts";
import { Journal, type Place } from "./journal.ts";
import type { Plan } from "./plan.ts";
import { sha256 } from "./stamp.ts";

/** The rows of a run that are finished, by stamp. */
export interface Held {
  /** The journal they stand in. */
  readonly journal: Journal;
  /** Where; stamps of other runs in the journal have no place here. */
  readonly places: Map<string, Place>;
}

/**
 * Whether a case has the profile it should have.
 *
 * @param folder Output folder.
 * @param name Case.
 * @param profile SHA-256 of the profile; null where the row has none; absent if none was asked for.
 * @returns True if the file is there and whole, or must not be there.
 */
export function profileHeld(folder: string, name: string, profile?: string | null): boolean {
  if (profile === null) return true;
  if (profile === undefined) return false;
  const bytes = readIfPresent(`${folder}/${profilePath(name)}`);
  return bytes !== undefined && sha256(bytes) === profile;
}

/**
 * Finds the rows that need not be solved again: their stamps are in the journal, and the profiles that are
 * wanted of them are whole.
 *
 * @param plan The run.
 * @param folder Its output folder.
 * @returns Finished rows and the open journal.
 */
export function heldRows(plan: Plan, folder: string): Held {
  const places = new Map<string, Place>();
  const journal = Journal.open(`${folder}/${FILES.journal}`, (stamp, place) => {
    if (plan.firsts.has(stamp)) places.set(stamp, place);
  });
  for (const [i, { case: name }] of plan.rows.entries()) {
    if (!plan.profiles.has(name)) continue;
    const stamp = plan.stamps[i]!, place = places.get(stamp);
    if (place === undefined) continue;
    const { profile } = readAnswer(journal.read(place));
    if (!profileHeld(folder, name, profile)) places.delete(stamp);
  }
  return { journal, places };
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
