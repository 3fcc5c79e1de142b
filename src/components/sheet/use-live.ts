import { useEffect } from "react";
import { LiveScreening, type FieldMapRequest } from "~/client/screening";
import { limitValue } from "~/domain/plan-document/sensor";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { mapGrid } from "~/sheet/map-grid";
import { shownDocument } from "~/sheet/session";
import { shownBounds } from "~/sheet/view";
import type { SheetState, SheetStore } from "./store";

/** Points of a map while something moves, and once all rests. */
const coarsePoints = 2_500;
const finePoints = 14_000;
const restMs = 250;

/** The band of the selected sensor's alternating limit, so that map and limit compare the same. */
function bandOf({ session }: SheetState, document: PlanDocument): [number, number] | undefined {
  const [selected] = session.selection.filter((item) => item.kind === "sensor");
  const limits = document.sensors.find(({ id }) => id === selected?.id)?.limits ?? [];
  const alternating = limits.find((limit) => limit.kind === "alternating");
  return alternating !== undefined && limitValue(alternating) > 0 ? alternating.bandHz : undefined;
}

function mapRequest(state: SheetState, points: number): FieldMapRequest | null {
  const { settings } = state.map;
  if (settings === null || state.size.width === 0) return null;
  const document = shownDocument(state.session);
  const { x0M, y0M, stepM, columns, rows } = mapGrid(shownBounds(state.view, state.size), points);
  const bandHz = settings.quantity === "alternating" ? bandOf(state, document) : undefined;
  const loadCase = document.loadCases.find(({ id }) => id === settings.loadCaseId);
  return {
    quantity: settings.quantity,
    loadCaseId: loadCase?.id ?? null,
    ...(bandHz && { bandHz }),
    grid: {
      origin: [x0M, y0M, settings.heightM],
      across: [stepM, 0, 0],
      up: [0, stepM, 0],
      columns,
      rows,
    },
  };
}

/** Screens what is shown and maps the field as they change; the map is coarse while things move and refined at rest. */
export function useLive(store: SheetStore): void {
  useEffect(() => {
    const live = new LiveScreening({
      onResult: (_document, outcome) =>
        store.update({
          live:
            outcome.kind === "done"
              ? { kind: "screened", result: outcome.value }
              : { kind: "refused", message: outcome.message, faults: outcome.faults },
        }),
      onMap: ({ grid, quantity }, outcome) => {
        const { map } = store.get();
        if (map.settings?.quantity !== quantity) return;
        if (outcome.kind === "refused") {
          store.update({ map: { ...map, mapped: null, problem: outcome.message } });
          return;
        }
        const { values, columns, rows } = outcome.value;
        const mapped = {
          x0M: grid.origin[0],
          y0M: grid.origin[1],
          stepM: grid.across[0],
          columns,
          rows,
          values,
        };
        store.update({ map: { ...map, mapped: { grid: mapped, quantity }, problem: null } });
      },
    });
    let document: PlanDocument | null = null;
    let mappedFor = "";
    let timer: ReturnType<typeof setTimeout> | undefined;

    const ask = () => {
      const state = store.get();
      const shown = shownDocument(state.session);
      const moved = shown !== document;
      if (moved) live.screen(shown);
      document = shown;
      const coarse = mapRequest(state, coarsePoints);
      const key = JSON.stringify(coarse);
      if (coarse === null || (!moved && key === mappedFor)) {
        mappedFor = key;
        return;
      }
      mappedFor = key;
      live.map(shown, coarse);
      clearTimeout(timer);
      timer = setTimeout(() => {
        const fine = mapRequest(store.get(), finePoints);
        if (fine !== null) live.map(shownDocument(store.get().session), fine);
      }, restMs);
    };
    ask();
    const unsubscribe = store.subscribe(ask);
    return () => {
      unsubscribe();
      clearTimeout(timer);
      live.dispose();
    };
  }, [store]);
}
