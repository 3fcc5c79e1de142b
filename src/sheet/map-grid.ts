import type { Bounds } from "./geometry";

/** A grid of about `points` points over what the screen shows, with a margin so that lines run out of sight. */
export function mapGrid(
  shown: Bounds,
  points: number,
): { x0M: number; y0M: number; stepM: number; columns: number; rows: number } {
  const widthM = (shown.maxX - shown.minX) * 1.1;
  const heightM = (shown.maxY - shown.minY) * 1.1;
  const stepM = Math.sqrt((widthM * heightM) / points);
  return {
    x0M: shown.minX - widthM / 22,
    y0M: shown.minY - heightM / 22,
    stepM,
    columns: Math.max(2, Math.ceil(widthM / stepM) + 1),
    rows: Math.max(2, Math.ceil(heightM / stepM) + 1),
  };
}
