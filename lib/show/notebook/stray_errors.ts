/**
 * Errors that no cell is there to report: rejections that nobody awaits and throws inside timers.
 *
 * @module
 */

/**
 * Installs handlers that show rejections nobody awaits and throws in timers as error outputs. Without them
 * the kernel swallows the former and stalls for half a minute at the latter. The first cell of every
 * notebook calls this; outside a notebook, and the second time, it does nothing.
 *
 * It refers to nothing outside itself: the executor sends its text to kernels that cannot load this library.
 *
 * @example
 * ```ts
 * import { reportStrayErrors } from "@backstamp/backstamp";
 * reportStrayErrors();
 * ```
 */
export function reportStrayErrors(): void {
  type Broadcast = (type: string, content: unknown, extra: unknown) => unknown;
  const scope = globalThis as unknown as Record<symbol, unknown> & {
    Deno?: { jupyter: { broadcast: Broadcast } };
    addEventListener(type: string, listener: (event: Event) => void): void;
  };
  const installed = Symbol.for("backstamp.stray-errors");
  let broadcast: Broadcast | undefined;
  try {
    broadcast = scope.Deno?.jupyter.broadcast; // throws outside a kernel
  } catch {
    return;
  }
  if (broadcast === undefined || scope[installed] === true) return;
  scope[installed] = true;
  const report = (event: Event): void => {
    event.preventDefault();
    const { reason, error = reason } = event as Event & { reason?: unknown; error?: unknown };
    const known = error instanceof Error;
    const content = {
      ename: known ? error.name : "Error",
      evalue: known ? error.message : String(error),
      traceback: known ? String(error.stack).split("\n") : [],
    };
    broadcast("error", content, { metadata: { stray: true } });
  };
  scope.addEventListener("error", report);
  scope.addEventListener("unhandledrejection", report);
}
