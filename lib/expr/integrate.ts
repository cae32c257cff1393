/**
 * Antiderivatives that can be believed.
 *
 * @module
 */
import { type AlgebraOptions, explain, proposal } from "./algebra.ts";
import { mathjsDerivative } from "./precise.ts";
import { print } from "./print.ts";
import { type Expr, mul, names, sym } from "./tree.ts";
import { compare, differences } from "./verify.ts";

/**
 * An antiderivative of `e`, verified: mathjs's derivative of the algebra system's proposal agrees with `e`,
 * and so do finite differences at high precision, wherever the proposal is real.
 *
 * @param e The integrand.
 * @param name The variable.
 * @param options Points, digits, seed, ranges, record of discarded proposals.
 * @returns The antiderivative without a constant; undefined if none was proposed that can be read and verified.
 * @throws {Error} named `AlgebraKilled` if the algebra system does not end within half a minute.
 * @example An exponential, and a logarithm whose proposal is wrong
 * ```ts
 * import { integrate, parse, print } from "@backstamp/backstamp";
 * const F = await integrate(parse("exp(-2*phi)"), "phi");
 * if (!F || print(F) !== "(-1/2)*exp(-2*phi)") throw new Error("not found");
 * if (await integrate(parse("1/(1-2*M/x)"), "x")) throw new Error("believed a wrong one");
 * ```
 */
export async function integrate(
  e: Expr,
  name: string,
  options: AlgebraOptions = {},
): Promise<Expr | undefined> {
  if (!names(e).includes(name)) return mul(e, sym(name));
  const p = await proposal("integrate", e, name, options);
  if (!p) return undefined;
  const witnesses = [
    await compare(await mathjsDerivative(p, name), e, options),
    await differences(p, name, e, options),
  ];
  const against = witnesses.find((w) => w.outcome !== "agree");
  if (!against) return p;
  options.discarded?.push({
    op: "integrate",
    input: `${print(e)}, ${name}`,
    proposed: print(p),
    why: explain(against),
  });
  return undefined;
}
