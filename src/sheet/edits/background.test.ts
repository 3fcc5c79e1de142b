import { expect, it } from "vitest";
import { knownAs, staticOfKind } from "./background";

it("keeps a static background's magnitude when it is known otherwise", () => {
  expect(staticOfKind("magnitude", [3e-6, 4e-6, 0])).toBeCloseTo(5e-6, 12);
  expect(staticOfKind("vector", 5e-6)).toEqual([5e-6, 0, 0]);
  expect(knownAs(staticOfKind("vector", [1, 2, 3]))).toBe("vector");
  expect(staticOfKind("none", 1)).toBeNull();
});
