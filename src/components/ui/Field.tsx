import type { InputHTMLAttributes, ReactNode } from "react";

interface FrameProps {
  id: string;
  label: ReactNode;
  hint?: ReactNode;
  /** What is wrong with what was typed and how to mend it. */
  error?: string | undefined;
  className?: string | undefined;
  children: ReactNode;
}

/** Label, hint and error around any control; the control takes `describedBy(id, …)` and the same id. */
export function FieldFrame({ id, label, hint, error, className = "", children }: FrameProps) {
  return (
    <div className={`field ${className}`}>
      <label className="field-label" htmlFor={id}>
        {label}
      </label>
      {children}
      {hint !== undefined && (
        <p className="field-hint" id={`${id}-hint`}>
          {hint}
        </p>
      )}
      <p className="field-error" id={`${id}-error`} aria-live="polite" data-fault-for={id}>
        {error}
      </p>
    </div>
  );
}

export const describedBy = (id: string, hasHint: boolean): string =>
  hasHint ? `${id}-hint ${id}-error` : `${id}-error`;

interface FieldProps extends InputHTMLAttributes<HTMLInputElement> {
  id: string;
  label: ReactNode;
  hint?: ReactNode;
  error?: string | undefined;
  /** Stands behind the input, such as "m" or "A". */
  unit?: string | undefined;
  small?: boolean | undefined;
}

export function Field({ id, label, hint, error, unit, small = false, className, ...input }: FieldProps) {
  return (
    <FieldFrame id={id} label={label} hint={hint} error={error} className={className}>
      <span className="input-unit">
        <input
          id={id}
          className={`input ${small ? "input-small" : ""}`}
          aria-describedby={describedBy(id, hint !== undefined)}
          aria-invalid={error !== undefined && error !== ""}
          {...input}
        />
        {unit !== undefined && <span className="text-sm text-muted">{unit}</span>}
      </span>
    </FieldFrame>
  );
}
