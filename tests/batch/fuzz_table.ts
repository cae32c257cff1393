import { uniformFloat64 } from "pure-rand/distribution/uniformFloat64";
import { uniformInt } from "pure-rand/distribution/uniformInt";
import { xoroshiro128plus } from "pure-rand/generator/xoroshiro128plus";
import { PARAMETER_COLUMNS, TABLE_COLUMNS } from "../../lib/batch/columns.ts";
import { MODEL_NAMES, STATE_NAMES } from "../../lib/model/input.ts";

const ODD_CELLS = [
  "",
  "0",
  "-0",
  "+1",
  "1e999",
  "5e-324",
  "1e-400",
  "-1e308",
  "1.7976931348623157e308",
  "NaN",
  "Infinity",
  "=1",
  "@a",
  " 1",
  "1 ",
  "0x10",
  "1_000",
  "1,5",
  "1e",
  ".",
  "-",
  "true",
  "null",
  "../../x",
  "\u0661",
  "1\u0000",
  '"',
  '""',
  "a".repeat(70_000),
] as const;
const ODD_BYTES = [0, 9, 10, 13, 34, 44, 45, 46, 48, 57, 61, 101, 128, 195, 239, 255] as const;

/** Draws of one case. */
export class Draws {
  readonly #generator;
  constructor(seed: number) {
    this.#generator = xoroshiro128plus(seed);
  }
  /** A whole number from 0 to n - 1. */
  below(n: number): number {
    return uniformInt(this.#generator, 0, n - 1);
  }
  /** One of several. */
  of<T>(list: readonly T[]): T {
    return list[this.below(list.length)]!;
  }
  /** Whether something with this chance happens. */
  chance(p: number): boolean {
    return uniformFloat64(this.#generator) < p;
  }
  /** A magnitude over eighty orders, mostly near one. */
  magnitude(): number {
    const decades = this.chance(0.97) ? 2 : 40; // rows far out may take ten seconds
    return 10 ** (decades * (2 * uniformFloat64(this.#generator) - 1));
  }
}

function validCells(draws: Draws): Record<string, string> {
  const model = draws.of(MODEL_NAMES), state = draws.of(STATE_NAMES);
  const cells: Record<string, string> = { case: `c${draws.below(1000)}`, model, state };
  const set = (name: string, value: number) => void (cells[name] = String(value));
  set(draws.of(["kappa", "n_scalars"]), draws.magnitude());
  const masses = PARAMETER_COLUMNS.filter(({ name, models, states }) =>
    /^(mass|mass_above_critical|horizon_dilaton)$/.test(name) && models.includes(model) &&
    states.includes(state)
  ).map(({ name }) => name);
  const cavity = model === "swave" && state !== "boulware", mass = draws.magnitude();
  set(draws.of(masses), !cavity && draws.chance(0.2) ? -mass : mass);
  if (state === "thermal") {
    draws.chance(0.5)
      ? set("bath_ratio", draws.magnitude())
      : set("bath_ratio_minus_one", draws.magnitude() * (draws.chance(0.3) ? -1e-41 : 1));
  }
  if (model === "solvable") set("a", Math.min(2, draws.magnitude()));
  if (cavity) set("wall_radius", mass * (2 + draws.magnitude()));
  if (model !== "swave" && draws.chance(0.3)) set("lambda", draws.magnitude());
  if (draws.chance(0.1)) set("tolerance", draws.of([1e-3, 1e-8, 1e-15, 0.5]));
  return cells;
}

/** A table of one to three rows; about half of them are spoilt in their cells, header or bytes. */
export function fuzzTable(seed: number): Uint8Array {
  const draws = new Draws(seed),
    rows = Array.from({ length: 1 + draws.below(3) }, () => validCells(draws));
  const columns = TABLE_COLUMNS.filter((name) =>
    rows.some((row) => row[name] !== undefined) || draws.chance(0.1)
  );
  const spoilt = draws.chance(0.5);
  if (spoilt && draws.chance(0.5)) draws.of(rows)[draws.of(columns)] = draws.of(ODD_CELLS);
  if (spoilt && draws.chance(0.2)) columns.splice(draws.below(columns.length), 1);
  if (spoilt && draws.chance(0.1)) columns.push(draws.of([...TABLE_COLUMNS, "colour", ""]));
  const lines = [columns, ...rows.map((row) => columns.map((name) => row[name] ?? ""))];
  const end = draws.of(["\n", "\r\n"]);
  const bytes = new TextEncoder().encode(lines.map((line) => line.join(",") + end).join(""));
  const out = [...bytes.subarray(0, 4000)];
  for (let n = spoilt && draws.chance(0.5) ? 1 + draws.below(3) : 0; n > 0; n--) {
    const at = draws.below(out.length + 1),
      byte = draws.chance(0.5) ? draws.of(ODD_BYTES) : draws.below(256);
    draws.of([() => out.splice(at, 1), () => out.splice(at, 0, byte), () => (out[at] = byte)])();
  }
  return Uint8Array.from(out);
}
