import { add, along, cross, distance, dot, length, scale, subtract, unit, type Vector } from "./vector";

/** One straight leg of a path with its section frame: u and v across (unit, v = u × t), t along. */
export interface Leg {
  start: Vector;
  end: Vector;
  lengthM: number;
  u: Vector;
  v: Vector;
  t: Vector;
}

export interface SectionFrames {
  legs: Leg[];
  /** Per bend (between leg i and i + 1): whether it turns more than 120° and is bevelled instead of mitred. */
  bevelled: boolean[];
  /** Segments of zero length that were dropped from the path as given. */
  zeroSegments: number;
}

export type FramedPath = { ok: true; frames: SectionFrames } | { ok: false; message: string };

const BEVEL_COSINE = Math.cos((120 * Math.PI) / 180);
const VERTICAL_COSINE = Math.cos(Math.PI / 180);
/** Points nearer to each other than this are one point, metres: below the rounding of coordinates in a large plan. */
const COINCIDENT_M = 1e-9;
/** Legs that turn less than this (rad) are one leg. */
const COLLINEAR_RAD = 1e-9;
/** Turns nearer to 180° than this (rad) have no bisector. */
const REVERSAL_RAD = 1e-6;

/**
 * Section frames of a path (m): on the first leg u is horizontal, to the right of t (+x where that leg is within 1° of
 * vertical), later ones are turned by the smallest rotation that takes t to t′ (rotation-minimising).
 * Collinear legs are merged first. Refused: a path without extent, a turn of 180°.
 */
export function sectionFrames(path: readonly Vector[]): FramedPath {
  const { points, zeroSegments } = cleanPoints(path);
  const legs: Leg[] = [];
  const bevelled: boolean[] = [];
  for (const [index, start] of points.entries()) {
    const end = points[index + 1];
    if (!end) break;
    const t = unit(subtract(end, start));
    const before = legs[legs.length - 1];
    if (before && isReversal(before.t, t)) {
      return { ok: false, message: `the path turns back on itself (180°) at ${text(start)}` };
    }
    const { u, v } = before ? turned(before, t) : firstFrame(t);
    if (before) bevelled.push(dot(before.t, t) < BEVEL_COSINE);
    legs.push({ start, end, lengthM: distance(start, end), u, v, t });
  }
  if (legs.length === 0) return { ok: false, message: "all points of the path coincide" };
  return { ok: true, frames: { legs, bevelled, zeroSegments } };
}

export type OffsetPath = { ok: true; points: Vector[] } | { ok: false; message: string };

/**
 * The line at offset (p, q) along u and v (m) of a path: mitred in the bisector plane of each bend, straight across where
 * the bend is bevelled. Refused where a mitre would reverse a leg.
 */
export function offsetPath(frames: SectionFrames, p: number, q: number): OffsetPath {
  const { legs, bevelled } = frames;
  const points: Vector[] = [];
  let startShift = 0;
  for (const [index, leg] of legs.entries()) {
    const offset = add(scale(leg.u, p), scale(leg.v, q));
    const next = legs[index + 1];
    const endShift = next && !bevelled[index] ? -dot(offset, next.t) / (1 + dot(leg.t, next.t)) : 0;
    if (leg.lengthM + endShift - startShift < 0) {
      const message = `the leg from ${text(leg.start)} to ${text(leg.end)} is too short for the bends at its ends: a mitred conductor would run backwards`;
      return { ok: false, message };
    }
    if (index === 0 || bevelled[index - 1]) points.push(along(add(leg.start, offset), leg.t, startShift));
    points.push(along(add(leg.end, offset), leg.t, endShift));
    startShift = bevelled[index] ? 0 : -endShift;
  }
  return { ok: true, points };
}

/** The leg nearest to a point and the distance, metres. Legs are never empty. */
export function nearestLeg(legs: readonly Leg[], at: Vector): { leg: Leg; distanceM: number } {
  let best: { leg: Leg; distanceM: number } | null = null;
  for (const leg of legs) {
    const share = Math.min(leg.lengthM, Math.max(0, dot(subtract(at, leg.start), leg.t)));
    const distanceM = distance(at, along(leg.start, leg.t, share));
    if (!best || distanceM < best.distanceM) best = { leg, distanceM };
  }
  if (!best) throw new RangeError("a path without legs has no nearest leg");
  return best;
}

function cleanPoints(path: readonly Vector[]): { points: Vector[]; zeroSegments: number } {
  const points: Vector[] = [];
  let zeroSegments = 0;
  for (const point of path) {
    const last = points[points.length - 1];
    if (last && distance(last, point) <= COINCIDENT_M) {
      zeroSegments += 1;
      continue;
    }
    const beforeLast = points[points.length - 2];
    if (last && beforeLast && isCollinear(subtract(last, beforeLast), subtract(point, last))) points.pop();
    points.push(point);
  }
  return { points, zeroSegments };
}

function isCollinear(a: Vector, b: Vector): boolean {
  return dot(a, b) > 0 && length(cross(a, b)) <= COLLINEAR_RAD * length(a) * length(b);
}

function isReversal(t: Vector, next: Vector): boolean {
  return dot(t, next) < 0 && length(cross(t, next)) <= REVERSAL_RAD;
}

function firstFrame(t: Vector): { u: Vector; v: Vector } {
  const vertical = Math.abs(t[2]) >= VERTICAL_COSINE;
  const u = vertical ? unit(along([1, 0, 0], t, -t[0])) : unit([t[1], -t[0], 0]);
  return { u, v: cross(u, t) };
}

function turned(before: Leg, t: Vector): { u: Vector; v: Vector } {
  const axis = cross(before.t, t);
  const divisor = 1 + dot(before.t, t);
  const rotated = add(
    add(before.u, cross(axis, before.u)),
    scale(cross(axis, cross(axis, before.u)), 1 / divisor),
  );
  const u = unit(along(rotated, t, -dot(rotated, t)));
  return { u, v: cross(u, t) };
}

function text(at: Vector): string {
  return `(${at.map((value) => Number(value.toFixed(3))).join(", ")})`;
}
