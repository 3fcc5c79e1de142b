import { useId, useState } from "react";

interface Props {
  label: string;
  value: string;
  /** Takes the text; answers with what is wrong with it, or null. */
  onCommit: (text: string) => string | null;
  numeric?: boolean | undefined;
  disabled?: boolean | undefined;
  placeholder?: string | undefined;
}

/** An input inside a table's cell: becomes an edit when it is left or Enter is pressed, Escape puts it back. */
export function CellInput({ label, value, onCommit, numeric = false, disabled = false, placeholder }: Props) {
  const id = useId();
  const [text, setText] = useState(value);
  const [shownFor, setShownFor] = useState(value);
  const [problem, setProblem] = useState<string | null>(null);
  if (shownFor !== value) {
    setShownFor(value);
    setText(value);
    setProblem(null);
  }
  const commit = () => setProblem(text === value ? null : onCommit(text));
  return (
    <>
      <input
        className={`input input-small ${numeric ? "min-w-16 text-right" : "min-w-48"}`}
        aria-label={label}
        aria-invalid={problem !== null}
        aria-describedby={`${id}-problem`}
        inputMode={numeric ? "decimal" : "text"}
        autoComplete="off"
        value={text}
        disabled={disabled}
        placeholder={placeholder}
        onChange={(event) => setText(event.target.value)}
        onBlur={commit}
        onKeyDown={(event) => {
          if (event.key === "Enter") commit();
          if (event.key === "Escape") {
            setText(value);
            setProblem(null);
          }
        }}
      />
      <p id={`${id}-problem`} role="alert" className="field-error text-xs">
        {problem}
      </p>
    </>
  );
}
