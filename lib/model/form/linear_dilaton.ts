/**
 * The static equations of a linear-dilaton model in the form that loses no digits far out.
 *
 * Units lambda = 1, independent variable u = 2 sigma, _u = d/du. With E = e^{-2 phi} and
 * rho = phi + u/2 + w the constraint (C) of the framework is, for constant counterterm slopes
 * h = dH_1/dphi and k = K_1 (H = E + kappa H_1, K = 4 E + kappa K_1, V = 4 E), a quadratic for phi_u whose
 * outer root is taken; equations (1) and (2) give w_uu. Derived here from the action.
 *
 * | symbol | meaning |
 * |---|---|
 * | F | E - e^u: what matter adds to the vacuum |
 * | w, v | rho - phi - sigma and its derivative; zero for the solvable family |
 * | eps | 1 - tau, tau = bath ratio |
 * | X | e^{2 rho} E |
 * | T | kappa (tau^2/4 - (1/2 + v)^2) |
 * | D | X + T; zero at a throat |
 * | hp, hk | 1 + h and h + k, formed exactly |
 * | delta | 1 + 2 h + k; zero for the solvable family |
 * | Ep, Em | roots of H_phi^2 - kappa K in E |
 *
 * @module
 */
import type { SystemText } from "../../expr/lower.ts";

/** Which of two algebraically equal texts is used: `outer` where E_u is close to E, `inner` elsewhere. */
export type Region = "outer" | "inner";

/**
 * The system in u.
 *
 * @param region Where it will be used.
 * @param solvable Whether delta vanishes identically.
 * @param parameters The model's own parameters.
 */
export function linearDilaton(
  region: Region,
  solvable: boolean,
  parameters: readonly string[],
): SystemText {
  const M = solvable ? "0" : "expm1(2*w)";
  return {
    independent: "u",
    unknowns: solvable ? ["F"] : ["F", "w", "v"],
    parameters: ["kappa", "eps", ...parameters],
    let: [
      ...(solvable ? [["w", "0"], ["v", "0"]] as const : []),
      ["eu", "exp(u)"],
      ["E", "eu+F"],
      ["eM", `eu*${M}`],
      ["X", "eu+eM"],
      ["T", "-kappa*(eps/2+v)*(1-eps/2+v)"],
      ["D", "X+T"],
      ["b1", "kappa*hp/(2*E)"],
      ["Bm", "2*v-(1+2*v)*b1"], // B - 1
      ["Sm", solvable ? "Bm" : "sqrt1pm1(Bm*(2+Bm)+kappa*delta*D/E^2)"], // S - 1
      ["BS", "2+Bm+Sm"],
      ["Fu", "(2*T+2*eM-eu*(Bm+Sm))/BS"],
      ["Eu", "eu+Fu"],
      ["y", "Fu-F"],
      ["N", region === "outer" ? "eM-F-2*y-y^2/E" : "X-Eu^2/E"],
      ["q", "2*E-kappa*hp"],
      ["r", "kappa*delta/q"],
      ["phiuu", "N/(kappa*r-q)"],
      ["vu", "r*phiuu"],
      ["phi", "-log(E)/2"],
      ["lnX", "u+2*w"],
      ["lngtt", "lnX-log(E)"],
      ["lngtt_throat", "log(-T)-log(E)"],
      ["gap", "lnX-log(-T)"], // ln X - ln(-T): zero at a throat, nearly linear in u
      ["curvature", "-8*(phiuu+vu)*E/X"],
      ["eratio", "Eu/E"],
      ["root", "sqrt(delta)"],
      ["Ep", "kappa*(hp+root)/2"],
      ["Em", "kappa*(hp-root)/2"],
      ["t", solvable ? "2*(E-Ep)" : "2*sqrt((E-Ep)*(E-Em))"],
      ["chi", "-((t-2*E-kappa*hk)/(2*E-kappa*h+t)-(1+2*v)*E/Eu)/t"],
      ["state", "eps/2+v"], // > 0: a throat can follow; < 0: none
      ["rho", "lngtt/2"],
      ["sigma", "u/2"],
      ["erho", "exp(rho)"],
      ["phiu", "-Eu/(2*E)"],
      ["flux", "-4*((eps/2+v)*(1-eps/2+v)+(1+2*v)*phiu+phiu^2)"], // c^2/4 - rho'^2
    ],
    derivative: { F: "Fu", w: "v", v: "vu" },
    series: ["E", "T", "D", "gap", "lngtt", "X"],
    outputs: [
      "E",
      "D",
      "X",
      "T",
      "BS",
      "eratio",
      "phi",
      "rho",
      "sigma",
      "erho",
      "flux",
      "lngtt",
      "lngtt_throat",
      "curvature",
      "chi",
      "state",
      "Ep",
      "lnX",
    ],
  };
}
