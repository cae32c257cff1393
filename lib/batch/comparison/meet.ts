/**
 * Rows of two tables that meet by their case while both are read once, in step.
 *
 * @module
 */

/** A row that has a case. */
export interface Named {
  /** Case. */
  readonly case: string;
}

/** Two rows of one case, or one whose case the other table does not have. */
export interface Met<T> {
  /** Row of the first table. */
  readonly a?: T;
  /** Row of the second table. */
  readonly b?: T;
}

/**
 * Pairs the rows of two tables. Only rows that have not met yet are held, so that tables in the same order
 * take no memory.
 *
 * @param a Rows of the first table; cases are unique.
 * @param b Rows of the second table.
 * @returns Pairs in the order in which they meet, then the rows of the first alone, then of the second.
 */
export async function* meet<T extends Named>(
  a: AsyncIterable<T>,
  b: AsyncIterable<T>,
): AsyncGenerator<Met<T>> {
  const sides = [a, b].map((rows) => ({
    rows: rows[Symbol.asyncIterator](),
    waiting: new Map<string, T>(),
    ended: false,
  }));
  try {
    while (sides.some(({ ended }) => !ended)) {
      for (const [i, side] of sides.entries()) {
        if (side.ended) continue;
        const next = await side.rows.next(), other = sides[1 - i].waiting;
        if (next.done) {
          side.ended = true;
          continue;
        }
        const row = next.value, partner = other.get(row.case);
        if (partner === undefined) side.waiting.set(row.case, row);
        else {
          other.delete(row.case);
          yield i === 0 ? { a: row, b: partner } : { a: partner, b: row };
        }
      }
    }
    for (const row of sides[0].waiting.values()) yield { a: row };
    for (const row of sides[1].waiting.values()) yield { b: row };
  } finally {
    for (const { rows } of sides) await rows.return?.();
  }
}
