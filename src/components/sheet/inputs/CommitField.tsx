import { useId, useState, type ReactNode } from "react";
import { Field } from "~/components/ui/Field";

interface Props {
  label: ReactNode;
  value: string;
  /** Takes the text; answers with what is wrong with it, or null. */
  onCommit: (text: string) => string | null;
  unit?: string | undefined;
  hint?: ReactNode;
  disabled?: boolean | undefined;
  placeholder?: string | undefined;
  inputMode?: "decimal" | "text" | undefined;
}

/** A field whose text becomes an edit when it is left or Enter is pressed, so that typing is one undo; Escape puts it back. */
export function CommitField({ value, onCommit, inputMode = "text", ...field }: Props) {
  const id = useId();
  const [text, setText] = useState(value);
  const [shownFor, setShownFor] = useState(value);
  const [problem, setProblem] = useState<string | undefined>();
  if (shownFor !== value) {
    setShownFor(value);
    setText(value);
    setProblem(undefined);
  }
  const commit = () => {
    if (text === value) {
      setProblem(undefined);
      return;
    }
    setProblem(onCommit(text) ?? undefined);
  };
  return (
    <Field
      {...field}
      id={id}
      small
      autoComplete="off"
      inputMode={inputMode}
      value={text}
      error={problem}
      onChange={(event) => setText(event.target.value)}
      onBlur={commit}
      onKeyDown={(event) => {
        if (event.key === "Enter") commit();
        if (event.key === "Escape") {
          setText(value);
          setProblem(undefined);
        }
      }}
    />
  );
}
