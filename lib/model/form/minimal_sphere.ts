/**
 * Static equations with the leading tensor of the anomaly near a would-be horizon, in the form that is integrated.
 *
 * Metric -e^{2 psi} dt^2 + dl^2 + R^2 dOmega, alpha = d psi/dl the acceleration of resting observers, source
 * T^m_n = -h alpha^4 diag(-3, 1, 1, 1), h = (a + beta/2)/(8 pi^2), G = 1 (the closure: leading order, no derivatives of
 * alpha). Used are G^t_t and, as an algebraic equation for alpha, G^l_l (order reduction); the remaining equation is then
 * fulfilled to leading order only. Lengths in units of the mass M; own derivation.
 *
 * | symbol | meaning |
 * |---|---|
 * | u | ln(alpha R), the independent variable; rises inwards |
 * | lng | ln of 8 pi h/M^2 = (a + beta/2)/(pi M^2) |
 * | L, psi | ln(R/M) and the redshift, unknowns |
 * | q | 8 pi h alpha^4 R^2 |
 * | p | dR/dl, the root of p^2 + 2 y p + q = 1; zero on the minimal sphere |
 * | D | 1 - p^2 + 3 q = 2 y p + 4 q |
 *
 * @module
 */
import type { SystemText } from "../../expr/lower.ts";

/** The system in u. */
export const MINIMAL_SPHERE: SystemText = {
  independent: "u",
  unknowns: ["L", "psi"],
  parameters: ["lng"],
  let: [
    ["y", "exp(u)"],
    ["gap", "2*L-4*u-lng"], // -ln q: zero on the minimal sphere, nearly linear in u
    ["q", "exp(-gap)"],
    ["p", "(1-q)/(y+sqrt(y^2+1-q))"],
    ["D", "2*y*p+4*q"],
    ["den", "(p+y)*D-2*q*p"],
  ],
  derivative: { L: "-p*D/den", psi: "-y*D/den" },
  series: ["gap"],
  outputs: ["gap", "y"],
};
