/**
 * Rows that a run shares with a store: taken where the folder lacks them, given where the store does.
 *
 * @module
 */
import { readAnswer } from "./answer.ts";
import { profilePath, readIfPresent } from "./folder.ts";
import { type Held, profileHeld } from "./kept.ts";
import { pauses } from "./pause.ts";
import type { Plan } from "./plan.ts";
import { resultCells } from "./result_row.ts";
import type { Entry, Store } from "./store.ts";
import { writeWhole } from "./whole_file.ts";

/** Rows of the table by stamp. */
function byStamp(plan: Plan): Map<string, number[]> {
  const rows = new Map<string, number[]>();
  for (const [i, stamp] of plan.stamps.entries()) {
    const same = rows.get(stamp);
    if (same) same.push(i);
    else rows.set(stamp, [i]);
  }
  return rows;
}

/** Whether the entry keeps the contract of the results table for all of its rows. */
function fits(plan: Plan, rows: readonly number[], { result }: Entry): boolean {
  try {
    for (const i of rows) resultCells(plan.rows[i]!, result, plan.stamps[i]!);
    return true;
  } catch {
    return false;
  }
}

function give(plan: Plan, rows: readonly number[], held: Held, store: Store, folder: string): void {
  const stamp = plan.stamps[rows[0]!]!;
  if (store.has(stamp)) return;
  const text = held.journal.read(held.places.get(stamp)!), { profile } = readAnswer(text);
  if (!profile) return store.add({ stamp, text });
  const names = rows.map((i) => plan.rows[i]!.case);
  const name = names.find((n) => profileHeld(folder, n, profile));
  if (name === undefined) return;
  const bytes = readIfPresent(`${folder}/${profilePath(name)}`)!;
  store.add({ stamp, text }, new TextDecoder().decode(bytes));
}

/**
 * Takes from a store what a folder lacks, and gives it what it lacks itself.
 *
 * @param plan The run.
 * @param held Its finished rows; more are added.
 * @param store The store.
 * @param options Output folder, and what stops.
 * @returns Number of rows taken.
 * @throws {StorageError} if the disk refuses.
 */
export async function share(
  plan: Plan,
  held: Held,
  store: Store,
  options: { readonly folder: string; readonly signal?: AbortSignal },
): Promise<number> {
  const { folder, signal } = options;
  const pause = pauses();
  let taken = 0;
  for (const [stamp, rows] of byStamp(plan)) {
    await pause();
    if (signal?.aborted) break;
    if (held.places.has(stamp)) {
      give(plan, rows, held, store, folder);
      continue;
    }
    const wanted = rows.map((i) => plan.rows[i]!.case).filter((name) => plan.profiles.has(name));
    const entry = store.find(stamp, wanted.length > 0);
    if (entry === undefined) continue;
    if (!fits(plan, rows, entry)) {
      store.reject(stamp, "it breaks the contract of the results table");
      continue;
    }
    const { profileText, text } = entry;
    if (profileText !== undefined) {
      for (const name of wanted) writeWhole(`${folder}/${profilePath(name)}`, profileText);
    }
    held.places.set(stamp, held.journal.append({ stamp, text }));
    taken += rows.length;
  }
  held.journal.flush();
  return taken;
}
