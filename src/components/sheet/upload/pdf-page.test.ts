import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { maxPixels, pdfScale } from "./pdf-page";

describe("a page of a PDF", () => {
  it("is rastered at 200 dpi where that fits, and never beyond what the server takes", () => {
    expect(pdfScale(595, 842)).toBeCloseTo(200 / 72);
    fc.assert(
      fc.property(
        fc.double({ min: 1, max: 15_000, noNaN: true }),
        fc.double({ min: 1, max: 15_000, noNaN: true }),
        (w, h) => {
          const scale = pdfScale(w, h);
          expect(Math.floor(w * scale) * Math.floor(h * scale)).toBeLessThanOrEqual(maxPixels);
          expect(scale).toBeGreaterThan(0);
        },
      ),
    );
  });
});
