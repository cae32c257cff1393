/**
 * Turns a series program into double-double recurrences (the same as in emit_double.ts). Coefficients
 * stand in three tables: leading part C, rest L, and Dekker's split head S of the leading part, so that
 * the inner loops need no splitting.
 *
 * @module
 */
import type { Program } from "../../expr/program.ts";
import { expansionRoots, isLinear, needed, rowsOf } from "./schedule.ts";

/** Fills orders 1..N of the tables; order 0, the scalars `sh`, `sl` (by operation) and the
 * exponentials `eh`, `el` of the arguments of expm1 are given. */
export type ExpandDoubleDouble = (
  sh: Float64Array,
  sl: Float64Array,
  H: number,
  N: number,
  C: Float64Array,
  L: Float64Array,
  S: Float64Array,
  eh: Float64Array,
  el: Float64Array,
) => void;

/** Small double-double toolkit of the generated code: results in zh, zl. */
const TOOLKIT = `
let zh=0,zl=0;
function norm(a,b){zh=a+b;zl=b-(zh-a);}
function perr(a,b,p){const s=134217729*a,t=134217729*b,ah=s-(s-a),bh=t-(t-b),al=a-ah,bl=b-bh;return((ah*bh-p)+ah*bl+al*bh)+al*bl;}
function add(ah,al,bh,bl){const s=ah+bh,z=s-ah,e=(ah-(s-z))+(bh-z),t=al+bl,y=t-al,f=(al-(t-y))+(bl-y);norm(s,e+t);norm(zh,zl+f);}
function mul(ah,al,bh,bl){const p=ah*bh;norm(p,perr(ah,bh,p)+(ah*bl+al*bh));}
function div(ah,al,bh,bl){const q=ah/bh,p=q*bh,r=((ah-p)-perr(q,bh,p))+(al-q*bl);norm(q,r/bh);}
`;

/** Sum of a_j b_{k-j} for j = from..to, left in (zh, zl). */
function convolution(ra: number, rb: number, from: string, to: string): string {
  return `{let h=0,l=0;for(let j=${from};j<=${to};j++){const y=${ra}*W+j,w=${rb}*W+k-j;` +
    `const a=C[y],ah=S[y],al=a-ah,b=C[w],bh=S[w],bl=b-bh;` +
    `const p=a*b,e=((ah*bh-p)+ah*bl+al*bh)+al*bl+(a*L[w]+L[y]*b);` +
    `const t=h+p,z=t-h;l+=((h-(t-z))+(p-z))+e;h=t;}norm(h,l);}`;
}

/** Sum of j a_j b_{k-j} for j = from..to, left in (zh, zl). */
function weighted(ra: number, rb: number, from: string, to: string): string {
  return `{let h=0,l=0;for(let j=${from};j<=${to};j++){const y=${ra}*W+j,w=${rb}*W+k-j;` +
    `const a0=C[y]*j,s=134217729*a0,ah=s-(s-a0),al=a0-ah,at=L[y]*j+((S[y]*j-a0)+(C[y]-S[y])*j);` +
    `const b=C[w],bh=S[w],bl=b-bh,p=a0*b,e=((ah*bh-p)+ah*bl+al*bh)+al*bl+(a0*L[w]+at*b);` +
    `const t=h+p,z=t-h;l+=((h-(t-z))+(p-z))+e;h=t;}norm(h,l);}`;
}

