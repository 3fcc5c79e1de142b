import { useEffect, useRef } from "react";
import { Button } from "~/components/ui/Button";
import { noModifiers } from "~/sheet/snapping";
import type { StepInput } from "~/sheet/steps/step";
import { focusDrawing } from "./StepBar";
import { useEditable, useSheet, useSheetStore } from "./store";
import { SnapInputs } from "./SnapInputs";

/** Says in words what the next click or key does, and holds the step's inputs. */
export function InstructionLine() {
  const store = useSheetStore();
  const editable = useEditable();
  const { instruction, inputs, focus, name } = useSheet(({ session }) => session.step);
  const line = useRef<HTMLDivElement>(null);
  useEffect(() => {
    if (focus !== null) line.current?.querySelector<HTMLElement>(`[name="step-${focus}"]`)?.focus();
  }, [focus]);
  return (
    <div
      ref={line}
      className="flex min-h-17 flex-wrap items-center gap-x-4 gap-y-2 border-y border-rule bg-raised px-3 py-1.5"
    >
      <p
        id="instruction-line"
        role="status"
        aria-live="polite"
        className="min-w-64 flex-1 self-center text-sm"
        data-testid="instruction"
      >
        {editable ? instruction : "Press on a sensor or a route to see what it is."}
      </p>
      {inputs.map((input) => (
        <LineInput key={`${name}-${input.id}`} input={input} />
      ))}
      {inputs.length > 0 && (
        <Button
          small
          onClick={() => {
            store.key("Enter", noModifiers);
            focusDrawing();
          }}
        >
          Finish
        </Button>
      )}
      {name !== "select" && (
        <Button small kind="quiet" onClick={() => store.key("Escape", noModifiers)}>
          Abandon
        </Button>
      )}
      {editable && <SnapInputs />}
    </div>
  );
}

function LineInput({ input }: { input: StepInput }) {
  const store = useSheetStore();
  const id = `step-${input.id}`;
  const errorId = `${id}-error`;
  const common = {
    id,
    name: id,
    value: input.value,
    className: "input input-small w-auto max-w-48",
    "aria-describedby": errorId,
    "aria-invalid": input.problem !== undefined,
    onKeyDown: (event: React.KeyboardEvent) => {
      if (event.key !== "Enter" && event.key !== "Escape") return;
      event.preventDefault();
      store.key(event.key, noModifiers);
      if (event.key === "Escape") focusDrawing();
    },
  } as const;
  return (
    <div className="grid gap-0.5">
      <label htmlFor={id} className="text-xs font-semibold">
        {input.label}
      </label>
      <span className="flex items-baseline gap-1">
        {input.choices === undefined ? (
          <input
            {...common}
            size={8}
            inputMode="decimal"
            autoComplete="off"
            onChange={(event) => store.type(input.id, event.target.value)}
          />
        ) : (
          <select {...common} onChange={(event) => store.type(input.id, event.target.value)}>
            {input.choices.map(({ value, label }) => (
              <option key={value} value={value}>
                {label}
              </option>
            ))}
          </select>
        )}
        {input.unit !== undefined && <span className="text-xs text-muted">{input.unit}</span>}
      </span>
      <p id={errorId} role="alert" className="field-error max-w-60 text-xs">
        {input.problem}
      </p>
    </div>
  );
}
