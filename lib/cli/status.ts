/**
 * Exit status of the commands: 0 done, 1 a row failed or two runs differ, 2 bad input or usage,
 * 3 interrupted.
 *
 * @module
 */
import { ComparisonError } from "../batch/comparison/comparison_error.ts";
import { TableError } from "../batch/fault.ts";
import { FolderError } from "../batch/folder.ts";
import { UsageError } from "./options.ts";

/** Exit status by what happened. */
export const STATUS = { done: 0, failed: 1, usage: 2, interrupted: 3 } as const;

/**
 * Carries a command out and turns what it throws into a line of text and an exit status.
 *
 * @param command The command; returns its own status.
 * @returns Exit status.
 */
export async function closing(command: () => Promise<number>): Promise<number> {
  try {
    return await command();
  } catch (error) {
    console.error(error instanceof Error ? error.message : String(error));
    const bad = [TableError, FolderError, ComparisonError, UsageError].some((kind) =>
      error instanceof kind
    );
    return bad ? STATUS.usage : STATUS.interrupted;
  }
}