function recurrence(program: Program, i: number, row: (i: number) => number): string {
  const o = program.operations[i]!;
  const V = (j: number) => program.varies[j]!;
  const at = (j: number, k: string) => `C[${row(j)}*W+${k}],L[${row(j)}*W+${k}]`;
  const minus = (j: number, k: string) => `-C[${row(j)}*W+${k}],-L[${row(j)}*W+${k}]`;
  const s = (j: number) => `sh[${j}],sl[${j}]`;
  const square = (j: number, from: string) =>
    `{const m=(k-1)>>1;${convolution(row(j), row(j), from, "m")}}zh*=2;zl*=2;` +
    `if(!(k&1)){const h=zh,l=zl;mul(${at(j, "(k>>1)")},${at(j, "(k>>1)")});add(h,l,zh,zl);}`;
  switch (o.op) {
    case "independent":
      return "zh=k===1?H:0;zl=0;";
    case "neg":
      return `zh=-C[${row(o.a)}*W+k];zl=-L[${row(o.a)}*W+k];`;
    case "add":
      if (!V(o.b)) return `zh=C[${row(o.a)}*W+k];zl=L[${row(o.a)}*W+k];`;
      if (!V(o.a)) return `zh=C[${row(o.b)}*W+k];zl=L[${row(o.b)}*W+k];`;
      return `add(${at(o.a, "k")},${at(o.b, "k")});`;
    case "sub":
      if (!V(o.b)) return `zh=C[${row(o.a)}*W+k];zl=L[${row(o.a)}*W+k];`;
      if (!V(o.a)) return `zh=-C[${row(o.b)}*W+k];zl=-L[${row(o.b)}*W+k];`;
      return `add(${at(o.a, "k")},${minus(o.b, "k")});`;
    case "mul":
      if (!V(o.a)) return `mul(${s(o.a)},${at(o.b, "k")});`;
      if (!V(o.b)) return `mul(${s(o.b)},${at(o.a, "k")});`;
      return convolution(row(o.a), row(o.b), "0", "k");
    case "sqr":
      return square(o.a, "0");
    case "div":
      if (!V(o.b)) return `div(${at(o.a, "k")},${s(o.b)});`;
      return `${convolution(row(o.b), row(i), "1", "k")}` +
        (V(o.a) ? `add(${at(o.a, "k")},-zh,-zl);` : "zh=-zh;zl=-zl;") +
        `div(zh,zl,${at(o.b, "0")});`;
    case "exp":
      if (isLinear(program, o.a)) return `mul(${at(i, "(k-1)")},${at(o.a, "1")});div(zh,zl,k,0);`;
      return `${weighted(row(o.a), row(i), "1", "k")}div(zh,zl,k,0);`;
    case "expm1": // exp(a_0) comes with the scalars: 1 + expm1(a_0) loses it where it is small
      return `${weighted(row(o.a), row(i), "1", "k-1")}div(zh,zl,k,0);{const h=zh,l=zl;` +
        `mul(${at(o.a, "k")},eh[${i}],el[${i}]);add(h,l,zh,zl);}`;
    case "log":
    case "log1p":
      return `${weighted(row(i), row(o.a), "1", "k-1")}div(zh,zl,k,0);add(${
        at(o.a, "k")
      },-zh,-zl);` +
        (o.op === "log"
          ? `div(zh,zl,${at(o.a, "0")});`
          : `{const h=zh,l=zl;add(${at(o.a, "0")},1,0);div(h,l,zh,zl);}`);
    case "sqrt":
    case "sqrt1pm1":
      return `${square(i, "1")}add(${at(o.a, "k")},-zh,-zl);{const h=zh,l=zl;` +
        (o.op === "sqrt" ? `zh=C[${row(i)}*W];zl=L[${row(i)}*W];` : `add(${at(i, "0")},1,0);`) +
        `div(h,l,2*zh,2*zl);}`;
    case "power": // k a_0 p_k = (r + 1) sum j a_j p_{k-j} - k sum a_j p_{k-j}
      return `${weighted(row(o.a), row(i), "1", "k")}{const h=zh,l=zl;div(${
        Number(o.p) + Number(o.q)
      },0,${o.q},0);` +
        `mul(h,l,zh,zl);}div(zh,zl,k,0);{const h=zh,l=zl;${
          convolution(row(o.a), row(i), "1", "k")
        }` +
        `add(h,l,-zh,-zl);}div(zh,zl,${at(o.a, "0")});`;
    default:
      throw new Error(`Cannot emit a recurrence as ${o.op} does not vary`);
  }
}

/** Compiles the double-double expansion of the derivatives and the followed series. */
export function emitExpandDoubleDouble(program: Program, stride: number): {
  readonly expand: ExpandDoubleDouble;
  readonly rows: ReadonlyMap<number, number>;
  readonly list: readonly number[];
  readonly rowCount: number;
} {
  const list = needed(program, expansionRoots(program)), rows = rowsOf(program, list);
  const row = (i: number) => rows.get(i)!;
  const store = (r: number) =>
    `{const m=${r}*W+k;C[m]=zh;L[m]=zl;const s=134217729*zh;S[m]=s-(s-zh);}`;
  const lines = [`const W=${stride};`, "for(let k=1;k<=N;k++){"];
  program.derivatives.forEach((d, i) => {
    lines.push(
      program.varies[d]
        ? `div(C[${row(d)}*W+k-1]*H,L[${row(d)}*W+k-1]*H,k,0);`
        : `if(k===1){zh=sh[${d}]*H;zl=sl[${d}]*H;}else{zh=0;zl=0;}`,
      store(i),
    );
  });
  for (const i of list) {
    if (!rows.has(i) || program.operations[i]!.op === "unknown") continue;
    lines.push(recurrence(program, i, row), store(row(i)));
  }
  lines.push("}");
  const make = new Function(
    `${TOOLKIT}return function(sh,sl,H,N,C,L,S,eh,el){${lines.join("\n")}};`,
  ) as () => ExpandDoubleDouble;
  return { expand: make(), rows, list, rowCount: Math.max(-1, ...rows.values()) + 1 };
}
