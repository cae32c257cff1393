/**
 * Jets: fields of one or two coordinates and all their derivatives as independent names, total
 * derivatives and the Euler-Lagrange operator of any order. The derivative of field phi along sigma is
 * the name `d(phi, sigma)`, which is also how it is written in texts.
 *
 * @module
 */
import { derive } from "../expr/derive.ts";
import { normalForm } from "../expr/normal.ts";
import { parse } from "../expr/parse.ts";
import { mathjsDerivative } from "../expr/precise.ts";
import { print } from "../expr/print.ts";
import { add, type Expr, mul, names, neg, num, substitute, sym } from "../expr/tree.ts";
import { compare } from "../expr/verify.ts";
import type { Ranges } from "../expr/points.ts";

/** What the names of an audit are. */
export interface Setting {
  /** Coordinates, in the order in which mixed derivatives are written. */
  readonly coordinates: readonly string[];
  /** Fields, functions of all coordinates. */
  readonly fields: readonly string[];
  /** Unspecified functions of one field or coordinate: function name to argument name. */
  readonly functions?: Readonly<Record<string, string>>;
}

const JET = /^d\((\w+), (.*)\)$/;

/** The base name of a jet name and the names it is differentiated by. */
export function partsOf(name: string): { base: string; by: readonly string[] } {
  const m = JET.exec(name);
  return m ? { base: m[1]!, by: m[2]!.split(", ") } : { base: name, by: [] };
}

/** Calculus over one setting. Keeps every derivative it takes, for {@linkcode Jets.verify}. */
export class Jets {
  readonly setting: Setting;
  readonly #taken = new Map<string, { e: Expr; name: string; d: Expr }>();

  /** Calculus for the given coordinates, fields and functions. */
  constructor(setting: Setting) {
    this.setting = setting;
  }

  /** The name node of a derivative of a base name; mixed derivatives in one order. */
  jet(base: string, by: readonly string[]): Expr {
    const order = this.setting.coordinates;
    const sorted = [...by].sort((a, b) => order.indexOf(a) - order.indexOf(b));
    return sym(sorted.length ? `d(${base}, ${sorted.join(", ")})` : base);
  }

  /** Partial derivative with respect to one name, jets being independent. */
  partial(e: Expr, name: string): Expr {
    const d = derive(e, name);
    this.#taken.set(`${print(e)} | ${name}`, { e, name, d });
    return d;
  }

  /** Total derivative along a coordinate. */
  total(e: Expr, coordinate: string): Expr {
    const { fields, functions = {} } = this.setting;
    let out: Expr = num(0);
    for (const name of names(e)) {
      const { base, by } = partsOf(name);
      if (name === coordinate) out = add(out, this.partial(e, name));
      else if (fields.includes(base)) {
        out = add(out, mul(this.partial(e, name), this.jet(base, [...by, coordinate])));
      } else if (Object.hasOwn(functions, base)) {
        const argument = functions[base]!;
        const inner = fields.includes(argument)
          ? this.jet(argument, [coordinate])
          : num(argument === coordinate ? 1 : 0);
        const next = sym(`d(${[base, ...by, argument].join(", ")})`);
        out = add(out, mul(mul(this.partial(e, name), next), inner));
      }
    }
    return out;
  }

  /** Derivative by coordinates (total) or other names (partial, functions by the chain rule). */
  derivative(e: Expr, by: readonly string[]): Expr {
    return by.reduce((x, name) => {
      if (this.setting.coordinates.includes(name)) return this.total(x, name);
      let out = this.partial(x, name);
      for (const [f, argument] of Object.entries(this.setting.functions ?? {})) {
        if (argument !== name) continue;
        for (const n of names(x)) {
          const { base, by } = partsOf(n);
          if (base !== f) continue;
          const next = sym(`d(${[f, ...by, argument].join(", ")})`);
          out = add(out, mul(this.partial(x, n), next));
        }
      }
      return out;
    }, e);
  }

  /** Reads a text in which names of `bindings` stand for expressions and `d(...)` is a derivative. */
  read(text: string, bindings: Readonly<Record<string, Expr>> = {}): Expr {
    // a derivative stands under a name of its own until the end: what it holds is not looked up again
    const held: Record<string, Expr> = {};
    const settle = (e: Expr) => substitute(substitute(e, bindings), held);
    let count = 0;
    return settle(parse(text, (e, by) => {
      const name = `@${count++}`;
      held[name] = this.derivative(settle(e), by);
      return sym(name);
    }));
  }

  /** Euler-Lagrange expression of `lagrangian` for one field: sum of (-D)^I dL/dq_I. */
  euler(lagrangian: Expr, field: string, at: Readonly<Record<string, Expr>> = {}): Expr {
    let out: Expr = num(0);
    for (const name of new Set([...names(lagrangian), field])) {
      const { base, by } = partsOf(name);
      if (base !== field) continue;
      let term = this.at(this.derivative(lagrangian, [name]), at);
      for (const x of by) term = neg(this.total(term, x));
      out = add(out, term);
    }
    return normalForm(out, { positive: () => false });
  }

  /** Sets fields to expressions (their derivatives follow) and brings the result to normal form. */
  at(e: Expr, values: Readonly<Record<string, Expr>>): Expr {
    const table: Record<string, Expr> = {};
    for (const name of names(e)) {
      const { base, by } = partsOf(name);
      if (Object.hasOwn(values, base)) {
        table[name] = by.reduce((x, y) => this.total(x, y), values[base]!);
      }
    }
    return normalForm(substitute(e, table), { positive: () => false });
  }

  /**
   * Checks every derivative taken so far against mathjs's at random points.
   *
   * @returns How many were checked.
   * @throws {Error} if one differs.
   */
  async verify(ranges: Ranges = {}): Promise<number> {
    const all = [...this.#taken.values()];
    for (const { e, name, d } of all) {
      const w = await compare(await mathjsDerivative(e, name), d, { count: 2, ranges });
      if (w.outcome === "differ") {
        throw new Error(
          `Cannot trust the derivative of ${print(e).slice(0, 80)} by ${name} as two routes must ` +
            `agree: current values are ${w.left} and ${w.right}`,
        );
      }
    }
    this.#taken.clear();
    return all.length;
  }
}
