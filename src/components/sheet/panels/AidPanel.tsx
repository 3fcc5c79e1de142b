import { Button } from "~/components/ui/Button";
import { aidTitles, hasHeight, removeAid, withAid, type Aid } from "~/sheet/edits/aids";
import type { Point3 } from "~/sheet/geometry";
import { readNumber } from "~/sheet/read-number";
import { CommitField } from "../inputs/CommitField";
import { CellInput } from "../tables/CellInput";
import { useEditable, useSheetStore } from "../store";

/** Name and points of what people work by. */
export function AidPanel({ aid }: { aid: Aid }) {
  const store = useSheetStore();
  const disabled = !useEditable();
  const title = aidTitles[aid.kind];
  const change = (label: string, next: Aid) =>
    store.edit(`${label} of ${aid.name}`, (whole) => withAid(whole, next));
  const axes = hasHeight(aid.kind) ? (["x", "y", "z"] as const) : (["x", "y"] as const);
  return (
    <div className="grid gap-3">
      <p className="text-sm text-muted">{title}</p>
      <CommitField
        label="Name"
        value={aid.name}
        disabled={disabled}
        onCommit={(name) => {
          if (name.length > 300) return "A name has at most 300 letters.";
          change("Name", { ...aid, name });
          return null;
        }}
      />
      <table className="table">
        <caption className="sr-only">Points of {aid.name}, metres</caption>
        <thead>
          <tr>
            <th scope="col">no.</th>
            {axes.map((axis) => (
              <th key={axis} scope="col">
                {axis}, m
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {aid.points.map((point, index) => (
            <tr key={index}>
              <th scope="row">{index + 1}</th>
              {axes.map((axis, at) => (
                <td key={axis}>
                  <CellInput
                    label={`${axis} of point ${index + 1} of ${aid.name}`}
                    value={String(point[at])}
                    numeric
                    disabled={disabled}
                    onCommit={(text) => {
                      const valueM = readNumber(text);
                      if (valueM === null || Math.abs(valueM) > 100_000) return "Type metres.";
                      const moved = point.map((old, i) => (i === at ? valueM : old)) as unknown as Point3;
                      const points = aid.points.map((other, i) => (i === index ? moved : other));
                      change("Point", { ...aid, points });
                      return null;
                    }}
                  />
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
      {!disabled && (
        <Button
          small
          kind="danger"
          className="justify-self-start"
          onClick={() => store.edit(`Delete ${aid.name}`, (whole) => removeAid(whole, aid.kind, aid.id), [])}
        >
          Delete {title.toLowerCase()}
        </Button>
      )}
    </div>
  );
}
