import { afterAll, describe, expect, it } from "vitest";
import { actionOf, GENERIC } from "../../lib/audit/action.ts";
import { type Audit, runAudit } from "../../lib/audit/audit.ts";
import { judge } from "../../lib/audit/judge.ts";
import { lightConeAudit, staticAudit } from "../../lib/audit/ready/equations.ts";
import {
  killingAudit,
  killingModelAudit,
  liouvilleAudit,
  reductionAudit,
} from "../../lib/audit/ready/geometry.ts";
import {
  anomalyAudit,
  boulwareAudit,
  horizonAudit,
  schwarzschildAudit,
  staticTensorAudit,
} from "../../lib/audit/ready/polyakov.ts";
import { closedFormAudit, jtBathAudit } from "../../lib/audit/ready/solutions.ts";
import { solverAudits } from "../../lib/audit/ready/solver.ts";
import { closeAlgebra } from "../../lib/expr/proposer.ts";

afterAll(closeAlgebra);

const MODELS = ["cghs", "rst", "bpp", "solvable", "swave", "jt"] as const;
const DERIVED: readonly (() => Audit)[] = [
  () => staticAudit(GENERIC),
  () => lightConeAudit(GENERIC),
  ...MODELS.map((name) => () => staticAudit(actionOf(name))),
  ...(["cghs", "swave"] as const).map((name) => () => lightConeAudit(actionOf(name))),
  anomalyAudit,
  staticTensorAudit,
  horizonAudit,
  boulwareAudit,
  schwarzschildAudit,
  killingAudit,
  ...["cghs", "swave", "jt"].map((name) => () => killingModelAudit(name)),
  liouvilleAudit,
  reductionAudit,
  closedFormAudit,
  jtBathAudit,
];

describe("Derivations from the action", () => {
  for (const make of DERIVED) {
    const audit = make();
    it(`prove every claim: ${audit.name}`, async () => {
      const steps = await runAudit(audit);
      expect(steps.length).toBeGreaterThan(0);
      for (const { claim, verdict } of steps) {
        expect(verdict.verdict, `${claim.id}: ${verdict.why}`).toBe("proved");
      }
    });
  }
});

describe("The forms that the solver integrates", () => {
  // The far forms of CGHS hold the square root of the constraint: there algebra may stay undecided and 20
  // points of 64 digits decide.
  for (const name of ["cghs", "rst", "bpp", "solvable"] as const) {
    for (const audit of solverAudits(name)) {
      it(`solve the static equations of their model's action: ${audit.name}`, async () => {
        for (const { claim, verdict } of await runAudit(audit)) {
          expect(["proved", "holds-numerically"], `${claim.id}: ${verdict.why}`).toContain(
            verdict.verdict,
          );
        }
      });
    }
  }
});

describe("A mutated claim is refuted:", () => {
  for (
    const audit of [
      staticAudit(actionOf("rst")),
      anomalyAudit(),
      closedFormAudit(),
      schwarzschildAudit(),
      jtBathAudit(),
    ]
  ) {
    const sides = (text: string) => [
      ...(/\bkappa\b/.test(text) ? [text.replace(/\bkappa\b/, "(kappa/2)")] : []),
      ...(text === "0" ? [] : [`2*(${text})`, `-(${text})`]),
    ];
    const mutants = audit.claims.flatMap((claim) => [
      ...(claim.right === "0" ? [] : sides(claim.right).map((right) => ({ ...claim, right }))),
      ...(claim.left.includes("kappa")
        ? [{ ...claim, left: claim.left.replace(/\bkappa\b/, "(kappa/2)") }]
        : []),
    ]).filter((claim) => !claim.upToFactor);
    it(`${audit.name}, ${mutants.length} mutants (a sign, a factor 2, kappa/2)`, async () => {
      expect(mutants.length).toBeGreaterThan(0);
      for (const claim of mutants) {
        const { verdict } = await judge(claim, audit.context);
        expect(verdict, `${claim.id}: ${claim.left} = ${claim.right}`).toBe("refuted");
      }
    });
  }
});
