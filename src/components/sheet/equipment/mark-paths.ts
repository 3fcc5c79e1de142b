import type { EquipmentKind } from "~/domain/plan-document/equipment";

/** Half the width of a mark. */
export const markPx = 12;

const spoke = (turnDeg: number): string => {
  const [x, y] = [Math.cos((turnDeg * Math.PI) / 180), Math.sin((turnDeg * Math.PI) / 180)];
  const at = (radius: number) => `${(radius * x).toFixed(2)} ${(radius * y).toFixed(2)}`;
  return `M${at(5)}L${at(11)}`;
};

/** Outlines of the marks, px about their middle, filled with paper: turns in a case, a wound ring, two poles. */
export const markPaths: Record<EquipmentKind, { body: string; inside: string }> = {
  coil: {
    body: "M-8 -11H8L11 -8V8L8 11H-8L-11 8V-8Z",
    inside: "M-8 6L-4 -6M-3 6L1 -6M2 6L6 -6",
  },
  toroid: {
    body: "M11 0A11 11 0 1 1 -11 0A11 11 0 1 1 11 0Z",
    inside: `M5 0A5 5 0 1 1 -5 0A5 5 0 1 1 5 0Z${[30, 90, 150, 210, 270, 330].map(spoke).join("")}`,
  },
  dipole: {
    body: "M0 -12L12 0L0 12L-12 0Z",
    inside: "M-5 0H5M-5 -3V3M5 -3V3",
  },
};

/** An arrow of `lengthPx` along x from the edge of the mark. */
export const arrowPath = (lengthPx: number): string => {
  const tip = markPx + lengthPx;
  return `M${markPx + 1} 0H${tip}M${tip - 6} -4L${tip} 0L${tip - 6} 4`;
};

/** Beside the mark: an axis that comes out of the picture, or goes into it. */
export const outPath = "M15 -14a5 5 0 1 0 10 0a5 5 0 1 0 -10 0M19 -14a1 1 0 1 0 2 0a1 1 0 1 0 -2 0";
export const intoPath = "M15 -14a5 5 0 1 0 10 0a5 5 0 1 0 -10 0M16.5 -17.5L23.5 -10.5M16.5 -10.5L23.5 -17.5";
