/**
 * Spherical gravity with nothing at infinity (Boulware), far out: a power series in x = 1/r without
 * logarithms. With Q = r^2 rho', p = r', L = e^{2 rho}:
 *
 *     (1 - b x^2) Q_x = 2 b x Q + b x^2 Q^2/p,   p L_x = -2 L Q,   p^2 + 2 x Q p - L + b x^4 Q^2 = 0
 *
 * with Q_0 = m, p_0 = L_0 = 1 (derived here from the split form). Every coefficient is carried as the pair
 * (classical, b times the rest), so what matter adds keeps all its digits however small b is.
 *
 * @module
 */
import type { Arithmetic } from "../arithmetic/arithmetic.ts";

/** c0 + b c1. */
interface Pair<T> {
  readonly c0: T;
  readonly c1: T;
}

/** Unknowns of the split form at r0. */
export interface SphericalPoint<T> {
  readonly rho: T;
  readonly mu: T;
  readonly om: T;
}

/** The split unknowns at areal radius r0 (in units of the larger of |m| and sqrt b), with `terms` powers of 1/r0. */
export function farSeries<T>(
  A: Arithmetic<T>,
  p: { readonly b: T; readonly m: T },
  r0: number,
  terms: number,
): SphericalPoint<T> {
  const zero = A.from(0), { b } = p, X = A.div(A.from(1), A.from(r0));
  const nothing: Pair<T> = { c0: zero, c1: zero };
  const plus = (x: Pair<T>, y: Pair<T>): Pair<T> => ({
    c0: A.add(x.c0, y.c0),
    c1: A.add(x.c1, y.c1),
  });
  const times = (x: Pair<T>, y: Pair<T>): Pair<T> => ({
    c0: A.mul(x.c0, y.c0),
    c1: A.add(A.add(A.mul(x.c0, y.c1), A.mul(x.c1, y.c0)), A.mul(b, A.mul(x.c1, y.c1))),
  });
  const scaled = (c: T, x: Pair<T>): Pair<T> => ({ c0: A.mul(c, x.c0), c1: A.mul(c, x.c1) });
  const whole = (x: Pair<T>) => A.add(x.c0, A.mul(b, x.c1));
  const timesB = (x: Pair<T>): Pair<T> => ({ c0: zero, c1: whole(x) });
  const product = (f: readonly Pair<T>[], g: readonly Pair<T>[], n: number): Pair<T> => {
    let sum = nothing;
    for (let i = 0; i <= n; i++) sum = plus(sum, times(f[i]!, g[n - i]!));
    return sum;
  };
  const one: Pair<T> = { c0: A.from(1), c1: zero };
  const Q: Pair<T>[] = [{ c0: p.m, c1: zero }], P: Pair<T>[] = [one], L: Pair<T>[] = [one];
  const S: Pair<T>[] = []; // Q^2/p
  const X2 = A.mul(X, X), X3 = A.mul(X2, X), X4 = A.mul(X2, X2);
  for (let n = 1; n <= terms; n++) {
    const k = n - 1; // [Q^2/p]_k from those before it
    let s = product(Q, Q, k);
    for (let i = 1; i <= k; i++) s = plus(s, scaled(A.from(-1), times(P[i]!, S[k - i]!)));
    S.push(s);
    let q = nothing;
    if (n >= 2) q = plus(q, scaled(A.mul(A.from(n), X2), timesB(Q[n - 2]!)));
    if (n >= 3) q = plus(q, scaled(X3, timesB(S[n - 3]!)));
    Q.push(scaled(A.ratio(1n, BigInt(n)), q));
    let l = scaled(A.mul(A.from(-2), X), product(L, Q, n - 1));
    for (let i = 1; i < n; i++) l = plus(l, scaled(A.from(i - n), times(P[i]!, L[n - i]!)));
    L.push(scaled(A.ratio(1n, BigInt(n)), l));
    let r = plus(L[n]!, scaled(A.mul(A.from(-2), X), product(Q, P, n - 1)));
    for (let i = 1; i < n; i++) r = plus(r, scaled(A.from(-1), times(P[i]!, P[n - i]!)));
    if (n >= 4) r = plus(r, scaled(A.neg(X4), timesB(product(Q, Q, n - 4))));
    P.push(scaled(A.ratio(1n, 2n), r));
  }
  const sum = (f: readonly Pair<T>[]) => f.reduceRight((t, x) => plus(t, x), nothing);
  const q = sum(Q), l = sum(L);
  return {
    rho: A.div(A.log(whole(l)), A.from(2)),
    mu: A.sub(q.c1, A.mul(X2, whole(q))),
    om: A.neg(A.mul(l.c1, A.from(r0))),
  };
}
