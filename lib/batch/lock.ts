/**
 * One run at a time in an output folder. The lock is one of the operating system, which frees it when its
 * owner ends in whatever way; the file beside it only says who that is.
 *
 * @module
 */
import { FILES, FolderError } from "./folder.ts";
import { onDisk } from "./storage.ts";

/** Who has a folder. */
export interface LockOwner {
  /** Host name. */
  readonly host: string;
  /** Process number there. */
  readonly pid: number;
  /** When it took the folder, ISO 8601. */
  readonly started: string;
}

/** Time that an owner gets to end before a second run is refused (milliseconds). */
const PATIENCE = 3000;
const LOOK = 100; // milliseconds between two looks

function ownerIn(path: string): LockOwner | undefined {
  try {
    const { host, pid, started } = JSON.parse(Deno.readTextFileSync(path));
    return { host: String(host), pid: Number(pid), started: String(started) };
  } catch {
    return undefined; // empty or gone: its owner is just beginning or ending
  }
}

/** Whether the open file is still the one of that name. */
function named(file: Deno.FsFile, path: string): boolean {
  try {
    return Deno.statSync(path).ino === file.statSync().ino;
  } catch {
    return false;
  }
}

function tryLock(path: string): Deno.FsFile | undefined {
  const file = Deno.openSync(path, { read: true, write: true, create: true });
  if (file.tryLockSync(true) && named(file, path)) return file;
  file.close(); // another has it, or it was removed between open and lock
  return undefined;
}

/** A folder that is ours. */
export class Lock {
  readonly #path: string;
  readonly #file: Deno.FsFile;
  /** The owner that ended without freeing the folder, if one did. */
  readonly stale?: LockOwner;

  private constructor(path: string, file: Deno.FsFile) {
    this.#path = path;
    this.#file = file;
    const stale = ownerIn(path);
    if (stale) this.stale = stale;
    const owner: LockOwner = {
      host: Deno.hostname(),
      pid: Deno.pid,
      started: new Date().toISOString(),
    };
    file.truncateSync(0);
    file.writeSync(new TextEncoder().encode(`${JSON.stringify(owner)}\n`));
  }

  /**
   * Takes a folder.
   *
   * @param folder Output folder, which must exist.
   * @param patience How long an owner may take to end (milliseconds).
   * @returns The lock, held until it is released or this process ends.
   * @throws {FolderError} if another process has it.
   * @throws {StorageError} if the folder cannot be written to.
   */
  static async take(folder: string, patience: number = PATIENCE): Promise<Lock> {
    const path = `${folder}/${FILES.lock}`, until = performance.now() + patience;
    for (;;) {
      const file = onDisk(`write to ${folder}`, () => tryLock(path));
      if (file) {
        try {
          return onDisk(`write to ${folder}`, () => new Lock(path, file));
        } catch (error) {
          file.close();
          throw error;
        }
      }
      if (performance.now() >= until) break;
      await new Promise((resolve) => setTimeout(resolve, LOOK));
    }
    const owner = ownerIn(path);
    const who = owner
      ? `process ${owner.pid} on ${owner.host} works there since ${owner.started}`
      : "another process works there";
    throw new FolderError(`Cannot write to ${folder} as one run at a time must do so: ${who}`);
  }

  /** Frees the folder. */
  release(): void {
    try {
      if (named(this.#file, this.#path)) Deno.removeSync(this.#path);
    } catch { /* the folder vanished: nothing is left to free */ }
    this.#file.close();
  }
}
