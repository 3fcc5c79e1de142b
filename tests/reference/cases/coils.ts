import { sectionFrames } from "~/field/section-frames";
import { loopField } from "~/field/loop";
import { twistedSet } from "~/field/twisted-pair";
import type { Vector } from "~/field/vector";
import { MU_0 } from "~/domain/units";
import { STATIC, valueOf } from "../engine";
import type { ReferenceCase } from "../reference-case";

const onAxis = (radiusM: number, zM: number, currentA: number) => currentA * loopField(radiusM, 0, zM).axial;

/** Field (T) in the middle of a coil through the whole engine. */
const coilT = (turns: number, radiusM: number, lengthM: number, currentA: number) =>
  valueOf([], [0, 0, 0], [STATIC], {
    equipment: [
      {
        id: "coil",
        name: "Coil",
        kind: "coil",
        turns,
        radiusM,
        lengthM,
        centre: [0, 0, 0],
        axis: [0, 0, 1],
        supply: { kind: "dc", currentA },
      },
    ],
  });

/** Field (T/A) of a twisted pair of spacing 20 mm and lay 0.2 m in cylindrical components at (r, φ, z), 1 A. */
function twistedField(r: number, phiRad: number, z: number): number[] {
  const layM = 0.2;
  const half = 6.5;
  // The path runs along z with u = +x, v = −y; the go conductor lies at +x where z is a whole number of lays.
  const framed = sectionFrames([
    [0, 0, -half * 10 * layM],
    [0, 0, half * 10 * layM],
  ]);
  if (!framed.ok) throw new Error(framed.message);
  const { legs } = framed.frames;
  const at: Vector = [r * Math.cos(phiRad), r * Math.sin(phiRad), z];
  const sum = new Float64Array(3);
  for (const side of [1, -1]) {
    const set = twistedSet([{ legs, p: side * 0.01, q: 0, layM, radiusM: 1e-6, share: side }]);
    set.addField(...at, sum, 0);
  }
  const [x, y, axial] = [sum[0] ?? 0, sum[1] ?? 0, sum[2] ?? 0];
  const [cos, sin] = [Math.cos(phiRad), Math.sin(phiRad)];
  return [x * cos + y * sin, y * cos - x * sin, axial];
}

const HELIX =
  "bifilar helix series with I_n' and K_n (Moser and Spencer 1968; Haber 1974; Pettersson and Schönborg 1997)";

export const COILS: ReferenceCase[] = [
  {
    id: "LP1",
    source: "OpenStax University Physics vol. 2, module m58464, two loops",
    from: "opened",
    geometry: "coaxial loops of 0.50 m and 1.00 m, 10 mA opposed, 0.25 m and 0.75 m from their centres",
    unit: "T",
    expected: [5.77e-9],
    tolerance: 1e-11,
    compute: () => [onAxis(0.5, 0.25, 0.01) - onAxis(1, 0.75, 0.01)],
  },
  {
    id: "LP2",
    source: "OpenStax University Physics vol. 2, module m58464",
    from: "opened",
    geometry: "loop of 6.0 A with 200 µT at its centre: its radius",
    unit: "m",
    expected: [0.019],
    tolerance: 5e-4,
    // The centre field goes as 1/radius.
    compute: () => [onAxis(1, 0, 6) / 2e-4],
  },
  {
    id: "LP8",
    source: "off-axis loop in complete elliptic integrals (Smythe; Jackson)",
    from: "memory",
    geometry: "loop of 0.5 m, 1 A, ρ = 0.7 m, z = 0.3 m: B_ρ, B_z",
    unit: "T",
    expected: [2.99244571886263e-7, -1.900583967328397e-8],
    tolerance: 1e-14,
    compute: () => {
      const { radialSlope, axial } = loopField(0.5, 0.7, 0.3);
      return [radialSlope * 0.7, axial];
    },
  },
  {
    id: "SO1",
    source: "OpenStax University Physics vol. 2, module m58466, solenoid",
    from: "opened",
    geometry: "300 turns, 12.0 mm across, 140 mm long, 0.410 A, centre",
    unit: "T",
    expected: [0.0011],
    tolerance: 5e-6,
    compute: () => [coilT(300, 0.006, 0.14, 0.41)],
  },
  {
    id: "SO3",
    source: "OpenStax University Physics vol. 2, module m58466",
    from: "opened",
    geometry: "long solenoid, 2000 turns a metre, 5.2 A (here 4 m long, 20 mm across)",
    unit: "T",
    expected: [0.013],
    tolerance: 5e-4,
    compute: () => [coilT(8000, 0.01, 4, 5.2)],
  },
  {
    id: "TW1-r0.1",
    source: HELIX,
    from: "memory (form), verified",
    geometry: "helix radius 10 mm, lay 0.2 m, 1 A, r = 0.1 m, φ = 0.3, z = 0.02 m: B_r, B_φ, B_z",
    unit: "T",
    expected: [5.3292667795140767e-8, 4.187975574993318e-8, -1.3149562458003023e-7],
    tolerance: 6.574781229001512e-10,
    compute: () => twistedField(0.1, 0.3, 0.02),
  },
  {
    id: "TW1-r0.3",
    source: HELIX,
    from: "memory (form), verified",
    geometry: "helix radius 10 mm, lay 0.2 m, 1 A, r = 0.3 m, φ = 1.1, z = 0.05 m: B_r, B_φ, B_z",
    unit: "T",
    expected: [6.720610259900643e-11, 1.3258148182642592e-11, -1.2486494516420458e-10],
    tolerance: 6.243247258210229e-13,
    compute: () => twistedField(0.3, 1.1, 0.05),
  },
  {
    id: "TW2",
    source: "Moser and Spencer, IEEE Trans. EMC 1968, abstract",
    from: "opened",
    geometry: "twisted pair at 1.5 lays: largest field relative to a parallel pair of the same spacing",
    unit: "dB",
    expected: [-50],
    tolerance: 0.5,
    compute: () => {
      const sizes = Array.from({ length: 24 }, (_, i) =>
        Math.hypot(...twistedField(0.3, (i * Math.PI) / 12, 0)),
      );
      const parallel = (MU_0 * 0.02) / (2 * Math.PI * 0.09);
      return [20 * Math.log10(Math.max(...sizes) / parallel)];
    },
  },
];
