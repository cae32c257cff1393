/**
 * Claims: an equation between two expressions, and what it is claimed of.
 *
 * @module
 */
import type { Ranges } from "../expr/points.ts";
import type { Expr } from "../expr/tree.ts";
import type { Jets } from "./jets.ts";
import type { Rule } from "./shell.ts";

/** One claim, as written. */
export interface Claim {
  /** Short name, unique in its audit. */
  readonly id: string;
  /** What is claimed, in words. */
  readonly statement: string;
  /** Left side, in the grammar of expressions with `d(e, x)` for derivatives. */
  readonly left: string;
  /** Right side. */
  readonly right: string;
  /** Where the claim comes from. */
  readonly source: string;
  /** Whether it is claimed modulo the rules of its context only. @default false */
  readonly onShell?: boolean;
  /** Whether it is claimed up to a non-zero constant factor. @default false */
  readonly upToFactor?: boolean;
  /** Convention in which it is stated, if not that of its context. */
  readonly convention?: string;
}

/** What names in claims mean. */
export interface Context {
  readonly jets: Jets;
  /** Names that stand for expressions. */
  readonly bindings: Readonly<Record<string, Expr>>;
  /** The same in other conventions, by the name of the convention. */
  readonly restated?: Readonly<Record<string, Readonly<Record<string, Expr>>>>;
  /** The equations of motion, for claims on shell. */
  readonly rules: readonly Rule[];
  /** Ranges from which the witness draws. */
  readonly ranges: Ranges;
}

/** A claim as trees. */
export interface Equation {
  readonly left: Expr;
  readonly right: Expr;
}

/**
 * Reads the two sides of a claim.
 *
 * @throws {SyntaxError} if a side is not an expression.
 */
export function equation(claim: Claim, context: Context): Equation {
  const { convention } = claim;
  const bindings = convention === undefined ? context.bindings : context.restated![convention]!;
  return {
    left: context.jets.read(claim.left, bindings),
    right: context.jets.read(claim.right, bindings),
  };
}
