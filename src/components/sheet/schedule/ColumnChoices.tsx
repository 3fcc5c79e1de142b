import { columnNames, type ColumnMapping, type ColumnName } from "~/sheet/cable-schedule/columns";
import { Choice } from "../inputs/Choice";

const titles: Record<ColumnName, string> = {
  tag: "Tag",
  from: "From",
  to: "To",
  cores: "Cores",
  size: "Size, mm²",
  load: "Load, A",
};

interface Props {
  headings: readonly string[];
  columns: number;
  mapping: ColumnMapping;
  onChange: (mapping: ColumnMapping) => void;
}

/** Which column of the table holds what. */
export function ColumnChoices({ headings, columns, mapping, onChange }: Props) {
  const options = [
    { value: "", label: "not there" },
    ...Array.from({ length: columns }, (_, column) => ({
      value: String(column),
      label: headings[column] || `column ${column + 1}`,
    })),
  ];
  return (
    <fieldset>
      <legend className="mb-1 font-semibold">Columns</legend>
      <div className="grid grid-cols-2 gap-3 sm:grid-cols-3">
        {columnNames.map((name) => (
          <Choice
            key={name}
            label={titles[name]}
            value={mapping[name] === null ? "" : String(mapping[name])}
            options={options}
            onChange={(value) => onChange({ ...mapping, [name]: value === "" ? null : Number(value) })}
          />
        ))}
      </div>
    </fieldset>
  );
}
