/**
 * The output folder of a run: whose it is, what is in it, and writing that leaves either the old file or
 * the new one.
 *
 * @module
 */
import { differences, type RunIdentity, type RunRecord } from "./record.ts";

/** Names of what a run writes, relative to its folder. */
export const FILES = {
  results: "results.csv",
  metadata: "results.csv-metadata.json",
  record: "run.json",
  table: "parameters.csv",
  profiles: "profiles",
  profilesMetadata: "profiles/csv-metadata.json",
  figures: "figures",
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
 */
export function profilePath(name: string): string {
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

/**
 * Writes a file so that its name never stands for half of it.
 *
 * @param path File.
 * @param data Text or bytes.
 */
export function writeWhole(path: string, data: string | Uint8Array): void {
  const bytes = typeof data === "string" ? new TextEncoder().encode(data) : data;
  Deno.writeFileSync(`${path}.tmp`, bytes);
  Deno.renameSync(`${path}.tmp`, path);
}

/**
 * Reads the record of a folder.
 *
 * @param folder Output folder.
 * @returns The record, or undefined if there is none that can be read.
 */
export function readRecord(folder: string): RunRecord | undefined {
  const bytes = readIfPresent(`${folder}/${FILES.record}`);
  if (bytes === undefined) return undefined;
  try {
    const record = JSON.parse(new TextDecoder().decode(bytes)) as RunRecord;
    return record.identity && record.rows && record.runs ? record : undefined;
  } catch {
    return undefined; // not ours or torn: the caller treats the folder as another's
  }
}

function remove(path: string): void {
  try {
    Deno.removeSync(path);
  } catch (error) {
    if (!(error instanceof Deno.errors.NotFound)) throw error;
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

/** Removes what a run wrote; files of other names stay. */
function clear(folder: string): void {
  for (const name of entries(`${folder}/${FILES.profiles}`)) {
    if (/\.csv(\.tmp)?$|^csv-metadata\.json$/.test(name)) {
      remove(`${folder}/${FILES.profiles}/${name}`);
    }
  }
  for (const name of entries(`${folder}/${FILES.figures}`)) {
    if (name.endsWith(".svg")) remove(`${folder}/${FILES.figures}/${name}`);
  }
  for (const name of [FILES.results, FILES.metadata, FILES.table, FILES.record]) {
    remove(`${folder}/${name}`);
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
 * Opens the folder for a run.
 *
 * @param folder Output folder; made if absent.
 * @param identity The run.
 * @param replace Whether another run's files may be removed.
 * @returns The record of this same run if the folder holds it.
 * @throws {FolderError} if the folder holds anything else and `replace` is false.
 */
export function openFolder(
  folder: string,
  identity: RunIdentity,
  replace: boolean,
): RunRecord | undefined {
  const present = entries(folder);
  const record = present.length > 0 ? readRecord(folder) : undefined;
  const differ = record ? differences(record.identity, identity) : [];
  if (record && differ.length === 0) return record;
  if (present.length > 0) {
    if (!replace) {
      const found = record
        ? `it holds another run: ${differ.map((key) => WHAT[key]).join(", ")} changed`
        : `it holds other files: ${present.sort().slice(0, 3).join(", ")}`;
      throw new FolderError(
        `Cannot write to ${folder} as it must be empty or hold this run: ${found}; ` +
          "choose another folder with --out, or give --replace",
      );
    }
    clear(folder);
  }
  Deno.mkdirSync(`${folder}/${FILES.profiles}`, { recursive: true });
  return undefined;
}
