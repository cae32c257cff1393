import { describe, expect, it } from "vitest";
import { boundedText } from "@backstamp/backstamp";

describe("boundedText", () => {
  it("writes two digits of the bound and the value down to them", () => {
    expect(boundedText({ value: 0.14415770, error: 3.14e-4 })).toBe("0.14416 ± 3.1e-4");
    expect(boundedText({ value: -1234.5678, error: 0.25 })).toBe("-1234.57 ± 0.25");
    expect(boundedText({ value: 2e-80, error: 1e-90 })).toBe("2.00000000000e-80 ± 1.0e-90");
  });

  it("writes no more digits than a double has", () => {
    expect(boundedText({ value: 0.1, error: 1e-18 })).toBe("0.1 ± 1.0e-18");
  });

  it("writes exact numbers whole, and infinities in words", () => {
    expect(boundedText({ value: 0.5, error: 0 })).toBe("0.5");
    expect(boundedText({ value: -Infinity })).toBe("diverges to -∞");
  });

  it("writes a zero that is not exact with its bound", () => {
    expect(boundedText({ value: 0, error: 5e-324 })).toBe("0 ± 4.9e-324");
  });
});
