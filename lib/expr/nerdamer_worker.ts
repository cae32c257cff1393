/**
 * Worker around the algebra system, so that a request that never ends can be killed.
 *
 * @module
 */
import { ask, type Request } from "./nerdamer.ts";

const scope = globalThis as unknown as {
  onmessage: (event: MessageEvent<Request>) => void;
  postMessage(message: unknown): void;
};

scope.onmessage = (event) => {
  ask(event.data).then(
    (text) => scope.postMessage({ text }),
    (e) => scope.postMessage({ error: e instanceof Error ? e.message : String(e) }),
  );
};
