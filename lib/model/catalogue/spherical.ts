/**
 * Spherically reduced Einstein gravity, G = 1.
 *
 * @module
 */
import type { Model } from "../model.ts";

/** Four dimensions; the dilaton is the areal radius and the matter is the s-wave (Polyakov) approximation. */
export const swave: Model = {
  name: "swave",
  family: "spherical",
  classical: { H: "pi*phi^2/2", K: "pi", V: "pi" },
  counterterm: { H: "0", K: "0" },
  parameters: [],
  source: "reduction of the Einstein-Hilbert action, e.g. hep-th/0512167",
};
