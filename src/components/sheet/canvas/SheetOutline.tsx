import { Line } from "react-konva";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { sheetCorners } from "~/sheet/edits/scale";

interface Props {
  sheet: NonNullable<PlanDocument["drawing"]["sheet"]>;
  colour: string;
}

/** The edge of the drawing, which may be as white as the paper around it. */
export function SheetOutline({ sheet, colour }: Props) {
  return (
    <Line
      points={sheetCorners(sheet).flatMap(([x, y]) => [x, y])}
      closed
      stroke={colour}
      strokeWidth={1}
      strokeScaleEnabled={false}
      listening={false}
    />
  );
}
