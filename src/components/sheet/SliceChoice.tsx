import type { Slice, SliceThrough } from "~/sheet/slice";
import { useShownDocument, useSheet, useSheetStore } from "./store";

const keyOf = (through: SliceThrough): string =>
  through === null ? "view" : `${through.kind}/${through.id}`;

/** Says where the section stands, and lets it stand elsewhere. */
export function SliceChoice({ slice }: { slice: Slice }) {
  const store = useSheetStore();
  const through = useSheet((state) => state.sliceThrough);
  const { sensors, drawing } = useShownDocument();
  const sensor = through?.kind === "sensor" ? sensors.find(({ id }) => id === through.id) : undefined;
  const choices: { through: SliceThrough; label: string }[] = [
    { through: null, label: "the middle of the view" },
    ...(sensor === undefined
      ? []
      : [{ through: { kind: "sensor" as const, id: sensor.id }, label: sensor.name }]),
    ...(drawing.sectionLines ?? []).map(({ id, name }) => ({
      through: { kind: "section-line" as const, id },
      label: `section line ${name}`,
    })),
  ];
  const shown = slice.through === null ? "view" : keyOf(through);
  return (
    <p className="flex flex-wrap items-baseline gap-x-2 px-3 pt-1 text-xs text-muted">
      <label htmlFor="slice-through">Section through</label>
      <select
        id="slice-through"
        className="min-h-6 max-w-52 border-b border-rule-strong bg-raised text-ink"
        value={shown}
        onChange={(event) => {
          const chosen = choices.find((choice) => keyOf(choice.through) === event.target.value);
          if (chosen !== undefined) store.update({ sliceThrough: chosen.through });
        }}
      >
        {choices.map((choice) => (
          <option key={keyOf(choice.through)} value={keyOf(choice.through)}>
            {choice.label}
          </option>
        ))}
      </select>
      <span>
        {slice.line === null
          ? `at y = ${slice.origin[1].toFixed(2)} m. Select a sensor to slice through it.`
          : `${slice.line.toM.toFixed(2)} m long, from its beginning on the left.`}
      </span>
    </p>
  );
}
