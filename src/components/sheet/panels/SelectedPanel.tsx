import { Button } from "~/components/ui/Button";
import { aidOf } from "~/sheet/edits/aids";
import { duplicateSelection, removeSelection } from "~/sheet/edits/arrange";
import { addCircuitToRoute } from "~/sheet/edits/circuits";
import { removeRoute } from "~/sheet/edits/remove";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { itemOfPath, type SelectedItem } from "~/sheet/selection";
import { CommitField } from "../inputs/CommitField";
import { useDocument, useEditable, useSelection, useSheetStore } from "../store";
import { EquipmentPanel } from "../equipment/EquipmentPanel";
import { AidPanel } from "./AidPanel";
import { CircuitPanel } from "./CircuitPanel";
import { SensorPanel } from "./SensorPanel";
import { Vertices } from "./VertexList";

/** What a selected vertex belongs to stands for it. */
const shownItem = (document: PlanDocument, item: SelectedItem): SelectedItem =>
  item.kind === "vertex" ? itemOfPath(document, item.owner) : item;

export function SelectedPanel() {
  const selection = useSelection();
  const document = useDocument();
  const [first] = selection;
  if (first === undefined) return <p className="text-sm text-muted">Nothing is selected.</p>;
  if (selection.length > 1) return <SeveralPanel count={selection.length} />;
  const item = shownItem(document, first);
  if (item.kind === "sensor") {
    const sensor = document.sensors.find(({ id }) => id === item.id);
    return sensor === undefined ? null : <SensorPanel key={sensor.id} sensor={sensor} />;
  }
  if (item.kind === "aid") {
    const aid = aidOf(document, item.aid, item.id);
    return aid === undefined ? null : <AidPanel key={`${aid.kind}/${aid.id}`} aid={aid} />;
  }
  if (item.kind === "equipment") {
    const found = document.equipment.find(({ id }) => id === item.id);
    return found === undefined ? null : <EquipmentPanel key={found.id} item={found} />;
  }
  if (item.kind === "circuit") {
    const circuit = document.circuits.find(({ id }) => id === item.id);
    return circuit === undefined ? null : <CircuitPanel key={circuit.id} circuit={circuit} />;
  }
  const route = item.kind === "route" ? document.routes.find(({ id }) => id === item.id) : undefined;
  return route === undefined ? null : <RoutePanel key={route.id} route={route} />;
}

function SeveralPanel({ count }: { count: number }) {
  const store = useSheetStore();
  const document = useDocument();
  const selection = useSelection();
  const editable = useEditable();
  return (
    <div className="grid gap-3 text-sm">
      <p>{count} things are selected. Drag one of them or use the arrow keys to move all.</p>
      {editable && (
        <div className="flex gap-2">
          <Button
            small
            onClick={() => {
              const { document: grown, copies } = duplicateSelection(document, selection);
              store.edit("Duplicate", () => grown, copies);
            }}
          >
            Duplicate
          </Button>
          <Button
            small
            kind="danger"
            onClick={() => store.edit("Delete", (whole) => removeSelection(whole, selection), [])}
          >
            Delete
          </Button>
        </div>
      )}
    </div>
  );
}

function RoutePanel({ route }: { route: PlanDocument["routes"][number] }) {
  const store = useSheetStore();
  const document = useDocument();
  const editable = useEditable();
  const inside = document.circuits.filter((circuit) => circuit.route?.id === route.id);
  return (
    <div className="grid gap-3">
      <CommitField
        label="Name of the route"
        value={route.name}
        disabled={!editable}
        onCommit={(name) => {
          if (name.length > 300) return "A name has at most 300 letters.";
          store.edit(`Name of ${route.name}`, (whole) => ({
            ...whole,
            routes: whole.routes.map((other) => (other.id === route.id ? { ...other, name } : other)),
          }));
          return null;
        }}
      />
      <p className="text-sm font-semibold">Circuits in it</p>
      <ul className="grid gap-1 text-sm">
        {inside.map(({ id, name }) => (
          <li key={id}>
            <button
              type="button"
              className="min-h-6 cursor-pointer underline"
              onClick={() => store.select([{ kind: "circuit", id }])}
            >
              {name}
            </button>
          </li>
        ))}
        {inside.length === 0 && <li className="text-muted">none yet</li>}
      </ul>
      <Vertices owner={{ list: "routes", id: route.id }} name={route.name} />
      {editable && (
        <div className="flex flex-wrap gap-2">
          <Button
            small
            onClick={() => {
              const added = addCircuitToRoute(document, route.id);
              store.edit("Add circuit to the route", () => added.document, [
                { kind: "circuit", id: added.circuitId },
              ]);
            }}
          >
            Add a circuit to this route
          </Button>
          <Button
            small
            kind="danger"
            onClick={() => store.edit(`Delete ${route.name}`, (whole) => removeRoute(whole, route.id), [])}
          >
            Delete route
          </Button>
        </div>
      )}
    </div>
  );
}
