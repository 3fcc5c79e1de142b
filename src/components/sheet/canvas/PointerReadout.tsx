import { useMapValue } from "../map/use-field-map";
import { useSheet } from "../store";
import { ScaleBar } from "./ScaleBar";

/** Where the pointer is, and the field there while the map is on. */
export function PointerReadout() {
  const pointerM = useSheet((state) => state.pointerM);
  const value = useMapValue(pointerM);
  return (
    <div className="pointer-events-none absolute bottom-2 left-3 flex items-end gap-4 text-sm">
      <ScaleBar />
      {pointerM !== null && (
        <p className="bg-paper/85 px-1" data-testid="pointer-readout">
          x {pointerM[0].toFixed(2)} m, y {pointerM[1].toFixed(2)} m{value !== null && <>: {value}</>}
        </p>
      )}
    </div>
  );
}
