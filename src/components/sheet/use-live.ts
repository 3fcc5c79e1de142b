import { useEffect } from "react";
import { LiveScreening, type FieldMap, type FieldMapRequest } from "~/client/screening";
import { limitValue } from "~/domain/plan-document/sensor";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { mapGrid } from "~/sheet/map-grid";
import { sectionFrame, sectionGrid } from "~/sheet/section";
import { shownDocument } from "~/sheet/session";
import { shownBounds } from "~/sheet/view";
import type { Mapped, SheetState, SheetStore } from "./store";

/** Points of a map and rows of a section while something moves, and once all rests. */
const coarse = { points: 2_500, rows: 15 };
const fine = { points: 14_000, rows: 40 };
const restMs = 250;

/** The band of the selected sensor's alternating limit, so that map and limit compare the same. */
function bandOf({ session }: SheetState, document: PlanDocument): [number, number] | undefined {
  const [selected] = session.selection.filter((item) => item.kind === "sensor");
  const limits = document.sensors.find(({ id }) => id === selected?.id)?.limits ?? [];
  const alternating = limits.find((limit) => limit.kind === "alternating");
  return alternating !== undefined && limitValue(alternating) > 0 ? alternating.bandHz : undefined;
}

interface Requests {
  document: PlanDocument;
  level: FieldMapRequest;
  section: FieldMapRequest;
}

/** What to map at this fineness; null while the map is off. */
function requestsOf(state: SheetState, { points, rows }: { points: number; rows: number }): Requests | null {
  const { settings } = state.map;
  if (settings === null || state.size.width === 0) return null;
  const document = shownDocument(state.session);
  const bandHz = settings.quantity === "alternating" ? bandOf(state, document) : undefined;
  const loadCase = document.loadCases.find(({ id }) => id === settings.loadCaseId);
  const common = { quantity: settings.quantity, loadCaseId: loadCase?.id ?? null, ...(bandHz && { bandHz }) };
  const flat = mapGrid(shownBounds(state.view, state.size), points);
  const frame = sectionFrame(document, state.session.selection, state.view, state.size);
  const upright = sectionGrid(frame, state.size.width, rows);
  const { columns, stepM } = flat;
  return {
    document,
    level: {
      ...common,
      grid: {
        origin: [flat.x0M, flat.y0M, settings.heightM],
        across: [stepM, 0, 0],
        up: [0, stepM, 0],
        columns,
        rows: flat.rows,
      },
    },
    section: {
      ...common,
      grid: {
        origin: [upright.x0M, frame.sliceY, upright.z0M],
        across: [upright.stepM, 0, 0],
        up: [0, 0, upright.stepM],
        columns: upright.columns,
        rows: upright.rows,
      },
    },
  };
}

/** A map as lines are drawn from it; in a section z stands for y. */
function mappedOf({ grid, quantity }: FieldMapRequest, { values, columns, rows }: FieldMap): Mapped {
  const y0M = grid.up[2] > 0 ? grid.origin[2] : grid.origin[1];
  return { quantity, grid: { x0M: grid.origin[0], y0M, stepM: grid.across[0], columns, rows, values } };
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
      onMap: (request, outcome) => {
        const { map } = store.get();
        if (map.settings?.quantity !== request.quantity) return;
        const part =
          outcome.kind === "done"
            ? { mapped: mappedOf(request, outcome.value), problem: null }
            : { mapped: null, problem: outcome.message };
        store.update({ map: { ...map, ...part } });
      },
      onSection: (request, outcome) => {
        const { map } = store.get();
        if (map.settings?.quantity !== request.quantity) return;
        const section = outcome.kind === "done" ? mappedOf(request, outcome.value) : null;
        store.update({ map: { ...map, section } });
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
      const requests = requestsOf(state, coarse);
      const key = requests === null ? "" : JSON.stringify([requests.level, requests.section]);
      if (requests === null || (!moved && key === mappedFor)) {
        mappedFor = key;
        return;
      }
      mappedFor = key;
      live.map(shown, requests.level);
      live.section(shown, requests.section);
      clearTimeout(timer);
      timer = setTimeout(() => {
        const finer = requestsOf(store.get(), fine);
        if (finer === null) return;
        live.map(finer.document, finer.level);
        live.section(finer.document, finer.section);
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
