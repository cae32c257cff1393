/**
 * Algebra that can be believed: the algebra system proposes, independent high-precision evaluation
 * decides. A wrong proposal is discarded and recorded.
 *
 * @module
 */
import { expandedTerms } from "./expanded.ts";
import { mathjsDerivative, neutral } from "./precise.ts";
import { normalForm } from "./normal.ts";
import { parse } from "./parse.ts";
import { print } from "./print.ts";
import type { Operation } from "./nerdamer.ts";
import { propose } from "./proposer.ts";
import { call, type Expr, names, num, parts, rebuild } from "./tree.ts";
import { compare, differences, type Witness, type WitnessOptions } from "./verify.ts";

/** A proposal that was not believed. */
export interface Discarded {
  /** What was asked. */
  readonly op: Operation | "normal form";
  /** Of which expression. */
  readonly input: string;
  /** What was proposed, or the error the algebra system gave. */
  readonly proposed: string;
  /** Why it was not believed. */
  readonly why: string;
}

/** How algebra is checked. */
export interface AlgebraOptions extends WitnessOptions {
  /** Receives every discarded proposal. */
  readonly discarded?: Discarded[];
}

const LONGEST = 4096; // characters; the algebra system is quadratic in length (2.3 s at 10 kB)
const MOST_TERMS = 50; // after expansion; (a/7+2*b/3)^48 takes 4 s, (a+b+c)^16 with 153 terms over 10 s
/** Of simplify and factor; simplify took under 3 s up to here in 2000 random expressions, over 20 s from 35 on. */
const MOST_NODES = 25;
/** Its stand-ins for e and other irrationals: a result with one of them is no longer exact. */
const LOSSY = /119696244|325368125|131836323|NaN|Infinity|undefined/;

/**
 * A proposal of the algebra system as a tree, checked against nothing yet.
 *
 * @returns The tree, or undefined if there is none that can be read (recorded).
 */
export async function proposal(
  op: Operation,
  e: Expr,
  name: string | undefined,
  options: AlgebraOptions = {},
): Promise<Expr | undefined> {
  const { tree, to, back } = neutral(e);
  const text = print(tree);
  const discard = (proposed: string, why: string) => {
    options.discarded?.push({ op, input: print(e), proposed, why });
    return undefined;
  };
  if (text.length > LONGEST) return discard("", `not asked: over ${LONGEST} characters`);
  if (op !== "diff" && expandedTerms(tree) > MOST_TERMS) {
    return discard("", `not asked: over ${MOST_TERMS} terms when expanded`);
  }
  if ((op === "simplify" || op === "factor") && size(tree) > MOST_NODES) {
    return discard("", `not asked: over ${MOST_NODES} nodes`);
  }
  const answer = await propose({ op, text, ...(name === undefined ? {} : { name: to(name) }) });
  if ("error" in answer) return discard(answer.error, "the algebra system gave an error");
  if (LOSSY.test(answer.text)) return discard(answer.text, "not exact");
  try {
    const read = exponentials(parse(answer.text));
    const stray = names(read).filter((n) => !names(tree).includes(n));
    if (stray.length) return discard(answer.text, `unknown name ${stray.join(", ")}`);
    return back(read);
  } catch (error) {
    return discard(answer.text, (error as Error).message);
  }
}

/** The algebra system writes exp(x) as e^x. */
function exponentials(e: Expr): Expr {
  const isE = (x: Expr) => x.kind === "sym" && x.name === "e";
  if (isE(e)) return call("exp", num(1));
  if (e.kind === "pow" && isE(e.a)) return call("exp", exponentials(e.b));
  return rebuild(e, exponentials);
}

/**
 * The derivative of `e`, verified: the algebra system's proposal if it agrees with mathjs's derivative
 * and with finite differences of `e` at high precision, otherwise mathjs's if that agrees with the
 * finite differences.
 *
 * @param e An expression.
 * @param name The variable.
 * @param options Points (at least 4), digits, seed, ranges, record of discarded proposals.
 * @throws {Error} if neither derivative can be verified.
 * @example A product with a square root
 * ```ts
 * import { differentiate, parse, print } from "@backstamp/backstamp";
 * const d = await differentiate(parse("y*sqrt(x)"), "y");
 * if (print(d) !== "sqrt(x)") throw new Error(print(d));
 * ```
 */
export async function differentiate(
  e: Expr,
  name: string,
  options: AlgebraOptions = {},
): Promise<Expr> {
  if (!names(e).includes(name)) return num(0);
  const second = await mathjsDerivative(e, name);
  const first = await proposal("diff", e, name, options);
  const witness = await differences(e, name, second, options);
  if (first) {
    const other = await compare(first, second, options);
    const direct = await differences(e, name, first, options);
    if (direct.outcome === "agree" && other.outcome === "agree") return first;
    options.discarded?.push({
      op: "diff",
      input: `${print(e)}, ${name}`,
      proposed: print(first),
      why: explain(direct.outcome === "agree" ? other : direct),
    });
  }
  if (witness.outcome === "agree") return second;
  throw new Error(
    `Cannot differentiate ${print(e).slice(0, 80)} with respect to ${name} as a derivative must ` +
      `agree with finite differences: current outcome is ${explain(witness)}`,
  );
}

/** A witness in words. */
export function explain(w: Witness): string {
  if (w.outcome === "no-points") return `only ${w.count} points inside the domain`;
  if (w.outcome === "agree") return `agrees at ${w.count} points to ${w.residual}`;
  const at = Object.entries(w.at ?? {}).map(([n, v]) => `${n}=${v}`).join(", ");
  return `differs at ${at}: ${w.left} against ${w.right}`;
}

/** Number of nodes of a tree. */
export function size(e: Expr): number {
  return 1 + parts(e).reduce((n, x) => n + size(x), 0);
}

/**
 * A proposal of equal value, or undefined if it differs from `e` (recorded).
 *
 * @param op What was asked.
 * @param e The expression it was asked of.
 * @param proposed The proposal.
 * @param options Points, digits, seed, ranges, record of discarded proposals.
 */
export async function equal(
  op: Discarded["op"],
  e: Expr,
  proposed: Expr,
  options: AlgebraOptions,
): Promise<Expr | undefined> {
  const w = await compare(e, proposed, options);
  if (w.outcome === "agree") return proposed;
  options.discarded?.push({ op, input: print(e), proposed: print(proposed), why: explain(w) });
  return undefined;
}

/**
 * A shorter form of `e`, verified at high precision; `e` itself if no proposal is both right and shorter.
 *
 * @param e An expression.
 * @param options Points, digits, seed, ranges, record of discarded proposals.
 * @example A wrong proposal is not taken
 * ```ts
 * import { compare, parse, simplify } from "@backstamp/backstamp";
 * const e = parse("2 - 2*(x/3)");
 * const { outcome } = await compare(e, await simplify(e));
 * if (outcome !== "agree") throw new Error("changed its value");
 * ```
 */
export async function simplify(e: Expr, options: AlgebraOptions = {}): Promise<Expr> {
  let best = e;
  const positive = (n: string) => (options.ranges?.[n]?.[0] ?? 0) >= 0;
  for (const op of ["normal form", "expand", "simplify"] as const) {
    const p = op === "normal form"
      ? normalForm(e, { positive })
      : await proposal(op, e, undefined, options);
    const right = p && await equal(op, e, p, options);
    if (right && size(right) < size(best)) best = right;
  }
  return best;
}
