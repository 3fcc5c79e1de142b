import { useState } from "react";
import { updateEquipment } from "~/sheet/edits/equipment";
import { circuitsOn, sameOwner, tidyPoint, type PathOwner } from "~/sheet/edits/paths";
import { updateSensor } from "~/sheet/edits/sensors";
import { crossingsAt, liftRun, profilesOf, sectionFrame, strip } from "~/sheet/section";
import { placeLabels } from "~/sheet/label-places";
import { itemOfPath, selectedOwners } from "~/sheet/selection";
import { flatOf, tidyM, type Point3 } from "~/sheet/geometry";
import { alongM, offM, type Slice } from "~/sheet/slice";
import { gridStepM } from "~/sheet/view";
import { SectionLines } from "./map/SectionLines";
import { SectionEquipment } from "./equipment/SectionEquipment";
import { HandleLabel, HeightHandle } from "./HeightHandle";
import { SliceChoice } from "./SliceChoice";
import { useEditable, useSelection, useSheet, useSheetStore, useShownDocument } from "./store";

/** Height labels stand at least this far apart. */
const labelApartPx = 17;
/** Sensors nearer than this to the slice stand in it; others are left out. */
const sliceDepthM = 0.75;

/** A vertical slice, to scale in both directions, with heights to drag or to change by arrow keys. */
export function SectionStrip() {
  const store = useSheetStore();
  const document = useShownDocument();
  const selection = useSelection();
  const editable = useEditable();
  const view = useSheet((state) => state.view);
  const size = useSheet((state) => state.size);
  const { width } = size;
  const litId = useSheet((state) => state.litId);
  const through = useSheet((state) => state.sliceThrough);
  const { slice, scale, lowM, highM } = sectionFrame(document, through, view, size);
  const [liftM, setLiftM] = useState<{ key: string; byM: number } | null>(null);
  const px = (x: number): number => width / 2 + (x - slice.centreM) * scale;
  const py = (z: number): number => strip.heightPx - strip.marginPx - (z - lowM) * scale;
  const crossings = crossingsAt(document, slice);
  const isNear = (place: Point3): boolean => Math.abs(offM(slice, flatOf(place))) <= sliceDepthM;
  const sensors = document.sensors.filter(({ position }) => isNear(position));
  const equipment = document.equipment.filter(({ centre }) => isNear(centre));
  const isChosen = (id: string): boolean =>
    selection.some((item) => (item.kind === "sensor" || item.kind === "equipment") && item.id === id);
  const labels = placeLabels(
    [
      ...sensors.map(({ id, name, position }) => ({ id, name, place: position })),
      ...equipment.map(({ id, name, centre }) => ({ id, name, place: centre })),
    ]
      .map(({ id, name, place }) => ({
        id,
        at: [px(alongM(slice, flatOf(place))), py(place[2])] as const,
        text: `${name}, ${place[2].toFixed(2)} m`,
      }))
      .sort((a, b) => Number(isChosen(b.id)) - Number(isChosen(a.id))),
    { clearPx: 13, linePx: 16, letterPx: 6.5 },
  );
  const chosenOwners = selectedOwners(document, selection);
  const isLit = (owner: PathOwner): boolean =>
    chosenOwners.some((chosen) => sameOwner(chosen, owner)) ||
    circuitsOn(document, owner).some(({ id }) => id === litId);

  const handle = (
    key: string,
    label: string,
    at: readonly [number, number],
    lift: (byM: number) => void,
  ) => ({
    label,
    editable,
    heightM: at[1],
    x: px(at[0]),
    y: py(at[1] + (liftM?.key === key ? liftM.byM : 0)),
    metresPerPixel: 1 / scale,
    stepM: store.get().snap.gridM > 0 ? store.get().snap.gridM : 0.1,
    onDrag: (byM: number | null) => setLiftM(byM === null ? null : { key, byM }),
    onLift: lift,
  });

  return (
    <section aria-label="Section strip" className="border-b border-rule bg-raised">
      <h2 className="sr-only">Section strip</h2>
      <SliceChoice slice={slice} />
      <svg width={width} height={strip.heightPx} className="block" role="group" aria-label="Section drawing">
        <Scale lowM={lowM} highM={highM} px={px} py={py} width={width} slice={slice} scale={scale} />
        <SectionLines px={px} py={py} scale={scale} />
        {profilesOf(document, slice).map(({ owner, points }) => (
          <polyline
            key={`${owner.list}/${owner.id}`}
            points={points.map(([x, z]) => `${px(x)},${py(z)}`).join(" ")}
            fill="none"
            className={isLit(owner) ? "stroke-accent" : "stroke-copper"}
            strokeOpacity={isLit(owner) ? 0.8 : 0.35}
            strokeWidth="1.5"
          />
        ))}
        {crossings.map(({ owner, name, leg, at }) => (
          <HeightHandle
            key={`${owner.list}/${owner.id}/${leg}`}
            {...handle(`${owner.id}/${leg}`, `Height of ${name} at ${at[0].toFixed(2)} m`, at, (byM) =>
              store.edit(
                `Lift ${name}`,
                (whole) => liftRun(whole, owner, leg, byM),
                undefined,
                `lift ${owner.id}/${leg}`,
              ),
            )}
            onFocus={() => store.select([itemOfPath(document, owner)])}
          >
            <circle
              r="5"
              className={isLit(owner) ? "fill-accent stroke-paper" : "fill-copper stroke-paper"}
              strokeWidth="1.5"
            />
          </HeightHandle>
        ))}
        {equipment.map((item) => (
          <HeightHandle
            key={item.id}
            {...handle(
              item.id,
              `Height of ${item.name}`,
              [alongM(slice, flatOf(item.centre)), item.centre[2]],
              (byM) =>
                store.edit(
                  `Height of ${item.name}`,
                  (whole) =>
                    updateEquipment(whole, item.id, (present) => ({
                      ...present,
                      centre: tidyPoint([present.centre[0], present.centre[1], present.centre[2] + byM]),
                    })),
                  undefined,
                  `lift ${item.id}`,
                ),
            )}
          >
            <SectionEquipment item={item} along={slice.along} lit={isChosen(item.id) || item.id === litId} />
            <HandleLabel
              at={labels.get(item.id)}
              text={`${item.name}, ${(item.centre[2] + (liftM?.key === item.id ? liftM.byM : 0)).toFixed(2)} m`}
            />
          </HeightHandle>
        ))}
        {sensors.map(({ id, name, position }) => {
          const chosen = isChosen(id);
          return (
            <HeightHandle
              key={id}
              {...handle(id, `Height of ${name}`, [alongM(slice, flatOf(position)), position[2]], (byM) =>
                store.edit(
                  `Height of ${name}`,
                  (whole) =>
                    updateSensor(whole, id, (sensor) => ({
                      ...sensor,
                      position: [sensor.position[0], sensor.position[1], tidyM(sensor.position[2] + byM)],
                    })),
                  undefined,
                  `lift ${id}`,
                ),
              )}
            >
              <circle
                r="8"
                className={`fill-paper ${chosen ? "stroke-accent" : "stroke-ink"}`}
                strokeWidth={chosen ? 3 : 1.75}
              />
              <line y1="-7" y2="7" className="stroke-ink" strokeWidth="1.75" />
              <HandleLabel
                at={labels.get(id)}
                text={`${name}, ${(position[2] + (liftM?.key === id ? liftM.byM : 0)).toFixed(2)} m`}
              />
            </HeightHandle>
          );
        })}
      </svg>
    </section>
  );
}

