import { Button } from "~/components/ui/Button";
import { addCircuit } from "~/sheet/edits/circuits";
import { useDocument, useEditable, useSheetStore } from "../store";
import { CircuitRow } from "./CircuitRow";

const columns = [
  "Name",
  "Route",
  "Supply",
  "Current, A",
  "Frequency, Hz",
  "Basis",
  "Arrangement",
  "Spacing, mm",
  "Radius, mm",
];

export function CircuitsTable() {
  const store = useSheetStore();
  const editable = useEditable();
  const { circuits } = useDocument();
  return (
    <div className="grid gap-3">
      {circuits.length > 0 && (
        <div className="table-scroll">
          <table className="table">
            <caption className="sr-only">Circuits</caption>
            <thead>
              <tr>
                {columns.map((column) => (
                  <th key={column} scope="col">
                    {column}
                  </th>
                ))}
                {editable && (
                  <th scope="col">
                    <span className="sr-only">Delete</span>
                  </th>
                )}
              </tr>
            </thead>
            <tbody>
              {circuits.map((circuit) => (
                <CircuitRow key={circuit.id} circuit={circuit} />
              ))}
            </tbody>
          </table>
        </div>
      )}
      {circuits.length === 0 && <p className="text-sm text-muted">No circuit yet.</p>}
      {editable && (
        <Button
          small
          className="justify-self-start"
          onClick={() => {
            const added = addCircuit(store.get().session.document);
            store.edit("Add circuit", () => added.document, [{ kind: "circuit", id: added.circuitId }]);
          }}
        >
          Add a circuit
        </Button>
      )}
    </div>
  );
}
