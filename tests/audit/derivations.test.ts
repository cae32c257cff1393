import { afterAll, describe, expect, it } from "vitest";
import { runAudit } from "../../lib/audit/audit.ts";
import { AUDITED_MODELS, readyAudits } from "../../lib/audit/ready/mod.ts";
import { CATALOGUE } from "../../lib/model/catalogue/mod.ts";
import { formsOf } from "../../lib/audit/ready/forms.ts";
import { closeAlgebra } from "../../lib/expr/proposer.ts";

afterAll(closeAlgebra);

describe("Ready audits", () => {
  for (const { make } of readyAudits()) {
    const audit = make();
    it(`prove every claim: ${audit.name}`, async () => {
      const { steps, derivatives } = await runAudit(audit);
      expect(derivatives).toBeGreaterThanOrEqual(0);
      expect(steps.length).toBeGreaterThan(0);
      for (const { claim, verdict } of steps) {
        expect(verdict.verdict, `${claim.id}: ${verdict.why}`).toBe("proved");
      }
    });
  }

  it("have different names, and claims with different names within each", () => {
    const audits = readyAudits().map(({ make }) => make());
    expect(new Set(audits.map(({ name }) => name)).size).toBe(audits.length);
    for (const { claims } of audits) {
      expect(new Set(claims.map(({ id }) => id)).size).toBe(claims.length);
    }
  });

  it("cover every model, and every form that the solver integrates", () => {
    expect(AUDITED_MODELS).toEqual(expect.arrayContaining(Object.keys(CATALOGUE)));
    for (const name of Object.keys(CATALOGUE) as (keyof typeof CATALOGUE)[]) {
      const names = readyAudits(name).map(({ make }) => make().name);
      for (const { title } of formsOf(name)) expect(names).toContain(`solver ${name} ${title}`);
      for (const kind of ["static", "light-cone", "killing"]) {
        expect(names).toContain(`${kind} ${name}`);
      }
    }
  });
});
