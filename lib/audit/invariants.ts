/**
 * Curvature invariants of a diagonal metric: Ricci tensor and scalar, the square of the Weyl tensor, the Euler
 * density of four dimensions.
 *
 * Convention: R > 0 on the sphere; R^a_bcd = d_c Gamma^a_bd - d_d Gamma^a_bc + ...
 *
 * @module
 */
import { normalForm } from "../expr/normal.ts";
import { add, div, type Expr, isNum, mul, num, sub } from "../expr/tree.ts";
import { christoffel, inverse } from "./curvature.ts";
import type { Jets } from "./jets.ts";

/** Invariants of a metric in four dimensions. */
export interface Invariants {
  /** Ricci scalar. */
  readonly R: Expr;
  /** Diagonal of the Ricci tensor, one index up. */
  readonly ricci: readonly Expr[];
  /** Weyl tensor squared. */
  readonly weyl: Expr;
  /** Euler density: Riemann squared - 4 Ricci squared + R^2. */
  readonly euler: Expr;
}

const tidy = (e: Expr) => normalForm(e, { positive: () => false });
const total = (list: readonly Expr[]) => list.reduce(add, num(0));

/**
 * Invariants of a diagonal metric.
 *
 * @param diagonal Its components.
 * @param coordinates Four names.
 * @param jets Calculus; `total` differentiates along any of the coordinates.
 */
export function invariants(
  diagonal: readonly Expr[],
  coordinates: readonly string[],
  jets: Jets,
): Invariants {
  const r = [...diagonal.keys()];
  const g = r.map((i) => r.map((j) => i === j ? diagonal[i]! : num(0)));
  const G = christoffel(g, coordinates, jets), up = inverse(g);
  const D = (e: Expr, i: number) => jets.total(e, coordinates[i]!);
  /** R^ab_cd; zero where a pair of indices is the same. */
  const mixed = r.map((a) =>
    r.map((b) =>
      r.map((c) =>
        r.map((d) => {
          if (a === b || c === d) return num(0);
          const squares = r.map((e) =>
            sub(mul(G[a]![c]![e]!, G[e]![b]![d]!), mul(G[a]![d]![e]!, G[e]![b]![c]!))
          );
          const linear = sub(D(G[a]![b]![d]!, c), D(G[a]![b]![c]!, d));
          return tidy(mul(up[b]![b]!, add(linear, total(squares))));
        })
      )
    )
  );
  const ricci = r.map((b) => r.map((d) => tidy(total(r.map((a) => mixed[a]![b]![a]![d]!)))));
  const R = tidy(total(r.map((a) => ricci[a]![a]!)));
  const square = mul(R, R);
  const ricci2 = total(r.flatMap((a) => r.map((b) => mul(ricci[a]![b]!, ricci[b]![a]!))));
  const riemann2 = total(
    r.flatMap((a) =>
      r.flatMap((b) =>
        r.flatMap((c) =>
          r.filter((d) => !isNum(mixed[a]![b]![c]![d]!, 0))
            .map((d) => mul(mixed[a]![b]![c]![d]!, mixed[c]![d]![a]![b]!))
        )
      )
    ),
  );
  return {
    R,
    ricci: r.map((a) => ricci[a]![a]!),
    weyl: tidy(add(sub(riemann2, mul(num(2), ricci2)), div(square, num(3)))),
    euler: tidy(add(sub(riemann2, mul(num(4), ricci2)), square)),
  };
}
