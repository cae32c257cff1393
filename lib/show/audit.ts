/**
 * Audits by hand and in notebooks.
 *
 * @module
 */
import type { ClaimsFile } from "../audit/claims_file.ts";
import type { JudgeOptions } from "../audit/judge.ts";
import { ledgerOf } from "../audit/ledger.ts";
import { runClaims } from "../audit/run_claims.ts";
import { runReady } from "../audit/run_ready.ts";
import { AUDIT_VERSIONS } from "../audit/versions.ts";
import { LedgerView } from "./ledger_view.ts";

/**
 * Judges claims about models.
 *
 * @param claims A claims file: its text (YAML or JSON), or the same as an object.
 * @param options Seed, points and digits of the numeric witness.
 * @returns The ledger; it shows itself.
 * @throws {ClaimsError} with every fault of the claims.
 * @example A wrong factor is refuted and its repair found
 * ```ts
 * import { auditClaims } from "@backstamp/backstamp";
 * const { ledger } = await auditClaims({
 *   title: "One line of notes",
 *   setting: "free",
 *   coordinates: ["x"],
 *   claims: [{ id: "slope", statement: "slope of a square", left: "d(x^2, x)", right: "x" }],
 * });
 * const step = ledger.parts[0]!.steps[0]!;
 * if (step.repair !== "left side = (2) * right side") throw new Error(step.repair);
 * ```
 */
export async function auditClaims(
  claims: string | ClaimsFile,
  options: JudgeOptions = {},
): Promise<LedgerView> {
  const text = typeof claims === "string" ? claims : JSON.stringify(claims);
  return new LedgerView(await runClaims(text, options));
}

/**
 * Judges the ready audits of one model: its equations derived from its action, the solver's own forms of
 * them, and what is known of its geometry and its states.
 *
 * @param model Name of a model.
 * @param options Seed, points and digits of the numeric witness.
 * @returns The ledger; it shows itself.
 * @throws {RangeError} if there is no such model.
 */
export async function auditModel(model: string, options: JudgeOptions = {}): Promise<LedgerView> {
  const workers = navigator.hardwareConcurrency;
  const { parts } = await runReady({ model, workers, judge: options });
  const about = { title: `Derivation audit of ${model}`, input: "", versions: AUDIT_VERSIONS };
  return new LedgerView(ledgerOf(parts, about));
}
