import type { ClearPosition, SensorClearing } from "~/domain/clearing";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { distance, type Vector } from "~/field/vector";
import type { PreparedPlan } from "../prepared-plan";
import type { Steps } from "../steps";
import { MovableSensor } from "./candidate";
import { angleBetweenDeg, bearingDeg, pointOn, raysAround, turnedRay, type Ray } from "./rays";
import { isInRegion, regionOf, type Region } from "./region";

/** The first distance looked at, and by how much each next one is larger. */
const FIRST_M = 0.05;
const GROWTH = 1.1;
/** Distances are narrowed down to this, and suggestions rounded to full centimetres. */
const FINE_M = 0.004;
const ROUNDED_M = 0.01;
/** Suggestions at the sensor's height, and the angle that keeps them apart. */
const LEVEL_SUGGESTIONS = 3;
const APART_DEG = 60;
/** An oblique move is worth telling where it is this much shorter than one at the same height. */
const OBLIQUE_SHARE = 0.85;

interface Found {
  ray: Ray;
  distanceM: number;
}

/**
 * The nearest places at which a sensor is clear, a few that lie well apart: at its own height, straight up or down, and obliquely
 * where that is clearly nearer. Searched along rays outward, so that a clear pocket smaller than a tenth of its distance may be missed;
 * what is suggested was judged by the engine in full.
 */
export function* clearPositionsOf(
  document: PlanDocument,
  prepared: PreparedPlan,
  index: number,
): Steps<NonNullable<SensorClearing["positions"]>> {
  const sensor = new MovableSensor(document, prepared, index);
  const own = prepared.resolved.sensors[index];
  if (!own) throw new RangeError(`the document has no sensor number ${index}`);
  const region = regionOf(document, own);
  const found = yield* searchRays(sensor, region);
  const north = document.frame.northBearingDeg;
  const suggestions: ClearPosition[] = [];
  for (const entry of found) {
    yield { done: suggestions.length, total: found.length };
    const settled = settle(sensor, region, entry);
    if (settled)
      suggestions.push({ ...settled, bearingDeg: bearingDeg(own.position, settled.position, north) });
  }
  suggestions.sort((a, b) => a.distanceM - b.distanceM);
  const { kind, zoneName, fromHeightM, toHeightM, furthestM } = region;
  return { searched: { region: kind, zoneName, fromHeightM, toHeightM, furthestM }, suggestions };
}

function* searchRays(sensor: MovableSensor, region: Region): Steps<Found[]> {
  const level: Found[] = [];
  const vertical: Found[] = [];
  const oblique: Found[] = [];
  let live = raysAround();
  let beforeM = 0;
  const shells = Math.ceil(Math.log(region.furthestM / FIRST_M) / Math.log(GROWTH)) + 1;
  for (let shell = 0; shell < shells && live.length > 0; shell++) {
    const radiusM = FIRST_M * GROWTH ** shell;
    const clear: Found[] = [];
    for (const ray of live) {
      yield { done: shell, total: shells };
      if (isClear(sensor, region, ray, radiusM)) clear.push(nearestOn(sensor, region, ray, beforeM, radiusM));
    }
    clear.sort((a, b) => a.distanceM - b.distanceM);
    for (const entry of clear) {
      if (entry.ray.kind === "vertical") vertical.push(entry);
      else if (entry.ray.kind === "oblique") oblique.push(entry);
      else if (level.length < LEVEL_SUGGESTIONS && isApart(entry.ray, level)) level.push(entry);
    }
    const isOpen: Record<Ray["kind"], (ray: Ray) => boolean> = {
      level: (ray) => level.length < LEVEL_SUGGESTIONS && isApart(ray, level),
      vertical: () => vertical.length === 0,
      oblique: () => oblique.length === 0 && level.length === 0,
    };
    live = live.filter((ray) => isOpen[ray.kind](ray));
    beforeM = radiusM;
  }
  const [nearest] = level;
  if (nearest) level[0] = yield* turnedNearer(sensor, region, nearest);
  const [slope] = oblique;
  const worth = slope && (!nearest || slope.distanceM < OBLIQUE_SHARE * nearest.distanceM);
  return [...level, ...vertical.slice(0, 1), ...(worth ? [slope] : [])];
}

const isApart = (ray: Ray, from: readonly Found[]): boolean =>
  from.every((entry) => angleBetweenDeg(entry.ray, ray) >= APART_DEG - 1e-9);

function isClear(sensor: MovableSensor, region: Region, ray: Ray, distanceM: number): boolean {
  const at = pointOn(sensor.position, ray, distanceM);
  return isInRegion(region, at) && !sensor.isOverAt(at) && sensor.judgeAt(at).clear;
}

/** Narrows the boundary between a distance that is not clear and one that is; the outcome is clear. */
function nearestOn(sensor: MovableSensor, region: Region, ray: Ray, notM: number, clearM: number): Found {
  let [inner, outer] = [notM, clearM];
  while (outer - inner > FINE_M) {
    const middle = (inner + outer) / 2;
    if (isClear(sensor, region, ray, middle)) outer = middle;
    else inner = middle;
  }
  return { ray, distanceM: outer };
}

/** The nearest level suggestion with its bearing improved between the rays. */
function* turnedNearer(sensor: MovableSensor, region: Region, from: Found): Steps<Found> {
  let best = from;
  for (const stepDeg of [5, 2.5, 1.25]) {
    yield { done: 0, total: 1 };
    for (const byDeg of [stepDeg, -stepDeg]) {
      const ray = turnedRay(best.ray, byDeg);
      const nearer = best.distanceM - FINE_M;
      if (nearer <= 0 || !isClear(sensor, region, ray, nearer)) continue;
      best = nearestOn(sensor, region, ray, 0.9 * nearer, nearer);
      break;
    }
  }
  return best;
}

/** Rounds a place to full centimetres, a little further out where it has to be, and has the engine confirm it. */
function settle(
  sensor: MovableSensor,
  region: Region,
  { ray, distanceM }: Found,
): Omit<ClearPosition, "bearingDeg"> | null {
  const from = sensor.position;
  for (let outwards = 0; outwards < 6; outwards++) {
    const at = pointOn(from, ray, distanceM + outwards * ROUNDED_M);
    const position = roundedPlace(from, at);
    if (!isInRegion(region, position)) continue;
    const { clear, reach, butForWaiting } = sensor.verifyAt(position);
    if (!clear) continue;
    return {
      position: [...position],
      distanceM: distance(from, position),
      riseM: position[2] - from[2],
      reach,
      butForWaiting,
    };
  }
  return null;
}

/** What does not change stays exactly as it is. */
function roundedPlace(from: Vector, at: Vector): Vector {
  const rounded = (i: 0 | 1 | 2) =>
    Math.abs(at[i] - from[i]) < 1e-9 ? from[i] : Math.round(at[i] / ROUNDED_M) * ROUNDED_M;
  const clean = (value: number) => Number(value.toFixed(6));
  return [clean(rounded(0)), clean(rounded(1)), clean(rounded(2))];
}
