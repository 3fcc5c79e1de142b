import { formatLimit, formatQuantity, quantityText, type QuantityUnit } from "~/domain/format";
import { limitValue, type Limit } from "~/domain/plan-document/sensor";
import { fieldLines, roundLevels, valueAt, type FieldGrid, type FieldLine } from "~/sheet/field-lines";
import type { Point2 } from "~/sheet/geometry";
import { useMemo } from "react";
import { useSelection, useSheet, useShownDocument, type Mapped, type MapQuantity } from "../store";

export const unitOf = (quantity: MapQuantity): QuantityUnit => (quantity === "heading" ? "deg" : "T");

/** A level or a limit: no zeros at its end. */
export const levelText = (level: number, quantity: MapQuantity): string =>
  formatLimit(level, unitOf(quantity));

export const valueText = (value: number, quantity: MapQuantity): string =>
  quantityText(formatQuantity(value, unitOf(quantity)));

/** The mapped value at a place in words; null while the map is off or the place outside it. */
export function useMapValue(pointerM: Point2 | null): string | null {
  const { settings, mapped } = useSheet((state) => state.map);
  if (settings === null || mapped === null || pointerM === null) return null;
  const value = valueAt(mapped.grid, pointerM);
  return value === null ? null : valueText(value, mapped.quantity);
}

/** The limit of the selected sensor that the map's quantity is compared with; null where it has none. */
export function useMapLimit(): Limit | null {
  const document = useShownDocument();
  const selection = useSelection();
  const quantity = useSheet(({ map }) => map.settings?.quantity ?? null);
  const [selected] = selection.filter((item) => item.kind === "sensor");
  const sensor = document.sensors.find(({ id }) => id === selected?.id);
  return sensor?.limits.find(({ kind }) => kind === quantity) ?? null;
}

/** Only a small part of the values is above the greatest level worth a line: conductors are poles of the field. */
function usefulRange(grid: FieldGrid): { least: number; greatest: number } {
  const sorted = Float64Array.from(grid.values).sort();
  const at = (share: number): number => sorted[Math.floor(share * (sorted.length - 1))] ?? 0;
  return { least: at(0.02), greatest: at(0.985) };
}

export interface MapLines {
  grid: FieldGrid;
  quantity: MapQuantity;
  lines: FieldLine[];
  limit: FieldLine | null;
}

/** The contour lines of a map, with that of the selected sensor's limit apart; null while there is nothing to draw. */
function useLines(mapped: Mapped | null): MapLines | null {
  const limit = useMapLimit();
  return useMemo(() => {
    if (mapped === null) return null;
    const { grid, quantity } = mapped;
    const { least, greatest } = usefulRange(grid);
    const lines = fieldLines(grid, roundLevels(least, greatest));
    const limitLine = limit === null ? undefined : fieldLines(grid, [limitValue(limit)])[0];
    return { grid, quantity, lines, limit: limitLine ?? null };
  }, [mapped, limit]);
}

export const useMapLines = (): MapLines | null => useLines(useSheet(({ map }) => map.mapped));

/** The same in the section: x across, z up. */
export const useSectionLines = (): MapLines | null => useLines(useSheet(({ map }) => map.section));
