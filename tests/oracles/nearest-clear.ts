import type { PlanDocument } from "../../src/domain/plan-document/plan-document";
import { screen } from "../../src/screening/screen";

/** The sensor's own entry of a whole screening with it moved. */
export function screenedAt(document: PlanDocument, id: string, position: [number, number, number]) {
  const sensors = document.sensors.map((sensor) => (sensor.id === id ? { ...sensor, position } : sensor));
  const found = screen({ ...document, sensors }).sensors.find((entry) => entry.id === id);
  if (!found) throw new Error(`no sensor ${id}`);
  return found;
}

/**
 * Distance to the nearest point of a square grid at a sensor's height, inside bounds, at which a whole screening finds it within;
 * Infinity where there is none. Slow and obvious.
 */
export function nearestWithinOnGrid(
  document: PlanDocument,
  id: string,
  stepM: number,
  [left, bottom, right, top]: [number, number, number, number],
): number {
  const sensor = document.sensors.find((entry) => entry.id === id);
  if (!sensor) throw new Error(`no sensor ${id}`);
  const [x0, y0, z] = sensor.position;
  let nearestM = Infinity;
  for (let x = left; x <= right; x += stepM) {
    for (let y = bottom; y <= top; y += stepM) {
      const distanceM = Math.hypot(x - x0, y - y0);
      if (distanceM < nearestM && screenedAt(document, id, [x, y, z]).verdict === "within")
        nearestM = distanceM;
    }
  }
  return nearestM;
}
