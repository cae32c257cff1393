/**
 * Curvature of a metric given by its components, in any number of coordinates.
 *
 * Convention: R > 0 on the sphere; R^a_bcd = d_c Gamma^a_bd - d_d Gamma^a_bc + ...
 *
 * @module
 */
import { normalForm } from "../expr/normal.ts";
import { add, div, type Expr, isNum, mul, num, sub } from "../expr/tree.ts";
import type { Jets } from "./jets.ts";

/** Symmetric matrix of trees. */
export type Metric = readonly (readonly Expr[])[];

const tidy = (e: Expr) => normalForm(e, { positive: () => false });
const total = (list: Expr[]) => list.reduce(add, num(0));

/** Determinant, by expansion along the first row. */
export function determinant(m: Metric): Expr {
  if (m.length === 1) return m[0]![0]!;
  return tidy(total(m.map((_, j) => {
    const entry = m[0]![j]!;
    if (isNum(entry, 0)) return num(0);
    const minor = m.slice(1).map((row) => row.filter((_, k) => k !== j));
    return mul(mul(num(j % 2 ? -1 : 1), entry), determinant(minor));
  })));
}

/** Inverse matrix. */
export function inverse(m: Metric): Metric {
  const det = determinant(m), n = m.length;
  return m.map((_, i) =>
    m.map((_, j) => {
      const minor = m.filter((_, r) => r !== j).map((row) => row.filter((_, c) => c !== i));
      const cofactor = n === 1 ? num(1) : determinant(minor);
      return tidy(div(mul(num((i + j) % 2 ? -1 : 1), cofactor), det));
    })
  );
}

/** Christoffel symbols Gamma^a_bc of a metric over the given coordinates. */
export function christoffel(g: Metric, coordinates: readonly string[], jets: Jets): Expr[][][] {
  const up = inverse(g), n = g.length;
  const d = (i: number, j: number, k: number) => jets.total(g[i]![j]!, coordinates[k]!);
  const range = [...Array(n).keys()];
  return range.map((a) =>
    range.map((b) =>
      range.map((c) =>
        tidy(total(range.map((e) => {
          if (isNum(up[a]![e]!, 0)) return num(0);
          const first = add(d(e, b, c), sub(d(e, c, b), d(b, c, e)));
          return mul(mul(num(1, 2), up[a]![e]!), first);
        })))
      )
    )
  );
}

/** The Ricci scalar. */
export function ricciScalar(g: Metric, coordinates: readonly string[], jets: Jets): Expr {
  const G = christoffel(g, coordinates, jets), up = inverse(g);
  const range = [...g.keys()];
  const ricci = (b: number, c: number) =>
    tidy(total(range.flatMap((a) => [
      sub(jets.total(G[a]![b]![c]!, coordinates[a]!), jets.total(G[a]![b]![a]!, coordinates[c]!)),
      ...range.map((e) =>
        sub(mul(G[a]![a]![e]!, G[e]![b]![c]!), mul(G[a]![c]![e]!, G[e]![b]![a]!))
      ),
    ])));
  return tidy(
    total(
      range.flatMap((b) =>
        range.map((c) => isNum(up[b]![c]!, 0) ? num(0) : mul(up[b]![c]!, ricci(b, c)))
      ),
    ),
  );
}
