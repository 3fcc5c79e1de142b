import type { Equipment } from "~/domain/plan-document/equipment";
import { axisOf } from "./edits/equipment";
import type { Point2, Point3 } from "./geometry";

/** How a view looks at the plan: from above, or across a slice whose direction on the plan, of length 1, is given. */
export type Projection = "from above" | { along: Point2 };

const project = ([x, y, z]: Point3, projection: Projection): Point2 =>
  projection === "from above" ? [x, y] : [x * projection.along[0] + y * projection.along[1], z];

const corners = 32;

/** Two directions at right angles to the axis and to each other, all of length 1. */
function across(axis: Point3): [Point3, Point3, Point3] {
  const length = Math.hypot(...axis);
  const n: Point3 = [axis[0] / length, axis[1] / length, axis[2] / length];
  const helper: Point3 = Math.abs(n[2]) < 0.9 ? [0, 0, 1] : [1, 0, 0];
  const u = cross(n, helper);
  const lengthU = Math.hypot(...u);
  const unit: Point3 = [u[0] / lengthU, u[1] / lengthU, u[2] / lengthU];
  return [n, unit, cross(n, unit)];
}

const cross = (a: Point3, b: Point3): Point3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];

/** Radius and length of the cylinder that a winding fills; null for a dipole, whose size nobody knows. */
function cylinderOf(item: Equipment): { radiusM: number; lengthM: number } | null {
  if (item.kind === "coil") return { radiusM: item.radiusM, lengthM: item.lengthM };
  if (item.kind === "toroid")
    return { radiusM: item.meanRadiusM + item.minorRadiusM, lengthM: 2 * item.minorRadiusM };
  return null;
}

/** The outline of a winding to scale as a view shows it, metres; null for a dipole. */
export function outlineOf(item: Equipment, projection: Projection): Point2[] | null {
  const cylinder = cylinderOf(item);
  const axis = axisOf(item);
  if (cylinder === null || axis === null) return null;
  const [n, u, v] = across(axis);
  const { radiusM, lengthM } = cylinder;
  const points: Point2[] = [];
  for (const end of [-0.5, 0.5]) {
    for (let i = 0; i < corners; i++) {
      const turn = (2 * Math.PI * i) / corners;
      const at = (axisAt: 0 | 1 | 2): number =>
        item.centre[axisAt] +
        end * lengthM * n[axisAt] +
        radiusM * (Math.cos(turn) * u[axisAt] + Math.sin(turn) * v[axisAt]);
      points.push(project([at(0), at(1), at(2)], projection));
    }
  }
  return hullOf(points);
}

/** The convex outline of points, counter-clockwise (Andrew's monotone chain). */
function hullOf(points: readonly Point2[]): Point2[] {
  const sorted = [...points].sort((a, b) => a[0] - b[0] || a[1] - b[1]);
  const half = (ordered: readonly Point2[]): Point2[] => {
    const chain: Point2[] = [];
    for (const point of ordered) {
      while (chain.length >= 2 && turns(chain.at(-2) as Point2, chain.at(-1) as Point2, point) <= 1e-12)
        chain.pop();
      chain.push(point);
    }
    return chain.slice(0, -1);
  };
  return [...half(sorted), ...half(sorted.reverse())];
}

const turns = (a: Point2, b: Point2, c: Point2): number =>
  (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0]);

/** An axis as a view shows it: `part` is its share in the picture's plane, `towards` says whether the rest comes out of it. */
export interface ShownAxis {
  direction: Point2;
  part: number;
  towards: boolean;
}

export function shownAxis(item: Equipment, projection: Projection): ShownAxis | null {
  const axis = axisOf(item);
  if (axis === null) return null;
  const length = Math.hypot(...axis);
  const [x, y] = project(axis, projection);
  const inPlane = Math.hypot(x, y);
  // One looks at a slice from its right, so that what points to the right comes out of the picture.
  const out =
    projection === "from above" ? axis[2] : axis[0] * projection.along[1] - axis[1] * projection.along[0];
  return {
    direction: inPlane === 0 ? [0, 0] : [x / inPlane, y / inPlane],
    part: inPlane / length,
    towards: out > 0,
  };
}
