import { Button } from "~/components/ui/Button";
import type { Equipment } from "~/domain/plan-document/equipment";
import { driveWords, equipmentWords, updateEquipment } from "~/sheet/edits/equipment";
import { removeEquipment } from "~/sheet/edits/remove";
import { readNumber, numberText } from "~/sheet/read-number";
import { useDocument, useEditable, useSheetStore } from "../store";
import { AddEquipment } from "./AddEquipment";
import { CellInput } from "./CellInput";
import { PositionCells, positionColumns } from "./PositionCells";

const columns = ["Name", "Kind", ...positionColumns, "Current, A", "What it is", "Tolerance, %"];

export function EquipmentTable() {
  const editable = useEditable();
  const { equipment } = useDocument();
  return (
    <div className="grid gap-3">
      {equipment.length === 0 ? (
        <p className="text-sm text-muted">No equipment is placed yet.</p>
      ) : (
        <div className="table-scroll">
          <table className="table">
            <caption className="sr-only">Equipment, positions of its middle in metres</caption>
            <thead>
              <tr>
                {columns.map((column) => (
                  <th key={column} scope="col">
                    {column}
                  </th>
                ))}
                {editable && (
                  <th scope="col">
                    <span className="sr-only">Edit</span>
                  </th>
                )}
              </tr>
            </thead>
            <tbody>
              {equipment.map((item) => (
                <Row key={item.id} item={item} />
              ))}
            </tbody>
          </table>
        </div>
      )}
      {editable && <AddEquipment />}
    </div>
  );
}

function Row({ item }: { item: Equipment }) {
  const store = useSheetStore();
  const disabled = !useEditable();
  const { name } = item;
  const change = (label: string, how: (present: Equipment) => Equipment) =>
    store.edit(`${label} of ${name}`, (whole) => updateEquipment(whole, item.id, how));
  return (
    <tr>
      <th scope="row">
        <CellInput
          label={`Name of equipment ${name}`}
          value={name}
          disabled={disabled}
          onCommit={(text) => {
            if (text.length > 300) return "At most 300 letters.";
            change("Name", (present) => ({ ...present, name: text }));
            return null;
          }}
        />
      </th>
      <td>{equipmentWords[item.kind]}</td>
      <PositionCells
        name={name}
        position={item.centre}
        disabled={disabled}
        onChange={(centre) => change("Position", (present) => ({ ...present, centre }))}
      />
      <td>
        {item.kind === "dipole" ? (
          <span className="text-muted">none</span>
        ) : (
          <CellInput
            label={`Current of ${name}, A`}
            value={numberText(item.supply.currentA)}
            numeric
            disabled={disabled}
            onCommit={(text) => {
              const currentA = readNumber(text);
              const leastA = item.supply.kind === "dc" ? -1e6 : 0;
              if (currentA === null || currentA < leastA || currentA > 1e6)
                return leastA === 0 ? "0 to a million amperes, rms." : "Amperes, up to a million.";
              change("Current", (present) =>
                present.kind === "dipole" ? present : { ...present, supply: { ...present.supply, currentA } },
              );
              return null;
            }}
          />
        )}
      </td>
      <td>{driveWords(item)}</td>
      <td>
        <CellInput
          label={`Tolerance of ${name}, %`}
          value={numberText(item.tolerancePercent)}
          numeric
          disabled={disabled}
          onCommit={(text) => {
            const tolerancePercent = readNumber(text);
            if (tolerancePercent === null || tolerancePercent < 0 || tolerancePercent > 1000)
              return "0 to 1000 %.";
            change("Tolerance", (present) => ({ ...present, tolerancePercent }));
            return null;
          }}
        />
      </td>
      {!disabled && (
        <td className="whitespace-nowrap">
          <Button
            small
            kind="quiet"
            aria-label={`Select ${name} to edit all of it`}
            onClick={() => store.select([{ kind: "equipment", id: item.id }])}
          >
            Select
          </Button>
          <Button
            small
            kind="quiet"
            aria-label={`Delete equipment ${name}`}
            onClick={() => store.edit(`Delete ${name}`, (whole) => removeEquipment(whole, [item.id]))}
          >
            Delete
          </Button>
        </td>
      )}
    </tr>
  );
}
