/**
 * Faults of the disk: full, read-only, vanished. What is attempted is named, and what is kept.
 *
 * @module
 */

/** The disk did not do what was asked; what was finished before is kept. */
export class StorageError extends Error {
  /** @param message What was attempted, what must hold, what came. */
  constructor(message: string) {
    super(message);
    this.name = "StorageError";
  }
}

const MUST: Readonly<Record<string, string>> = {
  ENOSPC: "the disk must have room",
  EDQUOT: "the quota must have room",
  EROFS: "the disk must be writable",
  EACCES: "you must be allowed to",
  EPERM: "you must be allowed to",
  ENOENT: "it must be there",
  ENOTDIR: "its parent must be a folder",
  EISDIR: "it must not be a folder",
  EIO: "the disk must answer",
  ENOLCK: "the disk must know locks",
};

/**
 * Does something with a file or folder.
 *
 * @param what What is attempted, after "Cannot".
 * @param act The deed.
 * @returns What the deed returns.
 * @throws {StorageError} if the disk refuses; any other error as it is.
 */
export function onDisk<T>(what: string, act: () => T): T {
  try {
    return act();
  } catch (error) {
    const must = MUST[(error as { code?: string }).code ?? ""];
    if (must === undefined || error instanceof StorageError) throw error;
    throw new StorageError(
      `Cannot ${what} as ${must}: ${(error as Error).message}; ` +
        "finished rows are kept, run again when that is mended",
    );
  }
}
