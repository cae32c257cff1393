/** A worker whose rows are arithmetic, not physics; `tolerance` tells which of them misbehave. */
import { ownPort, serve } from "../../lib/batch/serve.ts";
import type { RowInput } from "../../lib/model/input.ts";
import type { Profile, RowResult } from "../../lib/observe/result.ts";
import { PROFILE_COLUMNS } from "../../lib/observe/result.ts";
import { CRASH, EXHAUST, HANG, NOT_A_NUMBER, SLOW, THROW } from "./stub_worker_rows.ts";

/** Whether a crash that shall happen once has happened. */
function forgiven(): boolean {
  const marker = Deno.env.get("STUB_CRASH_ONCE");
  if (marker === undefined) return false;
  try {
    Deno.writeTextFileSync(marker, "", { createNew: true });
    return false;
  } catch {
    return true;
  }
}

function misbehave({ tolerance }: RowInput): void {
  if (tolerance === HANG) { for (;;); }
  if (tolerance === CRASH && !forgiven()) process.exit(1); // in a thread: ends that thread
  if (tolerance === EXHAUST) {
    const held: unknown[] = [];
    for (let n = 0;; n++) held.push(Array.from({ length: 1e4 }, (_, i) => ({ n, i })));
  }
  if (tolerance === THROW) throw new Error("thrown");
}

function result(input: RowInput): RowResult {
  const m = input.mass!, third = m % 3;
  if (third < 0.5) {
    return { outcome: "refused", reason: "below-critical: too light", numbers: {}, evidence: {} };
  }
  const value = input.tolerance === NOT_A_NUMBER ? NaN : m / 3;
  return {
    outcome: "solved",
    reason: "",
    kind: third < 1.5 ? "throat" : "horizon",
    numbers: {
      dilaton_locus: { value, error: m * 1e-20 },
      curvature_locus: third < 1.5 ? { value: -Infinity } : { value: Math.sqrt(m), error: 0 },
    },
    innerEnd: "not-followed",
    validity: "inside",
    evidence: { throat_condition: { value: -m / 7, error: 1e-30 } },
  };
}

function profile(input: RowInput): Profile {
  const points = Float64Array.from({ length: 40 }, (_, i) => input.mass! / (i + 1));
  return Object.fromEntries(PROFILE_COLUMNS.map((name) => [name, points])) as unknown as Profile;
}

serve((input: RowInput, _model: { readonly name: string }, options) => {
  const until = performance.now() + (input.kappa === SLOW ? 250 : 0.2);
  misbehave(input);
  while (performance.now() < until);
  const solved = result(input);
  return options.profile && solved.kind === "horizon"
    ? { result: solved, profile: profile(input) }
    : { result: solved };
}, ownPort());
