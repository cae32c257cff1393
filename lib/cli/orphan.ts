/**
 * Noticing that the process around this one is gone: it passes signals on, but not SIGKILL.
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
  watchParent(onOrphaned);
}

/**
 * Calls back once if the process that started this one ends before it.
 *
 * @param onOrphaned called once
 */
export function watchParent(onOrphaned: () => void): void {
  const parent = Deno.ppid;
  const timer = setInterval(() => {
    if (Deno.ppid === parent) return;
    clearInterval(timer);
    onOrphaned();
  }, INTERVAL);
  Deno.unrefTimer(timer as unknown as number);
}
