import { Button } from "~/components/ui/Button";
import { MAKERS_FIGURE_REMARK, SENSOR_KINDS } from "~/domain/catalogue";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { Sensor } from "~/domain/plan-document/sensor";
import { fromDatum, toPlanFrame } from "~/sheet/edits/aids";
import { limitsOfKind } from "~/sheet/edits/sensor-kinds";
import { removeSensors } from "~/sheet/edits/remove";
import { needsEarthField, updateSensor } from "~/sheet/edits/sensors";
import { Choice } from "../inputs/Choice";
import { CommitField } from "../inputs/CommitField";
import { NumberField } from "../inputs/NumberField";
import { useDocument, useEditable, useSheetStore } from "../store";
import { AxisFields } from "./AxisFields";
import { PositionFields } from "./PositionFields";
import { BackgroundFields } from "./BackgroundFields";
import { LimitFields } from "./LimitFields";

/** The catalogue's kind whose limits the sensor has; "" where they are its own. */
function kindIdOf(sensor: Sensor): string {
  const own = JSON.stringify(sensor.limits);
  return SENSOR_KINDS.find((kind) => JSON.stringify(limitsOfKind(kind)) === own)?.id ?? "";
}

export function SensorPanel({ sensor }: { sensor: Sensor }) {
  const store = useSheetStore();
  const document = useDocument();
  const disabled = !useEditable();
  const change = (label: string, how: (sensor: Sensor) => Sensor) =>
    store.edit(`${label} of ${sensor.name}`, (whole: PlanDocument) => updateSensor(whole, sensor.id, how));
  const kinds = SENSOR_KINDS.filter(
    (kind) => document.earthField !== null || !limitsOfKind(kind).some(needsEarthField),
  );
  const kindId = kindIdOf(sensor);
  return (
    <div className="grid gap-3">
      <CommitField
        label="Name"
        value={sensor.name}
        disabled={disabled}
        onCommit={(name) => {
          if (name.length > 300) return "A name has at most 300 letters.";
          change("Name", (present) => ({ ...present, name }));
          return null;
        }}
      />
      <Choice
        label="Kind"
        value={kindId}
        options={[
          ...(kindId === "" ? [{ value: "", label: "limits of its own" }] : []),
          ...kinds.map(({ id, name }) => ({ value: id, label: name })),
        ]}
        hint={MAKERS_FIGURE_REMARK}
        disabled={disabled}
        onChange={(id) => {
          const kind = kinds.find((candidate) => candidate.id === id);
          if (kind !== undefined) change("Kind", (present) => ({ ...present, limits: limitsOfKind(kind) }));
        }}
      />
      <PositionFields
        legend="Position"
        position={sensor.position}
        disabled={disabled}
        onChange={(position) => change("Position", (present) => ({ ...present, position }))}
      />
      {document.drawing.datum !== undefined && (
        <PositionFields
          legend={`From ${document.drawing.datum.name}`}
          position={fromDatum(document, sensor.position) ?? sensor.position}
          disabled={disabled}
          onChange={(offset) =>
            change("Position", (present) => ({ ...present, position: toPlanFrame(document, offset) }))
          }
        />
      )}
      <NumberField
        label="Position tolerance"
        unit="mm"
        perUnit={1000}
        least={0}
        most={100}
        value={sensor.positionToleranceM}
        disabled={disabled}
        onChange={(positionToleranceM) =>
          change("Position tolerance", (present) => ({ ...present, positionToleranceM }))
        }
      />
      <AxisFields sensor={sensor} change={change} disabled={disabled} />
      <LimitFields
        sensor={sensor}
        change={change}
        disabled={disabled}
        earthKnown={document.earthField !== null}
      />
      <BackgroundFields sensor={sensor} change={change} disabled={disabled} />
      {!disabled && (
        <Button
          small
          kind="danger"
          className="justify-self-start"
          onClick={() =>
            store.edit(`Delete ${sensor.name}`, (whole) => removeSensors(whole, [sensor.id]), [])
          }
        >
          Delete sensor
        </Button>
      )}
    </div>
  );
}
