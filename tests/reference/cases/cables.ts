import { MU_0 } from "~/domain/units";
import type { PlanDocumentInput } from "~/domain/plan-document/plan-document";
import type { Vector } from "~/field/vector";
import { ALTERNATING, FAR_M, STATIC, valueOf } from "../engine";
import type { ReferenceCase } from "../reference-case";

type Arrangement = PlanDocumentInput["circuits"][number]["arrangement"];

const NORTHWARD: [number, number, number][] = [
  [0, -FAR_M, 0],
  [0, FAR_M, 0],
];

const HVDC = "EMFs.info, UK electricity industry information site, page on HVDC static fields";
const BURIED = "DC go and return, 2000 A, 0.5 m apart, 1 m deep, observer 1 m above ground";
const DIP_RAD = (65.33 * Math.PI) / 180;

const hvdc = {
  path: NORTHWARD,
  arrangement: { kind: "pair", spacingM: 0.5 } as const,
  supply: { kind: "dc", currentA: 2000 } as const,
};
const earthField = {
  mode: "stated",
  horizontalT: 50e-6 * Math.cos(DIP_RAD),
  verticalT: 50e-6 * Math.sin(DIP_RAD),
  declinationDeg: 0,
} as const;

const beside = (xM: number): Vector => [xM, 0, 2];
const hvdcCase = (
  id: string,
  xM: number,
  what: string,
  unit: string,
  expected: number,
  tolerance: number,
  compute: () => number,
): ReferenceCase => ({
  id,
  source: HVDC,
  from: "opened",
  geometry: `${BURIED}, ${xM} m aside: ${what}`,
  unit,
  expected: [expected],
  tolerance,
  compute: () => [compute()],
});

const staticUT = (xM: number) => valueOf([hvdc], beside(xM), [STATIC]) * 1e6;
const totalUT = (xM: number) =>
  valueOf([hvdc], beside(xM), [{ kind: "range", limitT: 1 }], { earthField }) * 1e6;
const deviationDeg = (xM: number) =>
  valueOf([hvdc], beside(xM), [{ kind: "heading", limitDeg: 1 }], { earthField });
const NORTH_SOUTH = "cable north to south in 50 µT, dip 65.33° (fitted to the printed 96.94 µT)";

const netUT = (xM: number) =>
  valueOf(
    [
      {
        path: NORTHWARD,
        arrangement: { kind: "single" },
        supply: { kind: "ac1", currentA: 47.6, frequencyHz: 50 },
      },
    ],
    [xM, 0, 1.9],
    [ALTERNATING],
  );
const singleCable = (id: string, xM: number, expected: number): ReferenceCase => ({
  id,
  source:
    "EMFs.info, UK electricity industry information site, pages on 132 kV and 275 kV underground cables",
  from: "opened",
  geometry: `132 kV single cable as one net current, ${xM} m aside, as ratio to 5.01 µT above it (height 1.90 m fitted)`,
  unit: "µT",
  expected: [expected],
  tolerance: 0.01,
  compute: () => [(5.01 * netUT(xM)) / netUT(0)],
});

/** Points around the origin at distances of 0.1 m to 2 m, spread by the golden angle. */
const AROUND = Array.from({ length: 200 }, (_, i) => {
  const r = 0.1 * 20 ** (i / 199);
  return [r * Math.cos(2.399963 * i), r * Math.sin(2.399963 * i)] as const;
});

const threePhaseT = (arrangement: Arrangement, x: number, z: number) =>
  valueOf(
    [{ path: NORTHWARD, arrangement, supply: { kind: "ac3", currentA: 100, frequencyHz: 50 } }],
    [x, 0, z],
    [ALTERNATING],
  );

