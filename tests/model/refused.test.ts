import { afterEach, describe, expect, it } from "vitest";
import { CATALOGUE } from "../../lib/model/catalogue/mod.ts";
import { compileModel } from "../../lib/model/compile.ts";
import type { Model } from "../../lib/model/model.ts";

// The catalogue as it stands while one entry is replaced by a faulty one.
const entries = CATALOGUE as Record<string, Model>, { cghs, rst, swave } = CATALOGUE;
afterEach(() => void Object.assign(entries, { cghs, rst, swave }));

const compiled = (model: Model) => {
  entries[model.name] = model;
  return compileModel(model.name);
};

describe("A model is refused", () => {
  it("if a classical part is not that of its family", async () => {
    const K = "4.0000001*exp(-2*phi)";
    await expect(compiled({ ...cghs, classical: { ...cghs.classical, K } })).rejects.toThrow(
      `Cannot compile model cghs as its classical K must be that of the linear-dilaton family: current value is ${K}`,
    );
    await expect(compiled({ ...swave, classical: { ...swave.classical, V: "pi*phi" } })).rejects
      .toThrow(
        "Cannot compile model swave as its classical V must be that of the spherical family: current value is pi*phi",
      );
    await expect(compiled({ ...cghs, family: "spherical" })).rejects.toThrow(
      "classical H must be that of the spherical family",
    );
  });

  it("if the slope of a counterterm depends on the dilaton", async () => {
    await expect(compiled({ ...rst, counterterm: { H: "phi^2", K: "0" } })).rejects.toThrow(
      "Cannot compile model rst as the counterterm slope h must not depend on phi",
    );
    await expect(compiled({ ...rst, counterterm: { H: "0", K: "phi" } })).rejects.toThrow(
      "Cannot compile model rst as the counterterm slope k must not depend on phi",
    );
  });

  it("but not for another way of writing the same functions", async () => {
    const classical = { ...cghs.classical, V: "(2*lambda*exp(-phi))^2", H: "1/exp(phi)^2" };
    expect((await compiled({ ...cghs, classical })).solvable).toBe(false);
  });
});
