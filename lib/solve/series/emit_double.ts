/**
 * Turns a series program into double-precision code. The recurrences are the textbook ones of Taylor
 * integration (A. Jorba, M. Zou, Exp. Math. 14 (2005) 99, Proposition 2.1), written for coefficients
 * scaled by powers of a step unit H so that none over- or underflows.
 *
 * Every sum runs in a fixed order and only exp, expm1, log, log1p and sqrt of Math are used, so the same
 * engine gives the same bits everywhere.
 *
 * @module
 */
import type { Operation, Program } from "../../expr/program.ts";
import { expansionRoots, isLinear, needed, rowsOf } from "./schedule.ts";

/** Fills the coefficient table `C` (rows of length `stride`) with orders 0..N at the point (x, t). */
export type ExpandDouble = (
  x: Float64Array,
  t: number,
  P: Float64Array,
  H: number,
  N: number,
  C: Float64Array,
) => void;

/** Evaluates outputs at the point (x, t) into `out`. */
export type EvaluateDouble = (
  x: Float64Array,
  t: number,
  P: Float64Array,
  out: Float64Array,
) => void;

function scalar(o: Operation, v: (i: number) => string, parameters: readonly string[]): string {
  switch (o.op) {
    case "constant":
      return `(${o.p}/${o.q})`;
    case "parameter":
      return `P[${parameters.indexOf(o.name)}]`;
    case "unknown":
      return `x[${o.index}]`;
    case "independent":
      return "t";
    case "add":
      return `${v(o.a)}+${v(o.b)}`;
    case "sub":
      return `${v(o.a)}-${v(o.b)}`;
    case "mul":
      return `${v(o.a)}*${v(o.b)}`;
    case "div":
      return `${v(o.a)}/${v(o.b)}`;
    case "neg":
      return `-${v(o.a)}`;
    case "sqr":
      return `${v(o.a)}*${v(o.a)}`;
    case "sqrt1pm1":
      return `${v(o.a)}/(1+Math.sqrt(1+${v(o.a)}))`;
    case "power":
      return `Math.exp(${o.p}/${o.q}*Math.log(${v(o.a)}))`;
    default:
      return `Math.${o.op}(${v(o.a)})`;
  }
}

