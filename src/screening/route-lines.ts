import type { Route } from "~/domain/plan-document/circuit";
import type { DocumentFault } from "~/domain/plan-document/faults";
import type { ResolvedCircuit } from "~/domain/plan-document/resolved";
import {
  offsetPath,
  sectionFrames,
  type Leg,
  type OffsetPath,
  type SectionFrames,
} from "~/field/section-frames";

/** Framed routes, from which circuits take their centre lines. */
export interface RouteLines {
  /** The centre line of a circuit in its route's place; null where it has none or its route was refused. */
  lineOf(circuit: ResolvedCircuit): OffsetPath | null;
  legsOf(routeId: string): Leg[] | null;
}

/** Frames every route once; faults are added with their paths. */
export function routeLines(routes: readonly Route[], faults: DocumentFault[]): RouteLines {
  const framesById = new Map<string, SectionFrames>();
  routes.forEach((route, index) => {
    const framed = sectionFrames(route.path);
    if (framed.ok) framesById.set(route.id, framed.frames);
    else faults.push({ path: `routes[${index}].path`, message: framed.message });
  });
  return {
    lineOf: ({ route }) => {
      const frames = route && framesById.get(route.id);
      return frames ? offsetPath(frames, ...route.placeM) : null;
    },
    legsOf: (routeId) => framesById.get(routeId)?.legs ?? null,
  };
}
