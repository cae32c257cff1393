import { dirname, join, normalize } from "node:path";
import { describe, expect, it } from "vitest";

// Rooms of the library in the order in which data flows; audit stands beside solve and serves stress, show
// and cli.
const ORDER = ["expr", "model", "solve", "observe", "stress", "batch", "show", "publish", "cli"];

function files(folder: string): string[] {
  return [...Deno.readDirSync(folder)].flatMap(({ name, isDirectory }) =>
    isDirectory ? files(join(folder, name)) : name.endsWith(".ts") ? [join(folder, name)] : []
  ).sort();
}

interface Import {
  readonly from: string;
  readonly to: string;
  readonly typeOnly: boolean;
}

/** Imports of a module: static, re-exported, dynamic, and worker URLs. */
function importsOf(path: string): Import[] {
  const text = Deno.readTextFileSync(path).replace(/\/\*[\s\S]*?\*\//g, "").replace(
    /^\s*\/\/.*$/gm,
    "",
  );
  const statics = [
    ...text.matchAll(/(?:^|\n)\s*(import|export)\s+(type\s)?([^;"'`]*?from\s*)?["']([^"']+)["']/g),
  ]
    .map((m) => ({ to: m[4]!, typeOnly: m[2] !== undefined }));
  const others = [...text.matchAll(/(?:import\(|new URL\()\s*["']([^"']+)["']/g)].map((m) => ({
    to: m[1]!,
    typeOnly: false,
  }));
  return [...statics, ...others].map(({ to, typeOnly }) => ({
    from: path,
    to: to.startsWith(".") ? normalize(join(dirname(path), to)) : to,
    typeOnly,
  }));
}

const LIBRARY = files("lib"), ALL = LIBRARY.flatMap(importsOf);
const room = (path: string) => path.split("/").length > 2 ? path.split("/")[1]! : "";

/** What a module loads at run time, directly or not; a type-only import loads nothing. */
function reached(entry: string): Set<string> {
  const seen = new Set<string>(), stack = [entry];
  while (stack.length) {
    const path = stack.pop()!;
    if (seen.has(path)) continue;
    seen.add(path);
    for (const i of ALL) if (i.from === path && !i.typeOnly) stack.push(i.to);
  }
  return seen;
}

describe("Imports", () => {
  it("are found at all", () => {
    expect(ALL.length).toBeGreaterThan(200);
    expect(reached("lib/batch/worker.ts").has("lib/solve/engine.ts")).toBe(true);
  });

  it("never point to a later room of the library", () => {
    const backwards = ALL.filter(({ from, to }) => {
      if (!/^lib\/.*\.ts$/.test(to) || room(from) === "" || room(from) === room(to)) return false;
      if (room(from) === "audit") return !["expr", "model"].includes(room(to));
      if (room(to) === "audit") return !["stress", "show", "publish", "cli"].includes(room(from));
      return ORDER.indexOf(room(to)) > ORDER.indexOf(room(from)) || !ORDER.includes(room(to));
    });
    expect(backwards.map(({ from, to }) => `${from} -> ${to}`)).toEqual([]);
  });

  it("of nerdamer and of mathjs stand in one file each", () => {
    for (const name of ["nerdamer", "mathjs"]) {
      const at = new Set(
        ALL.filter(({ to }) => to === name || to.startsWith(`${name}/`)).map(({ from }) => from),
      );
      expect([...at], name).toHaveLength(1);
    }
  });

  it("of a worker reach neither packages nor algebra", () => {
    const packages = [...reached("lib/batch/worker.ts")].filter((path) => !path.startsWith("lib/"));
    expect(packages).toEqual([]);
  });

  it("of the integrator never reach the closed forms it is compared with", () => {
    const closed = [...reached("lib/observe/row.ts")].filter((path) =>
      path.includes("closed_form")
    );
    expect(closed).toEqual([]);
  });

  it("keep Deno's interface at the rim: none in expr's numerics, model, solve and observe", () => {
    const inner = LIBRARY.filter((path) => ["model", "solve", "observe"].includes(room(path)));
    expect(inner.filter((path) => /\bDeno\./.test(Deno.readTextFileSync(path)))).toEqual([]);
  });

  it("keep functions whose last bit varies out of the numerics", () => {
    const inner = LIBRARY.filter((path) => ["solve", "observe"].includes(room(path)));
    const code = (path: string) =>
      Deno.readTextFileSync(path).replace(/\/\*[\s\S]*?\*\//g, "").replace(/\/\/.*$/gm, "");
    const varying = /Math\.(pow|sinh|cosh|tanh|cbrt|hypot)\b|\*\*(?!\/)/;
    const constant = /\b2 \*\* -?\d+/g; // powers of two are exact wherever they are folded
    expect(inner.filter((path) => varying.test(code(path).replace(constant, "")))).toEqual([]);
  });
});
