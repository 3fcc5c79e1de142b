import type { SensorKind } from "~/domain/catalogue";
import { limit, type Limit, type LimitKind } from "~/domain/plan-document/sensor";

/** Limits in the order in which they are offered, commonest first. */
export const limitKinds = [
  "static",
  "alternating",
  "heading",
  "swing",
  "gradient",
  "range",
] as const satisfies readonly LimitKind[];

export const limitTitles: Record<LimitKind, string> = {
  static: "static (DC)",
  alternating: "alternating (AC)",
  swing: "swing between load cases",
  heading: "heading error",
  gradient: "gradient",
  range: "range",
};

/** The limits that a sensor of this kind starts with, defaults filled in and called "1", "2", … */
export const limitsOfKind = (kind: SensorKind): Limit[] =>
  kind.limits.map((entry, index) => ({ ...limit.parse(entry), id: String(index + 1) }));

/** A limit of a kind to begin with, called by the lowest number that is free. */
export function newLimit(kind: LimitKind, present: readonly Limit[]): Limit {
  let number = 1;
  while (present.some(({ id }) => id === String(number))) number++;
  const id = String(number);
  if (kind === "heading") return { id, kind, limitDeg: 1 };
  if (kind === "gradient") return { id, kind, limitTPerM: 1e-7 };
  if (kind === "range") return { id, kind, limitT: 1e-4 };
  if (kind !== "alternating") return { id, kind, limitT: 1e-6 };
  return { id, kind, limitT: 1e-6, bandHz: [10, 1000], measure: "rms" };
}
