import * as z from "zod";
import { arrangement } from "./arrangement";
import { arrangementFaults } from "./arrangement-fits";
import {
  angleDeg,
  identifier,
  lengthM,
  name,
  percent,
  planPoint,
  point,
  shieldingFactor,
  signedCurrentA,
  toleranceM,
} from "./quantities";
import { supply } from "./supply";

/** A centre line, metres; at least two points. */
export const path = z
  .array(point)
  .min(2, "a path has at least two points")
  .max(20_000, "a path has at most 20 000 points");

export const route = z.strictObject({ id: identifier, name, path });

export const currentBasis = z.enum(["measured", "load-list", "rating-plate", "breaker", "assumed"]);

/** Default tolerance of a current by where its figure comes from, percent; a breaker's rating is an upper bound. */
export const CURRENT_TOLERANCE_PERCENT: Record<CurrentBasis, number> = {
  measured: 3,
  "load-list": 10,
  "rating-plate": 10,
  breaker: 0,
  assumed: 30,
};

const placeInRoute = z.strictObject({ id: identifier, placeM: planPoint.default([0, 0]) });

/**
 * A circuit: centre line (own `path`, or a place in a `route`; `path: null` while not traced), arrangement and supply
 * (`null` while not known). `null` in source, tolerances and stray bound means "by rule", see `resolveDefaults`.
 */
export const circuit = z
  .strictObject({
    id: identifier,
    name,
    source: identifier.nullable().default(null),
    path: path.nullable().optional(),
    route: placeInRoute.nullable().optional(),
    arrangement,
    conductorRadiusM: lengthM,
    supply: supply.nullable(),
    currentBasis: currentBasis.default("load-list"),
    loadGroup: identifier.nullable().default(null),
    strayCurrentA: signedCurrentA.nullable().default(null),
    strayAngleDeg: angleDeg.default(0),
    strayToleranceA: signedCurrentA.nonnegative().nullable().default(null),
    shieldingFactor: shieldingFactor.default(1),
    currentTolerancePercent: percent.nullable().default(null),
    spacingTolerancePercent: percent.default(0),
    positionToleranceM: toleranceM.default(0),
  })
  .superRefine((value, context) => {
    const fault = (at: string, message: string) => context.addIssue({ code: "custom", path: [at], message });
    if (value.path === undefined && value.route === undefined) {
      fault("path", "give a path, a route, or null while the circuit is not traced");
    }
    if (value.path && value.route) fault("path", "a circuit has a path or a route, not both");
    for (const { path: at, message } of arrangementFaults(value)) {
      context.addIssue({ code: "custom", path: [...at], message });
    }
  })
  .transform((value) => ({ ...value, path: value.path ?? null, route: value.route ?? null }));

export type Route = z.output<typeof route>;
export type Circuit = z.output<typeof circuit>;
export type CircuitInput = z.input<typeof circuit>;
export type CurrentBasis = z.output<typeof currentBasis>;
