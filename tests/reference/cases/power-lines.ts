import type { PlanDocumentInput } from "~/domain/plan-document/plan-document";
import { ALTERNATING, FAR_M, valueOf } from "../engine";
import type { ReferenceCase } from "../reference-case";

type CircuitInput = PlanDocumentInput["circuits"][number];

/** Alternating field (µT, rms resultant) of a long straight circuit along y, at x and at a height above or below it. */
function besideUT(
  arrangement: CircuitInput["arrangement"],
  supply: CircuitInput["supply"],
  xM: number,
  heightM: number,
): number {
  const path: [number, number, number][] = [
    [0, -FAR_M, 0],
    [0, FAR_M, 0],
  ];
  return valueOf([{ path, arrangement, supply }], [xM, 0, heightM], [ALTERNATING]) * 1e6;
}

const threePhase = (currentA: number) => ({ kind: "ac3" as const, currentA, frequencyHz: 50 });
const BURIED = { kind: "flat" as const, spacingM: 0.5 };
const aboveCable = (xM: number) => besideUT(BURIED, threePhase(1000), xM, 1.9);

const directBuried = (xM: number, expected: number): ReferenceCase => ({
  id: `AC2-${xM}m`,
  source: "EMFs.info, UK electricity industry information site, page on 275 kV underground cables",
  from: "opened",
  geometry: `275 kV, three cores direct buried, 0.5 m apart and 0.9 m deep, 1 m above ground, ${xM} m aside, as ratio to 96.17 µT above it`,
  unit: "µT",
  expected: [expected],
  // The page claims its figures to a few percent only.
  tolerance: 0.03 * expected,
  compute: () => [(96.17 * aboveCable(xM)) / aboveCable(0)],
});

export const POWER_LINES: ReferenceCase[] = [
  directBuried(5, 13.05),
  directBuried(10, 3.58),
  directBuried(20, 0.92),
  {
    id: "OH1",
    source: "Energiforsk, questions and answers on fields of lines: 0.35 I d/s² µT",
    from: "opened",
    // The page's own example, 70 m from phases 5 m apart, is the rule rounded up once more; far away the rule alone is held.
    geometry: "flat line, phases 5 m apart, 350 A, 200 m from its middle: the rule's factor",
    unit: "µT m/A",
    expected: [0.35],
    tolerance: 0.005,
    compute: () => [
      (besideUT({ kind: "flat", spacingM: 5 }, threePhase(350), 0, 200) * 200 ** 2) / (350 * 5),
    ],
  },
  {
    id: "OH2",
    source: "exercise on two wires above ground, discussed at forum.allaboutcircuits.com, thread 162095",
    from: "opened",
    geometry: "go and return 1 m apart, 100 A rms at 60 Hz, 6 m above the point midway: peak",
    unit: "µT",
    expected: [0.78],
    tolerance: 0.005,
    compute: () => [
      Math.SQRT2 *
        besideUT({ kind: "pair", spacingM: 1 }, { kind: "ac1", currentA: 100, frequencyHz: 60 }, 0, -6),
    ],
  },
];
