/**
 * Equations of motion as rewriting rules: a derivative of a field, or a constant, is replaced by an
 * expression, and derivatives of that derivative follow.
 *
 * @module
 */
import { normalForm } from "../expr/normal.ts";
import { div, type Expr, mul, names, neg, num, sub, substitute } from "../expr/tree.ts";
import { type Jets, partsOf } from "./jets.ts";

/** Replaces the name `name` (a jet or a constant) by `by`. */
export interface Rule {
  readonly name: string;
  readonly by: Expr;
}

const ROUNDS = 24; // each round lowers the highest derivative by one order; no audit goes beyond order 8

/** `e` modulo the rules and their derivatives. */
export function onShell(e: Expr, rules: readonly Rule[], jets: Jets): Expr {
  let out = e;
  for (let round = 0; round < ROUNDS; round++) {
    const table: Record<string, Expr> = {};
    for (const name of names(out)) {
      const value = replacement(name, rules, jets);
      if (value) table[name] = value;
    }
    if (Object.keys(table).length === 0) return out;
    out = substitute(out, table);
  }
  throw new RangeError(
    `Cannot reduce modulo the equations as the rules must end: current count is ${ROUNDS} rounds`,
  );
}

function replacement(name: string, rules: readonly Rule[], jets: Jets): Expr | undefined {
  const { base, by } = partsOf(name);
  for (const rule of rules) {
    if (rule.name === name) return rule.by;
    const from = partsOf(rule.name);
    if (from.base !== base || from.by.length >= by.length || from.by.length === 0) continue;
    const left = [...by];
    if (!from.by.every((x) => left.includes(x) && left.splice(left.indexOf(x), 1))) continue;
    return left.reduce((x, y) => jets.total(x, y), rule.by);
  }
  return undefined;
}

/**
 * Solves equations `e = 0` that are linear in the given names (at most two).
 *
 * @param equations As many as names.
 * @param list The names.
 * @param jets Calculus in which derivatives are taken.
 * @returns One rule per name.
 * @throws {RangeError} if an equation is not linear in the names, or their number is not 1 or 2.
 */
export function solveLinear(
  equations: readonly Expr[],
  list: readonly string[],
  jets: Jets,
): Rule[] {
  const zero = Object.fromEntries(list.map((n) => [n, num(0)]));
  const rows = equations.map((e) => {
    const a = list.map((n) => jets.partial(e, n));
    if (a.some((x) => list.some((n) => names(normalForm(x)).includes(n)))) {
      throw new RangeError(
        `Cannot solve for ${list.join(", ")} as the equations must be linear in them`,
      );
    }
    return { a: a.map((x) => substitute(x, zero)), b: neg(substitute(e, zero)) };
  });
  if (rows.length === 1 && list.length === 1) {
    return [{ name: list[0]!, by: normalForm(div(rows[0]!.b, rows[0]!.a[0]!)) }];
  }
  if (rows.length !== 2 || list.length !== 2) {
    throw new RangeError(
      `Cannot solve as one or two names are needed: current count is ${list.length}`,
    );
  }
  const [r, s] = rows as [typeof rows[0], typeof rows[0]];
  const cross = (p: Expr, q: Expr, u: Expr, v: Expr) => sub(mul(p, v!), mul(q, u!));
  const det = cross(r.a[0]!, r.a[1]!, s.a[0]!, s.a[1]!);
  return [
    { name: list[0]!, by: normalForm(div(cross(r.b, r.a[1]!, s.b, s.a[1]!), det)) },
    { name: list[1]!, by: normalForm(div(cross(r.a[0]!, r.b, s.a[0]!, s.b), det)) },
  ];
}
