/**
 * The kernel's process: `deno jupyter` under its keeper.
 *
 * @module
 */
import { spawnDeno } from "./spawn_deno.ts";

/** A running kernel process. */
export interface KernelProcess {
  /** Exit code of the kernel; settles when it has ended, for whatever reason. */
  readonly ended: Promise<number>;
  /** What the process said on its own standard output and error so far: at most the last 64 KiB. */
  strayText(): string;
  /** Kills the kernel if it still runs and waits until it is gone. */
  kill(): Promise<void>;
}

/** Where a kernel runs. */
export interface KernelPlace {
  /** Working directory: bare import names are looked up from there. */
  readonly cwd: string;
  /** Variables added to the environment. */
  readonly env: Readonly<Record<string, string>>;
  /** Folder for the connection file, removed as soon as the kernel answers. @default the system's */
  readonly scratch?: string;
}

/** Stray text kept (characters). */
const STRAY_LIMIT = 1 << 16;

/**
 * Starts a kernel process on a connection file.
 *
 * @param connectionFile absolute path of a Jupyter connection file
 * @param place working directory and environment
 * @returns the running process
 * @throws {Error} if this Deno may not start itself
 */
export function startProcess(connectionFile: string, place: KernelPlace): KernelProcess {
  const keeper = new URL("./keeper.ts", import.meta.url).href;
  const permissions = ["--no-prompt", "--allow-run", "--allow-read"];
  const child = spawnDeno({
    args: ["run", "--no-config", "--no-lock", ...permissions, keeper, connectionFile],
    cwd: place.cwd,
    env: { ...place.env },
    stdin: "piped",
    stdout: "piped",
    stderr: "piped",
  });
  let stray = "";
  const drain = async (stream: ReadableStream<Uint8Array>): Promise<void> => {
    const decoder = new TextDecoder();
    for await (const chunk of stream) {
      stray = (stray + decoder.decode(chunk, { stream: true })).slice(-STRAY_LIMIT);
    }
  };
  const drained = Promise.all([drain(child.stdout), drain(child.stderr)]);
  const ended = child.status.then(async ({ code }) => {
    await drained;
    return code;
  });
  return {
    ended,
    strayText: () => stray,
    async kill() {
      await child.stdin.close().catch(() => {}); // the pipe is broken if the kernel has ended
      await ended;
    },
  };
}
