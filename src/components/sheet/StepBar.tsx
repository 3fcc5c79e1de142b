import { Button } from "~/components/ui/Button";
import { SENSOR_KINDS } from "~/domain/catalogue";
import { beginDrawAid, drawnBy } from "~/sheet/steps/draw-aid";
import { beginMeasure } from "~/sheet/steps/measure";
import { beginPlaceEquipment } from "~/sheet/steps/place-equipment";
import { beginPlaceSensor } from "~/sheet/steps/place-sensor";
import { beginSelect } from "~/sheet/steps/select";
import { beginSetNorth } from "~/sheet/steps/set-north";
import { beginSetScale } from "~/sheet/steps/set-scale";
import { stepNames, stepTitles, type StepName } from "~/sheet/steps/step";
import { beginTraceRoute, type TraceFor } from "~/sheet/steps/trace-route";
import type { SheetStore } from "./store";
import { useDocument, useEditable, useSheet, useSheetStore } from "./store";

/** Heights that most things have: trays under the ceiling, instruments on a bench. */
const usualTrayM = 2.8;
const usualSensorM = 1.1;
const usualEquipmentM = 0.4;

const lastHeightM = (heights: readonly number[], otherwiseM: number): number => heights.at(-1) ?? otherwiseM;

export function beginStep(store: SheetStore, name: StepName, traceFor: TraceFor | null = null): void {
  store.begin((around) => {
    const { routes, sensors, equipment, frame } = around.document;
    if (name === "set-scale") return beginSetScale();
    if (name === "set-north") return beginSetNorth(around);
    if (name === "measure") return beginMeasure(frame.northBearingDeg);
    if (name === "trace-route") {
      return beginTraceRoute(
        traceFor,
        lastHeightM(
          routes.flatMap(({ path }) => path.slice(0, 1).map(([, , z]) => z)),
          usualTrayM,
        ),
      );
    }
    const aid = drawnBy(name);
    if (aid !== null) return beginDrawAid(aid, aid === "loop" ? usualTrayM : 0);
    if (name === "place-equipment") {
      const last = equipment.at(-1);
      return beginPlaceEquipment(last?.kind ?? "coil", last?.centre[2] ?? usualEquipmentM);
    }
    if (name === "place-sensor") {
      return beginPlaceSensor(
        SENSOR_KINDS,
        SENSOR_KINDS[0]?.id ?? "",
        lastHeightM(
          sensors.map(({ position }) => position[2]),
          usualSensorM,
        ),
      );
    }
    return beginSelect(around.selection.length);
  });
}

/** Focuses the drawing, so that the step's keys reach it. */
export function focusDrawing(): void {
  document.querySelector<HTMLElement>("[data-testid=drawing]")?.focus({ preventScroll: true });
}

/** The steps as a plain list of names above the drawing. */
export function StepBar() {
  const store = useSheetStore();
  const editable = useEditable();
  const running = useSheet(({ session }) => session.step.name);
  const hasImage = useDocument().drawing.sheet !== undefined;
  const offered = stepNames.filter((name) => editable || name === "select" || name === "measure");
  return (
    <div role="group" aria-label="Steps" className="flex flex-wrap items-center gap-x-1 gap-y-1">
      {offered.map((name) => {
        const lacksImage = name === "set-scale" && !hasImage;
        return (
          <button
            key={name}
            type="button"
            aria-pressed={running === name}
            disabled={lacksImage}
            title={lacksImage ? "A blank grid is to scale already; add a drawing first." : undefined}
            className="min-h-9 cursor-pointer border-b-2 border-transparent px-2 text-sm text-ink hover:border-rule-strong disabled:cursor-not-allowed disabled:text-muted aria-pressed:border-accent aria-pressed:font-semibold"
            onClick={() => {
              beginStep(store, name);
              focusDrawing();
            }}
          >
            {stepTitles[name]}
          </button>
        );
      })}
    </div>
  );
}

export function UndoButtons() {
  const store = useSheetStore();
  const past = useSheet(({ session }) => session.history.past.at(-1)?.label ?? null);
  const future = useSheet(({ session }) => session.history.future[0]?.label ?? null);
  if (!useEditable()) return null;
  return (
    <div role="group" aria-label="History" className="flex items-center gap-1">
      <Button
        small
        disabled={past === null}
        title={past === null ? undefined : `Undo: ${past}`}
        onClick={() => store.undo()}
      >
        Undo
      </Button>
      <Button
        small
        disabled={future === null}
        title={future === null ? undefined : `Redo: ${future}`}
        onClick={() => store.redo()}
      >
        Redo
      </Button>
    </div>
  );
}
