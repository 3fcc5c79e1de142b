import { useSheet, useSheetStore } from "./store";

const grids = [0, 0.01, 0.05, 0.1, 0.25, 0.5, 1];

/** What the pointer holds on to; Alt lets go of everything, Shift holds a right angle from anywhere. */
export function SnapInputs() {
  const store = useSheetStore();
  const snap = useSheet((state) => state.snap);
  const box = (label: string, key: "vertices" | "rightAngles") => (
    <label className="flex min-h-8 items-center gap-1 text-xs">
      <input
        type="checkbox"
        className="checkbox"
        checked={snap[key]}
        onChange={(event) => store.update({ snap: { ...snap, [key]: event.target.checked } })}
      />
      {label}
    </label>
  );
  return (
    <fieldset className="flex flex-wrap items-center gap-x-3">
      <legend className="sr-only">Snap to (Alt suspends it, Shift holds a right angle)</legend>
      <span className="text-xs font-semibold" aria-hidden="true">
        Snap to
      </span>
      {box("vertices", "vertices")}
      {box("right angles", "rightAngles")}
      <label className="flex min-h-8 items-center gap-1 text-xs">
        grid
        <select
          className="input input-small w-auto"
          value={snap.gridM}
          onChange={(event) => {
            const gridM = Number(event.target.value);
            store.update({ snap: { ...snap, gridM } });
          }}
        >
          {grids.map((gridM) => (
            <option key={gridM} value={gridM}>
              {gridM === 0 ? "off" : `${gridM} m`}
            </option>
          ))}
        </select>
      </label>
    </fieldset>
  );
}
