/**
 * The top-level terms of an expression, and the expression with one of them changed.
 *
 * @module
 */
import { add, type Expr, mul, neg, sub } from "../expr/tree.ts";

/** A term with its sign, and the whole with that term replaced. */
export interface TermOf {
  readonly term: Expr;
  /** The whole with the term taken times `k`; without it if `k` is undefined. */
  with(k?: Expr): Expr;
}

/** The terms of a sum, from left to right; a single term if `e` is no sum. */
export function termsOf(e: Expr): TermOf[] {
  switch (e.kind) {
    case "add":
    case "sub": {
      const join = e.kind === "add" ? add : sub;
      const right = termsOf(e.b).map(({ term, with: w }) => ({
        term: e.kind === "add" ? term : neg(term),
        with: (k?: Expr) => join(e.a, w(k)),
      }));
      return [
        ...termsOf(e.a).map(({ term, with: w }) => ({ term, with: (k?: Expr) => join(w(k), e.b) })),
        ...right,
      ];
    }
    case "neg":
      return termsOf(e.a).map(({ term, with: w }) => ({
        term: neg(term),
        with: (k?: Expr) => neg(w(k)),
      }));
    default:
      return [{ term: e, with: (k) => k ? mul(k, e) : ZERO }];
  }
}

const ZERO: Expr = { kind: "num", p: 0n, q: 1n };
