import { useEffect, useLayoutEffect, useMemo, useRef } from "react";
import { Layer, Stage } from "react-konva";
import { drawingUrl } from "~/client/plan-calls";
import { FieldMapShapes } from "../map/FieldMapShapes";
import { useDocument, useEditable, useSheet, useSheetStore } from "../store";
import { GridShape } from "./GridShape";
import { Marks } from "./MarksLayer";
import { PaperLayer } from "./PaperLayer";
import { PlanShapes } from "./PlanShapes";
import { PointerReadout } from "./PointerReadout";
import { NorthMark } from "./NorthMark";
import { ZoomButtons } from "./ZoomButtons";
import { SheetOutline } from "./SheetOutline";
import { useGestures } from "./use-gestures";
import { useImage } from "./use-image";
import { fitView, useKeys } from "./use-keys";
import { usePalette } from "./use-palette";

/** The drawing on its canvas. What it shows stands in the tables and the ledger as text too. */
export function Drawing({ planId }: { planId: string }) {
  const store = useSheetStore();
  const container = useRef<HTMLDivElement>(null);
  const palette = usePalette();
  const view = useSheet((state) => state.view);
  const size = useSheet((state) => state.size);
  const marks = useSheet(({ session }) => session.step.marks);
  const tracing = useSheet(({ session }) => session.step.name !== "select");
  const editable = useEditable();
  const { sheet } = useDocument().drawing;
  const url = sheet === undefined ? null : drawingUrl(planId, sheet.drawingId);
  const loaded = useImage(url);
  useGestures(container, store);
  const onKeyDown = useKeys(store);

  useLayoutEffect(() => {
    const element = container.current;
    if (element === null) return;
    const observer = new ResizeObserver(() => {
      const unseen = store.get().size.width === 0;
      store.update({ size: { width: element.clientWidth, height: element.clientHeight } });
      if (unseen) fitView(store);
    });
    observer.observe(element);
    // A step that was begun from the tables wants its keys here.
    if (store.get().session.step.name !== "select") element.focus({ preventScroll: true });
    return () => observer.disconnect();
  }, [store]);

  // A drawing that is newly laid, or whose scale has changed, is shown whole.
  const drawingId = sheet?.drawingId;
  const metresPerPixel = sheet?.metresPerPixel;
  useEffect(() => fitView(store), [store, drawingId, metresPerPixel]);

  const dataView = useMemo(() => JSON.stringify(view), [view]);
  return (
    <div className="relative min-h-[22rem] flex-1 overflow-hidden border-b border-rule bg-paper">
      <div
        ref={container}
        role="application"
        tabIndex={0}
        aria-label="Drawing"
        aria-describedby="instruction-line drawing-keys"
        data-view={dataView}
        data-testid="drawing"
        className={`absolute inset-0 touch-none outline-offset-[-3px] ${tracing && editable ? "cursor-crosshair" : "cursor-default"}`}
        onKeyDown={onKeyDown}
      >
        <Stage width={size.width} height={size.height} listening={false}>
          {sheet !== undefined && loaded.kind === "shown" && (
            <PaperLayer sheet={sheet} image={loaded.image} view={view} dark={palette.dark} />
          )}
          <Layer listening={false}>
            <GridShape view={view} size={size} palette={palette} overDrawing={sheet !== undefined} />
          </Layer>
          <Layer listening={false} x={view.x} y={view.y} scaleX={view.scale} scaleY={-view.scale}>
            {sheet !== undefined && <SheetOutline sheet={sheet} colour={palette["rule-strong"]} />}
            <FieldMapShapes scale={view.scale} palette={palette} />
            <PlanShapes scale={view.scale} palette={palette} />
            <Marks marks={marks} scale={view.scale} palette={palette} />
          </Layer>
        </Stage>
      </div>
      <p id="drawing-keys" className="sr-only">
        Plus and minus zoom, 0 shows everything, arrow keys move the view while nothing is selected.
        Everything here can be read and edited under Tables too.
      </p>
      <PointerReadout />
      <ZoomButtons />
      <NorthMark />
      {loaded.kind === "loading" && (
        <p className="absolute left-3 top-3 bg-paper px-2 text-sm text-muted" role="status">
          Loading the drawing…
        </p>
      )}
      {loaded.kind === "failed" && (
        <p className="message message-undecided absolute left-3 top-3 bg-paper" role="alert">
          The drawing&rsquo;s image could not be loaded. The plan is complete without it; reload the page to
          try again.
        </p>
      )}
    </div>
  );
}
