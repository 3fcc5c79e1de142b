import { useCallback, type KeyboardEvent } from "react";
import { fitTo, panBy, zoomAt } from "~/sheet/view";
import type { SheetStore } from "../store";
import { planBounds } from "./plan-bounds";

/** Keys that a step takes; the browser keeps all others. */
const stepKeys = new Set([
  "ArrowLeft",
  "ArrowRight",
  "ArrowUp",
  "ArrowDown",
  "PageUp",
  "PageDown",
  "Enter",
  "Backspace",
  "Delete",
  "Escape",
  "d",
  "D",
]);

const panKeys: Readonly<Record<string, readonly [number, number]>> = {
  ArrowLeft: [60, 0],
  ArrowRight: [-60, 0],
  ArrowUp: [0, 60],
  ArrowDown: [0, -60],
};

export function zoomMiddle(store: SheetStore, factor: number): void {
  const { view, size } = store.get();
  store.update({ view: zoomAt(view, factor, [size.width / 2, size.height / 2]) });
}

export function fitView(store: SheetStore): void {
  const { size, session } = store.get();
  if (size.width > 0) store.update({ view: fitTo(planBounds(session.document), size) });
}

/** Keys while the drawing has the focus: view first, the running step gets the rest. */
export function useKeys(store: SheetStore): (event: KeyboardEvent) => void {
  return useCallback(
    (event) => {
      const { key } = event;
      const { session, view } = store.get();
      const pan = panKeys[key];
      const ctrl = event.ctrlKey || event.metaKey;
      if (ctrl && key.toLowerCase() !== "d") return;
      if (key === " ") event.preventDefault();
      else if (key === "+" || key === "=") zoomMiddle(store, 1.25);
      else if (key === "-") zoomMiddle(store, 0.8);
      else if (key === "0") fitView(store);
      else if (pan !== undefined && session.selection.length === 0) {
        event.preventDefault();
        store.update({ view: panBy(view, pan[0], pan[1]) });
      } else if (stepKeys.has(key)) {
        event.preventDefault();
        store.key(key, { shift: event.shiftKey, alt: event.altKey, ctrl });
      }
    },
    [store],
  );
}
