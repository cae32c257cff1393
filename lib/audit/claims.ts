/**
 * From a claims file to audits: first the derivation of the equations of its model, then its claims.
 *
 * @module
 */
import { type Expr, mul, sym } from "../expr/tree.ts";
import type { Audit } from "./audit.ts";
import type { Claim } from "./claim.ts";
import { ClaimsError, type ClaimsFile, type Path, type ReadClaims } from "./claims_file.ts";
import { type Convention, conventionOf, conversion, type Quantity } from "./conventions.ts";
import { type Ground, groundOf } from "./ground.ts";
import { written } from "../expr/written.ts";
import { faultsOf } from "./names.ts";
import { lightConeAudit, staticAudit } from "./ready/equations.ts";
import type { Rule } from "./shell.ts";

type Bindings = Readonly<Record<string, Expr>>;

/** Bindings in which every quantity has the size that a convention gives it. */
function inConvention(
  bindings: Bindings,
  quantities: Readonly<Record<string, Quantity>>,
  from: Convention,
  to: Convention,
): Record<string, Expr> {
  const out: Record<string, Expr> = { ...bindings };
  for (const [name, quantity] of Object.entries(quantities)) {
    const factor = conversion(quantity, from, to);
    out[name] = mul(factor, out[name] ?? sym(name));
  }
  return out;
}

/** Collects what is wrong with the texts of a file, each with its place. */
class Faults {
  readonly list: string[] = [];
  constructor(readonly at: ReadClaims["at"]) {}
  add(path: Path, message: string): void {
    this.list.push(`${path.join(".")}, ${this.at(path)}: ${message}`);
  }
  /** The value, or undefined with its error noted. */
  try<T>(path: Path, make: () => T): T | undefined {
    try {
      return make();
    } catch (error) {
      if (!(error instanceof RangeError || error instanceof SyntaxError)) throw error;
      this.add(path, error.message);
      return undefined;
    }
  }
}

/** Parts that only some settings have. */
function misplaced(file: ClaimsFile, faults: Faults): void {
  const free = file.setting === "free";
  const only = free
    ? (["model", "values", "classical", "solution"] as const)
    : (["coordinates", "fields", "functions", "rules"] as const);
  for (const part of only) {
    if (file[part] === undefined) continue;
    faults.add(
      [part],
      `Cannot use it as the setting must have it: current setting is ${file.setting}`,
    );
  }
  if (!free && file.model === undefined) {
    faults.add(
      ["setting"],
      `Cannot use it as a model must be named: current setting is ${file.setting}`,
    );
  }
  if (file.solution && file.setting !== "static") {
    faults.add(
      ["solution"],
      `Cannot use it as the setting must be static: current setting is ${file.setting}`,
    );
  }
}

/**
 * The audits that a claims file asks for.
 *
 * @param read A file that was read.
 * @returns The derivation of the model's equations, if it has a model, and the claims.
 * @throws {ClaimsError} with every text that is no expression and every name that means nothing.
 */
export function claimsAudits({ file, at }: ReadClaims): Audit[] {
  const faults = new Faults(at);
  misplaced(file, faults);
  const convention = faults.try(["convention"], () => conventionOf(file.convention ?? "house"));
  if (!convention || faults.list.length > 0) throw new ClaimsError(faults.list);
  const where: Path = file.solution ? ["solution"] : file.model === undefined ? [] : ["model"];
  const ground = faults.try(where, () => groundOf(file, convention));
  if (!ground) throw new ClaimsError(faults.list);
  const audit = claimsAudit(file, ground, convention, faults);
  if (faults.list.length > 0) throw new ClaimsError(faults.list);
  if (!ground.action) return [audit];
  const derive = file.setting === "static" ? staticAudit : lightConeAudit;
  return [derive(ground.action), audit];
}

