/**
 * Which operations of a program a task needs, and the row of the coefficient table each series has.
 *
 * @module
 */
import type { Operation, Program } from "../../expr/program.ts";

/** Operands of an operation. */
export function operands(o: Operation): readonly number[] {
  if ("b" in o) return [o.a, o.b];
  if ("a" in o) return [o.a];
  return [];
}

/** Operations that `roots` need, in order. */
export function needed(program: Program, roots: readonly number[]): readonly number[] {
  const used = new Set<number>(), stack = [...roots];
  while (stack.length) {
    const i = stack.pop()!;
    if (used.has(i)) continue;
    used.add(i);
    stack.push(...operands(program.operations[i]!));
  }
  return [...used].sort((x, y) => x - y);
}

/** Roots of one expansion: the derivatives and the series followed at every step. */
export function expansionRoots(program: Program): readonly number[] {
  const unknowns = program.operations.flatMap((o, i) => o.op === "unknown" ? [i] : []);
  return [...program.derivatives, ...Object.values(program.series), ...unknowns];
}

/** Row of every varying operation among `list`; rows of unknowns come first, in order. */
export function rowsOf(program: Program, list: readonly number[]): ReadonlyMap<number, number> {
  const rows = new Map<number, number>();
  let next = program.unknowns.length;
  for (const i of list) {
    const o = program.operations[i]!;
    if (o.op === "unknown") rows.set(i, o.index);
    else if (program.varies[i]) rows.set(i, next++);
  }
  return rows;
}

/** Whether operation `i` is linear in the independent variable alone (its series ends after one term). */
export function isLinear(program: Program, i: number): boolean {
  const o = program.operations[i]!;
  if (!program.varies[i] || o.op === "independent") return true;
  if (o.op === "neg") return isLinear(program, o.a);
  if (o.op === "add" || o.op === "sub") return isLinear(program, o.a) && isLinear(program, o.b);
  if (o.op === "mul") {
    const [x, y] = [o.a, o.b];
    return (!program.varies[x] && isLinear(program, y)) ||
      (!program.varies[y] && isLinear(program, x));
  }
  if (o.op === "div") return !program.varies[o.b] && isLinear(program, o.a);
  return false;
}
