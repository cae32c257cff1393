/**
 * The ledger of an audit: ordered steps with statement, source, verdict and evidence, as plain data. The same
 * input gives the same bytes; times are kept apart. Its form is `data/schema/ledger.schema.json`.
 *
 * @module
 */
import { print } from "../expr/print.ts";
import { type Audit, runAudit } from "./audit.ts";
import { type Convention, conventionOf, CONVENTIONS } from "./conventions.ts";
import type { JudgeOptions, VerdictName } from "./judge.ts";
import { VERDICTS } from "./judge.ts";

/** One claim with its verdict. */
export interface LedgerStep {
  /** Short name, unique in its part. */
  readonly id: string;
  /** What is claimed, in words. */
  readonly statement: string;
  /** Where the claim comes from. */
  readonly source: string;
  /** Convention in which the claim is stated. */
  readonly convention: string;
  /** Left side as written. */
  readonly left: string;
  /** Right side as written. */
  readonly right: string;
  /** Whether it is claimed modulo the equations only. */
  readonly on_shell: boolean;
  /** Whether it is claimed up to a factor that vanishes nowhere. */
  readonly up_to_factor: boolean;
  /** The verdict. */
  readonly verdict: VerdictName;
  /** What reached zero; empty if nothing did. */
  readonly algorithm: string;
  /** The numeric witness; where refuted, the point and both sides there. */
  readonly evidence: {
    readonly points: number;
    readonly digits: number;
    readonly seed: number;
    readonly residual: string;
    readonly at?: Readonly<Record<string, string>>;
    readonly left?: string;
    readonly right?: string;
  };
  /** left = factor * right, for claims up to a factor; otherwise empty. */
  readonly factor: string;
  /** What would make a refuted claim true; empty if nothing simple was found. */
  readonly repair: string;
  /** Why an undecided claim is undecided; otherwise empty. */
  readonly why: string;
  /** Proposals of the algebra system that were not believed. */
  readonly discarded: number;
}

/** An equation that was derived: the expression vanishes. */
export interface DerivedEquation {
  /** Name of the expression in claims. */
  readonly name: string;
  /** What it is, in words. */
  readonly statement: string;
  /** The expression; it vanishes. */
  readonly expression: string;
}

/** One audit, judged. */
export interface LedgerPart {
  /** Short name. */
  readonly name: string;
  /** What is audited, in words. */
  readonly title: string;
  /** Equations that were derived on the way. */
  readonly derived: readonly DerivedEquation[];
  /** Derivatives confirmed by a second differentiator. */
  readonly derivatives: number;
  /** The claims, in order. */
  readonly steps: readonly LedgerStep[];
}

/** A whole ledger. */
export interface Ledger {
  /** Name of the format. */
  readonly format: "derivation-ledger/1";
  /** What is audited, in words. */
  readonly title: string;
  /** SHA-256 of the claims file; empty for ready audits. */
  readonly input: string;
  /** Programs that took part, with versions. */
  readonly versions: Readonly<Record<string, string>>;
  /** How many claims got each verdict. */
  readonly counts: Readonly<Record<VerdictName, number>>;
  /** Conventions that steps are stated in. */
  readonly conventions: readonly Convention[];
  /** The parts, in order. */
  readonly parts: readonly LedgerPart[];
}

/**
 * Judges an audit into a part of a ledger.
 *
 * @param audit The audit.
 * @param convention Name of the convention of claims that name none.
 * @param options Seed, points, digits.
 */
export async function ledgerPart(
  audit: Audit,
  convention: string = "house",
  options: JudgeOptions = {},
): Promise<LedgerPart> {
  const { steps, derivatives } = await runAudit(audit, options);
  const { bindings } = audit.context;
  return {
    name: audit.name,
    title: audit.title,
    derived: Object.entries(audit.derived ?? {}).map(([name, statement]) => ({
      name,
      statement,
      expression: print(bindings[name]!),
    })),
    derivatives,
    steps: steps.map(({ claim, verdict: v }) => {
      const { count: points, digits, seed, residual, at, left, right } = v.witness;
      const counterexample = at === undefined ? {} : { at, left: left!, right: right! };
      return {
        id: claim.id,
        statement: claim.statement,
        source: claim.source,
        convention: claim.convention ?? convention,
        left: claim.left,
        right: claim.right,
        on_shell: claim.onShell ?? false,
        up_to_factor: claim.upToFactor ?? false,
        verdict: v.verdict,
        algorithm: v.algorithm,
        evidence: { points, digits, seed, residual, ...counterexample },
        factor: v.factor,
        repair: v.repair,
        why: v.why,
        discarded: v.discarded.length,
      };
    }),
  };
}

/**
 * Puts a ledger together.
 *
 * @param parts Parts in their order.
 * @param about Title, digest of the input, versions of the programs.
 */
export function ledgerOf(
  parts: readonly LedgerPart[],
  about: Pick<Ledger, "title" | "input" | "versions">,
): Ledger {
  const steps = parts.flatMap((part) => part.steps);
  const used = new Set(["house", ...steps.map((step) => step.convention)]);
  const counts = Object.fromEntries(
    VERDICTS.map((name) => [name, steps.filter((s) => s.verdict === name).length]),
  ) as Record<VerdictName, number>;
  return {
    format: "derivation-ledger/1",
    ...about,
    counts,
    conventions: CONVENTIONS.filter(({ name }) => used.has(name)).map(({ name }) =>
      conventionOf(name)
    ),
    parts,
  };
}

/** A ledger as the text of its file. */
export function ledgerText(ledger: Ledger): string {
  return `${JSON.stringify(ledger, null, 2)}\n`;
}