function claimsAudit(
  file: ClaimsFile,
  ground: Ground,
  convention: Convention,
  faults: Faults,
): Audit {
  const { constants = [], define = {}, quantities = {}, rules = {}, ranges = {} } = file;
  const { jets } = ground;
  const taken = new Set([...ground.own, ...Object.keys(ground.bindings), "pi", "d"]);
  const fresh = (name: string, path: Path) => {
    faults.try(path, () => written(name)); // a word that expressions cannot hold
    if (taken.has(name)) faults.add(path, `Cannot declare the name ${name} as it must be new`);
    taken.add(name);
  };
  constants.forEach((name, i) => fresh(name, ["constants", i]));
  const variables = new Set([...ground.own, ...constants]);
  const open = new Set(["pi", ...variables, ...Object.keys(ground.bindings)]);
  const known = { names: open, variables };
  let bindings: Record<string, Expr> = inConvention(
    ground.bindings,
    ground.quantities,
    conventionOf("house"),
    convention,
  );
  /** Reads a text whose names are in order. */
  const text = (path: Path, value: string | number, with_: Bindings): Expr | undefined => {
    const found = faultsOf(String(value), known);
    for (const message of found) faults.add(path, message);
    return found.length > 0 ? undefined : faults.try(path, () => jets.read(String(value), with_));
  };
  for (const [name, value] of Object.entries(define)) {
    fresh(name, ["define", name]);
    const e = text(["define", name], value, bindings);
    open.add(name);
    if (e) bindings = { ...bindings, [name]: e };
  }
  for (const name of Object.keys(quantities)) {
    if (constants.includes(name) || Object.hasOwn(define, name)) continue;
    faults.add(
      ["quantities", name],
      `Cannot use the name ${name} as it must be a constant or defined`,
    );
  }
  for (const name of Object.keys(ranges)) {
    const [low, high] = ranges[name]!;
    if (!(low < high)) {
      faults.add(
        ["ranges", name],
        `Cannot use the range as it must rise: current value is ${low}, ${high}`,
      );
    }
    if (!variables.has(name) && name !== "kappa") {
      faults.add(
        ["ranges", name],
        `Cannot use the name ${name} as it must be drawn by the witness`,
      );
    }
  }
  const shell: Rule[] = Object.entries(rules).flatMap(([name, value]) => {
    const left = text(["rules", name], name, {});
    const by = text(["rules", name], value, bindings);
    if (left && left.kind !== "sym") {
      faults.add(
        ["rules", name],
        "Cannot use the rule as its left side must be a name or the derivative of a field",
      );
    }
    return left?.kind === "sym" && by ? [{ name: left.name, by }] : [];
  });
  const all = { ...ground.quantities, ...quantities };
  const restated: Record<string, Bindings> = {}, claims: Claim[] = [];
  const ids = new Set<string>();
  file.claims.forEach((claim, i) => {
    const path = ["claims", i];
    if (ids.has(claim.id)) {
      faults.add([...path, "id"], `Cannot use the id ${claim.id} as it must be new`);
    }
    ids.add(claim.id);
    const other = claim.convention ?? convention.name;
    const to = faults.try([...path, "convention"], () => conventionOf(other));
    if (to && to !== convention) restated[to.name] ??= inConvention(bindings, all, convention, to);
    const with_ = to && to !== convention ? restated[to.name]! : bindings;
    for (const side of ["left", "right"] as const) text([...path, side], claim[side], with_);
    claims.push({
      id: claim.id,
      statement: claim.statement,
      left: String(claim.left),
      right: String(claim.right),
      source: claim.source ?? "",
      onShell: claim.on_shell ?? false,
      upToFactor: claim.up_to_factor ?? false,
      ...(to && to !== convention ? { convention: to.name } : {}),
    });
  });
  return {
    name: "claims",
    title: file.title,
    context: {
      jets,
      bindings,
      restated,
      rules: [...ground.rules, ...shell],
      ranges: { ...ground.ranges, ...ranges },
    },
    claims: [...solves(file), ...claims],
  };
}

/** A solution solves the equations: claimed without being asked. */
function solves(file: ClaimsFile): Claim[] {
  if (!file.solution) return [];
  return [["E_rho", "(1)"], ["E_phi", "(2)"], ["E_ell", "(C)"]].map(([name, number]) => ({
    id: `solution-${name}`,
    statement: `the solution solves equation ${number}`,
    left: name!,
    right: "0",
    source: "the file",
  }));
}
