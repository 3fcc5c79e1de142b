import type { WaitingCurrent } from "~/domain/clearing";
import { limitTitles } from "~/sheet/edits/sensor-kinds";
import { numberText } from "~/sheet/read-number";
import { useDocument } from "../store";
import type { FullCurrents } from "./use-waiting-currents";

function currentWords({ fullAtA, kind, frequencyHz }: WaitingCurrent): string {
  const supply = kind === "dc" ? "DC" : `at ${numberText(frequencyHz)} Hz`;
  return fullAtA === null ? `full without it (${supply})` : `full at ${numberText(fullAtA, 3)} A ${supply}`;
}

/** At which current of one waiting circuit each sensor's budget would be full, uncertainty included. */
export function FullAt({ circuitId, full }: { circuitId: string; full: FullCurrents }) {
  const { sensors } = useDocument();
  if (full.kind !== "known") return null;
  const rows = full.bySensor.flatMap(({ sensorId, waiting }) => {
    const sensor = sensors.find(({ id }) => id === sensorId);
    return waiting
      .filter((entry) => entry.circuitId === circuitId)
      .map((entry) => ({ entry, sensor, limit: sensor?.limits.find(({ id }) => id === entry.limitId) }));
  });
  if (rows.length === 0)
    return <p className="text-muted">No current that a plan may hold would fill a flagged budget.</p>;
  return (
    <ul className="text-muted">
      {rows.map(({ entry, sensor, limit }) => (
        <li key={`${sensor?.id}/${entry.limitId}/${entry.kind}`}>
          {sensor?.name}
          {limit !== undefined && `, ${limitTitles[limit.kind]}`}: {currentWords(entry)}
        </li>
      ))}
    </ul>
  );
}
