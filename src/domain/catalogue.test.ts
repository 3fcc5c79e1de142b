import { describe, expect, it } from "vitest";
import { conductorRadiusM, SENSOR_KINDS, touchingSpacingM } from "./catalogue";
import { limit } from "./plan-document/sensor";

describe("catalogue", () => {
  it("offers limits that a plan document takes", () => {
    for (const kind of SENSOR_KINDS) {
      for (const entry of kind.limits) expect(limit.safeParse(entry).success).toBe(true);
      expect(kind.source).not.toBe("");
    }
  });

  it("gives IEC 60228 class 2 radii and a filling between them", () => {
    expect(conductorRadiusM(95)).toBe(0.0057);
    expect(conductorRadiusM(80)).toBeGreaterThan(0.0049);
    expect(conductorRadiusM(80)).toBeLessThan(0.0057);
    expect(conductorRadiusM(0)).toBeNull();
    expect(conductorRadiusM(NaN)).toBeNull();
  });

  it("never lets touching cables overlap", () => {
    for (const mm2 of [1.5, 10, 35, 70, 95, 240, 500, 630, 800]) {
      expect(touchingSpacingM(mm2)).toBeGreaterThan(2 * (conductorRadiusM(mm2) ?? Infinity));
    }
    expect(touchingSpacingM(240)).toBe(0.027);
  });
});
