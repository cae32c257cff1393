import { afterAll, describe, expect, it } from "vitest";
import { equation } from "../../lib/audit/claim.ts";
import { judge, judgeEquation } from "../../lib/audit/judge.ts";
import { mutants } from "../../lib/audit/mutants.ts";
import { readyAudits } from "../../lib/audit/ready/mod.ts";
import { closeAlgebra } from "../../lib/expr/proposer.ts";
import { num, sub } from "../../lib/expr/tree.ts";

afterAll(closeAlgebra);

describe("A changed claim is refuted", () => {
  let refuted = 0, empty = 0;
  for (const { make } of readyAudits()) {
    const audit = make(), { context } = audit;
    it(`in every case: ${audit.name}`, async () => {
      for (const claim of audit.claims) {
        const before = equation(claim, context);
        for (const { claim: wrong, side, change } of mutants(claim)) {
          const after = equation(wrong, context);
          // a change that changes nothing (twice a term that vanishes) is no mutation
          const difference = { left: sub(after[side], before[side]), right: num(0) };
          const bare = { onShell: claim.onShell ?? false };
          const options = { repair: false, count: 3 };
          const nothing = await judgeEquation(difference, bare, context, options);
          if (nothing.verdict === "refuted") {
            const { verdict } = await judge(wrong, context, { repair: false });
            expect(verdict, `${claim.id}, ${change}: ${wrong.left} = ${wrong.right}`)
              .toBe("refuted");
            refuted++;
          } else empty++;
        }
      }
    });
  }
  it("and nearly all changes are changes", () => {
    console.log(`${refuted} mutants refuted, ${empty} changes changed nothing`);
    expect(refuted).toBeGreaterThan(1000);
    expect(empty).toBeLessThan(refuted / 10);
  });
});
