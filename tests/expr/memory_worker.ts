/**
 * The algebra worker, which also tells its heap after a collection (V8 flag --expose-gc).
 *
 * @module
 */
import "../../lib/expr/nerdamer_worker.ts";

const scope = globalThis as unknown as {
  onmessage: (event: MessageEvent<unknown>) => void;
  postMessage(message: unknown): void;
  gc(): void;
};
const answer = scope.onmessage;

scope.onmessage = (event) => {
  if (event.data !== "heap") return answer(event);
  scope.gc();
  scope.postMessage(Deno.memoryUsage().heapUsed);
};
