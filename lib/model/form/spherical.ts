/**
 * The static equations of spherically reduced gravity (G = 1) split into the classical hole and what
 * matter adds, so that nothing is lost when matter adds one part in 10^76.
 *
 * Lengths in any unit; b = kappa/pi in that unit squared; independent variable sigma, ' = d/dsigma, time
 * normalised so that the classical hole of mass m has e^{2 rho} = 1 - 2m/r. Derived here from equations
 * (1), (C) with H = pi r^2/2, K = V = pi: ((r^2 - b) rho')' = b (c^2/4 - rho'^2).
 *
 * | symbol | meaning |
 * |---|---|
 * | rho | half the logarithm of -g_tt |
 * | om | r (1 - e^{2 rho}) = 2 m + b om |
 * | mu | (r^2 - b) rho' = m + b mu; with a bath m - b/(4m) + b mu |
 * | q, p | rho', r' |
 * | eta | bath ratio minus one: c/2 = (1 + eta)/(4m) |
 * | de | c/2 - q without cancellation |
 * | D | e^{2 rho} + b (c^2/4 - q^2); zero at a throat |
 *
 * @module
 */
import type { SystemText } from "../../expr/lower.ts";

/**
 * Matter without a bath (c = 0), the same around a negative mass (rho' < 0), with a bath, or with a bath
 * that gravitates as much as the hole (r itself is the unknown then: e^{2 rho} may pass 1).
 */
export type Surroundings = "empty" | "empty-negative" | "bath" | "heavy-bath";

/** The system in sigma. */
export function spherical(surroundings: Surroundings): SystemText {
  const heavy = surroundings === "heavy-bath", bath = heavy || surroundings === "bath";
  return {
    independent: "sigma",
    unknowns: ["rho", "mu", heavy ? "r" : "om"],
    parameters: bath ? ["b", "m", "eta", "rw", "pi", "kappa"] : ["b", "m", "pi", "kappa"],
    let: [
      ["g", "exp(2*rho)"],
      ["mg", "-expm1(2*rho)"],
      ...(heavy ? [] : [["r", "(2*m+b*om)/mg"]] as const),
      ["r2", "r^2"],
      ["d", "r2-b"],
      ["x", heavy ? "r-2*m" : "(b*om+2*m*g)/mg"], // r - 2m
      ["m0", bath ? "m-b/(4*m)" : "m"],
      ["q", "(m0+b*mu)/d"],
      ["de", bath ? "(x*(r+2*m)+eta*d-4*m*b*mu)/(4*m*d)" : "-q"],
      ["ch", bath ? "(1+eta)/(4*m)" : "0"],
      ["tb", bath ? "de*(ch+q)" : "-q^2"], // T/b
      ["T", "b*tb"],
      ["D", "g+T"],
      ["rq", "r*q"],
      ["p", surroundings === "empty-negative" ? "sqrt(rq^2+D)-rq" : "D/(rq+sqrt(rq^2+D))"],
      ...(heavy ? [["om", "(r*mg-2*m)/b"]] as const : []),
      ["A", bath ? "(om*d+x*(r+2*m)/(2*m)-2*r2*mu)/(r*d)" : "(om*d-2*m-2*r2*mu)/(r*d)"],
      ["dp", heavy ? "(p-g)/b" : "(g*A+tb)/(p+g+2*rq)"], // (p - g)/b
      ["rhopp", "-(g*mg-2*g*b*dp-b^2*dp^2)/d"],
      ["curvature", "-2*rhopp/g"],
      ["gap", "2*rho-log(-T)"],
      ["lngtt", "2*rho"],
      ["lngtt_throat", "log(-T)"],
      ["t", "pi*sqrt(d)"],
      ["chi", "(q/p+1/(r+sqrt(d)))/t"],
      ["state", "-tb"],
      ["phi", "r"],
      ...(bath ? [["wall", "r-rw"]] as const : []),
      ["erho", "exp(rho)"],
      ["flux", "tb"], // c^2/4 - rho'^2
    ],
    derivative: { rho: "q", mu: "tb", om: "dp*mg+g*A", r: "p" },
    series: ["r", "T", "D", "gap", "lngtt", "g", ...(bath ? ["wall"] : [])],
    outputs: [
      "r",
      "om",
      "phi",
      "g",
      "D",
      "T",
      "d",
      "q",
      "p",
      "x",
      "dp",
      "rho",
      "sigma",
      "erho",
      "flux",
      "lngtt",
      "lngtt_throat",
      "curvature",
      "chi",
      "state",
      "de",
      "tb",
    ],
  };
}
