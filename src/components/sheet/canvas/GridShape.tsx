import { Shape } from "react-konva";
import { gridStepM, shownBounds, toScreen, type SizePx, type View } from "~/sheet/view";
import type { Palette } from "./use-palette";

interface Props {
  view: View;
  size: SizePx;
  palette: Palette;
  /** Fainter over a drawing, which has lines of its own. */
  overDrawing: boolean;
}

/** Fine lines at a round distance, heavier ones at every fifth, and the axes of the plan. */
export function GridShape({ view, size, palette, overDrawing }: Props) {
  const stepM = gridStepM(view.scale, overDrawing ? 48 : 24);
  return (
    <Shape
      listening={false}
      opacity={overDrawing ? 0.45 : 1}
      sceneFunc={(context) => {
        const bounds = shownBounds(view, size);
        const draw = (at: number, across: boolean) => {
          const [x, y] = toScreen(view, [at * stepM, at * stepM]);
          context.beginPath();
          context.setAttr("strokeStyle", at % 5 === 0 ? palette["rule-strong"] : palette.rule);
          context.setAttr("globalAlpha", at === 0 ? 0.9 : at % 5 === 0 ? 0.4 : 0.6);
          context.setAttr("lineWidth", 1);
          const place = Math.round(across ? y : x) + 0.5;
          context.moveTo(across ? 0 : place, across ? place : 0);
          context.lineTo(across ? size.width : place, across ? place : size.height);
          context.stroke();
        };
        for (let i = Math.ceil(bounds.minX / stepM); i * stepM <= bounds.maxX; i++) draw(i, false);
        for (let j = Math.ceil(bounds.minY / stepM); j * stepM <= bounds.maxY; j++) draw(j, true);
      }}
    />
  );
}
