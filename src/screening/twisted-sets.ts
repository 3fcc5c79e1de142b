import type { Arrangement, Carrier } from "~/domain/plan-document/arrangement";
import { radians } from "~/domain/units";
import type { ConductorSet } from "~/field/conductor-set";
import { offsetPath, sectionFrames, type Leg, type SectionFrames } from "~/field/section-frames";
import { twistedSet, type TwistedLine } from "~/field/twisted-pair";
import { parallelSets, rolled } from "./slots";

/** One set per carrier of a twisted pair, each parallel set twisted about its own line; null where a line does not fit the bends. */
export function twistedSets(
  { spacingM, layM, rollDeg, ...rest }: Extract<Arrangement, { kind: "twisted-pair" }>,
  carriers: Carrier[],
  frames: SectionFrames,
  radiusM: number,
): ConductorSet[] | null {
  const rollRad = radians(rollDeg);
  const lines = parallelSets({ spacingM, layM, rollDeg, ...rest }).map(({ shiftM, share }) => {
    const centre = rolled({ p: shiftM, q: 0 }, rollRad);
    const legs = shiftedLegs(frames, centre.p, centre.q);
    return legs && { legs, share };
  });
  if (lines.some((line) => line === null)) return null;
  return carriers.map((carrier) => {
    const start = rolled({ p: carrier === "go" ? -spacingM / 2 : spacingM / 2, q: 0 }, rollRad);
    return twistedSet(
      lines.flatMap((line): TwistedLine[] => (line ? [{ ...line, ...start, layM, radiusM }] : [])),
    );
  });
}

function shiftedLegs(frames: SectionFrames, p: number, q: number): Leg[] | null {
  if (p === 0 && q === 0) return frames.legs;
  const line = offsetPath(frames, p, q);
  const framed = line.ok ? sectionFrames(line.points) : line;
  return framed.ok ? framed.frames.legs : null;
}
