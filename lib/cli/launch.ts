/**
 * Runs a command's work in a child process that may read and write only the paths of that command. The
 * launching process has no other permission than to start it.
 *
 * @module
 */
import { resolve } from "node:path";
import { fileURLToPath } from "node:url";

/** Folder of the program. */
const ROOT = fileURLToPath(new URL("../../", import.meta.url));

/** A child busy elsewhere than in its workers hears no signal; what it had finished is on disk. */
const PATIENCE = 1500; // milliseconds

function kill(child: Deno.ChildProcess, signal: Deno.Signal): void {
  try {
    child.kill(signal);
  } catch { /* it has ended already */ }
}

/** What the child may do besides reading the program. */
export interface Grant {
  /** Files and folders it may read. */
  readonly read: readonly string[];
  /** Files and folders it may write. */
  readonly write: readonly string[];
  /** Environment variables it may see. */
  readonly env?: readonly string[];
  /** Facts about the machine it may ask for. */
  readonly sys?: readonly string[];
}

/**
 * Makes a path of the command line absolute: relative to where the command was typed.
 *
 * @param path What was typed.
 * @returns Absolute path.
 */
export function absolutePath(path: string): string {
  return resolve(Deno.env.get("INIT_CWD") ?? ROOT, path);
}

/** A path of the program's own folder. */
export function programPath(path: string): string {
  return resolve(ROOT, path);
}

function list(paths: readonly string[]): string {
  return paths.map((path) => path.replaceAll(",", ",,")).join(","); // a comma separates paths
}

/**
 * Runs a module of this folder to its end.
 *
 * @param module File name.
 * @param grant What it may do.
 * @param request What it is asked, plain data.
 * @returns Its exit status; 3 if it was killed.
 */
export async function launch(module: string, grant: Grant, request: unknown): Promise<number> {
  const flags = ["--no-prompt", `--allow-read=${list([ROOT, ...grant.read])}`];
  if (grant.write.length > 0) flags.push(`--allow-write=${list(grant.write)}`);
  if (grant.env) flags.push(`--allow-env=${grant.env.join(",")}`);
  if (grant.sys) flags.push(`--allow-sys=${grant.sys.join(",")}`);
  return await runDeno(
    [...flags, programPath(`lib/cli/${module}`), JSON.stringify(request)],
    PATIENCE,
  );
}

/**
 * Runs `deno run` to its end. Signals that stop a command are passed on.
 *
 * @param args Permissions, module, arguments.
 * @param patience Time it gets to end after such a signal (milliseconds). @default any
 * @returns Its exit status; 3 if it was killed.
 */
export async function runDeno(args: readonly string[], patience?: number): Promise<number> {
  const child = new Deno.Command("deno", {
    args: ["run", ...args],
    stdin: "null",
    stdout: "inherit",
    stderr: "inherit",
  }).spawn();
  for (const signal of ["SIGINT", "SIGTERM"] as const) {
    Deno.addSignalListener(signal, () => {
      kill(child, signal);
      if (patience !== undefined) setTimeout(() => kill(child, "SIGKILL"), patience);
    });
  }
  const { code, signal } = await child.status;
  return signal === null ? code : 3;
}
