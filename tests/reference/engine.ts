import { parsePlanDocument } from "~/domain/plan-document/parse";
import { emptyPlanDocument, type PlanDocumentInput } from "~/domain/plan-document/plan-document";
import type { Finding } from "~/domain/screening-result";
import { addSegmentField, SEGMENT_STRIDE } from "~/field/segment";
import type { Vector } from "~/field/vector";
import { screen } from "~/screening/screen";

type CircuitInput = PlanDocumentInput["circuits"][number];
type LimitInput = PlanDocumentInput["sensors"][number]["limits"][number];

/** Half the length of what stands for an infinite conductor, metres. */
export const FAR_M = 50_000;

/** Field (T) at a point of polylines, each with its current (A) and conductor radius (m). */
export function fieldOf(
  lines: { points: Vector[]; currentA: number; radiusM?: number }[],
  at: Vector,
): Vector {
  const rows = lines.flatMap(({ points, currentA, radiusM = 1e-6 }) =>
    points.slice(1).flatMap((to, index) => [...(points[index] ?? to), ...to, radiusM, currentA]),
  );
  const out = new Float64Array(3);
  addSegmentField(Float64Array.from(rows), 0, rows.length / SEGMENT_STRIDE, ...at, out, 0);
  return [out[0] ?? 0, out[1] ?? 0, out[2] ?? 0];
}

/** Findings of one sensor through the whole engine. */
export function findingsOf(
  circuits: (Pick<CircuitInput, "path" | "arrangement" | "supply"> & Partial<CircuitInput>)[],
  position: Vector,
  limits: LimitInput[],
  rest: Partial<PlanDocumentInput> = {},
): Finding[] {
  const parsed = parsePlanDocument({
    ...emptyPlanDocument("Published case"),
    circuits: circuits.map((circuit, index) => ({
      id: `c${index}`,
      name: `Circuit ${index}`,
      conductorRadiusM: 1e-3,
      currentTolerancePercent: 0,
      ...(circuit.arrangement.kind === "single" ? {} : { strayCurrentA: 0 }),
      ...circuit,
    })),
    sensors: [{ id: "s", name: "Observer", position, limits }],
    ...rest,
  });
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.faults));
  return screen(parsed.document).sensors[0]?.findings ?? [];
}

/** The value of one limit through the whole engine. */
export function valueOf(...[circuits, position, limits, rest]: Parameters<typeof findingsOf>): number {
  const [finding] = findingsOf(circuits, position, limits, rest);
  if (!finding) throw new Error("no finding");
  return finding.value;
}

export const STATIC: LimitInput = { kind: "static", limitT: 1 };
export const ALTERNATING: LimitInput = { kind: "alternating", limitT: 1, bandHz: [1, 1000] };
