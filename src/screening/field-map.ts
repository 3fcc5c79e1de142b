import * as z from "zod";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { point } from "~/domain/plan-document/quantities";
import { resolveDefaults } from "~/domain/plan-document/resolved";
import { compilePlan, type CompiledPlan } from "./compile";
import { planEarth, type PlanEarth } from "./earth";
import { caseFactors, type CaseFactors } from "./load-cases";
import { limitMeasure, type LimitMeasure } from "./measures/measure-of";
import { RefusedDocumentError } from "./refusal";
import { runSteps, type ScreenOptions, type Steps } from "./steps";
import { TILE_POINTS, tileMeasure } from "./tile-measure";

/** Most points of one map. */
export const MAX_MAP_POINTS = 1_000_000;

/**
 * What to map and where: `origin` is the first point (m), `across` and `up` the steps to the next column and row (m), so that
 * a map may lie level or stand as a section. `bandHz` bounds what counts as alternating; without it every frequency does.
 */
export const fieldMapRequestSchema = z.strictObject({
  quantity: z.enum(["static", "alternating", "heading"]),
  loadCaseId: z.string().nullable(),
  bandHz: z.tuple([z.number().nonnegative(), z.number().positive()]).optional(),
  grid: z
    .strictObject({
      origin: point,
      across: point,
      up: point,
      columns: z.int().min(1),
      rows: z.int().min(1),
    })
    .refine(
      ({ columns, rows }) => columns * rows <= MAX_MAP_POINTS,
      `a map has at most ${MAX_MAP_POINTS} points`,
    ),
});

export type FieldMapRequest = z.output<typeof fieldMapRequestSchema>;
export type MapQuantity = FieldMapRequest["quantity"];
export type MapGrid = FieldMapRequest["grid"];

/** Values row by row from the origin (`values[row · columns + column]`), in T or degrees. */
export interface FieldMap {
  columns: number;
  rows: number;
  unit: "T" | "deg";
  values: Float64Array;
}

/** A level grid at a height whose first point is (xM, yM), columns along +x and rows along +y. */
export function levelGrid(
  heightM: number,
  xM: number,
  yM: number,
  stepM: number,
  columns: number,
  rows: number,
): MapGrid {
  return { origin: [xM, yM, heightM], across: [stepM, 0, 0], up: [0, stepM, 0], columns, rows };
}

/**
 * Maps a quantity over a grid, backgrounds left out. The signal is looked at and progress told after every row.
 * Throws RefusedDocumentError as `screen` does, and where heading is mapped without an Earth field or the load case is unknown.
 */
export function fieldMap(
  document: PlanDocument,
  request: FieldMapRequest,
  options: ScreenOptions = {},
): FieldMap {
  return runSteps(fieldMapSteps(document, request), options);
}

/** The same in steps, one a row. */
export function* fieldMapSteps(document: PlanDocument, request: FieldMapRequest): Steps<FieldMap> {
  const resolved = resolveDefaults(document);
  const earth = planEarth(resolved);
  if (request.quantity === "heading" && !earth) {
    throw new RefusedDocumentError([
      { path: "earthField", message: "a map of the heading needs the Earth's field" },
    ]);
  }
  const plan = compilePlan(resolved);
  return yield* mapPlan(plan, earth, request);
}

function* mapPlan(plan: CompiledPlan, earth: PlanEarth | null, request: FieldMapRequest): Steps<FieldMap> {
  const { origin, across, up, columns, rows } = request.grid;
  const measure = measureOf(plan, request);
  const fill = tileMeasure(plan, earth, measure, factorsOf(plan, request.loadCaseId));
  const values = new Float64Array(columns * rows);
  for (let row = 0; row < rows; row++) {
    yield { done: row, total: rows };
    for (let first = 0; first < columns; first += TILE_POINTS) {
      const last = Math.min(columns, first + TILE_POINTS);
      const points = new Float64Array(3 * (last - first));
      for (let column = first; column < last; column++) {
        for (let i = 0; i < 3; i++) {
          points[3 * (column - first) + i] =
            (origin[i] as number) + column * (across[i] as number) + row * (up[i] as number);
        }
      }
      fill(points, values.subarray(row * columns + first, row * columns + last));
    }
  }
  yield { done: rows, total: rows };
  return { columns, rows, unit: measure.unit === "deg" ? "deg" : "T", values };
}

function measureOf(plan: CompiledPlan, { quantity, bandHz }: FieldMapRequest): LimitMeasure {
  const { groups } = plan.frequencies;
  const { unknownPhase } = plan.document;
  const band = bandHz ?? [0, Number.MAX_VALUE];
  if (quantity === "heading")
    return limitMeasure({ id: "", kind: "heading", limitDeg: 1 }, null, groups, unknownPhase);
  if (quantity === "static")
    return limitMeasure({ id: "", kind: "static", limitT: 1 }, null, groups, unknownPhase);
  const limit = { id: "", kind: "alternating" as const, limitT: 1, bandHz: band, measure: "rms" as const };
  return limitMeasure(limit, null, groups, unknownPhase);
}

function factorsOf(plan: CompiledPlan, loadCaseId: string | null): CaseFactors {
  const cases = caseFactors(plan);
  const found = loadCaseId === null ? cases[0] : cases.find(({ id }) => id === loadCaseId);
  if (found) return found;
  throw new RefusedDocumentError([
    { path: "loadCases", message: `there is no load case "${loadCaseId ?? ""}"` },
  ]);
}
