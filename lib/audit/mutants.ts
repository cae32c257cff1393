/**
 * Wrong versions of a claim, such as slip into notes: a sign, a factor 2, kappa for kappa/2, a lost term. An
 * audit that does not refute every one of them proves nothing.
 *
 * @module
 */
import { print } from "../expr/print.ts";
import { add, div, type Expr, isNum, mul, neg, num, rebuild, sub, sym } from "../expr/tree.ts";
import type { Claim } from "./claim.ts";
import { derivativeOf, written } from "../expr/written.ts";

/** A claim with one thing changed. */
export interface Mutant {
  readonly claim: Claim;
  /** Which side was changed. */
  readonly side: "left" | "right";
  /** What was done to it, in words. */
  readonly change: string;
}

interface Changed {
  readonly e: Expr;
  readonly change: string;
}

const isSum = (e: Expr) => e.kind === "add" || e.kind === "sub";

/** Every single change of a tree. */
function* changes(e: Expr): Iterable<Changed> {
  if (e.kind === "sym") {
    const d = derivativeOf(e.name);
    if (e.name === "kappa") yield { e: div(e, num(2)), change: "kappa/2 for kappa" };
    if (d) {
      for (const { e: inner, change } of changes(written(d.inner))) {
        yield { e: sym(`d(${[print(inner), ...d.by].join(", ")})`), change };
      }
    }
    return;
  }
  if (e.kind === "num") return;
  if (e.kind === "add" || e.kind === "sub") {
    const { a, b } = e, join = e.kind === "add" ? add : sub;
    yield { e: a, change: `${print(b)} dropped` };
    yield { e: (e.kind === "add" ? sub : add)(a, b), change: `sign of ${print(b)}` };
    if (!isSum(b)) yield { e: join(a, mul(num(2), b)), change: `twice ${print(b)}` };
    if (!isSum(a)) {
      yield { e: e.kind === "add" ? b : neg(b), change: `${print(a)} dropped` };
      yield { e: join(neg(a), b), change: `sign of ${print(a)}` };
      yield { e: join(mul(num(2), a), b), change: `twice ${print(a)}` };
    }
  }
  const list = "b" in e ? [e.a, e.b] : [e.a];
  for (const [i, part] of list.entries()) {
    if (e.kind === "pow" && i === 1) continue;
    for (const { e: changed, change } of changes(part)) {
      let at = 0;
      yield { e: rebuild(e, (x) => at++ === i ? changed : x), change };
    }
  }
}

/**
 * All wrong versions of a claim that differ from it by one change of one side.
 *
 * Some change nothing (twice a term that vanishes); whoever counts must leave these out. A claim up to a
 * factor keeps its meaning under a factor, so that whole sides are not multiplied there.
 *
 * @param claim A claim that holds.
 */
export function mutants(claim: Claim): Mutant[] {
  const out: Mutant[] = [];
  for (const side of ["left", "right"] as const) {
    const e = written(claim[side]), list = [...changes(e)];
    if (!isSum(e) && !isNum(e, 0) && !claim.upToFactor) {
      list.push({ e: neg(e), change: "sign of the side" });
      list.push({ e: mul(num(2), e), change: "twice the side" });
    }
    for (const { e: changed, change } of list) {
      out.push({ claim: { ...claim, [side]: print(changed) }, side, change });
    }
  }
  return out;
}
