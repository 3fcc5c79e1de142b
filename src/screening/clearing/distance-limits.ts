import { SENSOR_KINDS } from "~/domain/catalogue";
import type { DistanceLimit } from "~/domain/clearing";
import type { LimitInput } from "~/domain/plan-document/sensor";
import { fieldText, gradientText, radians, teslaFromMicrotesla } from "~/domain/units";

/** A limit of the distance table with the engine's own form of it. */
export interface TabledLimit {
  shown: DistanceLimit;
  /** What the engine judges; the horizontal part of a DC field for a compass-safe distance. */
  limit: LimitInput;
  isHorizontal: boolean;
}

/**
 * Deviations that define the compass-safe distance of a standard and of a steering compass (ISO 25862, IEC 60945 §11.2): 5.4°/H
 * and 18°/H with H in µT. A horizontal field B turns a needle by B/H, so that H falls out: 0.094 and 0.314 µT.
 */
const COMPASS_SAFE_DEG = [
  ["compass-5.4", 5.4, "standard compass"],
  ["compass-18", 18, "steering compass"],
] as const;

const compassSafe = COMPASS_SAFE_DEG.map(([id, deviationDeg, compass]): TabledLimit => {
  const limitT = teslaFromMicrotesla(radians(deviationDeg));
  return {
    shown: {
      id,
      label: `Compass-safe, ${deviationDeg}°/H (${compass})`,
      kind: "compass-safe",
      limit: limitT,
      unit: "T",
    },
    limit: { kind: "static", limitT },
    isHorizontal: true,
  };
});

const catalogue = SENSOR_KINDS.flatMap(({ id, name, limits }) =>
  limits.flatMap((limit): TabledLimit[] => {
    if (limit.kind === "heading" || limit.kind === "range") return [];
    const [bound, unit, text] =
      limit.kind === "gradient"
        ? ([limit.limitTPerM, "T/m", gradientText(limit.limitTPerM)] as const)
        : ([limit.limitT, "T", fieldText(limit.limitT)] as const);
    const shown = {
      id: `${id}-${limit.kind}`,
      label: `${name}, ${text.replace(" ", "\u00a0")}`,
      kind: limit.kind,
      limit: bound,
      unit,
    };
    return [{ shown, limit, isHorizontal: false }];
  }),
);

/** Compass-safe distances first, then what the catalogue holds. */
export const TABLED_LIMITS: readonly TabledLimit[] = [...compassSafe, ...catalogue];
