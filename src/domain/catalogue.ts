import type { LimitInput } from "./plan-document/sensor";

/** A kind of device with the limits that a new sensor starts with. */
export interface SensorKind {
  id: string;
  name: string;
  limits: LimitInput[];
  /** Where the figures come from. */
  source: string;
}

/** Shown beside every default limit. */
export const MAKERS_FIGURE_REMARK =
  "A starting figure for this kind of device. The maker's figure for the instrument at hand replaces it.";

export const SENSOR_KINDS: readonly SensorKind[] = [
  {
    id: "electronic-compass",
    name: "Electronic compass",
    limits: [{ kind: "static", limitT: 2e-6 }],
    source: "2 µT: hardware application note for an electronic compass, table of trace distances",
  },
  {
    id: "fluxgate-pillar",
    name: "Fluxgate pillar",
    limits: [
      { kind: "static", limitT: 10e-9 },
      { kind: "alternating", limitT: 1e-9, bandHz: [1, 1000] },
    ],
    source: "10 nT static, 1 nT alternating: trade practice, from memory",
  },
  {
    id: "magnetoresistive",
    name: "Magnetoresistive sensor",
    limits: [{ kind: "static", limitT: 0.5e-6 }],
    source: "0.5 µT, anisotropic or tunnel magnetoresistive: trade practice, from memory",
  },
  {
    id: "hall-probe-bench",
    name: "Hall probe, bench",
    limits: [{ kind: "static", limitT: 10e-6 }],
    source: "10 µT: trade practice, from memory",
  },
  {
    id: "reed-contact",
    name: "Reed contact",
    limits: [{ kind: "static", limitT: 1e-3 }],
    source: "1 mT, the low end of 1 to 5 mT: trade practice, from memory",
  },
  {
    id: "vehicle-detector",
    name: "Floor vehicle detector",
    limits: [{ kind: "swing", limitT: 0.1e-6 }],
    source: "Drift of 0.1 µT, the low end of 0.1 to 1 µT: trade practice, from memory",
  },
  {
    id: "proton-magnetometer",
    name: "Proton magnetometer",
    limits: [{ kind: "gradient", limitTPerM: 600e-9 }],
    source: "Stops working above 600 nT/m: maker's published figure",
  },
  {
    id: "electron-microscope",
    name: "Electron microscope room",
    limits: [{ kind: "alternating", limitT: 20e-9, bandHz: [10, 1000] }],
    source: "10 to 20 nT alternating: published room requirements",
  },
  {
    id: "scanning-microscope",
    name: "Scanning electron microscope",
    limits: [{ kind: "alternating", limitT: 0.1e-6, bandHz: [10, 1000], measure: "peakToPeak" }],
    source: "0.1 µT peak to peak, the low end of 0.1 to 2 µT: published room requirements",
  },
  {
    id: "picture-tube",
    name: "Picture tube",
    limits: [{ kind: "alternating", limitT: 0.6e-6, bandHz: [45, 65] }],
    source: "Jitter visible from 0.6 to 1.1 µT at 50 Hz: published observation",
  },
];

/** A conductor of round stranded wire, IEC 60228 class 2. */
export interface ConductorSize {
  crossSectionMm2: number;
  radiusM: number;
  source: string;
}

const CLASS_2 = "IEC 60228 class 2";
const FROM_MEMORY = "IEC 60228 class 2, middle of the usual range, from memory";

const size = (crossSectionMm2: number, diameterMm: number, source: string): ConductorSize => ({
  crossSectionMm2,
  radiusM: diameterMm / 2000,
  source,
});

/** Ascending by cross-section. */
export const CONDUCTOR_SIZES: readonly ConductorSize[] = [
  size(1.5, 1.6, FROM_MEMORY),
  size(2.5, 2.0, FROM_MEMORY),
  size(4, 2.5, FROM_MEMORY),
  size(6, 3.1, FROM_MEMORY),
  size(10, 4.0, FROM_MEMORY),
  size(16, 5.0, FROM_MEMORY),
  size(25, 6.0, FROM_MEMORY),
  size(35, 6.9, CLASS_2),
  size(50, 8.0, CLASS_2),
  size(70, 9.8, CLASS_2),
  size(95, 11.4, CLASS_2),
  size(120, 13.0, FROM_MEMORY),
  size(150, 14.5, FROM_MEMORY),
  size(185, 16.2, FROM_MEMORY),
  size(240, 18.5, FROM_MEMORY),
  size(300, 20.8, FROM_MEMORY),
  size(400, 23.8, FROM_MEMORY),
  size(500, 26.7, FROM_MEMORY),
  size(630, 30.9, FROM_MEMORY),
];

/** Outer diameter of a single-core 0.6/1 kV cable, metres, by cross-section: the least axis-to-axis spacing. From memory. */
const OUTER_DIAMETER_M: readonly (readonly [crossSectionMm2: number, diameterM: number])[] = [
  [70, 0.017],
  [120, 0.02],
  [240, 0.027],
  [400, 0.033],
  [630, 0.041],
];

/**
 * Radius of the conductor of a cross-section in mm²; between listed sizes the round conductor of the same filling.
 * Null for what is no cross-section.
 */
export function conductorRadiusM(crossSectionMm2: number): number | null {
  if (!(crossSectionMm2 > 0) || !Number.isFinite(crossSectionMm2)) return null;
  const listed = CONDUCTOR_SIZES.find((entry) => Math.abs(entry.crossSectionMm2 - crossSectionMm2) < 1e-9);
  return listed?.radiusM ?? Math.sqrt(crossSectionMm2 / (Math.PI * FILLING)) / 1000;
}

/** Copper per area of the circle around a stranded conductor; 95 mm² in 11.4 mm gives 0.93. */
const FILLING = 0.93;

/** Usual axis-to-axis spacing of touching single-core cables, metres: listed sizes, straight lines between them. */
export function touchingSpacingM(crossSectionMm2: number): number | null {
  const radiusM = conductorRadiusM(crossSectionMm2);
  if (radiusM === null) return null;
  const above = OUTER_DIAMETER_M.findIndex(([listed]) => listed >= crossSectionMm2);
  const upper = OUTER_DIAMETER_M[above];
  const lower = OUTER_DIAMETER_M[above - 1];
  if (!upper) return 2 * radiusM + 0.01;
  if (!lower) return 2 * radiusM + (upper[1] - 0.0098);
  return lower[1] + ((upper[1] - lower[1]) * (crossSectionMm2 - lower[0])) / (upper[0] - lower[0]);
}

export function sensorKind(id: string): SensorKind | undefined {
  return SENSOR_KINDS.find((kind) => kind.id === id);
}
