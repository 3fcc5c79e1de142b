import { useId, type ReactNode } from "react";
import { Select } from "~/components/ui/Select";

interface Props<T extends string> {
  label: ReactNode;
  value: T;
  options: readonly { value: T; label: string }[];
  onChange: (value: T) => void;
  hint?: ReactNode;
  error?: string | undefined;
  disabled?: boolean | undefined;
}

/** A small list of choices that take effect at once. */
export function Choice<T extends string>({ options, onChange, ...rest }: Props<T>) {
  const id = useId();
  return (
    <Select
      {...rest}
      id={id}
      small
      options={options}
      onChange={(event) => {
        const chosen = options.find(({ value }) => value === event.target.value);
        if (chosen !== undefined) onChange(chosen.value);
      }}
    />
  );
}
