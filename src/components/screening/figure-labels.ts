import type { FigureFrame, FigureLine, FigurePoint } from "./figure-geometry";

export interface FigureLabel {
  anchor: "start" | "end" | "middle";
  /** Start, end or middle of the upper line's base. */
  at: FigurePoint;
  /** Whether there is room for the number only. */
  short: boolean;
}

/** A sensor's mark with the letters of its label, in full and as a number. */
export interface FigureMark {
  at: FigurePoint;
  letters: number;
  shortLetters: number;
}

interface Box {
  left: number;
  right: number;
  top: number;
  bottom: number;
}

export const balloonRadius = 11;

const lineHeight = 16;
const letterWidth = 6.7;
const sampleEvery = 8;
const balloonStep = 2 * balloonRadius + 2;

const boxAround = ([x, y]: FigurePoint, half: number): Box => ({
  left: x - half,
  right: x + half,
  top: y - half,
  bottom: y + half,
});

const overlap = (a: Box, b: Box): boolean =>
  a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;

const coversAny = (box: Box, others: readonly Box[]): boolean => others.some((other) => overlap(box, other));

/**
 * Places each line's balloons side by side on one of its legs, the longest first, where they cover no other balloon and
 * nothing of `obstacles`; on the middle of the longest leg where there is no such place.
 */
export function placeBalloons(lines: readonly FigureLine[], obstacles: readonly Box[]): FigurePoint[][] {
  const taken = [...obstacles];
  return lines.map((line) => {
    const rows = anchorsAlong(line).map(({ at, angleRad }) =>
      line.circuitIds.map((_, index): FigurePoint => {
        const distance = (index - (line.circuitIds.length - 1) / 2) * balloonStep;
        return [at[0] + distance * Math.cos(angleRad), at[1] + distance * Math.sin(angleRad)];
      }),
    );
    const boxesOf = (row: readonly FigurePoint[]) => row.map((at) => boxAround(at, balloonRadius));
    const row =
      rows.find((candidate) => !boxesOf(candidate).some((box) => coversAny(box, taken))) ?? rows[0] ?? [];
    taken.push(...boxesOf(row));
    return row;
  });
}

function anchorsAlong({ points }: FigureLine): { at: FigurePoint; angleRad: number }[] {
  const legs = points.slice(1).map(([x, y], index) => {
    const [fromX, fromY] = points[index] ?? [x, y];
    return { fromX, fromY, dx: x - fromX, dy: y - fromY };
  });
  legs.sort((a, b) => Math.hypot(b.dx, b.dy) - Math.hypot(a.dx, a.dy));
  return legs.flatMap(({ fromX, fromY, dx, dy }) =>
    [0.5, 0.3, 0.7, 0.4, 0.6, 0.15, 0.85].map((share) => ({
      at: [fromX + share * dx, fromY + share * dy] as const,
      angleRad: Math.atan2(dy, dx),
    })),
  );
}

/** What stands in the way of labels: balloons and equipment, as boxes of half the given width. */
export const obstacleBoxes = (points: readonly FigurePoint[], half: number): Box[] =>
  points.map((at) => boxAround(at, half));

/** Points along lines, close enough together that no label slips between them. */
function sampled(lines: readonly FigureLine[]): FigurePoint[] {
  return lines.flatMap(({ points }) =>
    points.flatMap(([x, y], index) => {
      const [nextX, nextY] = points[index + 1] ?? [x, y];
      const steps = Math.ceil(Math.hypot(nextX - x, nextY - y) / sampleEvery);
      return Array.from({ length: steps + 1 }, (_, step): FigurePoint => {
        const share = steps === 0 ? 0 : step / steps;
        return [x + share * (nextX - x), y + share * (nextY - y)];
      });
    }),
  );
}

/**
 * Places two-line labels beside marks: to the right, or wherever else around the mark they cover nothing; over a line
 * rather than over a label, mark or obstacle; and the number alone where there is no room at all.
 */
export function placeLabels(
  marks: readonly FigureMark[],
  lines: readonly FigureLine[],
  obstacles: readonly Box[],
  { width }: Pick<FigureFrame, "width">,
  markRadius: number,
): FigureLabel[] {
  const onLines = sampled(lines).map((at) => boxAround(at, 3));
  const taken: Box[] = [...obstacles, ...marks.map(({ at }) => boxAround(at, markRadius))];

  return marks.map(({ at, letters, shortLetters }) => {
    const full = candidatesAround(at, markRadius, letters, false);
    const short = candidatesAround(at, markRadius, shortLetters, true);
    const inside = ({ box }: Candidate) => box.left > 4 && box.right < width - 4;
    const free = (candidate: Candidate) => inside(candidate) && !coversAny(candidate.box, taken);
    const clear = (candidate: Candidate) => free(candidate) && !coversAny(candidate.box, onLines);
    const chosen = full.find(clear) ?? full.find(free) ?? short.find(clear) ?? short.find(free) ?? short[0];
    if (chosen === undefined) return { anchor: "start", at, short: true };
    taken.push(chosen.box);
    return chosen.label;
  });
}

interface Candidate {
  label: FigureLabel;
  box: Box;
}

function candidatesAround([x, y]: FigurePoint, radius: number, letters: number, short: boolean): Candidate[] {
  const gap = radius + 6;
  const rise = short ? 0 : lineHeight;
  const places: Omit<FigureLabel, "short">[] = [
    { anchor: "start", at: [x + gap, y + (short ? 5 : -3)] },
    { anchor: "end", at: [x - gap, y + (short ? 5 : -3)] },
    { anchor: "middle", at: [x, y + gap + 12] },
    { anchor: "middle", at: [x, y - gap - rise] },
    { anchor: "start", at: [x + gap * 0.6, y - gap - rise + 4] },
    { anchor: "start", at: [x + gap * 0.6, y + gap + 8] },
  ];
  return places.map((place) => {
    const label = { ...place, short };
    return { label, box: labelBox(label, letters * letterWidth) };
  });
}

function labelBox({ anchor, at: [x, y], short }: FigureLabel, length: number): Box {
  const left = anchor === "start" ? x : anchor === "end" ? x - length : x - length / 2;
  return { left, right: left + length, top: y - lineHeight + 3, bottom: y + 3 + (short ? 0 : lineHeight) };
}
