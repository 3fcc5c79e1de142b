import { useEffect, useRef, type RefObject } from "react";
import type { Point2 } from "~/sheet/geometry";
import type { Modifiers } from "~/sheet/snapping";
import { panBy, toPlan, zoomAt } from "~/sheet/view";
import type { SheetStore } from "../store";

type Gesture =
  | { kind: "none" }
  | { kind: "pan"; at: Point2 }
  | { kind: "step" }
  | { kind: "touch"; fingers: Map<number, Point2>; moved: boolean };

const modifiersOf = (event: MouseEvent): Modifiers => ({
  shift: event.shiftKey,
  alt: event.altKey,
  ctrl: event.ctrlKey || event.metaKey,
});

/** Further than this a finger drags the plan, nearer it taps. */
const tapPx = 8;

const middle = (points: readonly Point2[]): Point2 => [
  points.reduce((sum, [x]) => sum + x, 0) / points.length,
  points.reduce((sum, [, y]) => sum + y, 0) / points.length,
];

const spread = ([a, b]: readonly Point2[]): number =>
  a === undefined || b === undefined ? 0 : Math.hypot(b[0] - a[0], b[1] - a[1]);

/** Mouse, pen, wheel and fingers on the drawing: panning and zooming here, everything else to the running step. */
export function useGestures(element: RefObject<HTMLElement | null>, store: SheetStore): void {
  const spaceHeld = useRef(false);
  useEffect(() => {
    const target = element.current;
    if (target === null) return;
    let gesture: Gesture = { kind: "none" };

    const placeOf = (event: MouseEvent): Point2 => {
      const box = target.getBoundingClientRect();
      return [event.clientX - box.left, event.clientY - box.top];
    };
    const inPlan = (event: MouseEvent): Point2 => toPlan(store.get().view, placeOf(event));
    const pan = (to: Point2, from: Point2) =>
      store.update({ view: panBy(store.get().view, to[0] - from[0], to[1] - from[1]) });

    const down = (event: PointerEvent) => {
      target.focus({ preventScroll: true });
      target.setPointerCapture(event.pointerId);
      if (event.pointerType === "touch") {
        const fingers = gesture.kind === "touch" ? gesture.fingers : new Map<number, Point2>();
        const moved = gesture.kind === "touch";
        fingers.set(event.pointerId, placeOf(event));
        gesture = { kind: "touch", fingers, moved };
        return;
      }
      if (event.button === 1 || (event.button === 0 && spaceHeld.current)) {
        event.preventDefault();
        gesture = { kind: "pan", at: placeOf(event) };
      } else if (event.button === 0) {
        gesture = { kind: "step" };
        store.pointer("press", inPlan(event), modifiersOf(event));
      }
    };

    const moveFingers = (event: PointerEvent, touch: Extract<Gesture, { kind: "touch" }>) => {
      const before = touch.fingers.get(event.pointerId);
      const at = placeOf(event);
      if (before === undefined) return;
      if (!touch.moved && Math.hypot(at[0] - before[0], at[1] - before[1]) < tapPx) return;
      const old = [...touch.fingers.values()];
      touch.fingers.set(event.pointerId, at);
      const now = [...touch.fingers.values()];
      touch.moved = true;
      pan(middle(now), middle(old));
      if (now.length === 2 && spread(old) > 0) {
        store.update({ view: zoomAt(store.get().view, spread(now) / spread(old), middle(now)) });
      }
    };

    const move = (event: PointerEvent) => {
      if (gesture.kind === "touch") moveFingers(event, gesture);
      else if (gesture.kind === "pan") {
        const at = placeOf(event);
        pan(at, gesture.at);
        gesture = { kind: "pan", at };
      } else {
        const pointM = inPlan(event);
        store.pointer(gesture.kind === "step" ? "drag" : "move", pointM, modifiersOf(event));
        store.update({ pointerM: pointM });
      }
    };

    const up = (event: PointerEvent) => {
      if (gesture.kind === "touch") {
        const tapped = !gesture.moved && gesture.fingers.size === 1;
        gesture.fingers.delete(event.pointerId);
        if (tapped) {
          store.pointer("press", inPlan(event), modifiersOf(event));
          store.pointer("release", inPlan(event), modifiersOf(event));
        }
        if (gesture.fingers.size === 0) gesture = { kind: "none" };
        return;
      }
      if (gesture.kind === "step") store.pointer("release", inPlan(event), modifiersOf(event));
      gesture = { kind: "none" };
    };

    const cancel = () => {
      if (gesture.kind === "step") store.key("Escape", { shift: false, alt: false, ctrl: false });
      gesture = { kind: "none" };
    };

    const wheel = (event: WheelEvent) => {
      event.preventDefault();
      const { view } = store.get();
      const pixels = event.deltaMode === WheelEvent.DOM_DELTA_LINE ? 16 : 1;
      if (event.ctrlKey || event.metaKey) {
        store.update({ view: zoomAt(view, Math.exp((-event.deltaY * pixels) / 300), placeOf(event)) });
      } else {
        const sideways = event.shiftKey && event.deltaX === 0;
        const [dx, dy] = sideways ? [event.deltaY, 0] : [event.deltaX, event.deltaY];
        store.update({ view: panBy(view, -dx * pixels, -dy * pixels) });
      }
    };

    const leave = () => store.update({ pointerM: null });
    // The press may have moved the focus to an input of the step; the browser would take it back here.
    const keepFocus = (event: MouseEvent) => event.preventDefault();
    const noMenu = (event: MouseEvent) => event.button === 1 && event.preventDefault();
    const keyDown = (event: KeyboardEvent) => {
      if (event.key === " " && document.activeElement === target) spaceHeld.current = true;
    };
    const keyUp = (event: KeyboardEvent) => {
      if (event.key === " ") spaceHeld.current = false;
    };

    const stop = new AbortController();
    const { signal } = stop;
    target.addEventListener("pointerdown", down, { signal });
    target.addEventListener("pointermove", move, { signal });
    target.addEventListener("pointerup", up, { signal });
    target.addEventListener("pointercancel", cancel, { signal });
    target.addEventListener("pointerleave", leave, { signal });
    target.addEventListener("mousedown", keepFocus, { signal });
    target.addEventListener("auxclick", noMenu, { signal });
    target.addEventListener("wheel", wheel, { passive: false, signal });
    addEventListener("keydown", keyDown, { signal });
    addEventListener("keyup", keyUp, { signal });
    return () => stop.abort();
  }, [element, store]);
}
