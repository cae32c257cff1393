/**
 * Models with a linear-dilaton vacuum.
 *
 * @module
 */
import type { Model } from "../model.ts";

const classical = {
  H: "exp(-2*phi)",
  K: "4*exp(-2*phi)",
  V: "4*lambda^2*exp(-2*phi)",
} as const;

/** Callan, Giddings, Harvey & Strominger with the Polyakov term only. */
export const cghs: Model = {
  name: "cghs",
  family: "linear-dilaton",
  classical,
  counterterm: { H: "0", K: "0" },
  parameters: [],
  source: "Phys. Rev. D 45 (1992) R1005",
};

/** Russo, Susskind & Thorlacius: the solvable family at a = 1/2. */
export const rst: Model = {
  name: "rst",
  family: "linear-dilaton",
  classical,
  counterterm: { H: "-phi/2", K: "0" },
  parameters: [],
  source: "Phys. Rev. D 46 (1992) 3444",
};

/** Bose, Parker & Peleg: the solvable family at a = 0. */
export const bpp: Model = {
  name: "bpp",
  family: "linear-dilaton",
  classical,
  counterterm: { H: "-phi", K: "1" },
  parameters: [],
  source: "hep-th/9502098",
};

/** The exactly solvable family with parameter a. */
export const solvable: Model = {
  name: "solvable",
  family: "linear-dilaton",
  classical,
  counterterm: { H: "(a-1)*phi", K: "1-2*a" },
  parameters: ["a"],
  source: "hep-th/9512187; hep-th/9510109",
};
