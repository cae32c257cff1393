/**
 * Timers that are still to fire when the last cell has ended.
 *
 * @module
 */

/**
 * Keeps count of the `setTimeout` calls of a kernel whose time has not come. Afterwards
 * `globalThis[Symbol.for("backstamp.settled")](milliseconds)` settles when those that fire within that time
 * have fired.
 *
 * It refers to nothing outside itself: the executor sends its text to the kernel.
 */
export function trackTimers(): void {
  type Timers = Record<symbol, unknown> & {
    setTimeout: (action: unknown, delay?: number, ...rest: unknown[]) => unknown;
    clearTimeout: (id: unknown) => void;
  };
  const scope = globalThis as unknown as Timers;
  const { setTimeout, clearTimeout } = scope;
  const due = new Map<unknown, number>();
  scope.setTimeout = (action, delay = 0, ...rest) => {
    if (typeof action !== "function") return setTimeout(action, delay, ...rest);
    const id = setTimeout(() => {
      due.delete(id);
      action(...rest);
    }, delay);
    due.set(id, Date.now() + delay);
    return id;
  };
  scope.clearTimeout = (id) => {
    due.delete(id);
    clearTimeout(id);
  };
  scope[Symbol.for("backstamp.settled")] = async (milliseconds: number) => {
    const end = Date.now() + milliseconds;
    while (Date.now() < end && [...due.values()].some((time) => time < end)) {
      await new Promise((resolve) => setTimeout(resolve, 5));
    }
  };
}
