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
  /** Equations that were derived on the way, each an expression that vanishes, with what it is. */
  readonly derived?: Readonly<Record<string, string>>;
}

/** An audit that was judged. */
export interface Judged {
  readonly steps: readonly Step[];
  /** Derivatives that were taken and confirmed by the second differentiator. */
  readonly derivatives: number;
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
export async function runAudit(audit: Audit, options: JudgeOptions = {}): Promise<Judged> {
  const steps: Step[] = [];
  for (const claim of audit.claims) {
    steps.push({ claim, verdict: await judge(claim, audit.context, options) });
  }
  return { steps, derivatives: await audit.context.jets.verify(audit.context.ranges) };
}
