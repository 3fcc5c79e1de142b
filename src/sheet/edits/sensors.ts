import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { Limit, Sensor } from "~/domain/plan-document/sensor";
import type { Point3 } from "../geometry";
import { copyName, newId } from "./ids";
import { tidyPoint } from "./paths";

export const updateSensor = (
  document: PlanDocument,
  id: string,
  change: (sensor: Sensor) => Sensor,
): PlanDocument => ({
  ...document,
  sensors: document.sensors.map((sensor) => (sensor.id === id ? change(sensor) : sensor)),
});

export function addSensor(
  document: PlanDocument,
  name: string,
  position: Point3,
  limits: readonly Limit[],
): { document: PlanDocument; sensorId: string } {
  const sensor: Sensor = {
    id: newId("s"),
    name,
    position: tidyPoint(position),
    axis: null,
    positionToleranceM: 0,
    background: null,
    limits: [...limits],
  };
  return { document: { ...document, sensors: [...document.sensors, sensor] }, sensorId: sensor.id };
}

/** A copy half a metre to the right. */
export function duplicateSensor(
  document: PlanDocument,
  id: string,
): { document: PlanDocument; sensorId: string } | null {
  const original = document.sensors.find((sensor) => sensor.id === id);
  if (original === undefined) return null;
  const [x, y, z] = original.position;
  const copy: Sensor = {
    ...original,
    id: newId("s"),
    name: copyName(original.name, document.sensors),
    position: tidyPoint([x + 0.5, y, z]),
  };
  return { document: { ...document, sensors: [...document.sensors, copy] }, sensorId: copy.id };
}

/** Limits that can't be judged without the Earth's field. */
export const needsEarthField = (limit: Limit): boolean => limit.kind === "heading" || limit.kind === "range";

export const usesEarthField = (document: PlanDocument): boolean =>
  document.sensors.some(({ limits }) => limits.some(needsEarthField));
