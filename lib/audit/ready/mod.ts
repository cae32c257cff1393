/**
 * The ready audits: what the program checks of its own equations and of the standard results around them.
 *
 * @module
 */
import { CATALOGUE } from "../../model/catalogue/mod.ts";
import { actionOf, GENERIC } from "../action.ts";
import {
  anomalyActionAudit,
  anomalyDeSitterAudit,
  anomalySchwarzschildAudit,
  contentAudit,
} from "./anomaly4d.ts";
import type { Audit } from "../audit.ts";
import { lightConeAudit, staticAudit } from "./equations.ts";
import { killingAudit, killingModelAudit, liouvilleAudit, reductionAudit } from "./geometry.ts";
import { minimalSphereAudit } from "./minimal_sphere.ts";
import {
  anomalyAudit,
  boulwareAudit,
  horizonAudit,
  schwarzschildAudit,
  staticTensorAudit,
} from "./polyakov.ts";
import { closedFormAudit, jtBathAudit } from "./solutions.ts";
import { solverAudits } from "./solver.ts";

/** An audit that can be had by name. */
export interface ReadyAudit {
  /** Models that it is about; empty if it holds for all. */
  readonly models: readonly string[];
  /** Makes it: derivation included. */
  readonly make: () => Audit;
}

/** Names of the models that have ready audits. */
export const AUDITED_MODELS: readonly string[] = [...Object.keys(CATALOGUE), "jt", "anomaly4d"];
/** Those with an action in two dimensions. */
export const TWO: readonly string[] = [...Object.keys(CATALOGUE), "jt"];

/** The conformal anomaly in four dimensions. */
const FOUR = "anomaly4d";
const FAMILY = ["rst", "bpp", "solvable"]; // members of the exactly solvable family

function ofModel(name: string): ReadyAudit[] {
  const solver = name in CATALOGUE ? solverAudits(name as keyof typeof CATALOGUE) : [];
  return [
    () => staticAudit(actionOf(name)),
    () => lightConeAudit(actionOf(name)),
    () => killingModelAudit(name),
    ...solver.map((audit) => () => audit),
  ].map((make) => ({ models: [name], make }));
}

/**
 * The ready audits, in the order of the ledger.
 *
 * @param model Only those that say something about this model. @default all
 */
export function readyAudits(model?: string): ReadyAudit[] {
  const about = (models: readonly string[], ...makes: (() => Audit)[]) =>
    makes.map((make) => ({ models, make }));
  const all: ReadyAudit[] = [
    ...about([], () => staticAudit(GENERIC), () => lightConeAudit(GENERIC)),
    ...about([], anomalyAudit, staticTensorAudit, horizonAudit, boulwareAudit, killingAudit),
    ...TWO.flatMap(ofModel),
    ...about(FAMILY, liouvilleAudit, closedFormAudit),
    ...about(["swave"], reductionAudit, schwarzschildAudit),
    ...about(["jt"], jtBathAudit),
    ...about([FOUR], anomalyActionAudit, anomalySchwarzschildAudit, anomalyDeSitterAudit),
    ...about([FOUR], contentAudit, minimalSphereAudit),
  ];
  return model === undefined
    ? all
    : all.filter(({ models }) => models.includes(model) || (models.length === 0 && model !== FOUR));
}
