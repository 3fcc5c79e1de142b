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
  /** Where the section's grid begins along its slice. */
  along0M: number;
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
  const frame = sectionFrame(document, state.sliceThrough, state.view, state.size);
  const upright = sectionGrid(frame, state.size.width, rows);
  const { columns, stepM } = flat;
  return {
    document,
    along0M: upright.along0M,
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
        origin: [...upright.origin, upright.z0M],
        across: [upright.stepM * frame.slice.along[0], upright.stepM * frame.slice.along[1], 0],
        up: [0, 0, upright.stepM],
        columns: upright.columns,
        rows: upright.rows,
      },
    },
  };
}

/** A map as lines are drawn from it. */
function mappedOf({ grid, quantity }: FieldMapRequest, { values, columns, rows }: FieldMap): Mapped {
  const [x0M, y0M] = grid.origin;
  return { quantity, grid: { x0M, y0M, stepM: grid.across[0], columns, rows, values } };
}

/** The same of a section: metres along the slice stand for x, z for y. */
function sectionOf({ grid, quantity }: FieldMapRequest, along0M: number, map: FieldMap): Mapped {
  const { values, columns, rows } = map;
  const [x0M, y0M] = [along0M, grid.origin[2]];
  return { quantity, grid: { x0M, y0M, stepM: grid.up[2], columns, rows, values } };
}

/** Screens what is shown and maps the field as they change; the map is coarse while things move and refined at rest. */
export function useLive(store: SheetStore): void {
  useEffect(() => {
    const begins = new WeakMap<FieldMapRequest, number>();
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
        const along0M = begins.get(request) ?? 0;
        const section = outcome.kind === "done" ? sectionOf(request, along0M, outcome.value) : null;
        store.update({ map: { ...map, section } });
      },
    });
    let document: PlanDocument | null = null;
    let mappedFor = "";
    let timer: ReturnType<typeof setTimeout> | undefined;

    const askSection = (shown: PlanDocument, { section, along0M }: Requests) => {
      begins.set(section, along0M);
      live.section(shown, section);
    };
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
      askSection(shown, requests);
      clearTimeout(timer);
      timer = setTimeout(() => {
        const finer = requestsOf(store.get(), fine);
        if (finer === null) return;
        live.map(finer.document, finer.level);
        askSection(finer.document, finer);
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
