/**
 * An audit: claims with what their names mean, and the audit judged.
 *
 * @module
 */
import type { Claim, Context } from "./claim.ts";
import { judge, type JudgeOptions, type Verdict } from "./judge.ts";

/** Claims that belong together. */
export interface Audit {
  /** Short name. */
  readonly name: string;
  /** What is audited, in words. */
  readonly title: string;
  readonly context: Context;
  readonly claims: readonly Claim[];
}

/** A claim with its verdict. */
export interface Step {
  readonly claim: Claim;
  readonly verdict: Verdict;
}

/**
 * Judges all claims of an audit, in order, after checking every derivative taken in its derivation
 * against a second differentiator.
 *
 * @throws {Error} if a derivative is not confirmed.
 */
export async function runAudit(audit: Audit, options: JudgeOptions = {}): Promise<Step[]> {
  const steps: Step[] = [];
  for (const claim of audit.claims) {
    steps.push({ claim, verdict: await judge(claim, audit.context, options) });
  }
  await audit.context.jets.verify(audit.context.ranges);
  return steps;
}
