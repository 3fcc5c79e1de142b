import type { Sensor } from "~/domain/plan-document/sensor";
import type { ChangeSensor } from "./changes";
import { DirectionFields } from "./DirectionFields";

interface Props {
  sensor: Sensor;
  change: ChangeSensor;
  disabled: boolean;
}

/** The direction along which a sensor measures; without one the resultant counts. */
export function AxisFields({ sensor, change, disabled }: Props) {
  return (
    <DirectionFields
      label="Axis"
      direction={sensor.axis}
      noneLabel="none: the whole field counts"
      disabled={disabled}
      onChange={(axis) => change("Axis", (present) => ({ ...present, axis }))}
    />
  );
}
