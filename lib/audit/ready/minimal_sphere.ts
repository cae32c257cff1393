/**
 * Audit of the equations of the minimal sphere: Einstein's equations of a static metric in proper length, and that the
 * form which is integrated follows from G^t_t, G^l_l and the leading tensor.
 *
 * @module
 */
import { lower } from "../../expr/lower.ts";
import { parse } from "../../expr/parse.ts";
import { type Expr, substitute } from "../../expr/tree.ts";
import { MINIMAL_SPHERE } from "../../model/form/minimal_sphere.ts";
import type { Audit } from "../audit.ts";
import type { Claim } from "../claim.ts";
import { invariants } from "../invariants.ts";
import { Jets } from "../jets.ts";

/** Lines of the form with every earlier line put in. */
function lines(known: Readonly<Record<string, Expr>>): Record<string, Expr> {
  lower(MINIMAL_SPHERE, {}); // the text is what is integrated
  const out: Record<string, Expr> = { ...known };
  for (const [name, text] of MINIMAL_SPHERE.let) out[name] = substitute(parse(text), out);
  for (const [name, text] of Object.entries(MINIMAL_SPHERE.derivative)) {
    out[`slope_${name}`] = substitute(parse(text), out);
  }
  return out;
}

/** Einstein tensor in proper length, and the form that is integrated. */
export function minimalSphereAudit(): Audit {
  const jets = new Jets({ coordinates: ["l"], fields: ["psi", "R"] });
  const four = new Jets({ coordinates: ["t", "l", "y", "w"], fields: [] });
  four.total = (e: Expr, x: string) => x === "l" ? jets.total(e, x) : jets.partial(e, x);
  const { ricci, R: scalar } = invariants(
    ["-exp(2*psi)", "1", "R^2/(1-y^2)", "R^2*(1-y^2)"].map((g) => jets.read(g)),
    ["t", "l", "y", "w"],
    four,
  );
  const G = (i: number) => jets.read("r - S/2", { r: ricci[i]!, S: scalar });
  // R = M e^L, alpha = y/R; the source has alpha^4 8 pi h = q/R^2
  const form = lines({ L: parse("log(R/M)"), u: parse("log(Y)"), lng: parse("log(k/M^2)") });
  const claim = (id: string, statement: string, left: string, right: string): Claim => ({
    id,
    statement,
    left,
    right,
    source: "Einstein's equations with the leading tensor, own derivation",
  });
  return {
    name: "minimal sphere",
    title: "Equations of the minimal sphere",
    context: {
      jets,
      bindings: {
        Gtt: G(0),
        Gll: G(1),
        Gth: G(2),
        p: form["p"]!,
        q: form["q"]!,
        D: form["D"]!,
        slope_L: form["slope_L"]!,
        slope_psi: form["slope_psi"]!,
      },
      rules: [],
      ranges: { R: [2.1, 3.1], Y: [0.4, 0.9], M: [0.9, 1.1], k: [0.1, 0.9], y: [-0.9, 0.9] },
    },
    claims: [
      claim("g-ll", "G^l_l", "Gll", "(d(R,l)^2 - 1)/R^2 + 2*d(psi,l)*d(R,l)/R"),
      claim("g-tt", "G^t_t", "Gtt", "(2*R*d(R,l,l) + d(R,l)^2 - 1)/R^2"),
      claim(
        "g-th",
        "G^theta_theta",
        "Gth",
        "d(R,l,l)/R + d(psi,l,l) + d(psi,l)^2 + d(psi,l)*d(R,l)/R",
      ),
      claim("source", "q is 8 pi h alpha^4 R^2", "q", "k*(Y/R)^4*R^2"),
      claim("constraint-ll", "p solves G^l_l = 8 pi T^l_l = -q/R^2", "p^2 + 2*Y*p", "1 - q"),
      claim("denominator", "D = 1 - p^2 + 3 q, from G^t_t = 3 q/R^2", "D", "1 - p^2 + 3*q"),
      // along l: R' = p, p' = D/(2R), q'/q = 4 Y'/Y - 2 p/R, and the constraint gives Y'
      claim(
        "slope-radius",
        "d ln R/du, by differentiating the constraint",
        "slope_L*(2*q*p/R - (p+Y)*D/R)/(2*p + 4*q/Y)/Y",
        "p/R",
      ),
      claim("slope-redshift", "d psi/du = (Y/p) d ln R/du", "slope_psi*p", "slope_L*Y"),
      claim(
        "limit",
        "on the sphere alpha^4 = 1/(8 pi h R^2): -g_tt tends to sqrt(8 pi h)/(8 M)",
        "(sqrt(k)/(2*M)/4)^2",
        "k/(64*M^2)",
      ),
    ],
  };
}
