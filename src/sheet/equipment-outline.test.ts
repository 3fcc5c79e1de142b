import { describe, expect, it } from "vitest";
import type { Coil, Dipole } from "~/domain/plan-document/equipment";
import { outlineOf, shownAxis } from "./equipment-outline";
import { boundsOf } from "./geometry";

const common = { id: "e", name: "Reel", source: null, tolerancePercent: 0, shieldingFactor: 1 };
const coil = (axis: [number, number, number]): Coil => ({
  ...common,
  kind: "coil",
  centre: [2, 3, 1],
  turns: 10,
  radiusM: 0.5,
  lengthM: 0.2,
  axis,
  supply: { kind: "dc", currentA: 1 },
});

describe("the outline of equipment", () => {
  it("is a circle from above where the coil stands upright, and its side where it lies", () => {
    const round = boundsOf(outlineOf(coil([0, 0, 2]), "from above") ?? []);
    expect(round?.maxX).toBeCloseTo(2.5);
    expect(round?.maxY).toBeCloseTo(3.5);
    const lying = boundsOf(outlineOf(coil([1, 0, 0]), "from above") ?? []);
    expect(lying?.maxX).toBeCloseTo(2.1);
    expect(lying?.maxY).toBeCloseTo(3.5);
    const upright = boundsOf(outlineOf(coil([0, 0, 1]), { along: [1, 0] }) ?? []);
    expect(upright?.maxX).toBeCloseTo(2.5);
    expect(upright?.maxY).toBeCloseTo(1.1);
  });

  it("shows an axis in the picture, out of it or into it", () => {
    expect(shownAxis(coil([0, 0, 1]), "from above")).toMatchObject({ part: 0, towards: true });
    expect(shownAxis(coil([0, 0, -3]), "from above")).toMatchObject({ part: 0, towards: false });
    expect(shownAxis(coil([0, 2, 0]), "from above")).toMatchObject({ direction: [0, 1], part: 1 });
    // Looking along +y at a slice along +x: an axis along −y comes towards the eye.
    expect(shownAxis(coil([0, -1, 0]), { along: [1, 0] })).toMatchObject({ part: 0, towards: true });
  });

  it("is none for a dipole, whose size and direction nobody knows", () => {
    const dipole: Dipole = {
      ...common,
      kind: "dipole",
      centre: [0, 0, 0],
      reading: { distanceM: 1, fieldT: 1e-6 },
      frequencyHz: 0,
      direction: null,
    };
    expect(outlineOf(dipole, "from above")).toBeNull();
    expect(shownAxis(dipole, "from above")).toBeNull();
  });
});
