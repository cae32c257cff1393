/**
 * Invented inputs for the figure tests: profiles from the closed form of the exactly solvable family
 * (E + a kappa phi = e^u + kappa (tau^2 - 1) u / 4 + m, rho = phi + sigma, u = 2 sigma, lambda = 1) and from
 * a plain fourth-order integration of the s-wave equations.
 */
import { PROFILE_COLUMNS, type ProfileColumn } from "../../lib/observe/result.ts";
import type { ProfileRows, ResultRow } from "../../lib/show/result_rows.ts";

export type Columns = Record<ProfileColumn, number[]>;

interface Sample {
  sigma: number;
  phi: number;
  rho: number;
  drho: number;
  ddrho: number;
}

/** Stress tensor and distances along samples that go from outside inwards. */
function columnsOf(samples: Sample[], at: { kappa: number; c: number; origin: number }): Columns {
  const out = Object.fromEntries(PROFILE_COLUMNS.map((c) => [c, []])) as unknown as Columns;
  const distance = [0];
  for (let i = 1; i < samples.length; i++) {
    const [s0, s1] = [samples[i - 1], samples[i]];
    const mean = (Math.exp(s0.rho) + Math.exp(s1.rho)) / 2;
    distance.push(distance[i - 1] + mean * (s1.sigma - s0.sigma));
  }
  samples.forEach((s, i) => {
    const g = Math.exp(2 * s.rho);
    const p = at.kappa / (8 * Math.PI) * (at.c ** 2 - 4 * s.drho ** 2) / g;
    const row: Record<ProfileColumn, number> = {
      sigma: s.sigma,
      proper_distance: i === at.origin ? 0 : distance[i] - distance[at.origin],
      dilaton: s.phi,
      rho: s.rho,
      minus_gtt: g,
      curvature: -2 * s.ddrho / g,
      energy_density: p + at.kappa / Math.PI * s.ddrho / g,
      pressure: p,
      residual_1: 1e-15,
      residual_2: 1e-15,
      residual_c: 1e-15,
    };
    for (const name of PROFILE_COLUMNS) out[name].push(row[name]);
  });
  return out;
}

export interface FamilyCase {
  a: number;
  kappa: number;
  tau: number;
  m: number;
}

/** u where the right side has its minimum: the throat. */
export const throatU = ({ kappa, tau }: FamilyCase): number => Math.log(kappa * (1 - tau ** 2) / 4);

/** Solves E + a kappa phi = value on the outer branch by Newton's method on phi, from outside. */
function dilaton(value: number, { a, kappa }: FamilyCase): number {
  let phi = -Math.log(Math.max(value, 1e-300)) / 2 - 0.5;
  for (let i = 0; i < 200; i++) {
    const e = Math.exp(-2 * phi);
    const step = (e + a * kappa * phi - value) / (-2 * e + a * kappa);
    phi -= step;
    if (Math.abs(step) < 1e-15 * (1 + Math.abs(phi))) break;
  }
  return phi;
}

/** Profile of a member of the family from u0 down to u1; the locus is the sample nearest to uLocus. */
export function familyProfile(
  at: FamilyCase,
  range: { u0: number; u1: number; uLocus: number },
  count = 160,
): Columns {
  const samples: Sample[] = [];
  let origin = 0;
  const toLocus = Math.round(count * (range.u0 - range.uLocus) / (range.u0 - range.u1));
  for (let i = 0; i <= count; i++) {
    const u = i === toLocus ? range.uLocus : range.u0 + (range.u1 - range.u0) * i / count;
    if (i === toLocus) origin = i;
    const k = at.kappa * (at.tau ** 2 - 1);
    const phi = dilaton(Math.exp(u) + k * u / 4 + at.m, at);
    const e = Math.exp(-2 * phi);
    const slope = -2 * e + at.a * at.kappa;
    const dphi = (2 * Math.exp(u) + k / 2) / slope;
    const ddphi = (4 * Math.exp(u) - 4 * e * dphi ** 2) / slope;
    samples.push({ sigma: u / 2, phi, rho: phi + u / 2, drho: dphi + 1, ddrho: ddphi });
  }
  return columnsOf(samples, { kappa: at.kappa, c: 2 * at.tau, origin });
}

/** Profile of the s-wave model without a bath, from r = 20 M through the throat. */
export function swaveProfile({ kappa, mass }: { kappa: number; mass: number }): Columns {
  const b = kappa / Math.PI;
  type State = [number, number, number]; // r, rho, rho'
  const slope = ([r, rho, q]: State): State => {
    const d = Math.exp(2 * rho) - b * q * q;
    const p = d / (r * q + Math.sqrt(r * r * q * q + d));
    return [p, q, (-b * q * q - 2 * r * p * q) / (r * r - b)];
  };
  const r0 = 20 * mass;
  let s: State = [r0, Math.log(1 - 2 * mass / r0) / 2, mass / r0 ** 2];
  const samples: Sample[] = [];
  const h = -0.05 * mass;
  let origin = 0;
  for (let i = 0; i < 2400; i++) {
    const [dr, , ddrho] = slope(s);
    if (dr > 0) origin = Math.floor(i / 10);
    if (i % 10 === 0) {
      samples.push({ sigma: h * i, phi: s[0], rho: s[1], drho: s[2], ddrho });
    }
    const add = (k: State, w: number): State => [s[0] + w * k[0], s[1] + w * k[1], s[2] + w * k[2]];
    const k1 = slope(s);
    const k2 = slope(add(k1, h / 2));
    const k3 = slope(add(k2, h / 2));
    const k4 = slope(add(k3, h));
    s = [0, 1, 2].map((j) => s[j] + h / 6 * (k1[j] + 2 * k2[j] + 2 * k3[j] + k4[j])) as State;
  }
  return columnsOf(samples, { kappa, c: 0, origin });
}

