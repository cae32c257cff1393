import { describe, expect, it } from "vitest";
import { precise } from "../../lib/expr/precise.ts";
import { parse } from "../../lib/expr/parse.ts";
import { CATALOGUE } from "../../lib/model/catalogue/mod.ts";
import { compileModel, derivedFunctions } from "../../lib/model/compile.ts";
import { MODEL_NAMES } from "../../lib/model/input.ts";

const { evaluate } = await precise(60);

describe("The catalogue", () => {
  for (const name of Object.keys(CATALOGUE) as (keyof typeof CATALOGUE)[]) {
    it(`gives ${name} derivatives that agree with difference quotients of its expressions`, async () => {
      const f = await derivedFunctions(CATALOGUE[name]);
      const at = (e: keyof typeof f, phi: string) =>
        evaluate(f[e]!, { phi, kappa: "1.7", a: "0.3", pi: "3.25", lambda: "1" });
      for (
        const [derivative, of] of [["H_phi", "H"], ["K_phi", "K"], ["V_phi", "V"], [
          "H_phiphi",
          "H_phi",
        ]] as const
      ) {
        const quotient = at(of, "0.70000000000000000001").sub(at(of, "0.69999999999999999999")).div(
          "2e-20",
        );
        const error = quotient.sub(at(derivative, "0.7")).abs().toNumber();
        expect(error).toBeLessThan(1e-36); // h^2/6 f''' at h = 1e-20, 60 digits
      }
    });
  }

  it("knows the critical locus of each model: H_phi^2 = kappa K (published for RST: E = kappa/4)", async () => {
    const f = await derivedFunctions(CATALOGUE.rst);
    const phi = evaluate(parse("-log(kappa/4)/2"), { kappa: "3" });
    const determinant = evaluate(f["H_phi"]!, { phi, kappa: "3" }).pow(2).sub(
      evaluate(f["K"]!, { phi, kappa: "3" }).mul(3),
    );
    expect(determinant.abs().toNumber()).toBeLessThan(1e-55); // 60 digits
  });
});

describe("Compiling a model", () => {
  it("recognises the solvable family from its expressions alone", async () => {
    const solvable = await Promise.all(
      MODEL_NAMES.map(async (n) => (await compileModel(n)).solvable),
    );
    expect(Object.fromEntries(MODEL_NAMES.map((n, i) => [n, solvable[i]]))).toEqual({
      cghs: false,
      rst: true,
      bpp: true,
      solvable: true,
      swave: false,
      anomaly4d: false,
    });
  });

  it("leaves no trace of w in the programs of a solvable model", async () => {
    expect((await compileModel("rst")).programs["outer"]!.unknowns).toEqual(["F"]);
    expect((await compileModel("cghs")).programs["outer"]!.unknowns).toEqual(["F", "w", "v"]);
  });
});
