/**
 * Evaluates the order-zero part of a program in any arithmetic: the values of all operations at a point.
 *
 * @module
 */
import type { Operation } from "../../expr/program.ts";
import type { Arithmetic } from "../arithmetic/arithmetic.ts";

/** Value of one operation from the values of earlier ones. */
export function valueOf<T>(
  A: Arithmetic<T>,
  o: Operation,
  v: readonly T[],
  point: { readonly x: readonly T[]; readonly t: T; readonly parameter: (name: string) => T },
): T {
  switch (o.op) {
    case "constant":
      return A.ratio(BigInt(o.p), BigInt(o.q));
    case "parameter":
      return point.parameter(o.name);
    case "unknown":
      return point.x[o.index]!;
    case "independent":
      return point.t;
    case "sqr":
      return A.mul(v[o.a]!, v[o.a]!);
    case "power":
      return A.exp(A.mul(A.ratio(BigInt(o.p), BigInt(o.q)), A.log(v[o.a]!)));
    case "add":
    case "sub":
    case "mul":
    case "div":
      return A[o.op](v[o.a]!, v[o.b]!);
    default:
      return A[o.op](v[o.a]!);
  }
}
