import type { Coil, Dipole, Equipment, Toroid } from "~/domain/plan-document/equipment";
import { Choice } from "../inputs/Choice";
import { NumberField } from "../inputs/NumberField";
import { SingleSupplyFields } from "../panels/SingleSupplyFields";

type Change = (label: string, how: (present: Equipment) => Equipment) => void;

interface Props<T> {
  item: T;
  change: Change;
  disabled: boolean;
}

/** Turns, size and supply of a coil or toroid. */
export function WindingFields({ item, change, disabled }: Props<Coil | Toroid>) {
  return (
    <>
      <div className="grid grid-cols-2 gap-3">
        <NumberField
          label="Turns"
          least={1}
          most={10_000}
          whole
          value={item.turns}
          disabled={disabled}
          onChange={(turns) => change("Turns", () => ({ ...item, turns }))}
        />
        {item.kind === "coil" ? (
          <CoilSize item={item} change={change} disabled={disabled} />
        ) : (
          <ToroidSize item={item} change={change} disabled={disabled} />
        )}
      </div>
      <SingleSupplyFields
        of={item.name}
        supply={item.supply}
        disabled={disabled}
        onChange={(supply) => change("Supply", () => ({ ...item, supply }))}
      />
    </>
  );
}

function CoilSize({ item, change, disabled }: Props<Coil>) {
  return (
    <>
      <NumberField
        label="Radius"
        unit="m"
        above={0}
        most={100}
        value={item.radiusM}
        disabled={disabled}
        onChange={(radiusM) => change("Radius", () => ({ ...item, radiusM }))}
      />
      <NumberField
        label="Length along its axis"
        unit="m"
        least={0}
        most={1000}
        value={item.lengthM}
        disabled={disabled}
        onChange={(lengthM) => change("Length", () => ({ ...item, lengthM }))}
      />
    </>
  );
}

function ToroidSize({ item, change, disabled }: Props<Toroid>) {
  return (
    <>
      <NumberField
        label="Mean radius of the ring"
        unit="m"
        above={item.minorRadiusM}
        most={100}
        value={item.meanRadiusM}
        disabled={disabled}
        onChange={(meanRadiusM) => change("Mean radius", () => ({ ...item, meanRadiusM }))}
      />
      <NumberField
        label="Minor radius"
        unit="m"
        above={0}
        below={item.meanRadiusM}
        value={item.minorRadiusM}
        disabled={disabled}
        onChange={(minorRadiusM) => change("Minor radius", () => ({ ...item, minorRadiusM }))}
      />
      <Choice
        label="Way round the ring"
        value={item.compensated ? "yes" : "no"}
        options={[
          { value: "no", label: "wound once round: acts as one turn" },
          { value: "yes", label: "led back: no field outside" },
        ]}
        disabled={disabled}
        onChange={(chosen) => change("Compensation", () => ({ ...item, compensated: chosen === "yes" }))}
      />
    </>
  );
}

/** The one reading that a dipole is known by. */
export function DipoleFields({ item, change, disabled }: Props<Dipole>) {
  const { reading } = item;
  return (
    <div className="grid grid-cols-2 gap-3">
      <NumberField
        label="Read at, from its middle"
        unit="m"
        above={0}
        most={1000}
        value={reading.distanceM}
        disabled={disabled}
        onChange={(distanceM) => change("Reading", () => ({ ...item, reading: { ...reading, distanceM } }))}
      />
      <NumberField
        label="Field read there"
        unit="µT"
        perUnit={1e6}
        least={0}
        most={100}
        value={reading.fieldT}
        hint="The largest at that distance. Rms where it alternates."
        disabled={disabled}
        onChange={(fieldT) => change("Reading", () => ({ ...item, reading: { ...reading, fieldT } }))}
      />
      <NumberField
        label="Frequency, 0 for DC"
        unit="Hz"
        least={0}
        most={1e9}
        value={item.frequencyHz}
        disabled={disabled}
        onChange={(frequencyHz) => change("Frequency", () => ({ ...item, frequencyHz }))}
      />
    </div>
  );
}