/** Code of the coefficient of order k >= 1 of one operation, left in `z`. */
function recurrence(
  program: Program,
  i: number,
  row: (i: number) => number,
  s: (i: number) => string,
): string {
  const o = program.operations[i]!, W = "W";
  const at = (j: number, k: string) => `C[${row(j)}*${W}+${k}]`;
  const V = (j: number) => program.varies[j]!;
  const sum = (a: number, b: number, from: string, to: string) =>
    `{let y=${row(a)}*W+(${from}),w=${row(b)}*W+k-(${from});const e=${
      row(a)
    }*W+(${to});for(;y<=e;)z+=C[y++]*C[w--];}`;
  const jsum = (a: number, b: number, from: string, to: string) =>
    `for(let j=${from};j<=${to};j++)z+=j*${at(a, "j")}*${at(b, "k-j")};`;
  switch (o.op) {
    case "independent":
      return `z=k===1?H:0;`;
    case "add":
    case "sub": {
      const sign = o.op === "add" ? "+" : "-";
      if (!V(o.b)) return `z=${at(o.a, "k")};`;
      if (!V(o.a)) return `z=${sign === "-" ? "-" : ""}${at(o.b, "k")};`;
      return `z=${at(o.a, "k")}${sign}${at(o.b, "k")};`;
    }
    case "neg":
      return `z=-${at(o.a, "k")};`;
    case "mul":
      if (!V(o.a)) return `z=${s(o.a)}*${at(o.b, "k")};`;
      if (!V(o.b)) return `z=${s(o.b)}*${at(o.a, "k")};`;
      return `z=0;${sum(o.a, o.b, "0", "k")}`;
    case "sqr":
      return `z=0;{const h=(k-1)>>1;${sum(o.a, o.a, "0", "h")}}z*=2;if(!(k&1)){const m=${
        at(o.a, "(k>>1)")
      };z+=m*m;}`;
    case "div":
      if (!V(o.b)) return `z=${at(o.a, "k")}/${s(o.b)};`;
      return `z=0;${sum(o.b, i, "1", "k")}z=(${V(o.a) ? at(o.a, "k") : "0"}-z)/${at(o.b, "0")};`;
    case "exp":
      if (isLinear(program, o.a)) return `z=${at(i, "k-1")}*${at(o.a, "1")}/k;`;
      return `z=0;${jsum(o.a, i, "1", "k")}z/=k;`;
    case "expm1":
      return `z=0;${jsum(o.a, i, "1", "k-1")}z=(z+k*${at(o.a, "k")}*Math.exp(${s(o.a)}))/k;`;
    case "log":
      return `z=0;${jsum(i, o.a, "1", "k-1")}z=(${at(o.a, "k")}-z/k)/${at(o.a, "0")};`;
    case "log1p":
      return `z=0;${jsum(i, o.a, "1", "k-1")}z=(${at(o.a, "k")}-z/k)/(1+${at(o.a, "0")});`;
    case "sqrt":
    case "sqrt1pm1": {
      const lead = o.op === "sqrt" ? at(i, "0") : `(1+${at(i, "0")})`;
      return `z=0;{const h=(k-1)>>1;${sum(i, i, "1", "h")}}z*=2;if(!(k&1)){const m=${
        at(i, "(k>>1)")
      };z+=m*m;}` +
        `z=(${at(o.a, "k")}-z)/(2*${lead});`;
    }
    case "power":
      return `z=0;for(let j=1;j<=k;j++)z+=(${o.p}/${o.q}*j-(k-j))*${at(o.a, "j")}*${
        at(i, "k-j")
      };z/=k*${at(o.a, "0")};`;
    default:
      throw new Error(`Cannot emit a recurrence as ${o.op} does not vary`);
  }
}

/** Compiles the expansion of derivatives, followed series and `extra` operations; `rows` tells their place. */
export function emitExpandDouble(program: Program, stride: number, extra: readonly number[] = []): {
  readonly expand: ExpandDouble;
  readonly rows: ReadonlyMap<number, number>;
  readonly rowCount: number;
} {
  const list = needed(program, [...expansionRoots(program), ...extra]),
    rows = rowsOf(program, list);
  const row = (i: number) => rows.get(i)!;
  const s = (i: number) => `s${i}`;
  const lines = [`const W=${stride};let z=0;`];
  for (const i of list) {
    lines.push(`const s${i}=${scalar(program.operations[i]!, s, program.parameters)};`);
    if (rows.has(i)) lines.push(`C[${row(i) * stride}]=s${i};`);
  }
  lines.push("for(let k=1;k<=N;k++){");
  program.derivatives.forEach((d, i) => {
    const source = program.varies[d] ? `C[${row(d)}*W+k-1]` : `(k===1?s${d}:0)`;
    lines.push(`C[${i}*W+k]=H*${source}/k;`);
  });
  for (const i of list) {
    if (!rows.has(i) || program.operations[i]!.op === "unknown") continue;
    lines.push(recurrence(program, i, row, s), `C[${row(i)}*W+k]=z;`);
  }
  lines.push("}");
  const expand = new Function("x", "t", "P", "H", "N", "C", lines.join("\n")) as ExpandDouble;
  return { expand, rows, rowCount: Math.max(-1, ...rows.values()) + 1 };
}

/** Compiles the evaluation of the named outputs, in the order of their keys. */
export function emitEvaluateDouble(program: Program): EvaluateDouble {
  const roots = Object.values(program.outputs), s = (i: number) => `s${i}`;
  const lines = needed(program, roots).map((i) =>
    `const s${i}=${scalar(program.operations[i]!, s, program.parameters)};`
  );
  roots.forEach((r, i) => lines.push(`out[${i}]=s${r};`));
  return new Function("x", "t", "P", "out", lines.join("\n")) as EvaluateDouble;
}
