import type { Circuit } from "~/domain/plan-document/circuit";
import type { Sensor } from "~/domain/plan-document/sensor";

/**
 * Makes one edit to the circuit that a panel shows; `label` names it for the undo button. An edit that would leave parts
 * that do not go together is not made: the answer says why.
 */
export type ChangeCircuit = (label: string, how: (circuit: Circuit) => Circuit) => string | null;

/** Makes one edit to the sensor that a panel shows; `label` names it for the undo button. */
export type ChangeSensor = (label: string, how: (sensor: Sensor) => Sensor) => void;
