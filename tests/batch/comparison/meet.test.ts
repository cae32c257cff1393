import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { meet } from "../../../lib/batch/comparison/meet.ts";

async function* rows(cases: readonly string[]) {
  for (const name of cases) yield { case: name };
}

describe("Rows of two tables", () => {
  it("meet once each whatever their order, and those alone come last in the order of their table", async () => {
    const cases = fc.uniqueArray(fc.constantFrom(..."abcdefgh"));
    await fc.assert(
      fc.asyncProperty(cases, cases, async (a, b) => {
        const met = await Array.fromAsync(meet(rows(a), rows(b)));
        const pairs = met.filter((m) => m.a && m.b);
        expect(pairs.every((m) => m.a!.case === m.b!.case)).toBe(true);
        expect(pairs.map((m) => m.a!.case).sort()).toEqual(a.filter((n) => b.includes(n)).sort());
        const rest = met.slice(pairs.length).map((m) => [m.a?.case, m.b?.case]);
        expect(rest).toEqual([
          ...a.filter((n) => !b.includes(n)).map((n) => [n, undefined]),
          ...b.filter((n) => !a.includes(n)).map((n) => [undefined, n]),
        ]);
      }),
    );
  });

  it("are read in step, so that tables in the same order are never held", async () => {
    let read = 0;
    async function* counted() {
      for (let i = 0; i < 100; i++) {
        read++;
        yield { case: String(i) };
      }
    }
    let met = 0;
    for await (const _ of meet(counted(), counted())) {
      met++;
      expect(read).toBe(2 * met);
    }
  });

  it("are let go on the way if nobody wants more", async () => {
    const ended: string[] = [];
    async function* open(name: string) {
      try {
        for (let i = 0; i < 9; i++) yield { case: String(i) };
      } finally {
        ended.push(name);
      }
    }
    for await (const _ of meet(open("a"), open("b"))) break;
    expect(ended).toEqual(["a", "b"]);
  });
});