interface ScaleProps {
  lowM: number;
  highM: number;
  px: (x: number) => number;
  py: (z: number) => number;
  width: number;
  slice: Slice;
  scale: number;
}

/** The floor, a line for each metre of height, and ticks for each metre along the slice. */
function Scale({ lowM, highM, px, py, width, slice, scale }: ScaleProps) {
  const everyM = gridStepM(scale, labelApartPx);
  const heights: number[] = [];
  for (let z = Math.ceil(lowM / everyM) * everyM; z <= highM; z += everyM) heights.push(z);
  const along: number[] = [];
  const halfM = width / 2 / scale;
  const { centreM, line } = slice;
  for (let x = Math.ceil((centreM - halfM) / everyM) * everyM; x <= centreM + halfM; x += everyM)
    along.push(x);
  return (
    <g aria-hidden="true">
      {line !== null &&
        [line.fromM, line.toM].map((atM) => (
          <line
            key={atM}
            x1={px(atM)}
            x2={px(atM)}
            y1={py(highM)}
            y2={py(lowM)}
            className="stroke-rule-strong"
            strokeDasharray="8 3 2 3"
          />
        ))}
      {heights.map((z) => (
        <g key={z}>
          <line
            x1="44"
            x2={width}
            y1={py(z)}
            y2={py(z)}
            className={z === 0 ? "stroke-ink" : "stroke-rule"}
            strokeWidth={z === 0 ? 1.5 : 1}
          />
          <text x="40" y={py(z) + 4} textAnchor="end" className="fill-muted text-xs">
            {z} m
          </text>
        </g>
      ))}
      {along.map((x) => (
        <line key={x} x1={px(x)} x2={px(x)} y1={py(0) - 3} y2={py(0) + 3} className="stroke-rule-strong" />
      ))}
    </g>
  );
}
