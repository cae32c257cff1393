import { describe, expect, it } from "vitest";
import { coreIdentity } from "../../lib/batch/core.ts";
import { canonicalJson, stamper, stampInputs } from "../../lib/batch/stamp.ts";
import type { RowInput } from "../../lib/model/input.ts";

const input: RowInput = {
  model: "rst",
  state: "thermal",
  kappa: 2.5,
  lambda: 1,
  mass: 1e21,
  bathRatioMinusOne: -1e-12,
  tolerance: 1e-10,
};
const context = {
  expressions: { K: "4*exp(-2*phi)", H: "exp(-2*phi)" },
  settings: { steps: 6000, far: { b: 2, a: 1 } },
  core: "00ff",
  pins: { nerdamer: "1.1.13", mathjs: "15.2.0" },
  runtime: { v8: "15.0", deno: "2.9.6" },
};

describe("A stamp", () => {
  it("is the SHA-256 of canonical JSON (worked by hand after RFC 8785; digest by GNU coreutils sha256sum)", async () => {
    const json =
      '{"core":"00ff","expressions":{"H":"exp(-2*phi)","K":"4*exp(-2*phi)"},"inputs":{"bath_ratio_minus_one":-1e-12,"kappa":2.5,"lambda":1,"mass":1e+21,"model":"rst","state":"thermal","tolerance":1e-10},"pins":{"mathjs":"15.2.0","nerdamer":"1.1.13"},"runtime":{"deno":"2.9.6","v8":"15.0"},"settings":{"far":{"a":1,"b":2},"steps":6000}}';
    expect(canonicalJson({ ...context, inputs: stampInputs(input) })).toBe(json);
    expect(stamper(context)(input)).toBe(
      "49baa257dd8c08ee1ef16598b66c085d7bd60738ed3db9443116d5e14b539ea1",
    );
    const web = await crypto.subtle.digest("SHA-256", new TextEncoder().encode(json));
    expect([...new Uint8Array(web)].map((b) => b.toString(16).padStart(2, "0")).join("")).toBe(
      "49baa257dd8c08ee1ef16598b66c085d7bd60738ed3db9443116d5e14b539ea1",
    );
  });

  it("changes with every input and setting, and with nothing else", () => {
    const stamp = stamper(context)(input);
    expect(stamper(structuredClone(context))({ ...input })).toBe(stamp);
    for (
      const change of [{ mass: 1e21 + 2e5 }, { kappa: 2.5000000000000004 }, { tolerance: 1e-9 }, {
        lambda: 2,
      }]
    ) {
      expect(stamper(context)({ ...input, ...change })).not.toBe(stamp);
    }
    for (
      const change of [{ core: "00fe" }, { settings: {} }, { pins: {} }, { runtime: {} }, {
        expressions: {},
      }]
    ) {
      expect(stamper({ ...context, ...change })(input)).not.toBe(stamp);
    }
  });
});

describe("The inputs of a stamp", () => {
  it("are all fields of a row: whoever adds one to the type must add it here, and then to the stamp", () => {
    const full: Required<RowInput> = {
      model: "rst",
      state: "thermal",
      kappa: 1,
      lambda: 2,
      mass: 3,
      massAboveCritical: 4,
      horizonDilaton: 5,
      bathRatioMinusOne: 6,
      a: 7,
      wallRadius: 8,
      realScalars: 9,
      diracSpinors: 10,
      vectors: 11,
      beta: 12,
      tolerance: 13,
    };
    const stamp = stamper(context)(full);
    for (const name of Object.keys(full) as (keyof RowInput)[]) {
      const other = { ...full, [name]: typeof full[name] === "number" ? 0.5 : "swave" };
      expect(stamper(context)(other as RowInput), name).not.toBe(stamp);
    }
  });
});

describe("The numeric core", () => {
  it("holds the files of the row solver and the packages they import, not the catalogue, figures or tests", async () => {
    const { core, pins, runtime } = await coreIdentity();
    expect(core).toMatch(/^[0-9a-f]{64}$/);
    expect(Object.keys(pins).sort()).toEqual(["mathjs", "nerdamer"]);
    expect(runtime["deno"]).toBe(Deno.version.deno);
    const text = Deno.readTextFileSync("lib/batch/core.ts");
    expect(text).toContain("catalogue");
  });
});
