import type { ReactNode, SelectHTMLAttributes } from "react";
import { describedBy, FieldFrame } from "./Field";

interface Props extends SelectHTMLAttributes<HTMLSelectElement> {
  id: string;
  label: ReactNode;
  options: readonly { value: string; label: string }[];
  hint?: ReactNode;
  error?: string | undefined;
  small?: boolean | undefined;
}

export function Select({ id, label, options, hint, error, small = false, className, ...select }: Props) {
  return (
    <FieldFrame id={id} label={label} hint={hint} error={error} className={className}>
      <select
        id={id}
        className={`input ${small ? "input-small" : ""}`}
        aria-describedby={describedBy(id, hint !== undefined)}
        aria-invalid={error !== undefined && error !== ""}
        {...select}
      >
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
    </FieldFrame>
  );
}
