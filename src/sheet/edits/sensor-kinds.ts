import { SENSOR_KINDS, type SensorKind } from "~/domain/catalogue";
import { limit, type Limit, type LimitKind } from "~/domain/plan-document/sensor";

/** Limits that the sheet offers: those that the engine judges. */
export const offeredLimits = ["static", "alternating", "heading"] as const satisfies readonly LimitKind[];
export type OfferedLimit = (typeof offeredLimits)[number];

export const limitTitles: Record<LimitKind, string> = {
  static: "static (DC)",
  alternating: "alternating (AC)",
  swing: "swing between load cases",
  heading: "heading error",
  gradient: "gradient",
  range: "range",
};

const isOffered = (kind: LimitKind): boolean => offeredLimits.some((offered) => offered === kind);

/** Kinds of the catalogue whose limits are all offered. */
export const offeredKinds = (): SensorKind[] =>
  SENSOR_KINDS.filter(({ limits }) => limits.every(({ kind }) => isOffered(kind)));

/** The limits that a sensor of this kind starts with, defaults filled in and called "1", "2", … */
export const limitsOfKind = (kind: SensorKind): Limit[] =>
  kind.limits.map((entry, index) => ({ ...limit.parse(entry), id: String(index + 1) }));

/** A limit of a kind to begin with, called by the lowest number that is free. */
export function newLimit(kind: OfferedLimit, present: readonly Limit[]): Limit {
  let number = 1;
  while (present.some(({ id }) => id === String(number))) number++;
  const id = String(number);
  if (kind === "heading") return { id, kind, limitDeg: 1 };
  if (kind === "static") return { id, kind, limitT: 1e-6 };
  return { id, kind, limitT: 1e-6, bandHz: [10, 1000], measure: "rms" };
}
