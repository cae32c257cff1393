/**
 * Values of texts by mathjs's own parser and evaluator, for judging what the library returns by a way that
 * shares no code with it but the big numbers.
 *
 * @module
 */
import { all, type BigNumber, create } from "mathjs";

const mathjs = create(all, { number: "BigNumber", precision: 64 });

/** Values of names, decimal texts. */
export type Point = Readonly<Record<string, string>>;

/** The value of a text at a point with 64 digits; undefined if it is not real and finite. */
export function value(text: string, at: Point): BigNumber | undefined {
  const scope = new Map(Object.entries(at).map(([n, v]) => [n, mathjs.bignumber(v)]));
  const x = mathjs.evaluate(text, scope);
  return mathjs.isBigNumber(x) && x.isFinite() ? x : undefined;
}

/** The derivative by central differences of fourth order with step 1e-12: good to 40 digits or so. */
export function slope(text: string, name: string, at: Point): BigNumber | undefined {
  const x = mathjs.bignumber(at[name]!), h = mathjs.bignumber("1e-12");
  const f = (k: number) => value(text, { ...at, [name]: x.plus(h.times(k)).toString() });
  const [a, b, c, d] = [f(-2), f(-1), f(1), f(2)];
  if (!a || !b || !c || !d) return undefined;
  return c.minus(b).times(8).minus(d.minus(a)).div(h.times(12)) as BigNumber;
}

/** |a - b| / |b|; infinite where one is missing. */
export function apart(a: BigNumber | undefined, b: BigNumber | string): number {
  const right = mathjs.bignumber(b);
  return a ? a.minus(right).div(right).abs().toNumber() : Infinity;
}
