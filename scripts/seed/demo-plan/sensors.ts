import type { SensorInput } from "../../../src/domain/plan-document/sensor";

/** The compass of a vehicle that stands in a dock; its heading is taken there before it drives off. */
const dock = (number: number): SensorInput => ({
  id: `dock-${String(number)}`,
  name: `Compass, dock ${String(number)}`,
  position: [26 + 3 * number, 2, 0.85],
  positionToleranceM: 0.02,
  limits: [
    { id: "heading", kind: "heading", limitDeg: 1 },
    { id: "dc", kind: "static", limitT: 2e-6 },
  ],
});

const bench = (number: number, x: number): SensorInput => ({
  id: `hall-${String(number)}`,
  name: `Hall probe H${String(number)}`,
  position: [x, 26.1, 0.95],
  positionToleranceM: 0.01,
  limits: [
    { id: "dc", kind: "static", limitT: 10e-6 },
    { id: "ac", kind: "alternating", limitT: 0.2e-6, bandHz: [10, 1000] },
  ],
});

export const sensors: SensorInput[] = [
  ...[1, 2, 3, 4, 5, 6].map(dock),
  {
    id: "turntable",
    name: "Reference magnetometer, turntable",
    position: [38, 8.6, 1.1],
    positionToleranceM: 0.01,
    limits: [
      { id: "dc", kind: "static", limitT: 0.1e-6 },
      { id: "ac", kind: "alternating", limitT: 0.1e-6, bandHz: [10, 1000] },
    ],
  },
  {
    id: "lane",
    name: "Vehicle detector, west lane",
    position: [27.4, 6, 0.05],
    positionToleranceM: 0.02,
    limits: [{ id: "swing", kind: "swing", limitT: 1e-6 }],
  },
  {
    id: "pillar",
    name: "Fluxgate pillar P1",
    position: [5.3, 24.8, 1.3],
    positionToleranceM: 0.005,
    limits: [
      { id: "dc", kind: "static", limitT: 10e-9 },
      { id: "ac", kind: "alternating", limitT: 1e-9, bandHz: [1, 1000] },
    ],
  },
  bench(1, 17.5),
  bench(2, 23.5),
  bench(3, 29.5),
  bench(4, 35.5),
  {
    id: "microscope",
    name: "Scanning microscope, column",
    position: [40.2, 25.7, 1.2],
    positionToleranceM: 0.02,
    limits: [
      { id: "ac", kind: "alternating", limitT: 0.3e-6, bandHz: [10, 1000], measure: "peakToPeak" },
      { id: "swing", kind: "swing", limitT: 0.3e-6 },
    ],
  },
  {
    id: "reed",
    name: "Reed contact, riser shaft door",
    position: [17.3, 3.6, 2],
    limits: [
      { id: "dc", kind: "static", limitT: 1e-3 },
      { id: "ac", kind: "alternating", limitT: 1e-3, bandHz: [10, 1000] },
    ],
  },
];
