import type { ConductorSet } from "./conductor-set";
import { addSegmentField, SEGMENT_STRIDE } from "./segment";
import { addSegmentGradient } from "./segment-gradient";
import type { Leg } from "./section-frames";
import { add, along, distance, dot, scale, subtract, type Vector } from "./vector";

/** A right-handed helix about a path: where it starts in the section and how it turns. */
export interface TwistedLine {
  legs: readonly Leg[];
  /** Place of the conductor in the section at the path's start, metres. */
  p: number;
  q: number;
  layM: number;
  radiusM: number;
  share: number;
}

/** Lays traced to either side of the stretch nearest to a point. */
const LAYS_TRACED = 10;
/** Lays at either end of the trace over which the spacing falls to nought. */
const LAYS_TAPERED = 5;
const CHORDS_PER_LAY = 48;

/**
 * One conductor of a twisted pair (several where sets are parallel). Outside the pair the field decays like exp(−2πr/lay), so the
 * helix is traced, by chords, only around the stretch nearest to each point; the spacing falls to zero by a cosine towards the
 * ends of the trace, where a cut would drown that field, and the rest of the path runs on its centre line.
 */
export function twistedSet(lines: readonly TwistedLine[]): ConductorSet {
  const scratch = new Float64Array(2 * SEGMENT_STRIDE * (2 * LAYS_TRACED * CHORDS_PER_LAY + 64));
  const each = (x: number, y: number, z: number, use: (rows: Float64Array, count: number) => void) => {
    for (const line of lines) {
      const needed = SEGMENT_STRIDE * (2 * LAYS_TRACED * CHORDS_PER_LAY + 8 + 2 * line.legs.length);
      const rows = needed <= scratch.length ? scratch : new Float64Array(needed);
      use(rows, traceRows(line, [x, y, z], rows));
    }
  };
  return {
    rows: null,
    addField: (x, y, z, out, at) =>
      each(x, y, z, (rows, count) => addSegmentField(rows, 0, count, x, y, z, out, at)),
    addGradient: (x, y, z, out, at) =>
      each(x, y, z, (rows, count) => addSegmentGradient(rows, 0, count, x, y, z, out, at)),
  };
}

/** Fills `rows` with the conductor as it is traced for a point; returns the number of segments. */
export function traceRows(line: TwistedLine, at: Vector, rows: Float64Array): number {
  let count = 0;
  let last: Vector | null = null;
  const go = (to: Vector) => {
    if (last && distance(last, to) > 0) {
      rows.set([...last, ...to, line.radiusM, line.share], SEGMENT_STRIDE * count);
      count += 1;
    }
    last = to;
  };
  const { from, until } = tracedStretch(line, at);
  const chords = Math.ceil(((until - from) / line.layM) * CHORDS_PER_LAY);
  let chord = 0;
  let legStart = 0;
  for (const leg of line.legs) {
    const legEnd = legStart + leg.lengthM;
    if (legStart <= from || legStart >= until) go(leg.start);
    for (; chord <= chords; chord++) {
      const s = from + ((until - from) * chord) / chords;
      if (s > legEnd && leg !== line.legs[line.legs.length - 1]) break;
      go(helixPoint(line, leg, s - legStart, s, taper(line, s, from, until)));
    }
    legStart = legEnd;
  }
  const end = line.legs[line.legs.length - 1]?.end;
  if (end) go(end);
  return count;
}

/** Arc lengths between which the helix is traced around the point of the path nearest to `at`. */
function tracedStretch({ legs, layM }: TwistedLine, at: Vector): { from: number; until: number } {
  let nearest = 0;
  let least = Infinity;
  let legStart = 0;
  for (const leg of legs) {
    const share = Math.min(leg.lengthM, Math.max(0, dot(subtract(at, leg.start), leg.t)));
    const away = distance(at, along(leg.start, leg.t, share));
    if (away < least) {
      least = away;
      nearest = legStart + share;
    }
    legStart += leg.lengthM;
  }
  const from = Math.max(0, nearest - LAYS_TRACED * layM);
  return { from, until: Math.min(legStart, nearest + LAYS_TRACED * layM) };
}

/** 1 in the middle of the trace, falling to 0 at its ends by a cosine. */
function taper({ layM }: TwistedLine, s: number, from: number, until: number): number {
  const over = Math.min(LAYS_TAPERED * layM, (until - from) / 2);
  const inward = Math.min(s - from, until - s);
  return inward >= over ? 1 : (1 - Math.cos((Math.PI * Math.max(0, inward)) / over)) / 2;
}

function helixPoint({ p, q, layM }: TwistedLine, leg: Leg, onLeg: number, s: number, size: number): Vector {
  const turn = (2 * Math.PI * s) / layM;
  const cos = Math.cos(turn);
  const sin = Math.sin(turn);
  // Right-handed about t carries u towards −v (v = u × t).
  const across = add(scale(leg.u, size * (p * cos + q * sin)), scale(leg.v, size * (q * cos - p * sin)));
  return add(along(leg.start, leg.t, onLeg), across);
}
