/**
 * The kernel's process: `deno jupyter` under its keeper.
 *
 * @module
 */

/** A running kernel process. */
export interface KernelProcess {
  /** Exit code of the kernel; settles when it has ended, for whatever reason. */
  readonly ended: Promise<number>;
  /** What the process wrote to its own standard output and error so far: at most the last 64 KiB. */
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
  const child = spawnDeno(
    [
      "run",
      "--no-prompt",
      "--no-config",
      "--no-lock",
      "--allow-run",
      "--allow-read",
      keeper,
      connectionFile,
    ],
    place,
  );
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

/**
 * Starts the Deno that runs this program. Under `--allow-run=deno` only the name on PATH may be started,
 * under `--allow-run` and `-A` its own path, which also works where PATH has no deno.
 */
export function spawnDeno(args: readonly string[], place: KernelPlace): Deno.ChildProcess {
  const options: Deno.CommandOptions = {
    args: [...args],
    cwd: place.cwd,
    env: { ...place.env },
    stdin: "piped",
    stdout: "piped",
    stderr: "piped",
  };
  try {
    return new Deno.Command(Deno.execPath(), options).spawn();
  } catch (error) {
    if (!(error instanceof Deno.errors.NotCapable)) throw error;
    return new Deno.Command("deno", options).spawn();
  }
}
