import { Button } from "~/components/ui/Button";
import { useSheetStore } from "../store";
import { fitView, zoomMiddle } from "./use-keys";

/** Zoom by buttons, for whoever has neither wheel nor keys. */
export function ZoomButtons() {
  const store = useSheetStore();
  return (
    <div role="group" aria-label="Zoom" className="absolute right-2 top-2 flex gap-1">
      <Button small aria-label="Zoom in" onClick={() => zoomMiddle(store, 1.25)}>
        +
      </Button>
      <Button small aria-label="Zoom out" onClick={() => zoomMiddle(store, 0.8)}>
        −
      </Button>
      <Button small onClick={() => fitView(store)}>
        Show all
      </Button>
    </div>
  );
}
