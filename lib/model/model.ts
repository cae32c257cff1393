/**
 * A model of the static framework: three functions of the dilaton in
 * S = (1/2 pi) Int sqrt(-g) [H R + K (grad phi)^2 + V] + S_Polyakov, each the sum of a classical part and
 * kappa times a one-loop counterterm. Data only.
 *
 * @module
 */
import type { DilatonName } from "./input.ts";

/** Asymptotic family: fixes the far-region form of the equations and the natural temperature. */
export type Family = "linear-dilaton" | "spherical";

/** A model as data; expression texts in the grammar of `parse`, with `phi` the dilaton. */
export interface Model {
  /** Name in tables. */
  readonly name: DilatonName;
  /** Asymptotic family. */
  readonly family: Family;
  /** Classical parts of H, K, V. */
  readonly classical: { readonly H: string; readonly K: string; readonly V: string };
  /** Coefficients of kappa in H and K. */
  readonly counterterm: { readonly H: string; readonly K: string };
  /** Names of the model's own parameters, besides kappa and the scale of its family. */
  readonly parameters: readonly string[];
  /** Where the action was published. */
  readonly source: string;
}
