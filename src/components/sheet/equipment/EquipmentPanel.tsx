import { Button } from "~/components/ui/Button";
import type { Equipment } from "~/domain/plan-document/equipment";
import { axisOf, equipmentTitles, updateEquipment, withAxis } from "~/sheet/edits/equipment";
import { removeEquipment } from "~/sheet/edits/remove";
import { CommitField } from "../inputs/CommitField";
import { NumberField } from "../inputs/NumberField";
import { DirectionFields } from "../panels/DirectionFields";
import { PositionFields } from "../panels/PositionFields";
import { SourceFields } from "../panels/SourceFields";
import { useEditable, useSheetStore } from "../store";
import { DipoleFields, WindingFields } from "./KindFields";

/** All that the plan says of a piece of equipment. */
export function EquipmentPanel({ item }: { item: Equipment }) {
  const store = useSheetStore();
  const disabled = !useEditable();
  const change = (label: string, how: (present: Equipment) => Equipment) =>
    store.edit(`${label} of ${item.name}`, (whole) => updateEquipment(whole, item.id, how));
  return (
    <div className="grid gap-3">
      <p className="text-sm text-muted">{equipmentTitles[item.kind]}</p>
      <CommitField
        label="Name"
        value={item.name}
        disabled={disabled}
        onCommit={(name) => {
          if (name.length > 300) return "A name has at most 300 letters.";
          change("Name", (present) => ({ ...present, name }));
          return null;
        }}
      />
      <PositionFields
        legend="Its middle"
        position={item.centre}
        disabled={disabled}
        onChange={(centre) => change("Position", (present) => ({ ...present, centre }))}
      />
      {item.kind === "dipole" ? (
        <DipoleFields item={item} change={change} disabled={disabled} />
      ) : (
        <WindingFields item={item} change={change} disabled={disabled} />
      )}
      <DirectionFields
        label={item.kind === "dipole" ? "Direction of the dipole" : "Axis"}
        direction={axisOf(item) as [number, number, number] | null}
        noneLabel={item.kind === "dipole" ? "not known: the worst one counts" : undefined}
        hint={
          item.kind === "dipole"
            ? undefined
            : "Seen along it, the turns run clockwise with a current above zero."
        }
        disabled={disabled}
        onChange={(axis) => change("Axis", (present) => withAxis(present, axis))}
      />
      <NumberField
        label={item.kind === "dipole" ? "Tolerance of the reading" : "Tolerance of the current"}
        unit="%"
        least={0}
        most={1000}
        value={item.tolerancePercent}
        disabled={disabled}
        onChange={(tolerancePercent) => change("Tolerance", (present) => ({ ...present, tolerancePercent }))}
      />
      <SourceFields
        source={item.source}
        shieldingFactor={item.shieldingFactor}
        disabled={disabled}
        onSource={(source) => change("Source", (present) => ({ ...present, source }))}
        onShielding={(shieldingFactor) =>
          change("Shielding factor", (present) => ({ ...present, shieldingFactor }))
        }
      />
      {!disabled && (
        <Button
          small
          kind="danger"
          className="justify-self-start"
          onClick={() => store.edit(`Delete ${item.name}`, (whole) => removeEquipment(whole, [item.id]), [])}
        >
          Delete equipment
        </Button>
      )}
    </div>
  );
}
