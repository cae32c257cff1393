/**
 * Audits of the conformal anomaly in four dimensions: its action, the stress tensor, and that tensor on flat
 * space, Schwarzschild and de Sitter.
 *
 * @module
 */
import { parse } from "../../expr/parse.ts";
import { num } from "../../expr/tree.ts";
import { anomalyOf, type FieldContent } from "../../model/content.ts";
import { anomalyTensor, tensorOn } from "../anomaly_action.ts";
import type { Audit } from "../audit.ts";
import type { Claim } from "../claim.ts";
import { Jets } from "../jets.ts";

const claims = (source: string) =>
(
  id: string,
  statement: string,
  left: string,
  right: string,
): Claim => ({ id, statement, left, right, source });

/** The action: its variation with the conformal factor is the anomaly, its tensor is conserved. */
export function anomalyActionAudit(): Audit {
  const { jets, optical, metric, variations, tensor } = anomalyTensor();
  const claim = claims("variation of the anomaly action, for any s, N, a");
  return {
    name: "anomaly in four dimensions",
    title: "Action and stress tensor of the conformal anomaly in four dimensions",
    context: {
      jets,
      bindings: {
        F: metric.weyl,
        E: metric.euler,
        R: metric.R,
        F_optical: optical.weyl,
        E_optical: optical.euler,
        E_s: variations.s,
        E_N: variations.N,
        E_a: variations.a,
        Ttt: tensor.tt,
        Tzz: tensor.zz,
        Tth: tensor.th,
      },
      rules: [],
      ranges: { s: [-0.8, 0.9], N: [0.4, 1.7], a: [0.6, 2.1] },
    },
    claims: [
      claim("euler-optical", "the Euler density of the optical metric vanishes", "E_optical", "0"),
      claim("weyl-conformal", "sqrt(g) F is conformally invariant", "exp(4*s)*F", "F_optical"),
      claim(
        "trace-four",
        "variation with the conformal factor gives c F - ae E + beta box R",
        "E_s",
        "exp(4*s)*N*a^2*(c*F - ae*E) + beta*d(exp(2*s)*a^2/N*d(R,z), z)",
      ),
      claim(
        "noether-four",
        "reparametrisation identity of the reduced action",
        "d(s,z)*E_s + d(a,z)*E_a",
        "N*d(E_N,z)",
      ),
      claim(
        "conservation-four",
        "nabla T = 0",
        "d(Tzz,z) + d(s,z)*(Tzz - Ttt)",
        "-2*(d(s,z) + d(a,z)/a)*(Tzz - Tth)",
      ),
    ],
  };
}

/** The tensor on flat space and on Schwarzschild, and its leading part at the horizon. */
export function anomalySchwarzschildAudit(): Audit {
  const jets = new Jets({ coordinates: ["z"], fields: [] });
  const flat = tensorOn({ s: num(0), N: num(1), a: parse("z") });
  const hole = tensorOn({
    s: parse("log(1-2*M/z)/2"),
    N: parse("1/(1-2*M/z)"),
    a: parse("z/sqrt(1-2*M/z)"),
  });
  const scalar = { c: parse("1/120"), ae: parse("1/360"), beta: parse("1/180") };
  const empty = (e: typeof hole.tt) => jets.read("T/(16*pi^2)", { T: e });
  const of = (e: typeof hole.tt) => jets.at(jets.read("T", { T: e }), scalar);
  const own = claims("variation of the anomaly action, own derivation");
  const page = claims(
    "D. N. Page, Phys. Rev. D 25 (1982) 1499, his tensor without its thermal part",
  );
  const form = (m2: string, m1: string, m0: string) =>
    `M^2*((${m2})*M^2 + (${m1})*M*z + (${m0})*z^2)/(8*pi^2*z^6*(z-2*M)^2)`;
  const pages = (gas: string, rest: string) =>
    `pi^2/90/(8*pi*M)^4*(${gas}*(4-6*M/z)^2*(2*M/z)^6/(1-2*M/z)^2 + ${rest}*(2*M/z)^6)`;
  return {
    name: "anomaly on Schwarzschild",
    title: "The tensor of the anomaly on flat space and on Schwarzschild",
    context: {
      jets,
      bindings: {
        xi: parse("-beta/12"),
        flat_tt: flat.tt,
        flat_zz: flat.zz,
        flat_th: flat.th,
        Ttt: empty(hole.tt),
        Tzz: empty(hole.zz),
        Tth: empty(hole.th),
        scalar_tt: of(empty(hole.tt)),
        scalar_zz: of(empty(hole.zz)),
        scalar_th: of(empty(hole.th)),
      },
      rules: [],
      ranges: { z: [6, 9], M: [0.3, 1.4] },
    },
    claims: [
      own("flat-tt", "nothing on flat space: T^t_t", "flat_tt", "0"),
      own("flat-zz", "nothing on flat space: T^r_r", "flat_zz", "0"),
      own("flat-th", "nothing on flat space: T^theta_theta", "flat_th", "0"),
      own(
        "hole-zz",
        "T^r_r on Schwarzschild",
        "Tzz",
        form("48*c-33*ae+486*xi", "24*ae-40*c-432*xi", "8*c-4*ae+96*xi"),
      ),
      own(
        "hole-th",
        "T^theta_theta on Schwarzschild",
        "Tth",
        `-(${form("64*c-39*ae+810*xi", "36*ae-64*c-792*xi", "16*c-8*ae+192*xi")})`,
      ),
      own(
        "hole-tt",
        "T^t_t on Schwarzschild",
        "Ttt",
        form("176*c-141*ae+1134*xi", "144*ae-184*c-1152*xi", "48*c-36*ae+288*xi"),
      ),
      own("hole-trace", "trace on Schwarzschild", "Ttt + Tzz + 2*Tth", "3*(c-ae)*M^2/(pi^2*z^6)"),
      page("page-tt", "scalar: T^t_t", "scalar_tt", pages("3", "72")),
      page("page-zz", "scalar: T^r_r", "scalar_zz", pages("(-1)", "24")),
      page("page-th", "scalar: T^theta_theta", "scalar_th", pages("(-1)", "0")),
      own(
        "horizon-leading",
        "8 pi^2 T^r_r -> -(ae + beta/2) (acceleration)^4 at the horizon",
        "(48*c-33*ae+486*xi) + 2*(24*ae-40*c-432*xi) + 4*(8*c-4*ae+96*xi)",
        "-(ae + beta/2)",
      ),
    ],
  };
}

