/**
 * Knowing that all outputs of a cell have arrived. The kernel says "idle" from another task than the one
 * that publishes outputs, often before them; but outputs keep their order among themselves, so that a token
 * published after a cell arrives after all that the cell put out.
 *
 * @module
 */
import type { Kernel } from "./kernel.ts";
import type { Message } from "./message.ts";

/** Media type of the token; no page shows it. */
const TOKEN_TYPE = "application/x-flush";

/**
 * Runs code that leaves no trace in the history and in the count of executions.
 *
 * @param kernel kernel
 * @param code TypeScript
 * @returns the kernel's reply
 */
export function silentRequest(kernel: Kernel, code: string): Promise<Message> {
  return kernel.request("execute_request", {
    code,
    silent: true,
    store_history: false,
    user_expressions: {},
    allow_stdin: false,
    stop_on_error: false,
  });
}

/** Waits for tokens among the published messages. */
export class Flusher {
  #token = "";
  #arrived: () => void = () => {};

  /**
   * Looks for the token.
   *
   * @param message published message
   * @returns whether it is a token and so no output
   */
  take(message: Message): boolean {
    if (message.type !== "display_data") return false;
    const token = (message.content.data as Record<string, unknown> | undefined)?.[TOKEN_TYPE];
    if (token === this.#token) this.#arrived();
    return token !== undefined;
  }

  /**
   * Settles when all that the kernel has put out up to now has arrived.
   *
   * @param kernel kernel whose messages are given to {@linkcode take}
   */
  async flush(kernel: Kernel): Promise<void> {
    const { promise, resolve } = Promise.withResolvers<void>();
    this.#token = crypto.randomUUID();
    this.#arrived = resolve;
    const content = { data: { [TOKEN_TYPE]: this.#token }, metadata: {}, transient: {} };
    await silentRequest(
      kernel,
      `await Deno.jupyter.broadcast("display_data", ${JSON.stringify(content)})`,
    );
    await promise;
  }
}
