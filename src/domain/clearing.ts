import * as z from "zod";
import { circuit, route } from "./plan-document/circuit";
import { identifier, point } from "./plan-document/quantities";
import type { PlanDocument } from "./plan-document/plan-document";
import { verdictSchema } from "./screening-result";

/** What can be asked for: clear positions and currents of flagged sensors, single changes, distances of circuits. */
export const CLEARING_PARTS = ["positions", "currents", "changes", "distances"] as const;
export type ClearingPart = (typeof CLEARING_PARTS)[number];

/** What would clear which flagged sensors; null means all that are flagged. */
export const clearingRequestSchema = z.strictObject({
  sensorIds: z.array(identifier).nullable(),
  parts: z.array(z.enum(CLEARING_PARTS)),
});
export type ClearingRequest = z.output<typeof clearingRequestSchema>;

/**
 * A place where every limit holds in every load case with its uncertainty (value + U ≤ limit), from the sensor's present one:
 * `distanceM` in a straight line, `bearingDeg` clockwise from true north (null straight up or down), `riseM` up.
 */
const clearPosition = z.strictObject({
  position: point,
  distanceM: z.number(),
  bearingDeg: z.number().nullable(),
  riseM: z.number(),
  /** Largest (value + U) / limit of all its limits there. */
  reach: z.number(),
  /** True where the verdict is no better than undecided only because something drawn still waits for its path or current. */
  butForWaiting: z.boolean(),
});

/** Where was looked: a zone or the drawing by its name, how high, how far. */
const searched = z.strictObject({
  region: z.enum(["zone", "sheet", "drawn"]),
  zoneName: z.string().nullable(),
  fromHeightM: z.number(),
  toHeightM: z.number(),
  furthestM: z.number(),
});

const currentBand = z.strictObject({ fromA: z.number(), toA: z.number(), toFactor: z.number() });

/**
 * Current of one circuit at which (value + U ≤ limit) for one limit, or for all limits where `limitId` is null, all else
 * unchanged. `atMost` holds from zero up; `between` where zero does not clear but a band does; both null: no current clears.
 * Rms or DC amperes of the largest line; the present current is `presentA`.
 */
const allowableCurrent = z.strictObject({
  circuitId: z.string(),
  limitId: z.string().nullable(),
  presentA: z.number(),
  atMost: z.strictObject({ currentA: z.number(), factor: z.number() }).nullable(),
  between: currentBand.nullable(),
});

/** Current of a traced circuit whose current is not known, at which the sensor's budget would be full, U included. */
const waitingCurrent = z.strictObject({
  circuitId: z.string(),
  limitId: z.string(),
  kind: z.enum(["dc", "ac"]),
  frequencyHz: z.number(),
  /** Null where no current clears: the budget is full without it. */
  fullAtA: z.number().nullable(),
});

const sensorClearing = z.strictObject({
  id: z.string(),
  verdict: verdictSchema,
  positions: z.strictObject({ searched, suggestions: z.array(clearPosition) }).nullable(),
  currents: z.array(allowableCurrent),
  waiting: z.array(waitingCurrent),
});

export const CHANGE_KINDS = [
  "spacing",
  "trefoil",
  "twisting",
  "phase-orders",
  "raise",
  "lower",
  "sideways",
  "stray-current",
  "current-known",
] as const;

/** Circuits and routes that take the place of those with the same ids. */
export const planPatchSchema = z.strictObject({ circuits: z.array(circuit), routes: z.array(route) });
export type PlanPatch = z.output<typeof planPatchSchema>;

/** A sensor's worst finding: `budgetUsed` = value / limit, `reach` = (value + U) / limit. */
const standing = z.strictObject({ verdict: verdictSchema, budgetUsed: z.number(), reach: z.number() });

/**
 * One change by itself, re-screened: `gained` is the fall of (value + U) / limit, summed over every flagged limit of the sensors
 * asked for; before and after are those sensors' worst findings.
 */
const singleChange = z.strictObject({
  kind: z.enum(CHANGE_KINDS),
  words: z.string(),
  /** Circuits and routes that it touches. */
  ids: z.array(identifier),
  patch: planPatchSchema,
  gained: z.number(),
  sensors: z.array(z.strictObject({ id: z.string(), before: standing, after: standing })),
  /** Sensors that are within now and would not be; null where that was not looked at. */
  spoils: z.array(z.string()).nullable(),
});

const distanceLimit = z.strictObject({
  id: z.string(),
  label: z.string(),
  kind: z.enum(["compass-safe", "static", "swing", "gradient", "alternating"]),
  limit: z.number(),
  unit: z.enum(["T", "T/m"]),
});

/** Distances from a circuit's centre line beyond which its own field keeps each limit that it can spend, in the worst direction. */
const circuitDistances = z.strictObject({
  circuitId: z.string(),
  entries: z.array(
    z.strictObject({
      limitId: z.string(),
      /** 0 where it is kept right at the cable; null beyond the reach of the search. */
      distanceM: z.number().nullable(),
      /** Rounded up to 5 cm. */
      statedM: z.number().nullable(),
    }),
  ),
});

export const clearingSchema = z.strictObject({
  format: z.literal("stillneedle-clearing"),
  version: z.literal(1),
  inputHash: z.string(),
  engineVersion: z.string(),
  sensors: z.array(sensorClearing),
  /** Most gained first; changes that gain nothing are left out. */
  changes: z.array(singleChange),
  distances: z
    .strictObject({
      limits: z.array(distanceLimit),
      circuits: z.array(circuitDistances),
      reachM: z.number(),
    })
    .nullable(),
});

export type Clearing = z.output<typeof clearingSchema>;
export type SensorClearing = z.output<typeof sensorClearing>;
export type ClearPosition = z.output<typeof clearPosition>;
export type Searched = z.output<typeof searched>;
export type AllowableCurrent = z.output<typeof allowableCurrent>;
export type WaitingCurrent = z.output<typeof waitingCurrent>;
export type SingleChange = z.output<typeof singleChange>;
export type ChangeKind = SingleChange["kind"];
export type Standing = z.output<typeof standing>;
export type DistanceLimit = z.output<typeof distanceLimit>;
export type CircuitDistances = z.output<typeof circuitDistances>;

/** The document with the patch's circuits and routes in the places of their namesakes. */
export function patched(document: PlanDocument, { circuits, routes }: PlanPatch): PlanDocument {
  const circuitById = new Map(circuits.map((entry) => [entry.id, entry]));
  const routeById = new Map(routes.map((entry) => [entry.id, entry]));
  return {
    ...document,
    circuits: document.circuits.map((entry) => circuitById.get(entry.id) ?? entry),
    routes: document.routes.map((entry) => routeById.get(entry.id) ?? entry),
  };
}
