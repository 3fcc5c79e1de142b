import type { EarthField } from "~/domain/plan-document/earth-field";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { usesEarthField } from "~/sheet/edits/sensors";
import { Choice } from "../inputs/Choice";
import { CommitField } from "../inputs/CommitField";
import { NumberField } from "../inputs/NumberField";
import { PlanFile } from "./PlanFile";
import { useDocument, useEditable, useSheetStore } from "../store";

type EarthMode = "none" | "model" | "stated";

/** A field to begin with when it is stated: about that of middle latitudes, to be replaced. */
const usualStated: EarthField = { mode: "stated", horizontalT: 1.9e-5, verticalT: 4.5e-5, declinationDeg: 0 };

/** What holds for the whole plan. */
export function PlanPanel({ siteEarth }: { siteEarth: EarthField | null }) {
  const store = useSheetStore();
  const document = useDocument();
  const disabled = !useEditable();
  const change = (label: string, part: Partial<PlanDocument>) =>
    store.edit(label, (whole) => ({ ...whole, ...part }));
  const { earthField } = document;
  const mode: EarthMode = earthField?.mode ?? "none";
  const needed = usesEarthField(document);
  const modes: { value: EarthMode; label: string }[] = [
    { value: "none", label: "none" },
    { value: "model", label: "World Magnetic Model at the site" },
    { value: "stated", label: "stated from a survey" },
  ];
  const choose = (next: EarthMode) => {
    if (next === "none") change("Earth’s field", { earthField: null });
    if (next === "stated") change("Earth’s field", { earthField: usualStated });
    if (next === "model" && siteEarth !== null) change("Earth’s field", { earthField: siteEarth });
  };
  return (
    <div className="grid gap-3">
      <CommitField
        label="Name of the plan"
        value={document.name}
        disabled={disabled}
        onCommit={(name) => {
          if (name.trim() === "" || name.length > 300) return "A name has 1 to 300 letters.";
          change("Name of the plan", { name: name.trim() });
          return null;
        }}
      />
      <NumberField
        label="North: true bearing up the sheet"
        unit="°"
        least={-360}
        most={360}
        value={document.frame.northBearingDeg}
        disabled={disabled}
        onChange={(northBearingDeg) => change("North", { frame: { northBearingDeg } })}
      />
      <Choice
        label="Unknown phase between sources"
        value={document.unknownPhase}
        options={[
          { value: "worst-case", label: "worst case: magnitudes add (upper bound)" },
          { value: "typical", label: "typical: root of the sum of squares" },
        ]}
        disabled={disabled}
        onChange={(unknownPhase) => change("Unknown phase", { unknownPhase })}
      />
      <Choice
        label="Earth’s field"
        value={mode}
        options={modes.filter(
          ({ value }) =>
            value === mode || !((value === "none" && needed) || (value === "model" && siteEarth === null)),
        )}
        hint={
          needed
            ? "Heading limits need it."
            : siteEarth === null
              ? "The site has no place on Earth yet; give it one on the site’s page to use the model."
              : undefined
        }
        disabled={disabled}
        onChange={choose}
      />
      {earthField !== null && (
        <EarthFields
          earthField={earthField}
          disabled={disabled}
          onChange={(next) => change("Earth’s field", { earthField: next })}
        />
      )}
      <PlanFile />
    </div>
  );
}

interface EarthProps {
  earthField: EarthField;
  disabled: boolean;
  onChange: (next: EarthField) => void;
}

function EarthFields({ earthField, disabled, onChange }: EarthProps) {
  if (earthField.mode === "model") {
    const { latitudeDeg, longitudeDeg, altitudeM, date } = earthField;
    return (
      <div className="grid grid-cols-2 gap-3">
        <NumberField
          label="Latitude"
          unit="°"
          least={-90}
          most={90}
          value={latitudeDeg}
          disabled={disabled}
          onChange={(value) => onChange({ ...earthField, latitudeDeg: value })}
        />
        <NumberField
          label="Longitude"
          unit="°"
          least={-180}
          most={360}
          value={longitudeDeg}
          disabled={disabled}
          onChange={(value) => onChange({ ...earthField, longitudeDeg: value })}
        />
        <NumberField
          label="Altitude"
          unit="m"
          least={-10_000}
          most={850_000}
          value={altitudeM}
          disabled={disabled}
          onChange={(value) => onChange({ ...earthField, altitudeM: value })}
        />
        <CommitField
          label="Date of the model"
          value={date}
          disabled={disabled}
          hint="year-month-day"
          onCommit={(text) => {
            if (!/^\d{4}-\d{2}-\d{2}$/.test(text) || Number.isNaN(Date.parse(text)))
              return "Type a date such as 2026-12-01.";
            onChange({ ...earthField, date: text });
            return null;
          }}
        />
      </div>
    );
  }
  const { horizontalT, verticalT, declinationDeg } = earthField;
  return (
    <div className="grid grid-cols-2 gap-3">
      <NumberField
        label="Horizontal"
        unit="µT"
        perUnit={1e6}
        above={0}
        most={1}
        value={horizontalT}
        disabled={disabled}
        onChange={(value) => onChange({ ...earthField, horizontalT: value })}
      />
      <NumberField
        label="Vertical, down"
        unit="µT"
        perUnit={1e6}
        least={-1}
        most={1}
        value={verticalT}
        disabled={disabled}
        onChange={(value) => onChange({ ...earthField, verticalT: value })}
      />
      <NumberField
        label="Declination, east"
        unit="°"
        least={-180}
        most={180}
        value={declinationDeg}
        disabled={disabled}
        onChange={(value) => onChange({ ...earthField, declinationDeg: value })}
      />
    </div>
  );
}
