/**
 * Runs the algebra system in a worker that can be killed. One request at a time; the worker ends by
 * itself after a short idle time, so no process is kept alive and no state survives for long. A kill by
 * the clock is an error, never an answer. Where the runtime has no workers, requests run on the calling
 * thread and cannot be killed.
 *
 * @module
 */
import type { Request } from "./nerdamer.ts";

/** Thrown when a request passed its time: the machine's clock decided, so there is no result at all. */
export class AlgebraKilled extends Error {
  override readonly name = "AlgebraKilled";
}

/** Answer of the algebra system: its text, or why it gave none. */
export type Proposal = { readonly text: string } | { readonly error: string };

const LIMIT_MS = 30_000; // far above the slowest honest request measured here (under 4 s)
const IDLE_MS = 300; // short enough not to be felt at the end of a command

let worker: Worker | undefined;
let idle: ReturnType<typeof setTimeout> | undefined;
let queue: Promise<unknown> = Promise.resolve();

/**
 * Asks the algebra system for a proposal.
 *
 * @param request Operation and expression text (exact rationals only, neutral names).
 * @param limit Milliseconds after which the worker is killed.
 * @throws {AlgebraKilled} if the limit passes.
 */
export function propose(request: Request, limit: number = LIMIT_MS): Promise<Proposal> {
  const answer = queue.then(() => run(request, limit));
  queue = answer.catch(() => {});
  return answer;
}

/** Ends the worker at once; the next request starts a new one. */
export function closeAlgebra(): void {
  clearTimeout(idle);
  worker?.terminate();
  worker = undefined;
}

function run(request: Request, limit: number): Promise<Proposal> {
  if (typeof Worker === "undefined") {
    return import("./nerdamer.ts").then(({ ask }) =>
      ask(request).then((text) => ({ text }), (e) => ({ error: String(e?.message ?? e) }))
    );
  }
  clearTimeout(idle);
  const current = worker ??= new Worker(new URL("./nerdamer_worker.ts", import.meta.url).href, {
    type: "module",
  });
  return new Promise<Proposal>((resolve, reject) => {
    const clock = setTimeout(() => {
      closeAlgebra();
      reject(
        new AlgebraKilled(
          `Cannot use the algebra system's ${request.op} as it must end within ${limit} ms: ` +
            `current expression is ${request.text.slice(0, 80)}`,
        ),
      );
    }, limit);
    const done = () => {
      clearTimeout(clock);
      idle = setTimeout(closeAlgebra, IDLE_MS);
    };
    current.onmessage = (event: MessageEvent<Proposal>) => {
      done();
      resolve(event.data);
    };
    current.onerror = (event) => {
      event.preventDefault();
      done();
      closeAlgebra();
      resolve({ error: event.message });
    };
    current.postMessage(request);
  });
}
