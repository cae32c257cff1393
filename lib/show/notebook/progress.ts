/**
 * Progress of a loop, shown in place in a notebook.
 *
 * @module
 */

interface Jupyter {
  display(value: unknown, options: Record<string, unknown>): Promise<void>;
}

/** Shortest time between two redraws (milliseconds). */
const REDRAW = 100;

/**
 * Passes on the items of a list and shows in place how many the loop has taken. Outside a notebook it only
 * passes them on.
 *
 * @param items list
 * @param label what is being done
 * @returns the items, in order
 * @example
 * ```ts
 * import { withProgress } from "@backstamp/backstamp";
 * let sum = 0;
 * for await (const item of withProgress([1, 2, 3], "adding")) sum += item;
 * if (sum !== 6) throw new Error(String(sum));
 * ```
 */
export async function* withProgress<T>(items: readonly T[], label: string): AsyncGenerator<T> {
  const jupyter = kernelDisplay();
  const display_id = crypto.randomUUID();
  const draw = async (done: number, update: boolean): Promise<void> => {
    const text = `${label}: ${done} of ${items.length}`;
    const bar = `<progress max="${items.length}" value="${done}"></progress> ${text}`;
    const bundle = { "text/html": bar, "text/plain": text };
    await jupyter?.display(bundle, { raw: true, display_id, update });
  };
  await draw(0, false);
  let last = performance.now();
  for (const [done, item] of items.entries()) {
    yield item;
    if (performance.now() - last < REDRAW) continue;
    await draw(done + 1, true);
    last = performance.now();
  }
  await draw(items.length, true);
}

function kernelDisplay(): Jupyter | undefined {
  try {
    return (Deno as unknown as { jupyter?: Jupyter }).jupyter;
  } catch {
    return undefined; // outside a kernel it may not be touched
  }
}