/** A row of a results table with the given cells. */
export function resultRow(
  given: Partial<Omit<ResultRow, "numbers">> & { numbers?: Record<string, number> },
): ResultRow {
  return {
    case: "invented",
    model: "rst",
    state: "boulware",
    outcome: "solved",
    kind: "throat",
    stamp: "0123456789abcdef".repeat(4),
    ...given,
    numbers: { kappa: 1, lambda: 1, mass: 10, bath_ratio: 0, ...given.numbers },
  };
}

/** An invented survey over all models with every lane and very large, very small and negative masses. */
export function surveyRows(): ResultRow[] {
  const rows: ResultRow[] = [];
  const put = (model: string, mass: number, bath: number, kind: string): void => {
    const state = bath === 0 ? "boulware" : "thermal";
    const name = `c${rows.length}`;
    const numbers = { mass, bath_ratio: bath };
    rows.push(resultRow({ case: name, model, state, kind, numbers }));
  };
  for (const model of ["cghs", "rst", "bpp", "solvable"]) {
    for (const m of [0.3, 1, 3, 10, 1e3, 1e12, 1e38, 1e60]) {
      for (const tau of [0, 0.5, 0.999]) {
        if (m > 10 && tau === 0.5) continue;
        put(model, m, tau, m < 0.6 ? "naked-singularity" : "throat");
      }
      if (m !== 1e12) put(model, m, model === "cghs" ? 1 + 0.09 / m : 1, "horizon");
      if (m < 100) put(model, m, 1.4, "naked-singularity");
    }
    put(model, -2, 0, "naked-singularity");
    if (model !== "bpp") put(model, 0, 0, "vacuum");
  }
  put("rst", 0.5965735902799727, 1, "singular-horizon");
  put("rst", 0.5965735902799727, 0.4, "marginal");
  put("bpp", -0.5965735902799727, 0, "semi-infinite-throat");
  for (const m of [1, 10, 1e6, 1e38]) put("swave", m, 0, "throat");
  for (const m of [5, 30]) put("swave", m, 1.01, "horizon");
  put("swave", -1, 0, "naked-singularity");
  const lane = (name: string, given: Parameters<typeof resultRow>[0]): void => {
    const row = resultRow({ ...given, case: name, kind: given.kind ?? "" });
    const numbers = { ...row.numbers };
    delete numbers.bath_ratio;
    rows.push({ ...row, numbers });
  };
  lane("below", { outcome: "refused", state: "hartle-hawking", numbers: { mass: 0.2 } });
  lane("below-2", { outcome: "refused", state: "hartle-hawking", numbers: { mass: -4 } });
  lane("edge", { model: "cghs", kind: "undecided", state: "thermal", numbers: { mass: 10 } });
  lane("gave-up", { model: "swave", outcome: "failed", kind: "", numbers: { mass: 1e-3 } });
  const lost = resultRow({ case: "no-mass", model: "cghs", outcome: "refused", kind: "" });
  rows.push({ ...lost, numbers: { kappa: 1, lambda: 1 } });
  return rows;
}

/** Text of a results table with these rows and only the columns figures read. */
export function resultsText(rows: readonly ResultRow[]): string {
  const numeric = [
    "kappa",
    "lambda",
    "a",
    "wall_radius",
    "mass",
    "bath_ratio",
    "dilaton_locus",
    "log10_minus_gtt_locus",
    "curvature_locus",
  ];
  const text = ["case", "model", "state", "outcome", "kind"] as const;
  const lines = rows.map((row) =>
    [...text.map((c) => row[c]), ...numeric.map((c) => cell(row.numbers[c])), row.stamp].join(",")
  );
  return `${[...text, ...numeric, "stamp"].join(",")}\r\n${lines.join("\r\n")}\r\n`;
}

/** Text of a profile file. */
export function profileText(profile: ProfileRows): string {
  const lines = profile.sigma.map((_, i) =>
    PROFILE_COLUMNS.map((c) => cell(profile[c][i])).join(",")
  );
  return `${PROFILE_COLUMNS.join(",")}\r\n${lines.join("\r\n")}\r\n`;
}

function cell(value: number | undefined): string {
  if (value === undefined || Number.isNaN(value)) return "";
  if (!Number.isFinite(value)) return value > 0 ? "INF" : "-INF";
  return String(value);
}