const S = 0.03;
const flatT = (x: number, z: number) => {
  const [r, r1, r3] = [Math.hypot(x, z), Math.hypot(x + S, z), Math.hypot(x - S, z)];
  return (MU_0 * 100 * S * Math.sqrt(3 * r * r + S * S)) / (2 * Math.PI * r * r1 * r3);
};
const trefoilT = (x: number, z: number) => {
  const base = -S / (2 * Math.sqrt(3));
  const r = Math.hypot(x, z);
  const product =
    Math.hypot(x + S / 2, z - base) * Math.hypot(x - S / 2, z - base) * Math.hypot(x, z - S / Math.sqrt(3));
  return (MU_0 * 100 * Math.sqrt(3) * S * Math.sqrt((r * r + (S * S) / 3) / 2)) / (2 * Math.PI * product);
};
const worstError = (kind: "flat" | "trefoil", closedForm: (x: number, z: number) => number) => {
  const errors = AROUND.map(([x, z]) => threePhaseT({ kind, spacingM: S }, x, z) / closedForm(x, z) - 1);
  return Math.max(...errors.map(Math.abs));
};

const FAR_LAW = "far-field law (CIGRE TB 373; Pettersson)";
const farField = (kind: "pair" | "flat" | "trefoil", factor: number, law: string): ReferenceCase => ({
  id: `FF-${kind}`,
  source: `${FAR_LAW}: ${law}`,
  from: "memory",
  geometry: "spacing 0.1 m, 1 m away: smallest and largest ratio to the law over all angles",
  unit: "–",
  expected: [1, 1],
  tolerance: 0.025,
  compute: () => {
    const ratios = Array.from({ length: 36 }, (_, i) => {
      const [x, z] = [Math.cos((i * Math.PI) / 18), Math.sin((i * Math.PI) / 18)];
      const supply = kind === "pair" ? { kind: "ac1" as const } : { kind: "ac3" as const };
      const fieldT = valueOf(
        [
          {
            path: NORTHWARD,
            arrangement: { kind, spacingM: 0.1 },
            supply: { ...supply, currentA: 100, frequencyHz: 50 },
          },
        ],
        [x, 0, z],
        [ALTERNATING],
      );
      return fieldT / ((factor * MU_0 * 100 * 0.1) / (2 * Math.PI));
    });
    return [Math.min(...ratios), Math.max(...ratios)];
  },
});

const CLOSED_FORM =
  "derived; cf. Filippopoulos and Tsanakas, IEEE Trans. Power Delivery 20 (2005), analytical calculation of the field of power lines";

export const CABLES: ReferenceCase[] = [
  hvdcCase("DC1-0m", 0, "|B| of the cable", "µT", 49.23, 0.005, () => staticUT(0)),
  hvdcCase("DC1-10m", 10, "|B| of the cable", "µT", 1.92, 0.005, () => staticUT(10)),
  hvdcCase("DC2-0m", 0, `|B| in total, ${NORTH_SOUTH}`, "µT", 96.94, 0.02, () => totalUT(0)),
  hvdcCase("DC2-10m", 10, `|B| in total, ${NORTH_SOUTH}`, "µT", 48.4, 0.02, () => totalUT(10)),
  hvdcCase("DC3-10m", 10, `compass deviation, ${NORTH_SOUTH}`, "°", 2.0, 0.06, () => deviationDeg(10)),
  hvdcCase("DC3-20m", 20, `compass deviation, ${NORTH_SOUTH}`, "°", 0.3, 0.06, () => deviationDeg(20)),
  singleCable("AC1-5m", 5, 1.78),
  singleCable("AC1-20m", 20, 0.47),
  {
    id: "F1",
    source: CLOSED_FORM,
    from: "opened (abstract), form derived",
    geometry:
      "balanced flat group, spacing 30 mm: worst relative error against μ₀Is√(3r² + s²)/2πr r₁r₃, 0.1 m to 2 m",
    unit: "–",
    expected: [0],
    tolerance: 1e-9,
    compute: () => [worstError("flat", flatT)],
  },
  {
    id: "F2",
    source: CLOSED_FORM,
    from: "opened (abstract), form derived",
    geometry:
      "balanced trefoil, spacing 30 mm: worst relative error against μ₀I√3 s√((r² + s²/3)/2)/2πr₁r₂r₃",
    unit: "–",
    expected: [0],
    tolerance: 1e-9,
    compute: () => [worstError("trefoil", trefoilT)],
  },
  farField("pair", 1, "μ₀Is/2πr²"),
  farField("flat", Math.sqrt(3), "√3 μ₀Is/2πr²"),
  farField("trefoil", Math.sqrt(1.5), "√(3/2) μ₀Is/2πr²"),
];
