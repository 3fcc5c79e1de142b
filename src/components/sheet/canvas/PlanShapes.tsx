import { useMemo } from "react";
import type { Equipment } from "~/domain/plan-document/equipment";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { positionsWorstFirst } from "~/domain/positions";
import { VERDICTS, type Verdict } from "~/domain/screening-result";
import { aidsOf } from "~/sheet/edits/aids";
import { equipmentWords } from "~/sheet/edits/equipment";
import { circuitsOn, ownedPaths, ownerOfCircuit, sameOwner, type OwnedPath } from "~/sheet/edits/paths";
import { placeLabels } from "~/sheet/label-places";
import { isSelected, selectedOwners } from "~/sheet/selection";
import { useSelection, useSheet, useShownDocument } from "../store";
import { AidShape } from "./AidShape";
import { EquipmentShape } from "./EquipmentShape";
import { PathShape, type Carried } from "./PathShape";
import { radiusPx, SensorShape } from "./SensorShape";
import { VertexHandles } from "./VertexHandles";
import type { Palette } from "./use-palette";

const bare: Carried = { dc: false, ac: false, reversed: false };

function carriedBy(document: PlanDocument, { owner }: OwnedPath): Carried {
  return circuitsOn(document, owner).reduce<Carried>((carried, { supply }) => {
    if (supply === null) return carried;
    if (supply.kind !== "dc") return { ...carried, ac: true };
    return { ...carried, dc: true, reversed: supply.currentA < 0 };
  }, bare);
}

const equipmentLabel = ({ name, kind }: Equipment): string => `${name} (${equipmentWords[kind]})`;

/** Routes with what they carry, equipment with its axes, and sensors with their needles. */
export function PlanShapes({ scale, palette }: { scale: number; palette: Palette }) {
  const document = useShownDocument();
  const selection = useSelection();
  const litId = useSheet((state) => state.litId);
  const live = useSheet((state) => state.live);
  const verdicts = useMemo(() => {
    const known = new Map<string, { verdict: Verdict; budgetUsed: number }>();
    if (live.kind !== "screened") return known;
    for (const { sensor, verdict, governing } of positionsWorstFirst(document, live.result)) {
      known.set(sensor.id, { verdict, budgetUsed: governing?.budgetUsed ?? 0 });
    }
    return known;
  }, [document, live]);
  const paths = useMemo(
    () => ownedPaths(document).map((owned) => ({ owned, carried: carriedBy(document, owned) })),
    [document],
  );
  const labels = useMemo(() => {
    const rank = (kind: "sensor" | "equipment", id: string): number =>
      isSelected(selection, { kind, id }) ? -9 : -VERDICTS.indexOf(verdicts.get(id)?.verdict ?? "within");
    const things = [
      ...document.sensors.map(({ id, name, position: [x, y] }) => ({
        id: `sensor/${id}`,
        text: name,
        at: [x * scale, -y * scale] as const,
        rank: rank("sensor", id),
      })),
      ...document.equipment.map((item) => ({
        id: `equipment/${item.id}`,
        text: equipmentLabel(item),
        at: [item.centre[0] * scale, -item.centre[1] * scale] as const,
        rank: rank("equipment", item.id),
      })),
    ].sort((a, b) => a.rank - b.rank);
    return placeLabels(things, { clearPx: radiusPx + 5, linePx: 16, letterPx: 7 });
  }, [document.sensors, document.equipment, selection, verdicts, scale]);
  const chosen = selectedOwners(document, selection);
  const lit = document.circuits.find(({ id }) => id === litId);
  const litOwner = lit === undefined ? null : ownerOfCircuit(lit);
  return (
    <>
      {paths.map(({ owned, carried }) => (
        <PathShape
          key={`${owned.owner.list}/${owned.owner.id}`}
          owned={owned}
          carried={carried}
          scale={scale}
          palette={palette}
          selected={chosen.some((owner) => sameOwner(owner, owned.owner))}
          lit={litOwner !== null && sameOwner(litOwner, owned.owner)}
        />
      ))}
      {paths
        .filter(({ owned }) => chosen.some((owner) => sameOwner(owner, owned.owner)))
        .map(({ owned }) => (
          <VertexHandles
            key={`${owned.owner.list}/${owned.owner.id}`}
            owned={owned}
            selection={selection}
            scale={scale}
            palette={palette}
          />
        ))}
      {aidsOf(document).map((aid) => (
        <AidShape
          key={`${aid.kind}/${aid.id}`}
          aid={aid}
          scale={scale}
          palette={palette}
          selected={isSelected(selection, { kind: "aid", aid: aid.kind, id: aid.id })}
        />
      ))}
      {document.equipment.map((item) => (
        <EquipmentShape
          key={item.id}
          item={item}
          scale={scale}
          palette={palette}
          selected={isSelected(selection, { kind: "equipment", id: item.id })}
          lit={item.id === litId}
          label={equipmentLabel(item)}
          labelAt={labels.get(`equipment/${item.id}`) ?? null}
        />
      ))}
      {document.sensors.map((sensor) => (
        <SensorShape
          key={sensor.id}
          sensor={sensor}
          verdict={verdicts.get(sensor.id)?.verdict ?? null}
          budgetUsed={verdicts.get(sensor.id)?.budgetUsed ?? 0}
          scale={scale}
          palette={palette}
          selected={isSelected(selection, { kind: "sensor", id: sensor.id })}
          labelAt={labels.get(`sensor/${sensor.id}`) ?? null}
        />
      ))}
    </>
  );
}
