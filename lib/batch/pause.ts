/**
 * Pauses in long work on the main thread, in which signals and workers are heard.
 *
 * @module
 */

/** Longest time without a pause (milliseconds). */
const LONGEST = 50;

/**
 * Makes a pause that takes place only if the last one is long ago.
 *
 * @returns To be awaited between pieces of work.
 */
export function pauses(): () => Promise<void> {
  let last = performance.now();
  return async () => {
    if (performance.now() - last < LONGEST) return;
    await new Promise((resolve) => setTimeout(resolve));
    last = performance.now();
  };
}
