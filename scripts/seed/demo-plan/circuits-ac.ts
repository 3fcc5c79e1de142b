import type { CircuitInput } from "../../../src/domain/plan-document/circuit";

const mains = { frequencyHz: 50 };

/** Rises through the lobby's shaft and crosses to the main distribution. */
const riser: CircuitInput = {
  id: "riser-r1",
  name: "Riser R1",
  source: "mains",
  path: [
    [17.3, 0.73, -4],
    [17.3, 0.73, 2.8],
    [14, 0.73, 2.8],
    [14, 1.1, 2.2],
  ],
  arrangement: { kind: "quad", spacingM: 0.03 },
  conductorRadiusM: 0.00925,
  supply: { kind: "ac3", currentA: 400, ...mains, harmonics: [{ order: 3, percent: 6 }] },
  currentBasis: "measured",
  strayCurrentA: 0,
  strayToleranceA: 0.5,
  positionToleranceM: 0.05,
};

/** The neutral of this feeder is earthed a second time at bench D: part of it comes back through the frame. */
const hallFeeder: CircuitInput = {
  id: "hall-feeder",
  name: "Instrument hall feeder",
  source: "mains",
  route: { id: "tray-t2" },
  arrangement: { kind: "quad", spacingM: 0.022 },
  conductorRadiusM: 0.00345,
  supply: {
    kind: "ac3",
    currentA: 63,
    ...mains,
    harmonics: [
      { order: 3, percent: 22 },
      { order: 5, percent: 8 },
    ],
  },
  currentBasis: "measured",
  strayCurrentA: 1.4,
  strayToleranceA: 0.2,
  positionToleranceM: 0.05,
};

/** What stays on when the mains fail; the UPS makes its own phase then, so it is a source of its own. */
const upsOutput: CircuitInput = {
  id: "ups-output",
  name: "UPS A, output",
  source: "ups-a",
  path: [
    [10.05, 5.3, 2.1],
    [10.05, 5.3, 2.7],
    [12, 5.3, 2.7],
    [12, 1.1, 2.7],
    [12, 1.1, 2.2],
  ],
  arrangement: { kind: "trefoil", spacingM: 0.022 },
  conductorRadiusM: 0.0065,
  supply: { kind: "ac3", currentA: 160, ...mains },
  currentBasis: "rating-plate",
  strayCurrentA: 0,
  positionToleranceM: 0.05,
};

const benchSupply: CircuitInput = {
  id: "bench-supply",
  name: "Bench supplies, UPS backed",
  source: "ups-a",
  route: { id: "tray-t2", placeM: [0.15, 0] },
  arrangement: { kind: "pair", spacingM: 0.012 },
  conductorRadiusM: 0.00205,
  supply: { kind: "ac1", currentA: 25, ...mains, harmonics: [{ order: 3, percent: 20 }] },
  currentBasis: "load-list",
  strayCurrentA: 0,
  positionToleranceM: 0.05,
};

/** Single-core cables laid flat on brackets along the plant strip. */
const airHandling: CircuitInput = {
  id: "air-handling",
  name: "Air handling and pumps",
  source: "mains",
  path: [
    [44, 16.7, 2.4],
    [44, 27.6, 2.4],
    [45, 28, 1.4],
  ],
  arrangement: { kind: "flat", spacingM: 0.03 },
  conductorRadiusM: 0.0041,
  supply: { kind: "ac3", currentA: 80, ...mains, sequence: "abc" },
  currentBasis: "rating-plate",
  strayCurrentA: 0,
  positionToleranceM: 0.05,
};

/** A charger's input, along the tray to the charger on the test bay's north wall. */
function charger(number: number, x: number, offsetM: number): CircuitInput {
  return {
    id: `charger-${String(number)}`,
    name: `Charger CH ${String(number)}`,
    source: "mains",
    path: [
      [12 + offsetM, 1.9, 3.2],
      [12 + offsetM, 9.3 + offsetM, 3.2],
      [26.8 + offsetM, 9.3 + offsetM, 3.2],
      [26.8 + offsetM, 13.5 + offsetM, 3.2],
      [x, 13.5 + offsetM, 3.2],
      [x, 13.5 + offsetM, 1.5],
    ],
    arrangement: { kind: "quad", spacingM: 0.012 },
    conductorRadiusM: 0.00155,
    supply: {
      kind: "ac3",
      currentA: 32,
      ...mains,
      harmonics: [
        { order: 3, percent: 15 },
        { order: 5, percent: 6 },
      ],
    },
    currentBasis: "breaker",
    loadGroup: "vehicle-charging",
    positionToleranceM: 0.05,
  };
}

export const acCircuits: CircuitInput[] = [
  riser,
  hallFeeder,
  upsOutput,
  benchSupply,
  airHandling,
  charger(1, 28.45, -0.09),
  charger(2, 32.45, -0.03),
  charger(3, 38.05, 0.03),
  charger(4, 42.05, 0.09),
];
