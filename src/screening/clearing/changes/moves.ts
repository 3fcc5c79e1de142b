import type { ChangeKind } from "~/domain/clearing";
import { isSingle } from "~/domain/plan-document/arrangement-fits";
import type { Circuit, Route } from "~/domain/plan-document/circuit";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { formatNumber } from "~/domain/format";
import { add, type Vector } from "~/field/vector";
import { bearingDeg } from "../rays";
import { called, type Proposal } from "./proposal";

const STEP_M = 0.5;

interface Move {
  kind: ChangeKind;
  by: Vector;
  words: (what: string) => string;
}

/** A route with all that lies in it, half a metre up, down and sideways. */
export function routeMoves(document: PlanDocument, route: Route): Proposal[] {
  const members = document.circuits.filter((circuit) => circuit.route?.id === route.id);
  const movesSingles = members.some(({ arrangement }) => isSingle(arrangement));
  return movesOf(document, route.path).map(({ kind, by, words }) => ({
    kind,
    words: words(`${called(route)} with all that lies in it`),
    ids: [route.id, ...members.map(({ id }) => id)],
    patch: { circuits: [], routes: [{ ...route, path: moved(route.path, by) }] },
    movesSingles,
  }));
}

/** A circuit on a path of its own, half a metre up, down and sideways. A single conductor is not moved away from its way back. */
export function circuitMoves(document: PlanDocument, circuit: Circuit): Proposal[] {
  const { path } = circuit;
  if (!path || isSingle(circuit.arrangement)) return [];
  return movesOf(document, path).map(({ kind, by, words }) => ({
    kind,
    words: words(called(circuit)),
    ids: [circuit.id],
    patch: { circuits: [{ ...circuit, path: moved(path, by) }], routes: [] },
    movesSingles: false,
  }));
}

function movesOf(document: PlanDocument, path: readonly Vector[]): Move[] {
  const lowest = Math.min(...path.map(([, , z]) => z));
  const raise: Move = {
    kind: "raise",
    by: [0, 0, STEP_M],
    words: (what) => `Raise ${what} by ${step}`,
  };
  const lower: Move = {
    kind: "lower",
    by: [0, 0, -STEP_M],
    words: (what) => `Lower ${what} by ${step}`,
  };
  // Nothing is lowered through the finished floor.
  const throughFloor = lowest >= 0 && lowest < STEP_M;
  return [raise, ...(throughFloor ? [] : [lower]), ...sideways(document, path)];
}

const step = `${formatNumber(STEP_M, 1)}\u00a0m`;

function sideways({ frame }: PlanDocument, path: readonly Vector[]): Move[] {
  const across = acrossLongest(path);
  return across.map((by) => {
    const bearing = Math.round(bearingDeg([0, 0, 0], by, frame.northBearingDeg) ?? 0) % 360;
    const towards = `towards ${String(bearing).padStart(3, "0")}° true`;
    return { kind: "sideways", by, words: (what) => `Move ${what} sideways by ${step}, ${towards}` };
  });
}

/** Both ways across the leg that is longest in the plan; for a riser along x and y. */
function acrossLongest(path: readonly Vector[]): Vector[] {
  let longestM = 1e-6;
  let direction: [number, number] | null = null;
  path.forEach(([x, y], index) => {
    const next = path[index + 1];
    if (!next) return;
    const lengthM = Math.hypot(next[0] - x, next[1] - y);
    if (lengthM <= longestM) return;
    longestM = lengthM;
    direction = [(next[0] - x) / lengthM, (next[1] - y) / lengthM];
  });
  const ways: [number, number][] = direction
    ? [[direction[1], -direction[0]]]
    : [
        [1, 0],
        [0, 1],
      ];
  return ways.flatMap(([x, y]): Vector[] => [
    [STEP_M * x, STEP_M * y, 0],
    [-STEP_M * x, -STEP_M * y, 0],
  ]);
}

/** To a tenth of a millimetre, so that a plan does not fill with digits. */
const moved = (path: readonly Vector[], by: Vector): [number, number, number][] =>
  path.map((at) => add(at, by).map((value) => Number(value.toFixed(4))) as [number, number, number]);
