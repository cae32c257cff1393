/**
 * One piece of code on a kernel, with a limit of time.
 *
 * @module
 */
import type { Kernel } from "./kernel.ts";
import type { Message } from "./message.ts";
import { spawnDeno } from "./spawn_deno.ts";

/** How code ended. */
export interface Ending {
  /** Number of the execution; null if the kernel was lost before it told. */
  readonly count: number | null;
  /** Error to write into the notebook, unless all went well or an error output arrived already. */
  readonly error?: {
    readonly ename: string;
    readonly evalue: string;
    readonly traceback: string[];
  };
  /** Whether the kernel is gone. */
  readonly lost?: true;
}

/** Limits of a run. */
export interface Limits {
  /** Longest time of a cell (milliseconds). */
  readonly timeout: number;
  /** Stops the cell when aborted. */
  readonly signal?: AbortSignal;
}

/** Time that an interrupted cell has to end (milliseconds); busy loops end within 40 ms. */
const GRACE = 2000;

/**
 * Sends code to a kernel and waits until it and all its outputs are through, its time is up, or the kernel
 * is gone. Interrupts what runs too long, and ends the kernel if that does not help.
 *
 * @param kernel kernel
 * @param work sends the code; settles with the reply when the outputs have arrived too
 * @param limits limits
 * @returns how it ended; never throws for what the code did
 */
export async function supervise(
  kernel: Kernel,
  work: Promise<Message>,
  limits: Limits,
): Promise<Ending> {
  const timer = alarm(limits.timeout);
  const stop = aborted(limits.signal);
  const first = await Promise.race([work, kernel.lost, timer.rings, stop.rings]);
  timer.clear();
  stop.clear();
  if (typeof first === "object") return ending(first);
  if (first !== "time" && first !== "stop") return died(`The kernel was lost: ${first}`);
  const why = first === "stop"
    ? "The run was stopped from outside"
    : `The cell ran longer than its limit of ${limits.timeout / 1000} s`;
  const grace = alarm(GRACE);
  kernel.interrupt();
  const second = await Promise.race([work, kernel.lost, grace.rings]);
  grace.clear();
  const ename = first === "stop" ? "Interrupted" : "TimeoutError";
  if (typeof second === "object") {
    const count = (second.content.execution_count as number | undefined) ?? null;
    return { count, error: { ename, evalue: `${why}; it was interrupted`, traceback: [] } };
  }
  await kernel.stop();
  return { ...died(`${why}; it did not end when interrupted, so its kernel was ended`, ename) };
}

function ending({ content }: Message): Ending {
  const count = (content.execution_count as number | undefined) ?? null;
  if (content.status !== "error") return { count };
  const { ename, evalue, traceback } = content as Record<string, never>;
  return { count, error: { ename, evalue, traceback: traceback ?? [] } };
}

function died(evalue: string, ename = "KernelDied"): Ending {
  return { count: null, error: { ename, evalue, traceback: [] }, lost: true };
}

/**
 * Why code does not parse: the kernel's reply says no more than that it failed.
 *
 * @param code source of a cell that failed without message
 * @returns what the parser says, with line and column
 */
export async function syntaxFault(code: string): Promise<string> {
  const args = ["fmt", "--no-config", "--ext=ts", "-"];
  const env = { NO_COLOR: "1" };
  const parser = spawnDeno({ args, env, stdin: "piped", stdout: "null", stderr: "piped" });
  const writer = parser.stdin.getWriter();
  await writer.write(new TextEncoder().encode(code)).then(() => writer.close()).catch(() => {});
  const { success, stderr } = await parser.output();
  if (success) return "The kernel could not run the cell and does not say why";
  const text = new TextDecoder().decode(stderr).replace(/\n\nStack backtrace:[^]*/, "");
  return text.replace(/^error: (SyntaxError: )?/, "").replace(/\s+at file:\S*?:(\d+:\d+)/, " ($1)")
    .trim();
}

function alarm(milliseconds: number): { rings: Promise<"time">; clear: () => void } {
  let id: ReturnType<typeof setTimeout> | undefined;
  const rings = new Promise<"time">((resolve) => {
    id = setTimeout(() => resolve("time"), milliseconds);
  });
  return { rings, clear: () => clearTimeout(id) };
}

function aborted(signal?: AbortSignal): { rings: Promise<"stop">; clear: () => void } {
  let clear = (): void => {};
  const rings = new Promise<"stop">((resolve) => {
    if (signal === undefined) return;
    if (signal.aborted) return resolve("stop");
    const listener = (): void => resolve("stop");
    signal.addEventListener("abort", listener);
    clear = () => signal.removeEventListener("abort", listener);
  });
  return { rings, clear };
}
