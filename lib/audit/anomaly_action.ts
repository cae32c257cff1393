/**
 * The action of the conformal anomaly in four dimensions on a static metric
 *
 *     g = e^{2 s} (-dt^2 + N^2 dz^2 + a^2 dOmega),
 *
 * and the stress tensor that follows from it by variation: that of the state which is empty on the optical
 * metric (Boulware). With <T> = (c F - ae E + beta box R)/16 pi^2,
 *
 *     16 pi^2 Gamma = Int sqrt(gbar) { c s Fbar - ae [s Ebar - 4 Gbar^{mn} d_m s d_n s - 4 (d s)^2 box s - 2 (d s)^4] }
 *                     - (beta/12) [Int sqrt(g) R^2 - Int sqrt(gbar) Rbar^2]
 *
 * (R. J. Riegert, Phys. Lett. B 134 (1984) 56; J. S. Dowker & J. P. Schofield, J. Math. Phys. 31 (1990) 808; both from
 * memory, signs fixed by the trace, which is a claim of the audit).
 *
 * | symbol | meaning |
 * |---|---|
 * | s | half the logarithm of -g_tt |
 * | N, a | radial factor and radius of the optical metric |
 * | c, ae, beta | coefficients of Weyl squared, Euler density and box R |
 *
 * @module
 */
import { normalForm } from "../expr/normal.ts";
import { type Expr, substitute } from "../expr/tree.ts";
import { type Invariants, invariants } from "./invariants.ts";
import { Jets } from "./jets.ts";

/** What the action gives. */
export interface AnomalyTensor {
  readonly jets: Jets;
  /** Invariants of the optical metric. */
  readonly optical: Invariants;
  /** Invariants of the metric itself. */
  readonly metric: Invariants;
  /** Lagrangian: 4 pi of the angles and 1/16 pi^2 left out. */
  readonly lagrangian: Expr;
  /** Its variations with respect to s, N and a. */
  readonly variations: { readonly s: Expr; readonly N: Expr; readonly a: Expr };
  /** 16 pi^2 T^t_t, T^z_z and T^theta_theta. */
  readonly tensor: { readonly tt: Expr; readonly zz: Expr; readonly th: Expr };
}

const COORDINATES = ["t", "z", "y", "w"]; // y = cos theta, w the azimuth
const LAGRANGIAN = "N*a^2*(c*s*F + ae*(4*Gzz*d(s,z)^2/N^2 " +
  "+ 4*d(s,z)^2/N^2*d(a^2*d(s,z)/N, z)/(N*a^2) + 2*d(s,z)^4/N^4)) " +
  "- beta/12*N*a^2*(exp(4*s)*R^2 - Rbar^2)";

let made: AnomalyTensor | undefined;

/** Derives the stress tensor of the anomaly action, once. */
export function anomalyTensor(): AnomalyTensor {
  return made ??= derive();
}

function derive(): AnomalyTensor {
  const jets = new Jets({ coordinates: ["z"], fields: ["s", "N", "a"] });
  const four = new Jets({ coordinates: COORDINATES, fields: [] });
  four.total = (e: Expr, x: string) => x === "z" ? jets.total(e, x) : jets.partial(e, x);
  const of = (factor: string) =>
    invariants(
      ["-1", "N^2", "a^2/(1-y^2)", "a^2*(1-y^2)"].map((g) => jets.read(`${factor}*(${g})`)),
      COORDINATES,
      four,
    );
  const optical = of("1"), metric = of("exp(2*s)");
  const names = { F: optical.weyl, Rbar: optical.R, R: metric.R };
  const lagrangian = normalForm(
    jets.read(LAGRANGIAN, {
      ...names,
      Gzz: jets.read("r - R/2", { r: optical.ricci[1]!, R: optical.R }),
    }),
    { positive: () => false },
  );
  const vary = (field: string) => jets.euler(lagrangian, field);
  const variations = { s: vary("s"), N: vary("N"), a: vary("a") };
  const put = (text: string, more: Record<string, Expr> = {}) =>
    normalForm(
      jets.read(text, { E_s: variations.s, E_N: variations.N, E_a: variations.a, ...more }),
      {
        positive: () => false,
      },
    );
  const zz = put("E_N/(exp(4*s)*a^2)"), th = put("E_a/(2*exp(4*s)*N*a)");
  const tt = put("E_s/(exp(4*s)*N*a^2) - zz - 2*th", { zz, th });
  return { jets, optical, metric, lagrangian, variations, tensor: { tt, zz, th } };
}

/**
 * The tensor on given fields, components times 16 pi^2.
 *
 * @param fields s, N and a as expressions of z.
 */
export function tensorOn(
  fields: { readonly s: Expr; readonly N: Expr; readonly a: Expr },
): AnomalyTensor["tensor"] {
  const { jets, tensor } = anomalyTensor();
  const put = (e: Expr) => jets.at(substitute(e, {}), fields);
  return { tt: put(tensor.tt), zz: put(tensor.zz), th: put(tensor.th) };
}
