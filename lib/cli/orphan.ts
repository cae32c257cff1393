/**
 * Noticing that `deno task` around this process is gone: it passes signals on, but not SIGKILL.
 *
 * @module
 */

/** Time between two looks (milliseconds). */
const INTERVAL = 500;

/**
 * Calls back once if the `deno task` that started this process ends before it. A process that was started
 * from a shell directly is left alone: it may outlive its shell.
 *
 * @param onOrphaned called once
 */
export function watchTask(onOrphaned: () => void): void {
  if (Deno.env.get("INIT_CWD") === undefined) return; // set by deno task
  const parent = Deno.ppid;
  const timer = setInterval(() => {
    if (Deno.ppid === parent) return;
    clearInterval(timer);
    onOrphaned();
  }, INTERVAL);
  Deno.unrefTimer(timer as unknown as number);
}
