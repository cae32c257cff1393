/**
 * The static equations with the dilaton as independent variable, for any H, K, V: regular through the
 * critical locus H_phi^2 = kappa K and therefore the form in which naked singularities are reached.
 *
 * With t = sqrt(H_phi^2 - kappa K), e the sign of H_phi, Y = e^{2 rho} V + kappa c^2/4 and
 * H_phi + kappa rho_phi = e t (1 + kappa chi), the constraint (C) reads
 * sigma_phi^2 = t^2 chi (2 + kappa chi)/Y, and equations (1), (2) give chi_phi without t in a
 * denominator. Derived here. Near the locus the independent variable is y = sqrt(distance), so that
 * the end is the regular point y = 0.
 *
 * | symbol | meaning |
 * |---|---|
 * | phi | dilaton (areal radius for spherical models) |
 * | e | sign of H_phi: -1 linear dilaton, +1 spherical |
 * | c4 | kappa c^2/4 |
 * | y | sqrt(E - Ep) for linear-dilaton models, sqrt(r - sqrt b) for spherical ones |
 *
 * @module
 */
import type { SystemText } from "../../expr/lower.ts";
import type { Family } from "../model.ts";

const UNKNOWNS = ["rho", "chi", "sigma"] as const;

const COMMON: SystemText["let"] = [
  ["g", "exp(2*rho)"],
  ["Y", "g*V+c4"],
  ["He", "e*H_phi"], // |H_phi|
  ["slope", "e*t*chi-e*K/(He+t)"], // d rho / d phi
  ["kc", "kappa*chi"],
  ["chi_phi", "chi*(2+kc)*(g/Y)*((1+kc)*V_phi/2-chi*V*H_phi-e*V*K/(t+He))"],
  ["sigma_phi", "e*t*sqrt(chi*(2+kc)/Y)"],
  ["lngtt", "2*rho"],
  ["erho", "exp(rho)"],
];

/** The system in phi. */
export function inDilaton(parameters: readonly string[]): SystemText {
  return {
    independent: "phi",
    unknowns: UNKNOWNS,
    parameters: ["kappa", "c4", "e", ...parameters],
    let: [["t", "sqrt(H_phi^2-kappa*K)"], ...COMMON],
    derivative: { rho: "slope", chi: "chi_phi", sigma: "sigma_phi" },
    series: [],
    outputs: ["phi", "rho", "chi", "sigma", "lngtt", "erho"],
  };
}

/** The system in y, which ends at the critical locus y = 0. */
export function inRoot(
  family: Family,
  solvable: boolean,
  parameters: readonly string[],
): SystemText {
  const linear = family === "linear-dilaton";
  return {
    independent: "y",
    unknowns: UNKNOWNS,
    parameters: linear
      ? ["kappa", "c4", "e", "Ep", ...parameters]
      : ["kappa", "c4", "e", "b", ...parameters],
    let: linear
      ? [
        ["E", "Ep+y^2"],
        ["phi", "-log(E)/2"],
        ["t", solvable ? "2*y^2" : "2*y*sqrt(y^2+kappa*sqrt(delta))"],
        ["phi_y", "-y/E"],
        ...COMMON,
      ]
      : [
        ["phi", "sqrt(b)+y^2"],
        ["t", "pi*y*sqrt(y^2+2*sqrt(b))"],
        ["phi_y", "2*y"],
        ...COMMON,
      ],
    derivative: { rho: "slope*phi_y", chi: "chi_phi*phi_y", sigma: "sigma_phi*phi_y" },
    series: [],
    outputs: ["phi", "rho", "chi", "sigma", "lngtt", "erho"],
  };
}
