import type { Limit, Sensor } from "~/domain/plan-document/sensor";
import { unit } from "~/field/vector";
import type { FieldGroup } from "../frequency-classes";
import { alternatingMeasure, alternatingValue, type UnknownPhase } from "./alternating";
import { headingMeasure } from "./heading";
import { dcMagnitude, dcMagnitudeValue } from "./magnitude";
import type { Measure, MeasuredState } from "./measure";
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
  /** The value alone, for many states in a row. */
  value: (state: MeasuredState) => number;
}

const dcOnly = (frequencyHz: number): boolean => frequencyHz === 0;

/** Share by which a frequency may miss an edge and still lie on it: the third harmonic of 16.7 Hz is 50.1 Hz but for its last digit. */
const ON_EDGE = 1e-9;

const inBand = (frequencyHz: number, lowHz: number, highHz: number): boolean =>
  frequencyHz >= lowHz * (1 - ON_EDGE) && frequencyHz <= highHz * (1 + ON_EDGE);

const base = { unit: "T", width: 3, axis: null } as const;

const valueBy =
  (measure: Measure) =>
  (state: MeasuredState): number =>
    measure(state).value;

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
      return {
        ...base,
        axis,
        includes: dcOnly,
        measure: dcMagnitude(3, axis),
        value: dcMagnitudeValue(3, axis),
      };
    case "alternating": {
      const [lowHz, highHz] = limit.bandHz;
      return {
        ...base,
        axis,
        includes: (frequencyHz) => frequencyHz > 0 && inBand(frequencyHz, lowHz, highHz),
        measure: alternatingMeasure(groups, axis, unknownPhase, limit.measure),
        value: alternatingValue(groups, axis, unknownPhase, limit.measure),
      };
    }
    case "heading":
      return {
        ...base,
        unit: "deg",
        includes: dcOnly,
        measure: headingMeasure,
        value: valueBy(headingMeasure),
      };
    case "gradient":
      return {
        ...base,
        unit: "T/m",
        width: 9,
        includes: dcOnly,
        measure: dcMagnitude(9, null),
        value: dcMagnitudeValue(9, null),
      };
    case "range": {
      const measure = rangeMeasure(groups);
      return { ...base, includes: () => true, measure, value: valueBy(measure) };
    }
  }
}
