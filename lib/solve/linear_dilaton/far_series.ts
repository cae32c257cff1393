/**
 * The solution of a linear-dilaton model far out, as a double series in z = e^{-u} and u:
 * E = e^u Sum e_n(u) z^n, w = Sum w_n(u) z^n, with e_0 = 1 and
 * e_1 = m + kappa (tau^2 - k) u/4. Derived here by inserting the series into
 * (E + kappa (h+1) phi + kappa w)_uu = e^{u + 2w} and (2E - kappa (h+1)) w_uu = kappa delta phi_uu.
 *
 * With D_n p = (d/du - n)^2 p, W_n = D_n w_n, L = log Sum e_n z^n:
 *
 *     W_{n+1} = kappa (h+1)/2 W_n - (kappa delta/4) D_n L_n - Sum_{j>=1} e_j W_{n+1-j}
 *     D_n e_{n+1} = kappa (h+1)/2 D_n L_n - kappa W_n + [e^{2w}]_{n+1}
 *
 * The polynomials stand in x = u - u0 and carry their power of z0 = e^{-u0}, so nothing overflows.
 *
 * @module
 */
import type { Arithmetic } from "../arithmetic/arithmetic.ts";

/** A polynomial in x, lowest power first. */
type Poly<T> = readonly T[];

/** Constants of the problem, in units where max(|m|, kappa) = 1. */
export interface FarProblem<T> {
  readonly kappa: T;
  /** 1 - tau. */
  readonly eps: T;
  /** 1 + h. */
  readonly hp: T;
  readonly k: T;
  readonly delta: T;
  readonly m: T;
}

/** Unknowns of the u-form at one point. */
export interface FarPoint<T> {
  readonly F: T;
  readonly w: T;
  readonly v: T;
}

/** tau^2 - k from eps = 1 - tau, as (1 - k) - eps (2 - eps). */
export function bathExcess<T>(A: Arithmetic<T>, p: Pick<FarProblem<T>, "eps" | "k">): T {
  const one = A.from(1);
  return A.sub(A.sub(one, p.k), A.mul(p.eps, A.sub(A.from(2), p.eps)));
}

/**
 * F, w, v at u0.
 *
 * @param A Arithmetic.
 * @param p Constants.
 * @param u0 Where; e^{u0} should exceed every scale of the problem a hundredfold.
 * @param terms Powers of z kept.
 */
export function farSeries<T>(
  A: Arithmetic<T>,
  p: FarProblem<T>,
  u0: T,
  terms: number,
): FarPoint<T> {
  const zero = A.from(0), z0 = A.exp(A.neg(u0)), kz = A.mul(p.kappa, z0);
  const plus = (a: Poly<T>, b: Poly<T>): T[] =>
    Array.from(
      { length: Math.max(a.length, b.length) },
      (_, i) => i >= a.length ? b[i]! : i >= b.length ? a[i]! : A.add(a[i]!, b[i]!),
    );
  const times = (a: Poly<T>, b: Poly<T>): T[] => {
    if (!a.length || !b.length) return [];
    const out: T[] = Array.from({ length: a.length + b.length - 1 }, () => zero);
    a.forEach((x, i) => b.forEach((y, j) => out[i + j] = A.add(out[i + j]!, A.mul(x, y))));
    return out;
  };
  const scaled = (c: T, a: Poly<T>): T[] => a.map((x) => A.mul(c, x));
  const derivative = (a: Poly<T>): T[] => a.slice(1).map((x, i) => A.mul(A.from(i + 1), x));
  const minusN = (a: Poly<T>, n: number) => plus(derivative(a), scaled(A.from(-n), a)); // (d - n) a
  const D = (a: Poly<T>, n: number) => minusN(minusN(a, n), n);
  const solve = (a: Poly<T>, n: number): T[] => { // (d - n)^{-1} a = -sum a^(k)/n^{k+1}
    let out: T[] = [], term: T[] = scaled(A.div(A.from(-1), A.from(n)), a);
    while (term.length) {
      out = plus(out, term);
      term = derivative(term).map((x) => A.div(x, A.from(n)));
    }
    return out;
  };
  const slope = A.div(A.mul(p.kappa, bathExcess(A, p)), A.from(4));
  const e1 = A.add(p.m, A.mul(slope, u0));
  const trim = (a: T[]): T[] => {
    while (a.length && A.toNumber(a[a.length - 1]!) === 0) a.pop();
    return a;
  };
  const e: Poly<T>[] = [[A.from(1)], trim([A.mul(e1, z0), A.mul(slope, z0)])];
  const w: Poly<T>[] = [[], []],
    W: Poly<T>[] = [[], []],
    L: Poly<T>[] = [[]],
    X: Poly<T>[] = [[A.from(1)], []];
  const half = A.div(A.mul(kz, p.hp), A.from(2)), quarter = A.div(A.mul(kz, p.delta), A.from(4));
  for (let n = 1; n < terms; n++) {
    let ln: T[] = [...e[n]!]; // n L_n = n e_n - sum_{j<n} j L_j e_{n-j}
    for (let j = 1; j < n; j++) {
      ln = plus(ln, scaled(A.ratio(BigInt(-j), BigInt(n)), times(L[j]!, e[n - j]!)));
    }
    L.push(trim(ln));
    const DL = D(L[n]!, n);
    let Wn: T[] = plus(scaled(half, W[n]!), scaled(A.neg(quarter), DL));
    for (let j = 1; j <= n - 1; j++) Wn = plus(Wn, scaled(A.from(-1), times(e[j]!, W[n + 1 - j]!)));
    W.push(trim(Wn));
    w.push(trim(solve(solve(W[n + 1]!, n + 1), n + 1)));
    let x: T[] = []; // (n+1) X_{n+1} = sum_j 2 j w_j X_{n+1-j}
    for (let j = 2; j <= n + 1; j++) {
      x = plus(x, scaled(A.ratio(BigInt(2 * j), BigInt(n + 1)), times(w[j]!, X[n + 1 - j]!)));
    }
    X.push(trim(x));
    const right = plus(plus(scaled(half, DL), scaled(A.neg(kz), W[n]!)), X[n + 1]!);
    e.push(trim(solve(solve(right, n), n)));
  }
  const at = (a: Poly<T>) => a[0] ?? zero;
  const sum = (list: readonly T[]) => list.reduceRight((s, x) => A.add(s, x), zero);
  return {
    F: A.div(sum(e.slice(1).map(at)), z0),
    w: sum(w.map(at)),
    v: sum(w.map((a, n) => at(minusN(a, n)))),
  };
}

/** Where to start: e^{u0} is `far` times the largest scale, and the logarithm there is small too. */
export function farStart<T>(A: Arithmetic<T>, p: FarProblem<T>, far: number): number {
  const x = A.toNumber, tau = 1 - x(p.eps), kappa = x(p.kappa);
  const scale = Math.max(
    Math.abs(x(p.m)),
    kappa * (1 + Math.abs(x(p.hp)) + Math.abs(x(p.k)) + tau * tau),
  );
  let u0 = Math.ceil(8 * Math.log(far * scale)) / 8;
  while (kappa * Math.abs(tau * tau - x(p.k)) * Math.abs(u0) / 4 * Math.exp(-u0) > 1 / far) {
    u0 += 0.5;
  }
  return u0;
}
