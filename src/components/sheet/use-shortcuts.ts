import { useEffect } from "react";
import type { SheetStore } from "./store";

const isText = (target: EventTarget | null): boolean =>
  target instanceof HTMLInputElement ||
  target instanceof HTMLTextAreaElement ||
  target instanceof HTMLSelectElement;

/** Ctrl+Z and its like anywhere on the sheet but in a text, which has an undo of its own. */
export function useShortcuts(store: SheetStore): void {
  useEffect(() => {
    const pressed = (event: KeyboardEvent) => {
      if (!(event.ctrlKey || event.metaKey) || isText(event.target)) return;
      const key = event.key.toLowerCase();
      const isRedo = key === "y" || (key === "z" && event.shiftKey);
      if (key !== "z" && !isRedo) return;
      event.preventDefault();
      if (isRedo) store.redo();
      else store.undo();
    };
    addEventListener("keydown", pressed);
    return () => removeEventListener("keydown", pressed);
  }, [store]);
}
