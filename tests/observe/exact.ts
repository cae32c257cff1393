/**
 * Exact differences of doubles from many-digit references.
 *
 * @module
 */
import { type BigNumber, bignumber } from "mathjs";

/** The double x as a decimal number, exactly (mathjs would read its shortest decimal text). */
export function exactly(x: number): BigNumber {
  if (!Number.isFinite(x)) return bignumber(x);
  let k = 0, n = x;
  while (!Number.isInteger(n)) {
    n *= 2;
    k++;
  }
  return bignumber(BigInt(n).toString()).div(bignumber(2).pow(k)) as BigNumber;
}

/** |x - reference|, as a double. */
export function distance(x: number, reference: BigNumber): number {
  return exactly(x).sub(reference).abs().toNumber();
}

/** Collects bounds and true errors by column. */
export class Tally {
  readonly violations: string[] = [];
  readonly #ratios = new Map<string, number[]>();

  /** Compares one number with its reference. */
  add(
    where: string,
    column: string,
    value: number,
    bound: number | undefined,
    reference: BigNumber,
  ): void {
    if (!Number.isFinite(value)) {
      if (reference.toNumber() !== value) {
        this.violations.push(`${where} ${column}: ${value} for ${reference}`);
      }
      return;
    }
    const error = distance(value, reference);
    if (!(error <= bound!)) {
      this.violations.push(`${where} ${column}: ${value}, bound ${bound}, error ${error}`);
    }
    const floor = Math.max(error, Math.abs(value) * 2 ** -52, 5e-324); // one unit in the last place
    const list = this.#ratios.get(column) ?? [];
    this.#ratios.set(column, [...list, bound! / floor]);
  }

  /** Median of bound over error of each column. */
  medians(): Record<string, number> {
    return Object.fromEntries(
      [...this.#ratios].map((
        [name, list],
      ) => [name, [...list].sort((a, b) => a - b)[list.length >> 1]!]),
    );
  }
}
