import type { Limit, Sensor } from "~/domain/plan-document/sensor";
import { unit } from "~/field/vector";
import type { FieldGroup } from "../frequency-classes";
import { alternatingMeasure, type UnknownPhase } from "./alternating";
import { headingMeasure } from "./heading";
import { dcMagnitude } from "./magnitude";
import type { Measure } from "./measure";
import { rangeMeasure } from "./range";

/** What a limit compares and which components take part in it. */
export interface LimitMeasure {
  unit: "T" | "deg" | "T/m";
  /** 3: the field, 9: its gradient. */
  width: 3 | 9;
  /** Whether the component that is compared is projected on the sensor's axis. */
  axis: Sensor["axis"];
  includes(frequencyHz: number): boolean;
  measure: Measure;
}

const dcOnly = (frequencyHz: number): boolean => frequencyHz === 0;

export function limitMeasure(
  limit: Limit,
  sensorAxis: Sensor["axis"],
  groups: readonly FieldGroup[],
  unknownPhase: UnknownPhase,
): LimitMeasure {
  const axis = sensorAxis && (unit(sensorAxis) as [number, number, number]);
  switch (limit.kind) {
    case "static":
    case "swing":
      return { unit: "T", width: 3, axis, includes: dcOnly, measure: dcMagnitude(3, axis) };
    case "alternating": {
      const [lowHz, highHz] = limit.bandHz;
      return {
        unit: "T",
        width: 3,
        axis,
        includes: (frequencyHz) => frequencyHz > 0 && frequencyHz >= lowHz && frequencyHz <= highHz,
        measure: alternatingMeasure(groups, axis, unknownPhase, limit.measure),
      };
    }
    case "heading":
      return { unit: "deg", width: 3, axis: null, includes: dcOnly, measure: headingMeasure };
    case "gradient":
      return { unit: "T/m", width: 9, axis: null, includes: dcOnly, measure: dcMagnitude(9, null) };
    case "range":
      return { unit: "T", width: 3, axis: null, includes: () => true, measure: rangeMeasure(groups) };
  }
}
