/**
 * Judges claims. A verdict is decided by counted work only; a kill of the algebra by the clock is an
 * error and never a verdict.
 *
 * @module
 */
import type { Discarded } from "../expr/algebra.ts";
import { parse } from "../expr/parse.ts";
import { precise } from "../expr/precise.ts";
import { print } from "../expr/print.ts";
import { type Expr, isNum, mul, names, sub, sym } from "../expr/tree.ts";
import type { Witness } from "../expr/verify.ts";
import { decideZero } from "../expr/zero.ts";
import { type Claim, type Context, type Equation, equation } from "./claim.ts";
import { partsOf } from "./jets.ts";
import { constantRatio, productRatio } from "./ratio.ts";
import { onShell } from "./shell.ts";
import { termsOf } from "./terms.ts";

/** The closed list of verdicts. */
export const VERDICTS = ["proved", "holds-numerically", "refuted", "undecided"] as const;
/** One of {@linkcode VERDICTS}. */
export type VerdictName = (typeof VERDICTS)[number];

/** A judged claim. */
export interface Verdict {
  readonly verdict: VerdictName;
  /** The algorithm that reached zero; empty if none did. */
  readonly algorithm: string;
  /** Points, digits, seed, residual; counterexample with both sides where refuted. */
  readonly witness: Witness;
  /** What would repair a refuted claim, empty if nothing simple was found. */
  readonly repair: string;
  /** The constant factor of a claim up to a factor, otherwise empty. */
  readonly factor: string;
  /** Why an undecided claim is undecided, otherwise empty. */
  readonly why: string;
  /** What the algebra system proposed and was not believed. */
  readonly discarded: readonly Discarded[];
}

/** How claims are judged. */
export interface JudgeOptions {
  /** Seed of the points. @default 20 */
  readonly seed?: number;
  /** Points. @default 20 */
  readonly count?: number;
  /** Decimal digits. @default 64 */
  readonly digits?: number;
  /** Whether a repair of a refuted claim is looked for. @default true */
  readonly repair?: boolean;
}

/** Derivatives of fields may have either sign; other names keep their declared range. */
function rangesFor(e: Expr, context: Context): Record<string, readonly [number, number]> {
  const out: Record<string, readonly [number, number]> = { ...context.ranges };
  for (const name of names(e)) {
    if (!Object.hasOwn(out, name) && partsOf(name).by.length) out[name] = [-1.9, 2.1];
  }
  return out;
}

/**
 * Judges one claim.
 *
 * @param claim As written.
 * @param context What its names mean.
 * @param options Seed, points, digits.
 * @throws {SyntaxError} if a side cannot be read.
 */
export function judge(
  claim: Claim,
  context: Context,
  options: JudgeOptions = {},
): Promise<Verdict> {
  return judgeEquation(equation(claim, context), claim, context, options);
}

/** Judges an equation that has been read (or changed) already. */
export async function judgeEquation(
  sides: Equation,
  claim: Pick<Claim, "onShell" | "upToFactor">,
  context: Context,
  options: JudgeOptions = {},
): Promise<Verdict> {
  const reduce = (e: Expr) => claim.onShell ? onShell(e, context.rules, context.jets) : e;
  const left = reduce(sides.left), right = reduce(sides.right);
  const ranges = rangesFor(sub(left, right), context);
  const how = { seed: 20, count: 20, digits: 64, repair: true, ...options, ranges };
  let factor = "", target = right, unknown = "";
  if (claim.upToFactor) {
    const ratio = await constantRatio(left, right, how);
    if (ratio.kind === "unknown-constant") unknown = ratio.digits;
    factor = ratio.kind === "constant" ? ratio.text : productRatio(left, right, ranges) ?? "";
    if (factor) target = mul(parse(factor, jetName), right);
  }
  const discarded: Discarded[] = [];
  const decision = await decideZero(sub(left, target), { ...how, discarded });
  const { verdict, algorithm } = decision;
  let { witness } = decision;
  if (verdict === "proved" || verdict === "holds-numerically") {
    return { verdict, algorithm, witness, repair: "", factor, why: "", discarded };
  }
  if (verdict === "undecided") {
    const why = `only ${witness.count} of ${how.count} points lie inside the domain`;
    return { verdict, algorithm, witness, repair: "", factor: "", why, discarded };
  }
  if (unknown) {
    const why =
      `the left side is ${unknown} times the right one at 5 points, no number that is known`;
    return { verdict: "undecided", algorithm, witness, repair: "", factor: "", why, discarded };
  }
  const p = await precise(how.digits), at = witness.at!;
  const both = [left, right].map((e) => p.evaluate(e, at).toPrecision(15)) as [string, string];
  witness = { ...witness, left: both[0], right: both[1] };
  const repair = how.repair ? await findRepair({ left, right }, sides, how) : "";
  return { verdict: "refuted", algorithm: "", witness, repair, factor: "", why: "", discarded };
}

/** A derivative in the text of a factor is the name of a jet. */
const jetName = (e: Expr, by: readonly string[]): Expr => sym(`d(${[print(e), ...by].join(", ")})`);

type How = Required<JudgeOptions> & { ranges: Record<string, readonly [number, number]> };

/** A constant factor on a side, or on one term of it, that makes the equation hold. */
async function findRepair(
  { left, right }: Equation,
  written: Equation,
  how: How,
): Promise<string> {
  const ratio = await constantRatio(left, right, how);
  const whole = ratio.kind === "constant" ? ratio.text : productRatio(left, right, how.ranges);
  if (whole) {
    const difference = sub(left, mul(parse(whole, jetName), right));
    const { outcome } = (await decideZero(difference, { ...how, count: 4 })).witness;
    if (outcome === "agree") return `left side = (${whole}) * right side`;
  }
  for (const [side, here, other] of [["right", right, left], ["left", left, right]] as const) {
    const list = termsOf(here);
    if (list.length > 24) continue; // a derived expression, not a side somebody wrote
    const shown = termsOf(written[side]);
    for (const [i, t] of list.entries()) {
      const needed = sub(other, t.with());
      if (isNum(t.term, 0)) continue;
      const zero = await decideZero(needed, { ...how, count: 4 });
      const found = await constantRatio(needed, t.term, how);
      const k = zero.witness.outcome === "agree"
        ? "0"
        : found.kind === "constant"
        ? found.text
        : "";
      if (k) {
        const term = print((shown.length === list.length ? shown[i]! : t).term);
        if (k === "0") return `${side} side without the term ${term}`;
        if (k === "-1") return `${side} side with the other sign of the term ${term}`;
        return `${side} side with ${k} times the term ${term}`;
      }
    }
  }
  return "";
}
