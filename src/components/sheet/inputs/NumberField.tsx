import type { ReactNode } from "react";
import { numberText, readNumber } from "~/sheet/read-number";
import { CommitField } from "./CommitField";

/** Why a change was refused; null for any answer but words. */
export const refusalOf = (answer: unknown): string | null => (typeof answer === "string" ? answer : null);

interface Props {
  label: ReactNode;
  /** In SI units; null shows an empty field. */
  value: number | null;
  /** Takes the value; words in its answer say why it was refused. */
  onChange: (value: number) => unknown;
  /** Given where the field may be emptied. */
  onEmpty?: (() => unknown) | undefined;
  unit?: string | undefined;
  /** How many of the shown unit make one SI unit: 1000 for mm. */
  perUnit?: number | undefined;
  least?: number | undefined;
  above?: number | undefined;
  most?: number | undefined;
  below?: number | undefined;
  /** Only whole numbers. */
  whole?: boolean | undefined;
  hint?: ReactNode;
  disabled?: boolean | undefined;
  placeholder?: string | undefined;
}

/** What the bounds say, in the unit shown. */
function boundWords({ least, above, most, below, perUnit = 1, unit = "" }: Props): string {
  const words = [
    ...(above !== undefined ? [`above ${numberText(above * perUnit)}`] : []),
    ...(least !== undefined ? [`from ${numberText(least * perUnit)}`] : []),
    ...(most !== undefined ? [`up to ${numberText(most * perUnit)}`] : []),
    ...(below !== undefined ? [`below ${numberText(below * perUnit)}`] : []),
  ];
  return words.length === 0 ? "" : ` ${words.join(" ")} ${unit}`.trimEnd();
}

export function NumberField(props: Props) {
  const { value, onChange, onEmpty, perUnit = 1, least, above, most, below, whole = false, ...field } = props;
  const wanted = `Type a ${whole ? "whole " : ""}number${boundWords(props)}.`;
  const commit = (text: string): string | null => {
    if (text.trim() === "" && onEmpty) {
      return refusalOf(onEmpty());
    }
    const typed = readNumber(text);
    if (typed === null || (whole && !Number.isInteger(typed))) return wanted;
    const si = typed / perUnit;
    const refused =
      (least !== undefined && si < least) ||
      (above !== undefined && si <= above) ||
      (most !== undefined && si > most) ||
      (below !== undefined && si >= below);
    if (refused) return wanted;
    return refusalOf(onChange(Number(si.toPrecision(12))));
  };
  return (
    <CommitField
      {...field}
      inputMode="decimal"
      value={value === null ? "" : numberText(value * perUnit)}
      onCommit={commit}
    />
  );
}
