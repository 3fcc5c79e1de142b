import type { Bounds, Point2 } from "./geometry";

/** Where the plan stands on the screen: `scale` in pixels per metre, (`x`, `y`) the plan's origin in pixels. */
export interface View {
  scale: number;
  x: number;
  y: number;
}

export interface SizePx {
  width: number;
  height: number;
}

/** Pixels per metre: a building of 5 km on a phone, and a millimetre of a few pixels. */
const scaleRange = { least: 0.05, most: 20_000 } as const;

const clampScale = (scale: number): number => Math.min(scaleRange.most, Math.max(scaleRange.least, scale));

export const toScreen = (view: View, [x, y]: Point2): Point2 => [
  view.x + x * view.scale,
  view.y - y * view.scale,
];

export const toPlan = (view: View, [x, y]: Point2): Point2 => [
  (x - view.x) / view.scale,
  (view.y - y) / view.scale,
];

/** Zooms by `factor` while the plan under `atPx` stays under it. */
export function zoomAt(view: View, factor: number, atPx: Point2): View {
  const scale = clampScale(view.scale * factor);
  const [x, y] = toPlan(view, atPx);
  return { scale, x: atPx[0] - x * scale, y: atPx[1] + y * scale };
}

export const panBy = (view: View, dxPx: number, dyPx: number): View => ({
  ...view,
  x: view.x + dxPx,
  y: view.y + dyPx,
});

/** The view that shows `bounds` whole, centred, with `marginPx` around. */
export function fitTo(bounds: Bounds, size: SizePx, marginPx = 44): View {
  const widthM = Math.max(bounds.maxX - bounds.minX, 0.5);
  const heightM = Math.max(bounds.maxY - bounds.minY, 0.5);
  const scale = clampScale(
    Math.min(
      Math.max(1, size.width - 2 * marginPx) / widthM,
      Math.max(1, size.height - 2 * marginPx) / heightM,
    ),
  );
  return {
    scale,
    x: size.width / 2 - ((bounds.minX + bounds.maxX) / 2) * scale,
    y: size.height / 2 + ((bounds.minY + bounds.maxY) / 2) * scale,
  };
}

const gridSteps = [1, 2, 5] as const;

/** The round number of metres whose lines stand at least `leastPx` apart. */
export function gridStepM(scale: number, leastPx: number): number {
  const wantedM = leastPx / scale;
  const decade = 10 ** Math.floor(Math.log10(wantedM));
  for (const step of gridSteps) if (step * decade >= wantedM) return step * decade;
  return 10 * decade;
}

/** The part of the plan that the screen shows. */
export function shownBounds(view: View, size: SizePx): Bounds {
  const [minX, maxY] = toPlan(view, [0, 0]);
  const [maxX, minY] = toPlan(view, [size.width, size.height]);
  return { minX, minY, maxX, maxY };
}
