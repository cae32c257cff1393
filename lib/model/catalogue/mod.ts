/**
 * The catalogue of models.
 *
 * @module
 */
import type { DilatonName } from "../input.ts";
import type { Model } from "../model.ts";
import { bpp, cghs, rst, solvable } from "./linear_dilaton.ts";
import { swave } from "./spherical.ts";

/** Models by name. */
export const CATALOGUE: Readonly<Record<DilatonName, Model>> = { cghs, rst, bpp, solvable, swave };
