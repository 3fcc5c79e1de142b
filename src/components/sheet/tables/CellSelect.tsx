interface Props<T extends string> {
  label: string;
  value: T;
  options: readonly { value: T; label: string }[];
  onChange: (value: T) => void;
  disabled?: boolean | undefined;
}

/** A choice inside a table's cell. */
export function CellSelect<T extends string>({ label, value, options, onChange, disabled }: Props<T>) {
  return (
    <select
      className="input input-small w-auto max-w-52"
      aria-label={label}
      value={value}
      disabled={disabled}
      onChange={(event) => {
        const chosen = options.find((option) => option.value === event.target.value);
        if (chosen !== undefined) onChange(chosen.value);
      }}
    >
      {options.map((option) => (
        <option key={option.value} value={option.value}>
          {option.label}
        </option>
      ))}
    </select>
  );
}
