import { readFileSync, writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { REFERENCE_CASES } from "./cases/all";
import { toleranceOf, type ReferenceCase } from "./reference-case";

const file = fileURLToPath(new URL("../../docs/method.md", import.meta.url));
const BEGIN = "<!-- published cases: made by tests/reference/method-table.test.ts -->";
const END = "<!-- end of published cases -->";

/** A figure to five digits; what the tolerance swallows whole is nought. */
const figure = (value: number, tolerance: number) =>
  Math.abs(value) < tolerance ? "0" : String(Number(value.toPrecision(5)));

function row(entry: ReferenceCase): string {
  const computed = entry.compute();
  const share = Math.max(
    ...computed.map((value, i) => Math.abs(value - (entry.expected[i] ?? NaN)) / toleranceOf(entry, i)),
  );
  const computedText = computed.map((value, i) => figure(value, toleranceOf(entry, i))).join("; ");
  const expectedText = entry.expected.map((value) => String(Number(value.toPrecision(5)))).join("; ");
  const cells = [
    entry.id,
    entry.source,
    entry.from,
    entry.geometry,
    `${expectedText} ${entry.unit}`,
    computedText,
  ];
  return `| ${[...cells, share.toFixed(1)].map((cell) => cell.replaceAll("|", "\\|")).join(" | ")} |`;
}

function table(): string {
  const head = "| Case | Source | Had | Geometry | Published | Computed | Difference / rounding |";
  return [head, "| --- | --- | --- | --- | --- | --- | --- |", ...REFERENCE_CASES.map(row)].join("\n");
}

describe("docs/method.md", () => {
  it("shows how well every published case is met (run with UPDATE_METHOD=1 to write it)", () => {
    const text = readFileSync(file, "utf8");
    const [before = "", rest = ""] = text.split(BEGIN);
    const [, after = ""] = rest.split(END);
    const wanted = `${before}${BEGIN}\n\n${table()}\n\n${END}${after}`;
    if (process.env["UPDATE_METHOD"]) writeFileSync(file, wanted);
    else expect(text).toBe(wanted);
  }, 60_000);
});