/** The tensor on the static patch of de Sitter space of radius l. */
export function anomalyDeSitterAudit(): Audit {
  const jets = new Jets({ coordinates: ["z"], fields: [] });
  const f = "(1-z^2/l^2)";
  const patch = tensorOn({
    s: parse(`log${f}/2`),
    N: parse(`1/${f}`),
    a: parse(`z/sqrt${f}`),
  });
  const T = (e: typeof patch.tt) => jets.read("T/(16*pi^2)", { T: e });
  const claim = claims(
    "Bunch & Davies 1978: -g_mn/(960 pi^2 l^4) for the scalar (from memory), less the gas at 1/(2 pi l)",
  );
  const value = (sign: string) => `-3*ae/(8*pi^2*l^4) ${sign}*(ae + beta/2)/(8*pi^2*l^4*${f}^2)`;
  return {
    name: "anomaly on de Sitter",
    title: "The tensor of the anomaly on the static patch of de Sitter space",
    context: {
      jets,
      bindings: { Ttt: T(patch.tt), Tzz: T(patch.zz), Tth: T(patch.th) },
      rules: [],
      ranges: { z: [0.3, 1.1], l: [1.4, 2.3] },
    },
    claims: [
      claim("patch-tt", "T^t_t", "Ttt", value("+ 3")),
      claim("patch-zz", "T^r_r", "Tzz", value("- 1")),
      claim("patch-th", "T^theta_theta", "Tth", value("- 1")),
      claim(
        "patch-scalar",
        "the part without gas for one scalar",
        "-3/(8*pi^2*360)",
        "-1/(960*pi^2)",
      ),
    ],
  };
}

/** Coefficients of usual contents: Rindler energies and the trace on Schwarzschild. */
export function contentAudit(): Audit {
  const jets = new Jets({ coordinates: [], fields: [] });
  const name = (id: string, content: FieldContent) => {
    const { c, a, beta } = anomalyOf(content, "zeta");
    return { [`c_${id}`]: c, [`a_${id}`]: a, [`beta_${id}`]: beta };
  };
  const rindler = claims(
    "P. Candelas & D. Deutsch, Proc. R. Soc. Lond. A 354 (1977) 79, from memory",
  );
  const trace = claims(
    "ratios 1 : 7/4 : 7/2 : -13; S. M. Christensen & M. J. Duff 1978, from memory",
  );
  const energy = (id: string) => `3*(a_${id} + beta_${id}/2)/(8*pi^2)`;
  return {
    name: "field content",
    title: "Anomaly coefficients of scalars, spinors and vectors",
    context: {
      jets,
      bindings: {
        ...name("scalar", { scalars: 1, weyl: 0, vectors: 0 }),
        ...name("weyl", { scalars: 0, weyl: 1, vectors: 0 }),
        ...name("dirac", { scalars: 0, weyl: 2, vectors: 0 }),
        ...name("vector", { scalars: 0, weyl: 0, vectors: 1 }),
      },
      rules: [],
      ranges: {},
    },
    claims: [
      rindler(
        "rindler-scalar",
        "energy below the vacuum, scalar",
        energy("scalar"),
        "1/(480*pi^2)",
      ),
      rindler("rindler-dirac", "energy below the vacuum, Dirac", energy("dirac"), "17/(960*pi^2)"),
      rindler(
        "rindler-vector",
        "energy below the vacuum, vector",
        energy("vector"),
        "11/(240*pi^2)",
      ),
      trace("trace-scalar", "trace M^2/(60 pi^2 r^6)", "3*(c_scalar - a_scalar)", "1/60"),
      trace("trace-weyl", "Weyl", "c_weyl - a_weyl", "7/4*(c_scalar - a_scalar)"),
      trace("trace-dirac", "Dirac", "c_dirac - a_dirac", "7/2*(c_scalar - a_scalar)"),
      trace("trace-vector", "vector", "c_vector - a_vector", "-13*(c_scalar - a_scalar)"),
    ],
  };
}
