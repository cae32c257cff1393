/**
 * Worker that judges ready audits, one after the other, by their place in the list.
 *
 * @module
 */
import { closeAlgebra } from "../expr/proposer.ts";
import type { JudgeOptions } from "./judge.ts";
import { ledgerPart } from "./ledger.ts";
import { readyAudits } from "./ready/mod.ts";

/** One piece of work. */
export interface ReadyRequest {
  readonly index: number;
  /** Model whose audits are counted; absent for all. */
  readonly model?: string;
  readonly options: JudgeOptions;
}

const scope = globalThis as unknown as {
  onmessage: (event: MessageEvent<ReadyRequest>) => void;
  postMessage(message: unknown): void;
};

scope.onmessage = async ({ data: { index, model, options } }) => {
  const begin = performance.now();
  try {
    const part = await ledgerPart(readyAudits(model)[index]!.make(), "house", options);
    scope.postMessage({ index, part, milliseconds: performance.now() - begin });
  } catch (error) {
    scope.postMessage({ index, error: error instanceof Error ? error.message : String(error) });
  } finally {
    closeAlgebra();
  }
};
