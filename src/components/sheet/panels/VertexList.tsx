import { Button } from "~/components/ui/Button";
import type { Circuit } from "~/domain/plan-document/circuit";
import {
  insertVertex,
  ownerOfCircuit,
  pathOf,
  removeVertex,
  withPath,
  withVertex,
  type PathOwner,
} from "~/sheet/edits/paths";
import type { Point3 } from "~/sheet/geometry";
import { readNumber } from "~/sheet/read-number";
import { CellInput } from "../tables/CellInput";
import { useDocument, useEditable, useSheetStore } from "../store";

/** The vertices of the path that a circuit follows. */
export function VertexList({ circuit }: { circuit: Circuit }) {
  const owner = ownerOfCircuit(circuit);
  return owner === null ? null : <Vertices owner={owner} name={circuit.name} />;
}

const axes = ["x", "y", "z"] as const;

export function Vertices({ owner, name, open = false }: { owner: PathOwner; name: string; open?: boolean }) {
  const store = useSheetStore();
  const editable = useEditable();
  const path = pathOf(useDocument(), owner);
  if (path === null) return null;
  const middle = (index: number): Point3 => {
    const [a, b] = [path[index] as Point3, path[index + 1] ?? (path[index] as Point3)];
    return [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2, (a[2] + b[2]) / 2];
  };
  return (
    <details open={open}>
      <summary className="text-sm font-semibold">{path.length} vertices</summary>
      <table className="table mt-1">
        <caption className="sr-only">Vertices of {name}, metres</caption>
        <thead>
          <tr>
            <th scope="col">no.</th>
            {axes.map((axis) => (
              <th key={axis} scope="col">
                {axis}, m
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
          {path.map((vertex, index) => (
            <tr key={index}>
              <th scope="row">{index + 1}</th>
              {axes.map((axis, at) => (
                <td key={axis}>
                  <CellInput
                    label={`${axis} of vertex ${index + 1} of ${name}`}
                    value={String(vertex[at])}
                    numeric
                    disabled={!editable}
                    onCommit={(text) => {
                      const valueM = readNumber(text);
                      if (valueM === null || Math.abs(valueM) > 100_000) return "Type metres.";
                      const to = vertex.map((present, i) => (i === at ? valueM : present));
                      store.edit(`Vertex ${index + 1} of ${name}`, (whole) =>
                        withVertex(whole, owner, index, to as unknown as Point3),
                      );
                      return null;
                    }}
                  />
                </td>
              ))}
              {editable && (
                <td className="whitespace-nowrap">
                  <Button
                    small
                    kind="quiet"
                    aria-label={`Insert a vertex after vertex ${index + 1} of ${name}`}
                    disabled={index === path.length - 1}
                    onClick={() =>
                      store.edit("Insert vertex", (whole) => insertVertex(whole, owner, index, middle(index)))
                    }
                  >
                    Insert
                  </Button>
                  <Button
                    small
                    kind="quiet"
                    aria-label={`Delete vertex ${index + 1} of ${name}`}
                    disabled={path.length <= 2}
                    onClick={() => store.edit("Delete vertex", (whole) => removeVertex(whole, owner, index))}
                  >
                    Delete
                  </Button>
                </td>
              )}
            </tr>
          ))}
        </tbody>
      </table>
      {editable && (
        <Button
          small
          className="mt-2"
          onClick={() => {
            const [before, last] = [path.at(-2), path.at(-1)];
            if (before === undefined || last === undefined) return;
            const next: Point3 = [2 * last[0] - before[0], 2 * last[1] - before[1], 2 * last[2] - before[2]];
            store.edit("Add vertex", (whole) => withPath(whole, owner, [...path, next]));
          }}
        >
          Add a vertex at the end
        </Button>
      )}
    </details>
  );
}
