import { useState } from "react";
import { Button } from "~/components/ui/Button";
import { SENSOR_KINDS, sensorKind } from "~/domain/catalogue";
import { angleText, fieldText, gradientText } from "~/domain/units";
import type { Limit, Sensor } from "~/domain/plan-document/sensor";
import { fromDatum } from "~/sheet/edits/aids";
import { freeName } from "~/sheet/edits/ids";
import { removeSensors } from "~/sheet/edits/remove";
import { limitsOfKind, limitTitles } from "~/sheet/edits/sensor-kinds";
import { addSensor, updateSensor } from "~/sheet/edits/sensors";
import { useDocument, useEditable, useSheetStore } from "../store";
import { CellInput } from "./CellInput";
import { CellSelect } from "./CellSelect";
import { PositionCells, positionColumns } from "./PositionCells";

const limitText = (limit: Limit): string => {
  if (limit.kind === "heading") return angleText(limit.limitDeg);
  return limit.kind === "gradient" ? gradientText(limit.limitTPerM) : fieldText(limit.limitT);
};

/** Height that a sensor added here begins with. */
const usualHeightM = 1.1;

export function SensorsTable() {
  const store = useSheetStore();
  const editable = useEditable();
  const { sensors, drawing } = useDocument();
  const [kindId, setKindId] = useState(SENSOR_KINDS[0]?.id ?? "");
  const add = () => {
    const kind = sensorKind(kindId);
    if (kind === undefined) return;
    const { document } = store.get().session;
    const name = freeName(kind.name, document.sensors);
    const added = addSensor(document, name, [0, 0, usualHeightM], limitsOfKind(kind));
    store.edit(`Add ${name}`, () => added.document, [{ kind: "sensor", id: added.sensorId }]);
  };
  return (
    <div className="grid gap-3">
      {sensors.length === 0 ? (
        <p className="text-sm text-muted">No sensor is placed yet.</p>
      ) : (
        <div className="table-scroll">
          <table className="table">
            <caption className="sr-only">Sensors, positions in metres</caption>
            <thead>
              <tr>
                <th scope="col">Name</th>
                {positionColumns.map((column) => (
                  <th key={column} scope="col">
                    {column}
                  </th>
                ))}
                {drawing.datum !== undefined && <th scope="col">From {drawing.datum.name}, m</th>}
                <th scope="col">Limits</th>
                {editable && (
                  <th scope="col">
                    <span className="sr-only">Edit</span>
                  </th>
                )}
              </tr>
            </thead>
            <tbody>
              {sensors.map((sensor) => (
                <Row key={sensor.id} sensor={sensor} />
              ))}
            </tbody>
          </table>
        </div>
      )}
      {editable && (
        <div className="flex flex-wrap items-center gap-2">
          <CellSelect
            label="Kind of the sensor to add"
            value={kindId}
            options={SENSOR_KINDS.map(({ id, name }) => ({ value: id, label: name }))}
            onChange={setKindId}
          />
          <Button small onClick={add}>
            Add a sensor
          </Button>
        </div>
      )}
    </div>
  );
}

function Row({ sensor }: { sensor: Sensor }) {
  const store = useSheetStore();
  const disabled = !useEditable();
  const { name } = sensor;
  const offset = fromDatum(useDocument(), sensor.position);
  const change = (label: string, how: (present: Sensor) => Sensor) =>
    store.edit(`${label} of ${name}`, (whole) => updateSensor(whole, sensor.id, how));
  return (
    <tr>
      <th scope="row">
        <CellInput
          label={`Name of sensor ${name}`}
          value={name}
          disabled={disabled}
          onCommit={(text) => {
            if (text.length > 300) return "At most 300 letters.";
            change("Name", (present) => ({ ...present, name: text }));
            return null;
          }}
        />
      </th>
      <PositionCells
        name={name}
        position={sensor.position}
        disabled={disabled}
        onChange={(position) => change("Position", (present) => ({ ...present, position }))}
      />
      {offset !== null && <td>{offset.map((partM) => partM.toFixed(3)).join(", ")}</td>}
      <td>{sensor.limits.map((limit) => `${limitTitles[limit.kind]} ${limitText(limit)}`).join(", ")}</td>
      {!disabled && (
        <td className="whitespace-nowrap">
          <Button
            small
            kind="quiet"
            aria-label={`Select ${name} to edit its limits`}
            onClick={() => store.select([{ kind: "sensor", id: sensor.id }])}
          >
            Select
          </Button>
          <Button
            small
            kind="quiet"
            aria-label={`Delete sensor ${name}`}
            onClick={() => store.edit(`Delete ${name}`, (whole) => removeSensors(whole, [sensor.id]))}
          >
            Delete
          </Button>
        </td>
      )}
    </tr>
  );
}
