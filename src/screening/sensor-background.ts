import type { Sensor } from "~/domain/plan-document/sensor";
import { classOf, type FrequencyTable } from "./frequency-classes";
import type { LimitMeasure } from "./measures/measure-of";

/** A sensor's measured background as it enters one limit: a static vector, and magnitudes per frequency class. */
export interface BackgroundState {
  staticT: readonly [number, number, number];
  bounds: Float64Array;
}

/**
 * What of the background takes part in a limit. Swing compares differences and gradient has no background, so nothing does.
 */
export function backgroundState(
  sensor: Sensor,
  kind: Sensor["limits"][number]["kind"],
  { includes }: LimitMeasure,
  frequencies: FrequencyTable,
): BackgroundState {
  const bounds = new Float64Array(frequencies.classesHz.length);
  const none: BackgroundState = { staticT: [0, 0, 0], bounds };
  const { background } = sensor;
  if (!background || kind === "swing" || kind === "gradient") return none;
  for (const { frequencyHz, rmsT } of background.alternating) {
    if (!includes(frequencyHz)) continue;
    const classIndex = classOf(frequencies.classesHz, frequencyHz);
    bounds[classIndex] = (bounds[classIndex] as number) + rmsT;
  }
  if (background.staticT === null || !includes(0)) return none;
  if (typeof background.staticT === "number") {
    bounds[0] = background.staticT;
    return none;
  }
  return { staticT: background.staticT, bounds };
}
