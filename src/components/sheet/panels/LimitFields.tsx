import { Button } from "~/components/ui/Button";
import type { Limit, Sensor } from "~/domain/plan-document/sensor";
import { limitKinds, limitTitles, newLimit } from "~/sheet/edits/sensor-kinds";
import { Choice } from "../inputs/Choice";
import { NumberField } from "../inputs/NumberField";
import type { ChangeSensor } from "./changes";

interface Props {
  sensor: Sensor;
  change: ChangeSensor;
  disabled: boolean;
  earthKnown: boolean;
}

/** What the sensor tolerates, one row for each limit. */
export function LimitFields({ sensor, change, disabled, earthKnown }: Props) {
  const set = (id: string, next: Limit) =>
    change("Limit", (present) => ({
      ...present,
      limits: present.limits.map((limit) => (limit.id === id ? { ...next, id } : limit)),
    }));
  const addable = limitKinds.filter((kind) => earthKnown || (kind !== "heading" && kind !== "range"));
  return (
    <fieldset className="grid gap-3">
      <legend className="mb-1 text-sm font-semibold">Limits</legend>
      {sensor.limits.map((limit) => (
        <div key={limit.id} className="grid gap-2 border-l-2 border-rule-strong pl-3">
          <div className="flex items-baseline justify-between gap-2">
            <span className="text-sm">{limitTitles[limit.kind]}</span>
            {!disabled && sensor.limits.length > 1 && (
              <Button
                small
                kind="quiet"
                aria-label={`Delete the limit ${limitTitles[limit.kind]}`}
                onClick={() =>
                  change("Limit", (present) => ({
                    ...present,
                    limits: present.limits.filter(({ id }) => id !== limit.id),
                  }))
                }
              >
                Delete
              </Button>
            )}
          </div>
          <LimitValue limit={limit} set={(next) => set(limit.id, next)} disabled={disabled} />
        </div>
      ))}
      {!disabled && (
        <Choice
          label="Add a limit"
          value=""
          options={[
            { value: "", label: "choose its kind" },
            ...addable.map((kind) => ({ value: kind, label: limitTitles[kind] })),
          ]}
          onChange={(kind) => {
            if (kind !== "")
              change("Limit", (present) => ({
                ...present,
                limits: [...present.limits, newLimit(kind, present.limits)],
              }));
          }}
        />
      )}
    </fieldset>
  );
}

function LimitValue({
  limit,
  set,
  disabled,
}: {
  limit: Limit;
  set: (next: Limit) => void;
  disabled: boolean;
}) {
  if (limit.kind === "heading") {
    return (
      <NumberField
        label="Limit"
        unit="°"
        above={0}
        most={180}
        value={limit.limitDeg}
        disabled={disabled}
        onChange={(limitDeg) => set({ ...limit, limitDeg })}
      />
    );
  }
  if (limit.kind === "gradient") {
    return (
      <NumberField
        label="Limit"
        unit="nT/m"
        perUnit={1e9}
        above={0}
        most={1}
        value={limit.limitTPerM}
        disabled={disabled}
        onChange={(limitTPerM) => set({ ...limit, limitTPerM })}
      />
    );
  }
  const field = (
    <NumberField
      label="Limit"
      unit="µT"
      perUnit={1e6}
      above={0}
      most={1}
      value={limit.limitT}
      disabled={disabled}
      onChange={(limitT) => set({ ...limit, limitT })}
    />
  );
  if (limit.kind !== "alternating") return field;
  const [lowHz, highHz] = limit.bandHz;
  return (
    <div className="grid grid-cols-2 gap-3">
      {field}
      <Choice
        label="Measured as"
        value={limit.measure}
        options={[
          { value: "rms", label: "rms" },
          { value: "peakToPeak", label: "peak to peak" },
        ]}
        disabled={disabled}
        onChange={(measure) => set({ ...limit, measure })}
      />
      <NumberField
        label="Band from"
        unit="Hz"
        least={0}
        most={highHz}
        value={lowHz}
        disabled={disabled}
        onChange={(low) => set({ ...limit, bandHz: [low, highHz] })}
      />
      <NumberField
        label="to"
        unit="Hz"
        least={Math.max(lowHz, 1e-6)}
        most={1e9}
        value={highHz}
        disabled={disabled}
        onChange={(high) => set({ ...limit, bandHz: [lowHz, high] })}
      />
    </div>
  );
}
