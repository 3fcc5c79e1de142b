import type { Point2 } from "./geometry";

export interface Labelled {
  id: string;
  /** Where the mark is, in pixels. */
  at: Point2;
  text: string;
}

export interface LabelStyle {
  /** Pixels from the middle of a mark to its label, and the height of a line. */
  clearPx: number;
  linePx: number;
  /** Mean width of a letter. */
  letterPx: number;
}

interface Box {
  x: number;
  y: number;
  width: number;
  height: number;
}

const overlap = (a: Box, b: Box): boolean =>
  a.x < b.x + b.width && b.x < a.x + a.width && a.y < b.y + b.height && b.y < a.y + a.height;

/**
 * Upper left corners of labels relative to their marks, so that none lies over another label or mark: to the right,
 * else to the left, below or above. What finds no room has no label; `things` come in order of importance.
 */
export function placeLabels(things: readonly Labelled[], style: LabelStyle): Map<string, Point2> {
  const { clearPx, linePx, letterPx } = style;
  const taken: { id: string; box: Box }[] = things.map(({ id, at: [x, y] }) => ({
    id,
    box: { x: x - clearPx + 4, y: y - clearPx + 4, width: 2 * clearPx - 8, height: 2 * clearPx - 8 },
  }));
  const places = new Map<string, Point2>();
  for (const { id, at, text } of things) {
    const width = text.length * letterPx;
    const tries: Point2[] = [
      [clearPx, -linePx / 2],
      [-clearPx - width, -linePx / 2],
      [-width / 2, clearPx - 2],
      [-width / 2, -clearPx - linePx + 2],
    ];
    const found = tries.find(([dx, dy]) => {
      const box = { x: at[0] + dx, y: at[1] + dy, width, height: linePx };
      return !taken.some((other) => other.id !== id && overlap(box, other.box));
    });
    if (found === undefined) continue;
    places.set(id, found);
    taken.push({
      id: `${id} label`,
      box: { x: at[0] + found[0], y: at[1] + found[1], width, height: linePx },
    });
  }
  return places;
}
