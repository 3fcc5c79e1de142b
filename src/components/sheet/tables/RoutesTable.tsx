import { Button } from "~/components/ui/Button";
import { freeName, newId } from "~/sheet/edits/ids";
import { pathLengthM } from "~/sheet/geometry";
import { removeRoute } from "~/sheet/edits/remove";
import { Vertices } from "../panels/VertexList";
import { useDocument, useEditable, useSheetStore } from "../store";
import { CellInput } from "./CellInput";

/** Where a route added here begins and ends until its vertices are typed. */
const newPath: [number, number, number][] = [
  [0, 0, 2.8],
  [1, 0, 2.8],
];

export function RoutesTable() {
  const store = useSheetStore();
  const editable = useEditable();
  const { routes, circuits } = useDocument();
  return (
    <div className="grid gap-3">
      {routes.length === 0 && <p className="text-sm text-muted">No route is drawn yet.</p>}
      {routes.map((route) => (
        <div key={route.id} className="border border-rule p-3" role="group" aria-label={route.name}>
          <div className="mb-2 flex flex-wrap items-center gap-3 text-sm">
            <div className="w-56">
              <CellInput
                label={`Name of route ${route.name}`}
                value={route.name}
                disabled={!editable}
                onCommit={(name) => {
                  if (name.length > 300) return "At most 300 letters.";
                  store.edit(`Name of ${route.name}`, (whole) => ({
                    ...whole,
                    routes: whole.routes.map((other) => (other.id === route.id ? { ...other, name } : other)),
                  }));
                  return null;
                }}
              />
            </div>
            <span className="text-muted">
              {pathLengthM(route.path).toFixed(2)} m, circuits:{" "}
              {circuits
                .filter((circuit) => circuit.route?.id === route.id)
                .map(({ name }) => name)
                .join(", ") || "none"}
            </span>
            {editable && (
              <Button
                small
                kind="quiet"
                aria-label={`Delete route ${route.name}`}
                onClick={() => store.edit(`Delete ${route.name}`, (whole) => removeRoute(whole, route.id))}
              >
                Delete
              </Button>
            )}
          </div>
          <Vertices owner={{ list: "routes", id: route.id }} name={route.name} open />
        </div>
      ))}
      {circuits
        .filter(({ path }) => path !== null)
        .map(({ id, name }) => (
          <div key={id} className="border border-rule p-3" role="group" aria-label={`Path of ${name}`}>
            <p className="mb-2 text-sm">
              <span className="font-semibold">{name}</span>{" "}
              <span className="text-muted">follows a path of its own</span>
            </p>
            <Vertices owner={{ list: "circuits", id }} name={name} open />
          </div>
        ))}
      {editable && (
        <Button
          small
          className="justify-self-start"
          onClick={() =>
            store.edit("Add route", (whole) => ({
              ...whole,
              routes: [
                ...whole.routes,
                { id: newId("r"), name: freeName("Route", whole.routes), path: newPath },
              ],
            }))
          }
        >
          Add a route
        </Button>
      )}
    </div>
  );
}
