import { Choice } from "../inputs/Choice";
import { NumberField } from "../inputs/NumberField";
import {
  useDocument,
  useSelection,
  useSheet,
  useSheetStore,
  type MapQuantity,
  type MapSettings,
} from "../store";
import { useMapLimit, levelText } from "./use-field-map";
import { limitValue } from "~/domain/plan-document/sensor";

const quantities: readonly { value: MapQuantity | "off"; label: string }[] = [
  { value: "off", label: "no map" },
  { value: "static", label: "static field (DC)" },
  { value: "alternating", label: "alternating field (AC, rms)" },
  { value: "heading", label: "heading error" },
];

/** Where a map lies while no sensor is selected: on a bench. */
const usualHeightM = 1.1;

/** What the contour lines on the drawing show. */
export function MapPanel() {
  const store = useSheetStore();
  const document = useDocument();
  const selection = useSelection();
  const { settings, problem } = useSheet((state) => state.map);
  const limit = useMapLimit();
  const [selected] = selection.filter((item) => item.kind === "sensor");
  const selectedHeightM = document.sensors.find(({ id }) => id === selected?.id)?.position[2];
  const set = (next: MapSettings | null) =>
    store.update({
      map: {
        ...store.get().map,
        settings: next,
        problem: null,
        ...(next?.quantity !== settings?.quantity && { mapped: null, section: null }),
      },
    });
  /** The load case that governs the selected sensor, so that map and ledger say the same of it. */
  const governingCase = (quantity: MapQuantity): string | null => {
    const { live } = store.get();
    const result =
      live.kind === "screened" ? live.result.sensors.find(({ id }) => id === selected?.id) : undefined;
    return result?.findings.find(({ kind }) => kind === quantity)?.loadCaseId ?? null;
  };
  const noEarth = document.earthField === null;
  return (
    <div className="grid gap-3">
      <Choice
        label="Field map"
        value={settings?.quantity ?? "off"}
        options={noEarth ? quantities.filter(({ value }) => value !== "heading") : quantities}
        hint={noEarth ? "A heading error needs the Earth’s field: state it under Plan." : undefined}
        onChange={(quantity) =>
          set(
            quantity === "off"
              ? null
              : {
                  heightM: selectedHeightM ?? settings?.heightM ?? usualHeightM,
                  loadCaseId: governingCase(quantity) ?? settings?.loadCaseId ?? null,
                  quantity,
                },
          )
        }
      />
      {settings !== null && (
        <>
          <NumberField
            label="Height of the map"
            unit="m"
            value={settings.heightM}
            onChange={(heightM) => set({ ...settings, heightM })}
          />
          {document.loadCases.length > 0 && (
            <Choice
              label="Load case"
              value={settings.loadCaseId ?? document.loadCases[0]?.id ?? ""}
              options={document.loadCases.map(({ id, name }) => ({ value: id, label: name }))}
              onChange={(loadCaseId) => set({ ...settings, loadCaseId })}
            />
          )}
          <p className="text-xs text-muted">
            {limit === null
              ? "Select a sensor with a limit of this kind to see where that limit is exceeded."
              : `The heavy line is the selected sensor’s limit, ${levelText(limitValue(limit), settings.quantity)}; the hatched side is to be kept out of.`}
          </p>
          {problem !== null && (
            <p className="message message-undecided" role="status">
              {problem}
            </p>
          )}
        </>
      )}
    </div>
  );
}
