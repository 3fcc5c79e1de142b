import type { Equipment } from "~/domain/plan-document/equipment";
import { shownAxis } from "~/sheet/equipment-outline";
import type { Point2 } from "~/sheet/geometry";
import { arrowPath, intoPath, markPaths, outPath } from "./mark-paths";

/** The mark of a piece of equipment in the section strip, with its axis as the slice shows it. */
export function SectionEquipment({ item, along, lit }: { item: Equipment; along: Point2; lit: boolean }) {
  const axis = shownAxis(item, { along });
  const { body, inside } = markPaths[item.kind];
  const stroke = lit ? "stroke-accent" : "stroke-copper";
  return (
    <g strokeWidth="1.75" strokeLinejoin="round">
      <path d={body} className={`fill-paper ${stroke}`} />
      <path d={inside} fill="none" className={stroke} />
      {axis !== null && axis.part > 0.1 && (
        <path
          d={arrowPath(4 + 8 * axis.part)}
          fill="none"
          className={stroke}
          transform={`rotate(${(-Math.atan2(axis.direction[1], axis.direction[0]) * 180) / Math.PI})`}
        />
      )}
      {axis !== null && axis.part < 0.995 && (
        <path d={axis.towards ? outPath : intoPath} className={`fill-paper ${stroke}`} strokeWidth="1.25" />
      )}
    </g>
  );
}
