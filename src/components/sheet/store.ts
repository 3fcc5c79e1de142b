import { createContext, use, useSyncExternalStore } from "react";
import type { EarthField } from "~/domain/plan-document/earth-field";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { ScreeningResult } from "~/domain/screening-result";
import type { FieldGrid } from "~/sheet/field-lines";
import type { Point2 } from "~/sheet/geometry";
import type { Selection } from "~/sheet/selection";
import * as sessions from "~/sheet/session";
import type { PointerEventKind, Session } from "~/sheet/session";
import { slicedBy, type SliceThrough } from "~/sheet/slice";
import { defaultSnap, type Modifiers, type SnapSettings } from "~/sheet/snapping";
import type { Step, Surroundings } from "~/sheet/steps/step";
import type { SizePx, View } from "~/sheet/view";

/** What the engine in the browser says of the document as it is shown. */
export type Live =
  | { kind: "waiting" }
  | { kind: "screened"; result: ScreeningResult }
  | { kind: "refused"; message: string; faults: readonly { path: string; message: string }[] };

export type MapQuantity = "static" | "alternating" | "heading";

export interface MapSettings {
  quantity: MapQuantity;
  heightM: number;
  /** Null takes the first load case, or the currents as entered where there is none. */
  loadCaseId: string | null;
}

export interface Mapped {
  grid: FieldGrid;
  quantity: MapQuantity;
}

export interface FieldMapState {
  /** Null while the map is off. */
  settings: MapSettings | null;
  /** What was last mapped, with the quantity that it shows. */
  mapped: Mapped | null;
  /** The same in the section: x across, z up. */
  section: Mapped | null;
  problem: string | null;
}

export interface SheetState {
  /** Which of the two ways to see the plan is on. */
  shown: "drawing" | "tables";
  /** False for whoever may only read, and on screens too small to draw on. */
  editable: boolean;
  session: Session;
  view: View;
  size: SizePx;
  snap: SnapSettings;
  /** The circuit that is lit on the drawing and in the ledger. */
  litId: string | null;
  /** The place under the pointer; null while it is elsewhere. */
  pointerM: Point2 | null;
  live: Live;
  map: FieldMapState;
  /** What the section goes through: the sensor or section line that was last selected. */
  sliceThrough: SliceThrough;
}

/** How near in pixels the pointer has to come to take hold of something. */
const reachPx = 10;

/** What the parts of the sheet share, outside React: each part re-renders only for what it reads. */
export class SheetStore {
  private state: SheetState;
  private readonly listeners = new Set<() => void>();

  constructor(
    session: Session,
    editable: boolean,
    private readonly siteEarth: EarthField | null,
    /** What the site calls its phases. */
    readonly phaseLabels: readonly string[],
  ) {
    this.state = {
      shown: "drawing",
      editable,
      session,
      view: { scale: 40, x: 40, y: 400 },
      size: { width: 0, height: 0 },
      snap: { ...defaultSnap, gridM: session.document.drawing.gridM ?? defaultSnap.gridM },
      litId: null,
      pointerM: null,
      live: { kind: "waiting" },
      sliceThrough: null,
      map: { settings: null, mapped: null, section: null, problem: null },
    };
  }

  readonly get = (): SheetState => this.state;

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  update(part: Partial<SheetState>): void {
    this.state = { ...this.state, ...part };
    for (const listener of this.listeners) listener();
  }

  private act(
    change: (session: Session, around: Omit<Surroundings, "document" | "selection">) => Session,
  ): void {
    const { session, snap, view, editable } = this.state;
    const changed = change(session, { snap, reachM: reachPx / view.scale, siteEarth: this.siteEarth });
    if (changed === session || (!editable && changed.document !== session.document)) return;
    const sliceThrough = changed.selection === session.selection ? null : slicedBy(changed.selection);
    this.update({ session: changed, ...(sliceThrough !== null && { sliceThrough }) });
  }

  pointer(kind: PointerEventKind, pointM: Point2, modifiers: Modifiers): void {
    if (kind === "drag" && !this.state.editable) return;
    this.act((session, around) => sessions.pointer(session, kind, pointM, modifiers, around));
  }

  key(key: string, modifiers: Modifiers): void {
    this.act((session, around) => sessions.keyPressed(session, key, modifiers, around));
  }

  type(inputId: string, text: string): void {
    this.act((session, around) => sessions.typed(session, inputId, text, around));
  }

  begin(begin: (around: Surroundings) => Step): void {
    this.update({ shown: "drawing" });
    this.act((session, around) => sessions.beginStep(session, begin, around));
  }

  select(selection: Selection): void {
    this.act((session) => sessions.select(session, selection));
  }

  /** An edit with its checkpoint; see `sessions.edit` for `joins`. */
  edit(
    label: string,
    change: (document: PlanDocument) => PlanDocument,
    selection?: Selection,
    joins?: string,
  ): void {
    this.act((session) => sessions.edit(session, label, change(session.document), selection, joins));
  }

  undo(): void {
    this.act(sessions.undoLast);
  }

  redo(): void {
    this.act(sessions.redoNext);
  }

  /** Takes in what was merged with somebody else's save. */
  adopt(document: PlanDocument): void {
    this.update({ session: sessions.adopt(this.state.session, document) });
  }

  light(litId: string | null): void {
    if (litId !== this.state.litId) this.update({ litId });
  }
}

export const SheetContext = createContext<SheetStore | null>(null);

export function useSheetStore(): SheetStore {
  const store = use(SheetContext);
  if (store === null) throw new Error("A part of the sheet stands outside it.");
  return store;
}

/** A part of the sheet's state; `select` must give the same object for the same state. */
export function useSheet<T>(select: (state: SheetState) => T): T {
  const store = useSheetStore();
  return useSyncExternalStore(store.subscribe, () => select(store.get()));
}

export const useDocument = (): PlanDocument => useSheet(({ session }) => session.document);

/** The document as the running drag would leave it. */
export const useShownDocument = (): PlanDocument =>
  useSheet(({ session }) => sessions.shownDocument(session));

export const useEditable = (): boolean => useSheet(({ editable }) => editable);

export const useSelection = (): Selection => useSheet(({ session }) => session.selection);
