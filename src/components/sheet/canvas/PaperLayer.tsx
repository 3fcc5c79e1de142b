import type Konva from "konva";
import { useEffect, useRef } from "react";
import { Image as KonvaImage, Layer } from "react-konva";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { View } from "~/sheet/view";

interface Props {
  sheet: NonNullable<PlanDocument["drawing"]["sheet"]>;
  image: HTMLImageElement;
  view: View;
  dark: boolean;
}

/** The uploaded drawing. In the dark its ink turns light by a filter on the layer's own canvas, which costs no pixels in memory. */
export function PaperLayer({ sheet, image, view, dark }: Props) {
  const layer = useRef<Konva.Layer>(null);
  useEffect(() => {
    const style = layer.current?.getNativeCanvasElement().style;
    if (style === undefined) return;
    style.filter = dark ? "invert(1) hue-rotate(180deg) brightness(0.82)" : "";
    style.mixBlendMode = dark ? "screen" : "multiply";
  }, [dark]);
  return (
    <Layer ref={layer} listening={false} x={view.x} y={view.y} scaleX={view.scale} scaleY={view.scale}>
      <KonvaImage
        image={image}
        width={sheet.widthPx * sheet.metresPerPixel}
        height={sheet.heightPx * sheet.metresPerPixel}
        offsetX={sheet.originPx[0] * sheet.metresPerPixel}
        offsetY={sheet.originPx[1] * sheet.metresPerPixel}
        rotation={-sheet.rotationDeg}
      />
    </Layer>
  );
}
