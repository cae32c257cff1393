/**
 * Seeded random expressions of the classes that field equations are made of, for tests of the algebra.
 *
 * @module
 */
import { uniform } from "../../lib/expr/points.ts";

/** Classes of expressions. */
export const CLASSES = [
  "polynomial",
  "rational",
  "exponential",
  "exponential times rational",
  "square root",
  "logarithm",
  "mixed",
  "symbolic power",
] as const;

/** One random expression. */
export interface Sample {
  readonly kind: (typeof CLASSES)[number];
  readonly text: string;
  readonly names: readonly string[];
}

/** A seeded stream of expressions, one class after the other, in 2 to 5 names. */
export function expressions(seed: number): () => Sample {
  const draw = uniform(seed);
  const below = (n: number) => Math.floor(draw() * n);
  const pick = <T>(list: readonly T[]): T => list[below(list.length)]!;
  let turn = 0, names: string[] = [];

  const rational = () => pick([`${1 + below(7)}`, `${1 + below(7)}/${2 + below(6)}`]);
  const sign = () => pick(["+", "-"]);
  const power = (n: string) => pick([n, n, `${n}^2`, `${n}^3`]);
  const monomial = () => {
    const list = names.filter(() => draw() < 0.5);
    return [`(${rational()})`, ...(list.length ? list : [pick(names)]).map(power)].join("*");
  };
  const positive = () => [rational(), ...Array.from({ length: 1 + below(2) }, monomial)].join("+");
  const polynomial = (most = 3) => {
    let out = pick([monomial(), rational()]);
    for (let i = 1 + below(most); i > 0; i--) out += sign() + monomial();
    return out;
  };
  const linear = () => `(${pick(["", "-"])}${rational()})*${pick(names)}`;
  const quotient = () =>
    pick([
      () => `(${polynomial()})/(${positive()})`,
      () => `(${rational()}${sign()}1/(${positive()}))*(${polynomial(2)})`,
      () => `(${polynomial(2)})*(${positive()})^(-${1 + below(3)})`,
      () => `(${polynomial(1)})/(${pick(names)}${sign()}${pick(names)}^${2 + below(2)}/9)`,
    ])();
  const exponential = () =>
    pick([
      () => `exp(${linear()})*(${polynomial(2)})`,
      () => `(exp(${linear()})${sign()}${monomial()})^2`,
      () => `exp(${linear()}${sign()}${linear()})${sign()}(${polynomial(1)})*exp(${linear()})`,
      () => `(${rational()}+exp(${linear()}))^(-1)*(${polynomial(1)})`,
    ])();
  const root = () =>
    pick([
      () => `sqrt(${positive()})*(${polynomial(2)})`,
      () => `(${polynomial(1)})/sqrt(${positive()})`,
      () => `(${positive()})^(${pick(["-3/2", "3/2", "1/3", "-1/2"])})*(${polynomial(1)})`,
      () => `(${pick(names)}+sqrt(${pick(names)}+${rational()}))^${2 + below(2)}`,
      () => `exp(-sqrt(${positive()}))*${pick(names)}`,
    ])();
  const logarithm = () =>
    pick([
      () => `log(${positive()})*(${polynomial(2)})`,
      () => `log(${monomial()}/(${positive()}))${sign()}log(${pick(names)})`,
      () => `(log(${pick(names)})${sign()}${rational()})^2*(${polynomial(1)})`,
      () => `log((${rational()})*${power(pick(names))})*${monomial()}${sign()}${monomial()}`,
    ])();
  const symbolic = () => {
    const [a, b] = [pick(names), pick(names)];
    return pick([
      () => `${a}^(${rational()}*${b})*(${polynomial(1)})`,
      () => `(${positive()})^${b}*${a}^(-${b})`,
      () => `${a}^(${b}${sign()}${rational()})/${a}^${b}+${polynomial(1)}`,
    ])();
  };
  const make: Record<Sample["kind"], () => string> = {
    polynomial: () =>
      `(${polynomial()})*(${polynomial(2)})${sign()}(${polynomial(2)})^${2 + below(2)}`,
    rational: () => `${quotient()}${sign()}${quotient()}`,
    exponential,
    "exponential times rational": () => `(${exponential()})*(${quotient()})`,
    "square root": root,
    logarithm,
    mixed: () =>
      `(${pick([exponential, root, logarithm])()})${sign()}(${
        pick([root, logarithm, quotient])()
      })*${pick([rational, () => pick(names)])()}`,
    "symbolic power": symbolic,
  };
  return () => {
    const kind = CLASSES[turn++ % CLASSES.length]!;
    names = ["x", "y", "a", "b", "c"].slice(0, 2 + below(4));
    return { kind, text: make[kind](), names };
  };
}
