/**
 * The output folder of a run: whose it is and what is in it.
 *
 * @module
 */
import { caseFault } from "./case_name.ts";
import { differences, type RunIdentity } from "./record.ts";
import { readRecordHead, type RecordHead } from "./record_file.ts";
import { onDisk } from "./storage.ts";
import { removeIfPresent, UNFINISHED } from "./whole_file.ts";

/** Names of what a run writes, relative to its folder. */
export const FILES = {
  results: "results.csv",
  metadata: "results.csv-metadata.json",
  record: "run.json",
  table: "parameters.csv",
  profiles: "profiles",
  profilesMetadata: "profiles/csv-metadata.json",
  figures: "figures",
  journal: "rows.journal",
  lock: "run.lock",
} as const;

/** An output folder that the run may not write to. */
export class FolderError extends Error {
  /** @param message What must hold. */
  constructor(message: string) {
    super(message);
    this.name = "FolderError";
  }
}

/**
 * File name of a case's profile.
 *
 * @param name A valid case.
 * @returns Path relative to the folder.
 * @throws {Error} if the case is not valid: its file could lie elsewhere.
 */
export function profilePath(name: string): string {
  const must = caseFault(name);
  if (must) throw new Error(`Cannot name a profile as its case ${must}: current value is ${name}`);
  return `${FILES.profiles}/${name}.csv`;
}

/**
 * Reads a file that may be absent.
 *
 * @param path File.
 * @returns Its bytes, or undefined if there is no such file.
 */
export function readIfPresent(path: string): Uint8Array | undefined {
  try {
    return Deno.readFileSync(path);
  } catch (error) {
    if (error instanceof Deno.errors.NotFound) return undefined;
    throw error;
  }
}

function entries(folder: string): string[] {
  try {
    return [...Deno.readDirSync(folder)].map((entry) => entry.name);
  } catch (error) {
    if (error instanceof Deno.errors.NotFound) return [];
    if (error instanceof Deno.errors.NotADirectory) {
      throw new FolderError(`Cannot write to ${folder} as it must be a folder: it is a file`);
    }
    throw error;
  }
}

/** Removes what a run wrote but its journal, its record and the profiles to keep; other files stay. */
function clear(folder: string, keep: ReadonlySet<string>): void {
  for (const name of entries(`${folder}/${FILES.profiles}`)) {
    if (/\.csv$|^csv-metadata\.json$/.test(name) && !keep.has(name.slice(0, -4))) {
      removeIfPresent(`${folder}/${FILES.profiles}/${name}`);
    }
  }
  for (const name of entries(`${folder}/${FILES.figures}`)) {
    if (name.endsWith(".svg")) removeIfPresent(`${folder}/${FILES.figures}/${name}`);
  }
  for (const name of [FILES.results, FILES.metadata, FILES.table]) {
    removeIfPresent(`${folder}/${name}`);
  }
}

/** Removes what a killed run left half written. */
function tidy(folder: string): void {
  const ours: readonly string[] = Object.values(FILES).map((name) => name + UNFINISHED);
  for (const name of entries(folder)) if (ours.includes(name)) removeIfPresent(`${folder}/${name}`);
  for (const name of entries(`${folder}/${FILES.profiles}`)) {
    if (/^(.*\.csv|csv-metadata\.json)\.tmp$/.test(name)) {
      removeIfPresent(`${folder}/${FILES.profiles}/${name}`);
    }
  }
}

/** A link in the folder could lead what is written out of it. */
function refuseLinks(folder: string): void {
  for (const name of Object.values(FILES)) {
    try {
      if (!Deno.lstatSync(`${folder}/${name}`).isSymlink) continue;
    } catch {
      continue; // absent
    }
    throw new FolderError(
      `Cannot write to ${folder} as what it holds must stand there itself: ${name} is a link`,
    );
  }
}

/**
 * Whether a folder has figures.
 *
 * @param folder Output folder.
 * @returns True if there is at least one.
 */
export function hasFigures(folder: string): boolean {
  return entries(`${folder}/${FILES.figures}`).some((name) => name.endsWith(".svg"));
}

const WHAT: Readonly<Record<keyof RunIdentity, string>> = {
  table: "the parameter table",
  core: "the numeric core",
  expressions: "the expressions of a model",
  settings: "the settings of the solver",
  pins: "a pinned package",
  runtime: "the runtime",
};

/**
 * Looks whether a run may write to a folder; nothing is changed.
 *
 * @param folder Output folder.
 * @param identity The run.
 * @param replace Whether another run's files may be removed.
 * @returns The record of this same run if the folder holds it.
 * @throws {FolderError} if the folder holds anything else and `replace` is false, or a link.
 */
export function inspectFolder(
  folder: string,
  identity: RunIdentity,
  replace: boolean,
): RecordHead | undefined {
  const present = entries(folder).filter((name) => name !== FILES.lock);
  refuseLinks(folder);
  const record = present.length > 0 ? readRecordHead(`${folder}/${FILES.record}`) : undefined;
  const differ = record ? differences(record.identity, identity) : [];
  if (record && differ.length === 0) return record;
  if (replace || beforeRecord(folder, present)) return undefined;
  const found = record
    ? `it holds another run: ${differ.map((key) => WHAT[key]).join(", ")} changed`
    : `it holds other files: ${present.sort().slice(0, 3).join(", ")}`;
  throw new FolderError(
    `Cannot write to ${folder} as it must be empty or hold this run: ${found}; ` +
      "choose another folder with --out, or give --replace",
  );
}

/** Whether there is no more than a run may have left that was killed before its first record. */
function beforeRecord(folder: string, present: readonly string[]): boolean {
  const names: readonly string[] = [FILES.profiles, FILES.journal, FILES.record + UNFINISHED];
  return present.every((name) => names.includes(name)) &&
    entries(`${folder}/${FILES.profiles}`).length === 0;
}

/**
 * Opens the folder for a run that has its lock.
 *
 * @param folder Output folder.
 * @param identity The run.
 * @param options `replace`: whether another run's files may be removed; `profiles`: cases whose files stay.
 * @returns The record of this same run if the folder holds it.
 * @throws {FolderError} as {@linkcode inspectFolder}.
 * @throws {StorageError} if the disk refuses.
 */
export function openFolder(
  folder: string,
  identity: RunIdentity,
  options: { readonly replace: boolean; readonly profiles: ReadonlySet<string> },
): RecordHead | undefined {
  const record = inspectFolder(folder, identity, options.replace);
  onDisk(`write to ${folder}`, () => {
    tidy(folder);
    if (record === undefined) clear(folder, options.profiles);
    Deno.mkdirSync(`${folder}/${FILES.profiles}`, { recursive: true });
  });
  return record;
}
