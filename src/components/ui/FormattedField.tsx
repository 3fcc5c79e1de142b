import { formatQuantity, type QuantityUnit, quantityText } from "~/domain/format";

interface Props {
  value: number;
  unit?: QuantityUnit | undefined;
  expandedUncertainty?: number | null | undefined;
}

/** A quantity with its prefix and, where known, ± U; the bare SI number is kept for machines. */
export function FormattedField({ value, unit = "T", expandedUncertainty = null }: Props) {
  return (
    <data value={value} className="whitespace-nowrap">
      {quantityText(formatQuantity(value, unit, expandedUncertainty))}
    </data>
  );
}

/** A text such as "1.42" or "12 %" that lines up on its decimal point within a column. */
export function Decimal({ text }: { text: string }) {
  const split = /^([^\d]*\d+)(.*)$/su.exec(text);
  return (
    <span className="decimal">
      <span>{split?.[1] ?? text}</span>
      <span>{split?.[2] ?? ""}</span>
    </span>
  );
}
